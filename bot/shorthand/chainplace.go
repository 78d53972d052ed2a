package shorthand

import (
	"math"

	"galeward/physio"
)

// place decides what a number of the chain is: by its slot, unless its sign,
// its percent sign or its size say that it is none of that kind.
func (c *chainReader) place(t *token, spaced bool) bool {
	r := c.r
	q, has := c.current()
	if has && c.repeats(t, q) {
		c.twice(t, q)
		return true
	}
	for has && r.raw[q] != nil {
		c.slot++
		q, has = c.current()
	}
	isSat := has && q == physio.SaO2
	switch {
	case t.percent && !isSat:
		return c.percent(t, q, has, spaced)
	case t.percent && spaced:
		return false // its role is weighed with the oxygen
	case t.sign != 0 && c.filled >= 3 && !(has && (q == physio.BE || q == physio.HCO3)):
		return c.baseExcess(t)
	case !has:
		return false
	case isSat:
		return c.saturation(t, spaced)
	}
	c.keep(t, q)
	return true
}

// current is the quantity whose turn it is in the channel's order.
func (c *chainReader) current() (physio.Quantity, bool) {
	if o := c.r.order(); c.slot < len(o) {
		return o[c.slot], true
	}
	return 0, false
}

// keep puts the number in the place of q.
func (c *chainReader) keep(t *token, q physio.Quantity) {
	r := c.r
	u, n := r.unitAfter(c.i)
	raw := &rawValue{v: t.v, decimals: t.decimals, typed: t.typed()}
	separated := q == physio.HCO3 && t.v > 12 && c.dashes()
	if t.sign == '-' && (q == physio.BE || q == physio.HCO3) && !separated {
		raw.v = -t.v
	}
	if u == uKPa || u == uMmHg {
		raw.unit = u
	}
	r.smallPlace = r.smallPlace || q == physio.HCO3 && t.v <= 12 && t.sign != '-'
	r.take(c.i, n)
	r.last = c.i
	if !r.rangeMark(q, c.i) {
		r.raw[q] = raw
	}
	c.i += n
	c.slot++
	c.filled++
}

// repeats says that the number stands in its place although a label outside
// the chain said the quantity too: "co2 58, 7.28/58/62/27". A label
// takes a place out of the chain only when the chain is too short to hold it.
func (c *chainReader) repeats(t *token, q physio.Quantity) bool {
	have := c.r.raw[q]
	inside := have != nil && have.at > c.r.first && have.at < c.i
	if have == nil || !have.labelled || inside || q == physio.PHq || t.percent {
		return false
	}
	return have.v == t.v || c.whole
}

// twice takes a repeated value, and asks when the two differ.
func (c *chainReader) twice(t *token, q physio.Quantity) {
	r := c.r
	have := r.raw[q]
	r.take(c.i, 0)
	r.last = c.i
	c.slot++
	c.filled++
	if have.v == t.v {
		return
	}
	if r.claims { // the gas counts, not what is said of it
		r.raw[q] = &rawValue{v: t.v, decimals: t.decimals, typed: t.typed()}
		return
	}
	delete(r.raw, q)
	r.ask(Question{Code: AskTwice, Quantity: q, Typed: t.typed(), Choices: []Choice{
		choose(q, r.canonical(q, &rawValue{v: t.v})), choose(q, r.canonical(q, have))}})
}

// dashes says that hyphens separate the values: an earlier one stood before
// the PaCO2 or the PaO2, where no sign can be.
func (c *chainReader) dashes() bool {
	for j := c.r.first + 1; j < c.i; j++ {
		if c.r.t[j].sign == '-' || c.r.t[j].sep("-") {
			return true
		}
	}
	return false
}

// percent takes a percentage that stands in another place than the
// saturation's: in the place of PaO2 it is a saturation, and said.
func (c *chainReader) percent(t *token, q physio.Quantity, has, spaced bool) bool {
	r := c.r
	if !has || q != physio.PaO2 && q != physio.PaCO2 || c.filled < 2 && q == physio.PaO2 && r.raw[physio.PaCO2] == nil || t.v < 40 {
		return false
	}
	if q == physio.PaO2 && r.raw[physio.SaO2] == nil {
		if spaced && (c.i+1 >= len(r.t) || r.t[c.i+1].kind != tokNumber || r.t[c.i+1].percent) {
			return false
		}
		r.keepSat(c.i, NoteSatForPaO2)
		r.missed[physio.PaO2] = true
		c.slot++
		c.filled++
		return true
	}
	return false
}

// keepSat keeps the number at i as the sample's saturation.
func (r *reader) keepSat(i int, n NoteCode) {
	t := &r.t[i]
	r.take(i, 0)
	r.last = max(r.last, i)
	r.sample().Set(physio.SaO2, t.v/100)
	if n != "" {
		r.note(n, physio.SaO2, t.typed(), t.v/100)
	}
}

// baseExcess takes a signed number behind the bicarbonate.
func (c *chainReader) baseExcess(t *token) bool {
	if c.r.raw[physio.BE] != nil || t.v > 30 {
		return false
	}
	if t.sign == '+' && !c.r.t[c.i].glued && !c.r.fitsBE(t.v) {
		return false // PEEP
	}
	c.r.raw[physio.BE] = &rawValue{v: t.signed(), decimals: t.decimals, typed: t.typed()}
	c.r.take(c.i, 0)
	c.r.last = c.i
	c.filled++
	return true
}

// saturation weighs a number in the fifth place: a saturation, a base excess,
// or an FiO2 that is asked about.
func (c *chainReader) saturation(t *token, spaced bool) bool {
	r, v := c.r, t.v
	if v >= 0.21 && v <= 1 && t.decimals == 1 && t.sign == 0 && !spaced && r.fitsBE(v) && r.otherFiO2(c.i) {
		r.note(NoteBEPlace, physio.BE, t.typed(), v)
		return c.baseExcess(t)
	}
	joined := c.i > 0 && r.t[c.i-1].sep("/|\\")
	switch fits := r.satFits(v / 100); {
	case c.bicarbonateAfterBE(t):
		return true
	case t.percent && !fits && v >= 21 && (v < 60 || spaced || !joined):
		return false // FiO2, by its sign
	case v > 20 && v <= 100 && (fits || v >= 86 && !spaced):
		if spaced && r.typicalFiO2(v) && !t.percent {
			return false
		}
		r.keepSat(c.i, "")
		c.slot++
		c.filled++
		return true
	case v <= 1 && v > 0.4 && t.decimals >= 2 && r.satFits(v):
		r.take(c.i, 0)
		r.last = c.i
		r.sample().Set(physio.SaO2, v)
		return true
	case v >= 0.21 && v <= 1 && t.decimals > 0 && t.sign == 0:
		c.smallFraction(t, spaced)
		return false
	case v <= 20 && t.decimals <= 1 && r.raw[physio.BE] == nil && r.fitsBE(t.signed()) && !spaced:
		r.note(NoteBEPlace, physio.BE, t.typed(), t.signed())
		return c.baseExcess(t)
	case !spaced && v >= 21 && v <= 100 && t.decimals == 0:
		r.askFifth(c.i)
	}
	return false
}

// smallFraction asks whether 0.4 in the fifth place is FiO2 or a base excess
// that it fits; any other fraction is left to be read as FiO2.
func (c *chainReader) smallFraction(t *token, spaced bool) {
	r := c.r
	if spaced || !r.fitsBE(t.v) || t.decimals > 1 {
		return
	}
	r.take(c.i, 0)
	r.last = c.i
	r.ask(Question{Code: AskFifth, Quantity: physio.FiO2, Typed: t.typed(), Value: t.v, Choices: []Choice{
		withWord(choose(physio.FiO2, t.v), "FiO2"), withWord(choose(physio.BE, t.v), "BE")}})
}

// bicarbonateAfterBE takes a bicarbonate that follows a base excess in the
// bicarbonate place: some laboratories print them in that order.
func (c *chainReader) bicarbonateAfterBE(t *token) bool {
	r := c.r
	be, implied := r.raw[physio.HCO3], 0.0
	if be == nil || be.labelled || r.raw[physio.BE] != nil || t.percent || math.Abs(be.v) > 20 || !r.fitsBE(be.v) {
		return false
	}
	implied, ok := impliedHCO3(r.likelyValues())
	if !ok || math.Abs(implied-t.v) > loud || math.Abs(implied-be.v) < loud {
		return false
	}
	r.raw[physio.BE] = be
	r.raw[physio.HCO3] = &rawValue{v: t.v, decimals: t.decimals, typed: t.typed()}
	r.note(NoteBEPlace, physio.BE, be.typed, be.v)
	r.smallPlace = false
	r.take(c.i, 0)
	r.last = c.i
	c.filled++
	return true
}

// typicalFiO2 says that v is a setting that people type as FiO2.
func (r *reader) typicalFiO2(v float64) bool { return int(v)%5 == 0 || v == 21 || v == 28 || v == 24 }

// askFifth asks about a bare fifth value that is no saturation here.
func (r *reader) askFifth(i int) {
	t := &r.t[i]
	r.take(i, 0)
	r.last = i
	r.ask(Question{Code: AskFifth, Quantity: physio.FiO2, Typed: t.typed(), Value: t.v / 100, Choices: []Choice{
		withWord(choose(physio.FiO2, t.v/100), "FiO2"), withWord(choose(physio.SaO2, t.v/100), "saturation")}})
}
