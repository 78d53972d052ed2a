package physio

// scene is one assessment in the making: the sample, the setting, and what has
// been worked out from them, shared by the steps of Assess.
type scene struct {
	s   Sample
	set Setting
	v   Values // the sample's values, with what was worked out
	a   *Assessment
	// made is what volumes worked out, for carry.
	made []completion
	// lung is true when the sample may speak of the lung: arterial blood, or
	// capillary blood for CO2, and no circuit that exchanges gas for it.
	lungCO2, lungO2 bool
	// venousLooking is true when the sample's saturation is so far below the
	// oximeter's that an oxygenation verdict must wait.
	venousLooking bool
}

func newScene(s Sample, set Setting) *scene {
	sc := &scene{s: s, set: set, v: possible(s.Values), a: &Assessment{Sample: s}}
	sc.population()
	sc.blood()
	sc.pressure()
	sc.ranges()
	sc.oxygen()
	sc.volumes()
	sc.triple()
	if sc.venousLooking = sc.looksVenous(); sc.venousLooking {
		sc.lungO2 = false
	}
	return sc
}

// possible leaves out what can be of no patient, and what is no number: it is
// missing, like a value that was not given.
func possible(v Values) Values {
	out := v
	v.Each(func(q Quantity, x float64) {
		if !q.Possible(x) {
			out.Drop(q)
		}
	})
	return out
}

func (sc *scene) population() {
	p := sc.s.Population
	if p == PopulationUnstated {
		p = sc.set.Population
	}
	age, known := sc.v.Get(Age)
	if p == PopulationUnstated && !known && sc.newbornSample() {
		p = Newborn
	}
	if p == PopulationUnstated || p == Adult {
		p = Adult
		if known && age < childBelow {
			p = Child
		}
	}
	// A house of newborns that names an adult's age or height means an adult.
	if (p == Newborn || p == Preterm) && known && age >= newbornBelow {
		p = Adult
		if age < childBelow {
			p = Child
		}
	}
	sc.a.Population = p
}

// newbornSample says that only newborns are sampled there.
func (sc *scene) newbornSample() bool {
	switch sc.s.Site {
	case Heel, UmbilicalArt, UmbilicalVein, CordArterySite, CordVeinSite:
		return true
	}
	return sc.s.Blood == Cord
}

func (sc *scene) blood() {
	a := sc.a
	a.Blood = sc.s.Blood
	if a.Blood == BloodUnstated {
		a.Blood = Arterial
		a.BloodAssumed = true
		if !sc.v.Has(PHq) && !sc.v.Has(PaCO2) && !sc.v.Has(PaO2) && !sc.v.Has(HCO3) {
			a.Blood, a.BloodAssumed = NoBlood, false
		}
	}
	bypass := sc.s.Circumstance.Has(ECMO) || sc.s.Circumstance.Has(CPR)
	sc.lungCO2 = (a.Blood == Arterial || a.Blood == Capillary) && !bypass
	earlobe := a.Blood == Capillary && sc.s.Site == Earlobe
	sc.lungO2 = (a.Blood == Arterial || earlobe) && !bypass
}

func (sc *scene) pressure() {
	a := sc.a
	measured, _ := sc.v.Get(PB)
	altitude := sc.set.Altitude
	if said, ok := sc.v.Get(Altitude); ok {
		altitude = said
	}
	a.PB, a.PBSource = barometricPressure(measured, sc.set.PB, altitude)
	a.Altitude = altitude
	if a.PBSource == PressureMeasured || a.PBSource == PressureHouse {
		a.Altitude = 0
		if a.PB < altitudePressureBelow {
			a.Altitude = altitudeAt(a.PB)
		}
	}
	sc.v.Set(PB, a.PB)
}

// altitudeAt inverts the pressure of West's model atmosphere, metres.
func altitudeAt(pb float64) float64 {
	return bisect(func(h float64) float64 { return pb - westPressure(h) }, 0, 9000)
}

func (sc *scene) ranges() {
	age, _ := sc.v.Get(Age)
	sc.a.Ranges = rangesFor(sc.a.Population, age, sc.s.Trimester, sc.a.Altitude)
	if sc.a.Blood == Cord {
		sc.a.Ranges = cordRangesOf(sc.s.Site)
	}
}

func (sc *scene) oxygen() {
	var stated *float64
	if f, ok := sc.v.Get(FiO2); ok {
		stated = &f
	}
	flow, _ := sc.v.Get(OxygenFlow)
	fio2, estimated, err := inspiredOxygen(sc.s, stated, flow, sc.a.Population)
	if err != nil {
		return
	}
	sc.a.Oxygen = Oxygen{FiO2: fio2, Known: true, Estimated: estimated}
	sc.v.Set(FiO2, fio2.Value)
}

// volumes completes minute volume, tidal volume and predicted weight.
func (sc *scene) volumes() {
	sc.complete(RR, func(v *Values) float64 { return v.Val(RRSet) }, RRSet)
	if sex := sc.s.Sex; sex != SexUnstated && sc.adultSized() {
		sc.complete(PBW, func(v *Values) float64 { return predictedWeight(sex, v.Val(Height)) }, Height)
	}
	sc.complete(VT, func(v *Values) float64 { return v.Val(VTPerKg) * v.Val(PBW) }, VTPerKg, PBW)
	sc.complete(VE, func(v *Values) float64 { return minuteVolume(v.Val(VT), v.Val(RR)) }, VT, RR)
}

func (sc *scene) adultSized() bool {
	return (sc.a.Population == Adult || sc.a.Population == Pregnant) && sc.v.Val(Height) >= pbwFromHeight
}

// looksVenous: a sample of unstated blood with a low PO2, whose saturation,
// measured or by the curve, is far below the oximeter's.
func (sc *scene) looksVenous() bool {
	v := &sc.v
	if !sc.a.BloodAssumed || !v.Has(SpO2, PaO2) || v.Val(PaO2) > venousPaO2+5 || sc.dyshaemoglobin() {
		return false
	}
	s, ok := v.Get(SaO2)
	if !ok {
		s = sc.saturationOfPaO2().Value
	}
	return v.Val(SpO2)-s >= venousSatGap
}

// triple completes pH, PaCO2 and HCO3 from each other and checks their fit.
func (sc *scene) triple() {
	v, d := &sc.v, &sc.a.Triple
	ph, hasPH := v.Get(PHq)
	pco2, hasCO2 := v.Get(PaCO2)
	hco3, hasHCO3 := v.Get(HCO3)
	if !hasHCO3 && hasPH && !hasCO2 && v.Has(BE) {
		hco3, hasHCO3 = bicarbonateFromBE(ph, v.Val(BE)), true
	}
	switch {
	case hasPH && hasCO2 && hasHCO3:
		sc.a.Fit = fit(ph, pco2, hco3)
	case hasPH && hasCO2:
		hco3 = bicarbonate(ph, pco2)
		d.Quantity, d.Any = HCO3, true
		if be, ok := v.Get(BE); ok {
			sc.a.Fit = fitBE(ph, pco2, be)
		}
	case hasPH && hasHCO3:
		pco2 = pco2From(ph, hco3)
		d.Quantity, d.Any = PaCO2, true
	case hasCO2 && hasHCO3:
		ph = phFrom(pco2, hco3)
		d.Quantity, d.Any = PHq, true
	default:
		return
	}
	// What was worked out must be possible too: else two given values can not
	// be of one sample, and the third stays unknown.
	if PHq.Possible(ph) && PaCO2.Possible(pco2) && HCO3.Possible(hco3) {
		d.PH, d.PaCO2, d.HCO3 = ph, pco2, hco3
	} else {
		*d = Derived{}
	}
}

// known says that the whole triple is there, given or completed.
func (d Derived) known() bool { return d.PH != 0 && d.PaCO2 != 0 && d.HCO3 != 0 }

// fit grades a triple by our error budget: pH 0.005, PaCO2 0.5 mmHg, HCO3 0.5
// mmol/L and the spread of the published constants, 3.5 %.
func fit(ph, pco2, hco3 float64) Fit {
	f := Fit{HCO3Calc: bicarbonate(ph, pco2)}
	f.Off = hco3 - f.HCO3Calc
	f.OffPH = phFrom(pco2, hco3) - ph
	free := abs(f.Off) <= fitFreeHCO3*hco3+0.5
	switch {
	case abs(f.OffPH) <= fitFreePH || free:
		f.Grade = FitOK
	case abs(f.OffPH) <= fitRejectPH && abs(f.Off) <= fitAskHCO3:
		f.Grade = FitCaution
	default:
		f.Grade = FitReject
	}
	return f
}

// fitBE grades a base excess given without bicarbonate. Analysers print the
// base excess of blood or of the extracellular fluid, which differ by 2 mmol/L
// and more, so only a wide miss is said.
func fitBE(ph, pco2, be float64) Fit {
	calc := bicarbonate(ph, pco2)
	f := Fit{HCO3Calc: calc, OfBE: true, Grade: FitOK, Off: be - standardBaseExcess(ph, calc)}
	if abs(f.Off) > beAsk {
		f.Grade = FitReject
	} else if abs(f.Off) > beFree {
		f.Grade = FitCaution
	}
	return f
}
