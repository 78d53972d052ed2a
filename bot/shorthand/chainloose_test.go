package shorthand

import (
	"testing"

	"galeward/physio"
)

// The pH does not always come first. Bicarbonate tells the order where it was
// typed (Henderson-Hasselbalch); else how possible each order is does.
var looseLines = []lineTest{
	{"", "40 7.40 95 24", "ph=7.4 paco2=40 pao2=95 hco3=24 !order_read:ph:=7.4"},
	{"", "95/40/7.40", "ph=7.4 paco2=40 pao2=95 !order_read:ph:=7.4"},
	{"", "32/7.48/110 ra", "ph=7.48 paco2=32 pao2=110 fio2=0.21 on:air !order_read:ph:=7.48"},
	{"", "24/95/40/7.40", "ph=7.4 paco2=40 pao2=95 hco3=24 !order_read:ph:=7.4"},
	{"", "82/110/7.21/32 60%", "ph=7.21 paco2=82 pao2=110 hco3=32 fio2=0.6 !order_read:ph:=7.21"},
	{"", "40/7.40/95/24/97 ra", "ph=7.4 paco2=40 pao2=95 hco3=24 sao2=0.97 fio2=0.21 on:air !order_read:ph:=7.4"},
	{"K", "5.3/7.40/12.7/24", "ph=7.4 paco2=39.75 pao2=95.26 hco3=24 !order_read:ph:=7.4"},
	{"Q", "40/7.40/95/24", "ph=7.4 paco2=40 pao2=95 hco3=24 !order_read:ph:=7.4"},
	{"Q", "95/40/7.40", "ph=7.4 paco2=40 pao2=95 !order_read:ph:=7.4"},
	{"", "40 7.4 95 24", "ph=7.4 paco2=40 pao2=95 hco3=24 !order_read:ph:=7.4"},
	{"K", "5.3/7.4/12.7", "ph=7.4 paco2=39.75 pao2=95.26 !order_read:ph:=7.4"},
	{"K", "7.38/5.3/7.4/23", "ph=7.38 paco2=39.75 pao2=55.5 hco3=23"},
	{"", "40-7.40-95-24", "ph=7.4 paco2=40 pao2=95 hco3=24 !order_read:ph:=7.4"},
	{"", "40/7.40/95/-2", "ph=7.4 paco2=40 pao2=95 be=-2 !order_read:ph:=7.4"},
	{"", "co2 40 po2 95 7.40", "ph=7.4 paco2=40 pao2=95"},
	// two orders fit: both are offered
	{"", "62/58/7.28", "ph=7.28 ?order[PaCO2 62, PaO2 58|PaO2 62, PaCO2 58]"},
	{"", "58 7.28 62 27 40%", "ph=7.28 fio2=0.4 ?order[PaCO2 58, PaO2 62, HCO3 27|PaO2 58, PaCO2 62, HCO3 27]"},
	{"Q", "62/58/7.28", "ph=7.28 ?order[PaCO2 62, PaO2 58|PaO2 62, PaCO2 58]"},
	// nothing fits: asked all the same, never silent
	{"", "300/500/7.28", "ph=7.28 ?order[]"},
	{"", "300/7.28/400", "ph=7.28 ?order[]"},
	// a bed, a rate, a time before the gas stay what they are
	{"", "14 7.28/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4"},
	{"", "rr 24 7.28/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 rr=24"},
	{"", "40 7.28 58 62 27", "ph=7.28 paco2=58 pao2=62 hco3=27"},
	{"", "0630 7.28 58 62 27", "ph=7.28 paco2=58 pao2=62 hco3=27 at:06:30"},
	{"Q", "12/7.30/19.00 shift", "silence"},
	{"Q", "10 7.5 8", "silence"},
	{"Q", "swap 3 7.50 ett 2", "silence"},
}

func TestLooseOrders(t *testing.T) { runLines(t, looseLines) }

// A house that types the pH elsewhere is read when it stands first after all.
func TestPHFirstInAnotherHouse(t *testing.T) {
	h := Habits{Addressed: true, Order: []physio.Quantity{physio.PaCO2, physio.PaO2, physio.PHq}}
	want := "ph=7.31 paco2=48 pao2=95 hco3=24 !order_read:ph:=7.31"
	if got := summary(Parse("7.31/48/95/24", h)); got != want {
		t.Errorf("got %s, want %s", got, want)
	}
}
