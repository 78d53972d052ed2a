package shorthand

import "testing"

// The rungs of the ladder for the values of a gas: examples of our own beside
// those of testdata/messages. What each line must be read as is common practice.
var ladder = []lineTest{
	// pH: one reading is said, several are asked with the fitting value
	{"", "731/49/71/24 35%", "ph=7.31 paco2=49 pao2=71 hco3=24 fio2=0.35 !ph_decimal:ph:731=7.31"},
	{"", "7280/58/62/27", "ph=7.28 paco2=58 pao2=62 hco3=27 !ph_decimal:ph:7280=7.28"},
	{"", "72.8/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 !ph_decimal:ph:72.8=7.28"},
	{"", "7:28/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4"},
	{"", "74/39/88/24 ra", "paco2=39 pao2=88 hco3=24 fio2=0.21 on:air ?ph[pH 7.40]"},
	{"", "7/55/60/26 40%", "paco2=55 pao2=60 hco3=26 fio2=0.4 ?ph[pH 7.29]"},
	{"", "3.72/45/80/25 ra", "paco2=45 pao2=80 hco3=25 fio2=0.21 on:air ?ph[pH 7.32]"},
	{"", "7.93/58/62/27", "paco2=58 pao2=62 hco3=27 ?ph[pH 7.28]"},
	{"", "6.4/20/90/5 ra", "paco2=20 pao2=90 hco3=5 fio2=0.21 on:air ?ph[pH 7.01]"},
	{"", "7.82/58/62/27 40%", "paco2=58 pao2=62 hco3=27 fio2=0.4 ?ph[pH 7.28|pH 7.82]"},
	{"", "H+ 45 pco2 6.2kpa po2 9kpa", "ph=7.347 paco2=46.5 pao2=67.51 !hydrogen:ph:45=7.347 !read_kpa:paco2:6.2=46.5 !read_kpa:pao2:9=67.51"},
	{"", "h+ 400 pco2 50", "paco2=50 ?ph[]"},
	// order and swaps
	{"", "7.33/92/48/25 40%", "ph=7.33 hco3=25 fio2=0.4 ?swap[swapped|as typed]"},
	{"", "7.41/88/41 ra", "ph=7.41 fio2=0.21 on:air ?swap[swapped|as typed]"},
	{"", "7.41/88/41", "ph=7.41 ?swap[swapped|as typed]"},
	{"", "7.30/27/64/56 40%", "ph=7.3 pao2=64 fio2=0.4 ?swap[swapped|as typed]"},
	{"", "7.30/56/27/64 40%", "ph=7.3 paco2=56 fio2=0.4 ?swap[swapped|as typed]"},
	{"", "7.28/62/58/27 40%", "ph=7.28 paco2=62 pao2=58 hco3=27 fio2=0.4"},
	{"K", "7.40/11.5/5.4/24 28%", "ph=7.4 hco3=24 fio2=0.28 ?swap[swapped|as typed]"},
	// units
	{"", "7.31/7.4/9.1/27 35%", "ph=7.31 paco2=55.5 pao2=68.26 hco3=27 fio2=0.35 !read_kpa:paco2:7.4=55.5 !read_kpa:pao2:9.1=68.26"},
	{"", "7.31/7.4/9.1 35%", "ph=7.31 paco2=55.5 pao2=68.26 fio2=0.35 !read_kpa:paco2:7.4=55.5 !read_kpa:pao2:9.1=68.26"},
	{"", "7.12/11/13 50%", "ph=7.12 fio2=0.5 ?pressure_unit[kPa|mmHg]"},
	{"", "7.12/11/13/26 50%", "ph=7.12 paco2=82.51 pao2=97.51 hco3=26 fio2=0.5 !read_kpa:paco2:11=82.51 !read_kpa:pao2:13=97.51"},
	{"K", "7.12/11/13 50%", "ph=7.12 paco2=82.51 pao2=97.51 fio2=0.5"},
	{"K", "7.31/56/68/27 35%", "ph=7.31 paco2=56 pao2=68 hco3=27 fio2=0.35 !read_mmhg:paco2:56=56 !read_mmhg:pao2:68=68"},
	{"", "7.31/7.4kPa/68/27 35%", "ph=7.31 paco2=55.5 pao2=68 hco3=27 fio2=0.35 !mixed_units:paco2:7.4=55.5"},
	{"", "7.31/55 torr/68 torr/27 35%", "ph=7.31 paco2=55 pao2=68 hco3=27 fio2=0.35"},
	{"", "7.31/7.4/68/27 35%", "ph=7.31 paco2=55.5 pao2=68 hco3=27 fio2=0.35 !mixed_units:paco2:7.4=55.5"},
	{"", "7.31/55/9.1/27 35%", "ph=7.31 paco2=55 hco3=27 fio2=0.35 ?pao2[91 mmHg|9.1 kPa]"},
	{"K", "7.31/7.4/68/27 35%", "ph=7.31 paco2=55.5 hco3=27 fio2=0.35 ?pao2[6.8 kPa|68 mmHg]"},
	// impossible numbers
	{"", "7.31/550/68/27", "ph=7.31 pao2=68 hco3=27 ?paco2[55 mmHg]"},
	{"", "7.31/55/680/27 40%", "ph=7.31 paco2=55 pao2=680 hco3=27 fio2=0.4 ?pao2_ceiling[68 mmHg|more oxygen|680 mmHg]"},
	{"", "7.31/55/68/270 40%", "ph=7.31 paco2=55 pao2=68 fio2=0.4 ?hco3[HCO3 27]"},
	{"", "7.31/55/68/27 be 200", "ph=7.31 paco2=55 pao2=68 hco3=27 ?be[BE +20]"},
	{"", "7.31/>150/68/27", "ph=7.31 pao2=68 hco3=27 ?over_range[use 150|leave out]"},
	{"", "7.31/55/<20/27", "ph=7.31 paco2=55 hco3=27 ?under_range[venous|sample fault]"},
	{"", "7.36/40/150/22 ra", "ph=7.36 paco2=40 pao2=150 hco3=22 fio2=0.21 on:air ?pao2_ceiling[more oxygen|150 mmHg]"},
	{"", "7.36/40/450/22 40%", "ph=7.36 paco2=40 pao2=450 hco3=22 fio2=0.4 ?pao2_ceiling[45 mmHg|more oxygen|450 mmHg]"},
	// the check digit
	{"", "7.31/55/68/27 40%", "ph=7.31 paco2=55 pao2=68 hco3=27 fio2=0.4"},
	{"", "7.31/55/68/30 40%", "ph=7.31 paco2=55 pao2=68 hco3=30 fio2=0.4 !hco3_off:hco3:30=27.3"},
	{"", "7.31/55/68/34 40%", "ph=7.31 hco3=34 fio2=0.4 ?swap[swapped|as typed]"},
	{"", "7.31/55/68/-2 40%", "ph=7.31 paco2=55 pao2=68 be=-2 fio2=0.4 !be_for_hco3:be:-2=-2"},
	{"", "7.31/55/68/1 40%", "ph=7.31 paco2=55 pao2=68 fio2=0.4 ?be_for_hco3[BE +1|HCO3 1]"},
	{"", "7.31/55/68/27/1/90 40%", "ph=7.31 paco2=55 pao2=68 hco3=27 be=1 sao2=0.9 fio2=0.4 !be_place:be:1=1"},
	{"", "7.31/55/68/0/27/90 40%", "ph=7.31 paco2=55 pao2=68 hco3=27 be=0 sao2=0.9 fio2=0.4 !be_place:be:0=0"},
	{"", "7.31/55/68/27 BE -14", "ph=7.31 paco2=55 pao2=68 hco3=27 be=-14 ?be_fit[BE +1|BE -14]"},
	{"", "7.31/55/68 BE 0 40%", "ph=7.31 paco2=55 pao2=68 be=0 fio2=0.4"},
	{"", "7.20/40/95/15 BD 11 ra", "ph=7.2 paco2=40 pao2=95 hco3=15 be=-11 fio2=0.21 on:air"},
	{"", "7.20/40/95/15 base deficit -11 ra", "ph=7.2 paco2=40 pao2=95 hco3=15 be=-11 fio2=0.21 on:air !sign:be:-11=-11"},
	{"", "7.31/55/68 sbc 25 40%", "ph=7.31 paco2=55 pao2=68 std_hco3=25 fio2=0.4 !standard_hco3:std_hco3:=25"},
	{"", "7.31/55/68 tco2 29 40%", "ph=7.31 paco2=55 pao2=68 total_co2=29 fio2=0.4"},
	// the saturation and the percentages
	{"", "7.31/55/62/27 89% 40%", "ph=7.31 paco2=55 pao2=62 hco3=27 sao2=0.89 fio2=0.4 !bare_sat:sao2:89%=0.89"},
	{"", "7.31/55/62/27/89 40%", "ph=7.31 paco2=55 pao2=62 hco3=27 sao2=0.89 fio2=0.4"},
	{"", "7.31/55/62/27 93% ra", "ph=7.31 paco2=55 pao2=62 hco3=27 sao2=0.93 fio2=0.21 on:air !bare_sat:sao2:93%=0.93"},
	{"", "7.40/40/95/24 97%", "ph=7.4 paco2=40 pao2=95 hco3=24 sao2=0.97 !bare_sat:sao2:97%=0.97"},
	{"", "7.35/50/61/27 90%", "ph=7.35 paco2=50 pao2=61 hco3=27 ?percent_role[FiO2|saturation]"},
	{"", "7.31/55/90%/27 40%", "ph=7.31 paco2=55 hco3=27 sao2=0.9 fio2=0.4 !sat_for_pao2:sao2:90%=0.9"},
	{"", "7.31/55/62/27/45", "ph=7.31 paco2=55 pao2=62 hco3=27 ?fifth[FiO2|saturation]"},
	{"", "7.31/55/62/27/0.4", "ph=7.31 paco2=55 pao2=62 hco3=27 ?fifth[FiO2|BE]"},
	{"", "7.40/40/94/24 sat 79 ra", "ph=7.4 paco2=40 pao2=94 hco3=24 sao2=0.79 fio2=0.21 on:air ?sat_fit[exchanged|sat is off|PaO2 is off]"},
	{"", "7.30/52/36/25 sat 66 spo2 96", "ph=7.3 paco2=52 pao2=36 hco3=25 sao2=0.66 spo2=0.96 ?venous[arterial|venous]"},
	// a label outside the chain
	{"", "7.31/55/68/27 co2 60", "ph=7.31 pao2=68 hco3=27 ?twice[55 mmHg|60 mmHg]"},
	{"", "7.31/55/68/27 bicarb 27", "ph=7.31 paco2=55 pao2=68 hco3=27"},
	{"", "7.31/co2 55/o2 68/27", "ph=7.31 paco2=55 pao2=68 hco3=27"},
	{"", "co2 55 7.31/68/27", "ph=7.31 paco2=55 pao2=68 hco3=27"},
	{"", "7.31/55 po2 68 hco3 27", "ph=7.31 paco2=55 pao2=68 hco3=27"},
	{"", "7.31/55.2/68.4/26.9/0.3/91.2% 35%", "ph=7.31 paco2=55.2 pao2=68.4 hco3=26.9 be=0.3 sao2=0.912 fio2=0.35 !be_place:be:0.3=0.3"},
}

func TestLadder(t *testing.T) { runLines(t, ladder) }
