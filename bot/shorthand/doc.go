// Package shorthand reads a typed line: it turns the words and numbers that
// respiratory staff type with one thumb into values, devices, a command and
// open doubts.
//
// # What lives here
//
// Parse is the one way in. A message is folded to plain text (fold.go),
// searched for identifiers (identify.go), cut into tokens (lex.go), parted into
// a clause of an aim or a what-if and into gases (clause.go, segment.go), and
// each gas is read by labels, settings, the chain of unlabelled values and the
// sayings on oxygen (reader.go lists the steps). A number beside a gas that no
// step takes is said not to be read (notread.go). The values of the gas are
// weighed last: every way to read them is a candidate, and one measure
// (score.go) compares them; decide.go turns its answer into use, note or
// question.
//
// The patterns for words, of identifiers, requests and jobs, are dear: each
// stands behind a sieve (sieve.go, grams.go) that says from the pieces of a
// text that it can not match. What the sieve asks for is derived from the
// pattern (derive.go) and stored (stored.go, stored_sieves.go); go generate
// renews it after a change of a pattern.
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
