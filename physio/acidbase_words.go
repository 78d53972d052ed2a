package physio

// Process is an acid-base process.
type Process string

// The processes.
const (
	NoProcess            Process = "none"
	RespiratoryAcidosis  Process = "respiratory_acidosis"
	RespiratoryAlkalosis Process = "respiratory_alkalosis"
	MetabolicAcidosis    Process = "metabolic_acidosis"
	MetabolicAlkalosis   Process = "metabolic_alkalosis"
	UnknownProcess       Process = "unknown"
)

// Course is the time course of a respiratory process.
type Course string

// The courses.
const (
	NoCourse       Course = "none"
	Acute          Course = "acute"
	Chronic        Course = "chronic"
	AcuteOnChronic Course = "acute_on_chronic"
	CourseNotClear Course = "not_clear"
)

// Compensation is the word of the range school: which of pH, PaCO2 and HCO3
// are out of their ranges. It says nothing of harm.
type Compensation string

// The words of the range school.
const (
	CompensationNone      Compensation = "none"
	CompensationPartial   Compensation = "partial"
	CompensationFull      Compensation = "full"
	CompensationNotStated Compensation = "none_stated"
)

// Gap is the anion gap in one word.
type Gap string

// The gaps.
const (
	GapHigh    Gap = "high"
	GapNormal  Gap = "normal"
	GapUnknown Gap = "unknown"
)

// Need compares PaCO2 with what a metabolic process needs.
type Need string

// The needs.
const (
	NoNeed  Need = ""
	Matches Need = "matches"
	Short   Need = "short"  // PaCO2 above what is needed
	Beyond  Need = "beyond" // PaCO2 below what is needed
)

// AcidBase is the acid-base side of an assessment.
type AcidBase struct {
	Primary      Process
	Also         []Process
	Course       Course
	Compensation Compensation
	Gap          Gap
	// Need is set when a metabolic process expects a PaCO2: NeedSpan.
	Need           Need
	NeedBorderline bool
	NeedSpan       Span
	// DaysFit says that an acute-on-chronic pattern also fits a rise over days.
	DaysFit bool
	// UsualPaCO2 is the range of usual PaCO2 that an acute-on-chronic
	// bicarbonate points to, mmHg.
	UsualPaCO2 Span
}

// Is says that the process is named, as primary or beside it.
func (ab AcidBase) Is(p Process) bool {
	if ab.Primary == p {
		return true
	}
	for _, q := range ab.Also {
		if q == p {
			return true
		}
	}
	return false
}
