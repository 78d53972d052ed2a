// Package store is the small contract that package memory writes to and that
// memstore, boltstore and redisstore implement.
//
// # What lives here
//
// The Store interface, its operations, its errors, and the check of a call
// that all stores share.
//
// # What does not
//
// No document format, no key names, no lifetimes: package memory. No client of
// a database: the adapters.
package store

import (
	"context"
	"errors"
	"fmt"
	"time"
)

// Store keeps small values in partitions. Implementations are safe for
// concurrent use; the buffers given and returned are never shared.
type Store interface {
	// Do carries out ops on one partition in one round trip, all or nothing,
	// and returns for each op the item as it stood before the call (the zero
	// Item when it was absent or expired).
	//
	// Errors: ErrConflict when a condition did not hold; nothing was written
	// and the items are still returned, so that the caller sees why.
	// ErrNotReplicated when all was written but a Durable write could not be
	// confirmed on a second server; the items are returned. ErrFull when there
	// was no room; nothing was written. Any other error is a fault of the
	// store: the items are nil, and whether the writes happened is not known:
	// read the tag to find out.
	//
	// A store on a network that lost a reply may find out by the tags that the
	// writes stand. It then returns as usual, with two limits. What stood
	// before a write is told by its condition: absent, or the tag without the
	// value, which the caller who named the tag has read. And where a write or
	// a deletion had no condition, the item before it is beyond knowing: the
	// error is ErrUnseen, and the items are returned without that one.
	Do(ctx context.Context, partition string, ops ...Op) ([]Item, error)
}

// Op is one read, write or deletion of a key. An Op with only a Key reads.
// Conditions of all ops are tried before anything is written.
type Op struct {
	Key string
	// If is the condition: nil for none, "" for "must be absent", else the tag
	// that the item must have.
	If *string
	// Value and Tag are written when Tag is not "". The tag is the caller's,
	// random and new for each write, so that "was my write with the lost reply
	// stored?" has an answer.
	Value []byte
	Tag   string
	// Delete removes the key; deleting an absent key is no error.
	Delete bool
	// TTL is the lifetime of what is written; 0 keeps it until it is deleted,
	// also where what stood before had a lifetime.
	TTL time.Duration
	// Durable asks that the write stands on a second server, where one is
	// configured, before Do returns.
	Durable bool
}

// Writes says whether the operation changes anything when its condition holds.
func (op Op) Writes() bool { return op.Delete || op.Tag != "" }

// Holds says whether the condition of the operation holds for the item as it
// stands; an absent or expired item is the zero Item.
func (op Op) Holds(item Item) bool { return op.If == nil || *op.If == item.Tag }

// Item is a stored value and the tag of the write that stored it.
type Item struct {
	Value []byte
	Tag   string
}

// The limits of one call.
const (
	MaxKey   = 512       // bytes of a key and of a partition
	MaxTag   = 128       // bytes of a tag
	MaxValue = 256 << 10 // bytes of one value
	MaxOps   = 32
)

var (
	// ErrConflict says that a condition did not hold and nothing was written.
	ErrConflict = errors.New("store: a condition did not hold")
	// ErrNotReplicated says that the write stands on one server only.
	ErrNotReplicated = errors.New("store: written, but not confirmed on a second server")
	// ErrUnseen says that all was written, but that what stood before one of
	// the writes is not known, because the reply that told it was lost.
	ErrUnseen = errors.New("store: written, but what stood before was not seen")
	// ErrFull says that the store has no room for a write; reads go on.
	ErrFull = errors.New("store: no room for a write")
)

// Absent is the condition "must be absent".
func Absent() *string { s := ""; return &s }

// Tagged is the condition "must have this tag".
func Tagged(tag string) *string { return &tag }

// Check finds mistakes of the caller: every store calls it first.
func Check(partition string, ops []Op) error {
	if partition == "" || len(partition) > MaxKey {
		return fmt.Errorf("store: a partition has 1 to %d bytes, not %d", MaxKey, len(partition))
	}
	if len(ops) > MaxOps {
		return fmt.Errorf("store: at most %d operations a call, not %d", MaxOps, len(ops))
	}
	seen := make(map[string]bool, len(ops))
	for i, op := range ops {
		switch {
		case op.Key == "" || len(op.Key) > MaxKey:
			return fmt.Errorf("store: operation %d: a key has 1 to %d bytes, not %d", i, MaxKey, len(op.Key))
		case seen[op.Key]:
			return fmt.Errorf("store: operation %d: one key stands twice in a call", i)
		case len(op.Tag) > MaxTag:
			return fmt.Errorf("store: operation %d: a tag has at most %d bytes, not %d", i, MaxTag, len(op.Tag))
		case len(op.Value) > MaxValue:
			return fmt.Errorf("store: operation %d: a value has at most %d bytes, not %d", i, MaxValue, len(op.Value))
		case op.Delete && op.Tag != "":
			return fmt.Errorf("store: operation %d writes and deletes", i)
		case op.Tag == "" && (op.Value != nil || op.TTL != 0 || op.Durable && !op.Delete):
			return fmt.Errorf("store: operation %d writes without a tag", i)
		case op.TTL < 0:
			return fmt.Errorf("store: operation %d has a negative lifetime", i)
		}
		seen[op.Key] = true
	}
	return nil
}
