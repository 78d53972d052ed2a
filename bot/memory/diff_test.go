package memory

import (
	"fmt"
	"testing"

	"galeward/bot/shorthand"
	"galeward/physio"
)

func TestDifferenceNamesEveryRule(t *testing.T) {
	to := House{
		Units: shorthand.KPa, Order: []physio.Quantity{physio.PHq, physio.PaO2}, Words: map[string]string{"b": "bilevel"},
		PB: 650, Altitude: 1200, Population: physio.Child, Target: &physio.Target{Low: 0.88, High: 0.92},
		TargetPaCO2: &physio.Span{Low: 45, High: 55}, Critical: &physio.CriticalLimits{PHLow: 7.15, PaO2Low: 40},
		Private: true, Listen: true, Zone: "Europe/London", Times: []string{"07:00"}, ShiftEnds: []string{"07:30", "19:30"},
		Editors: []string{"U1", Managers},
	}
	want := "[{units  kPa} {order  ph, pao2} {words.b  bilevel} {pressure_mmhg  650} {altitude_m  1200} {population  child} " +
		"{target_spo2  88-92} {target_paco2_mmhg  45-55} {critical.pao2_low_mmhg  40} {critical.ph_low  7.15} {private  true} " +
		"{listen  true} {zone  Europe/London} {times  07:00} {shift_ends  07:30, 19:30} {editors  U1, managers}]"
	expect(t, "set", fmt.Sprint(diff(House{}, to)), want)
	expect(t, "taken away", len(diff(to, House{})), len(diff(House{}, to)))
	expect(t, "the same", len(diff(to, to.Clone())), 0)
}
