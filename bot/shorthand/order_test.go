package shorthand

import (
	"testing"

	"galeward/physio"
)

// Any order of values that a house can set is read by that order.
func TestHouseOrders(t *testing.T) {
	ph, co2, o2, hco3, be, sat := physio.PHq, physio.PaCO2, physio.PaO2, physio.HCO3, physio.BE, physio.SaO2
	for _, c := range []struct {
		order []physio.Quantity
		text  string
		want  string
	}{
		{[]physio.Quantity{ph, o2, co2, hco3}, "7.31/68/55/27 35%", "ph=7.31 paco2=55 pao2=68 hco3=27 fio2=0.35"},
		{[]physio.Quantity{ph, o2, co2, hco3}, "7.31/55/68/27 35%", "ph=7.31 hco3=27 fio2=0.35 ?swap[swapped|as typed]"},
		{[]physio.Quantity{ph, co2, o2, be, hco3, sat}, "7.31/55/68/0/27/91 35%", "ph=7.31 paco2=55 pao2=68 hco3=27 be=0 sao2=0.91 fio2=0.35"},
		{[]physio.Quantity{ph, co2, o2, be, hco3}, "7.31 55 68 +1 27 35%", "ph=7.31 paco2=55 pao2=68 hco3=27 be=1 fio2=0.35"},
		{[]physio.Quantity{ph, co2, o2, sat, hco3}, "7.31/55/68/91/27 35%", "ph=7.31 paco2=55 pao2=68 hco3=27 sao2=0.91 fio2=0.35"},
		{[]physio.Quantity{co2, o2, ph}, "55/68/7.31 35%", "ph=7.31 paco2=55 pao2=68 fio2=0.35"},
		{[]physio.Quantity{o2, co2, hco3}, "7.31/55/68/27 35%", "ph=7.31 paco2=55 pao2=68 hco3=27 fio2=0.35"},
		{[]physio.Quantity{ph, o2, co2}, "pH 7.31 co2 55 o2 68", "ph=7.31 paco2=55 pao2=68"},
		{[]physio.Quantity{ph, co2, hco3, o2}, "7.31/55/27/68 35%", "ph=7.31 paco2=55 pao2=68 hco3=27 fio2=0.35"},
	} {
		if got := summary(Parse(c.text, Habits{Addressed: true, Order: c.order})); got != c.want {
			t.Errorf("%v %q: got %s, want %s", c.order, c.text, got, c.want)
		}
	}
}
