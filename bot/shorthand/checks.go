package shorthand

import (
	"math"

	"galeward/physio"
)

// crossCheck looks for values that do not go together. They are kept as typed
// and asked about; nothing is changed.
func (d *decider) crossCheck(smallInPlace bool) {
	v := &d.gas.Sample.Values
	if !d.asked(AskSwap, AskUnit) {
		d.checkBicarbonate(v, smallInPlace)
	}
	if !d.asked(AskSwap, AskUnit, AskPaO2) {
		d.checkCeiling(v)
		d.checkSaturation(v)
	}
}

func (d *decider) asked(codes ...QuestionCode) bool {
	for _, q := range d.gas.Questions {
		for _, c := range codes {
			if q.Code == c {
				return true
			}
		}
	}
	return false
}

func (d *decider) checkBicarbonate(v *physio.Values, smallInPlace bool) {
	implied, ok := impliedHCO3(v)
	hco3, has := v.Get(physio.HCO3)
	if !ok || !has {
		if ok {
			d.checkBaseExcess(v, implied)
		}
		return
	}
	gap := math.Abs(hco3 - implied)
	relative := math.Max(1, hco3/36) // constants of analysers differ by 3.5 %
	switch {
	case gap <= quiet*relative:
		d.checkBaseExcess(v, implied)
	case gap <= loud*relative:
		d.note(Note{Code: NoteHCO3Off, Quantity: physio.HCO3, Typed: d.typed(physio.HCO3), Value: implied})
	case smallInPlace && d.fitsBaseExcess(v, implied, hco3):
		d.ask(Question{Code: AskBEForHCO3, Quantity: physio.HCO3, Typed: d.typed(physio.HCO3), Value: implied, Choices: []Choice{
			{Word: choiceWord(physio.BE, hco3), Set: only(physio.BE, hco3), Drop: []physio.Quantity{physio.HCO3}},
			choose(physio.HCO3, hco3)}})
		v.Drop(physio.HCO3)
	default:
		d.askBicarbonate(v, hco3, implied)
	}
}

func only(q physio.Quantity, x float64) physio.Values {
	var v physio.Values
	v.Set(q, x)
	return v
}

func (d *decider) typed(q physio.Quantity) string {
	if r := d.raw[q]; r != nil {
		return r.typed
	}
	return ""
}

func (d *decider) fitsBaseExcess(v *physio.Values, implied, be float64) bool {
	sbe, err := physio.StandardBaseExcess(physio.PH(v.Val(physio.PHq)), physio.MmolL(implied))
	return err == nil && math.Abs(float64(sbe)-be) <= 3
}

// askBicarbonate offers for each of the three values what the other two imply.
func (d *decider) askBicarbonate(v *physio.Values, hco3, implied float64) {
	ask := Question{Code: AskHCO3Fit, Quantity: physio.HCO3, Typed: d.typed(physio.HCO3), Value: implied}
	ask.Choices = append(ask.Choices, choose(physio.HCO3, math.Round(implied)))
	if ph, err := physio.PHFrom(physio.MmHg(v.Val(physio.PaCO2)), physio.MmolL(hco3)); err == nil && physio.PHq.Possible(float64(ph)) {
		ask.Choices = append(ask.Choices, choose(physio.PHq, math.Round(float64(ph)*100)/100))
	}
	if co2, err := physio.PCO2From(physio.PH(v.Val(physio.PHq)), physio.MmolL(hco3)); err == nil && physio.PaCO2.Possible(co2.MmHg()) {
		ask.Choices = append(ask.Choices, withWord(choose(physio.PaCO2, math.Round(co2.MmHg())), "PaCO2 "+number(math.Round(co2.MmHg()))))
	}
	if hco3 > implied && hco3-implied < 6 {
		ask.Choices = append(ask.Choices, Choice{Word: "total CO2", Set: only(physio.TotalCO2, hco3), Drop: []physio.Quantity{physio.HCO3}})
	}
	d.ask(ask)
}

// checkBaseExcess asks about a base excess far from the other values: the
// sign, or another number. Definitions differ by 2-3 mmol/L.
func (d *decider) checkBaseExcess(v *physio.Values, implied float64) {
	be, ok := v.Get(physio.BE)
	if !ok || d.cord() || v.Val(physio.PaCO2) > mostForBE {
		return
	}
	sbe, err := physio.StandardBaseExcess(physio.PH(v.Val(physio.PHq)), physio.MmolL(implied))
	if err != nil || math.Abs(float64(sbe)-be) <= 6 {
		return
	}
	ask := Question{Code: AskBEFit, Quantity: physio.BE, Typed: d.typed(physio.BE), Value: float64(sbe)}
	if math.Abs(float64(sbe)+be) <= 4 {
		ask.Choices = append(ask.Choices, choose(physio.BE, -be))
	}
	ask.Choices = append(ask.Choices, choose(physio.BE, math.Round(float64(sbe))), choose(physio.BE, be))
	d.ask(ask)
}

// checkCeiling asks about a PaO2 that the stated oxygen can not give.
func (d *decider) checkCeiling(v *physio.Values) {
	o2, ok := v.Get(physio.PaO2)
	top, known := ceiling(v, d.near)
	if !ok || !known || o2 <= top {
		return
	}
	ask := Question{Code: AskCeiling, Quantity: physio.PaO2, Typed: d.typed(physio.PaO2), Value: top}
	if d.swapOnAir(v, o2) {
		return
	}
	if x := o2 / 10; o2 >= 250 && physio.PaO2.Possible(x) {
		ask.Choices = append(ask.Choices, choose(physio.PaO2, x))
	}
	ask.Choices = append(ask.Choices, Choice{Word: "more oxygen", Drop: []physio.Quantity{physio.FiO2}})
	ask.Choices = append(ask.Choices, choose(physio.PaO2, o2))
	d.ask(ask)
}

// swapOnAir asks whether PaCO2 and PaO2 were exchanged when only that makes
// the pair possible on this oxygen.
func (d *decider) swapOnAir(v *physio.Values, o2 float64) bool {
	co2 := v.Val(physio.PaCO2)
	c, o := d.raw[physio.PaCO2], d.raw[physio.PaO2]
	if c == nil || o == nil || c.labelled || o.labelled || v.Has(physio.HCO3) || o2 >= co2 {
		return false
	}
	exchanged := *v
	exchanged.Set(physio.PaCO2, o2)
	exchanged.Set(physio.PaO2, co2)
	if doubtOf(&exchanged, d.near) > quiet {
		return false
	}
	swap := Choice{Word: "swapped", Set: only(physio.PaCO2, o2)}
	swap.Set.Set(physio.PaO2, co2)
	typed := Choice{Word: "as typed", Set: only(physio.PaCO2, co2)}
	typed.Set.Set(physio.PaO2, o2)
	d.ask(Question{Code: AskSwap, Quantity: physio.PaCO2, Typed: c.typed, Value: o2, Choices: []Choice{swap, typed}})
	v.Drop(physio.PaCO2, physio.PaO2)
	return true
}

// checkSaturation asks about a saturation that does not go with the PaO2:
// venous blood, exchanged numbers, or a slip. Dyshaemoglobins, fetal blood and
// cyanotic hearts have their own cautions.
func (d *decider) checkSaturation(v *physio.Values) {
	s := &d.gas.Sample
	if d.near.other || s.Has(physio.COHb) || s.Has(physio.MetHb) || s.Circumstance&(physio.SmokeOrCO|physio.MetHbCause) != 0 {
		return
	}
	gap, ok := saturationGap(v)
	if !ok || math.Abs(gap) < 0.11 {
		return
	}
	sat, o2 := v.Val(physio.SaO2), v.Val(physio.PaO2)
	ask := Question{Code: AskSatFit, Quantity: physio.SaO2, Typed: number(sat * 100), Value: sat - gap}
	if c, err := curveAt(v, sat*100); err == nil && math.Abs(c-o2/100) < 0.06 {
		exchanged := Choice{Word: "exchanged", Set: only(physio.SaO2, o2/100)}
		exchanged.Set.Set(physio.PaO2, sat*100)
		ask.Choices = append(ask.Choices, exchanged)
	}
	ask.Choices = append(ask.Choices, Choice{Word: "sat is off", Drop: []physio.Quantity{physio.SaO2}},
		Choice{Word: "PaO2 is off", Drop: []physio.Quantity{physio.PaO2}})
	d.ask(ask)
}
