package shorthand

import (
	"math"

	"galeward/physio"
)

// form is a number read into the canonical unit of its quantity.
type form struct {
	v    float64
	q    physio.Quantity // may differ: 6 mL/kg behind VT
	note NoteCode
	// ask is set when the number can not be read without an answer.
	ask *Question
	// skip says that the number is no value of this quantity, in silence.
	skip bool
}

// formOf reads number v with its unit as quantity q. adult says that adult
// sizes are expected.
func formOf(q physio.Quantity, t *token, unit string, adult bool) form {
	v := t.signed()
	f := form{v: v, q: q}
	if t.sign == '-' && !q.Possible(v) && q != physio.BE {
		f.v = t.v // a hyphen between label and number
	}
	if convert, ok := forms[q]; ok {
		convert(&f, t, unit, adult)
	}
	if f.ask == nil && !f.skip && !f.q.Possible(f.v) {
		f.ask = askImpossible(f.q, f.v, t.typed())
	}
	return f
}

// forms are the quantities whose numbers come in several forms.
var forms = map[physio.Quantity]func(*form, *token, string, bool){
	physio.FiO2: fio2Form, physio.SaO2: percentForm, physio.SpO2: percentForm, physio.SpO2Pre: percentForm,
	physio.SpO2Post: percentForm, physio.SvO2: percentForm, physio.ScvO2: percentForm, physio.COHb: percentForm,
	physio.MetHb: percentForm, physio.VDVT: percentForm, physio.VT: vtForm, physio.Hb: hbForm, physio.Temp: tempForm,
	physio.Height: heightForm, physio.Weight: weightForm, physio.Lactate: mgForm(35, 9.008), physio.Glucose: mgForm(35, 18.016),
	physio.Calcium: mgForm(2.4, 4.008), physio.Albumin: albuminForm, physio.Age: ageForm, physio.VE: veForm,
	physio.EtCO2: pressureForm, physio.TcCO2: pressureForm, physio.TcO2: pressureForm, physio.PeCO2: pressureForm,
	physio.PvO2: pressureForm, physio.PvCO2: pressureForm, physio.PB: pbForm, physio.Altitude: altitudeForm,
	physio.PBW: pbwForm, physio.Magnesium: mgForm(1.6, 2.43), physio.Phosphate: mgForm(2.4, 3.097), physio.VTPerKg: nil,
}

func init() { delete(forms, physio.VTPerKg) }

// askImpossible asks about a value outside its possible range and offers the
// number with its decimal point moved, where that is possible.
func askImpossible(q physio.Quantity, v float64, typed string) *Question {
	code := AskValue
	switch q {
	case physio.VT:
		code = AskVT
	case physio.RR, physio.RRSet:
		code = AskRR
	case physio.BE:
		code = AskBE
	case physio.SpO2, physio.SpO2Pre, physio.SpO2Post:
		code = AskSpO2
	case physio.HCO3:
		code = AskHCO3
	}
	ask := &Question{Code: code, Quantity: q, Typed: typed}
	for _, scale := range []float64{0.1, 10, 0.01} {
		x := math.Round(v*scale*1000) / 1000
		if q.Possible(x) && v != 0 && plausibleSlip(q, x) {
			ask.Value = x
			ask.Choices = append(ask.Choices, choose(q, x))
			break
		}
	}
	return ask
}

// plausibleSlip keeps a moved point from offering what no one would mean.
func plausibleSlip(q physio.Quantity, x float64) bool {
	switch q {
	case physio.RR, physio.RRSet:
		return x >= 6
	case physio.BE:
		return math.Abs(x) <= 30
	}
	return true
}

func percentForm(f *form, t *token, unit string, _ bool) {
	if f.v > 1 || t.percent {
		f.v /= 100
	} else if f.v == 1 && t.decimals == 0 {
		f.v = 0.01
	}
}

// fio2Form reads .4, 0.40, 40 and 40 %. What may be litres as well is asked.
func fio2Form(f *form, t *token, unit string, _ bool) {
	switch {
	case unit == uLitre || unit == uLPM:
		f.q = physio.OxygenFlow
	case f.v >= 0.2 && f.v < 1 && !t.percent || f.v == 1 && t.decimals > 0:
	case f.v >= 21 && f.v <= 100:
		f.v /= 100
	case t.percent && f.v >= 20.5 && f.v < 21:
		f.v = 0.21
	default:
		f.ask = askFiO2(f.v, t.typed())
	}
}

// askFiO2 offers what an FiO2 of 4, 1, 15 or 400 may have been.
func askFiO2(v float64, typed string) *Question {
	ask := &Question{Code: AskFiO2, Quantity: physio.FiO2, Typed: typed}
	if v >= 1 && v <= 20 {
		ask.Choices = append(ask.Choices, choose(physio.OxygenFlow, v))
	}
	if v < 0.2 {
		v *= 100
	}
	for _, p := range []float64{v, v * 10, v / 10, v * 100} {
		if p >= 21 && p <= 100 {
			ask.Value = p / 100
			ask.Choices = append(ask.Choices, choose(physio.FiO2, p/100))
			break
		}
	}
	return ask
}

// vtForm reads litres and millilitres of adults; sizes between are asked.
func vtForm(f *form, t *token, unit string, adult bool) {
	switch {
	case unit == uMLKg || unit == uKg:
		f.q = physio.VTPerKg
	case unit == uLitre || unit == uLPM:
		f.v *= 1000
	case unit == uML:
	case !adult:
	case f.v >= 0.2 && f.v <= 1.5 && t.decimals > 0:
		f.v *= 1000
	case f.v >= 120:
	default:
		f.ask = askVT(f.v, t.typed())
	}
	f.v = math.Round(f.v*1000) / 1000
}

func askVT(v float64, typed string) *Question {
	ask := &Question{Code: AskVT, Quantity: physio.VT, Typed: typed}
	switch {
	case v < 0.2 && v*10000 >= 150:
		ask.Value = math.Round(v * 10000)
		ask.Choices = []Choice{choose(physio.VT, ask.Value), choose(physio.VT, math.Round(v*1000))}
	case v >= 3 && v <= 12:
		ask.Value = v
		ask.Choices = []Choice{choose(physio.VTPerKg, v)}
		if v >= 3 {
			ask.Choices = append(ask.Choices, choose(physio.VT, v*100))
		}
	case v > 12 && v < 120:
		ask.Value = v * 10
		ask.Choices = []Choice{choose(physio.VT, v*10), choose(physio.VT, v)}
	}
	return ask
}

func hbForm(f *form, _ *token, unit string, _ bool) {
	switch {
	case unit == uGL:
		f.v /= 10
	case unit == uMmolL:
		f.v *= 1.6114 // g/dL per mmol/L of the haemoglobin monomer, common practice
	case f.v > 28:
		f.v, f.note = f.v/10, NoteHbGramLitre
	}
}

func tempForm(f *form, _ *token, unit string, _ bool) {
	if unit == uF || unit == "" && f.v > 50 && f.v < 115 {
		f.v, f.note = float64(physio.Fahrenheit(f.v)), NoteFahrenheit
	}
}

// mgForm reads an analyte that is typed in mg/dL in some countries: above
// edge, or with the unit, it is divided.
func mgForm(edge, divisor float64) func(*form, *token, string, bool) {
	return func(f *form, _ *token, unit string, _ bool) {
		if unit == uMgDL || unit == "" && f.v > edge {
			f.v, f.note = f.v/divisor, NoteMgPerDL
		}
	}
}

func albuminForm(f *form, _ *token, unit string, _ bool) {
	if unit == uGDL || unit == "" && f.v < 7 {
		f.v, f.note = f.v*10, NoteGramPerDL
	}
}

func ageForm(f *form, _ *token, unit string, _ bool) {
	switch unit {
	case uMonth:
		f.v /= 12
	case uDay:
		f.v /= 365.25
	case uWeek:
		f.v /= 52.18
	}
	if f.v > 89 && f.v <= 120 {
		f.v, f.note = 90, NoteAge90
	}
}

func veForm(f *form, _ *token, unit string, adult bool) {
	if unit == uML || unit == "" && adult && f.v >= 1000 {
		f.v /= 1000
	}
}

func pressureForm(f *form, _ *token, unit string, _ bool) {
	if unit == uKPa {
		f.v = physio.KPa(f.v).MmHg()
	}
}

func pbForm(f *form, _ *token, unit string, _ bool) {
	switch {
	case unit == uKPa || unit == "" && f.v > 40 && f.v < 110:
		f.v = physio.KPa(f.v).MmHg()
	case unit == uMbar || unit == "" && f.v > 800 && f.v < 1100:
		f.v = physio.KPa(f.v / 10).MmHg()
	}
}

func altitudeForm(f *form, _ *token, unit string, _ bool) {
	if unit == uFoot {
		f.v *= 0.3048
	}
}

func pbwForm(f *form, _ *token, unit string, _ bool) {
	if unit == uPound {
		f.v *= kgPerPound
	}
}
