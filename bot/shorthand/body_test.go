package shorthand

import "testing"

// Ages, heights, altitudes and flows for each kg, as they are typed at the
// bedside. Common practice; high flow of 2 L/kg/min is the usual setting of
// infants (PARIS trial, Franklin 2018).
var bodyLines = []lineTest{
	{"", "45 y 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=45 on:air"},
	{"", "67 y/o female 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=67 on:air sex:f"},
	{"", "7.28/58/62/27 ra 71 year", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=71 on:air"},
	{"", "7.28/58/62/27 ra 58-year-old", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=58 on:air"},
	{"", "3 mo 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=0.25 on:air pop:child"},
	{"", "7.28/58/62/27 ra, 92 y", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=90 on:air !age_90:age:=90"},
	{"", "7.28/58/62/27 45 y male 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 age=45 sex:m"},
	{"", "7.42/36/62/23 ra 2400 m", "ph=7.42 paco2=36 pao2=62 hco3=23 fio2=0.21 altitude=2400 on:air"},
	{"", "7.42/36/62/23 ra at 2200 m.", "ph=7.42 paco2=36 pao2=62 hco3=23 fio2=0.21 altitude=2200 on:air"},
	{"", "7.42/36/72/23 ra 900 metres", "ph=7.42 paco2=36 pao2=72 hco3=23 fio2=0.21 altitude=900 on:air"},
	{"", "7.42/36/62/23 ra 7000 ft", "ph=7.42 paco2=36 pao2=62 hco3=23 fio2=0.21 altitude=2134 on:air"},
	{"", "7.42/36/82/23 ra 72 m", "ph=7.42 paco2=36 pao2=82 hco3=23 fio2=0.21 age=72 on:air sex:m"},
	{"", "vt 450 m rr 18 plat 24 peep 8", "rr=18 vt=450 peep=8 pplat=24 sex:m"},
	{"", "vt 400 rr 20 plat 25 peep 8 male 180", "rr=20 vt=400 peep=8 pplat=25 height=180 sex:m !bare_height:height:180=180"},
	{"", "vt 400 rr 20 plat 25 peep 8 f 165", "rr=20 vt=400 peep=8 pplat=25 height=165 sex:f !bare_height:height:165=165"},
	{"", "female 158 vt 400 rr 20 plat 25 peep 8", "rr=20 vt=400 peep=8 pplat=25 height=158 sex:f !bare_height:height:158=158"},
	{"", "vt 400 rr 20 plat 25 peep 8 180 cm m", "rr=20 vt=400 peep=8 pplat=25 height=180 sex:m"},
	{"", "f 24 7.28/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 rr=24"},
	{"", "hfnc 2 l/kg/min 40% spo2 94 7 kg", "spo2=0.94 fio2=0.4 flow=14 weight=7 on:high_flow !flow_per_kg:flow:2=14"},
	{"", "hfnc 1.5L/kg 35% spo2 93 wt 4", "spo2=0.93 fio2=0.35 flow=6 weight=4 on:high_flow !flow_per_kg:flow:1.5=6"},
	{"", "hfnc 2 L/kg 40% 7.35/45/70/24", "ph=7.35 paco2=45 pao2=70 hco3=24 fio2=0.4 on:high_flow ?flow_per_kg[]"},
	{"", "7.28/58/62/27 170 m", "ph=7.28 paco2=58 pao2=62 hco3=27 height=170 sex:m !bare_height:height:170=170"},
	{"", "72 male 7.28/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 age=72 sex:m"},
	{"", "7.28/58/62/27 64 m", "ph=7.28 paco2=58 pao2=62 hco3=27 age=64 sex:m"},
	{"", "7.28/58/62/27 72 female 2L", "ph=7.28 paco2=58 pao2=62 hco3=27 flow=2 age=72 taken:cannula sex:f !cannula_taken:flow:2=2"},
	{"", "7.28/58/62/27 nc 4 male", "ph=7.28 paco2=58 pao2=62 hco3=27 flow=4 on:cannula sex:m"},
	{"", "f 60 kg vt 400 rr 18 plat 22 peep 5", "rr=18 vt=400 peep=5 pplat=22 weight=60 sex:f"},
	// bilevel pressures the wrong way round, values that a circumstance makes
	{"", "ipap 6 epap 10 7.28/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 on:bilevel ?ipap_below_epap[IPAP 10/EPAP 6|as typed]"},
	{"", "ipap 16 epap 6 7.28/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 ipap=16 epap=6 on:bilevel"},
	{"Q", "etco2 15 cpr", "etco2=15 said:cpr"},
	{"Q", "rosc, etco2 38", "etco2=38 said:post_arrest"},
	{"Q", "smoke inhalation sat 99", "spo2=0.99 said:smoke"},
	{"Q", "etco2 cable for bed 4", "silence"},
	{"", "PCO2 55", "paco2=55"},
	{"", "pao2 60", "pao2=60"},
	{"K", "pco2 7.3", "paco2=54.75"},
	{"Q", "PCO2 55", "paco2=55"},
	{"Q", "pao2 60 mmHg", "pao2=60"},
	{"Q", "co2 55 in the tank", "silence"},
	{"Q", "pco2 cable 2", "silence"},
}

func TestBody(t *testing.T) { runLines(t, bodyLines) }
