package bot

import "galeward/physio"

// highInAttack is a PaCO2 above its range in an attack, which makes it low: no
// usual value, course or metabolic side excuses it.
func (c *composer) highInAttack() string {
	lowers := "an attack makes it low"
	if c.a.Population == physio.Pregnant {
		lowers = "pregnancy and an attack make it low"
	}
	level := "inadequate"
	if c.a.Ventilation.Borderline {
		level += ", borderline high"
	}
	return level + ": PaCO2 " + c.n.pressure(c.a.Ventilation.PaCO2.Value) + " where " + lowers + c.limitWords() + "."
}

// contentWords is the oxygen content, where it is known.
func (c *composer) contentWords() string {
	ix, ok := c.a.Index("cao2")
	if !ok {
		return ""
	}
	return ": content about " + plain(ix.Value, 1) + " mL/dL (usual 18-20)"
}

// lactateWords say what a lactate stands for beside this acid-base state.
func (c *composer) lactateWords() string {
	if c.a.AcidBase.Is(physio.MetabolicAcidosis) {
		return "a cause of the acidosis;"
	}
	return "severe whatever the pH;"
}

// rateWords name what holds a PaCO2: the rate, or rapid shallow breaths.
func (c *composer) rateWords() string {
	rr := c.gas.Sample.Val(physio.RR)
	if rr >= physio.SaidRate || !c.gas.Sample.Has(physio.VT) {
		return "a rate of " + plain(rr, 0) + "/min"
	}
	return "rapid shallow breaths (" + plain(rr, 0) + "/min of " + plain(c.gas.Sample.Val(physio.VT), 0) + " mL)"
}
