package bot

import (
	"galeward/bot/reply"
	"galeward/bot/shorthand"
	"galeward/physio"
)

// composer turns one assessed gas into the blocks of the answer. It chooses
// and orders; the sentences come from the wording files.
type composer struct {
	gas *shorthand.Gas
	a   *physio.Assessment
	n   numbers
	// inherited names what a follow-up took over, "" for none.
	inherited string
	// change says how a follow-up differs from the gas before it.
	change string
	// notice lines go before the echo: our own state, declined requests.
	notices []string
	// question is the one question, nil for none.
	question *asked
	// said tells what was asked in this thread before, nil for nothing.
	said func(shorthand.QuestionCode) bool
	// unsaid is a question that stays open without being asked again.
	unsaid *asked
	// replaces is the gas in whose place this one stands, nil for a new one.
	replaces *kin
	// brief is the step of brevity, 0 for the whole answer.
	brief int
}

// asked is a question in words, with the choices that answer it.
type asked struct {
	id, text string
	choices  []string
	from     *shorthand.Question
}

// answerLength is about what a phone shows without scrolling far, characters.
const answerLength = 620

// compose lays the answer out; a long one loses, step by step, what stands
// behind "why" anyway.
func (c *composer) compose() reply.Reply {
	r := c.layout()
	for c.brief = 1; c.brief <= briefest && len([]rune(r.Text())) > answerLength; c.brief++ {
		r = c.layout()
	}
	return r
}

// The steps of brevity: no next numbers, no second index and healthy PaO2, no
// minor caution.
const (
	briefNoNext = 1 + iota
	briefOneIndex
	briefest
)

// layout composes the answer in its fixed order.
func (c *composer) layout() reply.Reply {
	var r reply.Reply
	c.question = c.askedOnce(c.chooseQuestion())
	r.Add(reply.Headline, c.headline())
	if c.criticalFirst() {
		r.Add(reply.Critical, criticalNotice)
	}
	for _, n := range c.notices {
		r.Add(reply.Notice, n)
	}
	r.Add(reply.Echo, c.echo())
	r.Add(reply.Ventilation, c.ventilation())
	r.Add(reply.Oxygenation, c.oxygenation())
	r.Add(reply.Metabolic, c.metabolic())
	r.Add(reply.Next, c.change)
	if c.brief < briefNoNext {
		r.Add(reply.Next, c.next())
	}
	c.addCautions(&r)
	if c.question != nil {
		r.Add(reply.Question, c.question.text)
		for _, choice := range c.question.choices {
			r.Buttons = append(r.Buttons, reply.Button{Label: choice})
		}
	}
	return r
}

// criticalFirst says that the call comes before the text: any crossing but a
// PaCO2 alone, which its own line names.
func (c *composer) criticalFirst() bool {
	crossed := c.a.Critical
	return len(crossed) > 1 || len(crossed) == 1 && crossed[0] != physio.PaCO2
}
