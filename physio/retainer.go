package physio

// retainer: a CO2 retainer by word, or by numbers that look like one.
func (sc *scene) retainer() bool {
	if !sc.adultRespiration() || sc.a.Population == Pregnant {
		return false
	}
	if sc.s.Circumstance.Has(COPD) || sc.s.Circumstance.Has(Retainer) {
		return true
	}
	// Another cause of an acute rise was named: a target for retainers would
	// point the wrong way.
	if sc.s.Circumstance&(BrainInjury|PostArrest|CPR|AsthmaAttack|SmokeOrCO|OpioidOrSedation|Sepsis|Shock) != 0 {
		return false
	}
	d := sc.a.Triple
	if !d.known() || !sc.lungCO2 {
		return false
	}
	chronic := d.HCO3 > raisedHCO3 && d.PH <= sc.a.Ranges.PHHigh
	return above(d.PaCO2, max(sc.a.Ranges.PaCO2High, retainerPaCO2)) && sc.a.AcidBase.Primary == RespiratoryAcidosis || chronic
}

// retainerOnOxygen: on oxygen, and a CO2 retainer by word or by a raised
// bicarbonate that took days.
func (sc *scene) retainerOnOxygen() bool {
	word := sc.s.Circumstance.Has(COPD) || sc.s.Circumstance.Has(Retainer)
	course := sc.a.AcidBase.Course
	raised := sc.a.Triple.HCO3 > raisedHCO3 && sc.a.AcidBase.Primary == RespiratoryAcidosis && (course == Chronic || course == AcuteOnChronic)
	return sc.retainer() && (word || raised) && sc.a.Oxygenation.OnOxygen
}

// insideRetainer asks for the word: numbers alone must not call a low
// saturation usual.
func (sc *scene) insideRetainer() bool {
	sat := whole(sc.a.Oxygenation.Saturation.Value)
	word := sc.s.Circumstance.Has(COPD) || sc.s.Circumstance.Has(Retainer)
	return sc.set.Target == nil && word && !sc.a.Oxygenation.Blind && !sc.carbonMonoxide() && sc.retainerOnOxygen() && sat >= whole(retainerTargetLow) && sat <= whole(retainerTargetHigh)
}

func (sc *scene) aboveRetainer() bool {
	o := sc.a.Oxygenation
	if !sc.retainerOnOxygen() || o.Blind || sc.carbonMonoxide() {
		return false
	}
	limit := retainerTargetHigh
	if sc.set.Target != nil {
		limit = sc.set.Target.High
	}
	return whole(o.Saturation.Value) > whole(limit)
}

func (sc *scene) retainerUnset() bool {
	acuteOnVentilator := sc.s.Device == Ventilator && sc.a.Triple.HCO3 <= raisedHCO3 && !sc.s.Circumstance.Has(COPD)
	return sc.set.Target == nil && !sc.a.Oxygenation.Blind && !sc.carbonMonoxide() && sc.a.Fit.Grade != FitReject && sc.retainer() && !acuteOnVentilator && sc.a.Oxygenation.Saturation.Value > 0
}
