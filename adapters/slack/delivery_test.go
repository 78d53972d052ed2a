package slack

import (
	"context"
	"fmt"
	"strings"
	"sync"
	"testing"
	"time"

	"galeward/adapters/adaptertest"
	"galeward/adapters/slack/slackfake"
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
