package physio

// PulseOnOxygen is a pulse oximeter's reading on a fraction of oxygen.
type PulseOnOxygen struct {
	SpO2 Fraction
	FiO2 Fraction
}

func (p PulseOnOxygen) check(ceiling float64) error {
	return check(
		given{q: SpO2, v: float64(p.SpO2), low: quantities[SpO2].Low, high: ceiling},
		given{q: FiO2, v: float64(p.FiO2)},
	)
}

// SFRatio gives SpO2 in percent over FiO2. Above SpO2 0.97 it says nothing of
// the lung (Matthay 2024): RangeError.
func SFRatio(p PulseOnOxygen) (float64, error) {
	if err := p.check(float64(SaturationCeiling)); err != nil {
		return 0, err
	}
	return sfRatio(float64(p.SpO2), float64(p.FiO2)), nil
}

func sfRatio(spo2, fio2 float64) float64 { return 100 * spo2 / fio2 } // Rice 2007

// SFFromPF gives the S/F that belongs to a P/F on the line of a cohort of
// adults with acute lung injury. The published cut-offs 235 and 315 were chosen
// beside the line, which gives 232 and 316.
func SFFromPF(pf Pressure) (float64, error) {
	if err := check(given{name: "P/F", v: pf.MmHg(), low: 10, high: 1000}); err != nil {
		return 0, err
	}
	return 64 + 0.84*pf.MmHg(), nil // Rice 2007
}

// PFFromSF gives the P/F that belongs to an S/F between 73 and 600 on the same
// line.
func PFFromSF(sf float64) (Pressure, error) {
	if err := check(given{name: "S/F", v: sf, low: 73, high: 600}); err != nil {
		return 0, err
	}
	return MmHg((sf - 64) / 0.84), nil // Rice 2007
}

// ROX gives SpO2 in percent over FiO2 over breathing rate. Its limits were
// found in pneumonia on high flow from two hours on (Roca 2019).
func ROX(p PulseOnOxygen, rate Rate) (float64, error) {
	if err := p.check(1); err != nil {
		return 0, err
	}
	if err := check(given{q: RR, v: float64(rate)}); err != nil {
		return 0, err
	}
	return rox(float64(p.SpO2), float64(p.FiO2), float64(rate)), nil
}

func rox(spo2, fio2, rate float64) float64 { return 100 * spo2 / fio2 / rate } // Roca 2019

// OxygenationIndex gives 100 x FiO2 x mean airway pressure / PaO2, on positive
// pressure only.
func OxygenationIndex(fio2 Fraction, mean CmH2O, pao2 Pressure) (float64, error) {
	err := check(given{q: FiO2, v: float64(fio2)}, given{q: Pmean, v: float64(mean)}, given{q: PaO2, v: pao2.MmHg()})
	if err != nil {
		return 0, err
	}
	return oxygenationIndex(float64(fio2), float64(mean), pao2.MmHg()), nil
}

func oxygenationIndex(fio2, mean, pao2 float64) float64 { return 100 * fio2 * mean / pao2 } // PALICC 2015

// OxygenSaturationIndex gives 100 x FiO2 x mean airway pressure / SpO2 in
// percent. Above SpO2 0.97 it does not hold (PALICC 2015): RangeError.
func OxygenSaturationIndex(p PulseOnOxygen, mean CmH2O) (float64, error) {
	if err := p.check(float64(SaturationCeiling)); err != nil {
		return 0, err
	}
	if err := check(given{q: Pmean, v: float64(mean)}); err != nil {
		return 0, err
	}
	return oxygenSaturationIndex(float64(p.SpO2), float64(p.FiO2), float64(mean)), nil
}

func oxygenSaturationIndex(spo2, fio2, mean float64) float64 { return fio2 * mean / spo2 } // PALICC 2015

// PulseGapCO gives by how much a pulse oximeter reads above the fractional
// oxyhaemoglobin, as a fraction, for a carboxyhaemoglobin: it takes COHb for
// oxyhaemoglobin.
func PulseGapCO(cohb Fraction) (Fraction, error) {
	if err := check(given{q: COHb, v: float64(cohb)}); err != nil {
		return 0, err
	}
	return Percent(1.82 + 0.94*cohb.Percent()), nil // Buckley 1994
}
