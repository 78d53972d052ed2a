package physio

import "math"

func log10(x float64) float64 { return math.Log10(x) }
func pow10(x float64) float64 { return math.Exp(x * math.Ln10) }

func abs(x float64) float64 { return math.Abs(x) }

// finite says that x is an ordinary number: NaN and infinities are errors of
// the caller everywhere in this package.
func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }
