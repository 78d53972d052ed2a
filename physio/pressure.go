package physio

import "math"

// standardPB is the pressure taken when nothing else is known, mmHg.
const standardPB = 760.0

// lowlandBelow is the altitude in metres up to which the standard pressure
// stands: the model of West gives 759.5 at 0 m, and weather moves more than
// the difference.
const lowlandBelow = 50.0

// WaterVapour gives the saturated water vapour pressure over water from 0 to
// 60 C. At 37 C it is 47.1 mmHg, at 40 C 55.4.
func WaterVapour(t Celsius) (Pressure, error) {
	if err := check(given{name: "temperature", v: float64(t), low: 0, high: 60}); err != nil {
		return 0, err
	}
	return MmHg(waterVapour(float64(t))), nil
}

func waterVapour(t float64) float64 {
	hPa := 6.1121 * math.Exp((18.678-t/234.5)*t/(257.14+t)) // Buck 1996
	return hPa / 10 * mmHgPerKPa
}

// PressureAtAltitude gives the mean barometric pressure on inhabited mountains
// by the model atmosphere of West, from -430 to 9000 m. It agrees with
// measurements on Everest within 5 mmHg; weather adds 10 to 15 at sea level.
func PressureAtAltitude(height Metres) (Pressure, error) {
	if err := check(given{q: Altitude, v: float64(height)}); err != nil {
		return 0, err
	}
	return MmHg(westPressure(float64(height))), nil
}

func westPressure(metres float64) float64 {
	h := metres / 1000
	return math.Exp(6.63268 - 0.1112*h - 0.00149*h*h) // West 1996
}

// StandardAtmosphere gives the pressure of the standard atmosphere up to
// 11000 m. It suits aircraft cabins; on mountains it is up to 17 mmHg too low.
func StandardAtmosphere(height Metres) (Pressure, error) {
	if err := check(given{q: Altitude, v: float64(height), low: -500, high: 11000}); err != nil {
		return 0, err
	}
	return MmHg(standardAtmosphere(float64(height))), nil
}

func standardAtmosphere(metres float64) float64 {
	return standardPB * math.Pow(1-2.25577e-5*metres, 5.25588) // ISO 2533:1975
}

// PressureSource says where a barometric pressure came from.
type PressureSource string

// The sources, best first.
const (
	PressureMeasured PressureSource = "measured"
	PressureHouse    PressureSource = "house"
	PressureAltitude PressureSource = "altitude"
	PressureAssumed  PressureSource = "assumed"
)

// PressureKnown is what is known of the barometric pressure; zero fields are
// not known.
type PressureKnown struct {
	Measured Pressure // at the bed, by the analyser
	House    Pressure // set for the place
	Altitude Metres   // of the place
}

// BarometricPressure chooses the pressure: measured before the house's before
// one estimated from altitude before 760 mmHg. Each must be a station pressure,
// not one reduced to sea level as weather reports print it.
func BarometricPressure(k PressureKnown) (Pressure, PressureSource, error) {
	for _, g := range [...]given{{q: PB, v: k.Measured.MmHg()}, {q: PB, v: k.House.MmHg()}, {q: Altitude, v: float64(k.Altitude)}} {
		if g.v == 0 {
			continue
		}
		if err := check(g); err != nil {
			return 0, "", err
		}
	}
	v, source := barometricPressure(k.Measured.MmHg(), k.House.MmHg(), float64(k.Altitude))
	return MmHg(v), source, nil
}

func barometricPressure(measured, house, metres float64) (float64, PressureSource) {
	switch {
	case measured != 0:
		return measured, PressureMeasured
	case house != 0:
		return house, PressureHouse
	case math.Abs(metres) >= lowlandBelow:
		return westPressure(metres), PressureAltitude
	default:
		return standardPB, PressureAssumed
	}
}

// EquivalentFiO2 gives the fraction that at sea level has the same inspired
// PO2 as FiO2 has at PB. PaCO2 and R of the gas are not used.
func EquivalentFiO2(g AlveolarGas) (Fraction, error) {
	po2, err := InspiredPO2(g)
	if err != nil {
		return 0, err
	}
	return Fraction(po2.MmHg() / (standardPB - waterAt37)), nil // West 2012
}
