package shorthand

import "testing"

// What stands behind the word house is a rule, never a gas, and no sentence
// that has to be read back.
var houseLines = []lineTest{
	{"", "house critical ph 7.2-7.6 paco2 70 pao2 45", ":house (critical ph 7.2-7.6 paco2 70 pao2 45)"},
	{"", "house: critical pH 7.2-7.6", ":house (critical ph 7.2-7.6)"},
	{"", "@galeward house critical co2 65", ":house (critical co2 65)"},
	{"", "house word npo2 means nasal cannula 2 L", ":house (word npo2 means nasal cannula 2 l)"},
	{"", "house target 88-92", ":house (target 88-92)"},
	{"", "house co2 target 45-55", ":house (co2 target 45-55)"},
	{"", "house order ph co2 o2", ":house (order ph co2 o2)"},
	{"", "house pressure 620", ":house (pressure 620)"},
	{"", "house zone Europe/London", ":house (zone europe/london)"},
	{"", "house shift 07:00 19:00", ":house (shift 07:00 19:00)"},
	{"", "house altitude 1,600 m", ":house (altitude 1,600 m)"},
	{"", "house restore 2", ":house (restore 2)"},
	// not meant for the bot: neither a rule nor a gas
	{"Q", "house critical ph 7.2-7.6 paco2 70 pao2 45", "silence"},
	{"Q", "house rules", ":house (rules)"},
	// a word of the story
	{"", "house fire 7.38/36/240/21 nrb", "ph=7.38 paco2=36 pao2=240 hco3=21 on:reservoir_mask said:smoke"},
	{"Q", "house fire, 7.38/36/240/21 nrb", "ph=7.38 paco2=36 pao2=240 hco3=21 on:reservoir_mask said:smoke"},
}

func TestHouseCommands(t *testing.T) {
	runLines(t, houseLines)
	for _, l := range houseLines {
		if Parse(l.text, l.habits()).Sentence {
			t.Errorf("%q was taken for a sentence", l.text)
		}
	}
}
