package physio

// bisect finds the x between low and high where the rising function f crosses
// zero, by halving the bracket until the floats between are used up or the
// bracket is 1e-12 of its first width. The caller guarantees the bracket.
func bisect(f func(float64) float64, low, high float64) float64 {
	const halvings = 60
	for range halvings {
		mid := low + (high-low)/2
		if f(mid) < 0 {
			low = mid
		} else {
			high = mid
		}
	}
	return low + (high-low)/2
}
