package physio_test

import (
	"encoding/csv"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"testing"
)

// section is one section of the reference sheets that the check values come
// from: which measures of the check files belong to it, and which tests hold
// what it says without a number of its own.
type section struct {
	sheet, number, title string
	measures             *regexp.Regexp
	tests                []string
}

var sections = []section{
	{"oxygenation", "1", "pressures and water vapour", re("^(pb_|pio2|ph2o|unit_)"), []string{"TestReferenceWaterVapour", "TestReferenceStandardAtmosphere", "TestPressureChoice"}},
	{"oxygenation", "2", "alveolar gas", re("^pao2_alveolar"), []string{"TestFullAgainstShortAlveolarEquation", "TestExchangeRatioMatters"}},
	{"oxygenation", "3", "A-a", re("^aa_"), []string{"TestExpectedDifferenceByAge"}},
	{"oxygenation", "4", "PaO2 by age", re("^pao2_predicted"), []string{"TestPredictedPaO2"}},
	{"oxygenation", "5", "ratios", re("^(ri_|sf_|oi$|osi$|rox$|pf_)"), []string{"TestRiceLineBothWays", "TestOximetryCeiling", "TestCutoffs"}},
	{"oxygenation", "6", "criteria", nil, []string{"TestCriteriaAreNotDiagnoses", "TestPaediatricCriteria"}},
	{"oxygenation", "7", "dissociation", re("^(so2_|po2_|p50)"), []string{"TestCurveHoldsAtBothEnds", "TestCurveInverse"}},
	{"oxygenation", "8", "content and delivery", re("^(do2|vo2|cao2|cvo2|cco2|o2er|hufner|o2_sol|av_o2|spo2_gap)"), []string{"TestContentWithAndWithoutCooximetry"}},
	{"oxygenation", "9", "shunt and other FiO2", re("^shunt_"), []string{"TestShuntOfIsoShuntLines", "TestPaO2AtAnotherFiO2", "TestFitFindsTheLungBehindTheGases", "TestAdmixture"}},
	{"oxygenation", "10", "grades and targets", nil, []string{"TestCutoffs", "TestTablesMatchPublishedRanges"}},
	{"oxygenation", "11", "plausibility", nil, []string{"TestCautionsFireByTrigger", "TestSamplesSayWhatTheyMay"}},
	{"oxygenation", "12", "mechanisms", nil, []string{"TestCriteriaAreNotDiagnoses", "TestMechanisms"}},
	{"oxygenation", "13", "inspired oxygen", re("^(venturi|fio2_|entrain|cylinder|tank)"), []string{"TestCannula", "TestMasks", "TestHighFlowBelowInspiratoryFlow"}},
	{"oxygenation", "15", "what a careful clinician insists on", nil, []string{"TestOneStatementEach", "TestOximetryCeiling", "TestCautionsFireByTrigger", "TestCriteriaAreNotDiagnoses"}},
	{"ventilation", "1", "Henderson-Hasselbalch and base excess", re(`^(HCO3 (from|log|with|spread)|SBE|BE |Henderson|\[H|total CO2|standard bicarb|mmHg|kPa)`), []string{"TestTripleRoundTrips", "TestHouseFamilyIsOfOnePiece"}},
	{"ventilation", "2", "temperature", re(`temperature|per degree|PO2 (log|CLSI)`), []string{"TestAcidBloodIsCorrectedLess"}},
	{"ventilation", "3", "PaCO2 and settings", re(`^(VA |VE |VD ventilation|VA from|required|PaCO2 after|apnoea|anatomical|dead space adult|VT at|conversion|pH (linear|after|rule 0.1))`), []string{"TestBreathForATarget", "TestResponsesHaveACourseAndALimit"}},
	{"ventilation", "4", "dead space and efficiency", re(`^(VD/VT|VD phys|ventilatory ratio|corrected VE|EtCO2)`), []string{"TestCutoffs", "TestTableDeadSpaceFromOutput"}},
	{"ventilation", "5", "mechanics", re(`^(PBW|VT 6)`), []string{"TestMechanicsOfOneBreath", "TestBreathingIndex"}},
	{"ventilation", "6", "naming and expected responses", re(`^(Winters|exact regression|met alk|Copenhagen|acute|chronic)`), []string{"TestUsualPaCO2", "TestChronicBandReachesCohorts", "TestTablesMatchPublishedRanges"}},
	{"ventilation", "7", "gaps, strong ions, osmoles", re(`^(AG|expected AG|delta|potential|calculated osm|osmolal|ethanol|phosphate|albumin|HCO3 term|SIG|Na-Cl|lactate)`), []string{"TestGapWithPotassiumAndChlorideRatio"}},
	{"ventilation", "8", "sample types", nil, []string{"TestSamplesSayWhatTheyMay"}},
	{"ventilation", "9", "forms of ventilatory failure", nil, []string{"TestRetainersAreChronic", "TestCutoffs"}},
	{"ventilation", "10", "measurement error", re(`^(CLIA|smallest|inter-inst)`), []string{"TestReadingsCoverRepeatSamples", "TestReferenceIntervals"}},
}

func re(s string) *regexp.Regexp { return regexp.MustCompile(s) }

// TestNoSectionIsEmpty prints, for each section of the sheets, how many check
// rows are met, how many of these hold against a misprint, and which tests
// stand for the rest. A row that belongs nowhere, a section with neither rows
// nor tests, and a test that does not exist are failures.
func TestNoSectionIsEmpty(t *testing.T) {
	names := testNames(t)
	met, explained := map[string]int{}, map[string]int{}
	for _, sheet := range []string{"oxygenation", "ventilation"} {
		countRows(t, sheet, met, explained)
	}
	for _, s := range sections {
		key := s.sheet + " " + s.number
		if met[key]+explained[key] == 0 && len(s.tests) == 0 {
			t.Errorf("%s, %s: nothing holds it", key, s.title)
		}
		for _, name := range s.tests {
			if !slices.Contains(names, name) {
				t.Errorf("%s names %s, which does not exist", key, name)
			}
		}
		t.Logf("%-14s %-40s rows met %3d, against a misprint %2d, tests %d", key, s.title, met[key], explained[key], len(s.tests))
	}
}

func countRows(t *testing.T, sheet string, met, explained map[string]int) {
	f, err := os.Open("../testdata/checks/" + sheet + "_checks.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for _, row := range rows[1:] {
		i := slices.IndexFunc(sections, func(s section) bool {
			return s.sheet == sheet && s.measures != nil && s.measures.MatchString(row[1])
		})
		if i < 0 {
			t.Errorf("%s, %s belongs to no section", row[0], row[1])
			continue
		}
		key := sections[i].sheet + " " + sections[i].number
		if strings.Contains(strings.Join(row, ","), "DISAGREE") || slices.Contains(row, "NO") {
			explained[key]++
		} else {
			met[key]++
		}
	}
}

func testNames(t *testing.T) []string {
	files, err := filepath.Glob("*_test.go")
	if err != nil || len(files) == 0 {
		t.Fatal("no test files")
	}
	declared := regexp.MustCompile(`(?m)^func (Test\w+)\(`)
	var names []string
	for _, file := range files {
		text, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		for _, m := range declared.FindAllStringSubmatch(string(text), -1) {
			names = append(names, m[1])
		}
	}
	return names
}
