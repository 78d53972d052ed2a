package physio

// openOxygenCalls are the formulas of oxygen transfer and of devices.
var openOxygenCalls = []call{
	{"InspiredPO2 FiO2", func(x float64) (float64, error) {
		return plain(InspiredPO2(AlveolarGas{FiO2: Fraction(x), PB: 760}))
	}},
	{"AlveolarPO2 PB", func(x float64) (float64, error) {
		return plain(AlveolarPO2(AlveolarGas{FiO2: 0.21, PB: MmHg(x), PaCO2: 40}))
	}},
	{"AlveolarPO2 PaCO2", func(x float64) (float64, error) {
		return plain(AlveolarPO2(AlveolarGas{FiO2: 0.21, PB: 760, PaCO2: MmHg(x)}))
	}},
	{"AlveolarPO2Short FiO2", func(x float64) (float64, error) {
		return plain(AlveolarPO2Short(AlveolarGas{FiO2: Fraction(x), PB: 760, PaCO2: 40}))
	}},
	{"EquivalentFiO2", func(x float64) (float64, error) {
		return plain(EquivalentFiO2(AlveolarGas{FiO2: 0.21, PB: MmHg(x)}))
	}},
	{"Saturation PO2", func(x float64) (float64, error) { return plain(Saturation(MmHg(x), CurveShift{})) }},
	{"PO2At saturation", func(x float64) (float64, error) { return plain(PO2At(Fraction(x), CurveShift{})) }},
	{"P50FromSample PO2", func(x float64) (float64, error) { return plain(P50FromSample(MmHg(x), 0.7, CurveShift{})) }},
	{"P50FromSample saturation", func(x float64) (float64, error) { return plain(P50FromSample(40, Fraction(x), CurveShift{})) }},
	{"SaturationSeveringhaus", func(x float64) (float64, error) { return plain(SaturationSeveringhaus(MmHg(x))) }},
	{"PO2Severinghaus", func(x float64) (float64, error) { return plain(PO2Severinghaus(Fraction(x))) }},
	{"PO2Ellis", func(x float64) (float64, error) { return plain(PO2Ellis(Fraction(x))) }},
	{"PO2EllisShifted", func(x float64) (float64, error) { return plain(PO2EllisShifted(Fraction(x), CurveShift{})) }},
	{"SaturationKelman", func(x float64) (float64, error) { return plain(SaturationKelman(MmHg(x), CurveShift{})) }},
	{"Siggaard1984", func(x float64) (float64, error) { return plain(Siggaard1984{PO2: MmHg(x)}.Saturation()) }},

	{"PHAtTemp", func(x float64) (float64, error) { return plain(PHAtTemp(PH(x), 37)) }},
	{"PCO2AtTemp", func(x float64) (float64, error) { return plain(PCO2AtTemp(MmHg(x), 37)) }},
	{"PCO2AtTemp temperature", func(x float64) (float64, error) { return plain(PCO2AtTemp(40, Celsius(x))) }},
	{"PO2AtTemp", func(x float64) (float64, error) { return plain(PO2AtTemp(MmHg(x), 37)) }},

	{"AlveolarArterial", func(x float64) (float64, error) { return plain(AlveolarArterial(Tensions{100, MmHg(x)})) }},
	{"ArterialAlveolarRatio", func(x float64) (float64, error) { return ArterialAlveolarRatio(Tensions{MmHg(x), 90}) }},
	{"RespiratoryIndex", func(x float64) (float64, error) { return RespiratoryIndex(Tensions{100, MmHg(x)}) }},
	{"RespiratoryIndexFromRatio", RespiratoryIndexFromRatio},
	{"ExpectedAA FiO2", func(x float64) (float64, error) {
		s, _, err := ExpectedAA(40, Fraction(x), 760)
		return s.High, err
	}},
	{"PFRatio PaO2", func(x float64) (float64, error) { return plain(PFRatio(MmHg(x), 0.21)) }},
	{"PFRatio FiO2", func(x float64) (float64, error) { return plain(PFRatio(90, Fraction(x))) }},
	{"PFAtAltitude", func(x float64) (float64, error) { return plain(PFAtAltitude(PFAt{MmHg(x), 760})) }},
	{"HealthyPaO2", func(x float64) (float64, error) {
		return middle(HealthyPaO2(AlveolarGas{FiO2: Fraction(x), PB: 760, PaCO2: 40}, 40))
	}},
	{"SFRatio", func(x float64) (float64, error) { return SFRatio(PulseOnOxygen{Fraction(x), 0.4}) }},
	{"SFFromPF", func(x float64) (float64, error) { return SFFromPF(MmHg(x)) }},
	{"PFFromSF", func(x float64) (float64, error) { return plain(PFFromSF(x)) }},
	{"ROX FiO2", func(x float64) (float64, error) { return ROX(PulseOnOxygen{0.92, Fraction(x)}, 20) }},
	{"ROX rate", func(x float64) (float64, error) { return ROX(PulseOnOxygen{0.92, 0.4}, Rate(x)) }},
	{"OxygenationIndex pressure", func(x float64) (float64, error) { return OxygenationIndex(0.6, CmH2O(x), 60) }},
	{"OxygenationIndex PaO2", func(x float64) (float64, error) { return OxygenationIndex(0.6, 15, MmHg(x)) }},
	{"OxygenSaturationIndex SpO2", func(x float64) (float64, error) {
		return OxygenSaturationIndex(PulseOnOxygen{Fraction(x), 0.6}, 15)
	}},
	{"OxygenSaturationIndex pressure", func(x float64) (float64, error) {
		return OxygenSaturationIndex(PulseOnOxygen{0.9, 0.6}, CmH2O(x))
	}},
	{"PredictedPaO2Sitting", func(x float64) (float64, error) { return plain(PredictedPaO2Sitting(Years(x))) }},
	{"PredictedPaO2Mixed", func(x float64) (float64, error) { return plain(PredictedPaO2Mixed(Years(x))) }},
	{"PredictedPaO2Seated", func(x float64) (float64, error) { return plain(PredictedPaO2Seated(BuildAndPaCO2{60, x, 38})) }},
	{"ExpectedPaO2", func(x float64) (float64, error) { return low(ExpectedPaO2(Years(x))) }},

	{"Content Hb", func(x float64) (float64, error) { return plain(BindingFunctional.Content(Haemoglobin(x), 0.97, 90)) }},
	{"Content capacity", func(x float64) (float64, error) { return plain(Binding{Capacity: x}.Content(15, 0.97, 90)) }},
	{"ActiveFraction", func(x float64) (float64, error) { return plain(BindingFunctional.ActiveFraction(x)) }},
	{"ActiveFraction of a binding", func(x float64) (float64, error) { return plain(Binding{Capacity: x}.ActiveFraction(1.39)) }},
	{"TheoreticalCapacity", func(x float64) (float64, error) { return TheoreticalCapacity(HaemoglobinMolar{22394, x}) }},
	{"SolubilityFromMolar", SolubilityFromMolar},
	{"OxygenContent", func(x float64) (float64, error) {
		return plain(OxygenContent(BloodOxygen{Hb: 15, SO2: Fraction(x), PO2: 90}))
	}},
	{"Delivery", func(x float64) (float64, error) { return plain(Delivery(Flow(x), Contents{Arterial: 20})) }},
	{"Consumption", func(x float64) (float64, error) {
		return plain(Consumption(5, Contents{Arterial: 20, Venous: Content(x)}))
	}},
	{"PerSurface", func(x float64) (float64, error) { return PerSurface(1000, x) }},
	{"ContentDifference", func(x float64) (float64, error) {
		return plain(ContentDifference(Contents{Arterial: Content(x), Venous: 15}))
	}},
	{"Extraction", func(x float64) (float64, error) { return plain(Extraction(Contents{Arterial: Content(x), Venous: 15})) }},
	{"Shunt", func(x float64) (float64, error) { return plain(Shunt(Contents{20, 19, Content(x)})) }},
	{"EstimatedShunt", func(x float64) (float64, error) {
		return plain(EstimatedShunt(Contents{Capillary: 20, Arterial: 19}, Content(x)))
	}},
	{"ShuntOnPureOxygen", func(x float64) (float64, error) { return plain(ShuntOnPureOxygen(Tensions{660, MmHg(x)}, 5)) }},
	{"ShuntOnPureOxygen difference", func(x float64) (float64, error) {
		return plain(ShuntOnPureOxygen(Tensions{660, 500}, Content(x)))
	}},
	{"ShuntFromGas PaO2", func(x float64) (float64, error) {
		g := ordinaryLung()
		g.PaO2 = MmHg(x)
		return plain(ShuntFromGas(g))
	}},
	{"ShuntFromGas FiO2", func(x float64) (float64, error) {
		g := ordinaryLung()
		g.Gas.FiO2 = Fraction(x)
		return plain(ShuntFromGas(g))
	}},
	{"PaO2AtFiO2", func(x float64) (float64, error) {
		b, err := PaO2AtFiO2(ordinaryLung(), Fraction(x))
		return b.FixedRatio.MmHg(), err
	}},
	{"FiO2ForPaO2", func(x float64) (float64, error) { return middle(FiO2ForPaO2(ordinaryLung(), MmHg(x))) }},
	{"CannulaRule", func(x float64) (float64, error) { return plain(CannulaUsual.FiO2(Flow(x))) }},
	{"FiO2FromFlows", func(x float64) (float64, error) { return plain(FiO2FromFlows(Mixing{4, Flow(x)})) }},
	{"EntrainmentRatio", func(x float64) (float64, error) { return EntrainmentRatio(Entrainment{FiO2: Fraction(x)}) }},
	{"TotalFlow", func(x float64) (float64, error) { return plain(TotalFlow(Flow(x), 10)) }},
	{"Cylinder.Litres", func(x float64) (float64, error) { return Cylinder{LitresPerPSI: 0.28, PSI: x}.Litres() }},
	{"Cylinder.Minutes", func(x float64) (float64, error) { return Cylinder{LitresPerPSI: x, PSI: 2000}.Minutes(2) }},
	{"Cylinder.PSINeeded", func(x float64) (float64, error) { return Cylinder{LitresPerPSI: x}.PSINeeded(30, 2) }},
	{"Cylinder.PSINeeded flow", func(x float64) (float64, error) { return Cylinder{LitresPerPSI: 0.28}.PSINeeded(30, Flow(x)) }},
	{"MinutesOf", func(x float64) (float64, error) { return MinutesOf(400, Flow(x)) }},
	{"Allowable.At", func(x float64) (float64, error) { return Allowable{5, x}.At(40) }},
	{"Allowable.Crossing", func(x float64) (float64, error) { return Allowable{5, x}.Crossing() }},
}
