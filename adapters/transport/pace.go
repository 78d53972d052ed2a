package transport

import (
	"context"
	"sync"
	"time"

	"golang.org/x/time/rate"
)

// idleLanes is how many channels a pacer remembers before it forgets those
// that are idle.
const idleLanes = 1024

// Pacer spaces what is sent to each channel, in the order in which callers
// ask, with a bounded number waiting.
type Pacer struct {
	every time.Duration
	burst int
	limit int

	mu    sync.Mutex
	lanes map[string]*lane
}

type lane struct {
	limiter *rate.Limiter
	waiting int
	until   time.Time // the platform asked for silence until then
	used    time.Time
}

// NewPacer returns a pacer that lets burst sends through at once and then one
// every interval, per channel, with at most limit callers waiting per channel.
func NewPacer(every time.Duration, burst, limit int) *Pacer {
	return &Pacer{every: every, burst: burst, limit: limit, lanes: make(map[string]*lane)}
}

// Wait returns when channel may be sent to: at once, later, ErrBusy when too
// many wait already, or the error of a context that ended or would end first.
func (p *Pacer) Wait(ctx context.Context, channel string) error {
	l, err := p.enter(channel)
	if err != nil {
		return err
	}
	defer p.leave(l)
	if err := l.limiter.Wait(ctx); err != nil {
		return or(ctx.Err(), context.DeadlineExceeded)
	}
	for {
		left := p.silence(l)
		if left <= 0 {
			return nil
		}
		if err := Sleep(ctx, left); err != nil {
			return err
		}
	}
}

// Pause keeps channel silent for d from now: the platform asked for it.
func (p *Pacer) Pause(channel string, d time.Duration) {
	p.mu.Lock()
	defer p.mu.Unlock()
	l := p.lane(channel)
	if until := time.Now().Add(d); until.After(l.until) {
		l.until = until
	}
}

func (p *Pacer) enter(channel string) (*lane, error) {
	p.mu.Lock()
	defer p.mu.Unlock()
	l := p.lane(channel)
	if l.waiting >= p.limit {
		return nil, ErrBusy
	}
	l.waiting++
	l.used = time.Now()
	return l, nil
}

func (p *Pacer) leave(l *lane) {
	p.mu.Lock()
	defer p.mu.Unlock()
	l.waiting--
}

func (p *Pacer) silence(l *lane) time.Duration {
	p.mu.Lock()
	defer p.mu.Unlock()
	return time.Until(l.until)
}

func (p *Pacer) lane(channel string) *lane {
	l := p.lanes[channel]
	if l == nil {
		if len(p.lanes) >= idleLanes {
			p.forget()
		}
		l = &lane{limiter: rate.NewLimiter(rate.Every(p.every), p.burst)}
		p.lanes[channel] = l
	}
	return l
}

// forget drops the channels that have nothing left to remember.
func (p *Pacer) forget() {
	settled := time.Now().Add(-p.every * time.Duration(p.burst+1))
	for name, l := range p.lanes {
		if l.waiting == 0 && l.used.Before(settled) && time.Now().After(l.until) {
			delete(p.lanes, name)
		}
	}
}

func or(err, otherwise error) error {
	if err != nil {
		return err
	}
	return otherwise
}
