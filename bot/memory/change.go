package memory

import (
	"context"
	"errors"
	"fmt"
	"slices"
	"time"

	"galeward/bot/store"
)

// pen is one change of house rules on its way into the store.
type pen struct {
	m         *Memory
	partition string
	by        string
	base      int // the revision the change was decided on, -1 for the present one
	change    func(House) (House, error)
	seen      *House // the rules of base
	tag       string // of the rules known here before the read
}

func (p *pen) write(ctx context.Context) (Revision, error) {
	ops := []store.Op{{Key: houseKey}}
	if p.base > 0 {
		ops = append(ops, store.Op{Key: revisionKey(p.base)})
	}
	p.tag = p.m.seen(p.partition)
	items, err := p.m.guard.Do(ctx, p.partition, ops...)
	if err != nil {
		return Revision{}, err
	}
	if err := p.look(items); err != nil {
		return Revision{}, err
	}
	for range tries {
		var rev Revision
		if rev, items, err = p.attempt(ctx, items[0]); !errors.Is(err, store.ErrConflict) {
			return rev, err
		}
	}
	return Revision{}, ErrBusy
}

// look finds the rules that the change was decided on.
func (p *pen) look(items []store.Item) error {
	switch {
	case p.base == 0:
		p.seen = &House{}
	case p.base > 0 && items[1].Tag == "":
		return fmt.Errorf("%w: %d", ErrNoRevision, p.base)
	case p.base > 0:
		rev, err := decodeRevision(revisionSchema, items[1].Value)
		p.seen = &rev.House
		return err
	}
	return nil
}

// attempt writes the change on the rules that the store holds. On a conflict
// it gives what the store holds instead.
func (p *pen) attempt(ctx context.Context, item store.Item) (Revision, []store.Item, error) {
	now, err := p.m.houseOf(p.partition, p.tag, item)
	if err != nil {
		return Revision{}, nil, err
	}
	rev, err := p.draft(now)
	if err != nil || len(rev.What) == 0 {
		return rev, nil, err
	}
	tag := newTag()
	ops, err := revisionOps(rev, item.Tag, tag)
	if err != nil {
		return Revision{}, nil, err
	}
	items, err := p.m.guard.Do(ctx, p.partition, ops...)
	switch {
	case err == nil, errors.Is(err, store.ErrNotReplicated):
		p.m.houses.put(p.partition, known{tag, rev.N, rev.House})
		return rev, nil, err
	case errors.Is(err, store.ErrConflict) && items[0].Tag == tag: // written by a repeat inside the store's client
		return p.confirm(ctx, rev, tag, items)
	case errors.Is(err, ErrDown):
		return p.doubt(ctx, rev, tag, err)
	}
	return Revision{}, items, err
}

// draft applies the change, and looks whether others changed the same.
func (p *pen) draft(now known) (Revision, error) {
	if p.seen == nil {
		p.seen = &now.house
	}
	next, err := p.change(now.house.Clone())
	if err != nil {
		return Revision{}, err
	}
	next = next.tidy()
	if err := next.Validate(); err != nil {
		return Revision{}, err
	}
	what := diff(now.house, next)
	if len(what) == 0 {
		return Revision{N: now.n, House: now.house}, nil
	}
	if theirs := overlap(diff(*p.seen, now.house), what); len(theirs) > 0 {
		return Revision{}, &ClashError{Theirs: theirs, N: now.n}
	}
	return Revision{N: now.n + 1, At: p.m.now().UTC(), By: p.by, What: what, House: next}, nil
}

// overlap gives the changes of theirs that touch a field of ours.
func overlap(theirs, ours []Change) []Change {
	return slices.DeleteFunc(theirs, func(c Change) bool {
		return !slices.ContainsFunc(ours, func(o Change) bool { return o.Field == c.Field })
	})
}

// lookUp bounds the question what became of a write, so that a line is
// answered within two seconds.
const lookUp = 500 * time.Millisecond

// doubt finds out what became of a write whose reply was lost.
func (p *pen) doubt(ctx context.Context, rev Revision, tag string, cause error) (Revision, []store.Item, error) {
	ctx, cancel := context.WithTimeout(context.WithValue(context.WithoutCancel(ctx), pressing{}, true), lookUp)
	defer cancel()
	items, err := p.m.guard.Do(ctx, p.partition, store.Op{Key: houseKey}, store.Op{Key: revisionKey(rev.N)})
	switch {
	case err != nil:
		return Revision{}, nil, fmt.Errorf("%w: %w", ErrUncertain, cause)
	case items[0].Tag == tag:
		return p.confirm(ctx, rev, tag, items)
	case items[1].Tag == tag: // ours stands, and another change on top of it
		return rev, nil, nil
	}
	// Not there, yet it may still be on its way. Written anew under the same
	// condition, one of the two writes wins and the other is refused.
	return Revision{}, items, store.ErrConflict
}

// confirm writes the same rules once more under a new tag, so that a store
// that keeps a second server can say whether that has them.
func (p *pen) confirm(ctx context.Context, rev Revision, tag string, items []store.Item) (Revision, []store.Item, error) {
	again := newTag()
	ops, err := revisionOps(rev, tag, again)
	if err != nil {
		return Revision{}, nil, err
	}
	_, err = p.m.guard.Do(ctx, p.partition, ops[0])
	switch {
	case err == nil, errors.Is(err, store.ErrNotReplicated):
		p.m.houses.put(p.partition, known{again, rev.N, rev.House})
		return rev, nil, err
	case errors.Is(err, store.ErrConflict): // changed further by someone else: ours stands below
		return rev, nil, nil
	}
	return rev, items, store.ErrNotReplicated
}
