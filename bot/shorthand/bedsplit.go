package shorthand

import (
	"galeward/physio"
)

// shareBed gives the bed of a series to all its gases, and tells a list of
// beds from a series.
func shareBed(parts []segment) ([]segment, bool) {
	beds := map[string]bool{}
	for i := range parts {
		parts[i].bed = bedOf(parts[i].t)
		if parts[i].bed != "" {
			beds[parts[i].bed] = true
		}
	}
	if len(beds) > 1 {
		return parts, true
	}
	for i := range parts {
		parts[i].bed = parts[0].bed
	}
	return parts, false
}

func bedOf(t []token) string {
	for i := range t {
		if t[i].kind == tokWord && t[i].e == bedHead {
			return t[i].s
		}
	}
	r := reader{t: append([]token(nil), t...)}
	for i := range r.t {
		if r.t[i].is(senseBed) {
			r.bed(i)
		}
		if r.g.Bed != "" {
			return r.g.Bed
		}
	}
	return ""
}

// splitLabelled parts a message without a second chain when it says one
// quantity twice, once before and once after an arrow or a "now".
func splitLabelled(t []token) []segment {
	for i := range t {
		switch {
		case (t[i].kind == tokArrow || t[i].word("to") && !aimed(t)) && i > 1 && i+1 < len(t) && t[i-1].kind == tokNumber && t[i+1].kind == tokNumber:
			if l := labelBefore(t, i-1); l >= 0 && measured(t[l].e.q) {
				second := append([]token{t[l]}, t[i+1:]...)
				return []segment{{t: t[:i]}, {t: second, later: true}}
			}
		case t[i].word("now") && i > 0 && sameLabel(t[:i], t[i+1:]):
			return []segment{{t: t[:i]}, {t: t[i+1:], later: true}}
		}
	}
	return []segment{{t: t}}
}

// aimed says that the words speak of a target, whose range is no change.
func aimed(t []token) bool {
	for i := range t {
		switch t[i].s {
		case "target", "goal", "aim", "keep", "range", "between", "aiming":
			return true
		}
	}
	return false
}

func labelBefore(t []token, i int) int {
	for j := i - 1; j >= 0 && j >= i-3; j-- {
		if t[j].is(senseLabel) {
			return j
		}
	}
	return -1
}

// sameLabel says that one measured quantity is named with a number on both
// sides.
func sameLabel(a, b []token) bool {
	for i := range a {
		if !a[i].is(senseLabel) || numberNear(a, i) < 0 || a[i].e.q == physio.FiO2 || a[i].e.q == physio.PEEP {
			continue
		}
		for j := range b {
			if b[j].is(senseLabel) && b[j].e.q == a[i].e.q && numberNear(b, j) >= 0 {
				return true
			}
		}
	}
	return false
}
