package shorthand

import (
	"testing"

	"galeward/physio"
)

// What would be is never what is: a question of a thread about other numbers
// changes nothing of the stored gas.
func TestSupposeInAThread(t *testing.T) {
	earlier := &physio.Sample{Device: physio.Ventilator}
	for q, v := range map[physio.Quantity]float64{physio.PHq: 7.28, physio.PaCO2: 58, physio.PaO2: 62, physio.RRSet: 20, physio.FiO2: 0.4} {
		earlier.Set(q, v)
	}
	noOxygen := &physio.Sample{}
	noOxygen.Set(physio.PHq, 7.28)
	noOxygen.Set(physio.PaCO2, 58)
	for _, c := range []struct {
		before     *physio.Sample
		text, want string
	}{
		{earlier, "and at paco2 50?", ":suppose change{paco2=50}"},
		{earlier, "if co2 were 52?", ":suppose change{paco2=52}"},
		{earlier, "and if the co2 was 52", ":suppose change{paco2=52}"},
		{earlier, "with rate 26?", ":suppose change{rr=26}"},
		{earlier, "with a rate of 26 and vt 450?", ":suppose change{rr=26 vt=450}"},
		{earlier, "so on 60%?", ":suppose change{fio2=0.6}"},
		{earlier, "what about peep 12?", ":suppose change{peep=12}"},
		{earlier, "say ph 7.35?", ":suppose change{ph=7.35}"},
		{earlier, "co2 50?", ":suppose change{paco2=50}"},
		{earlier, "co2 was 50?", ":suppose change{paco2=50}"},
		{earlier, "7.30/52/70/25 45%, and at co2 45?", ":suppose change{paco2=45} ph=7.3 paco2=52 pao2=70 hco3=25 fio2=0.45"},
		{earlier, "what if co2 52", ":suppose change{paco2=52}"},
		{earlier, "rate 26 instead?", ":suppose change{rr=26}"},
		{earlier, "and if it was venous?", ":suppose"},
		// what is said stays said
		{earlier, "co2 50 now", "paco2=50 follow:1"},
		{earlier, "sorry co2 was 50", "paco2=50 follow:3"},
		{earlier, "on 50%", "fio2=0.5 follow:2"},
		{earlier, "if co2 comes to 40 whats the ph", ":aim target{paco2=40}"},
		{noOxygen, "on 40%?", "fio2=0.4 follow:2"},
		{noOxygen, "spo2 92?", "spo2=0.92 follow:2"},
	} {
		if got := summary(Parse(c.text, Habits{Addressed: true, Earlier: c.before})); got != c.want {
			t.Errorf("%q: got %s, want %s", c.text, got, c.want)
		}
	}
}
