package memory

import (
	"encoding/json"
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
	Entries []entryDoc               `json:"entries,omitempty"`
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
	Void    bool            `json:"void,omitempty"`
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
	for _, e := range d.Entries {
		gas, err := decodeGas(e.Gas)
		if err != nil {
			return Thread{}, threadSchema.unreadable(err)
		}
		t.entries = append(t.entries, held{
			Entry: Entry{Message: e.Message, Post: e.Post, At: e.At, Gas: gas, Void: e.Void}, until: e.Until, raw: e.Gas,
		})
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

func encodeThread(t *Thread) ([]byte, error) {
	d := threadDoc{head: threadSchema.head(), Of: t.of, Asked: t.asked, Flat: t.flat}
	d.Entries = make([]entryDoc, len(t.entries))
	for i := range t.entries {
		e := &t.entries[i]
		if e.raw == nil {
			raw, err := encodeGas(&e.Gas)
			if err != nil {
				return nil, err
			}
			e.raw = raw
		}
		d.Entries[i] = entryDoc{Message: e.Message, Post: e.Post, At: e.At.UTC(), Until: e.until.UTC(), Void: e.Void, Gas: e.raw}
	}
	if t.pending != nil {
		q := questionOut(t.pending)
		d.Pending = &q
	}
	return json.Marshal(&d)
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
