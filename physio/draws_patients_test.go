package physio

import "math"

// changed gives a sample with other values; a NaN takes a value away.
func (s Sample) changed(v map[Quantity]float64) Sample {
	for q, x := range v {
		if x != x {
			s.Drop(q)
		} else {
			s.Set(q, x)
		}
	}
	return s
}

func (s Sample) on(d Device) Sample { s.Device = d; return s }

func (s Sample) of(p Population) Sample { s.Population = p; return s }

// drawnPatients are invented: one or more of every population, on every kind of
// oxygen, with everything given that an index is made from. They stand away
// from the bounds at which an index begins to be told or a rule changes.
func drawnPatients() map[string]Sample {
	none := math.NaN()
	adult := Sample{Sex: Male}.changed(map[Quantity]float64{
		PHq: 7.28, PaCO2: 58, PaO2: 62, HCO3: 27, FiO2: 0.4, RR: 24, VT: 420, SpO2: 0.90, Hb: 12, Na: 140, Cl: 98, Albumin: 30,
		K: 4, Calcium: 1.2, Magnesium: 0.8, Lactate: 2, Phosphate: 1, EtCO2: 44, PeCO2: 26, Height: 172, Pplat: 26, PIP: 32,
		PEEP: 10, Pmean: 15, SaO2: 0.86, SvO2: 0.62, Age: 60,
	}).on(Ventilator)
	acid := map[Quantity]float64{PHq: 7.15, PaCO2: 22, HCO3: 7.5, PaO2: 105, SaO2: none, EtCO2: 17, PeCO2: 12}
	awake := adult.changed(map[Quantity]float64{Pplat: none, PIP: none, SaO2: none, SvO2: none})
	awake.Circumstance = SpontaneousBreathing
	small := map[Quantity]float64{Age: none, Height: none, VT: 18, Weight: 3.2, RR: 50, Pplat: 18, PIP: 22, PEEP: 5, PaO2: 55}
	late := adult.of(Pregnant).changed(map[Quantity]float64{PHq: 7.43, PaCO2: 38, HCO3: 24.5, PaO2: 95, SaO2: none, EtCO2: 30})
	late.Sex, late.Trimester = Female, 3
	return map[string]Sample{
		"adult ventilated":            adult,
		"adult, pure oxygen":          adult.changed(map[Quantity]float64{FiO2: 1, VT: none, VTPerKg: 6, RR: none, RRSet: 18, SaO2: none, PvO2: 36}),
		"adult, alkalosis, soft lung": adult.changed(map[Quantity]float64{PHq: 7.52, PaCO2: 47, HCO3: 37, EtCO2: 38, SvO2: none, SaO2: none, Pplat: 15, PIP: 21}),
		"adult on air, acidosis":      awake.changed(acid).changed(map[Quantity]float64{FiO2: none}).on(Air),
		"adult on cannula":            awake.changed(map[Quantity]float64{HCO3: none, FiO2: none, OxygenFlow: 6}).on(Cannula),
		"adult on Venturi mask":       awake.changed(map[Quantity]float64{FiO2: 0.6}).on(Venturi),
		"adult on little high flow":   awake.changed(map[Quantity]float64{FiO2: 0.6, OxygenFlow: 20, VT: none}).on(HighFlow),
		"adult of altitude":           awake.changed(map[Quantity]float64{FiO2: none, Altitude: 3500, PaCO2: 27, PHq: 7.46, HCO3: 19, PaO2: 52, EtCO2: 20, PeCO2: 15, SpO2: 0.84}).on(Air),
		"pregnant, third trimester":   late,
		"child":                       adult.changed(map[Quantity]float64{Age: 6, Height: 115, VT: 140, Weight: 20, RR: 26}),
		"newborn":                     adult.of(Newborn).changed(small),
		"preterm on the least breath": adult.of(Preterm).changed(small).changed(map[Quantity]float64{VT: 5, Weight: 1, FiO2: 0.3}),
	}
}
