package bot

import "galeward/physio"

// Every sentence and word that a user can read stands in the wording files:
// here the words of the reading, in wording_caution.go the cautions, in
// wording_doubt.go notes, questions and refusals, in wording_command.go the
// commands.

const (
	wordRead         = "Read: "
	wordFits         = " (fits)"
	wordAssumed      = "Assumed: "
	wordCannulaTaken = "flow taken as nasal cannula"

	standingNotice = "An aid for trained staff: check against the print-out; local protocols and the licensed practitioner decide. No patient identifiers here."
	criticalNotice = "Outside the critical limits of this channel: the patient and the critical-result call come before this text."
	storeDown      = "The store does not answer: read with the last known house rules; this gas is not remembered."
	storeDownBlank = "The store does not answer: read with default rules; this gas is not remembered."
	storeFull      = "The store takes no more writes: this gas is not remembered."
	notForgotten   = "The store does not answer: nothing was forgotten."
	withdrawn      = "The question was taken away: this answer no longer holds."
	earlierVoid    = "The earlier reading is void."
	hintNothing    = "Nothing was read there. help lists what can be typed."
	takenBack      = "A correction, but of which value? Its name in front, such as: co2 58"
	addedText      = "Added to the gas before: "
	hintGas        = "No gas was read there. An example: "
	troubleText    = "Something of ours went wrong (id %s). Nothing was stored; the same line can be sent again."
)

var bloodWord = map[physio.Blood]string{
	physio.Arterial: "arterial", physio.Venous: "venous", physio.CentralVenous: "central venous",
	physio.MixedVenous: "mixed venous", physio.Capillary: "capillary", physio.Cord: "cord",
	physio.Intraosseous: "intraosseous", physio.BloodUncertain: "sample in doubt",
}

var siteWord = map[physio.Site]string{
	physio.Earlobe: "earlobe capillary", physio.Finger: "finger capillary", physio.Heel: "heel capillary",
	physio.UmbilicalVein: "umbilical venous", physio.UmbilicalArt: "umbilical arterial",
	physio.CordArterySite: "cord arterial", physio.CordVeinSite: "cord venous",
}

var deviceWord = map[physio.Device]string{
	physio.Air: "air", physio.Cannula: "nasal cannula", physio.ReservoirCannula: "reservoir cannula",
	physio.PulseDose: "pulse-dose oxygen", physio.SimpleMask: "simple mask", physio.ReservoirMask: "reservoir mask",
	physio.Venturi: "Venturi mask", physio.FaceTent: "face tent", physio.TracheostomyMask: "tracheostomy mask",
	physio.TPiece: "T-piece", physio.Hood: "hood", physio.HighFlow: "high flow", physio.CPAPDevice: "CPAP device",
	physio.Bilevel: "bilevel NIV", physio.Ventilator: "ventilator", physio.BagMask: "bag and mask",
	physio.Chamber: "hyperbaric chamber",
}

var populationWord = map[physio.Population]string{
	physio.Adult: "adult", physio.Pregnant: "pregnant", physio.Child: "child", physio.Newborn: "newborn",
	physio.Preterm: "preterm",
}

var circumstanceWords = []struct {
	c    physio.Circumstance
	word string
}{
	{physio.COPD, "COPD"}, {physio.AsthmaAttack, "asthma"}, {physio.Retainer, "CO2 retainer"},
	{physio.ECMO, "ECMO"}, {physio.CPR, "CPR"}, {physio.PostArrest, "post arrest"},
	{physio.CyanoticHeart, "cyanotic heart disease"}, {physio.BrainInjury, "brain injury"},
	{physio.Heliox, "heliox"}, {physio.Hyperbaric, "hyperbaric"}, {physio.SmokeOrCO, "smoke"},
	{physio.JustChanged, "just changed"}, {physio.Prone, "prone"}, {physio.Shock, "shock"},
	{physio.BledInOxygen, "oxygen bled in"}, {physio.OpioidOrSedation, "opioid"},
	{physio.Ketoacidosis, "ketoacidosis"},
}

var processWord = map[physio.Process]string{
	physio.RespiratoryAcidosis: "respiratory acidosis", physio.RespiratoryAlkalosis: "respiratory alkalosis",
	physio.MetabolicAcidosis: "metabolic acidosis", physio.MetabolicAlkalosis: "metabolic alkalosis",
}

// rangeSchool is the range school's word, never printed as if it meant
// harmless.
var rangeSchool = map[physio.Compensation]string{
	physio.CompensationNone: "uncompensated", physio.CompensationPartial: "partially compensated",
	physio.CompensationFull: "fully compensated",
}

var courseWord = map[physio.Course]string{
	physio.Acute: "acute", physio.Chronic: "chronic", physio.AcuteOnChronic: "acute on chronic",
	physio.CourseNotClear: "time course not clear",
}

// efficiencyWord are the words of both axes.
var efficiencyWord = map[physio.Efficiency]string{
	physio.Efficient: "efficient", physio.Reduced: "reduced", physio.Poor: "poor",
	physio.EfficiencyUnknown: "can't say",
}

// basisWord names an index in a sentence.
var basisWord = map[string]string{
	"vd_vt": "VD/VT", "vent_ratio": "ventilatory ratio", "ve_corrected": "VE at PaCO2 40 would be",
	"pa_et_gap": "PaCO2-EtCO2", "pf": "P/F", "a_over_a": "a/A", "aa": "A-a", "sf": "S/F",
	"driving_pressure": "driving pressure", "vt_per_pbw": "VT", "compliance": "compliance",
	"rox": "rate index (SpO2/FiO2/RR)", "oi": "OI", "osi": "OSI", "rsbi": "breathing-pattern index",
	"vt_per_weight": "VT", "mech_power": "mechanical power", "delta_ratio": "delta ratio",
	"anion_gap": "anion gap", "anion_gap_corrected": "anion gap (albumin)", "sbe": "SBE",
	"pao2_expected_at_paco2": "PaO2 of a healthy lung here", "expected_paco2": "expected PaCO2",
	"hco3_calc": "HCO3 from pH and PaCO2", "sao2_calc": "SaO2 at this pH", "aa_expected": "expected A-a",
	"expected_hco3_acute": "HCO3 if acute", "expected_hco3_chronic": "HCO3 if chronic",
	"expected_ph_acute": "pH if acute", "expected_ph_chronic": "pH if chronic", "cao2": "CaO2",
	"pao2_alveolar": "PAO2", "pf_altitude_corrected": "P/F corrected for altitude", "resp_index": "respiratory index",
	"alveolar_dead_fraction": "alveolar dead-space fraction", "alveolar_vent": "alveolar ventilation",
	"pbw": "predicted weight", "p50": "P50", "shunt": "shunt", "shunt_estimated": "shunt, estimated",
	"cco2": "Cc'O2", "sid_apparent": "apparent SID", "sid_effective": "effective SID", "sig": "strong ion gap",
}
