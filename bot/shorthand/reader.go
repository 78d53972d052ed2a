package shorthand

import (
	"galeward/physio"
)

// reader reads the tokens of one gas, or of one set of bedside values.
type reader struct {
	h Habits
	t []token
	g Gas
	// raw are the core values before they are settled.
	raw raws
	// first and last are the tokens of the chain of unlabelled gas values, -1
	// when there is none. slashes says that separators joined it.
	first, last int
	slashes     bool
	oxygen      []saying
	// mixed says that the commas of the chain had two meanings.
	mixed bool
	// controlled says that a mode with a set rate is named, measured that a
	// rate was said to be the patient's own.
	controlled bool
	measured   bool
	smallPlace bool // a small positive number stands in the HCO3 place
	claims     bool // the text makes claims, whose numbers are no values
	// missed is set for an empty place of the chain.
	missed map[physio.Quantity]bool
	who    who
}

func (r *reader) sample() *physio.Sample { return &r.g.Sample }

func (r *reader) note(c NoteCode, q physio.Quantity, typed string, v float64) {
	r.g.Notes = append(r.g.Notes, Note{Code: c, Quantity: q, Typed: typed, Value: v})
}

func (r *reader) ask(q Question) { r.g.Questions = append(r.g.Questions, q) }

// readGas reads one segment of a line.
func readGas(t []token, h Habits, o segment) Gas {
	r := &reader{h: h, t: t, raw: raws{}, first: -1, last: -1, mixed: o.mixed, claims: o.claims, missed: map[physio.Quantity]bool{}}
	r.g.Bed, r.g.Time = o.bed, o.time
	r.targets()
	r.monoxide()
	r.unread()
	r.marks()
	r.said()
	r.usual()
	r.measures()
	r.modes()
	r.postfix()
	r.headings()
	r.labels()
	r.settings()
	r.chain()
	r.onTheOxygen()
	r.labelsBehind()
	r.phBesideLabels()
	r.signedPEEP()
	r.readOxygen()
	r.settle()
	r.leftovers()
	if o.corrects {
		r.lonePH()
	}
	r.notRead()
	r.finish()
	return r.g
}

// newborn says that the line or the house speaks of a newborn.
func (r *reader) newborn() bool {
	p := r.population()
	return p == physio.Newborn || p == physio.Preterm
}

func (r *reader) population() physio.Population {
	if p := r.sample().Population; p != "" {
		return p
	}
	if r.h.Earlier != nil && r.h.Earlier.Population != "" {
		return r.h.Earlier.Population
	}
	return r.h.Setting.Population
}

// adult says that adult sizes are expected.
func (r *reader) adult() bool {
	switch r.population() {
	case physio.Newborn, physio.Preterm, physio.Child:
		return false
	}
	w, ok := r.sample().Get(physio.Weight)
	return !ok || w >= 30
}

// said takes the words on blood, patient, circumstance and bed.
func (r *reader) said() {
	s := r.sample()
	for i := range r.t {
		t := &r.t[i]
		if t.kind != tokWord || t.e == nil || r.negated(i) {
			continue
		}
		e := t.e
		if (e.sense == senseSaid || e.sense == senseDevice) && (e.circ != physio.BledInOxygen || r.besideOxygen(i)) {
			s.Circumstance |= e.circ
		}
		if e.sense != senseSaid {
			continue
		}
		r.saidBlood(i, e)
		if e.pop != "" && (s.Population == "" || e.pop == physio.Preterm) {
			s.Population = e.pop
		}
		if e.sex != "" && s.Sex == "" {
			s.Sex = e.sex
		}
	}
}

// negated says that the word before takes the meaning back.
func (r *reader) negated(i int) bool {
	if i == 0 || r.t[i-1].kind != tokWord {
		return false
	}
	switch r.t[i-1].s {
	case "no", "not", "without", "denies", "never", "rule", "off", "non", "isnt", "wasnt":
		return true
	case "out": // "rule out"
		return i > 1 && r.t[i-2].s == "rule"
	}
	return false
}

// saidBlood takes a word on the sample. Doubt beside it is kept as doubt.
func (r *reader) saidBlood(i int, e *entry) {
	s := r.sample()
	if e.blood == "" {
		return
	}
	if s.Blood == physio.Cord && e.site == "" && e.blood != physio.Cord {
		s.Site = cordSite(e.blood)
		return
	}
	doubted := r.near(i, 3, "could", "maybe", "might", "possibly", "possible", "probably", "probable", "or", "query", "unsure", "think", "suspect", "?venous", "likely", "looks", "perhaps") || r.questioned(i)
	switch {
	case doubted && e.blood != physio.Arterial && e.site == "":
		s.Blood = physio.BloodUncertain
	case s.Blood == physio.BloodUncertain:
	case s.Blood == "" || s.Blood == physio.Arterial || e.site != "" || s.Blood == physio.Venous && e.blood != physio.Arterial:
		if e.blood == physio.Arterial && s.Blood != "" && e.site == "" {
			return
		}
		s.Blood, s.Site = e.blood, e.site
	}
}

// cordSite is the vessel that a word on the blood names in a cord gas.
func cordSite(b physio.Blood) physio.Site {
	if b == physio.Arterial {
		return physio.CordArterySite
	}
	return physio.CordVeinSite
}

// questioned says that a question mark directly follows or leads the word.
func (r *reader) questioned(i int) bool {
	return i+1 < len(r.t) && r.t[i+1].sep("?") || i > 0 && r.t[i-1].sep("?") && r.t[i].glued
}

// near says that one of the words stands within n tokens before i.
func (r *reader) near(i, n int, words ...string) bool {
	for j := i - 1; j >= 0 && j >= i-n; j-- {
		for _, w := range words {
			if r.t[j].word(w) {
				return true
			}
		}
	}
	return false
}
