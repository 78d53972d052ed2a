package physio

// triple is what the classification looks at: the values, in mmHg and mmol/L,
// and the ranges they are judged by.
type triple struct {
	ph, pco2, hco3, sbe float64
	r                   Ranges
	// need is the anchor of what a metabolic process expects, and margin the
	// miss in mmHg beyond which a second process is named.
	need   Anchor
	margin float64
}

// classify names the acid-base processes of a triple. It follows the
// expected-response school (Adrogue and Madias 2010; Schlichtig 1998), with
// the range school's word beside it.
func classify(t triple) AcidBase {
	ab := AcidBase{Primary: NoProcess, Course: NoCourse, Gap: GapUnknown}
	switch {
	case t.ph < t.r.PHLow:
		t.acidaemia(&ab)
	case t.ph > t.r.PHHigh:
		t.alkalaemia(&ab)
	default:
		t.balanced(&ab)
	}
	ab.Compensation = t.rangeWord(ab.Primary)
	if !t.r.Responses {
		t.withoutResponses(&ab)
	}
	return ab
}

// above says that a PCO2 is above a limit in the unit it was printed in: 45 mmHg
// is the limit that a kPa print-out knows as 6.0, which is 45.004 mmHg. No
// analyser prints hundredths of a mmHg.
func above(pco2, limit float64) bool { return pco2 > limit+0.01 }

func (t triple) highCO2() bool { return above(t.pco2, t.r.PaCO2High) }

func (t triple) lowCO2() bool { return t.pco2 < t.r.PaCO2Low }

func (t triple) highHCO3() bool { return t.hco3 > t.r.HCO3High }

func (t triple) lowHCO3() bool { return t.hco3 < t.r.HCO3Low }

// excess is the base excess beyond the population's own.
func (t triple) excess() float64 { return t.sbe - t.r.Anchor.SBE }

func (t triple) acidaemia(ab *AcidBase) {
	switch {
	case t.highCO2() && t.lowHCO3():
		t.both(ab, RespiratoryAcidosis, MetabolicAcidosis)
	case t.highCO2():
		t.respiratoryAcidosis(ab)
	case t.lowHCO3() || t.excess() < -sbeDisorder:
		t.metabolicAcidosis(ab)
	case t.pco2 > t.r.Anchor.PaCO2:
		t.respiratoryAcidosis(ab)
	default:
		t.metabolicAcidosis(ab)
	}
}

func (t triple) alkalaemia(ab *AcidBase) {
	switch {
	case t.lowCO2() && t.highHCO3():
		t.both(ab, RespiratoryAlkalosis, MetabolicAlkalosis)
	case t.lowCO2():
		t.respiratoryAlkalosis(ab)
	case t.highHCO3() || t.excess() > sbeDisorder:
		t.metabolicAlkalosis(ab)
	case t.pco2 < t.r.Anchor.PaCO2:
		t.respiratoryAlkalosis(ab)
	default:
		t.metabolicAlkalosis(ab)
	}
}

// balanced reads a pH inside its range: two values out in the same direction
// lean to the side of the undisturbed pH on which the pH lies.
func (t triple) balanced(ab *AcidBase) {
	middle := (t.r.PHLow + t.r.PHHigh) / 2
	switch {
	case t.highCO2() && t.highHCO3() && t.ph > middle:
		t.metabolicAlkalosis(ab)
	case t.highCO2():
		t.respiratoryAcidosis(ab)
	case t.lowCO2() && t.lowHCO3() && t.ph < middle:
		t.metabolicAcidosis(ab)
	case t.lowCO2():
		t.respiratoryAlkalosis(ab)
	case t.highHCO3() && t.excess() > sbeAlone:
		t.metabolicAlkalosis(ab)
	case t.lowHCO3() && t.excess() < -sbeAlone:
		t.metabolicAcidosis(ab)
	}
}

// both orders two processes that push the pH the same way by how far each has
// moved it: the logarithms of the two terms of Henderson-Hasselbalch.
func (t triple) both(ab *AcidBase, respiratory, metabolic Process) {
	moveCO2 := abs(log10(t.pco2 / t.r.Anchor.PaCO2))
	moveHCO3 := abs(log10(t.hco3 / t.r.Anchor.HCO3))
	ab.Primary, ab.Also = respiratory, []Process{metabolic}
	ab.Course = Acute
	if moveHCO3 > moveCO2 {
		ab.Primary, ab.Also, ab.Course = metabolic, []Process{respiratory}, NoCourse
	}
	if metabolic == MetabolicAcidosis {
		ab.Need, ab.NeedSpan = Short, t.acidosisNeed()
		return
	}
	ab.Need, ab.NeedSpan = Beyond, t.alkalosisNeed()
}

func (t triple) respiratoryAcidosis(ab *AcidBase) {
	ab.Primary = RespiratoryAcidosis
	acute := acuteHCO3(t.pco2, t.r.Anchor)
	chronic := chronicHypercapniaHCO3(t.pco2, t.r.Anchor)
	switch {
	case t.hco3 <= acute+acuteTolerance:
		ab.Course = Acute
		if t.hco3 < acute-disorderTolerance && t.excess() < -sbeSignificant {
			ab.Also = append(ab.Also, MetabolicAcidosis)
		}
	case t.ph >= t.r.PHLow:
		ab.Course = Chronic
	default:
		ab.Course = AcuteOnChronic
		ab.DaysFit = t.hco3 < chronic.Low
		ab.UsualPaCO2 = usualPaCO2(t.pco2, t.hco3, t.r.Anchor)
	}
	if t.hco3 > chronic.High+chronicTolerance {
		ab.Also = append(ab.Also, MetabolicAlkalosis)
	}
}

func (t triple) respiratoryAlkalosis(ab *AcidBase) {
	ab.Primary = RespiratoryAlkalosis
	acute := acuteHCO3(t.pco2, t.r.Anchor)
	chronic := chronicHypocapniaHCO3(t.pco2, t.r.Anchor)
	switch {
	case t.hco3 > acute+acuteTolerance && t.excess() > sbeDisorder:
		ab.Course = Acute
		ab.Also = append(ab.Also, MetabolicAlkalosis)
	case t.hco3 >= acute-acuteTolerance:
		ab.Course = Acute
	case t.hco3 < chronic-hypocapniaBand:
		ab.Course = CourseNotClear
		ab.Also = append(ab.Also, MetabolicAcidosis)
	case t.ph <= chronicLatestPH:
		ab.Course = Chronic
	default:
		ab.Course = CourseNotClear
	}
}

func (t triple) metabolicAcidosis(ab *AcidBase) {
	ab.Primary = MetabolicAcidosis
	ab.NeedSpan = t.acidosisNeed()
	t.compareNeed(ab, RespiratoryAcidosis, RespiratoryAlkalosis)
}

func (t triple) metabolicAlkalosis(ab *AcidBase) {
	ab.Primary = MetabolicAlkalosis
	ab.NeedSpan = t.alkalosisNeed()
	t.compareNeed(ab, RespiratoryAcidosis, RespiratoryAlkalosis)
}

// acidosisNeed is the PaCO2 that a metabolic acidosis expects: both bands,
// 40 + SBE (+-3) and Winters (+-2), so that "short" means above both.
func (t triple) acidosisNeed() Span {
	bySBE := acidosisPaCO2BySBE(t.sbe, t.need)
	byWinters := winters(t.hco3, t.need)
	return Span{
		Low:  min(bySBE-sbeNeedTolerance, byWinters-wintersTolerance),
		High: max(bySBE+sbeNeedTolerance, byWinters+wintersTolerance),
	}
}

// alkalosisNeed is the PaCO2 that a metabolic alkalosis expects.
func (t triple) alkalosisNeed() Span {
	byHCO3 := alkalosisPaCO2(t.hco3, t.need)
	bySBE := alkalosisPaCO2BySBE(t.sbe, t.need)
	return Span{
		Low:  min(byHCO3-alkalosisBand, bySBE-sbeNeedTolerance),
		High: max(byHCO3+alkalosisBand, bySBE+sbeNeedTolerance),
	}
}

// compareNeed sets the need; a second process is named only when PaCO2 misses
// the band by more than the error of a repeat sample.
func (t triple) compareNeed(ab *AcidBase, above, below Process) {
	over, under := t.pco2-ab.NeedSpan.High, ab.NeedSpan.Low-t.pco2
	ab.Need = Matches
	switch {
	case over > 0:
		ab.Need = Short
	case under > 0:
		ab.Need = Beyond
	}
	ab.NeedBorderline = abs(over) < t.margin || abs(under) < t.margin
	switch {
	case over > t.margin:
		ab.Also = append(ab.Also, above)
	case under > t.margin:
		ab.Also = append(ab.Also, below)
	}
}

// rangeWord is the range school's word for the primary process.
func (t triple) rangeWord(primary Process) Compensation {
	phOut := t.ph < t.r.PHLow || t.ph > t.r.PHHigh
	var answered bool
	switch primary {
	case RespiratoryAcidosis:
		answered = t.highHCO3()
	case RespiratoryAlkalosis:
		answered = t.lowHCO3()
	case MetabolicAcidosis:
		answered = t.lowCO2()
	case MetabolicAlkalosis:
		answered = t.highCO2()
	default:
		return CompensationNotStated
	}
	switch {
	case answered && phOut:
		return CompensationPartial
	case answered:
		return CompensationFull
	}
	return CompensationNone
}

// withoutResponses takes back what the adult rules said where they do not
// hold: course, second processes found by an expected response, and need.
func (t triple) withoutResponses(ab *AcidBase) {
	if ab.Primary != NoProcess {
		ab.Course = CourseNotClear
	}
	if ab.Primary == MetabolicAcidosis || ab.Primary == MetabolicAlkalosis {
		ab.Course = NoCourse
	}
	ab.Compensation = CompensationNotStated
	ab.Need, ab.NeedBorderline, ab.NeedSpan = NoNeed, false, Span{}
	ab.DaysFit, ab.UsualPaCO2 = false, Span{}
	if !(t.highCO2() && t.lowHCO3()) && !(t.lowCO2() && t.highHCO3()) {
		ab.Also = nil
	}
}

// withGap adds what the anion gap says: a high gap is a metabolic acidosis
// even beside a normal bicarbonate, and a gap that has risen by more than
// twice the fall of bicarbonate hides an alkalosis or earlier hypercapnia.
func (ab *AcidBase) withGap(t triple, gap float64) {
	ab.Gap = GapNormal
	if gap < gapHigh {
		return
	}
	ab.Gap = GapHigh
	if t.lowHCO3() || gap >= gapHidden {
		ab.add(MetabolicAcidosis)
	}
	fall := t.r.Anchor.HCO3 - t.hco3
	if gap >= gapHidden && (fall <= 0 || (gap-gapUsual)/fall > deltaMixed) {
		ab.add(MetabolicAlkalosis)
	}
}

// add names a further process once.
func (ab *AcidBase) add(p Process) {
	if ab.Primary == p {
		return
	}
	if ab.Primary == NoProcess {
		ab.Primary = p
		return
	}
	for _, q := range ab.Also {
		if q == p {
			return
		}
	}
	ab.Also = append(ab.Also, p)
}
