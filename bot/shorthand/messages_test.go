package shorthand

import (
	"bufio"
	"encoding/json"
	"fmt"
	"math"
	"os"
	"strings"
	"testing"

	"galeward/physio"
)

// message is one row of testdata/messages/messages.jsonl.
type message struct {
	ID      string         `json:"id"`
	Text    string         `json:"text"`
	Profile string         `json:"profile"`
	Expect  map[string]any `json:"expect"`
	Kind    string         `json:"kind"`
	MustAsk *string        `json:"must_ask"`
}

// notYet are the rows that are not met, each with its reason.
var notYet = map[string]string{}

func readMessages(t testing.TB) []message {
	t.Helper()
	f, err := os.Open("../../testdata/messages/messages.jsonl")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	var all []message
	in := bufio.NewScanner(f)
	in.Buffer(nil, 1<<20)
	for in.Scan() {
		var m message
		if err := json.Unmarshal(in.Bytes(), &m); err != nil {
			t.Fatal(err)
		}
		all = append(all, m)
	}
	return all
}

// habitsOf reads a profile: "kpa;order:ph,o2,co2,hco3", "default;alt:1600m".
func habitsOf(profile string) Habits {
	var h Habits
	for _, part := range strings.Split(profile, ";") {
		key, value, _ := strings.Cut(part, ":")
		switch key {
		case "kpa":
			h.Units = KPa
		case "neonatal":
			h.Setting.Population = physio.Newborn
		case "alt":
			fmt.Sscanf(value, "%fm", &h.Setting.Altitude)
		case "order":
			names := map[string]physio.Quantity{"ph": physio.PHq, "co2": physio.PaCO2, "o2": physio.PaO2, "hco3": physio.HCO3, "be": physio.BE, "sat": physio.SaO2}
			for _, n := range strings.Split(value, ",") {
				h.Order = append(h.Order, names[n])
			}
		case "abbr":
			h.Words = map[string]string{}
			for _, n := range strings.Split(value, ",") {
				k, v, _ := strings.Cut(n, "=")
				h.Words[k] = v
			}
		}
	}
	return h
}

// expectKeys are the expected keys that are numbers of a quantity, with what
// one unit of the key is in the canonical unit and the tolerance of rounding.
var expectKeys = map[string]struct {
	q          physio.Quantity
	scale, tol float64
}{
	"ph": {physio.PHq, 1, 0.001}, "pco2_mmhg": {physio.PaCO2, 1, 0.06}, "po2_mmhg": {physio.PaO2, 1, 0.06},
	"hco3": {physio.HCO3, 1, 0.01}, "be": {physio.BE, 1, 0.01}, "sao2": {physio.SaO2, 0.01, 1e-6},
	"spo2": {physio.SpO2, 0.01, 1e-6}, "fio2": {physio.FiO2, 1, 1e-6}, "o2_lpm": {physio.OxygenFlow, 1, 0.01},
	"flow_lpm": {physio.OxygenFlow, 1, 0.01}, "rr": {physio.RR, 1, 0.01}, "rr_set": {physio.RRSet, 1, 0.01},
	"vt_ml": {physio.VT, 1, 0.01}, "vt_ml_per_kg": {physio.VTPerKg, 1, 0.01}, "ve_lpm": {physio.VE, 1, 0.01},
	"peep": {physio.PEEP, 1, 0.01}, "pip": {physio.PIP, 1, 0.01}, "pplat": {physio.Pplat, 1, 0.01},
	"ps": {physio.PS, 1, 0.01}, "ipap": {physio.IPAP, 1, 0.01}, "epap": {physio.EPAP, 1, 0.01},
	"cpap": {physio.CPAP, 1, 0.01}, "map_cmh2o": {physio.Pmean, 1, 0.01}, "etco2_mmhg": {physio.EtCO2, 1, 0.06},
	"tcco2_mmhg": {physio.TcCO2, 1, 0.06}, "tco2_mmhg": {physio.TcO2, 1, 0.06}, "hb_gdl": {physio.Hb, 1, 0.01},
	"lactate": {physio.Lactate, 1, 0.01}, "temp_c": {physio.Temp, 1, 0.06}, "height_cm": {physio.Height, 1, 0.1},
	"weight_kg": {physio.Weight, 1, 0.01}, "pbw_kg": {physio.PBW, 1, 0.01}, "alt_m": {physio.Altitude, 1, 1},
	"pb_mmhg": {physio.PB, 1, 0.5}, "phigh": {physio.PHigh, 1, 0.01}, "plow": {physio.PLow, 1, 0.01},
	"thigh_s": {physio.THigh, 1, 0.01}, "tlow_s": {physio.TLow, 1, 0.01}, "hz": {physio.Hertz, 1, 0.01},
	"amplitude": {physio.Amplitude, 1, 0.01}, "peco2_mmhg": {physio.PeCO2, 1, 0.06}, "vdvt": {physio.VDVT, 1, 0.001},
	"auto_peep": {physio.AutoPEEP, 1, 0.01}, "cohb_pct": {physio.COHb, 0.01, 1e-6}, "methb_pct": {physio.MetHb, 0.01, 1e-6},
	"svo2": {physio.SvO2, 0.01, 1e-6}, "scvo2": {physio.ScvO2, 0.01, 1e-6}, "spo2_pre": {physio.SpO2Pre, 0.01, 1e-6},
	"spo2_post": {physio.SpO2Post, 0.01, 1e-6}, "ga_wk": {physio.Gestation, 1, 0.01}, "age_y": {physio.Age, 1, 0.01},
	"pc_above": {physio.PC, 1, 0.01}, "pc_above_or_total": {physio.PC, 1, 0.01},
}

var expectDevices = map[string]physio.Device{
	"nasal cannula": physio.Cannula, "non-rebreather": physio.ReservoirMask, "venturi": physio.Venturi, "HFNC": physio.HighFlow,
	"simple mask": physio.SimpleMask, "NIV": physio.Bilevel, "CPAP": physio.CPAPDevice, "trach collar": physio.TracheostomyMask,
	"reservoir cannula": physio.ReservoirCannula, "pulse-dose concentrator": physio.PulseDose,
}

var expectBlood = map[string]physio.Blood{
	"arterial": physio.Arterial, "venous": physio.Venous, "capillary": physio.Capillary, "cord": physio.Cord,
	"central": physio.CentralVenous, "arterialised": physio.Capillary, "intraosseous": physio.Intraosseous,
}

// mismatch compares what was read with what a row expects.
func mismatch(s *physio.Sample, expect map[string]any) []string {
	var bad []string
	for key, want := range expect {
		row, isNumber := expectKeys[key]
		number, ok := want.(float64)
		switch {
		case isNumber && ok:
			if key == "age_y" && number > 89 {
				number = 90
			}
			got, have := s.Get(row.q)
			if !have || math.Abs(got-number*row.scale) > row.tol {
				bad = append(bad, fmt.Sprintf("%s: got %v (%v), want %v", key, got, have, number))
			}
		case key == "device":
			name, assumed := strings.CutSuffix(want.(string), " (assumed)")
			name, _ = strings.CutSuffix(name, " (home)")
			if s.Device != expectDevices[name] || s.DeviceTaken != assumed {
				bad = append(bad, fmt.Sprintf("device: got %q taken %v, want %q", s.Device, s.DeviceTaken, want))
			}
		case key == "sample":
			if first, _, _ := strings.Cut(want.(string), " "); s.Blood != expectBlood[first] {
				bad = append(bad, fmt.Sprintf("sample: got %q, want %q", s.Blood, want))
			}
		case key == "mode":
			if string(s.Mode) != want.(string) {
				bad = append(bad, fmt.Sprintf("mode: got %q, want %q", s.Mode, want))
			}
		case key == "sex":
			if string(s.Sex) != want.(string) {
				bad = append(bad, fmt.Sprintf("sex: got %q, want %q", s.Sex, want))
			}
		}
	}
	return bad
}

// oxygenMissing says that the question of a row is the one that package bot
// asks: on how much oxygen, or what chamber.
func oxygenMissing(ask string) bool {
	for _, w := range []string{"ask: FiO2", "PaO2 or SpO2", "ask: chamber", "ask: pulse setting", "ask: height and sex", "which gas do I follow"} {
		if strings.Contains(ask, w) {
			return true
		}
	}
	return false
}

func TestMessages(t *testing.T) {
	met, all := 0, readMessages(t)
	for _, m := range all {
		bad := checkMessage(m)
		reason, listed := notYet[m.ID]
		switch {
		case len(bad) > 0 && !listed:
			t.Errorf("%s %q: %s", m.ID, m.Text, strings.Join(bad, "; "))
		case len(bad) == 0 && listed:
			t.Errorf("%s is met now: take it off the list (%s)", m.ID, reason)
		case len(bad) == 0:
			met++
		}
	}
	t.Logf("met %d of %d", met, len(all))
}

func checkMessage(m message) []string {
	h := habitsOf(m.Profile)
	h.Addressed = m.Kind != "noise"
	line := Parse(m.Text, h)
	ask := ""
	if m.MustAsk != nil {
		ask = *m.MustAsk
	}
	switch {
	case m.Kind == "noise":
		if line.Kind != Silence {
			return []string{fmt.Sprintf("kind %d, want silence: %+v", line.Kind, line.Gases)}
		}
		return nil
	case m.Kind == "phi":
		if line.Kind != Refusal || line.Refused != RefusedIdentifier && line.Refused != RefusedPicture || len(line.Gases) > 0 {
			return []string{fmt.Sprintf("kind %d refused %q, want refusal", line.Kind, line.Refused)}
		}
		return nil
	}
	bad := checkValues(&line, m.Expect)
	questions := 0
	for _, g := range line.Gases {
		questions += len(g.Questions)
	}
	switch {
	case strings.HasPrefix(ask, "refuse:"):
		if len(line.Declined) == 0 && line.Kind != Refusal {
			bad = append(bad, "nothing declined")
		}
	case strings.HasPrefix(ask, "ask:") && questions == 0 && !oxygenMissing(ask) && line.Intent == IntentNone:
		bad = append(bad, "no question, want "+ask)
	case ask == "" && questions > 0:
		bad = append(bad, fmt.Sprintf("needless question: %+v", line.Gases[0].Questions))
	}
	return bad
}

// checkValues compares gases, lists, targets and changes.
func checkValues(line *Line, expect map[string]any) []string {
	var bad []string
	samples := []*physio.Sample{}
	for i := range line.Gases {
		samples = append(samples, &line.Gases[i].Sample)
	}
	for _, key := range []string{"gases", "cases"} {
		rows, ok := expect[key].([]any)
		if !ok {
			continue
		}
		if len(rows) != len(samples) {
			return append(bad, fmt.Sprintf("%d gases, want %d", len(samples), len(rows)))
		}
		for i, row := range rows {
			want := row.(map[string]any)
			bad = append(bad, mismatch(samples[i], want)...)
			bad = append(bad, wordsMismatch(&line.Gases[i], want)...)
		}
		return bad
	}
	want := map[string]any{}
	for k, v := range expect {
		want[k] = v
	}
	if target, ok := expect["target"].(map[string]any); ok {
		bad = append(bad, mismatch(&physio.Sample{Values: line.Target}, target)...)
	}
	if v, ok := want["venous"].(map[string]any); ok {
		s := last0(samples)
		bad = append(bad, mismatch(&physio.Sample{Values: movedVenous(s)}, map[string]any{"pco2_mmhg": v["pco2_mmhg"], "po2_mmhg": v["po2_mmhg"]})...)
	}
	last := &physio.Sample{}
	if len(samples) > 0 {
		last = samples[len(samples)-1]
	}
	if changes, ok := expect["changes"].(map[string]any); ok && !(len(line.Gases) > 0 && len(line.Gases[0].Questions) > 0) {
		from := last
		if !line.Change.Empty() {
			from = &physio.Sample{Values: line.Change}
		}
		bad = append(bad, mismatch(from, changes)...)
	}
	if prev, ok := expect["prev"].(map[string]any); ok && len(samples) == 2 {
		merged := *samples[0]
		merged.Merge(&samples[1].Values)
		bad = append(bad, mismatch(samples[0], prev)...)
		last = &merged
	}
	if line.Intent == IntentHouse {
		return bad
	}
	bad = append(bad, mismatch(last, want)...)
	if len(line.Gases) > 0 {
		bad = append(bad, wordsMismatch(&line.Gases[0], want)...)
	} else if len(samples) == 0 && want["ph"] != nil {
		bad = append(bad, "nothing read")
	}
	return bad
}

func movedVenous(s *physio.Sample) physio.Values {
	var v physio.Values
	for from, to := range map[physio.Quantity]physio.Quantity{physio.PvCO2: physio.PaCO2, physio.PvO2: physio.PaO2} {
		if x, ok := s.Get(from); ok {
			v.Set(to, x)
		}
	}
	return v
}

func wordsMismatch(g *Gas, want map[string]any) []string {
	var bad []string
	if w, ok := want["bed"].(string); ok && g.Bed != w {
		bad = append(bad, fmt.Sprintf("bed %q, want %q", g.Bed, w))
	}
	if w, ok := want["time"].(string); ok && g.Time != w {
		bad = append(bad, fmt.Sprintf("time %q, want %q", g.Time, w))
	}
	contexts := map[string]physio.Circumstance{"COPD": physio.COPD, "asthma": physio.AsthmaAttack, "post-arrest": physio.PostArrest}
	if w, ok := want["context"].(string); ok && !g.Sample.Circumstance.Has(contexts[w]) {
		bad = append(bad, "context "+w+" not read")
	}
	return bad
}

func last0(samples []*physio.Sample) *physio.Sample {
	if len(samples) == 0 {
		return &physio.Sample{}
	}
	return samples[0]
}
