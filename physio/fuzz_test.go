package physio

import (
	"encoding/binary"
	"encoding/json"
	"fmt"
	"math"
	"os"
	"slices"
	"testing"
)

// FuzzAssess gives Assess samples and settings of any bytes: values that are
// possible and, where a bit asks for it, values far outside and no numbers, each
// word of each kind and none of them. It never panics, gives no number that is not an ordinary one, and every word is
// one of the published form of an answer.
func FuzzAssess(f *testing.F) {
	words := contractWords(f)
	for _, s := range drawnPatients() {
		f.Add(packSample(s))
	}
	f.Add([]byte{})
	f.Fuzz(func(t *testing.T, data []byte) {
		s, set := unpack(data)
		a := Assess(s, set)
		checkNumbers(t, &a)
		for _, w := range wordsOf(&a) {
			if !slices.Contains(words[w.kind], w.word) {
				t.Errorf("%s %q is not one of %q", w.kind, w.word, words[w.kind])
			}
		}
		Criteria(&a)
	})
}

// checkNumbers looks for a number that is none, and for an interval beside its
// value.
func checkNumbers(t *testing.T, a *Assessment) {
	intervals := map[string]Interval{
		"PaCO2": a.Ventilation.PaCO2, "saturation": a.Oxygenation.Saturation, "FiO2": a.Oxygen.FiO2,
		"healthy PaO2": a.Oxygenation.HealthyPaO2,
	}
	for _, ix := range a.Indices {
		intervals[ix.Key] = ix.Interval
		if _, ok := RuleFor(ix.Key); !ok {
			t.Errorf("%s has no rule", ix.Key)
		}
	}
	for key, iv := range intervals {
		if !finite(iv.Low) || !finite(iv.High) || !(iv.Low <= iv.Value && iv.Value <= iv.High) {
			t.Errorf("%s %+v", key, iv)
		}
	}
	numbers := []float64{
		a.PB, a.Altitude, a.Triple.PH, a.Triple.PaCO2, a.Triple.HCO3, a.Fit.HCO3Calc, a.Fit.Off, a.Fit.OffPH,
		a.AcidBase.NeedSpan.Low, a.AcidBase.NeedSpan.High, a.AcidBase.UsualPaCO2.Low, a.AcidBase.UsualPaCO2.High,
	}
	for i, v := range numbers {
		if !finite(v) {
			t.Errorf("number %d is %v", i, v)
		}
	}
}

// word is one word of an assessment with the place where the form lists it.
type word struct{ kind, word string }

func wordsOf(a *Assessment) []word {
	v, o, ab := a.Ventilation, a.Oxygenation, a.AcidBase
	all := []word{
		{"problem", string(a.Problem)}, {"sample", string(a.Blood)}, {"population", string(a.Population)},
		{"ventilation.level", string(v.Level)}, {"ventilation.efficiency", string(v.Efficiency)},
		{"oxygenation.level", string(o.Level)}, {"oxygenation.efficiency", string(o.Efficiency)},
		{"acid_base.primary", string(ab.Primary)}, {"acid_base.course", string(ab.Course)},
		{"acid_base.compensation", string(ab.Compensation)}, {"acid_base.gap", string(ab.Gap)},
	}
	if ab.Need != NoNeed {
		all = append(all, word{"ventilation.need", string(ab.Need)})
	}
	if o.AgainstTarget != NoTarget {
		all = append(all, word{"oxygenation.against_target", string(o.AgainstTarget)})
	}
	for _, p := range ab.Also {
		all = append(all, word{"acid_base.also", string(p)})
	}
	for _, m := range a.Mechanism {
		all = append(all, word{"mechanism", string(m)})
	}
	for _, q := range a.Critical {
		all = append(all, word{"critical", q.Key()})
	}
	for _, l := range a.Missing {
		all = append(all, word{"missing", l.Quantity.Key()})
	}
	return all
}

// schema is as much of the published form as lists words.
type schema struct {
	Enum       []string          `json:"enum"`
	Items      *schema           `json:"items"`
	Properties map[string]schema `json:"properties"`
}

// contractWords reads the words that the form of an answer allows at each place.
func contractWords(f *testing.F) map[string][]string {
	f.Helper()
	raw, err := os.ReadFile("../testdata/contract/answer.schema.json")
	var form schema
	if err == nil {
		err = json.Unmarshal(raw, &form)
	}
	if err != nil {
		f.Fatal(err)
	}
	words := map[string][]string{}
	collectWords("", form, words)
	if len(words["problem"]) == 0 || len(words["acid_base.also"]) == 0 {
		f.Fatalf("the form lists no words: %v", words)
	}
	return words
}

func collectWords(at string, s schema, into map[string][]string) {
	if s.Items != nil {
		s.Enum = append(s.Enum, s.Items.Enum...)
	}
	if len(s.Enum) > 0 {
		into[at] = s.Enum
	}
	for name, child := range s.Properties {
		if at != "" {
			name = fmt.Sprintf("%s.%s", at, name)
		}
		collectWords(name, child, into)
	}
}

// The words that a sample may hold.
var (
	fuzzBloods = []Blood{
		BloodUnstated, Arterial, Venous, CentralVenous, MixedVenous, Capillary, Cord, Intraosseous, BloodUncertain, NoBlood,
	}
	fuzzSites       = []Site{SiteUnstated, Earlobe, Finger, Heel, UmbilicalVein, UmbilicalArt, CordArterySite, CordVeinSite}
	fuzzPopulations = []Population{PopulationUnstated, Adult, Pregnant, Child, Newborn, Preterm}
	fuzzSexes       = []Sex{SexUnstated, Female, Male}
	fuzzModes       = []Mode{ModeUnstated, AssistCtrl, VolumeCtrl, PressureCtrl, PRVC, SIMV, PressSupport, APRV, HFOV, HFJV, NAVA}
	fuzzDevices     = []Device{
		DeviceUnstated, Air, Cannula, ReservoirCannula, PulseDose, SimpleMask, ReservoirMask, Venturi, FaceTent, TracheostomyMask,
		TPiece, Hood, HighFlow, CPAPDevice, Bilevel, Ventilator, BagMask, Chamber,
	}
)

// packSample writes a sample in the bytes that unpack reads.
func packSample(s Sample) []byte {
	b := []byte{
		byte(slices.Index(fuzzBloods, s.Blood)), byte(slices.Index(fuzzSites, s.Site)), byte(slices.Index(fuzzDevices, s.Device)),
		byte(slices.Index(fuzzModes, s.Mode)), byte(slices.Index(fuzzSexes, s.Sex)), byte(slices.Index(fuzzPopulations, s.Population)),
		byte(s.Trimester), 0,
	}
	b = binary.LittleEndian.AppendUint32(b, uint32(s.Circumstance))
	s.Each(func(q Quantity, v float64) {
		info := q.Info()
		part := min(1, max(0, (v-info.Low)/(info.High-info.Low)))
		b = append(b, byte(q))
		b = binary.LittleEndian.AppendUint16(b, uint16(part*math.MaxUint16))
	})
	return b
}

// unpack makes a sample and its setting from bytes. A value stands between the
// bounds of what is possible, or with the wild bit as far again outside them.
func unpack(data []byte) (s Sample, set Setting) {
	head := make([]byte, 12)
	rest := data[copy(head, data):]
	s.Blood = fuzzBloods[int(head[0])%len(fuzzBloods)]
	s.Site = fuzzSites[int(head[1])%len(fuzzSites)]
	s.Device = fuzzDevices[int(head[2])%len(fuzzDevices)]
	s.Mode = fuzzModes[int(head[3])%len(fuzzModes)]
	s.Sex = fuzzSexes[int(head[4])%len(fuzzSexes)]
	s.Population = fuzzPopulations[int(head[5])%len(fuzzPopulations)]
	s.Trimester = int(head[6] % 4)
	s.Circumstance = Circumstance(binary.LittleEndian.Uint32(head[8:]))
	set = fuzzSetting(head[7], rest)
	wild := head[6]&4 != 0
	for ; len(rest) >= 3; rest = rest[3:] {
		q := Quantity(rest[0]) % quantityCount
		s.Set(q, fuzzValue(q, binary.LittleEndian.Uint16(rest[1:]), wild))
	}
	return s, set
}

func fuzzValue(q Quantity, x uint16, wild bool) float64 {
	info := q.Info()
	part := float64(x) / math.MaxUint16
	if !wild {
		return info.Low + part*(info.High-info.Low)
	}
	switch x {
	case 0:
		return math.NaN()
	case 1:
		return math.Inf(1)
	case 2:
		return math.Inf(-1)
	case 3:
		return 0
	}
	return info.Low + (3*part-1)*(info.High-info.Low)
}

// fuzzSetting turns on what its bits ask for.
func fuzzSetting(bits byte, data []byte) (set Setting) {
	x := 0.0
	if len(data) > 0 {
		x = float64(data[len(data)-1]) / 255
	}
	if bits&1 != 0 {
		set.Target = &Target{Low: 0.85 + x/10, High: 0.90 + x/10}
	}
	if bits&2 != 0 {
		set.TargetPaCO2 = &Span{Low: 30 + 40*x, High: 40 + 40*x}
	}
	if bits&4 != 0 {
		set.PB = 450 + 350*x
	}
	if bits&8 != 0 {
		set.Altitude = 9000 * x
	}
	if bits&16 != 0 {
		set.UsualPaCO2 = 40 + 50*x
	}
	if bits&32 != 0 {
		set.Critical = &CriticalLimits{PHLow: 7 + x/2, PaCO2High: 60 + 40*x}
	}
	set.Population = fuzzPopulations[int(bits>>6)]
	return set
}
