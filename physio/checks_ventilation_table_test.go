package physio_test

import (
	"fmt"

	"galeward/physio"
)

// ventilationMeasures names each measure as its rows do. Rules that were once
// drawn as straight lines are computed as the package does it, from bicarbonate
// and PaCO2: where that parts from the line, the row says so.
var ventilationMeasures = map[string]measure{
	// Bicarbonate and hydrogen ion.
	"HCO3 from pH and PCO2":                             func(in *inputs) (float64, error) { return hco3By(in.constants())(in) },
	"HCO3 log form: pH+log10(PCO2)-7.608":               hco3By(physio.ConstantsCLSI),
	"HCO3 with 0.0304 and 6.1":                          hco3By(physio.ConstantsLangZander),
	"HCO3 with 0.0307 and 6.105 against reference 24.8": hco3By(physio.ConstantsNCCLS),
	"HCO3 term 1000*2.46e-11*PCO2/10^-pH":               hco3By(physio.ConstantsCLSI),
	"HCO3 spread between published constants (max/min)": func(in *inputs) (float64, error) {
		if in.word("text") != "0.0307/6.095 over 0.03/6.1" {
			return 0, fmt.Errorf("constants not known: %v", in.m)
		}
		high, err := physio.ConstantsCLSI.Bicarbonate(7.4, 40)
		if err != nil {
			return 0, err
		}
		low, err := physio.ConstantsBedside.Bicarbonate(7.4, 40)
		return float64(high / low), err
	},
	// The printed term is a misprint: the row shows that it is unusable.
	"HCO3 term printed as 12.2*PCO2/(10^-pH)": func(in *inputs) (float64, error) {
		return 12.2 * in.pressure("pco2").MmHg() / (in.ph().Hydrogen() * 1e-9), nil
	},
	"[H+] from pH":                 hydrogen,
	"Henderson [H+]=180*PCO2/HCO3": hydrogenBedside,
	"Henderson [H+]=24*PCO2/HCO3":  hydrogenBedside,
	"Henderson constant in kPa":    func(in *inputs) (float64, error) { return in.constants().HendersonKPa() },
	"total CO2 = HCO3 + 0.0307*PCO2": func(in *inputs) (float64, error) {
		hco3, err := physio.Bicarbonate(in.ph(), in.pressure("pco2"))
		if err != nil {
			return 0, err
		}
		return number(physio.TotalCarbonDioxide(hco3, in.pressure("pco2")))
	},

	// Base excess.
	"SBE Van Slyke (0.9287;24.4;14.83)":                               sbeBy(physio.ConstantsNCCLS, physio.StandardBaseExcess),
	"SBE Van Slyke with its own HCO3 (0.0306;6.1)":                    sbeBy(physio.ConstantsHouse, physio.StandardBaseExcess),
	"SBE CLSI linear (24.8;16.2)":                                     sbeBy(physio.ConstantsNCCLS, physio.StandardBaseExcessCLSI),
	"SBE CLSI linear (24.8;16.2) with its own HCO3 (log form -7.608)": sbeBy(physio.ConstantsCLSI, physio.StandardBaseExcessCLSI),
	"SBE CLSI linear with its own HCO3 (log form -7.608)":             sbeBy(physio.ConstantsCLSI, physio.StandardBaseExcessCLSI),
	"BE blood Lang & Zander (Hb in g/dL)":                             func(in *inputs) (float64, error) { return number(physio.BaseExcessLangZander(in.blood())) },
	"BE blood CLSI (0.014;24.8;1.43;7.7) at Hb 5 vs SBE Van Slyke":    func(in *inputs) (float64, error) { return number(physio.BaseExcessCLSI(in.blood())) },
	"standard bicarbonate 25+0.78*BEb+0.002*Hb*(sO2-100)": func(in *inputs) (float64, error) {
		return number(physio.StandardBicarbonateCLSI(
			physio.MmolL(in.f("beb")), physio.Haemoglobin(in.f("hb_gdl")), physio.Percent(in.f("so2_pct"))))
	},

	// Expected responses.
	"Winters expected PaCO2 = 1.5*HCO3+8 (+-2)": line(physio.LineWinters, "hco3"),
	"Winters upper limit": func(in *inputs) (float64, error) {
		in.pressure("paco2") // the patient's, which the row compares with the limit
		_, winters, err := physio.AcidosisPaCO2(physio.Metabolic{HCO3: in.hco3()})
		return winters.High, err
	},
	"exact regression 1.54*HCO3+8.36 (+-2.2) vs Winters": line(physio.LineWintersExact, "hco3"),
	"Winters at normal HCO3 (must not be applied)": func(in *inputs) (float64, error) {
		_, winters, err := physio.AcidosisPaCO2(physio.Metabolic{HCO3: in.hco3()})
		return winters.Value, err
	},
	"met alkalosis PaCO2 = 0.7*HCO3+20 (+-5)": func(in *inputs) (float64, error) {
		byHCO3, _, err := physio.AlkalosisPaCO2(physio.Metabolic{HCO3: in.hco3()})
		return byHCO3.Value, err
	},
	"met alkalosis PaCO2 = 0.9*HCO3+9":              line(physio.LineAlkalosisOld, "hco3"),
	"met alkalosis: 0.7*HCO3+20 against 0.9*HCO3+9": line(physio.LineAlkalosisOld, "hco3"),
	"Copenhagen: met acidosis PaCO2 = 40+1.0*SBE": func(in *inputs) (float64, error) {
		bySBE, _, err := physio.AcidosisPaCO2(physio.Metabolic{HCO3: 24, SBE: in.sbe()})
		return bySBE.Value, err
	},
	"Copenhagen: met alkalosis PaCO2 = 40+0.6*SBE": func(in *inputs) (float64, error) {
		_, bySBE, err := physio.AlkalosisPaCO2(physio.Metabolic{HCO3: 24, SBE: in.sbe()})
		return bySBE.Value, err
	},
	"Copenhagen: chronic resp SBE = 0.4*(PaCO2-40)": func(in *inputs) (float64, error) {
		return number(physio.ChronicSBE(in.paco2(), adult))
	},
	"Copenhagen: acute resp SBE change": func(in *inputs) (float64, error) {
		hco3, err := acuteHCO3(in)
		if err != nil {
			return 0, err
		}
		after, err := sbeOf(in.paco2(), physio.MmolL(hco3))
		if err != nil {
			return 0, err
		}
		before, err := sbeOf(40, 24)
		return after - before, err
	},
	"acute resp acidosis HCO3 (1 per 10)":              acuteHCO3,
	"acute HCO3 prediction":                            acuteHCO3,
	"acute resp acidosis dHCO3":                        change(physio.SlopeAcuteUp),
	"acute resp alkalosis dHCO3 (2 per 10)":            change(physio.SlopeAcuteDown),
	"chronic resp acidosis HCO3 (4 per 10)":            slope(physio.SlopeChronicTen4),
	"chronic HCO3 prediction (4 per 10)":               slope(physio.SlopeChronicTen4),
	"chronic resp acidosis HCO3 (3.5 per 10)":          slope(physio.SlopeChronicBoston),
	"chronic resp acidosis HCO3 Boston 0.35":           slope(physio.SlopeChronicBoston),
	"chronic resp acidosis 3 per 10 vs 3.5":            slope(physio.SlopeChronicBoston),
	"chronic resp acidosis HCO3 Martinu 0.51":          slope(physio.SlopeChronicMartinu),
	"chronic resp acidosis dHCO3 (3.5 per 10)":         change(physio.SlopeChronicBoston),
	"chronic resp alkalosis dHCO3 (4 per 10)":          change(physio.SlopeChronicTen4),
	"chronic resp alkalosis HCO3 = 24-0.41*(40-PaCO2)": slope(physio.SlopeChronicDown),
	"chronic resp alkalosis HCO3 = 0.41*PaCO2+9.1":     line(physio.LineKrapfPlain, "paco2_mmhg"),
	"acute resp acidosis per kPa: Boston 0.1/mmHg":     perKPa(physio.SlopeAcuteUp),
	"acute resp alkalosis per kPa: Boston 0.2/mmHg":    perKPa(physio.SlopeAcuteDown),
	"chronic resp acidosis per kPa: Boston 0.35/mmHg":  perKPa(physio.SlopeChronicBoston),
	"chronic resp acidosis per kPa: Martinu 0.51/mmHg": perKPa(physio.SlopeChronicMartinu),
	"chronic resp alkalosis per kPa: 0.41/mmHg":        perKPa(physio.SlopeChronicDown),
	"pH linear acute 7.40-0.008*(PaCO2-40)":            phWith(acuteHCO3),
	"pH linear chronic 7.40-0.003*(PaCO2-40)":          phWith(slope(physio.SlopeChronicBoston)),
	"pH rule 0.1 per 20 mmHg rise":                     phWith(acuteHCO3),
	"pH after acute PaCO2 change at constant SBE": func(in *inputs) (float64, error) {
		ph := physio.PH(in.f("ph_from"))
		hco3, err := physio.Bicarbonate(ph, physio.MmHg(in.f("paco2_from")))
		if err != nil {
			return 0, err
		}
		sbe, err := physio.StandardBaseExcess(ph, hco3)
		if err != nil {
			return 0, err
		}
		return number(physio.PHAtPCO2(sbe, physio.MmHg(in.f("paco2_to"))))
	},

	// Gaps and strong ions.
	"AG with blood-gas HCO3": anionGap,
	"AG = Na-Cl-HCO3":        anionGap,
	"expected AG at albumin: 12-2.5*(4.0-alb)": func(in *inputs) (float64, error) {
		return number(physio.ExpectedGap(12, physio.AlbuminLevel{Measured: physio.GramsPerL(10 * in.f("alb_gdl"))}))
	},
	"AG albumin correction +0.25*(44-alb_gL)":     albuminCorrected(physio.AlbuminFigge),
	"AG albumin correction: normal 40 vs 44 g/L":  albuminCorrected(physio.AlbuminTexts),
	"delta ratio (AG-12)/(24-HCO3)":               deltaRatio,
	"delta ratio (AG-10)/(24-HCO3)":               deltaRatio,
	"delta ratio with normal AG 12 instead of 10": deltaRatio,
	"potential HCO3 = HCO3+(AG-AGexp)":            func(in *inputs) (float64, error) { return number(physio.PotentialBicarbonate(in.delta())) },
	"phosphate charge 0.309*pH-0.469":             func(in *inputs) (float64, error) { return physio.PhosphateCharge(in.ph()) },
	"albumin charge (0.123*pH-0.631) per g/dL": func(in *inputs) (float64, error) {
		v, err := physio.AlbuminCharge(in.ph())
		return 10 * v, err
	},
	"SIG of a normal adult (Ca 1.25, Mg 0.8 mmol/L x2)": func(in *inputs) (float64, error) {
		p := physio.Plasma{
			Ions: in.ions(), PH: in.ph(), IonisedCa: physio.MmolL(in.f("ica")), Mg: physio.MmolL(in.f("mg")),
			Lactate: physio.MmolL(in.f("lac")), AlbuminGL: in.albumin(), Phosphate: physio.MmolL(in.f("phos")),
		}
		var err error
		if p.HCO3, err = physio.Bicarbonate(p.PH, in.pressure("pco2")); err != nil {
			return 0, err
		}
		return number(physio.StrongIonGap(p))
	},
	"Na-Cl effect = Na-Cl-38":                  func(in *inputs) (float64, error) { p, err := in.partition(); return float64(p.SodiumChloride), err },
	"albumin effect = 0.25*(42-alb)":           func(in *inputs) (float64, error) { p, err := in.partition(); return float64(p.Albumin), err },
	"lactate effect = 1-lactate":               func(in *inputs) (float64, error) { p, err := in.partition(); return float64(p.Lactate), err },
	"calculated osmolality 2Na+glu/18+BUN/2.8": func(in *inputs) (float64, error) { return physio.Osmolality(in.solutes()) },
	"osmolal gap":                              func(in *inputs) (float64, error) { return physio.OsmolalGap(in.f("measured"), in.solutes()) },
	"ethanol divisor 4.6 vs 3.7":               func(in *inputs) (float64, error) { return physio.EthanolEffect(in.mg("etoh_mgdl", physio.EthanolMgDL)) },

	// Temperature and units.
	"PCO2 rule 2 mmHg per degree": func(in *inputs) (float64, error) {
		return in.in(physio.PCO2AtTemp(physio.MmHg(in.f("pco2_37_mmhg")), in.temp()))
	},
	"PCO2 temperature factor 10^(0.019*(T-37))":                               pco2Factor,
	"PO2 log10 slope CLSI equals Severinghaus 1979 (0.243 outside the power)": po2Warm,
	"PO2 CLSI form at high PO2":                                               po2Warm,
	"PO2 temperature factor (CLSI form) at PO2 50 mmHg":                       po2Factor,
	"pH temperature shift (0.0147+0.0065*(pH-7.4))":                           phShift,
	"pH rule 0.015 per degree": func(in *inputs) (float64, error) {
		return number(physio.PHAtTemp(physio.PH(in.f("pH37")), in.temp()))
	},
	"mmHg to kPa":              func(in *inputs) (float64, error) { return in.pressure("pco2").KPa(), nil },
	"kPa to mmHg":              func(in *inputs) (float64, error) { return in.pressure("pco2").MmHg(), nil },
	"inter-instrument SD PCO2": func(in *inputs) (float64, error) { return physio.KPa(in.f("sd_kpa")).MmHg(), nil },
	"smallest detectable PaCO2 change, 1 SD of one sample": func(in *inputs) (float64, error) {
		return physio.SDFromSmallestChange(in.f("sdd_mmhg"))
	},
	"CLIA PCO2 limit: 8% exceeds 5 mmHg above": func(in *inputs) (float64, error) {
		return physio.Allowable{Absolute: in.f("limit_abs"), Relative: in.f("limit_pct") / 100}.Crossing()
	},

	// Ventilation and dead space.
	"VA = (VT-VD)*f": func(in *inputs) (float64, error) { return number(physio.AlveolarVentilation(in.breathing())) },
	"VE = VT*f":      func(in *inputs) (float64, error) { return number(physio.MinuteVolume(in.breathing())) },
	"VD ventilation": func(in *inputs) (float64, error) { return number(physio.DeadSpaceVentilation(in.breathing())) },
	"VA from 863*VCO2/PaCO2": func(in *inputs) (float64, error) {
		if k := in.f("k"); k != 0.863 {
			return 0, fmt.Errorf("constant %v is not known", k)
		}
		return number(physio.AlveolarVentilationFor(in.co2Output(), in.paco2()))
	},
	"conversion constant mmHg*L/L": func(in *inputs) (float64, error) {
		if in.f("t_body_k") != 310 || in.f("t0_k") != 273 {
			return 0, fmt.Errorf("temperatures not known: %v", in.m)
		}
		return in.in(outputConstant(in.pressure("p0")))
	},
	"conversion constant kPa": func(in *inputs) (float64, error) {
		if in.f("t_body_k") != 310 || in.f("t0_k") != 273 {
			return 0, fmt.Errorf("temperatures not known: %v", in.m)
		}
		return in.in(outputConstant(in.pressure("p0")))
	},
	"corrected VE = VE*PaCO2/40": func(in *inputs) (float64, error) {
		return number(physio.CorrectedMinuteVolume(in.minute(), in.paco2()))
	},
	"ventilatory ratio":              ventilatoryRatio,
	"ventilatory ratio at reference": ventilatoryRatio,
	"ventilatory ratio in kPa":       ventilatoryRatio,
	"apnoea PaCO2 rise (12 first min then 3.4/min)": func(in *inputs) (float64, error) {
		return in.in(physio.ApnoeaRise(in.f("minutes")))
	},
	"required VE for target PaCO2": func(in *inputs) (float64, error) {
		return number(physio.MinuteVolumeFor(physio.Flow(in.f("ve_l")), in.aim()))
	},
	"required rate at fixed VT": func(in *inputs) (float64, error) { return number(physio.RateFor(in.rate(), in.aim())) },
	"required VT at fixed rate with VD 200 mL": func(in *inputs) (float64, error) {
		iv, err := physio.BreathFor(in.breathing(), in.aim())
		return iv.Low, err
	},
	"PaCO2 after VT 450->350 at same VE (rate 20->25.7) with VD 150": func(in *inputs) (float64, error) {
		dead, ve := physio.Volume(in.f("vd")), in.f("ve")
		breath := func(name string) physio.Breathing {
			vt := in.f(name)
			return physio.Breathing{Breath: physio.Volume(vt), Dead: dead, Rate: physio.Rate(ve / vt)}
		}
		iv, err := physio.PaCO2After(physio.MmHg(in.f("paco2")), physio.Change{Now: breath("vt1"), Next: breath("vt2")})
		return iv.High, err
	},
	"VD/VT Enghoff": func(in *inputs) (float64, error) {
		return number(physio.DeadSpaceFraction(physio.DeadSpaceGas{PaCO2: in.paco2(), PeCO2: in.pressure("peco2")}))
	},
	"VD physiological": func(in *inputs) (float64, error) {
		return number(physio.DeadSpace(physio.Fraction(in.f("vd_vt")), physio.Volume(in.f("vt_ml"))))
	},
	"VD/VT = 1-0.86*VCO2/(VE*PaCO2)": func(in *inputs) (float64, error) {
		return number(physio.DeadSpaceFromOutput(in.co2Output(), in.minute(), in.paco2()))
	},
	"VD/VT Frankenfield 2010": func(in *inputs) (float64, error) {
		return number(physio.DeadSpaceRegression(physio.BedsideDeadSpace{EndTidal: in.endTidal(), Rate: in.rate(), Age: in.age()}))
	},
	"EtCO2/PaCO2 alveolar dead space 1-Et/Pa": func(in *inputs) (float64, error) {
		return physio.AlveolarDeadFraction(in.endTidal())
	},
	"VD/VT prognosis: OR per 0.10": func(in *inputs) (float64, error) {
		if in.f("or_per_0.05") != 1.45 {
			return 0, fmt.Errorf("odds ratio not known: %v", in.m)
		}
		return physio.DeadSpaceOdds(physio.Fraction(in.f("delta")))
	},
	"anatomical dead space child 3.28-0.56*ln(1+age)": func(in *inputs) (float64, error) { return physio.ChildDeadSpacePerKg(in.age()) },
	"dead space adult vs child formula":               func(in *inputs) (float64, error) { return physio.ChildDeadSpacePerKg(in.age()) },
	"anatomical dead space adult 2.2 mL/kg": func(in *inputs) (float64, error) {
		return number(physio.AnatomicalDeadSpace(in.predicted(), 40))
	},
	"VT at minimum elastic power = 2*VDanat": func(in *inputs) (float64, error) {
		const kg = 70
		v, err := physio.LeastPowerBreath(physio.Volume(in.f("vd_ml_kg") * kg))
		return float64(v) / kg, err
	},

	// Size.
	"PBW ARDS Network": func(in *inputs) (float64, error) {
		return number(physio.PredictedWeightInches(in.stature()))
	},
	"PBW cm form (0.91) vs inch form (2.3)": func(in *inputs) (float64, error) {
		return number(physio.PredictedWeight(in.stature()))
	},
	"VT 6 mL/kg PBW": func(in *inputs) (float64, error) {
		weight, err := physio.PredictedWeightInches(in.stature())
		if err != nil {
			return 0, err
		}
		return number(physio.VolumeAtPerWeight(6, weight))
	},
}
