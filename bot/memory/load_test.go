package memory

import (
	"errors"
	"fmt"
	"strings"
	"sync"
	"sync/atomic"
	"testing"
	"time"

	"galeward/bot/shorthand"
	"galeward/bot/store"
)

func TestTwoRoundTripsAReading(t *testing.T) {
	r := newRig()
	m := r.process()
	for i := range 12 { // first one, with a thread, with a full thread
		before := r.tap.count()
		c := call(fmt.Sprintf("m%d", i))
		c.Opens = i%2 == 0
		reading(t, m, c, 50)
		expect(t, fmt.Sprintf("round trips of reading %d", i), r.tap.count()-before, 2)
	}
}

func TestRepeatedDeliveryIsADuplicate(t *testing.T) {
	r := newRig()
	a, b := r.process(), r.process()
	v := load(t, a, call("m1"))
	expect(t, "first", v.Claim, Mine)
	expect(t, "while it is being answered", load(t, b, call("m1")).Claim, Duplicate)
	v.Put(gas("m1", 50))
	save(t, a, v)
	r.add(25 * time.Hour) // a platform repeats for up to a day
	expect(t, "after it was answered", load(t, b, call("m1")).Claim, Duplicate)
	again := load(t, a, call("m1"))
	expect(t, "after it was answered, same process", again.Claim, Duplicate)
	before := r.tap.count()
	save(t, a, again)
	expect(t, "round trips of saving a duplicate", r.tap.count(), before)
	r.add(2 * time.Hour)
	expect(t, "after the claim's life", load(t, b, call("m1")).Claim, Mine)
}

func TestOneOfManyProcessesClaims(t *testing.T) {
	r := newRig()
	var mine atomic.Int32
	var wg sync.WaitGroup
	for range 16 {
		m := r.process()
		wg.Go(func() {
			for i := range 20 {
				v, err := m.Load(ctx, call(fmt.Sprintf("m%d", i)))
				if err == nil && v.Claim == Mine {
					mine.Add(1)
				}
			}
		})
	}
	wg.Wait()
	expect(t, "claims won", mine.Load(), 20)
}

func TestTakeOverOfADeadProcess(t *testing.T) {
	r := newRig()
	load(t, r.process(), call("m1")) // and it dies
	r.add(29 * time.Second)
	expect(t, "while it may live", load(t, r.process(), call("m1")).Claim, Duplicate)
	r.add(time.Second)
	b, c := r.process(), r.process()
	v := load(t, b, call("m1"))
	expect(t, "after it died", v.Claim, TakenOver)
	expect(t, "a third process", load(t, c, call("m1")).Claim, Duplicate)
	v.Put(gas("m1", 50))
	save(t, b, v)
	r.add(time.Minute)
	expect(t, "after the take-over answered", load(t, c, call("m1")).Claim, Duplicate)
}

// Two processes find the same dead claim; only one of them takes it over.
func TestTwoFindADeadClaim(t *testing.T) {
	r := newRig()
	load(t, r.process(), call("m1"))
	r.add(time.Minute)
	b, c := r.process(), r.process()
	var first Claim
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		if len(ops) == 1 { // b has seen the dead claim; c is quicker
			r.tap.breakWith(nil)
			first = load(t, c, call("m1")).Claim
		}
		return false, nil
	})
	expect(t, "the slower", load(t, b, call("m1")).Claim, Duplicate)
	expect(t, "the quicker", first, TakenOver)
}

func TestOneOfManyTakesOver(t *testing.T) {
	r := newRig()
	load(t, r.process(), call("m1"))
	r.add(time.Minute)
	var over atomic.Int32
	var wg sync.WaitGroup
	for range 16 {
		m := r.process()
		wg.Go(func() {
			if v, err := m.Load(ctx, call("m1")); err == nil && v.Claim == TakenOver {
				over.Add(1)
			}
		})
	}
	wg.Wait()
	expect(t, "take-overs", over.Load(), 1)
}

// A process that finds its answered event again, whose mark could not be
// stored, must not answer twice.
func TestAnsweredButNotMarked(t *testing.T) {
	r := newRig()
	m := r.process()
	v := load(t, m, call("m1"))
	r.tap.breakWith(allFail(errCut))
	if err := m.Save(ctx, v); !errors.Is(err, ErrDown) {
		t.Fatalf("Save with the store down: %v", err)
	}
	expect(t, "repeated while the store is down", load(t, m, call("m1")).Claim, Duplicate)
	r.tap.breakWith(nil)
	r.add(time.Minute)
	expect(t, "repeated after the store is back", load(t, m, call("m1")).Claim, Duplicate)
}

func TestClaimOfANewerProcessIsADuplicate(t *testing.T) {
	r := newRig()
	raw := []byte(`{"v":9,"kind":"claim","at":"2020-01-01T00:00:00Z"}`)
	if _, err := r.tap.Do(ctx, ward.partition(), store.Op{Key: claimKey("m1"), Value: raw, Tag: "x"}); err != nil {
		t.Fatal(err)
	}
	expect(t, "claim", load(t, r.process(), call("m1")).Claim, Duplicate)
}

func TestWithoutDeliveryNothingIsClaimed(t *testing.T) {
	r := newRig()
	m := r.process()
	c := Call{Where: ward, User: "U1"}
	for range 2 {
		v := load(t, m, c)
		expect(t, "claim", v.Claim, Mine)
		v.FirstTime = false
		save(t, m, v)
	}
	expect(t, "values written", len(r.tap.wrote), 0)
}

func TestStandingNoticeOnce(t *testing.T) {
	r := newRig()
	m := r.process()
	v := load(t, m, call("m1"))
	expect(t, "first answer", v.FirstTime, true)
	v.FirstTime = false // the answer was a question without the notice
	save(t, m, v)
	expect(t, "notice still due", reading(t, m, call("m2"), 50).FirstTime, true)
	expect(t, "second answer", load(t, r.process(), call("m3")).FirstTime, false)
	other := call("m4")
	other.User = "U2"
	expect(t, "another user", load(t, m, other).FirstTime, true)
	elsewhere := call("m5")
	elsewhere.Where.Channel = "C2"
	expect(t, "another channel", load(t, m, elsewhere).FirstTime, true)
	r.add(181 * 24 * time.Hour)
	expect(t, "half a year later", load(t, m, call("m6")).FirstTime, true)
}

func TestNoNameForgesAPartition(t *testing.T) {
	long := strings.Repeat("é", 200)
	places := []Where{
		{"slack", "T1", "C1", ""}, {"slack", "T1/C1", "", ""}, {"slack/T1", "C1", "", ""}, {"slack", "", "T1/C1", ""},
		{"slack", "T1%2FC1", "", ""}, {"", "", "", ""}, {"slack", "T1", long, ""}, {"slack", "T1", long + "x", ""},
		{"slack", "T1", escape(long), ""}, {"slack", "T1", "{C1}", ""}, {"slack", "T1", "%7BC1%7D", ""},
	}
	seen := make(map[string]Where)
	for _, w := range places {
		p := w.partition()
		if other, twice := seen[p]; twice {
			t.Errorf("%+v and %+v share the partition %q", w, other, p)
		}
		seen[p] = w
		if len(p) > store.MaxKey || strings.ContainsAny(p, "{}\n ") || strings.Count(p, "/") != 2 {
			t.Errorf("partition %q of %+v", p, w)
		}
	}
}

func TestStoreDownAnswersWithTheLastKnownRules(t *testing.T) {
	r := newRig()
	m := r.process()
	if _, _, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa)); err != nil {
		t.Fatal(err)
	}
	reading(t, m, call("m1"), 50)
	r.tap.breakWith(allFail(errCut))
	v := load(t, m, call("m2"))
	expect(t, "degraded", v.Degraded, true)
	expect(t, "known", v.Known, true)
	expect(t, "units", v.House.Units, shorthand.KPa)
	expect(t, "revision", v.Revision, 1)
	expect(t, "claim", v.Claim, Mine)
	v.Put(gas("m2", 60))
	if err := m.Save(ctx, v); !errors.Is(err, ErrDown) {
		t.Errorf("Save: %v, want ErrDown", err)
	}
	elsewhere := call("m3")
	elsewhere.Where.Channel = "C2"
	w := load(t, m, elsewhere)
	expect(t, "unknown channel", w.Known, false)
	expect(t, "unknown channel's units", w.House.Units, "")
	expect(t, "repeat in the outage", load(t, m, call("m2")).Claim, Duplicate)
}

func TestRecoveryWithoutARestart(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, call("m1"), 50)
	r.tap.breakWith(allFail(errCut))
	v := load(t, m, call("m2"))
	v.Put(gas("m2", 60))
	r.tap.breakWith(nil)
	r.add(20 * time.Second) // the guard lets a probe through
	save(t, m, v)           // the answer was slow: the store is back by now
	w := load(t, m, call("m3"))
	expect(t, "degraded", w.Degraded, false)
	expect(t, "gases, the one of the outage included", paco2s(w.Thread()), "50 60")
}

// A deletion that comes while the store is down is carried out when it is
// back before the event ends.
func TestDeletionWhileTheStoreIsDown(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, call("m1"), 50)
	r.tap.breakWith(allFail(errCut))
	c := call("m1")
	c.Delivery = "m1 deleted"
	v := load(t, m, c)
	v.Remove("m1")
	r.tap.breakWith(nil)
	r.add(20 * time.Second)
	save(t, m, v)
	expect(t, "gases", paco2s(load(t, m, call("m2")).Thread()), "")
}

// A lost reply may have stored the claim: the event is answered, as in any
// outage, and a repeat is not.
func TestLostReplyOfAClaim(t *testing.T) {
	r := newRig()
	m := r.process()
	r.tap.breakWith(func([]store.Op) (bool, error) { return true, errCut })
	v := load(t, m, call("m1"))
	expect(t, "degraded", v.Degraded, true)
	expect(t, "claim", v.Claim, Mine)
	r.tap.breakWith(nil)
	r.add(3 * time.Second)
	expect(t, "repeat", load(t, r.process(), call("m1")).Claim, Duplicate)
}

func TestFullStoreStillReads(t *testing.T) {
	r := newRig()
	m := r.process()
	if _, _, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa)); err != nil {
		t.Fatal(err)
	}
	reading(t, m, call("m1"), 50)
	load(t, r.process(), call("dead"))
	full := func(ops []store.Op) (bool, error) {
		for _, op := range ops {
			if op.Tag != "" {
				return false, store.ErrFull
			}
		}
		return false, nil
	}
	r.tap.breakWith(full)
	v := load(t, m, call("m2"))
	expect(t, "full", v.Full, true)
	expect(t, "degraded", v.Degraded, false)
	expect(t, "units", v.House.Units, shorthand.KPa)
	expect(t, "gases", paco2s(v.Thread()), "50")
	expect(t, "repeat of an answered one", load(t, m, call("m1")).Claim, Duplicate)
	expect(t, "repeat", load(t, m, call("m2")).Claim, Duplicate)
	v.Put(gas("m2", 60))
	if err := m.Save(ctx, v); !errors.Is(err, store.ErrFull) {
		t.Errorf("Save: %v, want ErrFull", err)
	}
	r.add(time.Minute)
	expect(t, "a dead process's event", load(t, m, call("dead")).Claim, TakenOver)
	if _, down := m.Guard().Down(); down {
		t.Error("a full store is not down")
	}
}

func TestStoreLostDuringATakeOver(t *testing.T) {
	for _, broken := range []error{errCut, store.ErrFull} {
		r := newRig()
		load(t, r.process(), call("m1"))
		r.add(time.Minute)
		r.tap.breakWith(func(ops []store.Op) (bool, error) {
			if len(ops) == 1 {
				return false, broken
			}
			return false, nil
		})
		v := load(t, r.process(), call("m1"))
		expect(t, "claim", v.Claim, TakenOver)
		expect(t, "degraded", v.Degraded, broken == errCut)
		expect(t, "full", v.Full, broken == store.ErrFull)
	}
}

func TestMistakesOfTheCallerAreNoOutage(t *testing.T) {
	r := newRig()
	m := r.process()
	if err := m.guardCheck(); err == nil {
		t.Fatal("a call with a mistake passed")
	}
	if _, down := m.Guard().Down(); down {
		t.Error("a mistake of the caller is taken for an outage")
	}
}

func (m *Memory) guardCheck() error {
	_, err := m.guard.Do(ctx, "p", store.Op{Key: ""})
	return err
}

func TestHouseNow(t *testing.T) {
	r := newRig()
	m := r.process()
	if _, known := m.HouseNow(ward); known {
		t.Error("a channel is known before it was read")
	}
	load(t, m, call("m1"))
	h, known := m.HouseNow(ward)
	expect(t, "known", known, true)
	expect(t, "private", h.Private, false)
	if _, _, err := m.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) { h.Private = true; return h, nil }); err != nil {
		t.Fatal(err)
	}
	h, _ = m.HouseNow(ward)
	expect(t, "private after the change", h.Private, true)
}

// A read that began before a change and ends after it must not bring the old
// rules back into HouseNow: an answer would be shown to all.
func TestSlowReadKeepsTheNewerRules(t *testing.T) {
	r := newRig()
	m := r.process()
	load(t, m, call("m1"))
	seen := m.seen(ward.partition())
	if _, _, err := m.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) { h.Private = true; return h, nil }); err != nil {
		t.Fatal(err)
	}
	if _, err := m.houseOf(ward.partition(), seen, store.Item{}); err != nil {
		t.Fatal(err)
	}
	h, _ := m.HouseNow(ward)
	expect(t, "private", h.Private, true)
}
