package slack

import (
	"errors"
	"fmt"
	"log/slog"
	"net"
	"net/http"
	"net/url"
	"strings"
	"time"

	"galeward/adapters/transport"

	slackapi "github.com/slack-go/slack"
)

// Config is what an installation sets. The zero value of everything but the
// two secrets means the default.
type Config struct {
	// SigningSecret proves that a request comes from Slack; required.
	SigningSecret string
	// BotToken is the token that starts with "xoxb-"; required.
	BotToken string
	// APIURL is the address of the Web API, ending in a slash. It must be https
	// unless it is on this machine, which only tests use.
	APIURL string
	// BodyLimit is the largest request body taken, in bytes. The default leaves
	// room for a message of 40,000 characters, which Slack sends twice in an
	// event (as text and as blocks) and percent-encoded in a command.
	BodyLimit int64
	// Timeout bounds one call to Slack.
	Timeout time.Duration
	// Workers is how many channels are served at the same time.
	Workers int
	// Queue and ChannelQueue bound how many questions wait, in all and in one
	// channel. Who finds the queue full is told with Busy.
	Queue, ChannelQueue int
	// Pace is the least time between two messages to one channel.
	Pace time.Duration
	// Busy is the sentence for an asker whose question could not be taken.
	Busy string
	// Retry spaces repeated calls to Slack.
	Retry transport.Backoff
	// Network replaces the network in tests.
	Network http.RoundTripper
}

// Defaults of the settings.
const (
	DefaultBodyLimit = 512 << 10
	DefaultTimeout   = 5 * time.Second
	DefaultPace      = time.Second
	DefaultBusy      = "Too many questions at once: this one was not read. Ask again in a minute."

	defaultWorkers      = 128
	defaultQueue        = 16384
	defaultChannelQueue = 256

	hooksHost = "https://hooks.slack.com"
)

// LogValue keeps the secrets out of logs.
func (c Config) LogValue() slog.Value {
	return slog.GroupValue(slog.String("api", transport.RedactURL(c.APIURL)),
		slog.Bool("signing_secret", c.SigningSecret != ""), slog.Bool("bot_token", c.BotToken != ""))
}

// String keeps the secrets out of printed errors.
func (c Config) String() string { return "slack settings (secrets hidden)" }

// GoString keeps the secrets out of %#v.
func (c Config) GoString() string { return c.String() }

// check says what is wrong with the settings, all of it at once.
func (c Config) check() error {
	var wrong []error
	if c.SigningSecret == "" {
		wrong = append(wrong, errors.New("the signing secret is missing"))
	}
	if c.BotToken == "" {
		wrong = append(wrong, errors.New("the bot token is missing"))
	} else if strings.ContainsFunc(c.BotToken, func(r rune) bool { return r <= ' ' || r > '~' }) {
		wrong = append(wrong, errors.New("the bot token has a space or a strange character in it"))
	}
	if err := checkAPIURL(c.APIURL); err != nil {
		wrong = append(wrong, err)
	}
	if c.BodyLimit < 0 || c.Timeout < 0 || c.Workers < 0 || c.Queue < 0 || c.ChannelQueue < 0 || c.Pace < 0 {
		wrong = append(wrong, errors.New("limits must not be negative"))
	}
	if len(wrong) > 0 {
		return fmt.Errorf("slack: %w", errors.Join(wrong...))
	}
	return nil
}

func checkAPIURL(raw string) error {
	if raw == "" {
		return nil
	}
	u, err := url.Parse(raw)
	if err != nil || u.Host == "" || u.User != nil || u.RawQuery != "" || !strings.HasSuffix(u.Path, "/") {
		return errors.New("the API address must look like https://slack.com/api/")
	}
	ip := net.ParseIP(u.Hostname())
	local := u.Hostname() == "localhost" || ip != nil && ip.IsLoopback()
	if u.Scheme != "https" && !(u.Scheme == "http" && local) {
		return errors.New("the API address must be https: the token goes there")
	}
	return nil
}

func (c Config) withDefaults() Config {
	c.APIURL = or(c.APIURL, slackapi.APIURL)
	c.BodyLimit = or(c.BodyLimit, DefaultBodyLimit)
	c.Timeout = or(c.Timeout, DefaultTimeout)
	c.Workers = or(c.Workers, defaultWorkers)
	c.Queue = or(c.Queue, defaultQueue)
	c.ChannelQueue = or(c.ChannelQueue, defaultChannelQueue)
	c.Pace = or(c.Pace, DefaultPace)
	c.Busy = or(c.Busy, DefaultBusy)
	c.Retry = or(c.Retry, transport.Backoff{First: 500 * time.Millisecond, Max: 20 * time.Second, Tries: 5})
	return c
}

// mayAnswerTo says whether a response address is one of Slack's own: a forged
// one would send an answer to a stranger.
func (c Config) mayAnswerTo(raw string) bool {
	u, err := url.Parse(raw)
	if err != nil || u.User != nil {
		return false
	}
	origin := u.Scheme + "://" + u.Host
	if origin == hooksHost {
		return true
	}
	api, err := url.Parse(c.APIURL)
	return err == nil && c.APIURL != slackapi.APIURL && origin == api.Scheme+"://"+api.Host
}

func or[T comparable](value, standard T) T {
	var zero T
	if value == zero {
		return standard
	}
	return value
}
