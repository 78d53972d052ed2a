package bot

import (
	"errors"
	"fmt"
	"strings"

	"galeward/bot/memory"
	"galeward/bot/reply"
)

// historyLines is how many revisions the history shows.
const historyLines = 8

// houseHistory lists the last changes of the rules, the newest first.
func (t *turn) houseHistory() {
	revs, err := t.b.memory.Revisions(t.ctx, whereOf(t.e.Where), historyLines)
	if err != nil {
		t.houseUnread("history", err)
		return
	}
	var r reply.Reply
	if len(revs) == 0 {
		r.Add(reply.Headline, "No house rule was changed yet")
	}
	for i, rev := range revs {
		if i == 0 {
			r.Add(reply.Headline, fmt.Sprintf("House rules, revision %d", rev.N))
		}
		parts := make([]string, len(rev.What))
		for j, c := range rev.What {
			parts[j] = c.Field + " from " + changeWords(c.Field, c.From) + " to " + changeWords(c.Field, c.To)
		}
		r.Add(reply.Item, fmt.Sprintf("%d, %s: %s.", rev.N, rev.At.UTC().Format("2006-01-02 15:04 UTC"), strings.Join(parts, "; ")))
	}
	t.finish("house", r)
}

// houseUnread says that something could not be read, which is no word about a
// change.
func (t *turn) houseUnread(what string, err error) {
	if errors.Is(err, memory.ErrDown) {
		t.houseSays("The store does not answer: the " + what + " can't be read.")
		return
	}
	t.b.log.Error("house "+what, "error", err.Error())
	t.houseSays("The " + what + " can't be read.")
}

// changeWords prints one side of a change; user ids are counted, not named.
func changeWords(field, value string) string {
	switch {
	case field == editorsKey && value == "":
		return "everyone"
	case field == editorsKey:
		return editorWords(strings.Split(value, ", "))
	case value == "":
		return "not set"
	}
	return value
}

// clashWords says what someone else changed a moment before.
func clashWords(e *memory.ClashError) string {
	parts := make([]string, len(e.Theirs))
	for i, c := range e.Theirs {
		parts[i] = c.Field + " is now " + changeWords(c.Field, c.To)
	}
	return fmt.Sprintf("Someone else changed the same rule a moment ago (%s, revision %d). Nothing was changed.",
		strings.Join(parts, "; "), e.N)
}

// exportLine is about how long one line of an export is: short enough that no
// platform breaks it, long enough that a full house is one message.
const exportLine = 400

// exportHouse writes the rules in their file form, as lines that give the file
// again when they are put below each other.
func (t *turn) exportHouse() {
	if t.v.Degraded {
		t.houseSays("The store does not answer: the rules can't be exported.")
		return
	}
	file, err := t.v.House.Encode()
	if err != nil {
		t.houseUnread("house rules", err)
		return
	}
	var r reply.Reply
	line := ""
	for _, piece := range strings.Split(strings.TrimSpace(string(file)), "\n") {
		piece = strings.TrimSpace(piece)
		if line != "" && len(line)+len(piece) > exportLine {
			r.Add(reply.Item, line)
			line = ""
		}
		line = strings.TrimSpace(line + " " + piece)
	}
	r.Add(reply.Item, line)
	t.finish("house", r)
}
