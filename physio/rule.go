package physio

import (
	"fmt"
	"strings"
)

// Rule is how a number or a verdict was made: the equation in the field's
// notation, the cut-off it is held against, and the source. Package bot prints
// it behind "why" with the inputs of the sample.
type Rule struct {
	Equation string
	Cutoff   string
	Source   string
}

// rules is the one table of rules, by index key; the verdicts that rest on no
// index have keys of their own.
var rules = map[string]Rule{
	"hco3_calc":              {"HCO3 = 0.0306 x PaCO2 x 10^(pH - 6.10)", "within 6 % of the printed one", "Henderson-Hasselbalch; constants as in Baillie 2008"},
	"sbe":                    {"SBE = 0.9287 x (HCO3 - 24.4 + 14.83 x (pH - 7.40))", "-2 to 2 mmol/L", "Van Slyke equation, Siggaard-Andersen 1977"},
	"pao2_alveolar":          {"PAO2 = FiO2 x (PB - 47) - PaCO2 x (FiO2 + (1 - FiO2)/0.8)", "", "Fenn, Rahn and Otis 1946"},
	"aa":                     {"A-a = PAO2 - PaO2", "on air 2.5 + 0.21 x age to age/4 + 4 mmHg; no band holds on oxygen", "Mellemgaard 1966; the second line is common practice"},
	"aa_expected":            {"2.5 + 0.21 x age to age/4 + 4, on air", "", "Mellemgaard 1966; the second line is common practice"},
	"a_over_a":               {"a/A = PaO2 / PAO2", "0.75 or more efficient; on oxygen below 0.35 poor, on air below 0.5 poor (our bands)", "Gilbert and Keighley 1974"},
	"resp_index":             {"(PAO2 - PaO2) / PaO2", "0.33 is a/A 0.75", "Goldfarb 1975, from memory"},
	"pf":                     {"P/F = PaO2 / FiO2", "300 mmHg or below reduced, 200 mmHg or below poor, on oxygen with PaCO2 up to 50 mmHg", "Berlin definition 2012"},
	"pf_altitude_corrected":  {"P/F x PB/760", "", "Berlin definition 2012, footnote above 1000 m"},
	"sf":                     {"S/F = SpO2 / FiO2", "315 and 235 stand for P/F 300 and 200 mmHg; not above SpO2 97 %", "Rice 2007; Matthay 2024"},
	"rox":                    {"(SpO2/FiO2) / RR", "4.88 or more at 2, 6 and 12 h of high flow: lower risk", "Roca 2019"},
	"oi":                     {"OI = 100 x FiO2 x mean airway pressure / PaO2", "children: 4, 8, 16", "PALICC 2015"},
	"osi":                    {"OSI = 100 x FiO2 x mean airway pressure / SpO2", "children: 5, 7.5, 12.3", "PALICC 2015"},
	"ve_corrected":           {"VE x PaCO2 / 40", "above 10 L/min reduced, 15 or more poor (our band)", "common practice"},
	"vent_ratio":             {"VR = VE x PaCO2 / (PBW x 100 x 37.5)", "above 1.2 reduced, 2 or more poor (our bands)", "Sinha 2009"},
	"vd_vt":                  {"VD/VT = (PaCO2 - PeCO2) / PaCO2", "above 0.40 reduced, 0.60 or more poor", "Enghoff 1938; Nuckton 2002"},
	"pa_et_gap":              {"PaCO2 - EtCO2", "above 5 mmHg reduced, 15 or more poor (our band)", "common practice"},
	"alveolar_dead_fraction": {"(PaCO2 - EtCO2) / PaCO2", "", "Bonifazi 2021"},
	"alveolar_vent":          {"(VT - 2.2 x PBW) x RR", "", "Numa and Newth 1996"},
	"pbw":                    {"PBW = 50 (men) or 45.5 (women) + 0.91 x (height - 152.4)", "", "ARDS Network 2000"},
	"vt_per_pbw":             {"VT / PBW", "6 to 8 mL/kg", "ARDS Network 2000"},
	"vt_per_weight":          {"VT / weight", "", "common practice"},
	"driving_pressure":       {"Pplat - PEEP", "15 cmH2O", "Amato 2015"},
	"compliance":             {"VT / (Pplat - PEEP)", "", "common practice"},
	"mech_power":             {"0.098 x RR x VT x (PIP - (Pplat - PEEP)/2)", "17 J/min", "Gattinoni 2016; Serpa Neto 2018"},
	"rsbi":                   {"RR / VT", "105 /min/L", "Yang and Tobin 1991"},
	"anion_gap":              {"Na - Cl - HCO3", "usual 12, high from 16 mmol/L", "common practice; use the local range"},
	"anion_gap_corrected":    {"AG + 0.25 x (40 - albumin)", "usual 12, high from 16 mmol/L", "Figge 1998"},
	"delta_ratio":            {"(AG - 12) / (24 - HCO3)", "1 to 2 high gap alone, above 2 an alkalosis beside", "common practice"},
	"expected_paco2":         {"acidosis: 40 + SBE (+-3) and 1.5 x HCO3 + 8 (+-2); alkalosis: 0.7 x HCO3 + 20 (+-5) and 40 + 0.6 x SBE (+-3)", "short or beyond outside both bands, all in mmHg", "Schlichtig 1998; Albert, Dell and Winters 1967"},
	"expected_hco3_acute":    {"24 + 0.1 x (PaCO2 - 40), or 24 - 0.2 x (40 - PaCO2)", "+-2 mmol/L", "Boston rules, as in Adrogue and Madias 2010"},
	"expected_hco3_chronic":  {"24 + 0.35 to 0.51 x (PaCO2 - 40), or 24 - 0.41 x (40 - PaCO2)", "", "Boston rules; Martinu 2003; Krapf 1991"},
	"expected_ph_acute":      {"pH if only PaCO2 had changed, from SBE 0", "", "Schlichtig 1998"},
	"expected_ph_chronic":    {"pH at this PaCO2 with the chronic HCO3", "", "Boston rules; Martinu 2003"},
	"sao2_calc":              {"oxygen dissociation curve at this pH and PaCO2", "", "Siggaard-Andersen 1984"},
	"cao2":                   {"1.34 x Hb x SaO2 + 0.0031 x PaO2", "", "common practice"},
	"shunt":                  {"Qs/Qt = (Cc' - Ca) / (Cc' - Cv)", "below 0.05 in health", "Berggren 1942"},
	"shunt_estimated":        {"(Cc' - Ca) / (Cc' - Ca + D), D 3.5 to 5 mL/dL assumed", "not below 35 % oxygen", "Berggren 1942; Harrison 1975; Benatar 1973"},
	"cco2":                   {"content of end-capillary blood at PAO2", "", "curve of Siggaard-Andersen 1984"},
	"sid_apparent":           {"Na + K + 2 Ca + 2 Mg - Cl - lactate", "", "Kellum 2007"},
	"sid_effective":          {"HCO3 + albumin x (0.123 pH - 0.631) + phosphate x (0.309 pH - 0.469)", "", "Figge 1992"},
	"sig":                    {"apparent less effective strong ion difference", "ordinary values give about 5, above 8 raised", "Kellum 1995"},
	"p50":                    {"PO2 at 50 % saturation from the measured pair", "usual 26.6 mmHg", "Siggaard-Andersen 1984"},
	"pao2_expected_at_paco2": {"PAO2 less the expected A-a (air), or 0.75 to 0.82 x PAO2 (oxygen)", "", "Gilbert and Keighley 1974"},
	"paco2_range":            {"PaCO2 against its range", "35 to 45 mmHg (4.7 to 6.0 kPa)", "common practice"},
	"pao2_scale":             {"PaO2 on the scale for air at sea level", "80, 60 and 40 mmHg", "common practice"},
	"critical":               {"values against the critical limits", "pH 7.20 and 7.60, PaCO2 70 mmHg, PaO2 45 mmHg unless the house sets others", "after Kost 1990, from memory"},
	"borderline":             {"value and its spread in repeat samples against the cut-off", "PaCO2 +-1.5 mmHg, PaO2 +-7 %", "Mallat 2015"},
}

// RuleFor finds the rule of an index or a verdict.
func RuleFor(key string) (Rule, bool) {
	r, ok := rules[key]
	return r, ok
}

// RuleFor gives the rule behind a key as it was applied here: the range of
// PaCO2, the scale of PaO2 and the critical limits are those of the house or
// the population.
func (a *Assessment) RuleFor(key string) (Rule, bool) {
	rule, ok := RuleFor(key)
	switch r := a.Ranges; {
	case key == "paco2_range" && a.Ventilation.RangeHouse:
		rule.Cutoff, rule.Source = bothUnits(a.Ventilation.Range.Low, a.Ventilation.Range.High), "set by this channel"
	case key == "paco2_range" && r.Source != "":
		rule.Cutoff, rule.Source = bothUnits(r.PaCO2Low, r.PaCO2High), r.Source
	case key == "critical" && a.CriticalLimits != (CriticalLimits{}):
		rule.Cutoff = a.CriticalLimits.text()
		if a.CriticalHouse {
			rule.Source = "set by this channel"
		}
	case key == "pao2_scale" && !r.PaO2:
		rule.Cutoff = fmt.Sprintf("%.0f, %.0f and %.0f mmHg", newbornPaO2, newbornPaO2Mild, newbornPaO2Moderate)
		rule.Source = "newborn bounds, Huang 2017 and from memory"
	}
	return rule, ok
}

// bothUnits prints a range of pressures in mmHg and in kPa.
func bothUnits(low, high float64) string {
	return fmt.Sprintf("%.0f to %.0f mmHg (%.1f to %.1f kPa)", low, high, low/mmHgPerKPa, high/mmHgPerKPa)
}

// text prints the limits that are set, each with its side and unit.
func (c CriticalLimits) text() string {
	var parts []string
	for _, limit := range []struct {
		v            float64
		format, side string
	}{
		{c.PHLow, "%s %.2f", "pH below"}, {c.PHHigh, "%s %.2f", "pH above"},
		{c.PaCO2High, "%s %.0f mmHg", "PaCO2 above"}, {c.PaO2Low, "%s %.0f mmHg", "PaO2 below"},
	} {
		if limit.v > 0 {
			parts = append(parts, fmt.Sprintf(limit.format, limit.side, limit.v))
		}
	}
	return strings.Join(parts, ", ")
}
