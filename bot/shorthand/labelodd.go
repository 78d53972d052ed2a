package shorthand

import (
	"math"

	"galeward/physio"
)

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
	raw := &rawValue{v: t.v}
	if u, _ := r.unitAfter(j); u == uKPa || u == uMmHg {
		raw.unit = u
	}
	if x := r.canonical(q, raw); q.Possible(x) {
		ask.Value = x
		ask.Choices = []Choice{withWord(choose(q, x), "use "+t.s), {Word: "leave out", Drop: []physio.Quantity{q}}}
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
	case u == "" && t.v >= 1 && t.v <= 15 && t.decimals == 0 && r.wholeGas():
		r.take(j, n) // beside a whole gas a small "o2 3" is no PaO2
		r.ask(*askFiO2(t.v, t.typed()))
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

// wholeGas says that the line holds a chain of four or more values.
func (r *reader) wholeGas() bool {
	for i := range r.t {
		if n, _ := chainAhead(r.t, i); n >= 4 && r.gasStart(i) {
			return true
		}
	}
	return false
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
	if u == uPercent { // no pressure: TC is the trach collar
		r.oxygen = append(r.oxygen, saying{at: i, device: physio.TracheostomyMask})
		r.sayFiO2(j, formOf(physio.FiO2, &r.t[j], u, true))
		return
	}
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
		if n.percent && t.e.q.Info().Unit != "fraction" {
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

// rangeBehind says that a range was typed: "spo2 88-90".
func (r *reader) rangeBehind(j int) bool {
	if j+2 >= len(r.t) || !r.t[j+1].sep("-") || !r.t[j+1].glued || !r.t[j+2].free() || !r.t[j+2].glued {
		return false
	}
	a, b := &r.t[j], &r.t[j+2]
	return b.v > a.v && b.v <= 3*a.v && a.decimals == b.decimals && a.decimals == 0 && (j+3 >= len(r.t) || !r.t[j+3].sep("-/"))
}
