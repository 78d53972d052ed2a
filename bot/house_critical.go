package bot

import (
	"errors"
	"fmt"
	"regexp"
	"strconv"
	"strings"

	"galeward/bot/memory"
	"galeward/bot/shorthand"
	"galeward/physio"
)

// The keys of the critical limits in the file form.
const (
	phLow     = "ph_low"
	phHigh    = "ph_high"
	paco2High = "paco2_high_mmhg"
	pao2Low   = "pao2_low_mmhg"
)

// phMiddle tells which side one limit of pH belongs to.
const phMiddle = 7.4

var errCritical = errors.New("limits are expected, each behind its name. Example: house critical ph 7.2-7.6 paco2 70 pao2 45")

// limitReader reads the words of "ph 7.2-7.6 paco2 70 pao2 45".
type limitReader struct {
	out  map[string]limitTyped
	q    physio.Quantity
	open bool   // q waits for a number
	side string // "low" or "high" when it was said
	last string // the key that was set last
}

// limitTyped is one limit with the unit that was typed, "" for none.
type limitTyped struct {
	v    float64
	unit string
}

var (
	decimalComma = regexp.MustCompile(`(\d),(\d)`)
	spanSign     = regexp.MustCompile(`(\d) ?(?:-|to) ?(\d)`)
	stuckUnit    = regexp.MustCompile(`(\d)(mmhg|kpa)`)
)

// parseCritical reads the limits that are named. What is not named keeps what
// stands there, see mergeCritical.
func parseCritical(value string) (any, error) {
	if off(value) {
		return nil, nil
	}
	value = decimalComma.ReplaceAllString(value, "$1.$2")
	value = stuckUnit.ReplaceAllString(spanSign.ReplaceAllString(value, "$1-$2"), "$1 $2")
	r := limitReader{out: make(map[string]limitTyped)}
	for _, w := range strings.FieldsFunc(value, func(c rune) bool { return strings.ContainsRune(" ,;:=", c) }) {
		if err := r.word(w); err != nil {
			return nil, err
		}
	}
	if len(r.out) == 0 || r.open && r.side == "" {
		return nil, errCritical
	}
	return r.out, nil
}

func (r *limitReader) word(w string) error {
	switch w {
	case "low", "below", "under", "less":
		r.side = "low"
		return nil
	case "high", "above", "over", "more":
		r.side = "high"
		return nil
	case "than", "and", "or", "limit", "limits", "is":
		return nil
	case "mmhg", "mm", "hg", "torr", "kpa":
		return r.unit(w)
	}
	if w[0] >= '0' && w[0] <= '9' {
		return r.number(w)
	}
	q, ok := shorthand.QuantityNamed(w)
	switch {
	case !ok:
		return errCritical
	case q != physio.PHq && q != physio.PaCO2 && q != physio.PaO2:
		return fmt.Errorf("limits are kept for pH, PaCO2 and PaO2, not for %s", q.Info().Symbol)
	case r.open && r.side == "":
		return errCritical // a name without a limit
	}
	r.q, r.open, r.side = q, true, ""
	return nil
}

// unit notes the unit of the pressure in front of it.
func (r *limitReader) unit(w string) error {
	limit, ok := r.out[r.last]
	if !ok || r.last == phLow || r.last == phHigh {
		return errCritical
	}
	if limit.unit = "mmhg"; w == "kpa" {
		limit.unit = "kpa"
	}
	r.out[r.last] = limit
	return nil
}

func (r *limitReader) number(w string) error {
	low, high, isSpan := strings.Cut(w, "-")
	a, err := strconv.ParseFloat(low, 64)
	b := a
	if err == nil && isSpan {
		b, err = strconv.ParseFloat(high, 64)
	}
	if err != nil || !r.open {
		return errCritical
	}
	r.open = r.side != ""
	switch {
	case r.q == physio.PHq && isSpan:
		return errors.Join(r.limit(phLow, a), r.limit(phHigh, b))
	case r.q == physio.PHq && (r.side == "high" || r.side == "" && a > phMiddle):
		return r.limit(phHigh, a)
	case r.q == physio.PHq:
		return r.limit(phLow, a)
	case r.q == physio.PaCO2 && (isSpan || r.side == "low"):
		return errors.New("PaCO2 has one critical limit, above it. Example: house critical paco2 70")
	case r.q == physio.PaCO2:
		return r.limit(paco2High, a)
	case isSpan || r.side == "high":
		return errors.New("PaO2 has one critical limit, below it. Example: house critical pao2 45")
	}
	return r.limit(pao2Low, a)
}

func (r *limitReader) limit(key string, v float64) error {
	if _, twice := r.out[key]; twice {
		return errCritical
	}
	r.out[key], r.last = limitTyped{v: v}, key
	return nil
}

// mergeCritical puts the limits that were named over those that stand in the
// house, or over the defaults of its population: a house that names one limit
// does not switch the others off.
func mergeCritical(h memory.House, parsed any) any {
	c := criticalOf(h)
	out := map[string]float64{}
	for key, v := range map[string]float64{phLow: c.PHLow, phHigh: c.PHHigh, paco2High: c.PaCO2High, pao2Low: c.PaO2Low} {
		if v > 0 {
			out[key] = v
		}
	}
	for key, limit := range parsed.(map[string]limitTyped) {
		pressure := key == paco2High || key == pao2Low
		kPa := limit.unit == "kpa" || limit.unit == "" && h.Units == shorthand.KPa && limit.v <= mostKPa
		if out[key] = limit.v; pressure && kPa {
			out[key] = tenth(physio.KPa(limit.v).MmHg())
		}
	}
	return out
}

// criticalOf gives the limits in force in a house.
func criticalOf(h memory.House) physio.CriticalLimits {
	if h.Critical != nil {
		return *h.Critical
	}
	return physio.DefaultCritical(h.Population)
}

func showCritical(h memory.House) string {
	if h.Critical == nil {
		return "Critical limits (default): " + criticalWords(h) + "."
	}
	return "Critical limits: " + criticalWords(h) + "."
}

// criticalWords prints the limits that there are.
func criticalWords(h memory.House) string {
	c := criticalOf(h)
	var parts []string
	switch {
	case c.PHLow > 0 && c.PHHigh > 0:
		parts = append(parts, "pH below "+aboutPH(c.PHLow)+" or above "+aboutPH(c.PHHigh))
	case c.PHLow > 0:
		parts = append(parts, "pH below "+aboutPH(c.PHLow))
	case c.PHHigh > 0:
		parts = append(parts, "pH above "+aboutPH(c.PHHigh))
	}
	if c.PaCO2High > 0 {
		parts = append(parts, "PaCO2 above "+inBoth(h, c.PaCO2High))
	}
	if c.PaO2Low > 0 {
		parts = append(parts, "PaO2 below "+inBoth(h, c.PaO2Low))
	}
	return strings.Join(parts, ", ")
}
