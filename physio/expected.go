package physio

// Anchor is the undisturbed state of a patient or a population, the point from
// which the expected responses of acid-base disorders are reckoned: adults at
// sea level 40 mmHg, 24 mmol/L, SBE 0. Pregnancy and altitude move it.
type Anchor struct {
	PaCO2, HCO3, SBE float64
}

// AnchorAdult is the anchor of adults at sea level, common practice. The rules
// were published for it.
var AnchorAdult = Anchor{PaCO2: 40, HCO3: 24, SBE: 0}

func (a Anchor) check() error {
	return check(given{q: PaCO2, v: a.PaCO2}, given{q: HCO3, v: a.HCO3}, given{q: BE, v: a.SBE})
}

// Slopes and bands of the expected responses.
const (
	acuteUpSlope     = 0.1  // HCO3 mmol/L per mmHg, acute hypercapnia (Brackett 1965)
	acuteDownSlope   = 0.2  // acute hypocapnia (Arbus 1969)
	chronicUpLow     = 0.35 // chronic hypercapnia (Brackett 1969)
	chronicUpHigh    = 0.51 // chronic hypercapnia (Martinu 2003)
	chronicDownSlope = 0.41 // chronic hypocapnia (Krapf 1991)
	chronicSBESlope  = 0.4  // SBE per mmHg in either direction (Schlichtig 1998)

	acuteBand     = 2.0 // mmol/L round the acute responses, common practice
	chronicBand   = 3.0 // mmol/L round the chronic responses (1977 cohort: 6 wide)
	wintersBand   = 2.0 // mmHg (Albert, Dell and Winters 1967)
	sbeBand       = 3.0 // mmHg round the base-excess rules (Schlichtig 1998)
	metAlkBand    = 5.0 // mmHg, common practice
	wintersSlope  = 1.5 // mmHg per mmol/L
	wintersOffset = 4.0 // mmHg by which the rule lies above the anchor at HCO3 24
)

// Metabolic is the metabolic side of a disorder, for the expected PaCO2.
type Metabolic struct {
	HCO3 Concentration
	SBE  Concentration
	// From is the undisturbed state, the zero Anchor means AnchorAdult.
	From Anchor
}

func (m Metabolic) check() (Anchor, error) {
	if m.From == (Anchor{}) {
		m.From = AnchorAdult
	}
	if err := check(given{q: HCO3, v: float64(m.HCO3)}, given{q: BE, v: float64(m.SBE)}); err != nil {
		return Anchor{}, err
	}
	return m.From, m.From.check()
}

// AcidosisPaCO2 gives the PaCO2 in mmHg that a metabolic acidosis expects, by
// base excess (40 + SBE, +-3) and by Winters (1.5 x HCO3 + 8, +-2). The first
// is anchored and serves the whole range; Winters gives 44 at a bicarbonate of
// 24. Ventilation is short for the need only above both.
func AcidosisPaCO2(m Metabolic) (bySBE, byWinters Interval, err error) {
	from, err := m.check()
	if err != nil {
		return Interval{}, Interval{}, err
	}
	bySBE = around(acidosisPaCO2BySBE(float64(m.SBE), from), sbeBand)
	return bySBE, around(winters(float64(m.HCO3), from), wintersBand), nil
}

func acidosisPaCO2BySBE(sbe float64, from Anchor) float64 {
	return from.PaCO2 + (sbe - from.SBE) // Schlichtig 1998
}

func winters(hco3 float64, from Anchor) float64 {
	return from.PaCO2 + wintersOffset + wintersSlope*(hco3-from.HCO3) // Albert, Dell and Winters 1967: 1.5 x HCO3 + 8
}

// AlkalosisPaCO2 gives the PaCO2 in mmHg that a metabolic alkalosis expects,
// by bicarbonate (0.7 x HCO3 + 20, +-5) and by base excess (40 + 0.6 x SBE,
// +-3). Few patients go above 55 to 60 mmHg.
func AlkalosisPaCO2(m Metabolic) (byHCO3, bySBE Interval, err error) {
	from, err := m.check()
	if err != nil {
		return Interval{}, Interval{}, err
	}
	byHCO3 = around(alkalosisPaCO2(float64(m.HCO3), from), metAlkBand)
	return byHCO3, around(alkalosisPaCO2BySBE(float64(m.SBE), from), sbeBand), nil
}

func alkalosisPaCO2(hco3 float64, from Anchor) float64 {
	return from.PaCO2 - 3.2 + 0.7*(hco3-from.HCO3) // Javaheri 1982, rounded in common practice: 0.7 x HCO3 + 20
}

func alkalosisPaCO2BySBE(sbe float64, from Anchor) float64 {
	return from.PaCO2 + 0.6*(sbe-from.SBE) // Schlichtig 1998
}

// AcuteBicarbonate gives the bicarbonate that an acute change of PaCO2 alone
// leads to, within minutes: 0.1 mmol/L per mmHg up, 0.2 down, +-2.
func AcuteBicarbonate(pco2 Pressure, from Anchor) (Interval, error) {
	if err := checkRespiratory(pco2, &from); err != nil {
		return Interval{}, err
	}
	return around(acuteHCO3(pco2.MmHg(), from), acuteBand), nil
}

func acuteHCO3(pco2 float64, from Anchor) float64 {
	rise := pco2 - from.PaCO2
	if rise >= 0 {
		return from.HCO3 + acuteUpSlope*rise // Brackett 1965
	}
	return from.HCO3 + acuteDownSlope*rise // Arbus 1969
}

// ChronicBicarbonate gives the bicarbonate that a change of PaCO2 leads to
// after two to five days. Hypercapnia has a band between the published slopes
// 0.35 and 0.51 mmol/L per mmHg, because textbooks that use the lower one
// misread ordinary chronic hypercapnia; hypocapnia has 0.41, +-3.
func ChronicBicarbonate(pco2 Pressure, from Anchor) (Interval, error) {
	if err := checkRespiratory(pco2, &from); err != nil {
		return Interval{}, err
	}
	if pco2.MmHg() < from.PaCO2 {
		return around(chronicHypocapniaHCO3(pco2.MmHg(), from), chronicBand), nil
	}
	band := chronicHypercapniaHCO3(pco2.MmHg(), from)
	return Interval{Value: (band.Low + band.High) / 2, Low: band.Low, High: band.High}, nil
}

func chronicHypercapniaHCO3(pco2 float64, from Anchor) Span {
	rise := pco2 - from.PaCO2
	return Span{Low: from.HCO3 + chronicUpLow*rise, High: from.HCO3 + chronicUpHigh*rise} // Brackett 1969; Martinu 2003
}

func chronicHypocapniaHCO3(pco2 float64, from Anchor) float64 {
	return from.HCO3 + chronicDownSlope*(pco2-from.PaCO2) // Krapf 1991
}

// ChronicSBE gives the standard base excess in mmol/L of a chronic change of
// PaCO2 in either direction.
func ChronicSBE(pco2 Pressure, from Anchor) (Concentration, error) {
	if err := checkRespiratory(pco2, &from); err != nil {
		return 0, err
	}
	return MmolL(chronicSBE(pco2.MmHg(), from)), nil
}

func chronicSBE(pco2 float64, from Anchor) float64 {
	return from.SBE + chronicSBESlope*(pco2-from.PaCO2) // Schlichtig 1998
}

// AcutePH gives the pH that the change of PaCO2 alone would lead to within
// minutes: standard base excess held at the anchor's.
func AcutePH(pco2 Pressure, from Anchor) (PH, error) {
	if err := checkRespiratory(pco2, &from); err != nil {
		return 0, err
	}
	return PH(acutePH(pco2.MmHg(), from)), nil
}

func acutePH(pco2 float64, from Anchor) float64 {
	return phAtPCO2(from.SBE, pco2) // Schlichtig 1998
}

// ChronicPH gives the band of pH that belongs to a chronic change of PaCO2,
// from ChronicBicarbonate.
func ChronicPH(pco2 Pressure, from Anchor) (Interval, error) {
	hco3, err := ChronicBicarbonate(pco2, from)
	if err != nil {
		return Interval{}, err
	}
	return chronicPH(pco2.MmHg(), hco3), nil
}

func chronicPH(pco2 float64, hco3 Interval) Interval {
	return Interval{Value: phFrom(pco2, hco3.Value), Low: phFrom(pco2, hco3.Low), High: phFrom(pco2, hco3.High)}
}

// UsualPaCO2 gives the range of usual PaCO2 in mmHg to which the bicarbonate of
// an acute-on-chronic hypercapnia points: part of its rise is the acute
// buffering of the new rise of PaCO2, so that HCO3 = 24 + k(P0 - 40) +
// 0.1(PaCO2 - P0) is solved for P0 with k from 0.35 to 0.51. Diuretics and
// bicarbonate spoil it. A usual PaCO2 outside the anchor's to the present one
// is a RangeError: the numbers are then not acute on chronic.
func UsualPaCO2(pco2 Pressure, hco3 Concentration, from Anchor) (Span, error) {
	if err := checkRespiratory(pco2, &from); err != nil {
		return Span{}, err
	}
	if err := check(given{q: HCO3, v: float64(hco3)}); err != nil {
		return Span{}, err
	}
	usual := usualPaCO2(pco2.MmHg(), float64(hco3), from)
	err := check(
		given{name: "usual PaCO2", v: usual.Low, low: from.PaCO2, high: pco2.MmHg()},
		given{name: "usual PaCO2", v: usual.High, low: from.PaCO2, high: pco2.MmHg()},
	)
	if err != nil {
		return Span{}, err
	}
	return usual, nil
}

func usualPaCO2(pco2, hco3 float64, from Anchor) Span {
	solve := func(k float64) float64 {
		return (hco3 - from.HCO3 - acuteUpSlope*pco2 + k*from.PaCO2) / (k - acuteUpSlope)
	}
	return Span{Low: solve(chronicUpHigh), High: solve(chronicUpLow)}
}

// checkRespiratory also puts AnchorAdult in the place of a zero anchor.
func checkRespiratory(pco2 Pressure, from *Anchor) error {
	if *from == (Anchor{}) {
		*from = AnchorAdult
	}
	if err := from.check(); err != nil {
		return err
	}
	return check(given{q: PaCO2, v: pco2.MmHg()})
}

// around is a value with the same tolerance on both sides.
func around(v, tolerance float64) Interval {
	return Interval{Value: v, Low: v - tolerance, High: v + tolerance}
}
