// Package memory is what a channel remembers: its house rules with every
// revision, the gases of its threads for the length of a shift, which events
// were already taken, and which users have read the standing notice.
//
// # What lives here
//
// The keys and partitions, the versioned documents and their upgrades, the
// lifetimes, the claims that make one answer out of repeated deliveries, the
// merging of what two processes wrote at once, the readable file form of house
// rules with its checks, and the guard that keeps answers quick while the store
// is down.
//
// # What does not
//
// No wording for users except the sentences of errors in house rules: package
// bot. No client of a database: the adapters behind store.Store. No typed text
// and no user's name: a document has no field that could hold them, but for
// the ids of those who changed or may change house rules.
//
// # The way of a reading
//
// Load is the first round trip: it claims the event and reads house, thread and
// notice. The Visit that it gives is changed by its methods. Save is the second
// round trip. Only a conflict, a take-over or a fault costs more.
package memory
