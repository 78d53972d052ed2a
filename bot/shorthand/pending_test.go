package shorthand

import (
	"encoding/json"
	"testing"

	"galeward/physio"
)

// pendingOf gives the first question of a line.
func pendingOf(t *testing.T, text string) *Question {
	t.Helper()
	l := Parse(text, Habits{Addressed: true})
	if len(l.Gases) == 0 || len(l.Gases[0].Questions) == 0 {
		t.Fatalf("%q asks nothing: %s", text, summary(l))
	}
	return &l.Gases[0].Questions[0]
}

func TestOneWordAnswersAQuestion(t *testing.T) {
	for _, c := range []struct{ line, answer, want string }{
		{"7.34/50/40/26", "venous", "picked venous"},
		{"7.34/50/40/26", "it was venous", "picked venous"},
		{"7.34/50/40/26", "VBG!", "picked venous"},
		{"7.34/50/40/26", "art", "picked arterial"},
		{"7.10/12/14 60%", "kpa", "picked kPa"},
		{"7.10/12/14 60%", "mm hg", "picked mmHg"},
		{"7.28/58/62/27 fio2 4", "40%", "picked 40 %"},
		{"7.28/58/62/27 fio2 4", "40", "picked 40 %"},
		{"7.28/58/62/27 fio2 4", "4L", "picked 4 L/min"},
		{"7.28/58/62/27 fio2 4", "4 l/min", "picked 4 L/min"},
		{"7.28/58/62/27 fio2 4", "second", "picked 40 %"},
		{"7.28/58/62/27 fio2 4", "2", "picked 40 %"},
		{"7.28/58/62/27 fio2 4", "no", "picked 40 %"},
		{"73/58/62/28 40%", "yes", "picked pH 7.30"},
		{"73/58/62/28 40%", "7.30", "picked pH 7.30"},
		{"73/58/62/28 40%", "ph 7.30", "picked pH 7.30"},
		{"7.30/75/52/25 40%", "swapped", "picked swapped"},
		{"7.30/75/52/25 40%", "as typed", "picked as typed"},
		{"7.36/44/68/25 10L", "hudson", "picked simple mask"},
		{"7.36/44/68/25 10L", "nrb", "picked reservoir mask"},
		{"7.36/44/68/25 ht 1.78 m", "male", "picked male"},
		{"7.36/44/68/25 ht 1.78 m", "f", "picked female"},
		{"7.36/44/68/25 wt 190", "lb", "picked lb"},
		{"7.36/44/68/25 hfnc 50/60", "60 L", "picked 60 L/min at 50 %"},
		{"7.28/58/62/27/40", "fio2", "picked FiO2"},
		{"7.28/58/62/27/40", "sat", "picked saturation"},
		{"7.28/58/62/27 28", "rate", "picked rate"},
		{"7.28/58/62/27 28", "rr 20", "rr=20"},
		{"7.28/58/62/27 28", "the rate is 28", "rr=28"},
		{"7.29/67/55/31 2L NC now on 28% VM", "2L", "picked 2 L"},
		{"7.29/67/55/31 2L NC now on 28% VM", "the mask, 28%", "picked 28 %"},
		{"7.34/50/40/26", "no idea what you mean by that", "unclear"},
		{"7.34/50/40/26", "7.40/40/90/24 ra", "ph=7.4 paco2=40 pao2=90 hco3=24 fio2=0.21 on:air"},
	} {
		got := summary(Parse(c.answer, Habits{Addressed: true, Pending: pendingOf(t, c.line)}))
		if got != c.want {
			t.Errorf("%q after %q: got %s, want %s", c.answer, c.line, got, c.want)
		}
	}
}

// Every choice of every question can be picked by its own word, and carries
// what it changes.
func TestEveryChoiceCanBePicked(t *testing.T) {
	for _, m := range readMessages(t) {
		h := habitsOf(m.Profile)
		h.Addressed = true
		for _, g := range Parse(m.Text, h).Gases {
			for _, q := range g.Questions {
				for i := range q.Choices {
					h.Pending = &q
					l := Parse(q.Choices[i].Word, h)
					if l.Kind != Released || l.Picked.Word != q.Choices[i].Word {
						t.Errorf("%s: %q does not pick itself of %+v: %s", m.ID, q.Choices[i].Word, q.Choices, summary(l))
					}
				}
			}
		}
	}
}

// A question is stored beside the thread: it must come back as it went.
func TestQuestionSurvivesStorage(t *testing.T) {
	q := pendingOf(t, "7.28/58/62/27 be_ 2 fio2 4")
	b, err := json.Marshal(q)
	if err != nil {
		t.Fatal(err)
	}
	var back Question
	if err := json.Unmarshal(b, &back); err != nil {
		t.Fatal(err)
	}
	if back.Code != q.Code || len(back.Choices) != len(q.Choices) || back.Choices[1].Set != q.Choices[1].Set {
		t.Errorf("stored %+v, got back %+v", q, back)
	}
}

func TestHouseWords(t *testing.T) {
	words := map[string]string{"v": "vt", "p": "peep", "o": "fio2", "blue box": "hfnc", "ph": "fio2", "big": "fio2 900"}
	for text, want := range map[string]string{
		"7.31/53/64/26 v 420 p10 o 60":       "ph=7.31 paco2=53 pao2=64 hco3=26 fio2=0.6 vt=420 peep=10",
		"7.31/53/64/26 Blue Box 40L 50%":     "ph=7.31 paco2=53 pao2=64 hco3=26 fio2=0.5 flow=40 on:high_flow",
		"pH 7.31 co2 53 o2 64 rr 20":         "ph=7.31 paco2=53 pao2=64 rr=20",
		"7.31/53/64/26 big":                  "ph=7.31 paco2=53 pao2=64 hco3=26 ?fio2[90 %]",
		"7.31/53/64/26 over 50%, no ovation": "ph=7.31 paco2=53 pao2=64 hco3=26 fio2=0.5",
	} {
		if got := summary(Parse(text, Habits{Addressed: true, Words: words})); got != want {
			t.Errorf("%q: got %s, want %s", text, got, want)
		}
	}
}

// The example of help is read without a note, in every order and unit.
func TestExampleIsReadPlainly(t *testing.T) {
	for _, h := range []Habits{
		{}, {Units: KPa},
		{Order: []physio.Quantity{physio.PHq, physio.PaO2, physio.PaCO2, physio.HCO3}},
		{Units: KPa, Order: []physio.Quantity{physio.PHq, physio.PaO2, physio.PaCO2, physio.BE, physio.HCO3, physio.SaO2}},
		{Order: []physio.Quantity{physio.PHq, physio.PaCO2, physio.PaO2, physio.BE, physio.HCO3, physio.SaO2}},
	} {
		h.Addressed = true
		l := Parse(Example(h), h)
		if len(l.Gases) != 1 || doubted(l) {
			t.Fatalf("%q: %s", Example(h), summary(l))
		}
		if !reads(l, physio.PHq, 7.28, 0) || !reads(l, physio.PaCO2, 58, 0.5) || !reads(l, physio.PaO2, 62, 0.5) || !reads(l, physio.FiO2, 0.4, 0) {
			t.Errorf("%q: %s", Example(h), summary(l))
		}
	}
}

// A fault of the reader is no answer: silence, or "not read" to who asked.
func TestPanicIsContained(t *testing.T) {
	broken := map[string]string{"x": "y"}
	h := Habits{Words: broken, Pending: &Question{Choices: make([]Choice, 1)}}
	for addressed, want := range map[bool]Kind{true: Unclear, false: Silence} {
		h.Addressed = addressed
		if got := contained(h, func() Line { panic("broken") }); got.Kind != want {
			t.Errorf("addressed %v: kind %d, want %d", addressed, got.Kind, want)
		}
	}
}
