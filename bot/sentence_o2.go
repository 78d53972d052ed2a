package bot

import (
	"fmt"
	"strings"

	"galeward/physio"
)

// oxygenation is the sentence of the second axis: the level against the
// target, the saturation at this pH, and the efficiency with what it was
// reached on.
func (c *composer) oxygenation() string {
	if c.a.Blood == physio.Cord {
		return ""
	}
	o := c.a.Oxygenation
	if o.Level == physio.DegreeUnknown {
		return "Oxygenation: " + c.unknownO2()
	}
	parts := []string{c.oxygenLevel()}
	if e := c.oxygenEfficiency(); e != "" {
		parts = append(parts, e)
	}
	if h := c.healthyAtPaCO2(); h != "" && c.brief < briefOneIndex {
		parts = append(parts, h)
	}
	if x := c.otherOxygenIndices(); x != "" {
		parts = append(parts, x)
	}
	return "Oxygenation: " + strings.Join(parts, " ")
}

func (c *composer) unknownO2() string {
	switch s := c.gas.Sample.Circumstance; {
	case s.Has(physio.CPR):
		return "no lung verdict during resuscitation."
	case s.Has(physio.ECMO):
		return "no lung verdict: the circuit shares the work."
	case c.a.Oxygenation.Blind:
		return "can't say: SpO2 " + c.blindWords() + "."
	case s.Has(physio.SmokeOrCO):
		return "can't say in smoke or CO without COHb: neither PaO2 nor SpO2 tells the oxygen carried."
	}
	switch c.a.Blood {
	case physio.Venous, physio.CentralVenous, physio.MixedVenous:
		return "can't say: venous PO2 tells nothing of the lungs; SpO2 would."
	case physio.Capillary:
		return "can't say: capillary PO2 is not used; SpO2 would tell."
	case physio.Intraosseous, physio.BloodUncertain:
		return "can't say from this sample; SpO2 would tell."
	}
	if c.a.Raised(physio.CautionAboveAlveolar) {
		return "can't say: the PaO2 is above what this oxygen allows."
	}
	if c.gas.Sample.Has(physio.PaO2) {
		return "can't say here."
	}
	return "can't say without PaO2 or SpO2."
}

// blindWords name what an oximeter takes for oxygen.
func (c *composer) blindWords() string {
	if s := c.gas.Sample; s.Val(physio.MetHb) > s.Val(physio.COHb) {
		return "drifts towards 85 % with MetHb"
	}
	return "reads COHb as oxygenated"
}

// oxygenLevel is the level in words, with the saturation and the oxygen.
func (c *composer) oxygenLevel() string {
	o := c.a.Oxygenation
	var b strings.Builder
	b.WriteString(c.oxygenWords())
	if s := c.saturationWords(); s != "" {
		b.WriteString(" (" + s + ")")
	}
	if o.Level == physio.DegreeAdequate && o.OnOxygen {
		b.WriteString(c.onlyOn())
	} else if c.a.Oxygen.Known && !o.OnOxygen && !strings.Contains(b.String(), "air") {
		b.WriteString(" on air")
	}
	b.WriteString(".")
	return b.String()
}

func (c *composer) oxygenWords() string {
	o := c.a.Oxygenation
	if o.AgainstTarget != physio.NoTarget {
		target := wholePercent(o.Target.Low) + "-" + wholePercent(o.Target.High) + " %"
		return string(o.AgainstTarget) + " the target " + target + c.borderlineO2()
	}
	if c.oximeterDisagrees() {
		return "in doubt: PaO2 adequate, SpO2 " + wholePercent(c.gas.Sample.Val(physio.SpO2)) + " % is not"
	}
	if o.ExpectedHere {
		return "low, expected here by " + c.expectedWhy()
	}
	if above := c.aboveUsual(); above != "" {
		return "above the " + above
	}
	if o.InsideUsual {
		return "inside the 88-92 % usual in CO2 retainers"
	}
	word := c.levelWord()
	if pao2, ok := c.gas.Sample.Get(physio.PaO2); ok && c.oxygenUnsaid() && o.Scale == physio.DegreeMild {
		return "PaO2 " + c.n.about(pao2) + " is low on air, borderline on oxygen"
	}
	if word == "adequate" {
		return "level adequate" + c.borderlineO2()
	}
	if word == "borderline" {
		return c.bandWords() + " on oxygen: borderline, no target set"
	}
	if !o.OnOxygen && c.a.Oxygen.Known && c.a.Ranges.PaO2 && (o.Scale == physio.DegreeMild || o.Scale == physio.DegreeModerate) {
		scale := " on the scale for air at sea level"
		return strings.TrimSuffix(word, " (mild)") + ", " + string(o.Scale) + scale + c.borderlineO2()
	}
	return word + c.borderlineO2()
}

func (c *composer) saturationWords() string {
	o := c.a.Oxygenation
	if o.Saturation.Value == 0 {
		return ""
	}
	s := wholePercent(o.Saturation.Value) + " %"
	switch o.SaturationSource {
	case physio.SaO2:
		return "SaO2 " + s + " as given"
	case physio.SpO2:
		return "SpO2 " + s
	}
	if co, met := c.gas.Sample.Val(physio.COHb), c.gas.Sample.Val(physio.MetHb); co > physio.SaidCOHb || met > physio.SaidMetHb {
		return "oxyhaemoglobin at most about " + s
	}
	if ph, ok := c.gas.Sample.Get(physio.PHq); ok && (ph < physio.SaidPHLow || ph > physio.SaidPHHigh) {
		return "SaO2 about " + s + " at this pH"
	}
	return "SaO2 about " + s
}

// onlyOn names the oxygen that buys an adequate level.
func (c *composer) onlyOn() string {
	o := c.a.Oxygen
	if !o.Known {
		return " on oxygen"
	}
	word := " on "
	if c.a.Oxygenation.Efficiency == physio.Poor {
		word = " only on "
	}
	if o.Estimated {
		return word + "about " + wholePercent(o.FiO2.Low) + "-" + wholePercent(o.FiO2.High) + " %"
	}
	out := word + percent(o.FiO2.Value) + " %"
	if peep, ok := c.gas.Sample.Get(physio.PEEP); ok && peep > 0 {
		out += " and PEEP " + plain(peep, 0)
	}
	return out
}

func (c *composer) oxygenEfficiency() string {
	o := c.a.Oxygenation
	if c.gas.Sample.Circumstance.Has(physio.ECMO) {
		return ""
	}
	if o.Efficiency == physio.EfficiencyUnknown {
		switch {
		case !c.a.Oxygen.Known:
			return "Efficiency: can't say without the oxygen."
		case o.SaturationSource == physio.SpO2 && o.Saturation.Value > physio.SpO2Ceiling:
			return "Efficiency: can't say above SpO2 97 %."
		case o.SaturationSource == physio.SpO2:
			return "Efficiency: can't say without a PaO2."
		}
		return "Efficiency: can't say."
	}
	return c.transferPhrase() + ": " + efficiencyWord[o.Efficiency] + c.softWord() + "."
}

func (c *composer) softWord() string {
	if c.a.Oxygenation.Soft {
		return " (soft: FiO2 estimated)"
	}
	return ""
}

// transferPhrase prints the indices that the efficiency rests on: on air A-a
// with its band, on oxygen P/F and a/A, without a PaO2 S/F.
func (c *composer) transferPhrase() string {
	switch c.a.Oxygenation.Basis {
	case "aa":
		ix, _ := c.a.Index("aa")
		if band, ok := c.a.Index("aa_expected"); ok {
			return fmt.Sprintf("%s (expected %s)", c.indexPhrase(ix), c.n.between(band.Low, band.High))
		}
		return c.indexPhrase(ix)
	case "sf":
		ix, _ := c.a.Index("sf")
		return c.indexPhrase(ix)
	}
	var parts []string
	if ix, ok := c.a.Index("pf"); ok {
		parts = append(parts, c.indexPhrase(ix))
	}
	if ix, ok := c.a.Index("a_over_a"); ok && (c.brief < briefOneIndex || c.a.Oxygenation.Basis == "a_over_a") {
		parts = append(parts, c.indexPhrase(ix)+" (healthy: 0.75 or more)")
	}
	return strings.Join(parts, ", ")
}

// healthyAtPaCO2 keeps hypoventilation from being called a lung fault: what a
// healthy lung would have at a high PaCO2.
func (c *composer) healthyAtPaCO2() string {
	h := c.a.Oxygenation.HealthyPaO2
	p, ok := c.gas.Sample.Get(physio.PaCO2)
	if !ok || h.Value <= 0 || p <= physio.SaidHealthyPaCO2 || c.gas.Sample.Val(physio.PaO2) == 0 || c.gas.Sample.Val(physio.PaO2) >= h.Low {
		return ""
	}
	return "A healthy lung at this PaCO2: PaO2 about " + c.n.about(h.Value) + "."
}

// otherOxygenIndices are indices that were asked for by what was typed: OI
// where a mean airway pressure was, the rate index on high flow.
func (c *composer) otherOxygenIndices() string {
	var parts []string
	for _, key := range []string{"oi", "osi"} {
		if ix, ok := c.a.Index(key); ok {
			parts = append(parts, c.indexPhrase(ix))
			break
		}
	}
	if ix, ok := c.a.Index("rox"); ok && c.gas.Sample.Device == physio.HighFlow {
		parts = append(parts, c.indexPhrase(ix))
	}
	if ix, ok := c.a.Index("pf_altitude_corrected"); ok && c.a.Oxygenation.OnOxygen {
		parts = append(parts, c.indexPhrase(ix))
	}
	if len(parts) == 0 {
		return ""
	}
	return upperFirst(strings.Join(parts, ", ")) + "."
}

func upperFirst(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}
