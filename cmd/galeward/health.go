package main

import (
	"context"
	"encoding/json"
	"net/http"
	"time"

	"galeward/bot/store"
)

// health tells a supervisor how the process is. It is alive as long as it
// answers; it is ready when at least one platform is connected. A store that is
// down does not make it unready: answers go on with the last known house rules,
// and taking every replica out would stop them.
type health struct {
	store    guardedStore
	kind     string
	adapters map[string]chatAdapter
	warnings []string // about the store's settings, found at the start
}

// guardedStore is the store with what is known of its outages.
type guardedStore interface {
	store.Store
	Down() (since time.Time, down bool)
}

// state is the body of /readyz.
type state struct {
	Ready    bool              `json:"ready"`
	Degraded bool              `json:"degraded"`
	Store    string            `json:"store"`
	Adapters map[string]string `json:"adapters"`
	Reason   string            `json:"reason,omitempty"`
	Warnings []string          `json:"warnings,omitempty"`
}

func (h *health) live(w http.ResponseWriter, _ *http.Request) {
	w.Header().Set("Content-Type", "text/plain; charset=utf-8")
	_, _ = w.Write([]byte("alive\n"))
}

func (h *health) ready(w http.ResponseWriter, r *http.Request) {
	s := h.state(r.Context())
	w.Header().Set("Content-Type", "application/json")
	w.Header().Set("Cache-Control", "no-store")
	if !s.Ready {
		w.WriteHeader(http.StatusServiceUnavailable)
	}
	_ = json.NewEncoder(w).Encode(s)
}

func (h *health) state(ctx context.Context) state {
	s := state{Store: h.kind + ": answers", Adapters: make(map[string]string), Warnings: h.warnings}
	for name, a := range h.adapters {
		s.Adapters[name] = "connected"
		if err := a.Ready(); err != nil {
			s.Adapters[name], s.Degraded, s.Reason = err.Error(), true, "a platform is not connected"
			continue
		}
		s.Ready = true
	}
	// A read, so that an outage is also seen and its end noticed when nobody asks.
	_, _ = h.store.Do(ctx, "health", store.Op{Key: "ready"})
	if since, down := h.store.Down(); down {
		s.Store = h.kind + ": does not answer since " + since.UTC().Format(time.RFC3339)
		s.Degraded, s.Reason = true, "the store does not answer: house rules are the last known ones"
	}
	if !s.Ready {
		s.Reason = "no platform is connected"
	}
	return s
}
