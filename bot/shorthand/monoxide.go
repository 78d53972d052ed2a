package shorthand

import (
	"strings"

	"galeward/physio"
)

// monoxide turns CO into the label of carboxyhaemoglobin where its number is a
// percentage of it: from 1 to 60, common practice. The cardiac output has
// litres or a decimal, "co 2 55" is CO2.
func (r *reader) monoxide() {
	for i := range r.t {
		switch t := &r.t[i]; {
		case !t.word("co"):
		case r.countsMonoxide(i):
			t.e = look("cohb")
		case r.countsLitres(i):
			t.e = look("cardiac output")
		}
	}
}

// countsLitres says that the number of CO is a flow that a heart can pump.
func (r *reader) countsLitres(i int) bool {
	if i+1 >= len(r.t) || !r.t[i+1].free() || r.t[i+1].v < 1 || r.t[i+1].v > 12 {
		return false
	}
	u, _ := r.unitAfter(i + 1)
	return u == uLPM || u == uLitre
}

// countsMonoxide says that a percentage of CO follows.
func (r *reader) countsMonoxide(i int) bool {
	j := i + 1
	for j < len(r.t) && (r.t[j].sep(":=~(") || r.t[j].word("is") || r.t[j].word("of") || r.t[j].word("was")) {
		j++
	}
	if j >= len(r.t) || !r.t[j].free() || r.t[j].v < 1 || r.t[j].v > 60 || r.t[j].sign != 0 || r.joinedAhead(j) || r.gasStart(j) {
		return false
	}
	n := &r.t[j]
	u, _ := r.unitAfter(j)
	if n.percent || u == uPercent {
		return true
	}
	spaced := n.v == 2 && j+1 < len(r.t) && (r.t[j+1].kind == tokNumber || r.t[j+1].sep(":="))
	if u != "" || spaced || n.decimals > 0 && n.v >= 2 && n.v <= 12 {
		return false
	}
	return r.namesMonoxide() || r.besideWholeGas()
}

// namesMonoxide says that another word speaks of carbon monoxide.
func (r *reader) namesMonoxide() bool {
	for i := range r.t {
		if t := &r.t[i]; t.kind == tokWord && t.e != nil && t.e.circ.Has(physio.SmokeOrCO) {
			return true
		}
	}
	return false
}

// besideWholeGas says that the PaCO2 stands in the line, so that CO is no slip
// for CO2, and no other word of the circulation does.
func (r *reader) besideWholeGas() bool {
	gas := false
	for i := range r.t {
		t := &r.t[i]
		switch {
		case r.gasStart(i):
			n, _ := chainAhead(r.t, i)
			gas = gas || n >= 3
		case t.is(senseLabel) && t.e.q == physio.PaCO2:
			gas = true
		case t.kind == tokWord && (t.s == "ci" || t.s == "svr" || strings.HasPrefix(t.s, "cardiac")):
			return false
		}
	}
	return gas
}
