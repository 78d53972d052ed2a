package main

import (
	"bytes"
	"context"
	"errors"
	"io"
	"slices"
	"strings"
	"testing"
	"time"
)

func noEnv(string) string { return "" }

type goneWriter struct{}

func (goneWriter) Write([]byte) (int, error) { return 0, errors.New("nobody reads this") }

func TestOutputThatIsGoneIsAFailure(t *testing.T) {
	for _, args := range [][]string{{"ask", usualLine}, {"ask", "--json", usualLine}, {"version"}, {"settings"}} {
		var errs bytes.Buffer
		code := run(t.Context(), process{args: args, out: goneWriter{}, errs: &errs, getenv: noEnv})
		if code != exitFailed || !strings.Contains(errs.String(), "nobody reads this") {
			t.Errorf("%v: exit %d, %q", args, code, errs.String())
		}
	}
}

type throwingWriter struct{}

func (throwingWriter) Write(p []byte) (int, error) { panic("at " + string(p)) }

// A fault of ours ends with a code and names its place, and quotes nothing.
func TestFaultQuotesNothing(t *testing.T) {
	var errs bytes.Buffer
	code := run(t.Context(), process{args: []string{"ask", usualLine}, out: throwingWriter{}, errs: &errs, getenv: noEnv})
	got := errs.String()
	if code != exitFailed || !strings.Contains(got, "type string") || !strings.Contains(got, "throwingWriter") {
		t.Errorf("exit %d, %q", code, got)
	}
	if strings.Contains(got, "7.27") {
		t.Errorf("the fault quotes what was typed: %q", got)
	}
}

type goneReader struct{}

func (goneReader) Read([]byte) (int, error) { return 0, errors.New("nobody writes this") }

func TestInputThatBreaksIsAFailure(t *testing.T) {
	var errs bytes.Buffer
	code := run(t.Context(), process{args: []string{"ask"}, in: goneReader{}, out: io.Discard, errs: &errs, getenv: noEnv})
	if code != exitFailed || !strings.Contains(errs.String(), "nobody writes this") {
		t.Errorf("exit %d, %q", code, errs.String())
	}
}

func TestSignalEndsAWaitForInput(t *testing.T) {
	for _, args := range [][]string{{"ask"}, {"chat"}} {
		in, typing := io.Pipe()
		ctx, stop := context.WithCancel(t.Context())
		done := make(chan int, 1)
		go func() {
			done <- run(ctx, process{args: args, in: in, out: io.Discard, errs: io.Discard, getenv: noEnv})
		}()
		stop()
		select {
		case <-done:
		case <-time.After(5 * time.Second):
			t.Errorf("%v still waits", args)
		}
		typing.Close()
	}
}

func TestHelpGoesToStandardOutput(t *testing.T) {
	var out, errs bytes.Buffer
	if code := run(t.Context(), process{args: []string{"--help"}, out: &out, errs: &errs, getenv: noEnv}); code != exitDone {
		t.Errorf("exit %d", code)
	}
	for _, command := range []string{"ask", "chat", "serve", "settings", "version"} {
		if !strings.Contains(out.String(), command) {
			t.Errorf("help does not name %s", command)
		}
	}
	if errs.Len() > 0 {
		t.Errorf("standard error: %q", errs.String())
	}
}

// A negative number is a value; a flag stays a flag.
func TestNegativeNumbersAreNoFlags(t *testing.T) {
	got := shield([]string{"ask", "--json", "-5", "-.5", "-h", "-", "be"})
	if want := []string{"ask", "--json", mark + "-5", mark + "-.5", "-h", "-", "be"}; !slices.Equal(got, want) {
		t.Errorf("shielded %q, want %q", got, want)
	}
	if got := unshield([]string{"be", mark + "-5"}); got != "be -5" {
		t.Errorf("the message is %q", got)
	}
}

func TestStateFolder(t *testing.T) {
	for name, c := range map[string]struct {
		named string
		env   map[string]string
		want  string
		bad   bool
	}{
		"named":        {named: "/a", env: map[string]string{"STATE_DIRECTORY": "/b"}, want: "/a"},
		"of a service": {env: map[string]string{"STATE_DIRECTORY": "/b", "HOME": "/d"}, want: "/b"},
		"of a desktop": {env: map[string]string{"XDG_STATE_HOME": "/c", "HOME": "/d"}, want: "/c/galeward"},
		"of a user":    {env: map[string]string{"HOME": "/d"}, want: "/d/.local/state/galeward"},
		"of nobody":    {bad: true},
	} {
		got, err := stateDir(c.named, func(k string) string { return c.env[k] })
		if got != c.want || (err != nil) != c.bad {
			t.Errorf("%s: %q, %v", name, got, err)
		}
	}
}

func TestFold(t *testing.T) {
	if got := fold("one two  three", 7); !slices.Equal(got, []string{"one two", "three"}) {
		t.Errorf("folded %q", got)
	}
}
