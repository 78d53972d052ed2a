package bot

import (
	"math"
	"strings"

	"galeward/physio"
)

// mechanics gives what the ventilator's numbers tell of the breath.
func (c *composer) mechanics() string {
	var parts []string
	for _, key := range []string{"vt_per_pbw", "vt_per_weight", "driving_pressure", "rsbi"} {
		if ix, ok := c.a.Index(key); ok {
			parts = append(parts, c.indexPhrase(ix)+mechanicsTail[key])
		}
	}
	if len(parts) == 0 {
		return ""
	}
	return upperFirst(strings.Join(parts, ", ")) + "."
}

// mechanicsTail completes the unit of an index where the weight is the
// predicted one.
var mechanicsTail = map[string]string{"vt_per_pbw": " predicted weight"}

// lacking names the one value that would settle the efficiency: the minute
// volume, or its missing half.
func (c *composer) lacking() string {
	s := &c.gas.Sample
	rate := s.Has(physio.RR) || s.Has(physio.RRSet)
	switch {
	case rate && !s.Has(physio.VT) && !s.Has(physio.VE):
		return "VT"
	case s.Has(physio.VT) && !rate:
		return "the rate"
	}
	return "VE"
}

// indexPhrase names an index with its value; a soft one as "about" and a
// range.
func (c *composer) indexPhrase(ix physio.Index) string {
	name := basisWord[ix.Key]
	if c.soft(ix) {
		return name + " about " + c.indexRange(ix)
	}
	about := ""
	if ix.Key == "vent_ratio" {
		about = "about "
	}
	return name + " " + about + c.n.index(ix, ix.Value)
}

// soft says that an index rests on an estimated FiO2.
func (c *composer) soft(ix physio.Index) bool {
	if !c.a.Oxygen.Estimated {
		return false
	}
	for _, q := range ix.Inputs {
		if q == physio.FiO2 {
			return true
		}
	}
	return false
}

func (c *composer) indexRange(ix physio.Index) string {
	low, high := c.n.index(ix, ix.Low), c.n.index(ix, ix.High)
	if i := strings.LastIndexByte(low, ' '); i > 0 {
		low = low[:i]
	}
	if strings.HasPrefix(low, "-") {
		return low + " to " + high
	}
	return low + "-" + high
}

// metabolic is the half-line of the metabolic side, when it changes the
// meaning.
func (c *composer) metabolic() string {
	ab := c.a.AcidBase
	if c.a.Fit.Grade == physio.FitReject {
		return "" // no verdict is built on a value that does not fit
	}
	var parts []string
	for _, p := range []physio.Process{physio.MetabolicAcidosis, physio.MetabolicAlkalosis} {
		if ab.Is(p) {
			parts = append(parts, c.metabolicProcess(p, len(parts) == 0))
		}
	}
	for _, p := range []physio.Process{physio.RespiratoryAcidosis, physio.RespiratoryAlkalosis} {
		metabolicFirst := ab.Primary == physio.MetabolicAcidosis || ab.Primary == physio.MetabolicAlkalosis
		if ab.Is(p) && metabolicFirst && c.a.Ventilation.Level != physio.LevelShortForNeed {
			parts = append(parts, "a "+processWord[p]+" beside it")
		}
	}
	if gap := c.gapWords(); gap != "" {
		parts = append(parts, gap)
	}
	if len(parts) == 0 {
		return ""
	}
	return "Metabolic side: " + strings.Join(parts, "; ") + "."
}

func (c *composer) metabolicProcess(p physio.Process, first bool) string {
	word := processWord[p]
	if c.a.AcidBase.Primary != p {
		word = "also " + word
	}
	sbe, ok := c.a.Index("sbe")
	if !ok || !first || math.Abs(sbe.Value) < physio.SaidSBE {
		return word
	}
	return word + ", SBE " + signed(sbe.Value) + " mmol/L"
}

func (c *composer) gapWords() string {
	if c.a.AcidBase.Gap == physio.GapUnknown {
		return ""
	}
	ix, ok := c.a.Index("anion_gap_corrected")
	if !ok {
		if ix, ok = c.a.Index("anion_gap"); !ok {
			return ""
		}
	}
	return basisWord[ix.Key] + " " + plain(ix.Value, 0) + ", " + string(c.a.AcidBase.Gap)
}
