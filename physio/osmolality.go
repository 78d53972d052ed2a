package physio

// Solutes are what a calculated osmolality counts, all in mmol/L.
type Solutes struct {
	Na, Glucose, Urea Concentration
	// Ethanol is 0 when there is none.
	Ethanol Concentration
}

// Conversions from mg/dL, by molar mass.
const (
	glucoseMgPerMmol = 18.0 // mg/dL per mmol/L
	ureaMgPerMmol    = 2.8  // mg/dL of urea nitrogen per mmol/L of urea
	ethanolMgPerMmol = 4.6  // mg/dL per mmol/L
)

// GlucoseMgDL makes a glucose from mg/dL.
func GlucoseMgDL(v float64) Concentration { return Concentration(v / glucoseMgPerMmol) }

// UreaNitrogenMgDL makes a urea from mg/dL of urea nitrogen (BUN).
func UreaNitrogenMgDL(v float64) Concentration { return Concentration(v / ureaMgPerMmol) }

// EthanolMgDL makes an ethanol from mg/dL.
func EthanolMgDL(v float64) Concentration { return Concentration(v / ethanolMgPerMmol) }

// EthanolEffect gives the osmolality that ethanol adds as measured in blood,
// 1.25 times its concentration; by molar mass alone it would be 1 time.
func EthanolEffect(ethanol Concentration) (float64, error) {
	if err := check(ethanolIn(ethanol)); err != nil {
		return 0, err
	}
	return float64(ethanol) * ethanolMgPerMmol / 3.7, nil // Purssell 2001
}

func ethanolIn(v Concentration) given {
	return given{name: "ethanol", v: float64(v), low: 0, high: 200}
}

// Osmolality gives the calculated osmolality in mOsm/kg.
func Osmolality(s Solutes) (float64, error) {
	err := check(
		given{q: Na, v: float64(s.Na)}, given{q: Glucose, v: float64(s.Glucose)},
		given{name: "urea", v: float64(s.Urea), low: 0, high: 100}, ethanolIn(s.Ethanol),
	)
	if err != nil {
		return 0, err
	}
	return float64(2*s.Na + s.Glucose + s.Urea + s.Ethanol), nil // Lynd 2008
}

// OsmolalGap gives the measured less the calculated osmolality in mOsm/kg; -14
// to 10 is usual. A usual gap does not exclude a toxic alcohol.
func OsmolalGap(measured float64, s Solutes) (float64, error) {
	calculated, err := Osmolality(s)
	if err != nil {
		return 0, err
	}
	if err := check(given{name: "osmolality", v: measured, low: 200, high: 600}); err != nil {
		return 0, err
	}
	return measured - calculated, nil // Lynd 2008
}
