package shorthand

import (
	"regexp/syntax"
	"slices"
	"sort"
)

// needsOf derives what a text must hold before the pattern can match: the
// branches of the pattern, each a list of groups of which all are needed, each
// group a list of members of which one is needed, each member the grams it is
// made of. Every part stands behind its length, so that one slice holds all. An
// empty branch asks for nothing.
func needsOf(pattern string) []uint16 {
	tree, err := syntax.Parse(pattern, syntax.Perl)
	if err != nil {
		return []uint16{0}
	}
	var out []uint16
	for _, branch := range alternatives(tree.Simplify()) {
		out = withPart(out, layOut(derive(branch).asGroups()))
	}
	return out
}

// withPart appends a part behind its length.
func withPart(out, part []uint16) []uint16 {
	return append(append(out, uint16(len(part))), part...)
}

// layOut gives the groups of a branch, the rarest first.
func layOut(groups [][]string) []uint16 {
	sort.SliceStable(groups, func(a, b int) bool { return likeliness(groups[a]) < likeliness(groups[b]) })
	var out []uint16
	for _, group := range groups {
		var members []uint16
		for _, m := range fewest(group) {
			members = withPart(members, m)
		}
		out = withPart(out, members)
	}
	return out
}

// fewest gives the members of a group without those that hold all grams of
// another, and so occur only where that one does.
func fewest(group []string) []member {
	all := make([]member, len(group))
	for i, text := range group {
		all[i] = gramsOf(text)
	}
	sort.SliceStable(all, func(a, b int) bool { return len(all[a]) < len(all[b]) })
	var kept []member
next:
	for _, m := range all {
		for _, k := range kept {
			if m.holds(k) {
				continue next
			}
		}
		kept = append(kept, m)
	}
	return kept
}

// member is a piece of text that may have to occur, as the grams it is made of.
type member []uint16

// holds says that all grams of other are grams of m.
func (m member) holds(other member) bool {
	for _, i := range other {
		if !slices.Contains(m, i) {
			return false
		}
	}
	return true
}

// alternatives are the parts of a pattern of which one matches. The parser
// puts what all begin with, such as a word's edge, in front of them.
func alternatives(re *syntax.Regexp) []*syntax.Regexp {
	switch n := len(re.Sub); {
	case re.Op == syntax.OpAlternate:
		return re.Sub
	case re.Op == syntax.OpConcat && n == 2 && re.Sub[0].Op == syntax.OpWordBoundary:
		return alternatives(re.Sub[1])
	}
	return []*syntax.Regexp{re}
}

// likeliness is a rough chance that a line without a match holds the group.
func likeliness(group []string) float64 {
	sum := 0.0
	for _, text := range group {
		p := 1.0
		for range min(len(text), 6) {
			p /= 8
		}
		sum += p
	}
	return sum
}

// need is what is known of all matches of a part of a pattern.
type need struct {
	// exact are all texts that match, nil when they are too many.
	exact []string
	// groups each have a member that occurs in every match.
	groups [][]string
}

// mostExact bounds the texts that are listed for a part.
const mostExact = 32

func (n need) asGroups() [][]string {
	if n.exact != nil {
		return addGroup(nil, n.exact)
	}
	return n.groups
}

// addGroup keeps a group that says something: an empty member always occurs.
func addGroup(groups [][]string, group []string) [][]string {
	for _, text := range group {
		if text == "" {
			return groups
		}
	}
	return append(groups, group)
}

func derive(re *syntax.Regexp) need {
	switch re.Op {
	case syntax.OpEmptyMatch, syntax.OpBeginLine, syntax.OpEndLine, syntax.OpBeginText, syntax.OpEndText, syntax.OpWordBoundary, syntax.OpNoWordBoundary:
		return need{exact: []string{""}}
	case syntax.OpLiteral:
		return need{exact: []string{plainText(string(re.Rune))}}
	case syntax.OpCharClass:
		return needOfClass(re.Rune)
	case syntax.OpCapture:
		return derive(re.Sub[0])
	case syntax.OpPlus:
		return need{groups: derive(re.Sub[0]).asGroups()}
	case syntax.OpQuest:
		if sub := derive(re.Sub[0]); sub.exact != nil {
			return need{exact: append([]string{""}, sub.exact...)}
		}
	case syntax.OpConcat:
		return needOfAll(re.Sub)
	case syntax.OpAlternate:
		return needOfOne(re.Sub)
	}
	return need{}
}

// needOfClass lists the members of a small class. A class of capitals needs
// one, which the grams mark.
func needOfClass(pairs []rune) need {
	seen := map[string]bool{}
	capitals := len(pairs) > 0
	for i := 0; i < len(pairs); i += 2 {
		lo, hi := pairs[i], pairs[i+1]
		capitals = capitals && lo >= 'A' && hi <= 'Z'
		for r := lo; r <= hi && r < 0x80 && len(seen) <= 12; r++ {
			seen[plainText(string(r))] = true
		}
	}
	switch {
	case capitals && len(seen) > 12:
		return need{groups: [][]string{{capital}}}
	case len(seen) == 0 || len(seen) > 12:
		return need{}
	}
	var out need
	for text := range seen {
		out.exact = append(out.exact, text)
	}
	sort.Strings(out.exact)
	return out
}

// needOfAll joins the needs of parts that follow each other.
func needOfAll(parts []*syntax.Regexp) need {
	var groups [][]string
	run, whole := []string{""}, true
	for _, part := range parts {
		n := derive(part)
		switch {
		case n.exact == nil:
			groups = append(addGroup(groups, run), n.groups...)
			run, whole = []string{""}, false
		case len(run)*len(n.exact) > mostExact:
			groups = addGroup(groups, run)
			run, whole = n.exact, false
		default:
			run = crossed(run, n.exact)
		}
	}
	if whole {
		return need{exact: run}
	}
	return need{groups: addGroup(groups, run)}
}

func crossed(a, b []string) []string {
	out := make([]string, 0, len(a)*len(b))
	for _, x := range a {
		for _, y := range b {
			out = append(out, plainText(x+y))
		}
	}
	return out
}

// needOfOne joins the needs of alternatives: the rarest group of each.
func needOfOne(parts []*syntax.Regexp) need {
	var exact, group []string
	whole := true
	for _, part := range parts {
		n := derive(part)
		whole = whole && n.exact != nil
		exact = append(exact, n.exact...)
		groups := n.asGroups()
		if len(groups) == 0 {
			groups = [][]string{{""}}
		}
		rarest := groups[0]
		for _, g := range groups[1:] {
			if likeliness(g) < likeliness(rarest) {
				rarest = g
			}
		}
		group = append(group, rarest...)
	}
	if whole && len(exact) <= mostExact {
		return need{exact: exact}
	}
	return need{groups: addGroup(nil, group)}
}
