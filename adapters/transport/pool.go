package transport

import (
	"context"
	"fmt"
	"sync"
	"time"
)

// Task is one piece of work. Its context ends when a drain runs out of time;
// then it has graceTime left to save what it did.
type Task func(ctx context.Context)

// graceTime is how long Drain waits for tasks that it told to stop.
const graceTime = 2 * time.Second

// Pool runs tasks on a bounded number of goroutines. Tasks of one lane run one
// after the other in the order in which they came, so that an edit never
// overtakes the message that it changes; lanes run side by side and take
// turns. An idle pool holds no goroutine.
type Pool struct {
	workers int
	limit   int // tasks held in all
	perLane int // tasks held in one lane
	caught  func(value any)

	mu      sync.Mutex
	lanes   map[string][]Task // the first of a lane may be running
	ready   []string          // lanes that wait for a worker
	running int
	held    int // tasks taken and not yet done
	closed  bool

	work sync.WaitGroup
	ctx  context.Context
	stop context.CancelFunc
}

// NewPool returns a pool of at most workers goroutines that holds at most
// limit tasks, waiting and running, and perLane of them in one lane, so that one
// noisy channel can not shut the others out. caught, if not nil, hears of the
// value of a panic, which may quote what was typed: log its type alone. The pool
// goes on.
func NewPool(workers, limit, perLane int, caught func(value any)) *Pool {
	ctx, stop := context.WithCancel(context.Background())
	return &Pool{workers: workers, limit: limit, perLane: perLane, caught: caught,
		lanes: make(map[string][]Task), ctx: ctx, stop: stop}
}

// Go takes a task for a lane. It returns at once: ErrBusy when the pool is
// full, ErrClosed after Drain was called.
func (p *Pool) Go(lane string, task Task) error {
	p.mu.Lock()
	defer p.mu.Unlock()
	if p.closed {
		return ErrClosed
	}
	waiting, active := p.lanes[lane]
	if p.held >= p.limit || len(waiting) >= p.perLane {
		return ErrBusy
	}
	p.held++
	p.lanes[lane] = append(waiting, task)
	if active {
		return nil
	}
	p.ready = append(p.ready, lane)
	if p.running < p.workers {
		p.running++
		p.work.Go(p.loop)
	}
	return nil
}

// Held is the number of tasks taken and not yet done.
func (p *Pool) Held() int {
	p.mu.Lock()
	defer p.mu.Unlock()
	return p.held
}

// Drain takes no more work and waits for what was taken. When ctx ends first,
// tasks that wait are left, the contexts of those that run are cancelled, and
// Drain gives them up to graceTime to return. Its error then wraps ctx's error
// and tells how many tasks were left or cut short.
func (p *Pool) Drain(ctx context.Context) error {
	p.mu.Lock()
	p.closed = true
	p.mu.Unlock()
	defer p.stop()
	done := make(chan struct{})
	go func() { p.work.Wait(); close(done) }()
	select {
	case <-done:
		return nil
	case <-ctx.Done():
	}
	cut := p.cut()
	if cut == 0 { // the last one ended in this very moment
		return nil
	}
	select {
	case <-done:
	case <-time.After(graceTime):
	}
	return fmt.Errorf("%d tasks did not finish in time: %w", cut, ctx.Err())
}

// cut tells running tasks to stop, keeps waiting ones from being begun, and
// gives how many there were of both.
func (p *Pool) cut() int {
	p.mu.Lock()
	defer p.mu.Unlock()
	p.stop()
	return p.held
}

func (p *Pool) loop() {
	for {
		lane, task := p.next()
		if task == nil {
			return
		}
		p.run(task)
		p.done(lane)
	}
}

func (p *Pool) next() (string, Task) {
	p.mu.Lock()
	defer p.mu.Unlock()
	if len(p.ready) == 0 || p.ctx.Err() != nil {
		p.running--
		return "", nil
	}
	lane := p.ready[0]
	p.ready = p.ready[1:]
	return lane, p.lanes[lane][0]
}

// run keeps one bad message from ending the process.
func (p *Pool) run(task Task) {
	defer func() {
		if v := recover(); v != nil && p.caught != nil {
			p.caught(v)
		}
	}()
	task(p.ctx)
}

func (p *Pool) done(lane string) {
	p.mu.Lock()
	defer p.mu.Unlock()
	p.held--
	rest := p.lanes[lane][1:]
	if len(rest) == 0 {
		delete(p.lanes, lane)
		return
	}
	p.lanes[lane] = rest
	p.ready = append(p.ready, lane)
}
