package bot_test

import (
	"context"
	"errors"
	"strings"
	"sync"
	"testing"
	"time"

	"galeward/adapters/memstore"
	"galeward/bot"
	"galeward/bot/memory"
	"galeward/bot/store"
)

// hall is a way that keeps what was delivered.
type hall struct {
	mu    sync.Mutex
	posts []bot.Post
	fail  error
}

func (h *hall) Deliver(_ context.Context, p bot.Post) (bot.Ref, error) {
	h.mu.Lock()
	defer h.mu.Unlock()
	if h.fail != nil {
		return "", h.fail
	}
	h.posts = append(h.posts, p)
	if p.Amends != "" {
		return p.Amends, nil
	}
	return bot.Ref("post-" + p.Key), nil
}

func (h *hall) last(t *testing.T) bot.Post {
	t.Helper()
	h.mu.Lock()
	defer h.mu.Unlock()
	if len(h.posts) == 0 {
		t.Fatal("nothing was delivered")
	}
	return h.posts[len(h.posts)-1]
}

func (h *hall) count() int {
	h.mu.Lock()
	defer h.mu.Unlock()
	return len(h.posts)
}

// counted counts the round trips to a store, and can break it.
type counted struct {
	store.Store
	mu    sync.Mutex
	calls int
	down  bool
}

var errBroken = errors.New("broken")

func (c *counted) Do(ctx context.Context, partition string, ops ...store.Op) ([]store.Item, error) {
	c.mu.Lock()
	c.calls++
	down := c.down
	c.mu.Unlock()
	if down {
		return nil, errBroken
	}
	return c.Store.Do(ctx, partition, ops...)
}

func (c *counted) set(down bool) { c.mu.Lock(); c.down = down; c.mu.Unlock() }

func (c *counted) reset() { c.mu.Lock(); c.calls = 0; c.mu.Unlock() }

func (c *counted) n() int { c.mu.Lock(); defer c.mu.Unlock(); return c.calls }

type room struct {
	*hall
	store *counted
	bot   *bot.Bot
	now   time.Time
}

func newRoom() *room {
	r := &room{hall: &hall{}, store: &counted{Store: memstore.New(nil)}, now: noon}
	r.bot = r.another()
	return r
}

// another is a second process on the same store.
func (r *room) another() *bot.Bot {
	clock := func() time.Time { return r.now }
	return bot.New(bot.Options{Memory: memory.New(r.store, memory.Options{Now: clock}), Now: clock})
}

func typed(id, text string) bot.Event {
	return bot.Event{
		Kind: bot.Typed, Delivery: id, Message: id, Text: text, User: "u1", At: noon, Addressed: true,
		Where: bot.Place{Platform: "test", Workspace: "w", Channel: "c", Thread: "t"},
		Can:   bot.CanAmend | bot.CanPrivate,
	}
}

func (r *room) handle(e bot.Event) { r.bot.Handle(context.Background(), e, r) }

func TestAQuestionIsAnsweredOnceAlsoByTwoProcesses(t *testing.T) {
	r := newRoom()
	e := typed("m1", "7.28/58/62/27 40%")
	r.handle(e)
	r.handle(e)
	r.another().Handle(context.Background(), e, r)
	if n := r.count(); n != 1 {
		t.Fatalf("%d answers to one question", n)
	}
}

func TestTwoRoundTripsAReading(t *testing.T) {
	r := newRoom()
	r.handle(typed("m1", "7.28/58/62/27 40%"))
	r.store.reset()
	r.handle(typed("m2", "7.31/54/66/27 40%"))
	if n := r.store.n(); n != 2 {
		t.Errorf("%d round trips a reading, want 2", n)
	}
}

func TestAnEditedQuestionAmendsItsAnswer(t *testing.T) {
	r := newRoom()
	r.handle(typed("m1", "7.28/58/62/27 40%"))
	first := r.last(t)
	e := typed("m1", "7.28/68/62/31 40%")
	e.Kind, e.Delivery = bot.Edited, "m1:edit"
	r.handle(e)
	p := r.last(t)
	if p.Amends != bot.Ref("post-"+first.Key) {
		t.Errorf("the edit amends %q", p.Amends)
	}
	if !strings.Contains(p.Reply.Text(), "PaCO2 68") {
		t.Errorf("the amended answer reads the old line:\n%s", p.Reply.Text())
	}
}

func TestADeletedQuestionTakesItsGasWithIt(t *testing.T) {
	r := newRoom()
	r.handle(typed("m1", "7.28/58/62/27 40%"))
	e := typed("m1", "")
	e.Kind, e.Delivery = bot.Deleted, "m1:gone"
	r.handle(e)
	if p := r.last(t); p.Amends == "" || strings.Contains(p.Reply.Text(), "58") {
		t.Errorf("the answer was not withdrawn: %+v", p)
	}
	r.handle(typed("m2", "why"))
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "Which gas") {
		t.Errorf("the deleted gas is still remembered:\n%s", text)
	}
}

func TestAStoreThatIsDownNeverStopsAnAnswer(t *testing.T) {
	r := newRoom()
	r.handle(typed("m1", "house units kPa"))
	r.store.set(true)
	r.handle(typed("m2", "7.28/7.7/8.3/26 40%"))
	text := r.last(t).Reply.Text()
	if !strings.Contains(text, "store does not answer") || !strings.Contains(text, "7.7") {
		t.Errorf("the answer does not say that the store is down, or lost the house units:\n%s", text)
	}
	r.handle(typed("m3", "house units mmHg"))
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "not stored") || strings.Contains(text, "Stored") {
		t.Errorf("a change during an outage:\n%s", text)
	}
	r.store.set(false)
	r.now = r.now.Add(time.Minute)
	r.handle(typed("m4", "7.28/7.7/8.3/26 40%"))
	if text := r.last(t).Reply.Text(); strings.Contains(text, "does not answer") {
		t.Errorf("not recovered:\n%s", text)
	}
}

func TestHouseRulesBelongToOneChannel(t *testing.T) {
	r := newRoom()
	r.handle(typed("m1", "house units kPa"))
	e := typed("m2", "7.28/58/62/27 40%")
	e.Where.Channel = "other"
	r.handle(e)
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "62 mmHg") {
		t.Errorf("another channel's units changed:\n%s", text)
	}
	r.handle(typed("m3", "7.28/58/62/27 40%"))
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "8.3 kPa") || !strings.Contains(text, "mmHg") {
		t.Errorf("the channel's own units are not used, or the other unit is not said:\n%s", text)
	}
}

func TestWhatIsNotMeantIsNotRead(t *testing.T) {
	r := newRoom()
	e := typed("m1", "7.28/58/62/27 40%")
	e.Addressed = false
	r.handle(e)
	if r.count() != 0 {
		t.Fatal("a bare gas in a channel that does not listen was answered")
	}
	r.handle(typed("m2", "house listen on"))
	e.Delivery, e.Message = "m3", "m3"
	r.handle(e)
	if r.count() != 2 {
		t.Error("a bare gas in a listening channel was not answered")
	}
}

func TestPrivateAnswersGoToOneUser(t *testing.T) {
	r := newRoom()
	r.handle(typed("m1", "house private on"))
	r.handle(typed("m2", "7.28/58/62/27 40%"))
	if p := r.last(t); p.For != "u1" {
		t.Errorf("private answer for %q", p.For)
	}
	if !r.bot.Private(bot.Place{Platform: "test", Workspace: "w", Channel: "c"}) {
		t.Error("privacy is not known before the first acknowledgement")
	}
}

func TestTheStandingNoticeComesOnce(t *testing.T) {
	r := newRoom()
	r.handle(typed("m1", "7.28/58/62/27 40%"))
	first := r.last(t).Reply.Text()
	r.handle(typed("m2", "7.31/54/66/27 40%"))
	second := r.last(t).Reply.Text()
	if !strings.Contains(first, "aid for trained staff") || strings.Contains(second, "aid for trained staff") {
		t.Error("the standing notice belongs to a user's first answer only")
	}
}

func TestIdentifiersLeaveNothingBehind(t *testing.T) {
	r := newRoom()
	r.handle(typed("m1", "MRN 0012345 7.28/58/62/27"))
	p := r.last(t)
	if text := p.Reply.Text(); strings.Contains(text, "0012345") || strings.Contains(text, "7.28") {
		t.Errorf("the refusal repeats the line:\n%s", text)
	}
	r.handle(typed("m2", "why"))
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "Which gas") {
		t.Errorf("something of the refused line was kept:\n%s", text)
	}
}

func TestAfterADeliveryThatFailedTheNoticeIsStillDue(t *testing.T) {
	r := newRoom()
	r.fail = errors.New("platform down")
	r.handle(typed("m1", "7.28/58/62/27 40%"))
	if r.count() != 0 {
		t.Fatal("delivered")
	}
	r.fail = nil
	r.handle(typed("m2", "7.31/54/66/27 40%"))
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "aid for trained staff") {
		t.Errorf("the notice went with the answer that was never seen:\n%s", text)
	}
}
