package adaptertest

import (
	"bytes"
	"context"
	"fmt"
	"log/slog"
	"strings"
	"sync"
	"testing"
	"time"

	"galeward/bot"
	"galeward/bot/reply"

	"go.uber.org/goleak"
)

// Driver is an adapter that runs against its platform, or a fake of it, and the
// people there.
type Driver interface {
	// Ask puts a question in the platform's usual way. It returns when the
	// platform has handed it over.
	Ask(t testing.TB, text string) (id string)
	// Repeat hands the question over once more, as a platform does that missed
	// the acknowledgement. False when the platform never does that.
	Repeat(t testing.TB, id string) bool
	// SayAsBot lets a bot say something to the bot: itself, or another one.
	// False when no other bot can be there.
	SayAsBot(t testing.TB, text string, itself bool) bool
	// Shown are the texts that people see of the bot, oldest first.
	Shown() []string
	// Live is what of the shown texts the platform would turn into a mention,
	// a link or formatting; nil when nothing.
	Live() []string
	// Secrets must appear in no log and no error.
	Secrets() []string
	// Break makes the platform refuse the next messages of the bot for a while.
	Break()
	// Stop ends the adapter.
	Stop(ctx context.Context) error
}

// Start makes a driver for a bot. What the driver opens it closes in the
// test's cleanup.
type Start func(t testing.TB, h bot.Handler, log *slog.Logger) Driver

// Run runs the whole suite.
func Run(t *testing.T, start Start) {
	tests := map[string]func(*testing.T, Start){
		"a repeated delivery is answered once":    testRepeat,
		"bots are not answered":                   testBots,
		"questions are answered in order":         testOrder,
		"markup is harmless both ways":            testMarkup,
		"values and cautions survive the limits":  testLimits,
		"forty thousand characters survive":       testLong,
		"a panic costs one answer":                testPanic,
		"no secret and no text in logs or errors": testSilence,
		"nothing is left running":                 testStop,
	}
	for name, test := range tests {
		t.Run(name, func(t *testing.T) { test(t, start) })
	}
}

// begin starts a driver whose log goes nowhere.
func begin(t *testing.T, start Start, h bot.Handler) Driver {
	d := start(t, h, slog.New(slog.DiscardHandler))
	t.Cleanup(func() { stop(t, d) })
	return d
}

func stop(t testing.TB, d Driver) {
	ctx, cancel := context.WithTimeout(context.Background(), 20*time.Second)
	defer cancel()
	if err := d.Stop(ctx); err != nil {
		t.Errorf("stopping: %v", err)
	}
}

// until waits for something that happens in another goroutine.
func until(t testing.TB, what string, ok func() bool) {
	t.Helper()
	for end := time.Now().Add(15 * time.Second); !ok(); time.Sleep(2 * time.Millisecond) {
		if time.Now().After(end) {
			t.Fatalf("waited in vain for %s", what)
		}
	}
}

func testRepeat(t *testing.T, start Start) {
	h := &Handler{}
	d := begin(t, start, h)
	id := d.Ask(t, "first")
	for range 3 {
		if !d.Repeat(t, id) {
			t.Log("this platform does not repeat")
		}
	}
	d.Ask(t, "last")
	until(t, "two answers", func() bool { return len(h.Errors()) >= 2 })
	if got := len(h.Events()); got != 2 {
		t.Errorf("%d events reached the bot, want 2", got)
	}
	if got := d.Shown(); len(got) != 2 {
		t.Errorf("%d answers shown, want 2: %q", len(got), got)
	}
}

func testBots(t *testing.T, start Start) {
	h := &Handler{}
	d := begin(t, start, h)
	d.SayAsBot(t, "by the bot itself", true)
	d.SayAsBot(t, "by another bot", false)
	d.Ask(t, "by a person")
	until(t, "an answer", func() bool { return len(h.Errors()) >= 1 })
	if events := h.Events(); len(events) != 1 || events[0].Text != "by a person" {
		t.Errorf("the bot heard %+v, want only the person", events)
	}
}

func testOrder(t *testing.T, start Start) {
	h := &Handler{}
	d := begin(t, start, h)
	var want []string
	for i := range 8 {
		text := fmt.Sprintf("question %d", i)
		want = append(want, text)
		d.Ask(t, text)
	}
	until(t, "eight answers", func() bool { return len(h.Errors()) >= 8 })
	var got []string
	for _, e := range h.Events() {
		got = append(got, e.Text)
	}
	if strings.Join(got, "|") != strings.Join(want, "|") {
		t.Errorf("heard in the order %q", got)
	}
}

// hostile is text that means something to one platform or another.
const hostile = "<!channel> <@U0ANNE> @everyone <https://example.org|a link> *bold* _it_ ~7.20~ `code` PaO2 < 60 & > 40 &lt;"

func testMarkup(t *testing.T, start Start) {
	h := &Handler{}
	d := begin(t, start, h)
	const typed = "pH < 7.2 & PaCO2 > 60"
	d.Ask(t, typed)
	until(t, "an answer", func() bool { return len(h.Errors()) >= 1 })
	if got := h.Events()[0].Text; got != typed {
		t.Errorf("the bot heard %q, typed was %q", got, typed)
	}
	h.Reply = func(bot.Event) reply.Reply { return Echo(hostile) }
	d.Ask(t, "again")
	until(t, "a second answer", func() bool { return len(h.Errors()) >= 2 })
	shown := d.Shown()
	if last := shown[len(shown)-1]; last != hostile {
		t.Errorf("shown as %q, want it word for word", last)
	}
	if live := d.Live(); live != nil {
		t.Errorf("the platform would act on %q", live)
	}
}

// numbered makes n words that can be found again one by one.
func numbered(word string, n int) string {
	var b strings.Builder
	for i := range n {
		fmt.Fprintf(&b, "%s%04d ", word, i)
	}
	return strings.TrimSpace(b.String())
}

// large is a reply far over every platform's limit.
func large() (r reply.Reply, kept string) {
	r.Add(reply.Critical, numbered("critical", 40))
	r.Add(reply.Headline, numbered("headline", 30))
	r.Add(reply.Echo, numbered("echo", 900))
	r.Add(reply.Ventilation, numbered("ventilation", 300))
	r.Add(reply.Oxygenation, numbered("oxygenation", 300))
	r.Add(reply.Metabolic, numbered("metabolic", 300))
	for range 20 {
		r.Add(reply.Next, "shed "+numbered("next", 100))
	}
	r.Add(reply.Major, numbered("major", 400))
	for range 20 {
		r.Add(reply.Minor, "shed "+numbered("minor", 100))
	}
	r.Add(reply.Question, numbered("question", 40))
	for _, b := range r.Blocks {
		if b.Kind != reply.Next && b.Kind != reply.Minor {
			kept += b.Text + " "
		}
	}
	return r, strings.TrimSpace(kept)
}

func testLimits(t *testing.T, start Start) {
	r, kept := large()
	h := &Handler{Reply: func(bot.Event) reply.Reply { return r }}
	d := begin(t, start, h)
	d.Ask(t, "something large")
	until(t, "the delivery", func() bool { return len(h.Errors()) >= 1 })
	if err := h.Errors()[0]; err != nil {
		t.Fatalf("not delivered: %v", err)
	}
	rest := strings.Fields(strings.Join(d.Shown(), " "))
	for _, word := range strings.Fields(kept) {
		for len(rest) > 0 && rest[0] != word {
			rest = rest[1:]
		}
		if len(rest) == 0 {
			t.Fatalf("%s was cut, or stands out of order", word)
		}
	}
}

func testLong(t *testing.T, start Start) {
	h := &Handler{}
	d := begin(t, start, h)
	text := strings.TrimSpace(strings.Repeat("7.28/58/62/27 ", 40000/14))
	d.Ask(t, text)
	until(t, "the delivery", func() bool { return len(h.Errors()) >= 1 })
	if err := h.Errors()[0]; err != nil {
		t.Fatalf("not delivered: %v", err)
	}
	if got := h.Events()[0].Text; got != text {
		t.Errorf("%d characters reached the bot, %d were typed", len(got), len(text))
	}
	if got := strings.Join(strings.Fields(strings.Join(d.Shown(), " ")), " "); got != text {
		t.Errorf("%d characters came back, want %d", len(got), len(text))
	}
}

func testPanic(t *testing.T, start Start) {
	h := &Handler{}
	h.Reply = func(e bot.Event) reply.Reply {
		if e.Text == "boom" {
			panic("a secret of the reply")
		}
		return Echo(e.Text)
	}
	d := begin(t, start, h)
	d.Ask(t, "boom")
	d.Ask(t, "still there?")
	until(t, "an answer", func() bool { return len(h.Errors()) >= 1 })
	if got := d.Shown(); len(got) != 1 || got[0] != "still there?" {
		t.Errorf("shown: %q", got)
	}
}

// buffer is a log that may be written and read at the same time.
type buffer struct {
	mu sync.Mutex
	b  bytes.Buffer
}

func (b *buffer) Write(p []byte) (int, error) {
	b.mu.Lock()
	defer b.mu.Unlock()
	return b.b.Write(p)
}

func (b *buffer) String() string {
	b.mu.Lock()
	defer b.mu.Unlock()
	return b.b.String()
}

func testSilence(t *testing.T, start Start) {
	const typed, told = "bed-typed-1234", "answer-told-5678"
	h := &Handler{}
	h.Reply = func(e bot.Event) reply.Reply {
		if strings.Contains(e.Text, "boom") {
			panic(e.Text)
		}
		return Echo(told)
	}
	var log buffer
	d := start(t, h, slog.New(slog.NewJSONHandler(&log, &slog.HandlerOptions{Level: slog.LevelDebug})))
	d.Repeat(t, d.Ask(t, typed))
	d.Ask(t, typed+" boom")
	until(t, "an answer", func() bool { return len(h.Errors()) >= 1 })
	d.Break()
	d.Ask(t, typed+" while it is broken")
	until(t, "a second delivery", func() bool { return len(h.Errors()) >= 2 })
	stop(t, d)
	all := log.String() + fmt.Sprint(h.Errors())
	for _, secret := range append(d.Secrets(), typed, told) {
		if strings.Contains(all, secret) {
			t.Errorf("%q stands in the log or an error:\n%s", secret, all)
		}
	}
}

func testStop(t *testing.T, start Start) {
	before := goleak.IgnoreCurrent()
	h := &Handler{}
	t.Run("run", func(t *testing.T) {
		d := start(t, h, slog.New(slog.DiscardHandler))
		for i := range 20 {
			d.Ask(t, fmt.Sprint("question ", i))
		}
		stop(t, d)
	})
	if got := len(h.Errors()); got != 20 {
		t.Errorf("%d of 20 answers were finished before the end", got)
	}
	goleak.VerifyNone(t, before)
}
