package main

import (
	"io"
	"log/slog"
)

// newLog writes one JSON object a line. What goes in is chosen where it is
// logged: ids, kinds, counts and durations, never typed text, values or secrets.
func newLog(w io.Writer, level string) (*slog.Logger, error) {
	var l slog.Level
	if err := l.UnmarshalText([]byte(level)); err != nil {
		return nil, usageError{err}
	}
	return slog.New(slog.NewJSONHandler(w, &slog.HandlerOptions{Level: l})), nil
}
