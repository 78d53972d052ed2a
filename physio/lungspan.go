package physio

import "math"

// The spans of a fit are read off its profile: the least sum of squares that
// one of the two numbers allows when the other may be anything. A grid alone is
// too coarse: with good points a span is narrower than one of its cells.
const (
	profile95    = 3.84 // rise of the sum of squares, chi-squared with one degree of freedom
	edgeHalvings = 12   // down to 1/4096 of the range of search
	goldenSteps  = 22   // down to 1/40000 of the range of search
	// mostRuns bounds the work of a fit, in runs of the model over all points:
	// the grid, the way downhill, and the profile at four ends.
	mostRuns = 29*46 + refineRuns + 4*(1+edgeHalvings)*(2+goldenSteps)
)

// spans gives the ranges of both numbers over all pairs that fit nearly as well
// as the best.
func (f *lungFit) spans(grid []cell, best cell) (shunt, drop Span) {
	most := best.sum + profile95
	shunt, drop = seenSpans(grid, best, most)
	ofShunt := func(v float64) bool {
		return lowest(func(d float64) float64 { return f.misfit(v, d) }, mostDrop) <= most
	}
	ofDrop := func(v float64) bool {
		return lowest(func(s float64) float64 { return f.misfit(s, v) }, mostShunt) <= most
	}
	return Span{edge(ofShunt, shunt.Low, 0), edge(ofShunt, shunt.High, mostShunt)},
		Span{edge(ofDrop, drop.Low, 0), edge(ofDrop, drop.High, mostDrop)}
}

// seenSpans gives what the grid shows of the spans; at least the best pair.
func seenSpans(grid []cell, best cell, most float64) (shunt, drop Span) {
	shunt, drop = Span{best.shunt, best.shunt}, Span{best.drop, best.drop}
	for _, c := range grid {
		if c.sum <= most {
			shunt = Span{min(shunt.Low, c.shunt), max(shunt.High, c.shunt)}
			drop = Span{min(drop.Low, c.drop), max(drop.High, c.drop)}
		}
	}
	return shunt, drop
}

// edge gives the end of a span on the way from a number that fits to the limit
// of the search, which is the end when it fits too.
func edge(fits func(float64) bool, inside, limit float64) float64 {
	if fits(limit) {
		return limit
	}
	for range edgeHalvings {
		if mid := (inside + limit) / 2; fits(mid) {
			inside = mid
		} else {
			limit = mid
		}
	}
	return limit
}

// lowest gives the least value of f between 0 and high by golden sections
// (Kiefer 1953). Where f is flat it goes down: both numbers are flat only far
// above their best.
func lowest(f func(float64) float64, high float64) float64 {
	step := (math.Sqrt(5) - 1) / 2
	low := 0.0
	a, b := high-step*(high-low), low+step*(high-low)
	fa, fb := f(a), f(b)
	least := min(fa, fb)
	for range goldenSteps {
		if fa <= fb {
			high, b, fb = b, a, fa
			a = high - step*(high-low)
			fa = f(a)
			least = min(least, fa)
		} else {
			low, a, fa = a, b, fb
			b = low + step*(high-low)
			fb = f(b)
			least = min(least, fb)
		}
	}
	return least
}
