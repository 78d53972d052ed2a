package slack

import (
	"context"
	"encoding/json"
	"log/slog"
	"net/http/httptest"
	"strings"
	"testing"
	"time"

	"galeward/adapters/adaptertest"
	"galeward/adapters/slack/slackfake"
	"galeward/adapters/transport"
	"galeward/bot"
)

// fast are settings for tests: real ways, short waits.
func fast(f *slackfake.Fake) Config {
	return Config{SigningSecret: slackfake.Secret, BotToken: slackfake.Token, APIURL: f.APIURL(),
		Pace: time.Millisecond, Timeout: 2 * time.Second,
		Retry: transport.Backoff{First: time.Millisecond, Max: 10 * time.Millisecond, Tries: 4}}
}

// connect opens a workspace with the adapter in it.
func connect(t testing.TB, h bot.Handler, log *slog.Logger, change func(*Config)) (*slackfake.Fake, *Adapter) {
	t.Helper()
	f := slackfake.Start(t)
	cfg := fast(f)
	if change != nil {
		change(&cfg)
	}
	a, err := New(cfg, h, log)
	if err != nil {
		t.Fatal(err)
	}
	server := httptest.NewServer(a.Routes())
	f.Target(server.URL)
	t.Cleanup(func() {
		server.Close()
		ctx, cancel := context.WithTimeout(context.Background(), 10*time.Second)
		defer cancel()
		if err := a.Shutdown(ctx); err != nil {
			t.Error(err)
		}
	})
	return f, a
}

func quiet() *slog.Logger { return slog.New(slog.DiscardHandler) }

// driver lets the suite of all adapters talk to Slack's fake by mention.
type driver struct {
	*slackfake.Fake
	a *Adapter
}

func (d driver) Ask(t testing.TB, text string) string {
	t.Helper()
	ack := d.Mention(slackfake.Message{Text: text})
	if ack.Status != 200 {
		t.Fatalf("not acknowledged: %+v", ack)
	}
	return ack.TS
}

func (d driver) Repeat(t testing.TB, id string) bool {
	t.Helper()
	if ack := d.Mention(slackfake.Message{TS: id, Wire: slackfake.Wire{Retry: 1}}); ack.Status != 200 {
		t.Errorf("the repeated delivery got %+v", ack)
	}
	return true
}

func (d driver) SayAsBot(t testing.TB, text string, itself bool) bool {
	m := slackfake.Message{Channel: slackfake.DM, Text: text, User: "U0OTHER", BotID: "B0OTHER"}
	if itself {
		m.User, m.BotID = slackfake.Bot, slackfake.BotID
	}
	if ack := d.Say(m); ack.Status != 200 {
		t.Errorf("a bot's message got %+v", ack)
	}
	m.Channel = slackfake.Channel
	d.Mention(m)
	return true
}

func (d driver) Shown() []string {
	var out []string
	for _, p := range d.Posts() {
		out = append(out, p.Shown)
	}
	return out
}

func (d driver) Live() []string {
	var live []string
	for _, p := range d.Posts() {
		for _, b := range p.Blocks {
			if raw, _ := json.Marshal(b); strings.Contains(string(raw), "mrkdwn") || strings.Contains(string(raw), `"emoji":true`) {
				live = append(live, string(raw))
			}
		}
		if strings.ContainsAny(p.Text, "<>*_~`") || p.Parse != "none" || p.Unfurl != "false" {
			live = append(live, p.Text)
		}
	}
	return live
}

func (d driver) Secrets() []string {
	return []string{slackfake.Secret, slackfake.Token, "xoxb", "/commands/secret", slackfake.User, "a secret of the reply"}
}

func (d driver) Break() {
	for range 8 {
		d.Fault("chat.postMessage", slackfake.Fault{Cut: true})
	}
}

func (d driver) Stop(ctx context.Context) error { return d.a.Shutdown(ctx) }

func TestAsAnyAdapter(t *testing.T) {
	adaptertest.Run(t, func(t testing.TB, h bot.Handler, log *slog.Logger) adaptertest.Driver {
		f, a := connect(t, h, log, nil)
		return driver{f, a}
	})
}
