package shorthand

import (
	"strings"

	"galeward/physio"
)

// unreadWords name a quantity that is not read here, with the name it is given
// in the note. Common practice of the bedside.
var unreadWords = map[string]string{
	"vc": vitalCapacityName, "fvc": vitalCapacityName, "vital capacity": vitalCapacityName, "forced vital capacity": vitalCapacityName,
	"dp": drivingName, "driving pressure": drivingName,
	"ecmo": circuitName, "vv ecmo": circuitName, "va ecmo": circuitName, "vvecmo": circuitName, "vaecmo": circuitName, "ecls": circuitName, "on ecmo": circuitName, "flow": circuitName, "flows": circuitName, "pump flow": circuitName, "circuit flow": circuitName,
	"sweep": sweepName, "sweep gas": sweepName, "sweep gas flow": sweepName, "sweep flow": sweepName,
}

const (
	vitalCapacityName = "vital capacity"
	drivingName       = "driving pressure"
	circuitName       = "ECMO flow"
	sweepName         = "sweep"
)

// mostUnread is more than one line about one patient holds of them.
const mostUnread = 20

// unread takes the numbers of quantities that are not read here, so that they
// become no volume, pressure or flow of something else, and says so.
func (r *reader) unread() {
	looked := 0
	for i := range r.t {
		t := &r.t[i]
		name := ""
		if t.kind == tokWord {
			name = unreadWords[t.s]
		}
		if name == "" {
			continue
		}
		if looked++; looked > mostUnread {
			return
		}
		if !r.isUnread(i, name) {
			continue
		}
		j, ok := r.unreadNumber(i, name)
		if !ok {
			continue
		}
		_, n := r.unitAfter(j)
		r.take(j, n)
		r.t[j].taken = true
		if name == vitalCapacityName || t.is(senseLabel) {
			t.e, t.used = nil, true // no mode and no label
		}
		r.note(NoteNotRead, physio.PHq, name+" "+r.t[j].typed(), r.t[j].v)
	}
}

// isUnread says that the word is used in the sense that is not read.
func (r *reader) isUnread(i int, name string) bool {
	switch name {
	case vitalCapacityName:
		return r.t[i].s != "vc" || r.vcIsVitalCapacity(i)
	case drivingName:
		return r.ventSetting()
	case sweepName:
		return r.speaksOfECMO()
	case circuitName:
		ownDevice := i > 0 && r.t[i-1].is(senseDevice)
		return !ownDevice && r.speaksOfECMO()
	}
	return true
}

func (r *reader) speaksOfECMO() bool {
	for j := range r.t {
		if t := &r.t[j]; t.kind == tokWord && t.e != nil && t.e.circ.Has(physio.ECMO) {
			return true
		}
	}
	return false
}

// unreadNumber finds the number of the quantity: behind its word, or a volume
// in front of a vital capacity.
func (r *reader) unreadNumber(i int, name string) (int, bool) {
	said := name == circuitName && strings.Contains(r.t[i].s, "flow") // a word of flow stands between
	for j := i + 1; j < len(r.t) && j <= i+5; j++ {
		t := &r.t[j]
		switch {
		case t.free():
			u, _ := r.unitAfter(j)
			flow := said || u == uLitre || u == uLPM
			return j, !r.gasStart(j) && !t.percent && (name != circuitName || flow) && (name != vitalCapacityName || t.decimals > 0 || t.v >= 5)
		case name == circuitName && (t.word("flow") || t.word("flows") || t.word("flow rate")):
			said, t.used = true, true
		case t.sep(":=~("), t.is(senseFiller):
		default:
			j = len(r.t)
		}
	}
	if name == vitalCapacityName && i >= 2 {
		for _, j := range []int{i - 2, i - 4} {
			if j >= 0 && r.t[j].free() {
				u, n := r.unitAfter(j)
				return j, j+n+1 == i && (u == uML || u == uMLKg || u == uLitre)
			}
		}
	}
	return 0, false
}

// weakWords are illnesses in which the vital capacity is followed, common
// practice.
var weakWords = []string{"gbs", "guillain", "barre", "guillain barre", "myasthenia", "mnd", "als", "spinal", "sci", "cord injury", "neuromuscular", "nmd", "dmd", "duchenne", "myopathy", "botulism", "cidp", "quadriplegia", "tetraplegia", "nif", "mip", "fvc"}

// vcIsVitalCapacity says that VC stands for the vital capacity: one number
// follows, no setting of a ventilator stands in the line, and a weakness, room
// air or nothing that a ventilator needs does.
func (r *reader) vcIsVitalCapacity(i int) bool {
	if len(r.numbersBehind(i)) > 1 || r.ventSetting() {
		return false
	}
	rate, oxygen := false, false
	for j := range r.t {
		t := &r.t[j]
		for _, w := range weakWords {
			if t.word(w) {
				return true
			}
		}
		if t.is(senseAir) {
			return true
		}
		rate = rate || t.is(senseLabel) && (t.e.q == physio.RR || t.e.q == physio.RRSet)
		oxygen = oxygen || t.percent || t.is(senseLabel) && t.e.q == physio.FiO2
	}
	return !rate && !oxygen
}

// ventSetting says that a setting or a word of a ventilator stands in the line.
func (r *reader) ventSetting() bool {
	for i := range r.t {
		t := &r.t[i]
		if t.kind == tokWord && (t.s == "vc" || unreadWords[t.s] == vitalCapacityName) || r.negated(i) {
			continue
		}
		if t.is(senseDevice) && t.e.device == physio.Ventilator || t.word("x") && r.timesPair(i) || t.word("ett") {
			return true
		}
		if !t.is(senseLabel) {
			continue
		}
		switch t.e.q {
		case physio.PEEP, physio.RRSet, physio.VT, physio.VTPerKg, physio.Pplat, physio.PIP, physio.PS, physio.PC:
			return true
		}
	}
	return false
}
