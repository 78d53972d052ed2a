package physio

import "math"

// The equations in this file are published ways to compute the dissociation
// curve that records and other programs use. They are here to reproduce such
// numbers; Saturation and PO2At are the ones to compute with.

// SaturationSeveringhaus gives the saturation on the standard curve (37 C, pH
// 7.40) from PO2 by the cubic equation. It reads up to 0.55 percentage points
// high above 90 mmHg.
func SaturationSeveringhaus(po2 Pressure) (Fraction, error) {
	if err := check(given{q: PaO2, v: po2.MmHg(), low: 0.1, high: 2000}); err != nil {
		return 0, err
	}
	p := po2.MmHg()
	return Fraction(1 / (23400/(p*p*p+150*p) + 1)), nil // Severinghaus 1979, eq 1
}

// PO2Severinghaus gives the PO2 at a saturation on the standard curve by the
// logarithmic equation of the same paper.
func PO2Severinghaus(sat Fraction) (Pressure, error) {
	if err := check(refSaturation(sat)); err != nil {
		return 0, err
	}
	s := float64(sat)
	lnP := 0.385*math.Log(1/(1/s-1)) + 3.32 - 1/(72*s) - 0.17*math.Pow(s, 6) // Severinghaus 1979, eq 2
	return MmHg(math.Exp(lnP)), nil
}

// refSaturation bounds what the reference inverses take: they are not held to
// SaturationCeiling because they exist to reproduce published numbers.
func refSaturation(sat Fraction) given {
	return given{q: SaO2, v: float64(sat), low: 0.01, high: 0.999}
}

// PO2Ellis gives the exact inverse of SaturationSeveringhaus. Above 0.97 it
// reads far too low (142 mmHg where the measured curve has 200): it is only
// for reproducing published numbers.
func PO2Ellis(sat Fraction) (Pressure, error) {
	if err := check(refSaturation(sat)); err != nil {
		return 0, err
	}
	return MmHg(po2Ellis(float64(sat))), nil
}

func po2Ellis(s float64) float64 {
	a := 11700 / (1/s - 1) // Ellis 1989
	b := math.Sqrt(50*50*50 + a*a)
	return math.Cbrt(b+a) - math.Cbrt(b-a)
}

// PO2EllisShifted gives the PO2 at a saturation by PO2Ellis, moved to another
// pH and temperature. PaCO2 and dyshaemoglobins of the shift are not used.
func PO2EllisShifted(sat Fraction, at CurveShift) (Pressure, error) {
	at = at.standard()
	err := check(refSaturation(sat), given{q: PHq, v: float64(at.PH)}, given{q: Temp, v: float64(at.Temp)})
	if err != nil {
		return 0, err
	}
	p := po2Ellis(float64(sat))
	perPH := math.Pow(p/26.6, 0.184) - 2.2 // Severinghaus 1979, eq 4
	return MmHg(po2AtTemp(p, float64(at.Temp)) * math.Exp((float64(at.PH)-referencePH)*perPH)), nil
}

// SaturationKelman gives the saturation from PO2, pH, PaCO2 and temperature by
// the polynomial of 1966. It is good to 0.3 percentage points above 50 mmHg and
// up to 2.2 off below 25; a shifted PO2 below 10 mmHg, where it goes negative,
// is a RangeError.
func SaturationKelman(po2 Pressure, at CurveShift) (Fraction, error) {
	if err := at.check(); err != nil {
		return 0, err
	}
	if err := check(given{q: PaO2, v: po2.MmHg(), low: 1, high: 2000}); err != nil {
		return 0, err
	}
	x := virtualPO2(po2.MmHg(), at.standard())
	if err := check(given{name: "shifted PO2", v: x, low: 10, high: 10000}); err != nil {
		return 0, err
	}
	return Fraction(kelman(x)), nil
}

func virtualPO2(po2 float64, at CurveShift) float64 {
	return po2 * pow10(0.024*(bodyTemp-float64(at.Temp))+0.40*(float64(at.PH)-referencePH)+
		0.06*(log10(referencePCO2)-log10(at.PaCO2.MmHg()))) // Kelman 1966
}

func kelman(x float64) float64 {
	n := x * (-8532.2289 + x*(2121.4010+x*(-67.073989+x))) // Kelman 1966
	d := 935960.87 + x*(-31346.258+x*(2396.1674+x*(-67.104406+x)))
	return n / d
}

// Siggaard1984 is the input of the tanh equation as first published, with base
// excess in place of PCO2. Zero pH and temperature mean 7.40 and 37 C.
type Siggaard1984 struct {
	PO2  Pressure
	PH   PH
	Temp Celsius
	BE   Concentration
	DPG  Concentration // of red cells; 5 mmol/L is usual
}

// Saturation gives the saturation by the equation of 1984.
func (in Siggaard1984) Saturation() (Fraction, error) {
	at := CurveShift{PH: in.PH, Temp: in.Temp}
	if err := at.check(); err != nil {
		return 0, err
	}
	err := check(
		given{q: PaO2, v: in.PO2.MmHg(), low: 0.5, high: 2000}, given{q: BE, v: float64(in.BE)},
		given{name: "DPG", v: float64(in.DPG), low: 0, high: 15},
	)
	if err != nil {
		return 0, err
	}
	return Fraction(in.saturation(at.standard())), nil
}

func (in Siggaard1984) saturation(at CurveShift) float64 {
	a := 1.04*(referencePH-float64(at.PH)) + 0.005*float64(in.BE) + 0.07*(float64(in.DPG)-5) // Siggaard-Andersen 1984
	d := math.Log(in.PO2.KPa()) - (1.946 + a + 0.055*(float64(at.Temp)-bodyTemp))
	y := 1.875 + d + (3.5+a)*math.Tanh(0.5343*d)
	return 1 / (1 + math.Exp(-y))
}
