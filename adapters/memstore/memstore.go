// Package memstore keeps items in the memory of the process, for the console,
// for tests and for a trial. When the process ends, all is gone.
//
// # What lives here
//
// The store, its clock and the clearing of expired items.
//
// # What does not
//
// No file: package boltstore. No sharing between processes: package
// redisstore. No key names and no documents: bot/memory.
package memstore

import (
	"bytes"
	"context"
	"sync"
	"time"

	"galeward/bot/store"
)

// Store is the store in memory. Make one with New.
type Store struct {
	now func() time.Time

	mu     sync.Mutex
	items  map[place]entry
	writes int // since all items were last looked through
}

type place struct{ partition, key string }

type entry struct {
	item store.Item
	ends time.Time // zero: kept
}

var _ store.Store = (*Store)(nil)

// New makes an empty store that tells lifetimes by the given clock; nil means
// time.Now.
func New(now func() time.Time) *Store {
	if now == nil {
		now = time.Now
	}
	return &Store{now: now, items: make(map[place]entry)}
}

// Do carries out ops as store.Store says. Durable has no meaning here.
func (s *Store) Do(ctx context.Context, partition string, ops ...store.Op) ([]store.Item, error) {
	if err := store.Check(partition, ops); err != nil {
		return nil, err
	}
	if err := ctx.Err(); err != nil {
		return nil, err
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	now := s.now()
	items, holds := s.look(now, partition, ops)
	if !holds {
		return items, store.ErrConflict
	}
	for _, op := range ops {
		s.apply(now, place{partition, op.Key}, op)
	}
	s.clear(now)
	return items, nil
}

// look copies the items as they stand and tries the conditions.
func (s *Store) look(now time.Time, partition string, ops []store.Op) (items []store.Item, holds bool) {
	items, holds = make([]store.Item, len(ops)), true
	for i, op := range ops {
		if e, ok := s.items[place{partition, op.Key}]; ok && !e.over(now) {
			items[i] = store.Item{Value: bytes.Clone(e.item.Value), Tag: e.item.Tag}
		}
		holds = holds && op.Holds(items[i])
	}
	return items, holds
}

func (s *Store) apply(now time.Time, at place, op store.Op) {
	switch {
	case op.Delete:
		delete(s.items, at)
	case op.Tag != "":
		e := entry{item: store.Item{Value: bytes.Clone(op.Value), Tag: op.Tag}}
		if op.TTL > 0 {
			e.ends = now.Add(op.TTL)
		}
		s.items[at] = e
		s.writes++
	}
}

// clear drops expired items once there were half as many writes as there are
// items, so that a write costs the same on average however many stand, and at
// most about half of what stands is expired.
func (s *Store) clear(now time.Time) {
	if s.writes < 64 || 2*s.writes < len(s.items) {
		return
	}
	s.writes = 0
	for at, e := range s.items {
		if e.over(now) {
			delete(s.items, at)
		}
	}
}

func (e entry) over(now time.Time) bool { return !e.ends.IsZero() && !now.Before(e.ends) }
