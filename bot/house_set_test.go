package bot_test

import (
	"strings"
	"testing"
)

// Each row types lines in a fresh channel and looks at the last answer.
var houseSettings = []struct {
	name  string
	lines []string
	want  []string // all of these
	not   []string // none of these
}{
	{"one part of the critical limits", []string{"house critical ph 7.15"},
		[]string{"Stored as revision 1", "pH below 7.15 or above 7.60, PaCO2 above 70 mmHg, PaO2 below 45 mmHg."}, nil},
	{"critical limits are no gas", []string{"house critical ph 7.2-7.6 paco2 65 pao2 45"},
		[]string{"Stored as revision 1", "PaCO2 above 65 mmHg"}, []string{"Read:"}},
	{"what is not said keeps what stands", []string{"house critical paco2 65", "house critical ph 7.1"},
		[]string{"pH below 7.10 or above 7.60, PaCO2 above 65 mmHg, PaO2 below 45 mmHg."}, nil},
	{"sides and units", []string{"house critical ph below 7.1 above 7.65, pao2 6 kPa"},
		[]string{"pH below 7.10 or above 7.65, PaCO2 above 70 mmHg, PaO2 below 45 mmHg."}, nil},
	{"a channel in kPa", []string{"house units kPa", "house critical paco2 9"},
		[]string{"PaCO2 above 67.5 mmHg (9 kPa), PaO2 below 45 mmHg (6 kPa)."}, nil},
	{"a newborn's defaults", []string{"house population newborn", "house"},
		[]string{"Critical limits (default): pH below 7.20 or above 7.60, PaCO2 above 70 mmHg."}, []string{"PaO2 below"}},
	{"a newborn's limits", []string{"house population newborn", "house critical ph 7.15"},
		[]string{"pH below 7.15 or above 7.60, PaCO2 above 70 mmHg."}, []string{"PaO2 below"}},
	{"an adult's defaults", []string{"house"}, []string{"PaCO2 above 70 mmHg, PaO2 below 45 mmHg."}, nil},
	{"a range of PaCO2", []string{"house critical paco2 50-70"}, []string{"PaCO2 has one critical limit"}, []string{"Stored"}},
	{"a limit without a name", []string{"house critical paco2 70 75"}, []string{"Limits are expected"}, []string{"Stored"}},
	{"a name without a limit", []string{"house critical paco2"}, []string{"Limits are expected"}, []string{"Stored"}},
	{"a limit of another value", []string{"house critical hco3 10"}, []string{"not for HCO3"}, []string{"Stored"}},

	{"thousands of metres", []string{"house altitude 1,600 m"}, []string{"Altitude: 1600 m."}, nil},
	{"thousands of feet", []string{"house altitude 5,280 ft"}, []string{"Altitude: 1609 m."}, nil},
	{"feet in a word", []string{"house altitude 5280 feet"}, []string{"Altitude: 1609 m."}, nil},
	{"thousands by a point", []string{"house altitude 1.600 m"}, []string{"Altitude: 1600 m."}, nil},
	{"a decimal comma", []string{"house altitude 1600,5"}, []string{"Altitude: 1600 m."}, nil},
	{"half a kilometre", []string{"house altitude 0,5 km"}, []string{"Altitude: 500 m."}, nil},
	{"below the sea", []string{"house altitude -400 m"}, []string{"Altitude: -400 m."}, nil},
	{"too deep", []string{"house altitude -1600 m"}, []string{"Nothing was changed"}, []string{"Stored"}},
	{"something behind the number", []string{"house altitude 1600 x 3"}, []string{"A height in m or ft"}, []string{"Stored"}},
	{"a height in mmHg", []string{"house altitude 620 mmHg"}, []string{"A height in m or ft"}, []string{"Stored"}},
	{"a barometer", []string{"house pressure 620"}, []string{"Barometric pressure: 620 mmHg."}, nil},
	{"a barometer in kPa", []string{"house pressure 82.7 kPa"}, []string{"Barometric pressure: 620 mmHg."}, nil},
	{"a decimal comma in kPa", []string{"house pressure 101,325 kPa"}, []string{"Barometric pressure: 760 mmHg."}, nil},
	{"a barometer in hPa", []string{"house pressure 1,013 hPa"}, []string{"Barometric pressure: 760 mmHg."}, nil},
	{"a barometer in mbar", []string{"house pressure 827 mbar"}, []string{"Barometric pressure: 620 mmHg."}, nil},
	{"a pressure below 0", []string{"house pressure -620"}, []string{"is above 0"}, []string{"Stored"}},
	{"a pressure in feet", []string{"house pressure 620 ft"}, []string{"A pressure in mmHg, kPa or hPa"}, []string{"Stored"}},

	{"a target of CO2", []string{"house co2 target 45-55"}, []string{"PaCO2 wanted: 45-55 mmHg."}, nil},
	{"a target of CO2 in kPa", []string{"house co2 target 6 to 7.3 kPa"}, []string{"PaCO2 wanted: 45-54.8 mmHg."}, nil},
	{"a target in a channel in kPa", []string{"house units kPa", "house co2 target 6-7.3"}, []string{"PaCO2 wanted: 45-54.8 mmHg (6-7.3 kPa)."}, nil},
	{"a target with something behind", []string{"house co2 target 45-55 x"}, []string{"A range is expected"}, []string{"Stored"}},
	{"a word", []string{"house word npo2 means nasal cannula 2 L"}, []string{"Stored as revision 1", "npo2 = nasal cannula 2 l"}, []string{"Then type"}},
	{"a word said in a sentence", []string{"npo2 means nasal cannula 2 L"}, []string{"Then type: house word npo2"}, []string{"Stored"}},
	{"a zone", []string{"house zone europe/london"}, []string{"Time zone: Europe/London."}, nil},
	{"no zone", []string{"house zone europe/london", "house zone"}, []string{"A time zone is expected"}, []string{"Stored"}},
	{"shifts", []string{"house zone utc", "house shift 7:00 and 19:00"}, []string{"Shifts end at 07:00, 19:00."}, nil},
	{"two problems, one line", []string{"house shift 7:00 25:00"}, []string{"need one; shift_ends: read"}, []string{"Stored", "\n"}},
	{"no order", []string{"house order"}, []string{"The names of the values are expected"}, []string{"Stored"}},
	{"a target of CO2 taken away", []string{"house co2 target 45-55", "house co2 target off"}, []string{"CO2 target: not set."}, nil},
	{"a word about the word", []string{"house patients are preterm"}, []string{"Population: preterm."}, nil},
	{"a colon", []string{"house units: kPa"}, []string{"typed and shown in kPa."}, nil},
	{"the rules by name", []string{"house rules"}, []string{"House rules, revision 0"}, nil},
}

func TestHouseSettings(t *testing.T) {
	for _, c := range houseSettings {
		t.Run(c.name, func(t *testing.T) {
			d := newDesk(t)
			var text string
			for _, line := range c.lines {
				text = d.say(line).Reply.Text()
			}
			for _, want := range c.want {
				if !strings.Contains(text, want) {
					t.Errorf("%q is missing in:\n%s", want, text)
				}
			}
			for _, not := range c.not {
				if strings.Contains(text, not) {
					t.Errorf("%q stands in:\n%s", not, text)
				}
			}
		})
	}
}

// The range of PaCO2 that a channel set is the one that is named.
func TestTheChannelsRangeIsTold(t *testing.T) {
	for _, c := range []struct{ line, want, not string }{
		{"7.34/50/90/26 30%", "level adequate (this channel's 45-55 mmHg)", "35-45"},
		{"7.29/62/90/29 30%", "(this channel's 45-55 mmHg)", "35-45"},
		{"7.33/55.5/90/28 30%", "this channel's 45-55 mmHg", "35-45"},
		{"7.48/36/90/26 30%", "PaCO2 below its range (this channel's 45-55 mmHg).", "35-45"},
		{"7.20/64/90/24 30%", "PaCO2 55 mmHg (the end of this channel's range)", "PaCO2 45 mmHg"},
	} {
		d := newDesk(t)
		d.say("house co2 target 45-55")
		text := d.say(c.line).Reply.Text()
		if !strings.Contains(text, c.want) || strings.Contains(text, c.not) {
			t.Errorf("%s: not %q, or %q, in:\n%s", c.line, c.want, c.not, text)
		}
		if text := d.say("why co2").Reply.Text(); !strings.Contains(text, "45 to 55 mmHg") {
			t.Errorf("%s: why tells another range:\n%s", c.line, text)
		}
	}
}

// In a channel that reads kPa a limit in mmHg says so.
func TestWhyInKPaNamesTheUnitOfItsCutoffs(t *testing.T) {
	d := newDesk(t)
	d.say("house units kPa")
	if text := d.say("7.15/10.5/8/27 40%").Reply.Text(); !strings.Contains(text, "critical limit 9.3 kPa") {
		t.Errorf("the critical limit has no unit:\n%s", text)
	}
	for line, want := range map[string]string{
		"why critical":   "PaCO2 above 70 mmHg, PaO2 below 45 mmHg.",
		"why efficiency": "300 mmHg or below reduced, 200 mmHg or below poor, on oxygen with PaCO2 up to 50 mmHg.",
	} {
		if text := d.say(line).Reply.Text(); !strings.Contains(text, want) {
			t.Errorf("%s: %q is missing in:\n%s", line, want, text)
		}
	}
}
