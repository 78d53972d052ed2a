package shorthand

import (
	"strconv"
	"strings"
)

// lexer cuts a folded, lower-case line into tokens.
type lexer struct {
	s    string
	i    int
	line int
	out  []token
	// house are the channel's own words that may be glued to a number.
	gap bool
	// dots is set within numbers that are separated by points: 7.28.58.62.
	dots bool
}

// lex cuts s into tokens. Phrases of several words become one token, percent
// signs join their number.
func lex(s string) []token {
	l := &lexer{s: s, gap: true, out: make([]token, 0, len(s)/2+4)}
	for l.i < len(l.s) {
		l.next()
	}
	return joinSpoken(joinPhrases(l.out))
}

func (l *lexer) next() {
	c := l.s[l.i]
	switch {
	case c == ' ' || c == '\t':
		l.i++
		l.gap, l.dots = true, false
		return
	case c == '\n':
		l.add(token{kind: tokSep, s: "\n", at: l.i, end: l.i + 1})
		l.line++
		l.i++
		l.gap = true
		return
	case isDigit(c) || c == '.' && l.digitAt(l.i+1) && !l.dots:
		l.number(0, 0)
	case isLetter(c):
		l.letters()
	default:
		l.sign(c)
	}
	l.gap = false
}

func (l *lexer) digitAt(i int) bool { return i >= 0 && i < len(l.s) && isDigit(l.s[i]) }

func (l *lexer) byteAt(i int) byte {
	if i < 0 || i >= len(l.s) {
		return ' '
	}
	return l.s[i]
}

func (l *lexer) add(t token) {
	t.line, t.glued = l.line, !l.gap
	l.out = append(l.out, t)
}

// sign lexes everything that is neither digit nor letter.
func (l *lexer) sign(c byte) {
	at := l.i
	starts := l.digitAt(at+1) || l.byteAt(at+1) == '.' && l.digitAt(at+2)
	switch {
	case strings.HasPrefix(l.s[at:], "->") || strings.HasPrefix(l.s[at:], "=>"):
		l.i += 2
		l.add(token{kind: tokArrow, s: "->", at: at, end: l.i})
	case strings.HasPrefix(l.s[at:], "-->"):
		l.i += 3
		l.add(token{kind: tokArrow, s: "->", at: at, end: l.i})
	case c == '-' && starts && l.signPlace(at):
		l.i++
		l.number('-', 0)
	case c == '+' && l.byteAt(at+1) == ' ' && l.digitAt(at+2):
		l.i += 2
		l.number('+', 0)
	case c == '+' && starts:
		l.i++
		l.number('+', 0)
	case (c == '<' || c == '>') && starts && at > 0 && l.s[at-1] != '\n':
		l.i++
		l.number(0, c)
	case c == '%':
		l.i++
		l.percent(at)
	case strings.IndexByte("*_`~", c) >= 0:
		l.i++ // markup
		l.gap = l.gap || c == '*' && l.byteAt(at+1) == ' '
	case strings.HasPrefix(l.s[at:], "'s ") || c == '\'' && at > 0 && isLetter(l.s[at-1]):
		l.i++
	default:
		l.i++
		l.add(token{kind: tokSep, s: string(c), at: at, end: l.i})
	}
}

// signPlace says that a hyphen before a digit is a sign: not after a number,
// a percent sign or another hyphen.
func (l *lexer) signPlace(at int) bool {
	p := l.byteAt(at - 1)
	return !isDigit(p) && p != '%' && p != '-' && p != '"' && p != '\''
}

// percent marks the number before a percent sign.
func (l *lexer) percent(at int) {
	if n := len(l.out); n > 0 && l.out[n-1].kind == tokNumber && strings.TrimSpace(l.s[l.out[n-1].end:at]) == "" {
		l.out[n-1].percent = true
		l.out[n-1].end = l.i
		return
	}
	l.add(token{kind: tokSep, s: "%", at: at, end: l.i})
}

func (l *lexer) number(sign, than byte) {
	at := l.i
	for l.digitAt(l.i) {
		l.i++
	}
	whole := l.i
	if l.byteAt(l.i) == '.' && l.digitAt(l.i+1) && !l.dots {
		l.i++
		for l.digitAt(l.i) {
			l.i++
		}
		l.dots = l.byteAt(l.i) == '.' && l.digitAt(l.i+1)
	}
	if sign == 0 && whole == l.i && l.clock(at) {
		return
	}
	if n := ordinalSuffix(l.s[l.i:]); n > 0 && whole == l.i && sign == 0 {
		l.i += n
		l.add(token{kind: tokWord, s: l.s[at:l.i], at: at, end: l.i})
		return
	}
	typed := l.s[at:l.i]
	v, err := strconv.ParseFloat(typed, 64)
	if err != nil || l.i-at > 12 {
		l.add(token{kind: tokWord, s: typed, at: at, end: l.i})
		return
	}
	t := token{kind: tokNumber, s: typed, v: v, sign: sign, than: than, at: at, end: l.i}
	if l.i > whole {
		t.decimals = l.i - whole - 1
	}
	l.add(t)
}

// ordinalSuffix gives the length of the ending of an ordinal: 2nd, 3rd.
func ordinalSuffix(s string) int {
	for _, end := range []string{"st", "nd", "rd", "th"} {
		if after, ok := strings.CutPrefix(s, end); ok && (after == "" || !isLetter(after[0]) && !isDigit(after[0])) {
			return len(end)
		}
	}
	return 0
}

// clock reads hh:mm, hhmm with a leading zero or a time mark, and a colon
// typed for the decimal point of a pH that heads a chain.
func (l *lexer) clock(at int) bool {
	n := l.i - at
	if l.byteAt(l.i) == ':' && n <= 2 && l.digitAt(l.i+1) && l.digitAt(l.i+2) && !l.digitAt(l.i+3) {
		h, m := atoi(l.s[at:l.i]), atoi(l.s[l.i+1:l.i+3])
		if p := h*100 + m; (h == 6 || h == 7) && p >= 680 && p <= 780 && l.byteAt(l.i+3) == '/' {
			l.i += 3
			l.add(token{kind: tokNumber, s: strconv.Itoa(h) + "." + l.s[l.i-2:l.i], v: float64(p) / 100, decimals: 2, at: at, end: l.i})
			return true
		}
		if h < 25 && m < 60 {
			l.i += 3
			l.addClock(at, h, m)
			return true
		}
	}
	return n == 4 && l.fourDigits(at)
}

// fourDigits takes four digits as a clock time when they lead with a zero or a
// one or two, form a time, and no separator ties them to other numbers.
func (l *lexer) fourDigits(at int) bool {
	h, m := atoi(l.s[at:at+2]), atoi(l.s[at+2:at+4])
	p, next := l.byteAt(at-1), l.byteAt(l.i)
	if h > 23 || m > 59 || p == '/' || next == '/' || isLetter(p) || next == 'm' || next == 'f' || next == '%' {
		return false
	}
	rest := strings.TrimLeft(l.s[l.i:min(len(l.s), l.i+8)], " ")
	for _, u := range []string{"m", "ml", "ft", "feet", "met", "mmhg", "g", "cc"} {
		if after, ok := strings.CutPrefix(rest+" ", u); ok && (after == "" || !isLetter(after[0])) {
			return false
		}
	}
	if n := len(l.out); n > 0 && l.out[n-1].e == nil && l.out[n-1].kind == tokWord {
		if e := look(l.out[n-1].s); e != nil && (e.sense == senseLabel || e.unit != "") {
			return false
		}
	}
	l.addClock(at, h, m)
	return true
}

func (l *lexer) addClock(at, h, m int) {
	l.add(token{kind: tokClock, s: clockText(h, m), at: at, end: l.i})
}

func clockText(h, m int) string {
	return string([]byte{byte('0' + h/10), byte('0' + h%10), ':', byte('0' + m/10), byte('0' + m%10)})
}

func atoi(s string) int {
	n, _ := strconv.Atoi(s)
	return n
}
