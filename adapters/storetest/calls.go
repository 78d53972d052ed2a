package storetest

import (
	"context"
	"errors"
	"strings"
	"testing"

	"galeward/bot/store"
)

func writeAndRead(t *testing.T, s store.Store) {
	holds(t, s, room, "house", "", "")
	must(t, s, room, put("house", "rules", "t1"))
	holds(t, s, room, "house", "rules", "t1")
	must(t, s, room, put("house", "new rules", "t2"))
	holds(t, s, room, "house", "new rules", "t2")
}

func itemsAsBefore(t *testing.T, s store.Store) {
	must(t, s, room, put("a", "1", "t1"), put("b", "2", "t2"))
	items := must(t, s, room, put("a", "10", "t3"), get("b"), put("c", "3", "t4"), get("d"),
		store.Op{Key: "b2", Delete: true})
	same(t, items[0], "1", "t1")
	same(t, items[1], "2", "t2")
	for i := 2; i < 5; i++ {
		same(t, items[i], "", "")
	}
	holds(t, s, room, "a", "10", "t3")
	holds(t, s, room, "c", "3", "t4")
}

func conditions(t *testing.T, s store.Store) {
	conflict(t, s, putIf(store.Tagged("t0"), "k", "x", "t1"))
	must(t, s, room, putIf(store.Absent(), "k", "1", "t1"))
	conflict(t, s, putIf(store.Absent(), "k", "x", "t2"))
	conflict(t, s, putIf(store.Tagged("t2"), "k", "x", "t3"))
	conflict(t, s, putIf(store.Tagged("t"), "k", "x", "t3"))
	conflict(t, s, putIf(store.Tagged("t12"), "k", "x", "t3"))
	same(t, must(t, s, room, putIf(store.Tagged("t1"), "k", "2", "t2"))[0], "1", "t1")
	conflict(t, s, putIf(store.Tagged("t1"), "k", "x", "t3"))
	holds(t, s, room, "k", "2", "t2")
}

func allOrNothing(t *testing.T, s store.Store) {
	must(t, s, room, put("a", "1", "t1"), put("b", "2", "t2"))
	refused := []store.Op{
		put("a", "x", "t3"),
		{Key: "b", Delete: true},
		put("c", "x", "t4"),
		putIf(store.Tagged("no"), "d", "x", "t5"),
	}
	for turn := range refused { // the failing condition stands once at each place
		conflict(t, s, append(refused[turn:len(refused):len(refused)], refused[:turn]...)...)
		holds(t, s, room, "a", "1", "t1")
		holds(t, s, room, "b", "2", "t2")
		holds(t, s, room, "c", "", "")
		holds(t, s, room, "d", "", "")
	}
}

func conflictTellsWhy(t *testing.T, s store.Store) {
	must(t, s, room, put("a", "1", "t1"), put("b", "2", "t2"))
	items := conflict(t, s, putIf(store.Absent(), "a", "x", "t3"), get("b"), putIf(store.Absent(), "c", "x", "t4"))
	same(t, items[0], "1", "t1")
	same(t, items[1], "2", "t2")
	same(t, items[2], "", "")
}

func guardWithoutWrite(t *testing.T, s store.Store) {
	must(t, s, room, put("house", "rules", "t1"))
	guard := store.Op{Key: "house", If: store.Tagged("t1")}
	must(t, s, room, guard, put("bed", "9", "t2"))
	must(t, s, room, put("house", "other", "t3"))
	conflict(t, s, guard, put("bed", "10", "t4"))
	holds(t, s, room, "bed", "9", "t2")
	must(t, s, room, store.Op{Key: "none", If: store.Absent()}, put("bed", "11", "t5"))
}

func deletion(t *testing.T, s store.Store) {
	gone := store.Op{Key: "k", Delete: true}
	same(t, must(t, s, room, gone)[0], "", "")
	must(t, s, room, put("k", "1", "t1"))
	conflict(t, s, store.Op{Key: "k", Delete: true, If: store.Tagged("t0")})
	holds(t, s, room, "k", "1", "t1")
	same(t, must(t, s, room, store.Op{Key: "k", Delete: true, If: store.Tagged("t1")})[0], "1", "t1")
	holds(t, s, room, "k", "", "")
	conflict(t, s, store.Op{Key: "k", Delete: true, If: store.Tagged("t1")})
	must(t, s, room, putIf(store.Absent(), "k", "2", "t2"))
	must(t, s, room, store.Op{Key: "k", Delete: true, Durable: true})
	holds(t, s, room, "k", "", "")
}

func emptyCallAndValue(t *testing.T, s store.Store) {
	if items := must(t, s, room); len(items) != 0 {
		t.Fatalf("an empty call gave %d items", len(items))
	}
	must(t, s, room, store.Op{Key: "claim", Tag: "t1"})
	holds(t, s, room, "claim", "", "t1")
	conflict(t, s, putIf(store.Absent(), "claim", "x", "t2"))
}

// durableWrite runs without a second server, where Durable asks for nothing.
func durableWrite(t *testing.T, s store.Store) {
	op := put("house", "rules", "t1")
	op.Durable = true
	must(t, s, room, op)
	holds(t, s, room, "house", "rules", "t1")
}

func buffersNotShared(t *testing.T, s store.Store) {
	given := []byte("value")
	must(t, s, room, store.Op{Key: "k", Value: given, Tag: "t1"})
	copy(given, "XXXXX")
	first := must(t, s, room, get("k"))[0]
	same(t, first, "value", "t1")
	copy(first.Value, "YYYYY")
	holds(t, s, room, "k", "value", "t1")
	before := must(t, s, room, put("k", "next", "t2"))[0]
	must(t, s, room, put("k", "third", "t3"))
	same(t, before, "value", "t1")
}

func partitionsApart(t *testing.T, s store.Store) {
	// Pairs that a careless joining of partition and key would mix up.
	pairs := [][2]string{{"a", "b}:c"}, {"a}:b", "c"}, {"a", "b:c"}, {"a:b", "c"}, {"a", "b/c"}, {"a/b", "c"},
		{"}", "c"}, {"{", "c"}, {"{}", "c"}, {"%7D", "c"}, {"a", "c"}, {"A", "c"}, {"\x00", "c"}, {"ab", "c"}, {"a", "bc"}}
	for i, pair := range pairs {
		n := string(rune('A' + i))
		must(t, s, pair[0], putIf(store.Absent(), pair[1], n, "t"+n), get("beside"))
	}
	for i, pair := range pairs {
		n := string(rune('A' + i))
		holds(t, s, pair[0], pair[1], n, "t"+n)
	}
}

func anyBytes(t *testing.T, s store.Store) {
	all := make([]byte, 256)
	for i := range all {
		all[i] = byte(i)
	}
	for _, odd := range []string{"\x00", "\xff\xfe", "a\r\nb", "*1\r\n", "{}", " ", "%s", "ä", "nil", "\x01", string(all[:128]), string(all[128:])} {
		must(t, s, odd, store.Op{Key: odd, Value: all, Tag: odd})
		same(t, must(t, s, odd, store.Op{Key: odd, If: &odd})[0], string(all), odd)
		must(t, s, odd, store.Op{Key: odd, If: &odd, Delete: true})
		holds(t, s, odd, odd, "", "")
	}
}

func bigValues(t *testing.T, s store.Store) {
	big := strings.Repeat("0123456789abcdef", store.MaxValue/16)
	key, tag := strings.Repeat("k", store.MaxKey), strings.Repeat("t", store.MaxTag)
	partition := strings.Repeat("p", store.MaxKey)
	must(t, s, partition, put(key, big, tag), put("second", big[1:], tag))
	holds(t, s, partition, key, big, tag)
	holds(t, s, partition, "second", big[1:], tag)
	ops := make([]store.Op, store.MaxOps)
	for i := range ops {
		ops[i] = put(strings.Repeat("m", i+1), big[:1000+i], "t")
	}
	must(t, s, partition, ops...)
	for i, op := range ops {
		holds(t, s, partition, op.Key, big[:1000+i], "t")
	}
}

func mistakesRefused(t *testing.T, s store.Store) {
	must(t, s, room, put("k", "1", "t1"))
	for _, ops := range [][]store.Op{
		{get("k"), {}},
		{put("k", "2", "t2"), put("k", "3", "t3")},
		{put("k", "2", "t2"), {Key: "b", Value: []byte("v")}},
		{put("k", strings.Repeat("x", store.MaxValue+1), "t2")},
		{{Key: "k", Delete: true}, {Key: "b", Tag: "t", TTL: -1}},
	} {
		items, err := do(t, s, room, ops...)
		if err == nil || items != nil || errors.Is(err, store.ErrConflict) {
			t.Fatalf("a mistake gave items %v and error %v", items, err)
		}
	}
	if _, err := do(t, s, "", get("k")); err == nil {
		t.Fatal("an empty partition was taken")
	}
	holds(t, s, room, "k", "1", "t1")
}

func cancelledContext(t *testing.T, s store.Store) {
	must(t, s, room, put("k", "1", "t1"))
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	for _, op := range []store.Op{get("k"), put("k", "2", "t2")} {
		items, err := s.Do(ctx, room, op)
		if !errors.Is(err, context.Canceled) || items != nil {
			t.Fatalf("items %v, error %v", items, err)
		}
	}
	holds(t, s, room, "k", "1", "t1")
}
