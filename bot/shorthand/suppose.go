package shorthand

import (
	"math"
	"strings"

	"galeward/physio"
)

var (
	// leadsSuppose are words that lead a what-if of a thread: "and at co2 50?".
	leadsSuppose = sift(`^\s*(?:(?:and|so|then|but|ok|okay|hmm|now|or)[ ,]+)*(?:at|with|if|on|what if|say|saying|assuming|assume|for|supposing|imagine|in case|what about|how about|what with|what at|let'?s say|were|would|could|can (?:we|i|you)|maybe|perhaps|try|trying)\b`)
	// ifAlone is an if that asks for no other value by name.
	ifAlone   = sift(`^\s*(?:(?:and|so|then|but|ok|okay|hmm|or)[ ,]+)*(?:if|what if|say|assuming|supposing|imagine)\b`)
	asksValue = sift(`\bwhats\b|\b(what|which|how)\b(?: +(?:$|[^ai ]|a[^b]|i[^f]))`)
)

// supposes says that a line of a thread, without a gas of its own, asks what
// would be rather than tells what is.
func (p *parser) supposes(s string, g *grams, t []token) bool {
	if p.h.Earlier == nil || len(s) > 200 || correctionWords.in(s, g) || holdsGas(t) {
		return false
	}
	asks := strings.HasSuffix(strings.TrimRight(s, " !\n"), "?")
	led := leadsSuppose.in(s, g)
	if !asks && !(ifAlone.in(s, g) && !asksValue.in(s, g)) {
		return false
	}
	if asksValue.in(s, g) && !led {
		return false
	}
	v := p.clauseValues(t)
	if v.Empty() {
		return led && asks && wasBlood.in(s, g) // "and if it was venous?"
	}
	if p.answersOxygen(&v) {
		return false
	}
	return led || bareValue(t) && (p.differs(&v) || setByStaff(&v))
}

// holdsGas says that the tokens hold a whole gas, not only a labelled pH.
func holdsGas(t []token) bool {
	for _, c := range coreStarts(t) {
		if isGas(t, c) {
			return true
		}
	}
	return false
}

// answersOxygen says that only oxygen is said, and the gas before has none:
// "on 40%?" then completes it.
func (p *parser) answersOxygen(v *physio.Values) bool {
	e := p.h.Earlier
	if e.Has(physio.FiO2) || e.Has(physio.OxygenFlow) || e.Device == physio.Air {
		return false
	}
	only := true
	v.Each(func(q physio.Quantity, _ float64) { only = only && (q == physio.FiO2 || q == physio.OxygenFlow) })
	return only
}

// differs says that the gas before holds another value of one of these.
func (p *parser) differs(v *physio.Values) bool {
	found := false
	v.Each(func(q physio.Quantity, x float64) {
		have, ok := p.h.Earlier.Get(q)
		found = found || ok && math.Abs(have-x) > 1e-9
	})
	return found
}

// setByStaff says that only settings are said, which staff chooses: with a
// question mark they are a choice, not a state.
func setByStaff(v *physio.Values) bool {
	all := true
	v.Each(func(q physio.Quantity, _ float64) {
		switch q {
		case physio.RR, physio.RRSet, physio.VT, physio.VTPerKg, physio.VE, physio.PEEP, physio.PS, physio.PC, physio.IPAP,
			physio.EPAP, physio.CPAP, physio.FiO2, physio.OxygenFlow, physio.PHigh, physio.PLow, physio.THigh, physio.TLow:
		default:
			all = false
		}
	})
	return all
}

// pressuresOnly says that a line is nothing but gas pressures under their full
// names, "PCO2 55": nobody chats so.
func pressuresOnly(t []token) bool {
	named := false
	for i := range t {
		if !t[i].is(senseLabel) {
			continue
		}
		core := t[i].e.q == physio.PaCO2 || t[i].e.q == physio.PaO2
		if !core || !strings.HasPrefix(t[i].s, "p") {
			return false
		}
		named = true
	}
	return named && bareValue(t)
}

// joins says that a word may stand beside a bare what-if: "and co2 45?", "rate
// 28 instead?".
func joins(w string) bool {
	switch w {
	case "and", "so", "then", "but", "or", "ok", "okay", "instead", "rather", "enough", "help", "better":
		return true
	}
	return false
}

// bareValue says that the line holds nothing but labels, numbers and units.
func bareValue(t []token) bool {
	for i := range t {
		x := &t[i]
		if x.kind == tokWord && !x.is(senseLabel) && !x.is(senseUnit) && !x.is(senseFiller) && !x.is(senseDevice) && !joins(x.s) {
			return false
		}
	}
	return true
}
