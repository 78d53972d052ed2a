package bot

import (
	"context"
	"time"

	"galeward/bot/reply"
)

// Kind is what happened on a platform.
type Kind uint8

// The kinds of event.
const (
	Typed     Kind = iota // a new message
	Edited                // a message was changed: Text is the new text
	Deleted               // a message was taken away
	Shortcut              // a shortcut was used on a colleague's message: About
	Pressed               // a button was pressed: Token
	Submitted             // a form was sent: Token and Fields
	Due                   // a scheduled post is due: Token names its slot
)

// Place is where an event happened and where an answer goes. Thread is the
// platform's id of the thread's first message, "" outside a thread.
type Place struct {
	Platform  string `json:"platform"`
	Workspace string `json:"workspace"`
	Channel   string `json:"channel"`
	Thread    string `json:"thread,omitempty"`
}

// Quote is a colleague's message that a shortcut was used on.
type Quote struct{ Message, User, Text string }

// Ability says what the platform can do with the answer to this event.
type Ability uint8

// The abilities.
const (
	CanAmend   Ability = 1 << iota // change a post that was made
	CanPrivate                     // show a post to one user only
	CanForm                        // open a form now
	CanPicture                     // take a picture after the text
	CanThread                      // answer in a thread under the message
)

// Has says that all of o are there.
func (a Ability) Has(o Ability) bool { return a&o == o }

// Event is one thing that happened on a platform, in the core's words.
type Event struct {
	Kind Kind
	// Delivery identifies what was said, the same for every repeated delivery
	// of it and different for an edit: message id, plus the edit's id.
	Delivery string
	// Message is the platform's id of the message that the event is about.
	Message string
	Where   Place
	User    string
	Text    string
	About   *Quote
	Token   string
	Fields  map[string]string
	At      time.Time
	// Addressed is true when the bot was meant: command, mention, direct
	// message, or a reply in a thread in which it answers.
	Addressed bool
	// Listening is true where every line is meant to be read although chatter
	// gets silence: a console, the ask command.
	Listening bool
	// Manager is true when the platform says that the user manages the channel.
	Manager bool
	// Private asks that only the user sees the answer (a slash command whose
	// first acknowledgement was private, a shortcut on a colleague's message).
	Private bool
	Can     Ability
}

// Ref is a platform's name of a post that was made, "" when it can not be
// found again.
type Ref string

// Post is one thing to deliver.
type Post struct {
	// Key is the same for every attempt at the same post.
	Key string
	To  Place
	// For is the one user who sees the post, "" for all.
	For string
	// Amends is the post to be replaced, "" for a new one. A platform that can
	// not amend makes a new post.
	Amends Ref
	Reply  reply.Reply
}

// Way is the adapter's side of one event: it carries a post to the platform.
// It must be safe to call Deliver more than once (the text, then a picture).
type Way interface {
	Deliver(ctx context.Context, post Post) (Ref, error)
}

// Finder is an optional ability of a Way: was the post with this key made?
type Finder interface {
	Find(ctx context.Context, where Place, key string) (Ref, bool, error)
}

// Handler is the bot as an adapter sees it.
type Handler interface {
	// Handle claims the event, answers it, delivers the answer and remembers
	// where it stands. It returns when all of that is done. It never panics
	// and never returns an error: what goes wrong is logged under an id.
	Handle(ctx context.Context, e Event, way Way)
	// Private tells, before the first acknowledgement, whether answers in this
	// place are private by the house rules. It answers from memory, at once.
	Private(where Place) bool
}
