package bot_test

import (
	"fmt"
	"reflect"
	"strings"
	"testing"

	"galeward/bot/memory"
)

// What is exported is read back from the answer as it is shown.
func TestAnExportIsReadBack(t *testing.T) {
	d := newDesk(t)
	for _, line := range []string{"house units kPa", "house order ph co2 o2", "house altitude 1,600 m", "house target 88-92",
		"house co2 target 45-55", "house critical ph 7.15", "house zone europe/london", "house shift 07:00 19:00", "house editors managers everyone"} {
		d.say(line)
	}
	for i := range 60 {
		d.say(fmt.Sprintf("house word w%dx means nasal cannula %d L", i, i%6+1))
	}
	a := d.say("house export")
	for _, b := range a.Reply.Blocks {
		if strings.Contains(b.Text, "\n") || len(b.Text) > 500 {
			t.Errorf("a block of %d characters or several lines:\n%s", len(b.Text), b.Text)
		}
	}
	h, err := memory.DecodeHouse([]byte(a.Reply.Text()))
	if err != nil {
		t.Fatalf("%v in:\n%s", err, a.Reply.Text())
	}
	if len(h.Words) != 60 || h.Words["w7x"] != "nasal cannula 2 l" || h.Altitude != 1600 || h.Units != "kPa" || h.Critical.PHLow != 7.15 {
		t.Errorf("read back: %+v", h)
	}
	again, err := h.Encode()
	if err != nil {
		t.Fatal(err)
	}
	if h2, err := memory.DecodeHouse(again); err != nil || !reflect.DeepEqual(h, h2) {
		t.Errorf("the file form changes on its way: %v", err)
	}
}

func TestWhatOneLineSaysOfAStoreThatIsDown(t *testing.T) {
	for line, want := range map[string]string{
		"house history":   "The store does not answer: the history can't be read.",
		"house export":    "The store does not answer: the rules can't be exported.",
		"house units kPa": "The store does not answer: the rule was not stored.",
		"house restore 1": "The store does not answer: the rule was not stored.",
	} {
		r := newRoom()
		r.store.set(true)
		r.handle(typed("m1", line))
		if text := r.last(t).Reply.Text(); text != want {
			t.Errorf("%s:\n%s", line, text)
		}
	}
}

func TestHouseHistoryAndRestore(t *testing.T) {
	r := newRoom()
	for i, c := range []struct{ line, want string }{
		{"house history", "No house rule was changed yet"},
		{"house word npo2 means nasal cannula 2 L", "Own words: npo2 = nasal cannula 2 l."},
		{"house critical ph 7.15", "Critical limits: pH below 7.15"},
		{"house history", "critical.ph_low from not set to 7.15"},
		{"house restore 2x", "Which revision?"},
		{"house restore", "Which revision?"},
		{"house restore 1 2", "Which revision?"},
		{"house restore -1", "Which revision?"},
		{"house restore 9", "There is no such revision: 9. Nothing was changed."},
		{"house restore 1", "Critical limits (default): pH below 7.20"},
	} {
		r.handle(typed(fmt.Sprint("m", i), c.line))
		if text := r.last(t).Reply.Text(); !strings.Contains(text, c.want) {
			t.Errorf("%s: %q is missing in:\n%s", c.line, c.want, text)
		}
	}
}
