package transport

import (
	"context"
	"errors"
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

func TestPoolDrainGivesUp(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		p := NewPool(1, 5, 5, nil)
		var cancelled atomic.Bool
		_ = p.Go("a", func(ctx context.Context) { <-ctx.Done(); cancelled.Store(true) })
		ctx, cancel := context.WithTimeout(t.Context(), 20*time.Second)
		defer cancel()
		start := time.Now()
		if err := p.Drain(ctx); !errors.Is(err, context.DeadlineExceeded) {
			t.Errorf("Drain: %v", err)
		}
		if waited := time.Since(start); waited != 20*time.Second {
			t.Errorf("waited %s", waited)
		}
		synctest.Wait()
		if !cancelled.Load() {
			t.Error("the task was not told to stop")
		}
	})
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
