package physio_test

import (
	"testing"

	"galeward/physio"
)

// step is what "just" means below: PaCO2 in mmHg and bicarbonate in mmol/L; a
// pH moves by a tenth of it.
const step = 0.05

// lungTables are the populations whose PaCO2 gets a verdict; cord blood gets none.
var lungTables = []struct {
	population string
	height     float64
}{
	{"adult", 0}, {"trimester 1", 0}, {"trimester 2", 0}, {"trimester 3", 0}, {"infant", 0}, {"child", 0},
	{"newborn", 0}, {"newborn day 1", 0}, {"preterm", 0}, {"resident", 2600}, {"trimester 3", 4200},
}

// TestPaCO2CutoffsOfPopulations tries both ends of each population's PaCO2
// just below, at and just above.
func TestPaCO2CutoffsOfPopulations(t *testing.T) {
	for _, table := range lungTables {
		r := assess(of(t, table.population, table.height, physio.PaCO2, 40)).Ranges
		for _, c := range []struct {
			pco2 float64
			want physio.Level
		}{
			{r.PaCO2Low - step, physio.LevelHyperventilation}, {r.PaCO2Low, physio.LevelAdequate}, {r.PaCO2Low + step, physio.LevelAdequate},
			{r.PaCO2High - step, physio.LevelAdequate}, {r.PaCO2High, physio.LevelAdequate}, {r.PaCO2High + step, physio.LevelHypoventilation},
		} {
			if got := assess(of(t, table.population, table.height, physio.PaCO2, c.pco2)).Ventilation.Level; got != c.want {
				t.Errorf("%s at %g m, PaCO2 %.2f: %s, want %s", table.population, table.height, c.pco2, got, c.want)
			}
		}
	}
}

// side says on which side of health a process is.
func side(p physio.Process) string {
	switch p {
	case physio.RespiratoryAcidosis, physio.MetabolicAcidosis:
		return "acidosis"
	case physio.RespiratoryAlkalosis, physio.MetabolicAlkalosis:
		return "alkalosis"
	}
	return string(p)
}

// TestPHCutoffsOfPopulations tries both ends of each population's pH at a
// PaCO2 inside its range: outside a process is named, at the end none.
func TestPHCutoffsOfPopulations(t *testing.T) {
	for _, population := range allTables() {
		r := assess(of(t, population, 0, physio.PaCO2, 40)).Ranges
		for _, c := range []struct {
			ph, pco2 float64
			want     string
		}{
			{r.PHLow - step/10, r.PaCO2High, "acidosis"}, {r.PHLow, r.PaCO2High, "none"}, {r.PHLow + step/10, r.PaCO2High, "none"},
			{r.PHHigh - step/10, r.PaCO2Low, "none"}, {r.PHHigh, r.PaCO2Low, "none"}, {r.PHHigh + step/10, r.PaCO2Low, "alkalosis"},
		} {
			if got := side(assess(of(t, population, 0, physio.PHq, c.ph, physio.PaCO2, c.pco2)).AcidBase.Primary); got != c.want {
				t.Errorf("%s, pH %.3f at PaCO2 %.1f: %s, want %s", population, c.ph, c.pco2, got, c.want)
			}
		}
	}
}

func allTables() []string {
	var out []string
	for population := range people {
		out = append(out, population)
	}
	return out
}

// TestBicarbonateCutoffsOfPopulations tries both ends of each population's
// bicarbonate beside a PaCO2 outside its range. With the adult rules the word
// of the range school changes at the end; without them, low beside a high
// PaCO2 and high beside a low one name the second process.
func TestBicarbonateCutoffsOfPopulations(t *testing.T) {
	for _, population := range allTables() {
		r := assess(of(t, population, 0, physio.PaCO2, 40)).Ranges
		changed := func(pco2, hco3 float64) bool {
			ab := assess(of(t, population, 0, physio.PaCO2, pco2, physio.HCO3, hco3)).AcidBase
			if r.Responses {
				return ab.Compensation == physio.CompensationPartial || ab.Compensation == physio.CompensationFull
			}
			return len(ab.Also) == 1
		}
		lowBeside, highBeside := r.PaCO2Low-4, r.PaCO2High+4
		if !r.Responses {
			lowBeside, highBeside = r.PaCO2High+1, r.PaCO2Low-1
		}
		for _, c := range []struct {
			pco2, hco3 float64
			want       bool
		}{
			{lowBeside, r.HCO3Low - step, true}, {lowBeside, r.HCO3Low, false}, {lowBeside, r.HCO3Low + step, false},
			{highBeside, r.HCO3High - step, false}, {highBeside, r.HCO3High, false}, {highBeside, r.HCO3High + step, true},
		} {
			if got := changed(c.pco2, c.hco3); got != c.want {
				t.Errorf("%s, HCO3 %.2f beside PaCO2 %.1f: outside %v, want %v", population, c.hco3, c.pco2, got, c.want)
			}
		}
	}
}

// TestNewbornCutoffs tries the oxygen and critical cut-offs of newborns, whose
// sources stand in limits.go: Gomella and Huang 2017 for PaO2 50 and 80, NICE
// QS193 for 91-95 %, SUPPORT for 85 %, Sweet 2013 for pH 7.20, Iowa's list for
// PaCO2 70.
func TestNewbornCutoffs(t *testing.T) {
	degree := func(q physio.Quantity, v float64) string {
		return string(assess(of(t, "preterm", 0, physio.PaCO2, 45, physio.FiO2, 0.21, q, v)).Oxygenation.Level)
	}
	critical := func(population string, ph, pco2 float64) string {
		out := ""
		for _, q := range assess(of(t, population, 0, physio.PHq, ph, physio.PaCO2, pco2, physio.PaO2, 42, physio.FiO2, 0.3)).Critical {
			out += q.Key() + " "
		}
		return out
	}
	high := func(q physio.Quantity, v float64) string {
		a := assess(of(t, "preterm", 0, physio.FiO2, 0.4, q, v))
		return map[bool]string{true: "said", false: ""}[a.Raised(physio.CautionHighO2Preterm)]
	}
	transfer := func(po2 float64) string { // on air at PaCO2 30: A-a 113.8 less PaO2
		return string(assess(of(t, "newborn", 0, physio.PaCO2, 30, physio.PaO2, po2, physio.FiO2, 0.21)).Oxygenation.Efficiency)
	}
	for _, c := range []struct{ what, got, want string }{
		{"PaO2 50.1", degree(physio.PaO2, 50.1), "adequate"}, {"PaO2 50", degree(physio.PaO2, 50), "adequate"}, {"PaO2 49.9", degree(physio.PaO2, 49.9), "mild"},
		{"PaO2 40", degree(physio.PaO2, 40), "mild"}, {"PaO2 39.9", degree(physio.PaO2, 39.9), "moderate"},
		{"PaO2 30", degree(physio.PaO2, 30), "moderate"}, {"PaO2 29.9", degree(physio.PaO2, 29.9), "severe"},
		{"SpO2 91", degree(physio.SpO2, 0.91), "adequate"}, {"SpO2 90.9", degree(physio.SpO2, 0.909), "mild"},
		{"SpO2 85", degree(physio.SpO2, 0.85), "mild"}, {"SpO2 84.9", degree(physio.SpO2, 0.849), "moderate"},
		{"SpO2 75", degree(physio.SpO2, 0.75), "moderate"}, {"SpO2 74.9", degree(physio.SpO2, 0.749), "severe"},
		{"on oxygen PaO2 80", high(physio.PaO2, 80), ""}, {"on oxygen PaO2 80.1", high(physio.PaO2, 80.1), "said"},
		{"on oxygen SpO2 95", high(physio.SpO2, 0.95), ""}, {"on oxygen SpO2 95.1", high(physio.SpO2, 0.951), "said"},
		{"A-a 54.9", transfer(58.9), "efficient"}, {"A-a 55.1", transfer(58.7), "reduced"},
		{"a/A 0.351", transfer(40), "reduced"}, {"a/A 0.349", transfer(39.7), "poor"},
		{"newborn pH 7.20", critical("newborn", 7.20, 50), ""}, {"newborn pH 7.19", critical("newborn", 7.19, 50), "ph "},
		{"newborn PaCO2 70", critical("preterm", 7.25, 70), ""}, {"newborn PaCO2 70.1", critical("preterm", 7.25, 70.1), "paco2 "},
		{"adult PaO2 42 is critical, a newborn's is not", critical("adult", 7.40, 40), "pao2 "},
		{"cord pH 7.00", critical("cord artery", 7.00, 80), ""}, {"cord pH 6.99", critical("cord artery", 6.99, 80), "ph "},
	} {
		if c.got != c.want {
			t.Errorf("%s: %q, want %q", c.what, c.got, c.want)
		}
	}
}

// TestAgesAndTrimestersChooseTheirTable: the table changes at 1 day, 28 days,
// 2 and 16 years, and by trimester; an undated pregnancy is a late one.
func TestAgesAndTrimestersChooseTheirTable(t *testing.T) {
	low := func(population physio.Population, age float64, trimester int) float64 {
		s := gas(physio.PaCO2, 40)
		if s.Population, s.Trimester = population, trimester; age > 0 {
			s.Set(physio.Age, age)
		}
		r := assess(s).Ranges
		return r.PaCO2Low + 1000*r.PHLow
	}
	day := 1 / 365.25
	table := map[string]float64{}
	for name := range people {
		r := assess(of(t, name, 0, physio.PaCO2, 40)).Ranges
		table[name] = r.PaCO2Low + 1000*r.PHLow
	}
	if table["newborn day 1"] >= table["newborn"] || table["infant"] == table["child"] || table["trimester 2"] == table["trimester 3"] {
		t.Errorf("two tables are one: %v", table)
	}
	for _, c := range []struct {
		what string
		got  float64
		want string
	}{
		{"1 day", low(physio.Newborn, day, 0), "newborn day 1"}, {"2 days", low(physio.Newborn, 2*day, 0), "newborn"},
		{"28 days", low(physio.Newborn, 28*day, 0), "newborn"}, {"30 days", low(physio.Newborn, 30*day, 0), "infant"},
		{"1.99 years", low("", 1.99, 0), "infant"}, {"2 years", low("", 2, 0), "child"}, {"15.9 years", low("", 15.9, 0), "child"},
		{"16 years", low("", 16, 0), "adult"}, {"undated pregnancy", low(physio.Pregnant, 0, 0), "trimester 3"},
		{"first trimester", low(physio.Pregnant, 0, 1), "trimester 1"}, {"third", low(physio.Pregnant, 0, 3), "trimester 3"},
	} {
		if c.got != table[c.want] {
			t.Errorf("%s does not take the table %s", c.what, c.want)
		}
	}
}

// TestPaediatricCriteria tries the bands of PALICC 2015 (OI 4, 8, 16; OSI 5,
// 7.5, 12.3) and the threshold of PALICC-2 2023 on high flow (P/F 300, S/F 250,
// from 1.5 L/min per kg or 30 L/min) below, at and above.
func TestPaediatricCriteria(t *testing.T) {
	met := func(device physio.Device, pairs ...any) string {
		s := of(t, "child", 0, pairs...)
		s.Device = device
		a := assess(s)
		out := ""
		for _, c := range physio.Criteria(&a) {
			out += c.Definition + " " + c.Part
		}
		return out
	}
	oi := func(mean float64) string { // FiO2 0.5 and PaO2 50: OI is the mean pressure
		return met(physio.Ventilator, physio.PaO2, 50, physio.FiO2, 0.5, physio.Pmean, mean)
	}
	osi := func(mean float64) string { // FiO2 0.9 and SpO2 90 %: OSI is the mean pressure
		return met(physio.Ventilator, physio.SpO2, 0.90, physio.FiO2, 0.9, physio.Pmean, mean)
	}
	pf := func(po2, flow float64) string {
		return met(physio.HighFlow, physio.PaO2, po2, physio.FiO2, 0.4, physio.OxygenFlow, flow, physio.Weight, 20)
	}
	sf := func(s, flow float64) string {
		return met(physio.HighFlow, physio.SpO2, s, physio.FiO2, 0.38, physio.OxygenFlow, flow)
	}
	const nasalPF = "PALICC-2 2023 P/F 300 mmHg or below on high flow (possible, on nasal support)"
	const nasalSF = "PALICC-2 2023 S/F 250 or below with SpO2 up to 97 % on high flow (possible, on nasal support)"
	band := func(name, b string) string { return "PALICC 2015 " + name + " in the band " + b }
	for _, c := range []struct{ what, got, want string }{
		{"OI 3.9", oi(3.9), ""}, {"OI 4", oi(4), band("OI", "mild")}, {"OI 7.9", oi(7.9), band("OI", "mild")}, {"OI 8", oi(8), band("OI", "moderate")},
		{"OI 15.9", oi(15.9), band("OI", "moderate")}, {"OI 16", oi(16), band("OI", "severe")},
		{"OSI 4.9", osi(4.9), ""}, {"OSI 5.1", osi(5.1), band("OSI", "mild")}, {"OSI 7.4", osi(7.4), band("OSI", "mild")}, {"OSI 7.6", osi(7.6), band("OSI", "moderate")},
		{"OSI 12.2", osi(12.2), band("OSI", "moderate")}, {"OSI 12.4", osi(12.4), band("OSI", "severe")},
		{"P/F 300 at 1.5 L/min/kg", pf(120, 30), nasalPF}, {"P/F 301", pf(120.4, 30), ""}, {"P/F 300 below the flow", pf(120, 29.9), ""},
		{"S/F 250 at 30 L/min", sf(0.95, 30), nasalSF}, {"S/F 252.6", sf(0.96, 30), ""}, {"S/F 250 below the flow", sf(0.95, 29.9), ""},
	} {
		if c.got != c.want {
			t.Errorf("%s: %q, want %q", c.what, c.got, c.want)
		}
	}
}
