package bot

import (
	"fmt"
	"strings"

	"galeward/physio"
)

// ventilation is the sentence of the first axis: level, course, efficiency.
func (c *composer) ventilation() string {
	if c.a.Blood == physio.Cord {
		return ""
	}
	parts := []string{c.ventilationLevel()}
	if course := c.courseSentence(); course != "" {
		parts = append(parts, course)
	}
	if e := c.ventilationEfficiency(); e != "" {
		parts = append(parts, e)
	}
	if m := c.mechanics(); m != "" {
		parts = append(parts, m)
	}
	return "Ventilation: " + strings.Join(parts, " ")
}

func (c *composer) ventilationLevel() string {
	v := c.a.Ventilation
	switch v.Level {
	case physio.LevelAdequate:
		return c.adequateCO2()
	case physio.LevelShortForNeed:
		if c.n.finer(v.PaCO2.Value) == c.n.finer(c.a.AcidBase.NeedSpan.High) {
			return fmt.Sprintf("PaCO2 %s is at the upper end of what this metabolic acidosis needs (%s %s): borderline.",
				c.n.pressure(v.PaCO2.Value), c.needSpan(), c.n.unit())
		}
		return fmt.Sprintf("PaCO2 %s is above what this metabolic acidosis needs (%s %s): short for the need%s.",
			c.n.pressure(v.PaCO2.Value), c.needSpan(), c.n.unit(), c.borderlineNeed())
	case physio.LevelHypoventilation:
		return c.highCO2()
	case physio.LevelHyperventilation:
		return c.lowCO2()
	}
	return c.unknownCO2()
}

// answersNeed says that PaCO2 is what a metabolic process needs, at most
// borderline off it.
func (c *composer) answersNeed() bool {
	ab := c.a.AcidBase
	return ab.Need == physio.Matches || ab.Need != physio.NoNeed && ab.NeedBorderline
}

// needSpan prints what a metabolic process needs; a bound that PaCO2 misses by
// less than its last digit is printed finer, so that the verdict can be seen.
func (c *composer) needSpan() string {
	n, p := c.a.AcidBase.NeedSpan, c.a.Ventilation.PaCO2.Value
	shown := c.n.pressure(p)
	if p > n.High && shown == c.n.about(n.High) || p > 0 && p < n.Low && shown == c.n.about(n.Low) {
		return c.n.finer(n.Low) + "-" + c.n.finer(n.High)
	}
	return c.n.between(n.Low, n.High)
}

func (c *composer) borderlineNeed() string {
	if c.a.AcidBase.NeedBorderline {
		return ", borderline"
	}
	return ""
}

func (c *composer) adequateCO2() string {
	level := "level adequate"
	if c.a.Raised(physio.CautionAsthma) {
		return "PaCO2 " + c.n.about(c.a.Ventilation.PaCO2.Value) + " where an attack makes it low: not adequate, however usual the number."
	}
	if c.a.Ventilation.Borderline {
		level = "level adequate, borderline (" + c.rangeWords() + ")"
	}
	if c.a.AcidBase.Need == physio.Matches && c.a.AcidBase.Primary == physio.MetabolicAcidosis {
		return level + fmt.Sprintf(", and PaCO2 fits the metabolic side (%s %s).", c.needSpan(), c.n.unit())
	}
	if c.a.AcidBase.Need == physio.Beyond && c.a.AcidBase.Primary == physio.MetabolicAlkalosis {
		return level + fmt.Sprintf(", but PaCO2 is below what this alkalosis expects (%s %s).", c.needSpan(), c.n.unit())
	}
	if c.a.Ventilation.RangeHouse && !c.a.Ventilation.Borderline {
		level += " (" + c.rangeWords() + ")"
	}
	return level + "."
}

// rangeWords names the range that PaCO2 is judged by.
func (c *composer) rangeWords() string {
	if v := c.a.Ventilation; v.RangeHouse {
		return "this channel's " + c.n.between(v.Range.Low, v.Range.High) + " " + c.n.unit()
	}
	r := c.a.Ranges
	return "range " + c.n.between(r.PaCO2Low, r.PaCO2High) + " " + c.n.unit()
}

func (c *composer) highCO2() string {
	v, ab := c.a.Ventilation, c.a.AcidBase
	switch {
	case v.Floor:
		return "EtCO2 is a floor: PaCO2 is at least about that, so the level is inadequate."
	case c.a.Raised(physio.CautionAsthma):
		return c.highInAttack()
	case ab.Primary == physio.MetabolicAlkalosis && c.answersNeed():
		return fmt.Sprintf("PaCO2 above its range, as this metabolic alkalosis expects (%s %s)%s.", c.needSpan(), c.n.unit(), c.borderlineNeed())
	case ab.Primary == physio.MetabolicAlkalosis:
		return fmt.Sprintf("inadequate: PaCO2 above what this metabolic alkalosis expects (%s %s).", c.needSpan(), c.n.unit())
	case v.AtUsual:
		return "high, at this patient's usual PaCO2."
	case v.ChronicPattern && !v.Borderline:
		return "high, chronic pattern" + c.limitWords() + "."
	}
	level := "inadequate"
	switch {
	case v.Borderline:
		level = "borderline high"
	case c.a.Triple.PH >= c.a.Ranges.PHLow:
		level = "high, with pH in its range"
	}
	return level + c.limitWords() + "."
}

// limitWords names the critical limit or, off the adult table, the range.
func (c *composer) limitWords() string {
	for _, q := range c.a.Critical {
		if q == physio.PaCO2 {
			return " (critical limit " + c.n.about(c.a.CriticalLimits.PaCO2High) + " " + c.n.unit() + ")"
		}
	}
	if c.a.Ventilation.Borderline || c.a.Ventilation.RangeHouse || !plainAdult(c.a) {
		return " (" + c.rangeWords() + ")"
	}
	return ""
}

// plainAdult says that the adult table at sea level was used.
func plainAdult(a *physio.Assessment) bool {
	return a.Ranges.PaCO2Low == 35 && a.Ranges.PaCO2High == 45
}

func (c *composer) lowCO2() string {
	ab := c.a.AcidBase
	if ab.Primary == physio.MetabolicAcidosis {
		switch ab.Need {
		case physio.Matches:
			return fmt.Sprintf("PaCO2 is low as the metabolic acidosis needs (%s %s): level matches the need%s.", c.needSpan(), c.n.unit(), c.borderlineNeed())
		case physio.Beyond:
			return fmt.Sprintf("PaCO2 is lower than the metabolic acidosis needs (%s %s)%s.", c.needSpan(), c.n.unit(), c.borderlineNeed())
		}
	}
	level := "PaCO2 below its range"
	if c.a.Ventilation.Borderline {
		level += ", borderline"
	}
	level += " (" + c.lowRangeWords() + ")."
	low := c.a.Oxygenation.Scale == physio.DegreeMild || c.a.Oxygenation.Scale == physio.DegreeModerate || c.a.Oxygenation.Scale == physio.DegreeSevere
	if low || c.a.Oxygenation.Efficiency == physio.Poor {
		level += " Low oxygen can drive it; a later rise into the range is then no recovery by itself."
	}
	return level
}

// lowRangeWords names the range of a PaCO2 that is called below it.
func (c *composer) lowRangeWords() string {
	return strings.TrimPrefix(c.rangeWords(), "range ")
}

func (c *composer) unknownCO2() string {
	switch s := c.gas.Sample.Circumstance; {
	case s.Has(physio.CPR):
		return "no lung verdict during resuscitation."
	case s.Has(physio.ECMO):
		return "no lung verdict: the circuit shares the work."
	}
	switch c.a.Blood {
	case physio.Venous, physio.CentralVenous, physio.MixedVenous:
		if c.a.Ventilation.Screen {
			return "a venous PCO2 below 45 mmHg makes arterial hypercapnia unlikely; the level itself can't be said."
		}
		return "can't say from venous blood: PCO2 only screens, arterial is some 6 mmHg lower, at times 20."
	case physio.Intraosseous, physio.BloodUncertain:
		return "can't say from this sample."
	}
	if c.a.Ventilation.Floor {
		return "can't say: a usual EtCO2 excludes nothing about PaCO2."
	}
	return "can't say without PaCO2 or EtCO2."
}

// courseSentence is the time course, with what an acute change alone would
// have done.
func (c *composer) courseSentence() string {
	ab := c.a.AcidBase
	respiratory := ab.Primary == physio.RespiratoryAcidosis || ab.Primary == physio.RespiratoryAlkalosis
	if !respiratory || c.a.Fit.Grade == physio.FitReject || c.a.Ventilation.Level == physio.LevelUnknown || c.a.Ventilation.Borderline && c.a.Problem == physio.ProblemNone {
		return ""
	}
	acute, ok := c.a.Index("expected_ph_acute")
	bracket := ""
	if ok {
		bracket = " (acute alone: pH about " + aboutPH(acute.Value) + ")"
	}
	switch ab.Course {
	case physio.Acute:
		return "Acute pattern" + bracket + "."
	case physio.AcuteOnChronic:
		if ab.DaysFit {
			return "Acute on chronic" + bracket + "; a rise over days also fits."
		}
		return "Acute on chronic" + bracket + "."
	case physio.Chronic:
		if ab.Primary == physio.RespiratoryAlkalosis {
			return "Chronic pattern."
		}
	case physio.CourseNotClear:
		if c.a.Ranges.Responses && ab.Primary == physio.RespiratoryAlkalosis {
			return "Days of low PaCO2, or acute with a metabolic acidosis: the gas alone can't tell."
		}
	}
	return ""
}

func (c *composer) ventilationEfficiency() string {
	v := c.a.Ventilation
	switch c.a.Blood {
	case physio.Arterial, physio.Capillary, physio.NoBlood:
	default:
		return ""
	}
	if s := c.gas.Sample.Circumstance; s.Has(physio.CPR) || s.Has(physio.ECMO) {
		return ""
	}
	if v.Efficiency == physio.EfficiencyUnknown {
		if c.a.Blood == physio.NoBlood && v.Level == physio.LevelUnknown {
			return ""
		}
		return "Efficiency: can't say without " + c.lacking() + "."
	}
	ix, _ := c.a.Index(v.Basis)
	by := ""
	if v.ByRate {
		by = " by " + c.rateWords()
	}
	return "Efficiency: " + c.indexPhrase(ix) + by + ": " + efficiencyWord[v.Efficiency] + "."
}
