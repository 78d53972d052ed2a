package memory

import (
	"fmt"
	"maps"
	"math"
	"slices"
	"strconv"
	"strings"
	"time"
	"unicode"

	"galeward/bot/shorthand"
	"galeward/physio"
)

// The most of each list that a channel may have.
const (
	mostOrder   = 16
	mostWords   = 200
	mostTimes   = 12
	mostEditors = 50
)

// Validate says whether the rules are possible and do not contradict each
// other. The error is Problems.
func (h House) Validate() error { return h.problems().err() }

func (h House) problems() Problems {
	var p Problems
	if h.Units != "" && h.Units != shorthand.MmHg && h.Units != shorthand.KPa {
		p.add("units", quoted(string(h.Units)), wantUnits, perhaps(string(h.Units), []string{"mmHg", "kPa"}))
	}
	h.checkOrder(&p)
	h.checkWords(&p)
	h.checkPressure(&p)
	h.checkPopulation(&p)
	h.checkTargets(&p)
	h.checkCritical(&p)
	h.checkClock(&p)
	h.checkEditors(&p)
	return p
}

func quoted(s string) string { return strconv.Quote(shown(s)) }

func (h House) checkOrder(p *Problems) {
	if h.Order == nil {
		return
	}
	keys := writeOrder(House{Order: h.Order}).([]string)
	got := strings.Join(keys, ", ")
	slices.Sort(keys)
	switch {
	case len(slices.Compact(keys)) < len(h.Order):
		p.add("order", got, wantOrder, "one quantity stands twice")
	case !slices.Contains(h.Order, physio.PHq):
		p.add("order", got, wantOrder, "ph is missing")
	case len(h.Order) < 2 || len(h.Order) > mostOrder:
		p.add("order", got, wantOrder, fmt.Sprintf("2 to %d quantities", mostOrder))
	}
}

func (h House) checkWords(p *Problems) {
	if len(h.Words) > mostWords {
		p.add("words", fmt.Sprintf("%d words", len(h.Words)), fmt.Sprintf("at most %d", mostWords), "")
		return
	}
	for _, word := range slices.Sorted(maps.Keys(h.Words)) {
		meaning := h.Words[word]
		got := quoted(word) + " as " + quoted(meaning)
		switch {
		case !isWord(word):
			p.add("words", got, wantWords, "the word itself is letters and digits with a letter among them")
		case meaning == "" || len([]rune(meaning)) > 60 || !isPlain(meaning):
			p.add("words", got, wantWords, "the text is 1 to 60 letters, digits, spaces and . , / + - %")
		case strings.EqualFold(meaning, word):
			p.add("words", got, wantWords, "it stands for itself")
		}
	}
}

// isWord says that a word can be told from a number and from its neighbours.
func isWord(s string) bool {
	letter := false
	for _, r := range s {
		letter = letter || unicode.IsLetter(r)
		if !unicode.IsLetter(r) && !unicode.IsDigit(r) {
			return false
		}
	}
	return letter && len([]rune(s)) <= 24
}

// isPlain says that a text holds nothing that a platform could take as markup
// or a mention.
func isPlain(s string) bool {
	return !strings.ContainsFunc(s, func(r rune) bool {
		return !unicode.IsLetter(r) && !unicode.IsDigit(r) && !strings.ContainsRune(" .,/+-%", r)
	})
}

// apart is how far in mmHg a pressure may be from the mean at a height:
// weather adds up to 15, the model errs by 5, and a height is often rounded.
const apart = 40

func (h House) checkPressure(p *Problems) {
	pressure, height := h.PB == 0 || within(h.PB, 450, 800), within(h.Altitude, -430, 6000)
	if !pressure {
		p.add("pressure_mmhg", decimal(h.PB), wantPressure, inKPa(h.PB))
	}
	if !height {
		p.add("altitude_m", decimal(h.Altitude), wantAltitude, "")
	}
	if !pressure || !height || h.PB == 0 || h.Altitude == 0 {
		return
	}
	if mean, err := physio.PressureAtAltitude(physio.Metres(h.Altitude)); err == nil && math.Abs(mean.MmHg()-h.PB) > apart {
		p.add("pressure_mmhg", decimal(h.PB), fmt.Sprintf("about %.0f mmHg at the altitude_m of %s", mean.MmHg(), decimal(h.Altitude)),
			"one of the two contradicts the other")
	}
}

// inKPa is the hint for a pressure typed in kPa or hPa.
func inKPa(v float64) string {
	for _, u := range []struct {
		name string
		mmHg float64
	}{{"kPa", physio.KPa(v).MmHg()}, {"hPa", physio.KPa(v / 10).MmHg()}} {
		if within(u.mmHg, 450, 800) {
			return fmt.Sprintf("%s %s are %.0f mmHg", decimal(v), u.name, u.mmHg)
		}
	}
	return ""
}

func within(v, low, high float64) bool { return v >= low && v <= high } // false for NaN

func (h House) checkPopulation(p *Problems) {
	known := []string{string(physio.Adult), string(physio.Pregnant), string(physio.Child), string(physio.Newborn), string(physio.Preterm)}
	if h.Population != "" && !slices.Contains(known, string(h.Population)) {
		p.add("population", quoted(string(h.Population)), wantPopulation, perhaps(string(h.Population), known))
	}
}

func (h House) checkTargets(p *Problems) {
	if t := h.Target; t != nil && !(within(t.Low, 0.5, 1) && within(t.High, 0.5, 1) && t.Low < t.High) {
		p.add("target_spo2", quoted(writeTarget(h).(string)), wantTarget, fractions(t.Low, t.High))
	}
	t := h.TargetPaCO2
	if t == nil {
		return
	}
	if !(within(t.Low, 15, 120) && within(t.High, 15, 120) && t.Low < t.High) {
		hint := ""
		if within(t.Low, 2, 15) && within(t.High, 2, 15) {
			hint = fmt.Sprintf("%s kPa is %.0f-%.0f mmHg", writePaCO2(h), physio.KPa(t.Low).MmHg(), physio.KPa(t.High).MmHg())
		}
		p.add("target_paco2_mmhg", quoted(writePaCO2(h).(string)), wantPaCO2, hint)
	}
}

// fractions is the hint for a target typed as fractions.
func fractions(low, high float64) string {
	if within(100*low, 0.5, 1) && within(100*high, 0.5, 1) {
		return "percent, not a fraction"
	}
	return ""
}

// The range in which each critical limit makes sense; our own bounds, set so
// that no limit lies inside the usual range or beyond what is survivable.
var criticalBounds = []struct {
	key       string
	get       func(*physio.CriticalLimits) float64
	low, high float64
	unit      string
}{
	{"critical.ph_low", func(c *physio.CriticalLimits) float64 { return c.PHLow }, 6.8, 7.35, ""},
	{"critical.ph_high", func(c *physio.CriticalLimits) float64 { return c.PHHigh }, 7.45, 7.8, ""},
	{"critical.paco2_high_mmhg", func(c *physio.CriticalLimits) float64 { return c.PaCO2High }, 45, 150, " mmHg"},
	{"critical.pao2_low_mmhg", func(c *physio.CriticalLimits) float64 { return c.PaO2Low }, 20, 80, " mmHg"},
}

func (h House) checkCritical(p *Problems) {
	c := h.Critical
	if c == nil {
		return
	}
	for _, b := range criticalBounds {
		if v := b.get(c); v != 0 && !within(v, b.low, b.high) {
			p.add(b.key, decimal(v), fmt.Sprintf("%s to %s%s", decimal(b.low), decimal(b.high), b.unit), "")
		}
	}
	if t := h.TargetPaCO2; t != nil && c.PaCO2High != 0 && c.PaCO2High <= t.High {
		p.add("critical.paco2_high_mmhg", decimal(c.PaCO2High), "a limit above the target_paco2_mmhg of "+writePaCO2(h).(string),
			"one of the two contradicts the other")
	}
}

func (h House) checkClock(p *Problems) {
	if h.Zone != "" {
		if _, err := time.LoadLocation(h.Zone); err != nil || h.Zone == "Local" {
			p.add("zone", quoted(h.Zone), wantZone, "")
		}
	} else if len(h.Times)+len(h.ShiftEnds) > 0 {
		p.add("zone", "", wantZone, "times and shift_ends need one")
	}
	checkTimes(p, "times", h.Times)
	checkTimes(p, "shift_ends", h.ShiftEnds)
}

func checkTimes(p *Problems, key string, times []string) {
	if len(times) > mostTimes {
		p.add(key, fmt.Sprintf("%d times", len(times)), fmt.Sprintf("at most %d", mostTimes), "")
		return
	}
	for i, t := range times {
		if _, err := time.Parse("15:04", t); err != nil {
			p.add(key, quoted(t), wantTimes, "")
		} else if slices.Contains(times[:i], t) {
			p.add(key, quoted(t), wantTimes, "it stands twice")
		}
	}
}

func (h House) checkEditors(p *Problems) {
	if len(h.Editors) > mostEditors {
		p.add("editors", fmt.Sprintf("%d ids", len(h.Editors)), fmt.Sprintf("at most %d", mostEditors), "")
		return
	}
	for _, id := range h.Editors {
		if id == "" || len(id) > 64 || strings.ContainsFunc(id, func(r rune) bool { return !idRune(r) }) {
			p.add("editors", quoted(id), wantEditors, "")
		}
	}
}

// idRune says that a character may stand in a platform's user id.
func idRune(r rune) bool {
	return r < unicode.MaxASCII && (unicode.IsLetter(r) || unicode.IsDigit(r) || strings.ContainsRune("@:._-=/+", r))
}

// tidy brings rules into the one form in which they are stored: no empty
// lists, words in lower case, clock times with two digits of hours.
func (h House) tidy() House {
	h = h.Clone()
	if len(h.Order) == 0 {
		h.Order = nil
	}
	if h.Critical != nil && *h.Critical == (physio.CriticalLimits{}) {
		h.Critical = nil
	}
	h.Words = tidyWords(h.Words)
	h.Times, h.ShiftEnds = tidyTimes(h.Times), tidyTimes(h.ShiftEnds)
	if len(h.Editors) == 0 || len(h.Editors) == 1 && strings.EqualFold(h.Editors[0], "everyone") {
		h.Editors = nil
	}
	return h
}

func tidyWords(words map[string]string) map[string]string {
	if len(words) == 0 {
		return nil
	}
	tidy := make(map[string]string, len(words))
	for word, meaning := range words {
		tidy[strings.ToLower(strings.TrimSpace(word))] = strings.Join(strings.Fields(meaning), " ")
	}
	return tidy
}

func tidyTimes(times []string) []string {
	if len(times) == 0 {
		return nil
	}
	tidy := make([]string, len(times))
	for i, t := range times {
		tidy[i] = t
		if at, err := time.Parse("15:04", t); err == nil {
			tidy[i] = at.Format("15:04")
		}
	}
	slices.Sort(tidy)
	return tidy
}
