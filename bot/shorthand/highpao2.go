package shorthand

import "galeward/physio"

// muchPaO2 is a PaO2 in mmHg that nobody reaches on air or on the usual
// support: in kPa it is a number that looks like one in mmHg.
const muchPaO2 = 250.0

// highInKPa says that both pressures were read as kPa although the PaO2, whose
// unit was not said, would be very high so, and ordinary in mmHg: "7.4/4.8/60".
func (d *decider) highInKPa(kept *reading) bool {
	v := d.raw[physio.PaO2]
	if d.units == KPa && d.near.fio2 > 0 {
		return false // the oxygen that was said has weighed already
	}
	if v == nil || v.unit != "" || !kept.co2KPa || !kept.o2KPa || kept.orderDiffers {
		return false
	}
	return kept.v.Val(physio.PaO2) > muchPaO2 && physio.PaO2.Possible(v.v)
}

// oxygenOpen says that the oxygen may be enough for such a PaO2, or that the
// house types kPa, so that both units stay possible.
func (d *decider) oxygenOpen() bool {
	s := &d.gas.Sample
	switch s.Device {
	case physio.ReservoirMask, physio.BagMask, physio.Ventilator, physio.HighFlow, physio.Chamber:
		return true
	}
	flow, _ := s.Get(physio.OxygenFlow)
	return d.near.fio2 > 0 || flow >= 10 || d.units == KPa
}

// useMmHg reads the PaO2 of a candidate as mmHg.
func (c *reading) useMmHg(r raws) {
	mixed := *c.candidate
	mixed.o2KPa, mixed.mixed = false, true
	c.candidate = &mixed
	c.v = r.values(c.candidate)
}

// askHighPaO2 asks in which unit the PaO2 was meant and leaves it open.
func (d *decider) askHighPaO2(kept *reading) {
	v := d.raw[physio.PaO2]
	ask := Question{Code: AskPaO2, Quantity: physio.PaO2, Typed: v.typed, Choices: []Choice{
		withWord(choose(physio.PaO2, v.v), number(v.v)+" "+string(MmHg)),
		withWord(choose(physio.PaO2, kept.v.Val(physio.PaO2)), number(v.v)+" "+string(KPa))}}
	d.ask(ask)
	kept.v.Drop(physio.PaO2)
	kept.v.Each(d.gas.Sample.Set)
	d.gas.Typed = KPa
	d.unitNotes(kept)
}
