package shorthand

// tokenKind is what a token is.
type tokenKind uint8

const (
	tokWord tokenKind = iota
	tokNumber
	tokSep
	tokClock // a clock time
	tokArrow
)

// token is one piece of a line.
type token struct {
	kind tokenKind
	// s is the word in lower case, the digits as typed, or the separator.
	s string
	v float64
	// sign is '+' or '-' when one stands directly before the digits.
	sign byte
	// than is '<' or '>' when one stands directly before the digits.
	than     byte
	percent  bool
	decimals int
	// glued tokens follow the one before without a blank.
	glued bool
	line  int
	// at and end are offsets in the folded text.
	at, end int
	e       *entry
	used    bool
	// taken marks a number that belongs to a word that is no value.
	taken bool
}

func (t *token) is(s sense) bool { return t.kind == tokWord && t.e != nil && t.e.sense == s }

func (t *token) word(w string) bool { return t.kind == tokWord && t.s == w }

func (t *token) sep(chars string) bool {
	if t.kind != tokSep {
		return false
	}
	for i := 0; i < len(chars); i++ {
		if t.s[0] == chars[i] {
			return true
		}
	}
	return false
}

// free says that the token is a number that nothing has used.
func (t *token) free() bool { return t.kind == tokNumber && !t.used && !t.taken }

// signed is the number with a typed minus.
func (t *token) signed() float64 {
	if t.sign == '-' {
		return -t.v
	}
	return t.v
}

// typed is the token as typed: digits and signs only.
func (t *token) typed() string {
	s := t.s
	if t.sign != 0 {
		s = string(t.sign) + s
	}
	if t.than != 0 {
		s = string(t.than) + s
	}
	if t.percent {
		s += "%"
	}
	return s
}
