// Package adaptertest is the suite that every chat adapter passes: the same
// events lead to the same answers, and no platform's habits change them.
//
// # What lives here
//
// A bot that records what it is asked and answers as told, and the tests that
// hold for any adapter. Each adapter's own package gives the suite a Driver,
// which plays the people and the platform.
//
// # What does not
//
// Rules of one platform: its fake enforces those.
package adaptertest

import (
	"context"
	"sync"

	"galeward/bot"
	"galeward/bot/reply"
)

// Handler is a bot that remembers its events. It is safe for concurrent use.
type Handler struct {
	// Reply makes the answer; nil answers every event with its text as echo.
	Reply func(bot.Event) reply.Reply
	// Hidden makes all answers private.
	Hidden bool

	mu     sync.Mutex
	events []bot.Event
	refs   map[string]bot.Ref
	errs   []error
}

var _ bot.Handler = (*Handler)(nil)

// Private implements bot.Handler.
func (h *Handler) Private(bot.Place) bool { return h.Hidden }

// Handle implements bot.Handler: it answers where the event came from, in
// private when asked so, and amends the answer of an edited message.
func (h *Handler) Handle(ctx context.Context, e bot.Event, way bot.Way) {
	h.mu.Lock()
	h.events = append(h.events, e)
	amends := h.refs[e.Where.Channel+e.Message]
	h.mu.Unlock()
	make := h.Reply
	if make == nil {
		make = func(e bot.Event) reply.Reply { return Echo(e.Text) }
	}
	post := bot.Post{Key: e.Delivery, To: e.Where, Reply: make(e), Amends: amends}
	if h.Hidden || e.Private {
		post.For = e.User
	}
	made, err := way.Deliver(ctx, post)
	h.note(e, made, err)
}

func (h *Handler) note(e bot.Event, made bot.Ref, err error) {
	h.mu.Lock()
	defer h.mu.Unlock()
	if h.refs == nil {
		h.refs = make(map[string]bot.Ref)
	}
	h.refs[e.Where.Channel+e.Message] = made
	h.errs = append(h.errs, err)
}

// Events are the events so far.
func (h *Handler) Events() []bot.Event {
	h.mu.Lock()
	defer h.mu.Unlock()
	return append([]bot.Event(nil), h.events...)
}

// Errors are the outcomes of the deliveries so far, nil for those that went well.
func (h *Handler) Errors() []error {
	h.mu.Lock()
	defer h.mu.Unlock()
	return append([]error(nil), h.errs...)
}

// Echo is a reply of one line, none when there is no text.
func Echo(text string) reply.Reply {
	var r reply.Reply
	r.Add(reply.Echo, text)
	return r
}
