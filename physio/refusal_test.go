package physio

import (
	"errors"
	"math"
	"slices"
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
var openCalls = slices.Concat(openOxygenCalls, openVentilationCalls)

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
