package transport

import (
	"context"
	"math/rand/v2"
	"time"
)

// Backoff is a series of growing waits with jitter, so that many processes
// that failed together do not come back together.
type Backoff struct {
	First time.Duration // the first wait, about
	Max   time.Duration // no wait is longer, unless the platform asked for more
	Tries int           // attempts in all; 0 means until the context ends
}

// Wait is how long to wait after the attempt with this number (0 for the
// first): between half of the doubled-up time and all of it.
func (b Backoff) Wait(attempt int) time.Duration {
	d := b.First
	for i := 0; i < attempt && d < b.Max; i++ {
		d *= 2
	}
	d = min(d, b.Max)
	return d/2 + jitter(d/2)
}

// Verdict is what an error means for the next attempt.
type Verdict struct {
	Again bool          // another attempt is allowed
	After time.Duration // not before this, because the platform said so
}

// Retry calls op until it succeeds, judge forbids another attempt, the tries
// are used up, or ctx ends or would end before the next attempt. It returns the
// last error of op.
func (b Backoff) Retry(ctx context.Context, op func(ctx context.Context) error, judge func(error) Verdict) error {
	for attempt := 0; ; attempt++ {
		err := op(ctx)
		if err == nil {
			return nil
		}
		v := judge(err)
		if !v.Again || b.Tries > 0 && attempt+1 >= b.Tries {
			return err
		}
		wait := b.Wait(attempt)
		if v.After > 0 {
			wait = v.After + jitter(min(v.After/8, time.Second))
		}
		if late(ctx, wait) || Sleep(ctx, wait) != nil {
			return err
		}
	}
}

// Sleep waits for d or until ctx ends, whose error it then returns.
func Sleep(ctx context.Context, d time.Duration) error {
	t := time.NewTimer(d)
	defer t.Stop()
	select {
	case <-t.C:
		return nil
	case <-ctx.Done():
		return ctx.Err()
	}
}

// late says that waiting is pointless: ctx will have ended by then.
func late(ctx context.Context, wait time.Duration) bool {
	deadline, set := ctx.Deadline()
	return set && time.Until(deadline) < wait
}

func jitter(d time.Duration) time.Duration {
	if d <= 0 {
		return 0
	}
	return rand.N(d)
}
