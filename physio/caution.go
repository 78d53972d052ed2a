package physio

// Severity orders cautions.
type Severity uint8

// The severities. A major caution is never cut from an answer.
const (
	Minor Severity = iota
	Major
)

// CautionCode names a caution. The sentence stands in package bot.
type CautionCode string

// Caution is one caution that was raised.
type Caution struct {
	Code     CautionCode
	Severity Severity
}

// The cautions.
const (
	CautionCord           CautionCode = "cord_sample"
	CautionVenous         CautionCode = "venous_sample"
	CautionCapillary      CautionCode = "capillary_sample"
	CautionEarlobe        CautionCode = "earlobe_sample"
	CautionIntraosseous   CautionCode = "intraosseous_sample"
	CautionCPR            CautionCode = "during_resuscitation"
	CautionSampleDoubt    CautionCode = "sample_in_doubt"
	CautionVenousLikely   CautionCode = "venous_likely"
	CautionVenousPossible CautionCode = "venous_possible"
	CautionECMO           CautionCode = "ecmo"
	CautionHFOV           CautionCode = "hfov"
	CautionHeliox         CautionCode = "heliox"
	CautionHyperbaric     CautionCode = "hyperbaric"
	CautionCyanotic       CautionCode = "cyanotic_heart_disease"
	CautionBrain          CautionCode = "brain_injury_co2"
	CautionAsthma         CautionCode = "asthma_co2_not_low"
	CautionFit            CautionCode = "values_do_not_fit"
	CautionFitSoft        CautionCode = "values_fit_loosely"
	CautionAboveAlveolar  CautionCode = "pao2_above_alveolar"
	CautionSaturation     CautionCode = "saturation_mismatch"
	CautionDyshaem        CautionCode = "dyshaemoglobin"
	CautionLowCO2Newborn  CautionCode = "low_co2_newborn"
	CautionHighO2Preterm  CautionCode = "high_o2_preterm"
	CautionAboveRetainer  CautionCode = "above_retainer_target"
	CautionRetainer       CautionCode = "retainer_target"
	CautionAboveTarget    CautionCode = "above_target"
	CautionHidden         CautionCode = "oxygen_hides_hypoventilation"
	CautionNotSteady      CautionCode = "not_steady_state"
	CautionFloor          CautionCode = "etco2_is_a_floor"
	CautionTranscutaneous CautionCode = "transcutaneous_trend"
	CautionCeiling        CautionCode = "spo2_above_97"
	CautionOximeter       CautionCode = "spo2_may_over_read"
	CautionTemperature    CautionCode = "temperature"
	CautionEstimated      CautionCode = "fio2_estimated"
	CautionConserving     CautionCode = "fio2_not_estimated"
	CautionLowPaCO2       CautionCode = "paco2_calculated"
	CautionPlateau        CautionCode = "plateau_above_30"
	CautionVT             CautionCode = "vt_above_8"
	CautionHyperoxia      CautionCode = "high_o2_brain"
	CautionHighPaO2       CautionCode = "high_pao2"
	CautionShort          CautionCode = "short_for_need"
	CautionDriving        CautionCode = "driving_pressure_above_15"
	CautionAltitudeUnset  CautionCode = "altitude_not_set"
	CautionPotassium      CautionCode = "potassium_severe"
	CautionAnaemia        CautionCode = "anaemia_hides_low_content"
	CautionLactate        CautionCode = "lactate_severe"
	CautionByRate         CautionCode = "paco2_held_by_rate"
	CautionNewbornOI      CautionCode = "newborn_oi_high"
)

// trigger is one row of the table of cautions: what raises it, and which
// raised cautions make it redundant.
type trigger struct {
	code     CautionCode
	severity Severity
	when     func(sc *scene) bool
	unless   []CautionCode
}

// triggers is the one table of cautions, most important first.
var triggers = []trigger{
	{CautionCPR, Major, func(sc *scene) bool { return sc.s.Circumstance.Has(CPR) }, nil},
	{CautionPotassium, Major, func(sc *scene) bool { return sc.v.Val(K) >= potassiumHigh && sc.bloodTable() }, nil},
	{CautionCord, Major, func(sc *scene) bool { return sc.a.Blood == Cord }, nil},
	{CautionIntraosseous, Major, func(sc *scene) bool { return sc.a.Blood == Intraosseous }, nil},
	{CautionVenous, Major, (*scene).venousBlood, nil},
	{CautionSampleDoubt, Major, func(sc *scene) bool { return sc.a.Blood == BloodUncertain }, nil},
	{CautionFit, Major, func(sc *scene) bool { return sc.a.Fit.Grade == FitReject }, nil},
	{CautionAboveAlveolar, Major, (*scene).aboveAlveolar, nil},
	{CautionVenousLikely, Major, func(sc *scene) bool { return sc.venousLooking }, nil},
	{CautionVenousPossible, Major, (*scene).venousPossible, []CautionCode{CautionVenousLikely}},
	{CautionDyshaem, Major, (*scene).dyshaemoglobinLikely, nil},
	{CautionSaturation, Major, (*scene).saturationMismatch, []CautionCode{CautionDyshaem, CautionVenousLikely}},
	{CautionAnaemia, Major, (*scene).severeAnaemia, nil},
	{CautionECMO, Major, func(sc *scene) bool { return sc.s.Circumstance.Has(ECMO) }, nil},
	{CautionHyperbaric, Major, func(sc *scene) bool { return sc.s.Circumstance.Has(Hyperbaric) || sc.s.Device == Chamber }, nil},
	{CautionCyanotic, Major, func(sc *scene) bool { return sc.s.Circumstance.Has(CyanoticHeart) }, nil},
	{CautionAsthma, Major, (*scene).asthmaNotLow, nil},
	{CautionHyperoxia, Major, func(sc *scene) bool { return sc.veryHighPaO2() && sc.brainAtRisk() }, nil},
	{CautionByRate, Major, func(sc *scene) bool { return sc.a.Ventilation.ByRate }, nil},
	{CautionLactate, Major, func(sc *scene) bool { return sc.lactateSevere() && sc.acidotic() }, nil},
	{CautionBrain, Major, (*scene).brainCO2, []CautionCode{CautionHyperoxia}},
	{CautionLowCO2Newborn, Major, (*scene).lowCO2Newborn, nil},
	{CautionNewbornOI, Major, (*scene).newbornOI, nil},
	{CautionHighO2Preterm, Major, (*scene).highO2Preterm, nil},
	{CautionAboveRetainer, Major, (*scene).aboveRetainer, nil},
	{CautionHidden, Major, (*scene).hidden, nil},
	{CautionCapillary, Major, func(sc *scene) bool { return sc.a.Blood == Capillary && sc.s.Site != Earlobe }, nil},
	{CautionHeliox, Major, func(sc *scene) bool { return sc.s.Circumstance.Has(Heliox) }, nil},
	{CautionNotSteady, Major, func(sc *scene) bool { return sc.s.Circumstance.Has(JustChanged) }, nil},
	{CautionLactate, Minor, (*scene).lactateSevere, []CautionCode{CautionLactate}},
	{CautionShort, Minor, func(sc *scene) bool { return sc.a.Ventilation.Level == LevelShortForNeed }, nil},
	{CautionEarlobe, Minor, func(sc *scene) bool { return sc.a.Blood == Capillary && sc.s.Site == Earlobe }, nil},
	{CautionHFOV, Minor, func(sc *scene) bool { return sc.s.Mode == HFOV || sc.s.Mode == HFJV }, nil},
	{CautionFloor, Minor, func(sc *scene) bool { return sc.a.Ventilation.Floor }, nil},
	{CautionTranscutaneous, Minor, func(sc *scene) bool { return sc.v.Has(TcCO2) || sc.v.Has(TcO2) }, nil},
	{CautionCeiling, Minor, (*scene).aboveCeiling, nil},
	{CautionLowPaCO2, Minor, func(sc *scene) bool { return sc.a.Triple.Any && sc.a.Triple.Quantity == PaCO2 }, nil},
	{CautionAboveTarget, Minor, func(sc *scene) bool { return sc.a.Oxygenation.Level == DegreeAbove }, []CautionCode{CautionAboveRetainer}},
	{CautionHighPaO2, Minor, (*scene).veryHighPaO2, []CautionCode{CautionHyperoxia, CautionAboveRetainer, CautionDyshaem, CautionHighO2Preterm}},
	{CautionRetainer, Minor, (*scene).retainerUnset, []CautionCode{CautionAboveRetainer}},
	{CautionTemperature, Minor, (*scene).temperatureOff, nil},
	{CautionPlateau, Minor, func(sc *scene) bool { return sc.v.Val(Pplat) > plateauLimit }, nil},
	{CautionDriving, Minor, (*scene).drivingHigh, []CautionCode{CautionPlateau}},
	{CautionVT, Minor, (*scene).largeVT, nil},
	{CautionConserving, Minor, func(sc *scene) bool {
		return sc.s.Device == ReservoirCannula || sc.s.Device == PulseDose || sc.s.Circumstance.Has(BledInOxygen)
	}, nil},
	{CautionFitSoft, Minor, func(sc *scene) bool { return sc.a.Fit.Grade == FitCaution }, nil},
	{CautionEstimated, Minor, func(sc *scene) bool { return sc.a.Oxygen.Estimated && sc.lungO2 }, nil},
	{CautionOximeter, Minor, (*scene).oximeterNearTarget, []CautionCode{CautionCeiling}},
	{CautionAltitudeUnset, Minor, (*scene).altitudeUnset, nil},
}

// cautions raises what the sample calls for.
func (sc *scene) cautions() {
	for i := range triggers {
		t := &triggers[i]
		if !t.when(sc) || sc.a.anyRaised(t.unless) {
			continue
		}
		sc.a.Cautions = append(sc.a.Cautions, Caution{t.code, t.severity})
	}
}

func (a *Assessment) anyRaised(codes []CautionCode) bool {
	for _, c := range codes {
		if a.Raised(c) {
			return true
		}
	}
	return false
}

// Raised says that the caution was raised.
func (a *Assessment) Raised(code CautionCode) bool {
	for _, c := range a.Cautions {
		if c.Code == code {
			return true
		}
	}
	return false
}

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
