package shorthand

import "testing"

// A gas typed with blanks whose pH lost its point, as phones make them: common
// practice of the keyboard. Three numbers alone could be anything.
var lostPointLines = []lineTest{
	{"", "728 58 62 27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 on:air !ph_decimal:ph:728=7.28"},
	{"Q", "740 40 95 24", "ph=7.4 paco2=40 pao2=95 hco3=24 !ph_decimal:ph:740=7.4"},
	{"Q", "room 740 has 95 chairs", "silence"},
	{"Q", "640 40 95 24", "silence"},
}

func TestLostPoint(t *testing.T) { runLines(t, lostPointLines) }
