package slack

import (
	"strconv"
	"strings"

	"galeward/bot/reply"

	slackapi "github.com/slack-go/slack"
)

// Slack's limits on a message, from its block reference; the last one is
// undocumented (near 13,200 summed over the blocks) and kept with a margin.
const (
	maxBlocks  = 50
	maxText    = 3000
	maxHeader  = 150
	maxLabel   = 75
	maxValue   = 2000
	maxButtons = 25
	maxMessage = 12000
)

// message is one Slack message: the blocks, and the text for notifications and
// for clients without blocks.
type message struct {
	text   string
	blocks []slackapi.Block
}

// parts fits a reply into as few messages as it takes: what may be shed goes
// first, and what may not is spread over further messages, never cut.
func parts(r reply.Reply, limit int) []reply.Reply {
	r = r.Fit(limit, size)
	r = r.Fit(maxBlocks, count)
	var out []reply.Reply
	var part reply.Reply
	for _, b := range pieces(r.Blocks, limit) {
		next := reply.Reply{Blocks: append(part.Blocks[:len(part.Blocks):len(part.Blocks)], b)}
		if len(part.Blocks) > 0 && (size(next) > limit || count(next) >= maxBlocks) {
			out = append(out, part)
			next = reply.Reply{Blocks: []reply.Block{b}}
		}
		part = next
	}
	part.Buttons = r.Buttons // beside the question, which stands last
	return append(out, part)
}

// pieces breaks paragraphs that no single block holds.
func pieces(blocks []reply.Block, limit int) []reply.Block {
	var out []reply.Block
	for _, b := range blocks {
		for _, text := range chop(b.Text, min(maxText, limit)) {
			out = append(out, reply.Block{Kind: b.Kind, Text: text})
		}
	}
	return out
}

// size measures a reply as Slack counts a message; the notification text is
// escaped and may be longer than what the blocks show.
func size(r reply.Reply) int {
	n := width(escape(r.Text()))
	for _, b := range r.Buttons {
		n += width(b.Label) + width(b.Token)
	}
	return n
}

func count(r reply.Reply) int { return len(render(r).blocks) }

// render lays out a reply that parts has fitted. All text is plain text
// objects: Slack reads no mention, link or formatting in them.
func render(r reply.Reply) message {
	m := message{text: escape(r.Text())}
	for i := 0; i < len(r.Blocks); i++ {
		b := r.Blocks[i]
		text := b.Text
		if b.Kind == reply.Item {
			text, i = list(r.Blocks, i)
		}
		m.blocks = append(m.blocks, block(b.Kind, text, len(m.blocks) == 0))
	}
	if row := actions(r.Buttons); row != nil {
		m.blocks = append(m.blocks, row)
	}
	return m
}

// list joins the lines of a list, from the i-th block on, as far as one
// section holds them. It returns the index of the last line taken.
func list(blocks []reply.Block, i int) (string, int) {
	text := blocks[i].Text
	for i+1 < len(blocks) && blocks[i+1].Kind == reply.Item {
		longer := text + "\n" + blocks[i+1].Text
		if width(longer) > maxText {
			break
		}
		text = longer
		i++
	}
	return text, i
}

func block(kind reply.Kind, text string, first bool) slackapi.Block {
	heads := kind == reply.Headline || kind == reply.Critical && first
	switch {
	case heads && width(text) <= maxHeader:
		return slackapi.NewHeaderBlock(object(text))
	case kind == reply.Minor || kind == reply.Standing:
		return slackapi.NewContextBlock("", object(text))
	}
	// Expanded: Slack else hides the end of a long section behind a link.
	return slackapi.NewSectionBlock(object(text), nil, nil, slackapi.SectionBlockOptionExpand(true))
}

func object(text string) *slackapi.TextBlockObject {
	if strings.TrimSpace(text) == "" {
		text = "-" // Slack refuses an empty text object and the whole message with it
	}
	return slackapi.NewTextBlockObject(slackapi.PlainTextType, text, false, false)
}

func actions(buttons []reply.Button) slackapi.Block {
	var row []slackapi.BlockElement
	for i, b := range buttons {
		if len(row) == maxButtons || width(b.Token) > maxValue {
			continue
		}
		row = append(row, slackapi.NewButtonBlockElement("answer_"+strconv.Itoa(i), b.Token, object(clip(b.Label, maxLabel))))
	}
	if row == nil {
		return nil
	}
	return slackapi.NewActionBlock("", row...)
}
