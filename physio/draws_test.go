package physio

import (
	"math/rand/v2"
	"slices"
	"testing"
)

// drawn100000 is how many repeat samples each patient is given.
const drawn100000 = 100_000

// TestIntervalsAgainstDraws holds both ends of every index that Assess gives, for
// invented patients of every population on every kind of oxygen, against repeat
// samples of the same patient: each reading drawn anew from a normal
// distribution with the spread of the table and cut off at what is possible,
// the oxygen of a device drawn evenly between its bounds, every index
// worked out afresh. A published band adds a place in it, each as likely. The ends
// lie within 5 % of the width of the middle 95 % of the draws.
func TestIntervalsAgainstDraws(t *testing.T) {
	keep := imprecisions
	t.Cleanup(func() { imprecisions = keep })
	type patient struct {
		name   string
		sample Sample
		a      Assessment
	}
	var patients []patient
	seen := map[string]bool{}
	for name, s := range drawnPatients() {
		p := patient{name, s, Assess(s, Setting{})}
		for _, ix := range p.a.Indices {
			seen[ix.Key] = true
		}
		patients = append(patients, p)
	}
	everyIndexSeen(t, seen)
	// The draws are the only spread while they are assessed.
	imprecisions = [quantityCount]imprecision{}
	for _, p := range patients {
		t.Run(p.name, func(t *testing.T) {
			t.Parallel()
			compareWithDraws(t, &p.a, drawIndices(&p.a, &keep))
		})
	}
}

// everyIndexSeen fails for an index that none of the patients has.
func everyIndexSeen(t *testing.T, seen map[string]bool) {
	t.Helper()
	want := []string{
		"expected_hco3_acute", "expected_hco3_chronic", "expected_ph_acute", "expected_ph_chronic", "expected_paco2",
		"aa_expected", "pao2_expected_at_paco2", "delta_ratio", "sao2_calc", "cao2", "cco2", "shunt", "shunt_estimated",
	}
	for _, d := range derivations {
		want = append(want, d.key)
	}
	for _, key := range want {
		if !seen[key] {
			t.Errorf("no patient has %s", key)
		}
	}
}

// drawIndices collects the values of the indices over the draws.
func drawIndices(a *Assessment, spreads *[quantityCount]imprecision) map[string][]float64 {
	r := rand.New(rand.NewPCG(2015, 1946))
	got := make(map[string][]float64)
	for _, ix := range a.Indices {
		got[ix.Key] = make([]float64, 0, drawn100000)
	}
	for range drawn100000 {
		sc := newScene(drawSample(r, a, spreads), Setting{})
		sc.indices()
		for _, ix := range sc.a.Indices {
			if values, ok := got[ix.Key]; ok {
				got[ix.Key] = append(values, placeIn(ix, r))
			}
		}
	}
	return got
}

// placeIn is the value of an index, or a place in the band that it is.
func placeIn(ix Index, r *rand.Rand) float64 {
	if ix.Low == ix.High {
		return ix.Value
	}
	half := (ix.High - ix.Low) / 2
	if ix.Key != "expected_paco2" && ix.Key != "aa_expected" { // those stand as they were published
		half /= boundedPart
	}
	return (ix.Low+ix.High)/2 + half*(2*r.Float64()-1)
}

// drawSample is a repeat sample of the one that was assessed.
func drawSample(r *rand.Rand, a *Assessment, spreads *[quantityCount]imprecision) Sample {
	s := a.Sample
	draw := func(q Quantity, v float64) {
		if sd := max(spreads[q].abs, spreads[q].rel*abs(v)); sd > 0 {
			info := q.Info()
			s.Set(q, min(info.High, max(info.Low, v+sd*r.NormFloat64())))
		}
	}
	s.Set(PB, a.PB)
	f := a.Oxygen.FiO2
	s.Each(func(q Quantity, v float64) {
		if q != FiO2 {
			draw(q, v)
		}
	})
	switch {
	case !a.Oxygen.Known:
	case f.Low < f.High: // from here on it is known, whatever the device
		s.Set(FiO2, f.Low+(f.High-f.Low)*r.Float64())
		s.Device = DeviceUnstated
	case f.Value > airFiO2:
		draw(FiO2, f.Value)
	}
	return s
}

func compareWithDraws(t *testing.T, a *Assessment, draws map[string][]float64) {
	const most = 0.05
	worst, where := 0.0, ""
	for _, ix := range a.Indices {
		v := draws[ix.Key]
		if len(v) < drawn100000*999/1000 {
			t.Errorf("%s is told by %d of the draws only: the patient stands at a bound of it", ix.Key, len(v))
			continue
		}
		slices.Sort(v)
		low, high := v[len(v)*25/1000], v[len(v)*975/1000]
		if high-low < 1e-12 {
			if ix.High-ix.Low > 1e-9 {
				t.Errorf("%s %v of exact inputs", ix.Key, ix.Interval)
			}
			continue
		}
		off := max(abs(ix.Low-low), abs(ix.High-high)) / (high - low)
		if off > most {
			t.Errorf("%s %v, the draws lie between %.6g and %.6g: %.1f %% of the width off", ix.Key, ix.Interval, low, high, 100*off)
		}
		if off > worst {
			worst, where = off, ix.Key
		}
	}
	t.Logf("%d indices, at most %.1f %% of the width off (%s)", len(a.Indices), 100*worst, where)
}
