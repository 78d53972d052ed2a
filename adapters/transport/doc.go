// Package transport holds what every chat adapter needs between a platform
// and the bot, and what no platform's client does well by itself.
//
// # What lives here
//
// Suppression of repeated deliveries, a bounded pool that keeps the order of
// each conversation, pacing by channel, back-off with jitter, an HTTP client
// that can not hang, and the means to keep secrets out of errors and logs.
//
// # What does not
//
// Nothing of any one platform: no markup, no signatures, no message formats.
// Nothing of the answer either: this package never sees a reply.
package transport

import "errors"

var (
	// ErrBusy says that a bounded queue is full: the work was not taken.
	ErrBusy = errors.New("queue is full")
	// ErrClosed says that the adapter is shutting down: the work was not taken.
	ErrClosed = errors.New("shutting down")
)
