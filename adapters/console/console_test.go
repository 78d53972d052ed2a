package console_test

import (
	"bytes"
	"context"
	"errors"
	"io"
	"strings"
	"testing"
	"time"

	"galeward/adapters/console"
	"galeward/bot"
	"galeward/bot/reply"

	"go.uber.org/goleak"
)

func TestMain(m *testing.M) { goleak.VerifyTestMain(m) }

// echo answers "ECHO: text", is silent when the text begins with "psst", and
// keeps the events that it saw.
type echo struct {
	events []bot.Event
	amends bot.Ref
}

func (e *echo) Private(bot.Place) bool { return false }

func (e *echo) Handle(ctx context.Context, ev bot.Event, way bot.Way) {
	e.events = append(e.events, ev)
	if strings.HasPrefix(ev.Text, "psst") {
		return
	}
	var r reply.Reply
	r.Add(reply.Headline, "ECHO: "+ev.Text)
	_, _ = way.Deliver(ctx, bot.Post{Key: ev.Delivery, To: ev.Where, Amends: e.amends, Reply: r})
}

func session(t *testing.T, h bot.Handler, input string) string {
	t.Helper()
	var out bytes.Buffer
	c, err := console.New(console.Options{In: strings.NewReader(input), Out: &out, Session: "s1"})
	if err != nil {
		t.Fatal(err)
	}
	if err := c.Run(t.Context(), h); err != nil {
		t.Fatal(err)
	}
	return out.String()
}

func TestEachPipedLineIsAMessage(t *testing.T) {
	var h echo
	got := session(t, &h, "one\r\n\n  \ntwo\npsst\nthree")
	if want := "ECHO: one\n\nECHO: two\n\nECHO: three\n\n"; got != want {
		t.Errorf("got %q, want %q: answers alone, no prompt, no word on silence", got, want)
	}
	if len(h.events) != 4 {
		t.Fatalf("%d events, want 4: blank lines are none", len(h.events))
	}
	seen := map[string]bool{}
	for _, e := range h.events {
		if e.Where != console.Place("s1") || e.Where.Thread != "s1" || e.Addressed || !e.Listening || e.Kind != bot.Typed || e.At.IsZero() {
			t.Errorf("event %+v: one session is one thread, and plain lines are listened to, not addressed", e)
		}
		if seen[e.Delivery] || e.Delivery == "" || e.Message != e.Delivery {
			t.Errorf("delivery %q, message %q: each line has an id of its own", e.Delivery, e.Message)
		}
		seen[e.Delivery] = true
	}
}

func TestLeaving(t *testing.T) {
	for _, word := range []string{"quit", "exit", " QUIT "} {
		var h echo
		if got := session(t, &h, "one\n"+word+"\ntwo\n"); strings.Contains(got, "two") || len(h.events) != 1 {
			t.Errorf("%q does not end the session: %q", word, got)
		}
	}
}

func TestAmendedPostSaysSo(t *testing.T) {
	h := echo{amends: "earlier"}
	if got := session(t, &h, "one\n"); !strings.HasPrefix(got, "Amended:\nECHO: one") {
		t.Errorf("got %q", got)
	}
}

func TestChartIsToldInWords(t *testing.T) {
	got := session(t, handler(func(ctx context.Context, e bot.Event, way bot.Way) {
		_, _ = way.Deliver(ctx, bot.Post{Reply: reply.Reply{Charts: []reply.Chart{{Alt: "PaCO2 rose"}}}})
	}), "trend\n")
	if got != "PaCO2 rose\n\n" {
		t.Errorf("got %q", got)
	}
}

type handler func(context.Context, bot.Event, bot.Way)

func (h handler) Handle(ctx context.Context, e bot.Event, w bot.Way) { h(ctx, e, w) }
func (handler) Private(bot.Place) bool                               { return false }

// A signal ends a session that waits for a line.
func TestEndOfContextEndsTheWait(t *testing.T) {
	in, typing := io.Pipe()
	defer typing.Close()
	c, err := console.New(console.Options{In: in, Out: io.Discard, Session: "s1"})
	if err != nil {
		t.Fatal(err)
	}
	ctx, stop := context.WithCancel(t.Context())
	done := make(chan error)
	go func() { done <- c.Run(ctx, &echo{}) }()
	stop()
	select {
	case err := <-done:
		if err != nil {
			t.Error(err)
		}
	case <-time.After(5 * time.Second):
		t.Fatal("the session still waits")
	}
}

type broken struct{}

func (broken) Write([]byte) (int, error) { return 0, errors.New("the pipe is gone") }
func (broken) Read([]byte) (int, error)  { return 0, errors.New("the input is gone") }

func TestFaultsOfInputAndOutputAreErrors(t *testing.T) {
	for name, o := range map[string]console.Options{
		"output": {In: strings.NewReader("one\n"), Out: broken{}},
		"input":  {In: broken{}, Out: io.Discard},
	} {
		c, err := console.New(o)
		if err != nil {
			t.Fatal(err)
		}
		if err := c.Run(t.Context(), &echo{}); err == nil || !strings.Contains(err.Error(), "is gone") {
			t.Errorf("%s: error %v", name, err)
		}
	}
}
