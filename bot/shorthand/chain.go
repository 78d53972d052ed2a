package shorthand

import (
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

// chain reads the unlabelled values of the gas by the channel's order.
func (r *reader) chain() {
	if r.looseGas() {
		return
	}
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

// foreignUnit says that the number carries a unit of something else.
func (c *chainReader) foreignUnit() bool {
	u, _ := c.r.unitAfter(c.i)
	switch u {
	case "", uMmHg, uKPa, uMmolL, uPercent, uNmolL:
		return false
	}
	return true
}
