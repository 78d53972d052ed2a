package physio

import (
	"testing"
)

// drawn is an invented lung of the reference file: what it is, what it shows,
// and what the library's least squares make of it.
type drawn struct {
	shunt, drop         float64
	points              []LungGas
	bestShunt, bestDrop float64
	bestSum             float64
}

func drawnLungs(t *testing.T) []drawn {
	t.Helper()
	tb := reference(t, "lungs")
	var lungs []drawn
	last := ""
	for _, row := range tb.rows {
		if p := tb.text(row, "patient"); p != last {
			last = p
			lungs = append(lungs, drawn{
				shunt: tb.number(row, "true_shunt"), drop: tb.number(row, "true_drop"),
				bestShunt: tb.number(row, "shunt"), bestDrop: tb.number(row, "drop"), bestSum: tb.number(row, "sum"),
			})
		}
		d := &lungs[len(lungs)-1]
		gas := AlveolarGas{FiO2: Fraction(tb.number(row, "fio2")), PB: 760, PaCO2: 40}
		p := LungGas{Gas: gas}
		if seen := tb.number(row, "value"); tb.text(row, "seen") == "sao2" {
			p.SaO2 = Fraction(seen)
		} else {
			p.PaO2 = MmHg(seen)
		}
		d.points = append(d.points, p)
	}
	return lungs
}

// The fit of every lung against SciPy's bounded least squares from five starts
// on the same points; its 95 % spans hold the lung behind the points; and its
// work stays bounded. Of 30 lungs 25 at least lie inside: fewer would be seen
// once in 300 times if the spans were right.
func TestReferenceLungFit(t *testing.T) {
	const least = 25
	sum := comparison{what: "sum of squares of the fit", bound: 1e-6}
	shunt := comparison{what: "shunt at the optimum, fraction", bound: 1e-6}
	drop := comparison{what: "drop at the optimum, mmHg", bound: 1e-4} // 1e-6 of the 100 mmHg it is searched in
	var shunts, drops, runs int
	lungs := drawnLungs(t)
	for i, d := range lungs {
		got, n := fitCounted(t, d.points)
		sum.see(square(got.Misfit)*float64(got.Points)-d.bestSum, "lung %d", i)
		shunt.see(float64(got.Shunt)-d.bestShunt, "lung %d", i)
		drop.see(got.Drop.MmHg()-d.bestDrop, "lung %d", i)
		shunts += hits(got.ShuntSpan, d.shunt)
		drops += hits(got.DropSpan, d.drop)
		runs = max(runs, n)
	}
	sum.report(t)
	shunt.report(t)
	drop.report(t)
	t.Logf("lungs inside their 95 %% spans: shunt %d and drop %d of %d, at least %d", shunts, drops, len(lungs), least)
	if shunts < least || drops < least {
		t.Errorf("spans hold the shunt of %d and the drop of %d lungs of %d", shunts, drops, len(lungs))
	}
	t.Logf("runs of the model in a fit: %d of at most %d", runs, mostRuns)
}

func hits(s Span, v float64) int {
	if v >= s.Low && v <= s.High {
		return 1
	}
	return 0
}

// fitCounted fits and holds the work to its bound.
func fitCounted(t *testing.T, points []LungGas) (LungModel, int) {
	t.Helper()
	if err := checkPoints(points); err != nil {
		t.Fatal(err)
	}
	f := &lungFit{}
	for _, p := range points {
		f.points = append(f.points, p.filledForFit())
	}
	m, err := f.solve()
	if err != nil {
		t.Fatal(err)
	}
	if f.runs > mostRuns || f.runs < 1000 {
		t.Errorf("a fit ran the model %d times, at most %d are allowed", f.runs, mostRuns)
	}
	return m, f.runs
}

// Points that nothing fits, a saturation that falls while the oxygen rises, are
// no more work than others, and the misfit says so.
func TestFitOfWhatNothingFits(t *testing.T) {
	m, _ := fitCounted(t, []LungGas{
		{Gas: AlveolarGas{FiO2: 0.3, PB: 760, PaCO2: 40}, SaO2: 0.97},
		{Gas: AlveolarGas{FiO2: 0.9, PB: 760, PaCO2: 40}, SaO2: 0.60},
	})
	if m.Misfit < 2 {
		t.Errorf("misfit %v of impossible points", m.Misfit)
	}
}
