package memory

import (
	"encoding/json"
	"errors"
	"strings"
	"testing"

	"galeward/bot/shorthand"
	"galeward/bot/store"
)

// plant writes raw bytes into the store, as another version would.
func plant(t *testing.T, r *rig, key, raw string) {
	t.Helper()
	if _, err := r.tap.Do(ctx, ward.partition(), store.Op{Key: key, Value: []byte(raw), Tag: newTag()}); err != nil {
		t.Fatal(err)
	}
}

func TestNewerRulesAreRefused(t *testing.T) {
	r := newRig()
	newer := `{"v":2,"kind":"house","n":3,"house":{"v":1,"units":"kPa"}}`
	plant(t, r, houseKey, newer)
	m := r.process()
	v, err := m.Load(ctx, call("m1"))
	if !errors.Is(err, ErrNewer) {
		t.Fatalf("Load: %v, want ErrNewer", err)
	}
	expect(t, "sentence", err.Error(), "this store holds house rules written by a newer version of this program "+
		"(format 2, this one reads up to 1): nothing was read or changed; update this program")
	expect(t, "claim", v.Claim, Mine)
	v.Put(gas("m1", 50))
	save(t, m, v)
	expect(t, "repeat", load(t, r.process(), call("m1")).Claim, Duplicate)
	_, _, err = m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	expect(t, "change is refused", errors.Is(err, ErrNewer), true)
	_, _, err = m.HouseOf(ctx, ward)
	expect(t, "reading is refused", errors.Is(err, ErrNewer), true)
	_, err = m.Revisions(ctx, ward, 3)
	expect(t, "history is refused", errors.Is(err, ErrNewer), true)
	expect(t, "untouched", string(r.tap.wrote[ward.partition()+"\n"+houseKey]), newer)
	expect(t, "values in the store: rules and claim", len(r.tap.wrote), 2)
}

func TestNewerThreadIsNotOverwritten(t *testing.T) {
	for _, key := range []string{threadKey("top"), flatKey(ward.partition(), "U1")} {
		r := newRig()
		newer := `{"v":7,"kind":"thread","gases":[1,2]}`
		plant(t, r, key, newer)
		m := r.process()
		c := call("m1")
		if strings.HasPrefix(key, "thread/") {
			c = inThread("top", "m1")
		}
		v, err := m.Load(ctx, c)
		expect(t, "refused", errors.Is(err, ErrNewer), true)
		v.Put(gas("m1", 50))
		save(t, m, v)
		expect(t, "untouched", string(r.tap.wrote[ward.partition()+"\n"+key]), newer)
	}
}

// A newer process may write between our two round trips.
func TestNewerThreadInAConflict(t *testing.T) {
	r := newRig()
	m := r.process()
	v := load(t, m, inThread("top", "m1"))
	v.Put(gas("m1", 50))
	plant(t, r, threadKey("top"), `{"v":7,"kind":"thread"}`)
	if err := m.Save(ctx, v); !errors.Is(err, ErrNewer) {
		t.Errorf("Save: %v, want ErrNewer", err)
	}
}

func TestUnreadableDocuments(t *testing.T) {
	for key, raws := range map[string][]string{
		houseKey: {``, `{`, `[]`, `{"v":1,"kind":"thread"}`, `{"v":0,"kind":"house"}`, `{"v":1,"kind":"house","house":{"v":1,"units":7}}`,
			`{"v":1,"kind":"house","house":[]}`, `{"v":1,"kind":"house","n":"x"}`, `{"v":1,"kind":"house","house":{"order":["ph","nothing"]}}`},
		threadKey("top"): {`x`, `{"v":1,"kind":"house"}`, `{"v":1,"kind":"thread","entries":[{"gas":{"values":{"nothing":1}}}]}`},
	} {
		for _, raw := range raws {
			r := newRig()
			plant(t, r, key, raw)
			_, err := r.process().Load(ctx, inThread("top", "m1"))
			var doc *DocumentError
			if !errors.Is(err, ErrUnreadable) || !errors.As(err, &doc) || !strings.HasPrefix(err.Error(), "this store holds "+doc.What) {
				t.Errorf("%s holding %q: %v, want ErrUnreadable", key, raw, err)
			}
		}
	}
}

// A later field of the same version that this binary does not know is left
// out, in reading and in the next write.
func TestUnknownFieldsAreLeftOut(t *testing.T) {
	r := newRig()
	plant(t, r, houseKey, `{"v":1,"kind":"house","n":1,"colour":"red","house":{"v":1,"units":"kPa","colour":"red"}}`)
	plant(t, r, threadKey("top"), `{"v":1,"kind":"thread","colour":"red","entries":[{"message":"m0","at":"2026-03-10T05:00:00Z",
		"until":"2026-03-11T05:00:00Z","colour":"red","gas":{"values":{"ph":7.3,"paco2":44}}}]}`)
	m := r.process()
	v := reading(t, m, inThread("top", "m1"), 50)
	expect(t, "units", v.House.Units, shorthand.KPa)
	expect(t, "gases", paco2s(v.Thread()), "44 50")
	if _, _, err := m.ChangeHouse(ctx, ward, "U1", setWord("bip", "bilevel")); err != nil {
		t.Fatal(err)
	}
	for key, raw := range r.tap.wrote {
		if strings.Contains(string(raw), "colour") {
			t.Errorf("%s still holds the unknown field: %s", key, raw)
		}
	}
}

// invented has three versions: the second renamed a field, the third split it.
var invented = schema{kind: "invented", what: "invented notes", steps: []func(fields) error{
	func(f fields) error { f["name"] = f["title"]; delete(f, "title"); return nil },
	func(f fields) error {
		var name string
		if err := json.Unmarshal(f["name"], &name); err != nil {
			return err
		}
		first, last, _ := strings.Cut(name, " ")
		f["first"], _ = json.Marshal(first)
		f["last"], _ = json.Marshal(last)
		return nil
	},
}}

func TestOlderDocumentsAreRaised(t *testing.T) {
	type note struct {
		head
		First, Last string
		Title, Name string
	}
	for _, raw := range []string{
		`{"v":1,"kind":"invented","title":"north wing"}`, `{"v":2,"kind":"invented","name":"north wing"}`,
		`{"v":3,"kind":"invented","first":"north","last":"wing"}`,
	} {
		var n note
		if err := invented.decode([]byte(raw), &n); err != nil {
			t.Errorf("%s: %v", raw, err)
		}
		if n.First != "north" || n.Last != "wing" || n.Title != "" {
			t.Errorf("%s was raised to %+v", raw, n)
		}
	}
	var n note
	err := invented.decode([]byte(`{"v":1,"kind":"invented","title":7}`), &n)
	expect(t, "an older document that can not be raised", errors.Is(err, ErrUnreadable), true)
	err = invented.decode([]byte(`{"v":4,"kind":"invented"}`), &n)
	expect(t, "a newer one", errors.Is(err, ErrNewer), true)
	expect(t, "the version written", invented.head(), head{V: 3, Kind: "invented"})
}
