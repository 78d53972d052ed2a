package boltstore

import (
	"context"
	"errors"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"sync"
	"testing"
	"time"

	"go.etcd.io/bbolt"
	"go.uber.org/goleak"

	"galeward/adapters/storetest"
	"galeward/bot/store"
)

const room = "slack/T1/C1"

func TestMain(m *testing.M) {
	if path := os.Getenv(childFile); path != "" {
		childMain(path)
		return
	}
	goleak.VerifyTestMain(m)
}

// clock is a clock that a test moves.
type clock struct {
	mu sync.Mutex
	at time.Time
}

func newClock() *clock { return &clock{at: time.Date(2026, 3, 29, 0, 30, 0, 0, time.UTC)} }

func (c *clock) now() time.Time {
	c.mu.Lock()
	defer c.mu.Unlock()
	return c.at
}

func (c *clock) Advance(d time.Duration) {
	c.mu.Lock()
	defer c.mu.Unlock()
	c.at = c.at.Add(d)
}

type withClock struct {
	*Store
	*clock
}

func open(t testing.TB, path string, o Options) *Store {
	t.Helper()
	s, err := Open(path, o)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { s.Close() })
	return s
}

func newFile(t testing.TB) string { return filepath.Join(t.TempDir(), "galeward.db") }

func do(t testing.TB, s store.Store, ops ...store.Op) []store.Item {
	t.Helper()
	items, err := s.Do(context.Background(), room, ops...)
	if err != nil {
		t.Fatal(err)
	}
	return items
}

func put(key, value, tag string) store.Op {
	return store.Op{Key: key, Value: []byte(value), Tag: tag}
}

func TestContract(t *testing.T) {
	storetest.Run(t, func(t testing.TB) store.Store {
		c := newClock()
		return withClock{open(t, newFile(t), Options{Now: c.now}), c}
	})
}

func TestContractOnTheRealClock(t *testing.T) {
	storetest.Run(t, func(t testing.TB) store.Store { return open(t, newFile(t), Options{}) })
}

func TestReopenKeeps(t *testing.T) {
	path := newFile(t)
	s := open(t, path, Options{})
	do(t, s, put("house", "rules", "t1"), put("bed/9", "", "t2"))
	if err := s.Close(); err != nil {
		t.Fatal(err)
	}
	s = open(t, path, Options{})
	items := do(t, s, store.Op{Key: "house"}, store.Op{Key: "bed/9", If: store.Tagged("t2")})
	if string(items[0].Value) != "rules" || items[0].Tag != "t1" {
		t.Fatalf("after reopening: %v", items)
	}
}

func TestClosed(t *testing.T) {
	s := open(t, newFile(t), Options{})
	if err := s.Close(); err != nil {
		t.Fatal(err)
	}
	for _, op := range []store.Op{{Key: "k"}, put("k", "v", "t")} {
		if _, err := s.Do(context.Background(), room, op); !errors.Is(err, ErrClosed) {
			t.Errorf("after Close: %v", err)
		}
	}
	if _, err := s.Sweep(context.Background()); !errors.Is(err, ErrClosed) {
		t.Errorf("sweeping after Close: %v", err)
	}
	if err := s.Close(); err != nil {
		t.Errorf("a second Close: %v", err)
	}
}

func TestFileMode(t *testing.T) {
	path := newFile(t)
	open(t, path, Options{})
	info, err := os.Stat(path)
	if err != nil {
		t.Fatal(err)
	}
	if info.Mode().Perm() != 0o600 {
		t.Fatalf("the file's mode is %o", info.Mode().Perm())
	}
}

func TestExpiryAcrossReopening(t *testing.T) {
	path, c := newFile(t), newClock()
	s := open(t, path, Options{Now: c.now})
	brief := put("thread", "1", "t1")
	brief.TTL = 12 * time.Hour
	do(t, s, brief, put("house", "2", "t2"))
	s.Close()
	c.Advance(12*time.Hour - time.Millisecond)
	s = open(t, path, Options{Now: c.now})
	if items := do(t, s, store.Op{Key: "thread"}); items[0].Tag != "t1" {
		t.Fatal("gone before its end")
	}
	s.Close()
	c.Advance(time.Millisecond)
	s = open(t, path, Options{Now: c.now})
	items := do(t, s, store.Op{Key: "thread"}, store.Op{Key: "house"})
	if items[0].Tag != "" || items[0].Value != nil || items[1].Tag != "t2" {
		t.Fatalf("after the end: %v", items)
	}
}

// entries counts what is really in the file.
func entries(t *testing.T, s *Store) (items, ends int) {
	t.Helper()
	err := s.view(func(tx *bbolt.Tx) error {
		items = tx.Bucket(itemsBucket).Stats().KeyN
		ends = tx.Bucket(endsBucket).Stats().KeyN
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	return items, ends
}

func claim(i int) store.Op {
	return store.Op{Key: "event/" + strconv.Itoa(i), If: store.Absent(), Tag: "t", TTL: time.Minute}
}

func TestSweepFreesAll(t *testing.T) {
	c := newClock()
	s := open(t, newFile(t), Options{Now: c.now})
	do(t, s, put("house", "rules", "t1"))
	const n = 3 * store.MaxOps
	for i := 0; i < n; i += store.MaxOps {
		var ops []store.Op
		for j := range store.MaxOps {
			ops = append(ops, claim(i+j))
		}
		do(t, s, ops...)
	}
	if items, ends := entries(t, s); items != n+1 || ends != n {
		t.Fatalf("%d items and %d ends", items, ends)
	}
	if cleared, err := s.Sweep(context.Background()); cleared != 0 || err != nil {
		t.Fatalf("before the end: %d, %v", cleared, err)
	}
	c.Advance(time.Minute)
	if cleared, err := s.Sweep(context.Background()); cleared != n || err != nil {
		t.Fatalf("after the end: %d, %v", cleared, err)
	}
	if items, ends := entries(t, s); items != 1 || ends != 0 {
		t.Fatalf("%d items and %d ends are left", items, ends)
	}
}

// TestFileStopsGrowing is the promise behind clearing in each commit: steady
// traffic does not fill the disk.
func TestFileStopsGrowing(t *testing.T) {
	c := newClock()
	path := newFile(t)
	s := open(t, path, Options{Now: c.now})
	var size [2]int64
	for half := range size {
		for i := range 400 {
			op := claim(half*1000 + i)
			op.Value = []byte(strings.Repeat("x", 4000))
			do(t, s, op)
			c.Advance(2 * time.Second)
		}
		items, ends := entries(t, s)
		if items > 60 || ends != items {
			t.Fatalf("%d items and %d ends stand, 30 of them alive", items, ends)
		}
		info, err := os.Stat(path)
		if err != nil {
			t.Fatal(err)
		}
		size[half] = info.Size()
	}
	if size[1] > size[0] {
		t.Fatalf("the file grew from %d to %d bytes", size[0], size[1])
	}
}

func TestSweepStopsWithItsContext(t *testing.T) {
	s := open(t, newFile(t), Options{})
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := s.Sweep(ctx); !errors.Is(err, context.Canceled) {
		t.Fatal(err)
	}
}

func BenchmarkDo(b *testing.B) { storetest.Bench(b, open(b, newFile(b), Options{})) }

func BenchmarkDoTogether(b *testing.B) {
	s := open(b, newFile(b), Options{})
	var mu sync.Mutex
	n := 0
	b.SetParallelism(64)
	b.RunParallel(func(pb *testing.PB) {
		for pb.Next() {
			mu.Lock()
			n++
			op := claim(n)
			mu.Unlock()
			if _, err := s.Do(context.Background(), room, op, store.Op{Key: "house"}); err != nil {
				b.Error(err)
			}
		}
	})
}
