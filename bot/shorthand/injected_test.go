package shorthand

import (
	"fmt"
	"math"
	"math/rand"
	"testing"

	"galeward/physio"
)

// gasMaker invents gases that are consistent by the constants of another
// analyser than the house's (0.0307 and 6.105), rounded as print-outs are.
type gasMaker struct{ *rand.Rand }

type invented struct {
	ph        float64
	co2, o2   int
	hco3, pct int
}

func (m gasMaker) gas() invented {
	for {
		g := invented{
			ph: math.Round((6.95+0.65*m.Float64())*100) / 100, co2: 16 + m.Intn(90), pct: 21 + m.Intn(70),
		}
		g.hco3 = int(math.Round(0.0307 * float64(g.co2) * math.Pow(10, g.ph-6.105)))
		top := float64(g.pct)/100*713 - float64(g.co2)*1.2
		if g.hco3 < 5 || g.hco3 > 48 || top < 55 {
			continue
		}
		g.o2 = 46 + m.Intn(int(math.Min(top*0.95, 250))-46+1)
		return g
	}
}

func (g invented) line() string {
	return fmt.Sprintf("%.2f/%d/%d/%d fio2 %d%%", g.ph, g.co2, g.o2, g.hco3, g.pct)
}

// doubted says that a line led to a question or a note.
func doubted(l Line) bool {
	for _, g := range l.Gases {
		if len(g.Questions)+len(g.Notes) > 0 {
			return true
		}
	}
	return len(l.Gases) == 0
}

func reads(l Line, q physio.Quantity, want, tol float64) bool {
	if len(l.Gases) != 1 {
		return false
	}
	v, ok := l.Gases[0].Sample.Get(q)
	return ok && math.Abs(v-want) <= tol
}

func TestCleanGasesRaiseNoDoubt(t *testing.T) {
	m := gasMaker{rand.New(rand.NewSource(1))}
	const n = 10000
	alarms := 0
	for i := 0; i < n; i++ {
		g := m.gas()
		l := Parse(g.line(), Habits{Addressed: true})
		if !reads(l, physio.PHq, g.ph, 1e-9) || !reads(l, physio.PaCO2, float64(g.co2), 1e-9) && !doubted(l) {
			t.Fatalf("%s was misread: %+v", g.line(), l.Gases)
		}
		if doubted(l) {
			alarms++
			t.Logf("%s: %+v %+v", g.line(), l.Gases[0].Notes, l.Gases[0].Questions)
		}
	}
	if alarms*1000 >= n { // 0.1 %
		t.Errorf("%d false alarms in %d clean gases", alarms, n)
	}
}

func TestKPaChannelRaisesNoDoubt(t *testing.T) {
	m := gasMaker{rand.New(rand.NewSource(2))}
	const n = 5000
	alarms := 0
	for i := 0; i < n; i++ {
		g := m.gas()
		line := fmt.Sprintf("%.2f/%.1f/%.1f/%d fio2 %d%%", g.ph, float64(g.co2)/7.50062, float64(g.o2)/7.50062, g.hco3, g.pct)
		l := Parse(line, Habits{Addressed: true, Units: KPa})
		if doubted(l) {
			alarms++
			t.Logf("%s: %+v %+v", line, l.Gases[0].Notes, l.Gases[0].Questions)
		}
	}
	if alarms*1000 >= n {
		t.Errorf("%d false alarms in %d clean gases", alarms, n)
	}
}

// The shares are those of the simulation that the ladder was made from: what
// the numbers can reveal, they must reveal.
func TestInjectedErrorsAreDoubted(t *testing.T) {
	for _, e := range []struct {
		name  string
		spoil func(gasMaker, invented) (string, bool)
		least float64
	}{
		{"pressures swapped", func(_ gasMaker, g invented) (string, bool) {
			return fmt.Sprintf("%.2f/%d/%d/%d fio2 %d%%", g.ph, g.o2, g.co2, g.hco3, g.pct), math.Abs(float64(g.o2-g.co2)) > 0.15*float64(g.co2)
		}, 0.93},
		{"PaCO2 digits transposed", func(_ gasMaker, g invented) (string, bool) {
			c := g.co2%10*10 + g.co2/10
			return fmt.Sprintf("%.2f/%d/%d/%d fio2 %d%%", g.ph, c, g.o2, g.hco3, g.pct), g.co2 < 100 && math.Abs(float64(c-g.co2)) > 0.15*float64(g.co2)
		}, 0.97},
		{"BE in the bicarbonate place", func(_ gasMaker, g invented) (string, bool) {
			be := int(math.Round(0.9287 * (float64(g.hco3) - 24.4 + 14.83*(g.ph-7.4))))
			return fmt.Sprintf("%.2f/%d/%d/%d fio2 %d%%", g.ph, g.co2, g.o2, be, g.pct), true
		}, 0.99},
		{"one wrong digit in HCO3", func(m gasMaker, g invented) (string, bool) {
			h := g.hco3/10*10 + m.Intn(10)
			return fmt.Sprintf("%.2f/%d/%d/%d fio2 %d%%", g.ph, g.co2, g.o2, h, g.pct), math.Abs(float64(h-g.hco3)) >= 4
		}, 0.95},
		{"PaO2 and HCO3 exchanged", func(_ gasMaker, g invented) (string, bool) {
			return fmt.Sprintf("%.2f/%d/%d/%d fio2 %d%%", g.ph, g.co2, g.hco3, g.o2, g.pct), g.o2 > g.hco3+5
		}, 0.99},
	} {
		m := gasMaker{rand.New(rand.NewSource(3))}
		seen, caught := 0, 0
		for seen < 600 {
			line, counts := e.spoil(m, m.gas())
			if !counts {
				continue
			}
			seen++
			if doubted(Parse(line, Habits{Addressed: true})) {
				caught++
			}
		}
		share := float64(caught) / float64(seen)
		t.Logf("%s: %.1f %% doubted", e.name, 100*share)
		if share < e.least {
			t.Errorf("%s: only %.1f %% doubted, want %.0f %%", e.name, 100*share, 100*e.least)
		}
	}
}

// Slips with one plausible reading are read right and said.
func TestSlipsWithOneReading(t *testing.T) {
	m := gasMaker{rand.New(rand.NewSource(4))}
	const n = 3000
	right, kpa := 0, 0
	for i := 0; i < n; i++ {
		g := m.gas()
		l := Parse(fmt.Sprintf("%.0f/%d/%d/%d fio2 %d%%", g.ph*100, g.co2, g.o2, g.hco3, g.pct), Habits{Addressed: true})
		if reads(l, physio.PHq, g.ph, 1e-9) && doubted(l) {
			right++
		}
		l = Parse(fmt.Sprintf("%.2f/%.1f/%.1f/%d fio2 %d%%", g.ph, float64(g.co2)/7.50062, float64(g.o2)/7.50062, g.hco3, g.pct), Habits{Addressed: true})
		if reads(l, physio.PaCO2, float64(g.co2), 0.5) && reads(l, physio.PaO2, float64(g.o2), 0.5) && doubted(l) {
			kpa++
		} else if !doubted(l) {
			t.Errorf("kPa values of %s were used as mmHg in silence", g.line())
		}
	}
	if right < n || kpa < n*99/100 {
		t.Errorf("of %d: dropped point read %d, kPa read %d", n, right, kpa)
	}
}
