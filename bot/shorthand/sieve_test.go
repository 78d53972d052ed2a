package shorthand

import (
	"math/rand"
	"regexp/syntax"
	"strings"
	"testing"
)

// sieves are all patterns that are tried behind a sieve.
func sieves() []*sieve {
	all := append([]*sieve{title, namedAs, lastFirst, twoNames, initials, dotted, bedName, ptName, picture, asksOxygen,
		supposeWords, leadsSuppose, ifAlone, asksValue, andAt, aimWords, ifCore, settingAsk, checkWords, claimWord, bareQuestion,
		correctionWords, wasBlood, wasValue, laterGas, laterWords, afterEvent}, identifiers...)
	for _, d := range declines {
		all = append(all, d.words)
	}
	for _, f := range houseForms {
		all = append(all, f.typed)
	}
	return all
}

// A sieve never holds back a pattern that matches: neither a text made from
// the pattern nor any message.
func TestSievesLetEveryMatchThrough(t *testing.T) {
	rng := rand.New(rand.NewSource(4))
	all := sieves()
	for _, s := range all {
		tree, err := syntax.Parse(s.pattern, syntax.Perl)
		if err != nil {
			t.Fatal(err)
		}
		matched := 0
		for n := 0; n < 600 && matched < 40; n++ {
			var b strings.Builder
			write(&b, tree, rng)
			for _, text := range []string{b.String(), "see " + b.String() + " 7.28/58/62/27 40%"} {
				if s.compiled().MatchString(text) {
					matched++
				}
				letThrough(t, s, beforeSieves(text))
			}
		}
		if matched < 3 {
			t.Errorf("%.40s: only %d texts matched", s.pattern, matched)
		}
	}
	for _, m := range readMessages(t) {
		folded := fold(m.Text)
		asTyped, lowered := beforeSieves(folded), beforeSieves(lower(folded))
		for _, s := range all {
			letThrough(t, s, asTyped)
			letThrough(t, s, lowered)
		}
	}
}

// sievedText is a text, and the same with its gas hidden, with their grams.
type sievedText struct {
	text, hidden string
	g, masked    grams
}

func beforeSieves(text string) *sievedText {
	b := &sievedText{text: text, hidden: maskGas(text)}
	b.g.read(text)
	b.masked.readMasked(text)
	return b
}

func letThrough(t *testing.T, s *sieve, b *sievedText) {
	t.Helper()
	if !s.may(&b.g) && s.compiled().MatchString(b.text) {
		t.Fatalf("%q is held back from %s", b.text, s.pattern)
	}
	if !s.may(&b.masked) && s.compiled().MatchString(b.hidden) {
		t.Fatalf("%q, with its gas hidden, is held back from %s", b.text, s.pattern)
	}
}

// write makes a text that the pattern matches, but for the edges of words.
func write(b *strings.Builder, re *syntax.Regexp, rng *rand.Rand) {
	times := 1
	switch re.Op {
	case syntax.OpLiteral:
		b.WriteString(string(re.Rune))
	case syntax.OpCharClass:
		k := rng.Intn(len(re.Rune)/2) * 2
		lo, hi := max(re.Rune[k], ' '), min(re.Rune[k+1], '~')
		if lo <= hi {
			b.WriteRune(lo + rune(rng.Intn(int(hi-lo)+1)))
		}
	case syntax.OpAnyCharNotNL:
		b.WriteByte(byte(' ' + rng.Intn(95)))
	case syntax.OpAlternate:
		write(b, re.Sub[rng.Intn(len(re.Sub))], rng)
		return
	case syntax.OpStar, syntax.OpQuest:
		times = rng.Intn(2)
	case syntax.OpPlus:
		times = 1 + rng.Intn(2)
	case syntax.OpRepeat:
		times = re.Min + rng.Intn(3)
	}
	for range times {
		for _, sub := range re.Sub {
			write(b, sub, rng)
		}
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
				tried = append(tried, s.pattern[:min(len(s.pattern), 30)])
			}
		}
		if len(tried) > 3 {
			t.Errorf("%q: %d patterns are tried: %s", text, len(tried), strings.Join(tried, "; "))
		}
	}
}
