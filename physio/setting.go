package physio

// Aim is a PaCO2 that is there and one that is wanted.
type Aim struct {
	Now, Target Pressure
}

func (a Aim) check() error {
	return check(given{q: PaCO2, v: a.Now.MmHg()}, given{q: PaCO2, v: a.Target.MmHg()})
}

// factor is by how much alveolar ventilation has to change: PaCO2 x VA holds
// while CO2 output holds.
func (a Aim) factor() float64 { return a.Now.MmHg() / a.Target.MmHg() } // Rossier 1960

// RateFor gives the rate per minute that reaches the target at this breath. As
// the dead space of each breath stays the same it needs none.
func RateFor(rate Rate, a Aim) (Rate, error) {
	if err := a.check(); err != nil {
		return 0, err
	}
	if err := check(given{q: RR, v: float64(rate)}); err != nil {
		return 0, err
	}
	return Rate(rateFor(float64(rate), a.factor())), nil
}

func rateFor(rate, factor float64) float64 { return rate * factor }

// MinuteVolumeFor gives the minute volume in L/min that reaches the target by a
// change of rate alone. By a change of breath it overshoots.
func MinuteVolumeFor(minute Flow, a Aim) (Flow, error) {
	if err := a.check(); err != nil {
		return 0, err
	}
	if err := check(given{q: VE, v: float64(minute)}); err != nil {
		return 0, err
	}
	return Flow(rateFor(float64(minute), a.factor())), nil
}

// BreathFor gives the tidal volume in mL that reaches the target at this rate,
// as a bracket: Low with the dead space fixed in mL, High with it a fixed part
// of the breath. The value is the middle.
func BreathFor(b Breathing, a Aim) (Interval, error) {
	if err := a.check(); err != nil {
		return Interval{}, err
	}
	if err := b.check(); err != nil {
		return Interval{}, err
	}
	return breathFor(float64(b.Breath), float64(b.Dead), a.factor()), nil
}

func breathFor(breath, dead, factor float64) Interval {
	fixed, scaled := dead+(breath-dead)*factor, breath*factor
	low, high := min(fixed, scaled), max(fixed, scaled)
	return Interval{Value: (low + high) / 2, Low: low, High: high}
}

// Change is a pattern of breaths that is there and one that is thought of. The
// dead space of Next is not used: it follows from Now.
type Change struct {
	Now, Next Breathing
}

// PaCO2After gives the PaCO2 in mmHg in the steady state after a change of
// breath or rate, as a bracket between a dead space fixed in mL and one that is
// a fixed part of the breath. It is reached 10 to 20 minutes after an increase
// and an hour or more after a decrease.
func PaCO2After(now Pressure, c Change) (Interval, error) {
	c.Next.Dead = c.Now.Dead
	if err := check(given{q: PaCO2, v: now.MmHg()}); err != nil {
		return Interval{}, err
	}
	if err := c.Now.check(); err != nil {
		return Interval{}, err
	}
	if err := c.Next.check(); err != nil {
		return Interval{}, err
	}
	return paco2After(now.MmHg(), c), nil
}

func paco2After(now float64, c Change) Interval {
	scaled := now * float64(c.Now.Breath) * float64(c.Now.Rate) / (float64(c.Next.Breath) * float64(c.Next.Rate))
	fixed := now * float64(c.Now.Breath-c.Now.Dead) * float64(c.Now.Rate) /
		(float64(c.Next.Breath-c.Now.Dead) * float64(c.Next.Rate)) // Rossier 1960: PaCO2 x VA is constant
	low, high := min(scaled, fixed), max(scaled, fixed)
	return Interval{Value: (low + high) / 2, Low: low, High: high}
}
