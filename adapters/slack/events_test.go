package slack

import (
	"context"
	"strings"
	"sync/atomic"
	"testing"
	"time"

	"galeward/adapters/adaptertest"
	"galeward/adapters/slack/slackfake"
	"galeward/bot"
)

// slow answers when it is released.
type slow struct {
	release chan struct{}
	heard   atomic.Int32
}

func (s *slow) Private(bot.Place) bool { return false }

func (s *slow) Handle(ctx context.Context, _ bot.Event, _ bot.Way) {
	s.heard.Add(1)
	select {
	case <-s.release:
	case <-ctx.Done():
	}
}

// hear sends one event and returns what the bot heard of it.
func hear(t *testing.T, h *adaptertest.Handler, send func(*slackfake.Fake) slackfake.Ack) (bot.Event, slackfake.Ack) {
	t.Helper()
	f, _ := connect(t, h, quiet(), nil)
	ack := send(f)
	if ack.Status != 200 || ack.Body != "" {
		t.Fatalf("acknowledged with %d %q (%v)", ack.Status, ack.Body, ack.Err)
	}
	f.Until("the event", func() bool { return len(h.Errors()) == 1 })
	return h.Events()[0], ack
}

func TestEvents(t *testing.T) {
	const gas = "7.27/72/54/32 fio2 40"
	const asked, thread, edited = "1733058000.000100", "1733050000.000001", "1733058100.000200"
	channel := func(thread string) bot.Place {
		return bot.Place{Platform: "slack", Workspace: slackfake.Team, Channel: slackfake.Channel, Thread: thread}
	}
	dm := func(thread string) bot.Place {
		return bot.Place{Platform: "slack", Workspace: slackfake.Team, Channel: slackfake.DM, Thread: thread}
	}
	type M = slackfake.Message
	id := slackfake.Channel + ":" + asked
	dmID := slackfake.DM + ":" + asked
	tests := map[string]struct {
		send func(*slackfake.Fake) slackfake.Ack
		want bot.Event
	}{
		"a mention opens its own thread": {
			func(f *slackfake.Fake) slackfake.Ack { return f.Mention(M{Text: gas, TS: asked}) },
			bot.Event{Kind: bot.Typed, Delivery: id, Where: channel(asked), Text: gas, Addressed: true}},
		"a mention in a thread stays there": {
			func(f *slackfake.Fake) slackfake.Ack { return f.Mention(M{Text: gas, TS: asked, Thread: thread}) },
			bot.Event{Kind: bot.Typed, Delivery: id, Where: channel(thread), Text: gas, Addressed: true}},
		"a mention that comes as a message": {
			func(f *slackfake.Fake) slackfake.Ack {
				return f.Say(M{Raw: "<@" + slackfake.Bot + "> " + gas, TS: asked, Channel: slackfake.Channel})
			},
			bot.Event{Kind: bot.Typed, Delivery: id, Where: channel(asked), Text: gas, Addressed: true}},
		"the name in the middle, with a label": {
			func(f *slackfake.Fake) slackfake.Ack {
				return f.Say(M{Raw: "ask <@" + slackfake.Bot + "|galeward> " + gas, TS: asked})
			},
			bot.Event{Kind: bot.Typed, Delivery: id, Where: channel(asked), Text: "ask   " + gas, Addressed: true}},
		"a message nobody addressed": {
			func(f *slackfake.Fake) slackfake.Ack { return f.Say(M{Text: gas, TS: asked}) },
			bot.Event{Kind: bot.Typed, Delivery: id, Where: channel(asked), Text: gas}},
		"a reply in a thread: the core knows whose": {
			func(f *slackfake.Fake) slackfake.Ack { return f.Say(M{Text: "venous", TS: asked, Thread: thread}) },
			bot.Event{Kind: bot.Typed, Delivery: id, Where: channel(thread), Text: "venous"}},
		"a direct message stays flat": {
			func(f *slackfake.Fake) slackfake.Ack { return f.Say(M{Text: gas, TS: asked, Channel: slackfake.DM}) },
			bot.Event{Kind: bot.Typed, Delivery: dmID, Where: dm(""), Text: gas, Addressed: true}},
		"a thread in a direct conversation": {
			func(f *slackfake.Fake) slackfake.Ack {
				return f.Say(M{Text: gas, TS: asked, Thread: thread, Channel: slackfake.DM})
			},
			bot.Event{Kind: bot.Typed, Delivery: dmID, Where: dm(thread), Text: gas, Addressed: true}},
		"an edited mention": {
			func(f *slackfake.Fake) slackfake.Ack { return f.MentionEdited(M{Text: gas, TS: asked, EditTS: edited}) },
			bot.Event{Kind: bot.Edited, Delivery: id + ":" + edited, Where: channel(asked), Text: gas, Addressed: true}},
		"an edited mention with replies, as a message": {
			func(f *slackfake.Fake) slackfake.Ack {
				return f.Edit(M{Raw: "<@" + slackfake.Bot + "> " + gas, TS: asked, Thread: asked, EditTS: edited})
			},
			bot.Event{Kind: bot.Edited, Delivery: id + ":" + edited, Where: channel(asked), Text: gas, Addressed: true}},
		"an edited direct message with replies": {
			func(f *slackfake.Fake) slackfake.Ack {
				return f.Edit(M{Text: gas, TS: asked, Thread: asked, EditTS: edited, Channel: slackfake.DM})
			},
			bot.Event{Kind: bot.Edited, Delivery: dmID + ":" + edited, Where: dm(""), Text: gas, Addressed: true}},
		"a deleted message": {
			func(f *slackfake.Fake) slackfake.Ack { return f.Delete(M{TS: asked, Thread: thread}) },
			bot.Event{Kind: bot.Deleted, Delivery: id + ":deleted", Where: channel(thread)}},
		"a deleted message with replies": {
			func(f *slackfake.Fake) slackfake.Ack {
				return f.Bury(M{TS: asked, Raw: "<@" + slackfake.Bot + "> x"})
			},
			bot.Event{Kind: bot.Deleted, Delivery: id + ":deleted", Where: channel(asked), Addressed: true}},
	}
	for name, test := range tests {
		t.Run(name, func(t *testing.T) {
			got, _ := hear(t, &adaptertest.Handler{}, test.send)
			want := test.want
			want.Message, want.User, want.Can = asked, slackfake.User, bot.CanAmend|bot.CanPrivate
			want.At = time.Unix(1733058000, 0)
			if want.Kind == bot.Edited {
				want.At = time.Unix(1733058100, 0)
			}
			if got.At != want.At || got.Delivery != want.Delivery || got.Where != want.Where || got.Text != want.Text ||
				got.Kind != want.Kind || got.Addressed != want.Addressed || got.Message != want.Message ||
				got.User != want.User || got.Can != want.Can || got.Private {
				t.Errorf("heard\n %+v, want\n %+v", got, want)
			}
		})
	}
}

func TestCommandEvent(t *testing.T) {
	for _, hidden := range []bool{false, true} {
		got, _ := hear(t, &adaptertest.Handler{Hidden: hidden}, func(f *slackfake.Fake) slackfake.Ack {
			return f.Command(slackfake.Command{Text: "ph < 7.2 & rising", Trigger: "1.2.abc"})
		})
		where := bot.Place{Platform: "slack", Workspace: slackfake.Team, Channel: slackfake.Channel}
		if got.Kind != bot.Typed || got.Delivery != "command:1.2.abc" || got.Where != where || got.User != slackfake.User ||
			got.Text != "ph < 7.2 & rising" || !got.Addressed || got.Private != hidden || got.Can != bot.CanPrivate || got.At.IsZero() {
			t.Errorf("private %v: heard %+v", hidden, got)
		}
	}
}

// TestPrivateIsAskedFirst: an answer is private when the bot can not say
// whether it may be shared.
func TestPrivateIsAskedFirst(t *testing.T) {
	h := &shaken{}
	f, _ := connect(t, h, quiet(), nil)
	f.Command(slackfake.Command{Text: "x"})
	if posts := f.Wait(1); posts[0].For != slackfake.User {
		t.Errorf("answered %+v", posts[0])
	}
}

type shaken struct{ adaptertest.Handler }

func (s *shaken) Private(bot.Place) bool { panic("no house rules") }

// TestOneMentionTwoEvents: Slack sends a mention as app_mention and, where the
// app reads the channel, as message too, in any order, and an edit likewise.
func TestOneMentionTwoEvents(t *testing.T) {
	for _, mentionFirst := range []bool{true, false} {
		h := &adaptertest.Handler{}
		f, _ := connect(t, h, quiet(), nil)
		ts, edit := f.NewTS(), f.NewTS()
		raw := "<@" + slackfake.Bot + "> "
		sends := []func(){
			func() { f.Mention(slackfake.Message{Text: "first", TS: ts}) },
			func() { f.Say(slackfake.Message{Raw: raw + "first", TS: ts}) },
			func() { f.MentionEdited(slackfake.Message{Text: "second", TS: ts, EditTS: edit}) },
			func() { f.Edit(slackfake.Message{Raw: raw + "second", TS: ts, Thread: ts, EditTS: edit}) },
		}
		if !mentionFirst {
			sends[0], sends[1], sends[2], sends[3] = sends[1], sends[0], sends[3], sends[2]
		}
		for _, send := range sends {
			send()
		}
		f.Mention(slackfake.Message{Text: "last"})
		f.Until("three answers", func() bool { return len(h.Errors()) >= 3 })
		posts := f.Wait(2)
		if len(posts) != 2 || posts[0].Shown != "second" || posts[0].Updates != 1 || posts[0].Thread != ts {
			t.Errorf("mention first %v: %+v", mentionFirst, posts)
		}
		for _, e := range h.Events() {
			if !e.Addressed {
				t.Errorf("not addressed: %+v", e)
			}
		}
	}
}

// TestCommandReplay: the signature of a replayed command is good for five
// minutes; its trigger is not.
func TestCommandReplay(t *testing.T) {
	h := &adaptertest.Handler{}
	f, _ := connect(t, h, quiet(), nil)
	for range 3 {
		f.Command(slackfake.Command{Text: "x", Trigger: "1.2.same"})
	}
	f.Command(slackfake.Command{Text: "y"})
	f.Wait(2)
	if n := len(h.Events()); n != 2 {
		t.Errorf("%d events, want 2", n)
	}
}

func TestButtonEvents(t *testing.T) {
	asking := &adaptertest.Handler{Reply: question}
	f, _ := connect(t, asking, quiet(), nil)
	ack := f.Mention(slackfake.Message{Text: "7.05/95/40"})
	post := f.Wait(1)[0]
	if ack := f.Press(post, "venous", "U0BEN"); ack.Status != 200 || ack.Body != "" {
		t.Fatalf("%+v", ack)
	}
	f.Until("the press", func() bool { return len(asking.Errors()) == 2 })
	e := asking.Events()[1]
	if e.Kind != bot.Pressed || e.Token != "token-venous" || e.User != "U0BEN" || e.Where.Thread != ack.TS ||
		e.Where.Channel != slackfake.Channel || e.Message != post.TS || e.Private || !e.Addressed {
		t.Errorf("heard %+v", e)
	}
}

// TestPrivateButtonFindsItsThread: a private answer below a question without
// replies stands outside the thread, and Slack names no thread in its press.
func TestPrivateButtonFindsItsThread(t *testing.T) {
	h := &adaptertest.Handler{Reply: question, Hidden: true}
	f, _ := connect(t, h, quiet(), nil)
	ack := f.Mention(slackfake.Message{Text: "7.05/95/40"})
	post := f.Wait(1)[0]
	if post.Thread != "" || post.For != slackfake.User || post.Route != "chat.postEphemeral" {
		t.Errorf("posted %+v", post)
	}
	f.Press(post, "venous", "")
	f.Until("the press", func() bool { return len(h.Errors()) == 2 })
	if e := h.Events()[1]; e.Where.Thread != ack.TS || !e.Private {
		t.Errorf("heard %+v", e)
	}
}

func TestPlain(t *testing.T) {
	self := func(user string) bool { return user == "U0BOT" }
	for typed, want := range map[string]string{
		"<@U0BOT> 7.28/58":                              "7.28/58",
		"<@U0BOT|galeward>7.28":                         "7.28",
		"<@U0ANNE> has a gas":                           "@U0ANNE has a gas",
		"see <https://example.org/a?b=1&amp;c=2|there>": "see there",
		"see <https://example.org/a?b=1&amp;c=2>":       "see https://example.org/a?b=1&c=2",
		"mail <mailto:a@example.org|a@example.org>":     "mail a@example.org",
		"in <#C0WARD|ward>":                             "in #ward",
		"<!here> 7.28":                                  "!here 7.28",
		"pH &lt; 7.2 &amp; PaCO2 &gt; 60":               "pH < 7.2 & PaCO2 > 60",
		"&amp;lt; stays":                                "&lt; stays",
		"broken <@U0BOT":                                "broken <@U0BOT",
		"a > b":                                         "a > b",
		"":                                              "",
		"line one\nline two":                            "line one\nline two",
	} {
		if got := plain(typed, self); got != want {
			t.Errorf("plain(%q) = %q, want %q", typed, got, want)
		}
	}
	if mentions("<@U0ANNE> <@U0BOT|x>", self) != true || mentions("<@U0ANNE> U0BOT", self) != false {
		t.Error("mentions")
	}
}

func FuzzPlain(f *testing.F) {
	for _, seed := range []string{"<@U0BOT> x", "<<>>", "<|>", "<@", "&amp;lt;", "<#|>", "\xff<\x00>"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		self := func(user string) bool { return user == "U0BOT" }
		if got := plain(text, self); len(got) > len(text)+strings.Count(text, "<") {
			t.Errorf("plain(%q) grew to %q", text, got)
		}
		mentions(text, self)
	})
}
