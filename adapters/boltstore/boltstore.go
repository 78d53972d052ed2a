// Package boltstore keeps items in one file beside the program: the store of a
// house with one bot process. What Do acknowledged stands after a crash or a
// power cut.
//
// # What lives here
//
// The file: opening and refusing it, its format, the writing of many calls in
// one commit, and the clearing of expired items.
//
// # What does not
//
// No sharing between processes: package redisstore. No key names and no
// documents: bot/memory. No back-up: copy the file while the bot is stopped.
package boltstore

import (
	"context"
	"errors"
	"fmt"
	"runtime"
	"runtime/debug"
	"strings"
	"sync"
	"sync/atomic"
	"syscall"
	"time"

	"go.etcd.io/bbolt"
	bolterr "go.etcd.io/bbolt/errors"

	"galeward/bot/store"
)

var (
	// ErrInUse says that another process has the file open.
	ErrInUse = errors.New("boltstore: the file is already open in another process, and it serves one at a time")
	// ErrDamaged says that the file is not one of this program or can't be read.
	ErrDamaged = errors.New("boltstore: the file is damaged or was not written by this program")
	// ErrNewer says that the file has a format that this binary does not know.
	ErrNewer = errors.New("boltstore: the file was written by a newer version of this program")
	// ErrClosed says that Close was called.
	ErrClosed = errors.New("boltstore: closed")

	errGaveUp = fmt.Errorf("%w: its pages don't fit together", ErrDamaged)
)

// Options are the settings of a store; the zero value is fit for use.
type Options struct {
	// Now is the clock that lifetimes are told by; nil means time.Now.
	Now func() time.Time
	// MaxBytes is the size that the file may not pass; 0 means no limit. A
	// write beyond it gives store.ErrFull.
	MaxBytes int
}

// Store is a store in one file. Make one with Open.
type Store struct {
	db      *bbolt.DB
	now     func() time.Time
	damaged atomic.Bool

	mu      sync.Mutex
	waiting []*call
	running bool // a goroutine is committing what waits
	closed  bool
	drained sync.WaitGroup
}

var _ store.Store = (*Store)(nil)

// Do carries out ops as store.Store says. Durable asks for nothing more than
// any write gets: it is on the disk before Do returns. Where ctx ends while a
// commit is under way, Do returns at once with the error of ctx, and whether
// the writes happened is not known.
func (s *Store) Do(ctx context.Context, partition string, ops ...store.Op) ([]store.Item, error) {
	if err := store.Check(partition, ops); err != nil {
		return nil, err
	}
	if err := ctx.Err(); err != nil {
		return nil, err
	}
	now := s.now()
	c := newCall(now, partition, ops)
	if c.writes > 0 {
		return s.commit(ctx, c)
	}
	err := s.view(func(tx *bbolt.Tx) error {
		c.look(tx, now)
		return nil
	})
	if err != nil {
		return nil, err
	}
	return c.items, c.err
}

// Close waits for the commits under way and releases the file.
func (s *Store) Close() error {
	s.mu.Lock()
	s.closed = true
	s.mu.Unlock()
	s.drained.Wait()
	if s.damaged.Load() {
		return nil // the client may hold its own locks for ever: the end of the process lets go
	}
	if err := s.db.Close(); err != nil {
		return fmt.Errorf("boltstore: closing: %w", err)
	}
	return nil
}

func (s *Store) view(work func(*bbolt.Tx) error) error {
	return s.careful(func() error { return s.db.View(work) })
}

func (s *Store) update(work func(*bbolt.Tx) error) error {
	return s.careful(func() error { return s.db.Update(work) })
}

// careful touches a file no more that once made the client give up half-way.
func (s *Store) careful(work func() error) error {
	if s.damaged.Load() {
		return ErrDamaged
	}
	err := guard(work)
	if errors.Is(err, errGaveUp) {
		s.damaged.Store(true)
	}
	return plain(err)
}

// guard makes an error of what the client answers with a panic: pages that do
// not fit together, and reads beyond the end of a cut file. A damaged file may
// cost the memory of the bot, not its answers.
func guard(work func() error) (err error) {
	defer debug.SetPanicOnFault(debug.SetPanicOnFault(true))
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("%w: %T at %s", errGaveUp, r, thrownAt())
		}
	}()
	return work()
}

// thrownAt tells, called while a panic is recovered, which function threw it:
// the first one below the panic that is not of the runtime.
func thrownAt() string {
	pcs := make([]uintptr, 64)
	frames := runtime.CallersFrames(pcs[:runtime.Callers(1, pcs)])
	thrown := false
	for {
		f, more := frames.Next()
		if thrown && !strings.HasPrefix(f.Function, "runtime.") {
			return fmt.Sprintf("%s, line %d", f.Function, f.Line)
		}
		thrown = thrown || f.Function == "runtime.gopanic"
		if !more {
			return "an unknown place"
		}
	}
}

// plain gives the client's errors the names of the contract and of this
// package.
func plain(err error) error {
	switch {
	case err == nil, errors.Is(err, ErrDamaged), errors.Is(err, ErrNewer):
		return err
	case errors.Is(err, bolterr.ErrDatabaseNotOpen):
		return ErrClosed
	case errors.Is(err, syscall.ENOSPC), errors.Is(err, syscall.EDQUOT), errors.Is(err, syscall.EFBIG),
		errors.Is(err, bolterr.ErrMaxSizeReached):
		return fmt.Errorf("%w: boltstore: %w", store.ErrFull, err)
	}
	return fmt.Errorf("boltstore: %w", err)
}
