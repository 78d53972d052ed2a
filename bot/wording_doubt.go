package bot

import (
	"fmt"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// cautionSentence words a caution with its numbers.
func (c *composer) cautionSentence(code physio.CautionCode) string {
	args := c.cautionArgs(code)
	if args == nil {
		return cautionText[code]
	}
	return fmt.Sprintf(cautionText[code], args...)
}

// noteTemplates are the sentences of readings that were not plain: {t} is the
// token as typed, {v} what it was read as, {q} the quantity.
var noteTemplates = map[shorthand.NoteCode]string{
	shorthand.NotePHDecimal:    "Read {t} as {v}.",
	shorthand.NoteReadKPa:      "Read as kPa.",
	shorthand.NoteReadMmHg:     "Read as mmHg.",
	shorthand.NoteMixedUnits:   "Read {t} for {q} in its own unit: {v}.",
	shorthand.NoteBareFiO2:     "Read {t} as FiO2 {v}.",
	shorthand.NoteBareSat:      "Read {t} as the sample's saturation.",
	shorthand.NoteCannulaTaken: "",
	shorthand.NoteSatForPaO2:   "Read {t} as saturation; no PaO2 was given.",
	shorthand.NoteBEForHCO3:    "Read {t} as BE.",
	shorthand.NoteBEPlace:      "Read {t} as BE.",
	shorthand.NoteHydrogen:     "Read H+ {t} nmol/L as pH {v}.",
	shorthand.NoteHbGramLitre:  "Read Hb {t} as g/L ({v}).",
	shorthand.NoteFahrenheit:   "Read {t} as Fahrenheit ({v}).",
	shorthand.NotePounds:       "Read {t} as pounds ({v}).",
	shorthand.NoteInches:       "Read {t} as inches ({v}).",
	shorthand.NoteMgPerDL:      "Read {q} {t} as mg/dL ({v}).",
	shorthand.NoteGramPerDL:    "Read {q} {t} as g/dL ({v}).",
	shorthand.NoteAge90:        "Ages over 89 are read as 90+ and not kept.",
	shorthand.NotePaCO2Missing: "No PaCO2 given: pH and HCO3 imply about {v}.",
	shorthand.NoteVentOrder:    "Read {t} as {q}.",
	shorthand.NoteHCO3Off:      "HCO3 {t} against about {v} from pH and PaCO2.",
	shorthand.NoteStandardHCO3: "{t} is standard HCO3: not used as the check.",
	shorthand.NoteFiO2AtDraw:   "The oxygen at the draw counts: {v}.",
	shorthand.NotePCReference:  "Whether PC {t} is above PEEP or total is not said.",
	shorthand.NoteHighFlowPair: "Read {t} as {q} {v}.",
	shorthand.NoteMeanAirway:   "Read MAP {t} as mean airway pressure.",
	shorthand.NoteSign:         "Read the base deficit {t} as BE {v}.",
	shorthand.NoteFlowPerKg:    "Read {t} per kg as {v}.",
	shorthand.NoteBareHeight:   "Read {t} as height in cm.",
	shorthand.NoteOrderRead:    "The order was read by what fits: check the values above.",
	shorthand.NoteRangeLow:     "Of {t} the lower end is used.",
	shorthand.NoteNotRead:      "Not read: {t}.",
}

// questionTemplates are the questions about what was typed.
var questionTemplates = map[shorthand.QuestionCode]string{
	shorthand.AskSwap:        "HCO3 fits the pressures the other way round: which reading?",
	shorthand.AskPH:          "pH {t} can't be: {v}?",
	shorthand.AskPaCO2:       "PaCO2 {t} can't be: {v}?",
	shorthand.AskPaO2:        "PaO2 {t}: which was meant?",
	shorthand.AskHCO3:        "HCO3 {t} can't be: what does the print-out say?",
	shorthand.AskBE:          "BE {t} can't be: what does the print-out say?",
	shorthand.AskHCO3Fit:     "HCO3 {t} does not fit pH and PaCO2 (they give about {v}): one mistyped, or total CO2 of another sample?",
	shorthand.AskBEForHCO3:   "{t} in the HCO3 place: BE or HCO3?",
	shorthand.AskBEFit:       "BE {t} does not fit pH and PaCO2 (they give about {v}): which is mistyped?",
	shorthand.AskCeiling:     "PaO2 {t} is above what this oxygen allows (about {v}): oxygen on, air bubble, or typing?",
	shorthand.AskSatFit:      "Saturation and PaO2 do not go together: which is mistyped?",
	shorthand.AskOverRange:   "{q} above the analyser's range: can it be measured again?",
	shorthand.AskUnderRange:  "{q} below the analyser's range: venous, or a sample fault?",
	shorthand.AskUnit:        "kPa or mmHg?",
	shorthand.AskComma:       "Commas stand both as decimal and between values: is the echo right?",
	shorthand.AskTwice:       "{q} stands twice: which one?",
	shorthand.AskTwoGases:    "Two gases: the same patient, earlier then later? And on which oxygen was each?",
	shorthand.AskSecondGroup: "A second group of numbers has no pH: pasted twice?",
	shorthand.AskTwoNumbers:  "Two numbers: PaCO2 and PaO2? The pH and the oxygen are missing.",
	shorthand.AskVenous:      "Arterial or venous?",
	shorthand.AskWhichOxygen: "On which oxygen was the gas drawn?",
	shorthand.AskFiO2:        "FiO2 {t}: which was meant?",
	shorthand.AskFifth:       "The fifth value {t}: FiO2, or a saturation?",
	shorthand.AskBare:        "The number {t}: which is it?",
	shorthand.AskPercent:     "{t} %: FiO2 or saturation?",
	shorthand.AskFlowOrFiO2:  "{t}: % or L/min?",
	shorthand.AskFlowDevice:  "{t} L/min through which device?",
	shorthand.AskTc:          "{t}: transcutaneous CO2 or O2?",
	shorthand.AskSpO2:        "SpO2 {t} can't be: what does the oximeter show?",
	shorthand.AskVT:          "VT {t}: which was meant?",
	shorthand.AskRR:          "Rate {t}: {v}?",
	shorthand.AskValue:       "{q} {t} can't be: which was meant?",
	shorthand.AskWeight:      "Weight {t}: kg or lb? Height and sex serve better for VT.",
	shorthand.AskHeight:      "Height {t}: which was meant?",
	shorthand.AskMetresSex:   "Is m metres or male? Sex is needed for the predicted weight.",
	shorthand.AskMAP:         "MAP {t}: mean airway or mean arterial pressure?",
	shorthand.AskOrder:       "The pH does not stand first: which value is which?",
	shorthand.AskIPAP:        "IPAP {t} is below EPAP {v}: which way round?",
	shorthand.AskFlowPerKg:   "{t} L/kg/min: how many kg, or how many L/min in all?",
	shorthand.AskTempCorr:    "Are the values corrected to {v}?",
}

// The questions that come from the assessment, not from what was typed.
const (
	askOxygen      = "which_oxygen"
	askOxygenText  = "On how much oxygen?"
	askBlood       = "arterial_or_venous"
	askBloodText   = "Arterial or venous?"
	askSpO2        = "spo2_now"
	askSpO2Text    = "What does SpO2 read now?"
	askPaO2        = "which_oxygenation"
	askPaO2Text    = "Which PaO2 or SpO2?"
	askParent      = "which_gas"
	askParentText  = "Which gas does this follow? None is remembered here: its values come first."
	askBed         = "which_bed"
	askGasText     = "Several gases came together: which one? Type it again with all its values."
	closedText     = "That question is closed: it was answered, or its gas was replaced."
	askHeight      = "height_and_sex"
	askHeightText  = "Height and sex?"
	askCOHb        = "cohb"
	askCOHbText    = "COHb by co-oximeter?"
	askChamber     = "chamber"
	askChamberText = "Chamber pressure and FiO2?"
	askFiO2        = "which_fio2"
	askFiO2Text    = "Which FiO2, if it is measured or set?"
)

var refusalText = map[shorthand.Refused]string{
	shorthand.RefusedIdentifier: "That line holds something that can identify a patient: nothing of it was read, kept or shown. Delete it here and send the values with a bed label only.",
	shorthand.RefusedPicture:    "Pictures are not read: print-outs carry names. Delete it here and type the values with a bed label only.",
	shorthand.DeclinedDose:      "No doses here: the numbers below, the choice is the team's.",
	shorthand.DeclinedOrder:     "No orders here. What is usually considered, for high CO2: rate, VT within limits, dead space; for low O2: FiO2, mean airway pressure, position, secretions.",
	shorthand.DeclinedDiagnosis: "No diagnosis from a gas: ventilation and oxygenation are read.",
	shorthand.DeclinedPrognosis: "No prognosis from a gas: ventilation and oxygenation are read.",
	shorthand.DeclinedPEEP:      "What PEEP does to PaO2 can't be told by a formula: a gas or SpO2 after the change shows it.",
	shorthand.DeclinedOverride:  "Instructions in a message change nothing here: values are read, no orders are given.",
}

// filled puts a doubt's numbers into its sentence.
func (c *composer) filled(template string, q physio.Quantity, typed string, v float64) string {
	return replaceAll(template, "{t}", typed, "{q}", q.Info().Symbol, "{v}", c.n.value(q, v))
}

func (c *composer) noteText(n shorthand.Note) string {
	if n.Code == shorthand.NoteReadKPa || n.Code == shorthand.NoteReadMmHg {
		return c.otherUnit(n.Code)
	}
	return c.filled(noteTemplates[n.Code], n.Quantity, n.Typed, n.Value)
}

// otherUnit says in which unit the pressures were read, with the numbers that
// were typed.
func (c *composer) otherUnit(code shorthand.NoteCode) string {
	typed := numbers{shorthand.KPa}
	word := "Read as kPa"
	if code == shorthand.NoteReadMmHg {
		typed, word = numbers{shorthand.MmHg}, "Read as mmHg"
	}
	s := &c.gas.Sample
	var parts string
	for _, q := range []physio.Quantity{physio.PaCO2, physio.PaO2} {
		if v, ok := s.Get(q); ok {
			if parts != "" {
				parts += "/"
			}
			parts += typed.pressure(v)
		}
	}
	if parts == "" {
		return word + "."
	}
	return word + " (" + parts + " " + typed.unit() + ")."
}
