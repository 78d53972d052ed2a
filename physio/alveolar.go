package physio

const (
	usualR   = 0.8  // exchange ratio of a mixed diet at rest, common practice
	bodyTemp = 37.0 // C, the temperature at which gases are reported
	// tracheal water vapour at 37 C, mmHg: the rounded value all published
	// worked examples use; Buck 1996 gives 47.1.
	waterAt37 = 47.0
)

// AlveolarGas is what the alveolar gas equation needs.
type AlveolarGas struct {
	FiO2  Fraction // dry inspired fraction
	PB    Pressure // barometric pressure at the bed, not reduced to sea level
	PaCO2 Pressure // stands for the ideal alveolar PCO2
	R     float64  // respiratory exchange ratio, 0 means 0.8
	Temp  Celsius  // of the airway, 0 means 37
}

func (g AlveolarGas) r() float64 {
	if g.R == 0 {
		return usualR
	}
	return g.R
}

func (g AlveolarGas) water() float64 {
	if g.Temp == 0 || g.Temp == bodyTemp {
		return waterAt37
	}
	return waterVapour(float64(g.Temp))
}

func (g AlveolarGas) check() error {
	return check(
		given{q: FiO2, v: float64(g.FiO2)},
		pbAbove(g.PB, g.water()),
		given{q: PaCO2, v: g.PaCO2.MmHg()},
		given{q: Temp, v: g.temp()},
		given{name: "R", v: g.r(), low: 0.5, high: 1.5},
	)
}

func (g AlveolarGas) temp() float64 {
	if g.Temp == 0 {
		return bodyTemp
	}
	return float64(g.Temp)
}

// pbAbove is a barometric pressure that leaves room for water vapour: the
// formulas hold from a high-flying aircraft to a hyperbaric chamber.
func pbAbove(pb Pressure, water float64) given {
	return given{q: PB, v: pb.MmHg(), low: water + 1, high: quantities[PB].High}
}

// InspiredPO2 gives the PO2 of humid tracheal gas, FiO2 x (PB - PH2O), in
// mmHg. PaCO2 and R are not used. At sea level on air it is 150.
func InspiredPO2(g AlveolarGas) (Pressure, error) {
	err := check(given{q: FiO2, v: float64(g.FiO2)}, pbAbove(g.PB, g.water()), given{q: Temp, v: g.temp()})
	if err != nil {
		return 0, err
	}
	return MmHg(inspiredPO2(float64(g.FiO2), g.PB.MmHg(), g.water())), nil
}

func inspiredPO2(fio2, pb, water float64) float64 { return fio2 * (pb - water) } // West 2012

// AlveolarPO2 gives the ideal alveolar PO2 by the full equation, which lets
// the inspired nitrogen be diluted by the oxygen taken up (Fenn, Rahn, Otis
// 1946). It assumes a steady state and no inspired CO2, and can be negative
// for combinations that no one survives: those are a RangeError.
func AlveolarPO2(g AlveolarGas) (Pressure, error) {
	if err := g.check(); err != nil {
		return 0, err
	}
	return positiveAlveolar(alveolarPO2(float64(g.FiO2), g.PB.MmHg(), g.PaCO2.MmHg(), g.r(), g.water()))
}

func alveolarPO2(fio2, pb, paco2, r, water float64) float64 {
	return inspiredPO2(fio2, pb, water) - paco2*(fio2+(1-fio2)/r) // Fenn, Rahn, Otis 1946
}

// AlveolarPO2Short gives the alveolar PO2 by the short form PIO2 - PaCO2/R of
// older teaching. It is 2 mmHg below the full form on air and 10 below it on
// pure oxygen at PaCO2 40; it is offered for comparison with older records.
func AlveolarPO2Short(g AlveolarGas) (Pressure, error) {
	if err := g.check(); err != nil {
		return 0, err
	}
	short := inspiredPO2(float64(g.FiO2), g.PB.MmHg(), g.water()) - g.PaCO2.MmHg()/g.r() // common practice
	return positiveAlveolar(short)
}

func positiveAlveolar(v float64) (Pressure, error) {
	if v <= 0 {
		return 0, &RangeError{Name: "alveolar PO2", Got: v, Low: 0, High: quantities[PB].High}
	}
	return MmHg(v), nil
}
