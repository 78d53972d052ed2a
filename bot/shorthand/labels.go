package shorthand

import (
	"math"
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
		r.t[j].taken, r.t[j+2].taken = true, true // "peep 5 or 8": no value
		return
	}
	if r.t[i].e.q == physio.PHq && r.t[j].kind == tokNumber && r.t[i].s != hydrogenWord && !phLike(r.t[j].v) && j > i+1 {
		if s, _ := phSlips(r.t[j].v, r.t[j].s); len(s) == 0 && r.t[j].v > 14 {
			return
		}
	}
	u, n := r.unitAfter(j)
	if r.rangeBehind(j) {
		r.t[j+2].taken = true
		f := formOf(r.t[i].e.q, &r.t[j], u, r.adult())
		r.note(NoteRangeLow, f.q, r.t[j].s+"-"+r.t[j+2].s, f.v)
	}
	r.labelledValue(i, j, u, n)
}

// rangeBehind says that a range was typed: "spo2 88-90".
func (r *reader) rangeBehind(j int) bool {
	if j+2 >= len(r.t) || !r.t[j+1].sep("-") || !r.t[j+1].glued || !r.t[j+2].free() || !r.t[j+2].glued {
		return false
	}
	a, b := &r.t[j], &r.t[j+2]
	return b.v > a.v && b.v < 1.5*a.v && a.decimals == b.decimals && a.decimals == 0 && (j+3 >= len(r.t) || !r.t[j+3].sep("-/"))
}

// satInFront says that the saturation stands in front of its label although a
// number follows too: "91% sat 40%".
func (r *reader) satInFront(i int) bool {
	q := r.t[i].e.q
	if i == 0 || q != physio.SaO2 && q != physio.SpO2 {
		return false
	}
	p := &r.t[i-1]
	if !p.free() || p.v < 60 || p.v > 100 || r.joined(i-1) || !p.percent && !r.t[i].glued {
		return false
	}
	j, ok := r.numberAfter(i)
	return ok && r.t[j].percent && r.t[j].v < 60
}

// postfix reads values that stand in front of their labels all along the
// line: "7.28 pH, 58 CO2, 62 O2".
func (r *reader) postfix() {
	for i := range r.t {
		if !r.t[i].free() || i > 0 && (r.t[i-1].is(senseLabel) || r.t[i-1].sep("/:=")) {
			continue
		}
		pairs, end := r.pairsFrom(i)
		if len(pairs) < 2 || end < len(r.t) && (r.t[end].kind == tokNumber || r.t[end].sep(":=")) {
			continue
		}
		for _, k := range pairs {
			u, _ := r.unitAfter(k[0])
			r.labelledValue(k[1], k[0], u, 0)
		}
		return
	}
}

// pairsFrom lists numbers that a label follows, one after another.
func (r *reader) pairsFrom(i int) (pairs [][2]int, end int) {
	for next := i; next < len(r.t) && r.t[next].free(); {
		j := next + 1
		if j < len(r.t) && r.t[j].is(senseUnit) {
			j++
		}
		if j >= len(r.t) || !r.t[j].is(senseLabel) || r.t[j].e.weak {
			break
		}
		pairs = append(pairs, [2]int{next, j})
		next, end = j+1, j+1
		for next < len(r.t) && r.t[next].sep(",;/|\n") {
			next++
		}
	}
	return pairs, end
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
	v := t.signed()
	if q != physio.BE {
		v = t.v
	}
	if deficit {
		if t.sign == '-' {
			r.note(NoteSign, physio.BE, t.typed(), -t.v)
		}
		v = -t.v
		if t.v == 0 {
			v = 0
		}
	}
	raw := &rawValue{v: v, labelled: true, decimals: t.decimals, typed: t.typed(), at: j}
	if u == uKPa || u == uMmHg {
		raw.unit = u
	}
	if have := r.raw[q]; have != nil && have.v != v {
		if r.claims {
			r.raw[q] = raw
			return
		}
		a, b := have.v, v
		delete(r.raw, q)
		r.ask(Question{Code: AskTwice, Quantity: q, Typed: t.typed(), Choices: []Choice{choose(q, b), choose(q, a)}})
		return
	}
	r.raw[q] = raw
}

// rangeMark asks about a value beyond the analyser's range.
func (r *reader) rangeMark(q physio.Quantity, j int) bool {
	t := &r.t[j]
	if t.than == 0 {
		return false
	}
	code := AskOverRange
	if t.than == '<' {
		code = AskUnderRange
	}
	ask := Question{Code: code, Quantity: q, Typed: t.typed()}
	if q.Possible(t.v) {
		ask.Value = t.v
		ask.Choices = []Choice{withWord(choose(q, t.v), "use "+t.s), {Word: "leave out", Drop: []physio.Quantity{q}}}
	}
	if t.than == '<' && q == physio.PaO2 {
		ask.Choices = []Choice{{Word: "venous", Blood: physio.Venous}, {Word: "sample fault", Drop: []physio.Quantity{q}}}
	}
	r.ask(ask)
	return true
}

// hydrogen reads a hydrogen ion concentration in nmol/L as a pH.
func (r *reader) hydrogen(j, n int) {
	t := &r.t[j]
	r.take(j, n)
	if t.v < 10 || t.v > 250 {
		r.ask(Question{Code: AskPH, Quantity: physio.PHq, Typed: t.typed()})
		return
	}
	ph := math.Round(float64(physio.Hydrogen(t.v))*1000) / 1000
	r.raw[physio.PHq] = &rawValue{v: ph, labelled: true, decimals: 3, typed: t.typed()}
	r.first, r.last = j, j
	r.note(NoteHydrogen, physio.PHq, t.typed(), ph)
}

// oxygenNumber reads the number behind a bare "o2": litres and per cent are
// supply, not PaO2.
func (r *reader) oxygenNumber(i, j int, u string, n int) bool {
	t := &r.t[j]
	switch {
	case u == uLitre || u == uLPM:
		r.take(j, n)
		r.oxygen = append(r.oxygen, saying{at: j, flow: t.v, hasFlow: true})
	case u == uPercent && t.v >= 86 && i < j:
		r.take(j, n)
		ask := Question{Code: AskPercent, Typed: t.typed(), Quantity: physio.SpO2, Choices: []Choice{
			withWord(choose(physio.SpO2, t.v/100), "saturation"), withWord(choose(physio.FiO2, t.v/100), "FiO2")}}
		r.ask(ask)
	case u == uPercent, t.v < 1 && t.v >= 0.21:
		r.take(j, n)
		r.sayFiO2(j, formOf(physio.FiO2, t, u, r.adult()))
	default:
		return false
	}
	return true
}

// isTranscutaneous says that the line speaks of transcutaneous values.
func (r *reader) isTranscutaneous() bool {
	for i := range r.t {
		if r.t[i].is(senseLabel) && r.t[i].e.q == physio.TcCO2 {
			return true
		}
	}
	return false
}

// transcutaneous asks which of the two a "tccO2" was.
func (r *reader) transcutaneous(i int) {
	j, ok := r.numberAfter(i)
	if !ok {
		return
	}
	u, n := r.unitAfter(j)
	r.take(j, n)
	f := formOf(physio.TcCO2, &r.t[j], u, true)
	r.ask(Question{Code: AskTc, Quantity: physio.TcCO2, Typed: r.t[j].typed(), Choices: []Choice{
		withWord(choose(physio.TcCO2, f.v), "CO2"), withWord(choose(physio.TcO2, f.v), "O2")}})
}

// meanPressure reads MAP: airway pressure on an oscillator and in newborns,
// arterial pressure when it is too high for an airway, else asked.
func (r *reader) meanPressure(i int) {
	j, ok := r.numberAfter(i)
	if !ok {
		return
	}
	u, n := r.unitAfter(j)
	v := r.t[j].v
	r.take(j, n)
	switch {
	case v > 45 || u == uMmHg:
	case u == uH2O || r.newborn() || r.population() == physio.Child || r.oscillated():
		r.sample().Set(physio.Pmean, v)
	default:
		r.ask(Question{Code: AskMAP, Quantity: physio.Pmean, Typed: r.t[j].typed(), Value: v, Choices: []Choice{
			withWord(choose(physio.Pmean, v), "airway"), {Word: "arterial", Drop: []physio.Quantity{physio.Pmean}}}})
	}
}

func (r *reader) oscillated() bool {
	for i := range r.t {
		if t := &r.t[i]; t.kind == tokWord && t.e != nil && (t.e.mode == physio.HFOV || t.e.mode == physio.HFJV) {
			return true
		}
	}
	return r.h.Earlier != nil && r.h.Earlier.Mode == physio.HFOV
}

// labelsBehind reads a number that stands before its label: "40% fio2".
func (r *reader) labelsBehind() {
	for i := 1; i < len(r.t); i++ {
		t, n := &r.t[i], &r.t[i-1]
		if t.used || !t.is(senseLabel) || !n.free() || n.line != t.line || r.joined(i-1) || r.joinedAhead(i-1) || i-1 <= r.last && i-1 >= r.first && r.first >= 0 {
			continue
		}
		if _, ahead := r.numberAfter(i); ahead || t.e.q == physio.PHq {
			continue
		}
		r.labelledValue(i, i-1, r.percentOf(i-1), 0)
	}
}

func (r *reader) percentOf(i int) string {
	if r.t[i].percent {
		return uPercent
	}
	return ""
}
