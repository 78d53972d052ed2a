package bot

import (
	"cmp"
	"strings"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// complete adds to a gas or corrects it: the result stands in its place.
func (t *turn) complete(c *composer, parent kin) {
	g := parent.Gas
	add := c.gas
	if retyped(add) {
		again := *add
		again.Follow, again.Bed = shorthand.FollowAddition, cmp.Or(add.Bed, g.Bed)
		c.notices = append(c.notices, earlierVoid)
		*c.gas, c.replaces = again, &parent
		return
	}
	otherOxygen(&g.Sample, &add.Sample)
	if add.Follow != shorthand.FollowCorrection {
		if replaced := replacedSettings(&g.Sample, &add.Sample); replaced != "" {
			c.notices = append(c.notices, replaced)
		}
	}
	g.Sample.Values.Merge(&add.Sample.Values)
	mergeWords(&g.Sample, &add.Sample)
	if add.Bed != "" {
		g.Bed = add.Bed
	}
	if add.Target != nil {
		g.Target = add.Target
	}
	if add.UsualPaCO2 > 0 {
		g.UsualPaCO2 = add.UsualPaCO2
	}
	g.Notes = append(append([]shorthand.Note(nil), g.Notes...), add.Notes...)
	g.Questions = append(openDoubts(&g, add), add.Questions...)
	g.Follow = shorthand.FollowAddition
	if add.Follow == shorthand.FollowCorrection {
		c.notices = append(c.notices, earlierVoid)
	} else if added := c.added(add); added != "" {
		c.notices = append(c.notices, addedText+added+".")
	}
	*c.gas, c.replaces = g, &parent
}

// oxygenSaid says that a line tells of the oxygen.
func oxygenSaid(s *physio.Sample) bool {
	return s.Has(physio.FiO2) || s.Has(physio.OxygenFlow) || s.Device != physio.DeviceUnstated
}

// retyped says that a correction brings a whole gas with its oxygen: nothing
// of the gas before belongs to it, which may have been another patient's.
func retyped(add *shorthand.Gas) bool {
	return add.Follow == shorthand.FollowCorrection && add.Sample.Has(physio.PHq, physio.PaCO2, physio.PaO2) && oxygenSaid(&add.Sample)
}

// ownGas says that what looks like an addition is another gas: it brings both
// pressures anew, or bedside values on another oxygen.
func ownGas(add, before *shorthand.Gas) bool {
	if add.Follow != shorthand.FollowAddition {
		return false
	}
	a, b := &add.Sample, &before.Sample
	if a.Has(physio.PaCO2, physio.PaO2) && b.Has(physio.PaCO2, physio.PaO2) {
		return true
	}
	bedside := a.Has(physio.SpO2) || a.Has(physio.EtCO2) || a.Has(physio.TcCO2)
	return bedside && oxygenSaid(a) && oxygenSaid(b) && !sameOxygen(a, b)
}

func sameOxygen(a, b *physio.Sample) bool {
	return a.Val(physio.FiO2) == b.Val(physio.FiO2) && a.Val(physio.OxygenFlow) == b.Val(physio.OxygenFlow) && a.Device == b.Device
}

// otherOxygen takes away from s the oxygen that an addition replaces.
func otherOxygen(s, add *physio.Sample) {
	switch {
	case !oxygenSaid(add):
	case add.Device == physio.Air:
		s.Drop(physio.FiO2, physio.OxygenFlow)
	default:
		if s.Device == physio.Air {
			s.Device = physio.DeviceUnstated
		}
		if !add.Has(physio.FiO2) {
			s.Drop(physio.FiO2)
		}
	}
}

// added names what an addition brings, since it may have been meant for
// another gas.
func (c *composer) added(add *shorthand.Gas) string {
	var parts []string
	add.Sample.Each(func(q physio.Quantity, v float64) {
		if q == physio.FiO2 && add.Sample.Device == physio.Air {
			return // the word says it
		}
		parts = append(parts, q.Info().Symbol+" "+c.n.value(q, v))
	})
	for _, word := range []string{deviceWord[add.Sample.Device], bloodWord[add.Sample.Blood]} {
		if word != "" {
			parts = append(parts, word)
		}
	}
	return strings.Join(parts, ", ")
}

// replacedSettings names the settings that an addition puts in place of others:
// one that was changed after the gas was drawn does not belong to it.
func replacedSettings(s, add *physio.Sample) string {
	var names []string
	for _, q := range []physio.Quantity{physio.FiO2, physio.OxygenFlow, physio.RR, physio.RRSet, physio.VT, physio.VE, physio.PEEP} {
		before, had := s.Get(q)
		if now, ok := add.Get(q); had && ok && now != before {
			names = append(names, q.Info().Symbol)
		}
	}
	if len(names) == 0 {
		return ""
	}
	return strings.Join(names, ", ") + " replaced as a correction: if it was changed after this gas, the efficiency does not hold."
}

func mergeWords(s, add *physio.Sample) {
	if add.Blood != physio.BloodUnstated && add.Blood != physio.NoBlood {
		s.Blood, s.Site = add.Blood, add.Site
	}
	if add.Device != physio.DeviceUnstated {
		s.Device, s.DeviceTaken = add.Device, add.DeviceTaken
	}
	if add.Mode != physio.ModeUnstated {
		s.Mode = add.Mode
	}
	if add.Sex != physio.SexUnstated {
		s.Sex = add.Sex
	}
	if add.Population != physio.PopulationUnstated {
		s.Population, s.Trimester = add.Population, add.Trimester
	}
	s.Circumstance |= add.Circumstance
}
