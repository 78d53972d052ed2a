package shorthand

import (
	"math"

	"galeward/physio"
)

// unitAfter gives the unit behind the number at i and the tokens it takes.
func (r *reader) unitAfter(i int) (string, int) {
	if r.t[i].percent {
		return uPercent, 0
	}
	j := i + 1
	if j+1 < len(r.t) && r.t[j].sep("/") && r.t[j].glued && r.t[j+1].kind == tokWord && r.t[j+1].glued {
		switch r.t[j+1].s {
		case "min", "minute", "m":
			return uPerMin, 2
		case "kg", "kgs":
			return uMLKg, 2
		}
	}
	dash := 0 // "45-year-old"
	if j+1 < len(r.t) && r.t[j].sep("-") && r.t[j].glued && r.t[j+1].glued && r.t[j+1].e.ofAge() {
		dash = 1
	}
	j += dash
	if j >= len(r.t) || r.t[j].kind != tokWord || r.t[j].line != r.t[i].line {
		return "", 0
	}
	t := &r.t[j]
	if t.s == "m" && (t.glued || r.metresHigh(i) || r.t[i].decimals > 0 && r.t[i].v > 1 && r.t[i].v < 2.5) {
		return uMetre, 1
	}
	if t.s == "do" && t.glued {
		return uDay, 1
	}
	if t.s == "f" && t.glued && r.t[i].v > 80 {
		return uF, 1
	}
	if t.e == nil || t.e.sense != senseUnit {
		return "", 0
	}
	if len(t.s) == 1 && t.s != "l" && !t.glued && t.s != "g" && t.s != "c" && t.s != "h" && t.s != "y" {
		return "", 0
	}
	return t.e.unit, 1 + dash
}

// ofAge says that a word is a unit of age.
func (e *entry) ofAge() bool {
	return e != nil && (e.unit == uYear || e.unit == uMonth || e.unit == uWeek || e.unit == uDay)
}

// take marks the number at i and its unit as used.
func (r *reader) take(i, unitTokens int) {
	for j := i; j <= i+unitTokens && j < len(r.t); j++ {
		r.t[j].used = true
	}
}

// measures takes numbers that their unit names: heights, weights, ages,
// durations, rates, altitudes.
func (r *reader) measures() {
	for i := range r.t {
		if !r.t[i].free() || r.feet(i) || r.ageSex(i) || r.ageBeforeSex(i) {
			continue
		}
		u, n := r.unitAfter(i)
		if u == "" {
			r.ofGestation(i)
			continue
		}
		if r.labelled(i) && !(bodyUnit(u) && r.t[i-1].is(senseLabel) && r.t[i-1].e.weak) {
			continue
		}
		r.byUnit(i, u, n)
	}
	r.heightBesideSex()
	r.letterSex()
}

// bodyUnit says that a unit is one of age, weight or height: a letter in front
// of such a number is the sex and no label.
func bodyUnit(u string) bool {
	switch u {
	case uKg, uPound, uCm, uInch, uYear, uMonth:
		return true
	}
	return false
}

// labelled says that a label stands directly before the number.
func (r *reader) labelled(i int) bool {
	for j := i - 1; j >= 0 && j >= i-3; j-- {
		switch t := &r.t[j]; {
		case t.is(senseLabel):
			return t.e.q != physio.FiO2 || true
		case t.sep(":=~") || t.is(senseFiller):
		default:
			return false
		}
	}
	return false
}

func (r *reader) byUnit(i int, u string, n int) {
	t, s := &r.t[i], r.sample()
	switch u {
	case uTime:
		r.duration(i, n)
	case uYear:
		r.years(i, u, n)
	case uMonth, uDay, uWeek:
		r.daysToMonths(i, u, n)
	case uKg, uPound:
		if !s.Has(physio.Weight) {
			r.store(physio.Weight, i, u, n)
		}
	case uGram:
		if t.v >= 300 && t.v < 8000 {
			r.store(physio.Weight, i, u, n)
		}
	case uCm:
		if t.v >= 30 && !s.Has(physio.Height) {
			r.store(physio.Height, i, u, n)
		} else {
			r.t[i].taken = true
		}
	case uInch:
		if t.v >= 10 && t.v <= 90 && r.t[i+1].glued || t.v >= 48 && t.v <= 84 && r.t[i+1].s != "in" {
			r.store(physio.Height, i, u, n)
		}
	case uMetre, uFoot:
		r.length(i, u, n)
	case uC, uF:
		if t.v > 25 && !r.joined(i) && (r.t[i+1].glued || len(r.t[i+1].s) > 1) {
			r.store(physio.Temp, i, u, n)
		}
	default:
		if q, ok := namedByUnit[u]; ok {
			r.store(q, i, u, n)
		}
	}
}

// namedByUnit are the units that belong to one quantity only.
var namedByUnit = map[string]physio.Quantity{uPerMin: physio.RR, uMLKg: physio.VTPerKg, uHz: physio.Hertz}

// store reads the number at i as q.
func (r *reader) store(q physio.Quantity, i int, u string, n int) {
	unit, note := r.pressureUnit(q, &r.t[i], u)
	f := formOf(q, &r.t[i], unit, r.adult())
	if note != "" && f.note == "" {
		f.note = note
	}
	r.take(i, n)
	r.put(f, q, r.t[i].typed())
}

// pressureUnit gives the unit of a gas pressure beside the gas: the channel's,
// unless the size speaks against it, which is said.
func (r *reader) pressureUnit(q physio.Quantity, t *token, u string) (string, NoteCode) {
	most := 20.0 // kPa
	switch q {
	case physio.EtCO2, physio.TcCO2, physio.PeCO2, physio.PvCO2:
	case physio.TcO2, physio.PvO2:
		most = 30
	default:
		return u, ""
	}
	house := r.h.Units == KPa
	switch {
	case u == "" && house && t.v <= most:
		return uKPa, ""
	case house && u != uKPa:
		return u, NoteReadMmHg
	case u == uKPa && !house, u == "" && t.v < 9.5 && t.decimals > 0:
		return uKPa, NoteReadKPa
	}
	return u, ""
}

// put keeps a form that was read, or its question.
func (r *reader) put(f form, q physio.Quantity, typed string) {
	if f.skip {
		return
	}
	if f.ask != nil {
		r.ask(*f.ask)
		return
	}
	if have, ok := r.sample().Get(f.q); ok && math.Abs(have-f.v) > 1e-9 {
		r.twice(f.q, have, f.v, typed)
		return
	}
	r.sample().Set(f.q, f.v)
	if f.note != "" {
		typedNote := typed
		if f.note == NoteAge90 {
			typedNote = "" // the exact age is not kept
		}
		r.note(f.note, f.q, typedNote, f.v)
	}
}

// twice asks which of two values of one quantity counts.
func (r *reader) twice(q physio.Quantity, a, b float64, typed string) {
	switch q {
	case physio.RR: // set and measured rates are often typed one after another
		if !r.sample().Has(physio.RRSet) && r.controlled {
			r.sample().Set(physio.RRSet, a)
			r.sample().Set(physio.RR, b)
			return
		}
	case physio.Age, physio.Weight:
		return
	}
	if r.claims {
		return
	}
	r.sample().Drop(q)
	r.ask(Question{Code: AskTwice, Quantity: q, Typed: typed, Choices: []Choice{choose(q, b), choose(q, a)}})
}

// duration takes a time span; a change within the last half hour is said.
func (r *reader) duration(i, n int) {
	r.t[i].taken = true
	minutes := r.t[i].v
	if s := r.t[i+n].s; s[0] == 'h' {
		minutes *= 60
	} else if s[0] == 'd' || s[0] == 's' {
		return
	}
	if minutes < 30 && r.near(i, 8, "changed", "increased", "decreased", "turned", "went", "started", "switched", "weaned", "change", "put", "placed", "changed to", "up", "down", "moved") && !r.near(i, 8, "later") {
		r.sample().Circumstance |= physio.JustChanged
	}
}

// rateNamed says that another word than the one at i names a rate.
func (r *reader) rateNamed(i int) bool {
	for j := range r.t {
		if j != i && r.t[j].is(senseLabel) && r.t[j].e.q == physio.RR && r.t[j].s != "r" {
			return true
		}
	}
	return false
}
