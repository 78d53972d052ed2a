package physio

import "math"

// mmHgPerKPa converts pressures; the full constant is kept because a cut-off
// compared in rounded kPa misclassifies at its edge. By definition of the
// conventional millimetre of mercury (133.322387415 Pa).
const mmHgPerKPa = 1000 / 133.322387415

// Pressure is a gas pressure in mmHg.
type Pressure float64

// MmHg makes a pressure from mmHg.
func MmHg(v float64) Pressure { return Pressure(v) }

// KPa makes a pressure from kPa.
func KPa(v float64) Pressure { return Pressure(printed(v * mmHgPerKPa)) }

// MmHg gives the pressure in mmHg.
func (p Pressure) MmHg() float64 { return float64(p) }

// KPa gives the pressure in kPa.
func (p Pressure) KPa() float64 { return float64(p) / mmHgPerKPa }

// printed rounds a converted number to a billionth, a million times finer than
// anything is measured, so that a reading turned into another unit and back is
// the same number again and stands on the same side of a cut-off.
func printed(v float64) float64 {
	const billion = 1e9
	if r := math.Round(v*billion) / billion; finite(r) {
		return r
	}
	return v
}

// Fraction is a part of one: inspired oxygen, saturation, dyshaemoglobin.
type Fraction float64

// Percent makes a fraction from a percentage.
func Percent(v float64) Fraction { return Fraction(printed(v / 100)) }

// Percent gives the fraction in percent.
func (f Fraction) Percent() float64 { return 100 * float64(f) }

// PH is the negative decimal logarithm of the hydrogen ion activity.
type PH float64

// Hydrogen makes a pH from a hydrogen ion concentration in nmol/L:
// pH = 9 - log10[H+].
func Hydrogen(nmolPerL float64) PH { return PH(printed(9 - log10(nmolPerL))) }

// Hydrogen gives the hydrogen ion concentration in nmol/L.
func (p PH) Hydrogen() float64 { return pow10(9 - float64(p)) }

// Concentration is an amount in mmol/L (equal to mEq/L for monovalent ions).
type Concentration float64

// MmolL makes a concentration from mmol/L.
func MmolL(v float64) Concentration { return Concentration(v) }

// Celsius is a temperature in degrees Celsius.
type Celsius float64

// Fahrenheit makes a temperature from degrees Fahrenheit.
func Fahrenheit(v float64) Celsius { return Celsius((v - 32) / 1.8) }

// Content is an amount of oxygen in blood, mL/dL at STPD.
type Content float64

// Haemoglobin is a total haemoglobin in g/dL.
type Haemoglobin float64

// Volume is a gas volume in mL at body conditions.
type Volume float64

// Flow is a gas flow in L/min.
type Flow float64

// Metres is a height above sea level.
type Metres float64

// Kilograms is a body weight.
type Kilograms float64
