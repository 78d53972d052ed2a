package bot

import (
	"context"
	"fmt"
	"strings"

	"galeward/bot/memory"
	"galeward/bot/reply"
	"galeward/bot/shorthand"
	"galeward/physio"
)

// turn is one event on its way through the bot: what was remembered, what was
// read, and the answer in the making.
type turn struct {
	b      *Bot
	ctx    context.Context
	e      Event
	v      *memory.Visit
	line   shorthand.Line
	answer Answer
	// keeps is true when the thread has to be saved even without an answer.
	keeps bool
	// before is the gas that a follow-up follows, nil for none.
	before *shorthand.Gas
	// stood is true when the answer carries the standing notice.
	stood bool
	// amends is the post that the answer replaces, "" for a new one.
	amends Ref
}

// begin loads what is remembered and claims the event. It returns nil when the
// event was already taken; with an error, a turn of which only the claim can be
// saved.
func (b *Bot) begin(ctx context.Context, e Event) (*turn, error) {
	v, err := b.memory.Load(ctx, memory.Call{
		Where: whereOf(e.Where), Delivery: e.Delivery, User: e.User, Message: e.Message,
		Opens: e.Where.Thread == "" && e.Can.Has(CanThread),
	})
	if v == nil || v.Claim == memory.Duplicate {
		return nil, err
	}
	return &turn{b: b, ctx: ctx, e: e, v: v}, err
}

func whereOf(p Place) memory.Where {
	return memory.Where{Platform: p.Platform, Workspace: p.Workspace, Channel: p.Channel, Thread: p.Thread}
}

// work answers the event. Where the rules are not known, the answer is private:
// too private can be put right, the reverse not.
func (t *turn) work() {
	t.answer.Private = t.e.Private || t.v.House.Private || t.v.Degraded && !t.v.Known
	switch t.e.Kind {
	case Deleted:
		t.deleted()
		return
	case Edited:
		t.edited()
		return
	case Pressed:
		t.pressed()
		return
	case Shortcut:
		if t.e.About != nil {
			t.e.Text = t.e.About.Text
		}
		t.answer.Private = true
	}
	t.typed()
}

// typed reads the line and runs what it asks for.
func (t *turn) typed() {
	if !t.meant() {
		return
	}
	t.line = t.parse()
	switch t.line.Kind {
	case shorthand.Refusal:
		t.refuse()
	case shorthand.Unclear:
		t.unclear()
	case shorthand.Command:
		t.command()
	case shorthand.Released:
		t.released()
	case shorthand.Reading:
		t.reading()
	default:
		t.quiet()
	}
}

// quiet says nothing, but for a word or two in a console: there a mistyped
// command would stay without any answer.
func (t *turn) quiet() {
	t.answer.Machine = Machine{V: MachineVersion, Kind: "silence"}
	if t.line.TakesBack {
		t.says("question", takenBack)
		return
	}
	if n := len(strings.Fields(t.e.Text)); t.e.Listening && t.e.User != "" && (n == 1 || n == 2) {
		t.says("question", hintNothing)
	}
}

// meant says which messages are read: those that address the bot, replies in
// a thread in which it answered, and the rest only where the house listens.
func (t *turn) meant() bool {
	inThread := t.e.Where.Thread != "" && len(t.v.Thread().Entries()) > 0
	if t.e.Addressed || t.e.Listening || inThread || t.v.House.Listen {
		return true
	}
	t.answer.Machine = Machine{V: MachineVersion, Kind: "silence"}
	return false
}

// parse reads the line. One that was not addressed in so many words is read a
// second time as if it were: in a thread of ours for what completes or corrects
// its last gas, in a console for commands. Chatter stays chatter.
func (t *turn) parse() shorthand.Line {
	h := t.habits()
	line := shorthand.Parse(t.e.Text, h)
	if h.Addressed {
		return line
	}
	if t.chatter(&line) {
		return shorthand.Line{Kind: shorthand.Silence}
	}
	if line.Kind != shorthand.Silence || !t.e.Listening && h.Earlier == nil {
		return line
	}
	h.Addressed = true
	again := shorthand.Parse(t.e.Text, h)
	follows := t.e.Listening && again.Intent != shorthand.IntentNone
	for i := range again.Gases {
		f := again.Gases[i].Follow
		follows = follows || f != shorthand.FollowNone && (h.Earlier != nil || f != shorthand.FollowAddition)
	}
	switch {
	case t.chatter(&again):
	case again.Kind == shorthand.Command, again.Kind == shorthand.Released, again.Kind == shorthand.Refusal:
		return again
	case again.Kind == shorthand.Reading && follows:
		return again
	}
	return line
}

// mostWords is how long an answer in words is that was not addressed to the
// bot: a longer one only happens to hold such a word.
const mostWords = 4

// chatter says that a line which was not addressed only talks about a gas: it
// brings no value, and more words than an answer has.
func (t *turn) chatter(line *shorthand.Line) bool {
	if len(strings.Fields(t.e.Text)) <= mostWords {
		return false
	}
	if line.Kind == shorthand.Released {
		return true
	}
	return line.Kind == shorthand.Reading && line.Intent == shorthand.IntentNone && len(line.Gases) == 1 &&
		line.Gases[0].Follow == shorthand.FollowAddition && line.Gases[0].Sample.Values.Empty()
}

func (t *turn) habits() shorthand.Habits {
	h := t.v.House.Habits()
	h.Addressed = t.e.Addressed
	if last, ok := t.last(); ok {
		h.Earlier = &last.Gas.Sample
	}
	h.Pending, _ = t.v.Thread().Pending()
	return h
}

func (t *turn) refuse() {
	var r reply.Reply
	r.Add(reply.Notice, refusalText[t.line.Refused])
	t.answer.Reply = r
	t.answer.Machine = Machine{V: MachineVersion, Kind: "refusal", Text: r.Text()}
}

func (t *turn) unclear() {
	if t.line.TakesBack {
		t.says("question", takenBack)
		return
	}
	var r reply.Reply
	r.Add(reply.Question, hintGas+shorthand.Example(t.habits()))
	t.finish("question", r)
}

// finish sets an answer that is not a reading.
func (t *turn) finish(kind string, r reply.Reply) {
	t.answer.Reply = r
	t.answer.Machine = Machine{V: MachineVersion, Kind: kind, Headline: headlineOf(r), Text: r.Text()}
}

func (t *turn) command() {
	if c, ok := commandFor(t.line.Intent); ok && c.intent != shorthand.IntentNow {
		c.run(t)
		return
	}
	t.parentless()
}

// parentless answers a command that needs a gas and has none.
func (t *turn) parentless() {
	if list := laterLists[t.line.Intent]; list != "" {
		var r reply.Reply
		r.Add(reply.Notice, list)
		t.finish(string(t.line.Intent), r)
		return
	}
	parent, which := t.parent(t.bedSaid())
	if which != nil {
		t.askWhich(which)
		return
	}
	t.readAgain(parent)
}

// laterLists answers commands about beds, which this version does not keep.
var laterLists = map[shorthand.Intent]string{
	shorthand.IntentBeds:   "Beds are not kept by this version: pasted gases, one bed a line, are read worst first.",
	shorthand.IntentTrend:  "Beds are not kept by this version: pasted gases of one bed, one time a line, are read in their order.",
	shorthand.IntentRecord: "A chart line is not written by this version.",
}

// laterWork says, where a line asks for something that the gas alone does not
// answer, what the answer below is.
var laterWork = map[shorthand.Intent]string{
	shorthand.IntentAim:     "Targets are not worked out by this version: the gas as it stands.",
	shorthand.IntentSuppose: "Changes are not worked out by this version: the gas as it stands.",
	shorthand.IntentCheck:   "Claims are not judged one by one by this version: the reading to hold them against.",
}

// forget takes the thread's gases away, and says so only once the store has
// done it.
func (t *turn) forget() {
	n := len(t.v.Thread().Entries())
	t.v.Forget()
	if err := t.b.write(t.ctx, t); err != nil {
		t.says("forget", notForgotten)
		return
	}
	var r reply.Reply
	r.Add(reply.Headline, fmt.Sprintf("Forgotten: %d gases of this thread", n))
	t.finish("forget", r)
}

// says answers in one sentence.
func (t *turn) says(kind, text string) {
	var r reply.Reply
	r.Add(reply.Notice, text)
	t.finish(kind, r)
}

// edited reads the changed question and replaces its answer.
func (t *turn) edited() {
	before := t.v.ByMessage(t.e.Message)
	if len(before) > 0 {
		t.amends = Ref(before[0].Post)
	}
	t.typed()
	if t.line.Kind != shorthand.Reading && len(before) > 0 {
		t.v.Drop(t.e.Message) // the rest of a thread stays
		t.keeps = true
		if t.answer.Reply.Empty() {
			t.withdraw()
		}
	}
}

// deleted takes the question's gases away and says so where the answer stood.
func (t *turn) deleted() {
	before := t.v.ByMessage(t.e.Message)
	if len(before) == 0 {
		return
	}
	t.amends = Ref(before[0].Post)
	t.v.Remove(t.e.Message)
	t.keeps = true
	if t.amends != "" {
		t.withdraw()
	}
}

func (t *turn) withdraw() { t.says("forget", withdrawn) }

// settingFor is the house's setting with the target and the usual PaCO2 that
// the line says.
func (t *turn) settingFor(g *shorthand.Gas) physio.Setting {
	set := t.v.House.Setting()
	if g.Target != nil {
		set.Target = g.Target
	}
	if g.UsualPaCO2 > 0 {
		set.UsualPaCO2 = g.UsualPaCO2
	}
	return set
}
