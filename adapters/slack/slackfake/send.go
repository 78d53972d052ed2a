package slackfake

import (
	"bytes"
	"crypto/hmac"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"fmt"
	"io"
	"net/http"
	"net/url"
	"strconv"
	"strings"
	"time"
)

// ackTime is how long an acknowledgement may take; Slack grants 3 s from its
// own sending, so that less must do.
const ackTime = 2 * time.Second

// Ack is what the bot answered a request with.
type Ack struct {
	Status int
	Header http.Header
	Body   string
	Took   time.Duration
	TS     string // of the message that the request was about
	Err    error  // when there was no answer at all
}

// Wire is how a request is sent. The zero value is an honest one.
type Wire struct {
	Retry  int           // the x-slack-retry-num header
	Age    time.Duration // signed so long ago
	Forged bool          // signed with another secret
	Naked  bool          // not signed
}

// Send posts a body to one of the bot's addresses, signed as Slack signs. An
// honest request that is acknowledged late is a violation.
func (f *Fake) Send(path, contentType string, body []byte, wire Wire) Ack {
	f.mu.Lock()
	target, when := f.target, f.now().Add(-wire.Age)
	f.mu.Unlock()
	req, err := http.NewRequest(http.MethodPost, target+path, bytes.NewReader(body))
	if err != nil {
		return Ack{Err: err}
	}
	req.Header.Set("Content-Type", contentType)
	Sign(req.Header, Secret, body, when, wire)
	start := time.Now()
	resp, err := f.client.Do(req)
	if err != nil {
		return Ack{Err: err}
	}
	defer resp.Body.Close()
	answer, err := io.ReadAll(resp.Body)
	ack := Ack{Status: resp.StatusCode, Header: resp.Header, Body: string(answer), Took: time.Since(start), Err: err}
	if ack.Took > ackTime {
		f.mu.Lock()
		f.violate("%s acknowledged after %s", path, ack.Took)
		f.mu.Unlock()
	}
	return ack
}

// Sign sets the headers with which Slack proves a request.
func Sign(h http.Header, secret string, body []byte, when time.Time, wire Wire) {
	if wire.Retry > 0 {
		h.Set("X-Slack-Retry-Num", strconv.Itoa(wire.Retry))
		h.Set("X-Slack-Retry-Reason", "http_timeout")
	}
	if wire.Naked {
		return
	}
	if wire.Forged {
		secret += "-not"
	}
	stamp := strconv.FormatInt(when.Unix(), 10)
	mac := hmac.New(sha256.New, []byte(secret))
	_, _ = fmt.Fprintf(mac, "v0:%s:%s", stamp, body)
	h.Set("X-Slack-Request-Timestamp", stamp)
	h.Set("X-Slack-Signature", "v0="+hex.EncodeToString(mac.Sum(nil)))
}

// Command is a slash command.
type Command struct {
	Wire
	Channel, User, Text string
	Trigger             string // the same for a repeated delivery
	Hook                string // another response address than Slack's
}

// Command sends a slash command and keeps what the acknowledgement shows.
func (f *Fake) Command(c Command) Ack {
	channel, user := either(c.Channel, Channel), either(c.User, User)
	f.mu.Lock()
	trigger := either(c.Trigger, "trigger."+f.stamp())
	id := f.hook(&address{channel: channel, user: user})
	f.mu.Unlock()
	form := url.Values{"team_id": {Team}, "channel_id": {channel}, "channel_name": {"ward"}, "user_id": {user},
		"user_name": {"anne"}, "command": {"/gas"}, "text": {escape(c.Text)}, "trigger_id": {trigger},
		"response_url": {either(c.Hook, f.server.URL+"/commands/"+id)}, "api_app_id": {"A0APP"}, "token": {"deprecated"}}
	ack := f.Send("/slack/command", "application/x-www-form-urlencoded", []byte(form.Encode()), c.Wire)
	f.keepAck(ack, channel, user)
	return ack
}

// hook needs f.mu held.
func (f *Fake) hook(h *address) string {
	h.born = f.now()
	id := "secret" + strings.ReplaceAll(f.stamp(), ".", "")
	f.hooks[id] = h
	return id
}

func (f *Fake) keepAck(ack Ack, channel, user string) {
	if ack.Status != http.StatusOK || ack.Body == "" {
		return
	}
	f.mu.Lock()
	defer f.mu.Unlock()
	var shown struct {
		Type string `json:"response_type"`
		Text string
	}
	if json.Unmarshal([]byte(ack.Body), &shown) != nil {
		shown.Text = ack.Body
	}
	if shown.Text == "" {
		return
	}
	p := &Post{Route: "ack", Channel: channel, Text: shown.Text}
	if shown.Type != "in_channel" {
		p.For = user
	}
	f.markup("ack", p.Text)
	f.posts = append(f.posts, p)
}

// Message is a message that somebody typed, and what became of it.
type Message struct {
	Wire
	Channel, User, Text string // Text as typed; Slack's escaping is added
	Raw                 string // Text in Slack's own markup instead
	Thread              string
	TS                  string // the same for a repeated delivery
	EditTS              string // of the edit
	BotID               string // typed by a bot
}

func (m Message) text() string { return either(m.Raw, escape(m.Text)) }

// fill gives a message its defaults.
func (f *Fake) fill(m Message) Message {
	m.Channel, m.User = either(m.Channel, Channel), either(m.User, User)
	if m.TS == "" {
		m.TS = f.NewTS()
	}
	return m
}

// Mention sends a message that begins with the bot's name, as app_mention.
func (f *Fake) Mention(m Message) Ack {
	m = f.fill(m)
	return f.event(m, answer{"type": "app_mention", "text": "<@" + Bot + "> " + m.text()})
}

// MentionEdited sends the edit of a mention as app_mention, as Slack does.
func (f *Fake) MentionEdited(m Message) Ack {
	m = f.fill(m)
	m.EditTS = either(m.EditTS, f.NewTS())
	return f.event(m, answer{"type": "app_mention", "text": "<@" + Bot + "> " + m.text(),
		"edited": answer{"user": m.User, "ts": m.EditTS}})
}

// Say sends a message to a channel or, in DM, to the bot.
func (f *Fake) Say(m Message) Ack {
	m = f.fill(m)
	return f.event(m, answer{"type": "message", "text": m.text(), "channel_type": kind(m.Channel)})
}

// Edit changes a message.
func (f *Fake) Edit(m Message) Ack {
	m = f.fill(m)
	m.EditTS = either(m.EditTS, f.NewTS())
	body := answer{"type": "message", "subtype": "message_changed", "hidden": true, "channel_type": kind(m.Channel),
		"message":          f.inner(m, answer{"text": m.text(), "edited": answer{"user": m.User, "ts": m.EditTS}}),
		"previous_message": f.inner(m, answer{"text": "before"})}
	return f.wrap(m, body)
}

// Delete takes a message away.
func (f *Fake) Delete(m Message) Ack {
	m = f.fill(m)
	return f.wrap(m, answer{"type": "message", "subtype": "message_deleted", "hidden": true, "channel_type": kind(m.Channel),
		"deleted_ts": m.TS, "previous_message": f.inner(m, answer{"text": m.text()})})
}

// Bury takes a message away that has replies: Slack leaves a stone in its place.
func (f *Fake) Bury(m Message) Ack {
	m = f.fill(m)
	stone := answer{"type": "message", "subtype": "tombstone", "user": "USLACKBOT", "hidden": true, "ts": m.TS, "thread_ts": m.TS,
		"text": "This message was deleted."}
	return f.wrap(m, answer{"type": "message", "subtype": "message_changed", "hidden": true, "channel_type": kind(m.Channel),
		"message": stone, "previous_message": f.inner(m, answer{"text": m.text(), "thread_ts": m.TS})})
}

// Preview adds a link preview to a message, which Slack reports like an edit.
func (f *Fake) Preview(m Message) Ack {
	m = f.fill(m)
	return f.wrap(m, answer{"type": "message", "subtype": "message_changed", "hidden": true, "channel_type": kind(m.Channel),
		"message": f.inner(m, answer{"text": m.text()}), "previous_message": f.inner(m, answer{"text": m.text()})})
}

// Press presses the button with this label below a post.
func (f *Fake) Press(p Post, label, user string) Ack {
	user = either(user, User)
	f.mu.Lock()
	held := f.held(p)
	ts := either(p.TS, f.stamp())
	id := f.hook(&address{channel: p.Channel, user: user, thread: p.Thread, button: held})
	f.mu.Unlock()
	for _, b := range p.Buttons {
		if b.Label != label {
			continue
		}
		payload := answer{"type": "block_actions", "trigger_id": "trigger." + f.NewTS(), "team": answer{"id": Team},
			"user": answer{"id": user}, "channel": answer{"id": p.Channel}, "response_url": f.server.URL + "/commands/" + id,
			"container": answer{"type": "message", "message_ts": ts, "thread_ts": p.Thread, "channel_id": p.Channel, "is_ephemeral": p.For != ""},
			"message":   answer{"ts": ts, "thread_ts": p.Thread, "bot_id": BotID},
			"actions":   []answer{{"type": "button", "action_id": b.ActionID, "block_id": either(b.BlockID, "b1"), "value": b.Value, "action_ts": f.NewTS()}}}
		return f.Interact(payload, Wire{})
	}
	return Ack{Err: fmt.Errorf("no button %q below %q", label, p.Shown)}
}

func (f *Fake) held(p Post) *Post {
	for _, have := range f.posts {
		if have.TS == p.TS && have.hook == p.hook && have.Shown == p.Shown && have.Channel == p.Channel {
			return have
		}
	}
	return nil
}

// Interact sends the payload of an interaction.
func (f *Fake) Interact(payload any, wire Wire) Ack {
	raw, err := json.Marshal(payload)
	if err != nil {
		return Ack{Err: err}
	}
	body := url.Values{"payload": {string(raw)}}.Encode()
	return f.Send("/slack/interact", "application/x-www-form-urlencoded", []byte(body), wire)
}

// Event sends any inner event.
func (f *Fake) Event(inner any, wire Wire) Ack {
	return f.outer(inner, wire)
}

func (f *Fake) event(m Message, more answer) Ack {
	return f.wrap(m, f.inner(m, more))
}

// inner is a message as events carry it.
func (f *Fake) inner(m Message, more answer) answer {
	a := answer{"type": "message", "user": m.User, "ts": m.TS, "team": Team}
	if m.Thread != "" {
		a["thread_ts"] = m.Thread
	}
	if m.BotID != "" {
		a["bot_id"] = m.BotID
	}
	for k, v := range more {
		a[k] = v
	}
	return a
}

func (f *Fake) wrap(m Message, inner answer) Ack {
	inner["channel"] = m.Channel
	inner["event_ts"] = either(m.EditTS, m.TS)
	ack := f.outer(inner, m.Wire)
	ack.TS = m.TS
	return ack
}

func (f *Fake) outer(inner any, wire Wire) Ack {
	body, err := json.Marshal(answer{"type": "event_callback", "token": "deprecated", "team_id": Team, "api_app_id": "A0APP",
		"event": inner, "event_id": "Ev" + f.NewTS(), "event_time": f.Now().Unix(),
		"authorizations": []answer{{"team_id": Team, "user_id": Bot, "is_bot": true}}})
	if err != nil {
		return Ack{Err: err}
	}
	return f.Send("/slack/events", "application/json", body, wire)
}

func kind(channel string) string {
	if strings.HasPrefix(channel, "D") {
		return "im"
	}
	return "channel"
}

func escape(s string) string {
	return strings.NewReplacer("&", "&amp;", "<", "&lt;", ">", "&gt;").Replace(s)
}

func either(a, b string) string {
	if a != "" {
		return a
	}
	return b
}
