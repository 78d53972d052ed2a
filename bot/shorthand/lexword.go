package shorthand

import "strings"

// longestGlue bounds the search for words that are glued together.
const longestGlue = 24

// letters lexes a word, a label glued to its number ("co258"), or words glued
// together behind a number ("6lnc").
func (l *lexer) letters() {
	at := l.i
	if l.compound() {
		return
	}
	end := at
	for end < len(l.s) && (isLetter(l.s[end]) || isDigit(l.s[end]) || l.apostrophe(end)) {
		end++
	}
	run := l.s[at:end]
	if strings.Contains(run, "'") {
		run = strings.ReplaceAll(run, "'", "")
	}
	switch n := l.glued(run, l.digitAt(at-1) || l.byteAt(at-1) == '%'); {
	case look(run) != nil || n == 0 || len(run) != end-at:
		l.i = end
		l.add(token{kind: tokWord, s: run, at: at, end: end})
	default:
		l.i = at + n
		l.add(token{kind: tokWord, s: run[:n], at: at, end: l.i})
	}
}

// apostrophe says that s[i] is an apostrophe between letters.
func (l *lexer) apostrophe(i int) bool {
	return l.s[i] == '\'' && i > 0 && isLetter(l.s[i-1]) && i+1 < len(l.s) && isLetter(l.s[i+1])
}

// compound lexes a spelling with a sign inside.
func (l *lexer) compound() bool {
	rest := l.s[l.i:]
	for _, c := range compounds {
		if c.typed[0] != rest[0] || !strings.HasPrefix(rest, c.typed) {
			continue
		}
		if n := len(c.typed); n < len(rest) && isLetter(rest[n]) {
			continue
		}
		l.add(token{kind: tokWord, s: c.word, at: l.i, end: l.i + len(c.typed)})
		l.i += len(c.typed)
		return true
	}
	return false
}

// glued gives the length of the first word of a run that is glued, 0 when it
// is not. Behind a number the whole rest must be known words; else the run is
// a label with a number.
func (l *lexer) glued(run string, behindNumber bool) int {
	if look(run) != nil || len(run) > longestGlue {
		return 0
	}
	for n := len(run) - 1; n > 0; n-- {
		e := look(run[:n])
		if e == nil || e.sense == senseWord || e.sense == senseNumber {
			continue
		}
		rest := run[n:]
		if isDigit(rest[0]) {
			if (e.canGlue() || behindNumber) && digitsThenKnown(rest) {
				return n
			}
			continue
		}
		if behindNumber && knownRun(rest) {
			return n
		}
	}
	return 0
}

// canGlue says that a number may be glued to the word.
func (e *entry) canGlue() bool {
	switch e.sense {
	case senseLabel, senseDevice, senseBed, senseMean, senseFiller, senseTcO, senseSwallow:
		return true
	}
	return false
}

// knownRun says that s is a chain of known words and numbers.
func knownRun(s string) bool {
	if s == "" || look(s) != nil {
		return true
	}
	for n := len(s) - 1; n > 0; n-- {
		if look(s[:n]) == nil {
			continue
		}
		if isDigit(s[n]) && digitsThenKnown(s[n:]) || !isDigit(s[n]) && knownRun(s[n:]) {
			return true
		}
	}
	return false
}

// digitsThenKnown says that s is digits and then known words: "52po268" is,
// the "2rf" of a diagnosis is not.
func digitsThenKnown(s string) bool {
	i := 0
	for i < len(s) && isDigit(s[i]) {
		i++
	}
	return i == len(s) || knownRun(s[i:])
}

// joinPhrases gives words their meaning and joins phrases into one token.
func joinPhrases(in []token) []token {
	out := in[:0:len(in)]
	for i := 0; i < len(in); {
		n := 1
		if in[i].kind == tokWord {
			n = phraseAt(in, i, &in[i])
		}
		out = append(out, in[i])
		i += n
	}
	return out
}

// phraseAt finds the longest phrase at in[i], writes it to t, and gives the
// number of tokens it takes.
func phraseAt(in []token, i int, t *token) int {
	most := phraseLength[in[i].s]
	text, best := in[i].s, 1
	end := in[i].end
	found := look(text)
	phrase := text
	words := 1
	for j := i + 1; j < len(in) && words < most; j++ {
		if in[j].sep("-/") && in[j].glued && j+1 < len(in) && in[j+1].kind == tokWord && in[j+1].glued {
			continue
		}
		if in[j].kind != tokWord || in[j].line != in[i].line {
			break
		}
		phrase += " " + in[j].s
		words++
		if e := look(phrase); e != nil {
			found, text, best, end = e, phrase, j-i+1, in[j].end
		}
	}
	t.e, t.s, t.end = found, text, end
	return best
}
