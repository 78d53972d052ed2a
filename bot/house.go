package bot

import (
	"encoding/json"
	"errors"
	"fmt"
	"strings"

	"galeward/bot/memory"
	"galeward/bot/reply"
	"galeward/bot/shorthand"
	"galeward/bot/store"
)

// house shows this channel's rules, or sets one.
func (t *turn) house() {
	words := strings.Fields(t.line.Argument)
	switch {
	case len(words) == 0 || words[0] == "show":
		t.showHouse()
	case words[0] == "history":
		t.houseHistory()
	case words[0] == "restore" && len(words) == 2:
		t.restoreHouse(words[1])
	case words[0] == "export":
		t.exportHouse()
	default:
		t.setHouse(words)
	}
}

// showHouse prints the rules as plain sentences with an example line.
func (t *turn) showHouse() {
	h := t.v.House
	var r reply.Reply
	r.Add(reply.Headline, fmt.Sprintf("House rules, revision %d", t.v.Revision))
	if t.v.Degraded {
		r.Add(reply.Notice, storeDown)
	}
	for _, rule := range houseRules {
		if text := rule.show(h); text != "" {
			r.Add(reply.Item, text)
		}
	}
	r.Add(reply.Item, "Example: "+shorthand.Example(h.Habits()))
	t.finish("house", r)
}

// setHouse sets one rule. A rule said in a sentence is read back first: only
// the word house in front of it changes anything.
func (t *turn) setHouse(words []string) {
	rule, value, ok := findRule(words)
	if !ok {
		t.houseHint(words[0])
		return
	}
	raw, err := rule.parse(value)
	if err != nil {
		t.houseSays(upperFirst(err.Error()))
		return
	}
	if t.line.Sentence {
		t.readBack(rule.names[0] + " " + value)
		return
	}
	if !t.v.House.MayChange(t.e.User, t.e.Manager) {
		t.houseSays("These rules may be changed by named users only; nothing was changed.")
		return
	}
	_, rev, err := t.b.memory.ChangeHouse(t.ctx, whereOf(t.e.Where), t.e.User, func(h memory.House) (memory.House, error) {
		if rule.merge != nil {
			return withField(h, rule.key, rule.merge(h, raw))
		}
		return withField(h, rule.key, raw)
	})
	t.houseResult(rev, err)
}

// readBack asks for a rule that was said in a sentence to be set in so many
// words: nothing changes by the way.
func (t *turn) readBack(rule string) {
	text := "Set for this channel: " + rule + "? Then type: house " + rule
	var r reply.Reply
	r.Add(reply.Question, text)
	t.finish("house", r)
	t.answer.Machine.Question = &MachineQuestion{ID: "house_rule", Text: text}
}

// withField gives the rules with one field of the file form replaced; a nil
// value takes the field away.
func withField(h memory.House, key string, raw any) (memory.House, error) {
	file, err := h.Encode()
	if err != nil {
		return h, err
	}
	var m map[string]any
	if err := json.Unmarshal(file, &m); err != nil {
		return h, err
	}
	if raw == nil {
		delete(m, key)
	} else {
		m[key] = raw
	}
	if file, err = json.Marshal(m); err != nil {
		return h, err
	}
	return memory.DecodeHouse(file)
}

// houseResult says what became of a change: stored, stored on one server only,
// or not stored.
func (t *turn) houseResult(rev memory.Revision, err error) {
	var problems memory.Problems
	var clash *memory.ClashError
	switch {
	case err == nil, errors.Is(err, store.ErrNotReplicated):
		t.houseStored(rev, err != nil)
	case errors.As(err, &problems), errors.As(err, &clash), errors.Is(err, memory.ErrNoRevision), errors.Is(err, memory.ErrBusy):
		t.houseSays(upperFirst(err.Error()) + ". Nothing was changed.")
	case errors.Is(err, memory.ErrUncertain):
		t.houseSays("The store broke off: whether the rule is stored is not known. Type house to see.")
	case errors.Is(err, store.ErrFull):
		t.houseSays("The store has no room: the rule was not stored.")
	case errors.Is(err, memory.ErrDown):
		t.houseSays("The store does not answer: the rule was not stored.")
	default:
		t.b.log.Error("house change", "error", err.Error())
		t.houseSays("The rule was not stored.")
	}
}

func (t *turn) houseStored(rev memory.Revision, oneServer bool) {
	var r reply.Reply
	r.Add(reply.Headline, fmt.Sprintf("Stored as revision %d", rev.N))
	if len(rev.What) == 0 {
		r = reply.Reply{}
		r.Add(reply.Headline, "Nothing to change")
	}
	for _, rule := range houseRules {
		if changed(rev.What, rule.key) {
			r.Add(reply.Item, orDefault(rule.show(rev.House), rule))
		}
	}
	if oneServer {
		r.Add(reply.Notice, "Not yet confirmed on a second server.")
	}
	r.Add(reply.Item, "Example: "+shorthand.Example(rev.House.Habits()))
	t.finish("house", r)
}

func orDefault(text string, rule houseRule) string {
	if text == "" {
		return upperFirst(rule.names[0]) + ": not set."
	}
	return text
}

func changed(what []memory.Change, key string) bool {
	for _, c := range what {
		if c.Field == key {
			return true
		}
	}
	return false
}

func (t *turn) houseSays(text string) {
	var r reply.Reply
	r.Add(reply.Notice, text)
	t.finish("house", r)
}

// houseHint answers a rule that is not known with the known ones.
func (t *turn) houseHint(word string) {
	var names []string
	for _, rule := range houseRules {
		names = append(names, rule.names[0])
	}
	t.houseSays(fmt.Sprintf("No house rule is called %q. The rules: %s. Example: house units kPa", word, strings.Join(names, ", ")))
}

func (t *turn) houseHistory() {
	revs, err := t.b.memory.Revisions(t.ctx, whereOf(t.e.Where), 8)
	if err != nil {
		t.houseResult(memory.Revision{}, err)
		return
	}
	var r reply.Reply
	r.Add(reply.Headline, fmt.Sprintf("House rules, revision %d", t.v.Revision))
	for _, rev := range revs {
		parts := make([]string, len(rev.What))
		for i, c := range rev.What {
			parts[i] = c.Field + " " + orWord(c.From) + " to " + orWord(c.To)
		}
		r.Add(reply.Item, fmt.Sprintf("%d, %s: %s.", rev.N, rev.At.UTC().Format("2006-01-02 15:04 UTC"), strings.Join(parts, "; ")))
	}
	t.finish("house", r)
}

func orWord(s string) string {
	if s == "" {
		return "not set"
	}
	return s
}

func (t *turn) restoreHouse(number string) {
	var n int
	if _, err := fmt.Sscanf(number, "%d", &n); err != nil || n < 0 {
		t.houseSays("Which revision? A number, such as: house restore 2")
		return
	}
	if !t.v.House.MayChange(t.e.User, t.e.Manager) {
		t.houseSays("These rules may be changed by named users only; nothing was changed.")
		return
	}
	_, rev, err := t.b.memory.Restore(t.ctx, whereOf(t.e.Where), t.e.User, n)
	t.houseResult(rev, err)
}

func (t *turn) exportHouse() {
	file, err := t.v.House.Encode()
	if err != nil {
		t.houseResult(memory.Revision{}, err)
		return
	}
	t.houseSays(string(file))
}
