package slack

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
	"net/http"

	slackapi "github.com/slack-go/slack"
	"github.com/slack-go/slack/slackevents"
)

// Routes serves the three addresses that are entered in Slack's app settings:
// /slack/command, /slack/events and /slack/interact.
func (a *Adapter) Routes() http.Handler {
	mux := http.NewServeMux()
	mux.Handle("/slack/command", a.signed(a.serveCommand))
	mux.Handle("/slack/events", a.signed(a.serveEvent))
	mux.Handle("/slack/interact", a.signed(a.serveInteraction))
	return mux
}

// signed lets only requests through that Slack signed in the last five minutes.
// The signature is checked over the raw body before anything is parsed.
func (a *Adapter) signed(next func(http.ResponseWriter, *http.Request, []byte)) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		defer func() {
			if v := recover(); v != nil {
				a.caught(v)
				refuse(w, http.StatusInternalServerError)
			}
		}()
		if r.Method != http.MethodPost {
			w.Header().Set("Allow", http.MethodPost)
			refuse(w, http.StatusMethodNotAllowed)
			return
		}
		body, status := a.read(w, r)
		if status == http.StatusOK && !a.genuine(r.Header, body) {
			status = http.StatusUnauthorized
		}
		if status != http.StatusOK {
			a.log.Warn("slack: request refused", "path", r.URL.Path, "status", status)
			refuse(w, status)
			return
		}
		r.Body = io.NopCloser(bytes.NewReader(body))
		next(w, r, body)
	})
}

func (a *Adapter) read(w http.ResponseWriter, r *http.Request) ([]byte, int) {
	body, err := io.ReadAll(http.MaxBytesReader(w, r.Body, a.cfg.BodyLimit))
	var tooLarge *http.MaxBytesError
	switch {
	case errors.As(err, &tooLarge):
		return nil, http.StatusRequestEntityTooLarge
	case err != nil:
		return nil, http.StatusBadRequest
	}
	return body, http.StatusOK
}

func (a *Adapter) genuine(h http.Header, body []byte) bool {
	verifier, err := slackapi.NewSecretsVerifier(h, a.cfg.SigningSecret)
	if err != nil {
		return false
	}
	if _, err := verifier.Write(body); err != nil {
		return false
	}
	return verifier.Ensure() == nil
}

// refuse answers what is not worth repeating: Slack need not try again.
func refuse(w http.ResponseWriter, status int) {
	if status < 500 {
		w.Header().Set("X-Slack-No-Retry", "1")
	}
	http.Error(w, http.StatusText(status), status)
}

// serveCommand acknowledges a command in silence. Whether the answer is private
// is settled before that; but even where it is not, the acknowledgement does not
// make Slack show the typed line to the channel: it may hold what must not be
// repeated, and the answer shows the values as they were read.
func (a *Adapter) serveCommand(w http.ResponseWriter, r *http.Request, body []byte) {
	c, err := slackapi.SlashCommandParse(r)
	if err == nil && r.PostForm.Get("ssl_check") == "1" {
		return
	}
	var q asked
	if err == nil {
		q, err = a.translateCommand(c, body)
	}
	if err != nil {
		refuse(w, http.StatusBadRequest)
		return
	}
	if a.accept(q) != nil {
		a.sayBusy(w)
	}
}

// sayBusy answers a command whose question was not taken, to the asker alone.
func (a *Adapter) sayBusy(w http.ResponseWriter) {
	w.Header().Set("Content-Type", "application/json; charset=utf-8")
	_ = json.NewEncoder(w).Encode(struct {
		Type string `json:"response_type"`
		Text string `json:"text"`
	}{slackapi.ResponseTypeEphemeral, escape(a.cfg.Busy)})
}

func (a *Adapter) serveInteraction(w http.ResponseWriter, r *http.Request, _ []byte) {
	c, err := slackapi.InteractionCallbackParse(r)
	if err != nil {
		refuse(w, http.StatusBadRequest)
		return
	}
	if q, known := a.translateInteraction(c); known && a.accept(q) != nil {
		refuse(w, http.StatusServiceUnavailable)
	}
}

func (a *Adapter) serveEvent(w http.ResponseWriter, r *http.Request, body []byte) {
	var outer struct{ Type, Challenge string }
	if json.Unmarshal(body, &outer) != nil {
		refuse(w, http.StatusBadRequest)
		return
	}
	switch outer.Type {
	case slackevents.URLVerification:
		w.Header().Set("Content-Type", "text/plain; charset=utf-8")
		_, _ = io.WriteString(w, outer.Challenge)
	case slackevents.AppRateLimited:
		a.log.Warn("slack: events are being held back, too many in this workspace")
	case slackevents.CallbackEvent:
		if err := a.callback(body); err != nil {
			// Slack tries again in a minute and after five: that is the queue.
			refuse(w, http.StatusServiceUnavailable)
		}
	}
}

// callback takes an event. One of a kind that the library does not know is an
// error there; it is acknowledged like any other that is not for the bot.
func (a *Adapter) callback(body []byte) error {
	outer, err := slackevents.ParseEvent(body, slackevents.OptionNoVerifyToken())
	if err != nil {
		a.log.Info("slack: event of an unknown kind acknowledged")
		return nil
	}
	switch outer.InnerEvent.Data.(type) {
	case *slackevents.TokensRevokedEvent, *slackevents.AppUninstalledEvent:
		a.health.suspect()
		return nil
	}
	known, _ := a.health.get()
	q, ours := translate(outer, selfOf(outer, known))
	if !ours {
		return nil
	}
	return a.accept(q)
}
