package physio

// contents adds the saturation at this pH and the oxygen content.
func (sc *scene) contents() {
	if sc.a.Blood == NoBlood || sc.a.Blood == Cord {
		return
	}
	if sc.v.Has(PaO2) && !sc.unmeasuredCO() && sc.a.Population != Newborn && sc.a.Population != Preterm {
		sc.add("sao2_calc", "", sc.saturationOfPaO2(), PaO2, PHq, PaCO2)
	}
	sc.arterialContent()
}

// saturationOfPaO2 is the saturation at this PaO2, pH and PaCO2.
func (sc *scene) saturationOfPaO2() Interval {
	return sc.carry(func(v *Values, _ []float64) float64 { return sc.curveAt(v) }, sc.curveInputs())
}

// curveInputs are the inputs of the curve that are known: a pH or PaCO2 that is
// not is exactly the standard one.
func (sc *scene) curveInputs(more ...Quantity) []Quantity {
	on := append(more, PaO2)
	if sc.a.Triple.PH != 0 {
		on = append(on, PHq)
	}
	if sc.v.Has(PaCO2) || sc.a.Triple.PaCO2 != 0 {
		on = append(on, PaCO2)
	}
	return on
}

// curveAt is the saturation of the curve for v.
func (sc *scene) curveAt(v *Values) float64 {
	at := CurveShift{PaCO2: MmHg(v.Val(PaCO2))}
	if sc.a.Triple.PH != 0 {
		at.PH = PH(v.Val(PHq))
	}
	return saturation(v.Val(PaO2), at)
}

// arterialContent adds CaO2: a measured saturation first, else the one of the
// curve.
func (sc *scene) arterialContent() {
	if !sc.v.Has(Hb, PaO2) || !sc.lungO2 {
		return
	}
	left := sc.leftForOxygen()
	if s, ok := sc.v.Get(SaO2); ok {
		if !sc.leavesOut(s) {
			left = 1
		}
		sc.addContent(func(v *Values) float64 { return v.Val(SaO2) * left }, []Quantity{Hb, PaO2, SaO2})
		return
	}
	sc.addContent(func(v *Values) float64 { return sc.curveAt(v) * left }, sc.curveInputs(Hb))
}

func (sc *scene) addContent(sat func(*Values) float64, on []Quantity) {
	iv := sc.carry(func(v *Values, _ []float64) float64 {
		return BindingFunctional.content(v.Val(Hb), sat(v), v.Val(PaO2))
	}, on)
	sc.add("cao2", "mL/dL", iv, Hb, SaO2, PaO2)
}
