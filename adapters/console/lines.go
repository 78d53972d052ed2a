package console

import (
	"bufio"
	"errors"
	"io"
	"os"
	"strings"

	"golang.org/x/term"
)

// lines gives one message after the other, and io.EOF at the end.
type lines interface {
	next() (string, error)
}

// plainLines reads a pipe or a file: each line is a message.
type plainLines struct{ in *bufio.Reader }

func newPlainLines(in io.Reader) *plainLines { return &plainLines{bufio.NewReader(in)} }

func (p *plainLines) next() (string, error) {
	line, err := p.in.ReadString('\n')
	if err != nil && line != "" && errors.Is(err, io.EOF) {
		err = nil // the last line needs no line end
	}
	return strings.TrimRight(line, "\r\n"), err
}

// The prompts are of one width, so that pasted lines stand under each other.
const (
	prompt     = "gas> "
	promptMore = "...> "
)

// editedLines reads a terminal with line editing, and a history that is never
// written anywhere. Lines that are pasted in one go are one message: a print-out
// copied from a monitor is one slip.
type editedLines struct {
	term *term.Terminal
	raw  io.Writer
}

func (e *editedLines) next() (string, error) {
	e.term.SetPrompt(prompt)
	var message []string
	for {
		line, err := e.term.ReadLine()
		pasted := errors.Is(err, term.ErrPasteIndicator)
		if err != nil && !pasted {
			io.WriteString(e.raw, "\r\n") // what comes next must not stand behind the prompt
			return "", err
		}
		if line != "" || pasted {
			message = append(message, line)
		}
		if !pasted {
			return strings.Join(message, "\n"), nil
		}
		e.term.SetPrompt(promptMore)
	}
}

// onTerminal says whether both ends are a terminal that can be edited on.
func onTerminal(in io.Reader, out io.Writer) (*os.File, *os.File, bool) {
	i, isFile := in.(*os.File)
	o, isFileToo := out.(*os.File)
	if !isFile || !isFileToo || !term.IsTerminal(int(i.Fd())) || !term.IsTerminal(int(o.Fd())) {
		return nil, nil, false
	}
	return i, o, true
}

// edit prepares a session on a terminal.
func (c *Console) edit(in, out *os.File) error {
	was, err := term.MakeRaw(int(in.Fd()))
	if err != nil {
		return err
	}
	t := term.NewTerminal(struct {
		io.Reader
		io.Writer
	}{in, out}, prompt)
	t.SetBracketedPasteMode(true)
	c.out, c.lines = t, &editedLines{t, out}
	c.width = func() int { return columns(out, t) }
	c.restore = func() error {
		t.SetBracketedPasteMode(false)
		return term.Restore(int(in.Fd()), was)
	}
	return nil
}

// usual is the width of a terminal that does not tell.
const usual = 80

// columns asks for the width before each answer, as windows are resized, and
// passes it on to the line editor.
func columns(out *os.File, t *term.Terminal) int {
	w, h, err := term.GetSize(int(out.Fd()))
	if err != nil || w <= 0 || h <= 0 {
		return usual
	}
	if t.SetSize(w, h) != nil {
		return usual
	}
	return w
}
