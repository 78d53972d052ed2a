package physio

// needs adds the expected responses of the adult rules.
func (sc *scene) needs() {
	if !adultRules(sc) {
		return
	}
	d, anchor := sc.a.Triple, sc.bloodRanges().Anchor
	acute := func(v *Values) Span { return bandAround(acuteHCO3(v.Val(PaCO2), anchor), acuteTolerance) }
	chronic := func(v *Values) Span { return chronicHCO3(v.Val(PaCO2), anchor) }
	sc.add("expected_hco3_acute", "mmol/L", sc.carryBand(acute, middleOf, PaCO2), PaCO2)
	sc.add("expected_hco3_chronic", "mmol/L", sc.carryBand(chronic, middleOf, PaCO2), PaCO2)
	sc.add("expected_ph_acute", "", sc.carry(func(v *Values, _ []float64) float64 {
		return phAtPCO2(anchor.SBE, v.Val(PaCO2))
	}, []Quantity{PaCO2}), PaCO2)
	sc.add("expected_ph_chronic", "", sc.carryBand(func(v *Values) Span {
		b := chronic(v)
		return Span{phFrom(v.Val(PaCO2), b.Low), phFrom(v.Val(PaCO2), b.High)}
	}, middleOf, PaCO2), PaCO2)
	t := sc.tripleOf(d)
	switch p := classify(t).Primary; p {
	case MetabolicAcidosis:
		sc.add("expected_paco2", "mmHg", centred(t.acidosisNeed()), PHq, HCO3)
	case MetabolicAlkalosis:
		sc.add("expected_paco2", "mmHg", centred(t.alkalosisNeed()), HCO3)
	}
}

// chronicHCO3 is the band of the chronic response on either side of the anchor.
func chronicHCO3(pco2 float64, from Anchor) Span {
	if pco2 < from.PaCO2 {
		return bandAround(chronicHypocapniaHCO3(pco2, from), hypocapniaBand)
	}
	return chronicHypercapniaHCO3(pco2, from)
}

func bandAround(v, tolerance float64) Span { return Span{v - tolerance, v + tolerance} }

// centred is a band as an interval with its value in the middle.
func centred(b Span) Interval { return Interval{Value: (b.Low + b.High) / 2, Low: b.Low, High: b.High} }

// bands adds the expected A-a on air, the PaO2 of a healthy lung at this
// PaCO2, and the delta ratio.
func (sc *scene) bands() {
	if onAir(sc) && sc.adultScale() && sc.a.Population != Child {
		sc.add("aa_expected", "mmHg", centred(sc.expectedAA()), Age)
	}
	if _, ok := sc.a.Index("pao2_alveolar"); ok && sc.lungO2 && sc.v.Has(PaCO2) && sc.adultScale() {
		sc.a.Oxygenation.HealthyPaO2 = sc.healthyPaO2()
		sc.add("pao2_expected_at_paco2", "mmHg", sc.a.Oxygenation.HealthyPaO2, PaCO2, FiO2, PB)
	}
	sc.deltaRatio()
}

// deltaRatio compares the gap with the fall of bicarbonate, which is in both:
// they err together.
func (sc *scene) deltaRatio() {
	gap, corrected := sc.a.Index("anion_gap_corrected")
	if !corrected {
		gap, _ = sc.a.Index("anion_gap")
	}
	anchor := sc.a.Ranges.Anchor.HCO3
	if gap.Value < gapHigh || anchor-sc.a.Triple.HCO3 < deltaSmallestFall {
		return
	}
	sc.add("delta_ratio", "", sc.carry(func(v *Values, _ []float64) float64 {
		rise := anionGap(v.Val(Na), v.Val(Cl), v.Val(HCO3)) - gapUsual
		if corrected {
			rise += albuminCorrection(v.Val(Albumin), float64(AlbuminTexts))
		}
		return deltaRatio(rise, anchor-v.Val(HCO3))
	}, gap.Inputs), Na, Cl, HCO3)
}

// deltaSmallestFall is the fall of bicarbonate, mmol/L, below which the delta
// ratio is unstable.
const deltaSmallestFall = 4.0
