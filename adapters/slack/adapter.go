package slack

import (
	"context"
	"fmt"
	"log/slog"
	"net/http"
	"runtime/debug"
	"sync"
	"time"

	"galeward/adapters/transport"
	"galeward/bot"

	slackapi "github.com/slack-go/slack"
)

const (
	// answerTime is how long one question may take, waiting out Slack's own
	// limits included.
	answerTime = 90 * time.Second
	// drainTime is how long Shutdown waits for what is in flight.
	drainTime = 20 * time.Second
	// seenTime outlives Slack's last retry, which comes after five minutes,
	// and its first hourly one where delayed events are turned on.
	seenTime  = 65 * time.Minute
	seenLimit = 1 << 16
)

// Adapter is the bot's place in Slack. It is safe for concurrent use.
type Adapter struct {
	cfg     Config
	handler bot.Handler
	log     *slog.Logger
	client  *http.Client
	api     *slackapi.Client
	pool    *transport.Pool
	pace    *transport.Pacer
	seen    *transport.Seen
	health  *health
	now     func() time.Time

	stop context.CancelFunc
	side sync.WaitGroup
}

// New checks the settings and returns an adapter that proves its token in the
// background; see Ready. The caller serves Routes and calls Shutdown.
func New(cfg Config, handler bot.Handler, log *slog.Logger) (*Adapter, error) {
	if err := cfg.check(); err != nil {
		return nil, err
	}
	cfg = cfg.withDefaults()
	a := &Adapter{cfg: cfg, handler: handler, log: log, now: time.Now, health: newHealth(log),
		client: transport.NewClient(cfg.Timeout, cfg.Network),
		pace:   transport.NewPacer(cfg.Pace, 1, cfg.ChannelQueue),
		seen:   transport.NewSeen(seenTime, seenLimit, nil)}
	a.pool = transport.NewPool(cfg.Workers, cfg.Queue, cfg.ChannelQueue, a.caught)
	// The library's debug option stays off for ever: it logs message texts.
	a.api = slackapi.New(cfg.BotToken, slackapi.OptionAPIURL(cfg.APIURL), slackapi.OptionHTTPClient(a.client))
	ctx, stop := context.WithCancel(context.Background())
	a.stop = stop
	a.side.Go(func() { a.prove(ctx) })
	return a, nil
}

// Ready says nil when Slack has accepted the token, else in one sentence what
// is wrong.
func (a *Adapter) Ready() error {
	_, err := a.health.get()
	return err
}

// Way is the way to Slack for posts that answer no event, such as a scheduled
// list.
func (a *Adapter) Way() bot.Way { return &way{a: a} }

// Shutdown takes no more events, waits for what is in flight (at most 20 s, and
// no longer than ctx), and leaves no goroutine and no connection behind. Answers
// that are cut short then have a moment more to save what they did.
func (a *Adapter) Shutdown(ctx context.Context) error {
	ctx, cancel := context.WithTimeout(ctx, drainTime)
	defer cancel()
	err := a.pool.Drain(ctx)
	a.stop()
	a.side.Wait()
	a.client.CloseIdleConnections()
	if err != nil {
		return fmt.Errorf("slack: answers were not finished: %w", err)
	}
	return nil
}

// accept takes an event unless it was taken before. Events of one channel are
// handled in the order in which they came.
func (a *Adapter) accept(q asked) error {
	if !a.seen.Take(q.event.Delivery) {
		a.log.Info("slack: repeated delivery left out", "event", eventID(q), "how", q.how)
		return nil
	}
	err := a.pool.Go(q.event.Where.Channel, func(ctx context.Context) { a.handle(ctx, q) })
	if err != nil {
		a.seen.Drop(q.event.Delivery)
		a.log.Warn("slack: event not taken", "event", eventID(q), "how", q.how, "error", err.Error())
	}
	return err
}

func (a *Adapter) handle(ctx context.Context, q asked) {
	ctx, cancel := context.WithTimeout(ctx, answerTime)
	defer cancel()
	start := time.Now()
	defer func() {
		a.log.Info("slack: event handled", "event", eventID(q), "how", q.how, "ms", time.Since(start).Milliseconds())
	}()
	a.handler.Handle(ctx, q.event, &way{a: a, asked: q})
}

// caught logs a panic without its value, which may quote what was typed.
func (a *Adapter) caught(value any) {
	a.log.Error("slack: recovered from a panic", "type", fmt.Sprintf("%T", value), "stack", string(debug.Stack()))
}

// eventID names an event in logs without the platform's own ids.
func eventID(q asked) string { return digest([]byte(q.event.Delivery)) }
