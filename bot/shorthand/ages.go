package shorthand

import "galeward/physio"

// ageSex takes an age glued to a sex: 72M, 65f.
func (r *reader) ageSex(i int) bool {
	if i+1 >= len(r.t) || r.labelled(i) {
		return false
	}
	t, s := &r.t[i], &r.t[i+1]
	if !s.glued || s.kind != tokWord || s.s != "m" && s.s != "f" || t.decimals > 0 || t.v < 1 || t.v > 110 || t.percent || r.joined(i) {
		return false
	}
	r.put(formOf(physio.Age, t, uYear, true), physio.Age, t.typed())
	r.sample().Sex = physio.Sex(s.s)
	r.take(i, 1)
	return true
}

// ageBeforeSex takes the age in front of a sex: "72 male", "64 m".
func (r *reader) ageBeforeSex(i int) bool {
	if i+1 >= len(r.t) || r.t[i+1].line != r.t[i].line {
		return false
	}
	t, s := &r.t[i], &r.t[i+1]
	if t.decimals > 0 || t.v < 1 || t.v > 110 || t.sign != 0 || t.than != 0 || t.percent || r.labelled(i) || r.joined(i) || !r.namesSex(i+1) {
		return false
	}
	if i > 0 {
		before := &r.t[i-1]
		row := before.kind == tokNumber && !before.percent && !r.joined(i-1) // "28 450 16 m"
		if row || before.is(senseDevice) || before.sep("/@-") || before.is(senseFiller) {
			return false
		}
	}
	r.put(formOf(physio.Age, t, uYear, true), physio.Age, t.typed())
	if r.sample().Sex == "" && len(s.s) == 1 {
		s.used = true
		r.sample().Sex = physio.Sex(s.s)
	}
	r.take(i, 0)
	if t.v < 18 && r.sample().Population == "" {
		r.sample().Population = physio.Child
	}
	return true
}

// namesSex says that the word at i is a sex and nothing else.
func (r *reader) namesSex(i int) bool {
	t := &r.t[i]
	if t.kind != tokWord {
		return false
	}
	switch t.s {
	case "male", "female", "man", "woman", "lady", "gentleman", "boy", "girl":
		return true
	case "m", "f":
		return i+1 >= len(r.t) || r.t[i+1].kind != tokNumber
	}
	return false
}

// age takes an age with its unit; a child's and a newborn's age say the
// population.
func (r *reader) age(i int, u string, n int) {
	word := r.t[i+n].s
	if (word == "y" || word == "days" || word == "months" || word == "years") && r.durationWord(i, n) {
		r.t[i].taken = true
		return
	}
	r.put(formOf(physio.Age, &r.t[i], u, true), physio.Age, r.t[i].typed())
	r.take(i, n)
	if word == "yom" || word == "yof" {
		r.sample().Sex = physio.Sex(word[2:])
	}
	years, ok := r.sample().Get(physio.Age)
	s := r.sample()
	switch {
	case !ok || s.Population != "":
	case u == uDay && r.t[i].v <= 28:
		s.Population = physio.Newborn
	case years < 18:
		s.Population = physio.Child
	}
}

// durationWord says that a span of time is meant: "x 3 days", "2 days ago".
func (r *reader) durationWord(i, n int) bool {
	if r.near(i, 1, "x", "for", "since", "past", "last", "after", "day") {
		return true
	}
	if j := i + n + 1; j < len(r.t) {
		switch r.t[j].s {
		case "ago", "later", "post", "into", "of", "on", "postop", "post op":
			return true
		}
	}
	return false
}

// weeks takes the weeks of a pregnancy or of a gestation.
func (r *reader) weeks(i, n int) {
	v, s := r.t[i].v, r.sample()
	r.take(i, n)
	switch {
	case r.durationWord(i, n) || v < 4 || v > 44:
		return
	case r.speaksOfPregnancy():
		s.Population = physio.Pregnant
		s.Trimester = trimester(v)
	case v >= 21:
		s.Set(physio.Gestation, v)
		r.gestation(v)
	}
}

// gestation sets the population that a gestation says, unless more was said.
func (r *reader) gestation(weeks float64) {
	s := r.sample()
	switch {
	case weeks < 37 && s.Population != physio.Child:
		s.Population = physio.Preterm
	case s.Population == "":
		s.Population = physio.Newborn
	}
}

func trimester(weeks float64) int {
	switch {
	case weeks < 14:
		return 1
	case weeks < 28:
		return 2
	}
	return 3
}

func (r *reader) speaksOfPregnancy() bool {
	if r.sample().Population == physio.Pregnant || r.h.Setting.Population == physio.Pregnant {
		return true
	}
	for i := range r.t {
		if r.t[i].kind == tokWord && r.t[i].e != nil && r.t[i].e.pop == physio.Pregnant {
			return true
		}
	}
	return false
}

// ofGestation takes the weeks-of-forty form: 26/40, 34+2.
func (r *reader) ofGestation(i int) {
	if r.weeksAndDays(i) {
		return
	}
	if i+2 >= len(r.t) || r.t[i].decimals > 0 || r.t[i].v < 22 || r.t[i].v > 42 || r.joined(i) {
		return
	}
	sep, b := &r.t[i+1], &r.t[i+2]
	if sep.sep("/") && b.kind == tokNumber && b.s == "40" && !b.percent && (i+3 >= len(r.t) || !r.t[i+3].sep("/")) {
		if !r.newborn() && !r.speaksOfPregnancy() {
			return
		}
		b.used = true
		r.weeks(i, 0)
	}
}

// weeksAndDays takes 26+3 wk.
func (r *reader) weeksAndDays(i int) bool {
	if i+2 >= len(r.t) || r.t[i+1].sign != '+' || r.t[i+1].v > 6 || !r.t[i+1].glued || r.t[i].v < 20 || r.t[i].v > 44 {
		return false
	}
	week := r.t[i+2].is(senseUnit) && r.t[i+2].e.unit == uWeek
	if !week && !r.newborn() && !r.speaksOfPregnancy() {
		return false
	}
	r.t[i+1].used = true
	if week {
		r.t[i+2].used = true
	}
	r.weeks(i, 0)
	return true
}

// trimesterWords takes "third trimester", "2nd trimester", "T3".
func (r *reader) trimesterWords() {
	for i := range r.t {
		if !r.t[i].word("trimester") || i == 0 {
			continue
		}
		n := map[string]int{"first": 1, "1st": 1, "second": 2, "2nd": 2, "third": 3, "3rd": 3, "1": 1, "2": 2, "3": 3}[r.t[i-1].s]
		if n == 0 && i > 1 && r.t[i-2].kind == tokNumber {
			n = int(r.t[i-2].v)
		}
		if n >= 1 && n <= 3 {
			r.sample().Trimester, r.sample().Population = n, physio.Pregnant
		}
	}
}
