package physio

// OxygenSupply is how oxygen is given.
type OxygenSupply struct {
	Device Device
	// Flow is of oxygen, or of the whole gas on high flow, L/min; 0 unknown.
	Flow Flow
	// Stated is the fraction that was set, marked or said; 0 unknown.
	Stated Fraction
	// Minute is the patient's minute volume, 0 unknown; used on high flow.
	Minute     Flow
	Population Population
	// BledIn says that oxygen is bled into a circuit: what is set is not what
	// is breathed.
	BledIn bool
}

// InspiredOxygen gives the inspired fraction of oxygen. A stated one is taken
// as it is, with the measured spread of a Venturi mask or with what is missing
// on a high flow below the inspiratory flow. Without one, cannula and masks
// are estimated for adults as an interval, and estimated is true. What can not
// be estimated is a MissingError of FiO2.
func InspiredOxygen(s OxygenSupply) (fio2 Interval, estimated bool, err error) {
	if s.Stated != 0 {
		if err := check(given{q: FiO2, v: float64(s.Stated)}); err != nil {
			return Interval{}, false, err
		}
		return s.stated(), false, nil
	}
	if err := check(given{q: OxygenFlow, v: float64(s.Flow)}, given{name: "VE", v: float64(s.Minute), low: 0, high: quantities[VE].High}); err != nil {
		return Interval{}, false, err
	}
	return s.estimate()
}

// inspiredOxygen is InspiredOxygen for a sample; flow 0 and stated nil are
// unknown.
func inspiredOxygen(s Sample, stated *float64, flow float64, p Population) (Interval, bool, error) {
	supply := OxygenSupply{
		Device: s.Device, Flow: Flow(flow), Minute: Flow(s.Val(VE)), Population: p, BledIn: s.Circumstance.Has(BledInOxygen),
	}
	if stated != nil {
		supply.Stated = Fraction(*stated)
	}
	return InspiredOxygen(supply)
}

func (s OxygenSupply) stated() Interval {
	f := float64(s.Stated)
	switch s.Device {
	case Venturi:
		return venturiSpread(f)
	case HighFlow:
		return s.highFlow(f)
	}
	return Interval{Value: f, Low: f, High: f}
}

// venturiSpread: masks marked 24 to 40 % deliver within 1.9 % of the mark, one
// marked 60 % delivered 50 % (Lancet 1984, i).
func venturiSpread(mark float64) Interval {
	low, high := 0.019, 0.019
	if mark > 0.40 {
		low = 0.10
	}
	return Interval{Value: mark, Low: min(mark, max(airFraction, mark-low)), High: min(1, mark+high)}
}

const (
	airFraction = 0.21 // of oxygen in air, as used in practice; 0.2093 is true

	// restInspiratoryFlow is the mean inspiratory flow in L/min of a quietly
	// breathing adult, below which high flow leaves room for air: minute volume
	// over the inspired third of the breath, common practice.
	restInspiratoryFlow = 30.0
	inspiredThird       = 3.0
)

// highFlow mixes air in when the flow is below the inspiratory flow of an
// adult. A newborn or child breathes less than these devices give.
func (s OxygenSupply) highFlow(set float64) Interval {
	demand := max(restInspiratoryFlow, inspiredThird*float64(s.Minute))
	if s.Flow == 0 || float64(s.Flow) >= demand || !adultOxygen(s.Population) {
		return Interval{Value: set, Low: set, High: set}
	}
	mixed := diluted(set, float64(s.Flow), demand)
	return Interval{Value: (mixed + set) / 2, Low: min(mixed, set), High: max(mixed, set)}
}

func diluted(set, flow, demand float64) float64 {
	return (flow*set + (demand-flow)*airFraction) / demand // mass balance
}

// adultOxygen says that the estimates of cannula and mask hold: they were made
// on adults.
func adultOxygen(p Population) bool {
	return p == PopulationUnstated || p == Adult || p == Pregnant
}

func (s OxygenSupply) estimate() (Interval, bool, error) {
	if s.BledIn {
		return unknownOxygen(FiO2)
	}
	if s.Device == Air {
		return Interval{Value: airFraction, Low: airFraction, High: airFraction}, false, nil
	}
	if !adultOxygen(s.Population) {
		return unknownOxygen(FiO2)
	}
	switch {
	case s.Device == SimpleMask:
		return span(0.35, 0.60), true, nil // at 5 to 10 L/min, common practice
	case s.Device == ReservoirMask:
		return span(0.60, 0.90), true, nil // at 10 to 15 L/min, common practice
	case s.Device == Cannula, s.Device == DeviceUnstated && s.Flow != 0:
		return s.cannula()
	}
	return unknownOxygen(FiO2)
}

func unknownOxygen(need Quantity) (Interval, bool, error) {
	return Interval{}, false, &MissingError{Need: []Quantity{need}}
}

func span(low, high float64) Interval {
	return Interval{Value: (low + high) / 2, Low: low, High: high}
}

// cannulaMost is the flow in L/min up to which the cannula rule holds.
const cannulaMost = 6.0

func (s OxygenSupply) cannula() (Interval, bool, error) {
	if s.Flow == 0 {
		return unknownOxygen(OxygenFlow)
	}
	if s.Flow > cannulaMost {
		return Interval{}, false, &RangeError{Quantity: OxygenFlow, Got: float64(s.Flow), Low: 0, High: cannulaMost}
	}
	return cannulaFiO2(float64(s.Flow)), true, nil
}

// cannulaFiO2 spreads the rule by 0.02 + 0.015 a litre: that covers the mixing
// of the flow into mean inspiratory flows from 45 down to about 14 L/min, and
// the 0.30 to 0.48 measured at one flow with different patterns of breathing.
func cannulaFiO2(flow float64) Interval {
	mid, half := 0.20+0.04*flow, 0.02+0.015*flow // common practice; the spread is ours
	return Interval{Value: max(airFraction, mid), Low: max(airFraction, mid-half), High: mid + half}
}

// CannulaRule is a rule of thumb for the nasal cannula: Base + PerLitre x flow.
type CannulaRule struct {
	Base, PerLitre Fraction
}

// The rules in use; they are 4 to 8 points apart at 4 to 6 L/min.
var (
	CannulaUsual  = CannulaRule{0.20, 0.04} // common practice; the one InspiredOxygen uses
	CannulaAir    = CannulaRule{0.21, 0.04} // common practice
	CannulaGlobal = CannulaRule{0.21, 0.03} // Frat 2015, from memory
)

// FiO2 gives the fraction at a flow from 0.1 to 6 L/min.
func (r CannulaRule) FiO2(flow Flow) (Fraction, error) {
	err := check(
		given{q: OxygenFlow, v: float64(flow), low: 0.1, high: cannulaMost},
		given{name: "base fraction", v: float64(r.Base), low: 0.2, high: 0.22},
		given{name: "fraction per litre", v: float64(r.PerLitre), low: 0.01, high: 0.06},
	)
	if err != nil {
		return 0, err
	}
	return r.Base + r.PerLitre*Fraction(flow), nil
}

// FiO2FromFlows gives the fraction when oxygen mixes with air in the airway,
// 0.21 + 0.79 x oxygen flow / mean inspiratory flow: why the same cannula gives
// less to a patient who breathes hard.
func FiO2FromFlows(m Mixing) (Fraction, error) {
	err := check(
		given{name: "inspiratory flow", v: float64(m.Inspiratory), low: 1, high: 200},
		given{q: OxygenFlow, v: float64(m.Oxygen), low: 0, high: max(float64(m.Inspiratory), 1)},
	)
	if err != nil {
		return 0, err
	}
	return Fraction(diluted(1, float64(m.Oxygen), float64(m.Inspiratory))), nil // mass balance
}

// Mixing is an oxygen flow entering a mean inspiratory flow.
type Mixing struct {
	Oxygen, Inspiratory Flow
}
