package main

import (
	"io/fs"
	"net/http"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"galeward/adapters/slack/slackfake"
	"galeward/adapters/storetest"
)

const (
	line = "7.27/72/54/32 fio2 40 rr 22"
	// tooBig is above the limit of a request's body.
	tooBig = 2 << 20
)

// last is what the newest post shows.
func last(f *slackfake.Fake) string {
	posts := f.Posts()
	if len(posts) == 0 {
		return ""
	}
	return posts[len(posts)-1].Shown
}

// answerTo mentions the bot and gives what it answers.
func answerTo(t *testing.T, f *slackfake.Fake, text string) string {
	t.Helper()
	n := len(f.Posts())
	if ack := f.Mention(slackfake.Message{Text: text}); ack.Status != http.StatusOK {
		t.Fatalf("acknowledged with %d %v", ack.Status, ack.Err)
	}
	f.Wait(n + 1)
	return last(f)
}

func TestServedBotAnswersInSlack(t *testing.T) {
	f, _ := workspace(t, "--store", "memory")
	if got := answerTo(t, f, line); !strings.Contains(got, "P/F 135") {
		t.Errorf("a mention is answered with %.300q", got)
	}
	if ack := f.Command(slackfake.Command{Text: line}); ack.Status != http.StatusOK || ack.Took > 2*time.Second {
		t.Errorf("command acknowledged with %d after %v", ack.Status, ack.Took)
	}
	f.Wait(2)
	if !strings.Contains(last(f), "P/F 135") {
		t.Errorf("a command is answered with %.300q", last(f))
	}
	f.Say(slackfake.Message{Channel: slackfake.DM, Text: line})
	f.Wait(3)
	if !strings.Contains(last(f), "P/F 135") {
		t.Errorf("a direct message is answered with %.300q", last(f))
	}
}

func TestServedBotRefusesWhatIsNotSlack(t *testing.T) {
	f, s := workspace(t, "--store", "memory")
	for name, wire := range map[string]slackfake.Wire{
		"forged": {Forged: true}, "old": {Age: 6 * time.Minute}, "from the future": {Age: -6 * time.Minute}, "unsigned": {Naked: true},
	} {
		if ack := f.Mention(slackfake.Message{Wire: wire, Text: line}); ack.Status != http.StatusUnauthorized {
			t.Errorf("%s: %d %v", name, ack.Status, ack.Err)
		}
	}
	big := f.Send("/slack/events", "application/json", []byte(strings.Repeat("x", tooBig)), slackfake.Wire{})
	if big.Err == nil && big.Status != http.StatusRequestEntityTooLarge {
		t.Errorf("a body of %d bytes: %d", tooBig, big.Status)
	}
	if code, _ := s.get("/slack/"); code == http.StatusOK {
		t.Error("an address that is not Slack's is served")
	}
	if n := len(f.Posts()); n != 0 {
		t.Errorf("%d posts were made", n)
	}
}

// What a long paste holds is read or asked about, and the bot lives on.
func TestServedBotSurvivesALongText(t *testing.T) {
	f, _ := workspace(t, "--store", "memory")
	answerTo(t, f, strings.Repeat("7.27/72/54/32 ", 40000/14))
	f.Mention(slackfake.Message{Text: line, Channel: "C0OTHER"})
	f.Until("the answer after a long text", func() bool {
		return slices.ContainsFunc(f.Posts(), func(p slackfake.Post) bool {
			return p.Channel == "C0OTHER" && strings.Contains(p.Shown, "P/F 135")
		})
	})
}

func TestServedBotAmendsAnEditedQuestion(t *testing.T) {
	f, _ := workspace(t, "--store", "memory")
	asked := slackfake.Message{TS: f.NewTS(), Text: "7.27/72/54/32 fio2 40"}
	f.Mention(asked)
	f.Wait(1)
	asked.Text = "7.27/72/54/32 fio2 60"
	f.MentionEdited(asked)
	f.Until("the amendment", func() bool { return f.Posts()[0].Updates > 0 })
	if p := f.Posts(); len(p) != 1 || !strings.Contains(p[0].Shown, "P/F 90") {
		t.Errorf("%d posts, the first shows %q", len(p), p[0].Shown)
	}
}

// No identifier is answered, kept or logged: not in the bolt file, not in the
// folder of Redis, not in any log (see served.end).
func TestIdentifierIsKeptNowhere(t *testing.T) {
	state := t.TempDir()
	f, s := workspace(t, "--store", "bolt", "--state-dir", state)
	got := answerTo(t, f, "MRN 0012345 7.28/58/62/27")
	if strings.Contains(got, "0012345") || strings.Contains(got, "7.28") {
		t.Errorf("echoed: %q", got)
	}
	answerTo(t, f, line)
	if code, _ := s.terminate(); code != exitDone {
		t.Errorf("exit code %d", code)
	}
	searched := 0
	err := filepath.WalkDir(state, func(path string, e fs.DirEntry, err error) error {
		if err != nil || e.IsDir() {
			return err
		}
		searched++
		raw, err := os.ReadFile(path)
		for _, never := range []string{"0012345", "MRN", line} {
			if strings.Contains(string(raw), never) {
				t.Errorf("%s holds %q", path, never)
			}
		}
		return err
	})
	if err != nil || searched == 0 {
		t.Errorf("%d files searched, error %v", searched, err)
	}
}

func TestHouseRulesOfOneChannelSurviveARestart(t *testing.T) {
	redis := storetest.Redis(t)
	for name, settings := range map[string][]string{
		"bolt":  {"--store", "bolt", "--state-dir", t.TempDir()},
		"redis": {"--store", "redis", "--redis-address", redis.Addr()},
	} {
		t.Run(name, func(t *testing.T) {
			f, s := workspace(t, settings...)
			if got := answerTo(t, f, "house units kPa"); !strings.Contains(got, "kPa") {
				t.Fatalf("the change is answered with %.300q", got)
			}
			if code, _ := s.terminate(); code != exitDone {
				t.Errorf("exit code %d", code)
			}
			again := serve(t, f, settings...)
			f.Target(again.base)
			again.ready()
			if got := answerTo(t, f, "7.27/9.6/7.2/32 fio2 40"); !strings.Contains(got, "kPa") {
				t.Errorf("after a restart the answer is %.300q", got)
			}
			n := len(f.Posts())
			f.Mention(slackfake.Message{Channel: "C0OTHER", Text: line})
			f.Wait(n + 1)
			if strings.Contains(last(f), "kPa") {
				t.Errorf("another channel changed too: %q", last(f))
			}
		})
	}
}

func TestTwoProcessesAnswerADuplicateOnce(t *testing.T) {
	redis := storetest.Redis(t)
	settings := []string{"--store", "redis", "--replicas", "2", "--redis-address", redis.Addr()}
	f, one := workspace(t, settings...)
	two := serve(t, f, settings...)
	two.ready()
	for range 5 {
		asked := slackfake.Message{TS: f.NewTS(), Text: line}
		n := len(f.Posts())
		for retry, s := range []*served{one, two, one, two} {
			f.Target(s.base)
			asked.Retry = retry
			if ack := f.Mention(asked); ack.Status != http.StatusOK {
				t.Fatalf("acknowledged with %d %v", ack.Status, ack.Err)
			}
		}
		f.Wait(n + 1)
		time.Sleep(300 * time.Millisecond) // a second answer would have come
		if got := len(f.Posts()); got != n+1 {
			t.Fatalf("%d answers to one question", got-n)
		}
	}
}

// Redis is killed under the bot: answers go on within 2 s with the last known
// house rules and say so, a change is refused as not stored, and when Redis is
// back all is as before, without a restart.
func TestRedisKilledAndBack(t *testing.T) {
	redis := storetest.Redis(t)
	f, s := workspace(t, "--store", "redis", "--redis-address", redis.Addr())
	answerTo(t, f, "house units kPa")
	healthy := answerTo(t, f, "7.27/9.6/7.2/32 fio2 40")
	redis.Kill()
	begun := time.Now()
	degraded := answerTo(t, f, "7.27/9.6/7.2/32 fio2 40")
	if took := time.Since(begun); took > 2*time.Second {
		t.Errorf("the answer took %v", took)
	}
	if !strings.Contains(degraded, "kPa") || !strings.Contains(degraded, "house rules") || strings.Contains(healthy, "house rules") {
		t.Errorf("without the store the answer is %.300q, with it %.300q", degraded, healthy)
	}
	if got := answerTo(t, f, "house units mmHg"); !strings.Contains(got, "not stored") {
		t.Errorf("a change is answered with %.300q", got)
	}
	if code, body := s.get("/readyz"); code != http.StatusOK || !strings.Contains(body, `"degraded":true`) {
		t.Errorf("degraded is ready, with a reason: %d %s", code, body)
	}
	redis.Restart()
	s.until("recovery", func() bool { _, body := s.get("/readyz"); return strings.Contains(body, `"degraded":false`) })
	if got := answerTo(t, f, "7.27/9.6/7.2/32 fio2 40"); !strings.Contains(got, "kPa") || strings.Contains(got, "house rules") {
		t.Errorf("with Redis back the answer is %.300q", got)
	}
	if got := answerTo(t, f, "house units mmHg"); strings.Contains(got, "not stored") {
		t.Errorf("with Redis back a change is answered with %.300q", got)
	}
}

// SIGTERM: what was acknowledged is answered, what comes later is refused, and
// the process ends with 0.
func TestTerminationFinishesWhatIsUnderWay(t *testing.T) {
	f, s := workspace(t, "--store", "memory")
	answerTo(t, f, line)
	f.Fault("chat.postMessage", slackfake.Fault{Delay: 1500 * time.Millisecond, Accept: true})
	if ack := f.Mention(slackfake.Message{Text: "7.40/40/95/24 60%", Channel: "C0OTHER"}); ack.Status != http.StatusOK {
		t.Fatal(ack)
	}
	f.Until("the call to Slack", func() bool { return f.Calls("chat.postMessage") == 2 })
	code, took := s.terminate()
	if code != exitDone || took < time.Second || took > 20*time.Second {
		t.Errorf("exit code %d after %v; log:\n%s", code, took, s.log)
	}
	if n := len(f.Posts()); n != 2 {
		t.Errorf("%d posts, want 2", n)
	}
	if ack := f.Mention(slackfake.Message{Text: line}); ack.Err == nil {
		t.Errorf("after the end: %d", ack.Status)
	}
}

func TestReadinessTellsWhatIsWrong(t *testing.T) {
	f, s := workspace(t, "--store", "memory")
	if code, body := s.get("/healthz"); code != http.StatusOK || body == "" {
		t.Errorf("healthz: %d %q", code, body)
	}
	f.Revoke("token_revoked")
	f.Mention(slackfake.Message{Text: line})
	s.until("unreadiness", func() bool { code, _ := s.get("/readyz"); return code == http.StatusServiceUnavailable })
	if _, body := s.get("/readyz"); !strings.Contains(body, "token") || strings.Contains(body, slackfake.Token) {
		t.Errorf("readyz: %s", body)
	}
	f.Revoke("")
	s.until("readiness again", func() bool { code, _ := s.get("/readyz"); return code == http.StatusOK })
}

// A server that may throw house rules away is told of at the start.
func TestEvictingRedisIsWarnedOf(t *testing.T) {
	redis := storetest.Redis(t, "--maxmemory-policy", "allkeys-lru")
	_, s := workspace(t, "--store", "redis", "--redis-address", redis.Addr())
	if _, body := s.get("/readyz"); !strings.Contains(body, "noeviction") || !strings.Contains(s.log.String(), "noeviction") {
		t.Errorf("readyz: %s; log:\n%s", body, s.log)
	}
}
