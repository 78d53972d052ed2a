package physio

// Quantity names one thing that can be measured, set or said as a number.
type Quantity uint8

// The quantities, in the order in which a reading is echoed.
const (
	PHq Quantity = iota
	PaCO2
	PaO2
	HCO3
	StdHCO3
	TotalCO2
	BE
	SaO2
	SpO2
	SpO2Pre
	SpO2Post
	FiO2
	OxygenFlow
	RR
	RRSet
	VT
	VTPerKg
	VE
	PEEP
	AutoPEEP
	Pplat
	PIP
	Pmean
	PS
	PC
	IPAP
	EPAP
	CPAP
	PHigh
	PLow
	THigh
	TLow
	Hertz
	Amplitude
	EtCO2
	TcCO2
	TcO2
	PeCO2
	VDVT
	Hb
	COHb
	MetHb
	Na
	K
	Cl
	Lactate
	Albumin
	Glucose
	Phosphate
	Magnesium
	Calcium
	Temp
	Age
	Gestation
	Height
	Weight
	PBW
	PB
	Altitude
	PvO2
	SvO2
	ScvO2
	PvCO2
	CardiacOutput
	quantityCount
)

// Info is what the table knows of one quantity.
type Info struct {
	// Key is the name in the machine-readable answer.
	Key string
	// Symbol is the name as it is printed.
	Symbol string
	// Unit is the canonical unit, "" for pH and other pure numbers, "fraction"
	// for parts of one.
	Unit string
	// Low and High bound what is possible in a living patient or on a working
	// device; a value outside was mistyped or misread. They are not reference
	// ranges.
	Low, High float64
	// Source says where the bounds come from.
	Source string
}

const (
	analyser = "analyser measuring ranges, common practice"
	practice = "common practice"
)

// quantities is the one table of quantities.
var quantities = [quantityCount]Info{
	PHq:           {"ph", "pH", "", 6.6, 7.9, "survivable range with reserve: analysers report 6.5-8.0; common practice"},
	PaCO2:         {"paco2", "PaCO2", "mmHg", 5, 200, analyser},
	PaO2:          {"pao2", "PaO2", "mmHg", 10, 700, analyser + "; 713 mmHg is dry oxygen at sea level less water vapour"},
	HCO3:          {"hco3", "HCO3", "mmol/L", 1, 70, "Henderson-Hasselbalch over the possible pH and PaCO2; common practice"},
	StdHCO3:       {"std_hco3", "standard HCO3", "mmol/L", 1, 70, "as bicarbonate"},
	TotalCO2:      {"total_co2", "total CO2", "mmol/L", 1, 75, "as bicarbonate plus dissolved CO2"},
	BE:            {"be", "BE", "mmol/L", -40, 45, analyser},
	SaO2:          {"sao2", "SaO2", "fraction", 0.05, 1, "definition"},
	SpO2:          {"spo2", "SpO2", "fraction", 0.40, 1, "oximeters are not usable below about 0.40: sheet, section 11"},
	SpO2Pre:       {"spo2_pre", "preductal SpO2", "fraction", 0.40, 1, "as SpO2"},
	SpO2Post:      {"spo2_post", "postductal SpO2", "fraction", 0.40, 1, "as SpO2"},
	FiO2:          {"fio2", "FiO2", "fraction", 0.15, 1, "hypoxic tests go down to 0.15; common practice"},
	OxygenFlow:    {"flow", "flow", "L/min", 0, 80, "adult high-flow devices end at 60-80 L/min; common practice"},
	RR:            {"rr", "RR", "/min", 1, 120, "newborns reach about 100; common practice"},
	RRSet:         {"rr_set", "set rate", "/min", 1, 150, practice},
	VT:            {"vt", "VT", "mL", 1, 3000, "preterm to a large adult breath; common practice"},
	VTPerKg:       {"vt_per_kg", "VT per kg", "mL/kg", 1, 20, practice},
	VE:            {"ve", "VE", "L/min", 0.05, 80, "preterm to exercise; common practice"},
	PEEP:          {"peep", "PEEP", "cmH2O", 0, 40, practice},
	AutoPEEP:      {"auto_peep", "auto-PEEP", "cmH2O", 0, 40, practice},
	Pplat:         {"pplat", "Pplat", "cmH2O", 2, 80, practice},
	PIP:           {"pip", "PIP", "cmH2O", 2, 120, practice},
	Pmean:         {"mpaw", "mean airway pressure", "cmH2O", 1, 60, practice},
	PS:            {"ps", "PS", "cmH2O", 0, 50, practice},
	PC:            {"pc", "PC", "cmH2O", 1, 80, practice},
	IPAP:          {"ipap", "IPAP", "cmH2O", 2, 50, practice},
	EPAP:          {"epap", "EPAP", "cmH2O", 0, 30, practice},
	CPAP:          {"cpap", "CPAP", "cmH2O", 1, 30, practice},
	PHigh:         {"p_high", "P high", "cmH2O", 5, 60, practice},
	PLow:          {"p_low", "P low", "cmH2O", 0, 30, practice},
	THigh:         {"t_high", "T high", "s", 0.1, 15, practice},
	TLow:          {"t_low", "T low", "s", 0.1, 5, practice},
	Hertz:         {"hz", "frequency", "Hz", 2, 20, practice},
	Amplitude:     {"amplitude", "amplitude", "cmH2O", 5, 120, practice},
	EtCO2:         {"etco2", "EtCO2", "mmHg", 1, 150, practice},
	TcCO2:         {"tcco2", "TcCO2", "mmHg", 5, 200, practice},
	TcO2:          {"tco2", "TcO2", "mmHg", 5, 700, practice},
	PeCO2:         {"peco2", "mixed expired PCO2", "mmHg", 1, 100, practice},
	VDVT:          {"vd_vt", "VD/VT", "fraction", 0.05, 0.95, "sheet, section 4.1"},
	Hb:            {"hb", "Hb", "g/dL", 1, 28, analyser},
	COHb:          {"cohb", "COHb", "fraction", 0, 0.80, analyser},
	MetHb:         {"methb", "MetHb", "fraction", 0, 0.80, analyser},
	Na:            {"na", "Na", "mmol/L", 90, 200, analyser},
	K:             {"k", "K", "mmol/L", 0.8, 15, analyser},
	Cl:            {"cl", "Cl", "mmol/L", 30, 170, analyser},
	Lactate:       {"lactate", "lactate", "mmol/L", 0, 35, analyser},
	Albumin:       {"albumin", "albumin", "g/L", 5, 70, practice},
	Glucose:       {"glucose", "glucose", "mmol/L", 0.3, 80, practice},
	Phosphate:     {"phosphate", "phosphate", "mmol/L", 0.1, 6, practice},
	Magnesium:     {"magnesium", "Mg", "mmol/L", 0.2, 6, practice},
	Calcium:       {"calcium", "ionised Ca", "mmol/L", 0.3, 3, practice},
	Temp:          {"temp", "temperature", "C", 15, 44, "validity of the temperature corrections: sheet, section 2"},
	Age:           {"age", "age", "y", 0, 120, practice},
	Gestation:     {"gestation", "gestation", "wk", 21, 44, practice},
	Height:        {"height", "height", "cm", 25, 250, practice},
	Weight:        {"weight", "weight", "kg", 0.3, 400, practice},
	PBW:           {"pbw", "predicted weight", "kg", 20, 120, practice},
	PB:            {"pb", "PB", "mmHg", 200, 2500, "8848 m to a hyperbaric chamber; a hospital lies between 450 and 800: sheet, section 1.3"},
	Altitude:      {"altitude", "altitude", "m", -430, 9000, "Dead Sea shore to the summit of Everest"},
	PvO2:          {"pvo2", "PvO2", "mmHg", 8, 100, practice},
	SvO2:          {"svo2", "SvO2", "fraction", 0.05, 0.99, practice},
	ScvO2:         {"scvo2", "ScvO2", "fraction", 0.05, 0.99, practice},
	PvCO2:         {"pvco2", "PvCO2", "mmHg", 8, 220, practice},
	CardiacOutput: {"co", "cardiac output", "L/min", 0.1, 30, practice},
}

// Info gives the table row of the quantity.
func (q Quantity) Info() Info { return quantities[q] }

// Key is the quantity's name in the machine-readable answer.
func (q Quantity) Key() string { return quantities[q].Key }

// Possible says whether v, in the canonical unit, can be true of a patient or
// a device.
func (q Quantity) Possible(v float64) bool {
	return finite(v) && v >= quantities[q].Low && v <= quantities[q].High
}

// Quantities lists all quantities in echo order.
func Quantities() []Quantity {
	all := make([]Quantity, quantityCount)
	for i := range all {
		all[i] = Quantity(i)
	}
	return all
}

// QuantityByKey finds a quantity by its name in the machine-readable answer.
func QuantityByKey(key string) (Quantity, bool) {
	for i := range quantities {
		if quantities[i].Key == key {
			return Quantity(i), true
		}
	}
	return 0, false
}
