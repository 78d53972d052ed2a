package physio

import "testing"

// No formula at a point allocates: a trend of a thousand gases makes no work for
// the garbage collector. Every exported formula is tried, once for each of its
// inputs, with a value of that input that it takes.
func TestNoExportedFormulaAllocates(t *testing.T) {
	tried := 0
	for _, c := range append(openCalls, signedCalls...) {
		x, ok := taken(c)
		if !ok {
			t.Errorf("%s takes none of the usual numbers", c.name)
			continue
		}
		tried++
		if n := testing.AllocsPerRun(20, func() { allocationSink, _ = c.f(x) }); n != 0 {
			t.Errorf("%s allocates %v times a call at %v", c.name, n, x)
		}
	}
	t.Logf("%d calls tried", tried)
}

// allocationSink keeps the compiler from leaving a call out.
var allocationSink float64

// taken finds a number that the open input of a call takes.
func taken(c call) (float64, bool) {
	for _, x := range []float64{0.4, 0.9, 0.21, 6.1, 0.03, 0.23, 2.3, 7.4, 40, 5, 2, 1, 12, 15, 22, 28, 70, 100, 140, 170, 250, 450, 760, 1.39, 0.25, 0.0031, 22394, 64458} {
		if _, err := c.f(x); err == nil {
			return x, true
		}
	}
	return 0, false
}
