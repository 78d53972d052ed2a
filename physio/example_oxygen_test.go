package physio_test

import (
	"fmt"

	"galeward/physio"
)

// On air with PaCO2 36 and R 0.8 the alveolar PO2 is 107 mmHg (sample values of
// an encyclopaedia article on the equation, common practice).
func ExampleAlveolarPO2() {
	alveolar, err := physio.AlveolarPO2(physio.AlveolarGas{FiO2: 0.21, PB: physio.MmHg(760), PaCO2: physio.MmHg(36)})
	fmt.Printf("%.0f mmHg, %.1f kPa %v\n", alveolar.MmHg(), alveolar.KPa(), err)
	// Output: 107 mmHg, 14.2 kPa <nil>
}

// At 2500 m the same air holds an inspired PO2 of 110 instead of 150 mmHg (570
// mmHg by West 1996).
func ExampleInspiredPO2() {
	pb, source, _ := physio.BarometricPressure(physio.PressureKnown{Altitude: 2500})
	inspired, err := physio.InspiredPO2(physio.AlveolarGas{FiO2: 0.21, PB: pb})
	fmt.Printf("%.0f mmHg by %s: %.0f mmHg %v\n", pb.MmHg(), source, inspired.MmHg(), err)
	// Output: 570 mmHg by altitude: 110 mmHg <nil>
}

// PaO2 40 is 75 % on the standard curve (Severinghaus 1979, table 1: 74.69).
func ExampleSaturation() {
	standard, _ := physio.Saturation(physio.MmHg(40), physio.CurveShift{})
	acidotic, _ := physio.Saturation(physio.MmHg(40), physio.CurveShift{PH: 7.05, PaCO2: physio.MmHg(95)})
	fmt.Printf("%.0f %%, at pH 7.05 and PaCO2 95 %.0f %%\n", standard.Percent(), acidotic.Percent())
	// Output: 75 %, at pH 7.05 and PaCO2 95 50 %
}

// A saturation above 97 % does not tell a PaO2.
func ExamplePO2At() {
	p, _ := physio.PO2At(0.90, physio.CurveShift{})
	fmt.Printf("%.0f mmHg\n", p.MmHg())
	_, err := physio.PO2At(0.99, physio.CurveShift{})
	fmt.Println(err)
	// Output:
	// 59 mmHg
	// physio: SaO2 0.99 is outside 0.01 to 0.97
}

// PaO2 60 on 40 % at 2500 m: P/F 150, by the Berlin footnote 112.5 (Ranieri
// 2012).
func ExamplePFRatio() {
	pf, _ := physio.PFRatio(physio.MmHg(60), 0.40)
	corrected, _ := physio.PFAtAltitude(physio.PFAt{PF: pf, PB: physio.MmHg(570)})
	fmt.Printf("%.0f mmHg, %.1f with the pressure\n", pf.MmHg(), corrected.MmHg())
	// Output: 150 mmHg, 112.5 with the pressure
}

// SpO2 92 % on 60 % with a rate of 30: ROX 5.11 (definition of Roca 2019).
func ExampleROX() {
	v, err := physio.ROX(physio.PulseOnOxygen{SpO2: 0.92, FiO2: 0.60}, 30)
	fmt.Printf("%.2f %v\n", v, err)
	// Output: 5.11 <nil>
}

// Contents of 18.09, 15.94 and 12.39 mL/dL are a shunt of 37.8 % (college
// respiratory-care problem, printed as 37.6 %).
func ExampleShunt() {
	s, err := physio.Shunt(physio.Contents{Capillary: 18.088, Arterial: 15.936, Venous: 12.389})
	fmt.Printf("%.1f %% %v\n", s.Percent(), err)
	// Output: 37.8 % <nil>
}

// Hb 13 g/dL, saturation 90 % and PaO2 86 with 1.34 and 0.003: 15.94 mL/dL
// (college respiratory-care problem: 15.936).
func ExampleBinding_Content() {
	c, err := physio.Binding{Capacity: 1.34, Solubility: 0.003}.Content(13, 0.90, physio.MmHg(86))
	fmt.Printf("%.3f mL/dL %v\n", float64(c), err)
	// Output: 15.936 mL/dL <nil>
}

// PaO2 95 on 60 % foretells about 59 to 77 mmHg on 40 %: fixed a/A (Gilbert and
// Keighley 1974) and fixed shunt (Benatar 1973).
func ExamplePaO2AtFiO2() {
	known := physio.LungGas{
		Gas:  physio.AlveolarGas{FiO2: 0.60, PB: physio.MmHg(760), PaCO2: physio.MmHg(40)},
		PaO2: physio.MmHg(95), Shift: physio.CurveShift{PH: 7.40},
	}
	bracket, err := physio.PaO2AtFiO2(known, 0.40)
	iv := bracket.Interval()
	fmt.Printf("%.0f to %.0f mmHg %v\n", iv.Low, iv.High, err)
	// Output: 59 to 77 mmHg <nil>
}

// A cannula at 2 L/min gives about 28 % (teaching table, common practice), and
// the range says how surely.
func ExampleInspiredOxygen() {
	fio2, estimated, err := physio.InspiredOxygen(physio.OxygenSupply{Device: physio.Cannula, Flow: 2})
	fmt.Printf("%.2f (%.2f to %.2f), estimated %v %v\n", fio2.Value, fio2.Low, fio2.High, estimated, err)
	// Output: 0.28 (0.23 to 0.33), estimated true <nil>
}
