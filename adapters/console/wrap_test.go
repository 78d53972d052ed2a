package console_test

import (
	"strings"
	"testing"
	"unicode/utf8"

	"galeward/adapters/console"
)

func TestWrap(t *testing.T) {
	for _, c := range []struct {
		name, text string
		width      int
		want       string
	}{
		{"fits", "pH 7.40", 40, "pH 7.40"},
		{"exactly fits", "12345 789", 9, "12345 789"},
		{"one over", "12345 789", 8, "12345\n  789"},
		{"hanging lines are narrower", "a bb ccc dd e", 5, "a bb\n  ccc\n  dd\n  e"},
		{"paragraphs stay", "a b\nc d", 3, "a b\nc d"},
		{"empty lines stay", "a\n\nb", 3, "a\n\nb"},
		{"a long word stands alone, uncut", "x 123456789 y", 6, "x 123456789\n  y"},
		{"no-break space holds", "PaO2 54\u00a0mmHg", 10, "PaO2\n  54\u00a0mmHg"},
		{"marks take no room", "e\u0301e\u0301 ab", 5, "e\u0301e\u0301 ab"},
		{"no width", "a b c", 0, "a b c"},
	} {
		if got := console.Wrap(c.text, c.width); got != c.want {
			t.Errorf("%s: Wrap(%q, %d) = %q, want %q", c.name, c.text, c.width, got, c.want)
		}
	}
}

// Whatever the text and the width: no word is lost, cut or moved, and a line is
// wider than the terminal only when its last word could not have been moved down.
func FuzzWrap(f *testing.F) {
	f.Add("Read: pH 7.27, PaCO2 72, PaO2 54 mmHg, HCO3 32 mmol/L (fits), FiO2 40 %.", 40)
	f.Add("a  b\n\n c", 1)
	f.Fuzz(func(t *testing.T, text string, width int) {
		width %= 200
		if strings.ContainsFunc(text, func(r rune) bool { return r > 0x7e && r < 0xa1 || r > 0x2ff }) {
			return // one column a letter, so that the test can count them
		}
		got := console.Wrap(text, width)
		if a, b := strings.Join(strings.Fields(got), " "), strings.Join(strings.Fields(text), " "); a != b {
			t.Fatalf("words changed: %q became %q", b, a)
		}
		for _, line := range strings.Split(got, "\n") {
			line = strings.TrimRight(line, " ")
			last := utf8.RuneCountInString(line[:strings.LastIndexByte(line, ' ')+1])
			if width > 0 && utf8.RuneCountInString(line) > width && last > 3 && !strings.ContainsRune(line, '\u00ad') {
				t.Fatalf("line %q is wider than %d and could be broken", line, width)
			}
		}
	})
}
