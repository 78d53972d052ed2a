package physio

import (
	"math"
	"testing"
)

// VT 450 with a dead space of 200 from PaCO2 60 to 45 needs 533 mL, not the 600
// of the minute-volume rule (PaCO2 x VA constant, by hand).
func TestBreathForATarget(t *testing.T) {
	iv, err := BreathFor(Breathing{Breath: 450, Dead: 200, Rate: 20}, Aim{Now: 60, Target: 45})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "fixed dead space", iv.Low, 533.3, 0.1)
	near(t, "scaled dead space", iv.High, 600, 1e-9)
}

func TestSettingsRoundTrip(t *testing.T) {
	now := Breathing{Breath: 450, Dead: 150, Rate: 20}
	rate, err := RateFor(now.Rate, Aim{Now: 60, Target: 45})
	if err != nil {
		t.Fatal(err)
	}
	next := now
	next.Rate = rate
	after, err := PaCO2After(60, Change{Now: now, Next: next})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "PaCO2 by rate", after.Value, 45, 1e-9)
	near(t, "bracket of a change of rate", after.High-after.Low, 0, 1e-9)

	breath, _ := BreathFor(now, Aim{Now: 60, Target: 45})
	next = now
	next.Breath = Volume(breath.Low)
	after, err = PaCO2After(60, Change{Now: now, Next: next})
	if err != nil || math.Abs(after.Low-45) > 1e-9 {
		t.Errorf("PaCO2 by breath = %v, %v", after, err)
	}
	if _, err := PaCO2After(60, Change{Now: now, Next: Breathing{Breath: 120, Rate: 30}}); err == nil {
		t.Error("a breath below the dead space gives a PaCO2")
	}
}

// A CO2 output of 200 mL/min at an alveolar ventilation of 4.3 L/min keeps a
// PaCO2 of 40 (Martin, four equations).
func TestAlveolarVentilationEquation(t *testing.T) {
	paco2, err := PaCO2FromOutput(200, 4.315)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "PaCO2", paco2.MmHg(), 40, 0.01)
	va, err := AlveolarVentilationFor(200, paco2)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "VA", float64(va), 4.315, 1e-9)
}

func TestMixedExpiredAboveArterial(t *testing.T) {
	if v, err := DeadSpaceFraction(DeadSpaceGas{PaCO2: 40, PeCO2: 40}); err == nil || v != 0 {
		t.Errorf("an expired PCO2 as high as the arterial one gives %v, %v", v, err)
	}
}

// End-tidal above arterial is seen in pregnancy and exercise: a number, not an
// error.
func TestEndTidalAboveArterial(t *testing.T) {
	gap, err := EndTidalGap(EndTidal{PaCO2: 32, EtCO2: 34})
	if err != nil || gap != -2 {
		t.Errorf("gap %v, %v", gap, err)
	}
	fraction, err := AlveolarDeadFraction(EndTidal{PaCO2: 32, EtCO2: 34})
	if err != nil || fraction >= 0 {
		t.Errorf("fraction %v, %v", fraction, err)
	}
}

// Adults 2.2 mL/kg, infants more than 3 (Numa and Newth 1996); the two parts
// meet at six years within 0.05 mL/kg.
func TestAnatomicalDeadSpaceByAge(t *testing.T) {
	adult, err := AnatomicalDeadSpace(70, 40)
	if err != nil || adult != 154 {
		t.Errorf("adult %v, %v", adult, err)
	}
	infant, err := AnatomicalDeadSpace(5, 0.2)
	if err != nil || infant < 3*5 {
		t.Errorf("infant %v, %v", infant, err)
	}
	below, _ := AnatomicalDeadSpace(20, 5.999)
	above, _ := AnatomicalDeadSpace(20, 6)
	near(t, "at six years", float64(below), float64(above), 20*0.05)
	if above != 44 {
		t.Errorf("20 kg at six years: %v, want 2.2 mL/kg", above)
	}
}

// The first minute of a closed airway raises PaCO2 by 12, each later one by 3.4
// (Stock 1989).
func TestApnoeaRise(t *testing.T) {
	for minutes, want := range map[float64]float64{0: 0, 0.5: 6, 1: 12, 3: 18.8} {
		rise, err := ApnoeaRise(minutes)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "rise", rise.MmHg(), want, 1e-9)
	}
}

// A passive breath of 450 mL, rate 20, peak 30, plateau 25, PEEP 10: driving
// pressure 15, compliance 30, power 0.098 x 9 x 22.5 = 19.8 J/min (Gattinoni
// 2016, by hand).
func TestMechanicsOfOneBreath(t *testing.T) {
	b, p := Breathing{Breath: 450, Rate: 20}, Inflation{Plateau: 25, Peak: 30, TotalPEEP: 10}
	driving, err := DrivingPressure(p)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "driving pressure", float64(driving), 15, 0)
	compliance, err := StaticCompliance(b.Breath, p)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "compliance", compliance, 30, 1e-9)
	dynamic, err := DynamicCharacteristic(b.Breath, p)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "dynamic characteristic", dynamic, 22.5, 1e-9)
	power, err := PowerVolumeControl(b, p)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "power", power, 19.845, 1e-9)
	sum, err := PressureAndRate(p, b.Rate)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "4 x pressure + rate", sum, 80, 1e-9)
	// The surrogate with a flow of 60 L/min: 9 x (30 + 10 + 10)/20 = 22.5; its
	// paper allows a few J/min.
	surrogate, err := PowerSurrogate(SurrogateInflation{Minute: 9, Inspired: 60, Peak: 30, PEEP: 10})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "surrogate", surrogate, 22.5, 1e-9)
	near(t, "surrogate against power", surrogate, power, 3)
	pressure, err := PowerPressureControl(b, PressureSteps{PEEP: 10, AbovePEEP: 15})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "pressure control", pressure, 22.05, 1e-9)
}

func TestPlateauMustExceedPEEP(t *testing.T) {
	if v, err := StaticCompliance(450, Inflation{Plateau: 10, TotalPEEP: 10}); err == nil || v != 0 {
		t.Errorf("no driving pressure gives a compliance of %v, %v", v, err)
	}
	if _, err := DynamicCharacteristic(450, Inflation{Peak: 10, TotalPEEP: 10}); err == nil {
		t.Error("no peak above PEEP passes")
	}
	if _, err := PowerVolumeControl(Breathing{Breath: 450, Rate: 20}, Inflation{Plateau: 25, Peak: 20, TotalPEEP: 5}); err == nil {
		t.Error("a peak below the plateau passes")
	}
}

// The two printed forms differ by 0.2 % at 190 cm; without a sex there is no
// predicted weight (ARDS Network 2000).
func TestPredictedWeight(t *testing.T) {
	cm, err := PredictedWeight(Male, 190)
	if err != nil {
		t.Fatal(err)
	}
	inches, err := PredictedWeightInches(Male, 190)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "forms", float64(cm), float64(inches), 0.2)
	if v, err := PredictedWeight(SexUnstated, 170); err == nil || v != 0 {
		t.Errorf("no sex gives %v, %v", v, err)
	}
	perKg, err := VolumePerWeight(420, 70)
	if err != nil || perKg != 6 {
		t.Errorf("420 mL at 70 kg: %v, %v", perKg, err)
	}
}

// Rate 30 with 300 mL is 100/min/L (Yang and Tobin 1991); 300 typed as litres
// is refused.
func TestBreathingIndex(t *testing.T) {
	v, err := BreathingIndex(30, 300)
	if err != nil || math.Abs(v-100) > 1e-9 {
		t.Errorf("BreathingIndex(30, 300) = %v, %v", v, err)
	}
	if _, err := BreathingIndex(30, 0.3); err == nil {
		t.Error("0.3 mL passes")
	}
}

func TestGapWithPotassiumAndChlorideRatio(t *testing.T) {
	i := Ions{Na: 140, K: 4, Cl: 105, HCO3: 24}
	gap, err := AnionGapK(i)
	if err != nil || gap != 15 {
		t.Errorf("AnionGapK = %v, %v", gap, err)
	}
	ratio, err := ChlorideRatio(i)
	if err != nil || ratio != 0.75 {
		t.Errorf("ChlorideRatio = %v, %v", ratio, err)
	}
	corrected, err := CorrectedGap(11, AlbuminLevel{Measured: 20})
	if err != nil || corrected != 16 {
		t.Errorf("CorrectedGap = %v, %v", corrected, err)
	}
	if v, err := DeltaRatio(Delta{Gap: 20, HCO3: 24}); err == nil || v != 0 {
		t.Errorf("no fall of bicarbonate gives a ratio of %v, %v", v, err)
	}
}

// The parts of a base excess add up to it (Story 2004).
func TestPartitionAddsUp(t *testing.T) {
	part, err := PartitionBE(-12, Plasma{Ions: Ions{Na: 133, Cl: 110}, AlbuminGL: 22, Lactate: 5})
	if err != nil {
		t.Fatal(err)
	}
	sum := part.SodiumChloride + part.Albumin + part.Lactate + part.Other
	near(t, "sum", float64(sum), -12, 1e-9)
	near(t, "other", float64(part.Other), 2, 1e-9)
}
