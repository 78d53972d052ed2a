package slackfake

import (
	"errors"
	"net/http"
	"net/http/httptest"
	"strings"
	"testing"
	"time"

	"github.com/slack-go/slack"
	"go.uber.org/goleak"
)

func TestMain(m *testing.M) { goleak.VerifyTestMain(m) }

// client is the real library, pointed at the fake.
func client(f *Fake, token string) *slack.Client {
	c := &http.Client{Timeout: time.Second, Transport: &http.Transport{DisableKeepAlives: true}}
	return slack.New(token, slack.OptionAPIURL(f.APIURL()), slack.OptionHTTPClient(c))
}

func plainText(text string) *slack.TextBlockObject {
	return slack.NewTextBlockObject("plain_text", text, false, false)
}

func section(n int) slack.Block {
	return slack.NewSectionBlock(plainText(strings.Repeat("x", n)), nil, nil)
}

func many(n int, b slack.Block) []slack.Block {
	out := make([]slack.Block, n)
	for i := range out {
		out[i] = b
	}
	return out
}

func buttons(n, label, value int) slack.Block {
	row := make([]slack.BlockElement, n)
	for i := range row {
		row[i] = slack.NewButtonBlockElement(string(rune('a'+i)), strings.Repeat("v", value), plainText(strings.Repeat("x", label)))
	}
	return slack.NewActionBlock("", row...)
}

// TestLimitsHold tries each limit and one beyond it. The limits are those of
// Slack's block reference.
func TestLimitsHold(t *testing.T) {
	same := slack.NewButtonBlockElement("same", "v", plainText("x"))
	context := func(n int) slack.Block {
		e := make([]slack.MixedElement, n)
		for i := range e {
			e[i] = plainText("x")
		}
		return slack.NewContextBlock("", e...)
	}
	for name, test := range map[string]struct {
		blocks []slack.Block
		ok     bool
	}{
		"50 blocks":                 {many(50, section(1)), true},
		"51 blocks":                 {many(51, section(1)), false},
		"3000 characters":           {many(1, section(3000)), true},
		"3001 characters":           {many(1, section(3001)), false},
		"no characters":             {many(1, section(0)), false},
		"13200 in all":              {append(many(4, section(3000)), section(1200)), true},
		"13201 in all":              {append(many(4, section(3000)), section(1201)), false},
		"header of 150":             {many(1, slack.NewHeaderBlock(plainText(strings.Repeat("x", 150)))), true},
		"header of 151":             {many(1, slack.NewHeaderBlock(plainText(strings.Repeat("x", 151)))), false},
		"header with markup":        {many(1, slack.NewHeaderBlock(slack.NewTextBlockObject("mrkdwn", "x", false, false))), false},
		"10 in context":             {many(1, context(10)), true},
		"11 in context":             {many(1, context(11)), false},
		"25 buttons":                {many(1, buttons(25, 1, 1)), true},
		"26 buttons":                {many(1, buttons(26, 1, 1)), false},
		"label of 75, value 2000":   {many(1, buttons(1, 75, 2000)), true},
		"label of 76":               {many(1, buttons(1, 76, 1)), false},
		"value of 2001":             {many(1, buttons(1, 1, 2001)), false},
		"two buttons of one action": {many(1, slack.NewActionBlock("", same, same)), false},
		"live mention":              {many(1, slack.NewSectionBlock(slack.NewTextBlockObject("mrkdwn", "<!channel>", false, false), nil, nil)), false},
		"divider":                   {many(1, slack.NewDividerBlock()), false},
		"no blocks and no text":     {nil, false},
	} {
		f := Start(t)
		_, _, err := client(f, Token).PostMessage(Channel, slack.MsgOptionBlocks(test.blocks...))
		if broken := f.TakeViolations(); (len(broken) == 0) != test.ok || (err == nil) != test.ok {
			t.Errorf("%s: %v, %q", name, err, broken)
		}
	}
}

func TestTextRules(t *testing.T) {
	f := Start(t)
	api := client(f, Token)
	for text, ok := range map[string]bool{"harmless &lt;": true, "<!here>": false, strings.Repeat("x", 40000): true, strings.Repeat("x", 40001): false} {
		_, _, _ = api.PostMessage(Channel, slack.MsgOptionText(text, false))
		if broken := f.TakeViolations(); (len(broken) == 0) != ok {
			t.Errorf("%.20s: %q", text, broken)
		}
	}
}

func TestWebAPI(t *testing.T) {
	f := Start(t)
	api := client(f, Token)
	me, err := api.AuthTest()
	if err != nil || me.UserID != Bot {
		t.Fatalf("%+v %v", me, err)
	}
	channel, ts, err := api.PostMessage(Channel, slack.MsgOptionText("one", false), slack.MsgOptionTS("1.1"),
		slack.MsgOptionMetadata(slack.SlackMetadata{EventType: "galeward_post", EventPayload: map[string]any{"key": "k1"}}))
	if err != nil {
		t.Fatal(err)
	}
	if _, _, _, err := api.UpdateMessage(channel, ts, slack.MsgOptionText("two", false)); err != nil {
		t.Error(err)
	}
	if _, _, _, err := api.UpdateMessage(channel, "9.9", slack.MsgOptionText("two", false)); err == nil || err.Error() != "message_not_found" {
		t.Error(err)
	}
	messages, _, _, err := api.GetConversationReplies(&slack.GetConversationRepliesParameters{ChannelID: channel, Timestamp: "1.1", IncludeAllMetadata: true})
	if err != nil || len(messages) != 1 || messages[0].Metadata.EventPayload["key"] != "k1" {
		t.Errorf("%+v %v", messages, err)
	}
	if _, err := api.PostEphemeral(Channel, User, slack.MsgOptionText("for one", false)); err != nil {
		t.Error(err)
	}
	posts := f.Posts()
	if len(posts) != 2 || posts[0].Text != "two" || posts[0].Thread != "1.1" || posts[1].For != User {
		t.Errorf("%+v", posts)
	}
	if _, err := client(f, "xoxb-other").AuthTest(); err == nil || err.Error() != "invalid_auth" {
		t.Errorf("another token: %v", err)
	}
	f.Revoke("token_revoked")
	if _, err := api.AuthTest(); err == nil || err.Error() != "token_revoked" {
		t.Errorf("revoked token: %v", err)
	}
}

func TestFaultsAndViolations(t *testing.T) {
	f := Start(t)
	api := client(f, Token)
	f.Fault("auth.test", Fault{Status: 429, RetryAfter: "7"}, Fault{Status: 503}, Fault{Error: "fatal_error"}, Fault{Cut: true}, Fault{Hang: true})
	var limited *slack.RateLimitedError
	if _, err := api.AuthTest(); !errors.As(err, &limited) || limited.RetryAfter != 7*time.Second {
		t.Errorf("429: %v", err)
	}
	for _, name := range []string{"503", "refusal", "cut", "hang"} {
		if _, err := api.AuthTest(); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
	if _, err := api.AuthTest(); err != nil || f.Calls("auth.test") != 6 {
		t.Errorf("after the faults: %v, %d calls", err, f.Calls("auth.test"))
	}
	_, _ = api.GetUserInfo("U1")
	if v := f.TakeViolations(); len(v) != 1 || !strings.Contains(v[0], "unknown method") {
		t.Errorf("unknown method: %q", v)
	}
	resp, err := http.Post(f.APIURL()+"auth.test?token="+Token, "", nil)
	if err != nil {
		t.Fatal(err)
	}
	_ = resp.Body.Close()
	http.DefaultClient.CloseIdleConnections()
	if v := f.TakeViolations(); len(v) != 1 || !strings.Contains(v[0], "token in the address") {
		t.Errorf("token in the address: %q", v)
	}
	f.WatchPace(time.Minute)
	for range 2 {
		_, _, _ = api.PostMessage(Channel, slack.MsgOptionText("x", false))
	}
	if v := f.TakeViolations(); len(v) != 1 || !strings.Contains(v[0], "within") {
		t.Errorf("pace: %q", v)
	}
}

// bot is a server that does as it is told.
func bot(t *testing.T, f *Fake, do http.HandlerFunc) {
	s := httptest.NewServer(do)
	t.Cleanup(s.Close)
	f.Target(s.URL)
}

func TestResponseAddress(t *testing.T) {
	f := Start(t)
	var url string
	bot(t, f, func(_ http.ResponseWriter, r *http.Request) {
		c, err := slack.SlashCommandParse(r)
		if err != nil {
			t.Error(err)
		}
		url = c.ResponseURL
	})
	c := &http.Client{Transport: &http.Transport{DisableKeepAlives: true}}
	use := func() error {
		return slack.PostWebhookCustomHTTPContext(t.Context(), url, c, &slack.WebhookMessage{Text: "x", ResponseType: "in_channel"})
	}
	f.Command(Command{Text: "x"})
	for i := range 5 {
		if err := use(); err != nil {
			t.Errorf("use %d: %v", i+1, err)
		}
	}
	if err := use(); err == nil || len(f.TakeViolations()) != 1 {
		t.Errorf("sixth use: %v", err)
	}
	f.Command(Command{Text: "x"})
	f.Advance(31 * time.Minute)
	if err := use(); err == nil || len(f.TakeViolations()) != 1 {
		t.Errorf("after 31 minutes: %v", err)
	}
}

func TestLateAcknowledgement(t *testing.T) {
	f := Start(t)
	bot(t, f, func(http.ResponseWriter, *http.Request) { time.Sleep(ackTime + 50*time.Millisecond) })
	f.Mention(Message{Text: "x"})
	if v := f.TakeViolations(); len(v) != 1 || !strings.Contains(v[0], "acknowledged after") {
		t.Errorf("%q", v)
	}
}

// TestSignatures: what the library takes for genuine is what the fake meant so.
func TestSignatures(t *testing.T) {
	f := Start(t)
	bot(t, f, func(w http.ResponseWriter, r *http.Request) {
		v, err := slack.NewSecretsVerifier(r.Header, Secret)
		if err == nil {
			body := make([]byte, r.ContentLength)
			_, _ = r.Body.Read(body)
			_, _ = v.Write(body)
			err = v.Ensure()
		}
		if err != nil {
			w.WriteHeader(http.StatusUnauthorized)
		}
	})
	for _, test := range []struct {
		wire Wire
		want int
	}{{Wire{}, 200}, {Wire{Retry: 2}, 200}, {Wire{Forged: true}, 401}, {Wire{Naked: true}, 401}, {Wire{Age: 6 * time.Minute}, 401}, {Wire{Age: 4 * time.Minute}, 200}} {
		if got := f.Mention(Message{Text: "x", Wire: test.wire}).Status; got != test.want {
			t.Errorf("%+v: %d, want %d", test.wire, got, test.want)
		}
	}
}
