package bot

import (
	"fmt"
	"sort"
	"strings"

	"galeward/bot/memory"
	"galeward/bot/shorthand"
	"galeward/physio"
)

// houseRule is one row of the table of house rules: the key of the file form,
// the words that name it, how its value is read, and how it is shown.
type houseRule struct {
	key   string
	names []string
	parse func(value string) (any, error)
	// merge, when set, puts what was parsed into what stands there.
	merge func(h memory.House, parsed any) any
	show  func(memory.House) string
}

// houseRules is the one table of rules that can be set by plain words.
var houseRules = []houseRule{
	{"units", []string{"units", "unit"}, parseText, nil, func(h memory.House) string {
		return "Pressures are typed and shown in " + numbers{h.Units}.unit() + "."
	}},
	{"order", []string{"order"}, parseOrder, nil, func(h memory.House) string {
		return "Order of unlabelled values: " + orderWords(h.Order) + "."
	}},
	{"altitude_m", []string{"altitude", "height above sea", "elevation"}, parseHeight, nil, func(h memory.House) string {
		return ifSet(h.Altitude, "Altitude: "+plain(h.Altitude, 0)+" m.")
	}},
	{"pressure_mmhg", []string{"pressure", "barometer", "pb"}, parseBarometer, nil, func(h memory.House) string {
		return ifSet(h.PB, "Barometric pressure: "+plain(h.PB, 0)+" mmHg.")
	}},
	{"population", []string{"population", "patients"}, parseText, nil, func(h memory.House) string {
		if h.Population == physio.PopulationUnstated {
			return ""
		}
		return "Population: " + populationWord[h.Population] + "."
	}},
	{"target_spo2", []string{"target", "saturation target", "spo2 target"}, parseSpan, nil, func(h memory.House) string {
		if h.Target == nil {
			return "No saturation target is set."
		}
		return "Saturation target: " + wholePercent(h.Target.Low) + "-" + wholePercent(h.Target.High) + " %."
	}},
	{"target_paco2_mmhg", []string{"co2 target", "paco2 target"}, parsePressureSpan, mergeSpan, func(h memory.House) string {
		if h.TargetPaCO2 == nil {
			return ""
		}
		return "PaCO2 wanted: " + inBoth(h, h.TargetPaCO2.Low, h.TargetPaCO2.High) + "."
	}},
	{"critical", []string{"critical", "critical limits"}, parseCritical, mergeCritical, showCritical},
	{"private", []string{"private"}, parseSwitch, nil, func(h memory.House) string {
		if h.Private {
			return "Answers are private to the asker."
		}
		return "Answers are seen by the channel."
	}},
	{"listen", []string{"listen", "listening"}, parseSwitch, nil, func(h memory.House) string {
		if h.Listen {
			return "Bare gases in the channel are read."
		}
		return ""
	}},
	{"zone", []string{"zone", "time zone"}, parseZone, nil, func(h memory.House) string {
		return ifText(h.Zone, "Time zone: "+h.Zone+".")
	}},
	{"shift_ends", []string{"shift ends", "shift"}, parseTimes, nil, func(h memory.House) string {
		return ifText(strings.Join(h.ShiftEnds, ", "), "Shifts end at "+strings.Join(h.ShiftEnds, ", ")+".")
	}},
	{"words", []string{"word", "words"}, parseWord, mergeWord, showWords},
	{editorsKey, []string{"editors", "editor", "who may change"}, parseEditors, nil, showEditors},
}

// parseWord reads "ngt means nasal cannula 2 l", or a word with off behind it.
func parseWord(value string) (any, error) {
	for _, sign := range []string{" means ", " = ", "=", " is "} {
		if word, meaning, ok := strings.Cut(value, sign); ok {
			word, meaning = strings.Trim(word, ` '"`), strings.Trim(meaning, ` '"`)
			if off(meaning) {
				meaning = ""
			}
			return [2]string{word, meaning}, nil
		}
	}
	return nil, fmt.Errorf("a word and its meaning are expected. Example: house word npo2 means nasal cannula 2 L")
}

// mergeWord adds one word to the house's words, or takes it away.
func mergeWord(h memory.House, parsed any) any {
	pair := parsed.([2]string)
	words := make(map[string]string, len(h.Words)+1)
	for w, meaning := range h.Words {
		words[w] = meaning
	}
	if words[pair[0]] = pair[1]; pair[1] == "" {
		delete(words, pair[0])
	}
	if len(words) == 0 {
		return nil
	}
	return words
}

func ifSet(v float64, text string) string {
	if v == 0 {
		return ""
	}
	return text
}

func ifText(v, text string) string {
	if v == "" {
		return ""
	}
	return text
}

func showWords(h memory.House) string {
	if len(h.Words) == 0 {
		return ""
	}
	keys := make([]string, 0, len(h.Words))
	for w := range h.Words {
		keys = append(keys, w)
	}
	sort.Strings(keys)
	for i, w := range keys {
		keys[i] = w + " = " + h.Words[w]
	}
	return "Own words: " + strings.Join(keys, "; ") + "."
}

// findRule finds the rule that the first words name, the longest name first.
func findRule(words []string) (houseRule, string, bool) {
	line := strings.Join(words, " ")
	best, length := -1, 0
	for i, rule := range houseRules {
		for _, name := range rule.names {
			if rest, ok := strings.CutPrefix(line, name); ok && (rest == "" || rest[0] == ' ' || rest[0] == ':') && len(name) > length {
				best, length = i, len(name)
			}
		}
	}
	if best < 0 {
		return houseRule{}, "", false
	}
	value := strings.TrimLeft(line[length:], " :")
	for _, filler := range []string{"is ", "are ", "= ", "to ", "at "} {
		value = strings.TrimPrefix(value, filler)
	}
	return houseRules[best], value, true
}

// off says that a rule is to be taken away.
func off(value string) bool {
	switch value {
	case "off", "none", "not set", "default", "clear":
		return true
	}
	return false
}

func parseText(value string) (any, error) {
	if off(value) {
		return nil, nil
	}
	if value == "" {
		return nil, fmt.Errorf("a value is missing. Example: house units kPa")
	}
	return value, nil
}

// parseTimes reads "07:00 19:00", also with a word between.
func parseTimes(value string) (any, error) {
	if value == "" {
		return nil, fmt.Errorf("clock times are expected. Example: house shift 07:00 19:00")
	}
	return parseText(strings.ReplaceAll(value, " and ", " "))
}

func parseSpan(value string) (any, error) {
	if off(value) {
		return nil, nil
	}
	value = strings.NewReplacer(" to ", "-", "%", "", " ", "", "mmhg", "", "–", "-").Replace(value)
	if !strings.Contains(value, "-") {
		return nil, fmt.Errorf("a range is expected, low before high. Example: house target 88-92")
	}
	return value, nil
}

func parseSwitch(value string) (any, error) {
	switch value {
	case "on", "yes", "true", "":
		return true, nil
	case "off", "no", "false":
		return nil, nil
	}
	return nil, fmt.Errorf("on or off is expected. Example: house private on")
}

// parseZone restores the capitals of a zone's name, which a typed line loses.
func parseZone(value string) (any, error) {
	if off(value) {
		return nil, nil
	}
	if value == "" {
		return nil, fmt.Errorf("a time zone is expected by its place. Example: house zone Europe/London")
	}
	if strings.EqualFold(value, "utc") {
		return "UTC", nil
	}
	parts := strings.Split(value, "/")
	for i, p := range parts {
		words := strings.FieldsFunc(p, func(r rune) bool { return r == ' ' || r == '_' })
		for j, w := range words {
			words[j] = upperFirst(w)
		}
		parts[i] = strings.Join(words, "_")
	}
	return strings.Join(parts, "/"), nil
}

func parseOrder(value string) (any, error) {
	if off(value) {
		return nil, nil
	}
	var keys []string
	for _, w := range strings.FieldsFunc(value, func(r rune) bool { return strings.ContainsRune(" /,;>", r) }) {
		q, ok := shorthand.QuantityNamed(w)
		if !ok {
			return nil, fmt.Errorf("%q names no value. Example: house order ph co2 o2 hco3 sat", w)
		}
		keys = append(keys, q.Key())
	}
	if len(keys) == 0 {
		return nil, fmt.Errorf("the names of the values are expected. Example: house order ph co2 o2 hco3 sat")
	}
	return keys, nil
}

func orderWords(order []physio.Quantity) string {
	if len(order) == 0 {
		return "pH, PaCO2, PaO2, HCO3, SaO2"
	}
	names := make([]string, len(order))
	for i, q := range order {
		names[i] = q.Info().Symbol
	}
	return strings.Join(names, ", ")
}
