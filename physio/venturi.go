package physio

// Entrainment is a jet of oxygen that draws air in.
type Entrainment struct {
	FiO2 Fraction
	// Air is the fraction in the air drawn in, 0 means 0.21; bedside tables use
	// 0.20 from FiO2 0.40 up.
	Air Fraction
}

// EntrainmentRatio gives the parts of air to one of oxygen, (1 - F)/(F - air):
// 10.3 at 28 %.
func EntrainmentRatio(e Entrainment) (float64, error) {
	if e.Air == 0 {
		e.Air = airFraction
	}
	err := check(
		given{name: "fraction in air", v: float64(e.Air), low: 0.2, high: 0.21},
		given{q: FiO2, v: float64(e.FiO2), low: 0.22, high: 1},
	)
	if err != nil {
		return 0, err
	}
	return float64((1 - e.FiO2) / (e.FiO2 - e.Air)), nil // mass balance
}

// EntrainedFiO2 gives the fraction from a ratio of air to oxygen.
func EntrainedFiO2(ratio float64) (Fraction, error) {
	if err := check(given{name: "ratio", v: ratio, low: 0, high: 100}); err != nil {
		return 0, err
	}
	return Fraction((airFraction*ratio + 1) / (ratio + 1)), nil // mass balance
}

// TotalFlow gives the whole flow out of an entrainment device in L/min. It
// should exceed the peak inspiratory flow, 25 to 35 L/min at rest and more in
// distress, else room air is breathed beside it.
func TotalFlow(oxygen Flow, ratio float64) (Flow, error) {
	err := check(
		given{q: OxygenFlow, v: float64(oxygen), low: 0.1, high: quantities[OxygenFlow].High},
		given{name: "ratio", v: ratio, low: 0, high: 100},
	)
	if err != nil {
		return 0, err
	}
	return oxygen * Flow(1+ratio), nil // mass balance
}

// Cylinder is a gas cylinder by the factor of its size in litres per psi.
type Cylinder struct {
	LitresPerPSI float64
	PSI          float64 // on the gauge
	Reserve      float64 // psi to leave in, 200 in common practice
}

// Factors of cylinder sizes by their American letters, L/psi. The same letters
// mean other sizes elsewhere: a bare letter says nothing without the country.
var cylinderFactors = map[string]float64{"D": 0.16, "E": 0.28, "G": 2.41, "H": 3.14, "K": 3.14, "M": 1.56} // common practice

// CylinderFactorUS gives the litres per psi of an American cylinder size.
func CylinderFactorUS(letter string) (float64, bool) {
	f, ok := cylinderFactors[letter]
	return f, ok
}

func (c Cylinder) check() error {
	return check(
		given{name: "litres per psi", v: c.LitresPerPSI, low: 0.01, high: 10},
		given{name: "reserve", v: c.Reserve, low: 0, high: 3000},
	)
}

// Litres gives the usable oxygen in a cylinder, L.
func (c Cylinder) Litres() (float64, error) {
	if err := c.check(); err != nil {
		return 0, err
	}
	if err := check(given{name: "pressure", v: c.PSI, low: max(c.Reserve, 1), high: 4500}); err != nil {
		return 0, err
	}
	return (c.PSI - c.Reserve) * c.LitresPerPSI, nil // common practice
}

// Minutes gives how long a cylinder lasts at a flow.
func (c Cylinder) Minutes(flow Flow) (float64, error) {
	litres, err := c.Litres()
	if err != nil {
		return 0, err
	}
	return MinutesOf(litres, flow)
}

// MinutesOf gives how long so many litres last at a flow.
func MinutesOf(litres float64, flow Flow) (float64, error) {
	err := check(
		given{name: "litres", v: litres, low: 0, high: 1e6},
		given{q: OxygenFlow, v: float64(flow), low: 0.1, high: 200},
	)
	if err != nil {
		return 0, err
	}
	return litres / float64(flow), nil
}

// PSINeeded gives the gauge pressure that lasts for so many minutes at the sum
// of all flows, with the reserve. The cylinder's own PSI is not used.
func (c Cylinder) PSINeeded(minutes float64, flow Flow) (float64, error) {
	if err := c.check(); err != nil {
		return 0, err
	}
	err := check(
		given{name: "minutes", v: minutes, low: 0, high: 1e5},
		given{q: OxygenFlow, v: float64(flow), low: 0.1, high: 200},
	)
	if err != nil {
		return 0, err
	}
	return minutes*float64(flow)/c.LitresPerPSI + c.Reserve, nil // common practice
}
