package slack

import (
	"context"
	"errors"
	"fmt"
	"strings"
	"sync"
	"testing"
	"time"

	"galeward/adapters/adaptertest"
	"galeward/adapters/slack/slackfake"
	"galeward/adapters/transport"
	"galeward/bot"
	"galeward/bot/reply"
)

// scripted lets a test deliver by hand from inside Handle.
type scripted struct {
	hidden bool
	do     func(ctx context.Context, e bot.Event, way bot.Way)
	done   chan struct{}
}

func (s *scripted) Private(bot.Place) bool { return s.hidden }

func (s *scripted) Handle(ctx context.Context, e bot.Event, way bot.Way) {
	s.do(ctx, e, way)
	close(s.done)
}

// play runs one event through a script and waits for its end.
func play(t *testing.T, hidden bool, change func(*Config), send func(*slackfake.Fake),
	do func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way)) *slackfake.Fake {
	t.Helper()
	var f *slackfake.Fake
	s := &scripted{hidden: hidden, done: make(chan struct{})}
	s.do = func(ctx context.Context, e bot.Event, way bot.Way) { do(ctx, f, e, way) }
	f, _ = connect(t, s, quiet(), change)
	send(f)
	select {
	case <-s.done:
	case <-time.After(15 * time.Second):
		t.Fatal("the script did not end")
	}
	return f
}

func command(f *slackfake.Fake) { f.Command(slackfake.Command{Text: "7.28/58/62/27"}) }
func mention(f *slackfake.Fake) { f.Mention(slackfake.Message{Text: "7.28/58/62/27"}) }

// told is the post that answers an event.
func told(e bot.Event, text string) bot.Post {
	return bot.Post{Key: e.Delivery, To: e.Where, Reply: adaptertest.Echo(text)}
}

func TestCommandIsAnsweredThroughItsAddress(t *testing.T) {
	for _, hidden := range []bool{true, false} {
		h := &adaptertest.Handler{Hidden: hidden}
		f, _ := connect(t, h, quiet(), nil)
		command(f)
		p := f.Wait(1)[0]
		want := ""
		if hidden {
			want = slackfake.User
		}
		if p.Route != "response_url" || p.For != want || p.Shown != "7.28/58/62/27" || p.Replaces ||
			p.Unfurl != "false" || p.Parse != "none" {
			t.Errorf("private %v: %+v", hidden, p)
		}
		if n := f.Calls("chat.postMessage") + f.Calls("chat.postEphemeral"); n != 0 {
			t.Errorf("%d calls of the Web API", n)
		}
	}
}

// TestAddressTakesFiveMessages: the sixth goes another way, and the fake would
// count a sixth use as broken contract.
func TestAddressTakesFiveMessages(t *testing.T) {
	f := play(t, true, nil, command, func(ctx context.Context, _ *slackfake.Fake, e bot.Event, way bot.Way) {
		for i := range 7 {
			post := told(e, fmt.Sprint("message ", i))
			post.For = e.User
			if _, err := way.Deliver(ctx, post); err != nil {
				t.Errorf("message %d: %v", i, err)
			}
		}
	})
	posts := f.Posts()
	for i, p := range posts {
		want := "response_url"
		if i >= 5 {
			want = "chat.postEphemeral"
		}
		if p.Route != want || p.For != slackfake.User || p.Shown != fmt.Sprint("message ", i) {
			t.Errorf("message %d: %+v", i, p)
		}
	}
	if len(posts) != 7 {
		t.Errorf("%d messages, want 7", len(posts))
	}
}

// TestAddressTooOld: ours knows its age; should Slack think it older, it says
// so and the answer goes another way.
func TestAddressTooOld(t *testing.T) {
	f := play(t, false, nil, command, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
		f.Advance(31 * time.Minute)
		for range 2 {
			if _, err := way.Deliver(ctx, told(e, "late")); err != nil {
				t.Error(err)
			}
		}
	})
	if posts := f.Posts(); len(posts) != 2 || posts[0].Route != "chat.postMessage" || posts[0].For != "" {
		t.Errorf("%+v", posts)
	}
	if v := f.TakeViolations(); len(v) != 1 {
		t.Errorf("a dead address was used %d times, want once: %q", len(v), v)
	}
}

func TestAddressAgesHere(t *testing.T) {
	now := time.Unix(1733058000, 0)
	h := &hook{left: hookUses, until: now.Add(hookAge - time.Minute)}
	if !h.take(now.Add(28*time.Minute)) || h.take(now.Add(29*time.Minute+time.Second)) {
		t.Error("the address is not given up a minute before Slack does")
	}
}

// TestForeignAddress: an answer goes to nobody but Slack.
func TestForeignAddress(t *testing.T) {
	for _, url := range []string{"https://example.org/commands/1", "http://hooks.slack.com/x", "https://hooks.slack.com.example.org/x",
		"https://u@hooks.slack.com/x", "https://hooks.slack.com:444/x", "http://127.0.0.1:1/x", "::"} {
		h := &adaptertest.Handler{}
		f, _ := connect(t, h, quiet(), nil)
		f.Command(slackfake.Command{Text: "x", Hook: url})
		if p := f.Wait(1)[0]; p.Route != "chat.postMessage" {
			t.Errorf("%s: %+v", url, p)
		}
	}
	c := Config{APIURL: "https://slack.com/api/"}
	if !c.mayAnswerTo("https://hooks.slack.com/commands/T1/2/3") || c.mayAnswerTo("https://slack.com/x") {
		t.Error("the real address")
	}
}

// TestFaultsOnTheWay: each fault once, then Slack works again. One message
// arrives in each case, and not a second one.
func TestFaultsOnTheWay(t *testing.T) {
	type F = slackfake.Fault
	faults := map[string]F{
		"told to wait":                   {Status: 429, RetryAfter: "1"},
		"told to wait, no time":          {Status: 429},
		"told to wait, half a second":    {Status: 429, RetryAfter: "0.5"},
		"server error":                   {Status: 503},
		"server error, after all posted": {Status: 500, Accept: true},
		"connection cut":                 {Cut: true},
		"connection cut, after posting":  {Cut: true, Accept: true},
		"silence":                        {Hang: true},
		"silence, after posting":         {Hang: true, Accept: true},
		"slow":                           {Delay: 50 * time.Millisecond},
		"internal error":                 {Error: "internal_error"},
		"held back":                      {Error: "ratelimited"},
	}
	quick := func(c *Config) { c.Timeout = 300 * time.Millisecond }
	for name, fault := range faults {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			f := play(t, false, quick, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
				f.Fault("chat.postMessage", fault)
				made, err := way.Deliver(ctx, told(e, "answer"))
				if err != nil {
					t.Error(err)
				}
				if posts := f.Posts(); len(posts) != 1 || made != ref(slackfake.Channel, posts[0].TS) {
					t.Errorf("made %q, posts %+v", made, posts)
				}
			})
			if fault.RetryAfter == "1" && f.Calls("chat.postMessage") != 2 {
				t.Errorf("%d calls", f.Calls("chat.postMessage"))
			}
		})
		t.Run("private, "+name, func(t *testing.T) {
			t.Parallel()
			play(t, true, quick, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
				f.Fault("chat.postEphemeral", fault)
				post := told(e, "answer")
				post.For = e.User
				if _, err := way.Deliver(ctx, post); err != nil || len(f.Posts()) < 1 {
					t.Errorf("%v, posts %+v", err, f.Posts())
				}
			})
		})
		if fault.Error == "" {
			t.Run("by address, "+name, func(t *testing.T) {
				t.Parallel()
				play(t, true, quick, command, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
					f.Fault("response_url", fault)
					if _, err := way.Deliver(ctx, told(e, "answer")); err != nil || len(f.Posts()) < 1 {
						t.Errorf("%v, posts %+v", err, f.Posts())
					}
				})
			})
		}
	}
}

// TestWaitsAsLongAsAsked: Retry-After is a promise about the time before which
// another call is pointless, on every way.
func TestWaitsAsLongAsAsked(t *testing.T) {
	for route, send := range map[string]func(*slackfake.Fake){"chat.postMessage": mention, "chat.postEphemeral": mention, "response_url": command} {
		t.Run(route, func(t *testing.T) {
			t.Parallel()
			play(t, false, nil, send, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
				f.Fault(route, slackfake.Fault{Status: 429, RetryAfter: "1"})
				post := told(e, "answer")
				if route == "chat.postEphemeral" {
					post.For = e.User
				}
				start := time.Now()
				_, err := way.Deliver(ctx, post)
				if took := time.Since(start); err != nil || took < time.Second || took > 5*time.Second {
					t.Errorf("%v after %s", err, took)
				}
			})
		})
	}
}

// TestOutage: calls stay few, and the error names no address, token or text.
func TestOutage(t *testing.T) {
	f := play(t, false, nil, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
		for range 100 {
			f.Fault("chat.postMessage", slackfake.Fault{Status: 503})
		}
		_, err := way.Deliver(ctx, told(e, "bed-seven"))
		if err == nil || err.Error() != "slack chat.postMessage: status 503" {
			t.Errorf("error: %v", err)
		}
		for range 5 {
			f.Fault("chat.postEphemeral", slackfake.Fault{Cut: true})
		}
		post := told(e, "bed-seven")
		post.For = e.User
		_, err = way.Deliver(ctx, post)
		host := strings.TrimSuffix(f.APIURL(), "api/")
		if want := "slack chat.postEphemeral: call to " + host + "...: connection lost"; err == nil || err.Error() != want {
			t.Errorf("error: %v, want %s", err, want)
		}
	})
	if n := f.Calls("chat.postMessage"); n != 4 {
		t.Errorf("%d calls, the settings say 4", n)
	}
}

// TestNobodyWaits: a scheduled post is rather missed than doubled.
func TestNobodyWaits(t *testing.T) {
	place := bot.Place{Platform: platform, Workspace: slackfake.Team, Channel: slackfake.Channel}
	post := bot.Post{Key: "slot 07:00", To: place, Reply: adaptertest.Echo("beds")}
	ctx := context.Background()

	f, a := connect(t, &adaptertest.Handler{}, quiet(), nil)
	f.Fault("chat.postMessage", slackfake.Fault{Cut: true, Accept: true})
	f.Fault("conversations.history", slackfake.Fault{Error: "missing_scope"})
	if _, err := a.Way().Deliver(ctx, post); !errors.Is(err, errUnsure) {
		t.Errorf("error: %v", err)
	}
	if n := len(f.Posts()); n != 1 {
		t.Errorf("%d posts", n)
	}
	made, found, err := a.Way().(bot.Finder).Find(ctx, place, post.Key)
	if err != nil || !found || made != ref(place.Channel, f.Posts()[0].TS) {
		t.Errorf("Find: %q %v %v", made, found, err)
	}
	if _, found, err := a.Way().(bot.Finder).Find(ctx, place, "slot 19:00"); found || err != nil {
		t.Errorf("Find of another: %v %v", found, err)
	}
	f.Fault("conversations.history", slackfake.Fault{Error: "missing_scope"})
	if _, _, err := a.Way().(bot.Finder).Find(ctx, place, post.Key); err == nil {
		t.Error("a look-up that was refused says that there is nothing")
	}
}

func TestAmending(t *testing.T) {
	f := play(t, false, nil, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
		made, err := way.Deliver(ctx, told(e, "first"))
		if err != nil {
			t.Fatal(err)
		}
		post := told(e, "second")
		post.Amends = made
		again, err := way.Deliver(ctx, post)
		if err != nil || again != made {
			t.Errorf("amended %q as %q: %v", made, again, err)
		}
		for _, lost := range []bot.Ref{ref(slackfake.Channel, "1.000001"), "no ref at all"} {
			post.Amends, post.Reply = lost, adaptertest.Echo("new")
			if again, err = way.Deliver(ctx, post); err != nil || again == made || again == "" {
				t.Errorf("amending %q made %q: %v", lost, again, err)
			}
		}
	})
	posts := f.Posts()
	if len(posts) != 3 || posts[0].Shown != "second" || posts[0].Updates != 1 || posts[2].Shown != "new" {
		t.Errorf("%+v", posts)
	}
}

func TestPrivateAnswers(t *testing.T) {
	private := func(ctx context.Context, t *testing.T, e bot.Event, way bot.Way) {
		post := told(e, "for one")
		post.For = e.User
		if made, err := way.Deliver(ctx, post); err != nil || e.Where.Channel != slackfake.DM && made != "" && !strings.HasPrefix(string(made), e.User) {
			t.Errorf("made %q: %v", made, err)
		}
	}
	t.Run("below a question without replies", func(t *testing.T) {
		f := play(t, true, nil, mention, func(ctx context.Context, _ *slackfake.Fake, e bot.Event, way bot.Way) { private(ctx, t, e, way) })
		if p := f.Posts()[0]; p.Route != "chat.postEphemeral" || p.For != slackfake.User || p.Thread != "" {
			t.Errorf("%+v", p)
		}
	})
	t.Run("in a thread", func(t *testing.T) {
		f := play(t, true, nil, func(f *slackfake.Fake) { f.Mention(slackfake.Message{Text: "x", Thread: "1.000009"}) },
			func(ctx context.Context, _ *slackfake.Fake, e bot.Event, way bot.Way) { private(ctx, t, e, way) })
		if p := f.Posts()[0]; p.For != slackfake.User || p.Thread != "1.000009" {
			t.Errorf("%+v", p)
		}
	})
	t.Run("in a direct conversation, which is private already", func(t *testing.T) {
		f := play(t, true, nil, func(f *slackfake.Fake) { f.Say(slackfake.Message{Channel: slackfake.DM, Text: "x"}) },
			func(ctx context.Context, _ *slackfake.Fake, e bot.Event, way bot.Way) { private(ctx, t, e, way) })
		if p := f.Posts()[0]; p.Route != "chat.postMessage" || p.Channel != slackfake.DM {
			t.Errorf("%+v", p)
		}
	})
	t.Run("where the bot is no member", func(t *testing.T) {
		f := play(t, true, nil, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
			f.Fault("chat.postEphemeral", slackfake.Fault{Error: "not_in_channel"})
			private(ctx, t, e, way)
		})
		if p := f.Posts()[0]; p.Route != "chat.postMessage" || p.Channel != slackfake.User || p.Thread != "" {
			t.Errorf("a private answer went to %+v", p)
		}
	})
}

// TestSharedWhereTheBotIsNoMember: the asker at least gets the answer.
func TestSharedWhereTheBotIsNoMember(t *testing.T) {
	f := play(t, false, nil, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
		f.Fault("chat.postMessage", slackfake.Fault{Error: "not_in_channel"})
		if _, err := way.Deliver(ctx, told(e, "answer")); err != nil {
			t.Error(err)
		}
	})
	if p := f.Posts()[0]; p.Channel != slackfake.User {
		t.Errorf("%+v", p)
	}
}

// TestButtonAnswers: a public answer is a message that can be amended, a private
// one replaces the private question.
func TestButtonAnswers(t *testing.T) {
	for _, hidden := range []bool{false, true} {
		h := &adaptertest.Handler{Hidden: hidden}
		h.Reply = func(e bot.Event) reply.Reply {
			if e.Kind == bot.Pressed {
				return adaptertest.Echo("it was " + e.Token)
			}
			return critical()
		}
		f, _ := connect(t, h, quiet(), nil)
		command(f)
		f.Press(f.Wait(1)[0], "venous", "")
		posts := f.Wait(2)
		p := posts[1]
		if p.Shown != "it was token-venous" || (p.For != "") != hidden || (p.Route == "response_url") != hidden {
			t.Errorf("private %v: %+v", hidden, p)
		}
	}
}

// TestReplacingAPrivateQuestion: only the button's address reaches it.
func TestReplacingAPrivateQuestion(t *testing.T) {
	var f *slackfake.Fake
	s := &adaptive{}
	f, _ = connect(t, s, quiet(), nil)
	command(f)
	asked := f.Wait(1)[0]
	f.Press(asked, "venous", "")
	f.Until("the press", func() bool { return s.handled() == 2 })
	if posts := f.Posts(); len(posts) != 1 || posts[0].Shown != "answered" || posts[0].Updates != 1 || posts[0].For != slackfake.User {
		t.Errorf("%+v", posts)
	}
}

// adaptive asks in private and replaces the question by the answer.
type adaptive struct {
	mu sync.Mutex
	n  int
}

func (a *adaptive) Private(bot.Place) bool { return true }

func (a *adaptive) Handle(ctx context.Context, e bot.Event, way bot.Way) {
	post := bot.Post{Key: e.Delivery, To: e.Where, For: e.User, Reply: critical()}
	if e.Kind == bot.Pressed {
		post.Amends, post.Reply = ref(e.Where.Channel, e.Message), adaptertest.Echo("answered")
	}
	_, _ = way.Deliver(ctx, post)
	a.mu.Lock()
	defer a.mu.Unlock()
	a.n++
}

func (a *adaptive) handled() int {
	a.mu.Lock()
	defer a.mu.Unlock()
	return a.n
}

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

func TestNothingToSay(t *testing.T) {
	f := play(t, false, nil, mention, func(ctx context.Context, _ *slackfake.Fake, e bot.Event, way bot.Way) {
		if made, err := way.Deliver(ctx, bot.Post{To: e.Where}); made != "" || err != nil {
			t.Errorf("%q %v", made, err)
		}
	})
	if posts := f.Posts(); len(posts) != 0 {
		t.Errorf("%+v", posts)
	}
}
