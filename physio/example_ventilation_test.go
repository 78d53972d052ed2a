package physio_test

import (
	"fmt"

	"galeward/physio"
)

// pH 7.26 with PCO2 16 holds a bicarbonate of 7.0 (Brandis, case 2: 7.1 with
// slightly other constants).
func ExampleBicarbonate() {
	hco3, err := physio.Bicarbonate(7.26, physio.MmHg(16))
	fmt.Printf("%.1f mmol/L %v\n", float64(hco3), err)
	// Output: 7.1 mmol/L <nil>
}

// pH 6.98 with PCO2 31: an analyser printed a base excess of -22 (CICM 2020,
// paper 2, question 43).
func ExampleStandardBaseExcess() {
	hco3, _ := physio.Bicarbonate(6.98, physio.MmHg(31))
	sbe, err := physio.StandardBaseExcess(6.98, hco3)
	fmt.Printf("%.0f mmol/L %v\n", float64(sbe), err)
	// Output: -22 mmol/L <nil>
}

// From pH 7.27 and PaCO2 72 with a bicarbonate of 32 a fall of PaCO2 to 58 alone
// leads to pH 7.34 (Schlichtig 1998: base excess stays).
func ExamplePHAtPCO2() {
	sbe, _ := physio.StandardBaseExcess(7.27, 32)
	ph, err := physio.PHAtPCO2(sbe, physio.MmHg(58))
	fmt.Printf("%.2f %v\n", float64(ph), err)
	// Output: 7.34 <nil>
}

// Bicarbonate 9 expects a PaCO2 of 19.5 to 23.5 by Winters (question bank,
// common practice: 21.5).
func ExampleAcidosisPaCO2() {
	_, winters, err := physio.AcidosisPaCO2(physio.Metabolic{HCO3: 9, SBE: -16})
	fmt.Printf("%.1f (%.1f to %.1f) mmHg %v\n", winters.Value, winters.Low, winters.High, err)
	// Output: 21.5 (19.5 to 23.5) mmHg <nil>
}

// PaCO2 60 expects a bicarbonate of 26 acutely (Brandis, rule 1) and 31 to 34
// when chronic (Brackett 1969, Martinu 2003).
func ExampleChronicBicarbonate() {
	acute, _ := physio.AcuteBicarbonate(physio.MmHg(60), physio.AnchorAdult)
	chronic, err := physio.ChronicBicarbonate(physio.MmHg(60), physio.AnchorAdult)
	fmt.Printf("acute %.0f, chronic %.0f to %.0f mmol/L %v\n", acute.Value, chronic.Low, chronic.High, err)
	// Output: acute 26, chronic 31 to 34 mmol/L <nil>
}

// Na 136, Cl 106, HCO3 10 with albumin 36 g/L: a gap of 20, corrected 21
// (teaching example, common practice: expected gap 11).
func ExampleAnionGap() {
	gap, _ := physio.AnionGap(physio.Ions{Na: 136, Cl: 106, HCO3: 10})
	corrected, err := physio.CorrectedGap(gap, physio.AlbuminLevel{Measured: 36})
	fmt.Printf("%.0f, corrected %.0f mmol/L %v\n", float64(gap), float64(corrected), err)
	// Output: 20, corrected 21 mmol/L <nil>
}

// PaCO2 40 with a mixed expired PCO2 of 27: VD/VT 0.325 (course calculation,
// common practice).
func ExampleDeadSpaceFraction() {
	f, err := physio.DeadSpaceFraction(physio.DeadSpaceGas{PaCO2: physio.MmHg(40), PeCO2: physio.MmHg(27)})
	fmt.Printf("%.3f %v\n", float64(f), err)
	// Output: 0.325 <nil>
}

// 7 L/min at PaCO2 37.5 mmHg and 70 kg is a ratio of 1 by definition (Sinha
// 2009).
func ExampleVentilatoryRatio() {
	v, err := physio.VentilatoryRatio(7, physio.KPa(5), 70)
	fmt.Printf("%.2f %v\n", v, err)
	// Output: 1.00 <nil>
}

// From PaCO2 60 to 45 at this rate: 533 mL with a fixed dead space of 200 mL,
// 600 by the minute-volume rule (PaCO2 x VA constant).
func ExampleBreathFor() {
	iv, err := physio.BreathFor(physio.Breathing{Breath: 450, Dead: 200, Rate: 20}, physio.Aim{Now: 60, Target: 45})
	fmt.Printf("%.0f to %.0f mL %v\n", iv.Low, iv.High, err)
	// Output: 533 to 600 mL <nil>
}

// A woman of 64 inches has 54.7 kg (ARDS Network table).
func ExamplePredictedWeight() {
	kg, err := physio.PredictedWeight(physio.Female, physio.Inches(64))
	fmt.Printf("%.1f kg %v\n", float64(kg), err)
	// Output: 54.7 kg <nil>
}

// PCO2 40 at 37 C is 29.4 mmHg at 30 C (CLSI C46-A2 2009).
func ExamplePCO2AtTemp() {
	p, err := physio.PCO2AtTemp(physio.MmHg(40), 30)
	fmt.Printf("%.1f mmHg %v\n", p.MmHg(), err)
	// Output: 29.4 mmHg <nil>
}
