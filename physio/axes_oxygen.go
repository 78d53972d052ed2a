package physio

// oxygenation judges the second axis: the saturation against its target or the
// PaO2 on its scale, and what the level costs.
func (sc *scene) oxygenation() {
	o := &sc.a.Oxygenation
	o.Level, o.Scale, o.Efficiency = DegreeUnknown, DegreeUnknown, EfficiencyUnknown
	o.OnOxygen = sc.a.Oxygen.Known && sc.a.Oxygen.FiO2.Value > airFiO2 || sc.onUnknownOxygen()
	sc.saturationUsed()
	sc.scale()
	sc.againstTarget()
	if sc.lungO2 && sc.v.Has(PaO2) {
		o.ExpectedHere = sc.expectedHere()
	}
	o.InsideUsual = sc.insideRetainer()
	sc.oxygenationEfficiency()
	if o.Level != DegreeUnknown && !sc.a.Oxygen.Known {
		sc.lack(FiO2, "oxygenation")
	}
}

// onUnknownOxygen says that oxygen is given although its fraction is not known.
func (sc *scene) onUnknownOxygen() bool {
	if sc.a.Oxygen.Known {
		return false
	}
	switch sc.s.Device {
	case DeviceUnstated, Air:
		return sc.s.Circumstance.Has(BledInOxygen) || sc.v.Val(OxygenFlow) > 0
	}
	return true
}

func (sc *scene) saturationUsed() {
	o := &sc.a.Oxygenation
	if s, ok := sc.v.Get(SaO2); ok && sc.patientO2() {
		o.Saturation, o.SaturationSource = propagate(identity, []Input{Measured(SaO2, s)}), SaO2
		if sc.leavesOut(s) {
			o.Saturation, o.SaturationSource = sc.oxyhaemoglobin(o.Saturation), COHb
		}
		return
	}
	if ix, ok := sc.a.Index("sao2_calc"); ok && sc.patientO2() {
		o.Saturation, o.SaturationSource = sc.oxyhaemoglobin(ix.Interval), PaO2
		return
	}
	if s, ok := sc.v.Get(SpO2); ok {
		o.Saturation, o.SaturationSource = propagate(identity, []Input{Measured(SpO2, s)}), SpO2
		o.Saturation.High = min(o.Saturation.High, 1)
		o.Blind = sc.oximeterBlind()
	}
}

func identity(v []float64) float64 { return v[0] }

// oxyhaemoglobin takes measured dyshaemoglobin off a saturation of the curve:
// what is left is the most that can be oxyhaemoglobin.
func (sc *scene) oxyhaemoglobin(s Interval) Interval {
	left := sc.leftForOxygen()
	return Interval{Value: s.Value * left, Low: s.Low * left, High: s.High * left}
}

// scale puts the PaO2, or without one the saturation, on its scale of degrees.
func (sc *scene) scale() {
	o := &sc.a.Oxygenation
	newborn := !sc.adultScale()
	if p, ok := sc.v.Get(PaO2); ok && sc.patientO2() {
		cuts := [3]float64{pao2Adequate, pao2Mild, pao2Moderate}
		if newborn {
			cuts = [3]float64{newbornPaO2, newbornPaO2Mild, newbornPaO2Moderate}
		}
		iv := propagate(identity, []Input{Measured(PaO2, p)})
		o.Scale, o.Borderline, o.Band = degree(p, cuts), crossesAny(iv, cuts), mildOf(cuts)
	} else if o.Saturation.Value > 0 {
		cuts := [3]float64{satAdequate, satMild, satModerate}
		if newborn {
			cuts = [3]float64{pretermTargetLow, newbornSatMild, newbornSatModerate}
		}
		o.Scale, o.Borderline, o.Band = degree(o.Saturation.Value, cuts), crossesAny(o.Saturation, cuts), mildOf(cuts)
	}
	// Where haemoglobin carries something else, or the sample does not follow
	// the curve, a PaO2 on its scale is no comfort: the measured saturation is.
	if sc.lungO2 && !newborn && (sc.v.Has(SaO2) && sc.saturationMismatch() || sc.dyshaemoglobin() && sc.v.Has(PaO2)) {
		cuts := [3]float64{satAdequate, satMild, satModerate}
		if d := worse(o.Scale, degree(o.Saturation.Value, cuts)); d != o.Scale {
			o.Scale, o.Band = d, mildOf(cuts)
		}
	}
	if sc.aboveAlveolar() || sc.unmeasuredCO() || o.Blind {
		o.Scale, o.Borderline = DegreeUnknown, false
	}
	o.Level = o.Scale
}

// unmeasuredCO says that carbon monoxide is likely and nothing measured it:
// neither PaO2 nor SpO2 then tells the oxygen carried.
func (sc *scene) unmeasuredCO() bool {
	return sc.s.Circumstance.Has(SmokeOrCO) && !sc.v.Has(COHb) && !(sc.v.Has(SaO2) && sc.v.Has(PaO2))
}

// mildOf is where "mild" lies between the cut-offs of a scale.
func mildOf(cuts [3]float64) Span { return Span{Low: cuts[1], High: cuts[0]} }

// worse gives the worse of two degrees.
func worse(a, b Degree) Degree {
	for _, d := range []Degree{DegreeSevere, DegreeModerate, DegreeMild} {
		if a == d || b == d {
			return d
		}
	}
	return a
}

func degree(v float64, cuts [3]float64) Degree {
	switch {
	case v >= cuts[0]:
		return DegreeAdequate
	case v >= cuts[1]:
		return DegreeMild
	case v >= cuts[2]:
		return DegreeModerate
	}
	return DegreeSevere
}

func crossesAny(iv Interval, cuts [3]float64) bool {
	for _, c := range cuts {
		if crosses(iv, c) {
			return true
		}
	}
	return false
}

// againstTarget replaces the degree by the target, which compares saturations
// in whole percent, as targets are written.
func (sc *scene) againstTarget() {
	o := &sc.a.Oxygenation
	o.Target = sc.set.Target
	if o.Target == nil || o.Saturation.Value == 0 || o.Scale == DegreeUnknown {
		return
	}
	s := whole(o.Saturation.Value)
	low, high := whole(o.Target.Low), whole(o.Target.High)
	o.Borderline = crosses(o.Saturation, o.Target.Low-0.005) || crosses(o.Saturation, o.Target.High+0.005) && o.OnOxygen
	switch {
	case s < low:
		o.AgainstTarget = BelowTarget
		if o.Level == DegreeAdequate {
			o.Level = DegreeMild
		}
	case s > high:
		o.AgainstTarget = AboveTarget
		o.Level = DegreeAdequate
		if o.OnOxygen {
			o.Level = DegreeAbove
		}
	default:
		o.AgainstTarget = InsideTarget
		o.Level = DegreeAdequate
	}
}

// whole rounds a fraction to whole percent.
func whole(f float64) float64 { return float64(int(100*f + 0.5)) }

// expectedHere says that age or altitude alone explain a PaO2 below the scale:
// on air, not below what a healthy lung of this age would have at the usual
// PaCO2 of this altitude.
func (sc *scene) expectedHere() bool {
	o := sc.a.Oxygenation
	if o.Scale == DegreeAdequate || !onAir(sc) || !sc.adultScale() {
		return false
	}
	_, aged := sc.v.Get(Age)
	high := sc.a.Altitude >= altitudeShiftFrom
	if !high && !aged {
		return false
	}
	paco2 := sc.a.Ranges.Anchor.PaCO2
	if p, ok := sc.v.Get(PaCO2); ok {
		paco2 = min(paco2, p)
	}
	floor := aboutPA(sc.a.Oxygen.FiO2.Value, sc.a.PB, paco2) - sc.expectedAA().High
	return sc.v.Val(PaO2) >= floor
}

// oxygenationEfficiency judges transfer: on air the A-a against its band, on
// oxygen a/A and P/F, above PaCO2 50 or at altitude a/A alone, without a PaO2
// the S/F below its ceiling.
func (sc *scene) oxygenationEfficiency() {
	o := &sc.a.Oxygenation
	aa, hasAA := sc.a.Index("aa")
	switch {
	case o.Blind: // an index with this SpO2 tells nothing
	case hasAA && aa.Value < aaImpossible, sc.aboveAlveolar():
		// A PaO2 above the alveolar one: the inputs can not be right.
	case hasAA:
		sc.efficiencyFromGas(aa)
	default:
		if pf, ok := sc.a.Index("pf"); ok && sc.a.Oxygenation.OnOxygen {
			o.Basis, o.Efficiency = "pf", gradeDown(pf.Value, pfAbnormal, pfPoor)
			return
		}
		if sf, ok := sc.a.Index("sf"); ok && sc.a.Oxygenation.OnOxygen && sf.Value <= sfAbnormal && sc.adultScale() {
			o.Basis, o.Efficiency = "sf", gradeDown(sf.Value, sfAbnormal, sfPoor)
		}
	}
}

// gradeDown turns a number that is worse when lower into an efficiency.
func gradeDown(v, reduced, poor float64) Efficiency {
	switch {
	case v <= poor:
		return Poor
	case v <= reduced:
		return Reduced
	}
	return Efficient
}

func (sc *scene) efficiencyFromGas(aa Index) {
	o := &sc.a.Oxygenation
	ratio, _ := sc.a.Index("a_over_a")
	if onAir(sc) {
		o.Basis = "aa"
		o.Efficiency = Efficient
		switch {
		case sc.a.Population == Child: // no published band is held here: a/A decides
			if o.Basis = "a_over_a"; ratio.Value < aaEfficientRatio {
				o.Efficiency = Reduced
			}
		case !sc.adultScale():
			if aa.Value > newbornAA {
				o.Efficiency = Reduced
			}
		case aa.Value > sc.expectedAA().High:
			o.Efficiency = Reduced
		}
		if ratio.Value < sc.poorOnAir() {
			o.Efficiency = Poor
		}
		return
	}
	pf, _ := sc.a.Index("pf")
	ratioOnly := sc.v.Val(PaCO2) > ratioOnlyPaCO2 || sc.a.Altitude >= altitudeShiftFrom || !sc.adultScale()
	o.Basis = "a_over_a"
	o.Efficiency = sc.transfer(ratio.Value, pf.Value, ratioOnly)
	o.Soft = sc.a.Oxygen.Estimated &&
		sc.transfer(ratio.Low, pf.Low, ratioOnly) != sc.transfer(ratio.High, pf.High, ratioOnly)
	if !ratioOnly && pf.Value <= pfPoor {
		o.Basis = "pf"
	}
}

// poorOnAir is the a/A below which transfer on air is poor. A newborn's PaO2 of
// 50 mmHg, inside his usual range, is an a/A of 0.49: his bound is the one that
// adults have on oxygen.
func (sc *scene) poorOnAir() float64 {
	if !sc.adultScale() {
		return aaPoorOxygen
	}
	return aaPoorAir
}

func (sc *scene) transfer(ratio, pf float64, ratioOnly bool) Efficiency {
	switch {
	case ratio < aaPoorOxygen || !ratioOnly && pf <= pfPoor:
		return Poor
	case ratio < aaEfficientRatio:
		return Reduced
	}
	return Efficient
}
