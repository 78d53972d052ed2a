package shorthand

import (
	"math"
	"strconv"
	"strings"

	"galeward/physio"
)

// takesBack says that a line of which nothing was read takes a value of the
// gas before back: a word of correction beside a number that stands there.
func (p *parser) takesBack() bool {
	if p.h.Earlier == nil || !correctionWords.in(head(p.rest), &p.grams) {
		return false
	}
	for _, f := range strings.FieldsFunc(head(p.rest), func(r rune) bool { return r != '.' && (r < '0' || r > '9') }) {
		n, err := strconv.ParseFloat(f, 64)
		found := false
		p.h.Earlier.Each(func(q physio.Quantity, v float64) {
			shown := []float64{v, 100 * v, math.Round(10*v/physio.KPa(1).MmHg()) / 10}
			for _, s := range shown {
				found = found || err == nil && math.Abs(n-s) < 1e-6
			}
		})
		if found {
			return true
		}
	}
	return false
}
