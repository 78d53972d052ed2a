package physio

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"
	"time"
)

// An interval is worked out with as many runs of its formula as twice the inputs
// and four more: less than a hundredth of 10,000 draws.
func TestIntervalsTakeFewRuns(t *testing.T) {
	for i := range derivations {
		d := &derivations[i]
		runs := 0
		in := make([]Input, len(d.in))
		for k, q := range d.in {
			in[k] = Measured(q, usualValue(q))
		}
		propagate(func(x []float64) float64 { runs++; return d.f(x) }, in)
		if most := 2*len(in) + 4; runs > most || runs > 100 {
			t.Errorf("%s took %d runs of its formula, at most %d", d.key, runs, most)
		}
	}
}

// usualValue is one that every formula takes.
func usualValue(q Quantity) float64 {
	usual := map[Quantity]float64{
		PHq: 7.3, PaCO2: 50, PaO2: 70, HCO3: 24, FiO2: 0.4, SpO2: 0.9, SaO2: 0.88, RR: 20, VT: 400, VE: 8, PBW: 65,
		Pplat: 25, PEEP: 8, PIP: 30, Pmean: 14, EtCO2: 42, PeCO2: 25, PB: 750, Weight: 70,
		Na: 140, K: 4, Cl: 100, Calcium: 1.2, Magnesium: 0.8, Lactate: 1, Albumin: 38, Phosphate: 1,
	}
	return usual[q]
}

// BenchmarkInterval gives the time of an interval of the cheapest formula, a
// usual one and the dearest, and as x by how much it is faster than 10,000 draws
// of the same inputs.
func BenchmarkInterval(b *testing.B) {
	for _, key := range []string{"pf", "a_over_a", "p50"} {
		d := &derivations[slices.IndexFunc(derivations, func(d derivation) bool { return d.key == key })]
		b.Run(key, func(b *testing.B) {
			in := make([]Input, len(d.in))
			for k, q := range d.in {
				in[k] = Measured(q, usualValue(q))
			}
			for b.Loop() {
				propagate(d.f, in)
			}
			interval := float64(b.Elapsed().Nanoseconds()) / float64(b.N)
			b.ReportMetric(drawsTake(d, in)/interval, "x")
		})
	}
}

// drawsTake is the time in ns that 10,000 draws of the inputs, the formula on
// each and the order of the results take: the best of five.
func drawsTake(d *derivation, in []Input) float64 {
	const draws = 10_000
	r := rand.New(rand.NewPCG(1, 2))
	x, results := make([]float64, len(in)), make([]float64, draws)
	run := func() {
		for i := range results {
			for k := range in {
				x[k] = in[k].Value + (in[k].High-in[k].Low)/(2*coverage)*r.NormFloat64()
			}
			results[i] = d.f(x)
		}
		slices.Sort(results)
	}
	return bestOf(5, run)
}

func BenchmarkAssess(b *testing.B) {
	patients := drawnPatients()
	for _, name := range []string{"adult ventilated", "newborn"} {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Assess(patients[name], Setting{})
			}
		})
	}
	b.Run("four values", func(b *testing.B) {
		s := Sample{}.changed(map[Quantity]float64{PHq: 7.28, PaCO2: 58, PaO2: 62, HCO3: 27})
		b.ReportAllocs()
		for b.Loop() {
			Assess(s, Setting{})
		}
	})
}

// bestOf is the shortest time in ns that f takes of some runs.
func bestOf(runs int, f func()) float64 {
	best := time.Duration(math.MaxInt64)
	for range runs {
		start := time.Now()
		f()
		best = min(best, time.Since(start))
	}
	return float64(best.Nanoseconds())
}
