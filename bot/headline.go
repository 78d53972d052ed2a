package bot

import (
	"strings"

	"galeward/physio"
)

// headlineWidth is what a lock screen shows of the first line.
const headlineWidth = 40

// headline carries both verdicts, ventilation first, in at most 40 characters:
// the efficiency of oxygenation is kept before the time course of ventilation.
func (c *composer) headline() string {
	if len(c.a.Critical) > 1 {
		return c.criticalHeadline()
	}
	critical := ""
	if len(c.a.Critical) == 1 {
		critical = c.criticalValue(c.a.Critical[0]) + " critical"
	}
	vs, os := c.ventilationShort(), c.oxygenationShort()
	told := len(os) - 1 // the last phrasing leaves the efficiency out
	for _, group := range []struct{ vs, os []string }{
		{vs[:len(vs)-1], os[:told]}, {vs, os[:told]}, {vs, os[told:]},
	} {
		for _, v := range group.vs {
			for _, o := range group.os {
				if h := joinHeads(critical, v, o); len([]rune(h)) <= headlineWidth {
					return h
				}
			}
		}
	}
	return joinHeads(critical, last(vs))
}

func last(s []string) string { return s[len(s)-1] }

func joinHeads(heads ...string) string {
	var kept []string
	for _, h := range heads {
		if h != "" {
			kept = append(kept, h)
		}
	}
	return strings.Join(kept, "; ")
}

func (c *composer) criticalHeadline() string {
	parts := make([]string, len(c.a.Critical))
	for i, q := range c.a.Critical {
		parts[i] = c.criticalValue(q)
	}
	h := "CRITICAL " + strings.Join(parts, ", ")
	if len([]rune(h)) > headlineWidth {
		h = "CRITICAL " + strings.Join(parts[:2], ", ")
	}
	return h
}

func (c *composer) criticalValue(q physio.Quantity) string {
	v, _ := c.gas.Sample.Get(q)
	if q == physio.PHq {
		return "pH " + phText(v)
	}
	return c.bloodSymbol(q) + " " + c.n.pressure(v)
}

// ventilationShort gives phrasings of the first axis, longest first.
func (c *composer) ventilationShort() []string {
	level := c.ventilationHead()
	short, _, _ := strings.Cut(level, ",")
	out := []string{level, short}
	switch level {
	case "CO2 in range":
		out[1] = "CO2 fits"
	case "CO2 borderline high":
		out[1] = "CO2 borderline"
	case "CO2 not low in asthma":
		out[1] = "CO2 not low"
	}
	if c.a.Ventilation.Efficiency == physio.Poor {
		out = append([]string{level + ", efficiency poor", short + ", efficiency poor", level + ", costly", short + ", costly"}, out...)
	}
	if len(c.a.Critical) == 1 && c.a.Critical[0] == physio.PaCO2 {
		return []string{""} // the critical value names the axis
	}
	return out
}

func (c *composer) ventilationHead() string {
	switch c.a.Blood {
	case physio.Cord:
		return "Cord gas: no lung verdict"
	case physio.Venous, physio.CentralVenous, physio.MixedVenous, physio.Intraosseous, physio.BloodUncertain:
		return "CO2 can't say (" + shortBlood[c.a.Blood] + ")"
	}
	v, ab := c.a.Ventilation, c.a.AcidBase
	answers := ab.Need == physio.Matches
	switch v.Level {
	case physio.LevelAdequate:
		if c.a.Raised(physio.CautionAsthma) {
			return "CO2 not low in asthma"
		}
		return "CO2 in range"
	case physio.LevelShortForNeed:
		return "CO2 above need"
	case physio.LevelHypoventilation:
		return c.highHead(answers && ab.Primary == physio.MetabolicAlkalosis)
	case physio.LevelHyperventilation:
		if answers && ab.Primary == physio.MetabolicAcidosis {
			return "CO2 low, fits acidosis"
		}
		return "CO2 low"
	}
	return "CO2 can't say"
}

func (c *composer) highHead(answersAlkalosis bool) string {
	switch {
	case answersAlkalosis:
		return "CO2 high, fits alkalosis"
	case c.a.Ventilation.Floor:
		return "CO2 high (EtCO2)"
	case c.a.Ventilation.Borderline:
		return "CO2 borderline high"
	case c.a.AcidBase.Course == physio.Acute:
		return "CO2 high, acute"
	case c.a.AcidBase.Course == physio.Chronic:
		return "CO2 high, chronic"
	}
	return "CO2 high"
}

var shortBlood = map[physio.Blood]string{
	physio.Venous: "venous", physio.CentralVenous: "venous", physio.MixedVenous: "venous",
	physio.Intraosseous: "bone", physio.BloodUncertain: "sample?",
}

// oxygenationShort gives phrasings of the second axis, longest first.
func (c *composer) oxygenationShort() []string {
	if c.a.Blood == physio.Cord {
		return []string{""}
	}
	level := "O2 " + c.oxygenHead()
	switch c.a.Oxygenation.Efficiency {
	case physio.Efficient:
		return []string{level + ", efficient", level}
	case physio.Poor, physio.Reduced:
		word := efficiencyWord[c.a.Oxygenation.Efficiency]
		return []string{level + ", transfer " + word, level + ", lung " + word, level}
	}
	return []string{level}
}

// oxygenHead is the level in few words.
func (c *composer) oxygenHead() string {
	o := c.a.Oxygenation
	if c.oximeterDisagrees() {
		return "in doubt (SpO2 " + wholePercent(c.gas.Sample.Val(physio.SpO2)) + ")"
	}
	if o.ExpectedHere {
		return "low, expected here"
	}
	switch o.AgainstTarget {
	case physio.BelowTarget:
		return "below target"
	case physio.InsideTarget:
		return "inside target"
	case physio.AboveTarget:
		if o.OnOxygen {
			return "above target"
		}
	}
	if c.a.Raised(physio.CautionAboveRetainer) {
		return "above 88-92"
	}
	if o.InsideUsual {
		return "inside 88-92"
	}
	if c.a.Raised(physio.CautionHighO2Preterm) {
		return "above range"
	}
	if c.a.Raised(physio.CautionHyperoxia) {
		return "high"
	}
	return c.levelWord()
}

// levelWord is the level without a target: on oxygen 60-79 is "borderline",
// below 60 "low", below 45 "critically low"; on air the same words, with the
// degree in the body.
func (c *composer) levelWord() string {
	o := c.a.Oxygenation
	if pao2, ok := c.gas.Sample.Get(physio.PaO2); ok && o.SaturationSource != physio.SpO2 && c.a.Ranges.PaO2 {
		switch {
		case o.Scale == physio.DegreeUnknown:
			return "can't say"
		case pao2 < physio.CriticallyLowPaO2:
			return "critically low"
		case pao2 < physio.LowPaO2 || o.Saturation.Value > 0 && o.Saturation.Value < physio.LowSaturation && o.Scale != physio.DegreeSevere:
			return "low" // also where acidosis moves the saturation below 90 %
		}
	}
	if o.Scale == physio.DegreeMild && o.OnOxygen {
		return "borderline"
	}
	switch o.Scale {
	case physio.DegreeAdequate:
		return "adequate"
	case physio.DegreeMild:
		return "low (mild)"
	case physio.DegreeModerate:
		return "low"
	case physio.DegreeSevere:
		return "critically low"
	}
	return "can't say"
}
