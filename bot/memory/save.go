package memory

import (
	"context"
	"encoding/json"
	"errors"

	"galeward/bot/store"
)

// tries bounds how often a write is repeated on what others wrote meanwhile.
const tries = 12

func (m *Memory) save(ctx context.Context, v *Visit) error {
	if v.Claim == Duplicate {
		return nil
	}
	m.noteClaim(v, true)
	if v.Degraded && len(v.edits) > 0 { // nothing was read: read now, and repeat the changes on it
		if err := m.reread(ctx, v); err != nil {
			return err
		}
	}
	for range tries {
		ops, papers, err := m.writings(v)
		if err != nil || len(ops) == 0 {
			return err
		}
		items, err := m.guard.Do(ctx, v.partition, ops...)
		switch {
		case err == nil, errors.Is(err, store.ErrNotReplicated):
			for i, p := range papers {
				m.wrote(v.partition, p, ops[i].Tag)
			}
			return nil
		case !errors.Is(err, store.ErrConflict):
			return err
		}
		if err := m.merge(v, papers, items); err != nil {
			return err
		}
	}
	return ErrBusy
}

// writings are the operations of the second round trip; the papers come first.
func (m *Memory) writings(v *Visit) (ops []store.Op, papers []*paper, err error) {
	for i := range v.docs {
		p := &v.docs[i]
		if len(v.edits) == 0 || v.frozen || p.key == "" || p.tag == "" && p.thread.empty() {
			continue
		}
		if p.root {
			p.thread.flat = v.docs[0].key
		}
		op, err := p.op(v.now, v.life, newTag())
		if err != nil {
			return nil, nil, err
		}
		ops, papers = append(ops, op), append(papers, p)
	}
	if v.FirstTime {
		value, _ := json.Marshal(metDoc{head: metSchema.head(), At: v.now.UTC()}) // two plain fields
		ops = append(ops, store.Op{Key: metKey(v.partition, v.call.User), Value: value, Tag: newTag(), TTL: metLife})
	}
	if v.call.Delivery != "" {
		ops = append(ops, m.claimOp(v, nil, true))
	}
	return ops, papers, nil
}

// merge takes over what the store holds and repeats the changes on it.
func (m *Memory) merge(v *Visit, papers []*paper, items []store.Item) error {
	for i, p := range papers {
		if err := m.read(v.partition, p, items[i]); err != nil {
			return err
		}
		for _, e := range v.edits {
			e(p)
		}
	}
	return nil
}

// reread fetches the papers of a visit that began while the store was down.
func (m *Memory) reread(ctx context.Context, v *Visit) error {
	var ops []store.Op
	var papers []*paper
	for i := range v.docs {
		if v.docs[i].key != "" {
			ops = append(ops, store.Op{Key: v.docs[i].key})
			papers = append(papers, &v.docs[i])
		}
	}
	if len(ops) == 0 {
		return nil
	}
	items, err := m.guard.Do(ctx, v.partition, ops...)
	if err != nil {
		return err
	}
	return m.merge(v, papers, items)
}
