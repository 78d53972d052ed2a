package physio

// Ions are the ions of plasma from one analyser: mixing two moves the gap by
// more than its reference range is wide.
type Ions struct {
	Na, Cl, HCO3 Concentration
	// K is used by AnionGapK and the strong ion difference only.
	K Concentration
}

func (i Ions) check() error {
	return check(given{q: Na, v: float64(i.Na)}, given{q: Cl, v: float64(i.Cl)}, given{q: HCO3, v: float64(i.HCO3)})
}

// AnionGap gives Na - Cl - HCO3 in mmol/L; 8 to 12 is usual, less with modern
// chloride electrodes. It rises by 7 between pH 6.85 and 7.55 by itself.
func AnionGap(i Ions) (Concentration, error) {
	if err := i.check(); err != nil {
		return 0, err
	}
	return MmolL(anionGap(float64(i.Na), float64(i.Cl), float64(i.HCO3))), nil
}

func anionGap(na, cl, hco3 float64) float64 { return na - cl - hco3 } // Emmett and Narins 1977

// AnionGapK gives the gap with potassium added; 12 to 20 is usual.
func AnionGapK(i Ions) (Concentration, error) {
	if err := i.check(); err != nil {
		return 0, err
	}
	if err := check(given{q: K, v: float64(i.K)}); err != nil {
		return 0, err
	}
	return MmolL(anionGap(float64(i.Na), float64(i.Cl), float64(i.HCO3)) + float64(i.K)), nil // Emmett and Narins 1977
}

// Normal albumin in g/L: the paper of the correction takes 44, most texts 40,
// which moves the corrected gap by 1 mmol/L.
const (
	AlbuminFigge GramsPerL = 44 // Figge 1998
	AlbuminTexts GramsPerL = 40 // common practice
)

// gapPerAlbumin is mmol/L of gap per g/L of albumin (Figge 1998).
const gapPerAlbumin = 0.25

// AlbuminLevel is a patient's albumin and the one taken as normal, 0 meaning
// AlbuminTexts.
type AlbuminLevel struct {
	Measured, Normal GramsPerL
}

func (a AlbuminLevel) check() error {
	return check(
		given{q: Albumin, v: float64(a.Measured)},
		given{name: "normal albumin", v: float64(a.normal()), low: 35, high: 50},
	)
}

func (a AlbuminLevel) normal() GramsPerL {
	if a.Normal == 0 {
		return AlbuminTexts
	}
	return a.Normal
}

// AlbuminCorrection gives what to add to a gap for a low albumin, mmol/L.
func AlbuminCorrection(a AlbuminLevel) (Concentration, error) {
	if err := a.check(); err != nil {
		return 0, err
	}
	return MmolL(albuminCorrection(float64(a.Measured), float64(a.normal()))), nil
}

func albuminCorrection(measured, normal float64) float64 {
	return gapPerAlbumin * (normal - measured) // Figge 1998
}

// ExpectedGap gives the gap that is usual at an albumin when usual is the one
// at normal albumin.
func ExpectedGap(usual Concentration, a AlbuminLevel) (Concentration, error) {
	correction, err := AlbuminCorrection(a)
	if err != nil {
		return 0, err
	}
	if err := check(gapOf(usual)); err != nil {
		return 0, err
	}
	return usual - correction, nil
}

// CorrectedGap gives a gap corrected to normal albumin.
func CorrectedGap(gap Concentration, a AlbuminLevel) (Concentration, error) {
	correction, err := AlbuminCorrection(a)
	if err != nil {
		return 0, err
	}
	if err := check(gapOf(gap)); err != nil {
		return 0, err
	}
	return gap + correction, nil
}

func gapOf(gap Concentration) given {
	return given{name: "anion gap", v: float64(gap), low: -20, high: 80}
}

// Delta compares the rise of a gap with the fall of bicarbonate.
type Delta struct {
	Gap    Concentration // corrected for albumin
	Usual  Concentration // 0 means 12
	HCO3   Concentration
	Normal Concentration // bicarbonate of the undisturbed state, 0 means 24
}

const (
	usualGap   = 12.0 // mmol/L without potassium, common practice
	normalHCO3 = 24.0 // mmol/L, common practice
)

func (d Delta) filled() Delta {
	if d.Usual == 0 {
		d.Usual = usualGap
	}
	if d.Normal == 0 {
		d.Normal = normalHCO3
	}
	return d
}

// DeltaRatio gives the rise of the gap over the fall of bicarbonate: about 1 to
// 2 in a pure high-gap acidosis, less with a normal-gap acidosis beside it,
// more with an alkalosis or earlier hypercapnia. A fall of bicarbonate of less
// than 1 mmol/L is a RangeError; below 4 the ratio is unsteady.
func DeltaRatio(d Delta) (float64, error) {
	d = d.filled()
	err := check(gapOf(d.Gap), given{q: HCO3, v: float64(d.HCO3)},
		given{name: "fall of HCO3", v: float64(d.Normal - d.HCO3), low: 1, high: 70})
	if err != nil {
		return 0, err
	}
	return deltaRatio(float64(d.Gap-d.Usual), float64(d.Normal-d.HCO3)), nil
}

func deltaRatio(rise, fall float64) float64 { return rise / fall } // Rastegar 2007

// PotentialBicarbonate gives the bicarbonate that would be there without the
// anions of the gap: above 30 speaks for an alkalosis, below 20 for a
// normal-gap acidosis beside it.
func PotentialBicarbonate(d Delta) (Concentration, error) {
	d = d.filled()
	if err := check(gapOf(d.Gap), given{q: HCO3, v: float64(d.HCO3)}); err != nil {
		return 0, err
	}
	return d.HCO3 + d.Gap - d.Usual, nil // common practice
}

// ChlorideRatio gives Cl/Na: above 0.79 chloride acidifies, below 0.75 it
// alkalises (common practice).
func ChlorideRatio(i Ions) (float64, error) {
	if err := check(given{q: Na, v: float64(i.Na)}, given{q: Cl, v: float64(i.Cl)}); err != nil {
		return 0, err
	}
	return float64(i.Cl / i.Na), nil
}
