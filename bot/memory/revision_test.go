package memory

import (
	"errors"
	"fmt"
	"slices"
	"strings"
	"sync"
	"testing"
	"time"

	"galeward/bot/shorthand"
	"galeward/bot/store"
	"galeward/physio"
)

func TestChangeIsStoredForEveryProcess(t *testing.T) {
	r := newRig()
	h, rev, err := r.process().ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	if err != nil {
		t.Fatal(err)
	}
	expect(t, "units", h.Units, shorthand.KPa)
	expect(t, "number", rev.N, 1)
	expect(t, "author", rev.By, "U1")
	expect(t, "time", rev.At, base)
	expect(t, "difference", fmt.Sprint(rev.What), "[{units  kPa}]")
	v := load(t, r.process(), call("m1"))
	expect(t, "units elsewhere", v.House.Units, shorthand.KPa)
	expect(t, "revision elsewhere", v.Revision, 1)
	c := call("m2")
	c.Where.Channel = "C2"
	expect(t, "units of another channel", load(t, r.process(), c).House.Units, "")
}

func TestChangeThatChangesNothing(t *testing.T) {
	r := newRig()
	m := r.process()
	for range 2 {
		if _, _, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa)); err != nil {
			t.Fatal(err)
		}
	}
	h, rev, err := m.ChangeHouse(ctx, ward, "U2", setUnits(shorthand.KPa))
	if err != nil || rev.N != 1 || len(rev.What) != 0 || h.Units != shorthand.KPa {
		t.Errorf("%+v %+v %v, want the rules of revision 1 and no change", h, rev, err)
	}
}

func TestChangeThatIsNotPossible(t *testing.T) {
	r := newRig()
	m := r.process()
	_, _, err := m.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) { h.PB = 76; h.Zone = "Moon"; return h, nil })
	var field *FieldError
	var all Problems
	if !errors.As(err, &all) || len(all) != 2 || !errors.As(err, &field) || field.Field != "pressure_mmhg" {
		t.Errorf("got %v, want both problems", err)
	}
	refused := errors.New("only managers")
	_, _, err = m.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) { return h, refused })
	expect(t, "the change's own error", errors.Is(err, refused), true)
	expect(t, "values in the store", len(r.tap.wrote), 0)
}

func TestHistory(t *testing.T) {
	r := newRig()
	m := r.process()
	if revs, err := m.Revisions(ctx, ward, 5); err != nil || len(revs) != 0 {
		t.Errorf("history of the default rules: %v %v", revs, err)
	}
	for i := range 5 {
		if _, _, err := m.ChangeHouse(ctx, ward, fmt.Sprintf("U%d", i), setWord(fmt.Sprintf("w%d", i), "bilevel")); err != nil {
			t.Fatal(err)
		}
	}
	revs, err := m.Revisions(ctx, ward, 3)
	if err != nil || len(revs) != 3 || revs[0].N != 5 || revs[2].N != 3 || revs[2].By != "U2" || len(revs[2].House.Words) != 3 {
		t.Errorf("the last three: %+v %v", revs, err)
	}
	revs, err = m.Revisions(ctx, ward, 1000)
	expect(t, "all", len(revs), 5)
	expect(t, "error", err, nil)
	one, err := m.Revision(ctx, ward, 2)
	if err != nil || fmt.Sprint(one.What) != "[{words.w1  bilevel}]" || len(one.House.Words) != 2 {
		t.Errorf("revision 2: %+v %v", one, err)
	}
	for _, n := range []int{0, -1, 6} {
		if _, err := m.Revision(ctx, ward, n); !errors.Is(err, ErrNoRevision) {
			t.Errorf("revision %d: %v, want ErrNoRevision", n, err)
		}
		if _, _, err := m.Restore(ctx, ward, "U1", n, nil); !errors.Is(err, ErrNoRevision) {
			t.Errorf("restoring revision %d: %v, want ErrNoRevision", n, err)
		}
	}
	h, rev, err := m.Restore(ctx, ward, "U9", 2, nil)
	if err != nil || rev.N != 6 || rev.By != "U9" || len(h.Words) != 2 || len(rev.What) != 3 {
		t.Errorf("restored: %+v %+v %v", h, rev, err)
	}
	refused := errors.New("refused")
	var held, old int
	_, _, err = m.Restore(ctx, ward, "U9", 5, func(now, earlier House) error {
		held, old = len(now.Words), len(earlier.Words)
		return refused
	})
	if !errors.Is(err, refused) || held != 2 || old != 5 {
		t.Errorf("a refused restore: %v, with %d words in force and %d to come", err, held, old)
	}
	now, n, err := r.process().HouseOf(ctx, ward)
	if err != nil || n != 6 || len(now.Words) != 2 {
		t.Errorf("in force: %+v %d %v", now, n, err)
	}
}

// Fifty changes by two processes at once: each acknowledged one has its own
// number, each revision is the one before it and one more word, none is lost.
func TestContendedChangesAreLinear(t *testing.T) {
	r := newRig()
	a, b := r.process(), r.process()
	var mu sync.Mutex
	acknowledged := make(map[string]int)
	var wg sync.WaitGroup
	for i := range 50 {
		m := []*Memory{a, b}[i%2]
		wg.Go(func() {
			word := fmt.Sprintf("w%d", i)
			for {
				_, rev, err := m.ChangeHouse(ctx, ward, "U1", setWord(word, "bilevel"))
				if errors.Is(err, ErrBusy) {
					continue
				}
				if err != nil || len(rev.What) != 1 || rev.What[0].Field != "words."+word {
					t.Errorf("change %d: %+v %v", i, rev, err)
				}
				mu.Lock()
				acknowledged[word] = rev.N
				mu.Unlock()
				return
			}
		})
	}
	wg.Wait()
	var words []string
	for n := 1; n <= 50; n++ {
		rev, err := a.Revision(ctx, ward, n)
		if err != nil || rev.N != n {
			t.Fatalf("revision %d: %+v %v", n, rev, err)
		}
		word := strings.TrimPrefix(rev.What[0].Field, "words.")
		words = append(words, word)
		if len(rev.House.Words) != n || slices.ContainsFunc(words, func(w string) bool { return rev.House.Words[w] == "" }) {
			t.Errorf("revision %d has the words %v, want %v", n, rev.House.Words, words)
		}
		expect(t, "number told for "+word, acknowledged[word], n)
	}
	_, n, _ := b.HouseOf(ctx, ward)
	expect(t, "in force", n, 50)
}

// between runs f before the next write of rules.
func between(r *rig, f func()) {
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		if ops[0].Tag != "" {
			r.tap.breakWith(nil)
			f()
		}
		return false, nil
	})
}

func TestTwoChangeTheSameField(t *testing.T) {
	r := newRig()
	a, b := r.process(), r.process()
	between(r, func() {
		_, _, err := b.ChangeHouse(ctx, ward, "U2", func(h House) (House, error) { h.PB = 640; h.Altitude = 1500; return h, nil })
		if err != nil {
			t.Error(err)
		}
	})
	_, _, err := a.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) { h.PB = 650; return h, nil })
	var clash *ClashError
	if !errors.As(err, &clash) || clash.N != 1 {
		t.Fatalf("got %v, want a clash with revision 1", err)
	}
	expect(t, "sentence", err.Error(),
		"someone else changed the same rule a moment ago (pressure_mmhg is now 640, revision 1): nothing was stored")
	between(r, func() {
		_, _, err := b.ChangeHouse(ctx, ward, "U2", func(h House) (House, error) { h.PB = 0; return h, nil })
		if err != nil {
			t.Error(err)
		}
	})
	_, _, err = a.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) { h.PB = 650; return h, nil })
	expect(t, "what was taken away is named", fmt.Sprint(err),
		"someone else changed the same rule a moment ago (pressure_mmhg is now not set, revision 2): nothing was stored")
}

func TestTwoChangeDifferentFields(t *testing.T) {
	r := newRig()
	a, b := r.process(), r.process()
	between(r, func() {
		if _, _, err := b.ChangeHouse(ctx, ward, "U2", setUnits(shorthand.KPa)); err != nil {
			t.Error(err)
		}
	})
	before := r.tap.count()
	h, rev, err := a.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) { h.PB = 650; return h, nil })
	if err != nil || rev.N != 2 || h.Units != shorthand.KPa || h.PB != 650 {
		t.Errorf("%+v %+v %v, want both changes", h, rev, err)
	}
	expect(t, "round trips, the other's two included", r.tap.count()-before, 5)
}

// The change was decided while an older revision was shown.
func TestChangeDecidedOnAnOlderRevision(t *testing.T) {
	r := newRig()
	m := r.process()
	for _, pb := range []float64{640, 650} {
		if _, _, err := m.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) { h.PB = pb; return h, nil }); err != nil {
			t.Fatal(err)
		}
	}
	set := func(h House) (House, error) { h.PB = 660; return h, nil }
	var clash *ClashError
	for _, base := range []int{0, 1} {
		if _, _, err := m.ChangeHouseSince(ctx, ward, "U2", base, set); !errors.As(err, &clash) || clash.N != 2 {
			t.Errorf("decided on revision %d: %v, want a clash", base, err)
		}
	}
	if _, _, err := m.ChangeHouseSince(ctx, ward, "U2", 9, set); !errors.Is(err, ErrNoRevision) {
		t.Errorf("decided on a revision that is not there: %v", err)
	}
	if _, rev, err := m.ChangeHouseSince(ctx, ward, "U2", 1, setUnits(shorthand.KPa)); err != nil || rev.N != 3 {
		t.Errorf("another field: %+v %v", rev, err)
	}
	if _, rev, err := m.ChangeHouseSince(ctx, ward, "U2", 3, set); err != nil || rev.N != 4 {
		t.Errorf("decided on the present revision: %+v %v", rev, err)
	}
}

func TestNotOnASecondServer(t *testing.T) {
	r := newRig()
	m := r.process()
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		if ops[0].Durable {
			return true, store.ErrNotReplicated
		}
		return false, nil
	})
	h, rev, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	if !errors.Is(err, store.ErrNotReplicated) || rev.N != 1 || h.Units != shorthand.KPa {
		t.Errorf("%+v %+v %v, want the change and ErrNotReplicated", h, rev, err)
	}
	now, _ := m.HouseNow(ward)
	expect(t, "in force", now.Units, shorthand.KPa)
	if _, down := m.Guard().Down(); down {
		t.Error("a store without its second server is not down")
	}
	expect(t, "counted", m.Guard().Stats().NotReplicated, 1)
}

func TestStoreDownStoresNoChange(t *testing.T) {
	r := newRig()
	m := r.process()
	r.tap.breakWith(allFail(errCut))
	_, _, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	expect(t, "error", errors.Is(err, ErrDown), true)
	expect(t, "not uncertain: nothing was sent", errors.Is(err, ErrUncertain), false)
	_, err = m.Revision(ctx, ward, 1)
	expect(t, "revision", errors.Is(err, ErrDown), true)
	_, err = m.Revisions(ctx, ward, 1)
	expect(t, "revisions", errors.Is(err, ErrDown), true)
	_, _, err = m.HouseOf(ctx, ward)
	expect(t, "house", errors.Is(err, ErrDown), true)
	r.tap.breakWith(func(ops []store.Op) (bool, error) { return false, store.ErrFull })
	r.add(3 * time.Second)
	_, _, err = m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	expect(t, "full", errors.Is(err, store.ErrFull), true)
	expect(t, "values in the store", len(r.tap.wrote), 0)
}

func TestRulesAreTidiedBeforeTheyAreStored(t *testing.T) {
	r := newRig()
	m := r.process()
	h, rev, err := m.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) {
		h.Zone, h.Times, h.Words, h.Order = "UTC", []string{"7:00"}, map[string]string{"BIP": "bilevel"}, []physio.Quantity{}
		h.Critical = &physio.CriticalLimits{}
		return h, nil
	})
	expect(t, "error", err, nil)
	expect(t, "differences", fmt.Sprint(rev.What), "[{words.bip  bilevel} {zone  UTC} {times  07:00}]")
	expect(t, "no limits are the default limits", h.Critical == nil, true)
}

func TestEndlessContentionEnds(t *testing.T) {
	r := newRig()
	m := r.process()
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		if ops[0].Tag != "" { // someone else writes just before
			raw, _ := encodeRevision(houseSchema, Revision{N: 1, House: House{Private: true}})
			if _, err := r.tap.Store.Do(ctx, ward.partition(), store.Op{Key: houseKey, Value: raw, Tag: newTag()}); err != nil {
				t.Error(err)
			}
		}
		return false, nil
	})
	_, _, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	expect(t, "error", errors.Is(err, ErrBusy), true)
}
