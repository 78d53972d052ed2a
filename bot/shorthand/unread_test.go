package shorthand

import "testing"

// Quantities that are not read here become no value of something else, and
// CO in per cent is carboxyhaemoglobin. Common practice.
var unreadLines = []lineTest{
	{"", "gbs vc 12ml/kg 7.36/46/80/25 ra", "ph=7.36 paco2=46 pao2=80 hco3=25 fio2=0.21 on:air !not_read:ph:vital capacity 12=12"},
	{"", "gbs vc 800ml 7.36/46/80/25 ra", "ph=7.36 paco2=46 pao2=80 hco3=25 fio2=0.21 on:air !not_read:ph:vital capacity 800=800"},
	{"", "FVC 900 7.36/46/80/25 ra", "ph=7.36 paco2=46 pao2=80 hco3=25 fio2=0.21 on:air !not_read:ph:vital capacity 900=900"},
	{"", "7.36/46/80/25 ra vc 1.2 L", "ph=7.36 paco2=46 pao2=80 hco3=25 fio2=0.21 on:air !not_read:ph:vital capacity 1.2=1.2"},
	{"", "myasthenia pt VC 900 ml 7.36/46/80/25 28%", "ph=7.36 paco2=46 pao2=80 hco3=25 fio2=0.28 said:retainer !not_read:ph:vital capacity 900=900"},
	{"", "7.36/46/80/25 40% vc 450 rr 14 peep 5", "ph=7.36 paco2=46 pao2=80 hco3=25 fio2=0.4 rr_set=14 vt=450 peep=5 on:ventilator mode:VC"},
	{"", "7.36/46/80/25 vc 450x14 40%", "ph=7.36 paco2=46 pao2=80 hco3=25 fio2=0.4 rr_set=14 vt=450 on:ventilator mode:VC"},
	{"", "7.30/60/60/29 fio2 50 vt 400 peep 10 dp 18", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.5 vt=400 peep=10 !not_read:ph:driving pressure 18=18"},
	{"", "vv ecmo flow 4.5 7.36/40/60 fio2 50", "ph=7.36 paco2=40 pao2=60 fio2=0.5 said:ecmo !not_read:ph:ECMO flow 4.5=4.5"},
	{"", "on ecmo 4.5 L/min sweep 3L 7.36/40/60 fio2 50", "ph=7.36 paco2=40 pao2=60 fio2=0.5 said:ecmo !not_read:ph:ECMO flow 4.5=4.5 !not_read:ph:sweep 3=3"},
	{"", "ecmo sweep 4 flow 4.2 7.36/40/60 fio2 50", "ph=7.36 paco2=40 pao2=60 fio2=0.5 said:ecmo !not_read:ph:ECMO flow 4.2=4.2 !not_read:ph:sweep 4=4"},
	// carbon monoxide
	{"", "7.30/50/62/24 ra carbon monoxide level 30", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 cohb=0.3 on:air"},
	{"", "7.30/50/62/24 ra co level 22", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 cohb=0.22 on:air"},
	{"", "7.30/50/62/24 ra co 25%", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 cohb=0.25 on:air"},
	{"", "7.30/50/62/24 ra co 25", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 cohb=0.25 on:air"},
	{"", "7.30/50/62/24 ra hbco 25", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 cohb=0.25 on:air"},
	{"", "7.30/50/62/24 ra fco 25", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 cohb=0.25 on:air"},
	{"", "7.30/50/62/24 ra co hb 25", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 cohb=0.25 on:air"},
	{"", "7.30/50/62/24 ra carboxy 25", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 cohb=0.25 on:air"},
	{"", "7.30/50/62/24 ra CO 6 L/min", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 co=6 on:air"},
	{"", "7.30/50/62/24 ra CO 5.2", "ph=7.3 paco2=50 pao2=62 hco3=24 fio2=0.21 co=5.2 on:air"},
	{"", "ph 7.30 co 50 po2 62 ra", "ph=7.3 pao2=62 fio2=0.21 on:air !not_read:ph:50=50"},
}

func TestUnread(t *testing.T) { runLines(t, unreadLines) }
