package main

import (
	"context"
	"errors"
	"fmt"
	"log/slog"
	"net"
	"net/http"
	"time"
)

type serveCommand struct {
	allSettings
}

// Run serves until ctx ends, and then finishes what is under way.
func (c *serveCommand) Run(ctx runContext, p process) error {
	log, err := newLog(p.errs, c.LogLevel)
	if err != nil {
		return err
	}
	if err := c.check(); err != nil {
		return err
	}
	s, err := openStore(c.storeSettings, "bolt", p)
	if err != nil {
		return err
	}
	defer func() { logged(log, "closing the store", s.Close()) }()
	warnings := warn(ctx, s, log)
	srv, err := newService(c.allSettings, s, log, p.getenv)
	if err != nil {
		return err
	}
	srv.health.warnings = warnings
	defer sweeper{s.sweep, sweepTime, log}.start(ctx)()
	return srv.serve(ctx)
}

// warn looks at the store's own settings once: a server that throws keys away
// when it is full would lose house rules without a word. It does not keep the
// service from starting, since answers go on without the store.
func warn(ctx context.Context, s *openedStore, log *slog.Logger) []string {
	if s.check == nil {
		return nil
	}
	ctx, cancel := context.WithTimeout(ctx, time.Second)
	defer cancel()
	found := s.check(ctx)
	for _, w := range found {
		log.Warn("store", "warning", w)
	}
	return found
}

// check refuses what can not work together before anything is opened.
func (c *serveCommand) check() error {
	kind := c.Store
	if kind == "auto" {
		kind = "bolt"
	}
	switch {
	case c.Replicas < 1:
		return usagef("replicas: %d is less than one", c.Replicas)
	case c.Replicas > 1 && kind != "redis":
		return usagef("replicas: %d processes can not share store %s: each would keep rules of its own; set store to redis", c.Replicas, kind)
	case c.Drain <= 0 || c.Drain > maxDrain:
		return usagef("drain: %v is not above 0 and at most %v", c.Drain, maxDrain)
	case c.RedisMode == "sentinel" && c.RedisMaster == "" && kind == "redis":
		return usagef("redis-master: sentinels need the name of the master that they watch")
	}
	return nil
}

// maxDrain keeps the stop, with the moment that cut answers get after it, within
// what service managers grant: 30 s.
const maxDrain = 20 * time.Second

// chatAdapter is a chat platform served over HTTP, as the service sees it.
type chatAdapter interface {
	Routes() http.Handler
	Ready() error
	Shutdown(context.Context) error
}

// service is everything that runs between start and stop.
type service struct {
	adapters map[string]chatAdapter
	health   *health
	http     *http.Server
	listen   string
	drain    time.Duration
	log      *slog.Logger
}

func newService(s allSettings, store *openedStore, log *slog.Logger, getenv func(string) string) (*service, error) {
	handler, memory := newBot(store, log)
	adapters, err := openAdapters(s, handler, log, getenv)
	if err != nil {
		return nil, err
	}
	h := &health{store: memory.Guard(), kind: store.kind, adapters: adapters}
	mux := http.NewServeMux()
	mux.HandleFunc("GET /healthz", h.live)
	mux.HandleFunc("GET /readyz", h.ready)
	for name, a := range adapters {
		mux.Handle("/"+name+"/", a.Routes())
	}
	return &service{
		adapters: adapters, health: h, listen: s.Listen, drain: s.Drain, log: log,
		http: &http.Server{
			Handler: contain(mux, log), ReadHeaderTimeout: 5 * time.Second, ReadTimeout: 10 * time.Second,
			WriteTimeout: 15 * time.Second, IdleTimeout: time.Minute, MaxHeaderBytes: 32 << 10,
			ErrorLog: slog.NewLogLogger(log.Handler(), slog.LevelDebug),
		},
	}, nil
}

// serve listens until ctx ends or the listener fails.
func (s *service) serve(ctx context.Context) error {
	listener, err := net.Listen("tcp", s.listen)
	if err != nil {
		return errors.Join(usageError{fmt.Errorf("listen: %w", err)}, s.stop())
	}
	s.log.Info("serving", "address", listener.Addr().String(), "store", s.health.kind, "version", fullVersion())
	failed := make(chan error, 1)
	go func() { failed <- s.http.Serve(listener) }()
	select {
	case err := <-failed:
		return errors.Join(err, s.stop())
	case <-ctx.Done():
		return s.stop()
	}
}

// stop takes no more requests, and waits for answers under way, all within the
// drain time. What platforms send meanwhile they send again to another process.
func (s *service) stop() error {
	begun := time.Now()
	s.log.Info("stopping")
	ctx, cancel := context.WithTimeout(context.Background(), s.drain)
	defer cancel()
	err := s.http.Shutdown(ctx)
	for name, a := range s.adapters {
		if e := a.Shutdown(ctx); e != nil {
			err = errors.Join(err, fmt.Errorf("%s: %w", name, e))
		}
	}
	s.log.Info("stopped", "ms", time.Since(begun).Milliseconds(), "whole", err == nil)
	return err
}

// logged notes an error that nobody waits for.
func logged(log *slog.Logger, what string, err error) {
	if err != nil {
		log.Error("fault", "while", what, "error", err.Error())
	}
}
