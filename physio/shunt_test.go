package physio

import (
	"errors"
	"math"
	"testing"
)

// isoShunt holds PaO2 in mmHg by FiO2 for a fixed shunt: haemoglobin 15, PaCO2
// 40, arteriovenous difference 5, sea level, worked out apart from this package
// with the curve of Severinghaus 1979 (after Benatar 1973).
var isoShunt = map[float64]map[Fraction]float64{
	0.05: {0.21: 88, 0.28: 117, 0.40: 173},
	0.10: {0.21: 78, 0.24: 87, 0.28: 96, 0.35: 112, 0.40: 125, 0.50: 162, 0.60: 217},
	0.20: {0.21: 64, 0.24: 69, 0.28: 72, 0.35: 78, 0.40: 82, 0.50: 92, 0.60: 105, 0.80: 160, 1: 276},
	0.30: {0.21: 55, 0.28: 59, 0.40: 63, 0.50: 67, 0.60: 71, 0.80: 83, 1: 106},
	0.40: {0.21: 47, 0.28: 49, 0.40: 52, 0.60: 55, 0.80: 60, 1: 66},
	0.50: {0.21: 39, 0.40: 42, 0.60: 45, 1: 50},
}

func lung(fio2 Fraction, pao2 float64) LungGas {
	return LungGas{Gas: AlveolarGas{FiO2: fio2, PB: 760, PaCO2: 40}, PaO2: MmHg(pao2), Shift: CurveShift{PH: 7.40}}
}

func TestShuntOfIsoShuntLines(t *testing.T) {
	const within = 0.025 // the curves part by 0.3 points of saturation
	for want, line := range isoShunt {
		for fio2, pao2 := range line {
			got, err := ShuntFromGas(lung(fio2, pao2))
			if err != nil || math.Abs(float64(got)-want) > within {
				t.Errorf("ShuntFromGas(FiO2 %v, PaO2 %v) = %.3f, %v; line %v", fio2, pao2, got, err, want)
			}
		}
	}
}

// Fixed shunt and fixed a/A from one gas to another FiO2 at PaCO2 40, worked out
// apart from this package with the curve of Severinghaus 1979.
func TestPaO2AtAnotherFiO2(t *testing.T) {
	for _, c := range []struct {
		from         Fraction
		pao2         float64
		to           Fraction
		shunt, ratio float64
	}{
		{0.40, 60, 0.80, 75, 133},
		{0.21, 50, 0.35, 55, 100},
		{0.50, 80, 1.0, 191, 173},
		{0.40, 100, 0.21, 71, 43},
	} {
		got, err := PaO2AtFiO2(lung(c.from, c.pao2), c.to)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "fixed shunt", got.FixedShunt.MmHg(), c.shunt, 0.06*c.shunt)
		near(t, "fixed a/A", got.FixedRatio.MmHg(), c.ratio, 1)
	}
}

func TestBracketOfAnAdequatePaO2OnMuchOxygen(t *testing.T) {
	got, err := PaO2AtFiO2(lung(0.60, 95), 0.40)
	if err != nil {
		t.Fatal(err)
	}
	iv := got.Interval()
	near(t, "low", iv.Low, 59, 1.5) // a/A: 95 x 239.2/383.8
	near(t, "high", iv.High, 77, 2)
	near(t, "middle", iv.Value, (iv.Low+iv.High)/2, 1e-9)
}

func TestSameFiO2GivesTheSamePaO2(t *testing.T) {
	for _, pao2 := range []float64{45, 60, 80, 120, 200} {
		got, err := PaO2AtFiO2(lung(0.5, pao2), 0.5)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "fixed shunt", got.FixedShunt.MmHg(), pao2, 1e-6*pao2)
		near(t, "fixed a/A", got.FixedRatio.MmHg(), pao2, 1e-9)
	}
}

func TestMoreOxygenNeverLowersPaO2(t *testing.T) {
	var last PaO2Bracket
	for fio2 := Fraction(0.21); fio2 <= 1; fio2 += 0.05 {
		got, err := PaO2AtFiO2(lung(0.4, 65), fio2)
		if err != nil || got.FixedShunt <= last.FixedShunt || got.FixedRatio <= last.FixedRatio {
			t.Fatalf("FiO2 %v: %+v after %+v, %v", fio2, got, last, err)
		}
		last = got
	}
}

// An assumed difference of 3.5 in place of 5 takes the same fall of content for
// a larger shunt (Harrison 1975 found 3.5 in ventilated patients).
func TestAssumedDifferenceMovesTheShunt(t *testing.T) {
	g := lung(0.5, 80)
	healthy, _ := ShuntFromGas(g)
	g.Difference = DifferenceICU
	icu, err := ShuntFromGas(g)
	if err != nil || icu <= healthy {
		t.Errorf("shunt %v at 3.5, %v at 5, %v", icu, healthy, err)
	}
	// 3.5 with contents of 18.088 and 15.936 is 38 % (college respiratory-care
	// problem); 100 mmHg on pure oxygen are 5 % by the rule of thumb.
	s, err := EstimatedShunt(Contents{Capillary: 18.088, Arterial: 15.936}, DifferenceICU)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "estimated", s.Percent(), 38.1, 0.1)
	rule, err := ShuntRuleOfThumb(100)
	if err != nil || rule.Percent() != 5 {
		t.Errorf("rule of thumb: %v, %v", rule, err)
	}
	g.SaO2 = 0.90 // measured below the curve: more shunt still
	measured, err := ShuntFromGas(g)
	if err != nil || measured <= icu {
		t.Errorf("shunt %v with SaO2 0.90, %v without, %v", measured, icu, err)
	}
}

func TestArterialAboveAlveolar(t *testing.T) {
	noisy, err := ShuntFromGas(lung(0.21, 104)) // 2 mmHg above the alveolar 101.8
	if err != nil || noisy != 0 {
		t.Errorf("noise gives %v, %v", noisy, err)
	}
	var out *RangeError
	if _, err := ShuntFromGas(lung(0.21, 130)); !errors.As(err, &out) || out.Quantity != PaO2 {
		t.Errorf("PaO2 130 on air gives %v", err)
	}
}

func TestFiO2ForAPaO2(t *testing.T) {
	known := lung(0.4, 60)
	need, err := FiO2ForPaO2(known, 70)
	if err != nil || need.Low <= 0.4 || need.High > 1 || need.Low > need.High {
		t.Fatalf("FiO2ForPaO2(70) = %v, %v", need, err)
	}
	easy, _ := PaO2AtFiO2(known, Fraction(need.Low))
	hard, _ := PaO2AtFiO2(known, Fraction(need.High))
	near(t, "easier model", easy.Interval().High, 70, 1e-6)
	near(t, "harder model", hard.Interval().Low, 70, 1e-6)
	var out *RangeError
	if _, err := FiO2ForPaO2(known, 300); !errors.As(err, &out) || out.High > 120 {
		t.Errorf("a PaO2 that the shunt does not allow gives %v", err)
	}
}
