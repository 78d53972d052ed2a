package memory

import (
	"errors"
	"fmt"
	"slices"
	"strings"
	"sync"
	"testing"

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
		if _, _, err := m.Restore(ctx, ward, "U1", n); !errors.Is(err, ErrNoRevision) {
			t.Errorf("restoring revision %d: %v, want ErrNoRevision", n, err)
		}
	}
	h, rev, err := m.Restore(ctx, ward, "U9", 2)
	if err != nil || rev.N != 6 || rev.By != "U9" || len(h.Words) != 2 || len(rev.What) != 3 {
		t.Errorf("restored: %+v %+v %v", h, rev, err)
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
	r.tap.breakWith(func(ops []store.Op) (error, bool) {
		if ops[0].Tag != "" {
			r.tap.breakWith(nil)
			f()
		}
		return nil, false
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
	r.tap.breakWith(func(ops []store.Op) (error, bool) {
		if ops[0].Durable {
			return store.ErrNotReplicated, true
		}
		return nil, false
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
	r.tap.breakWith(func(ops []store.Op) (error, bool) { return store.ErrFull, false })
	r.add(3e9)
	_, _, err = m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	expect(t, "full", errors.Is(err, store.ErrFull), true)
	expect(t, "values in the store", len(r.tap.wrote), 0)
}

// breakWrites breaks the first writes of rules, before or after they land.
func breakWrites(r *rig, times int, after bool) {
	r.tap.breakWith(func(ops []store.Op) (error, bool) {
		if ops[0].Tag != "" && times > 0 {
			times--
			return errCut, after
		}
		return nil, false
	})
}

func TestLostReplyOfAChange(t *testing.T) {
	for _, after := range []bool{true, false} {
		r := newRig()
		m := r.process()
		breakWrites(r, 1, after)
		h, rev, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
		if err != nil && !errors.Is(err, ErrUncertain) || err == nil && (rev.N != 1 || h.Units != shorthand.KPa) {
			t.Fatalf("stored %v: %+v %+v %v", after, h, rev, err)
		}
		expect(t, "found out what became of it", err, nil)
		now, n, err := r.process().HouseOf(ctx, ward)
		if err != nil || n != 1 || now.Units != shorthand.KPa {
			t.Errorf("stored %v: the store holds %+v, revision %d, %v", after, now, n, err)
		}
		revs, err := m.Revisions(ctx, ward, 9)
		if err != nil || len(revs) != 1 {
			t.Errorf("stored %v: history %+v %v", after, revs, err)
		}
	}
}

// The reply was lost, and the confirming write fails in its own ways.
func TestLostReplyThenAnotherFault(t *testing.T) {
	for _, second := range []error{store.ErrNotReplicated, errCut} {
		r := newRig()
		m := r.process()
		n := 0
		r.tap.breakWith(func(ops []store.Op) (error, bool) {
			if ops[0].Tag == "" {
				return nil, false
			}
			n++
			if n == 1 {
				return errCut, true
			}
			return second, true
		})
		_, rev, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
		if !errors.Is(err, store.ErrNotReplicated) || rev.N != 1 {
			t.Errorf("%+v %v: want stored, not known on a second server", rev, err)
		}
	}
}

func TestLostReplyAndSomeoneElseOnTop(t *testing.T) {
	for _, when := range []string{"before the look", "before the confirmation"} {
		r := newRig()
		a, b := r.process(), r.process()
		broken := false
		r.tap.breakWith(func(ops []store.Op) (error, bool) {
			if ops[0].Tag != "" && !broken {
				broken = true
				return errCut, true
			}
			look := len(ops) == 2 && ops[0].Tag == "" && ops[1].Tag == ""
			if broken && (look && when == "before the look" || len(ops) == 1 && ops[0].Durable) {
				r.tap.breakWith(nil)
				if _, _, err := b.ChangeHouse(ctx, ward, "U2", func(h House) (House, error) { h.PB = 650; return h, nil }); err != nil {
					t.Error(err)
				}
			}
			return nil, false
		})
		_, rev, err := a.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
		if err != nil || rev.N != 1 {
			t.Errorf("%s: %+v %v, want revision 1 stored", when, rev, err)
		}
		h, n, err := b.HouseOf(ctx, ward)
		if err != nil || n != 2 || h.Units != shorthand.KPa || h.PB != 650 {
			t.Errorf("%s: in force %+v, revision %d, %v", when, h, n, err)
		}
	}
}

func TestStoreGoneAfterALostReply(t *testing.T) {
	r := newRig()
	m := r.process()
	gone := false
	r.tap.breakWith(func(ops []store.Op) (error, bool) {
		gone = gone || ops[0].Tag != ""
		if gone {
			return errCut, true
		}
		return nil, false
	})
	_, _, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	if !errors.Is(err, ErrUncertain) {
		t.Errorf("got %v, want ErrUncertain", err)
	}
}

// A client of the store that repeats a call by itself finds its own write.
func TestOwnWriteFoundInAConflict(t *testing.T) {
	r := newRig()
	m := r.process()
	once := true
	r.tap.breakWith(func(ops []store.Op) (error, bool) {
		if ops[0].Tag != "" && once {
			once = false
			if _, err := r.tap.Store.Do(ctx, ward.partition(), ops...); err != nil {
				t.Error(err)
			}
		}
		return nil, false
	})
	_, rev, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	if err != nil || rev.N != 1 || len(rev.What) != 1 {
		t.Errorf("%+v %v, want revision 1 stored by this change", rev, err)
	}
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
	r.tap.breakWith(func(ops []store.Op) (error, bool) {
		if ops[0].Tag != "" { // someone else writes just before
			raw, _ := encodeRevision(houseSchema, Revision{N: 1, House: House{Private: true}})
			if _, err := r.tap.Store.Do(ctx, ward.partition(), store.Op{Key: houseKey, Value: raw, Tag: newTag()}); err != nil {
				t.Error(err)
			}
		}
		return nil, false
	})
	_, _, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	expect(t, "error", errors.Is(err, ErrBusy), true)
}

func TestDifferenceNamesEveryRule(t *testing.T) {
	to := House{
		Units: shorthand.KPa, Order: []physio.Quantity{physio.PHq, physio.PaO2}, Words: map[string]string{"b": "bilevel"},
		PB: 650, Altitude: 1200, Population: physio.Child, Target: &physio.Target{Low: 0.88, High: 0.92},
		TargetPaCO2: &physio.Span{Low: 45, High: 55}, Critical: &physio.CriticalLimits{PHLow: 7.15, PaO2Low: 40},
		Private: true, Listen: true, Zone: "Europe/London", Times: []string{"07:00"}, ShiftEnds: []string{"07:30", "19:30"},
		Editors: []string{"U1", Managers},
	}
	want := "[{units  kPa} {order  ph, pao2} {words.b  bilevel} {pressure_mmhg  650} {altitude_m  1200} {population  child} " +
		"{target_spo2  88-92} {target_paco2_mmhg  45-55} {critical.pao2_low_mmhg  40} {critical.ph_low  7.15} {private  true} " +
		"{listen  true} {zone  Europe/London} {times  07:00} {shift_ends  07:30, 19:30} {editors  U1, managers}]"
	expect(t, "set", fmt.Sprint(diff(House{}, to)), want)
	expect(t, "taken away", len(diff(to, House{})), len(diff(House{}, to)))
	expect(t, "the same", len(diff(to, to.Clone())), 0)
}
