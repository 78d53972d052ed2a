package physio

import (
	"math"

	"gonum.org/v1/gonum/optimize"
)

// LungModel describes the transfer of oxygen by two numbers: a shunt that
// oxygen does not reach, and a drop of PO2 from ideal alveolar gas to
// end-capillary blood, which stands for scattered ventilation and perfusion. The
// shunt is the ceiling of PaO2 against FiO2, the drop its shift to the side
// (Sapsford and Jones 1995; the drop as defined by Rees and Kjaergaard, from
// alveolar and not from inspired gas).
type LungModel struct {
	Shunt Fraction
	Drop  Pressure
	// ShuntSpan and DropSpan (mmHg) hold every pair that fits the points not
	// worse than their measurement errors allow (95 %). They are wide with two
	// points or a narrow range of FiO2: say so.
	ShuntSpan, DropSpan Span
	// Misfit is the root mean square of what is left, in measurement errors;
	// much above 2 the two numbers do not describe this lung.
	Misfit float64
	Points int
}

// Limits of the search, and what the points must span.
const (
	mostShunt      = 0.70
	mostDrop       = 450.0 // mmHg
	shuntStep      = 0.025
	dropStep       = 10.0 // mmHg
	leastFiO2Range = 0.05 // between the points: below it shunt and drop are one
	fitSaturation  = 0.98 // above it a saturation tells nothing
	refineRuns     = 400  // of the model, on the way downhill
)

// FitLung finds the model of two or more gases of one patient at different
// FiO2, without much else changed between them. A gas without a PaO2 is taken
// by its SaO2, which may be an oximeter's, up to 0.98. Points whose FiO2 lie
// within 0.05 can not tell shunt from drop: RangeError.
func FitLung(points []LungGas) (LungModel, error) {
	if err := checkPoints(points); err != nil {
		return LungModel{}, err
	}
	f := &lungFit{points: make([]LungGas, len(points))}
	for i, p := range points {
		f.points[i] = p.filledForFit()
	}
	return f.solve()
}

func checkPoints(points []LungGas) error {
	if err := check(given{name: "points", v: float64(len(points)), low: 2, high: 100}); err != nil {
		return err
	}
	lowest, highest := points[0].Gas.FiO2, points[0].Gas.FiO2
	for _, p := range points {
		if err := p.checkForFit(); err != nil {
			return err
		}
		lowest, highest = min(lowest, p.Gas.FiO2), max(highest, p.Gas.FiO2)
	}
	return check(given{name: "range of FiO2", v: float64(highest - lowest), low: leastFiO2Range, high: 1})
}

func (g LungGas) checkForFit() error {
	if g.PaO2 != 0 {
		return g.check()
	}
	if err := check(given{q: SaO2, v: float64(g.SaO2), low: 0.5, high: fitSaturation}); err != nil {
		return err
	}
	g.PaO2 = 10 // any PaO2 that passes: only the saturation is used
	return g.check()
}

// filledForFit keeps the saturation of a point only where it is all there is.
func (g LungGas) filledForFit() LungGas {
	sat, hasPO2 := g.SaO2, g.PaO2 != 0
	if hasPO2 {
		sat = 0
	}
	g = g.filled()
	g.SaO2 = sat
	return g
}

// lungFit is one search. It counts how often the model was run, so that a test
// can hold the work to mostRuns.
type lungFit struct {
	points []LungGas
	runs   int
}

// misfit gives the sum of squares of a pair, in measurement errors.
func (f *lungFit) misfit(shunt, drop float64) float64 {
	f.runs++
	var sum float64
	for _, p := range f.points {
		po2 := p.pao2Of(shunt, drop)
		if p.SaO2 != 0 {
			sum += square((saturation(po2, p.Shift) - float64(p.SaO2)) / imprecisions[SpO2].abs)
			continue
		}
		sum += square(math.Log(po2/p.PaO2.MmHg()) / imprecisions[PaO2].rel)
	}
	return sum
}

// pao2Of gives the PaO2 that the model foresees.
func (g LungGas) pao2Of(shunt, drop float64) float64 {
	capillary := max(g.alveolar()-drop, 1)
	arterial := g.capillary(capillary) - float64(g.Difference)*shunt/(1-shunt) // Sapsford and Jones 1995
	return g.po2OfContent(arterial, capillary)
}

// solve searches a grid, which can not be trapped, refines its best pair, and
// walks from there to the ends of the spans.
func (f *lungFit) solve() (LungModel, error) {
	m := LungModel{Points: len(f.points)}
	grid := f.grid()
	best := grid[0]
	for _, c := range grid {
		if c.sum < best.sum {
			best = c
		}
	}
	best, err := f.refine(best)
	if err != nil {
		return LungModel{}, err
	}
	m.Shunt, m.Drop = Fraction(best.shunt), MmHg(best.drop)
	m.Misfit = math.Sqrt(best.sum / float64(len(f.points)))
	m.ShuntSpan, m.DropSpan = f.spans(grid, best)
	return m, nil
}

// cell is one pair with its sum of squares.
type cell struct {
	shunt, drop, sum float64
}

func (f *lungFit) grid() []cell {
	var cells []cell
	for shunt := 0.0; shunt <= mostShunt; shunt += shuntStep {
		for drop := 0.0; drop <= mostDrop; drop += dropStep {
			cells = append(cells, cell{shunt, drop, f.misfit(shunt, drop)})
		}
	}
	return cells
}

// refine walks downhill from a pair (Nelder and Mead 1965) inside the limits.
func (f *lungFit) refine(from cell) (cell, error) {
	pair := func(x []float64) (shunt, drop float64) {
		return min(max(x[0], 0), mostShunt), min(max(x[1]*100, 0), mostDrop)
	}
	problem := optimize.Problem{Func: func(x []float64) float64 { return f.misfit(pair(x)) }}
	settings := &optimize.Settings{MajorIterations: 200, FuncEvaluations: refineRuns}
	result, err := optimize.Minimize(problem, []float64{from.shunt, from.drop / 100}, settings, &optimize.NelderMead{SimplexSize: 0.02})
	if result == nil {
		return cell{}, err
	}
	// Running out of iterations leaves the best pair so far, never a worse one
	// than the grid's.
	if result.F >= from.sum {
		return from, nil
	}
	shunt, drop := pair(result.X)
	return cell{shunt, drop, result.F}, nil
}

// PaO2 gives the PaO2 that the model foresees for a gas, of which PaO2 and SaO2
// are not used.
func (m LungModel) PaO2(g LungGas) (Pressure, error) {
	err := check(
		given{name: "shunt", v: float64(m.Shunt), low: 0, high: mostShunt},
		given{name: "drop", v: m.Drop.MmHg(), low: 0, high: mostDrop},
	)
	if err != nil {
		return 0, err
	}
	g.PaO2, g.SaO2 = 10, 0
	if err := g.check(); err != nil {
		return 0, err
	}
	return MmHg(g.filled().pao2Of(float64(m.Shunt), m.Drop.MmHg())), nil
}
