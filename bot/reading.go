package bot

import (
	"strings"
	"time"

	"galeward/bot/memory"
	"galeward/bot/reply"
	"galeward/bot/shorthand"
	"galeward/physio"
)

// reading answers a line that holds one gas or several.
func (t *turn) reading() {
	if len(t.line.Gases) > 1 {
		t.several()
		return
	}
	gas := t.line.Gases[0]
	c := &composer{gas: &gas, n: numbers{t.v.House.Units}}
	c.notices = t.notices()
	if gas.Follow == shorthand.FollowNone {
		t.deliverReading(c)
		return
	}
	parent, which := t.parent(gas.Bed)
	if which == nil && ownGas(&gas, &parent.Gas) {
		gas.Follow = shorthand.FollowNone
		t.deliverReading(c)
		return
	}
	switch {
	case which != nil && (which.id == askBed || gas.Sample.Values.Empty()):
		t.askWhich(which)
		return
	case which != nil:
		c.question = which
	case gas.Follow == shorthand.FollowNow && measured(&gas.Sample):
		t.inherit(c, parent.Entry)
	default:
		t.complete(c, parent)
	}
	t.deliverReading(c)
}

// measured says that a follow-up brings a measurement: one that brings settings
// only completes the gas that is there.
func measured(s *physio.Sample) bool {
	for _, q := range []physio.Quantity{physio.PHq, physio.PaCO2, physio.PaO2, physio.SpO2, physio.SaO2, physio.EtCO2, physio.TcCO2} {
		if s.Has(q) {
			return true
		}
	}
	return false
}

// deliverReading assesses, composes and remembers.
func (t *turn) deliverReading(c *composer) {
	c.a = t.assess(c.gas)
	if c.gas.Follow != shorthand.FollowNone {
		c.said = t.v.Thread().Asked
	}
	if c.gas.Follow == shorthand.FollowNow && c.change != "" {
		c.change = c.changeSentence(c.change, t)
	}
	r := c.compose()
	t.keep(c, &r)
	t.stand(&r)
	t.answer.Machine = c.machine(r)
	t.answer.Reply = r
}

// assess assesses what a reading leaves standing, in the house's setting.
func (t *turn) assess(g *shorthand.Gas) *physio.Assessment {
	a := physio.Assess(settled(g), t.settingFor(g))
	return &a
}

// stand adds the standing notice to a user's first reading.
func (t *turn) stand(r *reply.Reply) {
	if t.v.FirstTime && t.e.User != "" {
		r.Add(reply.Standing, standingNotice)
		t.stood = true
	}
}

// settled is the half of a reading that a doubt leaves standing: where the
// pressures may stand the other way round, bicarbonate must not be used to
// work out a PaCO2 behind the question's back.
func settled(g *shorthand.Gas) physio.Sample {
	s := g.Sample
	for _, q := range g.Questions {
		switch q.Code {
		case shorthand.AskSwap, shorthand.AskPaCO2, shorthand.AskOverRange, shorthand.AskUnit:
			if !s.Has(physio.PaCO2) {
				s.Drop(physio.HCO3, physio.BE)
			}
		}
	}
	return s
}

func (t *turn) now() time.Time {
	if !t.e.At.IsZero() {
		return t.e.At
	}
	return t.b.now()
}

// notices are our own state and the declined requests.
func (t *turn) notices() []string {
	var out []string
	switch {
	case t.v.Degraded && t.v.Known:
		out = append(out, storeDown)
	case t.v.Degraded:
		out = append(out, storeDownBlank)
	case t.v.Full:
		out = append(out, storeFull)
	}
	for _, d := range t.line.Declined {
		out = append(out, refusalText[d])
	}
	if text := laterWork[t.line.Intent]; text != "" {
		out = append(out, text)
	}
	return out
}

// inherited quantities: what a follow-up takes over from the gas before it,
// settings and the patient, never what was measured in the blood.
var inheritedQuantities = []physio.Quantity{
	physio.FiO2, physio.OxygenFlow, physio.RR, physio.RRSet, physio.VT, physio.VTPerKg, physio.VE,
	physio.PEEP, physio.PS, physio.PC, physio.IPAP, physio.EPAP, physio.CPAP, physio.PHigh, physio.PLow,
	physio.THigh, physio.TLow, physio.Hb, physio.Age, physio.Gestation, physio.Height, physio.Weight,
	physio.PBW, physio.PB, physio.Altitude,
}

// inherit takes over from the gas before what the follow-up did not say, and
// names it and its age.
func (t *turn) inherit(c *composer, last memory.Entry) {
	g, before := c.gas, last.Gas
	oxygenSaid := g.Sample.Has(physio.FiO2) || g.Sample.Device != physio.DeviceUnstated || g.Sample.Has(physio.OxygenFlow)
	var names []string
	for _, q := range inheritedQuantities {
		if g.Sample.Has(q) || oxygenSaid && (q == physio.FiO2 || q == physio.OxygenFlow) {
			continue
		}
		if v, ok := before.Sample.Get(q); ok {
			g.Sample.Set(q, v)
			names = append(names, shortName(q))
		}
	}
	if !oxygenSaid && before.Sample.Device != physio.DeviceUnstated {
		g.Sample.Device, g.Sample.DeviceTaken = before.Sample.Device, before.Sample.DeviceTaken
		names = append(names, deviceWord[before.Sample.Device])
	}
	inheritPatient(g, &before)
	c.change = agoWords(t.now().Sub(last.At))
	if len(names) > 0 {
		c.inherited = "Taken over from the gas " + c.change + ": " + strings.Join(names, ", ") + "."
	}
	t.before = &before
}

func shortName(q physio.Quantity) string { return q.Info().Symbol }

// inheritPatient takes over what belongs to the patient and the bed.
func inheritPatient(g, before *shorthand.Gas) {
	if g.Sample.Sex == physio.SexUnstated {
		g.Sample.Sex = before.Sample.Sex
	}
	if g.Sample.Population == physio.PopulationUnstated {
		g.Sample.Population, g.Sample.Trimester = before.Sample.Population, before.Sample.Trimester
	}
	if g.Sample.Mode == physio.ModeUnstated {
		g.Sample.Mode = before.Sample.Mode
	}
	if g.Bed == "" {
		g.Bed = before.Bed
	}
	if g.Target == nil {
		g.Target = before.Target
	}
	if g.UsualPaCO2 == 0 {
		g.UsualPaCO2 = before.UsualPaCO2
	}
	g.Sample.Circumstance |= before.Sample.Circumstance &^ (physio.JustChanged | physio.CPR)
}

// agoWords says how old the parent gas is.
func agoWords(d time.Duration) string {
	switch {
	case d < 90*time.Second:
		return "just before"
	case d < 2*time.Hour:
		return plain(d.Minutes(), 0) + " min ago"
	}
	return plain(d.Hours(), 0) + " h ago"
}
