package shorthand

import (
	"galeward/physio"
)

// modes finds out whether a mode with a set rate is named.
func (r *reader) modes() {
	for i := range r.t {
		if t := &r.t[i]; t.is(senseDevice) && controls(t.e.mode) && !r.negated(i) {
			r.controlled = true
		}
	}
}

// settings reads devices and modes with the numbers behind them.
func (r *reader) settings() {
	defer r.setRate()
	for i := range r.t {
		if t := &r.t[i]; t.is(senseDevice) && !t.used {
			r.deviceAt(i)
		} else if t.word("x") {
			r.volumeByRate(i)
		}
	}
}

func (r *reader) deviceAt(i int) {
	e, s := r.t[i].e, r.sample()
	if r.negated(i) {
		return
	}
	nums := r.numbersBehind(i)
	if len(nums) == 0 || r.t[nums[0]].percent {
		if before := r.pairBefore(i, e.device); before != nil {
			nums = before
		}
	}
	if e.mode == physio.VolumeCtrl && r.vitalCapacity(nums) {
		return
	}
	if e.mode != "" && (s.Mode == "" || s.Mode == physio.PressSupport) {
		s.Mode = e.mode
	}
	r.oxygen = append(r.oxygen, saying{at: i, device: e.device})
	switch {
	case e.mode == physio.PressSupport:
		r.pressureSupport(i, nums)
	case e.mode == physio.APRV:
		r.release(nums)
	case e.mode == physio.PressureCtrl:
		r.pressureControl(i, nums)
	case e.mode == physio.HFOV || e.mode == physio.HFJV:
	case e.mode != "":
		r.volumeMode(nums)
	case e.device == physio.Bilevel:
		r.bilevel(i, nums)
	case e.device == physio.CPAPDevice:
		r.cpap(nums)
	case e.device == physio.HighFlow:
		r.highFlow(nums)
	case e.device == physio.Ventilator:
		r.ventilator(nums)
	default:
		r.flowOrFiO2(i, e.device, nums)
	}
}

// pairBefore finds a pair of pressures in front of the device: "14/6 bipap".
func (r *reader) pairBefore(i int, d physio.Device) []int {
	if i < 3 || !r.t[i-1].free() || !r.t[i-2].sep("/") && !r.t[i-2].is(senseOver) || !r.t[i-3].free() {
		return nil
	}
	pressures := r.t[i-3].v <= 50 && r.t[i-1].v < r.t[i-3].v && (d == physio.Bilevel || d == physio.Ventilator)
	if r.joined(i-3) || r.t[i-1].percent || !pressures && d != physio.HighFlow {
		return nil
	}
	return []int{i - 3, i - 1}
}

// controls says that a labelled rate beside the mode is the set one.
func controls(m physio.Mode) bool {
	switch m {
	case physio.AssistCtrl, physio.VolumeCtrl, physio.PressureCtrl, physio.PRVC, physio.SIMV:
		return true
	}
	return false
}

// vitalCapacity says that VC is the vital capacity: litres, below 8.
func (r *reader) vitalCapacity(nums []int) bool {
	if len(nums) == 0 || r.t[nums[0]].decimals == 0 || r.t[nums[0]].v > 8 {
		return false
	}
	r.t[nums[0]].taken = true
	return true
}

// numbersBehind lists the free numbers behind a device word, up to the gas, a
// label, or another word.
func (r *reader) numbersBehind(i int) []int {
	var nums []int
	for j := i + 1; j < len(r.t) && len(nums) < 6; j++ {
		t := &r.t[j]
		switch {
		case t.kind == tokNumber:
			if !t.free() || r.gasStart(j) || j == r.first {
				return nums
			}
			if u, _ := r.unitAfter(j); u == uTime || u == uYear || u == uKg {
				return nums
			}
			nums = append(nums, j)
		case t.sep("/-:=(@,~") && !(t.s == "," && len(nums) > 0 && !t.glued), t.is(senseOver), t.word("x"), t.is(senseFiller) && (len(nums) == 0 || t.word("on") || t.word("at")):
		case t.is(senseUnit) && t.e.unit != uTime:
		case len(nums) == 0 && j < i+3 && (t.is(senseSaid) || t.word("settings") || t.word("setting") || t.word("mode") || t.word("mask") || t.word("with") || t.word("rate")):
		default:
			return nums
		}
	}
	return nums
}

// pair gives the first two numbers when they are tied: a/b, a over b, a b.
func (r *reader) pair(nums []int) (a, b *token, ok bool) {
	if len(nums) < 2 {
		return nil, nil, false
	}
	a, b = &r.t[nums[0]], &r.t[nums[1]]
	if a.percent || b.percent || nums[1]-nums[0] > 3 || a.decimals > 1 || b.decimals > 1 {
		return nil, nil, false
	}
	for j := nums[0] + 1; j < nums[1]; j++ {
		if r.t[j].is(senseUnit) && r.t[j].e.unit != uH2O {
			return nil, nil, false
		}
	}
	return a, b, true
}

// setPair keeps a tied pair under two quantities.
func (r *reader) setPair(nums []int, qa, qb physio.Quantity) {
	for k, q := range []physio.Quantity{qa, qb} {
		t := &r.t[nums[k]]
		r.take(nums[k], 0)
		if q.Possible(t.v) {
			r.sample().Set(q, t.v)
		} else {
			r.ask(*askImpossible(q, t.v, t.typed()))
		}
	}
}

func (r *reader) bilevel(i int, nums []int) {
	a, b, ok := r.pair(nums)
	if !ok || a.v > 50 || b.v > 30 || a.v < 4 || a.v == b.v {
		return
	}
	if a.v < b.v {
		nums = []int{nums[1], nums[0]}
		r.note(NoteVentOrder, physio.IPAP, b.typed(), b.v)
	}
	if r.newborn() {
		r.setPair(nums, physio.PIP, physio.PEEP)
	} else {
		r.setPair(nums, physio.IPAP, physio.EPAP)
	}
	if r.t[i].e.circ.Has(physio.HomeVentilation) || r.sample().Circumstance.Has(physio.HomeVentilation) {
		r.labelledSetRate()
	}
	if len(nums) > 2 && r.joined(nums[2]) {
		r.third(nums[2])
	}
}

// third reads what follows a pair with one more slash: 14/6/40.
func (r *reader) third(j int) {
	t := &r.t[j]
	switch {
	case t.percent || t.sign != 0:
	case t.v >= 36 && t.v <= 100 || t.v >= 0.21 && t.v <= 1 && t.decimals > 0:
		r.take(j, 0)
		r.sayFiO2(j, formOf(physio.FiO2, t, "", true))
	case t.v >= 6 && t.v <= 20:
		r.take(j, 0)
		r.sample().Set(physio.RRSet, t.v)
		r.note(NoteVentOrder, physio.RRSet, t.typed(), t.v)
	}
}

// setRate takes a labelled rate as the set one when the mode sets a rate and
// nothing says that it was measured.
func (r *reader) setRate() {
	if r.controlled && !r.measured {
		r.labelledSetRate()
	}
}

// labelledSetRate turns a rate that was already read into the set rate.
func (r *reader) labelledSetRate() {
	s := r.sample()
	if v, ok := s.Get(physio.RR); ok && !s.Has(physio.RRSet) {
		s.Drop(physio.RR)
		s.Set(physio.RRSet, v)
	}
}

func (r *reader) cpap(nums []int) {
	if len(nums) == 0 {
		return
	}
	if t := &r.t[nums[0]]; !t.percent && physio.CPAP.Possible(t.v) && t.v >= 2 && t.decimals <= 1 {
		r.take(nums[0], 0)
		r.sample().Set(physio.CPAP, t.v)
	}
}

// pressureSupport reads PS 10, PS 10/5 and PS 10+5. The second is PEEP.
func (r *reader) pressureSupport(i int, nums []int) {
	if len(nums) == 0 || r.t[i].s == "asv" {
		return
	}
	a := &r.t[nums[0]]
	if a.percent || !physio.PS.Possible(a.v) || a.v < 1 && a.decimals > 0 {
		return
	}
	r.take(nums[0], 0)
	r.sample().Set(physio.PS, a.v)
	if len(nums) > 1 {
		if b := &r.t[nums[1]]; !b.percent && b.v <= 20 && nums[1]-nums[0] <= 2 && b.decimals <= 1 {
			r.take(nums[1], 0)
			r.setNew(physio.PEEP, b.v)
		}
	}
}

func (r *reader) setNew(q physio.Quantity, v float64) {
	if !r.sample().Has(q) {
		r.sample().Set(q, v)
	}
}

// pressureControl reads PC 18/8. Whether 18 is above PEEP is said only by
// "over" or a plus; in newborns the first number is the peak.
func (r *reader) pressureControl(i int, nums []int) {
	r.labelledSetRate()
	if len(nums) == 0 {
		return
	}
	a := &r.t[nums[0]]
	if a.percent || !physio.PC.Possible(a.v) || a.decimals > 1 {
		return
	}
	if r.newborn() {
		if _, b, ok := r.pair(nums); ok && b.v < a.v {
			r.setPair(nums, physio.PIP, physio.PEEP)
		}
		return
	}
	r.take(nums[0], 0)
	r.sample().Set(physio.PC, a.v)
	above := r.t[nums[0]].sign == '+'
	if _, b, ok := r.pair(nums); ok && b.v <= 30 {
		r.take(nums[1], 0)
		r.setNew(physio.PEEP, b.v)
		for j := nums[0] + 1; j < nums[1]; j++ {
			above = above || r.t[j].is(senseOver)
		}
		above = above || b.sign == '+'
		if len(nums) > 2 {
			r.volumeMode(nums[2:])
		}
	}
	if !above {
		r.note(NotePCReference, physio.PC, a.typed(), a.v)
	}
}
