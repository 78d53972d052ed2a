package shorthand

import (
	"math"
	"sort"

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
	x := v.v
	co2 := r.raw[physio.PaCO2]
	kpa := v.unit == uKPa || v.unit == "" && (r.h.Units == KPa && x < 27 || x < 10 || q == physio.PaO2 && x < 24 && co2 != nil && co2.v < 14)
	if kpa && q != physio.PHq {
		x = physio.KPa(x).MmHg()
	}
	if q == physio.PHq && x >= 65 {
		slips, _ := phSlips(x, v.typed)
		if len(slips) == 0 {
			return 0, false
		}
		x = slips[0]
	}
	return x, q.Possible(x)
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

// leftovers reads or asks about numbers that nothing has taken.
func (r *reader) leftovers() {
	r.secondGroup()
	if r.first < 0 {
		return
	}
	for j := r.last + 1; j < len(r.t) && j <= r.last+3; j++ {
		t := &r.t[j]
		if j+1 < len(r.t) && r.t[j+1].is(senseSwallow) {
			return // "2 mg": it belongs to what follows
		}
		if u, _ := r.unitAfter(j); t.free() && u == "" && t.sign == 0 && t.than == 0 && t.decimals == 0 && !r.unknownBefore(j) {
			r.bareNumber(j)
			return
		}
		if !t.sep(",/;.|") && !(t.kind == tokNumber && t.used) {
			return
		}
	}
}

// bareNumber reads a bare number behind the gas: from 36 up it is FiO2 when it
// is no saturation, and said; below it may be a rate or litres and is asked.
func (r *reader) bareNumber(j int) {
	t, s := &r.t[j], r.sample()
	if s.Has(physio.FiO2) || s.Has(physio.OxygenFlow) || s.Device == physio.Air {
		if v := t.v / 100; v >= 0.5 && v <= 1 && !s.Has(physio.SaO2) && r.satFits(v) {
			r.keepSat(j, NoteBareSat)
		}
		return
	}
	v := t.v / 100
	switch sat := v > 0.5 && v <= 1 && !s.Has(physio.SaO2) && r.satFits(v); {
	case sat && !r.typicalFiO2(t.v) || sat && !r.ceilingAllows(v):
		r.keepSat(j, NoteBareSat)
	case sat && v >= 0.85:
		r.take(j, 0)
		r.ask(Question{Code: AskPercent, Quantity: physio.FiO2, Typed: t.typed(), Choices: []Choice{
			withWord(choose(physio.SaO2, v), "saturation"), withWord(choose(physio.FiO2, v), "FiO2")}})
	case t.v >= 36 && t.v <= 100:
		r.take(j, 0)
		s.Set(physio.FiO2, v)
		r.note(NoteBareFiO2, physio.FiO2, t.typed(), v)
	case t.v >= 1 && t.v < 36:
		r.take(j, 0)
		r.askBare(t)
	}
}

func (r *reader) askBare(t *token) {
	ask := Question{Code: AskBare, Quantity: physio.FiO2, Typed: t.typed()}
	if t.v >= 21 {
		ask.Choices = append(ask.Choices, withWord(choose(physio.FiO2, t.v/100), "FiO2"))
	} else if t.v <= 15 {
		flow := withWord(choose(physio.OxygenFlow, t.v), number(t.v)+" L")
		if t.v <= mostCannula {
			flow.Device = physio.Cannula
		}
		ask.Choices = append(ask.Choices, flow)
	}
	if t.v >= 8 && !r.sample().Has(physio.RR) {
		ask.Choices = append(ask.Choices, withWord(choose(physio.RR, t.v), "rate"))
	}
	r.ask(ask)
}

// onTheOxygen reads "45 on the o2": litres or per cent, asked when both can be.
func (r *reader) onTheOxygen() {
	for i := range r.t {
		t := &r.t[i]
		if !t.free() || t.sign != 0 || t.percent || !r.oxygenWordBehind(i) || i >= r.first && i <= r.last && r.first >= 0 {
			continue
		}
		r.take(i, 0)
		switch v := t.v; {
		case v > mostHighFlow && v <= 100, v >= 0.21 && v < 1:
			r.sayFiO2(i, formOf(physio.FiO2, t, "", true))
		case v >= 21 && v <= mostHighFlow:
			r.ask(Question{Code: AskFlowOrFiO2, Quantity: physio.FiO2, Typed: t.typed(), Choices: []Choice{
				choose(physio.FiO2, v/100), choose(physio.OxygenFlow, v)}})
		case v > 0 && v < 21:
			r.ask(*askFiO2(v, t.typed()))
		}
	}
}

func (r *reader) oxygenWordBehind(i int) bool {
	for j := i + 1; j < len(r.t) && j <= i+3; j++ {
		t := &r.t[j]
		if t.word("o2") || t.word("oxygen") {
			_, ahead := labelNumber(r, j)
			return !ahead && (j > i+1 || i > 0 && r.near(i, 1, "on", "to", "at", "up to", "down to"))
		}
		if !t.is(senseFiller) && !t.word("on the") && !t.word("of") {
			return false
		}
	}
	return false
}

// labelNumber finds the number of a token that may be a label.
func labelNumber(r *reader, j int) (int, bool) {
	if !r.t[j].is(senseLabel) {
		return 0, false
	}
	return r.numberAfter(j)
}

// lonePH takes the one number of a correction that can only be a pH.
func (r *reader) lonePH() {
	found := -1
	for i := range r.t {
		if !r.t[i].free() {
			continue
		}
		if found >= 0 {
			return
		}
		found = i
	}
	if found < 0 || r.sample().Has(physio.PHq) || r.first >= 0 {
		return
	}
	if t := &r.t[found]; phLike(t.v) && t.decimals == 2 && t.sign == 0 {
		r.take(found, 0)
		r.sample().Set(physio.PHq, t.v)
	}
}

// secondGroup asks about three or more joined numbers without a pH.
func (r *reader) secondGroup() {
	if r.first < 0 {
		return
	}
	for i := range r.t {
		if !r.t[i].free() || r.joined(i) || i <= r.last && i >= r.first {
			continue
		}
		n, slashes := chainAhead(r.t, i)
		if n < 3 || !slashes {
			continue
		}
		for j, k := i, 0; j < len(r.t) && k < n; j++ {
			if r.t[j].free() {
				r.t[j].taken = true
				k++
			}
		}
		r.ask(Question{Code: AskSecondGroup, Quantity: physio.PHq, Typed: r.t[i].typed(), Choices: []Choice{{Word: "pasted twice"}, {Word: "another gas"}}})
		return
	}
}

// finish takes the last looks: whose saturation it is, whether the blood may
// be venous, whether a temperature matters, and the order of the questions.
func (r *reader) finish() {
	s := r.sample()
	gas := s.Has(physio.PHq) || s.Has(physio.PaCO2) || s.Has(physio.PaO2) || r.first >= 0
	if v, ok := s.Get(physio.SaO2); ok && !gas {
		s.Drop(physio.SaO2)
		if !s.Has(physio.SpO2) && physio.SpO2.Possible(v) {
			s.Set(physio.SpO2, v)
		}
	}
	if v, ok := s.Get(physio.SaO2); ok && s.Blood == physio.MixedVenous && !s.Has(physio.SvO2) {
		s.Set(physio.SvO2, v)
	}
	if !gas && s.Blood != physio.BloodUncertain && !s.Values.Empty() {
		s.Blood = physio.NoBlood
	}
	r.deviceByPressures()
	r.venousDoubt(gas)
	if v, ok := s.Get(physio.Temp); ok && gas && math.Abs(v-37) >= 2 && !s.Circumstance.Has(physio.TempCorrected) {
		r.ask(Question{Code: AskTempCorr, Quantity: physio.Temp, Value: v, Choices: []Choice{
			{Word: "37 C"}, {Word: "corrected", Circumstance: physio.TempCorrected}}})
	}
	r.guard()
	sort.SliceStable(r.g.Questions, func(a, b int) bool {
		return askRank[r.g.Questions[a].Code] < askRank[r.g.Questions[b].Code]
	})
}

// deviceByPressures names the device that its own pressures name.
func (r *reader) deviceByPressures() {
	s := r.sample()
	switch {
	case s.Device != "":
	case s.Has(physio.IPAP, physio.EPAP):
		s.Device = physio.Bilevel
	case s.Has(physio.CPAP):
		s.Device = physio.CPAPDevice
	}
}

// guard is the last wall: whatever way a number came, an impossible value is
// asked about and not kept, and no choice offers one.
func (r *reader) guard() {
	s := r.sample()
	copied := s.Values
	copied.Each(func(q physio.Quantity, v float64) {
		if !q.Possible(v) {
			s.Drop(q)
			r.ask(*askImpossible(q, v, number(v)))
		}
	})
	for i := range r.g.Questions {
		r.g.Questions[i].Choices = possibleChoices(r.g.Questions[i].Choices)
	}
}

func possibleChoices(all []Choice) []Choice {
	kept := all[:0:0]
	for _, c := range all {
		good := true
		c.Set.Each(func(q physio.Quantity, v float64) { good = good && q.Possible(v) })
		if good {
			kept = append(kept, c)
		}
	}
	return kept
}

// venousDoubt asks arterial or venous: when the words leave it open, when the
// pulse oximeter is far above the sample, when the PaO2 is that of venous
// blood and nothing else speaks for it.
func (r *reader) venousDoubt(gas bool) {
	s := r.sample()
	o2, hasO2 := s.Get(physio.PaO2)
	ask := Question{Code: AskVenous, Quantity: physio.PaO2, Choices: []Choice{
		{Word: "arterial", Blood: physio.Arterial}, {Word: "venous", Blood: physio.Venous}}}
	if s.Blood == physio.BloodUncertain && gas {
		r.ask(ask)
		return
	}
	if s.Blood != physio.BloodUnstated && s.Blood != physio.Arterial || r.newborn() || s.Circumstance&(physio.CyanoticHeart|physio.ECMO|physio.CPR) != 0 {
		return
	}
	blood, ok := s.Get(physio.SaO2)
	if !ok && hasO2 {
		c, err := curveAt(&s.Values, o2)
		blood, ok = c, err == nil
	}
	finger, has := s.Get(physio.SpO2)
	switch {
	case ok && has && finger-blood > 0.12 && blood < 0.80:
		r.ask(ask)
	case hasO2 && o2 < 45 && s.Blood == physio.BloodUnstated && !(has && ok && math.Abs(finger-blood) <= 0.10):
		r.ask(ask)
	}
}
