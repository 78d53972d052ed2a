package memory

import (
	"crypto/rand"
	"time"

	"galeward/bot/store"
)

// Options are the settings of a Memory. The zero Options are the usual ones.
type Options struct {
	// Now is the clock, nil for time.Now.
	Now func() time.Time
	// Life is how long gases are kept where the house names no end of shift,
	// 0 for 24 hours.
	Life time.Duration
	// Guard tunes how a store that is down is treated.
	Guard GuardOptions
}

// Lifetimes and sizes that are not the house's to choose.
const (
	usualLife = 24 * time.Hour
	claimLife = 26 * time.Hour       // beyond the hourly repeats of a day that platforms make
	metLife   = 180 * 24 * time.Hour // then the standing notice is due again
	orphaned  = 30 * time.Second     // an open claim of this age belongs to a dead process

	knownHouses  = 4096
	knownThreads = 512 // about 10 KB each when full
	knownClaims  = 8192
)

// Memory is what all channels remember, kept in a store. It is safe for
// concurrent use.
type Memory struct {
	guard   *Guard
	now     func() time.Time
	life    time.Duration
	houses  *lru[known]
	threads *lru[knownThread]
	claims  *lru[claimed]
}

// known is a house as it was last read or written, with its tag.
type known struct {
	tag   string
	n     int
	house House
}

// New makes a Memory on a store, with a Guard between them.
func New(s store.Store, o Options) *Memory {
	if o.Now == nil {
		o.Now = time.Now
	}
	if o.Life <= 0 {
		o.Life = usualLife
	}
	if o.Guard.Now == nil {
		o.Guard.Now = o.Now
	}
	return &Memory{
		guard: NewGuard(s, o.Guard), now: o.Now, life: o.Life,
		houses: newLRU[known](knownHouses), threads: newLRU[knownThread](knownThreads),
		claims: newLRU[claimed](knownClaims),
	}
}

// Guard gives the guard of the store, for its state and its counts.
func (m *Memory) Guard() *Guard { return m.guard }

// HouseNow answers at once, without the store: the rules of the channel as
// they were last seen by this process, or the default rules and false.
func (m *Memory) HouseNow(where Where) (House, bool) {
	k, ok := m.houses.get(where.partition())
	if !ok {
		return House{}, false
	}
	return k.house.Clone(), true
}

// newTag makes the random tag of one write.
func newTag() string { return rand.Text() }
