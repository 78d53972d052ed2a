package main

import (
	"bytes"
	"log/slog"
	"net/http"
	"net/http/httptest"
	"strings"
	"testing"
)

// No log, neither ours nor the server's, holds the value of a panic; the next
// request is served.
func TestPanicOfARequestIsLoggedWithoutItsValue(t *testing.T) {
	var log bytes.Buffer
	logger := slog.New(slog.NewJSONHandler(&log, &slog.HandlerOptions{Level: slog.LevelDebug}))
	server := httptest.NewUnstartedServer(contain(http.HandlerFunc(func(_ http.ResponseWriter, r *http.Request) {
		if r.URL.Path == "/fault" {
			panic("at 7.27/72/54/32")
		}
	}), logger))
	server.Config.ErrorLog = slog.NewLogLogger(logger.Handler(), slog.LevelDebug)
	server.Start()
	if resp, err := http.Get(server.URL + "/fault"); err == nil {
		resp.Body.Close()
		t.Errorf("a fault is answered with %d", resp.StatusCode)
	}
	resp, err := http.Get(server.URL + "/")
	if err != nil || resp.StatusCode != http.StatusOK {
		t.Fatalf("the next request: %v", err)
	}
	resp.Body.Close()
	server.Close() // waits for the requests, so the log is whole
	got := log.String()
	if strings.Contains(got, "7.27") || !strings.Contains(got, `"type":"string"`) || !strings.Contains(got, "contain_test.go") {
		t.Errorf("logged %s", got)
	}
}
