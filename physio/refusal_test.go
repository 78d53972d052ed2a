package physio

import (
	"errors"
	"math"
	"testing"
)

// call is one exported formula with one input left open.
type call struct {
	name string
	f    func(x float64) (float64, error)
}

func plain[T ~float64](v T, err error) (float64, error) { return float64(v), err }

func middle(iv Interval, err error) (float64, error) { return iv.Value, err }

func low(s Span, err error) (float64, error) { return s.Low, err }

// openCalls holds every input of every exported formula open once, with the
// others ordinary. Inputs that may be zero or negative are in signedCalls.
var openCalls = []call{
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

// signedCalls may take zero or a negative number, but nothing that is not an
// ordinary one.
var signedCalls = []call{
	{"BicarbonateFromBE BE", func(x float64) (float64, error) { return plain(BicarbonateFromBE(7.4, MmolL(x))) }},
	{"PHAtPCO2 BE", func(x float64) (float64, error) { return plain(PHAtPCO2(MmolL(x), 40)) }},
	{"StandardBicarbonateCLSI BE", func(x float64) (float64, error) { return plain(StandardBicarbonateCLSI(MmolL(x), 15, 1)) }},
	{"WaterVapour", func(x float64) (float64, error) { return plain(WaterVapour(Celsius(x))) }},
	{"PressureAtAltitude", func(x float64) (float64, error) { return plain(PressureAtAltitude(Metres(x))) }},
	{"StandardAtmosphere", func(x float64) (float64, error) { return plain(StandardAtmosphere(Metres(x))) }},
	{"AlveolarPO2 R", func(x float64) (float64, error) {
		return plain(AlveolarPO2(AlveolarGas{FiO2: 0.21, PB: 760, PaCO2: 40, R: x}))
	}},
	{"AlveolarPO2 temperature", func(x float64) (float64, error) {
		return plain(AlveolarPO2(AlveolarGas{FiO2: 0.21, PB: 760, PaCO2: 40, Temp: Celsius(x)}))
	}},
	{"Saturation pH", func(x float64) (float64, error) { return plain(Saturation(60, CurveShift{PH: PH(x)})) }},
	{"Saturation COHb", func(x float64) (float64, error) { return plain(Saturation(60, CurveShift{COHb: Fraction(x)})) }},
	{"Saturation MetHb", func(x float64) (float64, error) {
		return plain(Saturation(60, CurveShift{COHb: 0.2, MetHb: Fraction(x)}))
	}},
	{"PO2At PaCO2", func(x float64) (float64, error) { return plain(PO2At(0.5, CurveShift{PaCO2: MmHg(x)})) }},
	{"P50FromSample pH", func(x float64) (float64, error) { return plain(P50FromSample(40, 0.7, CurveShift{PH: PH(x)})) }},
	{"SaturationKelman pH", func(x float64) (float64, error) { return plain(SaturationKelman(60, CurveShift{PH: PH(x)})) }},
	{"Siggaard1984 pH", func(x float64) (float64, error) { return plain(Siggaard1984{PO2: 60, PH: PH(x)}.Saturation()) }},
	{"PulseGapCO", func(x float64) (float64, error) { return plain(PulseGapCO(Fraction(x))) }},
	{"HealthyPaO2 age", func(x float64) (float64, error) {
		return middle(HealthyPaO2(AlveolarGas{FiO2: 0.21, PB: 760, PaCO2: 40}, Years(x)))
	}},
	{"ShuntRuleOfThumb", func(x float64) (float64, error) { return plain(ShuntRuleOfThumb(MmHg(x))) }},
	{"ShuntFromGas shift", func(x float64) (float64, error) {
		g := ordinaryLung()
		g.Shift.PH = PH(x)
		return plain(ShuntFromGas(g))
	}},
	{"ExpectedGap usual", func(x float64) (float64, error) { return plain(ExpectedGap(MmolL(x), AlbuminLevel{Measured: 40})) }},
	{"CorrectedGap gap", func(x float64) (float64, error) { return plain(CorrectedGap(MmolL(x), AlbuminLevel{Measured: 40})) }},
	{"EthanolEffect", func(x float64) (float64, error) { return EthanolEffect(MmolL(x)) }},
	{"ChildDeadSpacePerKg", func(x float64) (float64, error) { return ChildDeadSpacePerKg(Years(x)) }},
	{"DeadSpaceOdds", func(x float64) (float64, error) { return DeadSpaceOdds(Fraction(x)) }},
	{"ApnoeaRise", func(x float64) (float64, error) { return plain(ApnoeaRise(x)) }},
	{"AlveolarVentilation dead space", func(x float64) (float64, error) { return plain(AlveolarVentilation(Breathing{500, Volume(x), 14})) }},
	{"BicarbonateBySlope slope", func(x float64) (float64, error) { return plain(BicarbonateBySlope(60, x, Anchor{})) }},
	{"EntrainedFiO2", func(x float64) (float64, error) { return plain(EntrainedFiO2(x)) }},
	{"SDFromSmallestChange", SDFromSmallestChange},
	{"Allowable.At value", AllowablePCO2.At},
	{"InspiredOxygen stated", func(x float64) (float64, error) {
		iv, _, err := InspiredOxygen(OxygenSupply{Device: Ventilator, Stated: Fraction(x)})
		return iv.Value, err
	}},
	{"InspiredOxygen flow", func(x float64) (float64, error) {
		iv, _, err := InspiredOxygen(OxygenSupply{Device: Cannula, Flow: Flow(x)})
		return iv.Value, err
	}},
	{"BarometricPressure", func(x float64) (float64, error) {
		p, _, err := BarometricPressure(PressureKnown{House: MmHg(x)})
		return p.MmHg(), err
	}},
}

func ordinaryLung() LungGas {
	return LungGas{Gas: AlveolarGas{FiO2: 0.4, PB: 760, PaCO2: 40}, PaO2: 60}
}

func ordinaryPlasma() Plasma {
	return Plasma{
		Ions: Ions{Na: 140, K: 4.2, Cl: 104, HCO3: 24}, PH: 7.4, IonisedCa: 1.25, Mg: 0.8, Lactate: 1, AlbuminGL: 42, Phosphate: 1.1,
	}
}

func TestNothingButOrdinaryNumbersPasses(t *testing.T) {
	for _, c := range append(openCalls, signedCalls...) {
		for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), 1e12, -1e12} {
			v, err := c.f(bad)
			var out *RangeError
			if !errors.As(err, &out) || v != 0 {
				t.Errorf("%s with %v = %v, %v; want a RangeError and no number", c.name, bad, v, err)
			}
		}
	}
}

func TestZeroIsNoMeasurement(t *testing.T) {
	for _, c := range openCalls {
		for _, bad := range []float64{0, -1} {
			if v, err := c.f(bad); err == nil || v != 0 {
				t.Errorf("%s with %v = %v, %v; want an error and no number", c.name, bad, v, err)
			}
		}
	}
}
