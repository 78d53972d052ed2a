package physio_test

import (
	"fmt"

	"galeward/physio"
)

func (in *inputs) ph() physio.PH               { return physio.PH(in.f("pH")) }
func (in *inputs) hco3() physio.Concentration  { return physio.MmolL(in.f("hco3")) }
func (in *inputs) sbe() physio.Concentration   { return physio.MmolL(in.f("sbe")) }
func (in *inputs) paco2() physio.Pressure      { return in.pressure("paco2") }
func (in *inputs) temp() physio.Celsius        { return physio.Celsius(in.f("temp_c")) }
func (in *inputs) age() physio.Years           { return physio.Years(in.f("age_y")) }
func (in *inputs) albumin() physio.GramsPerL   { return physio.GramsPerL(in.f("alb_gl")) }
func (in *inputs) rate() physio.Rate           { return physio.Rate(in.f("rr")) }
func (in *inputs) minute() physio.Flow         { return physio.Flow(in.f("ve_l_min")) }
func (in *inputs) co2Output() physio.GasRate   { return physio.GasRate(in.f("vco2_ml_min")) }
func (in *inputs) predicted() physio.Kilograms { return physio.Kilograms(in.f("pbw_kg")) }
func (in *inputs) mg(name string, f func(float64) physio.Concentration) physio.Concentration {
	return f(in.or(name, 0))
}

func (in *inputs) ions() physio.Ions {
	return physio.Ions{
		Na: physio.MmolL(in.or("na", 0)), K: physio.MmolL(in.or("k", 0)),
		Cl: physio.MmolL(in.or("cl", 0)), HCO3: physio.MmolL(in.or("hco3", 0)),
	}
}

func (in *inputs) delta() physio.Delta {
	return physio.Delta{
		Gap: physio.MmolL(in.f("ag")), HCO3: in.hco3(),
		Usual: physio.MmolL(in.or("ag_normal", in.or("ag_expected", 0))),
	}
}

// constants reads the Henderson-Hasselbalch pair of a row.
func (in *inputs) constants() physio.Constants {
	alpha := in.or("alpha", 0)
	if in.has("alpha_kpa") {
		alpha = in.f("alpha_kpa") / physio.KPa(1).MmHg()
	}
	return physio.Constants{Solubility: alpha, PK: in.f("pk")}
}

// hco3By gives the bicarbonate of a row's pH and PCO2 with one published pair.
func hco3By(c physio.Constants) measure {
	return func(in *inputs) (float64, error) { return number(c.Bicarbonate(in.ph(), in.pressure("pco2"))) }
}

// sbeBy gives a base excess from pH with the row's bicarbonate, or with that of
// a published pair.
func sbeBy(c physio.Constants, form func(physio.PH, physio.Concentration) (physio.Concentration, error)) measure {
	return func(in *inputs) (float64, error) {
		if in.has("hco3") {
			return number(form(in.ph(), in.hco3()))
		}
		if in.has("logk") && in.f("logk") != 7.608 {
			return 0, fmt.Errorf("constants of log %v are not known", in.f("logk"))
		}
		hco3, err := c.Bicarbonate(in.ph(), in.pressure("pco2"))
		if err != nil {
			return 0, err
		}
		return number(form(in.ph(), hco3))
	}
}

// adult keeps the zero anchor, which stands for the adult one.
var adult physio.Anchor

// slope gives the bicarbonate by one published slope; change gives its
// difference from the adult 24.
func slope(perMmHg float64) measure {
	return func(in *inputs) (float64, error) {
		return number(physio.BicarbonateBySlope(in.paco2(), perMmHg, adult))
	}
}

func change(perMmHg float64) measure {
	return func(in *inputs) (float64, error) {
		v, err := slope(perMmHg)(in)
		return v - physio.AnchorAdult.HCO3, err
	}
}

// perKPa gives the change of bicarbonate for a rise of PaCO2 in kPa.
func perKPa(perMmHg float64) measure {
	return func(in *inputs) (float64, error) {
		rise := physio.KPa(in.f("d_pco2_kpa"))
		v, err := physio.BicarbonateBySlope(physio.MmHg(40)+rise, perMmHg, adult)
		return float64(v) - physio.AnchorAdult.HCO3, err
	}
}

func acuteHCO3(in *inputs) (float64, error) {
	iv, err := physio.AcuteBicarbonate(in.paco2(), adult)
	return iv.Value, err
}

// phWith gives the pH at the row's PaCO2 with the bicarbonate of a measure.
func phWith(hco3 measure) measure {
	return func(in *inputs) (float64, error) {
		v, err := hco3(in)
		if err != nil {
			return 0, err
		}
		return number(physio.PHFrom(in.paco2(), physio.MmolL(v)))
	}
}

// sbeOf gives the standard base excess of a PaCO2 and a bicarbonate.
func sbeOf(paco2 physio.Pressure, hco3 physio.Concentration) (float64, error) {
	ph, err := physio.PHFrom(paco2, hco3)
	if err != nil {
		return 0, err
	}
	return number(physio.StandardBaseExcess(ph, hco3))
}

func line(l physio.Line, input string) measure {
	return func(in *inputs) (float64, error) { return l.At(in.f(input)) }
}

// albuminCorrected gives the albumin term of the gap for one normal albumin.
func albuminCorrected(normal physio.GramsPerL) measure {
	return func(in *inputs) (float64, error) {
		return number(physio.AlbuminCorrection(physio.AlbuminLevel{Measured: in.albumin(), Normal: normal}))
	}
}

func anionGap(in *inputs) (float64, error) { return number(physio.AnionGap(in.ions())) }

func deltaRatio(in *inputs) (float64, error) { return physio.DeltaRatio(in.delta()) }

func (in *inputs) stature() (physio.Sex, physio.Centimetres) {
	sex := map[string]physio.Sex{"F": physio.Female, "M": physio.Male}[in.word("sex")]
	if in.has("height_cm") {
		return sex, physio.Centimetres(in.f("height_cm"))
	}
	return sex, physio.Inches(in.f("height_in"))
}

func hydrogen(in *inputs) (float64, error) { return in.ph().Hydrogen(), nil }

func hydrogenBedside(in *inputs) (float64, error) {
	return physio.HydrogenBedside(in.pressure("pco2"), in.hco3())
}

func pco2Factor(in *inputs) (float64, error) {
	p, err := physio.PCO2AtTemp(40, in.temp())
	return float64(p) / 40, err
}

func (in *inputs) po2AtTemp() (physio.Pressure, error) {
	return physio.PO2AtTemp(physio.MmHg(in.f("po2_37_mmhg")), in.temp())
}

func po2Warm(in *inputs) (float64, error) { return in.in(in.po2AtTemp()) }

func po2Factor(in *inputs) (float64, error) {
	p, err := in.po2AtTemp()
	return float64(p) / in.f("po2_37_mmhg"), err
}

func phShift(in *inputs) (float64, error) {
	ph := physio.PH(in.f("pH37"))
	at, err := physio.PHAtTemp(ph, in.temp())
	return float64(at - ph), err
}

func (in *inputs) solutes() physio.Solutes {
	return physio.Solutes{
		Na: physio.MmolL(in.f("na")), Glucose: in.mg("glu_mgdl", physio.GlucoseMgDL),
		Urea: in.mg("bun_mgdl", physio.UreaNitrogenMgDL), Ethanol: in.mg("etoh_mgdl", physio.EthanolMgDL),
	}
}

// partition splits a base excess; terms the row does not give are at the rule's
// own zero points.
func (in *inputs) partition() (physio.Partition, error) {
	return physio.PartitionBE(0, physio.Plasma{
		Ions:      physio.Ions{Na: physio.MmolL(in.or("na", 142)), Cl: physio.MmolL(in.or("cl", 104))},
		AlbuminGL: physio.GramsPerL(in.or("alb_gl", 42)), Lactate: physio.MmolL(in.or("lac", 1)),
	})
}

func (in *inputs) breathing() physio.Breathing {
	b := physio.Breathing{Rate: physio.Rate(in.or("rr", 12))}
	for name, toML := range map[string]float64{"vt_ml": 1, "vt_l": 1000} {
		b.Breath += physio.Volume(in.or(name, 0) * toML)
	}
	for name, toML := range map[string]float64{"vd_ml": 1, "vd_l": 1000} {
		b.Dead += physio.Volume(in.or(name, 0) * toML)
	}
	if b.Breath == 0 {
		b.Breath = 500
	}
	return b
}

func (in *inputs) aim() physio.Aim {
	return physio.Aim{Now: physio.MmHg(in.f("paco2_from")), Target: physio.MmHg(in.f("paco2_to"))}
}

func ventilatoryRatio(in *inputs) (float64, error) {
	return physio.VentilatoryRatio(physio.Flow(in.f("ve_ml_min")/1000), in.paco2(), in.predicted())
}

func (in *inputs) endTidal() physio.EndTidal {
	return physio.EndTidal{PaCO2: in.paco2(), EtCO2: in.pressure("etco2")}
}

func (in *inputs) blood() physio.BloodForBE {
	return physio.BloodForBE{
		PH: in.ph(), HCO3: physio.MmolL(in.or("hco3", 0)), PaCO2: physio.MmHg(in.or("pco2_mmhg", 0)),
		Hb: physio.Haemoglobin(in.f("hb_gdl")), SO2: physio.Fraction(in.or("so2", 0)),
	}
}

func outputConstant(standard physio.Pressure) (physio.Pressure, error) {
	return physio.OutputConstant(standard, 37)
}
