package shorthand

import (
	"math"

	"galeward/physio"
)

// defaultOrder is the order of unlabelled values when the house has none.
var defaultOrder = []physio.Quantity{physio.PHq, physio.PaCO2, physio.PaO2, physio.HCO3, physio.SaO2}

func (r *reader) order() []physio.Quantity {
	if len(r.h.Order) > 0 && r.placeOfPH() >= 0 {
		return r.h.Order
	}
	return defaultOrder
}

// placeOfPH is where the house's order has the pH, -1 when it has none.
func (r *reader) placeOfPH() int {
	for i, q := range r.h.Order {
		if q == physio.PHq {
			return i
		}
	}
	return -1
}

// chainStart finds the first number of an unlabelled gas: its pH, or so many
// numbers before the pH as the house's order says.
func (r *reader) chainStart() int {
	if k := r.placeOfPH(); k > 0 {
		for i := range r.t {
			if r.t[i].free() && r.phAfter(i, k) {
				return i
			}
		}
		return -1
	}
	for i := range r.t {
		if r.gasStart(i) {
			return i
		}
	}
	return -1
}

// phAfter says that the number k places behind the one at i is a pH and joined
// to it.
func (r *reader) phAfter(i, k int) bool {
	for j, n := i, 0; j < len(r.t); j++ {
		switch t := &r.t[j]; {
		case t.free():
			if n == k {
				return phLike(t.v) && t.decimals > 0
			}
			n++
		case t.sep("/|\\,;-"), t.is(senseOver), t.is(senseUnit):
		default:
			return false
		}
	}
	return false
}

// phLike says that v is in the range of a pH.
func phLike(v float64) bool { return v >= 6.5 && v < 8 }

// gasStart says that an unlabelled gas starts with the number at i: a pH and,
// joined to it, a number that can be a PCO2.
func (r *reader) gasStart(i int) bool { return gasStart(r.t, i) }

func gasStart(t []token, i int) bool {
	p := &t[i]
	if p.kind != tokNumber || p.sign != 0 || p.than != 0 || p.percent || p.used || p.taken {
		return false
	}
	n, slashes := chainAhead(t, i)
	if q, ok := labelDirectlyBefore(t, i); ok && !(slashes && n >= 3 && p.decimals == 2 && q != physio.PaCO2 && q != physio.PaO2) {
		return false
	}
	if phLike(p.v) && p.decimals > 0 {
		if n <= 3 && clockTimes(t, i) || n == 2 && p.decimals == 1 && !secondAtLeast(t, i, 15) {
			return false
		}
		return n >= 2 && (slashes || n >= 3 || p.decimals == 2)
	}
	tied := i > 1 && t[i-1].sep("/|\\,;-") && t[i-2].kind == tokNumber && t[i-1].line == p.line
	if !slashes || n < 3 || tied || p.s == "7" && n < 4 {
		return false
	}
	return oddPH(p) && pressuresFollow(t, i)
}

// clockTimes says that all numbers joined from i on look like clock times with
// points: "7.30-19.00".
func clockTimes(t []token, i int) bool {
	for j, n := i, 0; j < len(t) && n < 3; j++ {
		switch x := &t[j]; {
		case x.kind == tokNumber:
			minutes := math.Mod(math.Round(x.v*100), 100)
			if x.decimals != 2 || x.v >= 24 || math.Mod(minutes, 15) != 0 || minutes >= 60 {
				return false
			}
			n++
		case x.sep("/-,"):
		default:
			return n >= 2
		}
	}
	return true
}

// secondAtLeast says that the next number is at least low.
func secondAtLeast(t []token, i int, low float64) bool {
	for j := i + 1; j < len(t); j++ {
		if t[j].kind == tokNumber {
			return t[j].v >= low
		}
	}
	return false
}

// labelDirectlyBefore finds the label of another quantity than pH that the
// number at i belongs to.
func labelDirectlyBefore(t []token, i int) (physio.Quantity, bool) {
	for j := i - 1; j >= 0 && j >= i-3; j-- {
		switch {
		case t[j].is(senseLabel):
			return t[j].e.q, t[j].e.q != physio.PHq
		case t[j].sep(":=~") || t[j].is(senseFiller):
		default:
			return 0, false
		}
	}
	return 0, false
}

// oddPH says that a number at the head of a chain of three or more may be a
// mistyped pH.
func oddPH(p *token) bool {
	v := p.v
	switch {
	case v >= 6 && v < 9 && (p.decimals > 0 || v == 7):
		return true
	case v >= 65 && v < 80, v >= 650 && v < 800 && p.decimals == 0, v >= 6500 && v < 8000 && p.decimals == 0:
		return true
	}
	return p.decimals > 0 && v < 10 && len(permutations(p.s)) > 0
}

// pressuresFollow says that the next two numbers can be a PCO2 and a PO2.
func pressuresFollow(t []token, i int) bool {
	found := 0
	for j := i + 1; j < len(t) && found < 2; j++ {
		if t[j].kind != tokNumber {
			continue
		}
		if t[j].v < 2 || t[j].v > 700 {
			return false
		}
		found++
	}
	return found == 2
}

// chainAhead counts the numbers that are joined from i on, and says whether
// separators join them.
func chainAhead(t []token, i int) (n int, slashes bool) {
	n, slashes = 1, true
	for j := i + 1; j < len(t); j++ {
		switch x := &t[j]; {
		case x.kind == tokNumber:
			if x.used || x.taken {
				return n, slashes
			}
			if !t[j-1].sep("/|\\,;-:.\n") && !t[j-1].is(senseOver) && x.sign == 0 && !t[j-1].is(senseUnit) {
				if slashes && n >= 3 {
					return n, true // what a blank sets off is no part of the chain
				}
				slashes = false
			}
			n++
		case x.sep("/|\\,;-:.~_"), x.is(senseOver), x.is(senseUnit) && x.e.unit != uTime && x.e.unit != uYear:
		case x.is(senseLabel) && x.e.q != physio.PHq && isCore(x.e.q):
			return n + 1, slashes
		case x.sep("\n") && aloneOnLine(t, j+1):
		case (x.sep("?") || x.word("x")) && j+1 < len(t) && t[j+1].sep("/"):
		default:
			return n, slashes
		}
		if n > 8 {
			break
		}
	}
	return n, slashes
}

// aloneOnLine says that the token at i is the only one of its line.
func aloneOnLine(t []token, i int) bool {
	return i < len(t) && t[i].kind == tokNumber && (i+1 >= len(t) || t[i+1].sep("\n") || t[i+1].is(senseUnit) && (i+2 >= len(t) || t[i+2].sep("\n")))
}

// chain reads the unlabelled values of the gas by the channel's order.
func (r *reader) chain() {
	start := r.chainStart()
	slot := 0
	switch {
	case start >= 0 && r.raw[physio.PHq] == nil:
	case r.raw[physio.PHq] != nil:
		start = r.labelledPH()
		slot = -1
	}
	if start < 0 {
		return
	}
	r.first, r.last = start, start
	if r.claims && slot == 0 {
		r.dropClaims(start)
	}
	n, _ := chainAhead(r.t, start)
	c := &chainReader{r: r, slot: slot, whole: slot == 0 && n >= 4}
	if slot < 0 {
		c.slot = c.after(physio.PHq)
		c.i = start + 1
	} else {
		c.i = start
	}
	c.read()
	r.slashes = c.slashes > 0
}

// dropClaims leaves out what the claims in front of a whole gas repeat: the
// gas counts.
func (r *reader) dropClaims(start int) {
	if n, _ := chainAhead(r.t, start); n < 3 {
		return
	}
	for q, v := range r.raw {
		if v.labelled && q != physio.PHq && v.at < start {
			delete(r.raw, q)
		}
	}
}

// labelledPH finds the number of a labelled pH.
func (r *reader) labelledPH() int {
	for i := range r.t {
		if r.t[i].kind == tokNumber && r.t[i].used && r.t[i].typed() == r.raw[physio.PHq].typed {
			return i
		}
	}
	return -1
}

// chainReader walks the chain.
type chainReader struct {
	r       *reader
	i       int
	slot    int
	filled  int
	seps    int // separators since the last number
	slashes int
	// whole says that the chain, from the pH on, holds at least four values.
	whole bool
	// sep is the separator before the number, style the one of the chain.
	sep, style byte
}

// after is the slot behind q in the channel's order.
func (c *chainReader) after(q physio.Quantity) int {
	for k, o := range c.r.order() {
		if o == q {
			return k + 1
		}
	}
	return c.slot
}

func (c *chainReader) read() {
	for ; c.i < len(c.r.t); c.i++ {
		t := &c.r.t[c.i]
		switch {
		case t.kind == tokNumber && t.used:
			c.seps = 0
			c.r.last = c.i
		case t.kind == tokNumber:
			if t.taken || !c.number(t) {
				return
			}
		case t.is(senseOver):
			c.seps++
			c.sep = '/'
		case t.sep("/|\\;"):
			c.empty()
			c.seps++
			c.sep = t.s[0]
		case t.sep(",-:.~_"):
			c.seps = max(c.seps, 1)
			c.sep = t.s[0]
		case (t.sep("?") || t.word("x")) && c.i+1 < len(c.r.t) && c.r.t[c.i+1].sep("/"), t.used && t.kind == tokWord && c.seps >= 0 && t.is(senseUnit):
		case t.is(senseLabel) && t.used && isCore(t.e.q):
			c.slot = c.after(t.e.q)
		case t.sep("\n") && aloneOnLine(c.r.t, c.i+1), t.is(senseUnit) && t.e.unit != uTime && t.e.unit != uLitre && t.e.unit != uLPM:
		default:
			return
		}
	}
}

// empty steps over a place that was left empty: "7.28//62".
func (c *chainReader) empty() {
	if c.seps == 0 || c.filled == 0 || !c.r.t[c.i-1].sep("/|\\-?_;") && !c.r.t[c.i-1].word("x") {
		return
	}
	if o := c.r.order(); c.slot < len(o) {
		c.r.missed[o[c.slot]] = true
		c.slot++
	}
	c.seps = 0
}

// number puts a number in its place and says whether the chain goes on.
func (c *chainReader) number(t *token) bool {
	r := c.r
	spaced := (c.seps == 0 || c.sep == ',' && c.style != ',') && c.filled > 0 && t.sign == 0
	if c.style == 0 && c.filled > 0 {
		c.style = c.sep
	}
	if o := r.order(); !(c.slot < len(o) && o[c.slot] == physio.PHq) && secondGas(r.t, c.i, c.filled) {
		return false
	}
	if spaced && c.slashes >= 2 && c.filled >= 3 || c.filled > 0 && c.foreignUnit() {
		return false
	}
	if c.filled > 0 {
		if !spaced {
			c.slashes++
		}
	}
	c.seps = 0
	return c.place(t, spaced)
}

// secondGas says that the number at i starts another gas: a pH with two
// decimals, or one with one decimal that a blank sets off. In kPa a PaO2 of 7.4
// looks like a pH.
func secondGas(t []token, i, filled int) bool {
	x := &t[i]
	if !phLike(x.v) || x.sign != 0 || x.percent {
		return false
	}
	return filled >= 2 && x.decimals == 2 || filled >= 3 && x.decimals == 1 && t[i-1].kind == tokNumber && gasStart(t, i)
}

// foreignUnit says that the number carries a unit of something else.
func (c *chainReader) foreignUnit() bool {
	u, _ := c.r.unitAfter(c.i)
	switch u {
	case "", uMmHg, uKPa, uMmolL, uPercent, uNmolL:
		return false
	}
	return true
}

// place decides what a number of the chain is: by its slot, unless its sign,
// its percent sign or its size say that it is none of that kind.
func (c *chainReader) place(t *token, spaced bool) bool {
	r := c.r
	order := r.order()
	q := physio.Quantity(255)
	if c.slot < len(order) {
		q = order[c.slot]
	}
	if q != 255 && c.repeats(t, q) {
		c.twice(t, q)
		return true
	}
	for q != 255 && r.raw[q] != nil {
		c.slot++
		q = 255
		if c.slot < len(order) {
			q = order[c.slot]
		}
	}
	switch {
	case t.percent && q != physio.SaO2:
		return c.percent(t, q, spaced)
	case t.percent && spaced:
		return false // its role is weighed with the oxygen
	case t.sign != 0 && c.filled >= 3 && q != physio.BE && q != physio.HCO3:
		return c.baseExcess(t)
	case q == 255:
		return false
	case q == physio.SaO2:
		return c.saturation(t, spaced)
	}
	u, n := r.unitAfter(c.i)
	raw := &rawValue{v: t.v, decimals: t.decimals, typed: t.typed()}
	if q == physio.BE || q == physio.HCO3 {
		raw.v = t.signed()
		if t.sign == '-' && q == physio.HCO3 && t.v > 12 && c.i > 0 && (c.dashes()) {
			raw.v = t.v
		}
	}
	if u == uKPa || u == uMmHg {
		raw.unit = u
	}
	if q == physio.HCO3 && t.v <= 12 && t.sign != '-' {
		r.smallPlace = true
	}
	r.take(c.i, n)
	r.last = c.i
	if !r.rangeMark(q, c.i) {
		r.raw[q] = raw
	}
	c.i += n
	c.slot++
	c.filled++
	return true
}

// repeats says that the number stands in its place although a label in front
// of the chain said the quantity already: "co2 58, 7.28/58/62/27". A label
// takes a place out of the chain only when the chain is too short to hold it.
func (c *chainReader) repeats(t *token, q physio.Quantity) bool {
	have := c.r.raw[q]
	if have == nil || !have.labelled || have.at >= c.r.first || q == physio.PHq || t.percent {
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
	delete(r.raw, q)
	r.ask(Question{Code: AskTwice, Quantity: q, Typed: t.typed(), Choices: []Choice{choose(q, t.v), choose(q, have.v)}})
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
func (c *chainReader) percent(t *token, q physio.Quantity, spaced bool) bool {
	r := c.r
	if q != physio.PaO2 && q != physio.PaCO2 || c.filled < 2 && q == physio.PaO2 && r.raw[physio.PaCO2] == nil || t.v < 40 {
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
	r := c.r
	switch {
	case c.bicarbonateAfterBE(t):
		return true
	case t.percent && !r.satFits(t.v/100) && t.v >= 21 && (t.v < 60 || spaced || !r.t[c.i-1].sep("/|\\")):
		return false // FiO2, by its sign
	case t.v >= 50 && t.v <= 100 && (r.satFits(t.v/100) || t.v >= 86 && !spaced) || t.v > 20 && r.satFits(t.v/100):
		if spaced && r.typicalFiO2(t.v) && !t.percent {
			return false
		}
		r.keepSat(c.i, "")
		c.slot++
		c.filled++
		return true
	case t.v <= 1 && t.decimals >= 2 && t.v > 0.4 && r.satFits(t.v):
		r.take(c.i, 0)
		r.last = c.i
		r.sample().Set(physio.SaO2, t.v)
		return true
	case t.v >= 0.21 && t.v <= 1 && t.decimals > 0 && t.sign == 0:
		if spaced || !r.fitsBE(t.v) || t.decimals > 1 {
			return false // FiO2, by its size
		}
		r.take(c.i, 0)
		r.last = c.i
		r.ask(Question{Code: AskFifth, Quantity: physio.FiO2, Typed: t.typed(), Value: t.v, Choices: []Choice{
			withWord(choose(physio.FiO2, t.v), "FiO2"), withWord(choose(physio.BE, t.v), "BE")}})
		return false
	case t.v <= 20 && t.decimals <= 1 && r.raw[physio.BE] == nil && r.fitsBE(t.signed()) && !spaced:
		r.raw[physio.BE] = &rawValue{v: t.signed(), decimals: t.decimals, typed: t.typed()}
		r.note(NoteBEPlace, physio.BE, t.typed(), t.signed())
		r.take(c.i, 0)
		r.last = c.i
		c.filled++
		return true
	case !spaced && t.v >= 21 && t.v <= 100 && t.decimals == 0:
		r.askFifth(c.i)
		return false
	}
	return false
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
