package main

import (
	"bytes"
	"context"
	"io"
	"log/slog"
	"net/http"
	"net/http/httptest"
	"net/url"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
	"time"

	"galeward/adapters/redisstore"
	"galeward/adapters/slack"
	"galeward/adapters/slack/slackfake"
	"galeward/adapters/storetest"
	"galeward/bot"
	"galeward/bot/reply"
	"galeward/bot/store"

	slackapi "github.com/slack-go/slack"
)

// Each benchmark runs the thing and a named reference in turn, in the same run,
// and reports how many times the reference it takes: absolute times of a shared
// machine mean little. deploy/bench.sh prints them beside their limits.

// usualLine has four values and oxygen.
const usualLine = "7.27/72/54/32 fio2 40"

// ratio runs ours and the reference in turn and reports the ratio of the
// medians, and the median of ours.
func ratio(b *testing.B, ours, reference func()) {
	b.Helper()
	tune()
	ours()
	reference() // both are warm
	var mine, theirs []time.Duration
	for b.Loop() {
		mine, theirs = append(mine, timed(ours)), append(theirs, timed(reference))
	}
	b.ReportMetric(float64(median(mine))/float64(median(theirs)), "x")
	b.ReportMetric(float64(median(mine).Nanoseconds())/1e3, "µs/ours")
	b.ReportMetric(float64(median(theirs).Nanoseconds())/1e3, "µs/reference")
	b.ReportMetric(0, "ns/op") // the sum of the two says nothing
}

func timed(f func()) time.Duration {
	begun := time.Now()
	f()
	return time.Since(begun)
}

func median(all []time.Duration) time.Duration {
	slices.Sort(all)
	return all[len(all)/2]
}

// The answer to a usual line, against one HTTP round trip on loopback with a
// constant body.
func BenchmarkAnswerAgainstRoundTrip(b *testing.B) {
	asked, err := newAsking(b.Context(), openMemory(), "")
	if err != nil {
		b.Fatal(err)
	}
	a := asker{bot: asked}
	constant := httptest.NewServer(http.HandlerFunc(func(w http.ResponseWriter, _ *http.Request) {
		_, _ = io.WriteString(w, "constant")
	}))
	defer constant.Close()
	ratio(b, func() {
		if asked.Answer(b.Context(), a.event(usualLine)).Text() == "" {
			b.Fatal("no answer")
		}
	}, func() { fetch(b, constant.URL) })
}

func fetch(b *testing.B, url string) {
	resp, err := http.Get(url)
	if err != nil {
		b.Fatal(err)
	}
	_, _ = io.Copy(io.Discard, resp.Body)
	resp.Body.Close()
}

// One answer on the command line, the whole process, against a Go program that
// prints a line.
func BenchmarkAskAgainstHello(b *testing.B) {
	path, err := binary()
	if err != nil {
		b.Fatal(err)
	}
	hello := buildHello(b)
	ratio(b, func() { ran(b, path, "ask", usualLine) }, func() { ran(b, hello) })
}

func buildHello(b *testing.B) string {
	dir := b.TempDir()
	source := filepath.Join(dir, "hello.go")
	program := "package main\n\nimport \"fmt\"\n\nfunc main() { fmt.Println(\"hello\") }\n"
	if err := os.WriteFile(source, []byte(program), 0o600); err != nil {
		b.Fatal(err)
	}
	path := filepath.Join(dir, "hello")
	if out, err := exec.Command("go", "build", "-o", path, source).CombinedOutput(); err != nil {
		b.Fatalf("%v: %s", err, out)
	}
	return path
}

func ran(b *testing.B, path string, args ...string) {
	if out, err := exec.Command(path, args...).Output(); err != nil || len(out) == 0 {
		b.Fatalf("%s: %v, %d bytes", path, err, len(out))
	}
}

// A signed command through everything, with Redis on loopback, against the same
// handler when it verifies, makes one claim in Redis and returns a constant: the
// same adapter before a bot that does no more. All are asked by several at once.
// The metric is the throughput, ours over the reference's. For information, bare
// is the same over a handler of a dozen lines that answers in its own reply and
// so spares the second request to Slack.
func BenchmarkSlackCommandAgainstConstant(b *testing.B) {
	tune()
	redis := storetest.Redis(b)
	s, err := redisstore.Open(redisstore.Options{Addrs: []string{redis.Addr()}})
	if err != nil {
		b.Fatal(err)
	}
	defer s.Close()
	handler, _ := newBot(s, slog.New(slog.DiscardHandler))
	ours, constant := newWhole(b, handler), newWhole(b, claimer{s})
	defer ours.close()
	defer constant.close()
	bare := httptest.NewServer(verifyClaimAndReturn(s))
	defer bare.Close()
	const batch, askers = 200, 8
	serial := 0
	ask := func(base, hooks string) {
		together(askers, batch, func(n int) { command(b, base, serial+n, hooks) })
		serial += batch
	}
	var mine, theirs, bares []time.Duration
	for b.Loop() {
		mine = append(mine, timed(func() { ask(ours.server.URL, ours.hooks.URL); ours.await(b, batch) }))
		theirs = append(theirs, timed(func() { ask(constant.server.URL, constant.hooks.URL); constant.await(b, batch) }))
		bares = append(bares, timed(func() { ask(bare.URL, ours.hooks.URL) }))
	}
	b.ReportMetric(float64(median(theirs))/float64(median(mine)), "throughput")
	b.ReportMetric(float64(median(bares))/float64(median(mine)), "bare")
	b.ReportMetric(batch/median(mine).Seconds(), "answers/s")
	b.ReportMetric(batch/median(theirs).Seconds(), "constants/s")
	b.ReportMetric(batch/median(bares).Seconds(), "bares/s")
	b.ReportMetric(0, "ns/op")
}

// claimer is the bot of the reference.
type claimer struct{ store store.Store }

func (claimer) Private(bot.Place) bool { return false }

func (c claimer) Handle(ctx context.Context, e bot.Event, way bot.Way) {
	claim := store.Op{Key: e.Delivery, If: store.Absent(), Value: []byte("mine"), Tag: "mine", TTL: time.Hour}
	if _, err := c.store.Do(ctx, "slack/reference/"+e.Where.Channel, claim); err != nil {
		return
	}
	var r reply.Reply
	r.Add(reply.Headline, "constant")
	_, _ = way.Deliver(ctx, bot.Post{Key: e.Delivery, To: e.Where, Reply: r})
}

// whole is the service in this process, with a place for its answers.
type whole struct {
	adapter chatAdapter
	server  *httptest.Server
	hooks   *httptest.Server
	arrived chan struct{}
}

func newWhole(b *testing.B, handler bot.Handler) *whole {
	w := &whole{arrived: make(chan struct{}, 4096)}
	w.hooks = httptest.NewServer(http.HandlerFunc(func(rw http.ResponseWriter, r *http.Request) {
		if r.URL.Path == "/api/auth.test" {
			rw.Header().Set("Content-Type", "application/json")
			_, _ = io.WriteString(rw, `{"ok":true,"user_id":"U0BOT"}`)
			return
		}
		_, _ = io.Copy(io.Discard, r.Body)
		_, _ = io.WriteString(rw, "ok")
		w.arrived <- struct{}{}
	}))
	log, err := newLog(io.Discard, "info") // what is logged is part of the work
	if err != nil {
		b.Fatal(err)
	}
	a, err := slack.New(slack.Config{
		SigningSecret: slackfake.Secret, BotToken: slackfake.Token, APIURL: w.hooks.URL + "/api/",
	}, handler, log)
	if err != nil {
		b.Fatal(err)
	}
	w.adapter, w.server = a, httptest.NewServer(a.Routes())
	return w
}

// await waits until n answers have come.
func (w *whole) await(b *testing.B, n int) {
	for late := time.After(20 * time.Second); n > 0; n-- {
		select {
		case <-w.arrived:
		case <-late:
			b.Fatalf("%d answers did not come", n)
		}
	}
}

func (w *whole) close() {
	w.server.Close()
	_ = w.adapter.Shutdown(context.Background())
	w.hooks.Close()
}

// verifyClaimAndReturn is the bare handler.
func verifyClaimAndReturn(s store.Store) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		body, _ := io.ReadAll(r.Body)
		v, err := slackapi.NewSecretsVerifier(r.Header, slackfake.Secret)
		if err != nil {
			http.Error(w, "no", http.StatusUnauthorized)
			return
		}
		_, _ = v.Write(body)
		form, _ := url.ParseQuery(string(body))
		claim := store.Op{Key: form.Get("trigger_id"), If: store.Absent(), Value: []byte("mine"), Tag: "mine", TTL: time.Hour}
		_, err = s.Do(r.Context(), "slack/reference/"+form.Get("channel_id"), claim)
		if err != nil || v.Ensure() != nil {
			http.Error(w, "no", http.StatusUnauthorized)
			return
		}
		_, _ = io.WriteString(w, "constant")
	})
}

// together calls f for 0 to n-1, as several askers do.
func together(askers, n int, f func(int)) {
	done := make(chan struct{})
	for a := range askers {
		go func() {
			defer func() { done <- struct{}{} }()
			for i := a; i < n; i += askers {
				f(i)
			}
		}()
	}
	for range askers {
		<-done
	}
}

var client = &http.Client{Transport: &http.Transport{MaxIdleConnsPerHost: 64}, Timeout: 20 * time.Second}

// command sends a signed slash command from one of many channels.
func command(b *testing.B, base string, n int, hooks string) {
	id := strconv.Itoa(n)
	body := []byte(url.Values{
		"team_id": {slackfake.Team}, "channel_id": {"C" + strconv.Itoa(n%50)}, "user_id": {slackfake.User}, "command": {"/gas"},
		"text": {usualLine}, "trigger_id": {"trigger." + id}, "response_url": {hooks + "/commands/" + id},
	}.Encode())
	req, err := http.NewRequest(http.MethodPost, base+"/slack/command", bytes.NewReader(body))
	if err != nil {
		b.Error(err)
		return
	}
	req.Header.Set("Content-Type", "application/x-www-form-urlencoded")
	slackfake.Sign(req.Header, slackfake.Secret, body, time.Now(), slackfake.Wire{})
	resp, err := client.Do(req)
	if err != nil {
		b.Error(err)
		return
	}
	defer resp.Body.Close()
	if text, _ := io.ReadAll(resp.Body); resp.StatusCode != http.StatusOK || strings.Contains(string(text), "Too many") {
		b.Errorf("%d %s", resp.StatusCode, text)
	}
}
