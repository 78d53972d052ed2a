package redisstore

import (
	"context"
	"errors"
	"fmt"
	"strconv"
	"strings"
	"sync"
	"sync/atomic"
	"testing"
	"time"

	"github.com/redis/go-redis/v9"
	"go.uber.org/goleak"

	"galeward/adapters/storetest"
	"galeward/bot/store"
)

const room = "slack/T1/C1"

func TestMain(m *testing.M) { goleak.VerifyTestMain(m) }

// on makes the settings for a server; a test changes what it is about.
func on(server *storetest.Server) Options { return Options{Addrs: []string{server.Addr()}} }

func open(t testing.TB, o Options) *Store {
	t.Helper()
	s, err := Open(o)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { s.Close() })
	return s
}

func put(key, value, tag string) store.Op {
	return store.Op{Key: key, Value: []byte(value), Tag: tag}
}

func must(t testing.TB, s *Store, ops ...store.Op) []store.Item {
	t.Helper()
	items, err := s.Do(context.Background(), room, ops...)
	if err != nil {
		t.Fatal(err)
	}
	return items
}

func holds(t testing.TB, s *Store, key, value, tag string) {
	t.Helper()
	item := must(t, s, store.Op{Key: key})[0]
	if string(item.Value) != value || item.Tag != tag {
		t.Fatalf("%s holds %q with tag %q, want %q with tag %q", key, item.Value, item.Tag, value, tag)
	}
}

// within fails when a call took longer; the slack is for a busy machine.
func within(t testing.TB, limit time.Duration, call func()) {
	t.Helper()
	began := time.Now()
	call()
	if d := time.Since(began); d > limit {
		t.Fatalf("it took %v, more than %v", d, limit)
	}
}

// recovers waits until a store that had a fault answers again.
func recovers(t testing.TB, s *Store) {
	t.Helper()
	deadline := time.Now().Add(5 * time.Second)
	for {
		_, err := s.Do(context.Background(), room, store.Op{Key: "house"})
		if err == nil {
			return
		}
		if time.Now().After(deadline) {
			t.Fatalf("no recovery: %v", err)
		}
		time.Sleep(20 * time.Millisecond)
	}
}

// apart opens stores that share a server but no key.
func apart(o Options) storetest.Open {
	var n atomic.Int64
	return func(t testing.TB) store.Store {
		o := o
		o.Prefix = fmt.Sprintf("galeward:%d:", n.Add(1))
		return open(t, o)
	}
}

func TestContract(t *testing.T) {
	storetest.Run(t, apart(on(storetest.Redis(t))))
}

func TestContractOnACluster(t *testing.T) {
	t.Parallel() // a cluster takes seconds to form
	server := storetest.Redis(t, "--cluster-enabled", "yes")
	oneNode(t, server)
	o := on(server)
	o.Cluster = true
	storetest.Run(t, apart(o))
}

func TestScriptIsGivenAgainWhenTheServerLostIt(t *testing.T) {
	server := storetest.Redis(t)
	s := open(t, on(server))
	must(t, s, put("house", "1", "t1"))
	if r := server.Raw("SCRIPT FLUSH"); r != "+OK" {
		t.Fatal(r)
	}
	must(t, s, put("house", "2", "t2"))
	holds(t, s, "house", "2", "t2")
}

func TestKeysOfAPartitionShareAHashTag(t *testing.T) {
	for partition, want := range map[string]string{
		"slack/T1/C1": "galeward:{slack/T1/C1}:house",
		"a}b{c%":      "galeward:{a%7Db%7Bc%25}:house",
		"}":           "galeward:{%7D}:house",
	} {
		if got := newCall("galeward:", partition, []store.Op{{Key: "house"}}).keys[0]; got != want {
			t.Errorf("%q gives %q, want %q", partition, got, want)
		}
	}
}

// TestTwoClientsContend is the suite's counter with two stores: what one
// process learnt, another has changed.
func TestTwoClientsContend(t *testing.T) {
	server := storetest.Redis(t)
	const additions = 150
	var both sync.WaitGroup
	for c := range 2 {
		s := open(t, on(server))
		both.Go(func() {
			for i := range additions {
				addOne(t, s, fmt.Sprintf("%d-%d", c, i))
			}
		})
	}
	both.Wait()
	item := must(t, open(t, on(server)), store.Op{Key: "n"})[0]
	if string(item.Value) != strconv.Itoa(2*additions) {
		t.Fatalf("the counter says %s after %d additions", item.Value, 2*additions)
	}
}

func addOne(t *testing.T, s *Store, tag string) {
	items, err := s.Do(context.Background(), room, store.Op{Key: "n"})
	for try := 0; ; try++ {
		if err != nil && !errors.Is(err, store.ErrConflict) {
			t.Error(err)
			return
		}
		n, _ := strconv.Atoi(string(items[0].Value))
		op := put("n", strconv.Itoa(n+1), tag+"-"+strconv.Itoa(try))
		op.If = store.Tagged(items[0].Tag)
		if items, err = s.Do(context.Background(), room, op); err == nil {
			return
		}
	}
}

func TestForeignValuesAreNotMisread(t *testing.T) {
	server := storetest.Redis(t)
	s := open(t, on(server))
	key := newCall("galeward:", room, []store.Op{{Key: "k"}}).keys[0]
	for _, command := range []string{"SET " + key + " 72", "LPUSH " + key + " 72"} {
		server.Raw("DEL " + key)
		server.Raw(command)
		for _, op := range []store.Op{{Key: "k"}, put("k", "v", "t"), {Key: "k", Delete: true}} {
			items, err := s.Do(context.Background(), room, put("beside", "v", "t"), op)
			if !errors.Is(err, errForeign) || items != nil {
				t.Errorf("after %s: items %v, error %v", command, items, err)
			}
		}
	}
	holds(t, s, "beside", "", "")
}

func TestOptionsThatDoNotFit(t *testing.T) {
	missing := t.TempDir() + "/none"
	for says, o := range map[string]Options{
		"no address":            {},
		"no sentinels":          {Addrs: []string{"a:1"}, Cluster: true, Master: "m"},
		"only database 0":       {Addrs: []string{"a:1"}, Cluster: true, DB: 1},
		"several addresses":     {Addrs: []string{"a:1", "b:1"}},
		"no braces":             {Addrs: []string{"a:1"}, Prefix: "x{y}"},
		"negative":              {Addrs: []string{"a:1"}, Replicas: -1},
		"set twice":             {Addrs: []string{"a:1"}, Password: "hush", PasswordFile: missing},
		"file of the password":  {Addrs: []string{"a:1"}, PasswordFile: missing},
		"file of the sentinel ": {Addrs: []string{"a:1"}, SentinelPasswordFile: missing},
	} {
		_, err := Open(o)
		if err == nil || !strings.Contains(err.Error(), says) || strings.Contains(err.Error(), "hush") {
			t.Errorf("want an error with %q, got %v", says, err)
		}
	}
}

func BenchmarkDo(b *testing.B) { storetest.Bench(b, open(b, on(storetest.Redis(b)))) }

// BenchmarkGet is the bare round trip to hold BenchmarkDo against.
func BenchmarkGet(b *testing.B) {
	client := redis.NewClient(&redis.Options{Addr: storetest.Redis(b).Addr()})
	b.Cleanup(func() { client.Close() })
	if err := client.Set(context.Background(), "k", make([]byte, 1500), 0).Err(); err != nil {
		b.Fatal(err)
	}
	for b.Loop() {
		if err := client.Get(context.Background(), "k").Err(); err != nil {
			b.Fatal(err)
		}
	}
}
