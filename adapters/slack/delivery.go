package slack

import (
	"context"
	"errors"
	"strconv"
	"strings"

	"galeward/adapters/transport"
	"galeward/bot"
	"galeward/bot/reply"

	slackapi "github.com/slack-go/slack"
)

// way is the way back of one event. The zero event makes the way of a post
// that nobody waits for, such as a scheduled list.
type way struct {
	a     *Adapter
	asked asked
}

var (
	_ bot.Way    = (*way)(nil)
	_ bot.Finder = (*way)(nil)
)

// smallest is the size below which a refused message is not split again.
const smallest = 1500

// ref names a message; Slack's time stamps are unique in a channel only.
func ref(channel, ts string) bot.Ref {
	if channel == "" || ts == "" {
		return ""
	}
	return bot.Ref(channel + ":" + ts)
}

func splitRef(r bot.Ref) (channel, ts string, ok bool) {
	channel, ts, ok = strings.Cut(string(r), ":")
	return channel, ts, ok && channel != "" && ts != ""
}

// Deliver carries a post to Slack. The Ref names the first message of it and is
// "" for what can not be amended later: private answers and those that went
// through a response address.
func (w *way) Deliver(ctx context.Context, post bot.Post) (bot.Ref, error) {
	if len(post.Reply.Blocks) == 0 {
		return "", nil
	}
	n := 0
	made, err := w.send(ctx, post.Reply, post.To.Thread, maxMessage, func(m message) (bot.Ref, error) {
		n++
		if n == 1 && post.Amends != "" {
			if made, err := w.amend(ctx, post, m); !gone(err) {
				return made, err
			}
		}
		return w.make(ctx, post, m, post.Key+"#"+strconv.Itoa(n))
	})
	if errors.Is(err, transport.ErrBusy) {
		w.tellBusy(ctx)
	}
	return made, err
}

// send makes the messages of a reply one after the other. A message that Slack
// refuses for its size or its blocks is split in two and, at last, sent as bare
// text: a reply is never cut to please a limit.
func (w *way) send(ctx context.Context, r reply.Reply, thread string, limit int, one func(message) (bot.Ref, error)) (first bot.Ref, err error) {
	for _, part := range parts(r, limit) {
		m := render(part, thread)
		made, err := one(m)
		if tooBig(err) && min(limit, size(part)) > smallest {
			made, err = w.send(ctx, part, thread, min(limit, size(part))/2+1, one)
		} else if tooBig(err) {
			made, err = one(message{text: m.text})
		}
		if err != nil {
			return first, err
		}
		if first == "" {
			first = made
		}
	}
	return first, nil
}

func tooBig(err error) bool {
	return isCode(err, "msg_blocks_too_long", "msg_too_long", "invalid_blocks", "invalid_blocks_format")
}

// gone says that the message to be amended is not there any more, or no longer
// open to change, so that the amendment becomes a new message.
func gone(err error) bool {
	return isCode(err, "message_not_found", "cant_update_message", "edit_window_closed", "channel_not_found") || errors.Is(err, errSpent)
}

// amend replaces a message. Only the response address reaches a private message,
// and only the one that holds the pressed button.
func (w *way) amend(ctx context.Context, post bot.Post, m message) (bot.Ref, error) {
	if h := w.asked.hook; h != nil && post.Amends == w.asked.pressed {
		return post.Amends, w.a.respond(ctx, h, m, w.asked.event.Private, true)
	}
	channel, ts, ok := splitRef(post.Amends)
	if !ok {
		return "", errSpent
	}
	return post.Amends, w.a.update(ctx, channel, ts, m)
}

// make sends a new message by the first way that is open: the response address
// of a command, then the channel; and to the asker directly where the bot may
// not write in the channel. What is private stays private on all of them.
func (w *way) make(ctx context.Context, post bot.Post, m message, key string) (bot.Ref, error) {
	private := post.For != ""
	if w.viaHook(post) {
		err := w.a.respond(ctx, w.asked.hook, m, private, false)
		if !errors.Is(err, errSpent) {
			return "", err
		}
	}
	var made bot.Ref
	var err error
	if private && !direct(post.To.Channel) {
		err = w.a.whisper(ctx, post.To.Channel, post.For, w.whisperThread(post), m)
	} else {
		made, err = w.a.post(ctx, post.To.Channel, post.To.Thread, m, key, w.asked.event.User != "")
	}
	if asker := or(post.For, w.asked.event.User); closedTo(err) && asker != "" {
		return w.a.post(ctx, asker, "", m, key, true)
	}
	return made, err
}

// viaHook says whether the response address is the way for post: always for a
// command; for a button when the answer is private, since a public one is to be
// a message that can be amended.
func (w *way) viaHook(post bot.Post) bool {
	e := w.asked.event
	return w.asked.hook != nil && post.To.Channel == e.Where.Channel && (e.Kind != bot.Pressed || post.For == e.User)
}

// whisperThread is the thread for a private message: Slack shows it only in a
// thread that is alive, and under a question without replies there is none yet.
func (w *way) whisperThread(post bot.Post) string {
	if w.asked.threaded {
		return post.To.Thread
	}
	return ""
}

// direct says that a channel is a conversation with one person.
func direct(channel string) bool { return strings.HasPrefix(channel, "D") }

// closedTo says that the bot may not write in the channel.
func closedTo(err error) bool {
	return isCode(err, "not_in_channel", "channel_not_found", "user_not_in_channel", "is_archived", "restricted_action")
}

// tellBusy tells the asker, and only him, that the channel's queue is full.
func (w *way) tellBusy(ctx context.Context) {
	e := w.asked.event
	if e.User == "" {
		return
	}
	m := message{text: escape(w.a.cfg.Busy)}
	if err := w.a.whisper(ctx, e.Where.Channel, e.User, "", m); err != nil {
		w.a.log.Warn("slack: could not tell the asker that the queue is full", "error", err.Error())
	}
}

// Find looks whether the post with this key was made, in the latest messages
// of the place.
func (w *way) Find(ctx context.Context, where bot.Place, key string) (bot.Ref, bool, error) {
	return w.a.find(ctx, where.Channel, where.Thread, key+"#1")
}

// options are common to all messages of the Web API: nothing in the text is
// read as markup, no link is unfurled.
func options(m message) []slackapi.MsgOption {
	opts := []slackapi.MsgOption{slackapi.MsgOptionText(m.text, false), slackapi.MsgOptionParse(false),
		slackapi.MsgOptionLinkNames(false), slackapi.MsgOptionDisableMarkdown(),
		slackapi.MsgOptionDisableLinkUnfurl(), slackapi.MsgOptionDisableMediaUnfurl()}
	return append(opts, slackapi.MsgOptionBlocks(m.blocks...))
}
