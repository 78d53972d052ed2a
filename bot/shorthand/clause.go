package shorthand

import (
	"strings"

	"galeward/physio"
)

// The words by which an aim, a what-if and a check are told from a gas.
var (
	supposeWords = sift(`\bwhat if\b|\bwhat happens? (if|when|with|to)\b|\bwhat would happen\b|\bsuppose\b|\bif (we|i|you|he|she|they|the)\b|\bwhat would\b.{0,40}\b(if|with|at|on)\b|^if\b|\bhow about\b|\bwould (it|that) help if\b|\bwhatif\b`)
	aimWords     = sift(`\b(what|which|how much|how many|how high|how low|whats the|what's the)\b.{0,40}\b(for|gets?|to get|gives?|needed|need|reach|reaches|brings?|makes?|hit|would get|will get|achieves?)\b|\b(target|goal|aim|aiming for|aim for|trying to get|want|wanting|shooting for|looking for)\b|\bneed(ed)?\b.{0,40}\b(what|for|which|how)\b|\bneeded (for|to)\b|\brequired for\b|\b(get|bring|drive) (the |his |her )?(co2|pco2|paco2|ph|po2|pao2|o2|sats?|spo2) (to|down to|up to|back to)\b`)
	andAt        = sift(`[,.;?!\n] *(and|then|so) (at|with|if|on) [^?]{1,40}\?`)
	ifCore       = sift(`\bif (the |his |her |their )?(co2|pco2|paco2|ph|po2|pao2)\b`)
	settingAsk   = sift(`\b(what|whats|how)\b.{0,20}\b(po2|pao2|co2|pco2|paco2|ph|sats?|spo2|o2)\b.{0,12}$`)
	checkWords   = sift(`^(is (this|it|that|he|she|pt)|am i right|agree|right)\b|\b(student|colleague|fellow|resident|intern|preceptee|orientee|learner|trainee|newbie|nurse|doc|doctor|attending|registrar|rn|md|rt|someone|they|he|she|my student|the student)\b[ :,-]*(says?|said|thinks?|thought|called|calls|call|reads?|claims?|wrote|writes|answers?|answered|put|calling|reckons?|labelled|labeled|charted|interpreted|believes?|told me)\b|\b(student|fellow|resident|intern|learner|trainee|orientee|preceptee)s?\s*:|\b(i|we|id|i'd|my|i am|im)\b *(would |also |just |am )?(say|says|said|think|thinks|thought|call|called|calling|read this|reckon|believe|interpret|vote|answer|guess|reading is|read is|take is|interpretation|impression)\b|\b(agree|correct|am i right|right|true or false|yes or no|do you agree|is that right|thoughts)\s*\?|\bis (this|it|that) (an? )?[a-z]`)
	claimWord    = sift(`\b(\w*acid(osis|otic|aemia|emia)|alkal(osis|otic|aemia|emia)|hyper\w*vent\w*|hypo\w*vent\w*|hypox\w*|hypercap\w*|hypercarb\w*|hypocap\w*|compensated|uncompensated|compensation|ards|t[12]rf|type (1|2|i|ii|one|two)|respiratory failure|resp failure|shunt|dead ?space|normal|mixed|acute on chronic|retaining|oxygenat\w+ (ok|fine|well|good)|ventilat\w+ (ok|fine|well|good))\b[^?]*\?`)
	bareQuestion = sift(`^(what'?s|whats|what is|how'?s|thoughts|interpret|read) (this|these|it|that|on this)\b`)
)

// clauses parts a message with an aim or a what-if into the clause that holds
// its numbers and the rest that holds the gas. A check has no clause: its
// claims stand around the gas.
func (p *parser) clauses(t []token, s string) (intent Intent, clause, rest []token) {
	switch {
	case p.line.Intent == IntentAim || p.line.Intent == IntentSuppose:
		clause, rest = cutClause(t, 0)
		return p.line.Intent, clause, rest
	case p.line.Intent != IntentNone && p.line.Intent != IntentNow:
		return IntentNone, nil, t
	}
	var g grams
	g.read(s)
	if p.supposes(s, &g, t) {
		return IntentSuppose, t, nil
	}
	for _, try := range []struct {
		words  *sieve
		intent Intent
	}{{andAt, IntentSuppose}, {ifCore, IntentAim}, {supposeWords, IntentSuppose}, {aimWords, IntentAim}, {settingAsk, IntentSuppose}} {
		if len(s) > 2000 || !try.words.may(&g) {
			continue
		}
		at := try.words.compiled().FindStringIndex(s)
		if at == nil {
			continue
		}
		from := 0
		if c := coreStarts(t); len(c) > 0 && t[c[0].at].at < at[0] {
			from = at[0]
		}
		clause, rest = cutClause(t, from)
		if p.fits(try.intent, clause) {
			return try.intent, clause, rest
		}
	}
	if isCheck(s, &g) && !p.declines(DeclinedPrognosis) {
		p.line.Intent = IntentCheck
	}
	return IntentNone, nil, t
}

// fits says that the clause holds numbers of the kind that the intent needs.
func (p *parser) fits(intent Intent, clause []token) bool {
	g := p.clauseGas(clause)
	v := valuesOf(&g)
	if v.Empty() || intent == IntentAim && g.Target != nil && !v.Has(physio.PHq) && !v.Has(physio.PaCO2) && !v.Has(physio.PaO2) {
		return false // "target 88-92 spo2 91": the range is the target, and the rest is of now
	}
	if intent == IntentSuppose {
		return true
	}
	for _, q := range []physio.Quantity{physio.PHq, physio.PaCO2, physio.PaO2, physio.SaO2, physio.SpO2, physio.EtCO2} {
		if v.Has(q) {
			return true
		}
	}
	return false
}

// isCheck says that the words around the gas claim something that is to be
// judged.
func isCheck(s string, g *grams) bool {
	if len(s) > 2000 {
		s = s[:2000]
	}
	if bareQuestion.in(strings.TrimSpace(s), g) && !claimWord.in(s, g) {
		return false
	}
	return checkWords.in(strings.TrimSpace(s), g) || claimWord.in(s, g)
}

// cutClause takes the clause that starts at offset from: up to the last break
// before a gas that follows it, else to the end.
func cutClause(t []token, from int) (clause, rest []token) {
	i := 0
	for i < len(t) && t[i].at < from {
		i++
	}
	before, t := t[:i], t[i:]
	cores := coreStarts(t)
	end := len(t)
	for _, c := range cores {
		if isGas(t, c) {
			end = c.at
			for j := c.at - 1; j > 0; j-- {
				if t[j].sep(",.?;:\n!") {
					end = j
					break
				}
			}
			break
		}
	}
	clause = append([]token(nil), t[:end]...)
	rest = append(append([]token(nil), before...), t[end:]...)
	return clause, rest
}

// isGas says that a core start is a whole gas and not a lone labelled pH.
func isGas(t []token, c span) bool {
	numbers := 0
	for j := c.at; j < len(t) && j <= c.at+8; j++ {
		if t[j].kind == tokNumber {
			numbers++
		}
		if t[j].is(senseWord) || t[j].sep("?") {
			break
		}
	}
	return numbers >= 2
}

// clauseValues reads the numbers of a clause, without the checks that belong
// to a gas.
func (p *parser) clauseValues(clause []token) physio.Values {
	g := p.clauseGas(clause)
	return valuesOf(&g)
}

// clauseGas reads a clause as a gas of which the numbers are claims.
func (p *parser) clauseGas(clause []token) Gas {
	t := append([]token(nil), clause...)
	h := p.h
	h.Addressed = true
	return readGas(t, h, segment{claims: true})
}

// valuesOf gives the values of a clause that can be aimed at or supposed.
func valuesOf(g *Gas) physio.Values {
	v := g.Sample.Values
	for _, q := range []physio.Quantity{physio.Age, physio.Gestation} {
		v.Drop(q)
	}
	return v
}

// readClause keeps the numbers of an aim as its target and those of a what-if
// as its change.
func (p *parser) readClause(intent Intent, clause []token) {
	v := p.clauseValues(clause)
	if intent == IntentSuppose {
		p.line.Change = v
		if predictsPressure(&v, p.typed) {
			p.line.Declined = append(p.line.Declined, DeclinedPEEP)
		}
		return
	}
	if x, ok := v.Get(physio.SpO2); ok && !namesSpO2(clause) {
		v.Drop(physio.SpO2)
		v.Set(physio.SaO2, x)
	}
	p.line.Target = v
}

func namesSpO2(t []token) bool {
	for i := range t {
		if t[i].is(senseLabel) && t[i].e.q == physio.SpO2 {
			return true
		}
	}
	return false
}
