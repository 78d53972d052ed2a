package main

import (
	"context"
	"os"
	"os/signal"
	"syscall"
	_ "time/tzdata" // house rules name time zones, and an image from scratch has none
)

// version is set by the linker in a release.
var version = "dev"

func main() {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	context.AfterFunc(ctx, stop) // a second signal ends the process at once
	os.Exit(run(ctx, process{
		args: os.Args[1:], in: os.Stdin, out: os.Stdout, errs: os.Stderr, getenv: os.Getenv,
	}))
}
