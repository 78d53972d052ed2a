package physio

// Assess reads a sample in its setting. It never fails: what is missing is
// listed, what can not be told is "unknown", and what can not be of one
// sample is a caution.
func Assess(s Sample, set Setting) Assessment {
	sc := newScene(s, set)
	sc.indices()
	sc.acidBase()
	sc.ventilation()
	sc.oxygenation()
	sc.critical()
	sc.mechanism()
	sc.problem()
	sc.cautions()
	return *sc.a
}

func (sc *scene) acidBase() {
	a := sc.a
	a.AcidBase = AcidBase{Primary: UnknownProcess, Course: NoCourse, Compensation: CompensationNotStated, Gap: GapUnknown}
	d := a.Triple
	if d.known() {
		t := sc.tripleOf(d)
		a.AcidBase = classify(t)
		if d.Any && d.Quantity == PaCO2 {
			// A PaCO2 that was calculated is too soft to name a second process.
			a.AcidBase.Also, a.AcidBase.Need, a.AcidBase.NeedBorderline = nil, NoNeed, false
		}
		sc.gap(t)
	}
}

// tripleOf gives the triple with the ranges of its blood. What a metabolic
// process needs is a PaCO2: from venous blood it is compared as it stands, and
// a miss counts only beyond the usual difference of the two.
func (sc *scene) tripleOf(d Derived) triple {
	t := triple{
		ph: d.PH, pco2: d.PaCO2, hco3: d.HCO3, sbe: standardBaseExcess(d.PH, d.HCO3),
		r: sc.bloodRanges(), need: sc.a.Ranges.Anchor, margin: needMargin,
	}
	if !sc.lungCO2 {
		t.margin = venousMargin
	}
	return t
}

// bloodRanges shifts the ranges of venous blood: pH 0.03 lower, PCO2 6 mmHg
// and HCO3 1.2 mmol/L higher (Byrne 2014; Kelly 2013), so that an ordinary
// venous gas is not called an acidosis.
func (sc *scene) bloodRanges() Ranges {
	r := sc.a.Ranges
	switch sc.a.Blood {
	case Venous, CentralVenous, MixedVenous, BloodUncertain, Intraosseous:
		r.PHLow -= venousPH
		r.PHHigh -= venousPH
		r.PaCO2High += venousPCO2
		r.HCO3High += venousHCO3
		r.Anchor.PaCO2 += venousPCO2
		r.Anchor.HCO3 += venousHCO3
	}
	return r
}

func (sc *scene) gap(t triple) {
	if ix, ok := sc.a.Index("anion_gap_corrected"); ok {
		sc.a.AcidBase.withGap(t, ix.Value)
		return
	}
	if ix, ok := sc.a.Index("anion_gap"); ok {
		sc.a.AcidBase.withGap(t, ix.Value)
	}
}

func (sc *scene) critical() {
	a := sc.a
	limits := DefaultCritical(a.Population)
	if a.Blood == Cord {
		limits = cordCritical
	} else if sc.set.Critical != nil {
		limits, a.CriticalHouse = *sc.set.Critical, true
	}
	a.CriticalLimits = limits
	if a.Blood == NoBlood {
		return
	}
	add := func(q Quantity, crossed bool) {
		if crossed {
			a.Critical = append(a.Critical, q)
		}
	}
	if ph, ok := sc.v.Get(PHq); ok {
		add(PHq, ph < limits.PHLow || limits.PHHigh > 0 && ph > limits.PHHigh)
	}
	if p, ok := sc.v.Get(PaCO2); ok {
		add(PaCO2, limits.PaCO2High > 0 && p > limits.PaCO2High)
	}
	if p, ok := sc.v.Get(PaO2); ok && a.Blood == Arterial {
		add(PaO2, p < limits.PaO2Low && !a.Oxygenation.ExpectedHere && !sc.venousLooking)
	}
}

func (sc *scene) problem() {
	a := sc.a
	vent, oxy := sc.ventilationCounts(), sc.oxygenationCounts()
	switch {
	case vent && oxy:
		a.Problem = ProblemBoth
	case vent:
		a.Problem = ProblemVentilation
	case oxy:
		a.Problem = ProblemOxygenation
	case a.Ventilation.Level == LevelUnknown || sc.oxygenationOpen():
		a.Problem = ProblemUndetermined
	default:
		a.Problem = ProblemNone
	}
}

// ventilationCounts says that the ventilation axis holds a problem: a level
// that is not adequate and not merely what a metabolic process needs, or poor
// efficiency.
func (sc *scene) ventilationCounts() bool {
	v, need := sc.a.Ventilation, sc.a.AcidBase.Need
	if sc.asthmaNotLow() {
		return true
	}
	switch v.Level {
	case LevelShortForNeed:
		return true
	case LevelHypoventilation:
		answers := sc.a.AcidBase.Primary == MetabolicAlkalosis && (need != Short || sc.a.AcidBase.NeedBorderline)
		return !answers && !v.AtUsual
	case LevelHyperventilation:
		answers := sc.a.AcidBase.Primary == MetabolicAcidosis && need != Beyond
		return !answers
	}
	return v.Efficiency == Poor
}

func (sc *scene) oxygenationCounts() bool {
	o := sc.a.Oxygenation
	if o.Efficiency == Poor {
		return true
	}
	switch o.Level {
	case DegreeMild, DegreeModerate, DegreeSevere:
		return !o.ExpectedHere
	case DegreeAbove:
		return false
	}
	return false
}

// oxygenationOpen says that the axis could still hold a problem that the
// numbers do not show.
func (sc *scene) oxygenationOpen() bool {
	o := sc.a.Oxygenation
	return o.Level == DegreeUnknown || o.Efficiency == EfficiencyUnknown && !sc.a.Oxygen.Known
}

func (sc *scene) mechanism() {
	a := sc.a
	if !sc.lungO2 {
		return
	}
	low := a.Oxygenation.Scale == DegreeMild || a.Oxygenation.Scale == DegreeModerate || a.Oxygenation.Scale == DegreeSevere
	transfer := a.Oxygenation.Efficiency == Reduced || a.Oxygenation.Efficiency == Poor
	if low {
		if p, ok := sc.v.Get(PaCO2); ok && above(p, a.Ranges.PaCO2High) {
			a.Mechanism = append(a.Mechanism, MechHypoventilation)
		}
		if a.Altitude >= altitudeShiftFrom {
			a.Mechanism = append(a.Mechanism, MechLowInspiredPO2)
		}
	}
	if transfer {
		a.Mechanism = append(a.Mechanism, MechMismatchOrShunt)
	}
	if sc.dyshaemoglobin() {
		a.Mechanism = append(a.Mechanism, MechDyshaemoglobin)
	}
}

// dyshaemoglobin says that a measured fraction of it is beyond a smoker's.
func (sc *scene) dyshaemoglobin() bool {
	co, _ := sc.v.Get(COHb)
	met, _ := sc.v.Get(MetHb)
	return co > cohbUsual || met > methbUsual
}
