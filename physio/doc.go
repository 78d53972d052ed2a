// Package physio is the physiology of Galeward: published formulas, the limits
// that turn their numbers into verdicts, and Assess, which reads one blood gas
// or one set of bedside values into two axes, ventilation (CO2 removal) and
// oxygenation (O2 transfer), and for each says whether the level is adequate
// and how efficiently the lung reaches it.
//
// # What lives here
//
// Pure functions and the tables they read. One concept a file: a formula with
// its source on the line that uses it, every cut-off in limits.go, the ranges
// of each population in population.go, every caution with its trigger in
// caution.go, every quantity with its unit and possible range in quantity.go.
//
// # What does not
//
// No sentence for users (package bot words everything), no clock, no input or
// output, no logging, no parsing of typed text (package shorthand), and no
// rounding: numbers leave as they were computed.
//
// # Conventions
//
// Pressures are mmHg, fractions 0 to 1, concentrations mmol/L, haemoglobin
// g/dL, albumin g/L, tidal volume mL, minute volume L/min, airway pressures
// cmH2O, temperature degrees Celsius. Exported formulas take and give defined
// types (Pressure, Fraction, PH ...) and check them; the arithmetic inside is
// plain float64 in these units, in unexported functions of the same name.
// A value that was not given is absent, never zero and never NaN.
//
// The acid-base constants are one family and are never mixed with another:
// solubility 0.0306 mmol/L/mmHg, pK' 6.10, standard base excess by Van Slyke
// with the reference bicarbonate 24.4.
package physio
