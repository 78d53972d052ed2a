package memory

import (
	"slices"
	"sync"
	"time"
	_ "time/tzdata" // house zones must be known in a container without a zone database
)

// zones are the time zones that were loaded: loading one reads a file, and
// every reading of a channel with shifts needs one.
var zones sync.Map // of *time.Location by name

// location is the house's time zone, UTC when none is set.
func (h House) location() *time.Location {
	if loc, ok := zones.Load(h.Zone); ok {
		return loc.(*time.Location)
	}
	loc, err := time.LoadLocation(h.Zone)
	if err != nil {
		return time.UTC
	}
	zones.Store(h.Zone, loc)
	return loc
}

// life is how long a gas of now is kept: to the end of the shift, or the usual
// life where the house names none.
func (h House) life(now time.Time, usual time.Duration) time.Duration {
	if end, ok := h.ShiftEnd(now); ok {
		return end.Sub(now)
	}
	return usual
}

// ShiftEnd gives the next end of a shift after a moment, and false when the
// house names none.
func (h House) ShiftEnd(after time.Time) (time.Time, bool) { return h.next(h.ShiftEnds, after) }

// NextList gives the next time of the list of beds after a moment, and false
// when the house names none.
func (h House) NextList(after time.Time) (time.Time, bool) { return h.next(h.Times, after) }

// next gives the first of some clock times after a moment, in the house's
// zone. A clock time that a change of the clock skips comes at the moment of
// the change; one that occurs twice counts once, the first time.
func (h House) next(clocks []string, after time.Time) (time.Time, bool) {
	loc := h.location()
	day := after.In(loc)
	var found []time.Time
	for offset := 0; offset <= 2; offset++ {
		for _, clock := range clocks {
			at, err := time.Parse("15:04", clock)
			if err != nil {
				continue
			}
			t := moment(day.Year(), day.Month(), day.Day()+offset, at.Hour(), at.Minute(), loc)
			if t.After(after) {
				found = append(found, t)
			}
		}
	}
	if len(found) == 0 {
		return time.Time{}, false
	}
	return slices.MinFunc(found, time.Time.Compare), true
}

// moment is the instant of a clock time on one day.
func moment(year int, month time.Month, day, hour, minute int, loc *time.Location) time.Time {
	t := time.Date(year, month, day, hour, minute, 0, 0, loc)
	start, end := t.ZoneBounds()
	if t.Hour() != hour || t.Minute() != minute { // skipped: time.Date gave a time on either side of the change
		if end.IsZero() || t.Sub(start) < end.Sub(t) {
			return start
		}
		return end
	}
	if !start.IsZero() { // the same clock time may have been shown before the last change
		_, now := t.Zone()
		_, before := start.Add(-time.Second).Zone()
		if earlier := t.Add(time.Duration(now-before) * time.Second); before > now && earlier.Before(start) {
			return earlier
		}
	}
	return t
}
