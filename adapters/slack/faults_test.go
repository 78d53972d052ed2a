package slack

import (
	"context"
	"errors"
	"strings"
	"testing"
	"time"

	"galeward/adapters/adaptertest"
	"galeward/adapters/slack/slackfake"
	"galeward/bot"
)

// onceBroken are the ways in which a call fails once; then Slack works again.
var onceBroken = map[string]slackfake.Fault{
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

func impatient(c *Config) { c.Timeout = 300 * time.Millisecond }

// TestFaultsOnTheWay: one message arrives in each case, and not a second one.
func TestFaultsOnTheWay(t *testing.T) {
	for name, fault := range onceBroken {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			f := play(t, false, impatient, mention, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
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
	}
}

// TestFaultsOnPrivateWays: a private message can not be looked up; it arrives,
// at worst twice.
func TestFaultsOnPrivateWays(t *testing.T) {
	for route, send := range map[string]func(*slackfake.Fake){"chat.postEphemeral": mention, "response_url": command} {
		for name, fault := range onceBroken {
			if route == "response_url" && fault.Error != "" {
				continue // a word of the Web API
			}
			t.Run(route+", "+name, func(t *testing.T) {
				t.Parallel()
				play(t, true, impatient, send, func(ctx context.Context, f *slackfake.Fake, e bot.Event, way bot.Way) {
					f.Fault(route, fault)
					post := told(e, "answer")
					post.For = e.User
					_, err := way.Deliver(ctx, post)
					if posts := f.Posts(); err != nil || len(posts) == 0 || len(posts) > 2 || !fault.Accept && len(posts) != 1 {
						t.Errorf("%v, posts %+v", err, posts)
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
