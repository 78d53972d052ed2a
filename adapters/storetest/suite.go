// Package storetest is the one suite that every store passes, and a real
// server to try package redisstore on.
//
// # What lives here
//
// Run, which holds a store to the contract of bot/store; Bench, the usual call
// of a reading; Redis, a server that can be killed, stopped and started again.
//
// # What does not
//
// No test of what only one store can do (a file in use, a lost reply): those
// stand beside that store. No client of a database.
package storetest

import (
	"context"
	"errors"
	"testing"
	"time"

	"galeward/bot/store"
)

// Open makes an empty store and leaves its closing to t.Cleanup.
type Open func(t testing.TB) store.Store

// Advancer is what a store with a clock of its own can do besides. The suite
// lets other stores wait for real.
type Advancer interface{ Advance(time.Duration) }

// Run holds the stores that open makes to the contract.
func Run(t *testing.T, open Open) {
	for _, part := range []struct {
		name string
		test func(*testing.T, store.Store)
	}{
		{"WriteAndRead", writeAndRead},
		{"ItemsAsBefore", itemsAsBefore},
		{"Conditions", conditions},
		{"AllOrNothing", allOrNothing},
		{"ConflictTellsWhy", conflictTellsWhy},
		{"GuardWithoutWrite", guardWithoutWrite},
		{"Deletion", deletion},
		{"EmptyCallAndValue", emptyCallAndValue},
		{"DurableWrite", durableWrite},
		{"Lifetime", lifetime},
		{"LifetimeReplaced", lifetimeReplaced},
		{"ExpiredIsAbsent", expiredIsAbsent},
		{"BuffersNotShared", buffersNotShared},
		{"PartitionsApart", partitionsApart},
		{"AnyBytes", anyBytes},
		{"BigValues", bigValues},
		{"MistakesRefused", mistakesRefused},
		{"CancelledContext", cancelledContext},
		{"ConcurrentCounter", concurrentCounter},
		{"OneClaimWins", oneClaimWins},
		{"NoHalfWrites", noHalfWrites},
		{"Rush", rush},
	} {
		t.Run(part.name, func(t *testing.T) { part.test(t, open(t)) })
	}
}

const room = "slack/T1/C1"

// put is a write without a condition.
func put(key, value, tag string) store.Op {
	return store.Op{Key: key, Value: []byte(value), Tag: tag}
}

// putIf is a write with a condition.
func putIf(cond *string, key, value, tag string) store.Op {
	op := put(key, value, tag)
	op.If = cond
	return op
}

func get(key string) store.Op { return store.Op{Key: key} }

func do(t testing.TB, s store.Store, partition string, ops ...store.Op) ([]store.Item, error) {
	t.Helper()
	ctx, cancel := context.WithTimeout(context.Background(), 10*time.Second)
	defer cancel()
	items, err := s.Do(ctx, partition, ops...)
	known := err == nil || errors.Is(err, store.ErrConflict)
	if known && len(items) != len(ops) {
		t.Fatalf("%d items for %d operations (error %v)", len(items), len(ops), err)
	}
	return items, err
}

// must is a call that has to succeed.
func must(t testing.TB, s store.Store, partition string, ops ...store.Op) []store.Item {
	t.Helper()
	items, err := do(t, s, partition, ops...)
	if err != nil {
		t.Fatalf("Do: %v", err)
	}
	return items
}

// conflict is a call that has to be refused by a condition.
func conflict(t testing.TB, s store.Store, ops ...store.Op) []store.Item {
	t.Helper()
	items, err := do(t, s, room, ops...)
	if !errors.Is(err, store.ErrConflict) {
		t.Fatalf("want ErrConflict, got %v", err)
	}
	return items
}

// holds compares what stands under a key; an empty tag means absent.
func holds(t testing.TB, s store.Store, partition, key, value, tag string) {
	t.Helper()
	same(t, must(t, s, partition, get(key))[0], value, tag)
}

func same(t testing.TB, item store.Item, value, tag string) {
	t.Helper()
	if string(item.Value) != value || item.Tag != tag {
		t.Fatalf("got %.40q with tag %.40q, want %.40q with tag %.40q", item.Value, item.Tag, value, tag)
	}
}

// wait lets d pass on the store's clock, or for real.
func wait(s store.Store, d time.Duration) {
	if a, ok := s.(Advancer); ok {
		a.Advance(d)
		return
	}
	time.Sleep(d)
}
