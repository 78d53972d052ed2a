package physio

import "math"

// PaO2Bracket is the PaO2 foreseen at another FiO2 by the two ways a lung can
// be ill: a fixed shunt, which suits filled alveoli, and a fixed a/A, which
// suits scattered ventilation and perfusion. The truth usually lies between;
// even then a repeat gas differs by 15 to 20 mmHg (Chang 2019).
type PaO2Bracket struct {
	FixedShunt Pressure
	FixedRatio Pressure
}

// Interval gives the bracket with its middle as value, mmHg.
func (b PaO2Bracket) Interval() Interval {
	low, high := min(b.FixedShunt, b.FixedRatio).MmHg(), max(b.FixedShunt, b.FixedRatio).MmHg()
	return Interval{Value: (low + high) / 2, Low: low, High: high}
}

// PaO2AtFiO2 gives the PaO2 at another FiO2 with PaCO2, haemoglobin, cardiac
// output and airway pressure unchanged. To room air it promises nothing: units
// of low V/Q desaturate there.
func PaO2AtFiO2(known LungGas, fio2 Fraction) (PaO2Bracket, error) {
	if err := known.check(); err != nil {
		return PaO2Bracket{}, err
	}
	next := known.Gas
	next.FiO2 = fio2
	if err := next.check(); err != nil {
		return PaO2Bracket{}, err
	}
	if _, err := AlveolarPO2(next); err != nil {
		return PaO2Bracket{}, err
	}
	return pao2AtFiO2(known, float64(fio2)), nil
}

func pao2AtFiO2(known LungGas, fio2 float64) PaO2Bracket {
	known = known.filled()
	return PaO2Bracket{
		FixedShunt: MmHg(known.atFixedShunt(shuntFromGas(known), fio2)),
		FixedRatio: MmHg(known.atFixedRatio(fio2)),
	}
}

func (g LungGas) alveolarAt(fio2 float64) float64 {
	g.Gas.FiO2 = Fraction(fio2)
	return g.alveolar()
}

func (g LungGas) atFixedRatio(fio2 float64) float64 {
	return g.PaO2.MmHg() / g.alveolar() * g.alveolarAt(fio2) // Gilbert and Keighley 1974
}

// atFixedShunt finds the PO2 whose content is the capillary one less what the
// shunt takes away: Ca = Cc - D x S/(1 - S).
func (g LungGas) atFixedShunt(shunt, fio2 float64) float64 {
	alveolar := g.alveolarAt(fio2)
	arterial := g.capillary(alveolar) - float64(g.Difference)*shunt/(1-shunt) // Benatar 1973
	return g.po2OfContent(arterial, alveolar)
}

// po2OfContent inverts the content of blood between 1 mmHg and a PO2 above it.
func (g LungGas) po2OfContent(content, above float64) float64 {
	return math.Exp(bisect(func(lnP float64) float64 {
		p := math.Exp(lnP)
		return g.content(p, saturation(p, g.Shift)) - content
	}, 0, math.Log(above)))
}

// FiO2ForPaO2 gives the FiO2 at which the two models foresee a PaO2, as an
// interval from the milder to the harder one, the value in its middle. A PaO2
// that the harder model does not reach on pure oxygen is a RangeError with the
// PaO2 that it does reach as High.
func FiO2ForPaO2(known LungGas, target Pressure) (Interval, error) {
	if err := known.check(); err != nil {
		return Interval{}, err
	}
	if err := check(given{q: PaO2, v: target.MmHg()}); err != nil {
		return Interval{}, err
	}
	most, least := pao2AtFiO2(known, 1).Interval(), pao2AtFiO2(known, lowestFiO2).Interval()
	if target.MmHg() > most.Low || target.MmHg() < least.High {
		return Interval{}, &RangeError{Quantity: PaO2, Got: target.MmHg(), Low: least.High, High: most.Low}
	}
	return fio2ForPaO2(known, target.MmHg()), nil
}

// lowestFiO2 is air.
const lowestFiO2 = 0.21

func fio2ForPaO2(known LungGas, target float64) Interval {
	known = known.filled()
	s := shuntFromGas(known)
	byShunt := bisect(func(f float64) float64 { return known.atFixedShunt(s, f) - target }, lowestFiO2, 1)
	byRatio := bisect(func(f float64) float64 { return known.atFixedRatio(f) - target }, lowestFiO2, 1)
	low, high := min(byShunt, byRatio), max(byShunt, byRatio)
	return Interval{Value: (low + high) / 2, Low: low, High: high}
}
