package physio

import (
	"errors"
	"math"
	"testing"
)

// standardCurve is the standard human curve at 37 C and pH 7.40, PO2 in mmHg
// against saturation in percent (Severinghaus 1979, table 1).
var standardCurve = []struct{ po2, sat float64 }{
	{1, 0.60}, {2, 1.19}, {4, 2.56}, {6, 4.37}, {8, 6.68}, {10, 9.58}, {12, 12.96}, {14, 16.89}, {16, 21.40}, {18, 26.50},
	{20, 32.12}, {22, 37.60}, {24, 43.14}, {26, 48.27}, {28, 53.16}, {30, 57.54}, {32, 61.69}, {34, 65.16}, {36, 68.63},
	{38, 71.94}, {40, 74.69}, {42, 77.29}, {44, 79.55}, {46, 81.71}, {48, 83.52}, {50, 85.08}, {52, 86.59}, {54, 87.70},
	{56, 88.93}, {58, 89.95}, {60, 90.85}, {65, 92.73}, {70, 94.06}, {75, 95.10}, {80, 95.84}, {85, 96.42}, {90, 96.88},
	{95, 97.25}, {100, 97.49}, {110, 97.91}, {120, 98.21}, {130, 98.44}, {140, 98.62}, {150, 98.77}, {175, 99.03},
	{200, 99.20}, {225, 99.32}, {250, 99.41}, {300, 99.53}, {400, 99.65}, {500, 99.72},
}

func TestCurveHoldsAtBothEnds(t *testing.T) {
	const worst = 0.43 // percentage points; eq 1 of Severinghaus is 0.55 off, Kelman 2.2
	for _, p := range standardCurve {
		got, err := Saturation(MmHg(p.po2), CurveShift{})
		if err != nil || math.Abs(got.Percent()-p.sat) > worst {
			t.Errorf("Saturation(%v mmHg) = %.2f %%, %v; table %.2f", p.po2, got.Percent(), err, p.sat)
		}
	}
}

func TestReferenceCurvesAgainstTheTable(t *testing.T) {
	for _, p := range standardCurve {
		if got, err := SaturationSeveringhaus(MmHg(p.po2)); err != nil || math.Abs(got.Percent()-p.sat) > 0.56 {
			t.Errorf("SaturationSeveringhaus(%v) = %v, %v; table %v", p.po2, got.Percent(), err, p.sat)
		}
		siggaard, err := Siggaard1984{PO2: MmHg(p.po2), DPG: 5}.Saturation()
		if err != nil || math.Abs(siggaard.Percent()-p.sat) > 0.43 {
			t.Errorf("Siggaard1984(%v) = %v, %v; table %v", p.po2, siggaard.Percent(), err, p.sat)
		}
		if p.po2 < 50 {
			continue
		}
		if got, err := SaturationKelman(MmHg(p.po2), CurveShift{}); err != nil || math.Abs(got.Percent()-p.sat) > 0.3 {
			t.Errorf("SaturationKelman(%v) = %v, %v; table %v", p.po2, got.Percent(), err, p.sat)
		}
	}
}

// PaO2 for a saturation at pH 7.3, 7.4 and 7.5, from a printed table that names
// no author (common practice).
func TestCurveShiftsWithPH(t *testing.T) {
	const within = 3.0 // mmHg
	for _, row := range []struct{ sat, at73, at74, at75 float64 }{
		{95, 82, 74, 68}, {90, 63, 58, 53}, {80, 49, 45, 41},
	} {
		for ph, want := range map[PH]float64{7.3: row.at73, 7.4: row.at74, 7.5: row.at75} {
			got, err := PO2At(Percent(row.sat), CurveShift{PH: ph})
			if err != nil || math.Abs(got.MmHg()-want) > within {
				t.Errorf("PO2At(%v %%, pH %v) = %v, %v; table %v", row.sat, ph, got, err, want)
			}
		}
	}
}

// The slope at constant saturation is 5.7 % a degree (Kelman 1966: 0.024 log10).
func TestCurveShiftsWithTemperature(t *testing.T) {
	cold, _ := PO2At(0.5, CurveShift{Temp: 33})
	warm, _ := PO2At(0.5, CurveShift{Temp: 34})
	if perDegree := float64(warm/cold) - 1; math.Abs(perDegree-0.057) > 0.003 {
		t.Errorf("P50 moves %.3f a degree, want 0.057", perDegree)
	}
}

// Two gases of severe acidosis: about 82 % and about 50 % (worked by hand on
// the curves of Severinghaus 1979 and Kelman 1966).
func TestSaturationInSevereAcidosis(t *testing.T) {
	for _, c := range []struct {
		po2  Pressure
		at   CurveShift
		want float64
	}{
		{54, CurveShift{PH: 7.27, PaCO2: 72}, 82},
		{40, CurveShift{PH: 7.05, PaCO2: 95}, 50},
	} {
		got, err := Saturation(c.po2, c.at)
		if err != nil || math.Abs(got.Percent()-c.want) > 1.5 {
			t.Errorf("Saturation(%v, %+v) = %.1f %%, %v; want about %v", c.po2, c.at, got.Percent(), err, c.want)
		}
	}
}

func TestCurveRisesEverywhere(t *testing.T) {
	for _, at := range shifts() {
		last := Fraction(-1)
		for p := 0.5; p < 2000; p *= 1.15 {
			s, err := Saturation(MmHg(p), at)
			if err != nil || s <= last || s > 1 {
				t.Fatalf("%+v: %v mmHg gives %v after %v, %v", at, p, s, last, err)
			}
			last = s
		}
	}
}

func TestCurveInverse(t *testing.T) {
	for _, at := range shifts() {
		for sat := Fraction(0.02); sat <= SaturationCeiling; sat += 0.05 {
			p, err := PO2At(sat, at)
			if err != nil {
				t.Fatal(err)
			}
			if back := saturation(p.MmHg(), at); math.Abs(back-float64(sat)) > 1e-9 {
				t.Errorf("%+v: %v comes back as %v", at, sat, back)
			}
		}
	}
}

func shifts() []CurveShift {
	var all []CurveShift
	for _, ph := range []PH{6.8, 7.4, 7.7} {
		for _, pco2 := range []Pressure{15, 40, 120} {
			for _, co := range []Fraction{0, 0.05, 0.4} {
				all = append(all, CurveShift{PH: ph, PaCO2: pco2, COHb: co, MetHb: 0.02})
			}
		}
	}
	return append(all, CurveShift{}, CurveShift{Temp: 30}, CurveShift{Temp: 41})
}

// Carbon monoxide moves the curve of the haemoglobin left over to the left
// (Roughton and Darling 1944), and so does methaemoglobin (Darling 1942).
func TestDyshaemoglobinsShiftToTheLeft(t *testing.T) {
	plain, _ := P50(CurveShift{})
	for _, at := range []CurveShift{{COHb: 0.1}, {COHb: 0.3}, {MetHb: 0.1}, {MetHb: 0.3}} {
		p50, err := P50(at)
		if err != nil || p50 >= plain {
			t.Errorf("P50(%+v) = %v, %v; want below %v", at, p50, err, plain)
		}
	}
	// A little CO changes little: the two branches meet.
	if d := math.Abs(saturation(40, CurveShift{COHb: 1e-6}) - saturation(40, CurveShift{})); d > 1e-5 {
		t.Errorf("a millionth of COHb moves the saturation by %v", d)
	}
}

// 26.6 mmHg is the usual P50 of adults (common practice); Siggaard-Andersen's
// curve has 26.8.
func TestP50(t *testing.T) {
	p50, err := P50(CurveShift{})
	if err != nil || math.Abs(p50.MmHg()-26.6) > 0.3 {
		t.Errorf("P50 = %v, %v", p50, err)
	}
	// A point of the curve itself gives the curve's P50 back, also shifted.
	at := CurveShift{PH: 7.25, PaCO2: 60}
	own, err := P50FromSample(MmHg(40), Fraction(saturation(40, at)), at)
	if err != nil || math.Abs((own-p50).MmHg()) > 1e-6 {
		t.Errorf("P50FromSample on the curve = %v, %v; want %v", own, err, p50)
	}
	// The same saturation at a higher PO2 is a curve to the right.
	right, err := P50FromSample(MmHg(45), Fraction(saturation(40, at)), at)
	if err != nil || right <= p50 {
		t.Errorf("P50FromSample to the right = %v, %v", right, err)
	}
}

func TestSaturationAboveCeilingIsRefused(t *testing.T) {
	_, err := PO2At(0.98, CurveShift{})
	var out *RangeError
	if !errors.As(err, &out) || out.Quantity != SaO2 || out.High != float64(SaturationCeiling) {
		t.Errorf("PO2At(0.98) gives %v", err)
	}
	if _, err := PO2At(SaturationCeiling, CurveShift{}); err != nil {
		t.Errorf("PO2At(ceiling) gives %v", err)
	}
}

// Kelman's polynomial goes negative near zero: a PO2 that is shifted below 10
// mmHg is refused although it was above.
func TestKelmanRefusesItsLowEnd(t *testing.T) {
	if _, err := SaturationKelman(12, CurveShift{PH: 7.0}); err == nil {
		t.Error("12 mmHg at pH 7.0 passes")
	}
	// 10 kPa gives 95.08 % (value printed beside the coefficients, common practice).
	got, err := SaturationKelman(KPa(10), CurveShift{})
	if err != nil || math.Abs(got.Percent()-95.0795) > 0.001 {
		t.Errorf("SaturationKelman(10 kPa) = %v, %v", got.Percent(), err)
	}
}

// The shifts of each curve by hand: ln 2 x 0.048 for a doubled PaCO2 and 0.07
// for 10 % methaemoglobin (Siggaard-Andersen 1990); 0.024 x -2, 0.40 x -0.2 and
// 0.06 x -0.301 in log10 for 39 C, pH 7.20 and PaCO2 80 (Kelman 1966).
func TestShiftsByHand(t *testing.T) {
	near(t, "PaCO2 80", CurveShift{PaCO2: 80}.standard().shift(), 0.0333, 0.0001)
	near(t, "MetHb 10 %", CurveShift{MetHb: 0.1}.standard().shift(), -0.07, 1e-9)
	near(t, "pH 7.20", CurveShift{PH: 7.20}.standard().shift(), 0.176, 1e-9)
	for name, c := range map[string]struct {
		at   CurveShift
		want float64
	}{
		"39 C":     {CurveShift{Temp: 39}, 35.81},
		"pH 7.20":  {CurveShift{PH: 7.20}, 33.27},
		"PaCO2 80": {CurveShift{PaCO2: 80}, 38.37},
	} {
		near(t, "virtual PO2 at "+name, virtualPO2(40, c.at.standard()), c.want, 0.01)
	}
}

// At the inflexion of the 1984 curve the saturation is 86.7 % whatever moves it:
// pH 7.20, BE -10, DPG 4 and 39 C put it at exp(1.946 + 0.208 - 0.05 - 0.07 +
// 0.11) = 8.53 kPa (Siggaard-Andersen 1984).
func TestSiggaardInflexionMoves(t *testing.T) {
	got, err := Siggaard1984{PO2: KPa(8.5336), PH: 7.20, BE: -10, DPG: 4, Temp: 39}.Saturation()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "saturation", got.Percent(), 86.70, 0.02)
}

func TestReferenceInverses(t *testing.T) {
	for s := Fraction(0.02); s < 0.99; s += 0.03 {
		p, err := PO2Ellis(s)
		if err != nil {
			t.Fatal(err)
		}
		back, err := SaturationSeveringhaus(p)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "saturation through Ellis", float64(back), float64(s), 1e-9)
	}
	// Severinghaus 1979, table 1: 9.58 % at 10 mmHg.
	deep, err := PO2Severinghaus(Percent(9.58))
	if err != nil {
		t.Fatal(err)
	}
	near(t, "eq 2 at its low end", deep.MmHg(), 10, 0.2)
}

// From pH 7.40 to 7.20 the PO2 of half saturation rises to 34.1 mmHg and that
// of 90 % by 1.232 (Severinghaus 1979, eq 4 by hand).
func TestEllisShiftByHand(t *testing.T) {
	half, err := PO2EllisShifted(0.5, CurveShift{PH: 7.20})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "half saturation", half.MmHg(), 34.13, 0.03)
	standard, _ := PO2Ellis(0.9)
	shifted, _ := PO2EllisShifted(0.9, CurveShift{PH: 7.20})
	near(t, "ratio at 90 %", float64(shifted/standard), 1.232, 0.001)
	warm, _ := PO2EllisShifted(0.9, CurveShift{Temp: 39})
	if warm <= standard {
		t.Errorf("39 C moves the curve to the left: %v after %v", warm, standard)
	}
}
