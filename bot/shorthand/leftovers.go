package shorthand

import (
	"galeward/physio"
)

// leftovers reads or asks about numbers that nothing has taken.
func (r *reader) leftovers() {
	r.secondGroup()
	if r.first < 0 {
		return
	}
	for j := r.last + 1; j < len(r.t) && j <= r.last+3; j++ {
		t := &r.t[j]
		if j+1 < len(r.t) && r.t[j+1].is(senseSwallow) || t.free() && r.joinedAhead(j) {
			return // "2 mg", "60/40": it belongs to what follows
		}
		if u, _ := r.unitAfter(j); t.free() && u == "" && t.sign == 0 && t.than == 0 && t.decimals == 0 && !r.unknownBefore(j) {
			r.bareNumber(j)
			return
		}
		if !t.sep(",/;.|") && !(t.kind == tokNumber && t.used) {
			return
		}
	}
}

// bareNumber reads a bare number behind the gas: from 36 up it is FiO2 when it
// is no saturation, and said; below it may be a rate or litres and is asked.
func (r *reader) bareNumber(j int) {
	t, s := &r.t[j], r.sample()
	if s.Has(physio.FiO2) || s.Has(physio.OxygenFlow) || s.Device == physio.Air {
		if v := t.v / 100; v >= 0.5 && v <= 1 && !s.Has(physio.SaO2) && r.satFits(v) {
			r.keepSat(j, NoteBareSat)
		}
		return
	}
	v := t.v / 100
	switch sat := v > 0.5 && v <= 1 && !s.Has(physio.SaO2) && r.satFits(v); {
	case sat && !r.typicalFiO2(t.v) || sat && !r.ceilingAllows(v):
		r.keepSat(j, NoteBareSat)
	case sat && v >= 0.85:
		r.take(j, 0)
		r.ask(Question{Code: AskPercent, Quantity: physio.FiO2, Typed: t.typed(), Choices: []Choice{
			withWord(choose(physio.SaO2, v), "saturation"), withWord(choose(physio.FiO2, v), "FiO2")}})
	case t.v >= 36 && t.v <= 100:
		r.take(j, 0)
		s.Set(physio.FiO2, v)
		r.note(NoteBareFiO2, physio.FiO2, t.typed(), v)
	case t.v >= 1 && t.v < 36:
		r.take(j, 0)
		r.askBare(t)
	}
}

func (r *reader) askBare(t *token) {
	ask := Question{Code: AskBare, Quantity: physio.FiO2, Typed: t.typed()}
	if t.v >= 21 {
		ask.Choices = append(ask.Choices, withWord(choose(physio.FiO2, t.v/100), "FiO2"))
	} else if t.v <= 15 {
		flow := withWord(choose(physio.OxygenFlow, t.v), number(t.v)+" L")
		if t.v <= mostCannula {
			flow.Device = physio.Cannula
		}
		ask.Choices = append(ask.Choices, flow)
	}
	if t.v >= 8 && !r.sample().Has(physio.RR) {
		ask.Choices = append(ask.Choices, withWord(choose(physio.RR, t.v), "rate"))
	}
	r.ask(ask)
}

// onTheOxygen reads "45 on the o2": litres or per cent, asked when both can be.
func (r *reader) onTheOxygen() {
	for i := range r.t {
		t := &r.t[i]
		if !t.free() || t.sign != 0 || t.percent || !r.oxygenWordBehind(i) || i >= r.first && i <= r.last && r.first >= 0 {
			continue
		}
		r.take(i, 0)
		switch v := t.v; {
		case v > mostHighFlow && v <= 100, v >= 0.21 && v < 1:
			r.sayFiO2(i, formOf(physio.FiO2, t, "", true))
		case v >= 21 && v <= mostHighFlow:
			r.ask(Question{Code: AskFlowOrFiO2, Quantity: physio.FiO2, Typed: t.typed(), Choices: []Choice{
				choose(physio.FiO2, v/100), choose(physio.OxygenFlow, v)}})
		case v > 0 && v < 21:
			r.ask(*askFiO2(v, t.typed()))
		}
	}
}

func (r *reader) oxygenWordBehind(i int) bool {
	for j := i + 1; j < len(r.t) && j <= i+3; j++ {
		t := &r.t[j]
		if t.word("o2") || t.word("oxygen") {
			_, ahead := labelNumber(r, j)
			return !ahead && (j > i+1 || i > 0 && r.near(i, 1, "on", "to", "at", "up to", "down to"))
		}
		if !t.is(senseFiller) && !t.word("on the") && !t.word("of") {
			return false
		}
	}
	return false
}

// labelNumber finds the number of a token that may be a label.
func labelNumber(r *reader, j int) (int, bool) {
	if !r.t[j].is(senseLabel) {
		return 0, false
	}
	return r.numberAfter(j)
}

// lonePH takes the one number of a correction that can only be a pH.
func (r *reader) lonePH() {
	found := -1
	for i := range r.t {
		if !r.t[i].free() {
			continue
		}
		if found >= 0 {
			return
		}
		found = i
	}
	if found < 0 || r.sample().Has(physio.PHq) || r.first >= 0 {
		return
	}
	if t := &r.t[found]; phLike(t.v) && t.decimals == 2 && t.sign == 0 {
		r.take(found, 0)
		r.sample().Set(physio.PHq, t.v)
	}
}

// secondGroup asks about three or more joined numbers without a pH.
func (r *reader) secondGroup() {
	if r.first < 0 {
		return
	}
	for i := range r.t {
		if !r.t[i].free() || r.joined(i) || r.dateLike(i) || i <= r.last && i >= r.first {
			continue
		}
		n, slashes := chainAhead(r.t, i)
		if n < 3 || !slashes {
			continue
		}
		for j, k := i, 0; j < len(r.t) && k < n; j++ {
			if r.t[j].free() {
				r.t[j].taken = true
				k++
			}
		}
		r.ask(Question{Code: AskSecondGroup, Quantity: physio.PHq, Typed: r.t[i].typed(), Choices: []Choice{{Word: "pasted twice"}, {Word: "another gas"}}})
		return
	}
}
