package shorthand

import (
	"cmp"
	"slices"
)

// The needs of the patterns take longer to derive than everything else at the
// start of the program, so they are stored; TestStoredNeedsAreDerived derives
// them anew and fails when a stored one differs.
//
//go:generate go test -run TestStoredNeedsAreDerived -update .

// stored are the needs of a pattern, which is known by its sum.
type stored struct {
	sum   uint64
	needs []uint16
}

// storedNeeds gives the needs of a pattern. One that is not stored, such as one
// that was just edited, has them derived.
func storedNeeds(pattern string) []uint16 {
	sum := sumOf(pattern)
	i, ok := slices.BinarySearchFunc(storedSieves, sum, func(s stored, sum uint64) int { return cmp.Compare(s.sum, sum) })
	if !ok {
		return needsOf(pattern)
	}
	return storedSieves[i].needs
}

// sumOf is the FNV-1a sum of a pattern (Fowler, Noll, Vo 1991).
func sumOf(pattern string) uint64 {
	sum := uint64(14695981039346656037)
	for i := 0; i < len(pattern); i++ {
		sum = (sum ^ uint64(pattern[i])) * 1099511628211
	}
	return sum
}
