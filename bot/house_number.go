package bot

import (
	"errors"
	"math"
	"regexp"
	"strconv"
	"strings"

	"galeward/bot/memory"
	"galeward/bot/shorthand"
	"galeward/physio"
)

// measure is one number with its unit as a house rule has it, and nothing
// behind it.
var measure = regexp.MustCompile(`^(-?)(\d+(?:[ ,.]\d{3})*)([.,]\d+)?\s*([a-z]+(?: hg)?)?$`)

// grouped is a number with a sign between its thousands: 1,600 or 1 600.
var grouped = regexp.MustCompile(`^[1-9]\d{0,2}(?:[ ,]\d{3})+$`)

// unitScale says by how much a unit is multiplied.
type unitScale map[string]float64

var (
	heightUnits = unitScale{
		"": 1, "m": 1, "metre": 1, "metres": 1, "meter": 1, "meters": 1, "km": 1000, "ft": feet, "feet": feet, "foot": feet,
	}
	barometerUnits = unitScale{
		"": 1, "mmhg": 1, "mm hg": 1, "torr": 1, "kpa": kilopascal, "hpa": kilopascal / 10, "mbar": kilopascal / 10, "mb": kilopascal / 10, "inhg": inch,
	}
)

const (
	feet = 0.3048 // m, by definition
	inch = 25.4   // mm, by definition
)

// kilopascal in mmHg.
var kilopascal = physio.KPa(1).MmHg()

// parseHeight reads a height above sea level: "1,600 m", "5,280 ft", "-430".
func parseHeight(value string) (any, error) {
	const example = "Example: house altitude 1600 m"
	if off(value) {
		return nil, nil
	}
	// A height is not typed in millimetres: a sign before three digits parts
	// thousands.
	if m := measure.FindStringSubmatch(value); m != nil && strings.Count(m[2], ".") == 1 && m[3] == "" && m[2][0] != '0' {
		value = strings.Replace(value, ".", ",", 1)
	}
	return parseMeasure(value, heightUnits, "a height in m or ft is expected. "+example)
}

// parseBarometer reads a barometric pressure: "620", "82.7 kPa", "1,013 hPa".
func parseBarometer(value string) (any, error) {
	if off(value) {
		return nil, nil
	}
	const want = "a pressure in mmHg, kPa or hPa is expected. Example: house pressure 620 mmHg"
	if strings.HasPrefix(value, "-") {
		return nil, errors.New("a barometric pressure is above 0: " + want)
	}
	return parseMeasure(value, barometerUnits, want)
}

// parseMeasure reads one number with its unit and gives it in the rule's own
// unit, to a tenth. A comma before exactly three digits parts thousands, in
// kPa, where there are none, and before others it is the decimal one.
func parseMeasure(value string, units unitScale, want string) (any, error) {
	m := measure.FindStringSubmatch(value)
	if m == nil {
		return nil, errors.New(want)
	}
	scale, known := units[m[4]]
	if !known {
		return nil, errors.New(want)
	}
	whole, part := m[2], strings.Replace(m[3], ",", ".", 1)
	switch {
	case grouped.MatchString(whole) && m[4] != "kpa":
		whole = strings.NewReplacer(",", "", " ", "").Replace(whole)
	case strings.Contains(whole, " "), part != "" && strings.ContainsAny(whole, ",."):
		return nil, errors.New(want)
	default:
		whole = strings.Replace(whole, ",", ".", 1)
	}
	v, err := strconv.ParseFloat(m[1]+whole+part, 64)
	if err != nil {
		return nil, errors.New(want)
	}
	return tenth(v * scale), nil
}

// tenth rounds to the precision in which a rule is kept.
func tenth(v float64) float64 { return math.Round(10*v) / 10 }

// spanTyped is a range of pressures as it was typed.
type spanTyped struct {
	low, high float64
	unit      string
}

var errSpan = errors.New("a range is expected, low before high. Example: house co2 target 45-55")

var pressureSpan = regexp.MustCompile(`^(\d+(?:[.,]\d+)?)\s*(?:-|to)\s*(\d+(?:[.,]\d+)?)\s*(mmhg|mm hg|torr|kpa)?$`)

// parsePressureSpan reads "45-55" or "6.0 to 7.3 kPa".
func parsePressureSpan(value string) (any, error) {
	if off(value) {
		return nil, nil
	}
	m := pressureSpan.FindStringSubmatch(value)
	if m == nil {
		return nil, errSpan
	}
	low, errLow := strconv.ParseFloat(strings.Replace(m[1], ",", ".", 1), 64)
	high, errHigh := strconv.ParseFloat(strings.Replace(m[2], ",", ".", 1), 64)
	if errLow != nil || errHigh != nil {
		return nil, errSpan
	}
	return spanTyped{low, high, m[3]}, nil
}

// mostKPa is the highest gas pressure that is taken for kPa in a channel that
// types kPa; as mmHg no limit or target is so low.
const mostKPa = 20.0

// mergeSpan gives a typed range in mmHg, in the unit of the house where none
// was typed.
func mergeSpan(h memory.House, parsed any) any {
	s := parsed.(spanTyped)
	if s.unit == "kpa" || s.unit == "" && h.Units == shorthand.KPa && s.high <= mostKPa {
		s.low, s.high = physio.KPa(s.low).MmHg(), physio.KPa(s.high).MmHg()
	}
	return plain(s.low, 1) + "-" + plain(s.high, 1)
}

// inBoth prints a pressure limit in mmHg, and in kPa where the house uses it.
func inBoth(h memory.House, mmHg ...float64) string {
	var a, b []string
	for _, v := range mmHg {
		a = append(a, plain(v, 1))
		b = append(b, plain(physio.MmHg(v).KPa(), 1))
	}
	text := strings.Join(a, "-") + " mmHg"
	if h.Units == shorthand.KPa {
		text += " (" + strings.Join(b, "-") + " kPa)"
	}
	return text
}
