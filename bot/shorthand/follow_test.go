package shorthand

import "testing"

// Lines in a thread that holds a gas already.
var followLines = []lineTest{
	// later states, additions and corrections, with an earlier gas in the thread
	{"T", "now 7.34/50/72 same settings", ":now ph=7.34 paco2=50 pao2=72 follow:1"},
	{"T", "recheck 7.34/50/72/27 35%", ":now ph=7.34 paco2=50 pao2=72 hco3=27 fio2=0.35 follow:1"},
	{"T", "1 hr later 7.34/50/72/27 35%", "ph=7.34 paco2=50 pao2=72 hco3=27 fio2=0.35 follow:1"},
	{"T", "repeat gas 7.34/50/72/27", "ph=7.34 paco2=50 pao2=72 hco3=27 follow:1"},
	{"T", "co2 down to 50, o2 72", "paco2=50 pao2=72 follow:1"},
	{"T", "same but rr 26", "rr=26 follow:1"},
	{"T", "after peep 10: po2 84", "pao2=84 peep=10 follow:1"},
	{"T", "weaned to 30%, sat 95", "spo2=0.95 fio2=0.3 follow:1"},
	{"T", "up to 60 on the o2, sat 93", "spo2=0.93 follow:1 ?flow_or_fio2[60 %|60 L/min]"},
	{"T", "on 50% now po2 75", "pao2=75 fio2=0.5 follow:1"},
	{"T", "extubated. 7.38/44/71/25 4L", "ph=7.38 paco2=44 pao2=71 hco3=25 flow=4 taken:cannula follow:1 !cannula_taken:flow:4=4"},
	{"T", "45%", "fio2=0.45 follow:2"},
	{"T", "ra", "fio2=0.21 on:air follow:2"},
	{"T", "2L NC", "flow=2 on:cannula follow:2"},
	{"T", "venous", "blood:venous follow:2"},
	{"T", "hb 9", "hb=9 follow:2"},
	{"T", "rr 26", "rr=26 follow:2"},
	{"T", `male 5'9"`, "height=175.3 sex:m follow:2"},
	{"T", "sorry co2 is 48", "paco2=48 follow:3"},
	{"T", "sorry, co2 is 48 not 55", "paco2=48 follow:3"},
	{"T", "oops ph 7.33", "ph=7.33 follow:3"},
	{"T", "oops 7.33 not 7.31", "ph=7.33 follow:3"},
	{"T", "fio2 was 50 not 35", "fio2=0.5 follow:3"},
	{"T", "i meant 50% not 35", "fio2=0.5 follow:3"},
	{"T", "it was venous sorry", "blood:venous follow:3"},
	{"T", "typo hco3 should be 29", "hco3=29 follow:3"},
	{"T", "thanks", "unclear"},
}

func TestFollow(t *testing.T) { runLines(t, followLines) }
