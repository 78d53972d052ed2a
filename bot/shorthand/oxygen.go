package shorthand

import (
	"math"

	"galeward/physio"
)

// saying is one thing that the line says on oxygen, in the order of the line.
type saying struct {
	at      int // token
	device  physio.Device
	fio2    float64
	flow    float64
	hasFlow bool
}

// sayFiO2 keeps a read FiO2, or its question.
func (r *reader) sayFiO2(i int, f form) {
	switch {
	case f.q == physio.OxygenFlow:
		r.oxygen = append(r.oxygen, saying{at: i, flow: f.v, hasFlow: true})
	case f.ask != nil:
		r.ask(*f.ask)
	default:
		r.oxygen = append(r.oxygen, saying{at: i, fio2: f.v})
	}
}

// readOxygen finds litres, percentages, "on 40", bare fractions and air.
func (r *reader) readOxygen() {
	for i := range r.t {
		t := &r.t[i]
		switch {
		case t.is(senseAir) && !r.negated(i):
			r.oxygen = append(r.oxygen, saying{at: i, device: physio.Air, fio2: 0.21})
		case !t.free() || t.sign != 0:
		case t.percent:
			r.percentage(i)
		default:
			r.litres(i)
		}
	}
	for i := range r.t {
		if t := &r.t[i]; t.free() && t.sign == 0 {
			r.behindOn(i)
		}
	}
	r.bareFraction()
}

// litres reads a flow.
func (r *reader) litres(i int) {
	u, n := r.unitAfter(i)
	if u == uLPMKg {
		r.flowPerKg(i, n)
		return
	}
	if u != uLitre && u != uLPM {
		return
	}
	r.take(i, n)
	v := r.part(i)
	if low, ok := r.lowerEnd(i); ok {
		r.note(NoteRangeLow, physio.OxygenFlow, number(low)+"-"+r.t[i].s, low)
		v = low
	}
	if !physio.OxygenFlow.Possible(v) {
		r.ask(*askImpossible(physio.OxygenFlow, v, r.t[i].typed()))
		return
	}
	if v == 0 {
		r.oxygen = append(r.oxygen, saying{at: i, device: physio.Air, fio2: 0.21, hasFlow: true})
		return
	}
	r.oxygen = append(r.oxygen, saying{at: i, flow: v, hasFlow: true})
}

// flowPerKg reads a flow per kg of weight. Without a weight it is no flow yet,
// and asked.
func (r *reader) flowPerKg(i, n int) {
	r.take(i, n)
	t := &r.t[i]
	kg, ok := r.sample().Get(physio.Weight)
	if !ok && r.h.Earlier != nil {
		kg, ok = r.h.Earlier.Get(physio.Weight)
	}
	flow := math.Round(t.v*kg*10) / 10
	if !ok || !physio.OxygenFlow.Possible(flow) {
		for j := range r.t {
			if u, _ := r.unitAfter(j); r.t[j].kind == tokNumber && (u == uLitre || u == uLPM) {
				return // the whole flow stands beside it
			}
		}
		r.ask(Question{Code: AskFlowPerKg, Quantity: physio.OxygenFlow, Typed: t.typed()})
		return
	}
	r.oxygen = append(r.oxygen, saying{at: i, flow: flow, hasFlow: true})
	r.note(NoteFlowPerKg, physio.OxygenFlow, t.typed(), flow)
}

// part reads the number at i, which may end a fraction: 1/2 L, 1 1/2 L.
func (r *reader) part(i int) float64 {
	v := r.t[i].v
	if i < 2 || !r.t[i-1].sep("/") || !r.t[i-1].glued || !r.t[i-2].free() {
		return v
	}
	top := &r.t[i-2]
	if top.v >= v || v != 2 && v != 4 && v != 8 && v != 16 || top.decimals+r.t[i].decimals > 0 {
		return v
	}
	top.used = true
	v = top.v / v
	if i >= 3 && r.t[i-3].free() && r.t[i-3].v <= 6 && r.t[i-3].decimals == 0 && !r.joined(i-3) && !(i >= 4 && r.t[i-4].free()) {
		r.t[i-3].used = true
		v += r.t[i-3].v
	}
	return v
}

// lowerEnd finds the lower end of a range that ends at i: 2-3 L, 40-50 %.
func (r *reader) lowerEnd(i int) (float64, bool) {
	if i < 2 || !r.t[i-1].sep("-") || !r.t[i-2].free() || r.t[i-2].v >= r.t[i].v || r.t[i-2].v < r.t[i].v/3 || r.joined(i-2) {
		return 0, false
	}
	r.t[i-2].used = true
	return r.t[i-2].v, true
}

// percentage reads a bare percentage: FiO2, or the saturation when it fits the
// PaO2, is no number that people set, or an FiO2 is said beside it.
func (r *reader) percentage(i int) {
	t := &r.t[i]
	v := t.v / 100
	if v < 0.205 || v > 1 {
		r.take(i, 0)
		f := formOf(physio.FiO2, t, uPercent, true)
		r.sayFiO2(i, f)
		return
	}
	if s := r.sample(); r.first < 0 && !s.Has(physio.SpO2) && !s.Has(physio.SaO2) && v >= 0.7 && !r.saidBefore(i) && r.otherFiO2(i) {
		r.take(i, 0) // "93% on 2L": the oxygen is said beside it
		s.Set(physio.SpO2, v)
		r.note(NoteBareSat, physio.SpO2, t.typed(), v)
		return
	}
	if r.first >= 0 && !r.saidBefore(i) && r.raw[physio.SaO2] == nil && !r.sample().Has(physio.SaO2) && v > 0.5 && r.satFits(v) {
		other := r.otherFiO2(i)
		switch {
		case other && !r.after(i, "on"), !other && !r.typicalFiO2(t.v):
			r.keepSat(i, NoteBareSat)
			return
		case !other && v >= 0.85 && r.ceilingAllows(v) && r.adjacent(i) && v < 1:
			r.take(i, 0)
			r.ask(Question{Code: AskPercent, Quantity: physio.FiO2, Typed: t.typed(), Choices: []Choice{
				withWord(choose(physio.FiO2, v), "FiO2"), withWord(choose(physio.SaO2, v), "saturation")}})
			return
		}
	}
	r.take(i, 0)
	if low, ok := r.lowerEnd(i); ok && low >= 21 {
		r.note(NoteRangeLow, physio.FiO2, number(low)+"-"+t.s, low/100)
		v = low / 100
	}
	r.oxygen = append(r.oxygen, saying{at: i, fio2: math.Max(v, 0.21)})
}

// saidBefore says that words in front mark the number as oxygen.
func (r *reader) saidBefore(i int) bool {
	return r.after(i, "on") || r.after(i, "@") || i > 0 && r.t[i-1].is(senseDevice)
}

func (r *reader) after(i int, what string) bool {
	if i == 0 {
		return false
	}
	p := &r.t[i-1]
	return p.word(what) || p.sep("@") && what == "@" || what == "on" && (p.word("at") || p.word("with"))
}

// adjacent says that the number follows the chain directly.
func (r *reader) adjacent(i int) bool { return r.first >= 0 && i > r.last && i-r.last <= 2 }

// otherFiO2 says that another free percentage, or an FiO2, is in the line.
func (r *reader) otherFiO2(i int) bool {
	for j := range r.t {
		t := &r.t[j]
		if j != i && t.free() && t.percent && t.v >= 21 {
			return true
		}
		if t.is(senseAir) {
			return true
		}
	}
	for _, o := range r.oxygen {
		if o.fio2 > 0 || o.hasFlow {
			return true
		}
	}
	for j := i + 1; j < len(r.t); j++ {
		if u, _ := r.unitAfter(j); r.t[j].free() && (u == uLitre || u == uLPM) {
			return true
		}
	}
	return false
}

// behindOn reads "on 40", "@40", "on 2".
func (r *reader) behindOn(i int) {
	t := &r.t[i]
	if !r.after(i, "on") && !r.after(i, "@") || t.than != 0 || r.gasStart(i) || r.joinedAhead(i) {
		return
	}
	if r.t[i-1].word("with") {
		return
	}
	switch v := t.v; {
	case v >= 21 && v <= 100 && t.decimals == 0, v >= 0.21 && v <= 1 && t.decimals > 0:
		r.take(i, 0)
		r.sayFiO2(i, formOf(physio.FiO2, t, "", true))
	case v >= 1 && v <= 20 && r.t[i-1].word("on") && r.first >= 0:
		r.take(i, 0)
		r.ask(*askFiO2(v, t.typed()))
	}
}

// bareFraction reads .55 or 0.6 that stands alone.
func (r *reader) bareFraction() {
	for i := range r.t {
		t := &r.t[i]
		if !t.free() || t.sign != 0 || t.than != 0 || t.decimals == 0 || t.v < 0.21 || t.v > 1 || r.joined(i) || r.unknownBefore(i) {
			continue
		}
		if u, _ := r.unitAfter(i); u != "" {
			continue
		}
		r.take(i, 0)
		r.sayFiO2(i, formOf(physio.FiO2, t, "", true))
	}
}

// unknownBefore says that a word which the vocabulary does not know stands
// directly before the number and so owns it.
func (r *reader) unknownBefore(i int) bool {
	if i == 0 || r.t[i-1].kind != tokWord || r.t[i-1].line != r.t[i].line {
		return false
	}
	if r.takesBack(i - 1) {
		return false
	}
	e := r.t[i-1].e
	return e == nil || e.sense == senseWord || e.sense == senseLabel && !r.t[i-1].used || e.sense == senseTime
}

// takesBack says that a word takes a typed value back, and owns no number.
func (r *reader) takesBack(i int) bool {
	for _, w := range []string{"sorry", "oops", "whoops", "woops", "correction", "typo", "mistyped", "mistype"} {
		if r.t[i].word(w) {
			return true
		}
	}
	return false
}
