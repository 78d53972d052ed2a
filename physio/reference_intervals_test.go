package physio

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"testing"
)

// inputsOf reads name=value+-sd and checks that this package takes the same
// spread of the quantity; a spread of 0 stands for an exact value.
func inputsOf(t *testing.T, cell string) map[Quantity]Input {
	t.Helper()
	in := map[Quantity]Input{}
	for _, part := range strings.Fields(cell) {
		name, rest, _ := strings.Cut(part, "=")
		value, spread, _ := strings.Cut(rest, "+-")
		q, ok := QuantityByKey(name)
		v, err1 := strconv.ParseFloat(value, 64)
		sd, err2 := strconv.ParseFloat(spread, 64)
		if !ok || err1 != nil || err2 != nil {
			t.Fatalf("not an input: %q", part)
		}
		if in[q] = Measured(q, v); sd == 0 {
			in[q] = Bounded(point(v))
		}
		near(t, "spread of "+name, in[q].High-in[q].Low, 2*coverage*sd, 1e-4*(1+sd))
	}
	return in
}

// worked gives the interval of an index: from its row in derivations, or from
// an assessment of a sample that holds the inputs.
func worked(t *testing.T, key string, in map[Quantity]Input) Interval {
	t.Helper()
	for i := range derivations {
		d := &derivations[i]
		if d.key != key {
			continue
		}
		var inputs []Input
		for _, q := range d.in {
			inputs = append(inputs, in[q])
		}
		return propagate(d.f, inputs)
	}
	var s Sample
	for q, input := range in {
		s.Set(q, input.Value)
	}
	a := Assess(s, Setting{})
	index, ok := a.Index(key)
	if !ok {
		t.Fatalf("no %s of %v: %v", key, in, a.Indices)
	}
	return index.Interval
}

// Each derived number's interval against the quantiles of 100,000 draws, for
// every index and an invented patient of every population: endpoints within 5 %
// of the width. An index without a simulation fails: it belongs into
// deploy/reference_intervals.py.
func TestReferenceIntervals(t *testing.T) {
	tb := reference(t, "intervals")
	ends := comparison{what: "ends of intervals, part of the width", bound: 0.05}
	simulated := map[string]bool{}
	for _, row := range tb.rows {
		key := tb.text(row, "index")
		simulated[key] = true
		iv := worked(t, key, inputsOf(t, tb.text(row, "inputs")))
		low, high := tb.number(row, "low"), tb.number(row, "high")
		where := fmt.Sprintf("%s of the %s", key, tb.text(row, "patient"))
		if width := high - low; width > 0 {
			ends.see(math.Max(math.Abs(iv.Low-low), math.Abs(iv.High-high))/width, "%s: %v-%v", where, low, high)
		} else if iv.Low != iv.High {
			t.Errorf("%s: %v of exact inputs", where, iv)
		}
	}
	for _, d := range derivations {
		if !simulated[d.key] {
			t.Errorf("%s was never simulated", d.key)
		}
	}
	ends.report(t)
}
