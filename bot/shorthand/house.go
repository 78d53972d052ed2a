package shorthand

import (
	"sort"
	"strings"

	"galeward/physio"
)

// expand replaces the channel's own words by what they stand for. A word that
// is a gas label already keeps its meaning: a house word can add, but not turn
// a pH into something else.
func expand(s string, words map[string]string) string {
	if len(words) == 0 {
		return s
	}
	keys := make([]string, 0, len(words))
	for k := range words {
		if k != "" && !protected(k) {
			keys = append(keys, strings.ToLower(k))
		}
	}
	sort.Slice(keys, func(a, b int) bool { return len(keys[a]) > len(keys[b]) })
	var b strings.Builder
	for i := 0; i < len(s); {
		k := keyAt(s, i, keys)
		if k == "" {
			b.WriteByte(s[i])
			i++
			continue
		}
		b.WriteString(" " + strings.ToLower(words[k]) + " ")
		i += len(k)
	}
	return b.String()
}

func protected(k string) bool {
	e := look(strings.ToLower(k))
	return e != nil && e.sense == senseLabel && !e.weak && isCore(e.q)
}

// keyAt finds the longest house word at s[i] that no letter touches.
func keyAt(s string, i int, keys []string) string {
	if i > 0 && isLetter(s[i-1]) {
		return ""
	}
	end := i
	for end < len(s) && (isLetter(s[end]) || isDigit(s[end])) {
		end++
	}
	run := s[i:end]
	for _, k := range keys {
		if k != run && look(run) != nil && len(k) < len(run) {
			continue // "o" is not the beginning of "o2"
		}
		if strings.HasPrefix(s[i:], k) && (i+len(k) == len(s) || !isLetter(s[i+len(k)])) {
			return k
		}
	}
	return ""
}

// Example gives a line in the channel's own order and units, for help and for
// reading a rule back. It is a line that Parse reads without a note.
func Example(h Habits) string {
	r := reader{h: h}
	values := map[physio.Quantity]string{
		physio.PHq: "7.28", physio.PaCO2: "58", physio.PaO2: "62", physio.HCO3: "27", physio.BE: "0",
		physio.SaO2: "88", physio.StdHCO3: "24",
	}
	if h.Units == KPa {
		values[physio.PaCO2], values[physio.PaO2] = "7.7", "8.3"
	}
	var parts []string
	for _, q := range r.order() {
		if v, ok := values[q]; ok && (q != physio.SaO2 || len(h.Order) > 0) {
			parts = append(parts, v)
		}
	}
	return strings.Join(parts, "/") + " 40%"
}
