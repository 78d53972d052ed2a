package memory

import (
	"context"
	"errors"
	"fmt"
	"math/rand/v2"
	"sync"
	"time"

	"galeward/bot/store"
)

// ErrDown says that the store does not answer: what was asked was not read,
// and a change was not acknowledged. It wraps the cause where there is one.
var ErrDown = errors.New("the store does not answer")

// GuardOptions tune a Guard; a zero field takes the usual value.
type GuardOptions struct {
	// Deadline bounds one call, usually 1 s.
	Deadline time.Duration
	// First and Most are the shortest and longest time for which the store is
	// taken as down after a fault, usually 2 s and 15 s.
	First, Most time.Duration
	// Now is the clock, nil for time.Now.
	Now func() time.Time
}

// Guard is a store that remembers that the store behind it is down, so that
// an outage costs one time-out, not one for each message. After a fault, calls
// fail at once with ErrDown for a short time; then one call is let through as a
// probe, and its success opens the way again.
type Guard struct {
	next  store.Store
	o     GuardOptions
	mu    sync.Mutex
	since time.Time // of the first fault; zero while up
	until time.Time // no probe before
	wait  time.Duration
	probe bool // one is under way
	stats GuardStats
}

// GuardStats counts what went through a guard since the start.
type GuardStats struct {
	Calls         uint64 // that reached the store
	Faults        uint64 // of these, not answered
	Refused       uint64 // not tried, because the store was taken as down
	Conflicts     uint64
	Full          uint64
	NotReplicated uint64
	// Down is the time spent down, the present outage included.
	Down time.Duration
}

// NewGuard puts a guard before a store.
func NewGuard(next store.Store, o GuardOptions) *Guard {
	o.Deadline = either(o.Deadline, time.Second)
	o.First = either(o.First, 2*time.Second)
	o.Most = max(o.First, either(o.Most, 15*time.Second))
	if o.Now == nil {
		o.Now = time.Now
	}
	return &Guard{next: next, o: o}
}

func either(d, usual time.Duration) time.Duration {
	if d > 0 {
		return d
	}
	return usual
}

// Do carries out the operations unless the store is taken as down. Every
// fault of the store is an ErrDown; the outcomes that the store contract names
// (conflict, full, not replicated) pass through and are no faults.
func (g *Guard) Do(ctx context.Context, partition string, ops ...store.Op) ([]store.Item, error) {
	if err := store.Check(partition, ops); err != nil {
		return nil, err
	}
	probing, ok := g.enter(ctx)
	if !ok {
		return nil, ErrDown
	}
	inner, cancel := context.WithTimeout(ctx, g.o.Deadline)
	defer cancel()
	items, err := g.next.Do(inner, partition, ops...)
	return items, g.leave(ctx, probing, err)
}

// pressing is the key of a context whose call goes through although the store
// is taken as down: to find out at once what became of a write.
type pressing struct{}

// enter says whether a call may go to the store, and whether it is the probe.
func (g *Guard) enter(ctx context.Context) (probing, ok bool) {
	g.mu.Lock()
	defer g.mu.Unlock()
	if g.since.IsZero() || ctx.Value(pressing{}) != nil {
		g.stats.Calls++
		return false, true
	}
	if g.probe || g.o.Now().Before(g.until) {
		g.stats.Refused++
		return false, false
	}
	g.probe = true
	g.stats.Calls++
	return true, true
}

// leave notes how a call ended.
func (g *Guard) leave(ctx context.Context, probing bool, err error) error {
	g.mu.Lock()
	defer g.mu.Unlock()
	if probing {
		g.probe = false
	}
	switch {
	case err == nil:
		g.up()
	case errors.Is(err, store.ErrConflict):
		g.stats.Conflicts++
		g.up()
	case errors.Is(err, store.ErrNotReplicated):
		g.stats.NotReplicated++
		g.up()
	case errors.Is(err, store.ErrUnseen):
		g.up() // written; only a write without a condition can be unseen, and nobody looks at its item
		return nil
	case errors.Is(err, store.ErrFull):
		g.stats.Full++
		g.up()
	case ctx.Err() != nil: // the caller gave up: says nothing of the store
		return fmt.Errorf("%w: %w", ErrDown, err)
	default:
		g.stats.Faults++
		g.fault(probing)
		return fmt.Errorf("%w: %w", ErrDown, err)
	}
	return err
}

// up ends an outage.
func (g *Guard) up() {
	if !g.since.IsZero() {
		g.stats.Down += g.o.Now().Sub(g.since)
		g.since = time.Time{}
	}
}

// fault begins an outage, or lengthens its waits when a probe failed. Calls
// that were already under way when it began change nothing.
func (g *Guard) fault(probing bool) {
	now := g.o.Now()
	switch {
	case g.since.IsZero():
		g.since, g.wait = now, g.o.First
	case probing:
		g.wait = min(2*g.wait, g.o.Most)
	default:
		return
	}
	spread := 0.9 + 0.2*rand.Float64() // so that replicas do not probe in step
	g.until = now.Add(time.Duration(float64(g.wait) * spread))
}

// Down says whether the store is taken as down, and since when.
func (g *Guard) Down() (since time.Time, down bool) {
	g.mu.Lock()
	defer g.mu.Unlock()
	return g.since, !g.since.IsZero()
}

// Stats gives the counts so far.
func (g *Guard) Stats() GuardStats {
	g.mu.Lock()
	defer g.mu.Unlock()
	s := g.stats
	if !g.since.IsZero() {
		s.Down += g.o.Now().Sub(g.since)
	}
	return s
}
