package bot

import (
	"math"
	"slices"
	"strings"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// released applies the choice that answered the open question.
func (t *turn) released() {
	pending, message := t.v.Thread().Pending()
	entries := t.v.Thread().ByMessage(message)
	if pending == nil || len(entries) != 1 || t.line.Picked == nil {
		t.unclear()
		return
	}
	parent := kin{Entry: entries[0]}
	g := parent.Gas
	g.Questions = nil
	for _, q := range parent.Gas.Questions {
		if q.Code != pending.Code || q.Typed != pending.Typed {
			g.Questions = append(g.Questions, q)
		}
	}
	choose(&g.Sample, t.line.Picked)
	t.deliverReading(&composer{gas: &g, n: numbers{t.v.House.Units}, notices: t.notices(), replaces: &parent})
}

// choose makes of a sample what a choice says.
func choose(s *physio.Sample, p *shorthand.Choice) {
	s.Drop(p.Drop...)
	if s.Device == physio.Air && slices.Contains(p.Drop, physio.FiO2) {
		s.Device = physio.DeviceUnstated
	}
	s.Values.Merge(&p.Set)
	if p.Blood != physio.BloodUnstated {
		s.Blood = p.Blood
	}
	if p.Device != physio.DeviceUnstated {
		s.Device, s.DeviceTaken = p.Device, false
	}
	if p.Sex != physio.SexUnstated {
		s.Sex = p.Sex
	}
	s.Circumstance |= p.Circumstance
}

// A button's token names the gas, the question and the word: one that was shown
// before the question was answered, or before the gas was replaced, is closed.
const tokenSign = "|"

func buttonToken(message string, q *asked, word string) string {
	return strings.Join([]string{message, q.id, word}, tokenSign)
}

// pressed answers with the word of a button, while its question is open.
func (t *turn) pressed() {
	parts := strings.SplitN(t.e.Token, tokenSign, 3)
	q, of := t.v.Thread().Pending()
	if q != nil && len(parts) == 3 && parts[0] == of && parts[1] == string(q.Code) {
		for i := range q.Choices {
			if q.Choices[i].Word == parts[2] {
				t.line = shorthand.Line{Kind: shorthand.Released, Picked: &q.Choices[i]}
				t.released()
				return
			}
		}
	}
	t.answer.Private = true
	t.says("question", closedText)
}

// openDoubts gives the doubts about g that an addition leaves open. One whose
// choice the addition repeats is settled by that choice as a whole, one whose
// quantity it brings by what it brings.
func openDoubts(g, add *shorthand.Gas) []shorthand.Question {
	var open []shorthand.Question
	for _, q := range g.Questions {
		picked, touched := repeated(&q, &add.Sample)
		switch {
		case picked != nil:
			choose(&g.Sample, picked)
			g.Sample.Values.Merge(&add.Sample.Values)
		case !touched:
			open = append(open, q)
		}
	}
	return open
}

// repeated finds the one choice that an addition says again, and whether the
// addition is about the question at all.
func repeated(q *shorthand.Question, add *physio.Sample) (picked *shorthand.Choice, touched bool) {
	touched = add.Has(q.Quantity)
	found := 0
	for i := range q.Choices {
		choice := &q.Choices[i]
		fits, said := choiceFits(choice, add)
		touched = touched || said
		if fits && said {
			picked = choice
			found++
		}
	}
	if found != 1 {
		picked = nil
	}
	return picked, touched
}

// choiceFits says whether an addition says anything of what a choice is about,
// and whether all of that is what the choice says.
func choiceFits(choice *shorthand.Choice, add *physio.Sample) (fits, said bool) {
	fits = true
	choice.Set.Each(func(q physio.Quantity, v float64) {
		if now, ok := add.Get(q); ok {
			said = true
			fits = fits && math.Abs(now-v) <= 1e-6*math.Abs(v)
		}
	})
	if choice.Blood != physio.BloodUnstated && add.Blood != physio.BloodUnstated && add.Blood != physio.NoBlood {
		said = true
		fits = fits && choice.Blood == add.Blood
	}
	if choice.Device != physio.DeviceUnstated && add.Device != physio.DeviceUnstated {
		said = true
		fits = fits && choice.Device == add.Device
	}
	return fits, said
}
