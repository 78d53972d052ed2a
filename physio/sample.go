package physio

// Blood is the kind of sample.
type Blood string

// The kinds of sample. Unstated blood is taken as arterial, and the answer
// says so.
const (
	BloodUnstated  Blood = ""
	Arterial       Blood = "arterial"
	Venous         Blood = "venous"
	CentralVenous  Blood = "central_venous"
	MixedVenous    Blood = "mixed_venous"
	Capillary      Blood = "capillary"
	Cord           Blood = "cord"
	Intraosseous   Blood = "intraosseous"
	BloodUncertain Blood = "unknown" // said to be in doubt
	NoBlood        Blood = "none"    // bedside values without a gas
)

// Site says where a capillary or umbilical sample came from when it was said.
type Site string

// The sites that change what a sample may say.
const (
	SiteUnstated   Site = ""
	Earlobe        Site = "earlobe"
	Finger         Site = "finger"
	Heel           Site = "heel"
	UmbilicalVein  Site = "umbilical_vein"
	UmbilicalArt   Site = "umbilical_artery"
	CordArterySite Site = "cord_artery"
	CordVeinSite   Site = "cord_vein"
)

// Device is the kind of device that delivers oxygen or breaths. Makers' names
// are read as their kind.
type Device string

// The kinds of device.
const (
	DeviceUnstated   Device = ""
	Air              Device = "air"
	Cannula          Device = "cannula"
	ReservoirCannula Device = "reservoir_cannula" // conserving, pendant
	PulseDose        Device = "pulse_dose"
	SimpleMask       Device = "simple_mask"
	ReservoirMask    Device = "reservoir_mask"
	Venturi          Device = "venturi"
	FaceTent         Device = "face_tent"
	TracheostomyMask Device = "tracheostomy_mask"
	TPiece           Device = "t_piece"
	Hood             Device = "hood"
	HighFlow         Device = "high_flow"
	CPAPDevice       Device = "cpap"
	Bilevel          Device = "bilevel"
	Ventilator       Device = "ventilator"
	BagMask          Device = "bag_mask"
	Chamber          Device = "hyperbaric_chamber"
)

// Mode is a ventilator mode in the trade's own abbreviation.
type Mode string

// The modes that are read.
const (
	ModeUnstated Mode = ""
	AssistCtrl   Mode = "AC"
	VolumeCtrl   Mode = "VC"
	PressureCtrl Mode = "PC"
	PRVC         Mode = "PRVC"
	SIMV         Mode = "SIMV"
	PressSupport Mode = "PS"
	APRV         Mode = "APRV"
	HFOV         Mode = "HFOV"
	HFJV         Mode = "HFJV"
	NAVA         Mode = "NAVA"
)

// Population chooses the table of limits.
type Population string

// The populations.
const (
	PopulationUnstated Population = ""
	Adult              Population = "adult"
	Pregnant           Population = "pregnant"
	Child              Population = "child"
	Newborn            Population = "newborn"
	Preterm            Population = "preterm"
)

// Sex is needed for predicted body weight only.
type Sex string

// The sexes that the predicted-weight equations know.
const (
	SexUnstated Sex = ""
	Female      Sex = "f"
	Male        Sex = "m"
)

// Circumstance is a set of things said about the patient that change a rule
// or call for a caution.
type Circumstance uint32

// The circumstances. Each is set by words only, never guessed from numbers.
const (
	COPD Circumstance = 1 << iota
	AsthmaAttack
	Retainer // other known CO2 retention: obesity hypoventilation, neuromuscular, kyphoscoliosis, home NIV
	ECMO
	CPR        // the sample was drawn during resuscitation
	PostArrest // after return of circulation
	CyanoticHeart
	BrainInjury
	Heliox
	Hyperbaric
	SmokeOrCO
	MetHbCause
	JustChanged // a setting was changed within the last half hour
	Prone
	Shock
	HomeVentilation
	BledInOxygen // oxygen bled into a breathing circuit: FiO2 not known
	SpontaneousBreathing
	OpioidOrSedation
	Ketoacidosis
	Sepsis
	Transfusion
	Anxious
	PulmonaryHypertensionNewborn
	TempCorrected
)

// Has says that all of c are set.
func (c Circumstance) Has(o Circumstance) bool { return c&o == o }

// Sample is what was measured, set and said of one patient at one time.
type Sample struct {
	Values
	Blood        Blood
	Site         Site
	Device       Device
	DeviceTaken  bool // the device was not said but taken from a flow
	Mode         Mode
	Sex          Sex
	Population   Population // said in the line; "" leaves it to the setting
	Trimester    int        // 1 to 3 when pregnancy is dated, else 0
	Circumstance Circumstance
}

// Target is a saturation target as fractions, both ends included.
type Target struct {
	Low  float64 `json:"low"`
	High float64 `json:"high"`
}

// Setting is what the house and the patient set around a sample.
type Setting struct {
	Population Population
	// PB is a house barometric pressure in mmHg, Altitude a house altitude in
	// metres; 0 is "not set". A measured pressure in the sample wins.
	PB, Altitude float64
	// Target is the saturation target in force, nil when none is.
	Target *Target
	// TargetPaCO2 bounds the PaCO2 that is wanted, nil when none is set.
	TargetPaCO2 *Span
	// UsualPaCO2 is a retainer's own PaCO2 in mmHg, 0 when not known.
	UsualPaCO2 float64
	// Critical are the house's critical limits, nil for the defaults.
	Critical *CriticalLimits
}

// CriticalLimits are the values at which the critical-result route comes
// first: pH below PHLow or above PHHigh, PaCO2 above PaCO2High, PaO2 below
// PaO2Low (mmHg). A zero field is no limit.
type CriticalLimits struct {
	PHLow     float64 `json:"ph_low,omitempty"`
	PHHigh    float64 `json:"ph_high,omitempty"`
	PaCO2High float64 `json:"paco2_high,omitempty"`
	PaO2Low   float64 `json:"pao2_low,omitempty"`
}
