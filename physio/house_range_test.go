package physio_test

import (
	"regexp"
	"strings"
	"testing"

	"galeward/physio"
)

func TestDefaultCriticalIsWhatAssessUses(t *testing.T) {
	for _, p := range []physio.Population{physio.Adult, physio.Pregnant, physio.Child, physio.Newborn, physio.Preterm} {
		var s physio.Sample
		s.Set(physio.PHq, 7.3)
		s.Population = p
		if got, want := physio.Assess(s, physio.Setting{}).CriticalLimits, physio.DefaultCritical(p); got != want {
			t.Errorf("%s: assessed with %+v, the default is %+v", p, got, want)
		}
	}
	if physio.DefaultCritical(physio.Newborn).PaO2Low != 0 || physio.DefaultCritical(physio.PopulationUnstated).PaO2Low != 45 {
		t.Error("a newborn has no critical PaO2 by default, an adult has 45 mmHg")
	}
}

func TestTheRangeThatWasUsedIsTold(t *testing.T) {
	var s physio.Sample
	s.Set(physio.PHq, 7.33)
	s.Set(physio.PaCO2, 50)
	house := physio.Span{Low: 45, High: 55}
	for _, c := range []struct {
		name  string
		set   physio.Setting
		want  physio.Span
		house bool
		level physio.Level
		rule  string
	}{
		{"population", physio.Setting{}, physio.Span{Low: 35, High: 45}, false, physio.LevelHypoventilation, "35 to 45 mmHg"},
		{"house", physio.Setting{TargetPaCO2: &house}, house, true, physio.LevelAdequate, "45 to 55 mmHg"},
	} {
		a := physio.Assess(s, c.set)
		if v := a.Ventilation; v.Range != c.want || v.RangeHouse != c.house || v.Level != c.level {
			t.Errorf("%s: %+v %v %s", c.name, v.Range, v.RangeHouse, v.Level)
		}
		if rule, _ := a.RuleFor("paco2_range"); !strings.HasPrefix(rule.Cutoff, c.rule) {
			t.Errorf("%s: the rule says %q", c.name, rule.Cutoff)
		}
	}
}

// barePressure finds a pressure behind its name with no unit behind it.
var barePressure = regexp.MustCompile(`(?:PaCO2|PaO2)(?: up to| below| above)? \d+(?:[^\d ]| [^m])|P/F \d+(?: and \d+)?(?:[^\d a]| [^ma])`)

func TestCutoffsOfPressuresCarryTheirUnit(t *testing.T) {
	for _, key := range []string{"aa", "pf", "sf", "expected_paco2", "pa_et_gap", "paco2_range", "pao2_scale", "critical", "borderline"} {
		rule, ok := physio.RuleFor(key)
		if !ok || !strings.Contains(rule.Cutoff, "mmHg") || barePressure.MatchString(rule.Cutoff+".") {
			t.Errorf("%s: a pressure without its unit in %q", key, rule.Cutoff)
		}
	}
	newborn := physio.Sample{Population: physio.Newborn}
	newborn.Set(physio.PHq, 7.3)
	a := physio.Assess(newborn, physio.Setting{})
	if rule, _ := a.RuleFor("critical"); rule.Cutoff != "pH below 7.20, pH above 7.60, PaCO2 above 70 mmHg" {
		t.Errorf("a newborn's critical limits: %q", rule.Cutoff)
	}
}
