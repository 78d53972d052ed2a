package physio

// bisect finds the x between low and high where the rising function f crosses
// zero. It keeps the crossing between two points and halves that bracket, or
// goes where the inverse parabola through the last three points crosses zero
// when that is safe, until the bracket is 1e-15 of its first width
// (Chandrupatla 1997). The caller guarantees the bracket; without a crossing
// the end nearer to it is the answer.
func bisect(f func(float64) float64, low, high float64) float64 {
	r := bracket{x: low, fx: f(low), far: high, ffar: f(high)}
	if r.fx >= 0 {
		return low
	}
	if r.ffar <= 0 {
		return high
	}
	const most = 100
	least := 1e-15 * (high - low)
	t := 0.5
	for range most {
		x := r.x + t*(r.far-r.x)
		r.take(x, f(x))
		if r.fx == 0 || abs(r.far-r.x) <= least {
			break
		}
		limit := least / 2 / abs(r.far-r.x)
		t = min(1-limit, max(limit, r.step()))
	}
	if abs(r.ffar) < abs(r.fx) {
		return r.far
	}
	return r.x
}

// bracket is the last point of a search, the point on the other side of the
// crossing, and the point before.
type bracket struct {
	x, fx, far, ffar, before, fbefore float64
}

// take replaces the end of the bracket that lies on the same side as x.
func (r *bracket) take(x, fx float64) {
	if (fx < 0) == (r.fx < 0) {
		r.before, r.fbefore = r.x, r.fx
	} else {
		r.before, r.fbefore = r.far, r.ffar
		r.far, r.ffar = r.x, r.fx
	}
	r.x, r.fx = x, fx
}

// step gives the next point as a part of the way from x to far: by the inverse
// parabola where it stays monotone between the points, else half.
func (r *bracket) step() float64 {
	xi := (r.x - r.far) / (r.before - r.far)
	phi := (r.fx - r.ffar) / (r.fbefore - r.ffar)
	if phi*phi < xi && (1-phi)*(1-phi) < 1-xi {
		return r.fx/(r.ffar-r.fx)*(r.fbefore/(r.ffar-r.fbefore)) +
			(r.before-r.x)/(r.far-r.x)*(r.fx/(r.fbefore-r.fx))*(r.ffar/(r.fbefore-r.ffar))
	}
	return 0.5
}
