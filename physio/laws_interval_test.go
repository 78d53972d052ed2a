package physio

import (
	"testing"

	"pgregory.net/rapid"
)

// TestLawNarrowerInputsNeverWiden: with any of its inputs known more closely an
// index is known at least as closely. One step of the method can be out by the
// curvature of the formula: a hundredth of the width is allowed, no more.
func TestLawNarrowerInputsNeverWiden(t *testing.T) {
	const curvature = 0.01
	rapid.Check(t, func(t *rapid.T) {
		d := &derivations[rapid.IntRange(0, len(derivations)-1).Draw(t, "index")]
		wide, narrow := make([]Input, len(d.in)), make([]Input, len(d.in))
		for i, q := range d.in {
			wide[i] = Measured(q, usualValue(q)*rapid.Float64Range(0.95, 1.05).Draw(t, q.Key()))
			keep := rapid.Float64Range(0, 1).Draw(t, "of "+q.Key())
			wide[i].bounded = rapid.Bool().Draw(t, "bounded")
			narrow[i] = wide[i]
			narrow[i].Low += (1 - keep) * (wide[i].Value - wide[i].Low)
			narrow[i].High -= (1 - keep) * (wide[i].High - wide[i].Value)
		}
		a, b := propagate(d.f, wide), propagate(d.f, narrow)
		if width := a.High - a.Low; b.High-b.Low > width*(1+curvature)+1e-12 {
			t.Fatalf("%s %+v of %v, but %+v of the narrower %v", d.key, a, wide, b, narrow)
		}
	})
}

// TestLawExactInputsAreExact: without any spread an index is a point.
func TestLawExactInputsAreExact(t *testing.T) {
	for i := range derivations {
		d := &derivations[i]
		in := make([]Input, len(d.in))
		x := make([]float64, len(d.in))
		for k, q := range d.in {
			x[k] = usualValue(q)
			in[k] = Bounded(point(x[k]))
		}
		if iv := propagate(d.f, in); iv != point(d.f(x)) {
			t.Errorf("%s of exact inputs is %+v", d.key, iv)
		}
	}
}
