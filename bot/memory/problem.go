package memory

import (
	"fmt"
	"strings"
	"unicode"
)

// FieldError is one rule that is not possible: the key of the file form, what
// was read, what was expected, and a hint where there is one.
type FieldError struct {
	Field string
	Got   string // as written, shortened; "" when it was absent
	Want  string
	Hint  string
}

// Error is one sentence that names all four.
func (e *FieldError) Error() string {
	s := e.Field + ": "
	if e.Got != "" {
		s += "read " + e.Got + ", "
	}
	s += "expected " + e.Want
	if e.Hint != "" {
		s += "; " + e.Hint
	}
	return s
}

// Problems are all the rules that are not possible: first those that can not
// be read, in the order of the file, then those that are out of range or
// contradict another. Nothing of the rules is applied.
type Problems []*FieldError

// mostProblems bounds what is printed of one file.
const mostProblems = 12

// Error lists the problems, one a line.
func (p Problems) Error() string {
	var lines []string
	for i, e := range p {
		if i == mostProblems {
			lines = append(lines, fmt.Sprintf("and %d more", len(p)-i))
			break
		}
		lines = append(lines, e.Error())
	}
	return strings.Join(lines, "\n")
}

// Unwrap gives the single field errors.
func (p Problems) Unwrap() []error {
	all := make([]error, len(p))
	for i, e := range p {
		all[i] = e
	}
	return all
}

// add notes a problem.
func (p *Problems) add(field, got, want, hint string) {
	*p = append(*p, &FieldError{field, got, want, hint})
}

// err is nil when there is no problem.
func (p Problems) err() error {
	if len(p) == 0 {
		return nil
	}
	return p
}

// shown shortens what was read and takes out what would not print.
func shown(s string) string {
	const most = 40
	s = strings.Map(func(r rune) rune {
		if !unicode.IsPrint(r) || r == unicode.ReplacementChar {
			return '?'
		}
		return r
	}, s)
	if runes := []rune(s); len(runes) > most {
		return string(runes[:most]) + "..."
	}
	return s
}

// perhaps is the hint at the nearest of some words, "" when none is near.
func perhaps(word string, known []string) string {
	if near := nearest(word, known); near != "" {
		return fmt.Sprintf("perhaps %q", near)
	}
	return ""
}

// nearest finds the known word that was probably meant.
func nearest(word string, known []string) string {
	word = strings.ToLower(word)
	if len(word) < 2 || len(word) > 40 {
		return ""
	}
	best, least := "", max(1, (len(word)+1)/3)+1
	for _, k := range known {
		low := strings.ToLower(k)
		d := distance(word, low)
		if min(len(word), len(low)) >= 3 && (strings.Contains(low, word) || strings.Contains(word, low)) {
			d = min(d, 1)
		}
		if d < least {
			best, least = k, d
		}
	}
	return best
}

// distance counts the single-character edits between two words (Levenshtein
// 1966), by rows.
func distance(a, b string) int {
	row := make([]int, len(b)+1)
	for j := range row {
		row[j] = j
	}
	for i := range len(a) {
		diagonal := row[0]
		row[0] = i + 1
		for j := range len(b) {
			cost := diagonal
			if a[i] != b[j] {
				cost++
			}
			diagonal = row[j+1]
			row[j+1] = min(cost, row[j]+1, row[j+1]+1)
		}
	}
	return row[len(b)]
}
