package physio_test

import (
	"testing"

	"galeward/physio"
)

// adultOnly is the list of rules that were made on adults: the number's key and
// who must not get it, besides newborns.
var adultOnly = []struct {
	key            string
	infant, child  bool // told there all the same
	whyNotNewborns string
}{
	{"expected_paco2", false, true, "Winters and base excess: neither kidney nor breathing answers as an adult's"},
	{"expected_hco3_acute", false, true, "Brackett 1965, adults"},
	{"expected_hco3_chronic", false, true, "Brackett 1969, Martinu 2003, adults"},
	{"expected_ph_acute", false, true, "Schlichtig 1998, adults"},
	{"expected_ph_chronic", false, true, "as the bicarbonate"},
	{"pbw", false, false, "ARDS Network 2000, adults; Ward 2018 found no agreed rule for children"},
	{"vt_per_pbw", false, false, "as predicted weight"},
	{"rox", false, false, "Roca 2019, adults; a child's rate differs by age (Yuniar 2024)"},
	{"vent_ratio", false, false, "Sinha 2009, adults: 100 mL/kg and 37.5 mmHg"},
	{"ve_corrected", false, false, "the bands are an adult's litres"},
	{"alveolar_vent", false, false, "2.2 mL/kg dead space; more in infants (Numa and Newth 1996)"},
	{"rsbi", false, false, "Yang and Tobin 1991, adults"},
	{"aa_expected", false, false, "Mellemgaard 1966, from 15 years"},
	{"pao2_expected_at_paco2", true, true, "a newborn has a wider A-a (Nelson 1963)"},
	{"sao2_calc", true, true, "adult haemoglobin"},
}

// metabolic is an acidosis on air with everything that the adult rules ask for.
func metabolic(t *testing.T, population string) physio.Sample {
	s := of(t, population, 0, physio.PHq, 7.22, physio.PaCO2, 30, physio.HCO3, 12, physio.PaO2, 90, physio.SpO2, 0.95,
		physio.FiO2, 0.21, physio.RR, 30, physio.VT, 400, physio.VE, 12, physio.Height, 150)
	s.Sex, s.Circumstance = physio.Female, physio.SpontaneousBreathing
	return s
}

// passive is the same in controlled ventilation.
func passive(t *testing.T, population string) physio.Sample {
	s := metabolic(t, population)
	s.Circumstance, s.Device, s.Mode = 0, physio.Ventilator, physio.VolumeCtrl
	return s
}

func told(key string, samples ...physio.Sample) bool {
	for _, s := range samples {
		a := assess(s)
		if _, ok := a.Index(key); ok {
			return true
		}
	}
	return false
}

// TestAdultRulesStayWithAdults: each rule of the list is told of an adult and
// not of newborns, infants or children but where the list says so.
func TestAdultRulesStayWithAdults(t *testing.T) {
	for _, rule := range adultOnly {
		for population, want := range map[string]bool{
			"adult": true, "newborn": false, "newborn day 1": false, "preterm": false, "infant": rule.infant, "child": rule.child,
		} {
			if got := told(rule.key, metabolic(t, population), passive(t, population)); got != want {
				t.Errorf("%s of %s: told %v, want %v (%s)", rule.key, population, got, want, rule.whyNotNewborns)
			}
		}
	}
}

// TestAdultVerdictsStayWithAdults: what verdicts and criteria take from adult
// rules is not said of newborns and infants.
func TestAdultVerdictsStayWithAdults(t *testing.T) {
	for _, population := range []string{"newborn", "newborn day 1", "preterm", "infant"} {
		ab := assess(metabolic(t, population)).AcidBase
		if ab.Need != physio.NoNeed || ab.NeedSpan != (physio.Span{}) || ab.Compensation != physio.CompensationNotStated || len(ab.Also) != 0 {
			t.Errorf("%s: need %q %v, %s, %v", population, ab.Need, ab.NeedSpan, ab.Compensation, ab.Also)
		}
		retention := assess(of(t, population, 0, physio.PHq, 7.20, physio.PaCO2, 75, physio.HCO3, 29)).AcidBase
		if retention.Course != physio.CourseNotClear || retention.UsualPaCO2 != (physio.Span{}) || retention.DaysFit {
			t.Errorf("%s: course %s, usual %v", population, retention.Course, retention.UsualPaCO2)
		}
		cannula := of(t, population, 0, physio.PaO2, 60, physio.PaCO2, 40, physio.OxygenFlow, 1)
		cannula.Device = physio.Cannula
		if a := assess(cannula); a.Oxygen.Known {
			t.Errorf("%s: a cannula is estimated as %v", population, a.Oxygen.FiO2)
		}
		if v := assess(passive(t, population)).Ventilation; v.Basis != "" {
			t.Errorf("%s: efficiency of ventilation by %s", population, v.Basis)
		}
		chronic := assess(of(t, population, 0, physio.PHq, 7.38, physio.PaCO2, 60, physio.HCO3, 34, physio.SpO2, 0.97, physio.FiO2, 0.4))
		if chronic.Raised(physio.CautionRetainer) || chronic.Raised(physio.CautionAboveRetainer) {
			t.Errorf("%s is warned of as a retainer", population)
		}
		supported := assess(of(t, population, 0, physio.PaO2, 60, physio.PaCO2, 40, physio.FiO2, 0.6, physio.PEEP, 8))
		for _, c := range physio.Criteria(&supported) {
			if c.Definition == "Berlin 2012" || c.Definition == "global definition 2024" {
				t.Errorf("%s meets %s", population, c.Definition)
			}
		}
	}
	adult := of(t, "adult", 0, physio.PaO2, 60, physio.PaCO2, 40, physio.FiO2, 0.6, physio.PEEP, 8)
	if a := assess(adult); len(physio.Criteria(&a)) == 0 {
		t.Error("an adult on the same support meets nothing: the test above can not fail")
	}
}

// TestRuleNamesTheTableUsed: what stands behind the PaCO2 verdict is the table
// of the population.
func TestRuleNamesTheTableUsed(t *testing.T) {
	for population, cutoff := range map[string]string{
		"adult": "35 to 45 mmHg (4.7 to 6.0 kPa)", "preterm": "35 to 55 mmHg (4.7 to 7.3 kPa)", "trimester 3": "26 to 34 mmHg (3.5 to 4.5 kPa)",
	} {
		a := assess(of(t, population, 0, physio.PaCO2, 40))
		if rule, ok := a.RuleFor("paco2_range"); !ok || rule.Cutoff != cutoff || rule.Source != a.Ranges.Source || rule.Source == "" {
			t.Errorf("%s: %+v", population, rule)
		}
	}
	a := assess(of(t, "newborn", 0, physio.PaO2, 55))
	if rule, _ := a.RuleFor("pao2_scale"); rule.Cutoff != "50, 40 and 30 mmHg" {
		t.Errorf("newborn PaO2: %+v", rule)
	}
}
