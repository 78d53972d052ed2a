package physio_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"galeward/physio"
)

// alike says that two numbers agree but for rounding.
func alike(a, b, part float64) bool {
	return math.Abs(a-b) <= part*(1+math.Abs(a)+math.Abs(b))
}

// drawShift makes an ordinary or a strange place of the dissociation curve.
func drawShift(t *rapid.T) physio.CurveShift {
	at := physio.CurveShift{
		PH:    physio.PH(rapid.Float64Range(6.7, 7.8).Draw(t, "ph")),
		PaCO2: physio.MmHg(rapid.Float64Range(10, 150).Draw(t, "pco2")),
		Temp:  physio.Celsius(rapid.Float64Range(25, 42).Draw(t, "temp")),
	}
	if rapid.Bool().Draw(t, "dyshaemoglobin") {
		at.COHb = physio.Fraction(rapid.Float64Range(0, 0.5).Draw(t, "cohb"))
		at.MetHb = physio.Fraction(rapid.Float64Range(0, 0.3).Draw(t, "methb"))
	}
	return at
}

// TestLawHendersonHasselbalch: any two of pH, PaCO2 and HCO3 give the third, and
// with it each other again; base excess and bicarbonate turn back as well.
func TestLawHendersonHasselbalch(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		ph := physio.PH(rapid.Float64Range(6.8, 7.8).Draw(t, "ph"))
		pco2 := physio.MmHg(rapid.Float64Range(8, 150).Draw(t, "pco2"))
		hco3, err := physio.Bicarbonate(ph, pco2)
		if err != nil || !physio.HCO3.Possible(float64(hco3)) {
			return // 7.8 beside 150 mmHg: no bicarbonate of a patient
		}
		again, err1 := physio.PHFrom(pco2, hco3)
		pressure, err2 := physio.PCO2From(ph, hco3)
		if err1 != nil || err2 != nil || !alike(float64(again), float64(ph), 1e-12) || !alike(pressure.MmHg(), pco2.MmHg(), 1e-12) {
			t.Fatalf("pH %v and %v mmHg come back as %v and %v (%v, %v)", ph, pco2, again, pressure, err1, err2)
		}
		be, err1 := physio.StandardBaseExcess(ph, hco3)
		back, err2 := physio.BicarbonateFromBE(ph, be)
		if err1 == nil && err2 == nil && !alike(float64(back), float64(hco3), 1e-12) {
			t.Fatalf("bicarbonate %v comes back from BE %v as %v", hco3, be, back)
		}
	})
}

// TestLawCurveTurnsBack: the PO2 of a saturation is the one it came from, on
// every place of the curve, up to the saturation above which none is told.
func TestLawCurveTurnsBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		at := drawShift(t)
		po2 := physio.MmHg(rapid.Float64Range(3, 200).Draw(t, "po2"))
		sat, err := physio.Saturation(po2, at)
		if err != nil {
			t.Fatal(err)
		}
		if sat < 0.01 || sat > physio.SaturationCeiling {
			return
		}
		if back, err := physio.PO2At(sat, at); err != nil || !alike(back.MmHg(), po2.MmHg(), 1e-8) {
			t.Fatalf("PO2 %v at %+v is saturation %v, which is %v (%v)", po2, at, sat, back, err)
		}
		more, err := physio.Saturation(po2+1, at)
		if err != nil || more < sat {
			t.Fatalf("PO2 %v saturates to %v, 1 mmHg more to %v (%v)", po2, sat, more, err)
		}
	})
}

// drawLung makes a gas that its own oxygen can give.
func drawLung(t *rapid.T) physio.LungGas {
	gas := physio.AlveolarGas{
		FiO2:  physio.Fraction(rapid.Float64Range(0.21, 1).Draw(t, "fio2")),
		PB:    physio.MmHg(rapid.Float64Range(600, 780).Draw(t, "pb")),
		PaCO2: physio.MmHg(rapid.Float64Range(20, 60).Draw(t, "pco2")),
	}
	alveolar, err := physio.AlveolarPO2(gas)
	if err != nil {
		t.Fatal(err)
	}
	return physio.LungGas{
		Gas: gas, PaO2: physio.MmHg(rapid.Float64Range(20, alveolar.MmHg()).Draw(t, "po2")),
		Hb: physio.Haemoglobin(rapid.Float64Range(5, 20).Draw(t, "hb")),
	}
}

// TestLawMoreOxygenNeverLowersPaO2: neither way of foreseeing a PaO2 falls when
// the oxygen rises, and at the oxygen that was given both give the PaO2 back.
func TestLawMoreOxygenNeverLowersPaO2(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		lung := drawLung(t)
		low := rapid.Float64Range(0.21, 1).Draw(t, "fio2 low")
		high := rapid.Float64Range(low, 1).Draw(t, "fio2 high")
		a, err1 := physio.PaO2AtFiO2(lung, physio.Fraction(low))
		b, err2 := physio.PaO2AtFiO2(lung, physio.Fraction(high))
		if err1 != nil || err2 != nil {
			return // at the lower FiO2 no oxygen may be left
		}
		if b.FixedShunt < a.FixedShunt-1e-6 || b.FixedRatio < a.FixedRatio-1e-6 {
			t.Fatalf("%+v: on %.3f %+v, on %.3f %+v", lung, low, a, high, b)
		}
		same, err := physio.PaO2AtFiO2(lung, lung.Gas.FiO2)
		if err != nil || !alike(same.FixedRatio.MmHg(), lung.PaO2.MmHg(), 1e-9) {
			t.Fatalf("%+v foresees %+v on its own oxygen (%v)", lung, same, err)
		}
	})
}

// TestLawNoSilentPaO2AboveAlveolar: a PaO2 more than 10 mmHg, which is more than
// noise, above the alveolar PO2 of its own FiO2, pressure and PaCO2 is never
// passed over in silence. On a circuit that exchanges gas for the lung, and in a
// sample that is not of the artery, its own caution stands.
func TestLawNoSilentPaO2AboveAlveolar(t *testing.T) {
	said := []physio.CautionCode{
		physio.CautionAboveAlveolar, physio.CautionECMO, physio.CautionCPR, physio.CautionVenous, physio.CautionCapillary,
		physio.CautionCord, physio.CautionVenousLikely,
	}
	above := 0
	rapid.Check(t, func(t *rapid.T) {
		s := draw(t)
		s.Set(physio.PaCO2, rapid.Float64Range(5, 200).Draw(t, "pco2"))
		s.Set(physio.PaO2, rapid.Float64Range(10, 700).Draw(t, "po2"))
		s.Set(physio.FiO2, rapid.Float64Range(0.15, 1).Draw(t, "oxygen"))
		a := assess(s)
		alveolar := alveolarOf(a.Oxygen.FiO2.Value, a.PB, s.Val(physio.PaCO2))
		if s.Val(physio.PaO2) <= alveolar+10 {
			return
		}
		above++
		for _, code := range said {
			if a.Raised(code) {
				return
			}
		}
		t.Fatalf("PaO2 %v above alveolar PO2 %v: %v", s.Val(physio.PaO2), alveolar, a.Cautions)
	})
	if above == 0 {
		t.Error("no PaO2 was above")
	}
}

// alveolarOf is the alveolar PO2 of the full equation with R 0.8 and 47 mmHg of
// water vapour (Fenn, Rahn and Otis 1946), also where it is none.
func alveolarOf(fio2, pb, paco2 float64) float64 {
	return fio2*(pb-47) - paco2*(fio2+(1-fio2)/0.8)
}
