package shorthand

import (
	"math"

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
		if before := r.pairBefore(i); before != nil {
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
func (r *reader) pairBefore(i int) []int {
	if i < 3 || !r.t[i-1].free() || !r.t[i-2].sep("/") && !r.t[i-2].is(senseOver) || !r.t[i-3].free() {
		return nil
	}
	if r.joined(i-3) || r.t[i-1].percent || r.t[i-3].v > 50 || r.t[i-1].v >= r.t[i-3].v {
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

// release reads APRV 28/0 5/0.5.
func (r *reader) release(nums []int) {
	if _, _, ok := r.pair(nums); ok {
		r.setPair(nums, physio.PHigh, physio.PLow)
		if len(nums) >= 4 {
			r.setPair(nums[2:], physio.THigh, physio.TLow)
		}
	}
}

// ventilator reads what follows a bare "vent": a pair of pressures, or the
// numbers of a volume mode.
func (r *reader) ventilator(nums []int) {
	a, b, ok := r.pair(nums)
	switch {
	case !ok && len(nums) < 3:
	case ok && a.v <= 50 && b.v <= 20 && a.v > b.v && a.v >= 8 && b.v >= 2 && len(nums) == 2:
		r.setPair(nums, physio.PIP, physio.PEEP)
		r.labelledSetRate()
		if !r.newborn() {
			r.note(NoteVentOrder, physio.PIP, a.typed(), a.v)
		}
	default:
		for _, n := range nums {
			if v := r.t[n].v; v >= 150 && v <= 1200 {
				r.volumeMode(nums)
				return
			}
		}
	}
}

// volumeByRate reads 500x14.
func (r *reader) volumeByRate(i int) {
	if !r.timesPair(i) {
		return
	}
	a, b := i-1, i+1
	if r.t[a].v < r.t[b].v && r.t[a].v >= 2 {
		a, b = b, a
	}
	if !r.t[a].free() || !r.t[b].free() || !physio.RRSet.Possible(r.t[b].v) {
		return
	}
	r.store(physio.VT, a, r.volumeUnit(a), 0)
	r.take(b, 0)
	r.setNew(physio.RRSet, r.t[b].v)
}

func (r *reader) volumeUnit(i int) string {
	if u, _ := r.unitAfter(i); u == uML || u == uLitre {
		return u
	}
	return ""
}

// volumeMode gives each unlabelled number behind a mode to what its size and
// its order allow: VT by size, FiO2 by its sign or size, PEEP by its plus or
// size, and the rate is the first number left.
func (r *reader) volumeMode(nums []int) {
	var rest []int
	bare := 0
	for _, n := range nums {
		t := &r.t[n]
		u, ut := r.unitAfter(n)
		switch {
		case u == uLitre && t.v > 1.6 || u == uLPM:
			continue
		case t.percent:
			continue // read with the oxygen
		case t.sign == '+' && t.v <= 30:
			r.take(n, 0)
			r.setNew(physio.PEEP, t.v)
		case r.isVolume(t, u) && !r.sample().Has(physio.VT):
			r.store(physio.VT, n, u, ut)
			bare++
		default:
			rest = append(rest, n)
		}
	}
	r.smallNumbers(rest, bare)
}

func (r *reader) isVolume(t *token, u string) bool {
	if u == uML {
		return true
	}
	return t.v >= 120 && t.v <= 1500 || t.v >= 0.2 && t.v < 1.5 && t.decimals > 0 && u == uLitre || !r.adult() && t.v > 60 && t.v < 120
}

// smallNumbers gives the bare numbers of a mode to rate, PEEP and FiO2, and
// says so when three or more were bare.
func (r *reader) smallNumbers(rest []int, bare int) {
	s := r.sample()
	said := bare+len(rest) >= 3
	for k, n := range rest {
		t := &r.t[n]
		q := physio.RRSet
		switch {
		case k == 0 && !s.Has(physio.RRSet) && t.v >= 4 && t.v <= 60 && t.decimals == 0:
		case t.v >= 21 && t.v <= 100 && !r.hasFiO2() && t.decimals == 0, t.v >= 0.21 && t.v <= 1 && t.decimals > 0:
			q = physio.FiO2
		case t.v <= 24 && !s.Has(physio.PEEP):
			q = physio.PEEP
		default:
			continue
		}
		r.take(n, 0)
		f := formOf(q, t, "", r.adult())
		if q == physio.FiO2 {
			r.sayFiO2(n, f)
		} else {
			s.Set(q, f.v)
		}
		if said {
			r.note(NoteVentOrder, q, t.typed(), f.v)
		}
	}
}

func (r *reader) hasFiO2() bool {
	for _, o := range r.oxygen {
		if o.fio2 > 0 {
			return true
		}
	}
	return false
}

// signedPEEP reads a lone +8 beside ventilator words or after the oxygen.
func (r *reader) signedPEEP() {
	for i := range r.t {
		t := &r.t[i]
		if !t.free() || t.sign != '+' || t.v > 30 || t.percent || t.decimals > 1 {
			continue
		}
		if r.first >= 0 && i == r.last+1 && r.raw[physio.BE] == nil && r.fitsBE(t.v) && !r.onVentilator() {
			continue
		}
		r.take(i, 0)
		r.setNew(physio.PEEP, t.v)
	}
	// A base excess in front of or behind the other values.
	for i := range r.t {
		t := &r.t[i]
		if !t.free() || t.sign == 0 || t.percent || t.v > 30 || r.raw[physio.BE] != nil || r.first < 0 || math.Abs(float64(i-r.last)) > 2 {
			continue
		}
		r.raw[physio.BE] = &rawValue{v: t.signed(), decimals: t.decimals, typed: t.typed()}
		r.take(i, 0)
	}
}

func (r *reader) onVentilator() bool {
	s := r.sample()
	if s.Mode != "" || s.Has(physio.VT) || s.Has(physio.RRSet) {
		return true
	}
	for _, o := range r.oxygen {
		if o.device == physio.Ventilator || o.device == physio.Bilevel || o.device == physio.CPAPDevice {
			return true
		}
	}
	return false
}
