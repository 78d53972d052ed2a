package bot

import (
	"context"
	"crypto/rand"
	"encoding/hex"
	"errors"
	"fmt"
	"log/slog"
	"runtime/debug"
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

var _ Handler = (*Bot)(nil)

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

// Answer answers one event without delivering anything; memory is read and
// written as for a delivered one. It never panics.
func (b *Bot) Answer(ctx context.Context, e Event) Answer {
	t, answer := b.answerSafely(ctx, e)
	b.save(ctx, t)
	return answer
}

// panicked makes an answer of a fault in our own code. The value of a panic may
// hold what was typed: only its type is logged.
func (b *Bot) panicked(p any) Answer {
	return b.trouble(fmt.Errorf("panic of type %T: %s", p, debug.Stack()))
}

func silence() Answer { return Answer{Machine: Machine{V: MachineVersion, Kind: "silence"}} }

// trouble is an error of ours: one sentence with an id, to the asker alone, the
// cause only in the log.
func (b *Bot) trouble(err error) Answer {
	id := newID()
	b.log.Error("trouble", "id", id, "error", err.Error())
	text := fmt.Sprintf(troubleText, id)
	var doc *memory.DocumentError
	if errors.As(err, &doc) {
		text = upperFirst(doc.Error()) + "."
	}
	var r reply.Reply
	r.Add(reply.Notice, text)
	return Answer{Reply: r, Private: true, Machine: Machine{V: MachineVersion, Kind: "trouble", Text: r.Text()}}
}

func newID() string {
	var b [4]byte
	_, _ = rand.Read(b[:]) // crypto/rand does not fail; an id of zeros would do
	return hex.EncodeToString(b[:])
}

// Private tells from memory, at once, whether answers here are private.
func (b *Bot) Private(where Place) bool {
	h, _ := b.memory.HouseNow(whereOf(where))
	return h.Private
}
