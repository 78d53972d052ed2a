package shorthand

import (
	"math"

	"galeward/physio"
)

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
