package bot

import (
	"galeward/bot/reply"
	"galeward/bot/shorthand"
)

// help prints the command table with example lines in the channel's own order
// and units.
func (t *turn) help() {
	var r reply.Reply
	r.Add(reply.Headline, "Type a gas; words may stand around it")
	h := t.habits()
	r.Add(reply.Item, "A gas: "+shorthand.Example(h)+" (labels in any order: ph 7.28 co2 58 o2 62 fio2 40)")
	r.Add(reply.Item, "Without a gas: spo2 91 60% hfnc rr 30")
	for _, c := range commands() {
		line := c.usage + ": " + c.summary
		if len(c.examples) > 1 || c.examples[0] != c.usage {
			line += ". Example: " + last(c.examples)
		}
		r.Add(reply.Item, line)
	}
	r.Add(reply.Item, "It gives no orders, doses, diagnosis or prognosis, and takes no names, numbers or pictures of patients.")
	r.Add(reply.Item, standingNotice)
	if t.b.version != "" {
		r.Add(reply.Item, "Galeward "+t.b.version)
	}
	t.finish("help", r)
}
