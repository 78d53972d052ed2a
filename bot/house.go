package bot

import (
	"encoding/json"
	"errors"
	"fmt"
	"strconv"
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
	case len(words) == 0, words[0] == "show", words[0] == "rules":
		t.showHouse()
	case words[0] == "history":
		t.houseHistory()
	case words[0] == "restore":
		t.restoreHouse(strings.Join(words[1:], " "))
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
	if rule.key == editorsKey {
		value = editorsTyped(t.e, rule.names)
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
	_, rev, err := t.b.memory.ChangeHouse(t.ctx, whereOf(t.e.Where), t.e.User, func(h memory.House) (memory.House, error) {
		next, err := rule.set(h, raw)
		if may := t.mayChange(h, next, err == nil); may != nil {
			return h, may
		}
		return next, err
	})
	t.houseResult(rev, err)
}

// set puts what was parsed into the rules.
func (r houseRule) set(h memory.House, parsed any) (memory.House, error) {
	if r.merge != nil && parsed != nil {
		parsed = r.merge(h, parsed)
	}
	return withField(h, r.key, parsed)
}

var (
	errNoEditor  = errors.New("the rules may not be changed by this user")
	errLockedOut = errors.New("the user would not be able to change the rules again")
)

// mayChange says whether the asker may change the rules that the store holds,
// and, where the new ones are known, whether these would still let him.
func (t *turn) mayChange(now, next memory.House, known bool) error {
	switch {
	case !now.MayChange(t.e.User, t.e.Manager):
		return errNoEditor
	case known && !next.MayChange(t.e.User, t.e.Manager):
		return errLockedOut
	}
	return nil
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
	case errors.Is(err, errNoEditor):
		t.houseSays("These rules may be changed by named users only; nothing was changed.")
	case errors.Is(err, errLockedOut):
		t.houseSays("You would not be able to change these rules again; nothing was changed. Example: house editors me managers")
	case errors.As(err, &clash):
		t.houseSays(clashWords(clash))
	case errors.As(err, &problems), errors.Is(err, memory.ErrNoRevision), errors.Is(err, memory.ErrBusy):
		t.houseSays(upperFirst(strings.ReplaceAll(err.Error(), "\n", "; ")) + ". Nothing was changed.")
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
		return strings.Replace(upperFirst(rule.names[0]), "Co2", "CO2", 1) + ": not set."
	}
	return text
}

// changed says that a revision touched a rule: the whole of it, or one of its
// parts, such as words.npo2.
func changed(what []memory.Change, key string) bool {
	for _, c := range what {
		if c.Field == key || strings.HasPrefix(c.Field, key+".") {
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

// restoreHouse makes an earlier revision the one in force.
func (t *turn) restoreHouse(number string) {
	n, err := strconv.Atoi(number)
	if err != nil || n < 1 {
		t.houseSays("Which revision? A number, such as: house restore 2")
		return
	}
	_, rev, err := t.b.memory.Restore(t.ctx, whereOf(t.e.Where), t.e.User, n, func(now, earlier memory.House) error {
		return t.mayChange(now, earlier, true)
	})
	t.houseResult(rev, err)
}
