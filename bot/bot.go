package bot

import (
	"context"
	"log/slog"
	"time"

	"galeward/bot/memory"
	"galeward/bot/reply"
)

// Options are what a Bot is made of.
type Options struct {
	// Memory is what channels remember.
	Memory *memory.Memory
	// Now is the clock, nil for time.Now.
	Now func() time.Time
	// Log takes faults and counts, never text or values; nil discards.
	Log *slog.Logger
	// Version is printed by help.
	Version string
}

// Bot answers events. It is safe for concurrent use.
type Bot struct {
	memory  *memory.Memory
	now     func() time.Time
	log     *slog.Logger
	version string
}

// Answer is one whole answer: the reply for people and the machine form.
type Answer struct {
	Reply   reply.Reply
	Machine Machine
	// Private says that only the asker sees it.
	Private bool
}

// Text is the plain-text answer, "" for silence.
func (a Answer) Text() string { return a.Reply.Text() }

// New makes a Bot.
func New(o Options) *Bot {
	if o.Now == nil {
		o.Now = time.Now
	}
	if o.Log == nil {
		o.Log = slog.New(slog.DiscardHandler)
	}
	return &Bot{memory: o.Memory, now: o.Now, log: o.Log, version: o.Version}
}

// Answer answers one event without delivering anything: it reads and writes
// memory, and never panics.
func (b *Bot) Answer(ctx context.Context, e Event) Answer { return Answer{} }
