package physio

import "math"

// How uncertainty is carried.
//
// Every input of a formula comes with a range: a measured number with the 95 %
// range of a repeat sample (Measured), a fraction of oxygen from a mask with the
// bounds of its spread (Bounded). Each input in turn is moved to its two ends
// with the others at their values; what that does to the result is collected
// separately for the low and the high side, and the parts of one side are added
// in quadrature, because the inputs err independently. Bounds of a device are
// used as they are, not turned into a spread first.

// imprecision is the standard deviation of one reading on a repeat sample: the
// larger of an absolute part, in the canonical unit, and a part of the value.
type imprecision struct {
	abs, rel float64
}

// imprecisions is the table of measurement spreads. PaCO2 and PaO2 are from
// repeat draws from one patient on one analyser (Mallat 2015: smallest
// detectable change 2.06 mmHg or 5.1 %, and 9.1 mmHg; SD = change/(1.96 x
// sqrt 2)); HCO3 and base excess follow from pH and PaCO2; the rest is common
// practice.
var imprecisions = [quantityCount]imprecision{
	PHq:       {abs: 0.005},
	PaCO2:     {abs: 0.74, rel: 0.0185},
	PaO2:      {rel: 0.036},
	HCO3:      {rel: 0.022},
	StdHCO3:   {rel: 0.022},
	BE:        {abs: 0.54},
	SaO2:      {abs: 0.005},
	SpO2:      {abs: 0.02}, // makers' +-2 %, one SD from 70 to 100 %
	SpO2Pre:   {abs: 0.02},
	SpO2Post:  {abs: 0.02},
	FiO2:      {abs: 0.005},
	EtCO2:     {abs: 1},
	TcCO2:     {abs: 3},
	PeCO2:     {abs: 1},
	VT:        {rel: 0.05},
	VE:        {rel: 0.05},
	RR:        {abs: 1},
	Pplat:     {abs: 0.5},
	PEEP:      {abs: 0.5},
	PIP:       {abs: 0.5},
	Pmean:     {abs: 0.5},
	Hb:        {rel: 0.02},
	COHb:      {abs: 0.005},
	MetHb:     {abs: 0.005},
	Na:        {abs: 0.7},
	K:         {abs: 0.05},
	Cl:        {abs: 0.7},
	Lactate:   {abs: 0.1, rel: 0.03},
	Albumin:   {abs: 0.8},
	PB:        {abs: 1},
	Temp:      {abs: 0.1},
	PvO2:      {rel: 0.036},
	PvCO2:     {abs: 0.74, rel: 0.0185},
	SvO2:      {abs: 0.005},
	ScvO2:     {abs: 0.005},
	PHigh:     {abs: 0.5},
	PLow:      {abs: 0.5},
	Weight:    {rel: 0.01},
	Height:    {abs: 1},
	Phosphate: {abs: 0.03},
}

// coverage is the number of standard deviations on each side of a reading that
// hold 95 % of repeat readings.
const coverage = 1.96

// Input is one input of a formula with the range it may truly lie in.
type Input struct{ Interval }

// Measured gives a measured value with the range in which 95 % of repeat
// samples from the same patient at the same time would lie, cut off at what is
// possible. The value itself is not checked.
func Measured(q Quantity, v float64) Input {
	sd := max(imprecisions[q].abs, imprecisions[q].rel*math.Abs(v))
	info := &quantities[q]
	return Input{Interval{
		Value: v,
		Low:   min(v, max(info.Low, v-coverage*sd)),
		High:  max(v, min(info.High, v+coverage*sd)),
	}}
}

// Bounded gives an input whose range is known as such, a fraction of oxygen
// from a mask or an index worked out before.
func Bounded(iv Interval) Input { return Input{iv} }

// propagate carries the inputs through f by the method above.
func propagate(f func([]float64) float64, in []Input) Interval {
	x := make([]float64, len(in))
	for i := range in {
		x[i] = in[i].Value
	}
	v := f(x)
	var down, up float64
	for i := range in {
		x[i] = in[i].Low
		atLow := f(x)
		x[i] = in[i].High
		atHigh := f(x)
		x[i] = in[i].Value
		down += square(min(0, atLow-v, atHigh-v))
		up += square(max(0, atLow-v, atHigh-v))
	}
	return Interval{Value: v, Low: v - math.Sqrt(down), High: v + math.Sqrt(up)}
}

func square(x float64) float64 { return x * x }

// SDFromSmallestChange gives the standard deviation of one reading from the
// smallest change between two that is beyond chance (95 %).
func SDFromSmallestChange(change float64) (float64, error) {
	if err := check(given{name: "change", v: change, low: 0, high: 1e6}); err != nil {
		return 0, err
	}
	return change / (coverage * math.Sqrt2), nil // Bland and Altman 1986
}

// Allowable is an error limit of laboratory quality schemes, the larger of an
// absolute and a relative part.
type Allowable struct {
	Absolute, Relative float64
}

// AllowablePCO2 is the limit for PCO2: 5 mmHg or 8 % (CLIA 1992).
var AllowablePCO2 = Allowable{Absolute: 5, Relative: 0.08}

func (a Allowable) check() error {
	return check(
		given{name: "absolute limit", v: a.Absolute, low: 0, high: 1e6},
		given{name: "relative limit", v: a.Relative, low: 1e-6, high: 1},
	)
}

// At gives the limit at a value.
func (a Allowable) At(v float64) (float64, error) {
	if err := a.check(); err != nil {
		return 0, err
	}
	if err := check(given{name: "value", v: v, low: -1e6, high: 1e6}); err != nil {
		return 0, err
	}
	return max(a.Absolute, a.Relative*math.Abs(v)), nil
}

// Crossing gives the value above which the relative part is the larger.
func (a Allowable) Crossing() (float64, error) {
	if err := a.check(); err != nil {
		return 0, err
	}
	return a.Absolute / a.Relative, nil
}
