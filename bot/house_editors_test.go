package bot_test

import (
	"context"
	"strings"
	"testing"
	"time"

	"galeward/bot"
	"galeward/bot/memory"
	"galeward/bot/store"
)

const notAllowed = "These rules may be changed by named users only; nothing was changed."

// by is a typed line of one user.
func by(user string, manager bool, id, text string) bot.Event {
	e := typed(id, text)
	e.User, e.Manager = user, manager
	return e
}

func TestEditors(t *testing.T) {
	for _, c := range []struct {
		name    string
		manager bool
		line    string
		want    string
	}{
		{"me", false, "house editors me", "Rules may be changed by: named users (1)."},
		{"me and a colleague", false, "house editors me <@U0BEN77>", "Rules may be changed by: named users (2)."},
		{"ids", false, "house editors: u1, U0BEN77", "Rules may be changed by: named users (2)."},
		{"me and the managers", false, "house editors me and managers", "Rules may be changed by: channel managers and named users (1)."},
		{"another name", false, "house who may change me", "Rules may be changed by: named users (1)."},
		{"everyone", false, "house editors everyone", "Nothing to change"},
		{"managers, by one", true, "house editors managers", "Rules may be changed by: channel managers."},
		{"managers, by another", false, "house editors managers", "You would not be able to change these rules again; nothing was changed."},
		{"others only", false, "house editors U0BEN77", "You would not be able to change these rules again; nothing was changed."},
		{"a name", false, "house editors me ben", "Everyone, managers, me or user ids are expected."},
		{"everyone and one", false, "house editors everyone me", "Everyone stands alone."},
		{"nobody", false, "house editors", "Who may change the rules?"},
	} {
		r := newRoom()
		r.handle(by("u1", c.manager, "m1", c.line))
		text := r.last(t).Reply.Text()
		if !strings.Contains(text, c.want) {
			t.Errorf("%s: %q is missing in:\n%s", c.name, c.want, text)
		}
		if strings.Contains(strings.ToLower(text), "ben") {
			t.Errorf("%s: an id or a name is told:\n%s", c.name, text)
		}
	}
}

func TestOnlyEditorsChangeAndRestore(t *testing.T) {
	r := newRoom()
	r.handle(by("u1", false, "m1", "house altitude 1600 m"))
	r.handle(by("u1", false, "m2", "house editors me"))
	for id, line := range map[string]string{"m3": "house units kPa", "m4": "house restore 1", "m5": "house editors everyone"} {
		r.handle(by("u2", true, id, line))
		if text := r.last(t).Reply.Text(); text != notAllowed {
			t.Errorf("%s by another:\n%s", line, text)
		}
	}
	r.handle(by("u1", false, "m6", "house units kPa"))
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "Stored as revision 3") {
		t.Errorf("by the editor:\n%s", text)
	}
	r.handle(by("u1", false, "m7", "house history"))
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "editors from everyone to named users (1)") || strings.Contains(text, "u1") {
		t.Errorf("the history does not count editors, or names them:\n%s", text)
	}
}

func TestARestoreLocksNobodyOut(t *testing.T) {
	r := newRoom()
	r.handle(by("u1", false, "m1", "house editors me"))
	r.handle(by("u1", false, "m2", "house editors everyone"))
	r.handle(by("u2", false, "m3", "house restore 1"))
	if text := r.last(t).Reply.Text(); !strings.Contains(text, "You would not be able") {
		t.Errorf("u2 restored rules that only u1 may change:\n%s", text)
	}
}

// meddler lets someone else act between the reading of the event and the
// change: in front of the n-th round trip.
type meddler struct {
	store.Store
	n      int
	before func()
}

func (m *meddler) Do(ctx context.Context, partition string, ops ...store.Op) ([]store.Item, error) {
	if m.n--; m.n == 0 {
		m.before()
	}
	return m.Store.Do(ctx, partition, ops...)
}

// Who may change is asked of the rules that the store holds at the change, not
// of those that were loaded with the event.
func TestTheRightToChangeIsAskedAtTheChange(t *testing.T) {
	for _, line := range []string{"house units kPa", "house restore 1"} {
		r := newRoom()
		r.handle(by("u1", false, "m1", "house altitude 1600 m"))
		clock := func() time.Time { return r.now }
		late := &meddler{Store: r.store, n: 2, before: func() { r.handle(by("u1", false, "m2", "house editors me")) }}
		other := bot.New(bot.Options{Memory: memory.New(late, memory.Options{Now: clock}), Now: clock})
		other.Handle(context.Background(), by("u2", false, "m3", line), r)
		if text := r.last(t).Reply.Text(); text != notAllowed {
			t.Errorf("%s after the rules were closed:\n%s", line, text)
		}
	}
}
