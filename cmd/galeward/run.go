package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"runtime/debug"
	"strings"

	"github.com/alecthomas/kong"
)

// process is what the world gives to a run, so that tests can give their own.
type process struct {
	args   []string
	in     io.Reader
	out    io.Writer
	errs   io.Writer
	getenv func(string) string
}

// The exit codes: see the package's doc.
const (
	exitDone   = 0
	exitFailed = 1
	exitUsage  = 2
)

// usageError is an error that the caller of the program can cure: exit code 2.
type usageError struct{ error }

func (e usageError) Unwrap() error { return e.error }

func usagef(format string, args ...any) error { return usageError{fmt.Errorf(format, args...)} }

// left is thrown where kong would end the process, after it printed help.
type left int

// run carries out one command line and gives the exit code.
func run(ctx context.Context, p process) (code int) {
	defer func() {
		if v := recover(); v != nil {
			code = thrown(p.errs, v)
		}
	}()
	err := parseAndRun(ctx, p)
	if err == nil {
		return exitDone
	}
	fmt.Fprintf(p.errs, "galeward: %v\n", err)
	var usage usageError
	if errors.As(err, &usage) {
		return exitUsage
	}
	return exitFailed
}

// thrown gives the exit code for what was thrown. The value of a fault may
// quote what was typed: only its type is printed, and where it came from.
func thrown(errs io.Writer, v any) int {
	if l, ok := v.(left); ok {
		return int(l)
	}
	fmt.Fprintf(errs, "galeward: a fault of the program, of type %T\n%s", v, debug.Stack())
	return exitFailed
}

func parseAndRun(ctx context.Context, p process) error {
	parser, err := kong.New(grammar(p.args),
		kong.Name("galeward"),
		kong.Description("Reads blood-gas values from a typed line and says how ventilation and oxygenation stand."),
		kong.Writers(p.out, p.errs),
		kong.Exit(func(code int) { panic(left(code)) }),
		kong.Resolvers(&resolver{getenv: p.getenv}),
		kong.ConfigureHelp(kong.HelpOptions{Compact: true}),
	)
	if err != nil {
		return err
	}
	command, err := parser.Parse(shield(p.args))
	if err != nil {
		return usagef("%w (galeward --help shows what can be typed)", err)
	}
	return command.Run(runContext{ctx}, p, parser.Model)
}

// runContext carries the context to a command: kong binds values by type.
type runContext struct{ context.Context }

// mark stands before an argument such as -5, which is a value and no flag. It
// can not come from a command line, where arguments end at a zero byte.
const mark = "\x00"

// shield marks arguments that begin with a negative number.
func shield(args []string) []string {
	marked := make([]string, len(args))
	for i, a := range args {
		if len(a) > 1 && a[0] == '-' && (a[1] == '.' || a[1] >= '0' && a[1] <= '9') {
			a = mark + a
		}
		marked[i] = a
	}
	return marked
}

// unshield takes the marks off again and joins what is one message.
func unshield(args []string) string {
	return strings.ReplaceAll(strings.Join(args, " "), mark, "")
}
