package physio

import "math"

// The dissociation curve of this package is the tanh equation of
// Siggaard-Andersen, with the shifts of his 1990 revision. Against the standard
// human curve (Severinghaus 1979, table 1) it is at most 0.42 percentage points
// off anywhere between 1 and 500 mmHg; no other single published equation holds
// at both ends. The other equations stand in curve_ref.go.
const (
	curveX0    = 1.9459101490553132 // ln 7: the inflexion at 7 kPa
	curveY0    = 1.8747             // ln(0.867/0.133): saturation at the inflexion
	curveH     = 3.5
	curveK     = 0.5342857
	bohrPH     = -0.88 // shift of ln PO2 per pH at constant PCO2
	bohrCO2    = 0.048 // shift of ln PO2 per ln PCO2 at constant pH
	shiftMetHb = -0.7  // shift per fraction of methaemoglobin
	shiftTemp  = 0.055 // shift of ln PO2 per degree
	kPaPerMmHg = 1 / mmHgPerKPa
)

// SaturationCeiling is the highest saturation that is ever turned into a PO2:
// above it an error of one percentage point in the saturation is an error of
// tens of mmHg.
const SaturationCeiling Fraction = 0.97

// CurveShift is what moves the oxygen dissociation curve. Each zero value
// stands for the standard: pH 7.40, PaCO2 40 mmHg, 37 C, no dyshaemoglobin.
// The temperature is that at which the PO2 is quoted: analysers quote 37 C
// whatever the patient's temperature.
type CurveShift struct {
	PH    PH
	PaCO2 Pressure
	Temp  Celsius
	COHb  Fraction // of total haemoglobin
	MetHb Fraction // of total haemoglobin
}

func (at CurveShift) standard() CurveShift {
	if at.PH == 0 {
		at.PH = referencePH
	}
	if at.PaCO2 == 0 {
		at.PaCO2 = referencePCO2
	}
	if at.Temp == 0 {
		at.Temp = bodyTemp
	}
	return at
}

func (at CurveShift) check() error {
	at = at.standard()
	err := check(
		given{q: PHq, v: float64(at.PH)}, given{q: PaCO2, v: at.PaCO2.MmHg()}, given{q: Temp, v: float64(at.Temp)},
		given{q: COHb, v: float64(at.COHb)}, given{q: MetHb, v: float64(at.MetHb)},
	)
	if err != nil {
		return err
	}
	return check(given{name: "COHb + MetHb", v: float64(at.COHb + at.MetHb), low: 0, high: 0.9})
}

// shift gives the parameter a of the tanh equation.
func (at CurveShift) shift() float64 {
	return bohrPH*(float64(at.PH)-referencePH) + bohrCO2*math.Log(at.PaCO2.MmHg()/referencePCO2) +
		shiftMetHb*float64(at.MetHb) // Siggaard-Andersen 1990
}

// Saturation gives the functional oxygen saturation O2Hb/(O2Hb + HHb) at a PO2
// between 0.5 and 2000 mmHg. With carboxyhaemoglobin the curve is that of the
// haemoglobin left over, shifted to the left. DPG and haemoglobin variants are
// not seen; a measured saturation is better than this one.
func Saturation(po2 Pressure, at CurveShift) (Fraction, error) {
	if err := at.check(); err != nil {
		return 0, err
	}
	if err := check(given{q: PaO2, v: po2.MmHg(), low: 0.5, high: 2000}); err != nil {
		return 0, err
	}
	return Fraction(saturation(po2.MmHg(), at)), nil
}

// saturation takes zero fields of the shift as standard.
func saturation(po2 float64, at CurveShift) float64 {
	at = at.standard()
	if at.COHb == 0 {
		return tanhCurve(po2, at)
	}
	return saturationWithCO(po2, at)
}

// tanhCurve gives the saturation of the haemoglobin that can bind, with oxygen
// and carbon monoxide together, at their combined partial pressure in mmHg.
func tanhCurve(po2 float64, at CurveShift) float64 {
	a := at.shift()
	x := math.Log(po2*kPaPerMmHg) - curveX0 - a - shiftTemp*(float64(at.Temp)-bodyTemp) // Siggaard-Andersen 1990
	y := curveY0 + x + (curveH+a)*math.Tanh(curveK*x)                                   // Siggaard-Andersen 1984
	return 1 / (1 + math.Exp(-y))
}

// saturationWithCO finds the combined saturation s of the haemoglobin that is
// not met-: carbon monoxide adds M x PCO to the PO2, and by Haldane's law
// COHb/O2Hb = M x PCO/PO2, so that s = curve(PO2 x s(1-m)/(s(1-m) - c)).
func saturationWithCO(po2 float64, at CurveShift) float64 {
	c, rest := float64(at.COHb), 1-float64(at.MetHb)
	s := bisect(func(s float64) float64 {
		return s - tanhCurve(po2*s*rest/(s*rest-c), at)
	}, c/rest+1e-9, 1)
	return (s*rest - c) / (rest - c)
}

// PO2At gives the PO2 at a functional saturation, the inverse of Saturation,
// by halving a bracket. A saturation above SaturationCeiling is refused with a
// RangeError: what can be said there is only that the PO2 is at least about 90
// mmHg on a standard curve.
func PO2At(sat Fraction, at CurveShift) (Pressure, error) {
	if err := at.check(); err != nil {
		return 0, err
	}
	if err := check(given{q: SaO2, v: float64(sat), low: 0.01, high: float64(SaturationCeiling)}); err != nil {
		return 0, err
	}
	return MmHg(po2At(float64(sat), at)), nil
}

// po2At has no ceiling: root finding inside the package may go above it.
func po2At(sat float64, at CurveShift) float64 {
	at = at.standard()
	return math.Exp(bisect(func(lnP float64) float64 {
		return saturation(math.Exp(lnP), at) - sat
	}, math.Log(1e-3), math.Log(1e5)))
}

// P50 gives the PO2 of half saturation on the curve so shifted: 26.8 mmHg on
// the standard curve. It knows nothing of the patient's own haemoglobin: see
// P50FromSample.
func P50(at CurveShift) (Pressure, error) {
	return PO2At(0.5, at)
}

// P50FromSample gives the patient's P50 at pH 7.40, PaCO2 40 and 37 C from one
// sample whose saturation was measured, not calculated (a calculated one only
// gives the curve's own P50 back). It holds for saturations from 0.20 to 0.90;
// above, the error explodes (Aberman 1975).
func P50FromSample(po2 Pressure, measured Fraction, at CurveShift) (Pressure, error) {
	err := check(given{q: PaO2, v: po2.MmHg(), low: 5, high: 150}, given{q: SaO2, v: float64(measured), low: 0.2, high: 0.9})
	if err == nil {
		err = at.check()
	}
	if err != nil {
		return 0, err
	}
	ratio := po2.MmHg() / po2At(float64(measured), at) // Severinghaus 1979: same shape, other position
	return MmHg(ratio * po2At(0.5, CurveShift{})), nil
}
