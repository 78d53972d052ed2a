package shorthand

import (
	"galeward/physio"
	"strings"
	"testing"
)

// Every spelling has one meaning: a second row would silently win or lose.
func TestVocabularyHasNoSpellingTwice(t *testing.T) {
	seen := map[string]bool{}
	for _, rows := range [][]row{valueRows, unitRows, deviceRows, saidRows, wordRows} {
		for _, r := range rows {
			for _, s := range strings.Split(r.spellings, ",") {
				s = strings.TrimSpace(s)
				if s == "" || s != strings.ToLower(s) {
					t.Errorf("spelling %q is empty or not in lower case", s)
				}
				if seen[s] {
					t.Errorf("spelling %q stands twice", s)
				}
				seen[s] = true
			}
		}
	}
	if len(seen) < 800 {
		t.Errorf("only %d spellings", len(seen))
	}
}

func TestQuantityNamed(t *testing.T) {
	for word, want := range map[string]physio.Quantity{"PaCO2": physio.PaCO2, " bicarb ": physio.HCO3, "rate": physio.RR} {
		if got, ok := QuantityNamed(word); !ok || got != want {
			t.Errorf("%q names %v (%v), want %v", word, got, ok, want)
		}
	}
	for _, word := range []string{"", "cannula", "nobody"} {
		if got, ok := QuantityNamed(word); ok {
			t.Errorf("%q names %v", word, got)
		}
	}
}
