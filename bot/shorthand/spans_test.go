package shorthand

import "testing"

// Days, weeks and months are an age only with a word of age or of a small
// child; beside an illness they tell how long it lasts. Common practice.
var spanLines = []lineTest{
	{"", "sob 3 days 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "copd 4 days worse 7.31/64/58/32 28%", "ph=7.31 paco2=64 pao2=58 hco3=32 fio2=0.28 said:copd"},
	{"", "covid 10 days 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "7.44/34/58/23 ra unwell 5 days", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "ventilated 14 days 7.44/34/58/23 40%", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.4 on:ventilator"},
	{"", "day 5 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "postpartum 2 days 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "5 days history sob 62M 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 age=62 on:air sex:m"},
	{"", "known lung ca 3 months 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "6 months pregnant 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air pop:pregnant"},
	{"", "2 weeks sob 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "unwell 24 weeks 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "copd 7.31/64/58/32 28% slower over 26 weeks", "ph=7.31 paco2=64 pao2=58 hco3=32 fio2=0.28 said:copd"},
	{"", "72 yo man covid 10 days 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 age=72 on:air sex:m"},
	{"", "copd home o2 6 months 7.31/64/58/32 28%", "ph=7.31 paco2=64 pao2=58 hco3=32 fio2=0.28 said:copd"},
	{"", "copd 15 years 7.31/64/58/32 28%", "ph=7.31 paco2=64 pao2=58 hco3=32 fio2=0.28 said:copd"},
	{"", "copd for 10 yrs 7.31/64/58/32 28%", "ph=7.31 paco2=64 pao2=58 hco3=32 fio2=0.28 said:copd"},
	{"", "smoker 40 years 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	// an age
	{"", "copd 62 years 7.31/64/58/32 28%", "ph=7.31 paco2=64 pao2=58 hco3=32 fio2=0.28 age=62 said:copd"},
	{"", "child asthma 5 years 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 age=5 on:air pop:child said:asthma"},
	{"", "5 years 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 age=5 on:air pop:child"},
	{"", "3 mo 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=0.25 on:air pop:child"},
	{"", "3 m/o 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=0.25 on:air pop:child"},
	{"", "rsv 3mo m 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=0.25 on:air sex:m pop:child"},
	{"", "bronchiolitis 4 months 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=0.3333 on:air pop:child"},
	{"", "baby 3 months 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=0.25 on:air pop:newborn"},
	{"", "wheezy 9 month old 7.28/58/62/27 ra", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.21 age=0.75 on:air pop:child"},
	{"", "8 wk old 7.28/58/62/27 28%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.28 age=0.1533 pop:child"},
	{"", "8 weeks 4.2kg bronchiolitis 7.28/58/62/27 28%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.28 age=0.1533 weight=4.2 pop:child"},
	{"", "child 7.44/34/58/23 ra croup 2 days", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air pop:child"},
	{"", "5 days 7.44/34/58/23 ra", "ph=7.44 paco2=34 pao2=58 hco3=23 fio2=0.21 on:air"},
	{"", "3do 7.30/50/55/24 25%", "ph=7.3 paco2=50 pao2=55 hco3=24 fio2=0.25 age=0.008214 pop:newborn"},
	{"", "3 d/o 7.30/50/55/24 25%", "ph=7.3 paco2=50 pao2=55 hco3=24 fio2=0.25 age=0.008214 pop:newborn"},
	{"", "26 weeker 7.30/50/55/24 25%", "ph=7.3 paco2=50 pao2=55 hco3=24 fio2=0.25 gestation=26 pop:preterm"},
}

func TestSpans(t *testing.T) { runLines(t, spanLines) }
