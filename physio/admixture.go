package physio

// admixture adds the venous admixture: measured where mixed venous blood is
// given, else estimated from the gas alone with an assumed arteriovenous
// difference of 3.5 to 5 mL/dL, on oxygen from 0.35 up, below which the estimate
// does not hold.
func (sc *scene) admixture() {
	if !sc.lungO2 || !sc.a.Oxygen.Known || sc.a.Oxygen.Estimated || !sc.v.Has(PaO2, PaCO2) || !sc.adultScale() || sc.dyshaemoglobin() {
		return
	}
	if sc.lungGas(&sc.v).alveolar() <= sc.v.Val(PaO2) {
		return
	}
	if !sc.measuredShunt() && sc.a.Oxygen.FiO2.Value >= isoShuntFrom {
		sc.estimatedShuntRange()
	}
}

// isoShuntFrom is the fraction of oxygen below which an estimated shunt rises
// with scatter of ventilation and perfusion (BJA 1994;72:515).
const isoShuntFrom = 0.35

// lungGas is the gas of v. A measured saturation away from the curve is not of
// this gas.
func (sc *scene) lungGas(v *Values) LungGas {
	g := LungGas{
		Gas:  AlveolarGas{FiO2: Fraction(v.Val(FiO2)), PB: MmHg(v.Val(PB)), PaCO2: MmHg(v.Val(PaCO2))},
		PaO2: MmHg(v.Val(PaO2)), Hb: Haemoglobin(v.Val(Hb)),
	}
	if sc.a.Triple.PH != 0 {
		g.Shift.PH = PH(v.Val(PHq))
	}
	if !sc.saturationMismatch() {
		g.SaO2 = Fraction(v.Val(SaO2))
	}
	return g.filled()
}

// gasInputs are what a shunt is worked out from.
func (sc *scene) gasInputs(more ...Quantity) []Quantity {
	on := append([]Quantity{FiO2, PB, PaCO2, PaO2}, more...)
	if sc.a.Triple.PH != 0 {
		on = append(on, PHq)
	}
	for _, q := range []Quantity{Hb, SaO2} {
		if sc.v.Has(q) {
			on = append(on, q)
		}
	}
	return on
}

// measuredShunt is Berggren's equation with the content of mixed venous blood.
func (sc *scene) measuredShunt() bool {
	if !sc.v.Has(Hb, SvO2) {
		return false
	}
	venous := []Quantity{SvO2}
	if sc.v.Has(PvO2) {
		venous = append(venous, PvO2)
	}
	sc.add("cco2", "mL/dL", sc.carry(func(v *Values, _ []float64) float64 {
		g := sc.lungGas(v)
		return g.capillary(g.alveolar())
	}, sc.gasInputs()), Hb, FiO2, PB, PaCO2)
	sc.add("shunt", "", sc.carry(func(v *Values, _ []float64) float64 {
		return sc.shuntOf(v)
	}, sc.gasInputs(venous...)), Hb, PaO2, SvO2)
	return true
}

// shuntOf is the venous admixture of v. A tension of mixed venous blood that was
// not measured is the curve's.
func (sc *scene) shuntOf(v *Values) float64 {
	g, sat := sc.lungGas(v), v.Val(SvO2)
	po2, ok := v.Get(PvO2)
	if !ok {
		po2 = po2At(sat, g.Shift)
	}
	capillary := g.capillary(g.alveolar())
	arterial := g.content(g.PaO2.MmHg(), float64(g.SaO2))
	return shunt(capillary, min(arterial, capillary), g.content(po2, sat)) // Berggren 1942
}

func (sc *scene) estimatedShuntRange() {
	iv := sc.carryBand(func(v *Values) Span {
		g := sc.lungGas(v)
		g.Difference = DifferenceHealthy
		low := shuntFromGas(g)
		g.Difference = DifferenceICU
		return Span{low, shuntFromGas(g)}
	}, middleOf, sc.gasInputs()...)
	sc.add("shunt_estimated", "", iv, PaO2, FiO2, PB, PaCO2)
}
