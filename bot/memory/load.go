package memory

import (
	"context"
	"encoding/json"
	"errors"
	"strconv"
	"time"

	"galeward/bot/store"
)

// claimDoc is the mark of one event.
type claimDoc struct {
	head
	At   time.Time `json:"at"`
	Done bool      `json:"done,omitempty"`
}

// metDoc is the mark of a user who has had the standing notice.
type metDoc struct {
	head
	At time.Time `json:"at"`
}

// houseDoc is the house as it is stored, with the number of its revision.
type houseDoc struct {
	head
	N     int             `json:"n"`
	At    time.Time       `json:"at"`
	By    string          `json:"by"`
	What  []Change        `json:"what,omitempty"`
	House json.RawMessage `json:"house"`
}

func (m *Memory) load(ctx context.Context, c Call) (*Visit, error) {
	v := m.visit(c)
	v.seen = m.seen(v.partition)
	ops := m.readings(v)
	items, err := m.guard.Do(ctx, v.partition, ops...)
	if errors.Is(err, store.ErrFull) {
		v.Full = true
		items, err = m.guard.Do(ctx, v.partition, unwritten(ops)...)
	}
	switch {
	case errors.Is(err, store.ErrConflict), err == nil:
		return v, m.take(ctx, v, items)
	case errors.Is(err, ErrDown):
		return m.degraded(v), nil
	}
	return v, err
}

// visit begins a visit with the papers it needs: the thread, or outside one
// what the user's own lines left, and the thread under the message itself.
func (m *Memory) visit(c Call) *Visit {
	v := &Visit{call: c, partition: c.Where.partition(), tag: newTag(), now: m.now(), life: m.life}
	switch {
	case c.Where.Thread != "":
		v.docs = []paper{{key: threadKey(c.Where.Thread)}}
	case c.User != "":
		v.docs = []paper{{key: flatKey(v.partition, c.User)}}
	default: // found through the thread under the message, if at all
		v.docs = []paper{{}}
	}
	if c.Where.Thread == "" && c.Message != "" {
		v.docs = append(v.docs, paper{key: threadKey(c.Message), root: true})
	}
	return v
}

// readings are the operations of the first round trip.
func (m *Memory) readings(v *Visit) []store.Op {
	ops := make([]store.Op, 0, 5)
	ops = append(ops, store.Op{Key: houseKey})
	for i := range v.docs {
		if v.docs[i].key != "" {
			ops = append(ops, store.Op{Key: v.docs[i].key})
		}
	}
	if v.call.User != "" {
		ops = append(ops, store.Op{Key: metKey(v.partition, v.call.User)})
	}
	if v.call.Delivery != "" {
		ops = append(ops, m.claimOp(v, store.Absent(), false))
	}
	return ops
}

func (m *Memory) claimOp(v *Visit, cond *string, done bool) store.Op {
	return store.Op{Key: claimKey(v.call.Delivery), If: cond, Value: encodeClaim(v.now, done), Tag: v.tag, TTL: claimLife}
}

// encodeClaim writes a claimDoc by hand: every event writes two of them.
func encodeClaim(at time.Time, done bool) []byte {
	h := claimSchema.head()
	out := make([]byte, 0, 80)
	out = strconv.AppendInt(append(out, `{"v":`...), int64(h.V), 10)
	out = append(append(append(out, `,"kind":"`...), h.Kind...), `","at":"`...)
	out = append(at.UTC().AppendFormat(out, time.RFC3339Nano), '"')
	if done {
		out = append(out, `,"done":true`...)
	}
	return append(out, '}')
}

// unwritten are the same operations without the claim's write.
func unwritten(ops []store.Op) []store.Op {
	reads := make([]store.Op, len(ops))
	for i, op := range ops {
		reads[i] = store.Op{Key: op.Key}
	}
	return reads
}

// take makes the visit out of what the first round trip brought.
func (m *Memory) take(ctx context.Context, v *Visit, items []store.Item) error {
	var err error
	if v.call.Delivery != "" {
		if v.Claim, err = m.judge(ctx, v, items[len(items)-1]); err != nil || v.Claim == Duplicate {
			return err
		}
	}
	if v.Degraded { // the store went away during the take-over
		return nil
	}
	if err := m.takeHouse(v, items[0]); err != nil {
		v.frozen = true
		return err
	}
	at := 1
	for i := range v.docs {
		if v.docs[i].key == "" {
			continue
		}
		if err := m.read(v.partition, &v.docs[i], items[at]); err != nil {
			v.frozen = true
			return err
		}
		at++
	}
	v.FirstTime = v.call.User != "" && items[at].Tag == ""
	return m.follow(ctx, v)
}

// follow reads what the user's own lines left, found through the thread under
// the message, where the platform did not say who the user is.
func (m *Memory) follow(ctx context.Context, v *Visit) error {
	if v.docs[0].key != "" || len(v.docs) < 2 || v.docs[1].thread.flat == "" {
		return nil
	}
	v.docs[0].key = v.docs[1].thread.flat
	items, err := m.guard.Do(ctx, v.partition, store.Op{Key: v.docs[0].key})
	if err != nil {
		if errors.Is(err, ErrDown) {
			m.degraded(v)
			return nil
		}
		return err
	}
	return m.read(v.partition, &v.docs[0], items[0])
}

// takeHouse reads the rules, and remembers them for when the store is down.
func (m *Memory) takeHouse(v *Visit, item store.Item) error {
	k, err := m.houseOf(v.partition, v.seen, item)
	if err != nil {
		return err
	}
	v.House, v.Revision, v.Known = k.house.Clone(), k.n, true
	v.life = v.House.life(v.now, m.life)
	return nil
}

// seen is the tag of the rules that this process knows, noted before a read.
func (m *Memory) seen(partition string) string {
	k, _ := m.houses.get(partition)
	return k.tag
}

// houseOf decodes the house unless this process knows it already. What was
// read is remembered only when the rules known here are still those seen before
// the read: a slow read must not bring back rules that were changed meanwhile.
func (m *Memory) houseOf(partition, seen string, item store.Item) (known, error) {
	if k, ok := m.houses.get(partition); ok && k.tag == item.Tag {
		return k, nil
	}
	k := known{tag: item.Tag}
	if item.Tag != "" {
		rev, err := decodeRevision(houseSchema, item.Value)
		if err != nil {
			return known{}, err
		}
		k.n, k.house = rev.N, rev.House
	}
	m.houses.putIf(partition, k, func(old known) bool { return old.tag == seen })
	return k, nil
}

// judge decides who answers an event, from the claim that stood before.
func (m *Memory) judge(ctx context.Context, v *Visit, item store.Item) (Claim, error) {
	if item.Tag == "" && v.Full {
		return m.judgeAlone(v), nil
	}
	if item.Tag == "" || item.Tag == v.tag {
		m.noteClaim(v, false)
		return Mine, nil
	}
	var d claimDoc
	if err := claimSchema.decode(item.Value, &d); err != nil {
		return Duplicate, nil // of a newer process, which will have answered
	}
	// What this very process knows of the event does not depend on a wall clock
	// that jumps.
	alone := m.judgeAlone(v)
	if d.Done || alone == Duplicate || v.now.Sub(d.At) < orphaned {
		return Duplicate, nil
	}
	if v.Full {
		return TakenOver, nil
	}
	_, err := m.guard.Do(ctx, v.partition, m.claimOp(v, store.Tagged(item.Tag), false))
	switch {
	case errors.Is(err, store.ErrConflict):
		return Duplicate, nil
	case errors.Is(err, store.ErrFull):
		v.Full = true
	case errors.Is(err, ErrDown):
		m.degraded(v)
	case err != nil:
		return Duplicate, err
	}
	m.noteClaim(v, false)
	return TakenOver, nil
}

// claimed is what this process knows of an event that it claimed.
type claimed struct {
	at   time.Time
	done bool
}

func (m *Memory) noteClaim(v *Visit, done bool) {
	if v.call.Delivery != "" {
		m.claims.put(v.partition+"\n"+v.call.Delivery, claimed{v.now, done})
	}
}

// judgeAlone decides by what this process knows, where the store can not.
func (m *Memory) judgeAlone(v *Visit) Claim {
	c, seen := m.claims.get(v.partition + "\n" + v.call.Delivery)
	switch age := v.now.Sub(c.at); {
	case seen && (c.done && age < claimLife || age < orphaned):
		return Duplicate
	case seen && age < claimLife:
		m.noteClaim(v, false)
		return TakenOver
	}
	m.noteClaim(v, false)
	return Mine
}

// degraded makes a visit without the store: with the last known rules. An
// event that this process has answered before is still a duplicate.
func (m *Memory) degraded(v *Visit) *Visit {
	k, ok := m.houses.get(v.partition)
	v.House, v.Revision, v.Known = k.house.Clone(), k.n, ok
	v.Degraded, v.FirstTime = true, false
	v.life = v.House.life(v.now, m.life)
	if v.call.Delivery != "" && v.Claim == Mine {
		v.Claim = m.judgeAlone(v)
	}
	return v
}
