package bot

import "encoding/json"

// MachineVersion is the version of the machine-readable answer.
const MachineVersion = 1

// Machine is the answer in machine-readable form. Absent things are left out.
// Units: pressures mmHg, fractions 0 to 1, concentrations mmol/L, Hb g/dL,
// albumin g/L, VT mL, VE and flow L/min, airway pressures cmH2O, temperature
// Celsius, age in years, height cm, weight kg, altitude m.
type Machine struct {
	V             int                     `json:"v"`
	Kind          string                  `json:"kind"`
	Headline      string                  `json:"headline,omitempty"`
	Text          string                  `json:"text"`
	Values        map[string]any          `json:"values,omitempty"`
	Intervals     map[string][2]float64   `json:"intervals,omitempty"`
	Sample        string                  `json:"sample,omitempty"`
	SampleAssumed bool                    `json:"sample_assumed,omitempty"`
	Device        string                  `json:"device,omitempty"`
	Mode          string                  `json:"mode,omitempty"`
	Population    string                  `json:"population,omitempty"`
	Bed           string                  `json:"bed,omitempty"`
	Time          string                  `json:"time,omitempty"`
	Critical      []string                `json:"critical,omitempty"`
	Notes         []MachineText           `json:"notes,omitempty"`
	Problem       string                  `json:"problem,omitempty"`
	Ventilation   *MachineVentilation     `json:"ventilation,omitempty"`
	Oxygenation   *MachineOxygenation     `json:"oxygenation,omitempty"`
	AcidBase      *MachineAcidBase        `json:"acid_base,omitempty"`
	Mechanism     []string                `json:"mechanism,omitempty"`
	Indices       map[string]MachineIndex `json:"indices,omitempty"`
	Missing       []string                `json:"missing,omitempty"`
	Cautions      []MachineText           `json:"cautions,omitempty"`
	Question      *MachineQuestion        `json:"question,omitempty"`
	// Gases holds one entry a gas when the message held several.
	Gases []Machine `json:"gases,omitempty"`
}

// MachineText is a sentence with the id of what it says.
type MachineText struct {
	ID   string `json:"id"`
	Text string `json:"text"`
}

// MachineVentilation is the ventilation axis.
type MachineVentilation struct {
	Level      string `json:"level"`
	Efficiency string `json:"efficiency"`
	Need       string `json:"need,omitempty"`
	Borderline bool   `json:"borderline"`
}

// MachineOxygenation is the oxygenation axis.
type MachineOxygenation struct {
	Level         string      `json:"level"`
	Efficiency    string      `json:"efficiency"`
	Target        *[2]float64 `json:"target,omitempty"`
	AgainstTarget string      `json:"against_target,omitempty"`
	ExpectedHere  bool        `json:"expected_here,omitempty"`
	Borderline    bool        `json:"borderline"`
}

// MachineAcidBase is the acid-base side.
type MachineAcidBase struct {
	Primary      string   `json:"primary"`
	Also         []string `json:"also,omitempty"`
	Course       string   `json:"course"`
	Compensation string   `json:"compensation"`
	Gap          string   `json:"gap"`
}

// MachineIndex is one derived number with the range it may truly lie in.
type MachineIndex struct {
	Value float64 `json:"value"`
	Low   float64 `json:"low"`
	High  float64 `json:"high"`
	Unit  string  `json:"unit,omitempty"`
}

// MachineQuestion is the one question of an answer.
type MachineQuestion struct {
	ID      string   `json:"id"`
	Text    string   `json:"text"`
	Choices []string `json:"choices,omitempty"`
}

// JSON writes the machine form on one line.
func (m Machine) JSON() ([]byte, error) { return json.Marshal(m) }
