package memory

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"strings"
	"time"

	"galeward/bot/store"
)

var (
	// ErrUncertain says that the store broke off while a change was written:
	// it may or may not be stored, and must not be reported as either.
	ErrUncertain = errors.New("the store broke off: whether the change is stored is not known")
	// ErrBusy says that others kept writing at the same time; nothing was
	// stored.
	ErrBusy = errors.New("others kept changing the same thing at this moment: nothing was stored")
	// ErrNoRevision says that there is no revision of this number.
	ErrNoRevision = errors.New("there is no such revision")
)

// Revision is one numbered change of house rules. Numbers begin at 1 and have
// no gaps.
type Revision struct {
	N  int
	At time.Time
	// By is the platform's id of who made the change.
	By string
	// What lists the changed fields; it is empty when nothing was to change.
	What []Change
	// House are the rules as they stood after the change.
	House House
}

// ClashError says that someone else changed the same field between the
// reading of the rules and the writing: nothing was stored.
type ClashError struct {
	// Theirs is what they changed of what was to be changed.
	Theirs []Change
	// N is the revision that stands now.
	N int
}

// Error says what was changed meanwhile.
func (e *ClashError) Error() string {
	parts := make([]string, len(e.Theirs))
	for i, c := range e.Theirs {
		parts[i] = fmt.Sprintf("%s is now %s", c.Field, orUnset(c.To))
	}
	return fmt.Sprintf("someone else changed the same rule a moment ago (%s, revision %d): nothing was stored",
		strings.Join(parts, "; "), e.N)
}

func orUnset(s string) string {
	if s == "" {
		return "not set"
	}
	return s
}

// ChangeHouse changes the rules of a channel: change gets a copy of them and
// gives the new ones; it may be called again, on newer rules, when others
// write at the same time, and its error ends the matter. The change is stored
// only when it stands where a store that asks for it has it on a second server.
//
// Errors: what change said; Problems when the new rules are not possible;
// *ClashError when someone changed the same field meanwhile; ErrBusy, ErrDown,
// store.ErrFull and *DocumentError with nothing stored; ErrUncertain; and
// store.ErrNotReplicated when all is stored, but on one server only: then the
// results are valid. When nothing was to change, the Revision is the one in
// force with an empty What.
func (m *Memory) ChangeHouse(ctx context.Context, where Where, by string, change func(House) (House, error)) (House, Revision, error) {
	return m.ChangeHouseSince(ctx, where, by, -1, change)
}

// ChangeHouseSince is ChangeHouse for a change that was decided while revision
// base was shown (0 for the default rules): what others changed since then of
// the same fields is a *ClashError.
func (m *Memory) ChangeHouseSince(ctx context.Context, where Where, by string, base int, change func(House) (House, error)) (House, Revision, error) {
	p := &pen{m: m, partition: where.partition(), by: by, base: base, change: change}
	rev, err := p.write(ctx)
	if err != nil && !errors.Is(err, store.ErrNotReplicated) {
		return House{}, Revision{}, err
	}
	return rev.House.Clone(), rev, err
}

// revisionOps are the writes of one revision, under the condition that the
// rules are still the ones it was made from.
func revisionOps(rev Revision, before, tag string) ([]store.Op, error) {
	now, err := encodeRevision(houseSchema, rev)
	if err != nil {
		return nil, err
	}
	kept, err := encodeRevision(revisionSchema, rev)
	return []store.Op{
		{Key: houseKey, If: &before, Value: now, Tag: tag, Durable: true},
		{Key: revisionKey(rev.N), If: store.Absent(), Value: kept, Tag: tag, Durable: true},
	}, err
}

func encodeRevision(s schema, rev Revision) ([]byte, error) {
	house, err := rev.House.file()
	if err != nil {
		return nil, err
	}
	return json.Marshal(houseDoc{head: s.head(), N: rev.N, At: rev.At, By: rev.By, What: rev.What, House: house})
}

func decodeRevision(s schema, raw []byte) (Revision, error) {
	var d houseDoc
	if err := s.decode(raw, &d); err != nil {
		return Revision{}, err
	}
	house, err := readHouse(d.House)
	if err != nil {
		return Revision{}, s.unreadable(err)
	}
	return Revision{N: d.N, At: d.At, By: d.By, What: d.What, House: house}, nil
}

// Revision gives one revision of a channel's rules. Errors: ErrNoRevision,
// ErrDown, *DocumentError.
func (m *Memory) Revision(ctx context.Context, where Where, n int) (Revision, error) {
	if n < 1 {
		return Revision{}, fmt.Errorf("%w: %d", ErrNoRevision, n)
	}
	items, err := m.guard.Do(ctx, where.partition(), store.Op{Key: revisionKey(n)})
	if err != nil {
		return Revision{}, err
	}
	if items[0].Tag == "" {
		return Revision{}, fmt.Errorf("%w: %d", ErrNoRevision, n)
	}
	return decodeRevision(revisionSchema, items[0].Value)
}

// Revisions gives the last revisions of a channel's rules, the newest first,
// at most 32. Errors: ErrDown, *DocumentError.
func (m *Memory) Revisions(ctx context.Context, where Where, last int) ([]Revision, error) {
	partition := where.partition()
	_, newest, err := m.HouseOf(ctx, where)
	if err != nil {
		return nil, err
	}
	var ops []store.Op
	for n := newest; n > 0 && len(ops) < min(last, store.MaxOps); n-- {
		ops = append(ops, store.Op{Key: revisionKey(n)})
	}
	if len(ops) == 0 {
		return nil, nil
	}
	items, err := m.guard.Do(ctx, partition, ops...)
	if err != nil {
		return nil, err
	}
	return decodeRevisions(items)
}

func decodeRevisions(items []store.Item) ([]Revision, error) {
	var all []Revision
	for _, item := range items {
		if item.Tag == "" {
			continue
		}
		rev, err := decodeRevision(revisionSchema, item.Value)
		if err != nil {
			return nil, err
		}
		all = append(all, rev)
	}
	return all, nil
}

// Restore makes the rules of an earlier revision the rules in force, as a new
// revision. Check, unless it is nil, gets the rules that the store holds at that
// time and the earlier ones; its error ends the matter. Errors: what check said,
// and those of Revision and of ChangeHouse.
func (m *Memory) Restore(ctx context.Context, where Where, by string, n int, check func(now, earlier House) error) (House, Revision, error) {
	earlier, err := m.Revision(ctx, where, n)
	if err != nil {
		return House{}, Revision{}, err
	}
	return m.ChangeHouse(ctx, where, by, func(now House) (House, error) {
		if check != nil {
			if err := check(now, earlier.House.Clone()); err != nil {
				return House{}, err
			}
		}
		return earlier.House.Clone(), nil
	})
}

// HouseOf gives the rules in force and their revision number, read from the
// store. Errors: ErrDown, *DocumentError.
func (m *Memory) HouseOf(ctx context.Context, where Where) (House, int, error) {
	partition := where.partition()
	seen := m.seen(partition)
	items, err := m.guard.Do(ctx, partition, store.Op{Key: houseKey})
	if err != nil {
		return House{}, 0, err
	}
	k, err := m.houseOf(partition, seen, items[0])
	return k.house.Clone(), k.n, err
}
