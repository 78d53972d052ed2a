package shorthand

import (
	"strings"

	"galeward/physio"
)

// QuantityNamed finds the quantity that a label names, in any of its
// spellings.
func QuantityNamed(word string) (physio.Quantity, bool) {
	e := look(strings.ToLower(strings.TrimSpace(word)))
	if e == nil || e.sense != senseLabel {
		return 0, false
	}
	return e.q, true
}
