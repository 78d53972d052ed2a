package shorthand

import (
	"strings"
)

// commandWords are the words that are commands when a message starts with
// them.
var commandWords = map[string]Intent{
	"now": IntentNow, "recheck": IntentNow, "aim": IntentAim, "suppose": IntentSuppose,
	"check": IntentCheck, "second": IntentCheck, "doublecheck": IntentCheck, "dblcheck": IntentCheck,
	"trend": IntentTrend, "course": IntentTrend, "series": IntentTrend,
	"beds": IntentBeds, "huddle": IntentBeds, "record": IntentRecord,
	"house": IntentHouse, "units": IntentHouse, "order": IntentHouse, "teach": IntentHouse,
	"why": IntentWhy, "workings": IntentWhy, "forget": IntentForget, "wipe": IntentForget, "erase": IntentForget,
	"help": IntentHelp,
}

// houseForms are the sentences that set a rule of the channel. Each gives the
// argument in one form, whatever was typed.
var houseForms = []struct {
	typed *sieve
	means string
	// plain forms are commands of their own; the others are sentences, which
	// are read back before anything changes.
	plain bool
}{
	{sift(`^set\s+(?:the\s+|our\s+|channel\s+)?(.+)$`), "$1", true},
	{sift(`^(?:our|the|my)\s+(?:value\s+)?order\s+(?:is|here is|will be)[:\s]+(.+)$`), "order $1", false},
	{sift(`^we\s+(?:type|use|read|give|write|report)\s+((?:ph|pao2|po2|o2|paco2|pco2|co2)\b.+)$`), "order $1", false},
	{sift(`^(?:our|the)\s+units?\s+(?:is|are)\s+(.+)$`), "units $1", false},
	{sift(`^we\s+(?:use|work in|report in|are in|type in|read in)\s+(kpa|mmhg|mm hg|torr)\b.*$`), "units $1", false},
	{sift(`^(?:we are|we're|were|we sit|this unit is|our hospital is|hospital is|this hospital is|i am|our unit is)\s+(?:at|up at)\s+(?:an altitude of |an elevation of |about )?([\d., ]+)\s*(m|metres|meters|ft|feet)\b.*$`), "altitude $1 $2", false},
	{sift(`^(?:our|the)\s+(?:altitude|elevation)\s+(?:is|here is)\s+(.+)$`), "altitude $1", false},
	{sift(`^(?:altitude|elevation)\s+([\d., ]+\s*(?:m|metres|meters|ft|feet)?)$`), "altitude $1", false},
	{sift(`^(?:our|the)\s+(?:barometric pressure|pb|barometer)\s+(?:is|here is)\s+(.+)$`), "pressure $1", false},
	{sift(`^when\s+(?:we|i|people here|they)\s+(?:say|type|write)\s+['"]?(.+?)['"]?,?\s+(?:we|i|it|they)\s+means?\s+['"]?(.+?)['"]?[.!]?$`), "word $1 = $2", false},
	{sift(`^teach\s+(.+)$`), "word $1", true},
	{sift(`^['"]?([a-z][a-z0-9 ]{0,20}?)['"]?\s+(?:means|stands for|is short for)\s+['"]?([a-z0-9 ]{2,30}?)['"]?(?:\s+here|\s+in this channel)?$`), "word $1 = $2", false},
	{sift(`^(?:our|the)\s+(?:sat(?:uration)?|spo2|o2)?\s*targets?\s+(?:is|are)\s+(.+)$`), "target $1", false},
	{sift(`^units\s+(.+)$`), "units $1", true},
	{sift(`^order\s+((?:is\s+)?(?:ph|pao2|po2|o2|paco2|pco2|co2)\b.+)$`), "order $1", true},
}

// houseRule gives the argument of a sentence that sets a rule of the channel.
func houseRule(s string, g *grams) (argument string, sentence, ok bool) {
	joined := ""
	for _, f := range houseForms {
		if !f.typed.may(g) {
			continue
		}
		if joined == "" {
			joined = strings.Join(strings.Fields(strings.TrimRight(s, " .!?")), " ")
		}
		if m := f.typed.compiled().FindStringSubmatchIndex(joined); m != nil && len(joined) <= 300 {
			arg := string(f.typed.compiled().ExpandString(nil, f.means, joined, m))
			return clean(strings.Replace(arg, "order is ", "order ", 1)), !f.plain, true
		}
	}
	return "", false, false
}

// clean keeps letters, digits and the signs that a rule needs, in lower case
// and on one line. What it gives can be shown anywhere.
func clean(s string) string {
	const longest = 160
	var b strings.Builder
	for _, c := range []byte(strings.ToLower(s)) {
		switch {
		case isLetter(c), isDigit(c), strings.IndexByte(" .,:;/%+-='()", c) >= 0:
			b.WriteByte(c)
		default:
			b.WriteByte(' ')
		}
		if b.Len() >= longest {
			break
		}
	}
	return strings.Trim(strings.Join(strings.Fields(b.String()), " "), " ,;:")
}

// lead gives the length of the bot's own name and a greeting's signs at the
// front of a message.
func lead(s string) int {
	i := leadSigns(s, 0)
	return leadSigns(s, i+leadName(s[i:]))
}

func leadSigns(s string, i int) int {
	for i < len(s) && strings.IndexByte(" \t\n\f\r:,;>*_~\"'(.!-", s[i]) >= 0 {
		i++
	}
	return i
}

// leadName gives the length of a name at the front: the bot's own, the
// command, or a mention.
func leadName(s string) int {
	name := strings.TrimPrefix(s, "@")
	for _, n := range []string{"galeward", "/gas"} {
		after, ok := strings.CutPrefix(name, n)
		if ok && (after == "" || !wordByte(after[0])) && (n[0] != '/' || len(name) == len(s)) {
			return len(s) - len(after)
		}
	}
	if len(s) < 2 || s[0] != '@' || s[1] < 'a' || s[1] > 'z' {
		return 0
	}
	n := 2
	for n < len(s) && (wordByte(s[n]) || s[n] == '.' || s[n] == '-') {
		n++
	}
	return n
}

func wordByte(c byte) bool { return isLetter(c) || isDigit(c) || c == '_' }

// command finds the command word at the head of a message, and what follows.
func command(s string) (Intent, string) {
	s = s[lead(s):]
	word, rest := s, ""
	if i := strings.IndexFunc(s, func(r rune) bool { return !(r >= 'a' && r <= 'z') }); i >= 0 {
		word, rest = s[:i], s[i:]
	}
	if word == "double" && strings.HasPrefix(strings.TrimLeft(rest, " -"), "check") {
		return IntentCheck, strings.TrimPrefix(strings.TrimLeft(rest, " -"), "check")
	}
	if word == "" && strings.HasPrefix(rest, "?") && strings.Trim(rest, "? ") == "" {
		return IntentHelp, ""
	}
	if strings.HasPrefix(rest, "'") || strings.HasPrefix(rest, "-") && word != "check" {
		return IntentNone, s
	}
	if word == "second" && countsGas().MatchString(rest) {
		return IntentNone, s
	}
	if intent, ok := commandWords[word]; ok {
		return intent, strings.TrimLeft(rest, " :,-?!.\t")
	}
	return IntentNone, s
}

// countsGas says that "second" counts: "second gas 7.30/...".
var countsGas = lazily(`^\s*(gas|abg|vbg|cbg|sample|set|one|stick|draw|of|day|unit)\b`)

// loose says that a command may be taken from a message that was not meant for
// the bot in so many words: the bare command, or one with a bed label.
func loose(intent Intent, rest string) bool {
	rest = strings.Trim(rest, " ?.!\n")
	if rest == "" {
		return intent != IntentNow && intent != IntentCheck && intent != IntentHelp
	}
	switch intent {
	case IntentTrend, IntentRecord, IntentForget:
		return bedOnly().MatchString(rest)
	case IntentBeds:
		return rest == "list" || rest == "list please" || rest == "please"
	case IntentHouse:
		return rest == "rules"
	}
	return false
}

var bedOnly = lazily(`^(?:bed|b|room|rm|bay|case)?\s*#?\d{1,4}[a-z]?$`)
