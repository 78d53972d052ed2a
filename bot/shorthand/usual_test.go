package shorthand

import "testing"

// A patient's usual PaCO2 is no PaCO2 of today, however it is said. Common
// practice of charting a chronic retainer.
var usualLines = []lineTest{
	{"", "7.32/62/58/31 2L nc usual co2 60", "ph=7.32 paco2=62 pao2=58 hco3=31 flow=2 on:cannula usual:60"},
	{"", "7.30/66/58/32 28% baseline pco2 57", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 usual:57"},
	{"", "normally 52, today 7.30/66/58/32 28%", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 at:today usual:52"},
	{"", "known paco2 61 copd 7.30/66/58/32 28%", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 said:copd usual:61"},
	{"", "7.30/66/58/32 28% her usual co2 is around 56", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 sex:f usual:56"},
	{"", "7.30/66/58/32 28% co2 normally 54", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 usual:54"},
	{"", "7.30/66/58/32 28% runs a co2 of 58", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 usual:58"},
	{"", "7.30/66/58/32 28% co2 of 58 at baseline", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 usual:58"},
	{"", "ph 7.30 co2 66 o2 58 28%, usual co2 57", "ph=7.3 paco2=66 pao2=58 fio2=0.28 usual:57"},
	{"", "7.30/66/58/32 28% normal for him 55", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 usual:55"},
	{"", "7.30/66/58/32 28% baseline co2 7.6 kPa", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 usual:57"},
	{"K", "7.30/8.8/7.7/32 28% usual co2 7.6", "ph=7.3 paco2=66.01 pao2=57.75 hco3=32 fio2=0.28 usual:57"},
	{"T", "usual co2 60", "follow:2 usual:60"},
	{"", "7.30/66/58/32 28% co2 55 is his baseline", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 sex:m usual:55"},
	{"", "co2 66 (usual 58) spo2 88", "paco2=66 spo2=0.88 usual:58"},
	{"", "normally on 2L, now 28% venti 7.30/66/58/32", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 on:venturi"},
	// other usual values are not of today either, and other words stay
	{"", "7.30/66/58/32 28% baseline sats 88-90", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28"},
	{"", "7.30/66/58/32 baseline bicarb 30 28%", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28"},
	{"", "7.30/66/58/32 normally on 2L", "ph=7.3 paco2=66 pao2=58 hco3=32 flow=2 taken:cannula !cannula_taken:flow:2=2"},
	{"", "known copd 7.30/66/58/32 28%", "ph=7.3 paco2=66 pao2=58 hco3=32 fio2=0.28 said:copd"},
	{"", "baseline 7.36/55/60/30 ra", "ph=7.36 paco2=55 pao2=60 hco3=30 fio2=0.21 on:air"},
}

func TestUsualPaCO2(t *testing.T) { runLines(t, usualLines) }
