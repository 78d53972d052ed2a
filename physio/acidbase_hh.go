package physio

import "math"

// The house family of constants. They are used together or not at all: the
// reference bicarbonate gives a base excess of 0 at pH 7.40 and PCO2 40 only
// with its own solubility and pK'.
const (
	alphaCO2      = 0.0306 // solubility of CO2 in plasma at 37 C, mmol/L/mmHg (Baillie 2008)
	pKCO2         = 6.10   // apparent first dissociation constant of carbonic acid (Baillie 2008)
	referenceHCO3 = 24.4   // mmol/L at pH 7.40 and PCO2 40 (Siggaard-Andersen 1977)
	referencePH   = 7.40
	referencePCO2 = 40.0   // mmHg
	vanSlykeScale = 0.9287 // 1 - 0.023 x 3.1 mmol/L of haemoglobin in the extracellular space
	vanSlykeBeta  = 14.83  // mmol/L per pH, buffers of the extracellular space
)

// Bicarbonate gives the actual bicarbonate of blood at 37 C from its pH and
// PCO2 (Henderson-Hasselbalch). It holds within a few per cent from pH 6.8 to
// 7.8; published pairs of constants differ by 3.5 %.
func Bicarbonate(ph PH, pco2 Pressure) (Concentration, error) {
	if err := check(given{q: PHq, v: float64(ph)}, given{q: PaCO2, v: pco2.MmHg()}); err != nil {
		return 0, err
	}
	return MmolL(bicarbonate(float64(ph), pco2.MmHg())), nil
}

func bicarbonate(ph, pco2 float64) float64 {
	return alphaCO2 * pco2 * pow10(ph-pKCO2) // Hasselbalch 1916
}

// PHFrom gives the pH that belongs to a PCO2 and a bicarbonate, the check
// digit of a typed triple.
func PHFrom(pco2 Pressure, hco3 Concentration) (PH, error) {
	if err := check(given{q: PaCO2, v: pco2.MmHg()}, given{q: HCO3, v: float64(hco3)}); err != nil {
		return 0, err
	}
	return PH(phFrom(pco2.MmHg(), float64(hco3))), nil
}

func phFrom(pco2, hco3 float64) float64 {
	return pKCO2 + log10(hco3/(alphaCO2*pco2)) // Hasselbalch 1916
}

// PCO2From gives the PCO2 that belongs to a pH and a bicarbonate.
func PCO2From(ph PH, hco3 Concentration) (Pressure, error) {
	if err := check(given{q: PHq, v: float64(ph)}, given{q: HCO3, v: float64(hco3)}); err != nil {
		return 0, err
	}
	return MmHg(pco2From(float64(ph), float64(hco3))), nil
}

func pco2From(ph, hco3 float64) float64 {
	return hco3 / (alphaCO2 * pow10(ph-pKCO2)) // Hasselbalch 1916
}

// StandardBaseExcess gives the base excess of the extracellular fluid in
// mmol/L by the Van Slyke equation, with haemoglobin fixed at a third of the
// usual. Negative is a deficit. It moves little when only PaCO2 changes.
func StandardBaseExcess(ph PH, hco3 Concentration) (Concentration, error) {
	if err := check(given{q: PHq, v: float64(ph)}, given{q: HCO3, v: float64(hco3)}); err != nil {
		return 0, err
	}
	return MmolL(standardBaseExcess(float64(ph), float64(hco3))), nil
}

func standardBaseExcess(ph, hco3 float64) float64 {
	return vanSlykeScale * (hco3 - referenceHCO3 + vanSlykeBeta*(ph-referencePH)) // Siggaard-Andersen 1977, as used by Schlichtig 1998
}

// BicarbonateFromBE gives the bicarbonate that belongs to a pH and a standard
// base excess: the Van Slyke equation solved for bicarbonate.
func BicarbonateFromBE(ph PH, sbe Concentration) (Concentration, error) {
	if err := check(given{q: PHq, v: float64(ph)}, given{q: BE, v: float64(sbe)}); err != nil {
		return 0, err
	}
	v := bicarbonateFromBE(float64(ph), float64(sbe))
	if err := check(given{q: HCO3, v: v}); err != nil {
		return 0, err
	}
	return MmolL(v), nil
}

func bicarbonateFromBE(ph, sbe float64) float64 {
	return sbe/vanSlykeScale + referenceHCO3 - vanSlykeBeta*(ph-referencePH) // Siggaard-Andersen 1977
}

// PHAtPCO2 gives the pH at another PCO2 when the standard base excess stays as
// it is: what an acute change of ventilation alone does (Schlichtig 1998).
// From pH 7.40 and PaCO2 40, a PaCO2 of 60 gives 7.26.
func PHAtPCO2(sbe Concentration, pco2 Pressure) (PH, error) {
	if err := check(given{q: BE, v: float64(sbe)}, given{q: PaCO2, v: pco2.MmHg()}); err != nil {
		return 0, err
	}
	ph := phAtPCO2(float64(sbe), pco2.MmHg())
	if err := check(given{q: PHq, v: ph}); err != nil {
		return 0, err
	}
	return PH(ph), nil
}

// phAtPCO2 solves for the pH by Newton's method: base excess rises with pH
// without a bend the other way, so a few steps from the middle find it.
func phAtPCO2(sbe, pco2 float64) float64 {
	ph := referencePH
	for range 20 {
		hco3 := bicarbonate(ph, pco2)
		slope := vanSlykeScale * (hco3*math.Ln10 + vanSlykeBeta)
		step := (standardBaseExcess(ph, hco3) - sbe) / slope
		ph -= step
		if abs(step) < 1e-12 {
			break
		}
	}
	return ph
}
