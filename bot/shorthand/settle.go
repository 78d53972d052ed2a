package shorthand

import (
	"math"

	"galeward/physio"
)

// settle weighs the core values and keeps them.
func (r *reader) settle() {
	r.trimesterWords()
	r.settleOxygen()
	s := r.sample()
	if sat := r.raw[physio.SaO2]; sat != nil {
		delete(r.raw, physio.SaO2)
	}
	d := &decider{raw: r.raw, units: r.h.Units, near: r.surroundings(), gas: &r.g}
	r.nearAtFirst(d)
	d.decide()
	d.crossCheck(r.smallPlace)
	r.missingPaCO2()
	if v, ok := s.Get(physio.StdHCO3); ok {
		r.note(NoteStandardHCO3, physio.StdHCO3, "", v)
	}
	if r.mixed && r.first >= 0 {
		ask := Question{Code: AskComma, Quantity: physio.PHq, Choices: []Choice{{Word: "yes", Set: *coreOf(&s.Values)}}}
		r.g.Questions = append([]Question{ask}, r.g.Questions...)
	}
}

func coreOf(v *physio.Values) *physio.Values {
	var out physio.Values
	for _, q := range coreQuantities {
		if x, ok := v.Get(q); ok {
			out.Set(q, x)
		}
	}
	return &out
}

// nearAtFirst lets a saturation that was already read weigh with the rest.
func (r *reader) nearAtFirst(d *decider) {
	if v, ok := r.sample().Get(physio.SaO2); ok && d.raw[physio.PaO2] != nil && !r.newborn() {
		d.raw[physio.SaO2] = &rawValue{v: v, labelled: true, typed: number(v * 100)}
	}
}

// surroundings are what the line and the house say beside the values.
func (r *reader) surroundings() surroundings {
	s := r.sample()
	var out surroundings
	switch s.Blood {
	case physio.BloodUnstated, physio.Arterial:
	default:
		out.other = true
	}
	if s.Circumstance&(physio.ECMO|physio.Hyperbaric|physio.CPR|physio.CyanoticHeart) != 0 || s.Device == physio.Chamber {
		out.other = true
	}
	if f, ok := s.Get(physio.FiO2); ok {
		out.fio2 = f
	}
	known := physio.PressureKnown{House: physio.MmHg(r.h.Setting.PB), Altitude: physio.Metres(r.h.Setting.Altitude)}
	if v, ok := s.Get(physio.PB); ok {
		known.Measured = physio.MmHg(v)
	} else if v, ok := s.Get(physio.Altitude); ok {
		known.House, known.Altitude = 0, physio.Metres(v)
	}
	if p, _, err := physio.BarometricPressure(known); err == nil {
		out.pb = p.MmHg()
	}
	return out
}

// missingPaCO2 says what pH and HCO3 imply when the PaCO2 place was empty.
func (r *reader) missingPaCO2() {
	s := r.sample()
	if !r.missed[physio.PaCO2] || s.Has(physio.PaCO2) || !s.Has(physio.PHq, physio.HCO3) {
		return
	}
	if p, err := physio.PCO2From(physio.PH(s.Val(physio.PHq)), physio.MmolL(s.Val(physio.HCO3))); err == nil {
		r.note(NotePaCO2Missing, physio.PaCO2, "", math.Round(p.MmHg()))
	}
}

// likely gives a raw value in the unit that it most likely has, for the
// questions that come up before all values are weighed.
func (r *reader) likely(q physio.Quantity) (float64, bool) {
	v := r.raw[q]
	if v == nil {
		return 0, false
	}
	x := r.canonical(q, v)
	if q == physio.PHq && x >= 65 {
		slips, _ := phSlips(x, v.typed)
		if len(slips) == 0 {
			return 0, false
		}
		x = slips[0]
	}
	return x, q.Possible(x)
}

// canonical gives a raw pressure in mmHg by the unit that it most likely has;
// other values are what they are.
func (r *reader) canonical(q physio.Quantity, v *rawValue) float64 {
	if q != physio.PaCO2 && q != physio.PaO2 || v.unit == uMmHg {
		return v.v
	}
	co2 := r.raw[physio.PaCO2]
	small := v.v < 10 || r.h.Units == KPa && v.v < 27 || q == physio.PaO2 && v.v < 24 && co2 != nil && co2.v < 14
	if v.unit == uKPa || small {
		return physio.KPa(v.v).MmHg()
	}
	return v.v
}

// likelyValues collects the likely pH, PaCO2 and PaO2.
func (r *reader) likelyValues() *physio.Values {
	var v physio.Values
	for _, q := range []physio.Quantity{physio.PHq, physio.PaCO2, physio.PaO2} {
		if x, ok := r.likely(q); ok {
			v.Set(q, x)
		}
	}
	return &v
}

// satFits says that a saturation goes with the PaO2 that was read.
func (r *reader) satFits(sat float64) bool {
	v := r.likelyValues()
	o2, ok := v.Get(physio.PaO2)
	if !ok {
		return sat >= 0.5
	}
	c, err := curveAt(v, o2)
	tolerance := 0.05
	if c < 0.85 {
		tolerance = 0.10
	}
	return err == nil && math.Abs(c-sat) <= tolerance
}

// fitsBE says that a base excess goes with pH and PaCO2.
func (r *reader) fitsBE(be float64) bool {
	implied, ok := impliedHCO3(r.likelyValues())
	if !ok {
		return false
	}
	ph, _ := r.likely(physio.PHq)
	sbe, err := physio.StandardBaseExcess(physio.PH(ph), physio.MmolL(implied))
	return err == nil && math.Abs(float64(sbe)-be) <= 3
}

// ceilingAllows says that the PaO2 is possible on an FiO2.
func (r *reader) ceilingAllows(fio2 float64) bool {
	v := r.likelyValues()
	o2, ok := v.Get(physio.PaO2)
	s := r.surroundings()
	s.fio2 = fio2
	top, known := ceiling(v, s)
	return !ok || !known || o2 <= top
}
