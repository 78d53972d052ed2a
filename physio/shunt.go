package physio

// Arteriovenous differences that are assumed when no pulmonary artery sample
// exists, mL/dL.
const (
	DifferenceHealthy Content = 5.0 // Benatar 1973, iso-shunt lines
	DifferenceICU     Content = 3.5 // Harrison 1975, stable and ventilated
)

// Shunt gives the venous admixture Qs/Qt from measured contents; below 0.05 in
// health. It varies with the inspired oxygen: a pure shunt is told from low
// V/Q only on 100 % oxygen. Central venous blood is not mixed venous blood.
func Shunt(c Contents) (Fraction, error) {
	err := check(
		contentIn("capillary content", c.Capillary),
		contentIn("arterial content", c.Arterial), contentIn("venous content", c.Venous),
	)
	if err != nil {
		return 0, err
	}
	if c.Capillary <= c.Venous || c.Arterial <= c.Venous {
		return 0, &RangeError{Name: "venous content", Got: float64(c.Venous), Low: 0, High: float64(min(c.Capillary, c.Arterial))}
	}
	return Fraction(shunt(float64(c.Capillary), float64(c.Arterial), float64(c.Venous))), nil
}

func shunt(capillary, arterial, venous float64) float64 {
	return (capillary - arterial) / (capillary - venous) // Berggren 1942
}

// EstimatedShunt gives Qs/Qt with an assumed arteriovenous difference of 1 to
// 12 mL/dL in place of the venous content. Show the difference that was taken,
// and the range from 3.5 to 5.
func EstimatedShunt(c Contents, assumed Content) (Fraction, error) {
	err := check(
		contentIn("capillary content", c.Capillary), contentIn("arterial content", c.Arterial), assumedDifference(assumed),
	)
	if err != nil {
		return 0, err
	}
	return Fraction(estimatedShunt(float64(c.Capillary), float64(c.Arterial), float64(assumed))), nil
}

func assumedDifference(d Content) given {
	return given{name: "arteriovenous difference", v: float64(d), low: 1, high: 12}
}

func estimatedShunt(capillary, arterial, difference float64) float64 {
	return (capillary - arterial) / (capillary - arterial + difference) // Berggren 1942, rearranged
}

// ShuntOnPureOxygen gives Qs/Qt from the alveolar-arterial difference on 100 %
// oxygen, when arterial blood is fully saturated: it needs a PaO2 above 150.
func ShuntOnPureOxygen(t Tensions, assumed Content) (Fraction, error) {
	if err := t.check(); err != nil {
		return 0, err
	}
	err := check(assumedDifference(assumed), given{q: PaO2, v: t.Arterial.MmHg(), low: 150, high: t.Alveolar.MmHg()})
	if err != nil {
		return 0, err
	}
	dissolved := solubilityO2 * (t.Alveolar - t.Arterial).MmHg()
	return Fraction(dissolved / (dissolved + float64(assumed))), nil // Chiang 1968
}

// ShuntRuleOfThumb gives Qs/Qt as 1 % for each 20 mmHg of alveolar-arterial
// difference on 100 % oxygen.
func ShuntRuleOfThumb(difference Pressure) (Fraction, error) {
	if err := check(given{name: "A-a", v: difference.MmHg(), low: 0, high: 700}); err != nil {
		return 0, err
	}
	return Percent(difference.MmHg() / 20), nil // common practice
}

// LungGas is a blood gas with the oxygen it was drawn on, for the models of
// oxygen transfer.
type LungGas struct {
	Gas  AlveolarGas
	PaO2 Pressure
	// SaO2 is measured; 0 means that the curve at Shift gives it.
	SaO2 Fraction
	// Shift moves the curve. Its PaCO2 is taken from Gas.
	Shift CurveShift
	Hb    Haemoglobin // 0 means 15
	// Difference is the arteriovenous difference, 0 means DifferenceHealthy.
	Difference Content
}

// noise is by how many mmHg a PaO2 may lie above the alveolar PO2 before the
// inputs can not be of one moment.
const noise = 5

func (g LungGas) check() error {
	if err := g.Gas.check(); err != nil {
		return err
	}
	g = g.filled()
	if err := g.Shift.check(); err != nil {
		return err
	}
	return check(
		given{q: PaO2, v: g.PaO2.MmHg(), low: 10, high: max(g.alveolar()+noise, 10)},
		given{q: SaO2, v: float64(g.SaO2)}, given{q: Hb, v: float64(g.Hb)}, assumedDifference(g.Difference),
	)
}

func (g LungGas) filled() LungGas {
	g.Shift.PaCO2 = g.Gas.PaCO2
	if g.Hb == 0 {
		g.Hb = 15
	}
	if g.Difference == 0 {
		g.Difference = DifferenceHealthy
	}
	if g.SaO2 == 0 {
		g.SaO2 = Fraction(saturation(g.PaO2.MmHg(), g.Shift))
	}
	return g
}

func (g LungGas) alveolar() float64 {
	return alveolarPO2(float64(g.Gas.FiO2), g.Gas.PB.MmHg(), g.Gas.PaCO2.MmHg(), g.Gas.r(), g.Gas.water())
}

// content gives the content at a PO2 and a functional saturation. Dyshaemoglobin
// binds nothing in any of the three contents.
func (g LungGas) content(po2, sat float64) float64 {
	free := 1 - float64(g.Shift.COHb) - float64(g.Shift.MetHb)
	return BindingFunctional.content(float64(g.Hb), sat*free, po2)
}

func (g LungGas) capillary(alveolar float64) float64 {
	return g.content(alveolar, saturation(alveolar, g.Shift))
}

// ShuntFromGas gives the estimated venous admixture of one blood gas, with the
// end-capillary saturation from the curve at the alveolar PO2: taking it as
// 100 % below an alveolar PO2 of 150 would be the biggest avoidable error.
// An arterial content above the capillary one, which is noise, gives 0.
func ShuntFromGas(g LungGas) (Fraction, error) {
	if err := g.check(); err != nil {
		return 0, err
	}
	return Fraction(shuntFromGas(g)), nil
}

// shuntFromGas takes zero fields as their usual values.
func shuntFromGas(g LungGas) float64 {
	g = g.filled()
	capillary := g.capillary(g.alveolar())
	arterial := g.content(g.PaO2.MmHg(), float64(g.SaO2))
	return max(0, estimatedShunt(capillary, min(arterial, capillary), float64(g.Difference)))
}
