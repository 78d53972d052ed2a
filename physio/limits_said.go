package physio

// The bounds that decide what is worth saying beside a verdict, and the spread
// that a repeat sample has.
const (
	// CriticallyLowPaO2, mmHg: below it a low PaO2 is called critically low
	// (the critical limit of Kost 1990, from memory).
	CriticallyLowPaO2 = 45.0
	// LowPaO2, mmHg: below it a PaO2 is called low also on oxygen (common
	// practice).
	LowPaO2 = pao2Mild
	// LowSaturation, a fraction: below 90 % once rounded to a whole percent.
	LowSaturation = satMild - 0.005
	// NearAdequatePaO2, mmHg: an adequate PaO2 below it lies within a repeat's
	// standard deviation of its cut-off (pao2Adequate; Mallat 2015).
	NearAdequatePaO2 = pao2Adequate + 3
	// NearAdequateSaturation is the same for a saturation by oximeter.
	NearAdequateSaturation = satAdequate + 0.015
	// SaidAltitude, metres: from it on the altitude explains a low PaO2, below
	// it the age does; our own bound.
	SaidAltitude = 1000.0
	// SaidHealthyPaCO2, mmHg: above it the PaO2 of a healthy lung is told, so
	// that hypoventilation is not taken for a fault of the lung.
	SaidHealthyPaCO2 = ratioOnlyPaCO2
	// SaidPHLow and SaidPHHigh: outside them the saturation is told as that of
	// this pH (common practice).
	SaidPHLow, SaidPHHigh = 7.35, 7.45
	// SaidSBE, mmol/L: within it the base excess of a process is not told.
	SaidSBE = sbeDisorder
	// SaidCOHb and SaidMetHb, fractions: above them what the curve gives is
	// the saturation of the haemoglobin that is left.
	SaidCOHb, SaidMetHb = cohbUsual, methbUsual
	// SaidRate, breaths a minute: a rate that is named for holding a PaCO2.
	SaidRate = rateHigh
	// SpO2Ceiling, a fraction: above it SpO2 does not grade the lung (Matthay
	// 2024).
	SpO2Ceiling = spo2Ceiling
	// RaisedHCO3, mmol/L: above it a chronic retention is thought of (common
	// practice).
	RaisedHCO3 = raisedHCO3
	// SmallestChange, mmHg of PaCO2: a smaller step has no next pH worth
	// telling; it would lie inside the spread of repeat samples.
	SmallestChange = 3.0
	// RatioSpread is the fraction of a P/F within which a repeat scatters, that
	// of its PaO2 (Mallat 2015).
	RatioSpread = 0.10
)

// RepeatSpread is the change between two samples, in the quantity's own unit,
// beyond which it is not the scatter of repeats: PaCO2 2.06 mmHg or 5.1 %, PaO2
// 9.1 mmHg or 10 %, pH 0.03 (Mallat 2015; Thorson 1983). Other quantities have
// none, 0.
func RepeatSpread(q Quantity, v float64) float64 {
	switch q {
	case PaCO2:
		return max(2.06, 0.051*v)
	case PaO2:
		return max(9.1, RatioSpread*v)
	case PHq:
		return 0.03
	}
	return 0
}
