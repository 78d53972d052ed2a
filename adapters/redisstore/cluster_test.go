package redisstore

import (
	"context"
	"errors"
	"net"
	"strconv"
	"strings"
	"sync"
	"testing"
	"time"

	"galeward/adapters/storetest"
	"galeward/bot/store"
)

// oneNode gives a lone node all slots and waits until it serves them.
func oneNode(t *testing.T, server *storetest.Server) {
	t.Helper()
	if r := server.Raw("CLUSTER ADDSLOTSRANGE 0 16383"); r != "+OK" {
		t.Fatal(r)
	}
	for range 500 {
		if !strings.HasPrefix(server.Raw("GET k"), "-CLUSTERDOWN") {
			return
		}
		time.Sleep(20 * time.Millisecond)
	}
	t.Fatal("the node does not serve its slots")
}

// twoNodes makes a cluster of two, of which the first has all slots.
func twoNodes(t *testing.T) (a, b *storetest.Server) {
	t.Helper()
	a, b = storetest.Redis(t, "--cluster-enabled", "yes"), storetest.Redis(t, "--cluster-enabled", "yes")
	oneNode(t, a)
	if r := a.Raw("CLUSTER MEET 127.0.0.1 " + b.Port()); r != "+OK" {
		t.Fatal(r)
	}
	for range 500 {
		if strings.Contains(b.Ask("CLUSTER INFO"), "cluster_state:ok") && strings.Contains(a.Ask("CLUSTER INFO"), "cluster_known_nodes:2") {
			return a, b
		}
		time.Sleep(20 * time.Millisecond)
	}
	t.Fatal("the two nodes do not meet")
	return nil, nil
}

// ok gives a command that has to succeed.
func ok(t *testing.T, s *storetest.Server, command string) {
	t.Helper()
	if r := s.Raw(command); r != "+OK" {
		t.Fatalf("%s: %s", command, r)
	}
}

// inUse writes and reads the house by two stores: one plain, and one that asks
// for a replica, of which there is none: its writes are stored and said to be
// on one node only.
func inUse(t *testing.T, plain, strict *Store) func(state string) {
	step := 0
	return func(state string) {
		t.Helper()
		step++
		tag := strconv.Itoa(step)
		must(t, plain, put("house", state, "p"+tag))
		holds(t, plain, "house", state, "p"+tag)
		items, err := strict.Do(context.Background(), room, durable("house", state, "d"+tag))
		if !errors.Is(err, store.ErrNotReplicated) || items[0].Tag != "p"+tag {
			t.Fatalf("%s: items %v, error %v", state, items, err)
		}
		holds(t, strict, "house", state, "d"+tag)
	}
}

// TestSlotMovesWhileInUse takes the channel's slot from one node to the other
// by hand, as resharding does, and keeps calling in each state of it.
func TestSlotMovesWhileInUse(t *testing.T) {
	t.Parallel() // a cluster takes seconds to form
	a, b := twoNodes(t)
	slot := strings.TrimPrefix(a.Raw("CLUSTER KEYSLOT {"+room+"}"), ":")
	aID, bID := a.Ask("CLUSTER MYID"), b.Ask("CLUSTER MYID")
	o := on(a)
	o.Cluster = true
	plain := open(t, o)
	o.Replicas = 1
	use := inUse(t, plain, open(t, o))
	key := newCall("galeward:", room, []store.Op{{Key: "house"}}).keys[0]

	use("at home")
	ok(t, b, "CLUSTER SETSLOT "+slot+" IMPORTING "+aID)
	ok(t, a, "CLUSTER SETSLOT "+slot+" MIGRATING "+bID)
	use("about to go")
	ok(t, a, "MIGRATE 127.0.0.1 "+b.Port()+" "+key+" 0 1000")
	use("on the way")
	var settle sync.WaitGroup
	settle.Go(func() {
		time.Sleep(40 * time.Millisecond)
		b.Raw("CLUSTER SETSLOT " + slot + " NODE " + bID)
		a.Raw("CLUSTER SETSLOT " + slot + " NODE " + bID)
	})
	must(t, plain, claim("event/1", "mine"), store.Op{Key: "house"}) // two keys: turned away until the slot has settled
	settle.Wait()
	use("settled")
	if r := b.Raw("EXISTS " + key); r != ":1" {
		t.Fatalf("the house is not on the second node: %s", r)
	}
}

// TestLostReplyOnACluster: the client of a cluster sends a command again on
// its own account unless told not to, and would turn our claim into somebody
// else's.
func TestLostReplyOnACluster(t *testing.T) {
	t.Parallel() // a cluster takes seconds to form
	server := storetest.Redis(t, "--cluster-enabled", "yes")
	p := newProxy(t, server.Addr())
	_, port, err := net.SplitHostPort(p.addr())
	if err != nil {
		t.Fatal(err)
	}
	if r := server.Raw("CONFIG SET cluster-announce-port " + port); r != "+OK" {
		t.Fatal(r)
	}
	oneNode(t, server)
	s := open(t, Options{Addrs: []string{p.addr()}, Cluster: true})
	must(t, s, put("house", "rules", "h1"))
	before := p.scripts.Load()
	p.loseReplies.Store(1)
	if items := must(t, s, claim("event/1", "mine"), store.Op{Key: "house"}); items[0].Tag != "" || items[1].Tag != "h1" {
		t.Fatalf("what stood before: %v", items)
	}
	if n := p.scripts.Load() - before; n != 2 {
		t.Fatalf("the script went %d times to the server", n)
	}
}
