package memory

import (
	"testing"
	"time"
)

// The days on which the clocks change are public: the last Sundays of March
// and October in the European Union and the United Kingdom (Directive
// 2000/84/EC; Summer Time Act 1972 as amended), the second Sunday of March and
// the first of November in the United States (Energy Policy Act of 2005). Lord
// Howe Island moves by half an hour (IANA tz database).
func TestNextInTheHousesZone(t *testing.T) {
	for _, c := range []struct{ zone, clocks, after, want, why string }{
		{"Europe/London", "07:00", "2026-03-10T06:00:00Z", "2026-03-10T07:00:00Z", "winter"},
		{"Europe/London", "07:00", "2026-03-10T07:00:00Z", "2026-03-11T07:00:00Z", "the moment itself is over"},
		{"Europe/London", "07:00", "2026-07-10T05:59:00Z", "2026-07-10T06:00:00Z", "summer"},
		{"Europe/London", "07:00", "2026-03-28T07:00:00Z", "2026-03-29T06:00:00Z", "23 hours to the day of the change"},
		{"Europe/London", "07:00", "2026-10-24T06:00:00Z", "2026-10-25T07:00:00Z", "25 hours to the day of the change"},
		{"Europe/Berlin", "02:30", "2026-03-28T12:00:00Z", "2026-03-29T01:00:00Z", "skipped: at the moment of the change"},
		{"Europe/Berlin", "02:30", "2026-03-29T01:00:00Z", "2026-03-30T00:30:00Z", "skipped: not twice"},
		{"Europe/Berlin", "02:30", "2026-10-24T12:00:00Z", "2026-10-25T00:30:00Z", "twice: the first"},
		{"Europe/Berlin", "02:30", "2026-10-25T00:30:00Z", "2026-10-26T01:30:00Z", "twice: not the second"},
		{"America/New_York", "02:30", "2026-03-08T00:00:00Z", "2026-03-08T07:00:00Z", "skipped west of Greenwich"},
		{"America/New_York", "01:30", "2026-10-31T12:00:00Z", "2026-11-01T05:30:00Z", "twice west of Greenwich"},
		{"America/New_York", "01:30", "2026-11-01T05:30:00Z", "2026-11-02T06:30:00Z", "not the second one"},
		{"Australia/Lord_Howe", "02:15", "2026-10-03T00:00:00Z", "2026-10-03T15:30:00Z", "half an hour skipped"},
		{"Asia/Kolkata", "19:00", "2026-03-10T06:00:00Z", "2026-03-10T13:30:00Z", "half an hour off"},
		{"Pacific/Kiritimati", "07:00", "2026-03-10T18:00:00Z", "2026-03-11T17:00:00Z", "a day ahead"},
		{"", "07:00", "2026-03-10T06:00:00Z", "2026-03-10T07:00:00Z", "no zone"},
		{"Nowhere/Land", "07:00", "2026-03-10T06:00:00Z", "2026-03-10T07:00:00Z", "a zone that this machine lacks"},
	} {
		after, err := time.Parse(time.RFC3339, c.after)
		if err != nil {
			t.Fatal(err)
		}
		h := House{Zone: c.zone, ShiftEnds: []string{c.clocks}, Times: []string{c.clocks}}
		got, ok := h.ShiftEnd(after)
		if s := got.UTC().Format(time.RFC3339); !ok || s != c.want {
			t.Errorf("%s %s after %s (%s): %s, want %s", c.zone, c.clocks, c.after, c.why, s, c.want)
		}
		list, _ := h.NextList(after)
		expect(t, "list", list.Equal(got), true)
	}
}

func TestNextOfSeveral(t *testing.T) {
	h := House{Zone: "Europe/London", ShiftEnds: []string{"07:30", "19:30"}}
	at := base // 06:00
	for _, want := range []string{"10 07:30", "10 19:30", "11 07:30"} {
		next, ok := h.ShiftEnd(at)
		expect(t, "there is one", ok, true)
		expect(t, "shift end", next.Format("02 15:04"), want)
		at = next
	}
	if _, ok := (House{}).ShiftEnd(at); ok {
		t.Error("a house without shifts has an end of shift")
	}
	if _, ok := (House{Times: []string{"25:00"}}).NextList(at); ok {
		t.Error("an impossible clock time comes")
	}
}

// On no day of a year does a clock time come twice or not at all.
func TestEachClockTimeOnceADay(t *testing.T) {
	for _, zone := range []string{"Europe/London", "America/St_Johns", "Australia/Lord_Howe", "Africa/Casablanca", "America/Santiago"} {
		loc, err := time.LoadLocation(zone)
		if err != nil {
			t.Fatal(err)
		}
		for _, clock := range []string{"00:00", "00:30", "01:30", "02:00", "02:30", "03:00", "23:45"} {
			h := House{Zone: zone, Times: []string{clock}}
			at := time.Date(2026, 1, 1, 23, 50, 0, 0, loc)
			for day := 2; day < 366; day++ {
				next, _ := h.NextList(at)
				want := time.Date(2026, 1, day, 0, 0, 0, 0, time.UTC)
				if got := next.In(loc); got.YearDay() != want.YearDay() {
					t.Fatalf("%s %s after %s: %s, want it on %s", zone, clock, at.In(loc), got, want.Format("2 January"))
				}
				at = next
			}
		}
	}
}
