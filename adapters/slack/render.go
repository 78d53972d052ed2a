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
	var out []reply.Reply
	var part reply.Reply
	room := limit
	for _, b := range pieces(r.Blocks, limit) {
		need := escapedWidth(b.Text) + 1
		// One block is left for the buttons.
		if len(part.Blocks) > 0 && (need > room || len(part.Blocks) == maxBlocks-1) {
			out = append(out, part)
			part, room = reply.Reply{}, limit
		}
		part.Blocks = append(part.Blocks, b)
		room -= need
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
	n := 0
	for _, b := range r.Blocks {
		n += escapedWidth(b.Text) + 1
	}
	for _, b := range r.Buttons {
		n += width(b.Label) + width(b.Token)
	}
	return n
}

// render lays out a reply that parts has fitted. All text is plain text
// objects: Slack reads no mention, link or formatting in them. thread is where
// the question stands; see actions.
func render(r reply.Reply, thread string) message {
	m := message{text: escape(r.Text())}
	for i := 0; i < len(r.Blocks); i++ {
		b := r.Blocks[i]
		text := b.Text
		if b.Kind == reply.Item {
			text, i = list(r.Blocks, i)
		}
		m.blocks = append(m.blocks, block(b.Kind, text, len(m.blocks) == 0))
	}
	if row := actions(r.Buttons, thread); row != nil {
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

// threadMark begins the id of a block of buttons that belongs to a thread.
const threadMark = "thread:"

// actions is the row of buttons. Its id carries the thread of the question: a
// private message under a question without replies stands outside the thread,
// and the press of its button is to find back.
func actions(buttons []reply.Button, thread string) slackapi.Block {
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
	id := ""
	if thread != "" {
		id = threadMark + thread
	}
	return slackapi.NewActionBlock(id, row...)
}
