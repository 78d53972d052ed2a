package shorthand

import (
	"strconv"

	"galeward/physio"
)

// looseChain is a chain of values in which the pH does not stand where the house
// has it: "95/40/7.40", "40 7.40 95 24".
type looseChain struct {
	ph int // token
	// others are the tokens of the other values, in typed order; before of
	// them stand in front of the pH.
	others []int
	before int
	// tied says that separators and not blanks join what stands before the pH.
	tied bool
}

// assignment gives each of the other values its quantity.
type assignment struct {
	q    []physio.Quantity
	kpa  bool
	v    physio.Values
	cost float64
}

const (
	// plausibleDoubt is the doubt up to which an order is believed, sameDoubt
	// the distance within which another one is as likely. Our own figures, in
	// the measure of score.go.
	plausibleDoubt = 2.5
	sameDoubt      = 2.0
)

// looseGas reads a gas whose pH stands in another place than the house's: by
// what fits, which is said; when two orders fit, it is asked.
func (r *reader) looseGas() bool {
	c, ok := r.findLoose()
	if !ok {
		return false
	}
	plain := r.plainDoubt(&c)
	if !c.tied && plain < sameDoubt {
		return false
	}
	all := r.assignments(&c)
	var good []assignment
	for _, a := range all {
		if !r.h.Addressed && !r.overheard(&c, &a) {
			continue
		}
		if a.cost < plausibleDoubt && a.cost-all[0].cost < sameDoubt {
			good = append(good, a)
		}
	}
	switch {
	case len(good) == 0 && (plain < plausibleDoubt || !r.meantAsGas(&c)):
		return false
	case len(good) > 0 && !c.tied && good[0].cost+sameDoubt > plain:
		return false // what stands before is a bed or another number
	case len(good) == 1:
		r.useAssignment(&c, &good[0])
	default:
		r.askOrder(&c, good)
	}
	return true
}

// overheard says that numbers of a message that was not meant for the bot can
// be a gas: in the house's unit, and tied by slashes or checked by bicarbonate.
func (r *reader) overheard(c *looseChain, a *assignment) bool {
	return a.kpa == (r.h.Units == KPa) && (c.tied || len(c.others) >= 3 && a.v.Has(physio.HCO3))
}

// findLoose finds the chain, unless the pH stands where the house has it.
func (r *reader) findLoose() (looseChain, bool) {
	for _, q := range []physio.Quantity{physio.PHq, physio.PaCO2, physio.PaO2} {
		if r.raw[q] != nil {
			return looseChain{}, false
		}
	}
	moved := r.placeOfPH() > 0
	if moved && r.chainStart() >= 0 {
		return looseChain{}, false
	}
	for i := range r.t {
		if !r.loosePH(i) {
			continue
		}
		c := looseChain{ph: i}
		r.lookBack(&c)
		r.lookAhead(&c)
		if n := len(c.others); (c.before > 0 || moved) && n >= 2 && n <= 4 {
			return c, true
		}
	}
	return looseChain{}, false
}

// loosePH says that the number at i can be a pH that does not stand first. A
// chain that begins with a pH has it there: 7.4 may be a pressure in kPa.
func (r *reader) loosePH(i int) bool {
	t := &r.t[i]
	if !t.free() || t.sign != 0 || t.percent || t.decimals == 0 || t.decimals > 2 || t.v < 6.8 || t.v > 7.8 || r.labelled(i) {
		return false
	}
	if u, _ := r.unitAfter(i); u != "" {
		return false
	}
	start := r.chainStart()
	return start < 0 || start >= i || !phLike(r.t[start].v) || r.t[start].decimals == 0
}

// phBesideLabels takes the one bare number that can only be the pH of labelled
// pressures: "co2 40 po2 95 7.40".
func (r *reader) phBesideLabels() {
	if r.first >= 0 || r.claims || r.raw[physio.PHq] != nil || r.raw[physio.PaCO2] == nil && r.raw[physio.PaO2] == nil {
		return
	}
	found := -1
	for i := range r.t {
		if t := &r.t[i]; t.free() && r.loosePH(i) && t.decimals == 2 && !r.unknownBefore(i) {
			if found >= 0 {
				return
			}
			found = i
		}
	}
	if found < 0 {
		return
	}
	t := &r.t[found]
	r.take(found, 0)
	r.first, r.last = found, found
	r.raw[physio.PHq] = &rawValue{v: t.v, decimals: t.decimals, typed: t.typed(), at: found}
}

// otherValue says that the token can be a value beside the pH.
func (r *reader) otherValue(i int) bool {
	t := &r.t[i]
	if t.kind == tokWord && t.e == bedHead { // taken for a bed so far
		_, err := strconv.Atoi(t.s)
		return err == nil
	}
	if !t.free() || t.sign != 0 || t.than != 0 || t.percent || t.decimals > 1 || t.v < 1 || t.v > 700 {
		return false
	}
	u, _ := r.unitAfter(i)
	return u == ""
}

// tie says that the token joins two values; a hyphen does so without blanks.
func (r *reader) tie(i int) bool {
	t := &r.t[i]
	return t.sep("/|\\,") || t.sep("-") && t.glued && i+1 < len(r.t) && r.t[i+1].glued
}

func (r *reader) lookBack(c *looseChain) {
	c.tied = true
	var found []int
	for i := c.ph - 1; i >= 0 && len(found) < 3; i-- {
		if r.t[i].line != r.t[c.ph].line {
			break
		}
		tie := r.tie(i)
		glued := tie && r.t[i].glued && r.t[i+1].glued
		if tie {
			i--
		}
		if i < 0 || !r.otherValue(i) || r.labelled(i) {
			break
		}
		c.tied = c.tied && glued
		found = append([]int{i}, found...)
	}
	c.others, c.before = found, len(found)
}

func (r *reader) lookAhead(c *looseChain) {
	for i := c.ph + 1; i < len(r.t) && len(c.others) < 5; i++ {
		if r.tie(i) {
			i++
		}
		if i >= len(r.t) || r.t[i].kind != tokNumber || !r.otherValue(i) {
			return
		}
		c.others = append(c.others, i)
	}
}

// valueAt is the number of a token, also of one taken for a bed.
func (r *reader) valueAt(i int) float64 {
	if r.t[i].kind == tokWord {
		n, _ := strconv.Atoi(r.t[i].s)
		return float64(n)
	}
	return r.t[i].v
}

// meantAsGas says that values of which no order fits are asked about all the
// same: the bot was meant, or they are tied and all look like pressures.
func (r *reader) meantAsGas(c *looseChain) bool {
	if r.h.Addressed {
		return true
	}
	for _, i := range c.others {
		if v := r.valueAt(i); v < 15 || v > 150 {
			return false
		}
	}
	return c.tied
}

// markLoose takes the tokens of the chain.
func (r *reader) markLoose(c *looseChain) {
	r.first, r.last = c.ph, c.ph
	for _, i := range append([]int{c.ph}, c.others...) {
		r.take(i, 0)
		r.first, r.last = min(r.first, i), max(r.last, i)
		if r.t[i].kind == tokWord {
			r.t[i].e = nil
		}
	}
	p := &r.t[c.ph]
	r.raw[physio.PHq] = &rawValue{v: p.v, labelled: true, decimals: p.decimals, typed: p.typed(), at: c.ph}
	r.slashes = true
}

// useAssignment keeps the one order that fits, and says so.
func (r *reader) useAssignment(c *looseChain, a *assignment) {
	r.markLoose(c)
	for k, i := range c.others {
		q := a.q[k]
		if q == physio.SaO2 {
			r.sample().Set(q, r.valueAt(i)/100)
			continue
		}
		raw := &rawValue{v: r.valueAt(i), labelled: true, decimals: r.t[i].decimals, typed: r.t[i].s, at: i}
		if a.kpa && q != physio.HCO3 && q != physio.BE {
			raw.unit = uKPa
		}
		r.raw[q] = raw
	}
	r.note(NoteOrderRead, physio.PHq, "", r.t[c.ph].v)
}

// askOrder asks which of the orders that fit was meant.
func (r *reader) askOrder(c *looseChain, good []assignment) {
	r.markLoose(c)
	ask := Question{Code: AskOrder, Quantity: physio.PaCO2}
	for k := range good[:min(len(good), 3)] {
		a := &good[k]
		choice := Choice{}
		for n, i := range c.others {
			choice.Set.Set(a.q[n], a.v.Val(a.q[n]))
			if choice.Word != "" {
				choice.Word += ", "
			}
			choice.Word += a.q[n].Info().Symbol + " " + r.t[i].s
		}
		if a.kpa {
			choice.Word += " " + string(KPa)
		}
		ask.Choices = append(ask.Choices, choice)
	}
	r.ask(ask)
}
