package physio

import (
	"slices"
	"testing"
)

// The base excess of five studies of cord blood, from their mean pH and PCO2,
// within 1.2 mmol/L of the printed means: analysers print several equations,
// and the pH of the mean is not the mean of pH. The mean babies lie inside the
// ranges of cord blood.
func TestTableCordBlood(t *testing.T) {
	tb := published(t, "cord_blood")
	ranges := map[string]Ranges{"artery": cordRanges, "vein": cordVeinRanges}
	compared := 0
	for _, row := range tb.rows {
		for _, vessel := range []string{"artery", "vein"} {
			r := ranges[vessel]
			ph := tb.number(row, "ph_"+vessel)
			if ph < r.PHLow || ph > r.PHHigh {
				t.Errorf("%s, %s: pH %v is outside %v-%v", row[0], vessel, ph, r.PHLow, r.PHHigh)
			}
			if tb.text(row, "pco2_"+vessel) == "" {
				continue
			}
			compared++
			pco2 := KPa(tb.number(row, "pco2_"+vessel)).MmHg()
			if pco2 < r.PaCO2Low || pco2 > r.PaCO2High {
				t.Errorf("%s, %s: PCO2 %.1f is outside %v-%v", row[0], vessel, pco2, r.PaCO2Low, r.PaCO2High)
			}
			near(t, row[0]+", "+vessel, standardBaseExcess(ph, bicarbonate(ph, pco2)), tb.number(row, "be_"+vessel), 1.2)
		}
	}
	if compared != 8 {
		t.Errorf("%d samples compared", compared)
	}
}

// The gases of asphyxiated newborns (Saugstad 1998): base excess of the means
// within 2.7 mmol/L of the printed one, which nears the printed one as the
// PCO2 falls, since a base excess of blood moves with PCO2 and a standard one
// does not; and each is read as an acidosis with a metabolic part.
func TestTableAsphyxiatedNewborns(t *testing.T) {
	tb := published(t, "asphyxia_newborn")
	for _, row := range tb.rows {
		n := func(column string) float64 { return tb.number(row, column) }
		at := tb.text(row, "minutes") + " min, " + tb.text(row, "gas")
		within := 2.7
		if n("pco2") < 40 {
			within = 1.3
		}
		near(t, at, standardBaseExcess(n("ph"), bicarbonate(n("ph"), n("pco2"))), -n("base_deficit"), within)
		s := Sample{Population: Newborn}
		s.Set(PHq, n("ph"))
		s.Set(PaCO2, n("pco2"))
		s.Set(PaO2, n("po2"))
		a := Assess(s, Setting{})
		if a.AcidBase.Primary != MetabolicAcidosis && !slices.Contains(a.AcidBase.Also, MetabolicAcidosis) {
			t.Errorf("%s: read as %v with %v", at, a.AcidBase.Primary, a.AcidBase.Also)
		}
	}
}
