package bot_test

import (
	"context"
	"strings"
	"testing"

	"galeward/bot"
)

func (r *room) say(id, text string) bot.Post {
	r.handle(typed(id, text))
	return r.posts[len(r.posts)-1]
}

func (r *room) press(id, token string) bot.Post {
	e := typed(id, "")
	e.Kind, e.Token = bot.Pressed, token
	r.handle(e)
	return r.posts[len(r.posts)-1]
}

// What an addition without a bed is about can not be known after a list of
// beds: it is asked, and nothing changes.
func TestAnAdditionAfterAListNamesItsBed(t *testing.T) {
	list := "bed 3 7.28/58/62/27 40%\nbed 4 7.40/41/88/25 30%\nbed 7 7.31/36/70/18"
	r := newRoom()
	r.say("m1", list)
	for id, line := range map[string]string{"m2": "on 50%", "m3": "correction hco3 26", "m4": "why", "m5": "now 7.33/50/66"} {
		p := r.say(id, line)
		if text := p.Reply.Text(); !strings.Contains(text, "Which bed: 3, 4, 7?") {
			t.Errorf("%q after a list:\n%s", line, text)
		}
	}
	p := r.say("m6", "bed 7 on 35%")
	if text := p.Reply.Text(); !strings.Contains(text, "PaCO2 36") || !strings.Contains(text, "35 %") {
		t.Errorf("the addition to bed 7 answered:\n%s", text)
	}
	p = r.say("m7", "why bed 3")
	if text := p.Reply.Text(); !strings.Contains(text, "58") {
		t.Errorf("bed 3 was lost by the addition to bed 7:\n%s", text)
	}
	if text := r.say("m8", "bed 9 on 35%").Reply.Text(); !strings.Contains(text, "Which bed") {
		t.Errorf("an addition to a bed that is not in the list:\n%s", text)
	}
}

func TestAListShowsNoButtons(t *testing.T) {
	r := newRoom()
	if p := r.say("m1", "bed 3 7.28/58/62/27\nbed 4 7.40/41/88/25 30%"); len(p.Reply.Buttons) > 0 {
		t.Errorf("buttons of a list: %+v", p.Reply.Buttons)
	}
}

// A gas that was completed stands in the place of what it completes: taking the
// question away takes the completed gas away.
func TestACompletedGasGoesWithItsQuestion(t *testing.T) {
	r := newRoom()
	r.say("m1", "7.28/58/62/27")
	if text := r.say("m2", "on 40%").Reply.Text(); !strings.Contains(text, "P/F") {
		t.Fatalf("the addition was not used:\n%s", text)
	}
	e := typed("m1", "")
	e.Kind, e.Delivery = bot.Deleted, "m1:gone"
	r.handle(e)
	if text := r.say("m3", "why").Reply.Text(); !strings.Contains(text, "Which gas") {
		t.Errorf("the completed gas outlived its question:\n%s", text)
	}
}

func TestAButtonAnswersItsOwnQuestionOnly(t *testing.T) {
	r := newRoom()
	p := r.say("m1", "7.28/58/62/27")
	if len(p.Reply.Buttons) == 0 {
		t.Fatalf("no buttons under a question with choices:\n%s", p.Reply.Text())
	}
	token := p.Reply.Buttons[0].Token
	if text := r.press("p1", token).Reply.Text(); !strings.Contains(text, "PaCO2 58") || strings.Contains(text, "closed") {
		t.Fatalf("the button %q answered:\n%s", token, text)
	}
	for id, stale := range map[string]string{"p2": token, "p3": "m9|x|room air", "p4": "7.40/40/95/24", "p5": "forget", "p6": ""} {
		p := r.press(id, stale)
		if !strings.Contains(p.Reply.Text(), "closed") || p.For != "u1" {
			t.Errorf("the stale button %q answered to %q:\n%s", stale, p.For, p.Reply.Text())
		}
	}
	if text := r.say("m5", "why").Reply.Text(); strings.Contains(text, "Which gas") {
		t.Error("a stale button changed what is remembered")
	}
}

// A doubt stays open until it is answered, whatever else is added.
func TestAnAdditionKeepsAnOpenDoubt(t *testing.T) {
	r := newRoom()
	first := r.say("m1", "7.28/62/58/24").Reply
	if first.Text() == "" || len(first.Buttons) == 0 {
		t.Fatalf("no doubt about pressures that fit the other way round only:\n%s", first.Text())
	}
	if text := r.say("m2", "on 40%").Reply.Text(); !strings.Contains(text, "HCO3") || !strings.Contains(text, "?") {
		t.Errorf("the doubt went with the addition of oxygen:\n%s", text)
	}
}

func TestAnEditIntoChatterTakesOnlyItsOwnGas(t *testing.T) {
	r := newRoom()
	e := typed("t", "7.28/58/62/27 40%")
	e.Where.Thread = ""
	e.Can |= bot.CanThread
	r.handle(e)
	r.say("m2", "now 7.33/49/70 same settings")
	e.Kind, e.Delivery, e.Text = bot.Edited, "t:edit", "thanks all"
	r.handle(e)
	if text := r.say("m3", "why").Reply.Text(); !strings.Contains(text, "49") {
		t.Errorf("the thread went with the edit of its first message:\n%s", text)
	}
}

func TestNotKnownRulesMakeAnAnswerPrivate(t *testing.T) {
	r := newRoom()
	r.store.set(true)
	if p := r.say("m1", "7.28/58/62/27 40%"); p.For != "u1" {
		t.Errorf("with unknown rules the answer went to %q, want the asker alone", p.For)
	}
	if text := r.say("m2", "forget").Reply.Text(); !strings.Contains(text, "nothing was forgotten") {
		t.Errorf("forget during an outage:\n%s", text)
	}
}

func TestTheStandingNoticeWaitsForAnAnswerThatCarriesIt(t *testing.T) {
	r := newRoom()
	r.say("m1", "help")
	if text := r.say("m2", "7.28/58/62/27 40%").Reply.Text(); !strings.Contains(text, "aid for trained staff") {
		t.Errorf("help used the notice up:\n%s", text)
	}
}

func TestWhatWasAnsweredIsSavedThoughTheEventIsCalledOff(t *testing.T) {
	r := newRoom()
	ctx, cancel := context.WithCancel(context.Background())
	r.bot.Handle(ctx, typed("m1", "7.28/58/62/27 40%"), cancelling{r.hall, cancel})
	if text := r.say("m2", "why").Reply.Text(); strings.Contains(text, "Which gas") {
		t.Errorf("the gas was not saved:\n%s", text)
	}
}

// cancelling calls the event off once its answer was posted, as a shutdown does.
type cancelling struct {
	*hall
	cancel context.CancelFunc
}

func (c cancelling) Deliver(ctx context.Context, p bot.Post) (bot.Ref, error) {
	defer c.cancel()
	return c.hall.Deliver(ctx, p)
}

func TestAFollowUpDoesNotAskTheSameAgain(t *testing.T) {
	r := newRoom()
	if text := r.say("m1", "7.28/58/62/27").Reply.Text(); !strings.Contains(text, "?") {
		t.Fatalf("the oxygen was not asked for:\n%s", text)
	}
	if text := r.say("m2", "now 7.33/49/70").Reply.Text(); strings.Contains(text, "?") {
		t.Errorf("the oxygen was asked for twice:\n%s", text)
	}
	if text := r.say("m3", "room air").Reply.Text(); !strings.Contains(text, "PaCO2 49") || !strings.Contains(text, "air") {
		t.Errorf("the question that was not repeated can not be answered:\n%s", text)
	}
}
