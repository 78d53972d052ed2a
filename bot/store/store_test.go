package store_test

import (
	"bytes"
	"strings"
	"testing"
	"time"

	"galeward/bot/store"
)

// The limits that these tests probe are the contract's own; there is no
// outside source for them.

func TestCheckAccepts(t *testing.T) {
	long := strings.Repeat("k", store.MaxKey)
	many := make([]store.Op, store.MaxOps)
	for i := range many {
		many[i].Key = string(rune('a' + i))
	}
	for name, ops := range map[string][]store.Op{
		"nothing":                   nil,
		"a read":                    {{Key: "a"}},
		"a read with a condition":   {{Key: "a", If: store.Tagged("t")}},
		"a write":                   {{Key: "a", Value: []byte("v"), Tag: "t", TTL: time.Hour, Durable: true}},
		"a write of an empty value": {{Key: "a", Tag: "t"}},
		"a deletion":                {{Key: "a", Delete: true, If: store.Tagged("t")}},
		"a durable deletion":        {{Key: "a", Delete: true, Durable: true}},
		"two keys":                  {{Key: "a"}, {Key: "b", Delete: true}},
		"the longest key":           {{Key: long}},
		"the longest tag":           {{Key: "a", Tag: strings.Repeat("t", store.MaxTag)}},
		"the biggest value":         {{Key: "a", Tag: "t", Value: bytes.Repeat([]byte{0}, store.MaxValue)}},
		"the most operations":       many,
		"bytes that are no text":    {{Key: "\x00\xff\n", Value: []byte{0xff, 0}, Tag: "\xfe"}},
	} {
		if err := store.Check("p", ops); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
	if err := store.Check(long, nil); err != nil {
		t.Errorf("the longest partition: %v", err)
	}
}

func TestCheckRefuses(t *testing.T) {
	for _, c := range []struct {
		says string
		ops  []store.Op
	}{
		{"not 0", []store.Op{{}}},
		{"a key has", []store.Op{{Key: strings.Repeat("k", store.MaxKey+1)}}},
		{"stands twice", []store.Op{{Key: "a"}, {Key: "b"}, {Key: "a", Delete: true}}},
		{"a tag has", []store.Op{{Key: "a", Tag: strings.Repeat("t", store.MaxTag+1)}}},
		{"a value has", []store.Op{{Key: "a", Tag: "t", Value: make([]byte, store.MaxValue+1)}}},
		{"writes and deletes", []store.Op{{Key: "a", Tag: "t", Delete: true}}},
		{"without a tag", []store.Op{{Key: "a", Value: []byte("v")}}},
		{"without a tag", []store.Op{{Key: "a", Value: []byte{}}}},
		{"without a tag", []store.Op{{Key: "a", TTL: time.Second}}},
		{"without a tag", []store.Op{{Key: "a", Durable: true}}},
		{"without a tag", []store.Op{{Key: "a", Delete: true, TTL: time.Second}}},
		{"negative", []store.Op{{Key: "a", Tag: "t", TTL: -1}}},
		{"at most 32", make([]store.Op, store.MaxOps+1)},
	} {
		err := store.Check("p", c.ops)
		if err == nil || !strings.Contains(err.Error(), c.says) {
			t.Errorf("want an error with %q, got %v", c.says, err)
		}
	}
	for _, partition := range []string{"", strings.Repeat("p", store.MaxKey+1)} {
		err := store.Check(partition, nil)
		if err == nil || !strings.Contains(err.Error(), "a partition has") {
			t.Errorf("a partition of %d bytes: %v", len(partition), err)
		}
	}
}

// TestCheckKeepsSecrets makes sure that an error tells sizes and positions
// only: keys hold channel names and values hold readings.
func TestCheckKeepsSecrets(t *testing.T) {
	secret := "paco2-72-bed-9"
	for _, ops := range [][]store.Op{
		{{Key: secret, Value: []byte(secret)}},
		{{Key: secret + strings.Repeat("k", store.MaxKey), Value: []byte(secret)}},
		{{Key: secret}, {Key: secret}},
		{{Key: secret, Tag: secret, Delete: true}},
	} {
		err := store.Check(secret, ops)
		if err == nil {
			t.Fatal("no error")
		}
		if strings.Contains(err.Error(), secret) {
			t.Errorf("the error tells what was stored: %v", err)
		}
	}
}

func TestHolds(t *testing.T) {
	absent, present := store.Item{}, store.Item{Tag: "t"}
	for _, c := range []struct {
		name            string
		cond            *string
		absent, present bool
	}{
		{"no condition", nil, true, true},
		{"must be absent", store.Absent(), true, false},
		{"must have the tag", store.Tagged("t"), false, true},
		{"must have another tag", store.Tagged("u"), false, false},
	} {
		op := store.Op{Key: "a", If: c.cond}
		if op.Holds(absent) != c.absent || op.Holds(present) != c.present {
			t.Errorf("%s: absent %v, present %v", c.name, op.Holds(absent), op.Holds(present))
		}
	}
}

func TestWrites(t *testing.T) {
	if (store.Op{Key: "a", If: store.Absent()}).Writes() {
		t.Error("a read writes")
	}
	if !(store.Op{Key: "a", Tag: "t"}).Writes() || !(store.Op{Key: "a", Delete: true}).Writes() {
		t.Error("a write or a deletion does not write")
	}
}
