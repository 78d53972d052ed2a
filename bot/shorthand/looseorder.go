package shorthand

import (
	"math"
	"sort"

	"galeward/physio"
)

// kindsOf are the sets of quantities that so many values can be.
func kindsOf(n int) [][]physio.Quantity {
	co2, o2, hco3, sat := physio.PaCO2, physio.PaO2, physio.HCO3, physio.SaO2
	switch n {
	case 2:
		return [][]physio.Quantity{{co2, o2}, {co2, hco3}}
	case 3:
		return [][]physio.Quantity{{co2, o2, hco3}, {co2, o2, sat}, {co2, o2, physio.BE}}
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
		case kpa && q[k] != physio.HCO3 && q[k] != physio.BE:
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
