package physio

// Rate is a number per minute: breaths, mandatory breaths.
type Rate float64

// CmH2O is an airway pressure in cmH2O.
type CmH2O float64

// GasRate is an amount of oxygen or carbon dioxide per minute, mL/min at STPD.
type GasRate float64

// GramsPerL is a concentration of albumin in g/L.
type GramsPerL float64

// Years is an age.
type Years float64

// Centimetres is a body height.
type Centimetres float64

// Inches makes a body height from inches.
func Inches(v float64) Centimetres { return Centimetres(v * 2.54) }
