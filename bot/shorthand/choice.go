package shorthand

import (
	"math"
	"strconv"

	"galeward/physio"
)

// choose makes the choice that sets q to v, named by the number and its unit
// so that the answer can be typed.
func choose(q physio.Quantity, v float64) Choice {
	c := Choice{Word: choiceWord(q, v)}
	c.Set.Set(q, v)
	return c
}

func withWord(c Choice, word string) Choice {
	c.Word = word
	return c
}

func choiceWord(q physio.Quantity, v float64) string {
	unit := q.Info().Unit
	switch {
	case q == physio.PHq:
		return "pH " + strconv.FormatFloat(v, 'f', 2, 64)
	case unit == "fraction":
		return number(100*v) + " %"
	case q == physio.BE && v > 0:
		return "BE +" + number(v)
	case q == physio.BE || q == physio.HCO3:
		return q.Info().Symbol + " " + number(v)
	}
	return number(v) + " " + unit
}

// number prints at most three decimals without trailing zeros.
func number(v float64) string {
	decimals := 1
	if math.Abs(v) < 2 {
		decimals = 2
	}
	p := math.Pow(10, float64(decimals))
	return strconv.FormatFloat(math.Round(v*p)/p, 'f', -1, 64)
}
