package physio

// Plasma is what the strong-ion approach needs. Valences and the place of
// lactate differ between authors: here calcium is ionised and doubled,
// magnesium total and doubled, lactate a strong anion.
type Plasma struct {
	Ions
	PH        PH
	IonisedCa Concentration
	Mg        Concentration
	Lactate   Concentration
	AlbuminGL GramsPerL
	Phosphate Concentration
}

func (p Plasma) checkStrong() error {
	if err := p.Ions.check(); err != nil {
		return err
	}
	return check(
		given{q: K, v: float64(p.K)}, given{q: Calcium, v: float64(p.IonisedCa)},
		given{q: Magnesium, v: float64(p.Mg)}, given{q: Lactate, v: float64(p.Lactate)},
	)
}

func (p Plasma) checkWeak() error {
	return check(
		given{q: PHq, v: float64(p.PH)}, given{q: HCO3, v: float64(p.HCO3)},
		given{q: Albumin, v: float64(p.AlbuminGL)}, given{q: Phosphate, v: float64(p.Phosphate)},
	)
}

// ApparentSID gives Na + K + 2 Ca + 2 Mg - Cl - lactate in mEq/L; about 40 is
// usual.
func ApparentSID(p Plasma) (Concentration, error) {
	if err := p.checkStrong(); err != nil {
		return 0, err
	}
	return p.Na + p.K + 2*p.IonisedCa + 2*p.Mg - p.Cl - p.Lactate, nil // Kellum 2007
}

// EffectiveSID gives the charge of bicarbonate, albumin and phosphate in mEq/L.
func EffectiveSID(p Plasma) (Concentration, error) {
	if err := p.checkWeak(); err != nil {
		return 0, err
	}
	ph := float64(p.PH)
	return p.HCO3 + MmolL(float64(p.AlbuminGL)*albuminCharge(ph)+float64(p.Phosphate)*phosphateCharge(ph)), nil // Figge 1992
}

// StrongIonGap gives the apparent less the effective strong ion difference, in
// mEq/L. Ordinary values give about 5, not 0; above 8 counted as raised in one
// intensive-care cohort (2013).
func StrongIonGap(p Plasma) (Concentration, error) {
	apparent, err := ApparentSID(p)
	if err != nil {
		return 0, err
	}
	effective, err := EffectiveSID(p)
	if err != nil {
		return 0, err
	}
	return apparent - effective, nil // Kellum 1995
}

// AlbuminCharge gives the negative charge of a gram of albumin, mEq, at a pH.
func AlbuminCharge(ph PH) (float64, error) {
	if err := check(given{q: PHq, v: float64(ph)}); err != nil {
		return 0, err
	}
	return albuminCharge(float64(ph)), nil
}

func albuminCharge(ph float64) float64 { return 0.123*ph - 0.631 } // Figge 1992

// PhosphateCharge gives the negative charge of a mmol of phosphate, mEq, at a
// pH.
func PhosphateCharge(ph PH) (float64, error) {
	if err := check(given{q: PHq, v: float64(ph)}); err != nil {
		return 0, err
	}
	return phosphateCharge(float64(ph)), nil
}

func phosphateCharge(ph float64) float64 { return 0.309*ph - 0.469 } // Figge 1992

// Partition is a base excess split into its causes, mmol/L each.
type Partition struct {
	SodiumChloride Concentration // Na - Cl - 38
	Albumin        Concentration // 0.25 x (42 - albumin)
	Lactate        Concentration // 1 - lactate
	Other          Concentration // what remains of the base excess
}

// PartitionBE splits a standard base excess by the simplified strong-ion rule.
func PartitionBE(sbe Concentration, p Plasma) (Partition, error) {
	err := check(
		given{q: BE, v: float64(sbe)}, given{q: Na, v: float64(p.Na)}, given{q: Cl, v: float64(p.Cl)},
		given{q: Albumin, v: float64(p.AlbuminGL)}, given{q: Lactate, v: float64(p.Lactate)},
	)
	if err != nil {
		return Partition{}, err
	}
	part := Partition{
		SodiumChloride: p.Na - p.Cl - 38, // Story 2004 (constants from memory)
		Albumin:        MmolL(gapPerAlbumin * (42 - float64(p.AlbuminGL))),
		Lactate:        1 - p.Lactate,
	}
	part.Other = sbe - part.SodiumChloride - part.Albumin - part.Lactate
	return part, nil
}
