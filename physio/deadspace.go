package physio

import "math"

// DeadSpaceGas holds the carbon dioxide pressures on the two sides of the
// dead-space equations.
type DeadSpaceGas struct {
	PaCO2 Pressure // or the alveolar PCO2, for Bohr's form
	PeCO2 Pressure // MIXED expired, not end-tidal
}

// DeadSpaceFraction gives the physiological dead space as a fraction of the
// breath, VD/VT, by Enghoff's form with PaCO2; with the alveolar PCO2 in its
// place it is Bohr's. About 0.3 is usual, less than 0.4 in ventilated patients.
// Enghoff's form counts shunt and mismatch as dead space. A mixed expired PCO2
// at or above PaCO2 is a RangeError: it is usually an end-tidal one.
func DeadSpaceFraction(g DeadSpaceGas) (Fraction, error) {
	if err := check(given{q: PaCO2, v: g.PaCO2.MmHg()}, given{q: PeCO2, v: g.PeCO2.MmHg()}); err != nil {
		return 0, err
	}
	if g.PeCO2 >= g.PaCO2 {
		return 0, &RangeError{Quantity: PeCO2, Got: g.PeCO2.MmHg(), Low: quantities[PeCO2].Low, High: g.PaCO2.MmHg()}
	}
	return Fraction(deadSpaceFraction(g.PaCO2.MmHg(), g.PeCO2.MmHg())), nil
}

func deadSpaceFraction(paco2, peco2 float64) float64 { return (paco2 - peco2) / paco2 } // Enghoff 1938

// DeadSpace gives the dead space of a breath in mL.
func DeadSpace(vdvt Fraction, breath Volume) (Volume, error) {
	if err := check(given{q: VDVT, v: float64(vdvt)}, given{q: VT, v: float64(breath)}); err != nil {
		return 0, err
	}
	return Volume(float64(vdvt) * float64(breath)), nil
}

// AlveolarDeadFraction gives the alveolar part of dead space from end-tidal
// PCO2, 1 - Et/Pa. It is not VD/VT: the airway's part is missing. Below zero it
// is a late-emptying lung, pregnancy, exercise or a sampling error, and given
// as such.
func AlveolarDeadFraction(g EndTidal) (float64, error) {
	if err := g.check(); err != nil {
		return 0, err
	}
	return alveolarDeadFraction(g.PaCO2.MmHg(), g.EtCO2.MmHg()), nil
}

func alveolarDeadFraction(paco2, etco2 float64) float64 { return 1 - etco2/paco2 } // Bonifazi 2021

// EndTidal is an arterial and an end-tidal PCO2 of one moment, both at body
// temperature.
type EndTidal struct {
	PaCO2, EtCO2 Pressure
}

func (g EndTidal) check() error {
	return check(given{q: PaCO2, v: g.PaCO2.MmHg()}, given{q: EtCO2, v: g.EtCO2.MmHg()})
}

// EndTidalGap gives PaCO2 - EtCO2 in mmHg; 2 to 5 is usual.
func EndTidalGap(g EndTidal) (Pressure, error) {
	if err := g.check(); err != nil {
		return 0, err
	}
	return MmHg(endTidalGap(g.PaCO2.MmHg(), g.EtCO2.MmHg())), nil
}

func endTidalGap(paco2, etco2 float64) float64 { return paco2 - etco2 } // Nunn 1960

// AnatomicalDeadSpace gives an assumed anatomical dead space in mL from a lean
// or predicted weight: 2.2 mL/kg from six years on, more below. In ventilated
// adults weight predicts it poorly, and a tracheal tube halves it.
func AnatomicalDeadSpace(weight Kilograms, age Years) (Volume, error) {
	err := check(given{q: Weight, v: float64(weight)}, given{q: Age, v: float64(age)})
	if err != nil {
		return 0, err
	}
	return Volume(anatomicalDeadSpace(float64(weight), float64(age))), nil
}

const (
	adultDeadSpace = 2.2 // mL/kg (Numa and Newth 1996)
	childLineEnds  = 6.0 // years: the child line passes 2.2 mL/kg there
)

func anatomicalDeadSpace(weight, age float64) float64 {
	if age < childLineEnds {
		return weight * childDeadSpace(age)
	}
	return weight * adultDeadSpace
}

// ChildDeadSpacePerKg gives the published line of anatomical dead space by age,
// in mL/kg. It was measured from 7 days to 14 years in intubated children and
// runs below the adult 2.2 from six years on: AnatomicalDeadSpace leaves it
// there.
func ChildDeadSpacePerKg(age Years) (float64, error) {
	if err := check(given{q: Age, v: float64(age), low: 0, high: 18}); err != nil {
		return 0, err
	}
	return childDeadSpace(float64(age)), nil
}

func childDeadSpace(age float64) float64 { return 3.28 - 0.56*math.Log(1+age) } // Numa and Newth 1996

// LeastPowerBreath gives the tidal volume at which a fixed alveolar ventilation
// costs the least elastic power: twice the anatomical dead space.
func LeastPowerBreath(anatomical Volume) (Volume, error) {
	if err := check(given{name: "dead space", v: float64(anatomical), low: 1, high: 500}); err != nil {
		return 0, err
	}
	return 2 * anatomical, nil // Fabry 2024
}

// DeadSpaceFromOutput gives VD/VT from an estimated or measured CO2 output, the
// minute volume and PaCO2. Equations that estimate the output from body size
// misjudge the single patient.
func DeadSpaceFromOutput(output GasRate, minute Flow, paco2 Pressure) (Fraction, error) {
	err := check(outputIn(output), given{q: VE, v: float64(minute)}, given{q: PaCO2, v: paco2.MmHg()})
	if err != nil {
		return 0, err
	}
	v := deadSpaceFromOutput(float64(output), float64(minute), paco2.MmHg())
	if err := check(given{q: VDVT, v: v, low: 0, high: 0.95}); err != nil {
		return 0, err
	}
	return Fraction(v), nil
}

func deadSpaceFromOutput(output, minute, paco2 float64) float64 {
	return 1 - 0.86*output/(minute*paco2) // Siddiki 2010, with the constant as printed there
}

// BedsideDeadSpace is what the regression of Frankenfield needs.
type BedsideDeadSpace struct {
	EndTidal
	Rate Rate
	Age  Years
}

// DeadSpaceRegression gives VD/VT by a regression of ventilated patients. Its
// coefficients are from memory, and at ordinary values it starts near 0.45: it
// is for comparison only.
func DeadSpaceRegression(in BedsideDeadSpace) (Fraction, error) {
	if err := in.EndTidal.check(); err != nil {
		return 0, err
	}
	if err := check(given{q: RR, v: float64(in.Rate)}, given{q: Age, v: float64(in.Age)}); err != nil {
		return 0, err
	}
	gap := endTidalGap(in.PaCO2.MmHg(), in.EtCO2.MmHg())
	return Fraction(0.320 + 0.0106*gap + 0.003*float64(in.Rate) + 0.0015*float64(in.Age)), nil // Frankenfield 2010, from memory
}

// DeadSpaceOdds gives the odds ratio of death that a cohort with early ARDS had
// for a higher VD/VT, 1.45 for 0.05. It describes the cohort and says nothing
// of a patient.
func DeadSpaceOdds(higher Fraction) (float64, error) {
	if err := check(given{q: VDVT, v: float64(higher), low: 0, high: 0.5}); err != nil {
		return 0, err
	}
	return math.Pow(1.45, float64(higher)/0.05), nil // Nuckton 2002
}
