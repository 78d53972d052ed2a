package slack

import (
	"context"
	"errors"
	"log/slog"
	"sync"
	"time"

	"galeward/adapters/transport"
)

// recheck spaces the proofs of the token while Slack refuses it or can not be
// reached; a token that works is proved by every call.
var recheck = transport.Backoff{First: time.Second, Max: time.Minute}

// health is what readiness says about the connection to Slack.
type health struct {
	log   *slog.Logger
	doubt chan struct{} // one signal waits at most

	mu   sync.Mutex
	err  error
	self string // the bot's user id, "" until Slack has told it
}

func newHealth(log *slog.Logger) *health {
	return &health{log: log, doubt: make(chan struct{}, 1), err: errors.New("slack: not connected yet")}
}

// revoked are the words with which Slack refuses a token for good.
var revoked = []string{"invalid_auth", "not_authed", "account_inactive", "token_revoked", "token_expired", "no_permission", "org_login_required"}

// heard takes note of a call's outcome: a refused token turns readiness at once.
func (h *health) heard(err error) {
	if !isCode(err, revoked...) {
		return
	}
	h.set("", errors.New("slack: the bot token was refused ("+word(code(err))+"): install the app again or set a new token"))
	h.suspect()
}

// suspect has the token proved again.
func (h *health) suspect() {
	select {
	case h.doubt <- struct{}{}:
	default:
	}
}

// set changes the state and logs the change, once.
func (h *health) set(self string, err error) {
	h.mu.Lock()
	changed := (h.err == nil) != (err == nil) || err != nil && h.err.Error() != err.Error()
	h.err = err
	if self != "" {
		h.self = self
	}
	h.mu.Unlock()
	switch {
	case changed && err != nil:
		h.log.Error("slack: not ready", "error", err.Error())
	case changed:
		h.log.Info("slack: ready")
	}
}

func (h *health) get() (self string, err error) {
	h.mu.Lock()
	defer h.mu.Unlock()
	return h.self, h.err
}

// prove calls auth.test until it succeeds, and again whenever there is doubt,
// until ctx ends.
func (a *Adapter) prove(ctx context.Context) {
	for attempt := 0; ; {
		wait := recheck.Wait(attempt)
		if a.proveOnce(ctx) {
			attempt = 0
			select {
			case <-a.health.doubt:
			case <-ctx.Done():
				return
			}
			continue
		}
		attempt++
		if transport.Sleep(ctx, wait) != nil {
			return
		}
	}
}

func (a *Adapter) proveOnce(ctx context.Context) bool {
	answer, err := a.api.AuthTestContext(ctx)
	switch {
	case err == nil:
		a.health.set(answer.UserID, nil)
	case isCode(err, revoked...):
		a.health.heard(err)
	case ctx.Err() == nil:
		a.health.set("", describe("auth.test", err))
	}
	return err == nil
}
