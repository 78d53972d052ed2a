// Package console is the chat adapter of a terminal: typed lines in, answers
// out, as plain text.
//
// # What lives here
//
// The loop of one session, reading with line editing and a history in memory
// on a terminal and plain lines from a pipe, and the laying out of an answer
// in the width of the terminal. One session is one thread.
//
// # What does not
//
// No words of an answer, no reading of values, no physiology: the text is
// printed as the core wrote it. Nothing typed is written to a file.
package console

import (
	"context"
	"errors"
	"fmt"
	"io"
	"strings"
	"time"

	"galeward/bot"
)

// Platform is the name of this adapter in a bot.Place.
const Platform = "console"

// Options are what a session is made of.
type Options struct {
	In  io.Reader
	Out io.Writer
	// Session names the thread of this session. It must differ from the names
	// of earlier sessions whose store is still used.
	Session string
	// Now is the clock, nil for time.Now.
	Now func() time.Time
}

// Console is one session.
type Console struct {
	out     io.Writer
	lines   lines
	width   func() int // columns, 0 when not on a terminal
	restore func() error
	session string
	now     func() time.Time
	asked   int
}

// New makes a session. On a terminal it puts the terminal into raw mode, which
// Run undoes when it returns.
func New(o Options) (*Console, error) {
	c := &Console{session: o.Session, now: o.Now}
	if c.now == nil {
		c.now = time.Now
	}
	if in, out, ok := onTerminal(o.In, o.Out); ok {
		return c, c.edit(in, out)
	}
	c.out = o.Out
	c.lines = newPlainLines(o.In)
	c.width = func() int { return 0 }
	c.restore = func() error { return nil }
	return c, nil
}

// Run answers line after line until the input ends, someone types quit or
// exit, or ctx is done. The error is a fault of the input or the output.
func (c *Console) Run(ctx context.Context, h bot.Handler) (err error) {
	defer func() { err = errors.Join(err, c.restore()) }()
	if c.width() > 0 {
		fmt.Fprintln(c.out, Wrap("Type values, or help. Leave with quit or Ctrl-D.", c.width()))
	}
	for {
		text, err := c.read(ctx)
		if err != nil || leaving(text) {
			return ended(err)
		}
		if strings.TrimSpace(text) == "" {
			continue
		}
		if err := c.answer(ctx, h, text); err != nil {
			return err
		}
	}
}

// read waits for a line or for the end of ctx. A read that is under way when
// ctx ends can not be called back; it ends with the process.
func (c *Console) read(ctx context.Context) (string, error) {
	type result struct {
		text string
		err  error
	}
	done := make(chan result, 1)
	go func() {
		text, err := c.lines.next()
		done <- result{text, err}
	}()
	select {
	case r := <-done:
		return r.text, r.err
	case <-ctx.Done():
		return "", io.EOF
	}
}

// answer lets the bot handle one message. A silent bot is told apart from a
// stuck one by a faint word, on a terminal only: a pipe carries answers alone.
func (c *Console) answer(ctx context.Context, h bot.Handler, text string) error {
	c.asked++
	w := &way{out: c.out, width: c.width(), session: c.session}
	h.Handle(ctx, c.event(text), w)
	if w.posts == 0 && w.width > 0 && w.err == nil {
		_, w.err = fmt.Fprintln(c.out, faint("(silent)"))
	}
	return w.err
}

func (c *Console) event(text string) bot.Event {
	id := fmt.Sprintf("%s-%d", c.session, c.asked)
	return bot.Event{
		Kind: bot.Typed, Delivery: id, Message: id,
		Where: Place(c.session),
		User:  "you", Text: text, At: c.now(), Listening: true,
	}
}

// Place is where the events of a session happen: one channel for all sessions,
// and a thread for each.
func Place(session string) bot.Place {
	return bot.Place{Platform: Platform, Workspace: "local", Channel: "chat", Thread: session}
}

func leaving(text string) bool {
	switch strings.ToLower(strings.TrimSpace(text)) {
	case "quit", "exit":
		return true
	}
	return false
}

// ended makes the usual end of input no error.
func ended(err error) error {
	if errors.Is(err, io.EOF) {
		return nil
	}
	return err
}

func faint(s string) string { return "\x1b[2m" + s + "\x1b[0m" }
