package shorthand

import (
	"math"
	"regexp"
	"strconv"
	"testing"

	"galeward/physio"
)

var typedNumber = regexp.MustCompile(`\d*[.,]?\d+`)

// typedNumbers lists the numbers that stand in the folded text, in every way
// that digits in it can be cut.
func typedNumbers(text string) map[float64]bool {
	all := map[float64]bool{}
	s := fold(text)
	for _, pattern := range []*regexp.Regexp{typedNumber, regexp.MustCompile(`\d+\.\d+`), regexp.MustCompile(`\d+`), regexp.MustCompile(`\.\d+`), regexp.MustCompile(`\d{2}\b`), regexp.MustCompile(`\d,\d+`)} {
		for _, m := range pattern.FindAllString(s, -1) {
			if v, err := strconv.ParseFloat(regexp.MustCompile(`,`).ReplaceAllString(m, "."), 64); err == nil {
				all[v] = true
			}
		}
	}
	for i := 0; i+1 < len(s); i++ { // a value glued behind a label: pCO252
		if v, err := strconv.Atoi(s[i : i+2]); err == nil {
			all[float64(v)] = true
		}
	}
	return all
}

// Every value that is read stands in the text as it was typed, in a unit that
// the text or the channel states; else a note or a question says so.
func TestNothingIsReadThatWasNotTyped(t *testing.T) {
	sayable := map[physio.Quantity]bool{physio.FiO2: true, physio.Height: true, physio.Gestation: true, physio.Altitude: true}
	for _, m := range readMessages(t) {
		h := habitsOf(m.Profile)
		h.Addressed = true
		typed := typedNumbers(m.Text)
		if len(typed) == 0 || m.ID == "m037" { // dictated
			continue
		}
		for _, g := range Parse(m.Text, h).Gases {
			noted := map[physio.Quantity]bool{}
			for _, n := range g.Notes {
				noted[n.Quantity] = true
			}
			g.Sample.Each(func(q physio.Quantity, v float64) {
				if noted[q] || sayable[q] && q != physio.FiO2 || q == physio.FiO2 && v == 0.21 {
					return
				}
				if !typedAs(typed, q, v, g.Typed) {
					t.Errorf("%s %q: %s = %v was not typed", m.ID, m.Text, q.Key(), v)
				}
			})
		}
	}
}

// typedAs says that the value stands among the typed numbers in one of its
// forms.
func typedAs(typed map[float64]bool, q physio.Quantity, v float64, units Units) bool {
	forms := []float64{math.Abs(v)}
	switch {
	case q.Info().Unit == "fraction":
		forms = append(forms, 100*v)
	case q == physio.VT, q == physio.Weight:
		forms = append(forms, v/1000, v*1000)
	case q.Info().Unit == "mmHg" && units == KPa:
		forms = append(forms, physio.MmHg(v).KPa())
	}
	for _, f := range forms {
		if typed[math.Round(f*1000)/1000] {
			return true
		}
	}
	return false
}
