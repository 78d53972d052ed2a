package slack

import (
	"context"
	"errors"
	"net/http"
	"sync"
	"time"

	"galeward/adapters/transport"

	slackapi "github.com/slack-go/slack"
)

// What Slack grants a response address.
const (
	hookAge  = 30 * time.Minute
	hookUses = 5
)

// errSpent says that a response address takes no more messages.
var errSpent = errors.New("response address is used up or too old")

// hook is the response address of one command or button press: a secret
// address that takes a few messages for a short time, without a token.
type hook struct {
	url string

	mu    sync.Mutex
	left  int
	until time.Time
}

// newHook returns nil for an address that is not Slack's.
func (a *Adapter) newHook(url string, now time.Time) *hook {
	if url == "" {
		return nil
	}
	if !a.cfg.mayAnswerTo(url) {
		a.log.Warn("slack: response address refused", "host", transport.RedactURL(url))
		return nil
	}
	// A margin, so that our last use is not the one that comes too late.
	return &hook{url: url, left: hookUses, until: now.Add(hookAge - time.Minute)}
}

// take uses up one message, which counts even when the call then fails.
func (h *hook) take(now time.Time) bool {
	h.mu.Lock()
	defer h.mu.Unlock()
	if h.left == 0 || now.After(h.until) {
		return false
	}
	h.left--
	return true
}

// close marks the address as dead: Slack said so.
func (h *hook) close() {
	h.mu.Lock()
	defer h.mu.Unlock()
	h.left = 0
}

// respond sends m through the response address: to the asker alone when
// private, replacing the message that holds the button when replace. An asker
// waits, so what may or may not have arrived is sent again.
func (a *Adapter) respond(ctx context.Context, h *hook, m message, private, replace bool) error {
	msg := webhook(m, private)
	msg.ReplaceOriginal = replace
	err := a.cfg.Retry.Retry(ctx, func(ctx context.Context) error {
		if !h.take(a.now()) {
			return errSpent
		}
		return slackapi.PostWebhookCustomHTTPContext(ctx, h.url, a.client, msg)
	}, judge)
	var status slackapi.StatusCodeError
	if errors.As(err, &status) && (status.Code == http.StatusNotFound || status.Code == http.StatusGone) {
		h.close()
		return errSpent
	}
	return describe("response address", err)
}

func webhook(m message, private bool) *slackapi.WebhookMessage {
	off := false
	msg := &slackapi.WebhookMessage{Text: m.text, Parse: "none", ResponseType: slackapi.ResponseTypeInChannel,
		UnfurlLinks: &off, UnfurlMedia: &off}
	if private {
		msg.ResponseType = slackapi.ResponseTypeEphemeral
	}
	if m.blocks != nil {
		msg.Blocks = &slackapi.Blocks{BlockSet: m.blocks}
	}
	return msg
}
