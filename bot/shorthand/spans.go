package shorthand

import (
	"strings"

	"galeward/physio"
)

// spanIsAge says that days, weeks or months are somebody's age and not how
// long something lasts: a word of age or of a small child stands with them, or
// weeks or months lead the line and the gas follows at once. Beside an adult they are
// never an age.
func (r *reader) spanIsAge(i, n int) bool {
	switch {
	case r.speaksOfAdult():
		return false
	case saysOld(r.t[i+n].s), r.besideSex(i + n + 1):
		return true
	}
	days := r.t[i+n].e.ofAge() && r.t[i+n].e.unit == uDay
	if r.speaksOfChild() {
		return !days || !r.behindIllness(i)
	}
	return !days && r.leadsGas(i, n)
}

// saysOld says that the unit itself is one of age.
func saysOld(unit string) bool {
	for _, end := range []string{"old", "do", "weeker", "weekers", "wkr", "wker", "ga", "gestation", "age"} {
		if strings.HasSuffix(unit, end) {
			return true
		}
	}
	return false
}

// behindIllness says that the word directly before the number at i is none of
// age or of a small child: "croup 2 days", "ventilated 2 days".
func (r *reader) behindIllness(i int) bool {
	if i == 0 || r.t[i-1].kind != tokWord || r.t[i-1].line != r.t[i].line {
		return false
	}
	t := &r.t[i-1]
	switch {
	case t.word("age"), t.word("aged"), t.is(senseFiller), t.word("boy"), t.word("girl"), t.word("m"), t.word("f"):
		return false
	case t.e != nil && (t.e.pop != "" || t.e.sex != "" || t.e.site != "" || t.e.blood != "" || t.is(senseUnit) || t.is(senseAir)):
		return false
	}
	return true
}

// besideSex says that the token at i is the sex behind an age: "3mo m".
func (r *reader) besideSex(i int) bool {
	return i < len(r.t) && (r.namesSex(i) || r.t[i].word("m") || r.t[i].word("f"))
}

// who is what the words of a line say of the patient's age; it is read once.
type who struct{ read, child, adult bool }

// speaksOfChild says that the line, the thread or the house is about a
// newborn, an infant or a child.
func (r *reader) speaksOfChild() bool { return !r.adult() || r.wordsOf().child }

// speaksOfAdult says that the line is about an adult: an age, a pregnancy, an
// illness or a word of adults.
func (r *reader) speaksOfAdult() bool {
	v, ok := r.sample().Get(physio.Age)
	return ok && v >= 18 || r.wordsOf().adult
}

func (r *reader) wordsOf() who {
	if r.who.read {
		return r.who
	}
	r.who.read = true
	for i := range r.t {
		r.who.child = r.who.child || r.childWord(i)
		r.who.adult = r.who.adult || r.adultWord(i)
	}
	return r.who
}

func (r *reader) childWord(i int) bool {
	t := &r.t[i]
	switch {
	case r.smallWeight(i), t.kind == tokWord && childWords[t.s]:
		return true
	case t.kind != tokWord || t.e == nil || r.negated(i):
		return false
	}
	switch t.e.pop {
	case physio.Newborn, physio.Preterm, physio.Child:
		return true
	}
	return t.e.site == physio.UmbilicalArt || t.e.site == physio.UmbilicalVein || t.e.site == physio.Heel
}

func (r *reader) adultWord(i int) bool {
	t := &r.t[i]
	switch {
	case t.kind == tokNumber && r.adultAge(i), t.kind == tokWord && adultWords[t.s]:
		return true
	case t.kind != tokWord || t.e == nil || r.negated(i):
		return false
	}
	return t.e.pop == physio.Adult || t.e.pop == physio.Pregnant || t.e.circ.Has(physio.COPD)
}

// smallWeight says that the number at i is the weight of a small child, or a
// flow per kg, which is set in infants only (common practice).
func (r *reader) smallWeight(i int) bool {
	if r.t[i].kind != tokNumber {
		return false
	}
	u, _ := r.unitAfter(i)
	return u == uLPMKg || u == uKg && r.t[i].v <= 15 || u == uGram && r.t[i].v >= 300 && r.t[i].v < 8000
}

// childWords are illnesses and words of the first years, common practice.
var childWords = map[string]bool{
	"rds": true, "ttn": true, "bpd": true, "bronchiolitis": true, "croup": true, "surfactant": true,
	"boy": true, "girl": true, "birthweight": true,
}

// adultWords are illnesses and words of adults, common practice.
var adultWords = map[string]bool{
	"postpartum": true, "post partum": true, "partum": true, "pph": true, "postnatal": true, "smoker": true, "exsmoker": true,
	"lung": true, "ca": true, "cancer": true, "chf": true, "ccf": true, "ckd": true, "esrf": true, "nstemi": true, "stemi": true,
	"ipf": true, "ild": true, "osa": true, "cirrhosis": true, "alcoholic": true, "etoh": true, "dementia": true,
	"gentleman": true, "lady": true, "man": true, "woman": true, "retired": true, "cabg": true,
}

// adultAge says that the number at i is the age of an adult in years: with
// its unit, or with a sex.
func (r *reader) adultAge(i int) bool {
	t := &r.t[i]
	if t.v < 18 || t.v > 110 || t.decimals > 0 || t.sign != 0 || r.joined(i) || r.joinedAhead(i) {
		return false
	}
	u, _ := r.unitAfter(i)
	glued := i+1 < len(r.t) && r.t[i+1].glued && (r.t[i+1].word("m") || r.t[i+1].word("f"))
	return u == uYear || glued || r.besideSex(i+1) && len(r.t[i+1].s) > 1
}

// leadsGas says that nothing stands before the number at i, and nothing but a
// word on the sample between its unit and the gas: "3 mo 7.28/58/62".
func (r *reader) leadsGas(i, n int) bool {
	for j := range r.t[:i] {
		if !r.t[j].sep("-*.,:>") {
			return false
		}
	}
	for j := i + n + 1; j < len(r.t); j++ {
		switch t := &r.t[j]; {
		case r.gasStart(j), t.is(senseLabel):
			return true
		case t.sep(",:;-.\n"), t.is(senseSaid) && t.e.blood != "", t.word("gas"):
		default:
			return false
		}
	}
	return false
}

// daysToMonths takes an age in days or months, the weeks of a pregnancy or of
// a gestation, or a span of time.
func (r *reader) daysToMonths(i int, u string, n int) {
	switch {
	case u == uWeek && r.weeksOld(i, n):
		r.ageInWeeks(i, n)
	case u == uWeek && (r.speaksOfPregnancy() || r.spanIsAge(i, n)):
		r.weeks(i, n)
	case u != uWeek && r.spanIsAge(i, n):
		r.age(i, u, n)
	default:
		r.span(i, n)
	}
}

// years takes an age in years, or the years that an illness or a habit lasts.
func (r *reader) years(i int, u string, n int) {
	if r.yearsLast(i, n) {
		r.span(i, n)
		return
	}
	r.age(i, u, n)
}

// yearsLast says that years are no age: "smoker for 40 yrs", and behind an
// illness or beside an adult too few for the age of one: "copd 15 years".
func (r *reader) yearsLast(i, n int) bool {
	switch r.t[i+n].s {
	case "years", "yrs", "yr", "year", "y":
	default:
		return false
	}
	switch {
	case r.near(i, 2, "smoker", "smoking", "smoked", "smokes", "exsmoker") || r.near(i, 1, "x", "for", "since", "past", "last"):
		return true
	case r.t[i].v >= 18 || r.besideSex(i+n+1) || r.speaksOfChild():
		return false
	}
	return r.speaksOfAdult() || r.behindIllness(i)
}

// weeksOld says that weeks are the age of an infant and no gestation: too few
// for one, or said to be an age.
func (r *reader) weeksOld(i, n int) bool {
	v, old := r.t[i].v, strings.HasSuffix(r.t[i+n].s, "old")
	if v < 1 || v > 104 || !old && v > mostWeeksOld || r.durationWord(i, n) || r.speaksOfAdult() || r.labelled(i) {
		return false
	}
	return old || r.besideSex(i+n+1) || r.speaksOfChild()
}

// mostWeeksOld is below every gestation of a child that lives, common practice.
const mostWeeksOld = 20.0

// ageInWeeks keeps an infant's age in weeks.
func (r *reader) ageInWeeks(i, n int) {
	v, s := r.t[i].v, r.sample()
	r.take(i, n)
	if !s.Has(physio.Age) {
		s.Set(physio.Age, v*7/365.25)
	}
	switch {
	case s.Population != "":
	case v <= 4:
		s.Population = physio.Newborn
	default:
		s.Population = physio.Child
	}
}

// span takes days, weeks or months that are no age: they tell how long
// something lasts, and are no value.
func (r *reader) span(i, n int) {
	r.take(i, n)
	r.t[i].taken = true
}
