package boltstore

import (
	"context"
	"errors"
	"strconv"
	"testing"
	"time"

	"go.etcd.io/bbolt"

	"galeward/bot/store"
)

// busy keeps the disk busy until the returned function is called: a commit has
// begun and waits, and what comes now waits behind it.
func busy(t *testing.T, s *Store) (release func()) {
	t.Helper()
	tx, err := s.db.Begin(true)
	if err != nil {
		t.Fatal(err)
	}
	later(s, put("first", "", "t"))
	until(t, func() bool { // the first call is in the hands of the committer
		s.mu.Lock()
		defer s.mu.Unlock()
		return s.running && len(s.waiting) == 0
	})
	return func() {
		if err := tx.Rollback(); err != nil {
			t.Error(err)
		}
	}
}

func until(t *testing.T, done func() bool) {
	t.Helper()
	for range 1000 {
		if done() {
			return
		}
		time.Sleep(time.Millisecond)
	}
	t.Fatal("it never came to that")
}

// later starts a call; its error comes later.
func later(s *Store, ops ...store.Op) <-chan error {
	outcome := make(chan error, 1)
	go func() {
		_, err := s.Do(context.Background(), room, ops...)
		outcome <- err
	}()
	return outcome
}

// queued waits until so many calls wait behind the commit under way.
func queued(t *testing.T, s *Store, n int) {
	t.Helper()
	until(t, func() bool {
		s.mu.Lock()
		defer s.mu.Unlock()
		return len(s.waiting) == n
	})
}

func TestDeadlineWhileTheDiskIsBusy(t *testing.T) {
	s := open(t, newFile(t), Options{})
	release := busy(t, s)
	ctx, cancel := context.WithTimeout(context.Background(), 30*time.Millisecond)
	defer cancel()
	began := time.Now()
	items, err := s.Do(ctx, room, put("given-up", "v", "t"))
	if !errors.Is(err, context.DeadlineExceeded) || items != nil || time.Since(began) > 500*time.Millisecond {
		t.Errorf("items %v, error %v after %v", items, err, time.Since(began))
	}
	release()
	items = do(t, s, store.Op{Key: "after", Tag: "t"}, store.Op{Key: "first"}, store.Op{Key: "given-up"})
	if items[1].Tag != "t" || items[2].Tag != "" {
		t.Errorf("what waited: %v", items)
	}
}

func TestReadsDoNotWaitForTheDisk(t *testing.T) {
	s := open(t, newFile(t), Options{})
	do(t, s, put("house", "rules", "t1"))
	release := busy(t, s)
	defer release()
	ctx, cancel := context.WithTimeout(context.Background(), time.Second)
	defer cancel()
	items, err := s.Do(ctx, room, store.Op{Key: "house", If: store.Tagged("t1")})
	if err != nil || string(items[0].Value) != "rules" {
		t.Fatalf("items %v, error %v", items, err)
	}
}

func TestRushSharesCommits(t *testing.T) {
	s := open(t, newFile(t), Options{})
	release := busy(t, s)
	const rush = 200
	var outcomes []<-chan error
	for i := range rush {
		outcomes = append(outcomes, later(s, put("k"+strconv.Itoa(i), "v", "t")))
	}
	queued(t, s, rush)
	before := commits(t, s)
	release()
	for _, outcome := range outcomes {
		if err := <-outcome; err != nil {
			t.Fatal(err)
		}
	}
	if n := commits(t, s) - before; n != 2 { // the one under way, and one for all that waited
		t.Fatalf("%d calls took %d commits", rush, n)
	}
}

func commits(t *testing.T, s *Store) (n int) {
	t.Helper()
	err := s.view(func(tx *bbolt.Tx) error { n = tx.ID(); return nil })
	if err != nil {
		t.Fatal(err)
	}
	return n
}

// TestOneCallTooBigFailsAlone: those that share its commit do not suffer.
func TestOneCallTooBigFailsAlone(t *testing.T) {
	s := open(t, newFile(t), Options{MaxBytes: 1 << 20})
	release := busy(t, s)
	var big []store.Op
	for i := range 8 {
		big = append(big, store.Op{Key: "big" + strconv.Itoa(i), Value: make([]byte, store.MaxValue), Tag: "t"})
	}
	tooBig := later(s, big...)
	queued(t, s, 1)
	small := later(s, put("small", "v", "t"))
	queued(t, s, 2)
	release()
	if err := <-tooBig; !errors.Is(err, store.ErrFull) {
		t.Errorf("the big call: %v", err)
	}
	if err := <-small; err != nil {
		t.Errorf("the small call: %v", err)
	}
	if items := do(t, s, store.Op{Key: "small"}, store.Op{Key: "big0"}); items[0].Tag != "t" || items[1].Tag != "" {
		t.Errorf("what stands: %v", items)
	}
}

func TestCloseFinishesWhatWaits(t *testing.T) {
	path := newFile(t)
	s := open(t, path, Options{})
	release := busy(t, s)
	const rush = 6 * batchCalls // more than one commit's worth
	var waiting []<-chan error
	for i := range rush {
		waiting = append(waiting, later(s, put("k"+strconv.Itoa(i), "v", "t")))
	}
	queued(t, s, rush)
	closed := make(chan error, 1)
	go func() { closed <- s.Close() }()
	until(t, func() bool {
		s.mu.Lock()
		defer s.mu.Unlock()
		return s.closed
	})
	if err := <-later(s, put("too-late", "v", "t")); !errors.Is(err, ErrClosed) {
		t.Errorf("a call after Close: %v", err)
	}
	release()
	for i, outcome := range waiting {
		if err := <-outcome; err != nil {
			t.Fatalf("call %d that waited: %v", i, err)
		}
	}
	if err := <-closed; err != nil {
		t.Error(err)
	}
	s = open(t, path, Options{})
	for i := range rush {
		if items := do(t, s, store.Op{Key: "k" + strconv.Itoa(i)}); items[0].Tag != "t" {
			t.Fatalf("call %d that waited is lost", i)
		}
	}
}

// TestConflictsCostNoCommit: a rush for one claim is written once.
func TestConflictsCostNoCommit(t *testing.T) {
	s := open(t, newFile(t), Options{})
	do(t, s, claim(1))
	before := commits(t, s)
	for range 5 {
		if _, err := s.Do(context.Background(), room, claim(1)); !errors.Is(err, store.ErrConflict) {
			t.Fatal(err)
		}
	}
	if n := commits(t, s); n != before {
		t.Fatalf("%d commits for nothing", n-before)
	}
}
