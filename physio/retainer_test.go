package physio

import "testing"

// British Thoracic Society guideline (O'Driscoll 2017): 88-92 % in those at
// risk of hypercapnia, whatever the device.
func TestRetainersOxygenIsHeldAgainstTheirRange(t *testing.T) {
	for _, c := range []struct {
		name          string
		circumstance  Circumstance
		pao2, flow    float64
		inside, above bool
	}{
		{"COPD on 2 L, saturation 92 %", COPD, 66, 2, true, false},
		{"COPD on 8 L without a device, saturation 96 %", COPD, 90, 8, false, true},
		{"COPD on 2 L, saturation 85 %", COPD, 52, 2, false, false},
		{"COPD, no oxygen said", COPD, 66, 0, false, false},
		{"no word of a retainer", 0, 66, 2, false, false},
	} {
		var s Sample
		s.Set(PHq, 7.36)
		s.Set(PaCO2, 52)
		s.Set(PaO2, c.pao2)
		s.Blood, s.Circumstance = Arterial, c.circumstance
		if c.flow > 0 {
			s.Set(OxygenFlow, c.flow)
		}
		a := Assess(s, Setting{})
		if got := a.Oxygenation.InsideUsual; got != c.inside {
			t.Errorf("%s: inside the usual range %v, want %v", c.name, got, c.inside)
		}
		if got := a.Raised(CautionAboveRetainer); got != c.above {
			t.Errorf("%s: above the range %v, want %v", c.name, got, c.above)
		}
	}
}
