package storetest

import (
	"testing"
	"time"

	"galeward/bot/store"
)

// The lifetimes of the suite: short enough to wait for, long enough that a
// slow machine does not expire an item before it was looked at.
const (
	brief = 150 * time.Millisecond
	past  = 200 * time.Millisecond
)

// putFor is a write with a lifetime.
func putFor(ttl time.Duration, key, value, tag string) store.Op {
	op := put(key, value, tag)
	op.TTL = ttl
	return op
}

func lifetime(t *testing.T, s store.Store) {
	must(t, s, room, putFor(brief, "short", "1", "t1"), putFor(time.Hour, "long", "2", "t2"), put("kept", "3", "t3"))
	holds(t, s, room, "short", "1", "t1")
	wait(s, past)
	holds(t, s, room, "short", "", "")
	holds(t, s, room, "long", "2", "t2")
	holds(t, s, room, "kept", "3", "t3")
	must(t, s, room, putFor(time.Nanosecond, "shortest", "4", "t4"))
	wait(s, past)
	holds(t, s, room, "shortest", "", "")
}

func lifetimeReplaced(t *testing.T, s store.Store) {
	must(t, s, room, putFor(brief, "kept", "1", "t1"), putFor(brief, "longer", "1", "t2"), put("shorter", "1", "t3"),
		putFor(brief, "again", "1", "t4"))
	must(t, s, room, put("kept", "2", "t5"), putFor(time.Hour, "longer", "2", "t6"), putFor(brief, "shorter", "2", "t7"),
		store.Op{Key: "again", Delete: true})
	must(t, s, room, put("again", "2", "t8"))
	wait(s, past)
	must(t, s, room, put("other", "2", "t9")) // a write may clear what is over, and nothing else
	holds(t, s, room, "kept", "2", "t5")
	holds(t, s, room, "longer", "2", "t6")
	holds(t, s, room, "shorter", "", "")
	holds(t, s, room, "again", "2", "t8")
}

func expiredIsAbsent(t *testing.T, s store.Store) {
	must(t, s, room, putFor(brief, "claim", "1", "t1"))
	wait(s, past)
	conflict(t, s, putIf(store.Tagged("t1"), "claim", "x", "t2"))
	same(t, must(t, s, room, putIf(store.Absent(), "claim", "2", "t3"))[0], "", "")
	holds(t, s, room, "claim", "2", "t3")
}
