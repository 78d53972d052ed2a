package main

import (
	"bytes"
	"context"
	"errors"
	"log/slog"
	"path/filepath"
	"strings"
	"sync/atomic"
	"testing"
	"testing/synctest"
	"time"

	"galeward/adapters/boltstore"
	"galeward/bot/store"
)

func TestSweepsAtTheStartAndAtEveryInterval(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		var log bytes.Buffer
		var sweeps atomic.Int32
		s := sweeper{every: time.Hour, log: slog.New(slog.NewTextHandler(&log, nil)),
			sweep: func(context.Context) (int, error) {
				if sweeps.Add(1) == 2 {
					return 0, errors.New("no room")
				}
				return 3, nil
			}}
		end := s.start(t.Context())
		for hour, want := range []int32{1, 2, 3} {
			synctest.Wait()
			if n := sweeps.Load(); n != want {
				t.Errorf("after %d hours there were %d sweeps, want %d", hour, n, want)
			}
			time.Sleep(time.Hour)
		}
		end()
		before := sweeps.Load()
		time.Sleep(5 * time.Hour)
		if sweeps.Load() != before {
			t.Error("it sweeps on after its end")
		}
		if got := log.String(); strings.Count(got, "items=3") != int(before)-1 || strings.Count(got, "no room") != 1 {
			t.Errorf("logged:\n%s", got)
		}
	})
}

// The store is closed after end: a sweep under way has to be over by then.
func TestEndWaitsForTheSweep(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		var log bytes.Buffer
		over := false
		end := sweeper{every: time.Hour, log: slog.New(slog.NewTextHandler(&log, nil)),
			sweep: func(ctx context.Context) (int, error) {
				<-ctx.Done()
				time.Sleep(time.Second)
				over = true
				return 0, ctx.Err()
			}}.start(t.Context())
		synctest.Wait()
		end()
		if !over || log.Len() > 0 {
			t.Errorf("over: %t, logged %q", over, log.String())
		}
	})
}

func TestStoreThatClearsItselfIsNotSwept(t *testing.T) {
	for _, kind := range []string{"memory", "redis"} {
		s, err := openStore(storeSettings{Store: kind, RedisAddress: []string{"127.0.0.1:1"}}, "", process{getenv: noEnv})
		if err != nil {
			t.Fatal(err)
		}
		sweeper{sweep: s.sweep}.start(t.Context())() // a ticker of no interval would panic
		if err := s.Close(); err != nil {
			t.Error(err)
		}
	}
}

// What expired while the bot was off is out of the file when serve has ended.
func TestServeSweepsTheBoltFile(t *testing.T) {
	path := filepath.Join(t.TempDir(), "galeward.db")
	yesterday := func() time.Time { return time.Now().Add(-24 * time.Hour) }
	old, err := boltstore.Open(path, boltstore.Options{Now: yesterday})
	if err != nil {
		t.Fatal(err)
	}
	_, err = old.Do(t.Context(), "room", store.Op{Key: "k", Value: []byte("v"), Tag: "t", TTL: time.Hour})
	if err != nil || old.Close() != nil {
		t.Fatal(err)
	}
	_, s := workspace(t, "--store", "bolt", "--bolt-file", path)
	s.until("the sweep", func() bool { return strings.Contains(s.log.String(), `"expired items cleared","items":1`) })
	if code, _ := s.terminate(); code != exitDone {
		t.Errorf("exit code %d; log:\n%s", code, s.log)
	}
	again, err := boltstore.Open(path, boltstore.Options{})
	if err != nil {
		t.Fatal(err)
	}
	defer again.Close()
	if left, err := again.Sweep(t.Context()); left != 0 || err != nil {
		t.Errorf("%d expired items were left, error %v", left, err)
	}
}
