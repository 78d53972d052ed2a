package shorthand

import (
	"strings"

	"galeward/physio"
)

// Parse reads one typed message under the habits of its channel and thread. It
// never panics, never holds a refusal and values together, and its work grows
// with the length of the message only up to a fixed cut.
func Parse(text string, h Habits) Line {
	if h.Units == "" {
		h.Units = MmHg
	}
	return contained(h, func() Line {
		folded := fold(text)
		if r := identified(folded); r != RefusedNone {
			return Line{Kind: Refusal, Refused: r}
		}
		p := &parser{h: h, typed: lower(folded)}
		return p.parse()
	})
}

// contained turns a panic of the reader into a message that was not read: a
// fault of ours must not take the bot down, nor give half a reading.
func contained(h Habits, read func() Line) (line Line) {
	defer func() {
		if recover() != nil {
			line = Line{Kind: quietKind(h)}
		}
	}()
	return read()
}

// lower gives the text in lower case without what is no typist's text. One
// spelling is told apart by its capitals: "tccO2" may be transcutaneous CO2 or
// O2, "tcCO2" and "tcco2" are CO2.
func lower(folded string) string {
	return strings.ToLower(strings.ReplaceAll(stripText(folded), "tccO2", "tc "))
}

// quietKind is the kind of a message in which nothing was read.
func quietKind(h Habits) Kind {
	if h.Addressed {
		return Unclear
	}
	return Silence
}

// parser reads one message.
type parser struct {
	h     Habits
	typed string // folded, in lower case
	rest  string // without the command word
	grams grams  // of typed
	line  Line
	mixed bool
	// pressuresOnly says that the whole message is labelled gas pressures.
	pressuresOnly bool
}

func (p *parser) parse() Line {
	p.grams.read(p.typed)
	if c, ok := p.released(); ok {
		return Line{Kind: Released, Picked: c}
	}
	if rest, ok := houseCommand(p.typed); ok {
		return p.houseLine(rest)
	}
	if arg, sentence, ok := houseRule(p.typed[lead(p.typed):], &p.grams); ok && (p.h.Addressed || !strings.HasPrefix(arg, "word ")) {
		return Line{Kind: Command, Intent: IntentHouse, Argument: arg, Sentence: sentence}
	}
	p.line.Intent, p.rest = command(p.typed)
	if p.namesGas() {
		p.line.Intent, p.rest = IntentNone, p.typed
	}
	p.line.Declined = declined(p.typed, &p.grams)
	p.read()
	return p.verdict()
}

// namesGas says that a gas follows a word that is a command only without one:
// "house fire 7.38/36/240".
func (p *parser) namesGas() bool {
	switch p.line.Intent {
	case IntentHouse, IntentForget, IntentHelp:
		return len(coreStarts(lex(p.rest))) > 0
	}
	return false
}

// read reads the values of the message.
func (p *parser) read() {
	s, mixed := commas(untable(oneSlash(expand(dropRanges(p.rest), p.h.Words))))
	p.mixed = mixed
	t := lex(s)
	intent, clause, rest := p.clauses(t, s)
	if intent != IntentNone {
		p.line.Intent = intent
		p.readClause(intent, clause)
		t = rest
	}
	claims := p.line.Intent == IntentCheck
	p.pressuresOnly = pressuresOnly(t)
	parts, list := split(t)
	parts = parts[:min(len(parts), mostGases)]
	p.line.List = list
	for i := range parts {
		parts[i].mixed, parts[i].claims = p.mixed, claims
		parts[i].corrects = p.h.Addressed && correctionWords.in(head(p.rest), &p.grams)
		g := readGas(parts[i].t, p.h, parts[i])
		p.line.Gases = append(p.line.Gases, g)
	}
	p.relate(parts, t)
	if p.h.Addressed {
		p.twoNumbers(t)
	}
}

// oneSlash takes a line that doubles every slash as one that does not; a line
// with single ones keeps the double one as an empty place.
func oneSlash(s string) string {
	if n := strings.Count(s, "//"); n < 2 || strings.Count(s, "/") != 2*n {
		return s
	}
	return strings.ReplaceAll(s, "//", "/")
}

// mostGases is more than any list of beds or series holds; what is pasted
// beyond it is not read.
const mostGases = 100

// relate says how the gases belong to each other and to the thread.
func (p *parser) relate(parts []segment, t []token) {
	gases := p.line.Gases
	shareCord(gases)
	shareUsual(gases, p.line.List)
	if len(gases) == 2 {
		if pair, ok := venousPair(&gases[0], &gases[1]); ok {
			p.line.Gases = []Gas{pair}
			gases = p.line.Gases
		}
	}
	for i := 1; i < len(gases); i++ {
		if parts[i].later {
			gases[i].Follow = FollowNow
		}
		if parts[i].plain && !p.line.List {
			ask := Question{Code: AskTwoGases, Quantity: physio.PHq, Choices: []Choice{{Word: "same patient"}, {Word: "two patients"}}}
			gases[i].Questions = append([]Question{ask}, gases[i].Questions...)
		}
	}
	if len(gases) > 0 && !p.line.List {
		gases[0].Follow = p.follow(&gases[0], t)
		if len(gases) > 1 && parts[1].later && p.line.Intent != IntentNow {
			gases[0].Follow = FollowNone // the word belongs to the second
		}
	}
}

// verdict says what kind of message it was.
func (p *parser) verdict() Line {
	p.dropEmpty()
	l := &p.line
	switch {
	case len(l.Gases) > 0:
		l.Kind = Reading
	case l.Intent != IntentNone && p.meant():
		l.Kind = Command
		if l.Intent == IntentHouse || l.Intent == IntentWhy || l.Intent == IntentHelp || l.Intent == IntentForget || l.Intent == IntentTrend || l.Intent == IntentRecord || l.Intent == IntentBeds {
			l.Argument = clean(p.rest)
		}
	case len(l.Declined) > 0 && p.h.Addressed:
		return Line{Kind: Refusal, Refused: l.Declined[0]}
	default:
		return Line{Kind: quietKind(p.h), TakesBack: p.takesBack()}
	}
	if l.Intent != IntentNone && l.Argument == "" && l.Intent != IntentAim && l.Intent != IntentSuppose && l.Intent != IntentCheck && l.Intent != IntentNow && len(l.Gases) > 0 && l.Intent != IntentTrend && l.Intent != IntentBeds && l.Intent != IntentRecord {
		l.Argument = clean(p.rest)
	}
	return *l
}

// meant says that a command without values was meant for the bot.
func (p *parser) meant() bool {
	if p.h.Addressed {
		return p.line.Intent != IntentCheck || p.h.Earlier != nil || !p.line.Target.Empty() || len(strings.Fields(p.rest)) > 0
	}
	if p.line.Intent == IntentAim || p.line.Intent == IntentSuppose {
		return p.h.Earlier != nil && (!p.line.Target.Empty() || !p.line.Change.Empty())
	}
	return loose(p.line.Intent, p.rest) || p.h.Earlier != nil && p.line.Intent == IntentWhy
}

// dropEmpty leaves out gases that hold nothing worth an answer.
func (p *parser) dropEmpty() {
	kept := p.line.Gases[:0]
	for _, g := range p.line.Gases {
		if p.worth(&g) {
			kept = append(kept, g)
		}
	}
	p.line.Gases = kept
	if len(kept) == 0 {
		p.line.Gases, p.line.List = nil, false
	}
}

// worth says that a gas is answered: it is one, or its bedside values mean
// something together, or the bot was meant and anything was read.
func (p *parser) worth(g *Gas) bool {
	s := &g.Sample
	said := !s.Values.Empty() || len(g.Questions) > 0
	switch {
	case s.Has(physio.PHq) && (p.h.Addressed || p.h.Earlier != nil || p.part(s) || coreDoubt(g.Questions)), s.Has(physio.PaCO2, physio.PaO2):
		return true
	case p.command():
		return false
	case p.h.Addressed && (coreDoubt(g.Questions) || p.h.Earlier != nil && g.UsualPaCO2 > 0):
		return true
	case p.h.Earlier != nil && p.h.Addressed:
		return said || g.Follow != FollowNone && (s.Blood != "" || s.Device != "" || s.Population != "" || s.Circumstance != 0) || s.Blood != "" && s.Blood != physio.NoBlood || s.Device != "" || g.Target != nil
	case p.h.Addressed:
		return said || g.Follow == FollowCorrection && s.Blood != "" || s.Device == physio.Air
	}
	return together(s) || p.pressuresOnly && (s.Has(physio.PaCO2) || s.Has(physio.PaO2))
}

// part says that another value of a gas stands beside the pH.
func (p *parser) part(s *physio.Sample) bool {
	return s.Has(physio.PaCO2) || s.Has(physio.PaO2) || s.Has(physio.HCO3) || s.Has(physio.BE)
}

// command says that the message is a command whose numbers are no values.
func (p *parser) command() bool {
	switch p.line.Intent {
	case IntentHouse, IntentForget, IntentHelp, IntentWhy, IntentBeds, IntentTrend, IntentRecord:
		return true
	case IntentAim, IntentSuppose:
		return !p.line.Target.Empty() || !p.line.Change.Empty()
	}
	return false
}

// coreDoubt says that a question about the gas itself is open, so that there
// was one.
func coreDoubt(qs []Question) bool {
	for _, q := range qs {
		switch q.Code {
		case AskPH, AskOrder, AskSwap, AskUnit, AskTwoNumbers, AskSecondGroup:
			return true
		}
	}
	return false
}

// together says that bedside values without a gas mean something together.
func together(s *physio.Sample) bool {
	oxygen := s.Has(physio.FiO2) || s.Has(physio.OxygenFlow) || s.Device != ""
	count := 0
	s.Each(func(q physio.Quantity, _ float64) {
		if q != physio.Age && q != physio.Height && q != physio.Weight && q != physio.Gestation && q != physio.OxygenFlow && q != physio.FiO2 {
			count++
		}
	})
	switch {
	case s.Has(physio.SpO2):
		return oxygen || count >= 2 || s.Circumstance&(physio.SmokeOrCO|physio.MetHbCause) != 0
	case s.Has(physio.EtCO2) && s.Circumstance&(physio.CPR|physio.PostArrest|physio.ECMO|physio.BrainInjury|physio.Shock) != 0:
		return true // what such a value means hangs on the circumstance
	case s.Has(physio.EtCO2), s.Has(physio.TcCO2), s.Has(physio.PaCO2), s.Has(physio.PaO2):
		return count >= 2 || oxygen
	case s.Has(physio.VT):
		return count >= 3 || count >= 2 && (s.Has(physio.RR) || s.Has(physio.RRSet) || s.Has(physio.Pplat))
	}
	return count >= 4
}
