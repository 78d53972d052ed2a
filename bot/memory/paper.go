package memory

import (
	"encoding/json"
	"slices"
	"strings"
	"time"

	"galeward/bot/shorthand"
	"galeward/bot/store"
)

// paper is one thread document on its way through a visit.
type paper struct {
	key    string
	tag    string // as read, "" when it was absent
	root   bool   // the thread under the message itself, beside the user's own
	thread Thread
}

func (p *paper) flat() bool { return strings.HasPrefix(p.key, "flat/") }

// threadDoc is a thread as it is stored.
type threadDoc struct {
	head
	Entries []json.RawMessage        `json:"entries,omitempty"`
	Pending *questionDoc             `json:"pending,omitempty"`
	Of      string                   `json:"of,omitempty"`
	Asked   []shorthand.QuestionCode `json:"asked,omitempty"`
	Flat    string                   `json:"flat,omitempty"`
}

type entryDoc struct {
	Message string          `json:"message"`
	Post    string          `json:"post,omitempty"`
	At      time.Time       `json:"at"`
	Until   time.Time       `json:"until"`
	Gas     json.RawMessage `json:"gas"`
}

// knownThread is a thread as it was last read or written here: its tag tells
// whether it still is what the store holds. It saves the decoding.
type knownThread struct {
	tag    string
	thread Thread
}

// read fills the paper from the store's item.
func (m *Memory) read(partition string, p *paper, item store.Item) error {
	p.tag, p.thread = item.Tag, Thread{}
	if item.Tag == "" {
		m.threads.drop(partition + "\n" + p.key)
		return nil
	}
	if k, ok := m.threads.get(partition + "\n" + p.key); ok && k.tag == item.Tag {
		p.thread = k.thread.clone()
		p.thread.expire(m.now())
		return nil
	}
	t, err := decodeThread(item.Value)
	if err != nil {
		return err
	}
	t.expire(m.now())
	p.thread = t
	return nil
}

// wrote notes what the store now holds.
func (m *Memory) wrote(partition string, p *paper, tag string) {
	p.tag = tag
	if tag == "" {
		m.threads.drop(partition + "\n" + p.key)
		return
	}
	m.threads.put(partition+"\n"+p.key, knownThread{tag, p.thread.clone()})
}

func decodeThread(raw []byte) (t Thread, err error) {
	var d threadDoc
	if err := threadSchema.decode(raw, &d); err != nil {
		return t, err
	}
	for _, raw := range d.Entries {
		e, err := decodeEntry(raw)
		if err != nil {
			return Thread{}, threadSchema.unreadable(err)
		}
		t.entries = append(t.entries, e)
	}
	if d.Pending != nil {
		q, err := questionIn(d.Pending)
		if err != nil {
			return Thread{}, threadSchema.unreadable(err)
		}
		t.pending, t.of = &q, d.Of
	}
	t.asked, t.flat = d.Asked, d.Flat
	return t, nil
}

func decodeEntry(raw json.RawMessage) (*held, error) {
	var d entryDoc
	if err := json.Unmarshal(raw, &d); err != nil {
		return nil, err
	}
	gas, err := decodeGas(d.Gas)
	return &held{Entry: Entry{Message: d.Message, Post: d.Post, At: d.At, Gas: gas}, until: d.Until}, err
}

// encode writes the entry for the store, once.
func (e *held) encode() (err error) {
	if e.raw != nil {
		return nil
	}
	gas, err := encodeGas(&e.Gas)
	if err != nil {
		return err
	}
	e.raw, err = json.Marshal(&entryDoc{Message: e.Message, Post: e.Post, At: e.At.UTC(), Until: e.until.UTC(), Gas: gas})
	return err
}

// encodeThread writes a thread for the store. The entries are put together
// from what each was written as before, which is most of the work of a save.
func encodeThread(t *Thread) ([]byte, error) {
	d := threadDoc{head: threadSchema.head(), Of: t.of, Asked: t.asked, Flat: t.flat}
	if t.pending != nil {
		q := questionOut(t.pending)
		d.Pending = &q
	}
	out, err := json.Marshal(&d)
	if err != nil || len(t.entries) == 0 {
		return out, err
	}
	size := len(out) + len(`,"entries":[]}`)
	for _, e := range t.entries {
		if err := e.encode(); err != nil {
			return nil, err
		}
		size += len(e.raw) + 1
	}
	out = append(slices.Grow(out[:len(out)-1], size), `,"entries":[`...)
	for i, e := range t.entries {
		if i > 0 {
			out = append(out, ',')
		}
		out = append(out, e.raw...)
	}
	return append(out, "]}"...), nil
}

// op is the write of a paper under the condition that the store holds what was
// read. An empty thread is taken out of the store.
func (p *paper) op(now time.Time, life time.Duration, tag string) (store.Op, error) {
	o := store.Op{Key: p.key, If: &p.tag}
	if p.thread.empty() {
		o.Delete = true
		return o, nil
	}
	value, err := encodeThread(&p.thread)
	o.Value, o.Tag, o.TTL = value, tag, life
	if len(p.thread.entries) > 0 { // no longer than its gases
		o.TTL = time.Second
	}
	for i := range p.thread.entries {
		o.TTL = max(o.TTL, p.thread.entries[i].until.Sub(now))
	}
	return o, err
}
