package memory

import (
	"fmt"
	"strings"
	"sync"
	"testing"
	"time"

	"galeward/bot/shorthand"
	"galeward/bot/store"
	"galeward/physio"
)

func TestThreadRemembersInOrder(t *testing.T) {
	r := newRig()
	m := r.process()
	for i := range 3 {
		reading(t, m, inThread("top", fmt.Sprintf("m%d", i)), float64(50+i))
		r.add(time.Minute)
	}
	v := load(t, r.process(), inThread("top", "m9"))
	expect(t, "gases", paco2s(v.Thread()), "50 51 52")
	last := v.Thread().Entries()[2]
	expect(t, "last", last.Message, "m2")
	expect(t, "its answer", last.Post, "post-m2")
	expect(t, "its time", last.At, base.Add(2*time.Minute))
	expect(t, "another thread", paco2s(load(t, m, inThread("other", "m8")).Thread()), "")
}

func TestOldestMessagesGoFirst(t *testing.T) {
	r := newRig()
	m := r.process()
	for i := range 11 {
		reading(t, m, inThread("top", fmt.Sprintf("m%d", i)), float64(50+i))
		r.add(time.Minute)
	}
	v := load(t, m, inThread("top", "list"))
	expect(t, "gases", paco2s(v.Thread()), "53 54 55 56 57 58 59 60")
	var beds []Entry
	for i := range 30 {
		beds = append(beds, gas("list", float64(60+i)))
	}
	v.Put(beds...)
	expect(t, "gases of one long list", len(v.Thread().Entries()), mostEntries)
	all := v.Thread().Entries()
	paco2, _ := all[len(all)-1].Gas.Sample.Get(physio.PaCO2)
	expect(t, "last of the list", paco2, 89)
	expect(t, "found by message", len(v.ByMessage("list")), mostEntries)
}

func TestEditedQuestionKeepsItsPlace(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, inThread("top", "m1"), 50)
	r.add(time.Minute)
	reading(t, m, inThread("top", "m2"), 60)
	r.add(time.Minute)
	c := inThread("top", "m1")
	c.Delivery = "m1 edited"
	v := load(t, m, c)
	e := gas("m1", 55)
	e.Post = ""
	v.Put(e)
	save(t, m, v)
	v = load(t, r.process(), inThread("top", "m3"))
	expect(t, "gases", paco2s(v.Thread()), "55 60")
	expect(t, "answer of the edited question", v.ByMessage("m1")[0].Post, "post-m1")
	v.Posted("m1", "elsewhere")
	expect(t, "answer after it was posted anew", v.ByMessage("m1")[0].Post, "elsewhere")
}

func TestEditKeepsTheQuestionAboutAnotherGas(t *testing.T) {
	r := newRig()
	v := load(t, r.process(), inThread("top", "m3"))
	v.Put(gas("m1", 50))
	v.Put(gas("m2", 60))
	v.Ask(shorthand.Question{Code: "venous"}, "m2")
	v.Put(gas("m1", 55))
	q, of := v.Thread().Pending()
	expect(t, "after an edit of the other gas", q != nil && of == "m2", true)
	v.Put(gas("m2", 65))
	q, _ = v.Thread().Pending()
	expect(t, "after an edit of its gas", q == nil, true)
}

// What another process wrote is seen although this one remembers the thread.
func TestRememberedThreadIsNotStale(t *testing.T) {
	r := newRig()
	a, b := r.process(), r.process()
	reading(t, a, inThread("top", "m1"), 50)
	r.add(time.Second)
	reading(t, b, inThread("top", "m2"), 60)
	r.add(time.Second)
	expect(t, "gases", paco2s(reading(t, a, inThread("top", "m3"), 70).Thread()), "50 60 70")
	where := ward
	where.Thread = "top"
	gone := load(t, b, Call{Where: where, Delivery: "gone", Message: "gone"})
	gone.Forget()
	save(t, b, gone)
	expect(t, "after another process forgot it", paco2s(load(t, a, inThread("top", "m4")).Thread()), "")
}

func TestTwoUsersOfAFlatChannelNeverMix(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, call("m1"), 50)
	other := call("m2")
	other.User = "U2"
	v := load(t, m, other)
	expect(t, "another user's gases", paco2s(v.Thread()), "")
	v.Put(gas("m2", 60))
	save(t, m, v)
	expect(t, "own gases", paco2s(load(t, m, call("m3")).Thread()), "50")
	elsewhere := call("m4")
	elsewhere.Where.Channel = "C2"
	expect(t, "own gases elsewhere", paco2s(load(t, m, elsewhere).Thread()), "")
}

func TestAnswerOpensAThread(t *testing.T) {
	r := newRig()
	m := r.process()
	c := call("m1")
	c.Opens = true
	v := load(t, m, c)
	v.Put(gas("m1", 50))
	v.Ask(shorthand.Question{Code: "which_oxygen"}, "m1")
	save(t, m, v)
	reply := load(t, r.process(), inThread("m1", "m2"))
	expect(t, "inside the thread", paco2s(reply.Thread()), "50")
	q, of := reply.Thread().Pending()
	expect(t, "question is found inside", q != nil && q.Code == "which_oxygen" && of == "m1", true)
	reply.Put(gas("m2", 60))
	save(t, m, reply)
	expect(t, "outside", paco2s(load(t, m, call("m3")).Thread()), "50")
	expect(t, "inside", paco2s(load(t, m, inThread("m1", "m4")).Thread()), "50 60")
}

func TestDeletedQuestionTakesItsThread(t *testing.T) {
	for _, user := range []string{"U1", ""} { // some platforms do not say who it was
		r := newRig()
		m := r.process()
		reading(t, m, call("m0"), 40)
		r.add(time.Second)
		c := call("m1")
		c.Opens = true
		reading(t, m, c, 50)
		reading(t, m, inThread("m1", "m2"), 60)
		c.Delivery, c.User, c.Opens = "m1 deleted", user, false
		v := load(t, r.process(), c)
		expect(t, "found", len(v.ByMessage("m1")), 1)
		v.Remove("m1")
		save(t, m, v)
		expect(t, "inside the thread", paco2s(load(t, m, inThread("m1", "m3")).Thread()), "")
		expect(t, "outside", paco2s(load(t, m, call("m4")).Thread()), "40")
		if _, there := r.tap.wrote[ward.partition()+"\n"+threadKey("m1")]; there {
			t.Error("the thread still stands in the store")
		}
	}
}

func TestDeletedInsideTheThread(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, inThread("top", "m1"), 50)
	v := load(t, m, inThread("top", "x"))
	v.Ask(shorthand.Question{Code: "which_oxygen"}, "m1")
	v.Remove("m1")
	q, _ := v.Thread().Pending()
	expect(t, "question about it", q == nil, true)
	save(t, m, v)
	key := ward.partition() + "\n" + threadKey("top")
	if _, there := r.tap.wrote[key]; there {
		t.Error("an empty thread stands in the store")
	}
	reading(t, m, inThread("top", "m2"), 50)
	v = load(t, m, inThread("top", "y"))
	v.Remove("top") // the message that the thread hangs from
	save(t, m, v)
	if _, there := r.tap.wrote[key]; there {
		t.Error("the thread of a deleted message stands in the store")
	}
}

func TestDeletionOfTheUnknown(t *testing.T) {
	r := newRig()
	m := r.process()
	v := load(t, m, Call{Where: ward, Delivery: "d", Message: "never seen"})
	expect(t, "found", len(v.ByMessage("never seen")), 0)
	v.Remove("never seen")
	save(t, m, v)
	expect(t, "written: the claim", len(r.tap.wrote), 1)
}

func TestQuestionIsAskedOnceAThread(t *testing.T) {
	r := newRig()
	m := r.process()
	v := load(t, m, inThread("top", "m1"))
	v.Put(gas("m1", 50))
	expect(t, "asked before", v.Thread().Asked("which_oxygen"), false)
	asked := shorthand.Question{Code: "which_oxygen", Quantity: physio.FiO2, Choices: []shorthand.Choice{
		{Word: "40 %", Drop: []physio.Quantity{physio.SpO2}, Device: physio.Venturi}}}
	asked.Choices[0].Set.Set(physio.FiO2, 0.4)
	v.Ask(asked, "m1")
	save(t, m, v)
	v = load(t, r.process(), inThread("top", "m2"))
	expect(t, "asked after", v.Thread().Asked("which_oxygen"), true)
	q, of := v.Thread().Pending()
	if q == nil || fmt.Sprint(*q) != fmt.Sprint(asked) || of != "m1" {
		t.Errorf("pending is %v about %q, want %v about m1", q, of, asked)
	}
	v.Put(gas("m2", 60))
	q, _ = v.Thread().Pending()
	expect(t, "lapsed with the next gas", q == nil, true)
	expect(t, "still asked", v.Thread().Asked("which_oxygen"), true)
}

// In a flat channel the next gas of its own is another case: what was asked
// about the last one may be asked again. A follow-up is the same case.
func TestFlatChannelAsksAnewForANewCase(t *testing.T) {
	r := newRig()
	m := r.process()
	v := load(t, m, call("m1"))
	v.Put(gas("m1", 50))
	v.Ask(shorthand.Question{Code: "which_oxygen"}, "m1")
	follow := gas("m2", 52)
	follow.Gas.Follow = shorthand.FollowNow
	v.Put(follow)
	expect(t, "asked, after a follow-up", v.Thread().Asked("which_oxygen"), true)
	v.Put(gas("m3", 60))
	expect(t, "asked, after a new case", v.Thread().Asked("which_oxygen"), false)
}

// Drop takes one message's gases, Remove the whole thread under it; Abandon
// leaves only the claim to be written.
func TestDropAndAbandon(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, inThread("m0", "m0"), 50)
	reading(t, m, inThread("m0", "m1"), 60)
	v := load(t, m, inThread("m0", "m2"))
	v.Drop("m0")
	v.Abandon()
	save(t, m, v)
	expect(t, "abandoned", paco2s(load(t, r.process(), inThread("m0", "m3")).Thread()), "50 60")
	v = load(t, m, inThread("m0", "m4"))
	v.Drop("m0")
	save(t, m, v)
	expect(t, "dropped", paco2s(load(t, r.process(), inThread("m0", "m5")).Thread()), "60")
}

func TestForget(t *testing.T) {
	r := newRig()
	m := r.process()
	reading(t, m, call("m1"), 50)
	reading(t, m, inThread("top", "m2"), 60)
	v := load(t, m, call("m3"))
	v.Forget()
	save(t, m, v)
	expect(t, "own lines", paco2s(load(t, m, call("m4")).Thread()), "")
	v = load(t, m, inThread("top", "m6"))
	v.Forget()
	save(t, m, v)
	expect(t, "thread", paco2s(load(t, m, inThread("top", "m5")).Thread()), "")
	for key := range r.tap.wrote {
		if strings.Contains(key, "thread/") || strings.Contains(key, "flat/") {
			t.Errorf("%q still stands in the store", key)
		}
	}
}

func TestTwoProcessesWriteOneThread(t *testing.T) {
	r := newRig()
	a, b := r.process(), r.process()
	reading(t, a, inThread("top", "m0"), 40)
	r.add(time.Second)
	va, vb := load(t, a, inThread("top", "m1")), load(t, b, inThread("top", "m2"))
	va.Put(gas("m1", 50))
	vb.Put(gas("m2", 60))
	vb.Ask(shorthand.Question{Code: "venous"}, "m2")
	save(t, a, va)
	before := r.tap.count()
	save(t, b, vb)
	expect(t, "round trips of a save with a conflict", r.tap.count()-before, 2)
	v := load(t, r.process(), inThread("top", "m3"))
	expect(t, "gases of both", paco2s(v.Thread()), "40 50 60")
	q, _ := v.Thread().Pending()
	expect(t, "question of one", q != nil, true)
}

func TestManyProcessesLoseNothing(t *testing.T) {
	r := newRig()
	var wg sync.WaitGroup
	for i := range mostMessages {
		m := r.process()
		wg.Go(func() {
			v, err := m.Load(ctx, inThread("top", fmt.Sprintf("m%d", i)))
			if err != nil {
				t.Errorf("load: %v", err)
				return
			}
			v.Put(gas(fmt.Sprintf("m%d", i), float64(50+i)))
			if err := m.Save(ctx, v); err != nil {
				t.Errorf("save: %v", err)
			}
		})
	}
	wg.Wait()
	expect(t, "gases", len(load(t, r.process(), inThread("top", "x")).Thread().Entries()), mostMessages)
}

func TestEndlessConflictEnds(t *testing.T) {
	r := newRig()
	m := r.process()
	v := load(t, m, inThread("top", "m1"))
	v.Put(gas("m1", 50))
	n := 0
	r.tap.breakWith(func(ops []store.Op) (bool, error) {
		n++
		raw, _ := encodeThread(&Thread{asked: []shorthand.QuestionCode{"venous"}})
		if n%2 == 1 { // another process writes before each try
			_, err := r.tap.Do(ctx, ward.partition(), store.Op{Key: threadKey("top"), Value: raw, Tag: newTag()})
			return false, err
		}
		return false, nil
	})
	expect(t, "error", m.Save(ctx, v), ErrBusy)
}
