package shorthand

import (
	"strings"

	"galeward/physio"
)

var (
	// correctionWords take the typed value back.
	correctionWords = sift(`\b(sorry|oops+|ooops|whoops|woops|correction|corrected value|typo|mistyped|mistype|misread|miskeyed|my bad|my mistake|i meant|meant|should be|should read|should have been|shouldve been|supposed to be|scratch that|fat finger\w*|not \d[\d.,]*|was actually|is actually|actually (was|is|it)|wrong (number|value|one|co2|ph|po2|fio2)|rather than|instead of \d)\b|^\s*\*`)
	// wasBlood takes the kind of blood back.
	wasBlood = sift(`\b(it|that|this|gas|sample|one)('s| is| was| were|s) (actually |really |a |an )*(venous|vbg|arterial|abg|capillary|cap|cbg|mixed venous|central venous|central)\b`)
	// wasValue takes a labelled value back: "fio2 was 60".
	wasValue = sift(`\b(ph|p?a?co2|p?a?o2|hco3|bic|bicarb|be|sats?|spo2|fio2|rr|vt|peep|hb|rate)\s+was\s+[\d.]`)
	// laterGas make a whole gas a later one of the thread.
	laterGas = sift(`^\s*(now|recheck|repeat|repeated|rpt|later|after|following|post|same|still|update|latest|redo|f/u|followup|follow up|new gas|next gas|next|then)\b|\b(hr|hrs|hour|hours|min|mins|minutes|h) (later|post|after|since)\b|\bsame (settings?|vent settings|fio2|o2|oxygen|everything|device)\b|\bextubated\b|\bre-?(check|peat)\b`)
	// laterWords make a line with some values a later state of the thread.
	laterWords = sift(`\bnow\b|^\s*(now|recheck|repeat|repeated|rpt|later|after|following|post|same|still|update|latest|redo|f/u|followup|follow up|new gas|next gas|next|then)\b|\b(hr|hrs|hour|hours|min|mins|minutes|h) (later|post|after|since)\b|\bsame (settings?|vent settings|fio2|o2|oxygen|everything|device)\b|\b(down|up) (to|from)\b|\b(came|come|gone|went|dropped|fell|rose|climbed) (up|down|to)\b|\b(weaned|changed|increased|decreased|switched|moved|turned|bumped|titrated|dropped|stepped) (to|up|down|him|her|them|over)\b|\bextubated\b|\bnow\s*$|\bre-?(check|peat)\b|\bafter (peep|niv|bipap|change|neb|suction|prone|proning|increase|decrease|the|cpap|hfnc|extub\w*|intub\w*)\b`)
)

// follow says how a gas relates to the thread's last one.
func (p *parser) follow(g *Gas, t []token) Follow {
	s := &g.Sample
	whole := s.Has(physio.PHq) && (s.Has(physio.PaCO2) || s.Has(physio.PaO2) || len(g.Questions) > 0)
	head := head(p.rest)
	switch {
	case p.line.Intent == IntentNow:
		return FollowNow
	case p.line.Intent == IntentAim || p.line.Intent == IntentSuppose || p.line.Intent == IntentCheck && whole:
		return FollowNone
	case correctionWords.in(head, &p.grams) && (!whole || p.h.Earlier != nil && !strings.Contains(head, "\n")):
		return FollowCorrection
	case !whole && (wasBlood.in(head, &p.grams) || wasValue.in(head, &p.grams)):
		return FollowCorrection
	case laterGas.in(head, &p.grams) && !afterEvent.in(head, &p.grams), !whole && laterWords.in(head, &p.grams):
		return FollowNow
	case !whole && p.h.Earlier != nil && p.line.Intent == IntentNone && !measuredAnew(s):
		return FollowAddition
	case !whole && p.h.Earlier != nil && p.line.Intent == IntentNone && !s.Has(physio.PHq):
		return FollowAddition
	}
	return FollowNone
}

// head is the part of a message in which its words are looked for.
func head(s string) string {
	if len(s) > 400 {
		return s[:400]
	}
	return s
}

// afterEvent says that "post" or "after" names an event before the first gas
// and no earlier gas.
var afterEvent = sift(`^\s*(post|after|following)[ -]*(intub\w*|op\w*|arrest|rosc|cardiac|code|extub\w*|cpr|vf|surgery|procedure|ictal)`)

// measuredAnew says that the line holds new measurements rather than what was
// left out before.
func measuredAnew(s *physio.Sample) bool {
	return s.Has(physio.PaCO2, physio.PaO2)
}
