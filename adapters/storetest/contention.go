package storetest

import (
	"context"
	"errors"
	"fmt"
	"strconv"
	"sync"
	"testing"
	"time"

	"galeward/bot/store"
)

const (
	writers = 8
	rounds  = 25
)

// concurrentCounter adds one by compare-and-swap from many sides: no addition
// may be lost and none may count twice.
func concurrentCounter(t *testing.T, s store.Store) {
	together(func(w int) {
		for r := range rounds {
			if err := addOne(t, s, "n", fmt.Sprintf("w%d-%d", w, r)); err != nil {
				t.Errorf("writer %d: %v", w, err)
				return
			}
		}
	})
	if n := string(must(t, s, room, get("n"))[0].Value); n != strconv.Itoa(writers*rounds) {
		t.Fatalf("the counter says %s after %d additions", n, writers*rounds)
	}
}

// addOne tries until its own addition stands. Each try has its own tag.
func addOne(t testing.TB, s store.Store, key, tag string) error {
	items, err := do(t, s, room, get(key))
	for try := 0; ; try++ {
		if err != nil && !errors.Is(err, store.ErrConflict) {
			return err
		}
		n, _ := strconv.Atoi(string(items[0].Value))
		op := put(key, strconv.Itoa(n+1), fmt.Sprintf("%s-%d", tag, try))
		op.If = store.Tagged(items[0].Tag) // "" when absent: the same condition
		if items, err = do(t, s, room, op); err == nil {
			return nil
		}
	}
}

// oneClaimWins lets many claim the same event: one gets it, the others see
// who did.
func oneClaimWins(t *testing.T, s store.Store) {
	for event := range rounds {
		key := "event/" + strconv.Itoa(event)
		var mu sync.Mutex
		var won []string
		seen := make(map[string]bool)
		together(func(w int) {
			tag := "w" + strconv.Itoa(w)
			items, err := do(t, s, room, putIf(store.Absent(), key, "", tag))
			mu.Lock()
			defer mu.Unlock()
			switch {
			case err == nil:
				won = append(won, tag)
			case errors.Is(err, store.ErrConflict):
				seen[items[0].Tag] = true
			default:
				t.Error(err)
			}
		})
		if len(won) != 1 || len(seen) != 1 || !seen[won[0]] {
			t.Fatalf("%d won, the others saw %v", len(won), seen)
		}
	}
}

// noHalfWrites writes the same word under two keys in each call: whoever reads
// both in one call sees one word.
func noHalfWrites(t *testing.T, s store.Store) {
	together(func(w int) {
		for r := range rounds {
			word := fmt.Sprintf("%d-%d", w, r)
			if _, err := do(t, s, room, put("left", word, word), put("right", word, word)); err != nil {
				t.Error(err)
				return
			}
			items, err := do(t, s, room, get("left"), get("right"))
			if err != nil || items[0].Tag != items[1].Tag || string(items[0].Value) != items[1].Tag {
				t.Errorf("read apart: %v, error %v", items, err)
				return
			}
		}
	})
}

// rush is what a shift change looks like at its worst: a thousand readings at
// once, two calls each, every one answered within the two seconds that a
// message may take.
func rush(t *testing.T, s store.Store) {
	var all sync.WaitGroup
	for i := range 1000 {
		all.Go(func() {
			ctx, cancel := context.WithTimeout(context.Background(), 2*time.Second)
			defer cancel()
			n, channel := strconv.Itoa(i), "slack/T1/C"+strconv.Itoa(i%20)
			_, err := s.Do(ctx, channel, putIf(store.Absent(), "event/"+n, "", n), get("house"), get("thread"))
			if err == nil {
				_, err = s.Do(ctx, channel, put("thread", n, n), store.Op{Key: "event/" + n, If: store.Tagged(n)})
			}
			if err != nil {
				t.Errorf("reading %d: %v", i, err)
			}
		})
	}
	all.Wait()
}

func together(work func(w int)) {
	var all sync.WaitGroup
	for w := range writers {
		all.Go(func() { work(w) })
	}
	all.Wait()
}
