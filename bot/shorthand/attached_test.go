package shorthand

import "testing"

// Words that look like another thing's word. Common practice of charting: an
// overdose need not be an opioid, a stroke need not be the brain's, a bleed
// need not be oxygen's.
var attachedLines = []lineTest{
	{"", "aspirin od 7.30/20/100/10 ra", "ph=7.3 paco2=20 pao2=100 hco3=10 fio2=0.21 on:air"},
	{"", "paracetamol overdose 7.30/20/100/10 ra", "ph=7.3 paco2=20 pao2=100 hco3=10 fio2=0.21 on:air"},
	{"", "heroin overdose 7.18/80/55/29 ra", "ph=7.18 paco2=80 pao2=55 hco3=29 fio2=0.21 on:air said:sedation"},
	{"", "methadone od 7.18/80/55/29 ra", "ph=7.18 paco2=80 pao2=55 hco3=29 fio2=0.21 on:air said:sedation"},
	{"", "heat stroke 7.30/30/80/15 ra", "ph=7.3 paco2=30 pao2=80 hco3=15 fio2=0.21 on:air"},
	{"", "7.30/30/80/15 ra stroke volume 60", "ph=7.3 paco2=30 pao2=80 hco3=15 fio2=0.21 on:air"},
	{"", "stroke 7.30/30/80/15 ra", "ph=7.3 paco2=30 pao2=80 hco3=15 fio2=0.21 on:air said:brain"},
	{"", "gi bleed nrb 15L 7.30/30/80/15", "ph=7.3 paco2=30 pao2=80 hco3=15 flow=15 on:reservoir_mask"},
	{"", "bleed in brain 7.30/30/80/15 ra", "ph=7.3 paco2=30 pao2=80 hco3=15 fio2=0.21 on:air"},
	{"", "hfo 7.30/50/60 fio2 60", "ph=7.3 paco2=50 pao2=60 fio2=0.6 on:ventilator mode:HFOV"},
	{"", "oscillating 7.30/50/60 fio2 60", "ph=7.3 paco2=50 pao2=60 fio2=0.6 on:ventilator mode:HFOV"},
	{"", "spinal cord injury 7.40/40/90/24 ra", "ph=7.4 paco2=40 pao2=90 hco3=24 fio2=0.21 on:air"},
	// a Venturi valve is named by its percentage
	{"", "7.30/60/60/29 28 venti", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 on:venturi"},
	{"", "7.30 60 60 29 28 venti", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 on:venturi"},
	{"", "7.30/60/60/29 28 vm 4L", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 flow=4 on:venturi"},
	{"", "2L o2 7.30/60/60/29", "ph=7.3 paco2=60 pao2=60 hco3=29 flow=2 taken:cannula !cannula_taken:flow:2=2"},
	{"", "7.30/60/60/29 35 venturi", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.35 on:venturi"},
	{"", "7.30/60/60/29 venti 28", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 on:venturi"},
	{"", "7.30/60/60/29 28% venti", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 on:venturi"},
	// a range with a target word on either side is no value
	{"", "7.30/60/60/29 28% spo2 88-92 target", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 keep:0.88-0.92"},
	{"", "7.30/60/60/29 28% sats 90 88-92% goal", "ph=7.3 paco2=60 pao2=60 hco3=29 sao2=0.9 fio2=0.28 keep:0.88-0.92"},
	{"", "7.30/60/60/29 28% aim spo2 94-98", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 keep:0.94-0.98"},
	{"", "7.30/60/60/29 28% sats target 88-92", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 keep:0.88-0.92"},
	{"", "7.30/60/60/29 28% keep sats 92-96", "ph=7.3 paco2=60 pao2=60 hco3=29 fio2=0.28 keep:0.92-0.96"},
	{"", "7.30/60/60/29 28% target 88-92 spo2 91", "ph=7.3 paco2=60 pao2=60 hco3=29 spo2=0.91 fio2=0.28 keep:0.88-0.92"},
	{"", "7.30/60/60/29 28% spo2 90-92 target 88-92", "ph=7.3 paco2=60 pao2=60 hco3=29 spo2=0.9 fio2=0.28 keep:0.88-0.92 !range_low:spo2:90-92=0.9"},
}

func TestWordsAttached(t *testing.T) { runLines(t, attachedLines) }

// A question about dying asks for a prognosis; it claims nothing of the gas.
func TestDyingIsNoClaim(t *testing.T) {
	for _, text := range []string{"is he dying 7.20/80/40", "is this patient dying? 7.20/80/40", "are they going to die 7.20/80/40", "is she palliative 7.20/80/40"} {
		l := Parse(text, Habits{Addressed: true})
		if l.Intent == IntentCheck || len(l.Declined) != 1 || l.Declined[0] != DeclinedPrognosis {
			t.Errorf("%q: intent %q, declined %v", text, l.Intent, l.Declined)
		}
	}
}
