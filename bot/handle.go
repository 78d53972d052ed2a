package bot

import (
	"context"
	"time"

	"galeward/bot/memory"
)

// Handle claims the event, answers it, delivers the answer and remembers where
// it stands: two round trips to the store, one before the answer and one
// after it.
func (b *Bot) Handle(ctx context.Context, e Event, way Way) {
	t, answer := b.answerSafely(ctx, e)
	if !answer.Reply.Empty() {
		b.post(ctx, t, answer, e, way)
	}
	b.save(ctx, t)
}

// post delivers the answer, unless an earlier process that died had done so,
// and notes where it stands.
func (b *Bot) post(ctx context.Context, t *turn, answer Answer, e Event, way Way) {
	p := Post{Key: e.Delivery, To: e.Where, For: forUser(e, answer), Reply: answer.Reply}
	if t == nil {
		b.deliver(ctx, e, way, p)
		return
	}
	p.Amends = t.amends
	ref, ok := b.madeBefore(ctx, t, way, p)
	if !ok {
		ref, ok = b.deliver(ctx, e, way, p)
	}
	switch {
	case !ok:
		t.stood = false
	case ref != "" && e.Message != "":
		t.v.Posted(e.Message, string(ref))
	}
}

func forUser(e Event, a Answer) string {
	if a.Private && e.Can.Has(CanPrivate) {
		return e.User
	}
	return ""
}

// answerSafely works the answer out; a panic becomes an answer of ours. A
// message that was not meant for the bot gets no answer about a fault.
func (b *Bot) answerSafely(ctx context.Context, e Event) (t *turn, answer Answer) {
	defer func() {
		if p := recover(); p != nil {
			answer = b.panicked(p)
			t.abandon()
		}
	}()
	t, err := b.begin(ctx, e)
	if err == nil && t != nil {
		t.work()
		return t, t.answer
	}
	t.abandon()
	if err != nil && (e.Addressed || e.Listening || e.Kind == Pressed) {
		return t, b.trouble(err)
	}
	return t, silence()
}

// abandon leaves of a turn that failed only the claim, which is closed.
func (t *turn) abandon() {
	if t != nil {
		t.v.Abandon()
		t.keeps = true
	}
}

// madeBefore asks, where an earlier process took the event and died, whether
// it had already posted the answer.
func (b *Bot) madeBefore(ctx context.Context, t *turn, way Way, post Post) (Ref, bool) {
	finder, can := way.(Finder)
	if t.v.Claim != memory.TakenOver || !can {
		return "", false
	}
	ref, found, err := finder.Find(ctx, post.To, post.Key)
	if err != nil {
		b.log.Warn("find", "error", err.Error())
	}
	return ref, found && err == nil
}

// deliver posts the answer; a failure is logged, since there is no other way
// to tell the user.
func (b *Bot) deliver(ctx context.Context, e Event, way Way, post Post) (Ref, bool) {
	ref, err := way.Deliver(ctx, post)
	if err != nil {
		b.log.Error("deliver", "platform", e.Where.Platform, "error", err.Error())
		return "", false
	}
	return ref, true
}

// saveTime bounds the second round trip, which outlives an event that is called
// off: what was answered is remembered.
const saveTime = 2 * time.Second

// save is the second round trip, also of an event that needed no answer but
// changed the thread.
func (b *Bot) save(ctx context.Context, t *turn) {
	if t == nil || !t.keeps && t.answer.Reply.Empty() {
		return
	}
	if !t.stood {
		t.v.FirstTime = false
	}
	if err := b.write(ctx, t); err != nil {
		b.log.Error("save", "error", err.Error())
	}
}

func (b *Bot) write(ctx context.Context, t *turn) error {
	ctx, cancel := context.WithTimeout(context.WithoutCancel(ctx), saveTime)
	defer cancel()
	return b.memory.Save(ctx, t.v)
}
