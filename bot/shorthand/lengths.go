package shorthand

import (
	"math"

	"galeward/physio"
)

// metresHigh says that the m behind the number at i is metres: nobody is so
// old or so tall, and no other word owns the number.
func (r *reader) metresHigh(i int) bool {
	t := &r.t[i]
	if t.decimals > 0 || t.v < 300 || t.v > 9000 || t.sign != 0 || r.joined(i) {
		return false
	}
	if q, ok := labelDirectlyBefore(r.t, i); ok {
		return q == physio.Altitude
	}
	return i == 0 || !r.t[i-1].is(senseDevice) && !r.t[i-1].word("x")
}

// heightBesideSex reads a bare number beside the sex of an adult as the height
// in cm: no age, weight or rate is typed there with three digits. It is said.
func (r *reader) heightBesideSex() {
	if r.sample().Has(physio.Height) || !r.adult() {
		return
	}
	for i := range r.t {
		s := &r.t[i]
		if s.kind != tokWord || !(s.s == "m" || s.s == "f" || s.e != nil && s.e.sex != "") {
			continue
		}
		for _, j := range []int{i + 1, i + 2, i - 1} {
			if !r.bareHeight(j) || j > i+1 && !r.t[i+1].sep(",:") {
				continue
			}
			r.take(j, 0)
			r.sample().Set(physio.Height, r.t[j].v)
			r.note(NoteBareHeight, physio.Height, r.t[j].typed(), r.t[j].v)
			if len(s.s) == 1 && r.sample().Sex == "" {
				s.used = true
				r.sample().Sex = physio.Sex(s.s)
			}
			return
		}
	}
}

// bareHeight says that the number at j can be a height in cm and belongs to
// nothing else.
func (r *reader) bareHeight(j int) bool {
	if j < 0 || j >= len(r.t) {
		return false
	}
	t := &r.t[j]
	u, _ := r.unitAfter(j)
	if !t.free() || t.sign != 0 || t.than != 0 || t.percent || t.decimals > 0 || t.v < 120 || t.v > 210 || u != "" {
		return false
	}
	behindSex := j > 0 && (r.t[j-1].word("f") || r.t[j-1].word("m"))
	return !r.joined(j) && !r.joinedAhead(j) && (behindSex || !r.labelled(j)) && !r.gasStart(j)
}

// feet takes 5'4", 5ft4, 5 ft 10 in.
func (r *reader) feet(i int) bool {
	a := &r.t[i]
	if a.v < 1 || a.v > 8 || a.decimals > 0 || i+1 >= len(r.t) {
		return false
	}
	mark := &r.t[i+1]
	foot := mark.is(senseUnit) && mark.e.unit == uFoot
	if !mark.sep("'") && !foot {
		return false
	}
	cm, end, typed := a.v*cmPerFoot, i+1, a.s
	if j := i + 2; j < len(r.t) && r.t[j].kind == tokNumber && r.t[j].v < 12 && !r.gasStart(j) && r.t[j].sign == 0 && (r.t[j].glued || foot) {
		cm += r.t[j].v * cmPerInch
		typed += "'" + r.t[j].s
		end = j
		if j+1 < len(r.t) && (r.t[j+1].sep("\"'") || r.t[j+1].is(senseUnit) && r.t[j+1].e.unit == uInch) {
			end++
		}
		if end+1 < len(r.t) && r.t[end].sep("'") && r.t[end+1].sep("'") {
			end++
		}
	}
	for j := i; j <= end; j++ {
		r.t[j].used = true
	}
	if physio.Height.Possible(cm) {
		r.sample().Set(physio.Height, math.Round(cm*100)/100)
	} else {
		r.ask(*askImpossible(physio.Height, cm, typed))
	}
	return true
}

// length takes metres and feet: a height, or an altitude from 100 on.
func (r *reader) length(i int, u string, n int) {
	v := r.t[i].v
	switch {
	case u == uMetre && v >= 0.4 && v <= 2.5 && r.t[i].decimals > 0:
		r.store(physio.Height, i, u, n)
		r.metresOrSex(i, n)
	case u == uMetre && v >= 100 && v == math.Trunc(v), u == uFoot && v >= 500:
		r.store(physio.Altitude, i, u, n)
	case u == uFoot && v >= 4 && v < 8:
		r.ask(*askFeet(v, &r.t[i]))
		r.take(i, n)
	}
}

// metresOrSex asks whether the m behind a height was the unit or the sex, when
// the sex is not said elsewhere.
func (r *reader) metresOrSex(i, n int) {
	if r.t[i+n].s != "m" || r.sample().Sex != "" {
		return
	}
	r.ask(Question{Code: AskMetresSex, Quantity: physio.Height, Typed: r.t[i].typed(),
		Choices: []Choice{{Word: "male", Sex: physio.Male}, {Word: "female", Sex: physio.Female}}})
}

// letterSex takes a lone m or f as the sex.
func (r *reader) letterSex() {
	for i := range r.t {
		t := &r.t[i]
		if t.used || t.kind != tokWord || t.s != "m" && t.s != "f" || r.sample().Sex != "" {
			continue
		}
		if t.s == "f" && i+1 < len(r.t) && r.t[i+1].free() && !r.rateNamed(i) {
			continue // a rate
		}
		if t.s == "m" && i > 0 && r.t[i-1].kind == tokNumber && r.t[i-1].decimals > 0 && r.t[i-1].v < 2.6 {
			continue // metres
		}
		if t.s == "m" && i > 0 && r.t[i-1].kind == tokNumber && r.metresHigh(i-1) {
			continue
		}
		t.used = true
		r.sample().Sex = physio.Sex(t.s)
	}
}
