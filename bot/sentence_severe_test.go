package bot_test

import (
	"regexp"
	"strconv"
	"strings"
	"testing"
)

// TestSevereSentences: what an answer must and must not say where a wrong word
// misleads most. Sources stand beside the limits in physio.
func TestSevereSentences(t *testing.T) {
	for _, c := range []struct{ line, says, never string }{
		{"asthma 7.02/95/70/24 15L nrb", "inadequate: PaCO2 95", "borderline high"},
		{"asthma 7.24/60/80/25 15L nrb", "inadequate: PaCO2 60", "borderline high"},
		{"6yo asthma 7.22/62/80/25 RA", "inadequate: PaCO2 62", "borderline high"},
		{"asthma 7.36/46/80/25 RA", "inadequate, borderline high", "chronic"},
		{"28wk pregnant 7.40/39/92/23 RA asthma", "inadequate: PaCO2 39 where pregnancy and an attack make it low", "chronic"},
		{"SpO2 98 cohb 30 RA", "can't say: SpO2 reads COHb as oxygenated", "adequate"},
		{"newborn 7.30/45/45/21 fio2 0.6", "PaO2 40-49 on oxygen: borderline", "60-79"},
		{"7.38/40/90/23 RA hb 4.5", "content about 6.1 mL/dL", ""},
		{"7.20/26/100/10 RA lactate 9", "lactate 9 mmol/L: a cause of the acidosis", ""},
		{"7.40/38/75/23 RA rr 42", "PaCO2 38 is held by a rate of 42/min", ""},
		{"7.40/40/62/24 ra spo2 98", "saturation and PaO2 do not go together", ""},
	} {
		text := ask(t, c.line).Text()
		if !strings.Contains(text, c.says) || c.never != "" && strings.Contains(text, c.never) {
			t.Errorf("%s:\n%s", c.line, text)
		}
	}
}

// shortWords are the sentence of a PaCO2 above a need, with its numbers.
var shortWords = regexp.MustCompile(`PaCO2 ([\d.]+) is above what this metabolic acidosis needs \([\d.]+-([\d.]+) mmHg\): short for the need(, borderline)?`)

// TestNeedDoesNotContradictItself: what is said to be above a bound is printed
// above it, and a miss within a repeat's spread is called borderline.
func TestNeedDoesNotContradictItself(t *testing.T) {
	near := 0
	for _, ph := range []string{"7.20", "7.21", "7.22", "7.23", "7.24", "7.26", "7.28", "7.30"} {
		for _, pco2 := range []string{"25", "26", "27", "28", "28.3", "29", "30", "31", "32", "33", "34"} {
			m := shortWords.FindStringSubmatch(ask(t, ph+"/"+pco2+"/95 RA").Text())
			if m == nil {
				continue
			}
			near++
			value, _ := strconv.ParseFloat(m[1], 64)
			bound, _ := strconv.ParseFloat(m[2], 64)
			if value <= bound {
				t.Errorf("pH %s, PaCO2 %s: %s", ph, pco2, m[0])
			}
			if value-bound < 1 && m[3] == "" {
				t.Errorf("pH %s, PaCO2 %s is not called borderline: %s", ph, pco2, m[0])
			}
		}
	}
	if near == 0 {
		t.Error("no PaCO2 was above its need")
	}
}
