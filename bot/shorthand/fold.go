package shorthand

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// maxBytes is where a message is cut. The longest useful one, a shift's bed
// list with every setting, is below 4 KiB; whoever pastes a megabyte gets an
// answer about its beginning and costs no more than that.
const maxBytes = 16 << 10

// fold turns a message into plain ASCII with the layout normalised: digits of
// all scripts and widths, dashes, slashes, quotes, spaces, look-alike letters,
// charges and key caps. Upper case is kept, since names are found by it.
// Everything that has no ASCII meaning, such as an emoji, becomes a space.
func fold(text string) string {
	if len(text) > maxBytes {
		text = text[:maxBytes]
	}
	if isFolded(text) {
		return doubledPoint(text)
	}
	text = entities.Replace(text)
	var b strings.Builder
	b.Grow(len(text))
	for i := 0; i < len(text); {
		r, n := utf8.DecodeRuneInString(text[i:])
		i += n
		foldRune(&b, r)
	}
	return doubledPoint(b.String())
}

// isFolded says that the text is plain ASCII already, as most lines are.
func isFolded(text string) bool {
	for i := 0; i < len(text); i++ {
		if c := text[i]; (c < ' ' || c >= 0x7f || c == '&') && c != '\n' && c != '\t' {
			return false
		}
	}
	return true
}

// entities undoes the escapes that some platforms leave in the text.
var entities = strings.NewReplacer("&lt;", "<", "&gt;", ">", "&amp;", "&", "&nbsp;", " ",
	"&quot;", `"`, "&#39;", "'", "\r\n", "\n", "\r", "\n", "\u2028", "\n", "\u2029", "\n")

func foldRune(b *strings.Builder, r rune) {
	switch {
	case r == '\n' || r == '\t' || r >= ' ' && r < 0x7f:
		b.WriteRune(r)
	case r < ' ' || r == 0x7f || r == utf8.RuneError:
		b.WriteByte(' ')
	case r >= 0xFF01 && r <= 0xFF5E: // full width
		b.WriteRune(r - 0xFEE0)
	case r >= 0x2080 && r <= 0x2089: // subscripts
		b.WriteRune('0' + r - 0x2080)
	default:
		foldOther(b, r)
	}
}

func foldOther(b *strings.Builder, r rune) {
	if s, ok := foldTable()[r]; ok {
		b.WriteString(s)
		return
	}
	if d, ok := digitOf(r); ok {
		b.WriteByte('0' + d)
		return
	}
	if unicode.Is(unicode.Mn, r) || unicode.Is(unicode.Cf, r) || unicode.Is(unicode.Me, r) {
		return // accents, joiners, key caps, marks of direction
	}
	b.WriteByte(' ')
}

// digitOf gives the value of a decimal digit of any script: each block of the
// table holds whole runs of ten.
func digitOf(r rune) (byte, bool) {
	for _, rng := range unicode.Nd.R16 {
		if uint32(r) >= uint32(rng.Lo) && uint32(r) <= uint32(rng.Hi) {
			return byte((uint32(r) - uint32(rng.Lo)) % 10), true
		}
	}
	for _, rng := range unicode.Nd.R32 {
		if uint32(r) >= rng.Lo && uint32(r) <= rng.Hi {
			return byte((uint32(r) - rng.Lo) % 10), true
		}
	}
	return 0, false
}

// doubledPoint reads "7..28" as one point.
func doubledPoint(s string) string {
	if !strings.Contains(s, "..") {
		return s
	}
	var b strings.Builder
	for i := 0; i < len(s); i++ {
		if s[i] == '.' && i > 0 && i+2 < len(s) && isDigit(s[i-1]) && s[i+1] == '.' && isDigit(s[i+2]) {
			continue
		}
		b.WriteByte(s[i])
	}
	return b.String()
}

func isDigit(c byte) bool { return c >= '0' && c <= '9' }

func isLetter(c byte) bool { return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' }

// stripText takes out what is text of the platform and not of the typist:
// tags with their script, mentions, addresses of pages.
func stripText(s string) string {
	if !strings.Contains(s, "<") && !strings.Contains(s, "://") {
		return s
	}
	var b strings.Builder
	for i := 0; i < len(s); {
		if n := skipTag(s[i:]); n > 0 {
			b.WriteByte(' ')
			i += n
			continue
		}
		if n := skipLink(s, i); n > 0 {
			b.WriteByte(' ')
			i += n
			continue
		}
		b.WriteByte(s[i])
		i++
	}
	return b.String()
}

// skipTag gives the length of a tag or mention in angle brackets at the start
// of s; a script goes with its content. "<20" is no tag.
func skipTag(s string) int {
	const longest = 200
	if len(s) < 3 || s[0] != '<' || !isLetter(s[1]) && !strings.ContainsRune("/@#!", rune(s[1])) {
		return 0
	}
	end := strings.IndexByte(s[:min(len(s), longest)], '>')
	if end < 0 {
		return 0
	}
	for _, name := range []string{"script", "style"} {
		if len(s) > len(name) && strings.EqualFold(s[1:1+len(name)], name) {
			if at := strings.Index(strings.ToLower(s[:min(len(s), maxBytes)]), "</"+name); at > 0 {
				return at
			}
		}
	}
	return end + 1
}

// skipLink gives the length of a page address at i.
func skipLink(s string, i int) int {
	if s[i] != 'h' && s[i] != 'H' {
		return 0
	}
	low := strings.ToLower(s[i:min(len(s), i+8)])
	if !strings.HasPrefix(low, "http://") && !strings.HasPrefix(low, "https://") {
		return 0
	}
	if n := strings.IndexAny(s[i:], " \n\t>"); n > 0 {
		return n
	}
	return len(s) - i
}
