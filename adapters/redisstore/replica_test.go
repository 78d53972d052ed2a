package redisstore

import (
	"context"
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"galeward/adapters/storetest"
	"galeward/bot/store"
)

// replicaOf starts a server that copies another, and waits until it does.
func replicaOf(t *testing.T, primary *storetest.Server) *storetest.Server {
	t.Helper()
	replica := storetest.Redis(t, "--replicaof", "127.0.0.1 "+primary.Port())
	for range 500 {
		if strings.Contains(primary.Ask("INFO replication"), "state=online") {
			return replica
		}
		time.Sleep(20 * time.Millisecond)
	}
	t.Fatal("the replica does not follow")
	return nil
}

func durable(key, value, tag string) store.Op {
	op := put(key, value, tag)
	op.Durable = true
	return op
}

func TestDurableWrite(t *testing.T) {
	primary := storetest.Redis(t)
	replica := replicaOf(t, primary)
	o := on(primary)
	o.Replicas = 1
	s := open(t, o)
	eventually(t, s, durable("house", "rules", "t1"))
	copied := open(t, on(replica))
	holds(t, copied, "house", "rules", "t1") // it stood there before Do returned

	if r := primary.Raw("SCRIPT FLUSH"); r != "+OK" {
		t.Fatal(r)
	}
	must(t, s, durable("house", "new rules", "t2"))
	holds(t, copied, "house", "new rules", "t2")

	op := durable("house", "x", "t3")
	op.If = store.Absent()
	if _, err := s.Do(context.Background(), room, op); !errors.Is(err, store.ErrConflict) {
		t.Fatalf("a refused durable write: %v", err)
	}
	replica.Stop()
	items, err := s.Do(context.Background(), room, durable("house", "third", "t4"), store.Op{Key: "none"})
	if !errors.Is(err, store.ErrNotReplicated) || len(items) != 2 || items[0].Tag != "t2" {
		t.Fatalf("with a hanging replica: items %v, error %v", items, err)
	}
	must(t, s, put("bed", "9", "t5")) // what is not durable does not wait
	holds(t, s, "house", "third", "t4")
	replica.Cont()
	eventually(t, s, store.Op{Key: "house", Delete: true, Durable: true})
	holds(t, copied, "house", "", "")
}

// eventually gives a call until it is replicated.
func eventually(t *testing.T, s *Store, ops ...store.Op) {
	t.Helper()
	var err error
	for range 200 {
		if _, err = s.Do(context.Background(), room, ops...); err == nil {
			return
		}
		time.Sleep(20 * time.Millisecond)
	}
	t.Fatal(err)
}

func TestNoReplicaIsNoFaultWhereNoneIsConfigured(t *testing.T) {
	s := open(t, on(storetest.Redis(t)))
	must(t, s, durable("house", "rules", "t1"))
}

func TestReplicaTakesNoWrites(t *testing.T) {
	primary := storetest.Redis(t)
	s := open(t, on(replicaOf(t, primary)))
	must(t, open(t, on(primary)), put("house", "rules", "t1"))
	items, err := s.Do(context.Background(), room, put("house", "x", "x"))
	if !errors.Is(err, ErrReadOnly) || items != nil {
		t.Fatalf("items %v, error %v", items, err)
	}
}

// TestSentinelFailover kills the server that the sentinel names and waits for
// the replica to take over. What stood there stands.
func TestSentinelFailover(t *testing.T) {
	primary := storetest.Redis(t)
	replica := replicaOf(t, primary)
	sentinel := sentinelFor(t, primary)
	s := open(t, Options{Addrs: []string{sentinel.Addr()}, Master: "galeward-test", Replicas: 1})
	eventually(t, s, durable("house", "rules", "t1"))
	time.Sleep(200 * time.Millisecond) // the sentinel reads who follows whom
	primary.Kill()
	deadline := time.Now().Add(20 * time.Second)
	edit := put("house", "new rules", "t2")
	edit.If = store.Tagged("t1")
	for {
		ctx, cancel := context.WithTimeout(context.Background(), 500*time.Millisecond)
		_, err := s.Do(ctx, room, edit)
		cancel()
		if err == nil {
			break
		}
		if errors.Is(err, store.ErrConflict) || time.Now().After(deadline) {
			t.Fatalf("after the failover: %v", err)
		}
		time.Sleep(50 * time.Millisecond)
	}
	holds(t, open(t, on(replica)), "house", "new rules", "t2")
}

func sentinelFor(t *testing.T, primary *storetest.Server) *storetest.Server {
	t.Helper()
	conf := filepath.Join(t.TempDir(), "sentinel.conf")
	text := "sentinel monitor galeward-test 127.0.0.1 " + primary.Port() + " 1\n" +
		"sentinel down-after-milliseconds galeward-test 300\nsentinel failover-timeout galeward-test 2000\n"
	if err := os.WriteFile(conf, []byte(text), 0o600); err != nil {
		t.Fatal(err)
	}
	sentinel := storetest.Sentinel(t, conf)
	for range 500 {
		line := sentinel.Raw("SENTINEL CKQUORUM galeward-test")
		if strings.HasPrefix(line, "+OK") && sentinel.Raw("SENTINEL REPLICAS galeward-test") == "*1" {
			return sentinel
		}
		time.Sleep(20 * time.Millisecond)
	}
	t.Fatal("the sentinel does not see the replica")
	return nil
}
