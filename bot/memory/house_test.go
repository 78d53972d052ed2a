package memory

import (
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"reflect"
	"strings"
	"testing"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// whole has every rule set.
func whole() House {
	return House{
		Units: shorthand.KPa, Order: []physio.Quantity{physio.PHq, physio.PaO2, physio.PaCO2},
		Words: map[string]string{"bip": "bilevel", "o2": "fio2 +"}, PB: 640, Altitude: 1500.5, Population: physio.Newborn,
		Target: &physio.Target{Low: 0.88, High: 0.92}, TargetPaCO2: &physio.Span{Low: 45, High: 52.5},
		Critical: &physio.CriticalLimits{PHLow: 7.15, PHHigh: 7.6, PaCO2High: 80, PaO2Low: 40},
		Private:  true, Listen: true, Zone: "Europe/London", Times: []string{"07:00", "19:00"}, ShiftEnds: []string{"07:30"},
		Editors: []string{"U1", Managers},
	}
}

func TestFileFormRoundTrip(t *testing.T) {
	for name, h := range map[string]House{"whole": whole(), "default": {}, "one": {Altitude: -400}, "limits": {Critical: &physio.CriticalLimits{PHLow: 7.1}}} {
		file, err := h.Encode()
		if err != nil {
			t.Fatal(err)
		}
		back, err := DecodeHouse(file)
		if err != nil || !reflect.DeepEqual(h, back) {
			t.Errorf("%s: read back %+v, %v, from\n%s", name, back, err, file)
		}
	}
}

// Every field of House must be in the table of the file form.
func TestEveryRuleIsInTheFile(t *testing.T) {
	v := reflect.ValueOf(whole())
	for i := range v.NumField() {
		if v.Field(i).IsZero() {
			t.Errorf("%s is not set in the example", v.Type().Field(i).Name)
		}
	}
	for i := range v.NumField() {
		one := reflect.New(v.Type()).Elem()
		one.Field(i).Set(v.Field(i))
		if len(diff(House{}, one.Interface().(House))) == 0 {
			t.Errorf("%s is in no field of the file form", v.Type().Field(i).Name)
		}
	}
}

func TestFileForm(t *testing.T) {
	file, err := House{Units: shorthand.KPa, Target: &physio.Target{Low: 0.88, High: 0.92}, Order: []physio.Quantity{physio.PHq, physio.PaCO2}}.Encode()
	want := `{
  "v": 1,
  "units": "kPa",
  "order": [
    "ph",
    "paco2"
  ],
  "target_spo2": "88-92"
}
`
	expect(t, "file", string(file), want)
	expect(t, "error", err, nil)
}

func TestForgivingOfLayout(t *testing.T) {
	h, err := DecodeHouse([]byte(`{"units":"KPA","order":"ph pao2, paco2","target_spo2":["88-92%"],"target_paco2_mmhg":"45 - 52.5",
		"words":{" BIP ":" bilevel  niv "},"zone":"Europe/London","times":["7:00"],"shift_ends":"19:30 07:30","editors":"everyone",
		"altitude_m":0,"critical":{}}`))
	if err != nil {
		t.Fatal(err)
	}
	want := House{
		Units: shorthand.KPa, Order: []physio.Quantity{physio.PHq, physio.PaO2, physio.PaCO2}, Target: &physio.Target{Low: 0.88, High: 0.92},
		TargetPaCO2: &physio.Span{Low: 45, High: 52.5}, Words: map[string]string{"bip": "bilevel niv"}, Zone: "Europe/London",
		Times: []string{"07:00"}, ShiftEnds: []string{"07:30", "19:30"},
	}
	if !reflect.DeepEqual(h, want) {
		t.Errorf("read %+v, want %+v", h, want)
	}
}

func TestBadFiles(t *testing.T) {
	const order = `expected a list of different quantities that holds ph, such as ["ph", "paco2", "pao2", "hco3"]`
	const words = "expected words of 1 to 24 letters and digits, each with the plain text it stands for"
	const times = `expected a list of different clock times, such as ["07:00", "19:00"]`
	const zone = `expected a time zone by its place, such as "Europe/London"`
	const target = `expected a saturation target in percent, low before high, between 50 and 100, such as "88-92"`
	const paco2 = `expected a PaCO2 range in mmHg, low before high, between 15 and 120, such as "45-55"`
	const limits = "expected limits under ph_low, ph_high, paco2_high_mmhg and pao2_low_mmhg"
	const editors = `expected "everyone", "managers" or a list of user ids`
	for _, c := range []struct{ file, want string }{
		{``, "the file ends too early, in line 1: house rules are one JSON object"},
		{"{\n\"units\":\"kPa\",\n", "the file ends too early, in line 2: house rules are one JSON object"},
		{"{\"units\":", "the file ends too early, in line 1: house rules are one JSON object"},
		{"{\n\"units\":\n  kPa}", "line 3 is not JSON: invalid character 'k' looking for beginning of value"},
		{"{\"private\":true,}", "line 1 is not JSON: invalid character '}'"},
		{`[]`, `house rules are one object: { "units": "kPa", ... }`},
		{`{} {}`, "house rules are one object: something stands behind its end"},
		{`{"units":"kpascal"}`, `units: read "kpascal", expected mmHg or kPa; perhaps "kPa"`},
		{`{"units":7}`, `units: read 7, expected mmHg or kPa`},
		{`{"unit":"kPa"}`, `unit: read "kPa", expected a key that is known; perhaps "units"`},
		{`{"pressure":750}`, `pressure: read 750, expected a key that is known; perhaps "pressure_mmhg"`},
		{`{"timezone":"UTC"}`, `timezone: read "UTC", expected a key that is known; perhaps "zone"`},
		{`{"colour":"red"}`, `colour: read "red", expected one of the keys units, order, words, pressure_mmhg, altitude_m, population, ` +
			`target_spo2, target_paco2_mmhg, critical, private, listen, zone, times, shift_ends, editors`},
		{`{"units":"kPa","units":"mmHg"}`, "units: read it twice, expected each key once"},
		{`{"order":["paco2","pao2"]}`, `order: read paco2, pao2, ` + order + `; ph is missing`},
		{`{"order":["ph","paco2","ph"]}`, `order: read ph, paco2, ph, ` + order + `; one quantity stands twice`},
		{`{"order":["ph"]}`, `order: read ph, ` + order + `; 2 to 16 quantities`},
		{`{"order":["ph","pco2"]}`, `order: read "pco2", ` + order + `; perhaps "paco2"`},
		{`{"order":{"ph":1}}`, `order: read {"ph":1}, ` + order},
		{`{"words":{"12":"bilevel"}}`, `words: read "12" as "bilevel", ` + words + `; the word itself is letters and digits with a letter among them`},
		{`{"words":{"a b":"bilevel"}}`, `words: read "a b" as "bilevel", ` + words + `; the word itself is letters and digits with a letter among them`},
		{`{"words":{"bip":"<!channel>"}}`, `words: read "bip" as "<!channel>", ` + words + `; the text is 1 to 60 letters, digits, spaces and . , / + - %`},
		{`{"words":{"bip":"BIP"}}`, `words: read "bip" as "BIP", ` + words + `; it stands for itself`},
		{`{"words":["bip"]}`, `words: read ["bip"], ` + words},
		{`{"pressure_mmhg":101.3}`, "pressure_mmhg: read 101.3, expected a barometric pressure of 450 to 800 mmHg; 101.3 kPa are 760 mmHg"},
		{`{"pressure_mmhg":1013}`, "pressure_mmhg: read 1013, expected a barometric pressure of 450 to 800 mmHg; 1013 hPa are 760 mmHg"},
		{`{"pressure_mmhg":0}`, "pressure_mmhg: read 0, expected a barometric pressure of 450 to 800 mmHg"},
		{`{"pressure_mmhg":"low"}`, `pressure_mmhg: read "low", expected a barometric pressure of 450 to 800 mmHg`},
		{`{"pressure_mmhg":1e400}`, `pressure_mmhg: read 1e400, expected a barometric pressure of 450 to 800 mmHg`},
		{`{"altitude_m":8849}`, "altitude_m: read 8849, expected a height of -430 to 6000 m"},
		{`{"pressure_mmhg":760,"altitude_m":2000}`, "pressure_mmhg: read 760, expected about 604 mmHg at the altitude_m of 2000; one of the two contradicts the other"},
		{`{"population":"adlut"}`, `population: read "adlut", expected adult, pregnant, child, newborn or preterm; perhaps "adult"`},
		{`{"target_spo2":"92-88"}`, `target_spo2: read "92-88", ` + target},
		{`{"target_spo2":"0.88-0.92"}`, `target_spo2: read "0.88-0.92", ` + target + `; percent, not a fraction`},
		{`{"target_spo2":92}`, `target_spo2: read 92, ` + target},
		{`{"target_spo2":null}`, `target_spo2: read null, ` + target},
		{`{"target_paco2_mmhg":"6-7"}`, `target_paco2_mmhg: read "6-7", ` + paco2 + `; 6-7 kPa is 45-53 mmHg`},
		{`{"target_paco2_mmhg":"45"}`, `target_paco2_mmhg: read "45", ` + paco2},
		{`{"critical":{"ph_low":7.4}}`, "critical.ph_low: read 7.4, expected 6.8 to 7.35"},
		{`{"critical":{"ph_lo":7.1}}`, "critical.ph_lo: read 7.1, " + limits + `; perhaps "ph_low"`},
		{`{"critical":{"ph_low":0}}`, "critical.ph_low: read 0, expected a number"},
		{`{"critical":7.1}`, "critical: read 7.1, " + limits},
		{`{"critical":{"paco2_high_mmhg":50},"target_paco2_mmhg":"45-55"}`,
			"critical.paco2_high_mmhg: read 50, expected a limit above the target_paco2_mmhg of 45-55; one of the two contradicts the other"},
		{`{"private":"yes"}`, `private: read "yes", expected true or false`},
		{`{"listen":null}`, `listen: read null, expected true or false`},
		{`{"zone":"Mars/Base"}`, `zone: read "Mars/Base", ` + zone},
		{`{"zone":"Local"}`, `zone: read "Local", ` + zone},
		{`{"times":["07:00"]}`, "zone: " + zone + "; times and shift_ends need one"},
		{`{"zone":"UTC","times":["25:00"]}`, `times: read "25:00", ` + times},
		{`{"zone":"UTC","shift_ends":["7:30","07:30"]}`, `shift_ends: read "07:30", ` + times + `; it stands twice`},
		{`{"zone":7,"times":["07:00"]}`, `zone: read 7, ` + zone},
		{`{"editors":["U1","<@U2>"]}`, `editors: read "<@U2>", ` + editors},
		{`{"editors":7}`, `editors: read 7, ` + editors},
		{`{"v":0}`, "v: read 0, expected the file form's version, 1 to 1"},
		{`{"v":2,"units":"kPa"}`, "this store holds house rules written by a newer version of this program (format 2, this one reads up to 1): " +
			"nothing was read or changed; update this program"},
		{`{"units":"x","private":1,"altitude_m":9999}`, "private: read 1, expected true or false\n" +
			`units: read "x", expected mmHg or kPa` + "\naltitude_m: read 9999, expected a height of -430 to 6000 m"},
	} {
		h, err := DecodeHouse([]byte(c.file))
		got := fmt.Sprint(err)
		if got != c.want && !(strings.HasPrefix(c.want, "line ") && strings.HasPrefix(got, c.want)) {
			t.Errorf("%s\n got %s\nwant %s", c.file, got, c.want)
		}
		if !reflect.DeepEqual(h, House{}) {
			t.Errorf("%s: half applied: %+v", c.file, h)
		}
	}
}

func TestHugeFiles(t *testing.T) {
	_, err := DecodeHouse([]byte(`{"units":"` + strings.Repeat("k", 1<<20) + `"}`))
	expect(t, "1 MB", fmt.Sprint(err), "the file has 1048588 bytes; house rules have at most 65536")
	_, err = DecodeHouse([]byte(`{"units":"` + strings.Repeat("k", 9000) + "\\u0007\u202e" + `"}`))
	expect(t, "a long value", fmt.Sprint(err), `units: read "`+strings.Repeat("k", 40)+`...", expected mmHg or kPa`)
	words, _ := json.Marshal(map[string]any{"words": manyWords(201)})
	_, err = DecodeHouse(words)
	expect(t, "many words", fmt.Sprint(err), "words: read 201 words, expected at most 200")
	var bad strings.Builder
	for i := range 30 {
		fmt.Fprintf(&bad, `"%dkey":1,`, i)
	}
	_, err = DecodeHouse([]byte("{" + strings.TrimSuffix(bad.String(), ",") + "}"))
	if lines := strings.Split(fmt.Sprint(err), "\n"); len(lines) != 13 || lines[12] != "and 18 more" {
		t.Errorf("thirty bad keys: %d lines, the last %q", len(lines), lines[len(lines)-1])
	}
}

func manyWords(n int) map[string]string {
	words := make(map[string]string)
	for i := range n {
		words[fmt.Sprintf("w%d", i)] = "bilevel"
	}
	return words
}

// The largest house that passes fits into the store and into a file.
func TestLargestHouseFits(t *testing.T) {
	h := whole()
	h.Words = make(map[string]string)
	for i := range mostWords {
		h.Words[fmt.Sprintf("%s%03d", strings.Repeat("w", 21), i)] = strings.Repeat("x", 60)
	}
	h.Editors = nil
	for i := range mostEditors {
		h.Editors = append(h.Editors, fmt.Sprintf("%s%02d", strings.Repeat("U", 62), i))
	}
	file, err := h.Encode()
	if err != nil || len(file) > mostFile {
		t.Fatalf("%d bytes, %v", len(file), err)
	}
	if _, err := DecodeHouse(file); err != nil {
		t.Error(err)
	}
	r := newRig()
	if _, _, err := r.process().ChangeHouse(ctx, ward, "U1", func(House) (House, error) { return h, nil }); err != nil {
		t.Error(err)
	}
}

func TestValidateWhatNoFileCanHold(t *testing.T) {
	for name, h := range map[string]House{
		"not a number": {PB: math.NaN()}, "endless": {Altitude: math.Inf(1)}, "target": {Target: &physio.Target{Low: math.NaN(), High: 1}},
		"many times": {Zone: "UTC", Times: make([]string, 13)}, "many editors": {Editors: make([]string, 51)},
		"control": {Words: map[string]string{"bip": "bi\x00level"}}, "no text": {Words: map[string]string{"bip": ""}},
		"an editor without an id": {Editors: []string{""}},
	} {
		var p Problems
		if err := h.Validate(); !errors.As(err, &p) || len(p) == 0 {
			t.Errorf("%s passes: %v", name, err)
		}
	}
	if err := whole().Validate(); err != nil {
		t.Errorf("a possible house: %v", err)
	}
	if err := (House{}).Validate(); err != nil {
		t.Errorf("the default house: %v", err)
	}
}

func TestWhoMayChange(t *testing.T) {
	for _, c := range []struct {
		editors string
		user    string
		manager bool
		may     bool
	}{
		{"", "U9", false, true}, {"U1 U2", "U2", false, true}, {"U1 U2", "U9", false, false}, {"U1", "U9", true, false},
		{"managers", "U9", true, true}, {"managers", "U9", false, false}, {"managers U1", "U1", false, true},
		{"managers", "managers", false, false}, {"U1", "managers", false, false},
	} {
		h := House{Editors: strings.Fields(c.editors)}
		if got := h.MayChange(c.user, c.manager); got != c.may {
			t.Errorf("editors %q, user %q, manager %v: %v", c.editors, c.user, c.manager, got)
		}
	}
}

func TestHabitsAndSetting(t *testing.T) {
	h := whole()
	habits := h.Habits()
	s := habits.Setting
	if habits.Units != h.Units || !reflect.DeepEqual(habits.Order, h.Order) || !reflect.DeepEqual(habits.Words, h.Words) ||
		s.PB != h.PB || s.Altitude != h.Altitude || s.Population != h.Population || s.Target != h.Target ||
		s.TargetPaCO2 != h.TargetPaCO2 || s.Critical != h.Critical {
		t.Errorf("%+v of %+v", habits, h)
	}
}

func TestCloneSharesNothing(t *testing.T) {
	h := whole()
	c := h.Clone()
	if !reflect.DeepEqual(h, c) {
		t.Fatalf("%+v, want %+v", c, h)
	}
	c.Order[0], c.Words["bip"], c.Times[0], c.ShiftEnds[0], c.Editors[0] = physio.Hb, "x", "x", "x", "x"
	c.Target.Low, c.TargetPaCO2.Low, c.Critical.PHLow = 0, 0, 0
	if !reflect.DeepEqual(h, whole()) {
		t.Errorf("a change to the copy changed the original: %+v", h)
	}
}
