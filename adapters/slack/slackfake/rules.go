package slackfake

import (
	"encoding/json"
	"strings"
	"unicode/utf16"
)

// Slack's limits, from its block reference; the sum over the blocks is not
// documented and was found by others (bolt-js issue 2509).
const (
	maxBlocks   = 50
	maxText     = 3000
	maxHeader   = 150
	maxElements = 10
	maxButtons  = 25
	maxLabel    = 75
	maxValue    = 2000
	maxID       = 255
	maxSum      = 13200
	maxMessage  = 40000
)

// Block is one block of a message.
type Block struct {
	Type     string    `json:"type"`
	Text     *Object   `json:"text,omitempty"`
	Elements []Element `json:"elements,omitempty"`
	ID       string    `json:"block_id,omitempty"`
	Expand   bool      `json:"expand,omitempty"`
}

// Object is a text object.
type Object struct {
	Type  string `json:"type"`
	Text  string `json:"text"`
	Emoji *bool  `json:"emoji,omitempty"`
}

// Element is an element of a context or actions block; its text is a string in
// the one and an object in the other.
type Element struct {
	Type     string          `json:"type"`
	Text     json.RawMessage `json:"text,omitempty"`
	ActionID string          `json:"action_id,omitempty"`
	Value    string          `json:"value,omitempty"`
	Emoji    *bool           `json:"emoji,omitempty"`
}

func length(s string) int { return len(utf16.Encode([]rune(s))) }

// check reads the blocks into the post and returns the word with which Slack
// would refuse the message, "" when it would take it. Every refusal, and what
// Slack would take to the reader's harm, is a violation. It needs f.mu held.
func (f *Fake) check(p *Post, raw []byte) string {
	if length(p.Text) > maxMessage {
		f.violate("%s: text of %d characters is cut at %d", p.Route, length(p.Text), maxMessage)
	}
	f.markup(p.Route, p.Text)
	if len(raw) > 0 && string(raw) != "null" && json.Unmarshal(raw, &p.Blocks) != nil {
		f.violate("%s: blocks are not a list of blocks", p.Route)
		return "invalid_blocks_format"
	}
	if len(p.Blocks) == 0 && p.Text == "" {
		f.violate("%s: empty message", p.Route)
		return "no_text"
	}
	if len(p.Blocks) > maxBlocks {
		f.violate("%s: %d blocks", p.Route, len(p.Blocks))
		return "invalid_blocks"
	}
	return f.checkBlocks(p)
}

func (f *Fake) checkBlocks(p *Post) string {
	sum, before := 0, len(f.violations)
	var lines []string
	for _, b := range p.Blocks {
		for _, line := range f.block(p, b) {
			lines = append(lines, line)
			sum += length(line)
		}
	}
	p.Shown = strings.Join(lines, "\n")
	if len(f.violations) > before {
		return "invalid_blocks"
	}
	if sum > maxSum {
		f.violate("%s: %d characters in the blocks", p.Route, sum)
		return "msg_blocks_too_long"
	}
	return ""
}

// block checks one block and returns the lines that it shows.
func (f *Fake) block(p *Post, b Block) []string {
	switch b.Type {
	case "header":
		return f.object(p, b.Text, maxHeader, true)
	case "section":
		return f.object(p, b.Text, maxText, false)
	case "context":
		return f.context(p, b)
	case "actions":
		return f.actions(p, b)
	}
	f.violate("%s: block of type %q", p.Route, b.Type)
	return nil
}

func (f *Fake) object(p *Post, o *Object, limit int, plainOnly bool) []string {
	switch {
	case o == nil || o.Text == "" || length(o.Text) > limit:
		f.violate("%s: text object missing, empty or over %d characters", p.Route, limit)
		return nil
	case o.Type != "plain_text" && (plainOnly || o.Type != "mrkdwn"):
		f.violate("%s: text object of type %q", p.Route, o.Type)
	case o.Type == "mrkdwn":
		f.markup(p.Route, o.Text)
	}
	return []string{o.Text}
}

func (f *Fake) context(p *Post, b Block) (lines []string) {
	if len(b.Elements) == 0 || len(b.Elements) > maxElements {
		f.violate("%s: %d elements in a context block", p.Route, len(b.Elements))
	}
	for _, e := range b.Elements {
		o := &Object{Type: e.Type}
		_ = json.Unmarshal(e.Text, &o.Text)
		lines = append(lines, f.object(p, o, maxText, false)...)
	}
	return lines
}

func (f *Fake) actions(p *Post, b Block) (lines []string) {
	if len(b.Elements) == 0 || len(b.Elements) > maxButtons || len(b.ID) > maxID {
		f.violate("%s: %d elements in an actions block", p.Route, len(b.Elements))
	}
	seen := map[string]bool{}
	for _, e := range b.Elements {
		var label Object
		_ = json.Unmarshal(e.Text, &label)
		lines = append(lines, f.object(p, &label, maxLabel, true)...)
		if e.Type != "button" || length(e.Value) > maxValue || e.ActionID == "" || len(e.ActionID) > maxID || seen[e.ActionID] {
			f.violate("%s: button with a bad type, value or action id", p.Route)
		}
		seen[e.ActionID] = true
		p.Buttons = append(p.Buttons, Button{b.ID, e.ActionID, label.Text, e.Value})
	}
	return lines
}

// markup finds text that Slack would turn into a mention, a link or a channel
// name: nothing that the bot says is meant to be one.
func (f *Fake) markup(route, text string) {
	if strings.ContainsAny(text, "<>") {
		f.violate("%s: unescaped < or > in text that Slack reads as markup", route)
	}
}
