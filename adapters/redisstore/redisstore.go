// Package redisstore keeps items on a Redis server, for several bot processes
// that share one memory: a single server, one found through Sentinel, or a
// cluster.
//
// # What lives here
//
// The client's settings, one script that is one call of the contract, the
// finding out of what became of a call whose reply was lost, and a look at the
// server's settings at the start.
//
// # What does not
//
// No key names below the prefix and no documents: bot/memory. No search for
// keys: nothing here lists or scans, and a cluster serves it as well as a
// single server.
package redisstore

import (
	"context"
	"fmt"
	"time"

	"github.com/redis/go-redis/v9"
	"github.com/redis/go-redis/v9/logging"

	"galeward/bot/store"
)

// The client logs to the standard error on its own account, with addresses and
// in no format of ours; what it says there it also returns.
func init() { logging.Disable() }

// Store is a store on a server. Make one with Open.
type Store struct {
	client redis.UniversalClient
	o      Options
}

var _ store.Store = (*Store)(nil)

// Open readies a store. It does not wait for the server: one that is down at
// the start is used when it is back.
func Open(o Options) (*Store, error) {
	if err := o.complete(); err != nil {
		return nil, err
	}
	universal := o.universal()
	s := &Store{o: o}
	switch {
	case o.Cluster: // said outright: with one address the client would guess a single server
		s.client = redis.NewClusterClient(universal.Cluster())
	case o.Master != "":
		s.client = redis.NewFailoverClient(universal.Failover())
	default:
		s.client = redis.NewClient(universal.Simple())
	}
	return s, nil
}

// Close gives the connections back.
func (s *Store) Close() error {
	if err := s.client.Close(); err != nil {
		return fmt.Errorf("redisstore: closing: %w", err)
	}
	return nil
}

// Do carries out ops as store.Store says, in one round trip. It returns by the
// deadline of ctx, and without one after at most about twice Options.Timeout.
//
// Where the reply is lost, Do asks once more: the script then first looks for
// the tags of this call. A call that only deletes has no tag, and is not asked
// again. Do does not remember that the server gave no answer: package memory
// spares the messages that follow.
func (s *Store) Do(ctx context.Context, partition string, ops ...store.Op) ([]store.Item, error) {
	if err := store.Check(partition, ops); err != nil {
		return nil, err
	}
	if err := ctx.Err(); err != nil {
		return nil, err
	}
	if len(ops) == 0 {
		return []store.Item{}, nil
	}
	c := newCall(s.o.Prefix, partition, ops)
	r, err := s.ask(ctx, c)
	if err != nil {
		return nil, fault(ctx, err)
	}
	return c.outcome(r)
}

// A call that was turned away is given again so often, so far apart.
const (
	turns    = 4
	turnWait = 25 * time.Millisecond
)

// ask sends the call, and sends it again where that is harmless and helps.
func (s *Store) ask(ctx context.Context, c *call) (reply, error) {
	r, err := s.send(ctx, c, false)
	for turn := 0; turn < turns && turnedAway(err); turn++ {
		select {
		case <-ctx.Done():
			return r, err
		case <-time.After(turnWait):
			r, err = s.send(ctx, c, false)
		}
	}
	if lost(err) && c.repeatable() && ctx.Err() == nil {
		r, err = s.send(ctx, c, true)
	}
	return r, err
}
