package shorthand

import (
	"strings"

	"galeward/physio"
)

// segment is the part of a message that holds one gas.
type segment struct {
	t     []token
	bed   string
	time  string
	mixed bool
	// corrects says that the words take something typed back.
	corrects bool
	// claims says that the text around the gas makes claims.
	claims bool
	// plain says that nothing but the second gas itself parts it from the one
	// before: whether they are one patient's is asked.
	plain bool
	// later says that a word or an arrow makes it the later one.
	later bool
}

// split parts the tokens of a message into gases. list is true for several
// beds.
func split(t []token) (parts []segment, list bool) {
	heads(t)
	cores := coreStarts(t)
	if len(cores) < 2 {
		return splitLabelled(t), false
	}
	from := 0
	for k := range cores {
		to := len(t)
		next := segment{}
		if k+1 < len(cores) {
			to = boundary(t, cores[k].end, cores[k+1].at, &next)
		}
		if k == 0 {
			parts = append(parts, segment{})
		}
		parts[k].t = t[from:to]
		if k+1 < len(cores) {
			parts = append(parts, next)
		}
		from = to
	}
	return shareBed(parts)
}

// span is the place of one gas in the tokens.
type span struct{ at, end int }

// coreStarts finds where each gas starts: an unlabelled chain, or a labelled
// pH.
func coreStarts(t []token) []span {
	var found []span
	for i := 0; i < len(t); i++ {
		j := -1
		if t[i].is(senseLabel) && t[i].e.q == physio.PHq && t[i].s != "pha" {
			j = numberNear(t, i)
		}
		switch {
		case j > 0:
			n, _ := chainAhead(t, j)
			end := advance(t, j, n)
			found = append(found, span{i, end})
			i = end - 1
		case gasStart(t, i):
			n, _ := chainAhead(t, i)
			if len(found) > 0 && n == 2 && t[i].decimals == 1 {
				continue // behind a gas, rather a tube: "7.5/22"
			}
			end := advance(t, i, n)
			if end <= i {
				end = i + 1
			}
			found = append(found, span{i, end})
			i = end - 1
		}
	}
	return found
}

// numberNear finds a number that can be a pH or a hydrogen ion within three
// tokens behind a label.
func numberNear(t []token, i int) int {
	for j := i + 1; j < len(t) && j <= i+4; j++ {
		if t[j].kind == tokNumber {
			return j
		}
		if !t[j].sep(":=~\n*") && !t[j].is(senseFiller) {
			return -1
		}
	}
	return -1
}

// advance steps over n joined numbers, but not into a second gas.
func advance(t []token, i, n int) int {
	seen, end := 0, i
	for ; i < len(t) && seen < n; i++ {
		if t[i].kind != tokNumber {
			if t[i].kind == tokWord && !t[i].is(senseUnit) && !t[i].is(senseOver) {
				break
			}
			continue
		}
		if i > 0 && secondGas(t, i, seen) {
			break
		}
		seen, end = seen+1, i+1
	}
	return end
}

// boundary finds where the next gas begins between the end of one chain and
// the start of the next.
func boundary(t []token, from, to int, next *segment) int {
	best, weight := to, 0
	next.plain = true
	for i := from; i < to; i++ {
		w, at := 0, i
		switch x := &t[i]; {
		case x.is(senseBed) && i+1 < len(t) && (lineStart(t, i) || t[i+1].kind == tokNumber && t[i+1].decimals == 0), x.kind == tokWord && x.e == bedHead:
			w = 6
		case x.sep("\n"):
			w, at = 5, i+1
		case x.sep(";"):
			w, at = 4, i+1
		case x.kind == tokClock, x.is(senseTime) && weekday(x.s) != "":
			w = 3
		case x.kind == tokArrow, x.word("then"), x.word("now"), x.word("repeat"), x.word("later"), x.word("recheck"), x.word("after"):
			w = 2
			next.later = true
		case x.e != nil && x.e.blood != "" && x.kind == tokWord:
			w = 1
		}
		if w > 0 && w >= weight {
			best, weight = at, w
		}
	}
	next.plain = weight == 0
	return best
}

// bedHead marks a token at the head of a line as a bed label.
var bedHead = &entry{sense: senseBed}

func lineStart(t []token, i int) bool {
	for j := i - 1; j >= 0; j-- {
		if t[j].sep("\n;") {
			return true
		}
		if !t[j].sep("-*#:>(") && !(t[j].kind == tokNumber && t[j].taken) {
			return false
		}
	}
	return true
}

// heads turns the number or short code in front of a gas at the head of a line
// into a bed label: "3: 7.41/38/92", "12) ...", "b4: ...", "A: ...".
func heads(t []token) {
	for i := range t {
		x := &t[i]
		if !lineStart(t, i) || i+1 >= len(t) {
			continue
		}
		j := i + 1
		if wardNumber(t, i) { // "icu 2: 7.41/..."
			x, j = &t[i+1], i+2
		}
		first := j
		for j < len(t) && t[j].sep(":).-") {
			j++
		}
		marked := j > first && (t[first].glued || t[first].sep("-)"))
		if j >= len(t) || !startsGas(t, j) || !marked && !(j == i+1 && x.kind == tokNumber && !t[j].glued) {
			continue
		}
		if x.kind == tokNumber && x.decimals == 0 && x.sign == 0 && !x.percent && x.v < 10000 && !phHead(x, t, i) {
			x.kind, x.e = tokWord, bedHead
		}
		if x.kind == tokWord && marked && (len(x.s) == 1 || x.e == nil && len(x.s) <= 6 && strings.ContainsAny(x.s, "0123456789")) {
			x.e = bedHead
		}
	}
}

// wardNumber says that the line starts with a word, a whole number and a
// colon.
func wardNumber(t []token, i int) bool {
	if i+2 >= len(t) || t[i].kind != tokWord || t[i].is(senseBed) || t[i].is(senseLabel) || t[i].is(senseDevice) {
		return false
	}
	switch t[i].s {
	case "gas", "sample", "draw", "set", "no":
		return false // the first and the second gas of one patient
	}
	n := &t[i+1]
	return t[i].e.bloodless() && n.kind == tokNumber && n.decimals == 0 && n.v < 10000 && t[i+2].sep(":)") && t[i+2].glued
}

// bloodless says that a word names no sample.
func (e *entry) bloodless() bool { return e == nil || e.blood == "" }

// phHead says that the number is itself the mistyped pH of the chain.
func phHead(x *token, t []token, i int) bool {
	return t[i+1].sep("-") && oddPH(x) && gasStart(t, i)
}

// startsGas says that a gas, with or without words in front, starts at i.
func startsGas(t []token, i int) bool {
	if t[i].is(senseLabel) && t[i].e.q == physio.PHq || t[i].kind == tokWord && t[i].e != nil && t[i].e.blood != "" {
		return true
	}
	return gasStart(t, i) || t[i].kind == tokNumber && i+1 < len(t) && t[i].decimals == 2 && phLike(t[i].v)
}

// measured says that q is measured rather than set.
func measured(q physio.Quantity) bool {
	switch q {
	case physio.EtCO2, physio.SpO2, physio.TcCO2, physio.Lactate:
		return true
	}
	return isCore(q) && q != physio.PHq
}
