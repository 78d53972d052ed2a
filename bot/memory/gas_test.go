package memory

import (
	"encoding/json"
	"fmt"
	"math"
	"reflect"
	"slices"
	"strings"
	"testing"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// fill sets everything inside v to something that is not zero.
func fill(v reflect.Value, n *int) {
	*n++
	switch at := v.Addr().Interface().(type) {
	case *physio.Values:
		for _, q := range physio.Quantities() {
			at.Set(q, float64(q)+0.1)
		}
		return
	case *physio.Quantity:
		*at = physio.Quantity(1 + *n%20)
		return
	case *shorthand.Follow:
		*at = shorthand.FollowCorrection
		return
	case *physio.Circumstance:
		*at = 1<<32 - 1
		return
	}
	switch v.Kind() {
	case reflect.Struct:
		for i := range v.NumField() {
			fill(v.Field(i), n)
		}
	case reflect.Pointer:
		v.Set(reflect.New(v.Type().Elem()))
		fill(v.Elem(), n)
	case reflect.Slice:
		v.Set(reflect.MakeSlice(v.Type(), 2, 2))
		fill(v.Index(0), n)
		fill(v.Index(1), n)
	case reflect.String:
		v.SetString(fmt.Sprintf("s%d", *n))
	case reflect.Bool:
		v.SetBool(true)
	case reflect.Int:
		v.SetInt(int64(*n))
	case reflect.Float64:
		v.SetFloat(float64(*n) / 3)
	default:
		panic("a new kind of field: " + v.Type().String())
	}
}

// A field that is added to a gas and not to its document is lost in silence:
// this fails then.
func TestEveryFieldOfAGasIsStored(t *testing.T) {
	var g shorthand.Gas
	n := 0
	fill(reflect.ValueOf(&g).Elem(), &n)
	raw, err := encodeGas(&g)
	if err != nil {
		t.Fatal(err)
	}
	back, err := decodeGas(raw)
	if err != nil {
		t.Fatal(err)
	}
	if !reflect.DeepEqual(g, back) {
		t.Errorf("stored and read back:\n%+v\nwant:\n%+v", back, g)
	}
	empty, err := decodeGas([]byte(`{"values":{}}`))
	if err != nil || !reflect.DeepEqual(empty, shorthand.Gas{}) {
		t.Errorf("an empty gas reads as %+v, %v", empty, err)
	}
}

// The names are in the order of the bits; the last one that physio declares is
// the last name.
func TestCircumstancesHaveTheirNames(t *testing.T) {
	for name, c := range map[string]physio.Circumstance{
		"copd": physio.COPD, "asthma_attack": physio.AsthmaAttack, "retainer": physio.Retainer, "ecmo": physio.ECMO,
		"cpr": physio.CPR, "just_changed": physio.JustChanged, "bled_in_oxygen": physio.BledInOxygen,
		"sepsis": physio.Sepsis, "temp_corrected": physio.TempCorrected,
	} {
		if got := circumstanceNames(c); !slices.Equal(got, []string{name}) {
			t.Errorf("%b is stored as %v, want %s", c, got, name)
		}
		back, err := circumstanceOf([]string{name})
		if err != nil || back != c {
			t.Errorf("%s reads as %b, %v; want %b", name, back, err, c)
		}
	}
}

// The claim and the values are written by hand: as json would.
func TestWrittenByHand(t *testing.T) {
	for _, done := range []bool{false, true} {
		want, _ := json.Marshal(claimDoc{head: claimSchema.head(), At: base, Done: done})
		expect(t, "claim", string(encodeClaim(base, done)), string(want))
	}
	var v physio.Values
	for i, x := range []float64{7.4, 0, -3.5, 1e-7, 1e21, 123456789, 1.0 / 3} {
		v.Set(physio.Quantity(i), x)
	}
	raw, err := json.Marshal(valuesDoc(v))
	var back physio.Values
	if err != nil || json.Unmarshal(raw, &back) != nil || back != v {
		t.Errorf("%s, %v reads back as %v, want %v", raw, err, back, v)
	}
	for _, x := range []float64{math.NaN(), math.Inf(1)} {
		g := shorthand.Gas{}
		g.Sample.Set(physio.PaCO2, x)
		if raw, err := encodeGas(&g); err == nil {
			t.Errorf("%v is stored as %s", x, raw)
		}
	}
}

func TestUnknownNamesInAGasAreRefused(t *testing.T) {
	for _, raw := range []string{
		`{"values":{"nothing":1}}`, `{"circumstance":["nothing"]}`, `{"circumstance":["bit_40"]}`, `{"follow":"nothing"}`,
		`{"notes":[{"code":"x","quantity":"nothing"}]}`, `{"values":{"ph":"7.2"}}`, `[]`,
	} {
		if g, err := decodeGas([]byte(raw)); err == nil {
			t.Errorf("%s reads as %+v, want an error", raw, g)
		}
	}
}

// Whatever the reading of a line lets through by mistake, memory keeps short
// labels and tokens of digits only.
func TestNoTypedTextIsKept(t *testing.T) {
	long := "Mr Smith's gas, MRN 0012345, " + strings.Repeat("call the wife ", 40)
	r := newRig()
	m := r.process()
	c := call("m1")
	c.User, c.Opens = "jane.doe@example.org", true
	v := load(t, m, c)
	e := gas("m1", 58)
	e.Gas.Bed, e.Gas.Time = "9\n<!channel>"+strings.Repeat("x", 90), "06:00"
	e.Gas.Notes = []shorthand.Note{{Code: "read_ph", Quantity: physio.PHq, Typed: "728 " + long, Value: 7.28}}
	q := shorthand.Question{Code: "venous", Typed: "wife 41", Choices: []shorthand.Choice{{Word: "venous <@U7>"}}}
	e.Gas.Questions = []shorthand.Question{q}
	v.Put(e)
	v.Ask(q, "m1")
	save(t, m, v)
	kept := v.Thread().Entries()[0].Gas
	expect(t, "typed token", kept.Notes[0].Typed, "728")
	expect(t, "question's token", kept.Questions[0].Typed, "")
	expect(t, "choice", kept.Questions[0].Choices[0].Word, "venous U7")
	expect(t, "given note is left as it was", strings.Contains(e.Gas.Notes[0].Typed, "Smith"), true)
	for key, raw := range r.tap.wrote {
		for _, forbidden := range []string{"Smith", "MRN", "0012345", "wife", "jane", "doe", "<", "@", `\n`, strings.Repeat("x", 25)} {
			if strings.Contains(string(raw), forbidden) || strings.Contains(key, forbidden) {
				t.Errorf("%q stands in %s: %s", forbidden, key, raw)
			}
		}
	}
	if len(r.tap.wrote) != 4 {
		t.Errorf("%d values written, want thread, own lines, notice and claim", len(r.tap.wrote))
	}
}
