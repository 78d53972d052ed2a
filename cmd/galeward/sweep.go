package main

import (
	"context"
	"log/slog"
	"sync"
	"time"
)

// sweepTime is how often a store that keeps expired items is cleared of them.
const sweepTime = time.Hour

// sweeper clears a store of what has expired: at the start, and then at every
// interval until it is ended.
type sweeper struct {
	sweep func(context.Context) (int, error)
	every time.Duration
	log   *slog.Logger
}

// start sweeps beside the service. end stops it and waits until the store is
// touched no more. A store that clears itself has no sweep.
func (s sweeper) start(ctx context.Context) (end func()) {
	if s.sweep == nil {
		return func() {}
	}
	ctx, cancel := context.WithCancel(ctx)
	var running sync.WaitGroup
	running.Go(func() { s.run(ctx) })
	return func() {
		cancel()
		running.Wait()
	}
}

func (s sweeper) run(ctx context.Context) {
	ticker := time.NewTicker(s.every)
	defer ticker.Stop()
	for {
		s.once(ctx)
		select {
		case <-ticker.C:
		case <-ctx.Done():
			return
		}
	}
}

// once sweeps; an end that was asked for is no fault.
func (s sweeper) once(ctx context.Context) {
	cleared, err := s.sweep(ctx)
	switch {
	case err != nil && ctx.Err() == nil:
		logged(s.log, "clearing expired items", err)
	case cleared > 0:
		s.log.Info("expired items cleared", "items", cleared)
	}
}
