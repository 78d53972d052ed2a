package boltstore

import (
	"bytes"
	"context"
	"encoding/binary"
	"time"

	"go.etcd.io/bbolt"
)

// sweepStep is how many expired items one commit of Sweep clears.
const sweepStep = 500

// Sweep clears expired items and returns how many. They are invisible from
// their end on, and each commit clears a few; Sweep frees the room of a
// channel that fell silent. Call it now and then. It stops when ctx ends.
func (s *Store) Sweep(ctx context.Context) (int, error) {
	total := 0
	for ctx.Err() == nil {
		cleared := 0
		err := s.update(func(tx *bbolt.Tx) (err error) {
			cleared, err = sweep(tx, s.now(), sweepStep)
			return err
		})
		if err != nil {
			return total, err
		}
		if total += cleared; cleared < sweepStep {
			return total, nil
		}
	}
	return total, ctx.Err()
}

// sweep clears up to limit items whose end has come, the oldest first.
func sweep(tx *bbolt.Tx, now time.Time, limit int) (int, error) {
	var due [][]byte // gathered first: a cursor does not bear deletions under it
	ends := tx.Bucket(endsBucket)
	c := ends.Cursor()
	for k, _ := c.First(); k != nil && len(due) < limit; k, _ = c.Next() {
		if !over(int64(binary.BigEndian.Uint64(k)), now) {
			break
		}
		due = append(due, bytes.Clone(k))
	}
	for _, k := range due {
		if err := remove(tx, k[8:]); err != nil {
			return 0, err
		}
		if err := ends.Delete(k); err != nil { // gone already, unless an entry lost its item
			return 0, err
		}
	}
	return len(due), nil
}

// remove takes an item and its end out of the file.
func remove(tx *bbolt.Tx, key []byte) error {
	items := tx.Bucket(itemsBucket)
	r := items.Get(key)
	if r == nil {
		return nil
	}
	_, ends, err := readRecord(r)
	if err != nil {
		return err
	}
	if ends != 0 {
		if err := tx.Bucket(endsBucket).Delete(endKey(ends, key)); err != nil {
			return err
		}
	}
	return items.Delete(key)
}

// insert puts an item, of which remove took what stood before, into the file.
func insert(tx *bbolt.Tx, key, rec []byte, ends int64) error {
	if ends != 0 {
		if err := tx.Bucket(endsBucket).Put(endKey(ends, key), nil); err != nil {
			return err
		}
	}
	return tx.Bucket(itemsBucket).Put(key, rec)
}
