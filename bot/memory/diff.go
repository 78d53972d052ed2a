package memory

import (
	"fmt"
	"maps"
	"slices"
	"strings"
)

// Change is what one revision did to one field, in the words of the file form.
// From and To are "" for "not set".
type Change struct {
	Field string `json:"field"`
	From  string `json:"from,omitempty"`
	To    string `json:"to,omitempty"`
}

// diff lists what differs between two houses, field by field; words and
// critical limits one by one.
func diff(from, to House) []Change {
	var all []Change
	for _, f := range houseFields {
		a, b := flat(f.key, f.write(from)), flat(f.key, f.write(to))
		for _, key := range merged(a, b) {
			if a[key] != b[key] {
				all = append(all, Change{Field: key, From: a[key], To: b[key]})
			}
		}
	}
	return all
}

// flat gives the plain text of a written field, of an object one for each of
// its keys.
func flat(key string, written any) map[string]string {
	switch v := written.(type) {
	case nil:
		return nil
	case string:
		return map[string]string{key: v}
	case float64:
		return map[string]string{key: decimal(v)}
	case bool:
		return map[string]string{key: "true"}
	case []string:
		return map[string]string{key: strings.Join(v, ", ")}
	case map[string]string:
		m := make(map[string]string, len(v))
		for word, meaning := range v {
			m[key+"."+word] = meaning
		}
		return m
	case criticalFile:
		return flatCritical(key, v)
	}
	return map[string]string{key: fmt.Sprint(written)}
}

func flatCritical(key string, c criticalFile) map[string]string {
	m := make(map[string]string)
	for name, v := range map[string]float64{
		".ph_low": c.PHLow, ".ph_high": c.PHHigh, ".paco2_high_mmhg": c.PaCO2High, ".pao2_low_mmhg": c.PaO2Low,
	} {
		if v != 0 {
			m[key+name] = decimal(v)
		}
	}
	return m
}

// merged gives the keys of both maps in order.
func merged(a, b map[string]string) []string {
	keys := slices.Collect(maps.Keys(a))
	for key := range b {
		if _, both := a[key]; !both {
			keys = append(keys, key)
		}
	}
	slices.Sort(keys)
	return keys
}
