package physio

// ventilation judges the first axis: PaCO2 against its range and its need, and
// what the level costs.
func (sc *scene) ventilation() {
	v := &sc.a.Ventilation
	v.Level, v.Efficiency = LevelUnknown, EfficiencyUnknown
	pco2 := sc.a.Triple.PaCO2
	if pco2 == 0 {
		pco2, _ = sc.v.Get(PaCO2)
	}
	switch {
	case pco2 > 0 && sc.lungCO2:
		sc.levelOf(pco2)
	case pco2 > 0:
		v.Screen = sc.a.Blood == Venous && pco2 < venousScreen
	default:
		sc.floor()
	}
	if sc.lungCO2 || sc.a.Blood == NoBlood {
		sc.ventilationEfficiency()
	}
	if v.ByRate = sc.heldByRate(); v.ByRate && v.Efficiency == Efficient {
		v.Efficiency = Reduced
	}
}

// levelOf compares a PaCO2 with its range, its target and its need.
func (sc *scene) levelOf(pco2 float64) {
	v, r, ab := &sc.a.Ventilation, sc.a.Ranges, sc.a.AcidBase
	low, high := r.PaCO2Low, r.PaCO2High
	if t := sc.set.TargetPaCO2; t != nil {
		low, high, v.RangeHouse = t.Low, t.High, true
	}
	v.Range = Span{Low: low, High: high}
	v.PaCO2 = propagate(func(x []float64) float64 { return x[0] }, []Input{Measured(PaCO2, pco2)})
	v.Borderline = crosses(v.PaCO2, low) || crosses(v.PaCO2, high)
	switch {
	case above(pco2, high):
		v.Level = LevelHypoventilation
	case ab.Primary == MetabolicAcidosis && ab.Need == Short && sc.a.Fit.Grade != FitReject:
		v.Level = LevelShortForNeed
		v.Borderline = ab.NeedBorderline
	case pco2 < low:
		v.Level = LevelHyperventilation
	default:
		v.Level = LevelAdequate
	}
	attack := sc.asthmaNotLow()
	if attack && v.Level == LevelAdequate {
		v.Borderline = true // never plain adequate in an attack
	}
	v.ChronicPattern = v.Level == LevelHypoventilation && ab.Course == Chronic && !attack
	usual := sc.set.UsualPaCO2
	v.AtUsual = usual > high && pco2 <= usual+needMargin && sc.a.Triple.PH >= r.PHLow && !attack
}

// crosses says that a cut-off lies inside an interval.
func crosses(iv Interval, cut float64) bool { return iv.Low <= cut && cut <= iv.High }

// floor reads end-tidal or transcutaneous CO2: a high one means that PaCO2 is
// at least about that high; a usual or low one excludes nothing.
func (sc *scene) floor() {
	v := &sc.a.Ventilation
	if et, ok := sc.v.Get(EtCO2); ok {
		v.Floor = true
		if above(et, sc.a.Ranges.PaCO2High) {
			v.Level = LevelHypoventilation
		}
		return
	}
	if tc, ok := sc.v.Get(TcCO2); ok && tc > sc.a.Ranges.PaCO2High+tcMargin {
		v.Level = LevelHypoventilation
	}
}

// ventilationEfficiency takes the strongest basis there is: measured dead
// space; else the ventilatory ratio or the minute volume at PaCO2 40, unless a
// PaCO2-EtCO2 beside it is worse.
func (sc *scene) ventilationEfficiency() {
	bases := []struct {
		key           string
		reduced, poor float64
	}{
		{"vd_vt", deadSpaceHigh, deadSpacePoor},
		{"vent_ratio", ratioReduced, ratioPoor},
		{"ve_corrected", correctedHigh, correctedPoor},
		{"pa_et_gap", paEtUsual, paEtWide},
	}
	if !sc.adultRespiration() {
		bases = bases[:1]
	}
	for _, b := range bases {
		ix, ok := sc.a.Index(b.key)
		if !ok {
			continue
		}
		sc.a.Ventilation.Basis = b.key
		sc.a.Ventilation.Efficiency = grade(ix.Value, b.reduced, b.poor)
		if gap, ok := sc.a.Index("pa_et_gap"); ok && b.key != "vd_vt" && b.key != "pa_et_gap" {
			sc.worseGap(grade(gap.Value, paEtUsual, paEtWide))
		}
		return
	}
	sc.lack(VE, "ve_corrected")
	sc.lack(EtCO2, "pa_et_gap")
}

// worseGap lets a wide PaCO2-EtCO2 decide where minute volume looks usual: the
// sign of low lung perfusion must not be covered.
func (sc *scene) worseGap(e Efficiency) {
	rank := map[Efficiency]int{Efficient: 0, Reduced: 1, Poor: 2}
	if v := &sc.a.Ventilation; rank[e] > rank[v.Efficiency] {
		v.Efficiency, v.Basis = e, "pa_et_gap"
	}
}

// grade turns a number that is worse when higher into an efficiency.
func grade(v, reduced, poor float64) Efficiency {
	switch {
	case v >= poor:
		return Poor
	case v > reduced:
		return Reduced
	}
	return Efficient
}

// lack notes a value that would settle something.
func (sc *scene) lack(q Quantity, settles string) {
	if !sc.v.Has(q) {
		sc.a.Missing = append(sc.a.Missing, Lack{q, settles})
	}
}
