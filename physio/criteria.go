package physio

// Criterion is the oxygenation part of a published definition that a sample
// meets. It is never the diagnosis: Open lists the parts that a gas can not
// tell.
type Criterion struct {
	Definition string // author or body and year
	Part       string // what is met, in the definition's own terms
	Open       []string
}

// openARDS are the parts of the ARDS definitions that no gas tells.
var openARDS = []string{"timing within a week", "imaging", "origin of the oedema"}

// openPARDS are the parts of the paediatric definitions that no gas tells.
var openPARDS = []string{"timing within a week", "imaging", "origin of the oedema", "cyanotic heart disease", "perinatal disease"}

// Criteria lists the oxygenation criteria that an assessed sample meets: the
// Berlin definition 2012 with PEEP or CPAP of at least 5 cmH2O, the global
// definition 2024 for high flow and for SpO2 up to 97 %, and the paediatric
// bands of PALICC 2015 by OI or OSI, with the threshold of PALICC-2 2023 on
// high flow. Estimated oxygen fractions of masks and
// cannulas meet none.
func Criteria(a *Assessment) []Criterion {
	if a.Oxygen.Estimated || !a.Oxygen.Known {
		return nil
	}
	switch a.Population {
	case Child:
		return paediatricCriteria(a)
	case Adult, Pregnant:
		return adultCriteria(a)
	}
	return nil
}

func adultCriteria(a *Assessment) []Criterion {
	var out []Criterion
	pressure := max(a.Sample.Val(PEEP), a.Sample.Val(CPAP), a.Sample.Val(EPAP))
	if pf, ok := a.Index("pf"); ok && pressure >= berlinPEEP && pf.Value <= pfAbnormal {
		out = append(out, Criterion{"Berlin 2012", berlinBand(pf.Value), openARDS})
	}
	supported := pressure >= berlinPEEP || a.Sample.Device == HighFlow && a.Sample.Val(OxygenFlow) >= globalFlow
	if sf, ok := a.Index("sf"); ok && supported && sf.Value <= sfAbnormal {
		out = append(out, Criterion{"global definition 2024", "S/F 315 or below with SpO2 up to 97 %", openARDS})
	} else if pf, ok := a.Index("pf"); ok && supported && pressure < berlinPEEP && pf.Value <= pfAbnormal {
		out = append(out, Criterion{"global definition 2024", "P/F 300 mmHg or below on high flow of 30 L/min or more", openARDS})
	}
	return out
}

func berlinBand(pf float64) string {
	switch {
	case pf <= berlinSevere:
		return "P/F 100 mmHg or below at PEEP 5 cmH2O or more (band: severe)"
	case pf <= pfPoor:
		return "P/F 101-200 mmHg at PEEP 5 cmH2O or more (band: moderate)"
	}
	return "P/F 201-300 mmHg at PEEP 5 cmH2O or more (band: mild)"
}

func paediatricCriteria(a *Assessment) []Criterion {
	for _, c := range []struct {
		key, name              string
		mild, moderate, severe float64
	}{
		{"oi", "OI", paliccOIMild, paliccOIModerate, paliccOISevere},
		{"osi", "OSI", paliccOSIMild, paliccOSIModerate, paliccOSISevere},
	} {
		ix, ok := a.Index(c.key)
		if !ok || ix.Value < c.mild {
			continue
		}
		band := "mild"
		switch {
		case ix.Value >= c.severe:
			band = "severe"
		case ix.Value >= c.moderate:
			band = "moderate"
		}
		return []Criterion{{"PALICC 2015", c.name + " in the band " + band, openPARDS}}
	}
	return nasalCriteria(a)
}

// nasalCriteria is the oxygenation threshold of possible disease in children
// on high flow; by the second consensus it has no bands.
func nasalCriteria(a *Assessment) []Criterion {
	flow, weight := a.Sample.Val(OxygenFlow), a.Sample.Val(Weight)
	enough := flow >= globalFlow || weight > 0 && flow >= paliccFlowPerKg*weight
	if a.Sample.Device != HighFlow || !enough {
		return nil
	}
	if pf, ok := a.Index("pf"); ok && pf.Value <= pfAbnormal {
		return []Criterion{{"PALICC-2 2023", "P/F 300 mmHg or below on high flow (possible, on nasal support)", openPARDS}}
	}
	if sf, ok := a.Index("sf"); ok && sf.Value <= paliccNasalSF {
		return []Criterion{{"PALICC-2 2023", "S/F 250 or below with SpO2 up to 97 % on high flow (possible, on nasal support)", openPARDS}}
	}
	return nil
}

// Bounds of the definitions.
const (
	berlinPEEP   = 5.0   // cmH2O (Berlin 2012)
	berlinSevere = 100.0 // mmHg (Berlin 2012)
	globalFlow   = 30.0  // L/min of high flow (Matthay 2024)

	paliccOIMild, paliccOIModerate, paliccOISevere    = 4.0, 8.0, 16.0 // PALICC 2015
	paliccOSIMild, paliccOSIModerate, paliccOSISevere = 5.0, 7.5, 12.3 // PALICC 2015
	paliccNasalSF                                     = 250.0          // PALICC-2 2023 (Yehya 2023), table 5
	paliccFlowPerKg                                   = 1.5            // L/min per kg of high flow (PALICC-2 2023)
)
