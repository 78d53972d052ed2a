package shorthand

import (
	"testing"

	"galeward/physio"
)

// A fraction behind a word that takes a value back is the oxygen, as without
// the word (common practice); behind any other word it is that word's.
func TestTakesAFractionBack(t *testing.T) {
	var before physio.Sample
	before.Set(physio.PHq, 7.36)
	before.Set(physio.PaCO2, 48)
	before.Set(physio.FiO2, 0.5)
	for text, want := range map[string]float64{
		"sorry 0.6 not 0.5": 0.6, "sorry .6": 0.6, "oops .45": 0.45, "typo, 0.35": 0.35, "0.6 not 0.5": 0.6, "trop 0.6": 0,
	} {
		line := Parse(text, Habits{Addressed: true, Earlier: &before})
		got := 0.0
		if len(line.Gases) == 1 && line.Gases[0].Follow == FollowCorrection {
			got = line.Gases[0].Sample.Val(physio.FiO2)
		}
		if got != want {
			t.Errorf("%q corrects the oxygen to %g, want %g", text, got, want)
		}
	}
}
