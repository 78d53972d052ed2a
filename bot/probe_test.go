package bot

import (
	"fmt"
	"testing"

	"galeward/bot/shorthand"
	"galeward/physio"
)

func TestProbe(t *testing.T) {
	gas := func(ph, c, o, h, f float64) *shorthand.Gas {
		g := &shorthand.Gas{}
		g.Sample.Set(physio.PHq, ph)
		g.Sample.Set(physio.PaCO2, c)
		g.Sample.Set(physio.PaO2, o)
		if h != 0 {
			g.Sample.Set(physio.HCO3, h)
		}
		if f != 0 {
			g.Sample.Set(physio.FiO2, f)
		}
		return g
	}
	nrb := gas(7.05, 95, 40, 0, 0)
	nrb.Sample.Device = physio.ReservoirMask
	ve := gas(7.30, 40, 88, 19, 0.4)
	ve.Sample.Set(physio.VE, 22)
	rr := gas(7.27, 72, 54, 32, 0.4)
	rr.Sample.Set(physio.RR, 22)
	can := gas(7.36, 44, 68, 25, 0)
	can.Sample.Device = physio.Cannula
	can.Sample.Set(physio.OxygenFlow, 2)
	for _, g := range []*shorthand.Gas{gas(7.40, 40, 95, 24, 0.6), rr, nrb, gas(7.28, 58, 62, 27, 0), ve, can, gas(7.44, 48, 70, 32, .21), gas(7.19, 28, 105, 10, .21), gas(7.25, 40, 90, 17, .4)} {
		a := physio.Assess(g.Sample, physio.Setting{})
		c := &composer{gas: g, a: &a}
		fmt.Println(c.compose().Text())
		fmt.Println()
	}
}
