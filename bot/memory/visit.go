package memory

import (
	"context"
	"time"

	"galeward/bot/shorthand"
)

// Call is one event for which memory is needed.
type Call struct {
	Where Where
	// Delivery is the same for every repeated delivery of the event; "" claims
	// nothing.
	Delivery string
	// User is the platform's id of who wrote; only a hash of it is stored. It
	// may be "" where a platform does not say who deleted a message.
	User string
	// Message is the platform's id of the message that the event is about, ""
	// when there is none.
	Message string
	// Opens says that the answer opens a thread under Message, so that what is
	// remembered must be found from inside it too; or that the platform will not
	// say whose message was deleted, so that it must be found by the message.
	Opens bool
}

// Claim is what became of the claim on an event.
type Claim uint8

// The outcomes of a claim.
const (
	Mine      Claim = iota // the event is this process's to answer
	Duplicate              // it was answered, or is being answered: stay silent
	TakenOver              // an earlier process claimed it and died: it may have posted
)

// Visit is what Load read for one event, and what Save will write. It belongs
// to one goroutine. The changes are repeated on what another process wrote
// meanwhile, so that both are kept.
type Visit struct {
	// Claim says whether to answer at all. The rest of a Duplicate is empty.
	Claim Claim
	// House are the channel's rules, Revision their number, 0 for the default.
	House    House
	Revision int
	// FirstTime says that the user has not had the standing notice here. Save
	// notes that the answer carried it; the caller clears it when it did not.
	FirstTime bool
	// Degraded says that the store is down: House is the last known one, or
	// the default when Known is false, and there is no thread.
	Degraded bool
	Known    bool
	// Full says that the store takes no more writes: all was read, and nothing
	// of this event will be remembered.
	Full bool

	call      Call
	partition string
	tag       string // of the claim
	seen      string // the tag of the rules known here before the read
	docs      []paper
	edits     []edit
	now       time.Time
	life      time.Duration
	frozen    bool // a document could not be read: none is overwritten
}

// Thread gives what the thread remembers; outside a thread, what this user's
// own last lines in the channel left.
func (v *Visit) Thread() *Thread { return &v.docs[0].thread }

// ByMessage gives the gases that a message brought, also when only the thread
// under that message still has them.
func (v *Visit) ByMessage(message string) []Entry {
	for i := range v.docs {
		if found := v.docs[i].thread.ByMessage(message); found != nil {
			return found
		}
	}
	return nil
}

// Put remembers what a message brought, in place of what it brought before
// (an edited question). All entries carry the same Message. It ends an open
// question: Ask comes after it.
func (v *Visit) Put(entries ...Entry) {
	if len(entries) == 0 {
		return
	}
	message, own := entries[0].Message, false
	put := make([]*held, len(entries))
	for i, e := range entries {
		if e.At.IsZero() {
			e.At = v.now
		}
		own = own || e.Gas.Follow == shorthand.FollowNone
		put[i] = &held{Entry: clean(e), until: v.now.Add(v.life)}
	}
	v.edit(func(p *paper) {
		switch {
		case p.root && !v.opens(p, message):
			return
		case p.flat() && own: // a new case may be asked what the last one was
			p.thread.asked = nil
		}
		p.thread.put(message, put)
	})
}

// Posted notes where the answer to a message stands.
func (v *Visit) Posted(message, post string) {
	v.edit(func(p *paper) { p.thread.each(message, func(e *held) { e.Post = post }) })
}

// Remove takes a message's gases away, and with a message that opened a
// thread the whole thread.
func (v *Visit) Remove(message string) {
	v.edit(func(p *paper) {
		if p.root && message == v.call.Message || p.key == threadKey(message) {
			p.thread = Thread{}
			return
		}
		p.thread.remove(message)
	})
}

// Drop takes a message's gases away, and nothing else.
func (v *Visit) Drop(message string) {
	v.edit(func(p *paper) { p.thread.remove(message) })
}

// Abandon takes back every change: Save will only mark the claim as done.
func (v *Visit) Abandon() { v.edits, v.FirstTime = nil, false }

// Ask leaves a question open, about what a message brought.
func (v *Visit) Ask(q shorthand.Question, message string) {
	q = cleanQuestion(q)
	v.edit(func(p *paper) {
		if !p.root || v.opens(p, message) {
			p.thread.ask(q, message)
		}
	})
}

// Forget empties the thread; outside a thread, what this user's lines left.
func (v *Visit) Forget() {
	v.edit(func(p *paper) { p.thread = Thread{} })
}

// opens says that what a message brought also belongs into the thread under
// it.
func (v *Visit) opens(p *paper, message string) bool {
	return message == v.call.Message && (v.call.Opens || !p.thread.empty())
}

// edit is one change of a thread; it can be repeated on a newer one.
type edit func(*paper)

func (v *Visit) edit(e edit) {
	v.edits = append(v.edits, e)
	for i := range v.docs {
		e(&v.docs[i])
	}
}

// Load is the first round trip of a reading: it claims the event and reads the
// house, the thread and whether the user has had the standing notice. A store
// that is down is no error: the Visit is Degraded. A *DocumentError comes with
// a Visit that is claimed and can be saved, but has no house and no thread.
func (m *Memory) Load(ctx context.Context, c Call) (*Visit, error) { return m.load(ctx, c) }

// Save is the second round trip of a reading: it writes the thread, marks the
// claim as done, and notes that the user has had the notice. When another
// process wrote the thread meanwhile, both writes are kept. On an error nothing
// is known to be stored.
func (m *Memory) Save(ctx context.Context, v *Visit) error { return m.save(ctx, v) }
