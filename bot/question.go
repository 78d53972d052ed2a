package bot

import (
	"strings"

	"galeward/bot/shorthand"
	"galeward/physio"
)

func replaceAll(s string, oldnew ...string) string {
	return strings.NewReplacer(oldnew...).Replace(s)
}

// chooseQuestion picks the one question: a doubt about what was typed comes
// before the sample, the sample before the oxygen. Only a question whose
// answer would change a verdict is asked.
func (c *composer) chooseQuestion() *asked {
	if len(c.gas.Questions) > 0 {
		return c.typedQuestion(&c.gas.Questions[0])
	}
	if c.question != nil {
		return c.question
	}
	return c.assessedQuestion()
}

// askedOnce holds a question back that a follow-up would ask again. A doubt
// about what was typed is asked until it is answered.
func (c *composer) askedOnce(q *asked) *asked {
	if q == nil || q.from == nil || c.said == nil || len(c.gas.Questions) > 0 || !c.said(q.from.Code) {
		return q
	}
	c.unsaid = q
	return nil
}

func (c *composer) typedQuestion(q *shorthand.Question) *asked {
	choices := make([]string, len(q.Choices))
	for i, choice := range q.Choices {
		choices[i] = choice.Word
	}
	text := c.filled(questionTemplates[q.Code], q.Quantity, q.Typed, q.Value)
	if q.Code == shorthand.AskSwap {
		text = c.swapText(q)
	}
	return &asked{id: string(q.Code), text: withChoices(text, choices), choices: choices, from: q}
}

// swapText spells both readings of two pressures out.
func (c *composer) swapText(q *shorthand.Question) string {
	readings := make([]string, 0, len(q.Choices))
	for _, choice := range q.Choices {
		pco2, ok1 := choice.Set.Get(physio.PaCO2)
		pao2, ok2 := choice.Set.Get(physio.PaO2)
		if ok1 && ok2 {
			readings = append(readings, "PaCO2 "+c.n.pressure(pco2)+" and PaO2 "+c.n.pressure(pao2)+" ("+choice.Word+")")
		}
	}
	if len(readings) < 2 {
		return c.filled(questionTemplates[q.Code], q.Quantity, q.Typed, q.Value)
	}
	return "HCO3 fits only one way round: " + strings.Join(readings, ", or ") + "?"
}

// withChoices spells the choices out where the sentence does not.
func withChoices(text string, choices []string) string {
	var missing []string
	for _, w := range choices {
		if !strings.Contains(strings.ToLower(text), strings.ToLower(w)) {
			missing = append(missing, w)
		}
	}
	if len(missing) < 2 {
		return text
	}
	return text + " (" + strings.Join(choices, " / ") + ")"
}

func (c *composer) assessedQuestion() *asked {
	a, s := c.a, &c.gas.Sample
	switch {
	case a.Raised(physio.CautionVenousLikely), a.Raised(physio.CautionVenousPossible):
		return c.bloodQuestion()
	case s.Circumstance.Has(physio.CPR):
		return nil // nothing is asked in a resuscitation
	case s.Circumstance.Has(physio.SmokeOrCO) && !s.Has(physio.COHb) && a.Oxygenation.Level == physio.DegreeUnknown:
		return &asked{id: askCOHb, text: askCOHbText}
	case a.Blood == physio.BloodUncertain && !s.Has(physio.SpO2):
		return &asked{id: askSpO2, text: askSpO2Text}
	case a.Raised(physio.CautionHyperbaric) && !s.Has(physio.PB, physio.FiO2):
		return &asked{id: askChamber, text: askChamberText}
	case c.oxygenWanted():
		return c.oxygenQuestion()
	case a.Blood == physio.Arterial && !s.Circumstance.Has(physio.ECMO) && !s.Has(physio.PaO2) && s.Has(physio.PHq, physio.PaCO2) && a.Oxygenation.Level == physio.DegreeUnknown:
		return &asked{id: askPaO2, text: askPaO2Text}
	case s.Has(physio.VTPerKg) && !s.Has(physio.PBW) && s.Sex == physio.SexUnstated && a.Population == physio.Adult:
		return &asked{id: askHeight, text: askHeightText}
	}
	return nil
}

// oxygenWanted says that the inspired oxygen would change a verdict.
func (c *composer) oxygenWanted() bool {
	a := c.a
	if a.Oxygen.Known || c.gas.Sample.Circumstance.Has(physio.ECMO) {
		return false
	}
	lung := a.Blood == physio.Arterial && c.gas.Sample.Has(physio.PaO2)
	return (lung || a.Blood == physio.NoBlood && c.gas.Sample.Has(physio.SpO2)) && a.Oxygenation.Level != physio.DegreeUnknown
}

func (c *composer) oxygenQuestion() *asked {
	s := &c.gas.Sample
	if s.Circumstance.Has(physio.BledInOxygen) || s.Device == physio.PulseDose || s.Device == physio.ReservoirCannula {
		return &asked{id: askFiO2, text: askFiO2Text}
	}
	if s.Device != physio.DeviceUnstated {
		return &asked{id: askOxygen, text: "On which FiO2?"}
	}
	q := &shorthand.Question{Code: askOxygen, Quantity: physio.FiO2, Choices: oxygenChoices()}
	return &asked{id: askOxygen, text: askOxygenText, choices: []string{"room air", "2 L", "40 %"}, from: q}
}

// oxygenChoices are examples: any other oxygen is read as an addition.
func oxygenChoices() []shorthand.Choice {
	var air, two, forty shorthand.Choice
	air.Word, air.Device = "room air", physio.Air
	two.Word, two.Device = "2 L", physio.Cannula
	two.Set.Set(physio.OxygenFlow, 2)
	forty.Word = "40 %"
	forty.Set.Set(physio.FiO2, 0.40)
	return []shorthand.Choice{air, two, forty}
}

func (c *composer) bloodQuestion() *asked {
	q := &shorthand.Question{Code: askBlood, Quantity: physio.PaO2, Choices: []shorthand.Choice{
		{Word: "arterial", Blood: physio.Arterial}, {Word: "venous", Blood: physio.Venous},
	}}
	return &asked{id: askBlood, text: askBloodText, choices: []string{"arterial", "venous"}, from: q}
}
