package physio

// PredictedWeight gives the body weight by which tidal volumes are reckoned,
// kg, from sex and height: 50 (men) or 45.5 (women) + 0.91 x (cm - 152.4). It
// is drawn for adults and means little below 130 cm: RangeError.
func PredictedWeight(sex Sex, height Centimetres) (Kilograms, error) {
	if err := checkStature(sex, height); err != nil {
		return 0, err
	}
	return Kilograms(predictedWeight(sex, float64(height))), nil
}

func predictedWeight(sex Sex, cm float64) float64 {
	return pbwBase(sex) + 0.91*(cm-152.4) // ARDS Network 2000
}

// PredictedWeightInches gives the same weight by the form in inches, 2.3 kg an
// inch above 60, which printed tables use. It is 0.2 % lower at 190 cm.
func PredictedWeightInches(sex Sex, height Centimetres) (Kilograms, error) {
	if err := checkStature(sex, height); err != nil {
		return 0, err
	}
	return Kilograms(pbwBase(sex) + 2.3*(float64(height)/2.54-60)), nil // ARDS Network 2000, table
}

func checkStature(sex Sex, height Centimetres) error {
	if err := check(given{q: Height, v: float64(height), low: 130, high: quantities[Height].High}); err != nil {
		return err
	}
	if sex != Female && sex != Male {
		return &RangeError{Name: "sex", Got: 0, Low: 1, High: 2}
	}
	return nil
}

func pbwBase(sex Sex) float64 {
	if sex == Male {
		return 50
	}
	return 45.5
}

// VolumePerWeight gives a tidal volume in mL/kg of predicted weight; 6 to 8 is
// usual on a ventilator.
func VolumePerWeight(breath Volume, predicted Kilograms) (float64, error) {
	if err := check(given{q: VT, v: float64(breath)}, given{q: PBW, v: float64(predicted)}); err != nil {
		return 0, err
	}
	return float64(breath) / float64(predicted), nil // ARDS Network 2000
}

// VolumeAtPerWeight gives the tidal volume of so many mL/kg.
func VolumeAtPerWeight(perKg float64, predicted Kilograms) (Volume, error) {
	if err := check(given{q: VTPerKg, v: perKg}, given{q: PBW, v: float64(predicted)}); err != nil {
		return 0, err
	}
	return Volume(perKg * float64(predicted)), nil // ARDS Network 2000
}

// Inflation holds the pressures of a passive breath on a ventilator. The
// plateau is read with at least half a second of hold and no leak.
type Inflation struct {
	Plateau CmH2O
	Peak    CmH2O
	// TotalPEEP is on an expiratory hold: set PEEP and auto-PEEP together.
	TotalPEEP CmH2O
}

func (p Inflation) checkDriving() error {
	if err := check(given{q: Pplat, v: float64(p.Plateau)}, given{q: PEEP, v: float64(p.TotalPEEP)}); err != nil {
		return err
	}
	return check(given{name: "driving pressure", v: float64(p.Plateau - p.TotalPEEP), low: 1, high: 80})
}

// DrivingPressure gives plateau - total PEEP in cmH2O; below 15 is protective
// in ARDS (Amato 2015).
func DrivingPressure(p Inflation) (CmH2O, error) {
	if err := p.checkDriving(); err != nil {
		return 0, err
	}
	return CmH2O(drivingPressure(float64(p.Plateau), float64(p.TotalPEEP))), nil
}

func drivingPressure(plateau, peep float64) float64 { return plateau - peep } // Amato 2015

// StaticCompliance gives breath/(plateau - total PEEP) in mL/cmH2O of lung and
// chest wall together; 50 to 80 is usual on a ventilator.
func StaticCompliance(breath Volume, p Inflation) (float64, error) {
	if err := p.checkDriving(); err != nil {
		return 0, err
	}
	if err := check(given{q: VT, v: float64(breath)}); err != nil {
		return 0, err
	}
	return float64(breath) / drivingPressure(float64(p.Plateau), float64(p.TotalPEEP)), nil // common practice
}

// DynamicCharacteristic gives breath/(peak - total PEEP) in mL/cmH2O, which
// holds the resistance as well.
func DynamicCharacteristic(breath Volume, p Inflation) (float64, error) {
	err := check(
		given{q: VT, v: float64(breath)}, given{q: PIP, v: float64(p.Peak)}, given{q: PEEP, v: float64(p.TotalPEEP)},
		given{name: "peak - PEEP", v: float64(p.Peak - p.TotalPEEP), low: 1, high: 120},
	)
	if err != nil {
		return 0, err
	}
	return float64(breath) / float64(p.Peak-p.TotalPEEP), nil // common practice
}

// joulesPerLitreCmH2O turns litres times cmH2O into joules.
const joulesPerLitreCmH2O = 0.098

// PowerVolumeControl gives the mechanical power in J/min of volume-controlled
// breaths, 0.098 x rate x breath x (peak - driving pressure/2); above 17 went
// with worse outcomes (Serpa Neto 2018).
func PowerVolumeControl(b Breathing, p Inflation) (float64, error) {
	if err := p.checkDriving(); err != nil {
		return 0, err
	}
	err := check(
		given{q: VT, v: float64(b.Breath)}, given{q: RR, v: float64(b.Rate)},
		given{q: PIP, v: float64(p.Peak), low: float64(p.Plateau), high: quantities[PIP].High},
	)
	if err != nil {
		return 0, err
	}
	return powerVolumeControl(minuteVolume(float64(b.Breath), float64(b.Rate)), p), nil
}

func powerVolumeControl(minute float64, p Inflation) float64 {
	driving := drivingPressure(float64(p.Plateau), float64(p.TotalPEEP))
	return joulesPerLitreCmH2O * minute * (float64(p.Peak) - driving/2) // Gattinoni 2016, simplified
}

// PowerPressureControl gives the mechanical power in J/min of pressure-
// controlled breaths from the pressure above PEEP; it is 10 to 20 % off.
func PowerPressureControl(b Breathing, s PressureSteps) (float64, error) {
	err := check(
		given{q: VT, v: float64(b.Breath)}, given{q: RR, v: float64(b.Rate)},
		given{q: PEEP, v: float64(s.PEEP)}, given{q: PC, v: float64(s.AbovePEEP)},
	)
	if err != nil {
		return 0, err
	}
	return joulesPerLitreCmH2O * minuteVolume(float64(b.Breath), float64(b.Rate)) * float64(s.PEEP+s.AbovePEEP), nil // Becher 2019
}

// PressureSteps are the levels of pressure-controlled breaths.
type PressureSteps struct {
	PEEP, AbovePEEP CmH2O
}

// SurrogateInflation is what the surrogate of mechanical power needs.
type SurrogateInflation struct {
	Minute     Flow // minute volume
	Inspired   Flow // constant inspiratory flow
	Peak, PEEP CmH2O
}

// PowerSurrogate gives the mechanical power in J/min from minute volume, peak
// pressure, PEEP and the inspiratory flow, without an inspiratory hold.
func PowerSurrogate(s SurrogateInflation) (float64, error) {
	err := check(
		given{q: VE, v: float64(s.Minute)}, given{name: "inspiratory flow", v: float64(s.Inspired), low: 5, high: 150},
		given{q: PIP, v: float64(s.Peak)}, given{q: PEEP, v: float64(s.PEEP)},
	)
	if err != nil {
		return 0, err
	}
	return float64(s.Minute) * (float64(s.Peak) + float64(s.PEEP) + float64(s.Inspired)/6) / 20, nil // Giosa 2019
}

// PressureAndRate gives 4 x driving pressure + rate, the weighted sum that went
// with outcome as well as power did.
func PressureAndRate(p Inflation, rate Rate) (float64, error) {
	if err := p.checkDriving(); err != nil {
		return 0, err
	}
	if err := check(given{q: RR, v: float64(rate)}); err != nil {
		return 0, err
	}
	return 4*drivingPressure(float64(p.Plateau), float64(p.TotalPEEP)) + float64(rate), nil // Costa 2021
}

// BreathingIndex gives rate over breath in litres, breaths/min/L, of an
// unassisted breathing pattern; 105 or below favoured coming off the ventilator
// (Yang and Tobin 1991).
func BreathingIndex(rate Rate, breath Volume) (float64, error) {
	if err := check(given{q: RR, v: float64(rate)}, given{q: VT, v: float64(breath)}); err != nil {
		return 0, err
	}
	return breathingIndex(float64(rate), float64(breath)), nil
}

func breathingIndex(rate, breath float64) float64 { return rate / (breath / 1000) } // Yang and Tobin 1991
