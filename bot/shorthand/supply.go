package shorthand

import (
	"math"

	"galeward/physio"
)

// supply is one consistent set of sayings on oxygen.
type supply struct {
	device  physio.Device
	fio2    float64
	flow    float64
	hasFlow bool
}

func (a *supply) add(s saying) {
	if s.device != "" && rank(s.device) >= rank(a.device) {
		a.device = s.device
	}
	if s.fio2 > 0 {
		a.fio2 = s.fio2
	}
	if s.hasFlow {
		a.flow, a.hasFlow = s.flow, true
	}
}

func (a *supply) empty() bool { return a.device == "" && a.fio2 == 0 && !a.hasFlow }

// rank orders devices by support, so that "vent" wins over the mask that the
// line mentions beside it.
func rank(d physio.Device) int {
	for i, o := range []physio.Device{"", physio.Air, physio.SimpleMask, physio.Cannula, physio.ReservoirCannula, physio.PulseDose,
		physio.ReservoirMask, physio.FaceTent, physio.Hood, physio.TPiece, physio.TracheostomyMask, physio.Venturi,
		physio.HighFlow, physio.CPAPDevice, physio.Bilevel, physio.BagMask, physio.Ventilator, physio.Chamber} {
		if o == d {
			return i
		}
	}
	return 0
}

// settleOxygen turns the sayings into one supply, or a question when two are
// said and nothing says which was on at the draw.
func (r *reader) settleOxygen() {
	before, after, split := r.splitSayings()
	switch {
	case split && r.drawWord() && !before.empty():
		r.useSupply(before)
		if before.fio2 > 0 {
			r.note(NoteFiO2AtDraw, physio.FiO2, "", before.fio2)
		} else if before.hasFlow {
			r.note(NoteFiO2AtDraw, physio.OxygenFlow, "", before.flow)
		}
	case split && differ(before, after):
		r.askWhich(before, after)
	default:
		r.settleSingle()
	}
}

// settleSingle joins the sayings of a line that speaks of one moment.
func (r *reader) settleSingle() {
	var a supply
	for _, s := range r.oxygen {
		if s.fio2 > 0 && a.fio2 > 0 && math.Abs(s.fio2-a.fio2) > 1e-9 || s.hasFlow && a.hasFlow && s.flow != a.flow {
			var b supply
			b.add(s)
			r.askWhich(a, b)
			return
		}
		if s.device == physio.Air && (a.hasFlow && a.flow > 0) {
			b := supply{device: physio.Air, fio2: 0.21}
			r.askWhich(a, b)
			return
		}
		a.add(s)
	}
	if a.device == physio.Air && a.fio2 > 0.22 {
		a.device = ""
	}
	r.useSupply(a)
}

// splitSayings parts the sayings at a word that says that the oxygen changed.
func (r *reader) splitSayings() (before, after supply, split bool) {
	at := -1
	for i := range r.t {
		t := &r.t[i]
		changes := t.word("now") || t.word("currently") || t.word("then") || t.word("changed to") || t.word("just changed to") || t.word("later")
		changes = changes || (t.word("to") || t.word("up to") || t.word("down to") || t.kind == tokArrow) && r.near(i, 3, "changed", "up", "down", "weaned", "went", "increased", "decreased", "switched", "moved", "turned") || t.kind == tokArrow
		if changes && r.saysOxygen(i, len(r.t)) && r.saysOxygen(0, i) {
			at = i
			break
		}
	}
	if at < 0 {
		return before, after, false
	}
	for _, s := range r.oxygen {
		if s.at < at {
			before.add(s)
		} else {
			after.add(s)
		}
	}
	return before, after, true
}

func (r *reader) saysOxygen(from, to int) bool {
	for _, s := range r.oxygen {
		if s.at >= from && s.at < to && (s.fio2 > 0 || s.hasFlow) {
			return true
		}
	}
	return false
}

func (r *reader) drawWord() bool {
	for i := range r.t {
		switch r.t[i].s {
		case "drawn", "when drawn", "draw", "drew", "sampled", "taken", "collected", "was":
			if r.t[i].kind == tokWord {
				return true
			}
		}
	}
	return false
}

func differ(a, b supply) bool {
	return a.fio2 != b.fio2 || a.flow != b.flow || a.device != b.device && a.device != "" && b.device != ""
}

// askWhich asks which of two supplies was on when the sample was drawn.
func (r *reader) askWhich(a, b supply) {
	r.ask(Question{Code: AskWhichOxygen, Quantity: physio.FiO2, Choices: []Choice{a.choice(), b.choice()}})
}

func (a supply) choice() Choice {
	c := Choice{Device: a.device}
	if a.hasFlow {
		c.Set.Set(physio.OxygenFlow, a.flow)
		c.Word = number(a.flow) + " L"
	}
	if a.fio2 > 0 {
		c.Set.Set(physio.FiO2, a.fio2)
		c.Word = number(a.fio2*100) + " %"
	}
	if a.device == physio.Air {
		c.Word = "room air"
	}
	if c.Device == "" && a.hasFlow && a.flow <= mostCannula && a.fio2 == 0 {
		c.Device = physio.Cannula
	}
	return c
}

// mostCannula is the flow up to which litres without a device are taken as a
// nasal cannula: it is given up to 6 L/min, common practice.
const mostCannula = 6.0

// useSupply keeps the supply, takes a cannula for few litres and asks for the
// device of many.
func (r *reader) useSupply(a supply) {
	s := r.sample()
	if a.fio2 > 0 {
		s.Set(physio.FiO2, a.fio2)
	}
	s.Device = a.device
	if !a.hasFlow {
		return
	}
	s.Set(physio.OxygenFlow, a.flow)
	switch inherits := r.h.Earlier != nil && r.h.Earlier.Device != "" && r.first < 0; {
	case a.device == physio.Bilevel || a.device == physio.Ventilator || a.device == physio.CPAPDevice:
		if a.fio2 == 0 && a.flow > 0 && a.flow <= 15 {
			s.Circumstance |= physio.BledInOxygen
		}
	case a.device != "" || a.fio2 > 0 && a.flow <= 15 || inherits && r.h.Earlier.Device != physio.Air:
	case a.fio2 > 0:
		s.Device, s.DeviceTaken = physio.HighFlow, true
	case s.Circumstance.Has(physio.BledInOxygen):
	case a.flow <= mostCannula:
		s.Device, s.DeviceTaken = physio.Cannula, true
		r.note(NoteCannulaTaken, physio.OxygenFlow, number(a.flow), a.flow)
	default:
		r.askDevice(a.flow)
	}
}

func (r *reader) askDevice(flow float64) {
	ask := Question{Code: AskFlowDevice, Quantity: physio.OxygenFlow, Typed: number(flow), Value: flow}
	if flow <= 15 {
		ask.Choices = []Choice{{Word: "simple mask", Device: physio.SimpleMask}, {Word: "reservoir mask", Device: physio.ReservoirMask}}
	}
	ask.Choices = append(ask.Choices, Choice{Word: "high flow", Device: physio.HighFlow})
	r.ask(ask)
}
