package physio

// PaO2 stops falling at about 70 to 75 years (Cerveri 1995): straight lines are
// not drawn further.
const (
	agedFlatFrom = 75.0
	adultFrom    = 18.0
)

// PredictedPaO2Sitting gives the usual PaO2 of a sitting adult on air at sea
// level by age, 104.2 - 0.27 x age, held from 75 years on.
func PredictedPaO2Sitting(age Years) (Pressure, error) {
	if err := check(adultAge(age)); err != nil {
		return 0, err
	}
	return MmHg(pao2Sitting(float64(age))), nil
}

func pao2Sitting(age float64) float64 { return 104.2 - 0.27*min(age, agedFlatFrom) } // Mellemgaard 1966

// PredictedPaO2Mixed gives the usual PaO2 on air at sea level by age over mixed
// postures, 102 - 0.33 x age (95 % within 10 mmHg), held from 75 years on.
func PredictedPaO2Mixed(age Years) (Pressure, error) {
	if err := check(adultAge(age)); err != nil {
		return 0, err
	}
	return MmHg(pao2Mixed(float64(age))), nil
}

func pao2Mixed(age float64) float64 { return 102 - 0.33*min(age, agedFlatFrom) } // Marshall and Whyche 1972, from memory

func adultAge(age Years) given {
	return given{q: Age, v: float64(age), low: adultFrom, high: quantities[Age].High}
}

// BuildAndPaCO2 is what the equation of Cerveri needs.
type BuildAndPaCO2 struct {
	Age   Years
	BMI   float64 // kg/m2
	PaCO2 Pressure
}

// PredictedPaO2Seated gives the usual PaO2 of seated non-smokers on air at sea
// level from age, body mass index and PaCO2, with a standard error of 7.48
// mmHg. It was fitted from 40 to 74 years; from 75 on it gives the mean 83.4
// mmHg (5th centile 68.4) that was measured there.
func PredictedPaO2Seated(in BuildAndPaCO2) (Pressure, error) {
	err := check(
		given{q: Age, v: float64(in.Age), low: 40, high: quantities[Age].High},
		given{name: "body mass index", v: in.BMI, low: 10, high: 80},
		given{q: PaCO2, v: in.PaCO2.MmHg()},
	)
	if err != nil {
		return 0, err
	}
	if in.Age >= agedFlatFrom {
		return 83.4, nil // Cerveri 1995
	}
	return MmHg(143.6 - 0.39*float64(in.Age) - 0.56*in.BMI - 0.57*in.PaCO2.MmHg()), nil // Cerveri 1995
}

// ExpectedPaO2 gives the range of usual PaO2 in mmHg by age on air at sea
// level: from the lower 95 % limit of the mixed line to the sitting line.
func ExpectedPaO2(age Years) (Span, error) {
	if err := check(adultAge(age)); err != nil {
		return Span{}, err
	}
	return expectedPaO2(float64(age)), nil
}

func expectedPaO2(age float64) Span {
	const limit95 = 10 // Marshall and Whyche 1972, from memory
	return Span{Low: pao2Mixed(age) - limit95, High: pao2Sitting(age)}
}
