package shorthand

import (
	"math"

	"galeward/physio"
)

// mostRead is above every value of a gas: a longer number is not repeated.
const mostRead = 2000

// notRead says of each number beside a gas that it was not read, unless a word
// owns it that names no value here: a time, a bed, a tube, a score, a dose.
func (r *reader) notRead() {
	if r.claims || r.first < 0 && !r.sample().Has(physio.PHq) {
		return
	}
	for i := range r.t {
		if t := &r.t[i]; t.free() && t.v < mostRead && !r.owned(i) {
			t.taken = true
			r.note(NoteNotRead, physio.PHq, t.typed(), t.v)
		}
	}
}

// owned says that the number at i belongs to something that is no value.
func (r *reader) owned(i int) bool {
	if r.unknownBehind(i) || r.dateLike(i) || r.tubeLike(i) {
		return true
	}
	for j := i - 1; j >= 0 && j >= i-4 && r.t[j].line == r.t[i].line; j-- {
		switch t := &r.t[j]; {
		case t.is(senseLabel), t.is(senseDevice), t.is(senseUnit), t.kind == tokClock, t.sep(";.|)\n"):
			return false
		case t.word("m"), t.word("f"), t.kind == tokWord && t.e != nil && t.e.sex != "":
			return false
		case t.kind == tokWord && !t.is(senseFiller) && !t.word("after") && !t.word("before"):
			return true // "propofol 20", "day 3": the word's own number
		case t.kind == tokNumber && !t.taken:
			return false
		}
	}
	return false
}

// unknownBehind says that a word behind the number names what it counts:
// "3 nebs", "2 puffs", "1 dose".
func (r *reader) unknownBehind(i int) bool {
	if i+1 >= len(r.t) || r.t[i+1].kind != tokWord || r.t[i+1].line != r.t[i].line {
		return false
	}
	t := &r.t[i+1]
	switch {
	case t.word("m"), t.word("f"):
		return false
	case t.word("after"), t.word("before"), t.word("now"), t.word("then"):
		return false
	case t.e == nil, t.e.sense == senseWord, t.e.sense == senseSwallow, t.e.sense == senseTime, t.e.sense == senseUnit:
		return true
	}
	return false
}

// tubeLike says that the number is part of the size and the depth of a tube:
// "7.5/22", "7.0 @ 21".
func (r *reader) tubeLike(i int) bool {
	for _, j := range []int{i, i - 2} {
		if j < 0 || j+2 >= len(r.t) || !r.t[j+1].sep("/@-") || r.t[j].kind != tokNumber || r.t[j+2].kind != tokNumber {
			continue
		}
		size, depth := r.t[j].v, r.t[j+2].v
		if size >= 2 && size < 10 && 2*size == math.Trunc(2*size) && depth >= 6 && depth <= 28 {
			return true
		}
	}
	return false
}

// dateLike says that the number is part of a date or of a fraction: 12/3, 3/4.
func (r *reader) dateLike(i int) bool {
	for _, j := range []int{i, i - 2} {
		if j < 0 || j+2 >= len(r.t) || r.t[j].kind != tokNumber || r.t[j+2].kind != tokNumber || !r.t[j+1].sep("/-.") || !r.t[j+1].glued {
			continue
		}
		a, b := &r.t[j], &r.t[j+2]
		if a.decimals == 0 && b.decimals == 0 && a.v >= 1 && b.v >= 1 && a.v <= 31 && b.v <= 31 {
			return true
		}
	}
	return false
}
