package physio_test

import (
	"fmt"

	"galeward/physio"
)

// percent turns a fraction into the percentage the rows print.
func percent(f physio.Fraction, err error) (float64, error) { return f.Percent(), err }

// number turns any defined type into the plain number of its canonical unit.
func number[T ~float64](v T, err error) (float64, error) { return float64(v), err }

func (in *inputs) shift() physio.CurveShift {
	at := physio.CurveShift{PH: physio.PH(in.or("ph", 0)), Temp: physio.Celsius(in.or("temp_c", 0))}
	if in.has("pco2_mmhg") {
		at.PaCO2 = in.pressure("pco2")
	}
	return at
}

// optional reads a pressure that a row may leave out.
func (in *inputs) optional(name string, otherwise physio.Pressure) physio.Pressure {
	if in.has(name+"_mmhg") || in.has(name+"_kpa") {
		return in.pressure(name)
	}
	return otherwise
}

// gas reads the alveolar gas. The rows' water vapour, 47 or 47.1, is the one
// of 37 C.
func (in *inputs) gas() physio.AlveolarGas {
	if w := in.optional("ph2o", 47).MmHg(); w < 46.9 || w > 47.2 {
		in.t.Fatalf("water vapour %v is not that of 37 C", w)
	}
	return physio.AlveolarGas{
		FiO2: physio.Fraction(in.f("fio2")), PB: in.optional("pb", 760), PaCO2: in.optional("paco2", 0), R: in.or("r", 0),
	}
}

func (in *inputs) binding() physio.Binding {
	alpha := in.or("alpha", 0.0031)
	if in.has("alpha_per_kpa") {
		alpha = in.f("alpha_per_kpa") / physio.KPa(1).MmHg()
	}
	return physio.Binding{Capacity: in.or("hufner", 1.34), Solubility: alpha}
}

// content reads a content whose saturation and PO2 stand under these names.
func content(sat, po2 string) measure {
	return func(in *inputs) (float64, error) {
		p := physio.Pressure(0)
		if po2 != "" && in.has(po2) {
			p = physio.MmHg(in.f(po2))
		} else if po2 != "" {
			p = in.pressure("po2")
		}
		return number(in.binding().Content(physio.Haemoglobin(in.f("hb_gdl")), physio.Fraction(in.f(sat)), p))
	}
}

func (in *inputs) contents() physio.Contents {
	return physio.Contents{
		Capillary: physio.Content(in.or("cco2", 0)), Arterial: physio.Content(in.or("cao2", in.or("cao2_mldl", 0))),
		Venous: physio.Content(in.or("cvo2", in.or("cvo2_mldl", 0))),
	}
}

func (in *inputs) output() physio.Flow { return physio.Flow(in.f("co_lmin")) }

func (in *inputs) perSurface(rate physio.GasRate, err error) (float64, error) {
	if err != nil {
		return 0, err
	}
	return physio.PerSurface(rate, in.f("bsa_m2"))
}

func (in *inputs) pulse() physio.PulseOnOxygen {
	return physio.PulseOnOxygen{SpO2: physio.Percent(in.f("spo2_pct")), FiO2: physio.Fraction(in.f("fio2"))}
}

func (in *inputs) cylinder() physio.Cylinder {
	c := physio.Cylinder{PSI: in.or("psi", 0), Reserve: in.or("residual_psi", 0)}
	factor, ok := physio.CylinderFactorUS(in.word("size"))
	if !ok {
		in.t.Fatalf("no cylinder of size %q", in.word("size"))
	}
	c.LitresPerPSI = in.or("factor", factor)
	return c
}

var p50Curves = map[string]func() (physio.Pressure, error){
	"severinghaus1979_eq1": func() (physio.Pressure, error) { return physio.PO2Ellis(0.5) },
	"severinghaus1979_eq2": func() (physio.Pressure, error) { return physio.PO2Severinghaus(0.5) },
	"siggaard1984":         func() (physio.Pressure, error) { return physio.P50(physio.CurveShift{}) },
}

var cannulaRules = map[string]physio.CannulaRule{
	"20+4L": physio.CannulaUsual, "21+4L": physio.CannulaAir, "21+3L": physio.CannulaGlobal,
}

var oxygenMeasures = map[string]measure{
	"so2_severinghaus1979": func(in *inputs) (float64, error) {
		return percent(physio.SaturationSeveringhaus(in.pressure("po2")))
	},
	"so2_kelman1966": func(in *inputs) (float64, error) {
		return percent(physio.SaturationKelman(in.pressure("po2"), in.shift()))
	},
	"so2_siggaard1984": func(in *inputs) (float64, error) {
		at := in.shift()
		return percent(physio.Siggaard1984{
			PO2: in.pressure("po2"), PH: at.PH, Temp: at.Temp,
			BE: physio.MmolL(in.f("be")), DPG: physio.MmolL(in.f("dpg")),
		}.Saturation())
	},
	"po2_ellis1989": func(in *inputs) (float64, error) {
		return in.in(physio.PO2Ellis(physio.Percent(in.f("so2_pct"))))
	},
	"po2_severinghaus1979_eq2": func(in *inputs) (float64, error) {
		return in.in(physio.PO2Severinghaus(physio.Percent(in.f("so2_pct"))))
	},
	"po2_from_so2_ph": func(in *inputs) (float64, error) {
		return in.in(physio.PO2EllisShifted(physio.Percent(in.f("so2_pct")), in.shift()))
	},
	"p50": func(in *inputs) (float64, error) {
		p50, ok := p50Curves[in.word("curve")]
		if !ok {
			return 0, fmt.Errorf("no curve %q", in.word("curve"))
		}
		return in.in(p50())
	},
	"pb_isa": func(in *inputs) (float64, error) {
		return in.in(physio.StandardAtmosphere(physio.Metres(in.f("altitude_m"))))
	},
	"pb_west1996": func(in *inputs) (float64, error) {
		return in.in(physio.PressureAtAltitude(physio.Metres(in.f("altitude_m"))))
	},
	"ph2o_saturated":      func(in *inputs) (float64, error) { return in.in(physio.WaterVapour(physio.Celsius(in.f("temp_c")))) },
	"pio2":                func(in *inputs) (float64, error) { return in.in(physio.InspiredPO2(in.gas())) },
	"pao2_alveolar_short": func(in *inputs) (float64, error) { return in.in(physio.AlveolarPO2Short(in.gas())) },
	"pao2_alveolar_full":  func(in *inputs) (float64, error) { return in.in(physio.AlveolarPO2(in.gas())) },
	"pao2_alveolar_r1":    func(in *inputs) (float64, error) { return in.in(physio.AlveolarPO2(in.gas())) },
	"pao2_alveolar_F_term": func(in *inputs) (float64, error) {
		g := in.gas()
		full, err := physio.AlveolarPO2(g)
		if err != nil {
			return 0, err
		}
		short, err := physio.AlveolarPO2Short(g)
		return float64(full - short), err
	},
	"aa_difference": func(in *inputs) (float64, error) {
		return in.in(physio.AlveolarArterial(physio.Tensions{
			Alveolar: physio.MmHg(in.f("pao2_alveolar")), Arterial: in.pressure("pao2"),
		}))
	},
	"unit_kpa_to_mmhg": func(in *inputs) (float64, error) { return physio.KPa(in.f("kpa")).MmHg(), nil },
	"unit_mmhg_to_kpa": func(in *inputs) (float64, error) { return physio.MmHg(in.f("mmhg")).KPa(), nil },

	"shunt_chiang": func(in *inputs) (float64, error) {
		alveolar, err := physio.AlveolarPO2(in.gas())
		if err != nil {
			return 0, err
		}
		t := physio.Tensions{Alveolar: alveolar, Arterial: in.pressure("pao2")}
		return percent(physio.ShuntOnPureOxygen(t, physio.Content(in.f("avdo2"))))
	},
	"shunt_rule_of_thumb": func(in *inputs) (float64, error) {
		if rule := in.word("rule"); rule != "aa/20" {
			return 0, fmt.Errorf("no rule %q", rule)
		}
		return percent(physio.ShuntRuleOfThumb(physio.MmHg(in.f("aa_difference_on_100pct_o2"))))
	},
	"shunt_measured": func(in *inputs) (float64, error) { return percent(physio.Shunt(in.contents())) },
	"shunt_estimated": func(in *inputs) (float64, error) {
		return percent(physio.EstimatedShunt(in.contents(), physio.Content(in.f("avdo2"))))
	},
	"shunt_measured_sc_from_curve": func(in *inputs) (float64, error) {
		if curve := in.word("sc"); curve != "severinghaus1979" {
			return 0, fmt.Errorf("no curve %q", curve)
		}
		alveolar := physio.MmHg(in.f("pao2_alveolar"))
		sat, err := physio.SaturationSeveringhaus(alveolar)
		if err != nil {
			return 0, err
		}
		c := in.contents()
		c.Capillary, err = in.binding().Content(physio.Haemoglobin(in.f("hb_gdl")), sat, alveolar)
		if err != nil {
			return 0, err
		}
		return percent(physio.Shunt(c))
	},

	"cao2":            content("so2", "po2_mmhg"),
	"cvo2":            content("so2", "po2_mmhg"),
	"cco2":            content("sc_o2", "pao2_alveolar"),
	"cao2_bound_only": content("so2", ""),
	"do2":             func(in *inputs) (float64, error) { return number(physio.Delivery(in.output(), in.contents())) },
	"do2_index":       func(in *inputs) (float64, error) { return in.perSurface(physio.Delivery(in.output(), in.contents())) },
	"vo2_fick":        func(in *inputs) (float64, error) { return number(physio.Consumption(in.output(), in.contents())) },
	"vo2_index": func(in *inputs) (float64, error) {
		return in.perSurface(physio.Consumption(in.output(), in.contents()))
	},
	"o2er": func(in *inputs) (float64, error) { return percent(physio.Extraction(in.contents())) },
	"av_o2_difference": func(in *inputs) (float64, error) {
		return number(physio.ContentDifference(in.contents()))
	},
	"hufner_active_fraction": func(in *inputs) (float64, error) {
		return percent(physio.Binding{Capacity: in.f("measured")}.ActiveFraction(in.f("theoretical")))
	},
	"hufner_theoretical": func(in *inputs) (float64, error) {
		return physio.TheoreticalCapacity(physio.HaemoglobinMolar{MolarVolume: in.f("molar_volume_ml"), Tetramer: in.f("hb_tetramer_g")})
	},
	"o2_solubility_mmhg": func(in *inputs) (float64, error) { return physio.SolubilityFromMolar(in.f("alpha_mmol_l_kpa")) },
	"o2_solubility_kpa":  func(in *inputs) (float64, error) { return in.f("alpha_mldl_mmhg") * physio.KPa(1).MmHg(), nil },
	"spo2_gap_co":        func(in *inputs) (float64, error) { return percent(physio.PulseGapCO(physio.Percent(in.f("cohb_pct")))) },

	"ri_from_aA":          func(in *inputs) (float64, error) { return physio.RespiratoryIndexFromRatio(in.f("a_over_A")) },
	"sf_from_pf_rice2007": func(in *inputs) (float64, error) { return physio.SFFromPF(physio.MmHg(in.f("pf"))) },
	"rox":                 func(in *inputs) (float64, error) { return physio.ROX(in.pulse(), physio.Rate(in.f("rr"))) },
	"osi": func(in *inputs) (float64, error) {
		return physio.OxygenSaturationIndex(in.pulse(), physio.CmH2O(in.f("map_cmh2o")))
	},
	"oi": func(in *inputs) (float64, error) {
		return physio.OxygenationIndex(physio.Fraction(in.f("fio2")), physio.CmH2O(in.f("map_cmh2o")), in.pressure("pao2"))
	},
	"pf_altitude_corrected": func(in *inputs) (float64, error) {
		pf, err := physio.PFRatio(in.pressure("pao2"), physio.Fraction(in.f("fio2")))
		if err != nil {
			return 0, err
		}
		return in.in(physio.PFAtAltitude(physio.PFAt{PF: pf, PB: in.pressure("pb")}))
	},
	"pao2_predicted_sitting": func(in *inputs) (float64, error) {
		return in.in(physio.PredictedPaO2Sitting(physio.Years(in.f("age"))))
	},
	"pao2_predicted_cerveri1995": func(in *inputs) (float64, error) {
		return in.in(physio.PredictedPaO2Seated(physio.BuildAndPaCO2{
			Age: physio.Years(in.f("age")), BMI: in.f("bmi"), PaCO2: in.pressure("paco2"),
		}))
	},

	"venturi_total_flow": func(in *inputs) (float64, error) {
		if in.has("fio2_pct") {
			if err := in.ratioIsOf(physio.Percent(in.f("fio2_pct"))); err != nil {
				return 0, err
			}
		}
		return number(physio.TotalFlow(physio.Flow(in.f("o2_lmin")), in.f("ratio")))
	},
	"fio2_from_entrainment": func(in *inputs) (float64, error) { return percent(physio.EntrainedFiO2(in.f("ratio_air_to_o2"))) },
	"entrainment_ratio": func(in *inputs) (float64, error) {
		return physio.EntrainmentRatio(physio.Entrainment{FiO2: physio.Percent(in.f("fio2_pct")), Air: physio.Percent(in.f("air_pct"))})
	},
	"cylinder_litres": func(in *inputs) (float64, error) { return in.cylinder().Litres() },
	"cylinder_minutes": func(in *inputs) (float64, error) {
		return in.cylinder().Minutes(physio.Flow(in.f("flow_lmin")))
	},
	"cylinder_min_psi": func(in *inputs) (float64, error) {
		flow := physio.Flow(in.f("flow_lmin") * in.or("flowmeters", 1))
		return in.cylinder().PSINeeded(in.f("minutes"), flow)
	},
	"tank_minutes": func(in *inputs) (float64, error) {
		return physio.MinutesOf(in.f("litres"), physio.Flow(in.f("flow_lmin")))
	},
	"fio2_nasal_cannula_rule": func(in *inputs) (float64, error) {
		rule, ok := cannulaRules[in.word("rule")]
		if !ok {
			return 0, fmt.Errorf("no rule %q", in.word("rule"))
		}
		return percent(rule.FiO2(physio.Flow(in.f("o2_lmin"))))
	},
}

// ratioIsOf checks that a row's rounded ratio belongs to its fraction.
func (in *inputs) ratioIsOf(fio2 physio.Fraction) error {
	exact, err := physio.EntrainmentRatio(physio.Entrainment{FiO2: fio2})
	if d := exact - in.f("ratio"); err == nil && (d < -0.5 || d > 0.5) {
		return fmt.Errorf("ratio %v is not the %v of %v", in.f("ratio"), exact, fio2)
	}
	return err
}
