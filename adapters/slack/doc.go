// Package slack connects the bot to Slack over HTTP: slash command, mention,
// direct message, thread reply, edits, deletions and buttons come in; replies
// go out as blocks.
//
// # What lives here
//
// Translation and nothing else: signed requests into bot events, replies into
// messages within Slack's limits, and the choice of the way back (response
// address, public message, private message, amendment).
//
// # What does not
//
// No physiology, no clinical wording, no reading of values. Pacing, back-off
// and the worker pool are in adapters/transport.
package slack
