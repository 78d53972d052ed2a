package slack

import (
	"fmt"
	"sync"
	"testing"
	"time"

	"galeward/adapters/adaptertest"
	"galeward/adapters/slack/slackfake"
)

// TestBurst: many at once in many channels. Each question is acknowledged in
// time (the fake counts a late one as broken contract), answered once, and in
// the order of its channel.
func TestBurst(t *testing.T) {
	const channels, each = 20, 40
	h := &adaptertest.Handler{}
	f, a := connect(t, h, quiet(), nil)
	var senders sync.WaitGroup
	for c := range channels {
		senders.Go(func() {
			for i := range each {
				m := slackfake.Message{Channel: fmt.Sprint("C", c), Text: fmt.Sprint(i)}
				if ack := f.Mention(m); ack.Status != 200 {
					t.Errorf("%+v got %+v", m, ack)
				}
			}
		})
	}
	senders.Wait()
	next := map[string]int{}
	for _, p := range f.Wait(channels * each) {
		if p.Shown != fmt.Sprint(next[p.Channel]) {
			t.Fatalf("channel %s: answer %q, want the one to %d", p.Channel, p.Shown, next[p.Channel])
		}
		next[p.Channel]++
	}
	f.Until("rest", func() bool { return a.pool.Held() == 0 })
	time.Sleep(20 * time.Millisecond)
	if n := len(f.Posts()); n != channels*each {
		t.Errorf("%d answers to %d questions", n, channels*each)
	}
}
