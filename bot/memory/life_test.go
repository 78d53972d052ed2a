package memory

import (
	"fmt"
	"testing"
	"time"

	"galeward/bot/shorthand"
	"galeward/bot/store"
)

func TestGasesGoAfterADay(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, inThread("top", "m1"), 50)
	r.add(20 * time.Hour)
	reading(t, m, inThread("top", "m2"), 60) // does not lengthen the life of the first
	r.add(3*time.Hour + 59*time.Minute)
	expect(t, "before the day is over", paco2s(load(t, m, inThread("top", "m3")).Thread()), "50 60")
	r.add(time.Minute)
	for _, p := range []*Memory{m, r.process()} { // with and without the cache
		expect(t, "after a day", paco2s(load(t, p, inThread("top", newTag())).Thread()), "60")
	}
	r.add(20 * time.Hour)
	expect(t, "after both days", paco2s(load(t, m, inThread("top", "m5")).Thread()), "")
	items, err := r.tap.Do(ctx, ward.partition(), store.Op{Key: threadKey("top")})
	if err != nil || items[0].Tag != "" {
		t.Errorf("the store still has the thread: %v %v", items, err)
	}
}

func TestGasesGoAtTheEndOfTheShift(t *testing.T) {
	r := newRig() // 06:00 in London
	m := r.process()
	if _, _, err := m.ChangeHouse(ctx, ward, "U1", func(h House) (House, error) {
		h.Zone, h.ShiftEnds = "Europe/London", []string{"07:30", "19:30"}
		return h, nil
	}); err != nil {
		t.Fatal(err)
	}
	reading(t, m, inThread("top", "m1"), 50)
	r.add(89 * time.Minute)
	expect(t, "in the shift", paco2s(load(t, m, inThread("top", "m2")).Thread()), "50")
	r.add(time.Minute)
	expect(t, "in the next shift", paco2s(load(t, m, inThread("top", "m3")).Thread()), "")
	items, err := r.tap.Do(ctx, ward.partition(), store.Op{Key: threadKey("top")})
	if err != nil || items[0].Tag != "" {
		t.Errorf("the store still has the thread: %v %v", items, err)
	}
}

// What is written but the rules always has a lifetime.
func TestOnlyRulesAreKeptForEver(t *testing.T) {
	r := newRig()
	m := r.process()
	kept := make(map[string]bool)
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		for _, op := range ops {
			if op.Tag != "" && op.TTL == 0 {
				kept[op.Key] = true
			}
		}
		return false, nil
	})
	c := call("m1")
	c.Opens = true
	reading(t, m, c, 50)
	v := load(t, m, inThread("m1", "m2"))
	v.Ask(shorthand.Question{Code: "venous"}, "m2")
	save(t, m, v)
	if _, _, err := m.ChangeHouse(ctx, ward, "U1", setUnits(shorthand.KPa)); err != nil {
		t.Fatal(err)
	}
	expect(t, "kept for ever", fmt.Sprint(kept), "map[house:true house/rev/000001:true]")
}

// A later write does not lengthen the life of what stays.
func TestLifeIsThatOfTheLastGas(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, inThread("top", "m1"), 50)
	r.add(time.Hour)
	reading(t, m, inThread("top", "m2"), 60)
	r.add(time.Hour)
	var life time.Duration
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		if ops[0].Tag != "" {
			life = ops[0].TTL
		}
		return false, nil
	})
	v := load(t, m, inThread("top", "m3"))
	v.Remove("m2")
	save(t, m, v)
	expect(t, "life of what stays", life, 22*time.Hour)
}
