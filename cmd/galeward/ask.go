package main

import (
	"bufio"
	"context"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"
	"time"

	"galeward/bot"
)

type askCommand struct {
	JSON   bool     `name:"json" help:"Print one JSON object a message, on one line."`
	House  string   `name:"house" placeholder:"FILE" help:"House rules, JSON or YAML, as house export writes them."`
	Thread bool     `name:"thread" help:"Take all messages as one thread. Else each is its own."`
	Text   []string `arg:"" optional:"" help:"The message. Without it, each line of standard input is one."`
}

// Run answers and prints. Nothing is kept when it ends.
func (c *askCommand) Run(ctx runContext, p process) error {
	b, err := newAsking(ctx, openMemory(), c.House)
	if err != nil {
		return err
	}
	a := asker{bot: b, json: c.JSON, thread: c.Thread, out: bufio.NewWriter(p.out)}
	if len(c.Text) > 0 {
		err = a.answer(ctx, unshield(c.Text))
	} else {
		err = a.lines(ctx, p.in)
	}
	if err == nil && a.troubled {
		err = errors.New("not every message was answered")
	}
	return err
}

// asker answers messages without a platform: no adapter, no delivery.
type asker struct {
	bot          *bot.Bot
	json, thread bool
	out          *bufio.Writer
	asked        int  // messages of the thread so far: their ids
	printed      bool // an answer stands already: the next one needs a blank line
	troubled     bool // an answer was kind trouble
}

// lines answers line by line.
func (a *asker) lines(ctx context.Context, in io.Reader) error {
	next := readLines(ctx, in)
	for {
		select {
		case <-ctx.Done():
			return errors.New("interrupted")
		case l := <-next:
			if l.text != "" {
				if err := a.answer(ctx, strings.TrimRight(l.text, "\r\n")); err != nil {
					return err
				}
			}
			if l.err != nil {
				return endOfInput(l.err)
			}
		}
	}
}

// inputLine is a line with its end, and what ended the input.
type inputLine struct {
	text string
	err  error
}

// readLines reads on its own, so that a signal ends a wait for input. The last
// line carries the error that ended the input.
func readLines(ctx context.Context, in io.Reader) <-chan inputLine {
	next := make(chan inputLine)
	go func() {
		r := bufio.NewReaderSize(in, 64<<10)
		for {
			text, err := r.ReadString('\n')
			select {
			case next <- inputLine{text, err}:
			case <-ctx.Done():
				return
			}
			if err != nil {
				return
			}
		}
	}()
	return next
}

func endOfInput(err error) error {
	if errors.Is(err, io.EOF) {
		return nil
	}
	return fmt.Errorf("reading standard input: %w", err)
}

// answer prints the answer to one message and flushes it.
func (a *asker) answer(ctx context.Context, text string) error {
	answer := a.bot.Answer(ctx, a.event(text))
	a.troubled = a.troubled || answer.Machine.Kind == "trouble"
	if err := a.print(answer); err != nil {
		return err
	}
	return a.out.Flush()
}

// event is a message of the one thread, or one that stands alone: without a
// thread, an id and a user there is nothing to remember it by, not even that it
// was asked. The house rules hold for both.
func (a *asker) event(text string) bot.Event {
	e := bot.Event{Kind: bot.Typed, Where: askPlace(), Text: text, At: time.Now(), Listening: true}
	if a.thread {
		a.asked++
		e.Delivery = strconv.Itoa(a.asked)
		e.Message, e.Where.Thread = e.Delivery, "1"
	}
	return e
}

// askPlace is the one channel of ask.
func askPlace() bot.Place {
	return bot.Place{Platform: "ask", Workspace: "local", Channel: "ask"}
}

// print writes an answer; errors of the buffer show in Flush.
func (a *asker) print(answer bot.Answer) error {
	if a.json {
		line, err := answer.Machine.JSON()
		if err != nil {
			return err
		}
		a.out.Write(line)
		return a.out.WriteByte('\n')
	}
	text := answer.Text()
	if text == "" {
		return nil
	}
	if a.printed {
		a.out.WriteByte('\n')
	}
	a.printed = true
	a.out.WriteString(text)
	return a.out.WriteByte('\n')
}
