// Package reply is the answer as a value: an ordered list of blocks, with the
// buttons, the form and the charts that go with it, and the plain-text printer.
//
// # What lives here
//
// The Reply, the order in which blocks are shed when a platform cuts, and the
// plain text that is the console's answer, every platform's fallback and the
// reference in the golden files.
//
// # What does not
//
// No words: package bot chooses every sentence. No platform markup: adapters
// lay blocks out, escape them, and may neither add nor reorder clinical text.
package reply

import "strings"

// Kind is the part of the answer that a block holds. Blocks stand in the
// order of these constants.
type Kind uint8

// The kinds, in the fixed order of the answer.
const (
	Critical Kind = iota // a critical limit is crossed: before everything
	Headline             // both verdicts, at most 40 characters
	Notice               // our own state: the store is down, a gas is void, a refusal
	Echo                 // "Read:" and every assumption
	Ventilation
	Oxygenation
	Metabolic
	Next     // next numbers
	Major    // a major caution
	Minor    // a minor caution
	Item     // one line of a list: a bed, a house rule, a help line
	Question // one question
	Standing // the standing notice for a user's first answer
)

// Block is one paragraph of the answer. Text is plain: no markup, no line
// break.
type Block struct {
	Kind Kind
	Text string
}

// Button is a one-word answer to the reply's question.
type Button struct {
	Label string // at most 24 characters
	Token string // comes back in Event.Token when pressed
}

// Field is one line of a form.
type Field struct {
	Name, Label, Hint string
	Optional          bool
}

// Form asks for values on platforms that can show one.
type Form struct {
	Title, Submit, Token string
	Fields               []Field
}

// Series is one line or set of points of a chart.
type Series struct {
	Name string
	X, Y []float64
	Line bool
}

// Chart is a picture to draw: its text alternative always goes with it.
type Chart struct {
	Title, XLabel, YLabel, Alt string
	Series                     []Series
}

// Reply is one whole answer.
type Reply struct {
	Blocks  []Block
	Buttons []Button
	Form    *Form
	Charts  []Chart
}

// Empty says that there is nothing to deliver.
func (r Reply) Empty() bool {
	return len(r.Blocks) == 0 && r.Form == nil && len(r.Charts) == 0
}

// Add appends a block unless its text is empty.
func (r *Reply) Add(k Kind, text string) {
	if text != "" {
		r.Blocks = append(r.Blocks, Block{k, text})
	}
}

// shed is the order in which blocks go when a platform cuts. What is not
// listed (critical line, headline, echo, verdicts, metabolic side, major
// caution, question) is never cut.
var shed = [...]Kind{Standing, Next, Minor}

// Fit drops whole blocks in the shedding order, the last of a kind first,
// until size is at most limit or nothing more may go. Size measures a reply
// as the platform counts it.
func (r Reply) Fit(limit int, size func(Reply) int) Reply {
	for _, kind := range shed {
		for i := len(r.Blocks) - 1; i >= 0 && size(r) > limit; i-- {
			if r.Blocks[i].Kind == kind {
				kept := make([]Block, 0, len(r.Blocks)-1)
				kept = append(kept, r.Blocks[:i]...)
				r.Blocks = append(kept, r.Blocks[i+1:]...)
			}
		}
	}
	return r
}

// Text prints the reply as plain text, one block a line.
func (r Reply) Text() string {
	lines := make([]string, len(r.Blocks))
	for i, b := range r.Blocks {
		lines[i] = b.Text
	}
	return strings.Join(lines, "\n")
}
