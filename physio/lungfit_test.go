package physio

import (
	"errors"
	"math"
	"testing"
)

// seen gives the gases that a lung of known shunt and drop would show.
func seen(t *testing.T, m LungModel, fio2 ...Fraction) []LungGas {
	t.Helper()
	var points []LungGas
	for _, f := range fio2 {
		g := LungGas{Gas: AlveolarGas{FiO2: f, PB: 760, PaCO2: 40}}
		p, err := m.PaO2(g)
		if err != nil {
			t.Fatal(err)
		}
		g.PaO2 = p
		points = append(points, g)
	}
	return points
}

func TestFitFindsTheLungBehindTheGases(t *testing.T) {
	for _, want := range []LungModel{{Shunt: 0.05, Drop: 20}, {Shunt: 0.25, Drop: 10}, {Shunt: 0.15, Drop: 120}} {
		got, err := FitLung(seen(t, want, 0.30, 0.45, 0.70))
		if err != nil {
			t.Fatal(err)
		}
		near(t, "shunt", float64(got.Shunt), float64(want.Shunt), 0.005)
		near(t, "drop", got.Drop.MmHg(), want.Drop.MmHg(), 3)
		if got.Misfit > 0.05 || got.Points != 3 {
			t.Errorf("misfit %v with %d points", got.Misfit, got.Points)
		}
		if s, d := got.ShuntSpan, got.DropSpan; s.Low > float64(got.Shunt) || s.High < float64(got.Shunt) ||
			d.Low > got.Drop.MmHg() || d.High < got.Drop.MmHg() {
			t.Errorf("spans %v and %v leave out %v and %v", s, d, got.Shunt, got.Drop)
		}
	}
}

// A pure shunt is what the iso-shunt lines draw (after Benatar 1973): the fit
// of the 20 % line finds 20 % and next to no drop.
func TestFitOfAnIsoShuntLine(t *testing.T) {
	var points []LungGas
	for _, fio2 := range []Fraction{0.28, 0.40, 0.60, 0.80} {
		points = append(points, lung(fio2, isoShunt[0.20][fio2]))
	}
	got, err := FitLung(points)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "shunt", float64(got.Shunt), 0.20, 0.02)
	near(t, "drop", got.Drop.MmHg(), 0, 15)
}

// In health inspired less end-capillary PO2 is about 6 kPa, which is PaCO2/R
// alone: the drop from alveolar gas is next to nothing (Sapsford and Jones
// 1995).
func TestFitOfHealthyLungs(t *testing.T) {
	healthy := []LungGas{lung(0.21, 95), lung(0.30, 155), lung(0.40, 220)}
	got, err := FitLung(healthy)
	if err != nil {
		t.Fatal(err)
	}
	if got.Shunt > 0.05 || got.Drop > 20 {
		t.Errorf("healthy lungs have a shunt of %v and a drop of %v", got.Shunt, got.Drop)
	}
}

func TestFitBySaturations(t *testing.T) {
	want := LungModel{Shunt: 0.20, Drop: 40}
	points := seen(t, want, 0.30, 0.40, 0.60)
	for i := range points {
		points[i].SaO2 = Fraction(saturation(points[i].PaO2.MmHg(), CurveShift{PaCO2: 40}))
		points[i].PaO2 = 0
	}
	got, err := FitLung(points)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "shunt", float64(got.Shunt), 0.20, 0.01)
	byPO2, err := FitLung(seen(t, want, 0.30, 0.40, 0.60))
	if err != nil {
		t.Fatal(err)
	}
	if narrow, wide := byPO2.ShuntSpan, got.ShuntSpan; wide.High-wide.Low < narrow.High-narrow.Low {
		t.Errorf("saturations %v say more than gases %v", wide, narrow)
	}
}

func TestFitRefusesWhatCanNotTell(t *testing.T) {
	one := seen(t, LungModel{Shunt: 0.2}, 0.4)
	for name, points := range map[string][]LungGas{
		"no gas": nil, "one gas": one, "one FiO2 twice": append(one, one[0]),
		"full saturation":  {one[0], {Gas: AlveolarGas{FiO2: 0.6, PB: 760, PaCO2: 40}, SaO2: 0.99}},
		"nothing measured": {one[0], {Gas: AlveolarGas{FiO2: 0.6, PB: 760, PaCO2: 40}}},
		"no FiO2":          {one[0], {Gas: AlveolarGas{PB: 760, PaCO2: 40}, SaO2: 0.9}},
	} {
		got, err := FitLung(points)
		var out *RangeError
		var missing *MissingError
		if !errors.As(err, &out) && !errors.As(err, &missing) || got != (LungModel{}) {
			t.Errorf("%s: %+v, %v", name, got, err)
		}
	}
	for _, m := range []LungModel{{Shunt: Fraction(math.NaN())}, {Shunt: 0.9}, {Drop: -1}} {
		if v, err := m.PaO2(one[0]); err == nil || v != 0 {
			t.Errorf("%+v foresees %v, %v", m, v, err)
		}
	}
	if v, err := (LungModel{}).PaO2(LungGas{}); err == nil || v != 0 {
		t.Errorf("a gas without oxygen has %v, %v", v, err)
	}
}
