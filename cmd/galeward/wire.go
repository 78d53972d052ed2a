package main

import (
	"context"
	"io"
	"log/slog"

	"galeward/adapters/boltstore"
	"galeward/adapters/memstore"
	"galeward/adapters/redisstore"
	"galeward/adapters/slack"
	"galeward/bot"
	"galeward/bot/memory"
	"galeward/bot/store"
)

// This file is the only list of adapters: nothing registers itself.

// newBot puts the core on a store.
func newBot(s store.Store, log *slog.Logger) (*bot.Bot, *memory.Memory) {
	m := memory.New(s, memory.Options{})
	return bot.New(bot.Options{Memory: m, Log: log, Version: fullVersion()}), m
}

// openedStore is a store with its end.
type openedStore struct {
	store.Store
	io.Closer
	kind string
	// check says what is wrong with the server's settings; nil: nothing can be.
	check func(context.Context) []string
	// sweep clears expired items; nil: the store does so by itself.
	sweep func(context.Context) (int, error)
}

type nothing struct{}

// Close has nothing to do.
func (nothing) Close() error { return nil }

func openMemory() *openedStore {
	return &openedStore{Store: memstore.New(nil), Closer: nothing{}, kind: "memory"}
}

// openStore opens the store that the settings name; usual is what auto means
// for the command.
func openStore(s storeSettings, usual string, p process) (*openedStore, error) {
	kind := s.Store
	if kind == "auto" {
		kind = usual
	}
	switch kind {
	case "bolt":
		return openBolt(s, p.getenv)
	case "redis":
		return openRedis(s, p.getenv)
	default:
		return openMemory(), nil
	}
}

func openBolt(s storeSettings, getenv func(string) string) (*openedStore, error) {
	path, err := boltPath(s, getenv)
	if err != nil {
		return nil, err
	}
	b, err := boltstore.Open(path, boltstore.Options{})
	if err != nil {
		return nil, err
	}
	return &openedStore{Store: b, Closer: b, kind: "bolt", sweep: b.Sweep}, nil
}

func openRedis(s storeSettings, getenv func(string) string) (*openedStore, error) {
	o := redisstore.Options{
		Addrs: s.RedisAddress, Master: s.RedisMaster, Cluster: s.RedisMode == "cluster",
		DB: s.RedisDB, Prefix: s.RedisPrefix, Replicas: s.RedisReplicas,
		Username: s.RedisUser, SentinelUsername: s.SentinelUser,
	}
	// Files are read by the store itself, so that a new password needs no restart.
	var err error
	if o.Password, o.PasswordFile, err = passwordOf("redis-password-file", s.RedisPasswordFile, getenv); err != nil {
		return nil, err
	}
	if o.SentinelPassword, o.SentinelPasswordFile, err = passwordOf("redis-sentinel-password-file", s.SentinelPassword, getenv); err != nil {
		return nil, err
	}
	if o.TLS, err = redisTLS(s); err != nil {
		return nil, err
	}
	r, err := redisstore.Open(o)
	if err != nil {
		return nil, usageError{err}
	}
	return &openedStore{Store: r, Closer: r, kind: "redis", check: r.Check}, nil
}

// openAdapters makes the chat adapters that the settings ask for.
func openAdapters(s allSettings, h bot.Handler, log *slog.Logger, getenv func(string) string) (map[string]chatAdapter, error) {
	adapters := make(map[string]chatAdapter)
	signing, err := readSecret("slack-signing-secret-file", s.SlackSigningSecretFile, getenv)
	if err != nil {
		return nil, err
	}
	token, err := readSecret("slack-token-file", s.SlackTokenFile, getenv)
	if err != nil {
		return nil, err
	}
	if signing.given() || token.given() {
		a, err := slack.New(slack.Config{
			SigningSecret: signing.reveal(), BotToken: token.reveal(), APIURL: s.SlackAPI,
		}, h, log)
		if err != nil {
			return nil, usageError{err}
		}
		adapters["slack"] = a
	}
	if len(adapters) == 0 {
		return nil, usagef("no platform is set up: give slack-signing-secret-file and slack-token-file, or use galeward chat")
	}
	return adapters, nil
}
