package console

import (
	"errors"
	"io"
	"strings"
	"testing"

	"golang.org/x/term"
)

// keys is a terminal on which keys were pressed.
func keys(pressed string) *editedLines {
	t := term.NewTerminal(struct {
		io.Reader
		io.Writer
	}{strings.NewReader(pressed), io.Discard}, prompt)
	t.SetBracketedPasteMode(true)
	return &editedLines{t, io.Discard}
}

const (
	pasteBegins = "\x1b[200~"
	pasteEnds   = "\x1b[201~"
	up          = "\x1b[A"
	ctrlC       = "\x03"
	ctrlD       = "\x04"
	backspace   = "\x7f"
)

func TestEditedLines(t *testing.T) {
	for _, c := range []struct {
		name, pressed string
		want          []string
	}{
		{"typed lines are messages", "one\rtwo\r", []string{"one", "two"}},
		{"a slip of the finger", "onr" + backspace + "e\r", []string{"one"}},
		{"the line before comes back", "one\r" + up + "!\r", []string{"one", "one!"}},
		{"a paste waits for Enter", pasteBegins + "a\rb\r" + pasteEnds + "\r", []string{"a\nb"}},
		{"a paste that ends in a line", pasteBegins + "a\rb" + pasteEnds + "\r", []string{"a\nb"}},
		{"a paste of one line is a line", pasteBegins + "a" + pasteEnds + "\r", []string{"a"}},
		{"typing behind a paste belongs to it", pasteBegins + "a\r" + pasteEnds + "b\r", []string{"a\nb"}},
		{"Ctrl-D ends", "one\r" + ctrlD + "two\r", []string{"one"}},
		{"Ctrl-C ends", "one\r" + "tw" + ctrlC + "o\r", []string{"one"}},
	} {
		lines := keys(c.pressed)
		var got []string
		for {
			text, err := lines.next()
			if err != nil {
				if !errors.Is(err, io.EOF) {
					t.Errorf("%s: %v", c.name, err)
				}
				break
			}
			got = append(got, text)
		}
		if strings.Join(got, "|") != strings.Join(c.want, "|") {
			t.Errorf("%s: got %q, want %q", c.name, got, c.want)
		}
	}
}
