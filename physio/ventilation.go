package physio

// outputConstant turns CO2 output in mL/min STPD over alveolar ventilation in
// L/min BTPS into a PCO2 in mmHg: 760 x 310/273 / 1000.
const outputConstant = 0.863

// OutputConstant gives the constant of the alveolar ventilation equation for a
// body temperature, in the unit of the standard pressure times L/L: 863 for
// 760 mmHg at 37 C, 115 for 101.3 kPa.
func OutputConstant(standard Pressure, body Celsius) (Pressure, error) {
	err := check(given{name: "standard pressure", v: standard.MmHg(), low: 700, high: 800}, given{q: Temp, v: float64(body)})
	if err != nil {
		return 0, err
	}
	return MmHg(standard.MmHg() * (float64(body) + 273) / 273), nil // Nunn 1960
}

func outputIn(output GasRate) given {
	return given{name: "CO2 output", v: float64(output), low: 1, high: 6000}
}

// Breathing is a pattern of breaths.
type Breathing struct {
	Breath Volume // tidal volume
	Dead   Volume // dead space of each breath
	Rate   Rate
}

func (b Breathing) check() error {
	return check(
		given{q: VT, v: float64(b.Breath)}, given{q: RR, v: float64(b.Rate)},
		given{name: "dead space", v: float64(b.Dead), low: 0, high: max(0, float64(b.Breath)-1)},
	)
}

// MinuteVolume gives breath x rate in L/min; the dead space is not used.
func MinuteVolume(b Breathing) (Flow, error) {
	if err := check(given{q: VT, v: float64(b.Breath)}, given{q: RR, v: float64(b.Rate)}); err != nil {
		return 0, err
	}
	return Flow(minuteVolume(float64(b.Breath), float64(b.Rate))), nil
}

func minuteVolume(breath, rate float64) float64 { return breath * rate / 1000 } // mL to L

// AlveolarVentilation gives (breath - dead space) x rate in L/min.
func AlveolarVentilation(b Breathing) (Flow, error) {
	if err := b.check(); err != nil {
		return 0, err
	}
	return Flow(minuteVolume(float64(b.Breath-b.Dead), float64(b.Rate))), nil // Bohr 1891
}

// DeadSpaceVentilation gives dead space x rate in L/min.
func DeadSpaceVentilation(b Breathing) (Flow, error) {
	if err := b.check(); err != nil {
		return 0, err
	}
	return Flow(minuteVolume(float64(b.Dead), float64(b.Rate))), nil // Bohr 1891
}

// AlveolarVentilationFor gives the alveolar ventilation in L/min at which a CO2
// output keeps a PaCO2.
func AlveolarVentilationFor(output GasRate, paco2 Pressure) (Flow, error) {
	if err := check(outputIn(output), given{q: PaCO2, v: paco2.MmHg()}); err != nil {
		return 0, err
	}
	return Flow(outputConstant * float64(output) / paco2.MmHg()), nil // Rossier 1960: PaCO2 = 0.863 VCO2/VA
}

// PaCO2FromOutput gives the PaCO2 of a CO2 output at an alveolar ventilation in
// steady state.
func PaCO2FromOutput(output GasRate, alveolar Flow) (Pressure, error) {
	if err := check(outputIn(output), given{name: "alveolar ventilation", v: float64(alveolar), low: 0.05, high: 80}); err != nil {
		return 0, err
	}
	return MmHg(outputConstant * float64(output) / float64(alveolar)), nil // Rossier 1960
}

// CorrectedMinuteVolume gives the minute volume that would hold PaCO2 40,
// L/min; 5 to 8 is usual in adults, above 10 is inefficient or hypermetabolic.
func CorrectedMinuteVolume(minute Flow, paco2 Pressure) (Flow, error) {
	if err := check(given{q: VE, v: float64(minute)}, given{q: PaCO2, v: paco2.MmHg()}); err != nil {
		return 0, err
	}
	return Flow(correctedMinuteVolume(float64(minute), paco2.MmHg())), nil
}

func correctedMinuteVolume(minute, paco2 float64) float64 { return minute * paco2 / referencePCO2 } // Wexler 1978, from memory

// VentilatoryRatio gives minute volume x PaCO2 over 100 mL/kg x 37.5 mmHg: 1 in
// health, rising with dead space and with CO2 output. It holds in passively
// ventilated adults in a steady state, by predicted weight.
func VentilatoryRatio(minute Flow, paco2 Pressure, predicted Kilograms) (float64, error) {
	err := check(given{q: VE, v: float64(minute)}, given{q: PaCO2, v: paco2.MmHg()}, given{q: PBW, v: float64(predicted)})
	if err != nil {
		return 0, err
	}
	return ventilatoryRatio(float64(minute), paco2.MmHg(), float64(predicted)), nil
}

func ventilatoryRatio(minute, paco2, predicted float64) float64 {
	return minute * 1000 * paco2 / (predicted * 100 * 37.5) // Sinha 2009
}

// ApnoeaRise gives the rise of PaCO2 in a closed airway without breathing: 12
// mmHg in the first minute, 3.4 in each later one, up to 15 minutes.
func ApnoeaRise(minutes float64) (Pressure, error) {
	if err := check(given{name: "minutes", v: minutes, low: 0, high: 15}); err != nil {
		return 0, err
	}
	if minutes <= 1 {
		return MmHg(12 * minutes), nil // Stock 1989
	}
	return MmHg(12 + 3.4*(minutes-1)), nil // Stock 1989
}
