package physio_test

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"galeward/physio"
)

// publishedRow is one row of testdata/tables/populations.csv.
type publishedRow struct {
	population, quantity, source, differs string
	height                                float64 // metres
	low, high, mean                       *float64
	n                                     float64
}

// The differences of a table from a printed limit that are allowed: published
// ranges of one population differ from each other by this much.
var limitTolerance = map[string]float64{"ph": 0.05, "paco2": 5, "hco3": 3, "pao2": 5}

// residentTolerance is how far, in mmHg, a series of residents may lie from
// the published line of PaCO2 on height, and anchorTolerance, in mmol/L, its
// bicarbonate from the anchor.
const (
	residentTolerance = 5.0
	residentOnAverage = 1.0
	anchorTolerance   = 2.0
)

func readPublished(t *testing.T) []publishedRow {
	t.Helper()
	f, err := os.Open("../testdata/tables/populations.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	if err != nil || len(lines) < 100 {
		t.Fatalf("%d lines: %v", len(lines), err)
	}
	column := map[string]int{}
	for i, name := range lines[0] {
		column[name] = i
	}
	var rows []publishedRow
	for _, line := range lines[1:] {
		rows = append(rows, published(t, func(name string) string { return line[column[name]] }))
	}
	return rows
}

func published(t *testing.T, cell func(string) string) publishedRow {
	t.Helper()
	r := publishedRow{population: cell("population"), quantity: cell("quantity"), source: cell("source"), differs: cell("differs")}
	factor, known := map[string]float64{"1": 1, "mmHg": 1, "mmol/L": 1, "kPa": 7.50062, "%": 0.01}[cell("unit")]
	if !known || cell("address") == "" || r.source == "" {
		t.Fatalf("a row without unit, source or address: %+v", r)
	}
	number := func(name string) *float64 {
		if cell(name) == "" {
			return nil
		}
		v, err := strconv.ParseFloat(cell(name), 64)
		if err != nil {
			t.Fatal(err)
		}
		v *= factor
		return &v
	}
	r.low, r.high, r.mean = number("low"), number("high"), number("mean")
	if cell("n") != "" {
		r.n, _ = strconv.ParseFloat(cell("n"), 64)
	}
	if name, height, ok := strings.Cut(r.population, " at "); ok {
		r.population = name
		if r.height, _ = strconv.ParseFloat(strings.TrimSuffix(height, " m"), 64); r.height == 0 {
			t.Fatalf("height %q", height)
		}
	}
	return r
}

// people makes a sample of each population of the tables.
var people = map[string]func(*physio.Sample){
	"adult":         func(*physio.Sample) {},
	"resident":      func(*physio.Sample) {},
	"trimester 1":   func(s *physio.Sample) { s.Population, s.Trimester = physio.Pregnant, 1 },
	"trimester 2":   func(s *physio.Sample) { s.Population, s.Trimester = physio.Pregnant, 2 },
	"trimester 3":   func(s *physio.Sample) { s.Population, s.Trimester = physio.Pregnant, 3 },
	"infant":        func(s *physio.Sample) { s.Set(physio.Age, 0.75) },
	"child":         func(s *physio.Sample) { s.Set(physio.Age, 6) },
	"newborn":       func(s *physio.Sample) { s.Population = physio.Newborn },
	"newborn day 1": func(s *physio.Sample) { s.Population = physio.Newborn; s.Set(physio.Age, 1/365.25) },
	"preterm":       func(s *physio.Sample) { s.Population = physio.Preterm },
	"cord artery":   func(s *physio.Sample) { s.Blood, s.Site = physio.Cord, physio.CordArterySite },
	"cord vein":     func(s *physio.Sample) { s.Blood, s.Site = physio.Cord, physio.CordVeinSite },
}

// of makes a sample of a population at a height in metres, with values.
func of(t *testing.T, population string, height float64, pairs ...any) physio.Sample {
	t.Helper()
	who, ok := people[population]
	if !ok {
		t.Fatalf("no population %q", population)
	}
	s := gas(pairs...)
	s.Blood = physio.Arterial
	who(&s)
	if height > 0 {
		s.Set(physio.Altitude, height)
	}
	return s
}

// TestTablesMatchPublishedRanges holds the table of each population against
// what was published of it, by the rules of testdata/tables/README.md.
func TestTablesMatchPublishedRanges(t *testing.T) {
	held := map[string]int{}
	for _, r := range readPublished(t) {
		if r.population == "retainer" || r.quantity == "spo2" || r.quantity == "pao2" && r.population == "resident" {
			continue // tests of their own
		}
		ranges := assess(of(t, r.population, r.height, physio.PaCO2, 40)).Ranges
		low, high := map[string]float64{"ph": ranges.PHLow, "paco2": ranges.PaCO2Low, "hco3": ranges.HCO3Low, "pao2": 50}[r.quantity],
			map[string]float64{"ph": ranges.PHHigh, "paco2": ranges.PaCO2High, "hco3": ranges.HCO3High}[r.quantity]
		if r.quantity == "pao2" { // newborns: the usual range has no upper end of its own
			high, r.high = math.Inf(1), nil
		}
		far := r.farFrom(low, high)
		switch {
		case far != "" && r.differs == "":
			t.Errorf("%s, %s of %s: %s, table %.4g-%.4g", r.population, r.quantity, r.source, far, low, high)
		case far == "" && r.differs != "":
			t.Errorf("%s, %s of %s no longer differs: take the reason out", r.population, r.quantity, r.source)
		}
		held[r.population]++
	}
	for population := range people {
		if held[population] < 2 {
			t.Errorf("%s is held against %d rows", population, held[population])
		}
	}
}

// farFrom says how a row misses a range, "" when it does not.
func (r publishedRow) farFrom(low, high float64) string {
	const rounding = 1e-6
	tolerance := limitTolerance[r.quantity] + rounding
	switch {
	case r.mean != nil && (*r.mean < low-rounding || *r.mean > high+rounding):
		return "the mean is outside"
	case r.low != nil && math.Abs(*r.low-low) > tolerance:
		return "the low limit is far"
	case r.high != nil && math.Abs(*r.high-high) > tolerance:
		return "the high limit is far"
	}
	return ""
}

// TestResidentsFollowThePublishedLine holds the series of residents against
// the line of PaCO2 on height of Vazquez and Perez-Padilla 2000, 38.3 - 2.5 x
// height in km, which the anchor follows.
func TestResidentsFollowThePublishedLine(t *testing.T) {
	var people, misses, largest float64
	for _, r := range readPublished(t) {
		if r.population != "resident" || r.mean == nil {
			continue
		}
		anchor := assess(of(t, "resident", r.height, physio.PaCO2, 30)).Ranges.Anchor
		if line := 38.3 - 2.5*r.height/1000; math.Abs(anchor.PaCO2-line) > 1e-9 {
			t.Fatalf("anchor at %g m is %g, the line %g", r.height, anchor.PaCO2, line)
		}
		switch miss := *r.mean; r.quantity {
		case "paco2":
			miss -= anchor.PaCO2
			people, misses, largest = people+r.n, misses+r.n*miss, max(largest, math.Abs(miss))
		case "hco3":
			if math.Abs(miss-anchor.HCO3) > anchorTolerance {
				t.Errorf("HCO3 %.1f at %g m, anchor %.1f (%s)", miss, r.height, anchor.HCO3, r.source)
			}
		}
	}
	if people < 1000 || math.Abs(misses/people) > residentOnAverage || largest > residentTolerance {
		t.Errorf("%g residents lie %.2f mmHg from the line on average, at most %.2f", people, misses/people, largest)
	}
	t.Logf("%g residents: %.2f mmHg from the line on average, at most %.2f", people, misses/people, largest)
}

// TestResidentsAreNoProblem: the mean gas of each series of residents, read as
// a patient on air at that height, shows no problem, and its PaO2 is expected.
func TestResidentsAreNoProblem(t *testing.T) {
	series := map[string]*physio.Sample{}
	key := map[string]physio.Quantity{"ph": physio.PHq, "paco2": physio.PaCO2, "hco3": physio.HCO3, "pao2": physio.PaO2}
	for _, r := range readPublished(t) {
		if r.population != "resident" || r.mean == nil {
			continue
		}
		name := r.source + strconv.Itoa(int(r.height))
		if series[name] == nil {
			s := of(t, "resident", r.height, physio.FiO2, 0.21)
			series[name] = &s
		}
		series[name].Set(key[r.quantity], *r.mean)
	}
	if len(series) < 8 {
		t.Fatalf("%d series", len(series))
	}
	for name, s := range series {
		a := assess(*s)
		if a.Ventilation.Level != physio.LevelAdequate || len(a.Critical) != 0 {
			t.Errorf("%s: %s, critical %v", name, a.Ventilation.Level, a.Critical)
		}
		if o := a.Oxygenation; s.Has(physio.PaO2) && (o.Level != physio.DegreeAdequate && !o.ExpectedHere || o.Efficiency != physio.Efficient) {
			t.Errorf("%s: oxygen %s, expected here %v, transfer %s", name, o.Level, o.ExpectedHere, o.Efficiency)
		}
		if a.AcidBase.Is(physio.MetabolicAcidosis) || a.AcidBase.Is(physio.RespiratoryAcidosis) {
			t.Errorf("%s: %s %v", name, a.AcidBase.Primary, a.AcidBase.Also)
		}
	}
}

// retainerTolerance is how far, in mmol/L, the mean bicarbonate of a group of
// retainers may lie off the band between the published slopes 0.35 and 0.51.
const retainerTolerance = 1.0

// TestRetainersAreChronic: the mean PaCO2 and bicarbonate of three stable
// groups of retainers fit chronic hypercapnia, and are read as nothing more.
func TestRetainersAreChronic(t *testing.T) {
	paco2, groups := map[string]float64{}, 0
	for _, r := range readPublished(t) {
		if r.population != "retainer" {
			continue
		}
		if r.quantity == "paco2" {
			paco2[r.source] = *r.mean
			continue
		}
		groups++
		p, hco3 := paco2[r.source], *r.mean
		band, err := physio.ChronicBicarbonate(physio.MmHg(p), physio.AnchorAdult)
		if err != nil || hco3 < band.Low-retainerTolerance || hco3 > band.High+retainerTolerance {
			t.Errorf("%s: HCO3 %.1f at PaCO2 %.1f, band %.1f-%.1f, %v", r.source, hco3, p, band.Low, band.High, err)
		}
		ab := assess(gas(physio.PaCO2, p, physio.HCO3, hco3)).AcidBase
		if len(ab.Also) != 0 || p > 45 && ab.Course != physio.Chronic || p <= 45 && ab.Primary != physio.NoProcess {
			t.Errorf("%s: %s, %s, %v", r.source, ab.Primary, ab.Course, ab.Also)
		}
	}
	if groups < 3 {
		t.Errorf("%d groups", groups)
	}
}
