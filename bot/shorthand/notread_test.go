package shorthand

import "testing"

// A number beside a gas is read, asked about, or said not to be read; what a
// word owns that is no value here is left alone.
func TestNotRead(t *testing.T) {
	runLines(t, []lineTest{
		{"", "7.28/58/62/27 40% rr 24 - 28 after", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 rr=24 !not_read:ph:28=28"},
		{"", "7.28/58/62/27 40% 18", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 !not_read:ph:18=18"},
		{"", "7.28/58/62/27 40% spo2 91 93", "ph=7.28 paco2=58 pao2=62 hco3=27 spo2=0.91 fio2=0.4 !not_read:ph:93=93"},
		{"", "12/7.28/58/62/27 40%", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 !not_read:ph:12=12"},
		{"", "7.28/58/62/27 40% peep 5 or 8", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 !not_read:peep:5=5 !not_read:peep:8=8"},
		{"", "male 30 7.40/40/95/24 ra", "ph=7.4 paco2=40 pao2=95 hco3=24 fio2=0.21 on:air sex:m !not_read:ph:30=30"},
		{"", "7.28/58/62/27 40% 12/3", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4"},
		{"", "7.28/58/62/27 40% 1430 bed 4", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 bed:4 at:14:30"},
		{"", "7.28/58/62/27 40% ett 7.5 @22", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4"},
		{"", "7.28/58/62/27 40% 8.0 ett 23 at lip", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4"},
		{"", "7.28/58/62/27 40% gcs 10 rass -2 hr 110 bp 120/70", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4"},
		{"", "7.28/58/62/27 40% propofol 20 levo 5 mcg", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 said:sedation"},
		{"", "7.28/58/62/27 40% after 2 nebs", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4"},
		{"", "7.28/58/62/27 40% day 3", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4"},
		{"", "7.28/58/62/27 40% room 12 x2", "ph=7.28 paco2=58 pao2=62 hco3=27 fio2=0.4 bed:12"},
	})
}

// Of the collection, less than one line in a hundred has such a note.
func TestNotReadIsRare(t *testing.T) {
	notes, all := 0, readMessages(t)
	for _, m := range all {
		h := habitsOf(m.Profile)
		h.Addressed = m.Kind != "noise"
		line := Parse(m.Text, h)
		for _, g := range line.Gases {
			for _, n := range g.Notes {
				if n.Code == NoteNotRead {
					notes++
					t.Logf("%s %q: %s is not read", m.ID, m.Text, n.Typed)
				}
			}
		}
	}
	if notes*100 >= len(all) {
		t.Errorf("%d notes in %d messages", notes, len(all))
	}
}
