package redisstore

import (
	"context"
	"errors"
	"fmt"
	"strconv"
	"sync"
	"testing"
	"time"

	"galeward/adapters/storetest"
	"galeward/bot/store"
)

// behind opens a store whose server is behind a proxy, and one that sees the
// server plainly.
func behind(t *testing.T, more ...func(*Options)) (*Store, *proxy, *Store) {
	t.Helper()
	server := storetest.Redis(t)
	plain := open(t, on(server))
	must(t, plain, put("house", "rules", "h1"), put("warm", "the script", "w")) // the script is known from here on
	p := newProxy(t, server.Addr())
	o := Options{Addrs: []string{p.addr()}}
	for _, change := range more {
		change(&o)
	}
	return open(t, o), p, plain
}

func claim(key, tag string) store.Op {
	return store.Op{Key: key, If: store.Absent(), Tag: tag, TTL: time.Minute}
}

// TestLostReplyOfAClaim: a claim that was won must not come back as somebody
// else's, which is what blind repetition makes of it.
func TestLostReplyOfAClaim(t *testing.T) {
	s, p, plain := behind(t)
	p.loseReplies.Store(1)
	items := must(t, s, claim("event/1", "mine"), store.Op{Key: "house"})
	if items[0].Tag != "" || string(items[1].Value) != "rules" {
		t.Fatalf("what stood before: %v", items)
	}
	if n := p.scripts.Load(); n != 2 {
		t.Fatalf("the script went %d times to the server", n)
	}
	holds(t, plain, "event/1", "", "mine")
	if _, err := s.Do(context.Background(), room, claim("event/1", "other")); !errors.Is(err, store.ErrConflict) {
		t.Fatalf("the claim can be won twice: %v", err)
	}
}

func TestLostReplyOfAnEdit(t *testing.T) {
	s, p, plain := behind(t)
	p.loseReplies.Store(1)
	edit := put("house", "new rules", "h2")
	edit.If = store.Tagged("h1")
	items := must(t, s, edit, store.Op{Key: "warm", If: store.Tagged("w"), Delete: true})
	if items[0].Tag != "h1" || items[1].Tag != "w" {
		t.Fatalf("what stood before: %v", items)
	}
	holds(t, plain, "house", "new rules", "h2")
	holds(t, plain, "warm", "", "")
}

func TestLostReplyOfAWriteWithoutACondition(t *testing.T) {
	s, p, plain := behind(t)
	p.loseReplies.Store(1)
	items, err := s.Do(context.Background(), room, put("house", "new rules", "h2"), store.Op{Key: "warm"})
	if !errors.Is(err, store.ErrUnseen) || len(items) != 2 || items[0].Tag != "" || items[1].Tag != "w" {
		t.Fatalf("items %v, error %v", items, err)
	}
	holds(t, plain, "house", "new rules", "h2")
}

// TestLostReplyOfADeletion: a deletion leaves no tag, so its fate is said to
// be unknown, and it is not done again on what came after it.
func TestLostReplyOfADeletion(t *testing.T) {
	s, p, plain := behind(t)
	p.loseReplies.Store(1)
	items, err := s.Do(context.Background(), room, store.Op{Key: "house", Delete: true})
	if !errors.Is(err, ErrNoAnswer) || items != nil {
		t.Fatalf("items %v, error %v", items, err)
	}
	if n := p.scripts.Load(); n != 1 {
		t.Fatalf("the script went %d times to the server", n)
	}
	holds(t, plain, "house", "", "")
}

func TestLostReplyOfARead(t *testing.T) {
	s, p, _ := behind(t)
	p.loseReplies.Store(1)
	holds(t, s, "house", "rules", "h1")
}

func TestLostReplyOfAConflict(t *testing.T) {
	s, p, plain := behind(t)
	p.loseReplies.Store(1)
	items, err := s.Do(context.Background(), room, claim("house", "h2"))
	if !errors.Is(err, store.ErrConflict) || items[0].Tag != "h1" {
		t.Fatalf("items %v, error %v", items, err)
	}
	holds(t, plain, "house", "rules", "h1")
}

func TestLostRequest(t *testing.T) {
	s, p, plain := behind(t)
	p.loseRequests.Store(1)
	edit := put("house", "new rules", "h2")
	edit.If = store.Tagged("h1")
	if items := must(t, s, edit, claim("event/1", "mine")); string(items[0].Value) != "rules" || items[1].Tag != "" {
		t.Fatalf("what stood before: %v", items)
	}
	holds(t, plain, "house", "new rules", "h2")
	holds(t, plain, "event/1", "", "mine")
}

// TestTwiceLost: one more try and no other. The error says nothing about the
// write, and the tag does.
func TestTwiceLost(t *testing.T) {
	s, p, plain := behind(t)
	p.loseReplies.Store(2)
	items, err := s.Do(context.Background(), room, claim("event/1", "mine"))
	if !errors.Is(err, ErrNoAnswer) || items != nil {
		t.Fatalf("items %v, error %v", items, err)
	}
	if n := p.scripts.Load(); n != 2 {
		t.Fatalf("the script went %d times to the server", n)
	}
	holds(t, plain, "event/1", "", "mine")
}

// TestDurableWriteLosesItsReply has a replica configured that does not exist:
// found by its tag, the write is stored and not replicated.
func TestDurableWriteLosesItsReply(t *testing.T) {
	s, p, plain := behind(t, func(o *Options) { o.Replicas = 1 })
	p.loseReplies.Store(1)
	op := claim("rule", "mine")
	op.Durable = true
	items, err := s.Do(context.Background(), room, op)
	if !errors.Is(err, store.ErrNotReplicated) || items[0].Tag != "" {
		t.Fatalf("items %v, error %v", items, err)
	}
	holds(t, plain, "rule", "", "mine")
}

func TestSlowServerKeepsTheDeadline(t *testing.T) {
	s, p, plain := behind(t, func(o *Options) { o.Timeout = 3 * time.Second })
	p.delay.Store(int64(time.Second))
	ctx, cancel := context.WithTimeout(context.Background(), 150*time.Millisecond)
	defer cancel()
	within(t, 500*time.Millisecond, func() {
		if _, err := s.Do(ctx, room, claim("event/1", "mine")); !errors.Is(err, ErrNoAnswer) {
			t.Errorf("error %v", err)
		}
	})
	holds(t, plain, "house", "rules", "h1")
}

// TestLinesThatBreakAllTheTime adds up over a line that loses every third
// reply and some requests: nothing is lost and nothing counts twice.
func TestLinesThatBreakAllTheTime(t *testing.T) {
	s, p, plain := behind(t)
	stop := make(chan struct{})
	var breaker sync.WaitGroup
	breaker.Go(func() {
		for i := 0; ; i++ {
			select {
			case <-stop:
				return
			case <-time.After(2 * time.Millisecond):
				if i%3 == 0 {
					p.loseRequests.Store(1)
				} else {
					p.loseReplies.Store(1)
				}
			}
		}
	})
	const additions = 200
	for i := range additions {
		surely(t, s, "n", "t"+strconv.Itoa(i), i)
	}
	close(stop)
	breaker.Wait()
	p.loseReplies.Store(0)
	holds(t, plain, "n", strconv.Itoa(additions), fmt.Sprintf("t%d", additions-1))
}

// surely writes n+1 under the condition of the tag before it, and after a
// fault reads the tag to learn what happened, as a caller would.
func surely(t *testing.T, s *Store, key, tag string, n int) {
	t.Helper()
	op := put(key, strconv.Itoa(n+1), tag)
	op.If = store.Absent()
	if n > 0 {
		op.If = store.Tagged("t" + strconv.Itoa(n-1))
	}
	for range 50 {
		items, err := s.Do(context.Background(), room, op)
		if err == nil {
			return
		}
		if errors.Is(err, store.ErrConflict) && items[0].Tag != tag { // its own tag: an earlier turn wrote it
			t.Fatalf("addition %d is called somebody else's", n)
		}
		items, err = s.Do(context.Background(), room, store.Op{Key: key})
		if err == nil && items[0].Tag == tag {
			return
		}
	}
	t.Fatalf("addition %d never went through", n)
}
