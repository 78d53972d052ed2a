package main

import (
	"context"
	"encoding/json"
	"fmt"
	"log/slog"
	"os"

	"galeward/adapters/console"
	"galeward/bot"
	"galeward/bot/memory"
	"galeward/bot/store"

	"github.com/goccy/go-yaml"
)

// newAsking makes the bot of ask on a store.
func newAsking(ctx context.Context, s store.Store, houseFile string) (*bot.Bot, error) {
	b, m := newBot(s, slog.New(slog.DiscardHandler))
	return b, settle(ctx, m, whereOf(askPlace()), houseFile)
}

// newChatting makes the bot of chat on a store.
func newChatting(ctx context.Context, s store.Store, log *slog.Logger, houseFile string) (*bot.Bot, error) {
	b, m := newBot(s, log)
	return b, settle(ctx, m, whereOf(console.Place("")), houseFile)
}

// settle makes the rules of a file the rules of a channel.
func settle(ctx context.Context, m *memory.Memory, where memory.Where, houseFile string) error {
	if houseFile == "" {
		return nil
	}
	given, err := readHouse(houseFile)
	if err != nil {
		return err
	}
	_, _, err = m.ChangeHouse(ctx, where, "galeward", func(memory.House) (memory.House, error) {
		return given.Clone(), nil
	})
	return err
}

// whereOf is the place of an event in the words of memory.
func whereOf(p bot.Place) memory.Where {
	return memory.Where{Platform: p.Platform, Workspace: p.Workspace, Channel: p.Channel, Thread: p.Thread}
}

// readHouse reads a file of house rules, JSON or YAML.
func readHouse(path string) (memory.House, error) {
	raw, err := os.ReadFile(path)
	if err != nil {
		return memory.House{}, usageError{err}
	}
	if !json.Valid(raw) {
		if raw, err = yaml.YAMLToJSON(raw); err != nil {
			return memory.House{}, usagef("%s: neither JSON nor YAML: %s", path, firstLine(err))
		}
	}
	h, err := memory.DecodeHouse(raw)
	if err != nil {
		return memory.House{}, usageError{fmt.Errorf("%s: %w", path, err)}
	}
	return h, nil
}
