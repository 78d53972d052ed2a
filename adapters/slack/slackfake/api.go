package slackfake

import (
	"encoding/json"
	"net/http"
	"net/url"
	"strings"
	"time"
)

// What Slack grants a response address.
const (
	hookUses = 5
	hookAge  = 30 * time.Minute
)

// address is one response address.
type address struct {
	uses    int
	born    time.Time
	channel string
	user    string
	thread  string
	button  *Post // the message that holds the pressed button
}

type answer map[string]any

// watch looks at every request for what must be in none.
func (f *Fake) watch(next http.Handler) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		f.mu.Lock()
		if strings.Contains(r.URL.RequestURI(), "xoxb-") || r.URL.Query().Has("token") {
			f.violate("token in the address of %s", r.URL.Path)
		}
		if r.Method != http.MethodPost {
			f.violate("%s %s instead of POST", r.Method, r.URL.Path)
		}
		f.mu.Unlock()
		next.ServeHTTP(w, r)
	})
}

func (f *Fake) serveAPI(w http.ResponseWriter, r *http.Request) {
	method := r.PathValue("method")
	_ = r.ParseForm()
	do := f.methods()[method]
	f.serve(w, method, func() answer {
		token := r.PostForm.Get("token")
		if bearer, ok := strings.CutPrefix(r.Header.Get("Authorization"), "Bearer "); ok {
			token = bearer
		}
		switch {
		case do == nil:
			f.violate("unknown method %s", method)
			return answer{"ok": false, "error": "unknown_method"}
		case f.revoked != "":
			return answer{"ok": false, "error": f.revoked}
		case token != Token:
			return answer{"ok": false, "error": "invalid_auth"}
		}
		return do(r.PostForm)
	})
}

// serve plays the next fault of a route, or does the work.
func (f *Fake) serve(w http.ResponseWriter, route string, work func() answer) {
	f.mu.Lock()
	f.calls[route]++
	var fault Fault
	if queue := f.faults[route]; len(queue) > 0 {
		fault, f.faults[route] = queue[0], queue[1:]
	}
	var a answer
	if fault.Accept || !fault.Hang && !fault.Cut && fault.Status == 0 && fault.Error == "" {
		a = work()
	}
	f.mu.Unlock()
	f.play(w, fault, a)
}

func (f *Fake) play(w http.ResponseWriter, fault Fault, a answer) {
	wait := fault.Delay
	if fault.Hang {
		wait = time.Hour
	}
	select {
	case <-time.After(wait):
	case <-f.quit:
	}
	if fault.Cut || fault.Hang {
		panic(http.ErrAbortHandler)
	}
	if fault.RetryAfter != "" {
		w.Header().Set("Retry-After", fault.RetryAfter)
	}
	w.Header().Set("Content-Type", "application/json")
	switch {
	case fault.Status != 0:
		w.Header().Set("Content-Type", "text/html")
		w.WriteHeader(fault.Status)
		_, _ = w.Write([]byte("<html>no</html>"))
	case fault.Error != "":
		_ = json.NewEncoder(w).Encode(answer{"ok": false, "error": fault.Error})
	case a["status"] != nil:
		w.WriteHeader(a["status"].(int))
		_, _ = w.Write([]byte(a["error"].(string)))
	default:
		_ = json.NewEncoder(w).Encode(a)
	}
}

func (f *Fake) methods() map[string]func(url.Values) answer {
	return map[string]func(url.Values) answer{
		"auth.test":             func(url.Values) answer { return answer{"ok": true, "user_id": Bot, "bot_id": BotID, "team_id": Team} },
		"chat.postMessage":      f.postMessage,
		"chat.postEphemeral":    f.postEphemeral,
		"chat.update":           f.update,
		"conversations.history": f.history,
		"conversations.replies": f.history,
	}
}

// read makes a post of a call's parameters and checks it against the rules.
func (f *Fake) read(route string, v url.Values) (*Post, string) {
	p := &Post{Route: route, Channel: v.Get("channel"), Thread: v.Get("thread_ts"), Text: v.Get("text"),
		Parse: v.Get("parse"), Markdown: v.Get("mrkdwn"), LinkNames: v.Get("link_names"), Unfurl: v.Get("unfurl_links")}
	var meta struct {
		Payload struct{ Key string } `json:"event_payload"`
	}
	if json.Unmarshal([]byte(v.Get("metadata")), &meta) == nil {
		p.Key = meta.Payload.Key
	}
	return p, f.check(p, []byte(v.Get("blocks")))
}

func (f *Fake) postMessage(v url.Values) answer {
	p, wrong := f.read("chat.postMessage", v)
	if wrong != "" {
		return answer{"ok": false, "error": wrong}
	}
	now := time.Now()
	if f.pace > 0 && now.Sub(f.last[p.Channel]) < f.pace {
		f.violate("two messages to %s within %s", p.Channel, f.pace)
	}
	f.last[p.Channel] = now
	p.TS = f.stamp()
	f.posts = append(f.posts, p)
	return answer{"ok": true, "channel": p.Channel, "ts": p.TS}
}

func (f *Fake) postEphemeral(v url.Values) answer {
	p, wrong := f.read("chat.postEphemeral", v)
	p.For = v.Get("user")
	if p.For == "" {
		f.violate("chat.postEphemeral without a user")
		wrong = "user_not_found"
	}
	if wrong != "" {
		return answer{"ok": false, "error": wrong}
	}
	f.posts = append(f.posts, p)
	return answer{"ok": true, "message_ts": f.stamp()}
}

func (f *Fake) update(v url.Values) answer {
	p, wrong := f.read("chat.update", v)
	old := f.find(p.Channel, v.Get("ts"))
	if old == nil {
		wrong = "message_not_found"
	}
	if wrong != "" {
		return answer{"ok": false, "error": wrong}
	}
	old.Text, old.Shown, old.Blocks, old.Buttons = p.Text, p.Shown, p.Blocks, p.Buttons
	old.Updates++
	return answer{"ok": true, "channel": old.Channel, "ts": old.TS, "text": old.Text}
}

func (f *Fake) find(channel, ts string) *Post {
	for _, p := range f.posts {
		if p.TS != "" && p.TS == ts && p.Channel == channel {
			return p
		}
	}
	return nil
}

// history gives the latest messages of a channel or a thread, newest first.
func (f *Fake) history(v url.Values) answer {
	messages := []answer{}
	for i := len(f.posts) - 1; i >= 0; i-- {
		p := f.posts[i]
		if p.TS == "" || p.Channel != v.Get("channel") || p.Thread != v.Get("ts") {
			continue
		}
		m := answer{"type": "message", "ts": p.TS, "text": p.Text, "bot_id": BotID}
		if v.Get("include_all_metadata") == "1" {
			m["metadata"] = answer{"event_type": "galeward_post", "event_payload": answer{"key": p.Key}}
		}
		messages = append(messages, m)
	}
	return answer{"ok": true, "messages": messages}
}

// serveHook takes a message through a response address.
func (f *Fake) serveHook(w http.ResponseWriter, r *http.Request) {
	var in struct {
		Text, Parse     string
		ResponseType    string `json:"response_type"`
		ThreadTS        string `json:"thread_ts"`
		ReplaceOriginal bool   `json:"replace_original"`
		UnfurlLinks     *bool  `json:"unfurl_links"`
		Blocks          json.RawMessage
	}
	err := json.NewDecoder(r.Body).Decode(&in)
	id := r.PathValue("id")
	f.serve(w, "response_url", func() answer {
		h := f.hooks[id]
		if err != nil || h == nil {
			return answer{"status": http.StatusNotFound, "error": "no_such_address"}
		}
		if wrong := f.spend(h); wrong != "" {
			return answer{"status": http.StatusNotFound, "error": wrong}
		}
		p := &Post{Route: "response_url", Channel: h.channel, Thread: in.ThreadTS, Text: in.Text, Parse: in.Parse,
			Replaces: in.ReplaceOriginal, hook: id}
		if in.ResponseType != "in_channel" {
			p.For = h.user
		}
		if in.UnfurlLinks != nil && !*in.UnfurlLinks {
			p.Unfurl = "false"
		}
		if wrong := f.check(p, in.Blocks); wrong != "" {
			return answer{"status": http.StatusBadRequest, "error": wrong}
		}
		f.store(h, p)
		return answer{"ok": true}
	})
}

func (f *Fake) spend(h *address) string {
	h.uses++
	switch {
	case h.uses > hookUses:
		f.violate("response address used for the %d. time", h.uses)
		return "used_url"
	case f.now().Sub(h.born) > hookAge:
		f.violate("response address used %s after it was given", f.now().Sub(h.born).Round(time.Minute))
		return "expired_url"
	}
	return ""
}

// store keeps a post, in the place of the message that holds the button when it
// replaces that.
func (f *Fake) store(h *address, p *Post) {
	if old := h.button; p.Replaces && old != nil {
		if (old.For == "") != (p.For == "") {
			f.violate("a message was to change between private and public")
		}
		old.Text, old.Shown, old.Blocks, old.Buttons = p.Text, p.Shown, p.Blocks, p.Buttons
		old.Updates++
		return
	}
	f.posts = append(f.posts, p)
}
