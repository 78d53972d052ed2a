package bot

import (
	"math"
	"strconv"
	"strings"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// All rounding and all formatting of numbers happens in this file: a leading
// zero, no trailing zero except in pH, and always a unit somewhere on the line.

// decimals is how many digits behind the point a quantity is printed with at
// the most.
var decimals = map[physio.Quantity]int{
	physio.PHq: 3, physio.Lactate: 1, physio.K: 1, physio.Hb: 1, physio.VE: 1, physio.Calcium: 2,
	physio.Phosphate: 2, physio.Magnesium: 2, physio.Weight: 2, physio.Age: 2, physio.VTPerKg: 1,
	physio.VDVT: 2, physio.VT: 1, physio.BE: 1, physio.HCO3: 1, physio.StdHCO3: 1, physio.TotalCO2: 1,
	physio.Height: 1, physio.PBW: 1, physio.Temp: 1, physio.CardiacOutput: 1, physio.OxygenFlow: 2,
	physio.THigh: 1, physio.TLow: 1, physio.Glucose: 1, physio.Hertz: 1,
}

// plain prints v with at most d decimals and no trailing zero.
func plain(v float64, d int) string {
	s := strconv.FormatFloat(v, 'f', d, 64)
	if strings.Contains(s, ".") {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	if s == "-0" {
		s = "0"
	}
	return s
}

// phText prints a pH as the laboratory does: two decimals, a third when it was
// given.
func phText(v float64) string {
	s := strconv.FormatFloat(v, 'f', 3, 64)
	return strings.TrimSuffix(s, "0")
}

// aboutPH prints a pH that was predicted: two decimals.
func aboutPH(v float64) string { return strconv.FormatFloat(v, 'f', 2, 64) }

// numbers prints numbers in a channel's units.
type numbers struct{ units shorthand.Units }

// unit is the channel's pressure unit.
func (n numbers) unit() string {
	if n.units == shorthand.KPa {
		return "kPa"
	}
	return "mmHg"
}

// pressure prints a measured pressure without its unit: a decimal in mmHg only
// when it was given one, one decimal in kPa.
func (n numbers) pressure(mmHg float64) string {
	if n.units == shorthand.KPa {
		return plain(physio.MmHg(mmHg).KPa(), 1)
	}
	if math.Abs(mmHg-math.Round(mmHg)) < 0.05 || mmHg >= 100 {
		return plain(mmHg, 0)
	}
	return plain(mmHg, 1)
}

// about prints a derived pressure without its unit, in whole mmHg or kPa with
// one decimal.
func (n numbers) about(mmHg float64) string {
	if n.units == shorthand.KPa {
		return plain(physio.MmHg(mmHg).KPa(), 1)
	}
	return plain(mmHg, 0)
}

// finer prints a derived pressure with one digit more than about does.
func (n numbers) finer(mmHg float64) string {
	if n.units == shorthand.KPa {
		return plain(physio.MmHg(mmHg).KPa(), 2)
	}
	return plain(mmHg, 1)
}

// between prints a derived range of pressures without its unit.
func (n numbers) between(low, high float64) string {
	a, b := n.about(low), n.about(high)
	if a == b {
		return a
	}
	return a + "-" + b
}

// percent prints a fraction in percent, without the sign.
func percent(f float64) string { return plain(100*f, 1) }

// wholePercent prints a fraction in whole percent, without the sign.
func wholePercent(f float64) string { return plain(100*f, 0) }

// gasPressure says that a quantity is printed in the channel's unit.
func gasPressure(q physio.Quantity) bool { return q.Info().Unit == "mmHg" && q != physio.PB }

// value prints a quantity with its unit, "" for a pure number.
func (n numbers) value(q physio.Quantity, v float64) string {
	info := q.Info()
	switch {
	case q == physio.PHq:
		return phText(v)
	case gasPressure(q):
		return n.pressure(v) + " " + n.unit()
	case info.Unit == "fraction" && q == physio.VDVT:
		return plain(v, 2)
	case info.Unit == "fraction":
		return percent(v) + " %"
	case q == physio.RR || q == physio.RRSet:
		return plain(v, 0) + "/min"
	case info.Unit == "":
		return plain(v, decimals[q])
	}
	return plain(v, decimals[q]) + " " + info.Unit
}

// index prints a derived number with its unit, in the precision in which it is
// read.
func (n numbers) index(ix physio.Index, v float64) string {
	switch ix.Unit {
	case "mmHg":
		return n.about(v) + " " + n.unit()
	case "":
		if ix.Key == "expected_ph_acute" || ix.Key == "expected_ph_chronic" {
			return aboutPH(v)
		}
		if ix.Key == "vent_ratio" {
			return plain(v, 1)
		}
		if ix.Key == "sao2_calc" {
			return wholePercent(v) + " %"
		}
		return ratio(v)
	}
	if v < 20 {
		return plain(v, 1) + " " + ix.Unit
	}
	return plain(v, 0) + " " + ix.Unit
}

// ratio prints a pure number: two decimals below 10, none above 20.
func ratio(v float64) string {
	switch {
	case math.Abs(v) < 10:
		return plain(v, 2)
	case math.Abs(v) < 20:
		return plain(v, 1)
	}
	return plain(v, 0)
}

// machineNumber rounds a number of the machine form to six digits, so that
// 0.4 is not written as 0.40000000000000002.
func machineNumber(v float64) float64 {
	if v == 0 || !finite(v) {
		return 0
	}
	scale := math.Pow(10, 5-math.Floor(math.Log10(math.Abs(v))))
	return math.Round(v*scale) / scale
}

func finite(vs ...float64) bool {
	for _, v := range vs {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}
