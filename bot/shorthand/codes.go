package shorthand

// The notes: what was read although it was not plain. Value is in the
// canonical unit of Quantity.
const (
	NotePHDecimal    NoteCode = "ph_decimal"     // a pH without its decimal point: 728 read as 7.28
	NoteReadKPa      NoteCode = "read_kpa"       // pressures read as kPa in a mmHg channel
	NoteReadMmHg     NoteCode = "read_mmhg"      // pressures read as mmHg in a kPa channel
	NoteMixedUnits   NoteCode = "mixed_units"    // one pressure in kPa, the other in mmHg
	NoteBareFiO2     NoteCode = "bare_fio2"      // a bare trailing number read as FiO2
	NoteBareSat      NoteCode = "bare_sat"       // a number beside the gas read as its saturation
	NoteCannulaTaken NoteCode = "cannula_taken"  // litres without a device, up to 6 L/min
	NoteSatForPaO2   NoteCode = "sat_for_pao2"   // a percentage in the PaO2 place: saturation, no PaO2
	NoteBEForHCO3    NoteCode = "be_for_hco3"    // a negative number in the HCO3 place read as BE
	NoteBEPlace      NoteCode = "be_place"       // a small number in another place read as BE
	NoteHydrogen     NoteCode = "hydrogen"       // H+ in nmol/L read as pH
	NoteHbGramLitre  NoteCode = "hb_g_per_l"     // Hb read as g/L
	NoteFahrenheit   NoteCode = "fahrenheit"     // temperature read as Fahrenheit
	NotePounds       NoteCode = "pounds"         // weight read as pounds
	NoteInches       NoteCode = "inches"         // height read as inches
	NoteMgPerDL      NoteCode = "mg_per_dl"      // an analyte read as mg/dL
	NoteGramPerDL    NoteCode = "g_per_dl"       // albumin read as g/dL
	NoteAge90        NoteCode = "age_90"         // an age over 89, read as 90 and not kept
	NotePaCO2Missing NoteCode = "paco2_missing"  // an empty PaCO2 place; Value is what pH and HCO3 imply
	NoteVentOrder    NoteCode = "vent_order"     // unlabelled ventilator numbers read by size; one note each
	NoteHCO3Off      NoteCode = "hco3_off"       // HCO3 2-4 mmol/L off pH and PaCO2; Value is the implied one
	NoteStandardHCO3 NoteCode = "standard_hco3"  // standard bicarbonate, not used as the check
	NoteFiO2AtDraw   NoteCode = "fio2_at_draw"   // several oxygens said, the one at the draw counts
	NotePCReference  NoteCode = "pc_reference"   // PC a/b: above PEEP or total is not said
	NoteHighFlowPair NoteCode = "high_flow_pair" // a/b after high flow: only one reading possible
	NoteMeanAirway   NoteCode = "mean_airway"    // MAP read as mean airway pressure
	NoteSign         NoteCode = "sign"           // a deficit typed with a minus
	NoteRangeLow     NoteCode = "range_low"      // a range was typed, its lower end is used
	NoteFlowPerKg    NoteCode = "flow_per_kg"    // a flow per kg, multiplied by the weight
	NoteBareHeight   NoteCode = "bare_height"    // a number beside the sex read as the height in cm
	NoteOrderRead    NoteCode = "order_read"     // values in another order, read by what fits
	NoteNotRead      NoteCode = "not_read"       // a number beside the gas that was not read
)

// The questions, most important first within a gas: contradiction, units,
// order, sample, oxygen, settings.
const (
	AskSwap        QuestionCode = "swap"            // HCO3 fits the pressures the other way round
	AskPH          QuestionCode = "ph"              // impossible pH; Value is the fitting one
	AskPaCO2       QuestionCode = "paco2"           // impossible PaCO2
	AskPaO2        QuestionCode = "pao2"            // impossible PaO2
	AskHCO3        QuestionCode = "hco3"            // impossible HCO3
	AskBE          QuestionCode = "be"              // impossible BE
	AskHCO3Fit     QuestionCode = "hco3_fit"        // HCO3 more than 4 mmol/L off; Value is the implied one
	AskBEForHCO3   QuestionCode = "be_for_hco3"     // a small number in the HCO3 place: BE or HCO3?
	AskBEFit       QuestionCode = "be_fit"          // BE far off pH and PaCO2; Value is the implied one
	AskCeiling     QuestionCode = "pao2_ceiling"    // PaO2 above what this oxygen allows; Value is the ceiling
	AskSatFit      QuestionCode = "sat_fit"         // saturation and PaO2 do not go together
	AskOverRange   QuestionCode = "over_range"      // typed as above the analyser's range
	AskUnderRange  QuestionCode = "under_range"     // typed as below the analyser's range
	AskUnit        QuestionCode = "pressure_unit"   // kPa or mmHg
	AskComma       QuestionCode = "comma"           // commas as decimal and as separator
	AskTwice       QuestionCode = "twice"           // one quantity with two values
	AskTwoGases    QuestionCode = "two_gases"       // two gases in one line
	AskSecondGroup QuestionCode = "second_group"    // a second group of numbers without a pH
	AskTwoNumbers  QuestionCode = "two_numbers"     // two bare numbers: PaCO2 and PaO2?
	AskVenous      QuestionCode = "venous"          // arterial or venous
	AskWhichOxygen QuestionCode = "which_at_draw"   // two oxygens said: which at the draw?
	AskFiO2        QuestionCode = "fio2"            // FiO2 4, 1, 400
	AskFifth       QuestionCode = "fifth"           // fifth place 40: FiO2 or saturation
	AskBare        QuestionCode = "bare_number"     // bare trailing 21-35 and other bare numbers
	AskPercent     QuestionCode = "percent_role"    // a percentage that fits both FiO2 and saturation
	AskFlowOrFiO2  QuestionCode = "flow_or_fio2"    // a number that may be litres or per cent
	AskFlowDevice  QuestionCode = "flow_device"     // more than 6 L/min without a device
	AskTc          QuestionCode = "tc_which"        // transcutaneous CO2 or O2
	AskSpO2        QuestionCode = "spo2"            // impossible SpO2
	AskVT          QuestionCode = "vt"              // VT .045, 45, 6
	AskRR          QuestionCode = "rr"              // impossible rate
	AskValue       QuestionCode = "value"           // any other impossible value
	AskWeight      QuestionCode = "weight_unit"     // kg or lb
	AskHeight      QuestionCode = "height"          // 510: 5 ft 10 in?
	AskMetresSex   QuestionCode = "metres_or_sex"   // "1.78 m": metres or male
	AskMAP         QuestionCode = "map"             // mean airway or mean arterial: only when an index wants it
	AskOrder       QuestionCode = "order"           // the pH is not first and the order of the others is open
	AskIPAP        QuestionCode = "ipap_below_epap" // IPAP below EPAP: which way round?
	AskFlowPerKg   QuestionCode = "flow_per_kg"     // a flow per kg without a weight
	AskTempCorr    QuestionCode = "temp_corrected"  // are the values corrected to this temperature?
)

// askRank is the place of each question: contradiction, units, order, sample,
// oxygen, settings, body.
var askRank = func() map[QuestionCode]int {
	rank := map[QuestionCode]int{}
	for i, c := range []QuestionCode{AskComma, AskTwoGases, AskOrder, AskSwap, AskPH, AskPaCO2, AskPaO2, AskHCO3, AskOverRange, AskUnderRange,
		AskUnit, AskBEForHCO3, AskHCO3Fit, AskCeiling, AskSatFit, AskBE, AskBEFit, AskTwice, AskSecondGroup, AskTwoNumbers,
		AskVenous, AskWhichOxygen, AskFiO2, AskFifth, AskPercent, AskFlowOrFiO2, AskBare, AskFlowDevice, AskFlowPerKg, AskTc, AskSpO2,
		AskVT, AskRR, AskIPAP, AskValue, AskHeight, AskWeight, AskMetresSex, AskTempCorr, AskMAP} {
		rank[c] = i
	}
	return rank
}()
