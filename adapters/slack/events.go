package slack

import (
	"strconv"
	"strings"
	"time"

	"galeward/bot"

	slackapi "github.com/slack-go/slack"
	"github.com/slack-go/slack/slackevents"
)

// asked is a bot event with what its way back needs to know.
type asked struct {
	event bot.Event
	// hook is the response address, nil where there is none.
	hook *hook
	// pressed is the message that holds the pressed button.
	pressed bot.Ref
	// threaded is true when the event happened inside a thread that exists.
	threaded bool
	// how names the kind of contact in logs.
	how string
}

const platform = "slack"

// canMessage is what Slack can do with the answer to a message.
const canMessage = bot.CanAmend | bot.CanPrivate

// said is the part that all kinds of message event have in common.
type said struct {
	workspace, channel, thread, ts, edited string
	user, text                             string
	direct                                 bool
}

// translate turns the inner event into a bot event; false when it is not for
// the bot: other bots, joins, link previews, kinds it does not know.
func translate(outer slackevents.EventsAPIEvent, self func(user string) bool) (asked, bool) {
	switch e := outer.InnerEvent.Data.(type) {
	case *slackevents.AppMentionEvent:
		if e.BotID != "" || self(e.User) {
			return asked{}, false
		}
		s := said{workspace: outer.TeamID, channel: e.Channel, thread: e.ThreadTimeStamp, ts: e.TimeStamp,
			user: e.User, text: e.Text}
		if e.Edited != nil {
			s.edited = e.Edited.TimeStamp
		}
		return s.asked(true, "mention", self)
	case *slackevents.MessageEvent:
		return translateMessage(outer.TeamID, e, self)
	}
	return asked{}, false
}

func translateMessage(team string, e *slackevents.MessageEvent, self func(user string) bool) (asked, bool) {
	s := said{workspace: team, channel: e.Channel, direct: e.IsIM()}
	switch e.SubType {
	case "", slackapi.MsgSubTypeFileShare, slackapi.MsgSubTypeThreadBroadcast, slackapi.MsgSubTypeMeMessage:
		if e.BotID != "" {
			return asked{}, false
		}
		s.thread, s.ts, s.user, s.text = e.ThreadTimeStamp, e.TimeStamp, e.User, e.Text
	case slackapi.MsgSubTypeMessageChanged:
		if e.Message.SubType == "tombstone" { // a deleted message with replies
			return s.deleted(e.Message.Timestamp, e.PreviousMessage, self)
		}
		if e.Message.BotID != "" || e.Message.Edited == nil { // no edit: a link preview
			return asked{}, false
		}
		s.thread, s.ts, s.user, s.text = e.Message.ThreadTimestamp, e.Message.Timestamp, e.Message.User, e.Message.Text
		s.edited = e.Message.Edited.Timestamp
	case slackapi.MsgSubTypeMessageDeleted:
		return s.deleted(e.DeletedTimeStamp, e.PreviousMessage, self)
	default:
		return asked{}, false
	}
	if self(s.user) {
		return asked{}, false
	}
	return s.asked(s.direct || mentions(s.text, self), s.contact(), self)
}

// asked makes the event. The delivery is the message's identity, not Slack's
// event id: a mention in a channel arrives twice, as app_mention and as message,
// and an edit comes with the first id's time stamp again.
func (s said) asked(addressed bool, how string, self func(user string) bool) (asked, bool) {
	e := bot.Event{Kind: bot.Typed, Delivery: s.channel + ":" + s.ts, Message: s.ts, Where: s.where(),
		User: s.user, Text: plain(s.text, self), At: at(s.ts), Addressed: addressed, Can: canMessage}
	if s.edited != "" {
		e.Kind = bot.Edited
		e.Delivery += ":" + s.edited
		e.At = at(s.edited)
	}
	return asked{event: e, threaded: s.threaded(), how: how}, s.channel != "" && s.ts != "" && s.user != ""
}

func (s said) deleted(ts string, before *slackapi.Msg, self func(user string) bool) (asked, bool) {
	if before != nil {
		s.thread, s.user, s.text = before.ThreadTimestamp, before.User, before.Text
		if before.BotID != "" || self(s.user) {
			return asked{}, false
		}
	}
	s.ts = ts
	e := bot.Event{Kind: bot.Deleted, Delivery: s.channel + ":" + ts + ":deleted", Message: ts, Where: s.where(),
		User: s.user, At: at(ts), Addressed: s.direct || mentions(s.text, self), Can: canMessage}
	return asked{event: e, threaded: s.threaded(), how: "deletion"}, s.channel != "" && ts != ""
}

// where puts a message into its thread. In a channel the answer to a top-level
// message opens that message's thread, so question, answer and follow-ups meet
// in one place; a direct conversation stays flat unless someone opened a thread.
func (s said) where() bot.Place {
	thread := s.thread
	if s.direct && !s.threaded() {
		thread = ""
	} else if thread == "" {
		thread = s.ts
	}
	return bot.Place{Platform: platform, Workspace: s.workspace, Channel: s.channel, Thread: thread}
}

// threaded says that the message is a reply. The first message of a thread
// carries its own time stamp as thread once somebody has replied.
func (s said) threaded() bool { return s.thread != "" && s.thread != s.ts }

func (s said) contact() string {
	switch {
	case s.edited != "":
		return "edit"
	case s.direct:
		return "direct"
	case s.threaded():
		return "thread"
	}
	return "message"
}

// at reads a Slack time stamp, which is seconds and a serial number.
func at(ts string) time.Time {
	whole, _, _ := strings.Cut(ts, ".")
	seconds, err := strconv.ParseInt(whole, 10, 64)
	if err != nil {
		return time.Now()
	}
	return time.Unix(seconds, 0)
}

// selfOf gathers the ids under which this event's installation knows the bot.
func selfOf(outer slackevents.EventsAPIEvent, known string) func(user string) bool {
	ids := map[string]bool{known: known != ""}
	if callback, ok := outer.Data.(*slackevents.EventsAPICallbackEvent); ok {
		for _, a := range callback.Authorizations {
			ids[a.UserID] = a.IsBot
		}
	}
	return func(user string) bool { return ids[user] }
}
