package shorthand

import (
	"math"

	"galeward/physio"
)

// baseExcessInPlace takes a number that can only be a base excess out of the
// bicarbonate place, and a bicarbonate out of the base-excess place.
func (d *decider) baseExcessInPlace() {
	h, b := d.raw[physio.HCO3], d.raw[physio.BE]
	if h != nil && b != nil && !h.labelled && !b.labelled && !physio.HCO3.Possible(h.v) && physio.HCO3.Possible(b.v) && b.v > 4 {
		d.raw[physio.HCO3], d.raw[physio.BE] = b, h
		d.note(Note{Code: NoteBEPlace, Quantity: physio.BE, Typed: h.typed, Value: h.v})
		return
	}
	if h == nil || h.labelled || b != nil || h.v > 0 && h.typed[0] != '+' || !physio.BE.Possible(h.v) {
		return
	}
	delete(d.raw, physio.HCO3)
	d.raw[physio.BE] = h
	d.note(Note{Code: NoteBEForHCO3, Quantity: physio.BE, Typed: h.typed, Value: h.v})
}

// settlePH reads a pH without its point, and asks about an impossible one.
func (d *decider) settlePH() {
	p := d.raw[physio.PHq]
	if p == nil {
		return
	}
	fit, fits := d.fittingPH()
	whole := p.decimals == 0 && p.v == 7 && fits && math.Abs(fit-7) > 0.03 // "7": digits were lost
	if physio.PHq.Possible(p.v) && p.v < 7.8 && !whole {
		return
	}
	slips, silent := phSlips(p.v, p.typed)
	if silent && (!fits || math.Abs(fit-slips[0]) < 0.08) {
		d.note(Note{Code: NotePHDecimal, Quantity: physio.PHq, Typed: p.typed, Value: slips[0]})
		p.v = slips[0]
		return
	}
	if physio.PHq.Possible(p.v) && fits && math.Abs(fit-p.v) < 0.05 {
		return
	}
	d.askPH(p, slips, fit, fits)
	delete(d.raw, physio.PHq)
}

// askPH offers the slip that fits, else what the other values imply.
func (d *decider) askPH(p *rawValue, slips []float64, fit float64, fits bool) {
	ask := Question{Code: AskPH, Quantity: physio.PHq, Typed: p.typed}
	for _, s := range slips {
		if !fits || math.Abs(s-fit) < 0.06 {
			ask.Value = s
			ask.Choices = append(ask.Choices, choose(physio.PHq, s))
		}
	}
	if len(ask.Choices) == 0 && fits {
		ask.Value = math.Round(fit*100) / 100
		ask.Choices = []Choice{choose(physio.PHq, ask.Value)}
	}
	if physio.PHq.Possible(p.v) && p.decimals > 0 {
		ask.Choices = append(ask.Choices, choose(physio.PHq, p.v))
	}
	d.ask(ask)
}

// fittingPH is the pH of the typed PaCO2 and bicarbonate, in the unit that
// gives a possible one.
func (d *decider) fittingPH() (float64, bool) {
	c, h := d.raw[physio.PaCO2], d.raw[physio.HCO3]
	if c == nil || h == nil || !physio.HCO3.Possible(h.v) {
		return 0, false
	}
	v := c.v
	if c.unit == uKPa || c.unit == "" && (d.units == KPa && v < 27 || v < 8) {
		v = physio.KPa(v).MmHg()
	}
	ph, err := physio.PHFrom(physio.MmHg(v), physio.MmolL(h.v))
	return float64(ph), err == nil && physio.PHq.Possible(float64(ph))
}

// settleImpossible takes out each value that is impossible in every unit, and
// asks about it.
func (d *decider) settleImpossible() {
	for _, q := range []physio.Quantity{physio.PaCO2, physio.PaO2, physio.HCO3, physio.BE, physio.SaO2} {
		v := d.raw[q]
		if v == nil || d.possible(q, v) {
			continue
		}
		delete(d.raw, q)
		if q == physio.SaO2 {
			continue // such a number was no saturation: the caller decides
		}
		d.ask(*d.askSlip(q, v))
	}
}

func (d *decider) possible(q physio.Quantity, v *rawValue) bool {
	kpa := physio.KPa(v.v).MmHg()
	switch {
	case q != physio.PaCO2 && q != physio.PaO2:
		return q.Possible(v.v)
	case v.unit == uKPa:
		return q.Possible(kpa)
	case v.unit == uMmHg:
		return q.Possible(v.v)
	}
	return q.Possible(v.v) || q.Possible(kpa)
}

// askSlip asks about an impossible value and offers the number with its point
// moved, the one that fits the others first.
func (d *decider) askSlip(q physio.Quantity, v *rawValue) *Question {
	code := map[physio.Quantity]QuestionCode{physio.PaCO2: AskPaCO2, physio.PaO2: AskPaO2, physio.HCO3: AskHCO3, physio.BE: AskBE}[q]
	ask := &Question{Code: code, Quantity: q, Typed: v.typed}
	best := math.Inf(1)
	for _, scale := range []float64{0.1, 10, 0.01} {
		for _, kpa := range []bool{false, true} {
			x := v.v * scale
			if kpa && (q != physio.PaCO2 && q != physio.PaO2 || v.unit == uMmHg || d.units != KPa && v.unit == "") || !kpa && v.unit == uKPa {
				continue
			}
			if kpa {
				x = physio.KPa(x).MmHg()
			}
			if q == physio.BE && math.Abs(x) > 30 || !q.Possible(x) {
				continue
			}
			if m := d.slipDoubt(q, x); m < best {
				best, ask.Value = m, x
				ask.Choices = []Choice{choose(q, x)}
			}
		}
	}
	return ask
}

// slipDoubt weighs a corrected value beside the others.
func (d *decider) slipDoubt(q physio.Quantity, x float64) float64 {
	var v physio.Values
	for _, other := range []physio.Quantity{physio.PHq, physio.PaCO2, physio.HCO3, physio.BE} {
		if r := d.raw[other]; r != nil && other.Possible(r.v) {
			v.Set(other, r.v)
		}
	}
	v.Set(q, x)
	return doubtOf(&v, d.near)
}
