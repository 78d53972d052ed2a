package physio

import (
	"errors"
	"testing"
)

func TestStatedOxygenIsTakenAsItIs(t *testing.T) {
	for _, d := range []Device{Ventilator, CPAPDevice, Bilevel, Cannula, ReservoirMask, TPiece, DeviceUnstated} {
		fio2, estimated, err := InspiredOxygen(OxygenSupply{Device: d, Stated: 0.4, Flow: 3})
		if err != nil || estimated || fio2 != point(0.4) {
			t.Errorf("%q on 0.40: %v, estimated %v, %v", d, fio2, estimated, err)
		}
	}
}

// 24 % at 2 L/min delivered 22.8 % to volunteers (Eur J Respir Dis 1984); masks
// marked 24 to 40 % were within 1.9 % and one marked 60 % gave 50.3 % (Lancet
// 1984, i).
func TestVenturiCarriesItsMeasuredSpread(t *testing.T) {
	for mark, delivered := range map[Fraction]float64{0.24: 0.228, 0.28: 0.262, 0.40: 0.419, 0.60: 0.503} {
		fio2, estimated, err := InspiredOxygen(OxygenSupply{Device: Venturi, Stated: mark})
		if err != nil || estimated || fio2.Value != float64(mark) {
			t.Errorf("mark %v: %v, estimated %v, %v", mark, fio2, estimated, err)
		}
		if delivered < fio2.Low-1e-9 || delivered > fio2.High+1e-9 {
			t.Errorf("mark %v: %v does not hold the measured %v", mark, fio2, delivered)
		}
	}
}

// The teaching table of the cannula: 24, 28, 32, 36, 40 and 44 % at 1 to 6
// L/min (common practice).
func TestCannula(t *testing.T) {
	for flow, want := range map[Flow]float64{1: 0.24, 2: 0.28, 3: 0.32, 4: 0.36, 5: 0.40, 6: 0.44} {
		fio2, estimated, err := InspiredOxygen(OxygenSupply{Device: Cannula, Flow: flow})
		if err != nil || !estimated {
			t.Errorf("%v L/min: estimated %v, %v", flow, estimated, err)
		}
		near(t, "cannula", fio2.Value, want, 1e-9)
		if fio2.Low < airFraction || fio2.Low >= fio2.Value || fio2.High <= fio2.Value {
			t.Errorf("%v L/min: %v", flow, fio2)
		}
		// Mixing into mean inspiratory flows of a patient in distress (45 L/min)
		// and of a quiet one (18 L/min) stays inside.
		for _, inspiratory := range []Flow{18, 45} {
			mixed, err := FiO2FromFlows(Mixing{Oxygen: flow, Inspiratory: inspiratory})
			if f := float64(mixed); err != nil || f < fio2.Low-0.02 || f > fio2.High {
				t.Errorf("%v L/min into %v gives %v, outside %v, %v", flow, inspiratory, mixed, fio2, err)
			}
		}
	}
	var out *RangeError
	if _, _, err := InspiredOxygen(OxygenSupply{Device: Cannula, Flow: 8}); !errors.As(err, &out) || out.Quantity != OxygenFlow {
		t.Errorf("8 L/min by cannula gives %v", err)
	}
}

func TestFlowWithoutADeviceIsACannula(t *testing.T) {
	taken, estimated, err := InspiredOxygen(OxygenSupply{Flow: 3})
	named, _, _ := InspiredOxygen(OxygenSupply{Device: Cannula, Flow: 3})
	if err != nil || !estimated || taken != named {
		t.Errorf("3 L/min gives %v, %v, %v; cannula %v", taken, estimated, err, named)
	}
}

func TestMasks(t *testing.T) {
	for device, want := range map[Device]Span{SimpleMask: {0.35, 0.60}, ReservoirMask: {0.60, 0.90}} {
		fio2, estimated, err := InspiredOxygen(OxygenSupply{Device: device, Flow: 10})
		if err != nil || !estimated || fio2.Low != want.Low || fio2.High != want.High {
			t.Errorf("%s: %v, %v, %v", device, fio2, estimated, err)
		}
		near(t, "middle", fio2.Value, (want.Low+want.High)/2, 1e-9)
	}
}

// High flow below the inspiratory flow draws room air: 20 L/min at 0.60 into 30
// L/min is (20 x 0.60 + 10 x 0.21)/30 = 0.47.
func TestHighFlowBelowInspiratoryFlow(t *testing.T) {
	enough, _, err := InspiredOxygen(OxygenSupply{Device: HighFlow, Stated: 0.6, Flow: 40})
	if err != nil || enough != point(0.6) {
		t.Errorf("40 L/min: %v, %v", enough, err)
	}
	unknown, _, _ := InspiredOxygen(OxygenSupply{Device: HighFlow, Stated: 0.6})
	if unknown != point(0.6) {
		t.Errorf("unknown flow: %v", unknown)
	}
	short, _, _ := InspiredOxygen(OxygenSupply{Device: HighFlow, Stated: 0.6, Flow: 20})
	near(t, "low", short.Low, 0.47, 1e-9)
	near(t, "high", short.High, 0.6, 1e-9)
	hard, _, _ := InspiredOxygen(OxygenSupply{Device: HighFlow, Stated: 0.6, Flow: 40, Minute: 20})
	if hard.Low >= 0.6 {
		t.Errorf("40 L/min into a minute volume of 20: %v", hard)
	}
	baby, _, _ := InspiredOxygen(OxygenSupply{Device: HighFlow, Stated: 0.6, Flow: 6, Population: Newborn})
	if baby != point(0.6) {
		t.Errorf("6 L/min in a newborn: %v", baby)
	}
}

func TestOxygenThatCanNotBeEstimated(t *testing.T) {
	for name, s := range map[string]OxygenSupply{
		"nothing known":        {},
		"ventilator":           {Device: Ventilator},
		"high flow":            {Device: HighFlow, Flow: 50},
		"pulsed":               {Device: PulseDose, Flow: 2},
		"conserving":           {Device: ReservoirCannula, Flow: 2},
		"bled into a circuit":  {Device: Bilevel, Flow: 4, BledIn: true},
		"newborn's cannula":    {Device: Cannula, Flow: 1, Population: Newborn},
		"preterm's mask":       {Device: SimpleMask, Flow: 5, Population: Preterm},
		"child's cannula":      {Device: Cannula, Flow: 2, Population: Child},
		"Venturi without mark": {Device: Venturi, Flow: 4},
	} {
		fio2, _, err := InspiredOxygen(s)
		var missing *MissingError
		if !errors.As(err, &missing) || missing.Need[0] != FiO2 || fio2 != (Interval{}) {
			t.Errorf("%s: %v, %v", name, fio2, err)
		}
	}
	var missing *MissingError
	if _, _, err := InspiredOxygen(OxygenSupply{Device: Cannula}); !errors.As(err, &missing) || missing.Need[0] != OxygenFlow {
		t.Errorf("cannula without a flow: %v", err)
	}
	air, estimated, err := InspiredOxygen(OxygenSupply{Device: Air, Population: Newborn})
	if err != nil || estimated || air != point(0.21) {
		t.Errorf("air: %v, %v, %v", air, estimated, err)
	}
}

func TestOxygenOfASample(t *testing.T) {
	stated := 0.5
	fio2, estimated, err := inspiredOxygen(Sample{Device: Ventilator}, &stated, 0, Adult)
	if err != nil || estimated || fio2 != point(0.5) {
		t.Errorf("stated: %v, %v, %v", fio2, estimated, err)
	}
	if _, _, err := inspiredOxygen(Sample{Device: Bilevel, Circumstance: BledInOxygen}, nil, 4, Adult); err == nil {
		t.Error("oxygen bled into a circuit is estimated")
	}
	fio2, estimated, err = inspiredOxygen(Sample{Device: Cannula}, nil, 2, Adult)
	if err != nil || !estimated {
		t.Errorf("cannula: %v, %v, %v", fio2, estimated, err)
	}
}

func TestEntrainmentRoundTrip(t *testing.T) {
	for _, f := range []Fraction{0.24, 0.28, 0.31, 0.35, 0.40, 0.50, 0.60, 1} {
		ratio, err := EntrainmentRatio(Entrainment{FiO2: f})
		if err != nil {
			t.Fatal(err)
		}
		back, err := EntrainedFiO2(ratio)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "FiO2", float64(back), float64(f), 1e-12)
	}
}

// 1000 psi of an American E cylinder at 2 L/min with nothing left in: 140
// minutes (worked example, common practice).
func TestCylinderTime(t *testing.T) {
	factor, ok := CylinderFactorUS("E")
	if !ok {
		t.Fatal("no E")
	}
	minutes, err := Cylinder{LitresPerPSI: factor, PSI: 1000}.Minutes(2)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "minutes", minutes, 140, 1e-9)
	if _, ok := CylinderFactorUS("J"); ok {
		t.Error("a British letter has an American factor")
	}
	if _, err := (Cylinder{LitresPerPSI: factor, PSI: 150, Reserve: 200}).Minutes(2); err == nil {
		t.Error("a cylinder below its reserve gives minutes")
	}
}

func TestBandsOfDevicesByHand(t *testing.T) {
	for mark, want := range map[Fraction]Span{0.28: {0.261, 0.299}, 0.40: {0.381, 0.419}, 0.42: {0.32, 0.439}, 0.60: {0.50, 0.619}} {
		fio2, _, err := InspiredOxygen(OxygenSupply{Device: Venturi, Stated: mark})
		if err != nil {
			t.Fatal(err)
		}
		near(t, "low", fio2.Low, want.Low, 1e-9)
		near(t, "high", fio2.High, want.High, 1e-9)
	}
	// Minute volume 12 is an inspiratory flow of 36: (33 x 0.60 + 3 x 0.21)/36.
	fast, _, _ := InspiredOxygen(OxygenSupply{Device: HighFlow, Stated: 0.6, Flow: 33, Minute: 12})
	near(t, "high flow", fast.Low, 0.5675, 1e-9)
	if _, _, err := InspiredOxygen(OxygenSupply{Device: Cannula, Flow: 6.5}); err == nil {
		t.Error("6.5 L/min by cannula passes")
	}
}

// At 4 L/min the rules in use give 36, 37 and 33 % (common practice; Frat 2015).
func TestCannulaRulesPart(t *testing.T) {
	for rule, want := range map[CannulaRule]float64{CannulaUsual: 0.36, CannulaAir: 0.37, CannulaGlobal: 0.33} {
		got, err := rule.FiO2(4)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "rule", float64(got), want, 1e-9)
	}
	fio2, _, _ := InspiredOxygen(OxygenSupply{Device: Cannula, Flow: 4})
	near(t, "spread", fio2.High-fio2.Value, 0.08, 1e-9)
}

// Full American cylinders at 2200 psi hold 350, 625, 5300, 6900 and 3450 litres
// (dealers' tables, common practice).
func TestFullCylinders(t *testing.T) {
	for letter, want := range map[string]float64{"D": 350, "E": 625, "G": 5300, "H": 6900, "K": 6900, "M": 3450} {
		factor, ok := CylinderFactorUS(letter)
		litres, err := Cylinder{LitresPerPSI: factor, PSI: 2200}.Litres()
		if !ok || err != nil {
			t.Fatal(letter, ok, err)
		}
		near(t, letter, litres, want, 0.02*want)
	}
}
