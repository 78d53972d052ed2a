package bot

import (
	"slices"
	"strings"

	"galeward/bot/memory"
	"galeward/bot/reply"
	"galeward/bot/shorthand"
)

// kin is a remembered gas with its place among the gases of its message.
type kin struct {
	memory.Entry
	at, of int
}

// listed says that the gas came in a list: a question about it can not be
// answered in one word.
func (k *kin) listed() bool { return k != nil && k.of > 1 }

// gases lists the thread's gases but those that the event edits.
func (t *turn) gases() []kin {
	var found []kin
	place := map[string]int{}
	for _, e := range t.v.Thread().Entries() {
		at := place[e.Message]
		place[e.Message]++
		if t.e.Kind != Edited || e.Message != t.e.Message {
			found = append(found, kin{Entry: e, at: at})
		}
	}
	for i := range found {
		found[i].of = place[found[i].Message]
	}
	return found
}

// last is the last of them.
func (t *turn) last() (kin, bool) {
	all := t.gases()
	if len(all) == 0 {
		return kin{}, false
	}
	return all[len(all)-1], true
}

// parent finds the gas that a line follows: the last one of the bed that it
// names, or the last one of the thread. Where that was one of several beds, or
// there is none, it gives the question instead: a guess would change another
// patient's gas.
func (t *turn) parent(bed string) (kin, *asked) {
	all := t.gases()
	if len(all) == 0 {
		return kin{}, &asked{id: askParent, text: askParentText}
	}
	last := all[len(all)-1]
	if bed != "" {
		for _, k := range slices.Backward(all) {
			if strings.EqualFold(k.Gas.Bed, bed) {
				return k, nil
			}
		}
		if last.Gas.Bed == "" && !last.listed() {
			return last, nil // the line names the bed of the one gas
		}
		return kin{}, whichBed(all)
	}
	for _, k := range all {
		if k.Message == last.Message && (!strings.EqualFold(k.Gas.Bed, last.Gas.Bed) || last.listed() && k.Gas.Time == "") {
			return kin{}, whichBed(all)
		}
	}
	return last, nil
}

// whichBed asks for the bed, naming those of the thread.
func whichBed(all []kin) *asked {
	var beds []string
	for _, k := range all {
		if k.Gas.Bed != "" && !slices.Contains(beds, k.Gas.Bed) {
			beds = append(beds, k.Gas.Bed)
		}
	}
	if len(beds) == 0 {
		return &asked{id: askBed, text: askGasText}
	}
	return &asked{id: askBed, text: "Which bed: " + strings.Join(beds, ", ") + "? The bed goes in front: bed " + beds[0] + " ..."}
}

// bedSaid is the bed of the thread that a command names.
func (t *turn) bedSaid() string {
	if len(t.line.Gases) == 1 && t.line.Gases[0].Bed != "" {
		return t.line.Gases[0].Bed
	}
	words := strings.Fields(t.line.Argument)
	for i, w := range words {
		if w == "bed" && i+1 < len(words) {
			return words[i+1]
		}
	}
	return ""
}

// askWhich asks which gas is meant.
func (t *turn) askWhich(which *asked) {
	var r reply.Reply
	for _, n := range t.notices() {
		r.Add(reply.Notice, n)
	}
	r.Add(reply.Question, which.text)
	t.finish("question", r)
	t.answer.Machine.Question = &MachineQuestion{ID: which.id, Text: which.text}
}

// keep remembers the gas, in the place of the one that it completes, and the
// question that it left open; the buttons get their tokens.
func (t *turn) keep(c *composer, r *reply.Reply) {
	message := t.e.Message
	if c.replaces != nil {
		message = c.replaces.Message
	}
	question := c.question
	if question == nil {
		question = c.unsaid
	}
	open := question != nil && question.from != nil && !c.replaces.listed()
	kept := message != "" && !t.v.Degraded && !t.v.Full
	if !kept || !open {
		r.Buttons = nil
	}
	if !kept {
		return // nothing can come back to it
	}
	t.keeps = true
	if c.replaces == nil {
		t.v.Put(memory.Entry{Message: message, At: t.now(), Gas: *c.gas})
	} else {
		entries := t.v.Thread().ByMessage(message)
		entries[c.replaces.at].Gas = *c.gas
		t.v.Put(entries...)
	}
	if !open {
		return
	}
	t.v.Ask(*question.from, message)
	for i := range r.Buttons {
		r.Buttons[i].Token = buttonToken(message, question, r.Buttons[i].Label)
	}
}

// readAgain shows a gas once more, with the notices before it.
func (t *turn) readAgain(k kin) {
	c := t.composer(&k.Gas)
	c.notices = t.notices()
	r := c.compose()
	r.Buttons = nil
	t.answer.Reply, t.answer.Machine = r, c.machine(r)
}

// composer assesses a gas for an answer.
func (t *turn) composer(g *shorthand.Gas) *composer {
	return &composer{gas: g, a: t.assess(g), n: numbers{t.v.House.Units}}
}
