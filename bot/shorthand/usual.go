package shorthand

import "galeward/physio"

// usual takes what the line says of the patient's own state before: a usual
// PaCO2 is kept as such, other usual values are no values of today.
func (r *reader) usual() {
	for i := range r.t {
		switch {
		case r.usualWord(i) && !r.t[i].used:
			r.usualAt(i)
			r.usualOxygen(i)
		case r.t[i].is(senseLabel) && !r.t[i].used && r.t[i].e.q == physio.PaCO2:
			r.usualBehind(i)
		}
	}
}

// usualWord says that the word at i speaks of the patient's own state.
func (r *reader) usualWord(i int) bool {
	switch r.t[i].s {
	case "usual", "usually", "normally", "baseline", "known", "chronic", "chronically", "habitual", "habitually", "lives", "live", "living", "runs":
		return r.t[i].kind == tokWord
	case "normal":
		own := i > 0 && (r.t[i-1].word("his") || r.t[i-1].word("her") || r.t[i-1].word("their"))
		for j := i + 1; j < len(r.t) && j <= i+3 && !own; j++ {
			own = r.t[j].word("for")
		}
		return own
	}
	return false
}

// usualAt takes the value behind "usual": "usual co2 60", "baseline bicarb 30",
// "normally 55".
func (r *reader) usualAt(i int) {
	label, j := -1, i+1
	for ; j < len(r.t) && j <= i+6; j++ {
		t := &r.t[j]
		if t.is(senseLabel) && label < 0 && !t.used {
			label = j
			continue
		}
		if t.kind == tokNumber || !t.sep(":=~(,") && !t.is(senseFiller) && !r.verbOfState(j) || t.word("on") {
			break
		}
	}
	if j >= len(r.t) || j > i+6 || !r.t[j].free() || r.gasStart(j) {
		return
	}
	switch {
	case label >= 0 && r.t[label].e.q == physio.PaCO2:
		r.keepUsual(j, label)
	case label >= 0:
		r.otherUsual(i, j, label)
	case r.t[j].percent && r.t[j].v >= 70 && len(coreStarts(r.t)) > 0:
		r.t[j].taken = true // "baseline 92%": a saturation, and not of today
	case r.bareUsual(i, j):
		r.keepUsual(j, -1)
	}
}

// verbOfState says that a word may stand between "usually" and its value.
func (r *reader) verbOfState(j int) bool {
	switch r.t[j].s {
	case "runs", "run", "has", "he", "she", "his", "her", "their", "lives", "with", "would", "be", "for", "him", "them":
		return r.t[j].kind == tokWord
	}
	return false
}

// usualBehind takes a PaCO2 with the word behind it: "co2 usually 60", "runs a
// co2 of 58 normally".
func (r *reader) usualBehind(i int) {
	usual, j := false, i+1
	for ; j < len(r.t) && j <= i+5 && r.t[j].kind != tokNumber; j++ {
		usual = usual || r.usualWord(j) && r.t[j].s != "known"
		if !r.usualWord(j) && !r.t[j].is(senseFiller) && !r.t[j].sep(":=~") && !r.verbOfState(j) {
			return
		}
	}
	if j >= len(r.t) || j > i+5 || !r.t[j].free() || r.gasStart(j) {
		return
	}
	_, n := r.unitAfter(j)
	next := j + n + 1
	for next < len(r.t) && (r.t[next].is(senseFiller) || r.verbOfState(next)) {
		next++
	}
	if !usual && next < len(r.t) && next == r.lastUsual(next) {
		usual = true
	}
	if usual {
		r.keepUsual(j, i)
	}
}

// lastUsual gives next when a word of a usual state ends the clause there.
func (r *reader) lastUsual(next int) int {
	switch r.t[next].s {
	case "usually", "normally", "chronically", "habitually", "baseline", "usual", "normal":
		if next+1 >= len(r.t) || r.t[next+1].sep(",.;)\n") {
			return next
		}
	}
	return -1
}

// bareUsual says that a number without a label behind "normally" can only be
// a PaCO2: it has no other unit, and a saturation or a bicarbonate has another
// size. It counts beside a gas alone.
func (r *reader) bareUsual(i, j int) bool {
	t := &r.t[j]
	u, _ := r.unitAfter(j)
	labelled := r.t[i].word("known") || r.t[i].word("chronic") || r.t[i].word("runs")
	if labelled || t.percent || t.sign != 0 || u != "" && u != uMmHg && u != uKPa || !r.hasPaCO2() || r.joinedAhead(j) {
		return false
	}
	if u == uKPa || r.h.Units == KPa && u == "" {
		return t.v >= 5.5 && t.v <= 12
	}
	return t.v >= 42 && t.v <= 84 && t.decimals == 0
}

// hasPaCO2 says that a PaCO2 of today stands in the line or in the thread.
func (r *reader) hasPaCO2() bool {
	if r.h.Earlier != nil && r.h.Earlier.Has(physio.PaCO2) || len(coreStarts(r.t)) > 0 {
		return true
	}
	for i := range r.t {
		if r.t[i].is(senseLabel) && r.t[i].e.q == physio.PaCO2 {
			return true
		}
	}
	return false
}

// usualOxygen leaves out the oxygen that a patient usually has, when the line
// says today's too: "normally on 2L, 28% now".
func (r *reader) usualOxygen(i int) {
	j := i + 1
	for j < len(r.t) && j <= i+4 && (r.t[j].is(senseFiller) || r.t[j].word("has") || r.t[j].word("uses") || r.verbOfState(j)) {
		j++
	}
	if j <= i+1 || j >= len(r.t) || !r.t[j].free() || !r.oxygenUnit(j) {
		return
	}
	for k := range r.t {
		if k != j && (r.t[k].free() && r.oxygenUnit(k) || r.t[k].is(senseAir)) {
			r.t[j].taken = true
			return
		}
	}
}

func (r *reader) oxygenUnit(j int) bool {
	u, _ := r.unitAfter(j)
	return u == uLitre || u == uLPM || u == uPercent
}

// Edges of what is believed as a usual PaCO2, in mmHg: below, the number is
// rather a bicarbonate, above, nobody lives. Our own figures.
const (
	leastUsual = 30.0
	mostUsual  = 120.0
)

// keepUsual keeps the number at j as the usual PaCO2. Of a range, the lower
// end is kept and said.
func (r *reader) keepUsual(j, label int) {
	t := &r.t[j]
	u, n := r.unitAfter(j)
	unit, _ := r.pressureUnit(physio.EtCO2, t, u)
	f := formOf(physio.EtCO2, t, unit, true)
	if f.v < leastUsual || f.v > mostUsual || j+1 < len(r.t) && r.t[j+1].word("s") { // "high 50s"
		t.taken = true
		return
	}
	if r.rangeBehind(j) {
		r.t[j+2].taken = true
		r.note(NoteRangeLow, physio.PaCO2, t.s+"-"+r.t[j+2].s, f.v)
	}
	r.take(j, n)
	if label >= 0 {
		r.t[label].used = true
	}
	r.g.UsualPaCO2 = f.v
}

// otherUsual leaves out a usual value of another quantity beside a gas of
// today: "baseline bicarb 30", "baseline sats 88-90".
func (r *reader) otherUsual(i, j, label int) {
	q := r.t[label].e.q
	if !isCore(q) && q != physio.SpO2 || q == physio.PHq || r.t[i].s == "known" || len(coreStarts(r.t)) == 0 {
		return
	}
	if r.rangeBehind(j) {
		r.t[j+2].taken = true
	}
	r.t[j].taken, r.t[label].used, r.t[label].e = true, true, nil
}

// shareUsual gives a usual PaCO2 that stands apart from the gas to the gas.
func shareUsual(gases []Gas, list bool) {
	if list {
		return
	}
	for i := range gases {
		if u := gases[i].UsualPaCO2; u > 0 {
			for k := range gases {
				if gases[k].UsualPaCO2 == 0 {
					gases[k].UsualPaCO2 = u
				}
			}
			return
		}
	}
}
