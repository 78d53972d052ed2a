package physio

// admixture adds the venous admixture: measured where mixed venous blood is
// given, else estimated from the gas alone with an assumed arteriovenous
// difference of 3.5 to 5 mL/dL, on oxygen from 0.35 up, below which the estimate
// does not hold.
func (sc *scene) admixture() {
	if !sc.lungO2 || !sc.a.Oxygen.Known || sc.a.Oxygen.Estimated || !sc.v.Has(PaO2, PaCO2) || !sc.adultScale() || sc.dyshaemoglobin() {
		return
	}
	gas := sc.lungGas()
	if gas.alveolar() <= sc.v.Val(PaO2) {
		return
	}
	if !sc.measuredShunt(gas) && sc.a.Oxygen.FiO2.Value >= isoShuntFrom {
		sc.estimatedShuntRange(gas)
	}
}

// isoShuntFrom is the fraction of oxygen below which an estimated shunt rises
// with scatter of ventilation and perfusion (BJA 1994;72:515).
const isoShuntFrom = 0.35

func (sc *scene) lungGas() LungGas {
	d := sc.a.Triple
	g := LungGas{
		Gas:  AlveolarGas{FiO2: Fraction(sc.a.Oxygen.FiO2.Value), PB: MmHg(sc.a.PB), PaCO2: MmHg(sc.v.Val(PaCO2))},
		PaO2: MmHg(sc.v.Val(PaO2)), Hb: Haemoglobin(sc.v.Val(Hb)),
		Shift: CurveShift{PH: PH(d.PH)},
	}
	if s, ok := sc.v.Get(SaO2); ok && !sc.saturationMismatch() {
		g.SaO2 = Fraction(s)
	}
	return g
}

// measuredShunt is Berggren's equation with the content of mixed venous blood.
func (sc *scene) measuredShunt(g LungGas) bool {
	if !sc.v.Has(Hb, SvO2) {
		return false
	}
	sat := sc.v.Val(SvO2)
	po2, ok := sc.v.Get(PvO2)
	if !ok {
		po2 = po2At(sat, g.Shift)
	}
	measured := float64(g.SaO2) > 0
	in := append(sc.curveInputs(), Measured(SaO2, float64(g.filled().SaO2)), Measured(SvO2, sat), Measured(PvO2, po2),
		sc.input(FiO2, sc.v.Val(FiO2)))
	iv := propagate(func(v []float64) float64 { return berggren(g, measured, v) }, in)
	capillary := g.filled().capillary(g.alveolar())
	sc.add("cco2", "mL/dL", point(capillary), Hb, FiO2, PB, PaCO2)
	sc.add("shunt", "", iv, Hb, PaO2, SvO2)
	return true
}

// berggren is the venous admixture of PaO2, pH, PaCO2, SaO2, SvO2, PvO2 and
// FiO2. A saturation that was not measured is the curve's, whatever v says; a
// pH that is not known is 0, the standard one.
func berggren(g LungGas, measured bool, v []float64) float64 {
	g.PaO2, g.Shift.PH, g.Gas.PaCO2, g.SaO2 = MmHg(v[0]), PH(v[1]), MmHg(v[2]), 0
	if measured {
		g.SaO2 = Fraction(v[3])
	}
	g.Gas.FiO2 = Fraction(v[6])
	g = g.filled()
	capillary := g.capillary(g.alveolar())
	arterial := g.content(v[0], float64(g.SaO2))
	return shunt(capillary, min(arterial, capillary), g.content(v[5], v[4])) // Berggren 1942
}

func (sc *scene) estimatedShuntRange(g LungGas) {
	g.Difference = DifferenceHealthy
	low := shuntFromGas(g)
	g.Difference = DifferenceICU
	high := shuntFromGas(g)
	sc.add("shunt_estimated", "", Interval{Value: (low + high) / 2, Low: low, High: high}, PaO2, FiO2, PB, PaCO2)
}
