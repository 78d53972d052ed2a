package shorthand

import (
	"math"
	"sort"
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
	plausibleDoubt = 3.0
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
		t := &r.t[i]
		if !t.free() || t.sign != 0 || t.percent || t.decimals != 2 || t.v < 6.8 || t.v > 7.8 || r.labelled(i) {
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

func (r *reader) lookBack(c *looseChain) {
	c.tied = true
	var found []int
	for i := c.ph - 1; i >= 0 && len(found) < 3; i-- {
		if r.t[i].line != r.t[c.ph].line {
			break
		}
		tie := r.t[i].sep("/|\\,-")
		if tie {
			i--
		}
		if i < 0 || !r.otherValue(i) || r.labelled(i) {
			break
		}
		c.tied = c.tied && tie
		found = append([]int{i}, found...)
	}
	c.others, c.before = found, len(found)
}

func (r *reader) lookAhead(c *looseChain) {
	for i := c.ph + 1; i < len(r.t) && len(c.others) < 5; i++ {
		tie := r.t[i].sep("/|\\,-")
		if tie {
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

// kindsOf are the sets of quantities that so many values can be.
func kindsOf(n int) [][]physio.Quantity {
	co2, o2, hco3, sat := physio.PaCO2, physio.PaO2, physio.HCO3, physio.SaO2
	switch n {
	case 2:
		return [][]physio.Quantity{{co2, o2}, {co2, hco3}}
	case 3:
		return [][]physio.Quantity{{co2, o2, hco3}, {co2, o2, sat}}
	}
	return [][]physio.Quantity{{co2, o2, hco3, sat}}
}

// assignments lists the ways to read the values, the likeliest first.
func (r *reader) assignments(c *looseChain) []assignment {
	var all []assignment
	for _, kinds := range kindsOf(len(c.others)) {
		permute(kinds, 0, func(q []physio.Quantity) {
			for _, kpa := range []bool{false, true} {
				all = append(all, r.assign(c, q, kpa))
			}
		})
	}
	sort.SliceStable(all, func(a, b int) bool { return all[a].cost < all[b].cost })
	return all
}

// permute calls use with every order of q.
func permute(q []physio.Quantity, k int, use func([]physio.Quantity)) {
	if k == len(q) {
		use(q)
		return
	}
	for i := k; i < len(q); i++ {
		q[k], q[i] = q[i], q[k]
		permute(q, k+1, use)
		q[k], q[i] = q[i], q[k]
	}
}

// assign weighs one way to read the values.
func (r *reader) assign(c *looseChain, q []physio.Quantity, kpa bool) assignment {
	a := assignment{q: append([]physio.Quantity(nil), q...), kpa: kpa}
	a.v.Set(physio.PHq, r.t[c.ph].v)
	if h := r.raw[physio.HCO3]; h != nil {
		a.v.Set(physio.HCO3, h.v)
	}
	for k, i := range c.others {
		x := r.valueAt(i)
		switch {
		case q[k] == physio.SaO2:
			x /= 100
			if k+1 < len(q) {
				a.cost += sameDoubt // a saturation is typed last
			}
		case kpa && q[k] != physio.HCO3:
			x = physio.KPa(x).MmHg()
		}
		a.v.Set(q[k], x)
	}
	a.cost += doubtOf(&a.v, r.surroundings())
	if gap, ok := saturationGap(&a.v); ok && math.Abs(gap) > 0.06 {
		a.cost += 4
	}
	if kpa != (r.h.Units == KPa) {
		a.cost++
	}
	return a
}

// plainDoubt is the doubt of the values behind the pH alone, in the usual
// order; what stands before it is then a bed or a number of its own.
func (r *reader) plainDoubt(c *looseChain) float64 {
	behind := looseChain{ph: c.ph, others: c.others[c.before:]}
	n := len(behind.others)
	if n < 2 || n > 4 {
		return impossible
	}
	usual := []physio.Quantity{physio.PaCO2, physio.PaO2, physio.HCO3, physio.SaO2}[:n]
	best := impossible
	for _, kpa := range []bool{false, true} {
		a := r.assign(&behind, usual, kpa)
		if o2 := a.v.Val(physio.PaO2); o2 < 40 && r.sample().Blood == "" {
			a.cost += plausibleDoubt // the PaO2 of venous blood, which nothing says
		}
		best = min(best, a.cost)
	}
	return best
}

// meantAsGas says that values of which no order fits are asked about all the
// same: the bot was meant, or they are tied and all look like pressures.
func (r *reader) meantAsGas(c *looseChain) bool {
	if r.h.Addressed {
		return true
	}
	for _, i := range c.others {
		if v := r.valueAt(i); v < 10 || v > 150 {
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
		if a.kpa && q != physio.HCO3 {
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
