package physio

// Span is a range with both ends included.
type Span struct {
	Low  float64 `json:"low"`
	High float64 `json:"high"`
}

// Interval is a value with the range it may truly lie in.
type Interval struct {
	Value float64 `json:"value"`
	Low   float64 `json:"low"`
	High  float64 `json:"high"`
}
