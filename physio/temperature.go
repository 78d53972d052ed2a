package physio

import "math"

// PHAtTemp gives the pH at a patient temperature from the pH at 37 C. Derived
// quantities and verdicts belong to the values at 37 C; corrected ones stand
// beside them.
func PHAtTemp(ph PH, t Celsius) (PH, error) {
	if err := check(given{q: PHq, v: float64(ph)}, given{q: Temp, v: float64(t)}); err != nil {
		return 0, err
	}
	return PH(phAtTemp(float64(ph), float64(t))), nil
}

func phAtTemp(ph, t float64) float64 {
	return ph - (0.0147+0.0065*(ph-referencePH))*(t-bodyTemp) // CLSI C46-A2 2009
}

// PCO2AtTemp gives the PCO2 at a patient temperature from the PCO2 at 37 C;
// compare an end-tidal PCO2 with this one.
func PCO2AtTemp(pco2 Pressure, t Celsius) (Pressure, error) {
	if err := check(given{q: PaCO2, v: pco2.MmHg()}, given{q: Temp, v: float64(t)}); err != nil {
		return 0, err
	}
	return MmHg(pco2AtTemp(pco2.MmHg(), float64(t))), nil
}

func pco2AtTemp(pco2, t float64) float64 {
	return pco2 * pow10(0.019*(t-bodyTemp)) // CLSI C46-A2 2009
}

// PO2AtTemp gives the PO2 at a patient temperature from the PO2 at 37 C: 7.4 %
// a degree at low PO2, 1.3 % at high. It assumes a usual haemoglobin and P50.
func PO2AtTemp(po2 Pressure, t Celsius) (Pressure, error) {
	if err := check(given{q: PaO2, v: po2.MmHg()}, given{q: Temp, v: float64(t)}); err != nil {
		return 0, err
	}
	return MmHg(po2AtTemp(po2.MmHg(), float64(t))), nil
}

func po2AtTemp(po2, t float64) float64 {
	perDegree := 0.058/(0.243*math.Pow(po2/100, 3.88)+1) + 0.013 // Severinghaus 1979, eq 3
	return po2 * math.Exp(perDegree*(t-bodyTemp))
}
