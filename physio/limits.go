package physio

// Every cut-off that a verdict uses stands in this file, with its unit, its
// side and where it comes from. The ranges of the populations stand in
// population.go.

// Degrees of a low PaO2 (mmHg): mild 60-79, moderate 40-59, severe below 40.
// They belong to air at sea level; Oxygen studies, common practice.
const (
	pao2Adequate = 80.0 // at or above
	pao2Mild     = 60.0 // at or above
	pao2Moderate = 40.0 // at or above
)

// Degrees of a low saturation, the same scale in saturations: 95, 90, 75.
const (
	satAdequate = 0.95
	satMild     = 0.90
	satModerate = 0.75
)

// Target saturations named when none is set.
const (
	retainerTargetLow  = 0.88 // O'Driscoll 2017 (BTS)
	retainerTargetHigh = 0.92
	pretermTargetLow   = 0.91 // NICE QS193
	pretermTargetHigh  = 0.95
	pretermPaO2High    = 80.0 // mmHg; above it hyperoxia (Huang 2017; a hospital's target ends at 9 kPa = 68)
)

// Efficiency of oxygenation.
const (
	aaEfficientRatio = 0.75  // a/A at or above: efficient (Gilbert 1974)
	aaPoorOxygen     = 0.35  // a/A below, on oxygen: poor; our band
	aaPoorAir        = 0.50  // a/A below, on air: poor; our band
	pfPoor           = 200.0 // mmHg, at or below, on oxygen: poor (Berlin 2012 moderate)
	pfAbnormal       = 300.0 // mmHg (Berlin 2012 mild)
	sfPoor           = 235.0 // S/F that stands for P/F 200 (Rice 2007)
	sfAbnormal       = 315.0 // S/F that stands for P/F 300 (Rice 2007)
	spo2Ceiling      = 0.97  // above it S/F does not grade (Matthay 2024)
	airFiO2          = 0.22  // at or below: air
	airAAFiO2        = 0.24  // above it the age line of A-a does not hold
	ratioOnlyPaCO2   = 50.0  // mmHg: above it P/F says little of the lung, a/A decides
)

// Efficiency of ventilation. The ventilatory-ratio and corrected-VE bands are
// our own, anchored on cohort medians (Sinha 2013; ROSE cohort: 2).
const (
	ratioReduced  = 1.2
	ratioPoor     = 2.0
	correctedHigh = 10.0  // L/min at PaCO2 40: above it reduced (common practice)
	correctedPoor = 15.0  // L/min: above it poor; our band
	deadSpaceHigh = 0.40  // VD/VT above: reduced (common practice)
	deadSpacePoor = 0.60  // VD/VT at or above: poor (Nuckton 2002: died 0.63, lived 0.54)
	paEtUsual     = 5.0   // mmHg PaCO2-EtCO2 above: reduced (common practice)
	paEtWide      = 15.0  // mmHg above: poor; our band
	vtProtective  = 8.0   // mL/kg predicted weight (ARDS Network 2000)
	plateauLimit  = 30.0  // cmH2O (ARDS Network 2000)
	drivingLimit  = 15.0  // cmH2O (Amato 2015)
	patternLimit  = 105.0 // breaths/min/L (Yang and Tobin 1991)
	powerConcern  = 17.0  // J/min (Serpa Neto 2018)
)

// defaultCritical are the critical limits of a house that has set none, after
// Kost 1990, from memory; pH and PaCO2 are also those of a university
// hospital's list (Iowa), which has PaO2 below 40. None was found for pregnancy.
var defaultCritical = CriticalLimits{PHLow: 7.20, PHHigh: 7.60, PaCO2High: 70, PaO2Low: 45}

// cordCritical: cord arterial pH 7.18 is usual; below 7.00 is not (common
// practice).
var cordCritical = CriticalLimits{PHLow: 7.00}

// newbornCritical leaves out PaO2: a newborn's lower values are his range. A pH
// down to 7.20-7.22 is accepted in the first days (Sweet 2013), where Iowa's
// list of nurseries calls from 7.25; both call above a PaCO2 of 70.
var newbornCritical = CriticalLimits{PHLow: 7.20, PHHigh: 7.60, PaCO2High: 70}

// DefaultCritical gives the critical limits of a population for which a house
// has set none. A zero field is no limit: newborns have none of PaO2.
func DefaultCritical(p Population) CriticalLimits {
	if p == Newborn || p == Preterm {
		return newbornCritical
	}
	return defaultCritical
}

// Acid-base tolerances.
const (
	acuteTolerance    = 2.0  // mmol/L round the acute response: course
	disorderTolerance = 3.0  // mmol/L: with 1 of measurement, a second disorder
	chronicTolerance  = 4.0  // mmol/L above the chronic band: a second disorder
	hypocapniaBand    = 3.0  // mmol/L round chronic hypocapnia (6 mmol/L wide, 1977)
	sbeDisorder       = 2.0  // mmol/L: beyond it SBE is out of range
	sbeAlone          = 3.0  // mmol/L: the wider range in use, for a lone change
	sbeSignificant    = 5.0  // mmol/L: a base deficit that counts beside a raised PaCO2
	needMargin        = 1.45 // mmHg: 1.96 x SD of a repeat PaCO2 (Mallat 2015)
	sbeNeedTolerance  = 3.0  // mmHg round 40 + SBE (Schlichtig 1998)
	wintersTolerance  = 2.0  // mmHg (Albert, Dell and Winters 1967)
	alkalosisBand     = 5.0  // mmHg round 0.7 x HCO3 + 20
	gapUsual          = 12.0 // mmol/L, without K
	gapHigh           = 15.5 // mmol/L: above 12 + 4, less half a printed digit
	gapHidden         = 20.0 // mmol/L: high whatever the bicarbonate
	deltaMixed        = 2.0  // above: alkalosis or earlier hypercapnia beside
	chronicLatestPH   = 7.50 // chronic hypocapnia at a higher pH is not called
)

// The triple of pH, PaCO2 and HCO3: our own error budget over analyser error,
// rounding and the spread of the constants.
const (
	fitFreePH    = 0.03 // pH units off: no remark
	fitRejectPH  = 0.08 // pH units off: the three can not be of one sample
	fitFreeHCO3  = 0.06 // of the bicarbonate, plus half its last digit
	fitAskHCO3   = 4.0  // mmol/L off: asked
	satMismatch  = 0.06 // measured against the curve, beyond which it is said
	satRepeat    = 0.04 // and so far beyond a repeat's spread: the error of an oximeter (ISO 80601-2-61)
	venousSatGap = 0.08 // sample below oximeter: venous until shown otherwise
	venousPaO2   = 45.0 // mmHg at or below: could be venous
)

// Differences of venous from arterial blood, and the ages and sizes at which
// one table hands over to the next.
const (
	venousPH   = 0.033 // pH units lower (Byrne 2014)
	venousPCO2 = 6.0   // mmHg higher (Kelly 2013)
	venousHCO3 = 1.2   // mmol/L higher (Kelly 2013)
	// venousMargin, mmHg, is between the mean differences that were found, 2.9
	// (in COPD) to 6.2 (Kelly 2013).
	venousMargin = 5.0

	childBelow    = 16.0       // years, common practice
	newbornBelow  = 29.0 / 365 // years: 28 days, common practice
	pbwFromHeight = 130.0      // cm; below it predicted weight means nothing

	cohbUsual  = 0.10  // smokers reach about 10 %, from memory
	methbUsual = 0.015 // from memory

	beFree = 3.0 // mmol/L: blood and extracellular base excess differ by so much
	beAsk  = 6.0 // mmol/L: beyond any form of base excess
)

// Bounds of the two axes that belong to bedside values, age and newborns.
const (
	venousScreen = 45.0  // mmHg: a venous PCO2 below it makes hypercapnia unlikely (Kelly 2013)
	tcMargin     = 7.5   // mmHg: agreement of transcutaneous CO2, from memory
	aaImpossible = -10.0 // mmHg: a more negative A-a has a wrong input (sheet, section 3)
	// newbornAA, mmHg on air: PaO2 60 and PaCO2 30 an hour after birth, as a
	// textbook table of the healthy has it, are an A-a of 54.
	newbornAA = 55.0

	newbornPaO2         = 50.0 // mmHg: at or above it inside the usual newborn range (Gomella; Huang 2017)
	newbornPaO2Mild     = 40.0 // mmHg: below it a laboratory calls (Iowa)
	newbornPaO2Moderate = 30.0 // mmHg, from memory
	newbornSatMild      = 0.85 // lower arm of SUPPORT, 85-89 % (Ambalavanan 2015)
	newbornSatModerate  = 0.75 // from memory
)

// Bounds of cautions.
const (
	highPaO2        = 150.0 // mmHg on oxygen: above any usual target, our bound
	altitudeExcess  = 30.0  // mmHg of A-a beyond its band: more than an unsaid altitude of a hospital makes
	retainerPaCO2   = 45.0  // mmHg: above it a retainer's target is named, whatever the altitude (O'Driscoll 2017)
	raisedHCO3      = 28.0  // mmol/L: above it a chronic retention is thought of, common practice
	flatPaO2        = 80.0  // mmHg: the curve is flat above
	temperatureSaid = 2.0   // C away from 37: PCO2 moves by more than 9 %

	hbSevere      = 7.0  // g/dL: below it anaemia decides the oxygen carried (AABB 2016 and 2023, the threshold of transfusion)
	lactateSevere = 4.0  // mmol/L at or above: severe (ventilation.md, section 7; Surviving Sepsis 2021)
	potassiumHigh = 6.5  // mmol/L at or above: severe (UK Kidney Association 2020, from memory)
	rateHigh      = 30.0 // breaths/min at or above: a mark of severity in adults (Lim 2003, CURB-65)
	newbornOI     = 20.0 // at or above: the range of inhaled nitric oxide (Lakshminrusimha 2015)

	// cohbOxygen, a fraction in smoke or CO: the usual ends at 2-3 % (from
	// memory); above it SpO2 takes COHb for oxygen (Buckley 1994).
	cohbOxygen = 0.03
	wholeHb    = 0.01 // parts of haemoglobin may add up to so much more than one, by rounding
	// methbOximeter, a fraction: SpO2 drifts towards 85 % whatever the oxygen
	// (Barker 1989, from memory).
	methbOximeter = 0.10
)
