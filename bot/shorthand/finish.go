package shorthand

import (
	"math"
	"sort"

	"galeward/physio"
)

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
	r.pressuresTurned()
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

// pressuresTurned asks which way round an IPAP below the EPAP was meant.
func (r *reader) pressuresTurned() {
	s := r.sample()
	i, e := s.Val(physio.IPAP), s.Val(physio.EPAP)
	if !s.Has(physio.IPAP, physio.EPAP) || i >= e {
		return
	}
	s.Drop(physio.IPAP, physio.EPAP)
	turned, typed := choose(physio.IPAP, e), choose(physio.IPAP, i)
	turned.Set.Set(physio.EPAP, i)
	typed.Set.Set(physio.EPAP, e)
	turned.Word, typed.Word = "IPAP "+number(e)+"/EPAP "+number(i), "as typed"
	r.ask(Question{Code: AskIPAP, Quantity: physio.IPAP, Typed: number(i), Value: e, Choices: []Choice{turned, typed}})
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
		if r.h.Units == KPa {
			r.inKPa(&r.g.Questions[i])
		}
	}
}

// inKPa names pressures in the channel's unit, except a choice that says that
// the typed number was meant in mmHg.
func (r *reader) inKPa(q *Question) {
	for i := range q.Choices {
		c := &q.Choices[i]
		for _, k := range []physio.Quantity{physio.PaCO2, physio.PaO2, physio.EtCO2, physio.TcCO2} {
			x, ok := c.Set.Get(k)
			if ok && c.Word == choiceWord(k, x) && c.Word != q.Typed+" "+string(MmHg) {
				c.Word = number(physio.MmHg(x).KPa()) + " " + string(KPa)
			}
		}
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
	if s.Blood == physio.BloodUncertain && gas {
		r.askVenous()
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
		r.askVenous()
	case hasO2 && o2 < 45 && s.Blood == physio.BloodUnstated && !(has && ok && math.Abs(finger-blood) <= 0.10):
		r.askVenous()
	}
}

func (r *reader) askVenous() {
	r.ask(Question{Code: AskVenous, Quantity: physio.PaO2, Choices: []Choice{
		{Word: "arterial", Blood: physio.Arterial}, {Word: "venous", Blood: physio.Venous}}})
}
