package physio

import (
	"math"
	"testing"
)

func TestReadingsCoverRepeatSamples(t *testing.T) {
	// Smallest real change between two draws: PaCO2 2.06 mmHg, PaO2 9.1 mmHg at
	// about 90 (Mallat 2015). One reading's 95 % half-width is change/sqrt 2.
	co2 := Measured(PaCO2, 40)
	near(t, "PaCO2 half-width", co2.High-co2.Value, 2.06/math.Sqrt2, 0.02)
	o2 := Measured(PaO2, 91)
	near(t, "PaO2 half-width", o2.High-o2.Value, 9.1/math.Sqrt2, 0.05)
	// Above 40 mmHg the relative part, 5.1 % between two draws, takes over.
	high := Measured(PaCO2, 100)
	near(t, "high PaCO2 half-width", high.High-high.Value, 5.1/math.Sqrt2, 0.05)
}

func TestReadingsStayPossible(t *testing.T) {
	for q := range quantityCount {
		info := q.Info()
		for _, v := range []float64{info.Low, info.High, (info.Low + info.High) / 2} {
			in := Measured(q, v)
			if in.Low < info.Low || in.High > info.High || in.Low > v || in.High < v {
				t.Errorf("%s %v reads as %v", info.Key, v, in)
			}
		}
	}
}

// Against the closed form for independent errors: the spread of a sum is the
// root of the squares, and the relative spread of a product as well.
func TestPropagateAgainstClosedForms(t *testing.T) {
	a, b := reading(10, 7, 13), reading(20, 16, 24)
	sum := propagate(func(x []float64) float64 { return x[0] + x[1] }, []Input{a, b})
	near(t, "sum", sum.Low, 25, 1e-9)
	near(t, "sum", sum.High, 35, 1e-9)
	small, large := reading(100, 99, 101), reading(50, 49, 51)
	product := propagate(func(x []float64) float64 { return x[0] * x[1] }, []Input{small, large})
	near(t, "product", product.High, 5000*(1+math.Hypot(0.01, 0.02)), 0.5) // less the product of the two errors
	near(t, "product", product.Low, 5000*(1-math.Hypot(0.01, 0.02)), 0.5)  // less the product of the two errors
}

func reading(v, low, high float64) Input {
	return Input{Interval: Interval{Value: v, Low: low, High: high}}
}

func TestPropagateKeepsTheSidesApart(t *testing.T) {
	// One input known only upwards: the quotient has room only downwards.
	in := []Input{reading(60, 60, 60), reading(0.4, 0.4, 0.5)}
	pf := propagate(func(x []float64) float64 { return pfRatio(x[0], x[1]) }, in)
	near(t, "value", pf.Value, 150, 1e-9)
	near(t, "low", pf.Low, 120, 1e-9)
	near(t, "high", pf.High, 150, 1e-9)
	// A minimum inside: both ends lie above.
	square := propagate(func(x []float64) float64 { return x[0] * x[0] }, []Input{reading(0, -2, 1)})
	if square != (Interval{0, 0, 4}) {
		t.Errorf("square = %v", square)
	}
}

// PaO2 40 on a reservoir mask: P/F about 44 to 67 (40/0.9 and 40/0.6).
func TestPFOnAReservoirMask(t *testing.T) {
	mask, _, err := InspiredOxygen(OxygenSupply{Device: ReservoirMask, Flow: 15})
	if err != nil {
		t.Fatal(err)
	}
	pf := propagate(func(x []float64) float64 { return pfRatio(x[0], x[1]) }, []Input{Measured(PaO2, 40), Bounded(mask)})
	near(t, "low", pf.Low, 44, 1)
	near(t, "high", pf.High, 67, 1)
}

func TestWiderInputsNeverNarrowTheResult(t *testing.T) {
	f := func(x []float64) float64 { return alveolarPO2(x[0], 760, x[1], usualR, waterAt37) }
	last := 0.0
	for spread := 0.0; spread < 0.2; spread += 0.02 {
		iv := propagate(f, []Input{Bounded(Interval{0.5, 0.5 - spread, 0.5 + spread}), Measured(PaCO2, 50)})
		if width := iv.High - iv.Low; width < last {
			t.Fatalf("spread %v gives %v after %v", spread, width, last)
		} else {
			last = width
		}
	}
}

// PCO2: 5 mmHg or 8 %, the larger; the change is at 62.5 mmHg (CLIA 1992).
func TestAllowableError(t *testing.T) {
	for v, want := range map[float64]float64{40: 5, 62.5: 5, 100: 8} {
		got, err := AllowablePCO2.At(v)
		if err != nil || math.Abs(got-want) > 1e-9 {
			t.Errorf("AllowablePCO2.At(%v) = %v, %v", v, got, err)
		}
	}
}

// The spreads of bicarbonate and base excess are what those of pH and PaCO2
// make of them: at pH 7.40 and PaCO2 40 within a tenth.
func TestDerivedSpreadsFollowFromTheMeasured(t *testing.T) {
	in := []Input{Measured(PHq, 7.40), Measured(PaCO2, 40)}
	hco3 := propagate(func(x []float64) float64 { return bicarbonate(x[0], x[1]) }, in)
	direct := Measured(HCO3, hco3.Value)
	near(t, "bicarbonate", (direct.High-direct.Low)/(hco3.High-hco3.Low), 1, 0.1)
	if std := Measured(StdHCO3, hco3.Value); std != direct {
		t.Errorf("standard bicarbonate spreads by %v, the actual one by %v", std, direct)
	}
	sbe := propagate(func(x []float64) float64 { return standardBaseExcess(x[0], bicarbonate(x[0], x[1])) }, in)
	be := Measured(BE, sbe.Value)
	near(t, "base excess", (be.High-be.Low)/(sbe.High-sbe.Low), 1, 0.15)
}

// A pulse oximeter is within 2 points for two readings in three (makers'
// statement), a co-oximeter within half a point (common practice).
func TestSaturationSpreads(t *testing.T) {
	for q, sd := range map[Quantity]float64{SpO2: 0.02, SpO2Pre: 0.02, SpO2Post: 0.02, SaO2: 0.005} {
		in := Measured(q, 0.90)
		near(t, q.Key(), in.Value-in.Low, 1.96*sd, 1e-9)
	}
}
