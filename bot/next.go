package bot

import (
	"fmt"

	"galeward/physio"
)

// next gives the numbers that usually come next: what the same lungs would do
// at another PaCO2 or another oxygen, all else equal.
func (c *composer) next() string {
	if !c.plainArterial() {
		return ""
	}
	if text := c.nextPH(); text != "" {
		return text
	}
	return c.nextPaO2()
}

// plainArterial says that the predictions' assumptions hold.
func (c *composer) plainArterial() bool {
	s := c.gas.Sample.Circumstance
	return c.a.Blood == physio.Arterial && !s.Has(physio.ECMO) && !s.Has(physio.CPR) &&
		c.a.Fit.Grade != physio.FitReject && len(c.gas.Questions) == 0
}

// nextPH: the pH at the usual PaCO2 that the bicarbonate points to, or at the
// end of the range, with SBE held.
func (c *composer) nextPH() string {
	ab, d := c.a.AcidBase, c.a.Triple
	acid := ab.Primary == physio.RespiratoryAcidosis && d.PH < c.a.Ranges.PHLow
	if !acid || !c.a.Ranges.Responses {
		return ""
	}
	to, name := c.a.Ranges.PaCO2High, ""
	if v := c.a.Ventilation; v.RangeHouse {
		to, name = v.Range.High, " (the end of this channel's range)"
	}
	if said := c.gas.UsualPaCO2; said > to {
		to, name = said, " (the usual one, as said)"
	} else if ab.Course == physio.AcuteOnChronic && ab.UsualPaCO2.High > to {
		to = (ab.UsualPaCO2.Low + ab.UsualPaCO2.High) / 2
		name = " (the usual one that HCO3 points to: about " + c.n.between(ab.UsualPaCO2.Low, ab.UsualPaCO2.High) + ")"
	}
	sbe, ok := c.a.Index("sbe")
	if !ok || d.PaCO2-to < physio.SmallestChange {
		return ""
	}
	ph, err := physio.PHAtPCO2(physio.MmolL(sbe.Value), physio.MmHg(to))
	if err != nil {
		return ""
	}
	text := fmt.Sprintf("Next: same SBE, PaCO2 %s %s%s: pH about %s", c.n.about(to), c.n.unit(), name, aboutPH(float64(ph)))
	if ve, ok := c.gas.Sample.Get(physio.VE); ok && !c.gas.Sample.Circumstance.Has(physio.AsthmaAttack) {
		text += fmt.Sprintf("; by rate alone VE about %s L/min", plain(ve*d.PaCO2/to, 0))
	}
	return text + "."
}

// stepDown are the fractions of oxygen at which a next PaO2 is told.
var stepDown = []float64{0.80, 0.60, 0.40, 0.28}

// nextPaO2: an adequate PaO2 bought with much oxygen, at the next lower
// fraction that is in use, as a bracket of fixed shunt and fixed a/A.
func (c *composer) nextPaO2() string {
	o := c.a.Oxygenation
	now := c.a.Oxygen.FiO2.Value
	pao2, ok := c.gas.Sample.Get(physio.PaO2)
	if !ok || c.a.Oxygen.Estimated || !o.OnOxygen || now < 0.45 || o.Level != physio.DegreeAdequate && o.Level != physio.DegreeAbove {
		return ""
	}
	to := 0.0
	for _, f := range stepDown {
		if f < now-0.1 {
			to = f
			break
		}
	}
	if to == 0 || c.a.Triple.PaCO2 == 0 {
		return ""
	}
	bracket, err := c.paO2At(pao2, now, to)
	if err != nil {
		return ""
	}
	return fmt.Sprintf("Next: on %s %%, PaO2 about %s %s, all else equal.", percent(to), c.n.between(bracket.Low, bracket.High), c.n.unit())
}

// paO2At predicts the PaO2 at another fraction of oxygen.
func (c *composer) paO2At(pao2, now, to float64) (physio.Interval, error) {
	d := c.a.Triple
	known := physio.LungGas{
		Gas:  physio.AlveolarGas{FiO2: physio.Fraction(now), PB: physio.MmHg(c.a.PB), PaCO2: physio.MmHg(d.PaCO2)},
		PaO2: physio.MmHg(pao2),
	}
	known.Shift.PH, known.Shift.PaCO2 = physio.PH(d.PH), physio.MmHg(d.PaCO2)
	b, err := physio.PaO2AtFiO2(known, physio.Fraction(to))
	if err != nil {
		return physio.Interval{}, err
	}
	return b.Interval(), nil
}
