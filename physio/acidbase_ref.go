package physio

// The equations in this file are published ways to compute acid-base numbers
// that analysers and books print. They reproduce such numbers; the house family
// in acidbase_hh.go is the one to compute with. A base excess belongs with its
// own constants.

// Constants is one published pair of Henderson-Hasselbalch constants.
type Constants struct {
	Solubility float64 // of CO2, mmol/L/mmHg at 37 C
	PK         float64 // apparent pK' of carbonic acid
}

// Published pairs.
var (
	ConstantsHouse      = Constants{alphaCO2, pKCO2} // Baillie 2008
	ConstantsCLSI       = Constants{0.0307, 6.095}   // CLSI C46-A2 2009; goes with StandardBaseExcessCLSI
	ConstantsNCCLS      = Constants{0.0307, 6.105}   // NCCLS C12-A 1994
	ConstantsLangZander = Constants{0.0304, 6.1}     // Lang and Zander 2002
	ConstantsBedside    = Constants{0.03, 6.1}       // common practice
)

func (c Constants) check() error {
	return check(given{name: "solubility", v: c.Solubility, low: 0.02, high: 0.04}, given{name: "pK", v: c.PK, low: 5.8, high: 6.4})
}

// Bicarbonate gives the actual bicarbonate with these constants.
func (c Constants) Bicarbonate(ph PH, pco2 Pressure) (Concentration, error) {
	if err := c.check(); err != nil {
		return 0, err
	}
	if err := check(given{q: PHq, v: float64(ph)}, given{q: PaCO2, v: pco2.MmHg()}); err != nil {
		return 0, err
	}
	return MmolL(c.Solubility * pco2.MmHg() * pow10(float64(ph)-c.PK)), nil // Hasselbalch 1916
}

// HendersonKPa gives the constant k of [H+] = k x PCO2/HCO3 with these
// constants, in nmol/L for PCO2 in kPa: 182.3 for the house family.
func (c Constants) HendersonKPa() (float64, error) {
	if err := c.check(); err != nil {
		return 0, err
	}
	return c.Solubility * mmHgPerKPa * pow10(9-c.PK), nil // Baillie 2008
}

// HydrogenBedside gives the hydrogen ion concentration in nmol/L by the
// bedside form 24 x PCO2/HCO3 (180 in kPa), 1.3 % below the house family.
func HydrogenBedside(pco2 Pressure, hco3 Concentration) (float64, error) {
	if err := check(given{q: PaCO2, v: pco2.MmHg()}, given{q: HCO3, v: float64(hco3)}); err != nil {
		return 0, err
	}
	return 24 * pco2.MmHg() / float64(hco3), nil // Adrogue and Madias 2010
}

// TotalCarbonDioxide gives bicarbonate plus dissolved CO2: what a chemistry
// panel prints as bicarbonate.
func TotalCarbonDioxide(hco3 Concentration, pco2 Pressure) (Concentration, error) {
	if err := check(given{q: HCO3, v: float64(hco3)}, given{q: PaCO2, v: pco2.MmHg()}); err != nil {
		return 0, err
	}
	return MmolL(totalCarbonDioxide(float64(hco3), pco2.MmHg())), nil
}

func totalCarbonDioxide(hco3, pco2 float64) float64 { return hco3 + alphaCO2*pco2 } // common practice

// StandardBaseExcessCLSI gives the base excess of the extracellular fluid by
// the linear form without haemoglobin. In severe acidosis it is 2 to 2.5 more
// negative than StandardBaseExcess.
func StandardBaseExcessCLSI(ph PH, hco3 Concentration) (Concentration, error) {
	if err := check(given{q: PHq, v: float64(ph)}, given{q: HCO3, v: float64(hco3)}); err != nil {
		return 0, err
	}
	return MmolL(float64(hco3) - 24.8 + 16.2*(float64(ph)-referencePH)), nil // CLSI C46-A2 2009
}

// BloodForBE is what a base excess of whole blood needs.
type BloodForBE struct {
	PH    PH
	HCO3  Concentration
	PaCO2 Pressure // used by BaseExcessLangZander in place of HCO3
	Hb    Haemoglobin
	SO2   Fraction // used by BaseExcessLangZander only
}

// BaseExcessCLSI gives the base excess of whole blood from pH, HCO3 and Hb. It
// moves with PaCO2 in the body, which the standard base excess does not.
func BaseExcessCLSI(b BloodForBE) (Concentration, error) {
	if err := check(given{q: PHq, v: float64(b.PH)}, given{q: HCO3, v: float64(b.HCO3)}, given{q: Hb, v: float64(b.Hb)}); err != nil {
		return 0, err
	}
	hb := float64(b.Hb)
	return MmolL((1 - 0.014*hb) * (float64(b.HCO3) - 24.8 + (1.43*hb+7.7)*(float64(b.PH)-referencePH))), nil // CLSI C46-A2 2009
}

// BaseExcessLangZander gives the base excess of whole blood from pH, PaCO2, Hb
// and saturation; the saturation term lets venous blood be used.
func BaseExcessLangZander(b BloodForBE) (Concentration, error) {
	err := check(
		given{q: PHq, v: float64(b.PH)}, given{q: PaCO2, v: b.PaCO2.MmHg()},
		given{q: Hb, v: float64(b.Hb)}, given{q: SaO2, v: float64(b.SO2)},
	)
	if err != nil {
		return 0, err
	}
	ph, hb := float64(b.PH), float64(b.Hb)
	hco3 := 0.0304 * b.PaCO2.MmHg() * pow10(ph-6.1) // Lang and Zander 2002
	be := (1-0.0143*hb)*(hco3-24.26+(9.5+1.63*hb)*(ph-referencePH)) - 0.2*hb*(1-float64(b.SO2))
	return MmolL(be), nil
}

// StandardBaseExcessHb gives the base excess of the extracellular fluid with
// the patient's own haemoglobin, spread over three times the blood volume.
func StandardBaseExcessHb(b BloodForBE) (Concentration, error) {
	if err := check(given{q: PHq, v: float64(b.PH)}, given{q: HCO3, v: float64(b.HCO3)}, given{q: Hb, v: float64(b.Hb)}); err != nil {
		return 0, err
	}
	c := float64(b.Hb) * 0.6206 / 3                                                                    // g/dL to mmol/L of monomer, in the extracellular space
	sbe := (1 - 0.023*c) * (float64(b.HCO3) - referenceHCO3 + (2.3*c+7.7)*(float64(b.PH)-referencePH)) // Siggaard-Andersen 1977
	return MmolL(sbe), nil
}

// StandardBicarbonateCLSI gives the bicarbonate at PCO2 40 and full saturation
// from a base excess of whole blood, as analysers print it.
func StandardBicarbonateCLSI(be Concentration, hb Haemoglobin, so2 Fraction) (Concentration, error) {
	if err := check(given{q: BE, v: float64(be)}, given{q: Hb, v: float64(hb)}, given{q: SaO2, v: float64(so2)}); err != nil {
		return 0, err
	}
	return MmolL(25 + 0.78*float64(be) + 0.002*float64(hb)*(so2.Percent()-100)), nil // NCCLS C12-A 1994
}
