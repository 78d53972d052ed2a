package shorthand

import (
	"math"

	"galeward/physio"
)

// The steps of the ladder, in mmol/L of bicarbonate: HCO3 within quiet of pH
// and PaCO2 is rounding, within loud a note, beyond it a question.
const (
	quiet = 2.0
	loud  = 4.0
)

// decider turns raw values into the values of a gas, with what is to be said
// and asked.
type decider struct {
	raw   raws
	units Units
	near  surroundings
	gas   *Gas
}

func (d *decider) note(n Note)    { d.gas.Notes = append(d.gas.Notes, n) }
func (d *decider) ask(q Question) { d.gas.Questions = append(d.gas.Questions, q) }

// decide settles the core values.
func (d *decider) decide() {
	d.baseExcessInPlace()
	d.settlePH()
	d.sharedUnit()
	d.settleImpossible()
	if len(d.raw) == 0 {
		return
	}
	if d.cord() {
		d.cordPressures()
	}
	defer d.setBaseExcessAside()()
	all := d.raw.candidates(d.units, d.near)
	kept := d.raw.reading(cheapest(all, func(c *candidate) bool { return !c.orderDiffers }))
	moved := d.raw.reading(cheapest(all, func(c *candidate) bool { return c.orderDiffers }))
	if kept == nil || kept.doubt >= impossible && (moved == nil || moved.doubt >= impossible) {
		d.dropBad(all)
		return
	}
	if moved != nil && d.swapFits(kept, moved) {
		d.askSwap(kept, moved)
		return
	}
	d.settleUnits(all, kept)
}

// swapFits says that another order is so much better that the typed one is
// doubted: the check digit fits it, or without a check digit the typed one is
// next to impossible.
func (d *decider) swapFits(kept, moved *reading) bool {
	if kept.doubt >= impossible {
		return moved.doubt < quiet
	}
	k, ok := kept.checkGap()
	m, _ := moved.checkGap()
	if !ok {
		return kept.doubt >= 5 && moved.doubt < 1
	}
	hco3 := kept.v.Val(physio.HCO3)
	return k > math.Max(quiet, 0.05*hco3) && (m <= 1.3 && k-m > 1.5 || m <= quiet && k-m > loud) && moved.doubt < kept.doubt-1
}

// askSwap leaves the places that the two readings differ in open.
func (d *decider) askSwap(kept, moved *reading) {
	ask := Question{Code: AskSwap, Quantity: physio.PaCO2, Value: moved.v.Val(physio.PaCO2)}
	if v := d.raw[physio.PaCO2]; v != nil {
		ask.Typed = v.typed
	}
	second, first := Choice{Word: "as typed"}, Choice{Word: "swapped"}
	for i, q := range houseOrder {
		if moved.order[i] == q {
			continue
		}
		first.Set.Set(q, moved.v.Val(q))
		if q.Possible(kept.v.Val(q)) {
			second.Set.Set(q, kept.v.Val(q))
		}
	}
	ask.Choices = []Choice{first, second}
	d.ask(ask)
	kept.v.Each(func(q physio.Quantity, v float64) {
		if !first.Set.Has(q) {
			d.gas.Sample.Set(q, v)
		}
	})
	d.gas.Typed = typedIn(moved.co2KPa)
}

func typedIn(kpa bool) Units {
	if kpa {
		return KPa
	}
	return MmHg
}

// settleUnits uses the kept reading when its unit is beyond doubt, else asks.
func (d *decider) settleUnits(all []candidate, kept *reading) {
	house := d.raw.reading(cheapest(all, func(c *candidate) bool { return !c.orderDiffers && !c.unitsDiffer }))
	d.gas.Typed = typedIn(kept.co2KPa && d.raw[physio.PaCO2] != nil || kept.o2KPa && d.raw[physio.PaO2] != nil)
	switch rival := d.rival(all, kept, house); {
	case rival != nil:
		d.askUnits(kept, rival)
		return
	case d.highInKPa(kept):
		if d.oxygenOpen() {
			d.askHighPaO2(kept)
			return
		}
		kept.useMmHg(d.raw)
	case kept.mixed && !d.sure(kept, physio.PaO2, kept.o2KPa):
		d.askPaO2Unit(kept)
		return
	}
	kept.v.Each(d.gas.Sample.Set)
	d.unitNotes(kept)
}

// rival gives the reading in other units that can not be excluded: without a
// check digit the house's own units are given up only when impossible, and
// kept only when they are not next to impossible.
func (d *decider) rival(all []candidate, kept, house *reading) *reading {
	_, checked := kept.checkGap()
	if house == nil || checked && d.raw[physio.PaO2] == nil {
		return nil
	}
	if kept.unitsDiffer {
		if house.doubt >= impossible || checked && house.doubt-kept.doubt >= 3 {
			return nil
		}
		return house
	}
	if checked || kept.doubt < 3 {
		return nil
	}
	return d.raw.reading(cheapest(all, func(c *candidate) bool {
		return !c.orderDiffers && c.unitsDiffer && !c.mixed && c.doubt < kept.doubt
	}))
}

// sure says that the unit of a pressure was said or is the only possible one
// without being next to its other reading by a slip of the decimal point.
func (d *decider) sure(kept *reading, q physio.Quantity, kpa bool) bool {
	v := d.raw[q]
	if v == nil || v.unit != "" {
		return true
	}
	if d.units == KPa == kpa {
		return true // in the house's unit; the other pressure differs
	}
	other := d.raw[physio.PaCO2]
	return !kpa && other != nil && other.unit == uKPa
}

// askUnits asks kPa or mmHg for both pressures and keeps neither.
func (d *decider) askUnits(a, b *reading) {
	ask := Question{Code: AskUnit, Quantity: physio.PaCO2}
	if v := d.raw[physio.PaCO2]; v != nil {
		ask.Typed = v.typed
	} else {
		ask.Quantity, ask.Typed = physio.PaO2, d.raw[physio.PaO2].typed
	}
	for _, c := range []*reading{a, b} {
		word := string(MmHg)
		if c.co2KPa || c.o2KPa && !c.mixed {
			word = string(KPa)
		}
		choice := Choice{Word: word}
		for _, q := range []physio.Quantity{physio.PaCO2, physio.PaO2} {
			if x, ok := c.v.Get(q); ok {
				choice.Set.Set(q, x)
			}
		}
		ask.Choices = append(ask.Choices, choice)
	}
	d.ask(ask)
	a.v.Each(func(q physio.Quantity, v float64) {
		if q != physio.PaCO2 && q != physio.PaO2 {
			d.gas.Sample.Set(q, v)
		}
	})
}

// askPaO2Unit asks about a PaO2 that is possible in one unit only, and not in
// the one of the PaCO2: another unit, or a slip of the decimal point.
func (d *decider) askPaO2Unit(kept *reading) {
	v := d.raw[physio.PaO2]
	ask := Question{Code: AskPaO2, Quantity: physio.PaO2, Typed: v.typed}
	slip := v.v * 10
	if kept.co2KPa {
		slip = physio.KPa(v.v / 10).MmHg()
	}
	if physio.PaO2.Possible(slip) {
		ask.Value = slip
		ask.Choices = append(ask.Choices, choose(physio.PaO2, slip))
	}
	ask.Choices = append(ask.Choices, withWord(choose(physio.PaO2, kept.v.Val(physio.PaO2)), number(v.v)+" "+string(typedIn(kept.o2KPa))))
	d.ask(ask)
	kept.v.Drop(physio.PaO2)
	kept.v.Each(d.gas.Sample.Set)
	d.gas.Typed = typedIn(kept.co2KPa)
	kept.mixed = false
	d.unitNotes(kept)
}

// unitNotes says when pressures were read in another unit than the channel's.
func (d *decider) unitNotes(kept *reading) {
	house := d.units == KPa
	code := NoteReadKPa
	if house {
		code = NoteReadMmHg
	}
	if kept.mixed {
		code = NoteMixedUnits
	}
	for _, p := range []struct {
		q   physio.Quantity
		kpa bool
	}{{physio.PaCO2, kept.co2KPa}, {physio.PaO2, kept.o2KPa}} {
		if v := d.raw[p.q]; v != nil && kept.v.Has(p.q) && p.kpa != house {
			d.note(Note{Code: code, Quantity: p.q, Typed: v.typed, Value: kept.v.Val(p.q)})
		}
	}
}

// dropBad leaves out the values that no reading makes possible; what is left
// is used.
func (d *decider) dropBad(all []candidate) {
	if len(all) == 0 {
		return
	}
	v := d.raw.values(&all[0])
	v.Each(func(q physio.Quantity, v float64) {
		if q.Possible(v) {
			d.gas.Sample.Set(q, v)
		}
	})
}
