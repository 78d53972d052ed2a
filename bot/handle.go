package bot

import (
	"context"
	"fmt"

	"galeward/bot/memory"
)

// Handle claims the event, answers it, delivers the answer and remembers where
// it stands: two round trips to the store, one before the answer and one
// after it.
func (b *Bot) Handle(ctx context.Context, e Event, way Way) {
	t, answer := b.answerSafely(ctx, e)
	if t == nil || answer.Reply.Empty() {
		if t == nil && !answer.Reply.Empty() {
			b.deliver(ctx, e, way, Post{Key: e.Delivery, To: e.Where, For: forUser(e, answer), Reply: answer.Reply})
		}
		b.save(ctx, t)
		return
	}
	post := Post{Key: e.Delivery, To: e.Where, For: forUser(e, answer), Amends: t.amends, Reply: answer.Reply}
	if ref, ok := b.madeBefore(ctx, t, way, post); ok {
		t.v.Posted(e.Message, string(ref))
		b.save(ctx, t)
		return
	}
	if ref, ok := b.deliver(ctx, e, way, post); ok && ref != "" && e.Message != "" {
		t.v.Posted(e.Message, string(ref))
	}
	b.save(ctx, t)
}

func forUser(e Event, a Answer) string {
	if a.Private && e.Can.Has(CanPrivate) {
		return e.User
	}
	return ""
}

// answerSafely works the answer out; a panic becomes an answer of ours.
func (b *Bot) answerSafely(ctx context.Context, e Event) (t *turn, answer Answer) {
	defer func() {
		if p := recover(); p != nil {
			t, answer = nil, b.trouble(fmt.Errorf("panic: %v", p))
		}
	}()
	t, err := b.begin(ctx, e)
	if t == nil || err != nil {
		return nil, b.trouble(err)
	}
	t.work()
	return t, t.answer
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

func (b *Bot) save(ctx context.Context, t *turn) {
	if t == nil || !t.keeps && t.answer.Reply.Empty() || t.v.Degraded {
		return
	}
	if err := b.memory.Save(ctx, t.v); err != nil {
		b.log.Error("save", "error", err.Error())
	}
}
