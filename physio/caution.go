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
