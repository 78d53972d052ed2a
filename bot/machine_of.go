package bot

import (
	"galeward/bot/reply"
	"galeward/physio"
)

// machine puts a composed gas into its machine form.
func (c *composer) machine(r reply.Reply) Machine {
	a := c.a
	m := Machine{
		V: MachineVersion, Kind: "reading", Headline: headlineOf(r), Text: r.Text(),
		Values: c.machineValues(), Intervals: c.machineIntervals(),
		Sample: string(a.Blood), SampleAssumed: a.BloodAssumed,
		Device: string(c.gas.Sample.Device), Mode: string(c.gas.Sample.Mode),
		Population: string(a.Population), Bed: c.gas.Bed, Time: c.gas.Time,
		Problem: string(a.Problem),
	}
	for _, q := range a.Critical {
		m.Critical = append(m.Critical, q.Key())
	}
	for _, n := range c.gas.Notes {
		m.Notes = append(m.Notes, MachineText{ID: noteID(string(n.Code), n.Typed), Text: c.noteText(n)})
	}
	for _, caution := range a.Cautions {
		m.Cautions = append(m.Cautions, MachineText{ID: string(caution.Code), Text: c.cautionSentence(caution.Code)})
	}
	for _, l := range a.Missing {
		m.Missing = append(m.Missing, l.Quantity.Key())
	}
	for _, mech := range a.Mechanism {
		m.Mechanism = append(m.Mechanism, string(mech))
	}
	c.machineAxes(&m)
	m.Indices = c.machineIndices()
	if q := c.question; q != nil {
		m.Question = &MachineQuestion{ID: q.id, Text: q.text, Choices: q.choices}
	}
	return m
}

// noteID joins a note's code and what was typed: read_ph_728 is found again
// by its parts.
func noteID(code, typed string) string {
	if typed == "" {
		return code
	}
	return code + "_" + typed
}

func headlineOf(r reply.Reply) string {
	for _, b := range r.Blocks {
		if b.Kind == reply.Headline {
			return b.Text
		}
	}
	return ""
}

func (c *composer) machineValues() map[string]any {
	out := make(map[string]any)
	c.gas.Sample.Each(func(q physio.Quantity, v float64) { out[q.Key()] = machineNumber(v) })
	if c.a.Oxygen.Known {
		out[physio.FiO2.Key()] = machineNumber(c.a.Oxygen.FiO2.Value)
	}
	if c.gas.Sample.Sex != physio.SexUnstated {
		out["sex"] = string(c.gas.Sample.Sex)
	}
	if c.gas.Bed != "" {
		out["bed"] = c.gas.Bed
	}
	return out
}

func (c *composer) machineIntervals() map[string][2]float64 {
	o := c.a.Oxygen
	if !o.Known || !o.Estimated {
		return nil
	}
	return map[string][2]float64{physio.FiO2.Key(): {machineNumber(o.FiO2.Low), machineNumber(o.FiO2.High)}}
}

func (c *composer) machineAxes(m *Machine) {
	v, o, ab := c.a.Ventilation, c.a.Oxygenation, c.a.AcidBase
	m.Ventilation = &MachineVentilation{
		Level: string(v.Level), Efficiency: string(v.Efficiency), Need: string(ab.Need), Borderline: v.Borderline,
	}
	m.Oxygenation = &MachineOxygenation{
		Level: string(o.Level), Efficiency: string(o.Efficiency), AgainstTarget: string(o.AgainstTarget),
		ExpectedHere: o.ExpectedHere, Borderline: o.Borderline,
	}
	if o.Target != nil {
		m.Oxygenation.Target = &[2]float64{o.Target.Low, o.Target.High}
	}
	m.AcidBase = &MachineAcidBase{
		Primary: string(ab.Primary), Course: string(ab.Course), Compensation: string(ab.Compensation), Gap: string(ab.Gap),
	}
	for _, p := range ab.Also {
		m.AcidBase.Also = append(m.AcidBase.Also, string(p))
	}
}

func (c *composer) machineIndices() map[string]MachineIndex {
	out := make(map[string]MachineIndex, len(c.a.Indices))
	for _, ix := range c.a.Indices {
		if !finite(ix.Value, ix.Low, ix.High) {
			continue // absent things are left out
		}
		out[ix.Key] = MachineIndex{
			Value: machineNumber(ix.Value), Low: machineNumber(ix.Low), High: machineNumber(ix.High), Unit: ix.Unit,
		}
	}
	return out
}
