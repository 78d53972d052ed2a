package memory

import (
	"context"
	"errors"
	"fmt"
	"sync"
	"testing"
	"time"

	"galeward/adapters/memstore"
	"galeward/bot/shorthand"
	"galeward/bot/store"
	"galeward/physio"
)

var (
	ctx  = context.Background()
	ward = Where{Platform: "slack", Workspace: "T1", Channel: "C1"}
	base = time.Date(2026, 3, 10, 6, 0, 0, 0, time.UTC)
)

// clock is a clock that tests turn.
type clock struct {
	mu sync.Mutex
	t  time.Time
}

func (c *clock) now() time.Time {
	c.mu.Lock()
	defer c.mu.Unlock()
	return c.t
}

func (c *clock) add(d time.Duration) {
	c.mu.Lock()
	defer c.mu.Unlock()
	c.t = c.t.Add(d)
}

// tap counts calls, keeps what is written, and breaks calls on demand.
type tap struct {
	store.Store
	mu    sync.Mutex
	calls int
	wrote map[string][]byte // by partition and key: the last value
	// breaks decides about one call: an error instead of it, or after it when
	// after is true.
	breaks func(ops []store.Op) (after bool, err error)
}

var errCut = errors.New("connection reset")

func (s *tap) Do(ctx context.Context, partition string, ops ...store.Op) ([]store.Item, error) {
	s.mu.Lock()
	s.calls++
	breaks := s.breaks
	s.mu.Unlock()
	var broken error
	if breaks != nil {
		after, err := breaks(ops)
		if err != nil && !after {
			return nil, err
		}
		broken = err
	}
	items, err := s.Store.Do(ctx, partition, ops...)
	if err == nil {
		s.note(partition, ops)
	}
	if errors.Is(broken, store.ErrNotReplicated) && err == nil {
		return items, broken
	}
	if broken != nil {
		return nil, broken
	}
	return items, err
}

func (s *tap) note(partition string, ops []store.Op) {
	s.mu.Lock()
	defer s.mu.Unlock()
	for _, op := range ops {
		switch {
		case op.Delete:
			delete(s.wrote, partition+"\n"+op.Key)
		case op.Tag != "":
			s.wrote[partition+"\n"+op.Key] = op.Value
		}
	}
}

func (s *tap) breakWith(f func([]store.Op) (bool, error)) {
	s.mu.Lock()
	defer s.mu.Unlock()
	s.breaks = f
}

func (s *tap) count() int {
	s.mu.Lock()
	defer s.mu.Unlock()
	return s.calls
}

func allFail(err error) func([]store.Op) (bool, error) {
	return func([]store.Op) (bool, error) { return false, err }
}

// rig is one store with a clock and as many processes as a test wants.
type rig struct {
	*clock
	tap *tap
}

func newRig() *rig {
	c := &clock{t: base}
	return &rig{c, &tap{Store: memstore.New(c.now), wrote: make(map[string][]byte)}}
}

func (r *rig) process() *Memory { return New(r.tap, Options{Now: r.now}) }

func call(message string) Call {
	return Call{Where: ward, Delivery: message, User: "U1", Message: message}
}

func inThread(thread, message string) Call {
	c := call(message)
	c.Where.Thread = thread
	return c
}

func load(t *testing.T, m *Memory, c Call) *Visit {
	t.Helper()
	v, err := m.Load(ctx, c)
	if err != nil {
		t.Fatalf("Load(%+v): %v", c, err)
	}
	return v
}

func save(t *testing.T, m *Memory, v *Visit) {
	t.Helper()
	if err := m.Save(ctx, v); err != nil {
		t.Fatalf("Save: %v", err)
	}
}

// gas makes an entry with a PaCO2 that tells it from others.
func gas(message string, paco2 float64) Entry {
	e := Entry{Message: message, Post: "post-" + message}
	e.Gas.Sample.Set(physio.PHq, 7.3)
	e.Gas.Sample.Set(physio.PaCO2, paco2)
	return e
}

// reading is one whole reading: load, remember, save.
func reading(t *testing.T, m *Memory, c Call, paco2 float64) *Visit {
	t.Helper()
	v := load(t, m, c)
	v.Put(gas(c.Message, paco2))
	save(t, m, v)
	return v
}

// paco2s are the PaCO2 of a thread's gases, in order.
func paco2s(t *Thread) string {
	s := ""
	for i, e := range t.Entries() {
		if i > 0 {
			s += " "
		}
		v, _ := e.Gas.Sample.Get(physio.PaCO2)
		s += fmt.Sprintf("%g", v)
	}
	return s
}

func expect[T comparable](t *testing.T, what string, got, want T) {
	t.Helper()
	if got != want {
		t.Errorf("%s: got %v, want %v", what, got, want)
	}
}

// setUnits is the simplest change of rules.
func setUnits(u shorthand.Units) func(House) (House, error) {
	return func(h House) (House, error) { h.Units = u; return h, nil }
}

func setWord(word, meaning string) func(House) (House, error) {
	return func(h House) (House, error) {
		if h.Words == nil {
			h.Words = make(map[string]string)
		}
		h.Words[word] = meaning
		return h, nil
	}
}
