package physio_test

import (
	"reflect"
	"testing"

	"pgregory.net/rapid"

	"galeward/physio"
)

// verdicts are what an assessment decides.
type verdicts struct {
	Level       physio.Level
	Breathing   physio.Efficiency
	Degree      physio.Degree
	Transfer    physio.Efficiency
	Against     physio.Against
	Primary     physio.Process
	Course      physio.Course
	Gap         physio.Gap
	Need        physio.Need
	Problem     physio.Problem
	Critical    []physio.Quantity
	Expected    bool
	VentBorder  bool
	OxyBorder   bool
	FitGrade    physio.FitGrade
	CautionsSet []physio.Caution
}

func verdictsOf(a physio.Assessment) verdicts {
	return verdicts{
		a.Ventilation.Level, a.Ventilation.Efficiency, a.Oxygenation.Level, a.Oxygenation.Efficiency, a.Oxygenation.AgainstTarget,
		a.AcidBase.Primary, a.AcidBase.Course, a.AcidBase.Gap, a.AcidBase.Need, a.Problem, a.Critical, a.Oxygenation.ExpectedHere,
		a.Ventilation.Borderline, a.Oxygenation.Borderline, a.Fit.Grade, a.Cautions,
	}
}

// drawTyped is a sample as analysers print it: whole mmHg, whole percent, two
// decimals of pH. Cut-offs are such numbers, so many samples stand on one.
func drawTyped(t *rapid.T) physio.Sample {
	steps := func(q physio.Quantity, low, high int, step float64) (physio.Quantity, float64) {
		return q, float64(rapid.IntRange(low, high).Draw(t, q.Key())) * step
	}
	var s physio.Sample
	s.Set(physio.PHq, float64(rapid.IntRange(690, 770).Draw(t, "ph"))/100)
	s.Set(steps(physio.PaCO2, 15, 110, 1))
	s.Set(steps(physio.PaO2, 30, 300, 1))
	s.Set(physio.FiO2, float64(rapid.IntRange(21, 100).Draw(t, "fio2"))/100)
	if rapid.Bool().Draw(t, "with EtCO2") {
		s.Set(steps(physio.EtCO2, 10, 90, 1))
	}
	if rapid.Bool().Draw(t, "with SpO2") {
		s.Set(physio.SpO2, float64(rapid.IntRange(60, 100).Draw(t, "spo2"))/100)
	}
	if rapid.Bool().Draw(t, "with VE") {
		s.Set(steps(physio.VE, 30, 250, 0.1))
	}
	s.Population = rapid.SampledFrom([]physio.Population{"", physio.Pregnant, physio.Child, physio.Newborn, physio.Preterm}).Draw(t, "population")
	return s
}

// TestLawUnitsNeverChangeAVerdict: the same reading typed in kPa, in percent or
// as hydrogen ions is judged the same, also where it stands on a cut-off.
func TestLawUnitsNeverChangeAVerdict(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := drawTyped(t)
		other := s
		for _, q := range []physio.Quantity{physio.PaCO2, physio.PaO2, physio.EtCO2} {
			if v, ok := s.Get(q); ok {
				other.Set(q, physio.KPa(physio.MmHg(v).KPa()).MmHg())
			}
		}
		for _, q := range []physio.Quantity{physio.FiO2, physio.SpO2} {
			if v, ok := s.Get(q); ok {
				other.Set(q, float64(physio.Percent(physio.Fraction(v).Percent())))
			}
		}
		other.Set(physio.PHq, float64(physio.Hydrogen(physio.PH(s.Val(physio.PHq)).Hydrogen())))
		if a, b := verdictsOf(assess(s)), verdictsOf(assess(other)); !reflect.DeepEqual(a, b) {
			t.Fatalf("%v\n%+v\nin other units\n%+v", s.Values, a, b)
		}
	})
}

// TestLimitsHoldAsPrintedInKPa: the adult range of PaCO2 is printed as 4.7 to 6.0
// kPa and the scale of PaO2 as 10.7 and 8.0 kPa (common practice): values that a
// kPa analyser prints at those limits are inside, a tenth beyond is not.
func TestLimitsHoldAsPrintedInKPa(t *testing.T) {
	of := func(pco2, po2 float64) physio.Assessment {
		return assess(gas(physio.PHq, 7.40, physio.PaCO2, physio.KPa(pco2).MmHg(), physio.PaO2, physio.KPa(po2).MmHg(), physio.FiO2, 0.21))
	}
	for kPa, want := range map[float64]physio.Level{
		4.6: physio.LevelHyperventilation, 4.7: physio.LevelAdequate, 6.0: physio.LevelAdequate, 6.1: physio.LevelHypoventilation,
	} {
		if got := of(kPa, 12).Ventilation.Level; got != want {
			t.Errorf("PaCO2 %.1f kPa: %s, want %s", kPa, got, want)
		}
	}
	for kPa, want := range map[float64]physio.Degree{
		10.7: physio.DegreeAdequate, 10.6: physio.DegreeMild, 8.0: physio.DegreeMild, 7.9: physio.DegreeModerate,
	} {
		if got := of(5.3, kPa).Oxygenation.Level; got != want {
			t.Errorf("PaO2 %.1f kPa: %s, want %s", kPa, got, want)
		}
	}
}

// TestLawOrderNeverMatters: the values of a sample may be set in any order, and
// set twice.
func TestLawOrderNeverMatters(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := draw(t)
		var given []physio.Quantity
		s.Each(func(q physio.Quantity, _ float64) { given = append(given, q) })
		again := s
		again.Values = physio.Values{}
		for _, q := range rapid.Permutation(given).Draw(t, "order") {
			again.Set(q, s.Val(q))
		}
		if len(given) > 0 {
			again.Set(given[0], s.Val(given[0]))
		}
		if a, b := assess(s), assess(again); !reflect.DeepEqual(a, b) {
			t.Fatalf("%+v\nin another order\n%+v", a, b)
		}
	})
}

// contradictions are the cautions that say of two values that they can not be of
// one sample: a value that raises one of them may take a verdict back.
var contradictions = []physio.CautionCode{
	physio.CautionAboveAlveolar, // an FiO2, pressure, altitude or PaCO2 that can not give this PaO2
	physio.CautionFit,           // a bicarbonate or base excess that does not fit
	physio.CautionVenousLikely,  // an SpO2 far above what this PaO2 saturates to
	physio.CautionVenousPossible,
	physio.CautionSaturation, // a measured saturation away from the curve
	physio.CautionDyshaem,    // COHb or MetHb that an SpO2 takes for something else
}

// TestLawMoreValuesNeverUnsettle: a value more never turns an adequate level into
// an unknown one, unless the new value contradicts the others, which is said.
func TestLawMoreValuesNeverUnsettle(t *testing.T) {
	settled := 0
	rapid.Check(t, func(t *rapid.T) {
		s := drawTyped(t)
		for _, q := range []physio.Quantity{physio.PHq, physio.PaO2, physio.FiO2, physio.PaCO2} {
			if rapid.Bool().Draw(t, "without "+q.Key()) {
				s.Drop(q)
			}
		}
		more := s
		q := rapid.SampledFrom(physio.Quantities()).Draw(t, "more")
		if s.Has(q) {
			return
		}
		more.Set(q, rapid.Float64Range(q.Info().Low, q.Info().High).Draw(t, "value"))
		a, b := assess(s), assess(more)
		lost := a.Ventilation.Level == physio.LevelAdequate && b.Ventilation.Level == physio.LevelUnknown ||
			a.Oxygenation.Level == physio.DegreeAdequate && b.Oxygenation.Level == physio.DegreeUnknown
		if a.Ventilation.Level == physio.LevelAdequate || a.Oxygenation.Level == physio.DegreeAdequate {
			settled++
		}
		if lost && !newlyRaised(a, b, contradictions) {
			t.Fatalf("%v and %s %v: %s, %s; before %s, %s", s.Values, q.Key(), more.Val(q),
				b.Ventilation.Level, b.Oxygenation.Level, a.Ventilation.Level, a.Oxygenation.Level)
		}
	})
	if settled == 0 {
		t.Error("no level was adequate")
	}
}

// newlyRaised says that b raises one of the cautions that a does not.
func newlyRaised(a, b physio.Assessment, codes []physio.CautionCode) bool {
	for _, c := range codes {
		if b.Raised(c) && !a.Raised(c) {
			return true
		}
	}
	return false
}

// TestLawIntervalsHoldTheirPoint: every interval of an assessment lies round its
// value.
func TestLawIntervalsHoldTheirPoint(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := assess(draw(t))
		all := map[string]physio.Interval{
			"PaCO2": a.Ventilation.PaCO2, "saturation": a.Oxygenation.Saturation, "FiO2": a.Oxygen.FiO2, "healthy PaO2": a.Oxygenation.HealthyPaO2,
		}
		for _, ix := range a.Indices {
			all[ix.Key] = ix.Interval
		}
		for key, iv := range all {
			if !(iv.Low <= iv.Value && iv.Value <= iv.High) {
				t.Fatalf("%s: %+v", key, iv)
			}
		}
	})
}
