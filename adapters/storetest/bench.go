package storetest

import (
	"context"
	"strconv"
	"testing"
	"time"

	"galeward/bot/store"
)

// Bench measures the first call of a reading: claim the event, read the house
// rules and the thread.
func Bench(b *testing.B, s store.Store) {
	thread := make([]byte, 1500)
	must(b, s, room, store.Op{Key: "house", Value: thread[:600], Tag: "h"}, store.Op{Key: "thread", Value: thread, Tag: "t"})
	b.ReportAllocs()
	n := 0
	for b.Loop() {
		n++
		claim := store.Op{Key: "event/" + strconv.Itoa(n), If: store.Absent(), Tag: strconv.Itoa(n), TTL: time.Minute}
		if _, err := s.Do(context.Background(), room, claim, get("house"), get("thread")); err != nil {
			b.Fatal(err)
		}
	}
}
