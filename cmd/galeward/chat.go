package main

import (
	"crypto/rand"

	"galeward/adapters/console"
)

type chatCommand struct {
	fileSetting   `group:"Settings file"`
	storeSettings `group:"Store"`
	House         string `name:"house" placeholder:"FILE" help:"House rules to begin with, JSON or YAML, as house export writes them."`
}

// Run answers on the terminal, or a pipe, until the input ends.
func (c *chatCommand) Run(ctx runContext, p process) error {
	// Only faults are logged: the log stands between the answers.
	log, err := newLog(p.errs, "error")
	if err != nil {
		return err
	}
	s, err := openStore(c.storeSettings, "memory", p)
	if err != nil {
		return err
	}
	defer func() { logged(log, "closing the store", s.Close()) }()
	b, err := newChatting(ctx, s, log, c.House)
	if err != nil {
		return err
	}
	session, err := console.New(console.Options{In: p.in, Out: p.out, Session: rand.Text()})
	if err != nil {
		return err
	}
	return session.Run(ctx, b)
}
