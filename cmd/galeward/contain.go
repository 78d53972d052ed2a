package main

import (
	"fmt"
	"log/slog"
	"net/http"
	"runtime/debug"
)

// contain keeps a fault in one request from the server's own log, which would
// print the value of the panic, and with it perhaps what was typed.
func contain(next http.Handler, log *slog.Logger) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		defer func() {
			v := recover()
			if v == nil {
				return
			}
			log.Error("recovered from a panic", "type", fmt.Sprintf("%T", v), "stack", string(debug.Stack()))
			panic(http.ErrAbortHandler) // the server drops the connection without a word
		}()
		next.ServeHTTP(w, r)
	})
}
