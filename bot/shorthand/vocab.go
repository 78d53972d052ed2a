package shorthand

import (
	"strings"

	"galeward/physio"
)

// sense says what part a spelling plays in a line.
type sense uint8

const (
	senseNone    sense = iota
	senseLabel         // names a quantity; its number follows or stands before
	senseUnit          // a unit behind a number
	senseDevice        // a device or mode, with or without numbers
	senseAir           // room air
	senseSaid          // says something of sample, patient or circumstance
	senseBed           // a bed or case label follows
	senseSwallow       // names something that is not a value here; takes its numbers along
	senseTime          // a unit of time, or a weekday
	senseFiller        // may stand between a label and its number
	senseWord          // a plain word, known so that it is not taken for a name
	senseOver          // "over" between two numbers
	senseNumber        // a spoken number
	senseMean          // MAP: mean airway or mean arterial
	senseTcO           // tccO2: CO2 or O2
)

// entry is one row of the vocabulary. A spelling may set several things at
// once: a cord artery is a kind of blood and a site.
type entry struct {
	sense  sense
	q      physio.Quantity
	unit   string
	device physio.Device
	mode   physio.Mode
	blood  physio.Blood
	site   physio.Site
	pop    physio.Population
	sex    physio.Sex
	circ   physio.Circumstance
	number float64
	// weak spellings are labels only in front of a number: "f", "r", "t".
	weak bool
}

// row is one meaning with all its spellings, separated by commas.
type row struct {
	e         entry
	spellings string
}

// vocabulary maps each spelling, in lower case, to its meaning. phraseLength
// holds the greatest number of words of a phrase by its first word.
var vocabulary, phraseLength = buildVocabulary()

func buildVocabulary() (map[string]*entry, map[string]int) {
	const spellings, starts = 3000, 1800 // about as many as there are
	words, lengths := make(map[string]*entry, spellings), make(map[string]int, starts)
	for _, rows := range [][]row{valueRows, unitRows, deviceRows, saidRows, wordRows} {
		for i := range rows {
			for s := range strings.SplitSeq(rows[i].spellings, ",") {
				s = strings.TrimSpace(s)
				words[s] = &rows[i].e
				first, _, _ := strings.Cut(s, " ")
				lengths[first] = max(lengths[first], strings.Count(s, " ")+1)
			}
		}
	}
	return words, lengths
}

// compounds are spellings with a sign inside, matched before the lexer would
// cut them; the longest first.
var compounds = []struct{ typed, word string }{
	{"mmol/liter", "mmol/l"}, {"mmol/litre", "mmol/l"}, {"mmol/l", "mmol/l"}, {"meq/l", "mmol/l"},
	{"nmol/l", "nmol/l"}, {"litres/min", "l/min"}, {"liters/min", "l/min"}, {"lt/min", "l/min"},
	{"l/kg/min", "l/kg"}, {"l/min/kg", "l/kg"}, {"lpm/kg", "l/kg"}, {"l/kg", "l/kg"}, {"l/min", "l/min"}, {"l/m", "l/min"}, {"ml/kg", "ml/kg"}, {"cc/kg", "ml/kg"}, {"mg/dl", "mg/dl"},
	{"g/dl", "g/dl"}, {"gm/dl", "g/dl"}, {"g/l", "g/l"}, {"gr/dl", "g/dl"},
	{"p/f", "pf"}, {"s/f", "sf"}, {"a/a", "aa"}, {"a-a", "aa"}, {"vd/vt", "vdvt"}, {"i:e", "ie"},
	{"y/o", "yo"}, {"m/o", "month old"}, {"d/o", "day old"}, {"mth/o", "month old"}, {"n/c", "nc"}, {"r/a", "ra"}, {"v/q", "vq"}, {"f/vt", "rsbi"}, {"s/p", "post"},
	{"w/o", "without"}, {"w/", "with"}, {"r/o", "rule"}, {"h/o", "history"}, {"c/o", "complains"},
	{"t/c", "trach collar"}, {"t-piece", "tpiece"}, {"h+", "h+"}, {"x-ray", "xray"}, {"ac/vc", "ac"},
	{"a/c", "ac"}, {"vc/ac", "ac"}, {"vc+", "prvc"}, {"pc/ac", "pcv"}, {"ac/pc", "pcv"}, {"pc-ac", "pcv"}, {"c-pap", "cpap"}, {"bi-pap", "bipap"},
	{"f/b", "followed"}, {"post-op", "postop"}, {"p-high", "phigh"}, {"p-low", "plow"}, {"t-high", "thigh"}, {"t-low", "tlow"},
	{"ps/cpap", "psv"}, {"cpap/ps", "psv"}, {"a.b.g", "abg"}, {"s/t", "st"}, {"r.a.", "ra"}, {"n.c.", "nc"}, {"non-re", "nonre"},
}

func look(word string) *entry { return vocabulary[word] }
