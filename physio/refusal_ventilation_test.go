package physio

// openVentilationCalls are the formulas of ventilation and acid-base.
var openVentilationCalls = []call{
	{"Bicarbonate pH", func(x float64) (float64, error) { return plain(Bicarbonate(PH(x), 40)) }},
	{"Bicarbonate PCO2", func(x float64) (float64, error) { return plain(Bicarbonate(7.4, MmHg(x))) }},
	{"PHFrom PCO2", func(x float64) (float64, error) { return plain(PHFrom(MmHg(x), 24)) }},
	{"PHFrom HCO3", func(x float64) (float64, error) { return plain(PHFrom(40, MmolL(x))) }},
	{"PCO2From pH", func(x float64) (float64, error) { return plain(PCO2From(PH(x), 24)) }},
	{"PCO2From HCO3", func(x float64) (float64, error) { return plain(PCO2From(7.4, MmolL(x))) }},
	{"StandardBaseExcess pH", func(x float64) (float64, error) { return plain(StandardBaseExcess(PH(x), 24)) }},
	{"StandardBaseExcess HCO3", func(x float64) (float64, error) { return plain(StandardBaseExcess(7.4, MmolL(x))) }},
	{"BicarbonateFromBE pH", func(x float64) (float64, error) { return plain(BicarbonateFromBE(PH(x), 0)) }},
	{"PHAtPCO2 PCO2", func(x float64) (float64, error) { return plain(PHAtPCO2(0, MmHg(x))) }},
	{"Constants solubility", func(x float64) (float64, error) { return plain(Constants{x, 6.1}.Bicarbonate(7.4, 40)) }},
	{"Constants pK", func(x float64) (float64, error) { return plain(Constants{0.03, x}.Bicarbonate(7.4, 40)) }},
	{"Constants pH", func(x float64) (float64, error) { return plain(ConstantsCLSI.Bicarbonate(PH(x), 40)) }},
	{"HendersonKPa", func(x float64) (float64, error) { return Constants{x, 6.1}.HendersonKPa() }},
	{"HydrogenBedside PCO2", func(x float64) (float64, error) { return HydrogenBedside(MmHg(x), 24) }},
	{"HydrogenBedside HCO3", func(x float64) (float64, error) { return HydrogenBedside(40, MmolL(x)) }},
	{"TotalCarbonDioxide", func(x float64) (float64, error) { return plain(TotalCarbonDioxide(MmolL(x), 40)) }},
	{"StandardBaseExcessCLSI", func(x float64) (float64, error) { return plain(StandardBaseExcessCLSI(PH(x), 24)) }},
	{"BaseExcessCLSI", func(x float64) (float64, error) {
		return plain(BaseExcessCLSI(BloodForBE{PH: 7.4, HCO3: 24, Hb: Haemoglobin(x)}))
	}},
	{"BaseExcessLangZander", func(x float64) (float64, error) {
		return plain(BaseExcessLangZander(BloodForBE{PH: 7.4, PaCO2: 40, Hb: Haemoglobin(x), SO2: 1}))
	}},
	{"StandardBaseExcessHb", func(x float64) (float64, error) {
		return plain(StandardBaseExcessHb(BloodForBE{PH: 7.4, HCO3: 24, Hb: Haemoglobin(x)}))
	}},
	{"StandardBicarbonateCLSI", func(x float64) (float64, error) { return plain(StandardBicarbonateCLSI(0, Haemoglobin(x), 1)) }},
	{"AcidosisPaCO2", func(x float64) (float64, error) {
		iv, _, err := AcidosisPaCO2(Metabolic{HCO3: MmolL(x)})
		return iv.Value, err
	}},
	{"AlkalosisPaCO2", func(x float64) (float64, error) {
		iv, _, err := AlkalosisPaCO2(Metabolic{HCO3: MmolL(x)})
		return iv.Value, err
	}},
	{"AcuteBicarbonate", func(x float64) (float64, error) { return middle(AcuteBicarbonate(MmHg(x), Anchor{})) }},
	{"AcuteBicarbonate anchor", func(x float64) (float64, error) { return middle(AcuteBicarbonate(40, Anchor{x, 24, 0})) }},
	{"ChronicBicarbonate", func(x float64) (float64, error) { return middle(ChronicBicarbonate(MmHg(x), Anchor{})) }},
	{"ChronicSBE", func(x float64) (float64, error) { return plain(ChronicSBE(MmHg(x), Anchor{})) }},
	{"AcutePH", func(x float64) (float64, error) { return plain(AcutePH(MmHg(x), Anchor{})) }},
	{"ChronicPH", func(x float64) (float64, error) { return middle(ChronicPH(MmHg(x), Anchor{})) }},
	{"UsualPaCO2 PaCO2", func(x float64) (float64, error) { return low(UsualPaCO2(MmHg(x), 32, Anchor{})) }},
	{"UsualPaCO2 HCO3", func(x float64) (float64, error) { return low(UsualPaCO2(72, MmolL(x), Anchor{})) }},
	{"BicarbonateBySlope", func(x float64) (float64, error) { return plain(BicarbonateBySlope(MmHg(x), 0.4, Anchor{})) }},
	{"Line", LineWinters.At},

	{"AnionGap", func(x float64) (float64, error) { return plain(AnionGap(Ions{Na: MmolL(x), Cl: 104, HCO3: 24})) }},
	{"AnionGapK", func(x float64) (float64, error) {
		return plain(AnionGapK(Ions{Na: 140, Cl: 104, HCO3: 24, K: MmolL(x)}))
	}},
	{"AnionGapK Cl", func(x float64) (float64, error) { return plain(AnionGapK(Ions{Na: 140, Cl: MmolL(x), HCO3: 24, K: 4})) }},
	{"AlbuminCorrection", func(x float64) (float64, error) {
		return plain(AlbuminCorrection(AlbuminLevel{Measured: GramsPerL(x)}))
	}},
	{"ExpectedGap", func(x float64) (float64, error) { return plain(ExpectedGap(12, AlbuminLevel{Measured: GramsPerL(x)})) }},
	{"CorrectedGap", func(x float64) (float64, error) { return plain(CorrectedGap(12, AlbuminLevel{Measured: GramsPerL(x)})) }},
	{"DeltaRatio", func(x float64) (float64, error) { return DeltaRatio(Delta{Gap: 25, HCO3: MmolL(x)}) }},
	{"PotentialBicarbonate", func(x float64) (float64, error) { return plain(PotentialBicarbonate(Delta{Gap: 25, HCO3: MmolL(x)})) }},
	{"ChlorideRatio", func(x float64) (float64, error) { return ChlorideRatio(Ions{Na: MmolL(x), Cl: 104}) }},
	{"ApparentSID", func(x float64) (float64, error) {
		p := ordinaryPlasma()
		p.K = MmolL(x)
		return plain(ApparentSID(p))
	}},
	{"ApparentSID Na", func(x float64) (float64, error) {
		p := ordinaryPlasma()
		p.Na = MmolL(x)
		return plain(ApparentSID(p))
	}},
	{"EffectiveSID", func(x float64) (float64, error) {
		p := ordinaryPlasma()
		p.AlbuminGL = GramsPerL(x)
		return plain(EffectiveSID(p))
	}},
	{"StrongIonGap strong", func(x float64) (float64, error) {
		p := ordinaryPlasma()
		p.Mg = MmolL(x)
		return plain(StrongIonGap(p))
	}},
	{"StrongIonGap weak", func(x float64) (float64, error) {
		p := ordinaryPlasma()
		p.Phosphate = MmolL(x)
		return plain(StrongIonGap(p))
	}},
	{"AlbuminCharge", func(x float64) (float64, error) { return AlbuminCharge(PH(x)) }},
	{"PhosphateCharge", func(x float64) (float64, error) { return PhosphateCharge(PH(x)) }},
	{"PartitionBE", func(x float64) (float64, error) {
		p := ordinaryPlasma()
		p.Cl = MmolL(x)
		part, err := PartitionBE(0, p)
		return float64(part.SodiumChloride), err
	}},
	{"Osmolality", func(x float64) (float64, error) { return Osmolality(Solutes{Na: MmolL(x), Glucose: 5, Urea: 5}) }},
	{"OsmolalGap", func(x float64) (float64, error) { return OsmolalGap(x, Solutes{Na: 140, Glucose: 5, Urea: 5}) }},
	{"OsmolalGap Na", func(x float64) (float64, error) { return OsmolalGap(300, Solutes{Na: MmolL(x), Glucose: 5, Urea: 5}) }},

	{"DeadSpaceFraction", func(x float64) (float64, error) { return plain(DeadSpaceFraction(DeadSpaceGas{40, MmHg(x)})) }},
	{"DeadSpace", func(x float64) (float64, error) { return plain(DeadSpace(Fraction(x), 500)) }},
	{"AlveolarDeadFraction", func(x float64) (float64, error) { return AlveolarDeadFraction(EndTidal{40, MmHg(x)}) }},
	{"EndTidalGap", func(x float64) (float64, error) { return plain(EndTidalGap(EndTidal{MmHg(x), 35})) }},
	{"AnatomicalDeadSpace", func(x float64) (float64, error) { return plain(AnatomicalDeadSpace(Kilograms(x), 40)) }},
	{"LeastPowerBreath", func(x float64) (float64, error) { return plain(LeastPowerBreath(Volume(x))) }},
	{"DeadSpaceFromOutput", func(x float64) (float64, error) { return plain(DeadSpaceFromOutput(200, Flow(x), 40)) }},
	{"DeadSpaceRegression", func(x float64) (float64, error) {
		return plain(DeadSpaceRegression(BedsideDeadSpace{EndTidal{45, 32}, Rate(x), 60}))
	}},
	{"DeadSpaceRegression PaCO2", func(x float64) (float64, error) {
		return plain(DeadSpaceRegression(BedsideDeadSpace{EndTidal{MmHg(x), 32}, 20, 60}))
	}},
	{"OutputConstant", func(x float64) (float64, error) { return plain(OutputConstant(MmHg(x), 37)) }},
	{"MinuteVolume", func(x float64) (float64, error) { return plain(MinuteVolume(Breathing{Breath: Volume(x), Rate: 14})) }},
	{"AlveolarVentilation", func(x float64) (float64, error) { return plain(AlveolarVentilation(Breathing{500, 150, Rate(x)})) }},
	{"DeadSpaceVentilation", func(x float64) (float64, error) { return plain(DeadSpaceVentilation(Breathing{Volume(x), 150, 14})) }},
	{"AlveolarVentilationFor", func(x float64) (float64, error) { return plain(AlveolarVentilationFor(GasRate(x), 40)) }},
	{"PaCO2FromOutput", func(x float64) (float64, error) { return plain(PaCO2FromOutput(200, Flow(x))) }},
	{"CorrectedMinuteVolume", func(x float64) (float64, error) { return plain(CorrectedMinuteVolume(Flow(x), 40)) }},
	{"VentilatoryRatio", func(x float64) (float64, error) { return VentilatoryRatio(7, 40, Kilograms(x)) }},
	{"RateFor rate", func(x float64) (float64, error) { return plain(RateFor(Rate(x), Aim{60, 45})) }},
	{"RateFor target", func(x float64) (float64, error) { return plain(RateFor(20, Aim{60, MmHg(x)})) }},
	{"MinuteVolumeFor", func(x float64) (float64, error) { return plain(MinuteVolumeFor(Flow(x), Aim{60, 45})) }},
	{"MinuteVolumeFor target", func(x float64) (float64, error) { return plain(MinuteVolumeFor(8, Aim{60, MmHg(x)})) }},
	{"BreathFor", func(x float64) (float64, error) { return middle(BreathFor(Breathing{Volume(x), 150, 20}, Aim{60, 45})) }},
	{"BreathFor target", func(x float64) (float64, error) { return middle(BreathFor(Breathing{450, 150, 20}, Aim{60, MmHg(x)})) }},
	{"PaCO2After now", func(x float64) (float64, error) {
		return middle(PaCO2After(MmHg(x), Change{Breathing{450, 150, 20}, Breathing{400, 0, 22}}))
	}},
	{"PaCO2After rate", func(x float64) (float64, error) {
		return middle(PaCO2After(45, Change{Breathing{450, 150, 20}, Breathing{400, 0, Rate(x)}}))
	}},
	{"PaCO2After earlier rate", func(x float64) (float64, error) {
		return middle(PaCO2After(45, Change{Breathing{450, 150, Rate(x)}, Breathing{400, 0, 20}}))
	}},

	{"PredictedWeight", func(x float64) (float64, error) { return plain(PredictedWeight(Male, Centimetres(x))) }},
	{"PredictedWeightInches", func(x float64) (float64, error) { return plain(PredictedWeightInches(Female, Inches(x))) }},
	{"VolumePerWeight", func(x float64) (float64, error) { return VolumePerWeight(450, Kilograms(x)) }},
	{"VolumeAtPerWeight", func(x float64) (float64, error) { return plain(VolumeAtPerWeight(x, 70)) }},
	{"DrivingPressure", func(x float64) (float64, error) {
		return plain(DrivingPressure(Inflation{Plateau: CmH2O(x), TotalPEEP: 5}))
	}},
	{"StaticCompliance", func(x float64) (float64, error) {
		return StaticCompliance(Volume(x), Inflation{Plateau: 20, TotalPEEP: 5})
	}},
	{"StaticCompliance plateau", func(x float64) (float64, error) {
		return StaticCompliance(450, Inflation{Plateau: CmH2O(x), TotalPEEP: 5})
	}},
	{"DynamicCharacteristic", func(x float64) (float64, error) {
		return DynamicCharacteristic(450, Inflation{Peak: CmH2O(x), TotalPEEP: 5})
	}},
	{"PowerVolumeControl", func(x float64) (float64, error) {
		return PowerVolumeControl(Breathing{Breath: 450, Rate: Rate(x)}, Inflation{25, 30, 10})
	}},
	{"PowerVolumeControl plateau", func(x float64) (float64, error) {
		return PowerVolumeControl(Breathing{Breath: 450, Rate: 20}, Inflation{CmH2O(x), 30, 10})
	}},
	{"PowerPressureControl", func(x float64) (float64, error) {
		return PowerPressureControl(Breathing{Breath: 450, Rate: 20}, PressureSteps{10, CmH2O(x)})
	}},
	{"PowerSurrogate", func(x float64) (float64, error) { return PowerSurrogate(SurrogateInflation{9, Flow(x), 30, 10}) }},
	{"PressureAndRate", func(x float64) (float64, error) {
		return PressureAndRate(Inflation{Plateau: 25, TotalPEEP: 10}, Rate(x))
	}},
	{"PressureAndRate plateau", func(x float64) (float64, error) {
		return PressureAndRate(Inflation{Plateau: CmH2O(x), TotalPEEP: 10}, 20)
	}},
	{"BreathingIndex", func(x float64) (float64, error) { return BreathingIndex(20, Volume(x)) }},
}
