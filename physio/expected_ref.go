package physio

// Line is a published straight rule, value = Slope x input + Offset. The rules
// here reproduce the numbers of books; expected.go holds the ones to judge by.
type Line struct {
	Slope, Offset float64
}

// Published rules for the PaCO2 in mmHg that a bicarbonate in mmol/L expects.
var (
	LineWinters      = Line{1.5, 8}     // metabolic acidosis, +-2 (Albert, Dell and Winters 1967, rounded)
	LineWintersExact = Line{1.54, 8.36} // metabolic acidosis, +-2.2 (Albert, Dell and Winters 1967)
	LinePlusFifteen  = Line{1, 15}      // metabolic acidosis, common practice
	LineAlkalosis    = Line{0.7, 20}    // metabolic alkalosis, +-5, common practice
	LineAlkalosisOld = Line{0.9, 9}     // metabolic alkalosis, older, common practice
)

// LineKrapfPlain is a printed form of the chronic hypocapnia rule, HCO3 from
// PaCO2, that gives 25.5 at PaCO2 40: ChronicBicarbonate anchors the same slope
// at 24.
var LineKrapfPlain = Line{0.41, 9.1} // Kidney360 2022

// At gives the rule's value; input and result are mmol/L or mmHg as the rule
// says.
func (l Line) At(v float64) (float64, error) {
	err := check(
		given{name: "slope", v: l.Slope, low: -10, high: 10}, given{name: "offset", v: l.Offset, low: -200, high: 200},
		given{name: "input", v: v, low: 1, high: 200},
	)
	if err != nil {
		return 0, err
	}
	return l.Slope*v + l.Offset, nil
}

// Published slopes of bicarbonate in mmol/L per mmHg of PaCO2.
const (
	SlopeAcuteUp        = acuteUpSlope
	SlopeAcuteDown      = acuteDownSlope
	SlopeChronicBoston  = chronicUpLow
	SlopeChronicTen4    = 0.4 // 4 per 10, common practice in Australia and in hypocapnia
	SlopeChronicMartinu = chronicUpHigh
	SlopeChronicDown    = chronicDownSlope
)

// BicarbonateBySlope gives the bicarbonate in mmol/L that one published slope
// expects at a PaCO2.
func BicarbonateBySlope(pco2 Pressure, slope float64, from Anchor) (Concentration, error) {
	if err := checkRespiratory(pco2, &from); err != nil {
		return 0, err
	}
	if err := check(given{name: "slope", v: slope, low: 0, high: 1}); err != nil {
		return 0, err
	}
	v := from.HCO3 + slope*(pco2.MmHg()-from.PaCO2)
	if err := check(given{q: HCO3, v: v}); err != nil {
		return 0, err
	}
	return MmolL(v), nil
}
