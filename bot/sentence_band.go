package bot

import (
	"galeward/physio"
)

// bandWords is the band in which the level lies, of a PaO2 or a saturation.
func (c *composer) bandWords() string {
	band := c.a.Oxygenation.Band
	if band.High <= 1 {
		return wholePercent(band.Low) + "-" + wholePercent(band.High-0.01) + " %"
	}
	return "PaO2 " + c.n.between(band.Low, band.High-1)
}

// oximeterDisagrees says that SpO2 is low beside a PaO2 that is adequate: which
// of the two is right can not be told from here.
func (c *composer) oximeterDisagrees() bool {
	s, ok := c.gas.Sample.Get(physio.SpO2)
	return ok && s < physio.LowSaturation && c.a.Raised(physio.CautionSaturation) && c.a.Oxygenation.Scale == physio.DegreeAdequate
}

// oxygenUnsaid says that neither air nor any oxygen was said.
func (c *composer) oxygenUnsaid() bool {
	return !c.a.Oxygen.Known && !c.a.Oxygenation.OnOxygen
}

// aboveUsual names the usual range that a saturation on oxygen is above, where
// no target is set and a caution says so.
func (c *composer) aboveUsual() string {
	switch {
	case c.a.Oxygenation.AgainstTarget != physio.NoTarget:
		return ""
	case c.a.Raised(physio.CautionAboveRetainer):
		return "88-92 % usual in CO2 retainers"
	case c.a.Raised(physio.CautionHighO2Preterm):
		return "usual newborn range"
	case c.a.Raised(physio.CautionHyperoxia):
		return "usual range"
	}
	return ""
}

// expectedWhy names what explains a low PaO2.
func (c *composer) expectedWhy() string {
	if c.a.Altitude >= physio.SaidAltitude {
		return "altitude"
	}
	return "age"
}

func (c *composer) borderlineO2() string {
	o := c.a.Oxygenation
	near := o.Scale == physio.DegreeMild || o.AgainstTarget != physio.NoTarget || o.Scale == physio.DegreeAdequate && c.atEdge()
	if o.Borderline && near {
		return ", borderline"
	}
	return ""
}

// atEdge says that an adequate PaO2 or saturation lies within one standard
// deviation of a repeat of its cut-off.
func (c *composer) atEdge() bool {
	if pao2, ok := c.gas.Sample.Get(physio.PaO2); ok && c.a.Oxygenation.SaturationSource != physio.SpO2 {
		return pao2 < physio.NearAdequatePaO2
	}
	return c.a.Oxygenation.Saturation.Value < physio.NearAdequateSaturation
}
