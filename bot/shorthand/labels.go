package shorthand

import (
	"strings"

	"galeward/physio"
)

// isCore says that q is read together with the gas.
func isCore(q physio.Quantity) bool {
	for _, c := range coreQuantities {
		if c == q {
			return true
		}
	}
	return false
}

// numberAfter finds the number that the label at i names.
func (r *reader) numberAfter(i int) (int, bool) {
	q := r.t[i].e.q
	for j := i + 1; j < len(r.t) && j < i+9; j++ {
		t := &r.t[j]
		switch {
		case t.kind == tokNumber:
			if t.used {
				if r.equalsAfter(j) {
					continue
				}
				return 0, false
			}
			return j, !t.taken
		case t.word("on") && q != physio.FiO2 && q != physio.OxygenFlow:
			return 0, false
		case t.sep(":=~@(*])") || t.is(senseFiller) && j < i+4 || t.used:
		case t.sep("-") && j+1 < len(r.t) && r.t[j+1].kind == tokNumber:
			if q == physio.BE && !t.glued && r.t[j+1].sign == 0 {
				r.t[j+1].sign = '-'
			}
		case t.sep("\n") && j == i+1:
		case t.word("m") || t.word("f"):
			if !r.equalsAfter(j) {
				return 0, false
			}
		default:
			return 0, false
		}
	}
	return 0, false
}

// equalsAfter says that an equals sign follows within three tokens.
func (r *reader) equalsAfter(j int) bool {
	for k := j + 1; k < len(r.t) && k <= j+5; k++ {
		if r.t[k].sep("=") {
			return true
		}
	}
	return false
}

// headings reads labels in a row and then as many numbers: "pCO2/pO2 58/62",
// "ph co2 o2 bicarb: 7.28 58 62 27".
func (r *reader) headings() {
	for i := 0; i < len(r.t); {
		names, next := r.run(i, func(t *token) bool { return t.is(senseLabel) && !t.used })
		if len(names) < 2 {
			i = max(next, i+1)
			continue
		}
		for next < len(r.t) && r.t[next].sep(":=\n") {
			next++
		}
		numbers, end := r.run(next, func(t *token) bool { return t.free() })
		if len(numbers) != len(names) {
			i = max(next, i+1)
			continue
		}
		for k := range names {
			u, n := r.unitAfter(numbers[k])
			r.labelledValue(names[k], numbers[k], u, n)
		}
		i = end
	}
}

// run lists consecutive tokens that are alike, with separators between.
func (r *reader) run(i int, alike func(*token) bool) (found []int, next int) {
	for next = i; next < len(r.t); next++ {
		t := &r.t[next]
		switch {
		case alike(t):
			found = append(found, next)
		case t.sep("/,|;-") && len(found) > 0, t.is(senseUnit) && len(found) > 0:
		default:
			return found, next
		}
	}
	return found, next
}

// labels reads every label that is followed by its number.
func (r *reader) labels() {
	for i := range r.t {
		t := &r.t[i]
		if t.used || t.kind != tokWord || t.e == nil {
			continue
		}
		switch t.e.sense {
		case senseLabel:
			r.label(i)
		case senseMean:
			r.meanPressure(i)
		case senseTcO:
			r.transcutaneous(i)
		}
	}
}

func (r *reader) label(i int) {
	if r.satInFront(i) {
		r.labelledValue(i, i-1, r.percentOf(i-1), 0)
		return
	}
	j, ok := r.numberAfter(i)
	if !ok || r.t[i].e.weak && !r.weakFits(i, j) {
		return
	}
	if r.gasStart(j) && r.t[i].e.q != physio.PHq {
		return
	}
	if j+2 < len(r.t) && r.t[j+1].word("or") && r.t[j+2].kind == tokNumber {
		r.t[i].used, r.t[j].taken, r.t[j+2].taken = true, true, true // "peep 5 or 8": no value
		r.note(NoteNotRead, r.t[i].e.q, r.t[j].typed(), r.t[j].v)
		r.note(NoteNotRead, r.t[i].e.q, r.t[j+2].typed(), r.t[j+2].v)
		return
	}
	if r.t[i].e.q == physio.PHq && r.t[j].kind == tokNumber && r.t[i].s != hydrogenWord && !phLike(r.t[j].v) && j > i+1 {
		if s, _ := phSlips(r.t[j].v, r.t[j].s); len(s) == 0 && r.t[j].v > 14 {
			return
		}
	}
	u, n := r.unitAfter(j)
	if n > 0 && isCore(r.t[i].e.q) && r.t[j+n].e.ofAge() {
		r.span(j, n) // "home o2 6 months": how long, no value
		return
	}
	if r.rangeBehind(j) {
		r.t[j+2].taken = true
		f := formOf(r.t[i].e.q, &r.t[j], u, r.adult())
		r.note(NoteRangeLow, f.q, r.t[j].s+"-"+r.t[j+2].s, f.v)
	}
	r.labelledValue(i, j, u, n)
}

// weakFits says that a spelling of one or two letters may be a label here.
func (r *reader) weakFits(i, j int) bool {
	t, n := &r.t[i], &r.t[j]
	if j > i+2 || n.line != t.line {
		return false
	}
	switch t.e.q {
	case physio.RR:
		feet := j+1 < len(r.t) && (r.t[j+1].sep("'") || r.t[j+1].is(senseUnit) && r.t[j+1].e.unit != uPerMin)
		return !feet && n.v >= 3 && n.v <= 220 && n.decimals == 0 && !n.percent && !r.gasStart(j)
	case physio.Temp:
		return n.v >= 25 && n.v < 112
	case physio.SpO2Pre, physio.SpO2Post:
		return n.v >= 40 && n.v <= 100 && n.decimals == 0 && !r.joinedAhead(j)
	case physio.CardiacOutput:
		return n.decimals == 1 && n.v < 15
	}
	return true
}

// joinedAhead says that the number at j heads a chain.
func (r *reader) joinedAhead(j int) bool {
	return j+2 < len(r.t) && r.t[j+1].sep("/|\\") && r.t[j+2].kind == tokNumber
}

// labelledValue keeps the number at j under the label at i.
func (r *reader) labelledValue(i, j int, u string, n int) {
	e := r.t[i].e
	q, t := e.q, &r.t[j]
	switch {
	case q == physio.PaO2 && (r.t[i].s == "o2" || r.t[i].s == "ox") && r.oxygenNumber(i, j, u, n):
		r.t[i].used = true
		return
	case q == physio.PaCO2 && t.percent, q == physio.PaO2 && t.percent:
		return
	case r.t[i].s == hydrogenWord || r.t[i].s == "hplus" || r.t[i].s == "h ion":
		r.hydrogen(j, n)
		return
	}
	r.t[i].used = true
	if q == physio.TotalCO2 && r.t[i].s == "tco2" && r.isTranscutaneous() {
		q = physio.TcO2 // tcCO2 stands beside it: tcO2 with its usual spelling
	}
	r.measured = r.measured || q == physio.RR && saysMeasured(r.t[i].s)
	if isCore(q) && q != physio.SaO2 {
		r.keepRaw(q, i, j, u, n, e.number < 0)
		return
	}
	if q == physio.FiO2 {
		r.take(j, n)
		r.sayFiO2(j, formOf(q, t, u, r.adult()))
		return
	}
	if q == physio.Height && u == uMetre {
		r.metresOrSex(j, n)
	}
	if q == physio.OxygenFlow {
		r.take(j, n)
		r.oxygen = append(r.oxygen, saying{at: j, flow: t.v, hasFlow: true})
		return
	}
	r.store(q, j, u, n)
}

// saysMeasured says that the spelling of a rate names the patient's own.
func saysMeasured(word string) bool {
	for _, w := range []string{"tot", "spont", "measured", "patient", "pt ", "actual", "breathing"} {
		if strings.Contains(word, w) {
			return true
		}
	}
	return false
}

// keepRaw keeps a labelled core value until the whole gas is weighed.
func (r *reader) keepRaw(q physio.Quantity, i, j int, u string, n int, deficit bool) {
	t := &r.t[j]
	if r.claims && r.raw[q] != nil && !r.raw[q].labelled {
		return
	}
	r.t[i].used = true
	r.take(j, n)
	if r.rangeMark(q, j) {
		return
	}
	raw := &rawValue{v: r.labelledSign(q, t, deficit), labelled: true, decimals: t.decimals, typed: t.typed(), at: j}
	if u == uKPa || u == uMmHg {
		raw.unit = u
	}
	have := r.raw[q]
	if have == nil || have.v == raw.v || r.claims {
		r.raw[q] = raw
		return
	}
	delete(r.raw, q)
	r.ask(Question{Code: AskTwice, Quantity: q, Typed: t.typed(), Choices: []Choice{
		choose(q, r.canonical(q, raw)), choose(q, r.canonical(q, have))}})
}

// labelledSign gives the number its sign: only a base excess has one, and a
// deficit turns it.
func (r *reader) labelledSign(q physio.Quantity, t *token, deficit bool) float64 {
	switch {
	case q != physio.BE:
		return t.v
	case !deficit:
		return t.signed()
	case t.sign == '-':
		r.note(NoteSign, physio.BE, t.typed(), -t.v)
	}
	return 0 - t.v
}
