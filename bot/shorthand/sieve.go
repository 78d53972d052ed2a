package shorthand

import (
	"regexp"
	"sync"
)

// sieve is a pattern with what a text must hold before the pattern can match.
// That is derived from the pattern itself (derive.go), so that it can never
// leave out a match; most lines hold none of it, and the pattern, which is
// dear, is neither compiled nor tried.
type sieve struct {
	pattern  string
	compiled func() *regexp.Regexp
	// needed gives the needs as needsOf lays them out.
	needed func() []uint16
}

// sift takes a pattern; nothing is compiled or derived before it is used.
func sift(pattern string) *sieve {
	return &sieve{
		pattern:  pattern,
		compiled: lazily(pattern),
		needed:   sync.OnceValue(func() []uint16 { return storedNeeds(pattern) }),
	}
}

// lazily compiles a pattern when it is first used.
func lazily(pattern string) func() *regexp.Regexp {
	return sync.OnceValue(func() *regexp.Regexp { return regexp.MustCompile(pattern) })
}

// may says that a text with these grams may hold a match: all groups of one
// branch have a member in it.
func (s *sieve) may(g *grams) bool {
	for needs := s.needed(); len(needs) > 0; {
		var branch []uint16
		if branch, needs = part(needs); g.holdsAll(branch) {
			return true
		}
	}
	return false
}

// in says that the text, whose grams g holds, matches.
func (s *sieve) in(text string, g *grams) bool { return s.may(g) && s.compiled().MatchString(text) }

// all gives up to eight matches with their groups.
func (s *sieve) all(text string, g *grams) [][]string {
	if !s.may(g) {
		return nil
	}
	return s.compiled().FindAllStringSubmatch(text, 8)
}
