package slack

import (
	"context"
	"errors"

	"galeward/bot"

	slackapi "github.com/slack-go/slack"
)

// errUnsure says that a message may or may not have been posted.
var errUnsure = errors.New("not known whether the message was posted")

// metadataType marks our own messages, so that they can be found again by key.
const metadataType = "galeward_post"

// call runs one Web API call with pacing and back-off. channel is the one to be
// paced, "" for none.
func (a *Adapter) call(ctx context.Context, what, channel string, op func(ctx context.Context) error) error {
	err := a.cfg.Retry.Retry(ctx, func(ctx context.Context) error {
		if channel != "" {
			if err := a.pace.Wait(ctx, channel); err != nil {
				return final{err}
			}
		}
		err := op(ctx)
		var limited *slackapi.RateLimitedError
		if channel != "" && errors.As(err, &limited) {
			a.pace.Pause(channel, limited.RetryAfter)
		}
		return err
	}, judge)
	a.health.heard(err)
	return describe(what, err)
}

// final wraps an error that no repetition cures.
type final struct{ error }

// Unwrap gives the wrapped error.
func (f final) Unwrap() error { return f.error }

// post makes a public message. After a failure that may have posted it, the
// channel is looked up before another attempt. Where it can not be looked up,
// waited decides: with someone waiting, rather twice than never; with nobody
// waiting, never twice.
func (a *Adapter) post(ctx context.Context, channel, thread string, m message, key string, waited bool) (made bot.Ref, err error) {
	opts := append(options(m), slackapi.MsgOptionMetadata(slackapi.SlackMetadata{
		EventType: metadataType, EventPayload: map[string]any{"key": digest([]byte(key))}}))
	if thread != "" {
		opts = append(opts, slackapi.MsgOptionTS(thread))
	}
	doubt := false
	err = a.call(ctx, "chat.postMessage", channel, func(ctx context.Context) error {
		if doubt {
			found, ok, err := a.find(ctx, channel, thread, key)
			if made = found; ok {
				return nil
			}
			if err != nil && !waited {
				return errUnsure
			}
		}
		inChannel, ts, err := a.api.PostMessageContext(ctx, channel, opts...)
		made = ref(inChannel, ts)
		doubt = unsure(err)
		return err
	})
	if err != nil {
		return "", err
	}
	return made, nil
}

// update replaces a public message; doing it twice does no harm.
func (a *Adapter) update(ctx context.Context, channel, ts string, m message) error {
	return a.call(ctx, "chat.update", channel, func(ctx context.Context) error {
		_, _, _, err := a.api.UpdateMessageContext(ctx, channel, ts, options(m)...)
		return err
	})
}

// whisper shows m to one person in the channel. It is not paced: nobody else
// sees it, and Slack counts it apart.
func (a *Adapter) whisper(ctx context.Context, channel, user, thread string, m message) error {
	opts := options(m)
	if thread != "" {
		opts = append(opts, slackapi.MsgOptionTS(thread))
	}
	return a.call(ctx, "chat.postEphemeral", "", func(ctx context.Context) error {
		_, err := a.api.PostEphemeralContext(ctx, channel, user, opts...)
		return err
	})
}

// findDepth is how many of the latest messages are looked through.
const findDepth = 100

// find looks for our own message with this key.
func (a *Adapter) find(ctx context.Context, channel, thread, key string) (bot.Ref, bool, error) {
	messages, err := a.latest(ctx, channel, thread)
	if err != nil {
		return "", false, describe("looking up messages", err)
	}
	want := digest([]byte(key))
	for _, m := range messages {
		if m.Metadata.EventType == metadataType && m.Metadata.EventPayload["key"] == want {
			return ref(channel, m.Timestamp), true, nil
		}
	}
	return "", false, nil
}

func (a *Adapter) latest(ctx context.Context, channel, thread string) ([]slackapi.Message, error) {
	if thread != "" {
		messages, _, _, err := a.api.GetConversationRepliesContext(ctx, &slackapi.GetConversationRepliesParameters{
			ChannelID: channel, Timestamp: thread, Limit: findDepth, IncludeAllMetadata: true})
		return messages, err
	}
	history, err := a.api.GetConversationHistoryContext(ctx, &slackapi.GetConversationHistoryParameters{
		ChannelID: channel, Limit: findDepth, IncludeAllMetadata: true})
	if err != nil {
		return nil, err
	}
	return history.Messages, nil
}
