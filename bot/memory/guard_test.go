package memory

import (
	"context"
	"errors"
	"sync"
	"testing"
	"time"

	"galeward/bot/store"
)

var read = store.Op{Key: "k"}

func newGuard(r *rig, o GuardOptions) *Guard {
	o.Now = r.now
	return NewGuard(r.tap, o)
}

func TestOutageCostsOneTimeOut(t *testing.T) {
	r := newRig()
	g := newGuard(r, GuardOptions{})
	r.tap.breakWith(allFail(errCut))
	for range 100 {
		if _, err := g.Do(ctx, "p", read); !errors.Is(err, ErrDown) {
			t.Fatalf("got %v, want ErrDown", err)
		}
	}
	expect(t, "calls that reached the store", r.tap.count(), 1)
	s := g.Stats()
	expect(t, "faults", s.Faults, 1)
	expect(t, "refused", s.Refused, 99)
	since, down := g.Down()
	expect(t, "down", down, true)
	expect(t, "since", since, base)
}

func TestCauseOfAnOutageIsKept(t *testing.T) {
	r := newRig()
	r.tap.breakWith(allFail(errCut))
	_, err := newGuard(r, GuardOptions{}).Do(ctx, "p", read)
	expect(t, "cause", errors.Is(err, errCut), true)
}

func TestProbesBecomeRarer(t *testing.T) {
	r := newRig()
	g := newGuard(r, GuardOptions{})
	r.tap.breakWith(allFail(errCut))
	var at []time.Duration // of calls that reached the store
	for elapsed := time.Duration(0); elapsed < 90*time.Second; elapsed += 100 * time.Millisecond {
		before := r.tap.count()
		_, _ = g.Do(ctx, "p", read)
		if r.tap.count() > before {
			at = append(at, elapsed)
		}
		r.add(100 * time.Millisecond)
	}
	want := []time.Duration{2 * time.Second, 4 * time.Second, 8 * time.Second, 15 * time.Second, 15 * time.Second}
	for i, w := range want {
		gap := at[i+1] - at[i]
		if gap < w*9/10-100*time.Millisecond || gap > w*11/10+100*time.Millisecond {
			t.Errorf("gap %d is %s, want %s with a tenth of spread", i, gap, w)
		}
	}
}

func TestOneProbeAtATime(t *testing.T) {
	r := newRig()
	g := newGuard(r, GuardOptions{})
	r.tap.breakWith(allFail(errCut))
	_, _ = g.Do(ctx, "p", read)
	r.add(5 * time.Second)
	probing, release := make(chan struct{}), make(chan struct{})
	r.tap.breakWith(func([]store.Op) (bool, error) {
		close(probing)
		<-release
		return false, nil
	})
	var wg sync.WaitGroup
	wg.Go(func() {
		if _, err := g.Do(ctx, "p", read); err != nil {
			t.Errorf("the probe: %v", err)
		}
	})
	<-probing
	if _, err := g.Do(ctx, "p", read); !errors.Is(err, ErrDown) {
		t.Errorf("beside the probe: %v, want ErrDown", err)
	}
	r.tap.breakWith(nil)
	close(release)
	wg.Wait()
	_, down := g.Down()
	expect(t, "down after the probe", down, false)
	expect(t, "time down", g.Stats().Down, 5*time.Second)
	if _, err := g.Do(ctx, "p", read); err != nil {
		t.Errorf("after the probe: %v", err)
	}
}

// Calls that were under way when the outage began do not lengthen its wait.
func TestCallsUnderWayCountOnce(t *testing.T) {
	r := newRig()
	g := newGuard(r, GuardOptions{})
	var inside, wg sync.WaitGroup
	inside.Add(8)
	r.tap.breakWith(func([]store.Op) (bool, error) {
		inside.Done()
		inside.Wait()
		return false, errCut
	})
	for range 8 {
		wg.Go(func() { _, _ = g.Do(ctx, "p", read) })
	}
	wg.Wait()
	r.tap.breakWith(nil)
	r.add(2200 * time.Millisecond)
	if _, err := g.Do(ctx, "p", read); err != nil {
		t.Errorf("after the first wait: %v", err)
	}
}

func TestNamedOutcomesAreNoFaults(t *testing.T) {
	r := newRig()
	g := newGuard(r, GuardOptions{})
	for _, outcome := range []error{store.ErrConflict, store.ErrFull, store.ErrNotReplicated} {
		r.tap.breakWith(allFail(outcome))
		_, err := g.Do(ctx, "p", read)
		expect(t, "passed through", err, outcome)
	}
	_, down := g.Down()
	expect(t, "down", down, false)
	s := g.Stats()
	expect(t, "counts", [5]uint64{s.Calls, s.Faults, s.Conflicts, s.Full, s.NotReplicated}, [5]uint64{3, 0, 1, 1, 1})
}

// A write whose reply was lost and that a look-up found stored is stored.
func TestAWriteThatWasUnseenIsWritten(t *testing.T) {
	r := newRig()
	g := newGuard(r, GuardOptions{})
	r.tap.breakWith(allFail(store.ErrUnseen))
	_, err := g.Do(ctx, "p", read)
	expect(t, "unseen", err, nil)
	_, down := g.Down()
	expect(t, "down", down, false)
}

// hung is a store that answers only when its caller gives up.
type hung struct{}

func (hung) Do(ctx context.Context, _ string, _ ...store.Op) ([]store.Item, error) {
	<-ctx.Done()
	return nil, ctx.Err()
}

func TestHungStoreIsLeftAtTheDeadline(t *testing.T) {
	g := NewGuard(hung{}, GuardOptions{Deadline: 20 * time.Millisecond})
	begin := time.Now()
	_, err := g.Do(ctx, "p", read)
	if took := time.Since(begin); !errors.Is(err, ErrDown) || took > time.Second {
		t.Errorf("%v after %s", err, took)
	}
	_, down := g.Down()
	expect(t, "down", down, true)
}

// A caller that gives up says nothing of the store.
func TestCallerThatGivesUpIsNoOutage(t *testing.T) {
	g := NewGuard(hung{}, GuardOptions{})
	gone, cancel := context.WithCancel(ctx)
	cancel()
	_, err := g.Do(gone, "p", read)
	expect(t, "error", errors.Is(err, ErrDown) && errors.Is(err, context.Canceled), true)
	_, down := g.Down()
	expect(t, "down", down, false)
}

// An answer, and a clear line, come within two seconds from a store that hangs.
func TestPromiseOfTwoSeconds(t *testing.T) {
	m := New(hung{}, Options{})
	begin := time.Now()
	v := load(t, m, call("m1"))
	expect(t, "degraded", v.Degraded, true)
	v.Put(gas("m1", 50))
	if err := m.Save(ctx, v); !errors.Is(err, ErrDown) {
		t.Errorf("Save: %v", err)
	}
	if _, _, err := m.ChangeHouse(ctx, ward, "U1", setWord("b", "bilevel")); !errors.Is(err, ErrDown) {
		t.Errorf("ChangeHouse: %v", err)
	}
	if took := time.Since(begin); took > 1900*time.Millisecond {
		t.Errorf("all of it took %s", took)
	}
	begin = time.Now()
	load(t, m, call("m2"))
	if took := time.Since(begin); took > 500*time.Millisecond {
		t.Errorf("the second message paid %s for the same outage", took)
	}
}

func TestLeastUsedGoesFirst(t *testing.T) {
	c := newLRU[int](3)
	for i, key := range []string{"a", "b", "c"} {
		c.put(key, i)
	}
	c.get("a")
	c.put("b", 7)
	c.put("d", 3)
	_, there := c.get("c")
	expect(t, "the least used one", there, false)
	for key, want := range map[string]int{"a": 0, "b": 7, "d": 3} {
		got, ok := c.get(key)
		expect(t, key, got, want)
		expect(t, key+" is there", ok, true)
	}
	c.drop("a")
	c.drop("a")
	_, there = c.get("a")
	expect(t, "a dropped one", there, false)
	expect(t, "entries", len(c.at), c.order.Len())
}
