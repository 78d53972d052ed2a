package memory

import (
	"bytes"
	"encoding/json"
	"errors"
	"maps"
	"slices"
	"strconv"
	"strings"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// field is one rule of the house in the file form: its key, what is expected
// in its place, how it is read, and how it is written (nil when not set).
type field struct {
	key   string
	want  string
	read  func(*House, json.RawMessage) error
	write func(House) any
}

// The expectations that both the reading and the check of a rule print.
const (
	wantUnits      = "mmHg or kPa"
	wantOrder      = "a list of different quantities that holds ph, such as [\"ph\", \"paco2\", \"pao2\", \"hco3\"]"
	wantWords      = "words of 1 to 24 letters and digits, each with the plain text it stands for"
	wantPressure   = "a barometric pressure of 450 to 800 mmHg"
	wantAltitude   = "a height of -430 to 6000 m"
	wantPopulation = "adult, pregnant, child, newborn or preterm"
	wantTarget     = "a saturation target in percent, low before high, between 50 and 100, such as \"88-92\""
	wantPaCO2      = "a PaCO2 range in mmHg, low before high, between 15 and 120, such as \"45-55\""
	wantCritical   = "limits under ph_low, ph_high, paco2_high_mmhg and pao2_low_mmhg"
	wantYesNo      = "true or false"
	wantZone       = "a time zone by its place, such as \"Europe/London\""
	wantTimes      = "a list of different clock times, such as [\"07:00\", \"19:00\"]"
	wantEditors    = "\"everyone\", \"managers\" or a list of user ids"
)

// houseFields are the rules in the order of the file form.
var houseFields = []field{
	{"units", wantUnits, readUnits, func(h House) any { return text(string(h.Units)) }},
	{"order", wantOrder, readOrder, writeOrder},
	{"words", wantWords, func(h *House, raw json.RawMessage) error { return strict(raw, &h.Words) },
		func(h House) any { return unlessEmpty(h.Words, len(h.Words)) }},
	{"pressure_mmhg", wantPressure, func(h *House, raw json.RawMessage) error { return nonZero(raw, &h.PB) },
		func(h House) any { return unlessZero(h.PB) }},
	{"altitude_m", wantAltitude, func(h *House, raw json.RawMessage) error { return strict(raw, &h.Altitude) },
		func(h House) any { return unlessZero(h.Altitude) }},
	{"population", wantPopulation, func(h *House, raw json.RawMessage) error { return strict(raw, &h.Population) },
		func(h House) any { return text(string(h.Population)) }},
	{"target_spo2", wantTarget, readTarget, writeTarget},
	{"target_paco2_mmhg", wantPaCO2, readPaCO2, writePaCO2},
	{"critical", wantCritical, readCritical, writeCritical},
	{"private", wantYesNo, func(h *House, raw json.RawMessage) error { return strict(raw, &h.Private) },
		func(h House) any { return onlyTrue(h.Private) }},
	{"listen", wantYesNo, func(h *House, raw json.RawMessage) error { return strict(raw, &h.Listen) },
		func(h House) any { return onlyTrue(h.Listen) }},
	{"zone", wantZone, func(h *House, raw json.RawMessage) error { return strict(raw, &h.Zone) },
		func(h House) any { return text(h.Zone) }},
	{"times", wantTimes, func(h *House, raw json.RawMessage) error { return texts(raw, &h.Times) },
		func(h House) any { return unlessEmpty(h.Times, len(h.Times)) }},
	{"shift_ends", wantTimes, func(h *House, raw json.RawMessage) error { return texts(raw, &h.ShiftEnds) },
		func(h House) any { return unlessEmpty(h.ShiftEnds, len(h.ShiftEnds)) }},
	{"editors", wantEditors, func(h *House, raw json.RawMessage) error { return texts(raw, &h.Editors) },
		func(h House) any { return unlessEmpty(h.Editors, len(h.Editors)) }},
}

func fieldByKey(key string) *field {
	for i := range houseFields {
		if houseFields[i].key == key {
			return &houseFields[i]
		}
	}
	return nil
}

func fieldKeys() []string {
	keys := make([]string, len(houseFields))
	for i := range houseFields {
		keys[i] = houseFields[i].key
	}
	return keys
}

var errOther = errors.New("not what stands here")

// strict reads a value that must be there and fit its type.
func strict(raw json.RawMessage, into any) error {
	if bytes.Equal(raw, []byte("null")) {
		return errOther
	}
	d := json.NewDecoder(bytes.NewReader(raw))
	d.DisallowUnknownFields()
	return d.Decode(into)
}

// nonZero reads a number for which 0 would mean "not set" in a House.
func nonZero(raw json.RawMessage, into *float64) error {
	if err := strict(raw, into); err != nil {
		return err
	}
	if *into == 0 {
		return errOther
	}
	return nil
}

// texts reads a list of strings, or one string with spaces or commas between.
func texts(raw json.RawMessage, into *[]string) error {
	var one string
	if json.Unmarshal(raw, &one) == nil && !bytes.Equal(raw, []byte("null")) {
		*into = strings.FieldsFunc(one, func(r rune) bool { return r == ' ' || r == ',' || r == ';' })
		return nil
	}
	return strict(raw, into)
}

func readUnits(h *House, raw json.RawMessage) error {
	var s string
	if err := strict(raw, &s); err != nil {
		return err
	}
	h.Units = shorthand.Units(s)
	for _, u := range []shorthand.Units{shorthand.MmHg, shorthand.KPa} {
		if strings.EqualFold(s, string(u)) {
			h.Units = u
		}
	}
	return nil
}

func readOrder(h *House, raw json.RawMessage) error {
	var keys []string
	if err := texts(raw, &keys); err != nil {
		return err
	}
	var known []string
	for _, q := range physio.Quantities() {
		known = append(known, q.Key())
	}
	for _, key := range keys {
		q, ok := physio.QuantityByKey(strings.ToLower(key))
		if !ok {
			h.Order = nil
			return &FieldError{"order", strconv.Quote(shown(key)), wantOrder, perhaps(key, known)}
		}
		h.Order = append(h.Order, q)
	}
	return nil
}

func writeOrder(h House) any {
	keys := make([]string, len(h.Order))
	for i, q := range h.Order {
		keys[i] = q.Key()
	}
	return unlessEmpty(keys, len(keys))
}

// bounds reads "88-92" or ["88-92"].
func bounds(raw json.RawMessage) (low, high float64, err error) {
	var parts []string
	if err := texts(raw, &parts); err != nil {
		return 0, 0, err
	}
	a, b, ok := strings.Cut(strings.Join(parts, ""), "-")
	low, err1 := strconv.ParseFloat(a, 64)
	high, err2 := strconv.ParseFloat(strings.TrimSuffix(b, "%"), 64)
	if !ok || err1 != nil || err2 != nil {
		return 0, 0, errOther
	}
	return low, high, nil
}

func readTarget(h *House, raw json.RawMessage) error {
	low, high, err := bounds(raw)
	if err == nil {
		h.Target = &physio.Target{Low: low / 100, High: high / 100}
	}
	return err
}

func writeTarget(h House) any {
	if h.Target == nil {
		return nil
	}
	return decimal(100*h.Target.Low) + "-" + decimal(100*h.Target.High)
}

func readPaCO2(h *House, raw json.RawMessage) error {
	low, high, err := bounds(raw)
	if err == nil {
		h.TargetPaCO2 = &physio.Span{Low: low, High: high}
	}
	return err
}

func writePaCO2(h House) any {
	if h.TargetPaCO2 == nil {
		return nil
	}
	return decimal(h.TargetPaCO2.Low) + "-" + decimal(h.TargetPaCO2.High)
}

// criticalFile are the critical limits in the file form.
type criticalFile struct {
	PHLow     float64 `json:"ph_low,omitempty"`
	PHHigh    float64 `json:"ph_high,omitempty"`
	PaCO2High float64 `json:"paco2_high_mmhg,omitempty"`
	PaO2Low   float64 `json:"pao2_low_mmhg,omitempty"`
}

func readCritical(h *House, raw json.RawMessage) error {
	var given map[string]json.RawMessage
	if err := strict(raw, &given); err != nil {
		return err
	}
	var c physio.CriticalLimits
	into := map[string]*float64{
		"ph_low": &c.PHLow, "ph_high": &c.PHHigh, "paco2_high_mmhg": &c.PaCO2High, "pao2_low_mmhg": &c.PaO2Low,
	}
	for _, key := range slices.Sorted(maps.Keys(given)) {
		field := "critical." + shown(key)
		at, ok := into[key]
		if !ok {
			return &FieldError{field, shown(string(given[key])), wantCritical, perhaps(key, slices.Sorted(maps.Keys(into)))}
		}
		if nonZero(given[key], at) != nil {
			return &FieldError{Field: field, Got: shown(string(given[key])), Want: "a number"}
		}
	}
	h.Critical = &c
	return nil
}

func writeCritical(h House) any {
	if h.Critical == nil {
		return nil
	}
	c := *h.Critical
	return criticalFile{PHLow: c.PHLow, PHHigh: c.PHHigh, PaCO2High: c.PaCO2High, PaO2Low: c.PaO2Low}
}

func text(s string) any {
	if s == "" {
		return nil
	}
	return s
}

func unlessZero(v float64) any {
	if v == 0 {
		return nil
	}
	return v
}

func onlyTrue(b bool) any {
	if !b {
		return nil
	}
	return true
}

func unlessEmpty(v any, n int) any {
	if n == 0 {
		return nil
	}
	return v
}

// decimal prints a number as short as it is, without the dust that a
// conversion to a fraction leaves.
func decimal(v float64) string {
	s := strconv.FormatFloat(v, 'f', 4, 64)
	return strings.TrimSuffix(strings.TrimRight(s, "0"), ".")
}
