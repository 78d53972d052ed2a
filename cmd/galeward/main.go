package main

import (
	"context"
	"os"
	"os/signal"
	"runtime/debug"
	"syscall"
	_ "time/tzdata" // house rules name time zones, and an image from scratch has none
)

// version is set by the linker in a release.
var version = "dev"

// An answer leaves little behind that lives on. Collecting less often makes it a
// fifth quicker and costs some 20 MiB; near the limit collecting gets eager again.
const (
	gcPercent   = 400
	memoryLimit = 192 << 20
)

func tune() {
	debug.SetGCPercent(gcPercent)
	debug.SetMemoryLimit(memoryLimit)
}

func main() {
	tune()
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	context.AfterFunc(ctx, stop) // a second signal ends the process at once
	os.Exit(run(ctx, process{
		args: os.Args[1:], in: os.Stdin, out: os.Stdout, errs: os.Stderr, getenv: os.Getenv,
	}))
}
