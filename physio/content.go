package physio

// Binding is what turns haemoglobin, saturation and PO2 into an oxygen
// content. The capacity belongs with the kind of saturation, and all contents
// of one shunt with the same binding.
type Binding struct {
	Capacity   float64 // mL of oxygen per g of haemoglobin (Huefner)
	Solubility float64 // mL/dL/mmHg
}

// The bindings. 1.39 counts only haemoglobin that can bind, so it goes with the
// fractional saturation of a co-oximeter; 1.34 allows for the usual
// dyshaemoglobin and goes with functional, calculated and pulse saturations.
var (
	BindingFractional = Binding{Capacity: 1.39, Solubility: solubilityO2} // Dijkhuizen 1977
	BindingFunctional = Binding{Capacity: 1.34, Solubility: solubilityO2} // common practice
)

// solubilityO2 is 0.0105 mmol/L/kPa (Siggaard-Andersen 1984) in mL/dL/mmHg.
const solubilityO2 = 0.0031

// molarVolume is that of oxygen at STPD, L/mol.
const molarVolume = 22.394

// HaemoglobinMolar holds the molar constants of the theoretical capacity.
type HaemoglobinMolar struct {
	MolarVolume float64 // of oxygen at STPD, mL/mol: 22394
	Tetramer    float64 // of haemoglobin, g/mol: 64458
}

// TheoreticalCapacity gives the oxygen that a gram of fully active haemoglobin
// binds, in mL: four molecules a tetramer, 1.39.
func TheoreticalCapacity(m HaemoglobinMolar) (float64, error) {
	err := check(
		given{name: "molar volume", v: m.MolarVolume, low: 22000, high: 23000},
		given{name: "mass of haemoglobin", v: m.Tetramer, low: 60000, high: 70000},
	)
	if err != nil {
		return 0, err
	}
	return 4 * m.MolarVolume / m.Tetramer, nil // Dijkhuizen 1977
}

// ActiveFraction gives the part of the haemoglobin that a measured capacity
// shows to be active.
func (b Binding) ActiveFraction(theoretical float64) (Fraction, error) {
	if err := check(given{name: "capacity", v: theoretical, low: 1.3, high: 1.5}); err != nil {
		return 0, err
	}
	if err := b.check(); err != nil {
		return 0, err
	}
	return Fraction(b.Capacity / theoretical), nil // Dijkhuizen 1977
}

// SolubilityFromMolar gives a solubility in mL/dL/mmHg from mmol/L/kPa.
func SolubilityFromMolar(mmolLKPa float64) (float64, error) {
	if err := check(given{name: "solubility", v: mmolLKPa, low: 1e-4, high: 1}); err != nil {
		return 0, err
	}
	return mmolLKPa * molarVolume / 10 / mmHgPerKPa, nil
}

func (b Binding) check() error {
	return check(
		given{name: "binding capacity", v: b.Capacity, low: 1.2, high: 1.45},
		given{name: "solubility", v: b.Solubility, low: 0, high: 0.005},
	)
}

// Content gives the oxygen content of blood with this binding. The saturation
// is fractional or functional, whichever the capacity belongs to. A PO2 of 0
// gives the bound oxygen alone.
func (b Binding) Content(hb Haemoglobin, sat Fraction, po2 Pressure) (Content, error) {
	if err := b.check(); err != nil {
		return 0, err
	}
	err := check(
		given{q: Hb, v: float64(hb)}, given{q: SaO2, v: float64(sat), low: 0, high: 1},
		given{q: PaO2, v: po2.MmHg(), low: 0, high: 2000},
	)
	if err != nil {
		return 0, err
	}
	return Content(b.content(float64(hb), float64(sat), po2.MmHg())), nil
}

func (b Binding) content(hb, sat, po2 float64) float64 {
	return b.Capacity*hb*sat + b.Solubility*po2 // Berggren 1942
}

// BloodOxygen is the oxygen in one sample of blood.
type BloodOxygen struct {
	Hb  Haemoglobin
	SO2 Fraction // functional, measured or calculated
	PO2 Pressure
	// COHb and MetHb are fractions of total haemoglobin. Cooximetry says that
	// they were measured, if only as zero.
	COHb, MetHb Fraction
	Cooximetry  bool
}

// OxygenContent gives the oxygen content of a sample in mL/dL: with co-oximetry
// 1.39 x Hb x SO2 x (1 - COHb - MetHb), without it 1.34 x Hb x SO2, each with
// the dissolved oxygen. 18 to 21 is usual in arterial blood.
func OxygenContent(b BloodOxygen) (Content, error) {
	err := check(
		given{q: Hb, v: float64(b.Hb)}, given{q: SaO2, v: float64(b.SO2)},
		given{q: PaO2, v: b.PO2.MmHg(), low: 1, high: 2000},
		given{q: COHb, v: float64(b.COHb)}, given{q: MetHb, v: float64(b.MetHb)},
		given{name: "COHb + MetHb", v: float64(b.COHb + b.MetHb), low: 0, high: 1},
	)
	if err != nil {
		return 0, err
	}
	return Content(oxygenContent(b)), nil
}

func oxygenContent(b BloodOxygen) float64 {
	if !b.Cooximetry {
		return BindingFunctional.content(float64(b.Hb), float64(b.SO2), b.PO2.MmHg())
	}
	fractional := float64(b.SO2) * (1 - float64(b.COHb) - float64(b.MetHb))
	return BindingFractional.content(float64(b.Hb), fractional, b.PO2.MmHg())
}

// Contents are the oxygen contents on the way through the lung, mL/dL.
type Contents struct {
	Capillary Content // end-capillary, of alveoli that are ventilated
	Arterial  Content
	Venous    Content // mixed venous, from the pulmonary artery
}

func contentIn(name string, c Content) given {
	return given{name: name, v: float64(c), low: 0.1, high: 50}
}

func (c Contents) checkFlow(co Flow) error {
	return check(
		given{q: CardiacOutput, v: float64(co)},
		contentIn("arterial content", c.Arterial), contentIn("venous content", c.Venous),
	)
}

// Delivery gives the oxygen that the heart delivers, mL/min; about 1000 is
// usual. The other contents are not used.
func Delivery(co Flow, c Contents) (GasRate, error) {
	if err := check(given{q: CardiacOutput, v: float64(co)}, contentIn("arterial content", c.Arterial)); err != nil {
		return 0, err
	}
	return GasRate(delivery(float64(co), float64(c.Arterial))), nil
}

func delivery(co, arterial float64) float64 { return co * arterial * 10 } // common practice; 10 dL in a litre

// Consumption gives the oxygen that the body takes up, mL/min; about 250 is
// usual at rest.
func Consumption(co Flow, c Contents) (GasRate, error) {
	if err := c.checkFlow(co); err != nil {
		return 0, err
	}
	return GasRate(consumption(float64(co), float64(c.Arterial), float64(c.Venous))), nil
}

func consumption(co, arterial, venous float64) float64 { return co * (arterial - venous) * 10 } // Fick 1870

// PerSurface gives a rate per square metre of body surface, mL/min/m2.
func PerSurface(rate GasRate, squareMetres float64) (float64, error) {
	err := check(
		given{name: "gas rate", v: float64(rate), low: 0, high: 20000},
		given{name: "body surface", v: squareMetres, low: 0.1, high: 4},
	)
	if err != nil {
		return 0, err
	}
	return float64(rate) / squareMetres, nil
}

// ContentDifference gives the arteriovenous difference, mL/dL; 4 to 6 is usual.
func ContentDifference(c Contents) (Content, error) {
	if err := c.checkFlow(1); err != nil {
		return 0, err
	}
	return c.Arterial - c.Venous, nil
}

// Extraction gives the part of the delivered oxygen that is taken up; 0.22 to
// 0.30 is usual.
func Extraction(c Contents) (Fraction, error) {
	if err := c.checkFlow(1); err != nil {
		return 0, err
	}
	return Fraction(extraction(float64(c.Arterial), float64(c.Venous))), nil
}

func extraction(arterial, venous float64) float64 { return (arterial - venous) / arterial } // common practice
