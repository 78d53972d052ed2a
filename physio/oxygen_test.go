package physio

import (
	"errors"
	"math"
	"testing"
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s = %v, want %v within %v", what, got, want, tolerance)
	}
}

// The full form is above the short one by PaCO2 x FiO2 x (1 - R)/R: 2.1 mmHg on
// air and 10 on pure oxygen at PaCO2 40 (Fenn, Rahn, Otis 1946, by algebra).
func TestFullAgainstShortAlveolarEquation(t *testing.T) {
	for fio2, want := range map[Fraction]float64{0.21: 2.1, 0.30: 3, 0.40: 4, 0.50: 5, 0.60: 6, 1: 10} {
		g := AlveolarGas{FiO2: fio2, PB: 760, PaCO2: 40}
		full, err := AlveolarPO2(g)
		if err != nil {
			t.Fatal(err)
		}
		short, err := AlveolarPO2Short(g)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "full - short", (full - short).MmHg(), want, 1e-9)
	}
}

// On air PAO2 at PaCO2 40 is 96.2, 101.8 and 109.7 for R 0.7, 0.8 and 1.0; on
// pure oxygen R cancels out (Fenn, Rahn, Otis 1946, by algebra).
func TestExchangeRatioMatters(t *testing.T) {
	for r, want := range map[float64]float64{0.7: 96.2, 0.8: 101.8, 1.0: 109.7} {
		air, _ := AlveolarPO2(AlveolarGas{FiO2: 0.21, PB: 760, PaCO2: 40, R: r})
		near(t, "PAO2 on air", air.MmHg(), want, 0.05)
		pure, _ := AlveolarPO2(AlveolarGas{FiO2: 1, PB: 760, PaCO2: 40, R: r})
		near(t, "PAO2 on oxygen", pure.MmHg(), 673, 1e-9)
	}
}

func TestFeverLowersInspiredPO2(t *testing.T) {
	warm, err := InspiredPO2(AlveolarGas{FiO2: 0.21, PB: 760, Temp: 40})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "PIO2 at 40 C", warm.MmHg(), 0.21*(760-55.4), 0.02) // CRC Handbook: 55.4 mmHg
}

func TestNoAlveolarPO2BelowZero(t *testing.T) {
	var out *RangeError
	if v, err := AlveolarPO2(AlveolarGas{FiO2: 0.21, PB: 400, PaCO2: 90}); !errors.As(err, &out) || v != 0 {
		t.Errorf("PaCO2 90 at 400 mmHg gives %v, %v", v, err)
	}
	if _, err := PaO2AtFiO2(LungGas{Gas: AlveolarGas{FiO2: 1, PB: 300, PaCO2: 150}, PaO2: 60}, 0.21); !errors.As(err, &out) {
		t.Errorf("air at 300 mmHg and PaCO2 150 gives %v", err)
	}
}

func TestPressureChoice(t *testing.T) {
	for _, c := range []struct {
		known  PressureKnown
		want   float64
		source PressureSource
	}{
		{PressureKnown{Measured: 640, House: 650, Altitude: 1500}, 640, PressureMeasured},
		{PressureKnown{House: 650, Altitude: 1500}, 650, PressureHouse},
		{PressureKnown{Altitude: 1500}, 641, PressureAltitude}, // West 1996
		{PressureKnown{Altitude: -400}, 795, PressureAltitude}, // Dead Sea, about 800 in common practice
		{PressureKnown{Altitude: 49}, 760, PressureAssumed},
		{PressureKnown{Altitude: 51}, 755, PressureAltitude},
		{PressureKnown{}, 760, PressureAssumed},
	} {
		got, source, err := BarometricPressure(c.known)
		if err != nil || source != c.source {
			t.Errorf("%+v: %v, %v", c.known, source, err)
		}
		near(t, "pressure", got.MmHg(), c.want, 3)
	}
	if _, _, err := BarometricPressure(PressureKnown{Measured: 76}); err == nil {
		t.Error("a pressure of 76 passes")
	}
}

// At 1500 m air is worth 0.175 at sea level: 0.21 x (641 - 47)/713.
func TestEquivalentFiO2(t *testing.T) {
	got, err := EquivalentFiO2(AlveolarGas{FiO2: 0.21, PB: 641})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "equivalent FiO2", float64(got), 0.175, 0.0005)
}

// The two published lines at 20, 40, 60 and 80 years: age/4 + 4 and 2.5 + 0.21
// age (Mellemgaard 1966).
func TestExpectedDifferenceByAge(t *testing.T) {
	for age, want := range map[Years]Span{20: {6.7, 9}, 40: {10.9, 14}, 60: {15.1, 19}, 80: {19.3, 24}} {
		band, highland, err := ExpectedAA(age, 0.21, 760)
		if err != nil || highland {
			t.Errorf("ExpectedAA(%v): highland %v, %v", age, highland, err)
		}
		near(t, "low", band.Low, want.Low, 1e-9)
		near(t, "high", band.High, want.High, 1e-9)
	}
	if _, _, err := ExpectedAA(40, 0.28, 760); err == nil {
		t.Error("the age line passes on 28 %")
	}
	if _, highland, _ := ExpectedAA(40, 0.21, 570); !highland {
		t.Error("570 mmHg is not marked as highland")
	}
}

// Age 70: 85.3 sitting (Mellemgaard 1966), 78.9 mixed (Marshall and Whyche),
// and no further fall from 75 on (Cerveri 1995).
func TestPredictedPaO2(t *testing.T) {
	sitting, _ := PredictedPaO2Sitting(70)
	near(t, "sitting", sitting.MmHg(), 85.3, 0.001)
	mixed, _ := PredictedPaO2Mixed(70)
	near(t, "mixed", mixed.MmHg(), 78.9, 0.001)
	at75, _ := ExpectedPaO2(75)
	at95, _ := ExpectedPaO2(95)
	if at75 != at95 {
		t.Errorf("expected PaO2 still falls: %v at 75, %v at 95", at75, at95)
	}
	near(t, "lower limit of the old", at95.Low, 68.4, 1.5) // Cerveri 1995: 5th centile
	old, _ := PredictedPaO2Seated(BuildAndPaCO2{Age: 80, BMI: 25, PaCO2: 38})
	near(t, "seated at 80", old.MmHg(), 83.4, 0)
	if _, err := PredictedPaO2Sitting(18); err != nil {
		t.Errorf("18 years: %v", err)
	}
	if _, err := PredictedPaO2Sitting(17); err == nil {
		t.Error("17 years pass on an adult's line")
	}
}

// On 40 % oxygen with PaCO2 72 a healthy lung has about 150 mmHg (0.75 of the
// alveolar 202). On air the difference at 60 years is at most 19.
func TestHealthyPaO2(t *testing.T) {
	on40, err := HealthyPaO2(AlveolarGas{FiO2: 0.40, PB: 760, PaCO2: 72}, 0)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "on 40 %", on40.Value, 151.8, 0.1)
	near(t, "at best", on40.High, 0.82*202.4, 0.1)
	air, _ := HealthyPaO2(AlveolarGas{FiO2: 0.21, PB: 760, PaCO2: 40}, 60)
	near(t, "on air", air.Low, 101.83-19, 0.001)
	unknown, _ := HealthyPaO2(AlveolarGas{FiO2: 0.21, PB: 760, PaCO2: 40}, 0)
	if unknown.Low >= air.Low || unknown.High <= air.High {
		t.Errorf("unknown age %v does not contain 60 years %v", unknown, air)
	}
	near(t, "unknown age, as at 70", unknown.Low, 101.83-21.5, 0.001)
	near(t, "unknown age, as at 20", unknown.High, 101.83-6.7, 0.001)
}

// S/F above SpO2 97 % and the saturation index are not defined; ROX is.
func TestOximetryCeiling(t *testing.T) {
	p := PulseOnOxygen{SpO2: 0.98, FiO2: 0.4}
	var out *RangeError
	if _, err := SFRatio(p); !errors.As(err, &out) || out.Quantity != SpO2 {
		t.Errorf("S/F at 98 %%: %v", err)
	}
	if _, err := OxygenSaturationIndex(p, 12); !errors.As(err, &out) {
		t.Errorf("OSI at 98 %%: %v", err)
	}
	if _, err := ROX(p, 20); err != nil {
		t.Errorf("ROX at 98 %%: %v", err)
	}
	if v, err := SFRatio(PulseOnOxygen{0.97, 0.4}); err != nil || math.Abs(v-242.5) > 1e-9 {
		t.Errorf("S/F at the ceiling: %v, %v", v, err)
	}
}

func TestRiceLineBothWays(t *testing.T) {
	for _, pf := range []Pressure{80, 100, 200, 300, 450} {
		sf, err := SFFromPF(pf)
		if err != nil {
			t.Fatal(err)
		}
		back, err := PFFromSF(sf)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "P/F", back.MmHg(), pf.MmHg(), 1e-9)
	}
}

// a/A 0.75 is a respiratory index of 0.33, whichever way it is reached.
func TestRatioAndIndexAreOneThing(t *testing.T) {
	tensions := Tensions{Alveolar: 100, Arterial: 75}
	ratio, _ := ArterialAlveolarRatio(tensions)
	index, _ := RespiratoryIndex(tensions)
	same, _ := RespiratoryIndexFromRatio(ratio)
	near(t, "a/A", ratio, 0.75, 1e-12)
	near(t, "index", index, 1.0/3, 1e-12)
	near(t, "index from ratio", same, index, 1e-12)
}

// Hb 15, 97 %: 1.39 with the fractional saturation and 1.34 with the functional
// one differ by 0.73 mL/dL when they are confused (common practice). With the
// dyshaemoglobin taken off they come together.
func TestContentWithAndWithoutCooximetry(t *testing.T) {
	plain, err := OxygenContent(BloodOxygen{Hb: 15, SO2: 0.97, PO2: 90})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "functional", float64(plain), 1.34*15*0.97+0.279, 1e-9)
	measured, err := OxygenContent(BloodOxygen{Hb: 15, SO2: 0.97, PO2: 90, COHb: 0.02, MetHb: 0.01, Cooximetry: true})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "fractional", float64(measured), 1.39*15*0.97*0.97+0.279, 1e-9)
	poisoned, _ := OxygenContent(BloodOxygen{Hb: 15, SO2: 0.97, PO2: 90, COHb: 0.3, Cooximetry: true})
	if poisoned > 0.75*measured {
		t.Errorf("30 %% COHb leaves %v of %v", poisoned, measured)
	}
	if _, err := OxygenContent(BloodOxygen{Hb: 15, SO2: 0.97, PO2: 90, COHb: 0.6, MetHb: 0.6}); err == nil {
		t.Error("more dyshaemoglobin than haemoglobin passes")
	}
}

func TestVenousAboveCapillaryIsRefused(t *testing.T) {
	var out *RangeError
	for _, c := range []Contents{{Capillary: 14, Arterial: 15, Venous: 14.5}, {Capillary: 20, Arterial: 14, Venous: 15}} {
		if v, err := Shunt(c); !errors.As(err, &out) || v != 0 {
			t.Errorf("Shunt(%+v) = %v, %v", c, v, err)
		}
	}
}

func TestErrorsNameWhatIsMissing(t *testing.T) {
	_, err := AlveolarPO2(AlveolarGas{PB: 760})
	var missing *MissingError
	if !errors.As(err, &missing) || len(missing.Need) != 2 || missing.Need[0] != FiO2 || missing.Need[1] != PaCO2 {
		t.Fatalf("AlveolarPO2 without FiO2 and PaCO2 gives %v", err)
	}
	if got := err.Error(); got != "physio: needs FiO2, PaCO2" {
		t.Errorf("MissingError reads %q", got)
	}
	_, err = PFRatio(90, 21)
	if got := err.Error(); got != "physio: FiO2 21 is outside 0.15 to 1" {
		t.Errorf("RangeError reads %q", got)
	}
	_, err = EstimatedShunt(Contents{Capillary: 20, Arterial: 19}, 50)
	if got := err.Error(); got != "physio: arteriovenous difference 50 is outside 1 to 12" {
		t.Errorf("RangeError of an input without a Quantity reads %q", got)
	}
}

// Formulas on one point stay off the heap: they run in loops of fits and plots.
func TestPointFormulasDoNotAllocate(t *testing.T) {
	g := ordinaryLung()
	for name, f := range map[string]func(){
		"Bicarbonate":    func() { _, _ = Bicarbonate(7.4, 40) },
		"PHAtPCO2":       func() { _, _ = PHAtPCO2(0, 60) },
		"AlveolarPO2":    func() { _, _ = AlveolarPO2(g.Gas) },
		"Saturation":     func() { _, _ = Saturation(60, CurveShift{COHb: 0.1}) },
		"PO2At":          func() { _, _ = PO2At(0.8, CurveShift{PH: 7.2}) },
		"PaO2AtFiO2":     func() { _, _ = PaO2AtFiO2(g, 0.6) },
		"InspiredOxygen": func() { _, _, _ = InspiredOxygen(OxygenSupply{Device: Cannula, Flow: 2}) },
	} {
		if n := testing.AllocsPerRun(50, f); n != 0 {
			t.Errorf("%s allocates %v times", name, n)
		}
	}
}
