package memory

import (
	"cmp"
	"encoding/json"
	"slices"
	"time"

	"galeward/bot/shorthand"
)

// Entry is one remembered gas: numbers, device words, bed label and times.
// There is no field for a user or for the typed text.
type Entry struct {
	// Message is the platform's id of the question.
	Message string
	// Post is the platform's name of the answer, "" when it can not be found
	// again.
	Post string
	// At is when the gas was typed.
	At time.Time
	// Gas is what was read.
	Gas shorthand.Gas
}

// The most that one thread keeps: the oldest messages go first.
const (
	mostMessages = 8
	mostEntries  = 24 // a pasted list of beds is one message with many entries
)

// held is an entry as it lies in a thread. It is shared by the threads that
// hold it and is not changed once it was stored: a change makes a new one.
type held struct {
	Entry
	until time.Time
	raw   json.RawMessage // the entry as stored, nil until it was
}

// Thread is what one thread remembers: its gases in the order in which they
// were typed, its open question, and what was already asked. It is read
// through methods and changed through the Visit that holds it; the slices
// inside of what it gives are shared and must be left as they are.
type Thread struct {
	entries []*held
	pending *shorthand.Question
	of      string // the message whose gas the pending question is about
	asked   []shorthand.QuestionCode
	flat    string // of a thread under a message: the key of the other copy
}

// Entries lists the gases in the order in which they were typed.
func (t *Thread) Entries() []Entry {
	all := make([]Entry, len(t.entries))
	for i := range t.entries {
		all[i] = t.entries[i].Entry
	}
	return all
}

// ByMessage gives the gases that a message brought, none when it is not
// remembered.
func (t *Thread) ByMessage(message string) []Entry {
	var found []Entry
	for i := range t.entries {
		if t.entries[i].Message == message {
			found = append(found, t.entries[i].Entry)
		}
	}
	return found
}

// Pending gives the open question and the message it is about, or nil.
func (t *Thread) Pending() (question *shorthand.Question, message string) {
	return t.pending, t.of
}

// Asked says that a question was already asked in this thread.
func (t *Thread) Asked(code shorthand.QuestionCode) bool { return slices.Contains(t.asked, code) }

func (t *Thread) empty() bool { return len(t.entries) == 0 && t.pending == nil && len(t.asked) == 0 }

// clone copies what a change could touch: a Thread in the cache is shared.
func (t *Thread) clone() Thread {
	c := *t
	c.entries = slices.Clone(t.entries)
	c.asked = slices.Clone(t.asked)
	return c
}

// put replaces what a message brought by new entries. An edited question keeps
// its place among the others and its answer; a new one ends an open question.
func (t *Thread) put(message string, entries []*held) {
	earlier := t.ByMessage(message)
	if len(earlier) == 0 || t.of == message {
		t.pending, t.of = nil, ""
	}
	t.entries = slices.DeleteFunc(t.entries, func(e *held) bool { return e.Message == message })
	for _, e := range entries {
		if len(earlier) > 0 {
			kept := *e
			kept.At, kept.Post, kept.raw = earlier[0].At, cmp.Or(e.Post, earlier[0].Post), nil
			e = &kept
		}
		t.entries = append(t.entries, e)
	}
	slices.SortStableFunc(t.entries, func(a, b *held) int { return a.At.Compare(b.At) })
	t.trim()
}

// trim drops the oldest messages beyond what is kept.
func (t *Thread) trim() {
	for n := t.messages(); n > mostMessages || n > 1 && len(t.entries) > mostEntries; n-- {
		oldest := t.entries[0].Message
		t.entries = slices.DeleteFunc(t.entries, func(e *held) bool { return e.Message == oldest })
	}
	if over := len(t.entries) - mostEntries; over > 0 { // one message alone is too long
		t.entries = t.entries[over:]
	}
}

// messages counts the messages that the entries came from.
func (t *Thread) messages() int {
	n := 0
	for i := range t.entries {
		if !slices.ContainsFunc(t.entries[:i], func(e *held) bool { return e.Message == t.entries[i].Message }) {
			n++
		}
	}
	return n
}

// each changes the entries of one message.
func (t *Thread) each(message string, change func(*held)) {
	for i := range t.entries {
		if t.entries[i].Message == message {
			changed := *t.entries[i]
			changed.raw = nil
			change(&changed)
			t.entries[i] = &changed
		}
	}
}

// remove takes a message's gases away, and the question about them.
func (t *Thread) remove(message string) {
	t.entries = slices.DeleteFunc(t.entries, func(e *held) bool { return e.Message == message })
	if t.of == message {
		t.pending, t.of = nil, ""
	}
	if len(t.entries) == 0 && t.pending == nil {
		t.asked = nil
	}
}

// ask opens a question; it replaces an open one.
func (t *Thread) ask(q shorthand.Question, message string) {
	t.pending, t.of = &q, message
	if !slices.Contains(t.asked, q.Code) {
		t.asked = append(t.asked, q.Code)
	}
}

// expire drops the gases whose time is over.
func (t *Thread) expire(now time.Time) {
	gone := func(e *held) bool { return !e.until.After(now) }
	if slices.ContainsFunc(t.entries, gone) {
		t.entries = slices.DeleteFunc(t.entries, gone)
		if len(t.entries) == 0 {
			t.pending, t.of, t.asked = nil, "", nil
		}
	}
}
