package shorthand

import (
	"strings"
)

// marks takes what is no value: an index, a number behind a word that owns it,
// a duration, a date, a clock time, a bed.
func (r *reader) marks() {
	for i := range r.t {
		t := &r.t[i]
		switch {
		case t.kind == tokClock:
			r.clock(i)
		case t.is(senseBed):
			r.bed(i)
		case t.is(senseSwallow):
			r.swallow(i)
		case t.kind == tokNumber && i+1 < len(r.t) && (r.t[i+1].word("am") || r.t[i+1].word("pm")):
			r.halfDay(i)
		case t.is(senseTime):
			if r.g.Time == "" && weekday(t.s) != "" {
				r.g.Time = weekday(t.s)
			}
		case t.sep("#") && i+1 < len(r.t) && r.t[i+1].kind == tokNumber && r.t[i+1].glued:
			r.t[i+1].taken = true
		case t.word("hr") && (i == 0 || r.t[i-1].kind != tokNumber) && i+1 < len(r.t) && r.t[i+1].kind == tokNumber:
			r.swallow(i) // a heart rate, not an hour
		case t.word("not") && i+1 < len(r.t) && r.t[i+1].kind == tokNumber:
			r.t[i+1].taken = true
		case t.word("x") && i+1 < len(r.t) && r.t[i+1].kind == tokNumber && !r.timesPair(i):
			r.t[i+1].taken = true
		}
	}
}

// timesPair says that x stands between a volume and a rate: 500 x 14.
func (r *reader) timesPair(i int) bool {
	if i == 0 || i+1 >= len(r.t) || r.t[i-1].kind != tokNumber {
		return false
	}
	a, b := r.t[i-1].v, r.t[i+1].v
	return max(a, b) >= 100 && min(a, b) <= 60 || a < 1.6 && r.t[i-1].decimals > 0
}

func weekday(s string) string {
	switch {
	case len(s) < 3 || strings.Contains(s, " "):
		return ""
	}
	for _, d := range []string{"mon", "tue", "wed", "thu", "fri", "sat", "sun"} {
		if strings.HasPrefix(s, d) && (len(s) == 3 || strings.HasSuffix(s, "day") || s == "tues" || s == "thur" || s == "thurs") {
			return strings.ToUpper(d[:1]) + d[1:]
		}
	}
	if s == "yesterday" || s == "today" || s == "tonight" || s == "overnight" || s == "noon" || s == "midnight" {
		return s
	}
	return ""
}

// halfDay takes 6 am and 11pm.
func (r *reader) halfDay(i int) {
	t := &r.t[i]
	if t.v < 1 || t.v > 12 || t.decimals > 0 {
		return
	}
	t.taken = true
	h := int(t.v) % 12
	if r.t[i+1].s == "pm" {
		h += 12
	}
	if r.g.Time == "" {
		r.g.Time = clockText(h, 0)
	}
}

func (r *reader) clock(i int) {
	if r.g.Time == "" {
		r.g.Time = r.t[i].s
	}
	r.t[i].used = true
}

// bed takes the label behind a bed word: a number with up to two letters, or a
// short code. "b" needs a number glued to it or none of the gas behind it.
func (r *reader) bed(i int) {
	j := i + 1
	for j < len(r.t) && (r.t[j].sep("#:") || r.t[j].word("no")) {
		j++
	}
	if j >= len(r.t) {
		return
	}
	n := &r.t[j]
	letter := r.t[i].s == "b" && !n.glued
	if letter || n.kind != tokNumber || n.decimals > 0 || n.sign != 0 || n.v > 9999 {
		return
	}
	label := n.s
	if j+1 < len(r.t) && r.t[j+1].kind == tokWord && r.t[j+1].glued && len(r.t[j+1].s) == 1 {
		label += r.t[j+1].s
		r.t[j+1].used, r.t[j+1].e = true, nil
	}
	n.taken = true
	if r.g.Bed == "" {
		r.g.Bed = label
	}
}

// swallow takes the numbers that belong to a word which names no value here.
func (r *reader) swallow(i int) {
	for j := i + 1; j < len(r.t) && j < i+6; j++ {
		t := &r.t[j]
		switch {
		case t.kind == tokNumber && t.percent:
			return
		case t.kind == tokNumber && !r.gasStart(j):
			t.taken = true
			r.tubeDepth(i, j)
			if j+2 >= len(r.t) || !r.t[j+1].sep("/:-") || r.t[j+2].kind != tokNumber || r.gasStart(j+2) {
				return
			}
		case t.sep("/:=-~#@") || t.is(senseFiller):
		default:
			r.swallowBefore(i)
			return
		}
	}
}

// tubeDepth takes the depth behind the size of a tube: "ett 7.5 @ 22", "7.5
// ett at 23".
func (r *reader) tubeDepth(i, j int) {
	switch r.t[i].s {
	case "ett", "tube", "trach", "size", "sz":
		if j+2 < len(r.t) && (r.t[j+1].sep("@") || r.t[j+1].word("at")) && r.t[j+2].free() && r.t[j].v < 10 && !r.gasStart(j+2) {
			r.t[j+2].taken = true
		}
	}
}

// swallowBefore takes the number in front of a tube word: "7.5 ETT".
func (r *reader) swallowBefore(i int) {
	switch r.t[i].s {
	case "ett", "tube", "trach", "shiley", "portex", "bivona", "lip", "teeth", "ppm", "french", "gauge":
		if i > 0 && r.t[i-1].kind == tokNumber && !r.joined(i-1) {
			r.t[i-1].taken = true
		}
	}
}

// joined says that the number at i is tied to a number before it by a slash.
func (r *reader) joined(i int) bool {
	return i > 1 && r.t[i-1].sep("/|\\") && r.t[i-2].kind == tokNumber
}
