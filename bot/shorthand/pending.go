package shorthand

import (
	"math"
	"strconv"
	"strings"

	"galeward/physio"
)

// released finds the choice that a short message picks from the open question.
func (p *parser) released() (*Choice, bool) {
	q := p.h.Pending
	if q == nil || len(q.Choices) == 0 {
		return nil, false
	}
	said := plainWord(p.typed[lead(p.typed):])
	if said == "" || len(strings.Fields(said)) > 8 {
		return nil, false
	}
	for i := range q.Choices {
		if said == plainWord(q.Choices[i].Word) {
			return &q.Choices[i], true
		}
	}
	if i, ok := ordinal(said, len(q.Choices)); ok {
		return &q.Choices[i], true
	}
	return p.byMeaning(said, q)
}

// plainWord strips a word to what identifies it.
func plainWord(s string) string {
	s = strings.ToLower(s)
	for _, filler := range []string{"it's ", "its ", "it is ", "it was ", "was ", "the ", "i meant ", "meant ", "on ", " please", " thanks", " sorry", " gas", " sample"} {
		s = strings.ReplaceAll(s, filler, " ")
	}
	s = strings.NewReplacer("%", " % ", "l/min", "l", "litres", "l", "liters", "l", "lpm", "l", "!", "", "?", "", "'", "", "\"", "").Replace(s)
	return strings.Trim(strings.Join(strings.Fields(s), ""), ".,;: ")
}

// ordinal reads "first", "2nd", "yes" and "no" as a place among n choices.
func ordinal(s string, n int) (int, bool) {
	places := map[string]int{"first": 0, "1st": 0, "firstone": 0, "former": 0, "a": 0, "yes": 0, "y": 0, "yep": 0, "yeah": 0, "yup": 0, "correct": 0, "right": 0, "ja": 0, "si": 0, "ok": 0, "confirm": 0, "confirmed": 0,
		"second": 1, "2nd": 1, "secondone": 1, "latter": 1, "b": 1, "third": 2, "3rd": 2, "thirdone": 2, "c": 2, "last": n - 1, "lastone": n - 1}
	if n == 2 {
		for _, no := range []string{"no", "n", "nope", "nah", "other", "theother", "theotherone", "otherone", "nein"} {
			places[no] = 1
		}
	}
	i, ok := places[s]
	return i, ok && i < n
}

// byMeaning reads the message and finds the one choice that means the same.
func (p *parser) byMeaning(said string, q *Question) (*Choice, bool) {
	if v, err := strconv.ParseFloat(strings.TrimRight(strings.ReplaceAll(said, ",", "."), "%l"), 64); err == nil {
		return byNumber(v, said, q)
	}
	t := lex(p.typed)
	if len(coreStarts(t)) > 0 {
		return nil, false
	}
	if holdsNumber(t) { // a number that is no choice is a new value
		n := loneNumber(t)
		if n == nil {
			return nil, false
		}
		return byNumber(n.v, n.typed(), q)
	}
	var found *Choice
	for i := range t {
		e := t[i].e
		if t[i].kind != tokWord || e == nil {
			continue
		}
		for k := range q.Choices {
			c := &q.Choices[k]
			same := e.means(c, q)
			if same && found != nil && found != c {
				return nil, false
			}
			if same {
				found = c
			}
		}
	}
	if found == nil {
		found = byLetter(said, q)
	}
	return found, found != nil
}

// byLetter finds the choice of a sex by its letter.
func byLetter(said string, q *Question) *Choice {
	for k := range q.Choices {
		if c := &q.Choices[k]; c.Sex != "" && string(c.Sex) == said {
			return c
		}
	}
	return nil
}

// means says that a word of the vocabulary names the choice.
func (e *entry) means(c *Choice, q *Question) bool {
	switch {
	case c.Blood != "" && e.blood == c.Blood, c.Device != "" && e.device == c.Device, c.Sex != "" && e.sex == c.Sex:
		return true
	case e.unit != "" && strings.EqualFold(c.Word, e.unit):
		return true
	}
	return e.sense == senseLabel && (plainWord(c.Word) == plainWord(e.q.Info().Symbol) || c.Set.Has(e.q) && onlyIn(q, e.q))
}

// onlyIn says that one choice alone sets k.
func onlyIn(q *Question, k physio.Quantity) bool {
	n := 0
	for i := range q.Choices {
		if q.Choices[i].Set.Has(k) {
			n++
		}
	}
	return n == 1
}

func holdsNumber(t []token) bool {
	for i := range t {
		if t[i].kind == tokNumber {
			return true
		}
	}
	return false
}

// loneNumber is the number of an answer that holds just one.
func loneNumber(t []token) *token {
	var found *token
	for i := range t {
		if t[i].kind == tokNumber {
			if found != nil {
				return nil
			}
			found = &t[i]
		}
	}
	return found
}

// byNumber finds the one choice whose value is the number, as typed or in per
// cent; a number of one digit may be the place of the choice.
func byNumber(v float64, said string, q *Question) (*Choice, bool) {
	var found *Choice
	matches := 0
	for k := range q.Choices {
		c := &q.Choices[k]
		hit := false
		c.Set.Each(func(quantity physio.Quantity, x float64) {
			percent := quantity.Info().Unit == "fraction"
			same := math.Abs(x-v) < 0.005*math.Max(1, math.Abs(v)) && !(percent && strings.HasSuffix(said, "%"))
			same = same || quantity.Info().Unit == "mmHg" && math.Abs(physio.KPa(v).MmHg()-x) < 0.5 // answered in kPa
			same = same || percent && !strings.HasSuffix(said, "l") && math.Abs(100*x-v) < 0.5
			if strings.HasSuffix(said, "l") && quantity != physio.OxygenFlow {
				same = false
			}
			hit = hit || same && !(strings.HasSuffix(said, "%") && !percent)
		})
		if hit {
			found = c
			matches++
		}
	}
	if matches == 1 {
		return found, true
	}
	if i := int(v) - 1; matches == 0 && v == math.Trunc(v) && i >= 0 && i < len(q.Choices) && len(said) == 1 {
		return &q.Choices[i], true
	}
	return nil, false
}
