package physio

import (
	"fmt"
	"strings"
)

// MissingError says that a formula lacks inputs. The caller can name them as
// "would be known with ...".
type MissingError struct {
	Need []Quantity
}

// Error lists the missing quantities by symbol.
func (e *MissingError) Error() string {
	names := make([]string, len(e.Need))
	for i, q := range e.Need {
		names[i] = q.Info().Symbol
	}
	return "physio: needs " + strings.Join(names, ", ")
}

// RangeError says that an input lies outside what is possible, or outside the
// range in which the formula holds. NaN and infinities are always outside.
type RangeError struct {
	// Quantity is what was out of range, in its canonical unit.
	Quantity Quantity
	// Name replaces the symbol of Quantity for an input that no Quantity
	// stands for, such as the exchange ratio; "" otherwise.
	Name string
	// Got is the refused number, Low and High the bounds, both allowed.
	Got, Low, High float64
}

// Error names the quantity, the number and the bounds.
func (e *RangeError) Error() string {
	name := e.Name
	if name == "" {
		name = e.Quantity.Info().Symbol
	}
	return fmt.Sprintf("physio: %s %g is outside %g to %g", name, e.Got, e.Low, e.High)
}

// given is one input of a formula. Without bounds of its own it is held
// against the table of quantities. Zero counts as missing where zero is not
// possible.
type given struct {
	q         Quantity
	v         float64
	low, high float64
	name      string
}

func (g given) bounds() (low, high float64) {
	if g.low == 0 && g.high == 0 {
		i := &quantities[g.q]
		return i.Low, i.High
	}
	return g.low, g.high
}

// check gives a MissingError with all inputs that are absent, else a
// RangeError for the first one that is out of range, else nil.
func check(all ...given) error {
	var need []Quantity
	for _, g := range all {
		if low, _ := g.bounds(); g.v == 0 && low > 0 && g.name == "" {
			need = append(need, g.q)
		}
	}
	if need != nil {
		return &MissingError{Need: need}
	}
	for _, g := range all {
		low, high := g.bounds()
		if !finite(g.v) || g.v < low || g.v > high {
			return &RangeError{Quantity: g.q, Name: g.name, Got: g.v, Low: low, High: high}
		}
	}
	return nil
}
