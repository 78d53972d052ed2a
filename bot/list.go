package bot

import (
	"sort"
	"strconv"
	"strings"

	"galeward/bot/memory"
	"galeward/bot/reply"
	"galeward/physio"
)

// several answers a line with more than one gas: a series in its order, a list
// of beds worst first, each read on its own, one line each.
func (t *turn) several() {
	cs := make([]*composer, len(t.line.Gases))
	for i := range t.line.Gases {
		cs[i] = t.composer(&t.line.Gases[i])
	}
	kind := "trend"
	shown := append([]*composer(nil), cs...)
	if t.line.List {
		kind = "beds"
		sort.SliceStable(shown, func(i, j int) bool { return shown[i].weight() > shown[j].weight() })
	}
	var r reply.Reply
	r.Add(reply.Headline, countWords(cs))
	for _, n := range t.notices() {
		r.Add(reply.Notice, n)
	}
	for _, c := range shown {
		r.Add(reply.Item, c.itemLine())
	}
	question := askOnce(cs)
	if question != nil {
		r.Add(reply.Question, question.Text)
	}
	t.stand(&r)
	t.finish(kind, r)
	t.answer.Machine.Question = question
	for _, c := range cs {
		t.answer.Machine.Gases = append(t.answer.Machine.Gases, c.machine(c.compose()))
	}
	t.keepSeveral(cs)
}

func (t *turn) keepSeveral(cs []*composer) {
	entries := make([]memory.Entry, 0, len(cs))
	for _, c := range cs {
		entries = append(entries, memory.Entry{Message: t.e.Message, At: t.now(), Gas: *c.gas})
	}
	if t.e.Message != "" && !t.v.Degraded {
		t.v.Put(entries...)
		t.keeps = true
	}
}

// askOnce is the one question of a list: a doubt about what was typed first,
// then the first other one.
func askOnce(cs []*composer) *MachineQuestion {
	for _, typed := range []bool{true, false} {
		for i, c := range cs {
			if typed && len(c.gas.Questions) == 0 {
				continue
			}
			if q := c.chooseQuestion(); q != nil {
				return &MachineQuestion{ID: q.id, Text: c.label(i) + ": " + q.text + c.answerHint(q), Choices: q.choices}
			}
		}
	}
	return nil
}

// answerHint shows how the question about one gas of a list is answered.
func (c *composer) answerHint(q *asked) string {
	if c.gas.Bed == "" || len(q.choices) == 0 {
		return ""
	}
	return " Answer with the bed: bed " + c.gas.Bed + " " + q.choices[0]
}

func (c *composer) label(i int) string {
	switch {
	case c.gas.Bed != "" && c.gas.Time != "":
		return "Bed " + c.gas.Bed + ", " + c.gas.Time
	case c.gas.Bed != "":
		return "Bed " + c.gas.Bed
	case c.gas.Time != "":
		return c.gas.Time
	}
	return "Gas " + strconv.Itoa(i+1)
}

// itemLine is one gas in one sentence: label, verdicts, values as read.
func (c *composer) itemLine() string {
	label := ""
	if c.gas.Bed != "" || c.gas.Time != "" {
		label = c.label(0) + ": "
	}
	values := strings.TrimPrefix(strings.Join(c.echoedValues(), ", "), " ")
	line := label + c.headline() + ". " + values + "."
	for _, text := range c.noteTexts() {
		line += " " + text
	}
	for _, caution := range c.a.Cautions {
		if caution.Severity == physio.Major {
			line += " Caution: " + c.cautionSentence(caution.Code)
			break
		}
	}
	return line
}

// weight orders a list of beds: critical values first, then a level that is
// critically low, then both axes, then one, then what can not be told.
func (c *composer) weight() int {
	w := 10 * len(c.a.Critical)
	if c.a.Oxygenation.Level == physio.DegreeSevere || c.levelWord() == "critically low" {
		w += 5
	}
	switch c.a.Problem {
	case physio.ProblemBoth:
		w += 4
	case physio.ProblemVentilation, physio.ProblemOxygenation:
		w += 3
	case physio.ProblemUndetermined:
		w++
	}
	return w
}

// countWords counts the problems of a list in its first line.
func countWords(cs []*composer) string {
	counts := map[physio.Problem]int{}
	for _, c := range cs {
		counts[c.a.Problem]++
	}
	text := strconv.Itoa(len(cs)) + " gases:"
	for _, p := range []struct {
		problem physio.Problem
		word    string
	}{
		{physio.ProblemBoth, "both"}, {physio.ProblemVentilation, "CO2"},
		{physio.ProblemOxygenation, "O2"}, {physio.ProblemNone, "neither"}, {physio.ProblemUndetermined, "unclear"},
	} {
		if n := counts[p.problem]; n > 0 {
			if !strings.HasSuffix(text, ":") {
				text += ","
			}
			text += " " + strconv.Itoa(n) + " " + p.word
		}
	}
	return text
}
