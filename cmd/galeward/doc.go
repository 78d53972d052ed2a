// Command galeward is the binary: it answers lines of blood-gas values on the
// command line, on a terminal and in a chat.
//
// # What lives here
//
// The flags, the one table of settings with its sources, the wiring of the
// core to stores and adapters (wire.go is the only list of adapters), the log,
// the health end points, the shutting down, and the exit codes:
//
//	0  done; for ask: every message was answered, also with a question, a
//	   refusal or silence
//	1  something failed: the store is in use, an answer ended in trouble, the
//	   output is gone
//	2  the command line, the settings or a file named in them can not be used
//
// # What does not
//
// No wording of answers, no reading of values, no physiology: the core. No
// platform's protocol: the adapters.
package main
