package physio

// Some inputs of an index were themselves worked out: a minute volume from
// breath and rate, a predicted weight from a height, a bicarbonate from pH and
// PaCO2. What varies is what was measured, so an index is carried through from
// there, and two inputs that share a reading vary together.

// completion is a quantity that was worked out, from which others and how.
type completion struct {
	q    Quantity
	from []Quantity
	f    func(v *Values) float64
}

// complete works a quantity out where it was not given and others were.
func (sc *scene) complete(q Quantity, f func(v *Values) float64, from ...Quantity) {
	if sc.v.Has(q) || !sc.v.Has(from...) {
		return
	}
	sc.v.Set(q, f(&sc.v))
	sc.made = append(sc.made, completion{q, from, f})
}

// completions are those of the sample and the one of the triple, each after
// what it is made from.
func (sc *scene) completions() []completion {
	d := sc.a.Triple
	if !d.Any {
		return sc.made
	}
	made := sc.made[:len(sc.made):len(sc.made)]
	switch d.Quantity {
	case HCO3:
		return append(made, completion{HCO3, []Quantity{PHq, PaCO2}, func(v *Values) float64 {
			return bicarbonate(v.Val(PHq), v.Val(PaCO2))
		}})
	case PHq:
		return append(made, completion{PHq, []Quantity{PaCO2, HCO3}, func(v *Values) float64 {
			return phFrom(v.Val(PaCO2), v.Val(HCO3))
		}})
	}
	if !sc.v.Has(HCO3) {
		made = append(made, completion{HCO3, []Quantity{PHq, BE}, func(v *Values) float64 {
			return bicarbonateFromBE(v.Val(PHq), v.Val(BE))
		}})
	}
	return append(made, completion{PaCO2, []Quantity{PHq, HCO3}, func(v *Values) float64 {
		return pco2From(v.Val(PHq), v.Val(HCO3))
	}})
}

// carry gives the interval of f over the readings that the quantities come
// from, and over further inputs that are no quantity, handed on as extra.
func (sc *scene) carry(f func(v *Values, extra []float64) float64, on []Quantity, further ...Input) Interval {
	made := sc.completions()
	roots := rootsOf(on, made, nil)
	v := sc.v
	in := make([]Input, len(roots), len(roots)+len(further))
	for i, q := range roots {
		in[i] = sc.input(q, v.Val(q))
	}
	return propagate(func(x []float64) float64 {
		for i, q := range roots {
			v.Set(q, x[i])
		}
		for i := range made {
			v.Set(made[i].q, made[i].f(&v))
		}
		return f(&v, x[len(roots):])
	}, append(in, further...))
}

// carryInputs is carry for a formula of a list of inputs. Where all of them
// were given it needs no detour.
func (sc *scene) carryInputs(f func(x []float64) float64, on []Quantity) Interval {
	made := sc.completions()
	for _, q := range on {
		if completionOf(q, made) != nil {
			x := make([]float64, len(on))
			return sc.carry(func(v *Values, _ []float64) float64 {
				for i, q := range on {
					x[i] = v.Val(q)
				}
				return f(x)
			}, on)
		}
	}
	in := make([]Input, len(on))
	for i, q := range on {
		in[i] = sc.input(q, sc.v.Val(q))
	}
	return propagate(f, in)
}

// rootsOf replaces what was worked out by what it was worked out from, each
// reading once.
func rootsOf(on []Quantity, made []completion, roots []Quantity) []Quantity {
	for _, q := range on {
		if c := completionOf(q, made); c != nil {
			roots = rootsOf(c.from, made, roots)
		} else if !contains(roots, q) {
			roots = append(roots, q)
		}
	}
	return roots
}

func completionOf(q Quantity, made []completion) *completion {
	for i := range made {
		if made[i].q == q {
			return &made[i]
		}
	}
	return nil
}

func contains(qs []Quantity, q Quantity) bool {
	for _, other := range qs {
		if other == q {
			return true
		}
	}
	return false
}

// input is a reading with the spread it brings into a formula. A fraction of
// oxygen that was set is measured like any other reading; that of air is not.
func (sc *scene) input(q Quantity, v float64) Input {
	if f := sc.a.Oxygen.FiO2; q == FiO2 && sc.a.Oxygen.Known && (f.Low < f.High || f.Value <= airFiO2) {
		return Bounded(f)
	}
	return Measured(q, v)
}

// carryBand gives the interval of a published band that lies round what the
// readings say: somewhere inside the band, as a device's oxygen lies somewhere
// inside its bounds. at is where in the band, from 0 to 1, its value stands.
func (sc *scene) carryBand(band func(v *Values) Span, at float64, on ...Quantity) Interval {
	return sc.carry(func(v *Values, x []float64) float64 {
		b := band(v)
		return b.Low + x[0]*(b.High-b.Low)
	}, on, Bounded(Interval{Value: at, Low: 0, High: 1}))
}

// middleOf is where in a band the value stands that the band lies round.
const middleOf = 0.5
