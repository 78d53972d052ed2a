package console

import (
	"context"
	"fmt"
	"io"
	"strings"
	"unicode"

	"galeward/bot"
)

// way delivers the posts of one event by printing them.
type way struct {
	out     io.Writer
	width   int
	session string
	posts   int
	err     error
}

// Deliver prints a post. What has been printed can not be changed: an amended
// post is printed anew and says so.
func (w *way) Deliver(_ context.Context, post bot.Post) (bot.Ref, error) {
	text := post.Reply.Text()
	for _, chart := range post.Reply.Charts {
		text = strings.TrimPrefix(text+"\n"+chart.Alt, "\n")
	}
	if post.Amends != "" {
		text = "Amended:\n" + text
	}
	w.posts++
	// A blank line ends an answer, so that a long session can be read back.
	_, w.err = io.WriteString(w.out, Wrap(text, w.width)+"\n\n")
	return bot.Ref(fmt.Sprintf("%s/%d", post.Key, w.posts)), w.err
}

// hang is how far the second and later lines of a paragraph stand in.
const hang = "  "

// Wrap lays each line of text out in width columns. Words are not cut: one that
// is wider stands alone and runs over. Continued lines hang, so that a paragraph
// can be told from the next one. A width of 0 leaves the text as it is.
func Wrap(text string, width int) string {
	if width <= 0 {
		return text
	}
	var b strings.Builder
	for i, line := range strings.Split(text, "\n") {
		if i > 0 {
			b.WriteByte('\n')
		}
		wrapLine(&b, line, width)
	}
	return b.String()
}

// wrapLine breaks at plain spaces only: a no-break space keeps a number and its
// unit together.
func wrapLine(b *strings.Builder, line string, width int) {
	at := 0
	for i, word := range strings.Split(line, " ") {
		w := cells(word)
		switch {
		case i == 0:
		case at+1+w > width && w > 0 && at > len(hang):
			b.WriteString("\n" + hang)
			at = len(hang)
		default:
			b.WriteByte(' ')
			at++
		}
		b.WriteString(word)
		at += w
	}
}

// cells counts the columns of a word: marks that stand on the letter before
// them take none. The answers use no wide letters.
func cells(word string) int {
	n := 0
	for _, r := range word {
		if !unicode.Is(unicode.Mn, r) && !unicode.Is(unicode.Cf, r) {
			n++
		}
	}
	return n
}
