package physio

import (
	"path/filepath"
	"testing"
)

// Whole published tables: see testdata/tables. They print means of groups, so
// that a formula of means may differ from the mean of the formula; each
// tolerance says what it allows.

func published(t *testing.T, name string) table {
	t.Helper()
	return readTable(t, filepath.Join("..", "testdata", "tables", name+".csv"))
}

// The gases of Chiumello 2006 over pH and PCO2 of their own side: saturations
// of means of 11 patients, within 1.5 points where the curve is flat and 2 in
// venous blood, and the oxygen fraction that P/F and PaO2 share.
func TestTableSaturationsInLungInjury(t *testing.T) {
	tb := published(t, "ards_prone")
	for _, row := range tb.rows {
		at := tb.text(row, "position")
		arterial := CurveShift{PH: PH(tb.number(row, "ph")), PaCO2: MmHg(tb.number(row, "paco2"))}
		venous := CurveShift{PH: PH(tb.number(row, "phv")), PaCO2: MmHg(tb.number(row, "pvco2"))}
		near(t, at+": SaO2", 100*saturation(tb.number(row, "pao2"), arterial), tb.number(row, "sao2"), 1.5)
		near(t, at+": SvO2", 100*saturation(tb.number(row, "pvo2"), venous), tb.number(row, "svo2"), 2)
		near(t, at+": FiO2", tb.number(row, "pao2")/tb.number(row, "pf"), 0.427, 0.01)
	}
}

// The venous admixture of the same patients, with the printed venous
// saturation: a fifth to a third of the flow, the usual size at such a P/F
// (common practice), and lower prone than supine, where P/F is higher.
// Haemoglobin is not printed and hardly matters: it is in all contents.
func TestTableVenousAdmixtureFallsWhenProne(t *testing.T) {
	tb := published(t, "ards_prone")
	before := 1.0
	for _, row := range tb.rows {
		g := LungGas{
			Gas:  AlveolarGas{FiO2: Fraction(tb.number(row, "pao2") / tb.number(row, "pf")), PB: 760, PaCO2: MmHg(tb.number(row, "paco2"))},
			PaO2: MmHg(tb.number(row, "pao2")), SaO2: Percent(tb.number(row, "sao2")), Shift: CurveShift{PH: PH(tb.number(row, "ph"))},
		}.filled()
		got, err := Shunt(Contents{
			Capillary: Content(g.capillary(g.alveolar())),
			Arterial:  Content(g.content(g.PaO2.MmHg(), float64(g.SaO2))),
			Venous:    Content(g.content(tb.number(row, "pvo2"), tb.number(row, "svo2")/100)),
		})
		if err != nil {
			t.Fatal(err)
		}
		if v := float64(got); v < 0.20 || v > 0.33 || v >= before {
			t.Errorf("%s: venous admixture %.3f after %.3f", tb.text(row, "position"), v, before)
		}
		before = float64(got)
	}
}

// Dead space from the printed CO2 output, minute volume and PaCO2, within 0.10
// of the printed one and always above it: the ventilator's minute volume holds
// gas that was only compressed in the tubing, and the means are of 11 patients.
func TestTableDeadSpaceFromOutput(t *testing.T) {
	tb := published(t, "ards_prone")
	for _, row := range tb.rows {
		got, err := DeadSpaceFromOutput(GasRate(tb.number(row, "vco2")), Flow(tb.number(row, "ve")), MmHg(tb.number(row, "paco2")))
		if err != nil {
			t.Fatal(err)
		}
		near(t, tb.text(row, "position"), float64(got), tb.number(row, "vdvt")+0.05, 0.05)
	}
}

// Venous blood holds the bicarbonate that the tissues' CO2 makes: 2 to 4 mmol/L
// above arterial, the base excess of both alike within 3.
func TestTableBicarbonateAcrossTheBody(t *testing.T) {
	tb := published(t, "ards_prone")
	for _, row := range tb.rows {
		a := bicarbonate(tb.number(row, "ph"), tb.number(row, "paco2"))
		v := bicarbonate(tb.number(row, "phv"), tb.number(row, "pvco2"))
		near(t, "bicarbonate, venous less arterial", v-a, 3, 1)
		sbe := standardBaseExcess(tb.number(row, "phv"), v) - standardBaseExcess(tb.number(row, "ph"), a)
		near(t, "base excess, venous less arterial", sbe, 1.5, 1.5)
	}
}

// PCO2 foreseen from the change of alveolar ventilation at an unchanged CO2
// output, against the PCO2 measured on oxygen: within 0.4 kPa (Hollier 2014).
// The healthy on 50 % breathed more and kept their PCO2, so that their output
// had risen; theirs is the largest difference.
func TestTablePCO2FromAlveolarVentilation(t *testing.T) {
	tb := published(t, "obesity_oxygen")
	for _, row := range tb.rows {
		n := func(column string) float64 { return tb.number(row, column) }
		before := n("ve_air") * (1 - n("vdvt_air"))
		output := KPa(n("pco2_air")).MmHg() * before / outputConstant
		got, err := PaCO2FromOutput(GasRate(output), Flow(n("ve")*(1-n("vdvt"))))
		if err != nil {
			t.Fatal(err)
		}
		near(t, tb.text(row, "group")+" on "+tb.text(row, "fio2"), got.KPa(), n("pco2"), 0.4)
	}
}

// The dead space and minute volume that VD/VT, breath and rate make, against
// the printed ones: within 20 % and 13 %, as the breaths of the healthy are
// medians and the rest are means.
func TestTableBreaths(t *testing.T) {
	tb := published(t, "obesity_oxygen")
	for _, row := range tb.rows {
		for _, when := range []string{"_air", ""} {
			n := func(column string) float64 { return tb.number(row, column+when) }
			dead, err := DeadSpace(Fraction(n("vdvt")), Volume(n("vt")))
			if err != nil {
				t.Fatal(err)
			}
			minute, err := MinuteVolume(Breathing{Breath: Volume(n("vt")), Rate: Rate(n("rr"))})
			if err != nil {
				t.Fatal(err)
			}
			near(t, tb.text(row, "group")+": dead space over the printed", float64(dead)/n("dead"), 0.9, 0.1)
			near(t, tb.text(row, "group")+": minute volume over the printed", float64(minute)/n("ve"), 1.03, 0.1)
		}
	}
}

// At 4559 m the pressure by altitude gives the printed alveolar-arterial
// differences within 1 mmHg; the standard atmosphere would be 3 too low.
func TestTableGasesAt4559Metres(t *testing.T) {
	tb := published(t, "sickness_4559m")
	pb, err := PressureAtAltitude(4559)
	if err != nil {
		t.Fatal(err)
	}
	for _, row := range tb.rows {
		alveolar, err := AlveolarPO2(AlveolarGas{FiO2: 0.2093, PB: pb, PaCO2: MmHg(tb.number(row, "paco2"))})
		if err != nil {
			t.Fatal(err)
		}
		near(t, tb.text(row, "sickness"), alveolar.MmHg()-tb.number(row, "pao2"), tb.number(row, "aa"), 1)
	}
}

// Two weeks at 3600 m (Wachsmuth 2013): the base excess of the printed PaCO2
// and bicarbonate within 0.8 of the printed; from the sixth day the bicarbonate
// of chronic hypocapnia within 0.5; and an alveolar PO2 above the arterial one
// by 0 to 10 mmHg in all who lay at altitude.
func TestTableTwoWeeksAt3600Metres(t *testing.T) {
	tb := published(t, "footballers_3600m")
	for _, row := range tb.rows {
		if tb.text(row, "paco2") == "" {
			continue
		}
		n := func(column string) float64 { return tb.number(row, column) }
		near(t, "base excess", standardBaseExcess(phFrom(n("paco2"), n("hco3")), n("hco3")), n("be"), 0.8)
		if n("day") >= 6 {
			near(t, "chronic hypocapnia", chronicHypocapniaHCO3(n("paco2"), AnchorAdult), n("hco3"), 0.5)
		}
		if n("day") > 0 {
			near(t, "A-a", aboutPA(0.2093, westPressure(n("metres")), n("paco2"))-n("pao2"), 5, 5)
		}
	}
}

// The highlanders at home: with the PaCO2 that is usual there (38.3 - 2.5 x
// height in km, Vazquez 2000) the alveolar PO2 is no lower than the arterial one
// by more than 1 mmHg and no higher by more than 13, the most on the first days
// after a stay near sea level.
func TestTableHighlandersAtHome(t *testing.T) {
	tb := published(t, "footballers_3600m")
	compared := 0
	for _, row := range tb.rows {
		if tb.text(row, "team") != "highlander" || tb.number(row, "metres") < 1000 {
			continue
		}
		compared++
		alveolar := aboutPA(0.2093, westPressure(3600), 38.3-2.5*3.6)
		near(t, "A-a of day "+tb.text(row, "day"), alveolar-tb.number(row, "pao2"), 6, 7)
	}
	if compared != 5 {
		t.Errorf("%d days compared", compared)
	}
}
