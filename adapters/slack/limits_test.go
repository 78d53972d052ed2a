package slack

import (
	"context"
	"errors"
	"fmt"
	"strings"
	"testing"
	"time"

	"galeward/adapters/adaptertest"
	"galeward/adapters/slack/slackfake"
	"galeward/adapters/transport"
	"galeward/bot"
	"galeward/bot/reply"
)

// TestRefusedMessagesAreSplit: Slack's own count of a message is not documented
// to the letter; when it refuses one, nothing is cut.
func TestRefusedMessagesAreSplit(t *testing.T) {
	r := critical()
	for i := range 40 {
		r.Add(reply.Major, fmt.Sprintf("Caution %d: %s", i, strings.Repeat("w ", 100)))
	}
	for name, refusals := range map[string][]slackfake.Fault{
		"once":      {{Error: "msg_blocks_too_long"}},
		"twice":     {{Error: "msg_blocks_too_long"}, {Error: "invalid_blocks"}},
		"seemingly": {{Error: "msg_too_long"}, {Error: "msg_too_long"}, {Error: "msg_too_long"}, {Error: "msg_too_long"}},
	} {
		f := play(t, false, nil, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
			f.Fault("chat.postMessage", refusals...)
			post := told(e, "")
			post.Reply = r
			if _, err := way.Deliver(ctx, post); err != nil {
				t.Errorf("%s: %v", name, err)
			}
		})
		var all strings.Builder
		for _, p := range f.Posts() {
			all.WriteString(p.Text + "\n")
		}
		if strings.TrimSpace(all.String()) != escape(strings.TrimSpace(r.Text())) {
			t.Errorf("%s: %d messages show %q", name, len(f.Posts()), all.String())
		}
		if len(f.Posts()) < 2 {
			t.Errorf("%s: %d messages", name, len(f.Posts()))
		}
	}
}

// TestBareTextAtLast: when Slack takes no blocks at all, the text still goes.
func TestBareTextAtLast(t *testing.T) {
	f := play(t, false, nil, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
		f.Fault("chat.postMessage", slackfake.Fault{Error: "invalid_blocks"})
		post := told(e, "")
		post.Reply = everyday()
		if _, err := way.Deliver(ctx, post); err != nil {
			t.Error(err)
		}
	})
	posts := f.Posts()
	if len(posts) != 1 || posts[0].Text != escape(everyday().Text()) || len(posts[0].Blocks) > 0 || posts[0].Markdown != "false" {
		t.Errorf("%+v", posts)
	}
}

func TestPacing(t *testing.T) {
	const pace = 60 * time.Millisecond
	h := &adaptertest.Handler{}
	f, _ := connect(t, h, quiet(), func(c *Config) { c.Pace = pace })
	start := time.Now()
	for i := range 6 {
		f.Mention(slackfake.Message{Text: fmt.Sprint("question ", i)})
	}
	posts := f.Wait(6)
	if took := time.Since(start); took < 5*pace {
		t.Errorf("six messages to one channel in %s", took)
	}
	for i, p := range posts {
		if p.Shown != fmt.Sprint("question ", i) {
			t.Errorf("answer %d is %q", i, p.Shown)
		}
	}
}

// TestFull: whose question could not be taken is told, or Slack asks again.
func TestFull(t *testing.T) {
	s := &slow{release: make(chan struct{})}
	f, _ := connect(t, s, quiet(), func(c *Config) { c.ChannelQueue = 2 })
	for range 2 {
		f.Command(slackfake.Command{Text: "x"})
	}
	f.Command(slackfake.Command{Text: "one too many"})
	p := f.Wait(1)[0]
	if p.Route != "ack" || p.For != slackfake.User || p.Text != DefaultBusy {
		t.Errorf("%+v", p)
	}
	ts := f.NewTS()
	if ack := f.Mention(slackfake.Message{Text: "x", TS: ts}); ack.Status != 503 || ack.Header.Get("X-Slack-No-Retry") != "" {
		t.Errorf("%+v", ack)
	}
	close(s.release)
	f.Until("room", func() bool {
		return f.Mention(slackfake.Message{Text: "x", TS: ts, Wire: slackfake.Wire{Retry: 1}}).Status == 200
	})
	f.Until("the question that had no room", func() bool { return s.heard.Load() == 3 })
}

// TestPaceQueueFull: an answer that may not wait any longer is announced to the
// asker, who sees it alone.
func TestPaceQueueFull(t *testing.T) {
	f := play(t, false, nil, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, w bot.Way) {
		w.(*way).a.pace = transport.NewPacer(time.Hour, 1, 0)
		_, err := w.Deliver(ctx, told(e, "answer"))
		if !errors.Is(err, transport.ErrBusy) {
			t.Errorf("error: %v", err)
		}
	})
	if posts := f.Posts(); len(posts) != 1 || posts[0].For != slackfake.User || posts[0].Text != DefaultBusy {
		t.Errorf("%+v", posts)
	}
}
