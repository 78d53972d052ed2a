package bot_test

import (
	"bufio"
	"encoding/json"
	"fmt"
	"os"
	"slices"
	"sort"
	"strings"
	"testing"

	"galeward/bot"
)

// published is one row of testdata/cases/cases.jsonl: a gas from a teaching
// page, a textbook or a paper, with its author's conclusion.
type published struct {
	ID, Setting, Sample, Units string
	Values                     map[string]float64
	Published                  struct {
		Primary, Timing, Oxygenation string
		Second                       []string
		Derived                      map[string]float64
	}
}

func cases(t *testing.T) []published {
	t.Helper()
	f, err := os.Open("../testdata/cases/cases.jsonl")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	var all []published
	s := bufio.NewScanner(f)
	s.Buffer(nil, 1<<20)
	for s.Scan() {
		var c published
		if err := json.Unmarshal(s.Bytes(), &c); err != nil {
			t.Fatal(err)
		}
		all = append(all, c)
	}
	if len(all) == 0 {
		t.Fatal("no cases")
	}
	return all
}

// typed writes a case as the line a user would type.
func (c published) typed() string {
	var b strings.Builder
	switch c.Sample {
	case "venous":
		b.WriteString("vbg ")
	case "capillary":
		b.WriteString("cap gas ")
	}
	keys := make([]string, 0, len(c.Values))
	for k := range c.Values {
		keys = append(keys, k)
	}
	sort.Strings(keys)
	for _, k := range keys {
		b.WriteString(c.value(k) + " ")
	}
	for word, typed := range map[string]string{"pregnan": "pregnant", "preterm": "preterm", "VLBW": "preterm", "BPD": "infant"} {
		if strings.Contains(c.Setting, word) {
			b.WriteString(typed + " ")
		}
	}
	for _, m := range []string{"3350 m", "4559 m"} {
		if strings.Contains(c.Setting, m) {
			b.WriteString("altitude " + m)
		}
	}
	return strings.TrimSpace(b.String())
}

func (c published) value(key string) string {
	v := c.Values[key]
	switch key {
	case "fio2":
		return fmt.Sprintf("fio2 %g%%", 100*v)
	case "pco2", "po2":
		if c.Units == "kPa" {
			return fmt.Sprintf("%s %gkPa", key, v)
		}
	case "alb":
		return fmt.Sprintf("albumin %g", v)
	case "age":
		if v < 1 {
			return fmt.Sprintf("%.0f weeks old", v*52)
		}
		return fmt.Sprintf("%gyo", v)
	case "spo2", "sao2", "svo2", "cohb", "methb":
		return fmt.Sprintf("%s %g%%", key, v)
	}
	return fmt.Sprintf("%s %g", key, v)
}

// disagreements are the cases whose author concludes otherwise, each with the
// reason a clinician would accept. A case that agrees must not be listed.
var disagreements = map[string]string{
	"c161": "neither pH nor HCO3 is given: that the low PaCO2 is a compensated alkalosis of a day or more can't be read from these numbers",
}

// TestCasesAgree types every published case and holds the answer against its
// author's conclusion.
func TestCasesAgree(t *testing.T) {
	total, agreed := 0, 0
	for _, c := range cases(t) {
		a := ask(t, c.typed())
		validate(t, a)
		reason := c.disagrees(a)
		total++
		if reason == "" {
			agreed++
		}
		listed, known := disagreements[c.ID]
		switch {
		case reason != "" && !known:
			t.Errorf("%s %q: %s\n%s", c.ID, c.typed(), reason, a.Text())
		case reason == "" && known:
			t.Errorf("%s agrees and is still listed: %s", c.ID, listed)
		}
	}
	t.Logf("%d of %d published cases agree", agreed, total)
	if agreed*100 < total*97 {
		t.Errorf("only %d of %d published cases agree", agreed, total)
	}
}

// disagrees says how an answer differs from the author's conclusion, "" when
// it does not: the primary process must be named, nothing may be called its
// opposite, acute may not be called chronic, a low oxygen not adequate.
func (c published) disagrees(a bot.Answer) string {
	m := a.Machine
	if m.Kind != "reading" || m.AcidBase == nil {
		return "not read: " + m.Kind
	}
	for key, want := range map[string]string{"ph": "ph", "pco2": "paco2", "po2": "pao2"} {
		if _, given := c.Values[key]; given && m.Values[want] == nil {
			return want + " was lost"
		}
	}
	named := append([]string{m.AcidBase.Primary}, m.AcidBase.Also...)
	for _, p := range processesIn(c.Published.Primary) {
		if !slices.Contains(named, p) {
			return fmt.Sprintf("the author names %s, the answer %v", p, named)
		}
	}
	if misled := c.courseMisleads(m.AcidBase.Course); misled != "" {
		return misled
	}
	low := strings.Contains(c.Published.Oxygenation, "hypoxaemia") && !strings.Contains(c.Published.Oxygenation, "not")
	if low && m.Oxygenation.Level == "adequate" {
		return "the author finds hypoxaemia, the answer calls it adequate"
	}
	return ""
}

func processesIn(text string) []string {
	var out []string
	for _, kind := range []string{"respiratory", "metabolic"} {
		for _, side := range []string{"acidosis", "alkalosis"} {
			name := kind + " " + side
			if strings.Contains(text, name) {
				out = append(out, kind+"_"+side)
			}
		}
	}
	return out
}

func (c published) courseMisleads(course string) string {
	timing := c.Published.Timing
	respiratory := strings.Contains(c.Published.Primary, "respiratory")
	switch {
	case !respiratory:
		return ""
	case timing == "acute" && course == "chronic":
		return "the author calls it acute, the answer chronic"
	case strings.HasPrefix(timing, "chronic") && course == "acute":
		return "the author calls it chronic, the answer acute"
	case strings.HasPrefix(timing, "chronic") && course == "none":
		return "the author calls it chronic, the answer gives no course"
	}
	return ""
}

// TestCasesIndices holds the derived numbers against those that the authors
// printed: within 10 mmHg or 10 % for A-a (they use 1.25 x PaCO2 and other
// pressures), 1 for gaps.
func TestCasesIndices(t *testing.T) {
	names := map[string]string{"aa": "aa", "ag": "anion_gap", "pa_et": "pa_et_gap", "pf": "pf", "exp_hco3": "expected_hco3_acute"}
	compared := 0
	for _, c := range cases(t) {
		m := ask(t, c.typed()).Machine
		for key, want := range c.Published.Derived {
			ix, ok := m.Indices[names[key]]
			if !ok || sourceOff[c.ID+" "+key] != "" {
				continue
			}
			compared++
			if tolerance := max(10, 0.10*want); ix.Value < want-tolerance || ix.Value > want+tolerance {
				t.Errorf("%s %s: printed %g, worked out %g", c.ID, key, want, ix.Value)
			}
		}
	}
	if compared < 30 {
		t.Errorf("only %d numbers were compared", compared)
	}
}

// sourceOff are printed numbers that do not follow from the printed gas.
var sourceOff = map[string]string{}
