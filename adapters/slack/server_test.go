package slack

import (
	"context"
	"io"
	"net/http"
	"net/http/httptest"
	"strconv"
	"strings"
	"testing"
	"testing/synctest"
	"time"

	"galeward/adapters/adaptertest"
	"galeward/adapters/slack/slackfake"

	"go.uber.org/goleak"
)

func TestMain(m *testing.M) { goleak.VerifyTestMain(m) }

// Slack's published example of a signed request (docs.slack.dev, "Verifying
// requests from Slack").
const (
	exampleSecret    = "8f742231b10e8888abcd99yyyzzz85a5"
	exampleTime      = 1531420618
	exampleSignature = "v0=a2114d57b48eac39b9ad189dd8316235a7b4a8d21a10bd27519666489c69b503"
	exampleBody      = "token=xyzz0WbapA4vBCDEFasx0q6G&team_id=T1DC2JH3J&team_domain=testteamnow&channel_id=G8PSS9T3V" +
		"&channel_name=foobar&user_id=U2CERLKJA&user_name=roadrunner&command=%2Fwebhook-collect&text=" +
		"&response_url=https%3A%2F%2Fhooks.slack.com%2Fcommands%2FT1DC2JH3J%2F397700885554%2F96rGlfmibIGlgcZRskXaIFfN" +
		"&trigger_id=398738663015.47445629121.803a0bc887a14d10d2c447fce8b6703c"
)

// network answers every call of the adapter itself.
type network func(*http.Request) string

func (n network) RoundTrip(r *http.Request) (*http.Response, error) {
	return &http.Response{StatusCode: 200, Header: http.Header{"Content-Type": {"application/json"}},
		Body: io.NopCloser(strings.NewReader(n(r))), Request: r}, nil
}

// TestPublishedSignature sends the example through all of the adapter, with the
// clock of that day.
func TestPublishedSignature(t *testing.T) {
	for name, test := range map[string]struct {
		late      time.Duration
		signature string
		body      string
		want      int
	}{
		"on time":               {0, exampleSignature, exampleBody, 200},
		"five minutes late":     {300 * time.Second, exampleSignature, exampleBody, 200},
		"later":                 {301 * time.Second, exampleSignature, exampleBody, 401},
		"five minutes early":    {-300 * time.Second, exampleSignature, exampleBody, 200},
		"earlier":               {-301 * time.Second, exampleSignature, exampleBody, 401},
		"another body":          {0, exampleSignature, exampleBody + "&text=x", 401},
		"another signature":     {0, strings.Replace(exampleSignature, "a2", "a3", 1), exampleBody, 401},
		"another version":       {0, strings.Replace(exampleSignature, "v0", "v1", 1), exampleBody, 401},
		"no hexadecimal number": {0, "v0=xyz", exampleBody, 401},
		"shortened":             {0, exampleSignature[:20], exampleBody, 401},
		"empty":                 {0, "", exampleBody, 401},
	} {
		t.Run(name, func(t *testing.T) {
			synctest.Test(t, func(t *testing.T) {
				h := &adaptertest.Handler{}
				a, err := New(Config{SigningSecret: exampleSecret, BotToken: "xoxb-x",
					Network: network(func(*http.Request) string { return `{"ok":true,"user_id":"U1"}` })}, h, quiet())
				if err != nil {
					t.Fatal(err)
				}
				defer func() { _ = a.Shutdown(context.Background()) }()
				time.Sleep(time.Until(time.Unix(exampleTime, 0).Add(test.late)))
				r := httptest.NewRequest(http.MethodPost, "/slack/command", strings.NewReader(test.body))
				r.Header.Set("Content-Type", "application/x-www-form-urlencoded")
				r.Header.Set("X-Slack-Request-Timestamp", strconv.Itoa(exampleTime))
				r.Header.Set("X-Slack-Signature", test.signature)
				w := httptest.NewRecorder()
				a.Routes().ServeHTTP(w, r)
				synctest.Wait()
				if w.Code != test.want {
					t.Errorf("status %d, want %d", w.Code, test.want)
				}
				if heard := len(h.Events()) == 1; heard != (test.want == 200) {
					t.Errorf("heard by the bot: %v", heard)
				}
			})
		})
	}
}

func TestRefusals(t *testing.T) {
	h := &adaptertest.Handler{}
	f, _ := connect(t, h, quiet(), func(c *Config) { c.BodyLimit = 4096 })
	const form = "application/x-www-form-urlencoded"
	mention := []byte(`{"type":"event_callback","event":{"type":"app_mention","user":"U1","text":"x","ts":"1.2","channel":"C1"}}`)
	old := slackfake.Wire{Age: 301 * time.Second}
	early := slackfake.Wire{Age: -301 * time.Second}
	for name, test := range map[string]struct {
		path, kind string
		body       []byte
		wire       slackfake.Wire
		want       int
	}{
		"forged event":       {"/slack/events", "application/json", mention, slackfake.Wire{Forged: true}, 401},
		"old event":          {"/slack/events", "application/json", mention, old, 401},
		"event from ahead":   {"/slack/events", "application/json", mention, early, 401},
		"unsigned event":     {"/slack/events", "application/json", mention, slackfake.Wire{Naked: true}, 401},
		"forged command":     {"/slack/command", form, []byte("text=x"), slackfake.Wire{Forged: true}, 401},
		"forged button":      {"/slack/interact", form, []byte("payload={}"), slackfake.Wire{Forged: true}, 401},
		"forged and junk":    {"/slack/events", "application/json", []byte("{"), slackfake.Wire{Forged: true}, 401},
		"year 2001":          {"/slack/events", "application/json", mention, slackfake.Wire{Age: 25 * 365 * 24 * time.Hour}, 401},
		"too large":          {"/slack/command", form, make([]byte, 4097), slackfake.Wire{}, 413},
		"junk event":         {"/slack/events", "application/json", []byte("{"), slackfake.Wire{}, 400},
		"empty event":        {"/slack/events", "application/json", nil, slackfake.Wire{}, 400},
		"deep event":         {"/slack/events", "application/json", []byte(strings.Repeat("[", 4000)), slackfake.Wire{}, 400},
		"bare command":       {"/slack/command", form, []byte("text=x"), slackfake.Wire{}, 400},
		"command as json":    {"/slack/command", "application/json", mention, slackfake.Wire{}, 400},
		"button without":     {"/slack/interact", form, []byte("x=y"), slackfake.Wire{}, 400},
		"button with junk":   {"/slack/interact", form, []byte("payload=%7B"), slackfake.Wire{}, 400},
		"no such address":    {"/slack/other", form, nil, slackfake.Wire{}, 404},
		"check of the certs": {"/slack/command", form, []byte("ssl_check=1&token=x"), slackfake.Wire{}, 200},
	} {
		if ack := f.Send(test.path, test.kind, test.body, test.wire); ack.Status != test.want {
			t.Errorf("%s: status %d, want %d (%v)", name, ack.Status, test.want, ack.Err)
		}
	}
	if events := h.Events(); len(events) != 0 {
		t.Errorf("the bot heard %+v", events)
	}
}

// TestTooLargeWithoutLength sends a body whose size is not announced.
func TestTooLargeWithoutLength(t *testing.T) {
	_, a := connect(t, &adaptertest.Handler{}, quiet(), func(c *Config) { c.BodyLimit = 4096 })
	r := httptest.NewRequest(http.MethodPost, "/slack/events", io.MultiReader(strings.NewReader(strings.Repeat("x", 5000))))
	r.ContentLength = -1
	w := httptest.NewRecorder()
	a.Routes().ServeHTTP(w, r)
	if w.Code != http.StatusRequestEntityTooLarge {
		t.Errorf("status %d", w.Code)
	}
	if w.Header().Get("X-Slack-No-Retry") != "1" {
		t.Error("Slack would send it again")
	}
}

func TestOnlyPost(t *testing.T) {
	_, a := connect(t, &adaptertest.Handler{}, quiet(), nil)
	w := httptest.NewRecorder()
	a.Routes().ServeHTTP(w, httptest.NewRequest(http.MethodGet, "/slack/events", nil))
	if w.Code != http.StatusMethodNotAllowed || w.Header().Get("Allow") != http.MethodPost {
		t.Errorf("GET: %d, Allow %q", w.Code, w.Header().Get("Allow"))
	}
}

func TestAddressIsVerified(t *testing.T) {
	f, _ := connect(t, &adaptertest.Handler{}, quiet(), nil)
	ack := f.Send("/slack/events", "application/json", []byte(`{"type":"url_verification","token":"x","challenge":"3eZbrw1a"}`), slackfake.Wire{})
	if ack.Status != 200 || ack.Body != "3eZbrw1a" {
		t.Errorf("got %d %q", ack.Status, ack.Body)
	}
}

// TestWhatIsNotForUs: all of it is acknowledged, none of it answered. Slack
// turns the events off for an app that does not acknowledge.
func TestWhatIsNotForUs(t *testing.T) {
	h := &adaptertest.Handler{}
	f, _ := connect(t, h, quiet(), nil)
	m := slackfake.Message{Channel: slackfake.Channel, Text: "look at https://example.org"}
	acks := map[string]slackfake.Ack{
		"unknown event":   f.Event(map[string]any{"type": "not_invented_yet", "user": "U1"}, slackfake.Wire{}),
		"event of no use": f.Event(map[string]any{"type": "reaction_added", "user": "U1"}, slackfake.Wire{}),
		"no event":        f.Event(nil, slackfake.Wire{}),
		"held back":       f.Send("/slack/events", "application/json", []byte(`{"type":"app_rate_limited"}`), slackfake.Wire{}),
		"unknown outer":   f.Send("/slack/events", "application/json", []byte(`{"type":"something"}`), slackfake.Wire{}),
		"join": f.Event(map[string]any{"type": "message", "subtype": "channel_join", "user": "U1", "text": "joined",
			"ts": "1.1", "channel": slackfake.Channel}, slackfake.Wire{}),
		"link preview": f.Preview(m),
		"own edit": f.Edit(slackfake.Message{Channel: slackfake.DM, User: slackfake.Bot, BotID: slackfake.BotID,
			Text: "amended"}),
		"another bot's edit": f.Edit(slackfake.Message{Channel: slackfake.DM, User: "U0OTHER", BotID: "B0OTHER", Text: "x"}),
		"own deletion":       f.Delete(slackfake.Message{Channel: slackfake.DM, User: slackfake.Bot, BotID: slackfake.BotID}),
		"form sent":          f.Interact(map[string]any{"type": "view_submission"}, slackfake.Wire{}),
		"shortcut":           f.Interact(map[string]any{"type": "message_action", "callback_id": "x"}, slackfake.Wire{}),
	}
	for name, ack := range acks {
		if ack.Status != 200 {
			t.Errorf("%s: status %d (%v)", name, ack.Status, ack.Err)
		}
	}
	f.Say(slackfake.Message{Channel: slackfake.DM, Text: "hello"})
	f.Wait(1)
	if events := h.Events(); len(events) != 1 {
		t.Errorf("the bot heard %+v", events)
	}
}

// TestAcknowledgedWhileTheAnswerIsSlow: the fake counts an acknowledgement after
// two seconds as broken contract.
func TestAcknowledgedWhileTheAnswerIsSlow(t *testing.T) {
	release := make(chan struct{})
	h := &slow{release: release}
	f, _ := connect(t, h, quiet(), nil)
	acks := []slackfake.Ack{f.Command(slackfake.Command{Text: "x"}), f.Mention(slackfake.Message{Text: "x"})}
	close(release)
	for _, ack := range acks {
		if ack.Status != 200 || ack.Took > time.Second {
			t.Errorf("%d after %s", ack.Status, ack.Took)
		}
	}
}

func TestEndOfService(t *testing.T) {
	f, a := connect(t, &adaptertest.Handler{}, quiet(), nil)
	if err := a.Shutdown(context.Background()); err != nil {
		t.Fatal(err)
	}
	if ack := f.Mention(slackfake.Message{Text: "late"}); ack.Status != http.StatusServiceUnavailable {
		t.Errorf("an event after the end got %d; Slack is to send it to the next process", ack.Status)
	}
	f.Command(slackfake.Command{Text: "late"})
	if posts := f.Posts(); len(posts) != 1 || posts[0].Route != "ack" || posts[0].For != slackfake.User {
		t.Errorf("a command after the end was answered with %+v", posts)
	}
}
