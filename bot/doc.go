// Package bot is the core of Galeward: one event in, one answer out.
//
// # What lives here
//
// The contracts with the platforms (Event, Post, Way), the one way of an event
// through the house (Handle), the answer without delivery (Answer), the command
// table, the composing of an assessment into a reply, every sentence that a
// user can read, and the formatting of numbers.
//
// # What does not
//
// No platform: the adapters translate to and from these types. No physiology:
// package physio. No reading of typed values: package shorthand. No keys or
// document formats: package memory.
package bot
