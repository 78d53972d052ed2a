package main

import (
	"context"
	"encoding/json"
	"errors"
	"net/http"
	"net/http/httptest"
	"strings"
	"testing"
	"time"

	"galeward/bot/store"
)

// platform is a chat adapter in a given state.
type platform struct{ err error }

func (p platform) Routes() http.Handler         { return http.NotFoundHandler() }
func (p platform) Ready() error                 { return p.err }
func (platform) Shutdown(context.Context) error { return nil }

// kept is a store in a given state.
type kept struct{ since time.Time }

func (k kept) Do(context.Context, string, ...store.Op) ([]store.Item, error) { return nil, nil }
func (k kept) Down() (time.Time, bool)                                       { return k.since, !k.since.IsZero() }

func TestReadiness(t *testing.T) {
	up, down := kept{}, kept{time.Date(2026, 1, 2, 3, 4, 5, 0, time.UTC)}
	well, ill := platform{}, platform{errors.New("the token was refused")}
	for name, c := range map[string]struct {
		health         *health
		code           int
		degraded       bool
		says, mustName string
	}{
		"all is well":           {health: &health{store: up, adapters: map[string]chatAdapter{"a": well}}, code: 200, says: "answers"},
		"the store is down":     {health: &health{store: down, adapters: map[string]chatAdapter{"a": well}}, code: 200, degraded: true, says: "2026-01-02T03:04:05Z"},
		"one platform of two":   {health: &health{store: up, adapters: map[string]chatAdapter{"a": well, "b": ill}}, code: 200, degraded: true, says: "token was refused"},
		"no platform connected": {health: &health{store: up, adapters: map[string]chatAdapter{"b": ill}}, code: 503, degraded: true, says: "no platform"},
		"a warning":             {health: &health{store: up, warnings: []string{"noeviction"}, adapters: map[string]chatAdapter{"a": well}}, code: 200, says: "noeviction"},
	} {
		c.health.kind = "redis"
		w := httptest.NewRecorder()
		c.health.ready(w, httptest.NewRequest("GET", "/readyz", nil))
		var s state
		if err := json.Unmarshal(w.Body.Bytes(), &s); err != nil {
			t.Fatal(err)
		}
		if w.Code != c.code || s.Ready != (c.code == 200) || s.Degraded != c.degraded || !strings.Contains(w.Body.String(), c.says) {
			t.Errorf("%s: %d %s", name, w.Code, w.Body)
		}
		w = httptest.NewRecorder()
		if c.health.live(w, nil); w.Code != 200 {
			t.Errorf("%s: a process that answers is alive, not %d", name, w.Code)
		}
	}
}
