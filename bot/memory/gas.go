package memory

import (
	"encoding/json"
	"fmt"
	"math"
	"strconv"
	"strings"
	"unicode"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// gasDoc is a gas as it is stored. It is a type of its own, because a Sample
// embeds its Values, whose JSON form would stand in for the whole sample, and
// because quantities and circumstances are stored by name: their numbers move
// when a row is added.
type gasDoc struct {
	Values       valuesDoc         `json:"values"`
	Blood        physio.Blood      `json:"blood,omitempty"`
	Site         physio.Site       `json:"site,omitempty"`
	Device       physio.Device     `json:"device,omitempty"`
	DeviceTaken  bool              `json:"device_taken,omitempty"`
	Mode         physio.Mode       `json:"mode,omitempty"`
	Sex          physio.Sex        `json:"sex,omitempty"`
	Population   physio.Population `json:"population,omitempty"`
	Trimester    int               `json:"trimester,omitempty"`
	Circumstance []string          `json:"circumstance,omitempty"`
	Follow       string            `json:"follow,omitempty"`
	Bed          string            `json:"bed,omitempty"`
	Time         string            `json:"time,omitempty"`
	Target       *physio.Target    `json:"target,omitempty"`
	UsualPaCO2   float64           `json:"usual_paco2,omitempty"`
	Typed        shorthand.Units   `json:"typed,omitempty"`
	Notes        []noteDoc         `json:"notes,omitempty"`
	Questions    []questionDoc     `json:"questions,omitempty"`
}

type noteDoc struct {
	Code     shorthand.NoteCode `json:"code"`
	Quantity quantityDoc        `json:"quantity"`
	Typed    string             `json:"typed,omitempty"`
	Value    float64            `json:"value,omitempty"`
}

type questionDoc struct {
	Code     shorthand.QuestionCode `json:"code"`
	Quantity quantityDoc            `json:"quantity"`
	Typed    string                 `json:"typed,omitempty"`
	Value    float64                `json:"value,omitempty"`
	Choices  []choiceDoc            `json:"choices,omitempty"`
}

type choiceDoc struct {
	Word         string        `json:"word"`
	Set          physio.Values `json:"set"`
	Drop         []quantityDoc `json:"drop,omitempty"`
	Blood        physio.Blood  `json:"blood,omitempty"`
	Device       physio.Device `json:"device,omitempty"`
	Sex          physio.Sex    `json:"sex,omitempty"`
	Circumstance []string      `json:"circumstance,omitempty"`
}

// valuesDoc writes values under their keys like physio.Values, without the
// detour over a map: each save writes some.
type valuesDoc physio.Values

// MarshalJSON writes the values in echo order.
func (d valuesDoc) MarshalJSON() ([]byte, error) {
	out := append(make([]byte, 0, 160), '{')
	var bad error
	(*physio.Values)(&d).Each(func(q physio.Quantity, v float64) {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			bad = fmt.Errorf("%s is not a number", q.Key())
		}
		if len(out) > 1 {
			out = append(out, ',')
		}
		out = append(append(append(out, '"'), q.Key()...), `":`...)
		out = strconv.AppendFloat(out, v, 'g', -1, 64)
	})
	return append(out, '}'), bad
}

// UnmarshalJSON reads values as physio does: an unknown key is an error.
func (d *valuesDoc) UnmarshalJSON(b []byte) error { return (*physio.Values)(d).UnmarshalJSON(b) }

// quantityDoc is a quantity under its key.
type quantityDoc physio.Quantity

// MarshalText gives the key.
func (q quantityDoc) MarshalText() ([]byte, error) { return []byte(physio.Quantity(q).Key()), nil }

// UnmarshalText finds the quantity; an unknown key is an error.
func (q *quantityDoc) UnmarshalText(b []byte) error {
	found, ok := physio.QuantityByKey(string(b))
	if !ok {
		return fmt.Errorf("no quantity is called %.20q", b)
	}
	*q = quantityDoc(found)
	return nil
}

// circumstances are the stored names, by bit.
var circumstances = []string{
	"copd", "asthma_attack", "retainer", "ecmo", "cpr", "post_arrest", "cyanotic_heart", "brain_injury", "heliox",
	"hyperbaric", "smoke_or_co", "methb_cause", "just_changed", "prone", "shock", "home_ventilation", "bled_in_oxygen",
	"spontaneous_breathing", "opioid_or_sedation", "ketoacidosis", "sepsis", "transfusion", "anxious",
	"pulmonary_hypertension_newborn", "temp_corrected",
}

// follows are the stored names of the relations.
var follows = [...]string{
	shorthand.FollowNone: "", shorthand.FollowNow: "now",
	shorthand.FollowAddition: "addition", shorthand.FollowCorrection: "correction",
}

func circumstanceNames(c physio.Circumstance) []string {
	var names []string
	for i := range 32 {
		switch {
		case c&(1<<i) == 0:
		case i < len(circumstances):
			names = append(names, circumstances[i])
		default: // nothing is lost of a bit that has no name yet
			names = append(names, fmt.Sprintf("bit_%d", i))
		}
	}
	return names
}

func circumstanceOf(names []string) (physio.Circumstance, error) {
	var c physio.Circumstance
next:
	for _, name := range names {
		for i, known := range circumstances {
			if known == name {
				c |= 1 << i
				continue next
			}
		}
		var i int
		if _, err := fmt.Sscanf(name, "bit_%d", &i); err != nil || i < 0 || i > 31 {
			return 0, fmt.Errorf("no circumstance is called %.20q", name)
		}
		c |= 1 << i
	}
	return c, nil
}

func followOf(name string) (shorthand.Follow, error) {
	for i, known := range follows {
		if known == name {
			return shorthand.Follow(i), nil
		}
	}
	return 0, fmt.Errorf("no relation is called %.20q", name)
}

// encodeGas writes a gas for the store.
func encodeGas(g *shorthand.Gas) (json.RawMessage, error) {
	s := &g.Sample
	d := gasDoc{
		Values: valuesDoc(s.Values), Blood: s.Blood, Site: s.Site, Device: s.Device, DeviceTaken: s.DeviceTaken, Mode: s.Mode,
		Sex: s.Sex, Population: s.Population, Trimester: s.Trimester, Circumstance: circumstanceNames(s.Circumstance),
		Follow: follows[g.Follow], Bed: g.Bed, Time: g.Time, Target: g.Target, UsualPaCO2: g.UsualPaCO2,
		Typed: g.Typed,
	}
	for _, n := range g.Notes {
		d.Notes = append(d.Notes, noteDoc{n.Code, quantityDoc(n.Quantity), n.Typed, n.Value})
	}
	for i := range g.Questions {
		d.Questions = append(d.Questions, questionOut(&g.Questions[i]))
	}
	return json.Marshal(&d)
}

// decodeGas reads a stored gas.
func decodeGas(raw json.RawMessage) (g shorthand.Gas, err error) {
	var d gasDoc
	if err = json.Unmarshal(raw, &d); err != nil {
		return g, err
	}
	g = shorthand.Gas{Bed: d.Bed, Time: d.Time, Target: d.Target, UsualPaCO2: d.UsualPaCO2, Typed: d.Typed}
	g.Sample = physio.Sample{
		Values: physio.Values(d.Values), Blood: d.Blood, Site: d.Site, Device: d.Device, DeviceTaken: d.DeviceTaken, Mode: d.Mode,
		Sex: d.Sex, Population: d.Population, Trimester: d.Trimester,
	}
	if g.Sample.Circumstance, err = circumstanceOf(d.Circumstance); err != nil {
		return g, err
	}
	for _, n := range d.Notes {
		g.Notes = append(g.Notes, shorthand.Note{Code: n.Code, Quantity: physio.Quantity(n.Quantity), Typed: n.Typed, Value: n.Value})
	}
	for i := range d.Questions {
		q, err := questionIn(&d.Questions[i])
		if err != nil {
			return g, err
		}
		g.Questions = append(g.Questions, q)
	}
	g.Follow, err = followOf(d.Follow)
	return g, err
}

func questionOut(q *shorthand.Question) questionDoc {
	d := questionDoc{Code: q.Code, Quantity: quantityDoc(q.Quantity), Typed: q.Typed, Value: q.Value}
	for _, c := range q.Choices {
		out := choiceDoc{
			Word: c.Word, Set: c.Set, Blood: c.Blood, Device: c.Device, Sex: c.Sex, Circumstance: circumstanceNames(c.Circumstance),
		}
		for _, drop := range c.Drop {
			out.Drop = append(out.Drop, quantityDoc(drop))
		}
		d.Choices = append(d.Choices, out)
	}
	return d
}

func questionIn(d *questionDoc) (q shorthand.Question, err error) {
	q = shorthand.Question{Code: d.Code, Quantity: physio.Quantity(d.Quantity), Typed: d.Typed, Value: d.Value}
	for _, c := range d.Choices {
		in := shorthand.Choice{Word: c.Word, Set: c.Set, Blood: c.Blood, Device: c.Device, Sex: c.Sex}
		if in.Circumstance, err = circumstanceOf(c.Circumstance); err != nil {
			return q, err
		}
		for _, drop := range c.Drop {
			in.Drop = append(in.Drop, physio.Quantity(drop))
		}
		q.Choices = append(q.Choices, in)
	}
	return q, nil
}

// clean keeps an entry to what may be remembered, whatever the reader of the
// line let through: short labels, and tokens of digits and signs.
func clean(e Entry) Entry {
	g := &e.Gas
	g.Bed, g.Time = label(g.Bed, 24), label(g.Time, 16)
	notes, questions := g.Notes, g.Questions
	g.Notes, g.Questions = nil, nil
	for _, n := range notes {
		n.Typed = digits(n.Typed)
		g.Notes = append(g.Notes, n)
	}
	for _, q := range questions {
		g.Questions = append(g.Questions, cleanQuestion(q))
	}
	return e
}

func cleanQuestion(q shorthand.Question) shorthand.Question {
	q.Typed = digits(q.Typed)
	choices := q.Choices
	q.Choices = nil
	for _, c := range choices {
		c.Word = label(c.Word, 40)
		q.Choices = append(q.Choices, c)
	}
	return q
}

// digits keeps the digits and signs that a typed token begins with: what
// comes behind anything else is not the token.
func digits(s string) string {
	const signs = "0123456789.,:/+-<>%'\""
	end := strings.IndexFunc(s, func(r rune) bool { return !strings.ContainsRune(signs, r) })
	if end >= 0 {
		s = s[:end]
	}
	return s[:min(len(s), 16)]
}

// label keeps what a label may hold, up to a number of characters.
func label(s string, most int) string {
	return strings.TrimSpace(keep(s, most, func(r rune) bool {
		return unicode.IsLetter(r) || unicode.IsDigit(r) || strings.ContainsRune(" .,:/+-%'\"", r)
	}))
}

// keep leaves the first characters of s that may stay.
func keep(s string, most int, may func(rune) bool) string {
	n := 0
	return strings.Map(func(r rune) rune {
		if n == most || !may(r) {
			return -1
		}
		n++
		return r
	}, s)
}
