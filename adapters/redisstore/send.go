package redisstore

import (
	"context"

	"github.com/redis/go-redis/v9"

	"galeward/bot/store"
)

// reply is what the script answered, and what the replicas did.
type reply struct {
	outcome    int64
	items      []store.Item
	replicated bool
}

// once is a command that the client of a cluster does not send a second time
// on its own account.
type once struct{ *redis.Cmd }

// NoRetry is asked by the client.
func (once) NoRetry() bool { return true }

// send gives the script to the server, by its name where the server has it.
func (s *Store) send(ctx context.Context, c *call, again bool) (reply, error) {
	cmd, replicated := s.run(ctx, c, again, "evalsha", scriptHash)
	if redis.HasErrorPrefix(cmd.Err(), "NOSCRIPT") {
		cmd, replicated = s.run(ctx, c, again, "eval", script)
	}
	if err := cmd.Err(); err != nil {
		return reply{}, err
	}
	r, err := readReply(cmd.Val(), len(c.ops))
	r.replicated = replicated
	return r, err
}

func (s *Store) run(ctx context.Context, c *call, again bool, name, which string) (cmd *redis.Cmd, replicated bool) {
	if s.o.Replicas == 0 || !c.durable {
		cmd = c.command(ctx, again, name, which)
		_ = s.client.Process(ctx, once{cmd}) // the error stands in cmd
		return cmd, true
	}
	node, err := s.node(ctx, c.keys[0])
	if err != nil {
		cmd = redis.NewCmd(ctx)
		cmd.SetErr(err)
		return cmd, false
	}
	cmd, replicated = s.runAndWait(ctx, node, c.command(ctx, again, name, which))
	cluster, ok := s.client.(*redis.ClusterClient)
	if ok && moved(cmd.Err()) {
		// The slot went to another node, and nothing was done. The client can
		// follow it with one command, but not with a wait on the same
		// connection: this write counts as not replicated.
		cluster.ReloadState(ctx)
		cmd = c.command(ctx, again, name, which)
		_ = s.client.Process(ctx, once{cmd})
	}
	return cmd, replicated
}

// runAndWait sends the script and the wait for the replicas together: the wait
// counts for the writes of its own connection only.
func (s *Store) runAndWait(ctx context.Context, node *redis.Client, cmd *redis.Cmd) (*redis.Cmd, bool) {
	pipe := node.Pipeline()
	_ = pipe.Process(ctx, cmd)
	wait := pipe.Do(ctx, "wait", s.o.Replicas, s.o.WaitTimeout.Milliseconds())
	_, _ = pipe.Exec(ctx) // the errors stand in the commands
	n, err := wait.Int()
	return cmd, err == nil && n >= s.o.Replicas
}

// node is the client of the one server that has the key.
func (s *Store) node(ctx context.Context, key string) (*redis.Client, error) {
	switch client := s.client.(type) {
	case *redis.Client:
		return client, nil
	case *redis.ClusterClient:
		return client.MasterForKey(ctx, key)
	}
	return nil, errReply // Open makes no other client
}

func (c *call) command(ctx context.Context, again bool, name, which string) *redis.Cmd {
	args := make([]any, 0, 4+len(c.keys)+len(c.args))
	args = append(args, name, which, len(c.keys))
	for _, key := range c.keys {
		args = append(args, key)
	}
	args = append(args, again)
	cmd := redis.NewCmd(ctx, append(args, c.args...)...)
	cmd.SetFirstKeyPos(3)
	return cmd
}

func readReply(v any, n int) (r reply, err error) {
	all, ok := v.([]any)
	if !ok || len(all) != 1+n {
		return r, errReply
	}
	if r.outcome, ok = all[0].(int64); !ok {
		return r, errReply
	}
	r.items = make([]store.Item, n)
	for i, v := range all[1:] {
		text, ok := v.(string)
		if !ok {
			continue // absent
		}
		if r.items[i], err = decode(text); err != nil {
			return r, err
		}
	}
	return r, nil
}

// outcome is what Do returns for a reply.
func (c *call) outcome(r reply) ([]store.Item, error) {
	var err error
	switch r.outcome {
	case conflict:
		return r.items, store.ErrConflict
	case stood:
		err = c.before(r.items)
	}
	if err == nil && !r.replicated {
		err = store.ErrNotReplicated
	}
	return r.items, err
}

// before puts what stood before this call in the place of what it wrote,
// where the condition tells it.
func (c *call) before(items []store.Item) (err error) {
	for i, op := range c.ops {
		if !op.Writes() {
			continue
		}
		items[i] = store.Item{}
		if op.If == nil {
			err = store.ErrUnseen
		} else {
			items[i].Tag = *op.If
		}
	}
	return err
}
