package shorthand

import (
	"math"

	"galeward/physio"
)

// phLike says that v is in the range of a pH.
func phLike(v float64) bool { return v >= 6.5 && v < 8 }

// gasStart says that an unlabelled gas starts with the number at i: a pH and,
// joined to it, a number that can be a PCO2.
func (r *reader) gasStart(i int) bool { return gasStart(r.t, i) }

func gasStart(t []token, i int) bool {
	p := &t[i]
	if p.kind != tokNumber || p.sign != 0 || p.than != 0 || p.percent || p.used || p.taken {
		return false
	}
	n, slashes := chainAhead(t, i)
	if q, ok := labelDirectlyBefore(t, i); ok && !(slashes && n >= 3 && p.decimals == 2 && q != physio.PaCO2 && (q != physio.PaO2 || t[i-1].word("o2"))) {
		return false
	}
	if phLike(p.v) && p.decimals > 0 {
		if n <= 3 && clockTimes(t, i) || n == 2 && p.decimals == 1 && !secondAtLeast(t, i, 15) {
			return false
		}
		return n >= 2 && (slashes || n >= 3 || p.decimals == 2)
	}
	tied := i > 1 && t[i-1].sep("/|\\,;-") && t[i-2].kind == tokNumber && t[i-1].line == p.line
	// Four numbers with blanks between and a pH that lost its point: "728 58 62 27".
	spaced := !slashes && n >= 4 && p.decimals == 0 && p.v >= 650 && p.v < 800
	if !slashes && !spaced || n < 3 || tied || p.s == "7" && n < 4 {
		return false
	}
	return oddPH(p) && pressuresFollow(t, i)
}

// clockTimes says that all numbers joined from i on look like clock times with
// points: "7.30-19.00".
func clockTimes(t []token, i int) bool {
	for j, n := i, 0; j < len(t) && n < 3; j++ {
		switch x := &t[j]; {
		case x.kind == tokNumber:
			minutes := math.Mod(math.Round(x.v*100), 100)
			if x.decimals != 2 || x.v >= 24 || math.Mod(minutes, 15) != 0 || minutes >= 60 {
				return false
			}
			n++
		case x.sep("/-,"):
		default:
			return n >= 2
		}
	}
	return true
}

// secondAtLeast says that the next number is at least low.
func secondAtLeast(t []token, i int, low float64) bool {
	for j := i + 1; j < len(t); j++ {
		if t[j].kind == tokNumber {
			return t[j].v >= low
		}
	}
	return false
}

// labelDirectlyBefore finds the label of another quantity than pH that the
// number at i belongs to.
func labelDirectlyBefore(t []token, i int) (physio.Quantity, bool) {
	for j := i - 1; j >= 0 && j >= i-3; j-- {
		switch {
		case t[j].is(senseLabel):
			return t[j].e.q, t[j].e.q != physio.PHq
		case t[j].sep(":=~") || t[j].is(senseFiller):
		default:
			return 0, false
		}
	}
	return 0, false
}

// oddPH says that a number at the head of a chain of three or more may be a
// mistyped pH.
func oddPH(p *token) bool {
	v := p.v
	switch {
	case v >= 6 && v < 9 && (p.decimals > 0 || v == 7):
		return true
	case v >= 65 && v < 80, v >= 650 && v < 800 && p.decimals == 0, v >= 6500 && v < 8000 && p.decimals == 0:
		return true
	}
	return p.decimals > 0 && v < 10 && len(permutations(p.s)) > 0
}

// pressuresFollow says that the next two numbers can be a PCO2 and a PO2.
func pressuresFollow(t []token, i int) bool {
	found := 0
	for j := i + 1; j < len(t) && found < 2; j++ {
		if t[j].kind != tokNumber {
			continue
		}
		if t[j].v < 2 || t[j].v > 700 {
			return false
		}
		found++
	}
	return found == 2
}

// chainAhead counts the numbers that are joined from i on, and says whether
// separators join them.
func chainAhead(t []token, i int) (n int, slashes bool) {
	n, slashes = 1, true
	for j := i + 1; j < len(t); j++ {
		switch x := &t[j]; {
		case x.kind == tokNumber:
			if x.used || x.taken {
				return n, slashes
			}
			if !t[j-1].sep("/|\\,;-:.\n") && !t[j-1].is(senseOver) && x.sign == 0 && !t[j-1].is(senseUnit) {
				if slashes && n >= 3 {
					return n, true // what a blank sets off is no part of the chain
				}
				slashes = false
			}
			n++
		case x.sep("/|\\,;-:.~_"), x.is(senseOver), x.is(senseUnit) && x.e.unit != uTime && x.e.unit != uYear:
		case x.is(senseLabel) && x.e.q != physio.PHq && isCore(x.e.q):
			return n + 1, slashes
		case x.sep("\n") && aloneOnLine(t, j+1):
		case (x.sep("?") || x.word("x")) && j+1 < len(t) && t[j+1].sep("/"):
		default:
			return n, slashes
		}
		if n > 8 {
			break
		}
	}
	return n, slashes
}

// aloneOnLine says that the token at i is the only one of its line.
func aloneOnLine(t []token, i int) bool {
	return i < len(t) && t[i].kind == tokNumber && (i+1 >= len(t) || t[i+1].sep("\n") || t[i+1].is(senseUnit) && (i+2 >= len(t) || t[i+2].sep("\n")))
}

// secondGas says that the number at i starts another gas: a pH with two
// decimals, or one with one decimal that a blank sets off. In kPa a PaO2 of 7.4
// looks like a pH.
func secondGas(t []token, i, filled int) bool {
	x := &t[i]
	if !phLike(x.v) || x.sign != 0 || x.percent {
		return false
	}
	return filled >= 2 && x.decimals == 2 || filled >= 3 && x.decimals == 1 && t[i-1].kind == tokNumber && gasStart(t, i)
}
