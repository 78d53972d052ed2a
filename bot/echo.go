package bot

import (
	"slices"
	"strings"

	"galeward/physio"
)

// echo composes the "Read:" block: the values with units and signs, bed, draw
// time and sample where given, what was not plain, and every assumption.
func (c *composer) echo() string {
	var b strings.Builder
	b.WriteString(wordRead)
	b.WriteString(strings.Join(c.echoed(), ", "))
	b.WriteString(".")
	for _, text := range c.noteTexts() {
		add(&b, text)
	}
	if c.inherited != "" {
		add(&b, c.inherited)
	}
	if assumed := c.assumptions(); assumed != "" {
		add(&b, assumed)
	}
	return b.String()
}

// noteTexts are the readings that were not plain, each said once.
func (c *composer) noteTexts() []string {
	var out []string
	for _, n := range c.gas.Notes {
		if text := c.noteText(n); text != "" && !slices.Contains(out, text) {
			out = append(out, text)
		}
	}
	return out
}

func add(b *strings.Builder, sentence string) {
	if sentence == "" {
		return
	}
	b.WriteByte(' ')
	b.WriteString(sentence)
}

// echoed lists bed, time, sample, values and devices in echo order.
func (c *composer) echoed() []string {
	var out []string
	if c.gas.Bed != "" {
		out = append(out, "bed "+c.gas.Bed)
	}
	if c.gas.Time != "" {
		out = append(out, c.gas.Time)
	}
	return append(out, c.echoedValues()...)
}

// echoedValues is the echo behind bed and time.
func (c *composer) echoedValues() []string {
	s := &c.gas.Sample
	var out []string
	if w := bloodWord[s.Blood]; w != "" {
		if site := siteWord[s.Site]; site != "" {
			w = site
		}
		out = append(out, w)
	}
	s.Each(func(q physio.Quantity, v float64) {
		if text := c.echoValue(q, v); text != "" {
			out = append(out, text)
		}
	})
	return append(out, c.echoWords()...)
}

// echoValue prints one value. PaCO2 leaves its unit to the PaO2 behind it.
func (c *composer) echoValue(q physio.Quantity, v float64) string {
	s := &c.gas.Sample
	symbol := q.Info().Symbol
	switch q {
	case physio.PaCO2:
		if s.Has(physio.PaO2) {
			return c.bloodSymbol(q) + " " + c.n.pressure(v)
		}
		return c.bloodSymbol(q) + " " + c.n.value(q, v)
	case physio.PaO2:
		return c.bloodSymbol(q) + " " + c.n.value(q, v)
	case physio.FiO2:
		if s.Device == physio.Air {
			return "" // "on air" says it
		}
		return symbol + " " + percent(v) + " %"
	case physio.HCO3:
		return symbol + " " + c.n.value(q, v) + c.fitWord()
	case physio.OxygenFlow:
		return plain(v, 2) + " L/min"
	case physio.BE:
		return symbol + " " + signed(v) + " mmol/L"
	case physio.Age:
		return c.ageText(v)
	}
	return symbol + " " + c.n.value(q, v)
}

// bloodSymbol drops the "a" of PaCO2 where the blood is not arterial.
func (c *composer) bloodSymbol(q physio.Quantity) string {
	if c.a.Blood == physio.Arterial || c.a.Blood == physio.NoBlood {
		return q.Info().Symbol
	}
	return strings.Replace(q.Info().Symbol, "a", "", 1)
}

func (c *composer) fitWord() string {
	if c.a.Fit.Grade == physio.FitOK && !c.a.Fit.OfBE && c.gas.Sample.Has(physio.PHq, physio.PaCO2) {
		return wordFits
	}
	return ""
}

func signed(v float64) string {
	if v > 0 {
		return "+" + plain(v, 1)
	}
	return plain(v, 1)
}

func (c *composer) ageText(v float64) string {
	if v >= 90 {
		return "age 90+"
	}
	if v < 2 {
		return "age " + plain(v*12, 1) + " months"
	}
	return "age " + plain(v, 0)
}

// echoWords prints what was said in words: device, mode, sex, circumstances.
func (c *composer) echoWords() []string {
	s := &c.gas.Sample
	var out []string
	if s.Device == physio.Air {
		out = append(out, "on air")
	} else if w := deviceWord[s.Device]; w != "" {
		if span := c.maskSpan(); span != "" {
			w += span
		}
		out = append(out, w)
	}
	if s.Mode != physio.ModeUnstated {
		out = append(out, "mode "+string(s.Mode))
	}
	if s.Population != physio.PopulationUnstated && s.Population != physio.Adult {
		out = append(out, populationWord[s.Population])
	}
	switch s.Sex {
	case physio.Female:
		out = append(out, "female")
	case physio.Male:
		out = append(out, "male")
	}
	for _, w := range circumstanceWords {
		if s.Circumstance.Has(w.c) {
			out = append(out, w.word)
		}
	}
	if u := c.gas.UsualPaCO2; u > 0 {
		out = append(out, "usual PaCO2 "+c.n.pressure(u))
	}
	if t := c.gas.Target; t != nil {
		out = append(out, "target "+wholePercent(t.Low)+"-"+wholePercent(t.High)+" %")
	}
	return out
}

// maskSpan prints the range of an estimated FiO2 behind its device.
func (c *composer) maskSpan() string {
	o := c.a.Oxygen
	if !o.Estimated {
		return ""
	}
	return " (FiO2 about " + wholePercent(o.FiO2.Low) + "-" + wholePercent(o.FiO2.High) + " %)"
}

// assumptions names what was taken without being said.
func (c *composer) assumptions() string {
	var out []string
	if c.a.BloodAssumed {
		out = append(out, "arterial")
	}
	if c.a.Blood != physio.NoBlood {
		if c.gas.Sample.Population == physio.PopulationUnstated {
			out = append(out, populationWord[c.a.Population])
		}
		if w := c.pressureWord(); w != "" {
			out = append(out, w)
		}
	}
	if c.gas.Sample.DeviceTaken {
		out = append(out, wordCannulaTaken)
	}
	if d := c.a.Triple; d.Any {
		out = append(out, c.derivedWord(d))
	}
	if len(out) == 0 {
		return ""
	}
	return wordAssumed + strings.Join(out, ", ") + "."
}

func (c *composer) pressureWord() string {
	switch c.a.PBSource {
	case physio.PressureMeasured:
		return ""
	case physio.PressureHouse:
		return "PB " + plain(c.a.PB, 0) + " mmHg (house)"
	case physio.PressureAltitude:
		return "altitude " + plain(c.a.Altitude, 0) + " m (PB about " + plain(c.a.PB, 0) + " mmHg)"
	}
	return "sea level"
}

func (c *composer) derivedWord(d physio.Derived) string {
	switch d.Quantity {
	case physio.PaCO2:
		return "PaCO2 about " + c.n.about(d.PaCO2) + " calculated, not measured"
	case physio.PHq:
		return "pH about " + aboutPH(d.PH) + " calculated"
	}
	return "HCO3 " + plain(d.HCO3, 0) + " calculated, no cross-check"
}
