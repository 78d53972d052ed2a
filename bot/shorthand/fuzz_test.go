package shorthand

import (
	"strings"
	"testing"
	"time"

	"galeward/physio"
)

// FuzzParse: no message makes the parser panic, hold a refusal and values
// together, or give a value that can not be true.
func FuzzParse(f *testing.F) {
	for _, m := range readMessages(f) {
		f.Add(m.Text, false, true)
	}
	f.Add("7.28/58/62/27 40%\x00\xff<@U123> &lt;b&gt;", true, false)
	f.Fuzz(func(t *testing.T, text string, kpa, addressed bool) {
		h := Habits{Addressed: addressed, Words: map[string]string{"o": "fio2", "zz": "zz zz"}}
		if kpa {
			h.Units = KPa
		}
		checkInvariants(t, text, h)
	})
}

func checkInvariants(t *testing.T, text string, h Habits) {
	t.Helper()
	folded := fold(text)
	line := (&parser{h: withUnits(h), typed: lower(folded)}).parse() // no recovery: a panic is a failure
	line2 := Parse(text, h)
	for _, l := range []Line{line, line2} {
		if l.Kind == Refusal && (len(l.Gases) > 0 || !l.Target.Empty() || !l.Change.Empty() || l.Argument != "") {
			t.Fatalf("%q: a refusal with content: %+v", text, l)
		}
		if l.Kind != Reading && len(l.Gases) > 0 {
			t.Fatalf("%q: kind %d with gases", text, l.Kind)
		}
		if !h.Addressed && l.Kind == Unclear || h.Addressed && l.Kind == Silence {
			t.Fatalf("%q: kind %d", text, l.Kind)
		}
		for i := range l.Gases {
			l.Gases[i].Sample.Each(func(q physio.Quantity, v float64) {
				if !q.Possible(v) {
					t.Fatalf("%q: %s = %v", text, q.Key(), v)
				}
			})
			for _, q := range l.Gases[i].Questions {
				for _, c := range q.Choices {
					if c.Word == "" {
						t.Fatalf("%q: a choice without a word: %+v", text, q)
					}
					c.Set.Each(func(k physio.Quantity, v float64) {
						if !k.Possible(v) {
							t.Fatalf("%q: choice %s = %v", text, k.Key(), v)
						}
					})
				}
			}
		}
	}
}

func withUnits(h Habits) Habits {
	if h.Units == "" {
		h.Units = MmHg
	}
	return h
}

// A megabyte is cut early, whatever it holds.
func TestHugeMessages(t *testing.T) {
	for _, piece := range []string{"7.28/58/62/27 40% ", "a", "9", "7,2,", "co2", "(((", "7.28/", "\xff", "bed 3 ", "x1", "<", "'", "forty ", "if co2 40 ", "\n", "mr ", "🤔", "5'4\" "} {
		text := strings.Repeat(piece, 1<<20/len(piece))
		began := time.Now()
		Parse(text, Habits{Addressed: true})
		if took := time.Since(began); took > 2*time.Second { // the promise for a whole answer
			t.Errorf("%q repeated took %v", piece, took)
		}
	}
}

func BenchmarkParse(b *testing.B) {
	for _, text := range []string{"7.28/58/62/27 on 40% rr 24", "huddle\n3: 7.41/38/92 35%\n5: 7.22/71/58 60%\n9: 7.34/49/81 40%", "bed 14 needs a neb at 1800"} {
		b.Run(text[:8], func(b *testing.B) {
			b.ReportAllocs()
			for i := 0; i < b.N; i++ {
				Parse(text, Habits{Addressed: true})
			}
		})
	}
}
