package physio

// Problem says on which axis a problem lies.
type Problem string

// The problems.
const (
	ProblemVentilation  Problem = "ventilation"
	ProblemOxygenation  Problem = "oxygenation"
	ProblemBoth         Problem = "both"
	ProblemNone         Problem = "none"
	ProblemUndetermined Problem = "undetermined"
)

// Level is a PaCO2 against its range.
type Level string

// The levels of ventilation.
const (
	LevelUnknown          Level = "unknown"
	LevelAdequate         Level = "adequate"
	LevelHypoventilation  Level = "hypoventilation"
	LevelHyperventilation Level = "hyperventilation"
	LevelShortForNeed     Level = "short_for_need"
)

// Efficiency says how much breathing or oxygen buys the level.
type Efficiency string

// The efficiencies, the same words on both axes.
const (
	EfficiencyUnknown Efficiency = "unknown"
	Efficient         Efficiency = "efficient"
	Reduced           Efficiency = "reduced"
	Poor              Efficiency = "poor"
)

// Degree is a PaO2 or a saturation on its scale, or against a target.
type Degree string

// The degrees of oxygenation.
const (
	DegreeUnknown  Degree = "unknown"
	DegreeAdequate Degree = "adequate"
	DegreeMild     Degree = "mild"
	DegreeModerate Degree = "moderate"
	DegreeSevere   Degree = "severe"
	DegreeAbove    Degree = "above_target"
)

// Against compares a saturation with its target.
type Against string

// The comparisons.
const (
	NoTarget     Against = ""
	BelowTarget  Against = "below"
	InsideTarget Against = "inside"
	AboveTarget  Against = "above"
)

// Mechanism is a way in which a PaO2 becomes low.
type Mechanism string

// The mechanisms that numbers can point to.
const (
	MechHypoventilation Mechanism = "hypoventilation"
	MechLowInspiredPO2  Mechanism = "low_inspired_po2"
	MechMismatchOrShunt Mechanism = "vq_mismatch_or_shunt"
	MechDyshaemoglobin  Mechanism = "dyshaemoglobin"
)

// Ventilation is the first axis.
type Ventilation struct {
	Level      Level
	Borderline bool // the PaCO2's interval crosses a cut-off
	Efficiency Efficiency
	// Basis is the key of the index that the efficiency rests on, "" if none.
	Basis string
	// ByRate is true when a PaCO2 in or below its range is held by a high rate
	// or by rapid shallow breaths of the patient's own.
	ByRate bool
	// Floor is true when only a floor of PaCO2 is known (EtCO2).
	Floor bool
	// Screen is true when a venous PCO2 below 45 mmHg makes arterial
	// hypercapnia unlikely (Kelly 2013).
	Screen bool
	// PaCO2 is the interval of a repeat sample, mmHg; zero when unknown.
	PaCO2 Interval
	// Range is the span in mmHg that the PaCO2 was held against; zero when it
	// was not. RangeHouse says that it is the house's own and not the
	// population's.
	Range      Span
	RangeHouse bool
	// Pattern says "high, chronic pattern": PaCO2 above its range with pH in
	// range and bicarbonate in the chronic band.
	ChronicPattern bool
	// RetainerUsual is true when the PaCO2 is at the patient's usual value.
	AtUsual bool
}

// Oxygenation is the second axis.
type Oxygenation struct {
	Level      Degree
	Borderline bool
	// Scale is the degree on the PaO2 scale, also where a target decides.
	Scale Degree
	// Band is where "mild" lies on the scale that decided, in mmHg or, with a
	// saturation, as fractions: from Low to just below High.
	Band       Span
	Efficiency Efficiency
	// Basis is the key of the index that the efficiency rests on, "" if none.
	Basis string
	// Soft is true when the efficiency changes within the interval of an
	// estimated FiO2.
	Soft          bool
	Target        *Target
	AgainstTarget Against
	ExpectedHere  bool
	// InsideUsual is true on oxygen, with no target set, where the saturation is
	// inside the 88-92 % usual in a CO2 retainer (O'Driscoll 2017).
	InsideUsual bool
	// Saturation is the one that is compared: measured, at this pH from the
	// PaO2, or by oximeter.
	Saturation Interval
	// SaturationSource is SaO2 measured, PaO2 calculated, SpO2 oximeter, or
	// COHb where a measured SaO2 left dyshaemoglobin out and it was taken off.
	SaturationSource Quantity
	// Blind is true when the saturation is an oximeter's that takes
	// carboxyhaemoglobin or methaemoglobin for something else.
	Blind    bool
	OnOxygen bool
	// HealthyPaO2 is the PaO2 a healthy lung would have at this PaCO2 and
	// FiO2; zero when unknown.
	HealthyPaO2 Interval
}

// Oxygen is the inspired oxygen that the assessment used.
type Oxygen struct {
	FiO2      Interval
	Known     bool
	Estimated bool // from a device and a flow, not set or measured
}

// Fit compares the pH, PaCO2 and HCO3 (or BE) of one sample.
type Fit struct {
	Grade    FitGrade
	HCO3Calc float64 // from pH and PaCO2, mmol/L; 0 when not known
	Off      float64 // given less calculated, mmol/L
	OffPH    float64 // calculated less given, pH units
	OfBE     bool    // the comparison was of BE
}

// FitGrade grades how well the values of a triple fit each other.
type FitGrade string

// The grades.
const (
	FitUnchecked FitGrade = ""
	FitOK        FitGrade = "ok"
	FitCaution   FitGrade = "caution"
	FitReject    FitGrade = "reject"
)

// Derived marks a value that was calculated from the others of a triple.
type Derived struct {
	PH, PaCO2, HCO3 float64 // the triple that was used; 0 when unknown
	Quantity        Quantity
	Any             bool // Quantity was calculated, the others were given
}

// Lack is a quantity that was not given, with the index or verdict that it
// would settle.
type Lack struct {
	Quantity Quantity
	Settles  string // an index key, or "oxygenation"
}

// Assessment is everything that physio says of a sample.
type Assessment struct {
	Sample         Sample
	Population     Population
	Ranges         Ranges
	Blood          Blood
	BloodAssumed   bool
	PB             float64 // mmHg used
	PBSource       PressureSource
	Altitude       float64 // m, from the house or from the pressure; 0 at sea level
	Oxygen         Oxygen
	Triple         Derived
	Fit            Fit
	Critical       []Quantity
	CriticalLimits CriticalLimits
	CriticalHouse  bool
	Ventilation    Ventilation
	Oxygenation    Oxygenation
	AcidBase       AcidBase
	Mechanism      []Mechanism
	Problem        Problem
	Indices        []Index
	Missing        []Lack
	Cautions       []Caution
}

// Index finds a derived number by its key.
func (a *Assessment) Index(key string) (Index, bool) {
	for _, ix := range a.Indices {
		if ix.Key == key {
			return ix, true
		}
	}
	return Index{}, false
}
