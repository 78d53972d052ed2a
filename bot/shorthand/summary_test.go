package shorthand

import (
	"fmt"
	"sort"
	"strings"
	"testing"

	"galeward/physio"
)

// summary writes a line in one short text, so that a table can state all that
// a message must be read as.
func summary(l Line) string {
	var parts []string
	switch l.Kind {
	case Silence:
		return "silence"
	case Unclear:
		return "unclear"
	case Refusal:
		return "refused " + string(l.Refused)
	case Released:
		return "picked " + l.Picked.Word
	}
	if l.Intent != IntentNone {
		parts = append(parts, ":"+string(l.Intent))
	}
	if l.Argument != "" {
		parts = append(parts, fmt.Sprintf("(%s)", l.Argument))
	}
	if l.List {
		parts = append(parts, "list")
	}
	for _, d := range l.Declined {
		parts = append(parts, "declined:"+string(d))
	}
	if !l.Target.Empty() {
		parts = append(parts, "target{"+valuesText(&l.Target)+"}")
	}
	if !l.Change.Empty() {
		parts = append(parts, "change{"+valuesText(&l.Change)+"}")
	}
	for i := range l.Gases {
		parts = append(parts, gasText(&l.Gases[i]))
	}
	return strings.Join(parts, " ")
}

var circumstances = []struct {
	c    physio.Circumstance
	name string
}{
	{physio.COPD, "copd"}, {physio.AsthmaAttack, "asthma"}, {physio.Retainer, "retainer"}, {physio.ECMO, "ecmo"}, {physio.CPR, "cpr"},
	{physio.PostArrest, "post_arrest"}, {physio.CyanoticHeart, "cyanotic"}, {physio.BrainInjury, "brain"}, {physio.Heliox, "heliox"},
	{physio.Hyperbaric, "hyperbaric"}, {physio.SmokeOrCO, "smoke"}, {physio.MetHbCause, "methb"}, {physio.JustChanged, "just_changed"},
	{physio.Prone, "prone"}, {physio.Shock, "shock"}, {physio.HomeVentilation, "home_vent"}, {physio.BledInOxygen, "bled_in"},
	{physio.SpontaneousBreathing, "spont"}, {physio.OpioidOrSedation, "sedation"}, {physio.Ketoacidosis, "dka"}, {physio.Sepsis, "sepsis"},
	{physio.Transfusion, "transfusion"}, {physio.Anxious, "anxious"}, {physio.PulmonaryHypertensionNewborn, "pphn"}, {physio.TempCorrected, "temp_corrected"},
}

func valuesText(v *physio.Values) string {
	var out []string
	v.Each(func(q physio.Quantity, x float64) {
		out = append(out, fmt.Sprintf("%s=%.4g", q.Key(), x))
	})
	return strings.Join(out, " ")
}

func gasText(g *Gas) string {
	s := &g.Sample
	out := []string{valuesText(&s.Values)}
	add := func(name string, v any) {
		if text := fmt.Sprint(v); text != "" && text != "0" && text != "false" {
			out = append(out, name+text)
		}
	}
	if s.Blood != physio.NoBlood {
		add("blood:", s.Blood)
	}
	add("site:", s.Site)
	if s.DeviceTaken {
		add("taken:", s.Device)
	} else {
		add("on:", s.Device)
	}
	add("mode:", s.Mode)
	add("sex:", s.Sex)
	add("pop:", s.Population)
	add("trimester:", s.Trimester)
	for _, c := range circumstances {
		if s.Circumstance.Has(c.c) {
			out = append(out, "said:"+c.name)
		}
	}
	add("bed:", g.Bed)
	add("at:", g.Time)
	add("follow:", g.Follow)
	if g.UsualPaCO2 > 0 {
		out = append(out, fmt.Sprintf("usual:%.4g", g.UsualPaCO2))
	}
	if g.Target != nil {
		out = append(out, fmt.Sprintf("keep:%.4g-%.4g", g.Target.Low, g.Target.High))
	}
	var notes []string
	for _, n := range g.Notes {
		notes = append(notes, fmt.Sprintf("!%s:%s:%s=%.4g", n.Code, n.Quantity.Key(), n.Typed, n.Value))
	}
	sort.Strings(notes)
	out = append(out, notes...)
	for _, q := range g.Questions {
		var words []string
		for _, c := range q.Choices {
			words = append(words, c.Word)
		}
		out = append(out, fmt.Sprintf("?%s[%s]", q.Code, strings.Join(words, "|")))
	}
	return strings.TrimSpace(strings.Join(out, " "))
}

// lineTest is a line with the summary that it must be read as. where says what
// the channel is like: K types kPa, N has newborns, Q was not addressed, T has
// an earlier gas in the thread.
type lineTest struct{ where, text, want string }

func (l lineTest) habits() Habits {
	h := Habits{Addressed: true}
	for _, c := range l.where {
		switch c {
		case 'K':
			h.Units = KPa
		case 'N':
			h.Setting.Population = physio.Newborn
		case 'Q':
			h.Addressed = false
		case 'T':
			h.Earlier = &physio.Sample{Device: physio.Cannula}
		}
	}
	return h
}

func runLines(t *testing.T, lines []lineTest) {
	t.Helper()
	for _, l := range lines {
		if got := summary(Parse(l.text, l.habits())); got != l.want {
			t.Errorf("%s %q:\n got %s\nwant %s", l.where, l.text, got, l.want)
		}
	}
}
