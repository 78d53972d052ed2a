package bot

import (
	"galeward/bot/reply"
	"galeward/bot/shorthand"
	"galeward/physio"
)

// cautionText are the sentences of the cautions. "%s" takes what cautionArg
// gives.
var cautionText = map[physio.CautionCode]string{
	physio.CautionCord:           "cord blood speaks of the placenta, not of the lungs: no ventilation or oxygenation verdict.",
	physio.CautionVenous:         "venous sample: pH and HCO3 are usable, PCO2 only screens, PO2 tells nothing of the lungs.",
	physio.CautionCapillary:      "capillary sample: PO2 is not used; PCO2 is close to arterial when the site was warm and well perfused.",
	physio.CautionEarlobe:        "earlobe sample: PO2 may read some mmHg lower than arterial.",
	physio.CautionIntraosseous:   "sample from bone: no lung verdict.",
	physio.CautionCPR:            "drawn during resuscitation: arterial gases then hide the state of the tissues; no lung verdict.",
	physio.CautionSampleDoubt:    "arterial or venous is in doubt: treated as venous until known.",
	physio.CautionVenousLikely:   "the sample's saturation is far below SpO2: this looks venous; until that is known oxygenation is read from SpO2.",
	physio.CautionVenousPossible: "PO2 %s also fits venous blood; the pH keeps its meaning.",
	physio.CautionECMO:           "on ECMO the gas reflects the circuit too: no lung efficiency is given.",
	physio.CautionHFOV:           "on oscillation minute volume is not rate times VT; the mean airway pressure carries the oxygenation.",
	physio.CautionHeliox:         "heliox changes flows and ventilator readings; FiO2 holds only when measured.",
	physio.CautionHyperbaric:     "under pressure the indices hold only with the chamber's pressure and FiO2.",
	physio.CautionCyanotic:       "cyanotic heart disease: the usual oxygenation cut-offs do not apply; the patient's own target does.",
	physio.CautionAsthma:         "in an acute asthma attack a PaCO2 in or above the range is a life-threatening sign.",
	physio.CautionBrain:          "after brain injury or arrest both high and low PaCO2 move cerebral blood flow.",
	physio.CautionFit:            "the values do not fit each other: %s; check against the print-out.",
	physio.CautionFitSoft:        "the values fit only loosely: %s.",
	physio.CautionAboveAlveolar:  "PaO2 %s is above what this oxygen allows (about %s): oxygen on, air bubble, or typing?",
	physio.CautionSaturation:     "saturation and PaO2 do not go together: timing, probe, dyshaemoglobin, venous blood or typing.",
	physio.CautionDyshaem:        "dyshaemoglobin: SpO2, PaO2 and calculated saturation mislead; only a co-oximeter's saturation counts.",
	physio.CautionLowCO2Newborn:  "a low PaCO2 is a harm of its own in a newborn.",
	physio.CautionHighO2Preterm:  "above the usual newborn oxygen range (SpO2 91-95 % in the preterm) while on oxygen.",
	physio.CautionAboveRetainer:  "saturation is above %s %%, the range usual in CO2 retainers, while on oxygen.",
	physio.CautionRetainer:       "%s; target 88-92 %% is usual in CO2 retainers.",
	physio.CautionAboveTarget:    "saturation is above the target in force while on oxygen.",
	physio.CautionHidden:         "a good saturation on added oxygen hides hypoventilation.",
	physio.CautionNotSteady:      "just changed: a gas is steady some 20-30 min after a change, later in obstruction.",
	physio.CautionFloor:          "EtCO2 is at or below PaCO2 as a rule: a usual one excludes nothing, a high one is a floor.",
	physio.CautionTranscutaneous: "transcutaneous values show the trend; they are no gas.",
	physio.CautionCeiling:        "above SpO2 97 % neither PaO2 nor S/F can be graded.",
	physio.CautionOximeter:       "SpO2 alone can hide a lower SaO2 (perfusion, skin pigment, dyshaemoglobin).",
	physio.CautionTemperature:    "values are read as reported at 37 C; corrected to the patient they move (%s).",
	physio.CautionEstimated:      "FiO2 is an estimate: the indices built on it are rough.",
	physio.CautionConserving:     "with this oxygen source FiO2 can't be estimated: no index with it is given.",
	physio.CautionLowPaCO2:       "PaCO2 is calculated from pH and HCO3: the measured one is wanted.",
	physio.CautionPlateau:        "plateau pressure above 30 cmH2O.",
	physio.CautionHyperoxia:      "PaO2 this high after arrest or brain injury counts as a harm of its own, as high and low PaCO2 do.",
	physio.CautionHighPaO2:       "PaO2 above 150 mmHg on oxygen is above any usual target.",
	physio.CautionShort:          "PaCO2 is above what the metabolic acidosis needs: ventilation does not match the need.",
	physio.CautionDriving:        "driving pressure above 15 cmH2O.",
	physio.CautionVT:             "VT above 8 mL/kg predicted weight.",
	physio.CautionPotassium:      "K %s: critical in its own right, whatever the gas; haemolysis also raises it.",
	physio.CautionAnaemia:        "Hb %s: PaO2 and saturation say nothing of the oxygen carried%s.",
	physio.CautionLactate:        "lactate %s: %s perfusion comes before ventilation.",
	physio.CautionByRate:         "PaCO2 %s is held by %s: tiring shows in the breathing first, in PaCO2 late.",
	physio.CautionNewbornOI:      "OI %s: in newborns nitric oxide is thought of from about 20, referral from 25, ECMO at 40; local protocol decides.",
	physio.CautionAltitudeUnset:  "sea level was taken: at altitude a lower PaO2 is expected.",
}

// cautionArgs gives the numbers of the sentences that carry some.
func (c *composer) cautionArgs(code physio.CautionCode) []any {
	s := &c.gas.Sample
	switch code {
	case physio.CautionVenousPossible:
		return []any{c.n.pressure(s.Val(physio.PaO2))}
	case physio.CautionFit, physio.CautionFitSoft:
		return []any{c.fitNumbers()}
	case physio.CautionAboveAlveolar:
		pa, _ := c.a.Index("pao2_alveolar")
		return []any{c.n.pressure(s.Val(physio.PaO2)), c.n.about(pa.Value)}
	case physio.CautionAboveRetainer:
		if t := c.a.Oxygenation.Target; t != nil {
			return []any{wholePercent(t.Low) + "-" + wholePercent(t.High)}
		}
		return []any{"88-92"}
	case physio.CautionPotassium:
		return []any{c.n.value(physio.K, s.Val(physio.K))}
	case physio.CautionAnaemia:
		return []any{c.n.value(physio.Hb, s.Val(physio.Hb)), c.contentWords()}
	case physio.CautionLactate:
		return []any{c.n.value(physio.Lactate, s.Val(physio.Lactate)), c.lactateWords()}
	case physio.CautionByRate:
		return []any{c.n.pressure(c.a.Ventilation.PaCO2.Value), c.rateWords()}
	case physio.CautionNewbornOI:
		oi, _ := c.a.Index("oi")
		return []any{plain(oi.Value, 0)}
	case physio.CautionRetainer:
		return []any{c.retainerWhy()}
	case physio.CautionTemperature:
		return []any{c.correctedValues()}
	}
	return nil
}

func (c *composer) retainerWhy() string {
	s := c.gas.Sample.Circumstance
	switch {
	case s.Has(physio.COPD):
		return "COPD"
	case s.Has(physio.Retainer):
		return "a cause of CO2 retention"
	case c.a.Triple.HCO3 > physio.RaisedHCO3:
		return "raised HCO3"
	}
	return "raised PaCO2"
}

// fitNumbers says which number the others imply.
func (c *composer) fitNumbers() string {
	if c.a.Fit.OfBE {
		be, _ := c.a.Index("sbe")
		return "BE from pH and PaCO2 is about " + signed(be.Value)
	}
	return "HCO3 from pH and PaCO2 is about " + plain(c.a.Fit.HCO3Calc, 0)
}

// correctedValues are pH, PCO2 and PO2 at the patient's temperature.
func (c *composer) correctedValues() string {
	s := &c.gas.Sample
	t := physio.Celsius(s.Val(physio.Temp))
	out := ""
	join := func(text string) {
		if out != "" {
			out += ", "
		}
		out += text
	}
	if v, ok := s.Get(physio.PHq); ok {
		if w, err := physio.PHAtTemp(physio.PH(v), t); err == nil {
			join("pH " + aboutPH(float64(w)))
		}
	}
	if v, ok := s.Get(physio.PaCO2); ok {
		if w, err := physio.PCO2AtTemp(physio.MmHg(v), t); err == nil {
			join("PCO2 " + c.n.about(w.MmHg()))
		}
	}
	if v, ok := s.Get(physio.PaO2); ok {
		if w, err := physio.PO2AtTemp(physio.MmHg(v), t); err == nil {
			join("PO2 " + c.n.about(w.MmHg()))
		}
	}
	return out
}

// The number of cautions shown: at most two major ones, else one minor.
const (
	majorShown = 2
	minorShown = 1
)

// addCautions shows the most important cautions; all stand in the machine form
// and behind "why cautions".
func (c *composer) addCautions(r *reply.Reply) {
	major, minor := 0, 0
	for _, caution := range c.a.Cautions {
		if c.asks(caution.Code) {
			continue // the question says the same
		}
		text := "Caution: " + c.cautionSentence(caution.Code)
		switch {
		case caution.Severity == physio.Major && major < majorShown:
			r.Add(reply.Major, text)
			major++
		case caution.Severity == physio.Minor && major == 0 && minor < minorShown && c.brief < briefest && c.worthSaying(caution.Code):
			r.Add(reply.Minor, text)
			minor++
		}
	}
}

// asks says that the question of this answer is about what a caution says.
func (c *composer) asks(code physio.CautionCode) bool {
	if c.question == nil {
		return false
	}
	switch shorthand.QuestionCode(c.question.id) {
	case shorthand.AskHCO3Fit, shorthand.AskBEFit:
		return code == physio.CautionFit
	case shorthand.AskCeiling:
		return code == physio.CautionAboveAlveolar
	case shorthand.AskSatFit:
		return code == physio.CautionSaturation
	}
	return false
}

// worthSaying drops what the body of the answer already says.
func (c *composer) worthSaying(code physio.CautionCode) bool {
	switch code {
	case physio.CautionShort:
		return false
	case physio.CautionEstimated:
		return c.a.Oxygenation.Efficiency != physio.EfficiencyUnknown
	case physio.CautionAltitudeUnset:
		return c.a.Problem == physio.ProblemOxygenation
	}
	return true
}
