package main

import (
	"bufio"
	"bytes"
	"context"
	"os"
	"path/filepath"
	"strings"
	"sync/atomic"
	"testing"

	"galeward/bot/store"
)

// witness counts the writes to a store.
type witness struct {
	store.Store
	writes atomic.Int32
}

func (w *witness) Do(ctx context.Context, partition string, ops ...store.Op) ([]store.Item, error) {
	for _, op := range ops {
		if op.Tag != "" || op.Delete {
			w.writes.Add(1)
		}
	}
	return w.Store.Do(ctx, partition, ops...)
}

// asked answers lines on one store, and gives the answers and the number of
// writes that they made.
func asked(t *testing.T, thread bool, house string, lines ...string) (answers []string, writes int32) {
	t.Helper()
	w := &witness{Store: openMemory()}
	b, err := newAsking(t.Context(), w, house)
	if err != nil {
		t.Fatal(err)
	}
	settled := w.writes.Load()
	for _, l := range lines {
		var out bytes.Buffer
		a := asker{bot: b, thread: thread, out: bufio.NewWriter(&out), asked: len(answers)}
		if err := a.answer(t.Context(), l); err != nil {
			t.Fatal(err)
		}
		answers = append(answers, out.String())
	}
	return answers, w.writes.Load() - settled
}

// Without a thread nothing is remembered: the same text twice gets the same
// answer twice, a line that would follow another has nothing to follow, and the
// store is only read.
func TestAskRemembersNothing(t *testing.T) {
	answers, writes := asked(t, false, "", usualLine, usualLine, "now 7.33/58/66/30 fio2 40", "7.33/58/66/30 fio2 40", "fio2 60",
		"why", "7.40/40", "forget")
	alone, _ := asked(t, false, "", "7.33/58/66/30 fio2 40")
	if answers[0] != answers[1] || !strings.Contains(answers[0], "P/F 135") {
		t.Errorf("the same twice: %q and %q", answers[0], answers[1])
	}
	if answers[3] != alone[0] {
		t.Errorf("after others: %q, alone: %q", answers[3], alone[0])
	}
	if strings.Contains(answers[4], "P/F") {
		t.Errorf("a line followed a stranger: %q", answers[4])
	}
	if writes != 0 {
		t.Errorf("%d writes to the store, want none", writes)
	}
}

// The one thread does remember: a witness that sees no write would prove nothing.
func TestAskRemembersItsThread(t *testing.T) {
	answers, writes := asked(t, true, "", usualLine, "fio2 60")
	if !strings.Contains(answers[1], "P/F 90") {
		t.Errorf("the second line is answered with %q", answers[1])
	}
	if writes == 0 {
		t.Error("the thread was not written")
	}
}

func TestHouseRulesHoldWithoutAThread(t *testing.T) {
	path := filepath.Join(t.TempDir(), "house.yaml")
	if err := os.WriteFile(path, []byte("units: kPa\n"), 0o600); err != nil {
		t.Fatal(err)
	}
	answers, writes := asked(t, false, path, "7.27/9.6/7.2/32 fio2 40")
	if !strings.Contains(answers[0], "kPa") || writes != 0 {
		t.Errorf("%d writes, answered %q", writes, answers[0])
	}
}
