package shorthand

import (
	"fmt"
	"math/rand"
	"strings"
	"testing"

	"galeward/physio"
)

// layout types the values of one gas in a random layout: separators, labels,
// spaces, decimal commas, markup and the order of labelled values.
func layout(r *rand.Rand, g invented) string {
	if r.Intn(2) == 0 {
		return dress(r, labelledLayout(r, g))
	}
	seps := []string{"/", " / ", "/ ", " ", "  ", "|", "\\", " over ", "⁄", "／", "\u00a0", "\t", ";", "-", " - ", "–"}
	sep := seps[r.Intn(len(seps))]
	line := strings.Join([]string{fmt.Sprintf("%.2f", g.ph), fmt.Sprint(g.co2), fmt.Sprint(g.o2), fmt.Sprint(g.hco3)}, sep)
	gap := []string{" ", "  ", ", ", " \n"}[r.Intn(4)]
	return dress(r, line+gap+oxygenForm(r, g.pct))
}

func labelledLayout(r *rand.Rand, g invented) string {
	pick := func(names ...string) string { return names[r.Intn(len(names))] }
	join := []string{" ", ": ", "=", " = ", ":"}[r.Intn(5)]
	parts := []string{
		pick("pH", "ph", "PH") + join + fmt.Sprintf("%.2f", g.ph),
		pick("pCO2", "PaCO2", "co2", "pCO₂", "PaCO₂") + join + fmt.Sprint(g.co2),
		pick("pO2", "PaO2", "po2", "PaO₂") + join + fmt.Sprint(g.o2),
		pick("HCO3", "bicarb", "HCO₃⁻", "bic") + join + fmt.Sprint(g.hco3),
		pick("FiO2", "fio2", "FiO₂") + join + pick(fmt.Sprint(g.pct), fmt.Sprintf("%d%%", g.pct), fmt.Sprintf("0.%02d", g.pct), fmt.Sprintf(".%02d", g.pct)),
	}
	r.Shuffle(len(parts), func(a, b int) { parts[a], parts[b] = parts[b], parts[a] })
	return strings.Join(parts, []string{" ", ", ", "; ", "\n", " | ", "\n- "}[r.Intn(6)])
}

func oxygenForm(r *rand.Rand, pct int) string {
	forms := []string{"%d%%", "on %d%%", "@%d%%", "%d %%", "fio2 %d", "FiO2 0.%02d", "on %d", "%d percent", "FiO₂ %d %%", "fi %d"}
	return fmt.Sprintf(forms[r.Intn(len(forms))], pct)
}

// dress adds what a chat program or a keyboard adds round a line.
func dress(r *rand.Rand, s string) string {
	dresses := []func(string) string{
		func(s string) string { return s },
		func(s string) string { return "*" + s + "*" },
		func(s string) string { return "“" + s + "”" },
		func(s string) string { return "\ufeff" + s + "\r\n" },
		func(s string) string { return "> " + s },
		func(s string) string { return "<@U012AB> " + s },
		func(s string) string { return "• " + s + " 🙏" },
		func(s string) string { return "`" + s + "`" },
		func(s string) string { return "abg: " + s },
		fullWidth,
	}
	return dresses[r.Intn(len(dresses))](s)
}

func fullWidth(s string) string {
	return strings.Map(func(c rune) rune {
		if c > ' ' && c < 0x7f {
			return c + 0xFEE0
		}
		return c
	}, s)
}

// Layout carries no meaning: the same values are read from every layout,
// without a question.
func TestLayoutsReadTheSame(t *testing.T) {
	m := gasMaker{rand.New(rand.NewSource(7))}
	for i := 0; i < 6000; i++ {
		g := m.gas()
		if g.pct %= 60; g.pct < 36 || g.pct%5 != 0 {
			g.pct = 50 // what may be a rate or a saturation has rungs of its own
		}
		if float64(g.o2) > 250 {
			continue
		}
		text := layout(m.Rand, g)
		l := Parse(text, Habits{Addressed: true})
		if len(l.Gases) != 1 || l.Kind != Reading {
			t.Fatalf("%q: kind %d, %d gases", text, l.Kind, len(l.Gases))
		}
		for q, want := range map[physio.Quantity]float64{physio.PHq: g.ph, physio.PaCO2: float64(g.co2), physio.PaO2: float64(g.o2), physio.HCO3: float64(g.hco3), physio.FiO2: float64(g.pct) / 100} {
			if !reads(l, q, want, 1e-9) {
				t.Fatalf("%q: %s is not %v: %s", text, q.Key(), want, summary(l))
			}
		}
		for _, q := range l.Gases[0].Questions {
			if q.Code != AskCeiling {
				t.Fatalf("%q: %s", text, summary(l))
			}
		}
	}
}

func TestFold(t *testing.T) {
	for in, want := range map[string]string{
		"７．２８／５８": "7.28/58", "PaCO₂": "PaCO2", "HCO₃⁻": "HCO3", "4️⃣0️⃣%": "40%", "٧٫٢٨": "7.28", "7·28": "7.28",
		"BE −5": "BE -5", "рН": "pH", "½ L": ".5 L", "a\u200bb": "ab", "a\u00a0b": "a b", "37°C": "37C", "7..28": "7.28",
		"&lt;20": "<20", "a\r\nb": "a\nb", "🤔": " ", "Sättigung": "Sattigung", "\xff": " ", "→": "->", "é": "e",
	} {
		if got := fold(in); got != want {
			t.Errorf("fold(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestStripText(t *testing.T) {
	for in, want := range map[string]string{
		"a <b>c</b>": "a  c ", "<script>alert(1)</script> x": "   x", "<@U1> y": "  y", "<20 z": "<20 z",
		"see https://example.org/7.28/58 now": "see   now", "5 < 6 > 4": "5 < 6 > 4",
	} {
		if got := stripText(in); strings.Join(strings.Fields(got), " ") != strings.Join(strings.Fields(want), " ") {
			t.Errorf("stripText(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestCommas(t *testing.T) {
	for in, want := range map[string]string{
		"7,28/7,7": "7.28/7.7", "7.28,58,62,27": "7.28/58/62/27", "7,28,7,7,8,3,27": "7.28/7.7/8.3/27", "3,5,7,9,11": "3,5,7,9,11",
		"1,600 m": "1600 m", "0,350": "0.350", "7,285": "7.285", "a, b": "a, b", "728,58,62,27": "728/58/62/27", "7,40,40,95,24": "7.40/40/95/24",
	} {
		if got, _ := commas(in); got != want {
			t.Errorf("commas(%q) = %q, want %q", in, got, want)
		}
	}
}
