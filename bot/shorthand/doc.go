// Package shorthand reads a typed line: it turns the words and numbers that
// respiratory staff type with one thumb into values, devices, a command and
// open doubts.
//
// # What lives here
//
// The lexer with positions, the one vocabulary table (spellings, accepted
// units), the reading of unlabelled values by order, the comparison of two
// candidate readings, and the refusal of identifiers. A doubt climbs one
// ladder: an oddity of layout is normalised in silence; one plausible reading
// is used and said (Note); two readings are one Question with both choices;
// identifiers refuse the message (Refusal).
//
// # What does not
//
// No sentence for users: notes and questions are codes that package bot
// words. No verdict on a gas: package physio. No memory: package memory.
// Nothing here keeps the typed text.
package shorthand
