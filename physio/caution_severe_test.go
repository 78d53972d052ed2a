package physio_test

import (
	"math"
	"testing"

	"galeward/physio"
)

// adultGas is an ordinary gas on air, with changes.
func adultGas(change func(*physio.Sample)) physio.Assessment {
	s := gas(physio.PHq, 7.40, physio.PaCO2, 40, physio.PaO2, 90, physio.HCO3, 24, physio.FiO2, 0.21)
	change(&s)
	return assess(s)
}

// TestSevereValuesBesideTheGas tries each bound of a caution about a value
// beside the gas on both sides. Hb 7 g/dL: AABB 2016; lactate 4 mmol/L:
// Surviving Sepsis 2021; K 6.5 mmol/L: UK Kidney Association 2020; rate 30:
// Lim 2003; breathing-pattern index 105: Yang and Tobin 1991.
func TestSevereValuesBesideTheGas(t *testing.T) {
	newborn := func(q physio.Quantity, v float64) func(*physio.Sample) {
		return func(s *physio.Sample) { s.Set(q, v); s.Population = physio.Newborn }
	}
	set := func(q physio.Quantity, v float64) func(*physio.Sample) {
		return func(s *physio.Sample) { s.Set(q, v) }
	}
	breath := func(rate, vt float64, mode physio.Mode) func(*physio.Sample) {
		return func(s *physio.Sample) { s.Set(physio.RR, rate); s.Set(physio.VT, vt); s.Mode = mode }
	}
	for _, c := range []struct {
		what   string
		code   physio.CautionCode
		change func(*physio.Sample)
		want   bool
	}{
		{"Hb 6.9", physio.CautionAnaemia, set(physio.Hb, 6.9), true},
		{"Hb 7", physio.CautionAnaemia, set(physio.Hb, 7), false},
		{"Hb 6.9, newborn", physio.CautionAnaemia, newborn(physio.Hb, 6.9), false},
		{"lactate 4", physio.CautionLactate, set(physio.Lactate, 4), true},
		{"lactate 3.9", physio.CautionLactate, set(physio.Lactate, 3.9), false},
		{"K 6.5", physio.CautionPotassium, set(physio.K, 6.5), true},
		{"K 6.4", physio.CautionPotassium, set(physio.K, 6.4), false},
		{"K 6.8, newborn", physio.CautionPotassium, newborn(physio.K, 6.8), false},
		{"rate 30", physio.CautionByRate, set(physio.RR, 30), true},
		{"rate 29", physio.CautionByRate, set(physio.RR, 29), false},
		{"rate 30, set", physio.CautionByRate, set(physio.RRSet, 30), false},
		{"rate 34, volume control", physio.CautionByRate, breath(34, 400, physio.VolumeCtrl), false},
		{"rate 28 of 260 mL, pressure support", physio.CautionByRate, breath(28, 260, physio.PressSupport), true}, // 107.7
		{"rate 28 of 280 mL, pressure support", physio.CautionByRate, breath(28, 280, physio.PressSupport), false},
		{"rate 40, PaCO2 60", physio.CautionByRate, func(s *physio.Sample) {
			*s = gas(physio.PHq, 7.26, physio.PaCO2, 60, physio.HCO3, 26, physio.RR, 40)
		}, false},
	} {
		if a := adultGas(c.change); a.Raised(c.code) != c.want {
			t.Errorf("%s: %s raised is %v", c.what, c.code, !c.want)
		}
	}
}

// TestRateIsNoEfficiency: a PaCO2 that a high rate holds is not efficient.
func TestRateIsNoEfficiency(t *testing.T) {
	calm := adultGas(func(s *physio.Sample) { s.Set(physio.RR, 20); s.Set(physio.VE, 8) })
	fast := adultGas(func(s *physio.Sample) { s.Set(physio.RR, 32); s.Set(physio.VE, 8) })
	if calm.Ventilation.Efficiency != physio.Efficient || fast.Ventilation.Efficiency != physio.Reduced {
		t.Errorf("rate 20: %s, rate 32: %s", calm.Ventilation.Efficiency, fast.Ventilation.Efficiency)
	}
}

// TestLactateIsMajorBesideAnAcidosis: the same lactate is graded by what it
// explains, and said once.
func TestLactateIsMajorBesideAnAcidosis(t *testing.T) {
	severity := func(a physio.Assessment) (out []physio.Severity) {
		for _, c := range a.Cautions {
			if c.Code == physio.CautionLactate {
				out = append(out, c.Severity)
			}
		}
		return out
	}
	alone := severity(adultGas(func(s *physio.Sample) { s.Set(physio.Lactate, 6) }))
	acidosis := severity(assess(gas(physio.PHq, 7.20, physio.PaCO2, 26, physio.HCO3, 10, physio.Lactate, 9)))
	if len(alone) != 1 || alone[0] != physio.Minor || len(acidosis) != 1 || acidosis[0] != physio.Major {
		t.Errorf("alone %v, with acidosis %v", alone, acidosis)
	}
}

// TestOximeterTakesCOForOxygen: SpO2 stays at 92-100 up to COHb 46 %, the gap
// being about the COHb (Buckley 1994; Hampson 1998), so no level rests on it.
func TestOximeterTakesCOForOxygen(t *testing.T) {
	pulse := func(co float64, c physio.Circumstance) physio.Assessment {
		s := gas(physio.SpO2, 0.98, physio.COHb, co, physio.FiO2, 0.21)
		s.Circumstance = c
		return assess(s)
	}
	for _, c := range []struct {
		co    float64
		c     physio.Circumstance
		blind bool
	}{{0.30, 0, true}, {0.11, 0, true}, {0.10, 0, false}, {0.05, physio.SmokeOrCO, true}, {0.02, physio.SmokeOrCO, false}} {
		a := pulse(c.co, c.c)
		if blind := a.Oxygenation.Level == physio.DegreeUnknown; blind != c.blind || blind && a.Problem == physio.ProblemNone {
			t.Errorf("COHb %v, smoke %v: %s, problem %s", c.co, c.c != 0, a.Oxygenation.Level, a.Problem)
		}
	}
	high := func(co float64) physio.Assessment {
		s := gas(physio.PHq, 7.38, physio.PaCO2, 40, physio.PaO2, 400, physio.FiO2, 0.9, physio.COHb, co)
		s.Circumstance = physio.PostArrest
		return assess(s)
	}
	if h := high(0.25); h.Raised(physio.CautionHyperoxia) || h.Raised(physio.CautionHighPaO2) {
		t.Error("high oxygen is the treatment of carbon monoxide")
	}
	if clean := high(0.02); !clean.Raised(physio.CautionHyperoxia) {
		t.Error("a high PaO2 after arrest is said")
	}
}

// TestMismatchOfAnOximeter: PaO2 62 is 91 % at pH 7.40 (Severinghaus 1979), so
// SpO2 98 does not go with it; SpO2 95 does within an oximeter's error.
func TestMismatchOfAnOximeter(t *testing.T) {
	for spo2, want := range map[float64]bool{0.98: true, 0.95: false, 0.91: false, 0.84: true} {
		s := gas(physio.PHq, 7.40, physio.PaCO2, 40, physio.PaO2, 62, physio.SpO2, spo2, physio.FiO2, 0.21)
		if a := assess(s); a.Raised(physio.CautionSaturation) != want {
			t.Errorf("PaO2 62, SpO2 %v: mismatch %v", spo2, !want)
		}
	}
}

// TestNewbornOI: the ranges of a newborn's oxygenation index begin at 20
// (Lakshminrusimha 2015).
func TestNewbornOI(t *testing.T) {
	oi := func(mean float64, p physio.Population) bool {
		s := gas(physio.PHq, 7.30, physio.PaCO2, 45, physio.PaO2, 45, physio.FiO2, 0.9, physio.Pmean, mean)
		s.Population = p
		a := assess(s)
		return a.Raised(physio.CautionNewbornOI)
	}
	if !oi(10, physio.Newborn) || oi(9.9, physio.Newborn) || oi(15, physio.Adult) {
		t.Errorf("OI 20: %v, 19.8: %v, an adult's 30: %v", oi(10, physio.Newborn), oi(9.9, physio.Newborn), oi(15, physio.Adult))
	}
}

// TestBandOfTheScale: the band that is printed is the population's own.
func TestBandOfTheScale(t *testing.T) {
	for p, want := range map[physio.Population]physio.Span{
		physio.Adult: {Low: 60, High: 80}, physio.Newborn: {Low: 40, High: 50},
	} {
		s := gas(physio.PaO2, want.Low+2, physio.PHq, 7.35, physio.PaCO2, 42, physio.FiO2, 0.5)
		s.Population = p
		if a := assess(s); a.Oxygenation.Band != want || a.Oxygenation.Scale != physio.DegreeMild {
			t.Errorf("%s: %v, %s", p, a.Oxygenation.Band, a.Oxygenation.Scale)
		}
	}
}

// TestCircuitKeepsTheLevel: on a circuit PaO2 tells the patient's level and
// nothing of the lung; during resuscitation, or from blood that may be the
// circuit's, neither.
func TestCircuitKeepsTheLevel(t *testing.T) {
	on := func(b physio.Blood, c physio.Circumstance) physio.Oxygenation {
		return adultGas(func(s *physio.Sample) { s.Blood, s.Circumstance = b, c; s.Set(physio.FiO2, 0.5) }).Oxygenation
	}
	if o := on(physio.Arterial, physio.ECMO); o.Level != physio.DegreeAdequate || o.Efficiency != physio.EfficiencyUnknown {
		t.Errorf("ECMO: %s, %s", o.Level, o.Efficiency)
	}
	if o := on(physio.Arterial, physio.ECMO|physio.CPR); o.Level != physio.DegreeUnknown {
		t.Errorf("CPR: %s", o.Level)
	}
	if o := on(physio.BloodUnstated, physio.ECMO); o.Level != physio.DegreeUnknown {
		t.Errorf("a gas that may be the circuit's: %s", o.Level)
	}
}

// TestAttackIsBorderlineOnlyNearTheCut: a raised PaCO2 in asthma is a near-fatal
// feature (BTS/SIGN 158, 2019, from memory), borderline only where a repeat
// could lie on the other side (Mallat 2015).
func TestAttackIsBorderlineOnlyNearTheCut(t *testing.T) {
	for pco2, want := range map[float64]bool{46: true, 52: false, 60: false, 95: false} {
		s := gas(physio.PHq, 7.40, physio.PaCO2, pco2)
		s.Circumstance = physio.AsthmaAttack
		v := assess(s).Ventilation
		if v.Level != physio.LevelHypoventilation || v.Borderline != want || v.ChronicPattern || v.AtUsual {
			t.Errorf("PaCO2 %v: %+v", pco2, v)
		}
	}
}

// TestSaturationOfWhatIsLeft: SaO2 98 % beside COHb 30 % is more than the whole,
// so it is 98 % of the 70 % that is left (Dijkhuizen 1977); SaO2 68 % is not.
func TestSaturationOfWhatIsLeft(t *testing.T) {
	for sao2, want := range map[float64]float64{0.98: 0.686, 0.68: 0.68} {
		a := adultGas(func(s *physio.Sample) { s.Set(physio.SaO2, sao2); s.Set(physio.COHb, 0.30) })
		if o := a.Oxygenation; math.Abs(o.Saturation.Value-want) > 0.001 || o.Level != physio.DegreeSevere {
			t.Errorf("SaO2 %v: %v, %s", sao2, o.Saturation.Value, o.Level)
		}
	}
}

// TestContentOfWhatIsLeft: COHb takes its part of the oxygen content too.
func TestContentOfWhatIsLeft(t *testing.T) {
	content := func(co float64) float64 {
		a := adultGas(func(s *physio.Sample) { s.Set(physio.Hb, 15); s.Set(physio.COHb, co) })
		ix, _ := a.Index("cao2")
		return ix.Value
	}
	dissolved := 0.0031 * 90 // mL/dL: oxygenation sheet, section 8
	if got, want := content(0.30)-dissolved, 0.70*(content(0)-dissolved); math.Abs(got-want) > 0.05 {
		t.Errorf("bound oxygen with COHb 30 %%: %.2f, want %.2f mL/dL", got, want)
	}
}
