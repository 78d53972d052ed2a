package shorthand

import "testing"

// A unit that can not fit, and a base excess that tells nothing. Common
// practice.
var setAsideLines = []lineTest{
	{"", "7.30/70/62 kpa 28%", "ph=7.3 paco2=70 pao2=62 fio2=0.28 !read_mmhg:paco2:70=70"},
	{"", "pco2 70 po2 62 kpa ph 7.30 28%", "ph=7.3 paco2=70 pao2=62 fio2=0.28 !read_mmhg:paco2:70=70"},
	{"", "ph 7.30 pco2 70 kpa po2 62 kpa 28%", "ph=7.3 paco2=70 pao2=62 fio2=0.28 !read_mmhg:paco2:70=70"},
	{"", "7.30/9.3/8.2 kpa 28%", "ph=7.3 paco2=69.76 pao2=61.51 fio2=0.28 !read_kpa:paco2:9.3=69.76 !read_kpa:pao2:8.2=61.51"},
	{"", "cord arterial 6.85/105/10 BE -18", "ph=6.85 paco2=105 pao2=10 be=-18 blood:cord site:cord_artery"},
	{"", "cord 7.05/80/12 BE -12", "ph=7.05 paco2=80 pao2=12 be=-12 blood:cord"},
	{"", "cord venous 7.30/40/28 BE -4", "ph=7.3 paco2=40 pao2=28 be=-4 blood:cord site:cord_vein"},
	{"", "7.40/95/40 BE 0 28%", "ph=7.4 be=0 fio2=0.28 ?swap[swapped|as typed]"},
	{"", "7.05/100/60 BE -8 40%", "ph=7.05 paco2=100 pao2=60 be=-8 fio2=0.4"},
	{"K", "cord arterial 7.05/10.5/1.6 BE -10", "ph=7.05 paco2=78.76 pao2=12 be=-10 blood:cord site:cord_artery"},
}

func TestSetAside(t *testing.T) { runLines(t, setAsideLines) }
