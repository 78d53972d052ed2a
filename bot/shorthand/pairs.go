package shorthand

import (
	"galeward/physio"
)

// twoNumbers asks about two bare numbers, when the bot was meant and nothing
// else was read.
func (p *parser) twoNumbers(t []token) {
	if len(p.line.Gases) != 1 || !p.line.Gases[0].Sample.Values.Empty() || len(p.line.Gases[0].Questions) > 0 {
		return
	}
	var nums []*token
	for i := range t {
		switch {
		case t[i].kind == tokNumber:
			nums = append(nums, &t[i])
		case t[i].sep("/,-|\n") || t[i].is(senseOver):
		default:
			return
		}
	}
	if len(nums) != 2 {
		return
	}
	co2, o2 := p.pressure(nums[0].v), p.pressure(nums[1].v)
	if !physio.PaCO2.Possible(co2) || !physio.PaO2.Possible(o2) {
		return
	}
	yes := Choice{Word: "PaCO2/PaO2"}
	yes.Set.Set(physio.PaCO2, co2)
	yes.Set.Set(physio.PaO2, o2)
	p.line.Gases[0].Questions = []Question{{Code: AskTwoNumbers, Quantity: physio.PaCO2, Typed: nums[0].s + "/" + nums[1].s, Choices: []Choice{yes, {Word: "no gas"}}}}
}

// shareCord makes all gases of a message about a cord cord gases.
func shareCord(gases []Gas) {
	if len(gases) < 2 || gases[0].Sample.Blood != physio.Cord {
		return
	}
	for i := range gases[1:] {
		s := &gases[i+1].Sample
		if s.Blood == physio.Arterial || s.Blood == physio.Venous {
			s.Blood, s.Site = physio.Cord, cordSite(s.Blood)
		}
	}
}

// pressure reads a bare pressure in the channel's unit, when that is possible.
func (p *parser) pressure(v float64) float64 {
	if p.h.Units == KPa && v < 27 {
		return physio.KPa(v).MmHg()
	}
	return v
}

// venousPair joins an arterial and a venous gas of one moment: the venous side
// goes into the arterial gas.
func venousPair(a, b *Gas) (Gas, bool) {
	if isVenous(a.Sample.Blood) && (b.Sample.Blood == physio.Arterial || b.Sample.Blood == "") && b.Sample.Has(physio.PHq) {
		a, b = b, a
	}
	if !isVenous(b.Sample.Blood) || isVenous(a.Sample.Blood) || a.Sample.Blood == physio.Cord || a.Sample.Blood == physio.Capillary {
		return Gas{}, false
	}
	out := *a
	for from, to := range map[physio.Quantity]physio.Quantity{physio.PaCO2: physio.PvCO2, physio.PaO2: physio.PvO2, physio.SaO2: physio.SvO2} {
		if v, ok := b.Sample.Get(from); ok && to.Possible(v) {
			out.Sample.Set(to, v)
		}
	}
	b.Sample.Each(func(q physio.Quantity, v float64) {
		if !isCore(q) && !out.Sample.Has(q) {
			out.Sample.Set(q, v)
		}
	})
	if out.Sample.Device == "" {
		out.Sample.Device = b.Sample.Device
	}
	out.Sample.Circumstance |= b.Sample.Circumstance
	out.Sample.Blood = physio.Arterial
	out.Notes = append(out.Notes, b.Notes...)
	for _, q := range b.Questions {
		if q.Code != AskTwoGases && q.Code != AskVenous {
			out.Questions = append(out.Questions, q)
		}
	}
	return out, true
}

func isVenous(b physio.Blood) bool {
	return b == physio.Venous || b == physio.CentralVenous || b == physio.MixedVenous
}
