package memory

import (
	"encoding/json"
	"errors"
	"fmt"
)

var (
	// ErrNewer says that a document was written by a newer version of this
	// program: it is neither guessed at nor overwritten.
	ErrNewer = errors.New("written by a newer version of this program")
	// ErrUnreadable says that a document is not what its kind should be.
	ErrUnreadable = errors.New("not readable")
)

// DocumentError is a stored document that could not be used. It wraps
// ErrNewer or ErrUnreadable, and its text can be shown: it holds no content.
type DocumentError struct {
	What      string // "house rules", "the gases of a thread" ...
	Have, Can int    // the document's version and the newest that is understood
	Err       error  // ErrNewer, or an ErrUnreadable with its cause
}

// Error says in plain words what stands in the store and what helps.
func (e *DocumentError) Error() string {
	if errors.Is(e.Err, ErrNewer) {
		return fmt.Sprintf("this store holds %s %v (format %d, this one reads up to %d): nothing was read or changed; update this program",
			e.What, ErrNewer, e.Have, e.Can)
	}
	return fmt.Sprintf("this store holds %s that are %v: nothing was changed", e.What, e.Err)
}

// Unwrap gives ErrNewer or ErrUnreadable.
func (e *DocumentError) Unwrap() error { return e.Err }

// head begins every stored document.
type head struct {
	V    int    `json:"v"`
	Kind string `json:"kind"`
}

// fields is a document of an older version on its way up.
type fields map[string]json.RawMessage

// schema is one kind of document: its name, and one step from each older
// version to the next. Version 1 is the first; the newest is one more than
// there are steps.
type schema struct {
	kind  string
	what  string
	steps []func(fields) error // steps[i] makes version i+2 of version i+1
}

func (s schema) version() int { return len(s.steps) + 1 }
func (s schema) head() head   { return head{V: s.version(), Kind: s.kind} }

// The kinds of document. A field that is added must come with a new version
// when an older binary would misread the document without it.
var (
	houseSchema    = schema{kind: "house", what: "house rules"}
	revisionSchema = schema{kind: "revision", what: "earlier house rules"}
	threadSchema   = schema{kind: "thread", what: "gases of a thread"}
	claimSchema    = schema{kind: "claim", what: "marks of answered messages"}
	metSchema      = schema{kind: "met", what: "marks of users who have read the notice"}
)

// decode reads a document of this kind into out, raising an older version
// first. Fields that the version does not know are left out.
func (s schema) decode(raw []byte, out any) error {
	var h head
	if err := json.Unmarshal(raw, &h); err != nil {
		return s.unreadable(err)
	}
	switch {
	case h.Kind != s.kind || h.V < 1:
		return s.unreadable(fmt.Errorf("kind %.20q, format %d", h.Kind, h.V))
	case h.V > s.version():
		return &DocumentError{What: s.what, Have: h.V, Can: s.version(), Err: ErrNewer}
	case h.V < s.version():
		var err error
		if raw, err = s.raise(raw, h.V); err != nil {
			return s.unreadable(err)
		}
	}
	if err := json.Unmarshal(raw, out); err != nil {
		return s.unreadable(err)
	}
	return nil
}

// raise takes a document from version v to the newest.
func (s schema) raise(raw []byte, v int) ([]byte, error) {
	var doc fields
	if err := json.Unmarshal(raw, &doc); err != nil {
		return nil, err
	}
	for ; v < s.version(); v++ {
		if err := s.steps[v-1](doc); err != nil {
			return nil, fmt.Errorf("raising format %d: %w", v, err)
		}
	}
	return json.Marshal(doc)
}

func (s schema) unreadable(cause error) error {
	return &DocumentError{What: s.what, Can: s.version(), Err: fmt.Errorf("%w (%w)", ErrUnreadable, cause)}
}
