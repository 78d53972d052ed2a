package bot

import (
	"math"
	"strings"

	"galeward/physio"
)

// repeatSpread is the change between two samples beyond which it is not the
// scatter of repeat samples: PaCO2 2.1 mmHg, PaO2 9.1 mmHg or 10 %, pH 0.03
// (Mallat 2015; Thorson 1983).
func repeatSpread(q physio.Quantity, v float64) float64 {
	switch q {
	case physio.PaCO2:
		return max(2.06, 0.051*v)
	case physio.PaO2:
		return max(9.1, 0.10*v)
	case physio.PHq:
		return 0.03
	}
	return 0
}

// changeSentence splits the change since the gas before by axis: the values,
// and whether each is beyond the spread of repeat samples.
func (c *composer) changeSentence(when string, t *turn) string {
	if t.before == nil {
		return ""
	}
	var parts []string
	if now, ok := c.gas.Sample.Get(physio.PHq); ok {
		if before, had := t.before.Sample.Get(physio.PHq); had {
			parts = append(parts, "pH "+phText(before)+" to "+phText(now)+c.spreadWord(physio.PHq, before, now))
		}
	}
	for _, q := range []physio.Quantity{physio.PaCO2, physio.PaO2} {
		now, ok := c.gas.Sample.Get(q)
		before, had := t.before.Sample.Get(q)
		if !ok || !had {
			continue
		}
		parts = append(parts, q.Info().Symbol+" "+c.n.pressure(before)+" to "+c.n.pressure(now)+c.spreadWord(q, before, now))
	}
	if now, ok := c.a.Index("pf"); ok {
		if before, had := t.assess(t.before).Index("pf"); had {
			parts = append(parts, "P/F "+c.n.about(before.Value)+" to "+c.n.about(now.Value)+c.ratioSpread(before, now))
		}
	}
	if len(parts) == 0 {
		return ""
	}
	return "Since the gas " + when + ": " + strings.Join(parts, "; ") + "."
}

func (c *composer) spreadWord(q physio.Quantity, before, now float64) string {
	if math.Abs(now-before) <= repeatSpread(q, before) {
		return " (inside the spread of repeat samples)"
	}
	return ""
}

func (c *composer) ratioSpread(before, now physio.Index) string {
	if math.Abs(now.Value-before.Value) <= 0.10*before.Value {
		return " (inside the spread)"
	}
	return ""
}
