package shorthand

import (
	"math"
	"strings"

	"galeward/physio"
)

// rawValue is a core value before it is known in which unit, and in which
// place, it was meant.
type rawValue struct {
	v        float64
	unit     string // uKPa or uMmHg when said
	labelled bool
	decimals int
	typed    string
	at       int // token of the number
}

// raws are the raw core values of one gas.
type raws map[physio.Quantity]*rawValue

// candidate is one way to read the raw values. It does not hold the values:
// many are weighed and few are used.
type candidate struct {
	co2KPa       bool
	o2KPa        bool
	order        [3]physio.Quantity // what the PaCO2, PaO2 and HCO3 places hold
	unitsDiffer  bool               // from the channel
	mixed        bool
	orderDiffers bool
	// doubt is the measure of score.go; cost adds what departs from house
	// order and house units.
	doubt, cost float64
}

// houseOrder leaves each place what it is.
var houseOrder = [3]physio.Quantity{physio.PaCO2, physio.PaO2, physio.HCO3}

// orders are the permutations that people type, by frequency: pressures
// swapped first, then bicarbonate out of its place.
var orders = [][3]physio.Quantity{
	houseOrder,
	{physio.PaO2, physio.PaCO2, physio.HCO3},
	{physio.PaCO2, physio.HCO3, physio.PaO2},
	{physio.HCO3, physio.PaCO2, physio.PaO2},
	{physio.PaO2, physio.HCO3, physio.PaCO2},
	{physio.HCO3, physio.PaO2, physio.PaCO2},
}

// candidates lists the possible readings, the cheapest first.
func (r raws) candidates(units Units, s surroundings) []candidate {
	all := make([]candidate, 0, 4*len(orders))
	for i, order := range orders {
		if i > 0 && !r.movable(order) {
			continue
		}
		for _, co2KPa := range r.unitChoices(order, physio.PaCO2) {
			for _, o2KPa := range r.unitChoices(order, physio.PaO2) {
				c := r.build(order, co2KPa, o2KPa, units, s)
				c.orderDiffers = i > 0
				if i > 0 {
					c.cost += 2 + float64(i)/4
				}
				all = append(all, c)
			}
		}
	}
	return all
}

// movable says that the places which an order exchanges hold unlabelled
// numbers, all of them present.
func (r raws) movable(order [3]physio.Quantity) bool {
	for i, q := range order {
		if q == houseOrder[i] {
			continue
		}
		if v := r[houseOrder[i]]; v == nil || v.labelled {
			return false
		}
	}
	return true
}

// place finds the raw value that an order gives to q.
func (r raws) place(order [3]physio.Quantity, q physio.Quantity) *rawValue {
	for i := range order {
		if order[i] == q {
			return r[houseOrder[i]]
		}
	}
	return r[q]
}

func (r raws) unitChoices(order [3]physio.Quantity, q physio.Quantity) []bool {
	v := r.place(order, q)
	switch {
	case v == nil:
		return []bool{false}
	case v.unit == uKPa:
		return []bool{true}
	case v.unit == uMmHg:
		return []bool{false}
	}
	return []bool{false, true}
}

// values gives what a candidate reads.
func (r raws) values(c *candidate) (v physio.Values) {
	for _, q := range coreQuantities {
		raw := r.place(c.order, q)
		if raw == nil {
			continue
		}
		x := raw.v
		if q == physio.PaCO2 && c.co2KPa || q == physio.PaO2 && c.o2KPa {
			x = physio.KPa(x).MmHg()
		}
		v.Set(q, x)
	}
	return v
}

// build makes one candidate and weighs it.
func (r raws) build(order [3]physio.Quantity, co2KPa, o2KPa bool, units Units, s surroundings) candidate {
	c := candidate{co2KPa: co2KPa, o2KPa: o2KPa, order: order}
	both := r[physio.PaCO2] != nil && r[physio.PaO2] != nil
	c.mixed = both && co2KPa != o2KPa
	house := units == KPa
	c.unitsDiffer = r[physio.PaCO2] != nil && co2KPa != house || r[physio.PaO2] != nil && o2KPa != house
	v := r.values(&c)
	c.doubt = doubtOf(&v, s)
	c.cost = c.doubt
	if c.unitsDiffer {
		c.cost++
	}
	if c.mixed && r.oneUnitSaid() {
		c.cost += 0.4
	} else if c.mixed {
		c.cost += 2
	}
	return c
}

// oneUnitSaid says that one pressure carries its unit and the other none.
func (r raws) oneUnitSaid() bool {
	a, b := r[physio.PaCO2], r[physio.PaO2]
	return a != nil && b != nil && (a.unit == "") != (b.unit == "")
}

// cheapest gives the candidate of least cost among those that keep f.
func cheapest(all []candidate, keep func(*candidate) bool) *candidate {
	var best *candidate
	for i := range all {
		if keep(&all[i]) && (best == nil || all[i].cost < best.cost) {
			best = &all[i]
		}
	}
	return best
}

// reading is a candidate with its values.
type reading struct {
	*candidate
	v physio.Values
}

func (r raws) reading(c *candidate) *reading {
	if c == nil {
		return nil
	}
	return &reading{candidate: c, v: r.values(c)}
}

// checkGap is how far the check digit is from pH and PaCO2.
func (c *reading) checkGap() (float64, bool) {
	if !c.v.Has(physio.PHq, physio.PaCO2) || !c.v.Has(physio.HCO3) && !c.v.Has(physio.BE) {
		return 0, false
	}
	return acidDoubt(&c.v), true
}

// phSlips gives what a typed pH can have been: silent is true for the one
// reading of a dropped decimal point. The list is empty for a plain pH.
func phSlips(v float64, typed string) (slips []float64, silent bool) {
	switch {
	case v >= 650 && v < 800:
		return []float64{v / 100}, true
	case v >= 6500 && v < 8000:
		return []float64{v / 1000}, true
	case v >= 65 && v < 80 && strings.Contains(typed, "."):
		return []float64{v / 10}, true
	case v >= 65 && v < 80:
		return []float64{v / 10}, false
	}
	return permutations(typed), false
}

// permutations are the pH values that the digits of a token give in another
// order.
func permutations(typed string) []float64 {
	var d []byte
	for i := 0; i < len(typed); i++ {
		if isDigit(typed[i]) {
			d = append(d, typed[i])
		}
	}
	if len(d) != 3 {
		return nil
	}
	var out []float64
	for _, p := range [][3]int{{1, 0, 2}, {0, 2, 1}, {1, 2, 0}, {2, 0, 1}, {2, 1, 0}} {
		x := float64(d[p[0]]-'0') + float64(d[p[1]]-'0')/10 + float64(d[p[2]]-'0')/100
		if x >= 6.8 && x <= 7.8 {
			out = append(out, math.Round(x*100)/100)
		}
	}
	return out
}
