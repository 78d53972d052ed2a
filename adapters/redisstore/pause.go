package redisstore

import (
	"errors"
	"os"
	"sync/atomic"
	"time"
)

// pause spares messages the wait for a server that just gave no answer to
// another. After the pause one call tries, and the others go on failing at
// once until it has an answer.
type pause struct {
	length time.Duration
	start  time.Time
	until  *atomic.Int64 // since start; 0 while the server answers
}

func newPause(length time.Duration) pause {
	return pause{length: length, start: time.Now(), until: new(atomic.Int64)}
}

// now is told since the start, so that a set clock does not matter.
func (p pause) now() time.Duration { return time.Since(p.start) }

// holds says whether a call should not be tried.
func (p pause) holds() bool {
	until := p.until.Load()
	if until == 0 {
		return false
	}
	now := p.now()
	if now < time.Duration(until) {
		return true
	}
	return !p.until.CompareAndSwap(until, int64(now+p.length))
}

// note remembers how a call ended. patient says that the server had time to
// answer: a caller in a hurry proves nothing by a timeout, and neither does
// one who found all connections busy.
func (p pause) note(err error, patient bool) {
	switch {
	case err == nil || serverCode(err) != "":
		if p.until.Load() != 0 {
			p.until.Store(0)
		}
	case ours(err), !patient && errors.Is(err, os.ErrDeadlineExceeded):
	case p.length > 0:
		p.until.Store(int64(p.now() + p.length))
	}
}
