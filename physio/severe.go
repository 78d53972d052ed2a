package physio

// heldByRate says that an adult who breathes by himself holds a PaCO2 in or
// below its range by a high rate or by rapid shallow breaths.
func (sc *scene) heldByRate() bool {
	v := &sc.a.Ventilation
	if !sc.adultRespiration() || v.PaCO2.Value == 0 || v.Level == LevelHypoventilation || sc.controlled() {
		return false
	}
	index, _ := sc.a.Index("rsbi")
	return sc.v.Val(RR) >= rateHigh || index.Value > patternLimit
}

// controlled says that the rate is the ventilator's.
func (sc *scene) controlled() bool {
	switch sc.s.Mode {
	case SIMV, APRV, HFOV, HFJV:
		return true
	}
	return sc.passive() || sc.v.Has(RRSet) || sc.controlledMode() && !sc.spontaneous()
}

// patientO2 says that PaO2 and SaO2 tell the level of the patient: where a
// circuit shares the work they do so still, and only the lung stays unknown. The
// blood must then be said to be arterial: it could be the circuit's.
func (sc *scene) patientO2() bool {
	circuit := sc.s.Circumstance.Has(ECMO) && !sc.s.Circumstance.Has(CPR)
	return sc.lungO2 || circuit && sc.s.Blood == Arterial
}

// oximeterBlind says that an oximeter takes what haemoglobin carries for
// oxygen: COHb beyond a smoker's, in smoke beyond the usual (Buckley 1994), or
// much MetHb.
func (sc *scene) oximeterBlind() bool {
	co := sc.v.Val(COHb)
	return co > cohbUsual || sc.s.Circumstance.Has(SmokeOrCO) && co > cohbOxygen || sc.v.Val(MetHb) > methbOximeter
}

// bloodTable says that the bounds of children and adults hold for what is
// measured in this blood.
func (sc *scene) bloodTable() bool { return !sc.newborn() && sc.a.Blood != Cord }

// severeAnaemia: so little haemoglobin that neither PaO2 nor saturation tells
// the oxygen carried.
func (sc *scene) severeAnaemia() bool {
	return sc.v.Has(Hb) && sc.v.Val(Hb) < hbSevere && sc.bloodTable()
}

func (sc *scene) lactateSevere() bool { return sc.v.Val(Lactate) >= lactateSevere && sc.bloodTable() }

// acidotic says that there is an acidosis which a lactate may explain.
func (sc *scene) acidotic() bool { return sc.a.AcidBase.Is(MetabolicAcidosis) }

// newbornOI: an oxygenation index in the ranges that decide about more than
// ventilation.
func (sc *scene) newbornOI() bool {
	ix, ok := sc.a.Index("oi")
	return ok && sc.newborn() && ix.Value >= newbornOI
}

// carbonMonoxide: measured, or said; high oxygen is then its treatment.
func (sc *scene) carbonMonoxide() bool {
	return sc.v.Val(COHb) > cohbUsual || sc.s.Circumstance.Has(SmokeOrCO)
}

// leavesOut says that a measured saturation can not be a part of all
// haemoglobin, as it and the dyshaemoglobin beside it make more than the whole:
// it is of what is left (FO2Hb = SO2 (1 - FCOHb - FMetHb), sheet, section 8).
func (sc *scene) leavesOut(sao2 float64) bool {
	return sc.dyshaemoglobin() && sao2+sc.v.Val(COHb)+sc.v.Val(MetHb) > 1+wholeHb
}

// leftForOxygen is the part of haemoglobin that can carry oxygen beside a
// measured dyshaemoglobin.
func (sc *scene) leftForOxygen() float64 {
	if !sc.dyshaemoglobin() {
		return 1
	}
	return max(0, 1-sc.v.Val(COHb)-sc.v.Val(MetHb))
}
