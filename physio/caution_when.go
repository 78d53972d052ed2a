package physio

// The conditions of the cautions that caution.go lists.

// venousBlood: the sample is said to be venous.
func (sc *scene) venousBlood() bool {
	switch sc.a.Blood {
	case Venous, CentralVenous, MixedVenous:
		return true
	}
	return false
}

// aboveAlveolar: a PaO2 that this oxygen and PaCO2 can not give.
func (sc *scene) aboveAlveolar() bool {
	aa, ok := sc.a.Index("aa")
	switch {
	case !ok:
		return sc.aboveNoRoom()
	case sc.a.Oxygen.Estimated:
		return aa.High < aaImpossible
	}
	return aa.Value < aaImpossible
}

// aboveNoRoom: the inputs leave so little alveolar oxygen that no difference is
// told, and the PaO2 lies above it.
func (sc *scene) aboveNoRoom() bool {
	o := sc.a.Oxygen
	if !sc.lungO2 || !o.Known || !sc.v.Has(PaCO2, PaO2) {
		return false
	}
	f := o.FiO2.Value
	if o.Estimated {
		f = o.FiO2.High
	}
	return aboutPA(f, sc.a.PB, sc.v.Val(PaCO2))-sc.v.Val(PaO2) < aaImpossible
}

// venousPossible: a PO2 that venous blood also has, with nothing to settle it.
func (sc *scene) venousPossible() bool {
	p, ok := sc.v.Get(PaO2)
	if !ok || p > venousPaO2 || !sc.a.BloodAssumed || sc.v.Has(SpO2) || !sc.adultScale() {
		return false
	}
	return !sc.a.Oxygenation.ExpectedHere && !sc.s.Circumstance.Has(CyanoticHeart)
}

// dyshaemoglobinLikely: measured, or pointed to by a word, or by a measured
// saturation far below the curve at a PaO2 on its flat part.
func (sc *scene) dyshaemoglobinLikely() bool {
	if sc.dyshaemoglobin() || sc.s.Circumstance.Has(SmokeOrCO) || sc.s.Circumstance.Has(MetHbCause) {
		return true
	}
	return sc.v.Val(PaO2) >= flatPaO2 && sc.v.Has(SaO2) && sc.saturationMismatch()
}

// saturationMismatch: a measured saturation away from the curve at this PaO2.
func (sc *scene) saturationMismatch() bool {
	ix, ok := sc.a.Index("sao2_calc")
	if !ok || !sc.lungO2 {
		return false
	}
	s, measured := sc.v.Get(SaO2)
	if !measured {
		if s, ok = sc.v.Get(SpO2); !ok {
			return false
		}
	}
	return s < min(ix.Value-satMismatch, ix.Low-satRepeat) || s > max(ix.Value+satMismatch, ix.High+satRepeat)
}

// asthmaNotLow: in an acute attack a PaCO2 in or above the range is a
// life-threatening sign (BTS/SIGN guideline).
func (sc *scene) asthmaNotLow() bool {
	p, ok := sc.v.Get(PaCO2)
	return ok && sc.s.Circumstance.Has(AsthmaAttack) && p >= sc.a.Ranges.PaCO2Low
}

func (sc *scene) brainCO2() bool {
	p, ok := sc.v.Get(PaCO2)
	return ok && sc.brainAtRisk() && (p < sc.a.Ranges.PaCO2Low || above(p, sc.a.Ranges.PaCO2High))
}

// brainAtRisk: the brain was injured or has been without blood.
func (sc *scene) brainAtRisk() bool {
	return sc.s.Circumstance.Has(BrainInjury) || sc.s.Circumstance.Has(PostArrest)
}

// veryHighPaO2: on oxygen, above any usual target, and not meant to be.
func (sc *scene) veryHighPaO2() bool {
	return sc.lungO2 && sc.a.Oxygenation.OnOxygen && sc.v.Val(PaO2) > highPaO2 && !sc.aboveAlveolar() && !sc.carbonMonoxide()
}

func (sc *scene) newborn() bool {
	return sc.a.Population == Newborn || sc.a.Population == Preterm
}

func (sc *scene) lowCO2Newborn() bool {
	p, ok := sc.v.Get(PaCO2)
	return ok && sc.newborn() && p < sc.a.Ranges.PaCO2Low && sc.a.Blood != Cord
}

func (sc *scene) highO2Preterm() bool {
	if !sc.newborn() || !sc.a.Oxygenation.OnOxygen {
		return false
	}
	p, hasPaO2 := sc.v.Get(PaO2)
	s, hasSpO2 := sc.v.Get(SpO2)
	return hasPaO2 && sc.lungO2 && p > pretermPaO2High || hasSpO2 && s > pretermTargetHigh
}

// hidden: a good saturation on added oxygen beside a high CO2 that oxygen does
// not show.
func (sc *scene) hidden() bool {
	s, ok := sc.v.Get(SpO2)
	return ok && s >= satAdequate && sc.a.Oxygenation.OnOxygen && sc.a.Blood == NoBlood &&
		(sc.a.Ventilation.Level == LevelHypoventilation || sc.s.Circumstance.Has(OpioidOrSedation))
}

func (sc *scene) aboveCeiling() bool {
	s, ok := sc.v.Get(SpO2)
	return ok && s > spo2Ceiling && sc.a.Oxygenation.OnOxygen && sc.a.Oxygenation.SaturationSource == SpO2
}

// oximeterNearTarget: an answer that rests on SpO2 alone, where a hidden low
// SaO2 is common (Valbuena 2022).
func (sc *scene) oximeterNearTarget() bool {
	return sc.a.Oxygenation.SaturationSource == SpO2 && sc.adultScale() && sc.v.Val(SpO2) <= 0.96
}

func (sc *scene) temperatureOff() bool {
	t, ok := sc.v.Get(Temp)
	return ok && abs(t-bodyTemp) >= temperatureSaid && sc.a.Blood != NoBlood
}

func (sc *scene) drivingHigh() bool {
	ix, ok := sc.a.Index("driving_pressure")
	return ok && ix.Value > drivingLimit
}

func (sc *scene) largeVT() bool {
	ix, ok := sc.a.Index("vt_per_pbw")
	return ok && ix.Value > vtProtective && sc.passive()
}

// altitudeUnset: a low PaO2 on air, where a house altitude would matter.
func (sc *scene) altitudeUnset() bool {
	low := sc.a.Oxygenation.Scale == DegreeMild || sc.a.Oxygenation.Scale == DegreeModerate
	if aa, ok := sc.a.Index("aa"); ok && aa.Value > sc.expectedAA().High+altitudeExcess {
		return false // more than altitude could explain
	}
	return low && onAir(sc) && sc.a.PBSource == PressureAssumed
}
