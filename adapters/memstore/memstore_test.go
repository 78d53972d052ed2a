package memstore

import (
	"context"
	"strconv"
	"sync"
	"testing"
	"time"

	"go.uber.org/goleak"

	"galeward/adapters/storetest"
	"galeward/bot/store"
)

func TestMain(m *testing.M) { goleak.VerifyTestMain(m) }

// clock is a clock that a test moves.
type clock struct {
	mu sync.Mutex
	at time.Time
}

func newClock() *clock { return &clock{at: time.Date(2026, 3, 29, 0, 30, 0, 0, time.UTC)} }

func (c *clock) now() time.Time {
	c.mu.Lock()
	defer c.mu.Unlock()
	return c.at
}

func (c *clock) Advance(d time.Duration) {
	c.mu.Lock()
	defer c.mu.Unlock()
	c.at = c.at.Add(d)
}

type withClock struct {
	*Store
	*clock
}

func TestContract(t *testing.T) {
	storetest.Run(t, func(testing.TB) store.Store {
		c := newClock()
		return withClock{New(c.now), c}
	})
}

func TestContractOnTheRealClock(t *testing.T) {
	storetest.Run(t, func(testing.TB) store.Store { return New(nil) })
}

func TestExpiredItemsLeaveMemory(t *testing.T) {
	c := newClock()
	s := New(c.now)
	for i := range 5000 {
		claim := store.Op{Key: "event/" + strconv.Itoa(i), Tag: "t", TTL: time.Minute}
		if _, err := s.Do(context.Background(), "slack/T1/C1", claim); err != nil {
			t.Fatal(err)
		}
		c.Advance(time.Second)
	}
	if n := len(s.items); n > 300 {
		t.Fatalf("%d items are in memory, 60 of them alive", n)
	}
}

func TestEndIsExact(t *testing.T) {
	c := newClock()
	s := New(c.now)
	ctx := context.Background()
	if _, err := s.Do(ctx, "p", store.Op{Key: "k", Tag: "t", TTL: time.Minute}); err != nil {
		t.Fatal(err)
	}
	c.Advance(time.Minute - 1)
	if items, _ := s.Do(ctx, "p", store.Op{Key: "k"}); items[0].Tag != "t" {
		t.Fatal("gone before its end")
	}
	c.Advance(1)
	if items, _ := s.Do(ctx, "p", store.Op{Key: "k"}); items[0].Tag != "" {
		t.Fatal("still there at its end")
	}
}

func BenchmarkDo(b *testing.B) { storetest.Bench(b, New(nil)) }
