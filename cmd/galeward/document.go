package main

import (
	"fmt"
	"io"
	"strings"

	"github.com/alecthomas/kong"
)

type settingsCommand struct{}

// Run prints the table of settings from the flags of serve, which has them all.
func (settingsCommand) Run(p process, app *kong.Application) error {
	var b strings.Builder
	b.WriteString("Settings of galeward serve and galeward chat. The first source that gives one\n" +
		"counts: the flag, the variable, the settings file, the default.\n")
	group := ""
	for _, child := range app.Children {
		if child.Name != "serve" {
			continue
		}
		for _, flag := range child.Flags {
			if flag.Group != nil && flag.Group.Title != group {
				group = flag.Group.Title
				fmt.Fprintf(&b, "\n%s\n", group)
			}
			document(&b, flag)
		}
	}
	_, err := io.WriteString(p.out, b.String())
	return err
}

// document prints one setting.
func document(b *strings.Builder, flag *kong.Flag) {
	fmt.Fprintf(b, "\n  %s", flag.Name)
	if flag.HasDefault && flag.Default != "" {
		fmt.Fprintf(b, ", by default %s", flag.Default)
	}
	fmt.Fprintf(b, "\n      --%s   %s\n", flag.Name, envName(flag.Name))
	if _, isSecret := flag.Target.Interface().(secretFile); isSecret {
		fmt.Fprintf(b, "      or the secret itself in %s\n", strings.TrimSuffix(envName(flag.Name), "_FILE"))
	}
	for _, line := range fold(flag.Help, 72) {
		fmt.Fprintf(b, "      %s\n", line)
	}
}

// fold breaks a text into lines of at most width bytes.
func fold(text string, width int) []string {
	var lines []string
	line := ""
	for _, word := range strings.Fields(text) {
		if line != "" && len(line)+1+len(word) > width {
			lines, line = append(lines, line), ""
		}
		line = strings.TrimPrefix(line+" "+word, " ")
	}
	return append(lines, line)
}
