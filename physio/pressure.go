package physio

import "math"

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
