package main

import (
	"fmt"
	"runtime/debug"
)

// commandLine is the grammar of the command line.
type commandLine struct {
	Ask      askCommand      `cmd:"" help:"Answer one message, or one message a line of standard input."`
	Chat     chatCommand     `cmd:"" help:"Answer on this terminal until you leave."`
	Serve    serveCommand    `cmd:"" help:"Answer in a chat platform."`
	Settings settingsCommand `cmd:"" help:"Print every setting with its flag, variable, key and default."`
	Version  versionCommand  `cmd:"" help:"Print the version."`
}

// askLine is the part of the grammar that ask needs. Building the whole one
// takes longer than an answer, and ask is started once for each question.
type askLine struct {
	Ask askCommand `cmd:"" help:"Answer one message, or one message a line of standard input."`
}

// grammar gives what is needed to parse the arguments.
func grammar(args []string) any {
	if len(args) > 0 && args[0] == "ask" {
		return new(askLine)
	}
	return new(commandLine)
}

type versionCommand struct{}

// Run prints the version and the commit that the binary was built from.
func (versionCommand) Run(p process) error {
	_, err := fmt.Fprintln(p.out, "galeward", fullVersion())
	return err
}

// fullVersion adds the commit, where the build knows it.
func fullVersion() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return version
	}
	for _, s := range info.Settings {
		if s.Key == "vcs.revision" && len(s.Value) >= 12 {
			return version + " " + s.Value[:12]
		}
	}
	return version
}
