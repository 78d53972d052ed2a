package physio_test

import (
	"slices"
	"testing"

	"pgregory.net/rapid"

	"galeward/physio"
)

// rising is a verdict that goes through its words in one order, at most, while
// one value rises and the others stay.
type rising struct {
	name  string
	q     physio.Quantity
	steps []string // the words in that order; "" where nothing is told
	// others draws what stays.
	others func(t *rapid.T) physio.Sample
	set    physio.Setting
	// from and to bound the walk where the ends of what is possible can not be
	// of one sample with the others.
	from, to float64
	word     func(a physio.Assessment) string
}

func only(pairs ...any) func(*rapid.T) physio.Sample {
	return func(*rapid.T) physio.Sample { return gas(pairs...) }
}

func anyPopulation(t *rapid.T) physio.Sample {
	var s physio.Sample
	s.Population = rapid.SampledFrom([]physio.Population{physio.Adult, physio.Pregnant, physio.Child, physio.Newborn, physio.Preterm}).Draw(t, "population")
	return s
}

var degrees = []string{"severe", "moderate", "mild", "adequate"}

func level(a physio.Assessment) string    { return string(a.Ventilation.Level) }
func degree(a physio.Assessment) string   { return string(a.Oxygenation.Level) }
func costly(a physio.Assessment) string   { return string(a.Ventilation.Efficiency) }
func transfer(a physio.Assessment) string { return string(a.Oxygenation.Efficiency) }
func gapWord(a physio.Assessment) string  { return string(a.AcidBase.Gap) }
func against(a physio.Assessment) string  { return string(a.Oxygenation.AgainstTarget) }
func primary(a physio.Assessment) string  { return string(a.AcidBase.Primary) }

var costs = []string{"efficient", "reduced", "poor"}

// risings are the verdicts with the value that each is about.
var risings = []rising{
	{name: "PaCO2, its level", q: physio.PaCO2, steps: []string{"hyperventilation", "adequate", "hypoventilation"}, others: anyPopulation, word: level},
	{name: "PaCO2 beside a bicarbonate", q: physio.PaCO2,
		steps: []string{"hyperventilation", "adequate", "short_for_need", "hypoventilation"},
		others: func(t *rapid.T) physio.Sample {
			return gas(physio.HCO3, rapid.Float64Range(6, 40).Draw(t, "hco3"))
		}, word: level},
	{name: "PaCO2 beside a bicarbonate, the process", q: physio.PaCO2,
		steps:  []string{"respiratory_alkalosis", "none", "respiratory_acidosis"},
		others: only(physio.HCO3, 24.0), from: 15, to: 150, word: primary},
	{name: "PaO2, its degree", q: physio.PaO2, steps: degrees, others: anyPopulation, word: degree},
	{name: "SaO2, its degree", q: physio.SaO2, steps: degrees, others: only(physio.PHq, 7.4), word: degree},
	{name: "SpO2, its degree", q: physio.SpO2, steps: degrees, others: anyPopulation, word: degree},
	{name: "SpO2 against a target", q: physio.SpO2, steps: []string{"below", "inside", "above"}, others: anyPopulation, word: against,
		set: physio.Setting{Target: &physio.Target{Low: 0.88, High: 0.92}}},
	{name: "FiO2 at a PaO2, on oxygen", q: physio.FiO2, steps: costs, from: 0.25, to: 1, word: transfer, others: func(t *rapid.T) physio.Sample {
		return gas(physio.PaO2, rapid.Float64Range(60, 110).Draw(t, "pao2"), physio.PaCO2, rapid.Float64Range(30, 48).Draw(t, "paco2"))
	}},
	{name: "VE", q: physio.VE, steps: costs, others: only(physio.PHq, 7.4, physio.PaCO2, 40), word: costly},
	{name: "VD/VT", q: physio.VDVT, steps: costs, others: only(physio.PHq, 7.4, physio.PaCO2, 40), word: costly},
	{name: "EtCO2", q: physio.EtCO2, steps: []string{"poor", "reduced", "efficient"}, others: only(physio.PHq, 7.4, physio.PaCO2, 40), word: costly},
	{name: "EtCO2 alone", q: physio.EtCO2, steps: []string{"unknown", "hypoventilation"}, others: anyPopulation, word: level},
	{name: "TcCO2 alone", q: physio.TcCO2, steps: []string{"unknown", "hypoventilation"}, others: anyPopulation, word: level},
	{name: "Na in the gap", q: physio.Na, steps: []string{"normal", "high"}, word: gapWord,
		others: only(physio.PHq, 7.3, physio.PaCO2, 32, physio.HCO3, 15.3, physio.Cl, 105)},
	{name: "Cl in the gap", q: physio.Cl, steps: []string{"high", "normal"}, word: gapWord,
		others: only(physio.PHq, 7.3, physio.PaCO2, 32, physio.HCO3, 15.3, physio.Na, 140)},
	{name: "a critical PaCO2", q: physio.PaCO2, steps: []string{"", "paco2"}, others: anyPopulation, word: criticalWord(physio.PaCO2)},
	{name: "a critical PaO2", q: physio.PaO2, steps: []string{"pao2", ""}, others: anyPopulation, word: criticalWord(physio.PaO2)},
	{name: "a critical pH", q: physio.PHq, steps: []string{"ph", "", "ph"}, others: anyPopulation, word: criticalWord(physio.PHq)},
}

func criticalWord(q physio.Quantity) func(physio.Assessment) string {
	return func(a physio.Assessment) string {
		if slices.Contains(a.Critical, q) {
			return q.Key()
		}
		return ""
	}
}

// TestLawVerdictsFollowTheirValue walks each value from the least to the most
// that is possible, in steps that hit the cut-offs, and beside every kind of
// patient: a verdict only ever moves on through its words.
func TestLawVerdictsFollowTheirValue(t *testing.T) {
	for _, r := range risings {
		t.Run(r.name, func(t *testing.T) {
			seen := map[string]bool{}
			rapid.Check(t, func(t *rapid.T) { r.walk(t, seen) })
			for _, word := range r.steps {
				if !seen[word] {
					t.Errorf("never %q", word)
				}
			}
		})
	}
}

func (r rising) walk(t *rapid.T, seen map[string]bool) {
	const steps = 60
	s := r.others(t)
	low, high := r.q.Info().Low, r.q.Info().High
	if r.to > 0 {
		low, high = r.from, r.to
	}
	place, last := 0, low
	for i := range steps {
		v := low + (high-low)*(float64(i)+rapid.Float64Range(0, 1).Draw(t, "step"))/steps
		s.Set(r.q, v)
		word := r.word(physio.Assess(s, r.set))
		seen[word] = true
		next := slices.Index(r.steps[place:], word)
		if next < 0 {
			t.Fatalf("%q at %v after %q at %v", word, v, r.steps[place], last)
		}
		place, last = place+next, v
	}
}
