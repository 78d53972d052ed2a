package boltstore

import (
	"context"
	"errors"
	"slices"
	"time"

	"go.etcd.io/bbolt"

	"galeward/bot/store"
)

// A commit costs one wait for the disk however many calls it holds, so a rush
// of messages is written in few. One commit takes at most so many calls and
// about so many bytes.
const (
	batchCalls = 256
	batchBytes = 4 << 20
)

// errNothing rolls back a commit that has nothing to write.
var errNothing = errors.New("nothing to write")

// call is one Do on its way. It has copies of all that the caller gave,
// because a caller whose context ended is gone while its call is written.
type call struct {
	keys   [][]byte
	ops    []store.Op
	ends   []int64
	writes int
	bytes  int
	items  []store.Item
	err    error
	done   chan struct{}
}

func newCall(now time.Time, partition string, ops []store.Op) *call {
	c := &call{
		keys: make([][]byte, len(ops)), ops: slices.Clone(ops), ends: make([]int64, len(ops)),
		items: make([]store.Item, len(ops)), done: make(chan struct{}),
	}
	for i := range c.ops {
		op := &c.ops[i]
		c.keys[i] = itemKey(partition, op.Key)
		if op.If != nil {
			op.If = store.Tagged(*op.If)
		}
		if op.Writes() {
			c.writes++
			c.ends[i] = endOf(now, op.TTL)
			op.Value = record(store.Item{Value: op.Value, Tag: op.Tag}, c.ends[i])
			c.bytes += len(op.Value)
		}
	}
	return c
}

// commit waits until the call is on the disk.
func (s *Store) commit(ctx context.Context, c *call) ([]store.Item, error) {
	s.mu.Lock()
	if s.closed {
		s.mu.Unlock()
		return nil, ErrClosed
	}
	s.waiting = append(s.waiting, c)
	if !s.running {
		s.running = true
		s.drained.Go(s.drain)
	}
	s.mu.Unlock()
	select {
	case <-c.done:
		return c.items, c.err
	case <-ctx.Done():
		s.forget(c)
		return nil, ctx.Err()
	}
}

// forget takes back a call that no commit has begun on.
func (s *Store) forget(c *call) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if i := slices.Index(s.waiting, c); i >= 0 {
		s.waiting = slices.Delete(s.waiting, i, i+1)
	}
}

// drain commits what waits until nothing does.
func (s *Store) drain() {
	for {
		s.mu.Lock()
		batch := s.take()
		s.running = len(batch) > 0
		s.mu.Unlock()
		if len(batch) == 0 {
			return
		}
		s.write(batch)
	}
}

// take is the next batch; s.mu is held.
func (s *Store) take() []*call {
	n, size := 0, 0
	for n < len(s.waiting) && n < batchCalls && size < batchBytes {
		size += s.waiting[n].bytes
		n++
	}
	batch := slices.Clone(s.waiting[:n])
	s.waiting = slices.Delete(s.waiting, 0, n)
	return batch
}

// write carries out a batch in one commit; when that fails for all, each call
// gets a commit of its own, so that one too big does not take others along.
func (s *Store) write(batch []*call) {
	err := s.update(func(tx *bbolt.Tx) error { return s.apply(tx, batch) })
	if errors.Is(err, errNothing) {
		err = nil
	}
	if err != nil && len(batch) > 1 {
		for _, c := range batch {
			s.write([]*call{c})
		}
		return
	}
	for _, c := range batch {
		if err != nil {
			c.items, c.err = nil, err
		}
		close(c.done)
	}
}

func (s *Store) apply(tx *bbolt.Tx, batch []*call) error {
	now, writes := s.now(), 0
	for _, c := range batch {
		if c.look(tx, now); c.err != nil {
			continue
		}
		if err := c.apply(tx); err != nil {
			return err
		}
		writes += c.writes
	}
	swept, err := sweep(tx, now, 8+2*writes) // faster than items are made
	if err == nil && writes+swept == 0 {
		err = errNothing
	}
	return err
}

// look copies the items as they stand and tries the conditions; the outcome is
// in c.items and c.err.
func (c *call) look(tx *bbolt.Tx, now time.Time) {
	bucket := tx.Bucket(itemsBucket)
	c.items, c.err = make([]store.Item, len(c.ops)), nil
	for i, op := range c.ops {
		if r := bucket.Get(c.keys[i]); r != nil {
			item, ends, err := readRecord(r)
			if err != nil {
				c.items, c.err = nil, err
				return
			}
			if !over(ends, now) {
				c.items[i] = item
			}
		}
		if !op.Holds(c.items[i]) {
			c.err = store.ErrConflict
		}
	}
}

func (c *call) apply(tx *bbolt.Tx) error {
	for i, op := range c.ops {
		if !op.Writes() {
			continue
		}
		if err := remove(tx, c.keys[i]); err != nil {
			return err
		}
		if op.Delete {
			continue
		}
		if err := insert(tx, c.keys[i], op.Value, c.ends[i]); err != nil {
			return err
		}
	}
	return nil
}
