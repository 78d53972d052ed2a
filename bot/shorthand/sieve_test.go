package shorthand

import (
	"math/rand"
	"strings"
	"testing"
)

// sieves are all patterns that are tried behind a sieve.
func sieves() []*sieve {
	all := append([]*sieve{title, namedAs, lastFirst, twoNames, initials, dotted, bedName, ptName, picture, asksOxygen,
		supposeWords, aimWords, ifCore, settingAsk, checkWords, claimWord, bareQuestion,
		correctionWords, wasBlood, wasValue, laterGas, laterWords, afterEvent}, identifiers...)
	for _, d := range declines {
		all = append(all, d.words)
	}
	for _, f := range houseForms {
		all = append(all, f.typed)
	}
	return all
}

// A sieve never holds back a pattern that matches, whatever the text.
func TestSievesLetEveryMatchThrough(t *testing.T) {
	rng := rand.New(rand.NewSource(4))
	messages := readMessages(t)
	matched := map[*sieve]bool{}
	try := func(text string) {
		var g, masked grams
		g.read(text)
		masked.readMasked(text)
		hidden := maskGas(text)
		for _, s := range sieves() {
			if s.re.MatchString(text) {
				matched[s] = true
				if !s.may(&g) {
					t.Fatalf("%q is held back from %s", text, s.re)
				}
			}
			if s.re.MatchString(hidden) && !s.may(&masked) {
				t.Fatalf("%q, with its gas hidden, is held back from %s", text, s.re)
			}
		}
	}
	for _, m := range messages {
		folded := fold(m.Text)
		try(folded)
		try(lower(folded))
		other := fold(messages[rng.Intn(len(messages))].Text)
		cut, from := rng.Intn(len(folded)+1), rng.Intn(len(other)+1)
		try(folded[:cut] + other[from:])
	}
	if len(matched) < 40 {
		t.Errorf("only %d patterns matched anywhere", len(matched))
	}
}

// Most patterns are not tried on a usual line: that is what makes it quick.
func TestSievesHoldBackUsualLines(t *testing.T) {
	for _, text := range []string{"7.28/58/62/27 on 40% rr 24", "bed 14 needs a neb at 1800", "thanks, on my way"} {
		var g grams
		g.read(text)
		var tried []string
		for _, s := range sieves() {
			if s.may(&g) {
				tried = append(tried, s.re.String()[:min(len(s.re.String()), 30)])
			}
		}
		if len(tried) > 3 {
			t.Errorf("%q: %d patterns are tried: %s", text, len(tried), strings.Join(tried, "; "))
		}
	}
}
