package physio

// Index is a derived number with the range it may truly lie in and the inputs
// it was made from.
type Index struct {
	Key string
	Interval
	Unit   string
	Inputs []Quantity
}

// derivation is one row of the table of derived numbers: which inputs, which
// formula on them, and when it may be told at all. Its equation and source
// stand under the same key in rules.
type derivation struct {
	key, unit string
	in        []Quantity
	f         func(v []float64) float64
	when      func(sc *scene) bool
}

func lungO2(sc *scene) bool { return sc.lungO2 }

func lungCO2(sc *scene) bool { return sc.lungCO2 && sc.a.Blood == Arterial }

func always(*scene) bool { return true }

// alveolarCO2 and alveolarO2 also ask that the alveolar PO2 is one: at a low
// pressure a high PaCO2 leaves no room for oxygen, so an input is amiss.
func alveolarCO2(sc *scene) bool { return lungCO2(sc) && sc.alveolarRoom() }

func alveolarO2(sc *scene) bool { return sc.lungO2 && sc.alveolarRoom() }

func (sc *scene) alveolarRoom() bool {
	return aboutPA(sc.v.Val(FiO2), sc.a.PB, sc.v.Val(PaCO2)) > leastAlveolar
}

// leastAlveolar is an alveolar PO2, mmHg, that nobody was found alive below.
const leastAlveolar = 10.0

func adultRules(sc *scene) bool {
	return sc.a.Ranges.Responses && sc.a.Triple.known() && sc.a.Blood != Cord
}

func onAir(sc *scene) bool {
	return sc.lungO2 && sc.a.Oxygen.Known && !sc.a.Oxygen.Estimated && sc.a.Oxygen.FiO2.Value <= airAAFiO2
}

func ratioCurve(sc *scene) bool {
	s, ok := sc.v.Get(SpO2)
	return ok && s <= spo2Ceiling && !sc.s.Circumstance.Has(ECMO)
}

// aboutPA is the alveolar PO2 of FiO2, PB and PaCO2.
func aboutPA(fio2, pb, paco2 float64) float64 {
	return alveolarPO2(fio2, pb, paco2, usualR, waterAt37)
}

// derivations is the one table of derived numbers, in the order in which they
// are worked out: a later row may use an earlier one through scene.v.
var derivations = []derivation{
	{"hco3_calc", "mmol/L", []Quantity{PHq, PaCO2}, func(v []float64) float64 { return bicarbonate(v[0], v[1]) }, always},
	{"sbe", "mmol/L", []Quantity{PHq, PaCO2}, func(v []float64) float64 {
		return standardBaseExcess(v[0], bicarbonate(v[0], v[1]))
	}, always},
	{"pao2_alveolar", "mmHg", []Quantity{FiO2, PB, PaCO2}, func(v []float64) float64 { return aboutPA(v[0], v[1], v[2]) }, alveolarCO2},
	{"aa", "mmHg", []Quantity{FiO2, PB, PaCO2, PaO2}, func(v []float64) float64 { return alveolarArterial(aboutPA(v[0], v[1], v[2]), v[3]) }, alveolarO2},
	{"a_over_a", "", []Quantity{FiO2, PB, PaCO2, PaO2}, func(v []float64) float64 { return arterialAlveolarRatio(aboutPA(v[0], v[1], v[2]), v[3]) }, alveolarO2},
	{"resp_index", "", []Quantity{FiO2, PB, PaCO2, PaO2}, func(v []float64) float64 { return respiratoryIndex(aboutPA(v[0], v[1], v[2]), v[3]) }, alveolarO2},
	{"pf", "mmHg", []Quantity{PaO2, FiO2}, func(v []float64) float64 { return pfRatio(v[0], v[1]) }, lungO2},
	{"pf_altitude_corrected", "mmHg", []Quantity{PaO2, FiO2, PB}, func(v []float64) float64 { return pfAtAltitude(pfRatio(v[0], v[1]), v[2]) },
		func(sc *scene) bool { return sc.lungO2 && sc.a.Altitude >= altitudeShiftFrom }},
	{"sf", "", []Quantity{SpO2, FiO2}, func(v []float64) float64 { return sfRatio(v[0], v[1]) }, ratioCurve},
	{"rox", "", []Quantity{SpO2, FiO2, RR}, func(v []float64) float64 { return rox(v[0], v[1], v[2]) },
		func(sc *scene) bool { return sc.adultRespiration() && !sc.s.Circumstance.Has(ECMO) }},
	{"oi", "", []Quantity{FiO2, Pmean, PaO2}, func(v []float64) float64 { return oxygenationIndex(v[0], v[1], v[2]) }, lungO2},
	{"osi", "", []Quantity{SpO2, FiO2, Pmean}, func(v []float64) float64 { return oxygenSaturationIndex(v[0], v[1], v[2]) }, ratioCurve},
	{"ve_corrected", "L/min", []Quantity{VE, PaCO2}, func(v []float64) float64 { return correctedMinuteVolume(v[0], v[1]) },
		func(sc *scene) bool { return lungCO2(sc) && sc.adultRespiration() }},
	{"vent_ratio", "", []Quantity{VE, PaCO2, PBW}, func(v []float64) float64 { return ventilatoryRatio(v[0], v[1], v[2]) },
		func(sc *scene) bool { return lungCO2(sc) && sc.passive() }},
	{"vd_vt", "", []Quantity{PaCO2, PeCO2}, func(v []float64) float64 { return deadSpaceFraction(v[0], v[1]) },
		func(sc *scene) bool { return lungCO2(sc) && sc.v.Val(PeCO2) < sc.v.Val(PaCO2) }},
	{"pa_et_gap", "mmHg", []Quantity{PaCO2, EtCO2}, func(v []float64) float64 { return endTidalGap(v[0], v[1]) }, lungCO2},
	{"alveolar_dead_fraction", "", []Quantity{PaCO2, EtCO2}, func(v []float64) float64 { return alveolarDeadFraction(v[0], v[1]) },
		func(sc *scene) bool { return lungCO2(sc) && sc.v.Val(EtCO2) <= sc.v.Val(PaCO2) }},
	{"alveolar_vent", "L/min", []Quantity{VT, RR, PBW}, func(v []float64) float64 { return minuteVolume(v[0]-adultDeadSpace*v[2], v[1]) },
		func(sc *scene) bool { return sc.adultRespiration() && sc.v.Val(VT) > adultDeadSpace*sc.v.Val(PBW) }},
	{"pbw", "kg", []Quantity{PBW}, func(v []float64) float64 { return v[0] }, always},
	{"vt_per_pbw", "mL/kg", []Quantity{VT, PBW}, func(v []float64) float64 { return v[0] / v[1] }, always},
	{"vt_per_weight", "mL/kg", []Quantity{VT, Weight}, func(v []float64) float64 { return v[0] / v[1] },
		func(sc *scene) bool { p := sc.a.Population; return p == Newborn || p == Preterm || p == Child }},
	{"driving_pressure", "cmH2O", []Quantity{Pplat, PEEP}, func(v []float64) float64 { return drivingPressure(v[0], v[1]) },
		(*scene).drivingKnown},
	{"compliance", "mL/cmH2O", []Quantity{VT, Pplat, PEEP}, func(v []float64) float64 { return v[0] / drivingPressure(v[1], v[2]) },
		(*scene).drivingKnown},
	{"mech_power", "J/min", []Quantity{RR, VT, PIP, Pplat, PEEP}, func(v []float64) float64 {
		in := Inflation{Peak: CmH2O(v[2]), Plateau: CmH2O(v[3]), TotalPEEP: CmH2O(v[4])}
		return powerVolumeControl(minuteVolume(v[1], v[0]), in)
	}, func(sc *scene) bool { return sc.drivingKnown() && sc.v.Val(PIP) >= sc.v.Val(Pplat) }},
	{"rsbi", "/min/L", []Quantity{RR, VT}, func(v []float64) float64 { return breathingIndex(v[0], v[1]) },
		func(sc *scene) bool { return sc.adultRespiration() && sc.spontaneous() }},
	{"anion_gap", "mmol/L", []Quantity{Na, Cl, HCO3}, func(v []float64) float64 { return anionGap(v[0], v[1], v[2]) }, always},
	{"anion_gap_corrected", "mmol/L", []Quantity{Na, Cl, HCO3, Albumin}, func(v []float64) float64 {
		return anionGap(v[0], v[1], v[2]) + albuminCorrection(v[3], float64(AlbuminTexts))
	}, always},
	{"sid_apparent", "mEq/L", []Quantity{Na, K, Calcium, Magnesium, Cl, Lactate}, func(v []float64) float64 {
		return v[0] + v[1] + 2*v[2] + 2*v[3] - v[4] - v[5] // Kellum 2007
	}, always},
	{"sid_effective", "mEq/L", []Quantity{PHq, HCO3, Albumin, Phosphate}, func(v []float64) float64 {
		return v[1] + v[2]*albuminCharge(v[0]) + v[3]*phosphateCharge(v[0]) // Figge 1992
	}, always},
	{"sig", "mEq/L", []Quantity{Na, K, Calcium, Magnesium, Cl, Lactate, PHq, HCO3, Albumin, Phosphate}, func(v []float64) float64 {
		apparent := v[0] + v[1] + 2*v[2] + 2*v[3] - v[4] - v[5]
		return apparent - v[7] - v[8]*albuminCharge(v[6]) - v[9]*phosphateCharge(v[6]) // Kellum 1995
	}, always},
	{"p50", "mmHg", []Quantity{PaO2, SaO2, PHq, PaCO2}, func(v []float64) float64 {
		shift := CurveShift{PH: PH(v[2]), PaCO2: MmHg(v[3])}
		return v[0] / po2At(v[1], shift) * po2At(0.5, CurveShift{})
	}, func(sc *scene) bool { s := sc.v.Val(SaO2); return s >= 0.2 && s <= 0.9 && sc.a.Blood != NoBlood }},
}

// drivingKnown says that the total PEEP is known: an auto-PEEP may have been
// read as a total or as a part on top, so that the difference is not told.
func (sc *scene) drivingKnown() bool {
	return sc.v.Val(Pplat) > sc.v.Val(PEEP) && !sc.v.Has(AutoPEEP)
}

// adultRespiration says that adult breathing indices hold.
func (sc *scene) adultRespiration() bool {
	return sc.a.Population == Adult || sc.a.Population == Pregnant
}

// spontaneous says that the patient breathes with little or no support.
func (sc *scene) spontaneous() bool {
	if sc.s.Circumstance.Has(SpontaneousBreathing) || sc.s.Mode == PressSupport {
		return true
	}
	switch sc.s.Device {
	case TPiece, TracheostomyMask, CPAPDevice:
		return true
	}
	return false
}

// passive says that the ventilator does the breathing: the ventilatory ratio
// holds in controlled ventilation of adults.
func (sc *scene) passive() bool {
	if !sc.adultRespiration() || sc.spontaneous() || sc.s.Mode == SIMV || sc.a.Population == Pregnant {
		return false
	}
	return sc.s.Device == Ventilator || sc.v.Has(Pplat) || sc.controlledMode()
}

func (sc *scene) controlledMode() bool {
	switch sc.s.Mode {
	case AssistCtrl, VolumeCtrl, PressureCtrl, PRVC:
		return true
	}
	return false
}

// indices works out every derived number that the inputs allow.
func (sc *scene) indices() {
	v := sc.v
	if d := sc.a.Triple; d.Any && d.Quantity == HCO3 {
		v.Set(HCO3, d.HCO3)
	}
	sc.a.Indices = make([]Index, 0, usualIndices)
	sc.given(&v)
	for i := range derivations {
		d := &derivations[i]
		if !v.Has(d.in...) || !d.when(sc) {
			continue
		}
		sc.derive(d)
	}
	sc.needs()
	sc.bands()
	sc.contents()
	sc.admixture()
}

// usualIndices is room for the indices of a usual gas.
const usualIndices = 20

// derive carries one row of the table out, by the readings that its inputs were
// worked out from where they were.
func (sc *scene) derive(d *derivation) {
	sc.add(d.key, d.unit, sc.carryInputs(d.f, d.in), d.in...)
}

// add notes an index whose numbers are ordinary.
func (sc *scene) add(key, unit string, iv Interval, in ...Quantity) {
	if finite(iv.Value) && finite(iv.Low) && finite(iv.High) {
		sc.a.Indices = append(sc.a.Indices, Index{Key: key, Interval: iv, Unit: unit, Inputs: in})
	}
}

// given takes over derived numbers that were measured or typed as such.
func (sc *scene) given(v *Values) {
	if f, ok := v.Get(VDVT); ok {
		sc.add("vd_vt", "", point(f), VDVT)
	}
}

func point(v float64) Interval { return Interval{Value: v, Low: v, High: v} }

// adultScale says that adult expectations of PaO2 hold.
func (sc *scene) adultScale() bool { return sc.a.Ranges.PaO2 }

// expectedAA is the expected A-a on air, mmHg: the age band, or for an unknown
// age the band of adults up to about 64 years.
func (sc *scene) expectedAA() Span {
	if age, ok := sc.v.Get(Age); ok {
		return expectedAA(age)
	}
	return Span{Low: expectedAA(youngAdult).Low, High: expectedAA(ageUnknown).High}
}

const (
	youngAdult = 20.0 // years
	ageUnknown = 64.0 // years: its upper line, 20 mmHg, serves when no age was said
)

// healthyPaO2 is the PaO2 that a healthy lung would have: the alveolar PO2
// less the expected A-a on air, or times a healthy a/A on oxygen.
func (sc *scene) healthyPaO2() Interval {
	alveolar := func(v *Values) float64 { return aboutPA(v.Val(FiO2), v.Val(PB), v.Val(PaCO2)) }
	if onAir(sc) {
		b := sc.expectedAA()
		return sc.carryBand(func(v *Values) Span {
			pa := alveolar(v)
			return Span{pa - b.High, pa - b.Low}
		}, middleOf, FiO2, PB, PaCO2)
	}
	return sc.carryBand(func(v *Values) Span {
		pa := alveolar(v)
		return Span{aaEfficientRatio * pa, healthyRatioHigh * pa}
	}, 0, FiO2, PB, PaCO2)
}

// healthyRatioHigh is the upper end of a healthy a/A, from memory.
const healthyRatioHigh = 0.82
