package slack

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"strings"

	"galeward/bot"

	slackapi "github.com/slack-go/slack"
)

var errIncomplete = errors.New("a field that Slack always sends is missing")

// nobody is for texts whose mentions are not the bot's own name.
func nobody(string) bool { return false }

// command translates a slash command. Slack can not invoke one inside a
// thread, so it stands outside of any.
func (a *Adapter) translateCommand(c slackapi.SlashCommand, body []byte) (asked, error) {
	if c.ChannelID == "" || c.UserID == "" || c.TeamID == "" {
		return asked{}, errIncomplete
	}
	now := a.now()
	e := bot.Event{
		Kind:      bot.Typed,
		Delivery:  "command:" + or(c.TriggerID, digest(body)),
		Where:     bot.Place{Platform: platform, Workspace: c.TeamID, Channel: c.ChannelID},
		User:      c.UserID,
		Text:      plain(c.Text, nobody),
		At:        now,
		Addressed: true,
		Can:       bot.CanPrivate,
	}
	e.Message = e.Delivery
	e.Private = a.private(e.Where)
	return asked{event: e, hook: a.newHook(c.ResponseURL, now), how: "command"}, nil
}

// translateInteraction translates what was done with a message of the bot's;
// false for the kinds that are not used yet, which Slack only wants
// acknowledged.
func (a *Adapter) translateInteraction(c slackapi.InteractionCallback) (asked, bool) {
	if c.Type != slackapi.InteractionTypeBlockActions || len(c.ActionCallback.BlockActions) == 0 {
		return asked{}, false
	}
	press := c.ActionCallback.BlockActions[0]
	channel := or(c.Channel.ID, c.Container.ChannelID)
	message := or(c.Container.MessageTs, c.Message.Timestamp)
	if channel == "" || message == "" || c.User.ID == "" {
		return asked{}, false
	}
	e := bot.Event{
		Kind:      bot.Pressed,
		Delivery:  "press:" + or(c.TriggerID, channel+":"+message+":"+press.ActionTs+":"+c.User.ID),
		Message:   message,
		Where:     bot.Place{Platform: platform, Workspace: c.Team.ID, Channel: channel, Thread: threadOf(c, press)},
		User:      c.User.ID,
		Token:     press.Value,
		At:        a.now(),
		Addressed: true,
		Private:   c.Container.IsEphemeral,
		Can:       canMessage,
	}
	return asked{event: e, hook: a.newHook(c.ResponseURL, e.At), pressed: ref(channel, message),
		threaded: or(c.Message.ThreadTimestamp, c.Container.ThreadTs) != "", how: "button"}, true
}

func threadOf(c slackapi.InteractionCallback, press *slackapi.BlockAction) string {
	if thread, ok := strings.CutPrefix(press.BlockID, threadMark); ok {
		return thread
	}
	return or(c.Message.ThreadTimestamp, c.Container.ThreadTs)
}

// private asks the bot before the first acknowledgement. Should that fail, the
// answer goes to the asker alone: too private can be put right, the reverse not.
func (a *Adapter) private(where bot.Place) (private bool) {
	defer func() {
		if v := recover(); v != nil {
			a.caught(v)
			private = true
		}
	}()
	return a.handler.Private(where)
}

func digest(b []byte) string {
	sum := sha256.Sum256(b)
	return hex.EncodeToString(sum[:8])
}
