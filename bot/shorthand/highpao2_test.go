package shorthand

import "testing"

// A PaO2 of 33 or more beside a PaCO2 in kPa is above 250 mmHg if it is kPa
// too: that needs much oxygen (alveolar gas equation).
func TestPaO2BesideKPa(t *testing.T) {
	runLines(t, []lineTest{
		{"", "7.40/5.2/62/24", "ph=7.4 paco2=39 pao2=62 hco3=24 !mixed_units:paco2:5.2=39"},
		{"", "7.40/5.2/62/24 ra", "ph=7.4 paco2=39 pao2=62 hco3=24 fio2=0.21 on:air !mixed_units:paco2:5.2=39"},
		{"", "7.40/5.2/62/24 2L nc", "ph=7.4 paco2=39 pao2=62 hco3=24 flow=2 on:cannula !mixed_units:paco2:5.2=39"},
		{"", "7.40/5.2/62/24 100%", "ph=7.4 paco2=39 hco3=24 fio2=1 !read_kpa:paco2:5.2=39 ?pao2[62 mmHg|62 kPa]"},
		{"", "7.40/5.2/62/24 nrb 15L", "ph=7.4 paco2=39 hco3=24 flow=15 on:reservoir_mask !read_kpa:paco2:5.2=39 ?pao2[62 mmHg|62 kPa]"},
		{"", "7.40/5.2/62kpa/24 100%", "ph=7.4 paco2=39 pao2=465 hco3=24 fio2=1 !read_kpa:paco2:5.2=39 !read_kpa:pao2:62=465"},
		{"", "7.40/5.2/12/24 ra", "ph=7.4 paco2=39 pao2=90.01 hco3=24 fio2=0.21 on:air !read_kpa:paco2:5.2=39 !read_kpa:pao2:12=90.01"},
		{"K", "7.40/5.2/62/24", "ph=7.4 paco2=39 hco3=24 ?pao2[62 mmHg|62 kPa]"},
		{"K", "7.40/5.2/62/24 100%", "ph=7.4 paco2=39 pao2=465 hco3=24 fio2=1"},
		{"K", "7.40/5.2/62/24 ra", "ph=7.4 paco2=39 hco3=24 fio2=0.21 on:air ?pao2[6.2 kPa|62 mmHg]"},
	})
}
