package transport

import (
	"context"
	"errors"
	"strings"
	"sync"
	"sync/atomic"
	"testing"
	"testing/synctest"
	"time"
)

func TestPoolKeepsEachLaneInOrder(t *testing.T) {
	p := NewPool(4, 10000, 10000, nil)
	var mu sync.Mutex
	got := map[string][]int{}
	for i := range 200 {
		for _, lane := range []string{"a", "b", "c", "d", "e", "f"} {
			if err := p.Go(lane, func(context.Context) {
				mu.Lock()
				defer mu.Unlock()
				got[lane] = append(got[lane], i)
			}); err != nil {
				t.Fatal(err)
			}
		}
	}
	if err := p.Drain(context.Background()); err != nil {
		t.Fatal(err)
	}
	for lane, order := range got {
		for i, n := range order {
			if i != n {
				t.Fatalf("lane %s ran %v", lane, order)
			}
		}
		if len(order) != 200 {
			t.Errorf("lane %s ran %d of 200 tasks", lane, len(order))
		}
	}
}

func TestPoolIsBounded(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		p := NewPool(2, 5, 3, nil)
		var running, most atomic.Int32
		task := func(context.Context) {
			most.Store(max(most.Load(), running.Add(1)))
			time.Sleep(time.Second)
			running.Add(-1)
		}
		var taken, busy int
		for _, lane := range []string{"a", "a", "a", "a", "b", "c", "d"} {
			switch err := p.Go(lane, task); {
			case err == nil:
				taken++
			case errors.Is(err, ErrBusy):
				busy++
			default:
				t.Fatal(err)
			}
		}
		if taken != 5 || busy != 2 {
			t.Errorf("took %d and refused %d, want 5 (3 of lane a, b, c) and 2", taken, busy)
		}
		if err := p.Drain(context.Background()); err != nil {
			t.Fatal(err)
		}
		if most.Load() != 2 {
			t.Errorf("%d tasks ran at once, want 2", most.Load())
		}
		if err := p.Go("e", task); !errors.Is(err, ErrClosed) {
			t.Errorf("a drained pool answers %v", err)
		}
		if p.Held() != 0 {
			t.Errorf("%d tasks held at the end", p.Held())
		}
	})
}

// Tasks that are told to stop still save what they did; Drain waits for that,
// but not for ever. What had not begun is not begun any more.
func TestPoolDrainGivesUp(t *testing.T) {
	for name, c := range map[string]struct {
		saving, waits time.Duration
		saved         bool
	}{
		"saved at once":      {0, 20 * time.Second, true},
		"saved in the grace": {1900 * time.Millisecond, 21900 * time.Millisecond, true},
		"too slow":           {3 * time.Second, 22 * time.Second, false},
	} {
		t.Run(name, func(t *testing.T) {
			synctest.Test(t, func(t *testing.T) {
				p := NewPool(2, 5, 5, nil)
				var saved, begun atomic.Bool
				_ = p.Go("a", func(ctx context.Context) { <-ctx.Done(); time.Sleep(c.saving); saved.Store(true) })
				_ = p.Go("a", func(context.Context) { begun.Store(true) })
				ctx, cancel := context.WithTimeout(t.Context(), 20*time.Second)
				defer cancel()
				start := time.Now()
				err := p.Drain(ctx)
				if !errors.Is(err, context.DeadlineExceeded) || !strings.HasPrefix(err.Error(), "2 tasks") {
					t.Errorf("Drain: %v", err)
				}
				if waited := time.Since(start); waited != c.waits || saved.Load() != c.saved {
					t.Errorf("waited %s, saved %t; want %s, %t", waited, saved.Load(), c.waits, c.saved)
				}
				time.Sleep(time.Minute)
				if begun.Load() {
					t.Error("a task was begun after the pool gave up")
				}
			})
		})
	}
}

func TestPoolSurvivesPanics(t *testing.T) {
	var caught atomic.Value
	p := NewPool(1, 5, 5, func(v any) { caught.Store(v) })
	_ = p.Go("a", func(context.Context) { panic("boom") })
	ran := make(chan struct{})
	_ = p.Go("a", func(context.Context) { close(ran) })
	<-ran
	if caught.Load() != "boom" {
		t.Errorf("caught %v", caught.Load())
	}
	_ = p.Drain(context.Background())
}
