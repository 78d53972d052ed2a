package memory

import (
	"errors"
	"testing"

	"galeward/bot/shorthand"
	"galeward/bot/store"
)

// breakWrites breaks the first writes of rules, before or after they land.
func breakWrites(r *rig, times int, after bool) {
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		if ops[0].Tag != "" && times > 0 {
			times--
			return after, errCut
		}
		return false, nil
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
		r.tap.breakWith(func(ops []store.Op) (bool, error) {
			if ops[0].Tag == "" {
				return false, nil
			}
			n++
			if n == 1 {
				return true, errCut
			}
			return true, second
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
		r.tap.breakWith(func(ops []store.Op) (bool, error) {
			if ops[0].Tag != "" && !broken {
				broken = true
				return true, errCut
			}
			look := len(ops) == 2 && ops[0].Tag == "" && ops[1].Tag == ""
			if broken && (look && when == "before the look" || len(ops) == 1 && ops[0].Durable) {
				r.tap.breakWith(nil)
				if _, _, err := b.ChangeHouse(ctx, ward, "U2", func(h House) (House, error) { h.PB = 650; return h, nil }); err != nil {
					t.Error(err)
				}
			}
			return false, nil
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
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		gone = gone || ops[0].Tag != ""
		if gone {
			return true, errCut
		}
		return false, nil
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
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		if ops[0].Tag != "" && once {
			once = false
			if _, err := r.tap.Store.Do(ctx, ward.partition(), ops...); err != nil {
				t.Error(err)
			}
		}
		return false, nil
	})
	_, rev, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa))
	if err != nil || rev.N != 1 || len(rev.What) != 1 {
		t.Errorf("%+v %v, want revision 1 stored by this change", rev, err)
	}
}
