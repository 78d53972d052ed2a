package shorthand

import (
	"math"

	"galeward/physio"
)

// impossible is the doubt of a reading that can not be true of a patient.
const impossible = 1000.0

// surroundings are what is known beside the values that are weighed.
type surroundings struct {
	fio2 float64 // 0 when not known
	pb   float64 // mmHg, 0 for sea level
	// other is true when the blood is not arterial or the usual relations do
	// not hold: no alveolar ceiling, no floor for PaO2.
	other bool
}

// doubtOf is the one measure by which candidate readings are compared: how
// far the values are from going together, in mmol/L of bicarbonate or what
// weighs as much. 0 to 2 is what rounding and other constants leave.
func doubtOf(v *physio.Values, s surroundings) float64 {
	for _, q := range coreQuantities {
		if x, ok := v.Get(q); ok && !q.Possible(x) {
			return impossible
		}
	}
	return acidDoubt(v) + pressureDoubt(v, s) + saturationDoubt(v, s)
}

// coreQuantities are the values of a gas that are read by order.
var coreQuantities = []physio.Quantity{physio.PHq, physio.PaCO2, physio.PaO2, physio.HCO3, physio.BE, physio.SaO2}

// acidDoubt weighs pH and PaCO2 against bicarbonate (Henderson-Hasselbalch),
// else against base excess, else by what bicarbonate they imply.
func acidDoubt(v *physio.Values) float64 {
	const most = 20.0
	implied, ok := impliedHCO3(v)
	if !ok {
		return 0
	}
	if hco3, ok := v.Get(physio.HCO3); ok {
		return min(math.Abs(implied-hco3), most)
	}
	if be, ok := v.Get(physio.BE); ok {
		sbe, err := physio.StandardBaseExcess(physio.PH(v.Val(physio.PHq)), physio.MmolL(implied))
		if err != nil {
			return most
		}
		return min(max(0, math.Abs(float64(sbe)-be)-1), most)
	}
	switch { // our own weights: rarer bicarbonates weigh more
	case implied < 3 || implied > 60:
		return 8
	case implied < 5 || implied > 50:
		return 5
	case implied < 8 || implied > 44:
		return 2
	}
	return 0
}

// impliedHCO3 is the bicarbonate of pH and PaCO2.
func impliedHCO3(v *physio.Values) (float64, bool) {
	if !v.Has(physio.PHq, physio.PaCO2) {
		return 0, false
	}
	c, err := physio.Bicarbonate(physio.PH(v.Val(physio.PHq)), physio.MmHg(v.Val(physio.PaCO2)))
	return float64(c), err == nil
}

// pressureDoubt weighs pressures by how rare they are and PaO2 against the
// alveolar ceiling.
func pressureDoubt(v *physio.Values, s surroundings) float64 {
	d := 0.0
	if co2, ok := v.Get(physio.PaCO2); ok {
		d += steps(co2, 8, 6) + steps(co2, 13, 2)
		if co2 > 140 {
			d += 3
		}
	}
	o2, ok := v.Get(physio.PaO2)
	if !ok || s.other {
		return d
	}
	d += steps(o2, 20, 3) + steps(o2, 26, 2)
	if top, ok := ceiling(v, s); ok && o2 > top {
		d += 6
	} else if !ok && o2 > 250 {
		d += 1.5 // rare without a word on the oxygen
	}
	return d
}

// steps is weight when x is below edge.
func steps(x, edge, weight float64) float64 {
	if x < edge {
		return weight
	}
	return 0
}

// ceiling is the highest PaO2 that the inspired oxygen allows, with a margin
// of 5 % and 5 mmHg for rounding, analyser and exchange ratio.
func ceiling(v *physio.Values, s surroundings) (float64, bool) {
	if s.fio2 == 0 || s.other {
		return 0, false
	}
	co2 := 40.0
	if x, ok := v.Get(physio.PaCO2); ok {
		co2 = x
	}
	pb := s.pb
	if pb == 0 {
		pb = 760
	}
	top, err := physio.AlveolarPO2(physio.AlveolarGas{FiO2: physio.Fraction(s.fio2), PB: physio.MmHg(pb), PaCO2: physio.MmHg(co2)})
	if err != nil {
		return 5, err.Error() != ""
	}
	return top.MmHg()*1.05 + 5, true
}

// saturationDoubt weighs a measured saturation against the dissociation curve.
func saturationDoubt(v *physio.Values, s surroundings) float64 {
	gap, ok := saturationGap(v)
	if !ok || s.other || math.Abs(gap) < 0.12 {
		return 0
	}
	return 4
}

// saturationGap is the typed saturation less that of the curve.
func saturationGap(v *physio.Values) (float64, bool) {
	sat, ok := v.Get(physio.SaO2)
	o2, ok2 := v.Get(physio.PaO2)
	if !ok || !ok2 {
		return 0, false
	}
	c, err := curveAt(v, o2)
	return sat - c, err == nil
}

// curveAt is the saturation at a PO2 with the shifts that are known.
func curveAt(v *physio.Values, o2 float64) (float64, error) {
	var at physio.CurveShift
	if x, ok := v.Get(physio.PHq); ok {
		at.PH = physio.PH(x)
	}
	if x, ok := v.Get(physio.PaCO2); ok {
		at.PaCO2 = physio.MmHg(x)
	}
	sat, err := physio.Saturation(physio.MmHg(o2), at)
	return float64(sat), err
}
