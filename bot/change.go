package bot

import (
	"math"
	"strings"

	"galeward/physio"
)

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
	if math.Abs(now-before) <= physio.RepeatSpread(q, before) {
		return " (inside the spread of repeat samples)"
	}
	return ""
}

func (c *composer) ratioSpread(before, now physio.Index) string {
	if math.Abs(now.Value-before.Value) <= physio.RatioSpread*before.Value {
		return " (inside the spread)"
	}
	return ""
}
