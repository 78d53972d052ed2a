package shorthand

import (
	"math"

	"galeward/physio"
)

const (
	kgPerPound = 0.45359237 // by definition of the pound
	cmPerInch  = 2.54       // by definition of the inch
	cmPerFoot  = 30.48
)

// weightForm reads kg, lb and g; a bare adult number that may be either kg or
// lb is asked.
func weightForm(f *form, t *token, unit string, adult bool) {
	switch {
	case unit == uPound:
		f.v, f.note = f.v*kgPerPound, NotePounds
	case unit == uGram || unit == "" && !adult && f.v >= 300:
		f.v /= 1000
	case unit == "" && adult && f.v >= 100:
		f.ask = &Question{Code: AskWeight, Quantity: physio.Weight, Typed: t.typed(), Choices: []Choice{
			withWord(choose(physio.Weight, f.v), uKg),
			withWord(choose(physio.Weight, f.v*kgPerPound), uPound)}}
	}
}

// heightForm reads cm, m and inches; 510 is asked as 5 ft 10 in.
func heightForm(f *form, t *token, unit string, adult bool) {
	switch {
	case unit == uMetre || unit == "" && f.v > 0.4 && f.v < 2.5 && t.decimals > 0:
		f.v = math.Round(f.v*1000) / 10
	case unit == uInch:
		f.v *= cmPerInch
	case unit == uFoot:
		f.v *= cmPerFoot
	case unit == uCm:
	case adult && f.v >= 48 && f.v <= 84 && t.decimals == 0:
		f.v, f.note = f.v*cmPerInch, NoteInches
	case f.v >= 400 && f.v < 712 || t.decimals > 0 && f.v >= 4 && f.v < 7.2:
		f.ask = askFeet(f.v, t)
	}
}

func askFeet(v float64, t *token) *Question {
	ask := &Question{Code: AskHeight, Quantity: physio.Height, Typed: t.typed()}
	feet, inches := math.Floor(v/100), math.Mod(v, 100)
	if v < 10 {
		feet = math.Floor(v)
		inches = math.Round((v - feet) * math.Pow(10, float64(t.decimals)))
		cm := v * cmPerFoot
		ask.Choices = append(ask.Choices, choose(physio.Height, cm))
	}
	if inches < 12 {
		ask.Value = feet*cmPerFoot + inches*cmPerInch
		feetInches := withWord(choose(physio.Height, ask.Value), number(feet)+" ft "+number(inches)+" in")
		ask.Choices = append([]Choice{feetInches}, ask.Choices...)
	}
	return ask
}
