package physio

// Tensions are the alveolar and the arterial PO2 of one moment, both at 37 C.
type Tensions struct {
	Alveolar, Arterial Pressure
}

func (t Tensions) check() error {
	return check(
		given{name: "alveolar PO2", v: t.Alveolar.MmHg(), low: 1, high: quantities[PB].High},
		given{q: PaO2, v: t.Arterial.MmHg(), low: 1, high: quantities[PB].High},
	)
}

// AlveolarArterial gives the difference of alveolar and arterial PO2. It
// depends on FiO2, so that the age line holds only on air. A few mmHg below
// zero is noise; below -10 one of the inputs is wrong.
func AlveolarArterial(t Tensions) (Pressure, error) {
	if err := t.check(); err != nil {
		return 0, err
	}
	return MmHg(alveolarArterial(t.Alveolar.MmHg(), t.Arterial.MmHg())), nil
}

func alveolarArterial(alveolar, arterial float64) float64 { return alveolar - arterial } // Mellemgaard 1966

// ArterialAlveolarRatio gives a/A, at least 0.75 in health whatever the
// inspired oxygen (Gilbert and Keighley 1974). At a fixed shunt it is lowest
// near FiO2 0.6.
func ArterialAlveolarRatio(t Tensions) (float64, error) {
	if err := t.check(); err != nil {
		return 0, err
	}
	return arterialAlveolarRatio(t.Alveolar.MmHg(), t.Arterial.MmHg()), nil
}

func arterialAlveolarRatio(alveolar, arterial float64) float64 { return arterial / alveolar } // Gilbert and Keighley 1974

// RespiratoryIndex gives the difference over the arterial PO2; it says the same
// as a/A, since it is 1/(a/A) - 1.
func RespiratoryIndex(t Tensions) (float64, error) {
	if err := t.check(); err != nil {
		return 0, err
	}
	return respiratoryIndex(t.Alveolar.MmHg(), t.Arterial.MmHg()), nil
}

func respiratoryIndex(alveolar, arterial float64) float64 { return (alveolar - arterial) / arterial } // Goldfarb 1975

// RespiratoryIndexFromRatio gives the respiratory index that belongs to an a/A
// between 0.01 and 1.2.
func RespiratoryIndexFromRatio(ratio float64) (float64, error) {
	if err := check(given{name: "a/A", v: ratio, low: 0.01, high: 1.2}); err != nil {
		return 0, err
	}
	return 1/ratio - 1, nil // Goldfarb 1975
}

// airDifferenceFiO2 is the highest FiO2 at which the age line is shown.
const airDifferenceFiO2 = 0.24

// ExpectedAA gives the band between two published lines for the
// alveolar-arterial difference in mmHg by age on air: 2.5 + 0.21 x age
// (Mellemgaard 1966) and age/4 + 4 (common practice). A smaller difference than
// the band is no finding. Above FiO2 0.24 the lines do not hold: RangeError.
// highland is true below 680 mmHg, where the lines were not drawn and healthy
// differences are smaller, so that a value inside the band excludes less.
func ExpectedAA(age Years, fio2 Fraction, pb Pressure) (band Span, highland bool, err error) {
	err = check(
		given{q: Age, v: float64(age)}, pbAbove(pb, waterAt37),
		given{q: FiO2, v: float64(fio2), low: quantities[FiO2].Low, high: airDifferenceFiO2},
	)
	if err != nil {
		return Span{}, false, err
	}
	return expectedAA(float64(age)), pb.MmHg() < highlandPB, nil
}

// highlandPB is the pressure at about 1000 m, mmHg.
const highlandPB = 680

func expectedAA(age float64) Span {
	a, b := 2.5+0.21*age, age/4+4 // Mellemgaard 1966; common practice
	return Span{Low: min(a, b), High: max(a, b)}
}

// PFRatio gives PaO2/FiO2 in mmHg. It falls when PaCO2 rises or pressure falls
// although the lung is the same, and varies with FiO2 at a fixed shunt.
func PFRatio(pao2 Pressure, fio2 Fraction) (Pressure, error) {
	if err := check(given{q: PaO2, v: pao2.MmHg()}, given{q: FiO2, v: float64(fio2)}); err != nil {
		return 0, err
	}
	return MmHg(pfRatio(pao2.MmHg(), float64(fio2))), nil
}

func pfRatio(pao2, fio2 float64) float64 { return pao2 / fio2 } // Horovitz 1974

// PFAtAltitude gives P/F x PB/760, as the Berlin definition asks above 1000 m.
// Experts differ whether it should be used: show it beside the raw ratio.
func PFAtAltitude(at PFAt) (Pressure, error) {
	err := check(given{name: "P/F", v: at.PF.MmHg(), low: 10, high: 1000}, pbAbove(at.PB, waterAt37))
	if err != nil {
		return 0, err
	}
	return MmHg(pfAtAltitude(at.PF.MmHg(), at.PB.MmHg())), nil
}

// PFAt is a P/F with the barometric pressure it was found at.
type PFAt struct {
	PF, PB Pressure
}

func pfAtAltitude(pf, pb float64) float64 { return pf * pb / standardPB } // Ranieri 2012 (Berlin), footnote

// HealthyPaO2 gives the PaO2 in mmHg that a healthy lung would have at this
// PaCO2 and FiO2, so that hypoventilation is not called a lung fault: on air
// alveolar PO2 less the expected difference at this age (0 means not known, and
// the band from 20 to 70 years is used), on oxygen a/A 0.75 to 0.82, the value
// being the 0.75 that health reaches at least.
func HealthyPaO2(g AlveolarGas, age Years) (Interval, error) {
	alveolar, err := AlveolarPO2(g)
	if err != nil {
		return Interval{}, err
	}
	if err := check(given{q: Age, v: float64(age)}); err != nil {
		return Interval{}, err
	}
	return healthyPaO2(alveolar.MmHg(), float64(g.FiO2), float64(age)), nil
}

func healthyPaO2(alveolar, fio2, age float64) Interval {
	const healthyLow, healthyHigh = 0.75, 0.82 // Gilbert and Keighley 1974; the upper from memory
	if fio2 > airDifferenceFiO2 {
		return Interval{Value: healthyLow * alveolar, Low: healthyLow * alveolar, High: healthyHigh * alveolar}
	}
	young, old := age, age
	if age == 0 {
		young, old = 20, 70
	}
	low, high := alveolar-expectedAA(old).High, alveolar-expectedAA(young).Low
	return Interval{Value: (low + high) / 2, Low: low, High: high}
}
