package memory

import (
	"maps"
	"slices"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// House holds the rules of one channel. The zero House is the default channel:
// every field left empty means "not set".
type House struct {
	// Units is the unit in which gas pressures are read and shown, "" for mmHg.
	Units shorthand.Units
	// Order is the order of unlabelled values, nil for the usual one.
	Order []physio.Quantity
	// Words are the channel's own abbreviations in lower case with the text
	// that each stands for.
	Words map[string]string
	// PB is the barometric pressure in mmHg (450 to 800), 0 when not set.
	PB float64
	// Altitude is the height above sea level in metres (-430 to 6000), 0 when
	// not set.
	Altitude float64
	// Population is who lies here, "" for adults.
	Population physio.Population
	// Target is the saturation target as fractions, nil when none is set.
	Target *physio.Target
	// TargetPaCO2 bounds the wanted PaCO2 in mmHg, nil when none is set.
	TargetPaCO2 *physio.Span
	// Critical are the channel's critical limits, nil for the defaults.
	Critical *physio.CriticalLimits
	// Private shows answers to the asker only.
	Private bool
	// Listen reads bare gases in the channel, without a command or mention.
	Listen bool
	// Zone is the IANA name of the time zone, "" when not set.
	Zone string
	// Times are the clock times ("07:00") of the list of beds.
	Times []string
	// ShiftEnds are the clock times at which a shift ends and its gases go.
	ShiftEnds []string
	// Editors may change these rules: user ids, or Managers for the platform's
	// channel managers; nil for everyone.
	Editors []string
}

// Managers stands in House.Editors for the platform's channel managers.
const Managers = "managers"

// Habits gives what the rules add to the reading of a line. The caller adds
// Addressed, Earlier and Pending.
func (h House) Habits() shorthand.Habits {
	return shorthand.Habits{Units: h.Units, Order: h.Order, Words: h.Words, Setting: h.Setting()}
}

// Setting gives what the rules set around a sample.
func (h House) Setting() physio.Setting {
	return physio.Setting{
		Population: h.Population, PB: h.PB, Altitude: h.Altitude,
		Target: h.Target, TargetPaCO2: h.TargetPaCO2, Critical: h.Critical,
	}
}

// MayChange says whether a user, who may be a channel manager on the platform,
// may change the rules.
func (h House) MayChange(user string, manager bool) bool {
	if len(h.Editors) == 0 {
		return true
	}
	return slices.Contains(h.Editors, user) && user != Managers ||
		manager && slices.Contains(h.Editors, Managers)
}

// Clone copies the rules, so that a change to the copy leaves h as it is.
func (h House) Clone() House {
	h.Order = slices.Clone(h.Order)
	h.Words = maps.Clone(h.Words)
	h.Times = slices.Clone(h.Times)
	h.ShiftEnds = slices.Clone(h.ShiftEnds)
	h.Editors = slices.Clone(h.Editors)
	h.Target = copied(h.Target)
	h.TargetPaCO2 = copied(h.TargetPaCO2)
	h.Critical = copied(h.Critical)
	return h
}

func copied[T any](p *T) *T {
	if p == nil {
		return nil
	}
	v := *p
	return &v
}
