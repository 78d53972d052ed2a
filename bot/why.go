package bot

import (
	"fmt"
	"slices"
	"strings"

	"galeward/bot/reply"
	"galeward/physio"
)

// whyLines is how many rules one "why" shows.
const whyLines = 4

// whyWords says which rules a word behind "why" asks for. The first row whose
// word stands in the argument decides.
var whyWords = []struct {
	words []string
	keys  []string
}{
	{[]string{"acute", "chronic", "course", "compensat", "acid", "alkal", "metabolic", "sbe", "bicarb", "hco3"},
		[]string{"expected_ph_acute", "expected_hco3_acute", "expected_hco3_chronic", "expected_paco2", "sbe"}},
	{[]string{"need", "short"}, []string{"expected_paco2", "sbe", "hco3_calc"}},
	{[]string{"gap", "delta"}, []string{"anion_gap", "anion_gap_corrected", "delta_ratio", "sig"}},
	{[]string{"sid", "strong", "stewart"}, []string{"sid_apparent", "sid_effective", "sig"}},
	{[]string{"shunt", "admixture"}, []string{"shunt", "shunt_estimated"}},
	{[]string{"critical"}, []string{"critical"}},
	{[]string{"borderline"}, []string{"borderline", "paco2_range", "pao2_scale"}},
	{[]string{"fit", "read"}, []string{"hco3_calc", "sbe"}},
	{[]string{"sat", "curve"}, []string{"sao2_calc", "pao2_scale"}},
	{[]string{"healthy"}, []string{"pao2_expected_at_paco2", "pao2_alveolar"}},
	{[]string{"vent", "co2", "dead"}, []string{"paco2_range", "vd_vt", "vent_ratio", "ve_corrected", "pa_et_gap"}},
	{[]string{"oxygen", "o2", "transfer"}, []string{"pf", "a_over_a", "aa", "sf", "pao2_scale"}},
	{[]string{"efficien"}, []string{"vd_vt", "vent_ratio", "ve_corrected", "pa_et_gap", "pf", "a_over_a", "aa", "sf"}},
}

// whyUsual is shown when no word is given.
var whyUsual = []string{"expected_ph_acute", "expected_paco2", "vd_vt", "vent_ratio", "ve_corrected", "pf", "a_over_a", "aa", "sf", "paco2_range", "pao2_scale"}

// why shows formula, inputs, cut-off and source behind the last answer, worked
// out again from the stored numbers.
func (t *turn) why() {
	parent, which := t.parent(t.bedSaid())
	if which != nil {
		t.askWhich(which)
		return
	}
	c := t.composer(&parent.Gas)
	a := c.a
	var r reply.Reply
	switch {
	case strings.Contains(t.line.Argument, "criteri"), strings.Contains(t.line.Argument, "ards"):
		for _, line := range criteriaLines(a) {
			r.Add(reply.Item, line)
		}
	case strings.Contains(t.line.Argument, "caution"):
		for _, caution := range a.Cautions {
			r.Add(reply.Item, upperFirst(c.cautionSentence(caution.Code)))
		}
	default:
		keys := whyKeys(t.line.Argument)
		for _, line := range c.whyKeys(keys) {
			r.Add(reply.Item, line)
		}
		if slices.Contains(keys, "expected_ph_acute") || slices.Contains(keys, "expected_paco2") {
			r.Add(reply.Item, c.schools())
		}
	}
	if r.Empty() {
		r.Add(reply.Item, "Nothing in the last answer rests on that.")
	}
	t.finish("why", r)
}

func whyKeys(argument string) []string {
	for key := range basisWord {
		if argument != "" && strings.EqualFold(argument, basisWord[key]) || argument == key {
			return []string{key}
		}
	}
	for _, row := range whyWords {
		for _, w := range row.words {
			if strings.Contains(argument, w) {
				return row.keys
			}
		}
	}
	return whyUsual
}

// whyKeys prints the rules that this gas has, at most four.
func (c *composer) whyKeys(keys []string) []string {
	var out []string
	for _, key := range keys {
		if len(out) == whyLines {
			break
		}
		if line := c.whyLine(key); line != "" {
			out = append(out, line)
		}
	}
	return out
}

// whyLine prints one rule: equation, inputs, result, cut-off, source.
func (c *composer) whyLine(key string) string {
	rule, ok := c.a.RuleFor(key)
	if !ok {
		return ""
	}
	ix, hasIndex := c.a.Index(key)
	if !hasIndex && !c.verdictRule(key) {
		return ""
	}
	var b strings.Builder
	b.WriteString(rule.Equation)
	if hasIndex {
		fmt.Fprintf(&b, " = %s", c.n.index(ix, ix.Value))
		if low, high := c.n.index(ix, ix.Low), c.n.index(ix, ix.High); low != high {
			fmt.Fprintf(&b, " (%s)", c.indexRange(ix))
		}
		if inputs := c.inputs(ix); inputs != "" {
			b.WriteString(" with " + inputs)
		}
	}
	b.WriteString(".")
	if rule.Cutoff != "" {
		b.WriteString(" Cut-off: " + rule.Cutoff + ".")
	}
	b.WriteString(" Source: " + rule.Source + ".")
	return b.String()
}

// criteriaLines name the oxygenation criteria that are met, with what a gas
// can not tell of the definition.
func criteriaLines(a *physio.Assessment) []string {
	var out []string
	for _, criterion := range physio.Criteria(a) {
		out = append(out, "Meets the oxygenation part of the "+criterion.Definition+": "+criterion.Part+
			". Not known from a gas: "+strings.Join(criterion.Open, ", ")+".")
	}
	if out == nil {
		return []string{"No oxygenation criterion of a published definition is met, or its device and pressure are not known."}
	}
	return out
}

// verdictRule says that a rule without an index belongs to this answer.
func (c *composer) verdictRule(key string) bool {
	switch key {
	case "paco2_range":
		return c.gas.Sample.Has(physio.PaCO2)
	case "pao2_scale":
		return c.a.Oxygenation.Level != physio.DegreeUnknown
	case "critical":
		return true
	case "borderline":
		return c.a.Ventilation.Borderline || c.a.Oxygenation.Borderline
	}
	return false
}

// inputs prints the values that a formula was given.
func (c *composer) inputs(ix physio.Index) string {
	parts := make([]string, 0, len(ix.Inputs))
	for _, q := range ix.Inputs {
		if text := c.inputText(q); text != "" {
			parts = append(parts, text)
		}
	}
	return strings.Join(parts, ", ")
}

func (c *composer) inputText(q physio.Quantity) string {
	symbol := q.Info().Symbol + " "
	switch q {
	case physio.PB:
		return symbol + plain(c.a.PB, 0) + " mmHg"
	case physio.FiO2:
		if o := c.a.Oxygen; o.Known && o.Estimated {
			return symbol + wholePercent(o.FiO2.Low) + "-" + wholePercent(o.FiO2.High) + " %"
		} else if o.Known {
			return symbol + percent(o.FiO2.Value) + " %"
		}
	}
	if v, ok := c.gas.Sample.Get(q); ok {
		return symbol + c.n.value(q, v)
	}
	return ""
}

// schools says the same finding in the words of both schools where they
// differ.
func (c *composer) schools() string {
	ab := c.a.AcidBase
	word, ok := rangeSchool[ab.Compensation]
	process := processWord[ab.Primary]
	if !ok || process == "" {
		return ""
	}
	other := courseWord[ab.Course]
	switch ab.Primary {
	case physio.MetabolicAcidosis, physio.MetabolicAlkalosis:
		other = "the respiratory response " + needWord[ab.Need]
	}
	if other == "" {
		return ""
	}
	return fmt.Sprintf("By ranges: %s %s; by expected response: %s.", word, process, other)
}

var needWord = map[physio.Need]string{
	physio.Matches: "is as expected", physio.Short: "is short of what is expected", physio.Beyond: "is beyond what is expected",
	physio.NoNeed: "is not judged here",
}
