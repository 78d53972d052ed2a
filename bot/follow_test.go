package bot_test

import (
	"strings"
	"testing"
)

// followed types lines in one thread and gives the text of the last answer.
func followed(lines ...string) string {
	r := newRoom()
	for i, line := range lines {
		r.handle(typed(string(rune('a'+i)), line))
	}
	return r.posts[len(r.posts)-1].Reply.Text()
}

// What a follow-up belongs to is said, and what belongs to another patient or
// another oxygen is not mixed in.
func TestFollowUps(t *testing.T) {
	for _, c := range []struct {
		name          string
		lines         []string
		holds, lacked string
	}{
		{"an addition is named", []string{"7.28/58/62/27", "hb 9"}, "Added to the gas before: Hb 9", ""},
		{"oxygen in place of air", []string{"7.40/40/95/24 ra", "on 40"}, "FiO2 40 %", "on air"},
		{"air in place of a flow", []string{"7.40/40/95/24 2L nc", "on air"}, "on air", "2 L/min"},
		{"bedside values on another oxygen", []string{"7.40/40/95/24 60%", "spo2 88 4l nc rr 28"}, "O2 low", "PaO2 95"},
		{"both pressures anew", []string{"7.40/40/95/24 60%", "co2 58 o2 60 hco3 27"}, "58", "60 %"},
		{"a whole gas as a correction", []string{"7.31/62/58/30 2l nc copd", "sorry wrong pt 7.40/40/95/24 ra"}, "on air", "COPD"},
		{"more oxygen than said", []string{"7.40/40/300/24 ra", "more oxygen"}, "On how much oxygen?", "on air"},
	} {
		text := followed(c.lines...)
		if !strings.Contains(text, c.holds) || c.lacked != "" && strings.Contains(text, c.lacked) {
			t.Errorf("%s: want %q and not %q in\n%s", c.name, c.holds, c.lacked, text)
		}
	}
}

func TestTalkAboutAGasIsNoAnswer(t *testing.T) {
	for _, line := range []string{"abg on bed 12 looks bad again", "vent is free for the next one"} {
		r := newRoom()
		r.handle(typed("m1", "7.05/95/40 nrb"))
		e := typed("m2", line)
		e.Addressed = false
		r.handle(e)
		if r.count() != 1 {
			t.Errorf("%q was answered:\n%s", line, r.last(t).Reply.Text())
		}
	}
}

func TestASaturationThatContradictsThePaO2(t *testing.T) {
	text := followed("7.40/40/95/24 60% spo2 88")
	if !strings.HasPrefix(text, "CO2 in range; O2 in doubt (SpO2 88)") {
		t.Errorf("an SpO2 of 88 %% beside a PaO2 of 95:\n%s", text)
	}
}

// A correction that can't be read is never lost in silence.
func TestACorrectionThatIsNotReadIsAsked(t *testing.T) {
	for line, want := range map[string]bool{
		"sorry 58 not 48": true, "48 should read 58": true, "sorry 50 was a typo, it's 60": true,
		"sorry bed 4 needs a neb": false, "sorry, back in 5": false,
	} {
		r := newRoom()
		r.handle(typed("m1", "7.36/48/64 50%"))
		e := typed("m2", line)
		e.Addressed = false
		r.handle(e)
		text := r.last(t).Reply.Text()
		got := r.count() == 2 && (strings.Contains(text, "A correction, but of which value?") || strings.Contains(text, "void"))
		if got != want {
			t.Errorf("%q was taken for a correction %v, want %v:\n%s", line, got, want, text)
		}
	}
}
