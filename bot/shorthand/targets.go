package shorthand

import "galeward/physio"

// targets takes a saturation target: "target 88-92", "goal sats 92 to 96 %".
func (r *reader) targets() {
	for i := 0; i+2 < len(r.t); i++ {
		a, j := &r.t[i], i+1
		if a.kind != tokNumber || a.v < 60 || a.v > 100 || a.decimals > 0 {
			continue
		}
		if !r.t[j].sep("-") && !r.t[j].word("to") && !r.t[j].word("and") || j+1 >= len(r.t) {
			continue
		}
		b := &r.t[j+1]
		if b.kind != tokNumber || b.v <= a.v || b.v > 100 || !r.targetWord(i) && !r.targetBehind(j+2) {
			continue
		}
		r.g.Target = &physio.Target{Low: a.v / 100, High: b.v / 100}
		a.used, b.used, a.taken, b.taken = true, true, true, true
		r.unlabel(i)
	}
}

// targetWord says that a target word stands in front of the range.
func (r *reader) targetWord(i int) bool {
	return r.near(i, 5, "target", "targets", "goal", "aim", "aiming", "aims", "keep", "range", "tgt", "scale", "prescribed", "sats target", "for", "between", "titrate", "titrated")
}

// targetBehind says that a target word directly follows the range and does not
// lead a range of its own: "spo2 88-92 target".
func (r *reader) targetBehind(i int) bool {
	if i < len(r.t) && r.t[i].word("is") {
		i++
	}
	if i >= len(r.t) || r.t[i].kind != tokWord || r.t[i].line != r.t[i-1].line {
		return false
	}
	switch r.t[i].s {
	case "target", "targets", "goal", "goals", "aim", "aims", "aimed", "aimed for", "tgt", "range", "prescribed", "scale":
		for i++; i < len(r.t) && (r.t[i].sep(":=") || r.t[i].is(senseFiller)); i++ {
		}
		return i+1 >= len(r.t) || r.t[i].kind != tokNumber || !r.t[i+1].sep("-") || r.gasStart(i)
	}
	return false
}

// unlabel takes the labels in front of a target away.
func (r *reader) unlabel(i int) {
	for j := i - 1; j >= 0 && j >= i-4 && r.t[j].kind != tokNumber; j-- {
		if r.t[j].is(senseLabel) && (r.t[j].e.q == physio.SaO2 || r.t[j].e.q == physio.SpO2) {
			r.t[j].e, r.t[j].used = nil, true
		}
	}
}
