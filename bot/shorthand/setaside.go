package shorthand

import "galeward/physio"

// The bounds of what one typed unit can mean for a pair of pressures.
const (
	// mostKPa is the PaCO2 in kPa above which it is no kPa: 20 kPa are 150
	// mmHg, beyond all but single cases, common practice.
	mostKPa = 20.0
	// mostForBE is the PaCO2 in mmHg up to which the base excess of the blood
	// and that of the extracellular fluid go together within the check: at a
	// high PCO2 the two part, common practice.
	mostForBE = 80.0
)

// sharedUnit reads a pair that was labelled kPa in mmHg when its PaCO2 can
// only be mmHg: one pair is never of two units. It is said.
func (d *decider) sharedUnit() {
	c, o := d.raw[physio.PaCO2], d.raw[physio.PaO2]
	kpa := c != nil && c.unit == uKPa || o != nil && o.unit == uKPa
	if !kpa || c == nil || c.v <= mostKPa || !physio.PaCO2.Possible(c.v) || o != nil && o.v <= mostKPa {
		return
	}
	c.unit = uMmHg
	if o != nil {
		o.unit = uMmHg
	}
	if d.units != KPa {
		d.note(Note{Code: NoteReadMmHg, Quantity: physio.PaCO2, Typed: c.typed, Value: c.v})
	}
}

// cord says that the blood is of the umbilical cord.
func (d *decider) cord() bool { return d.gas.Sample.Blood == physio.Cord }

// cordPressures keeps the pressures of a cord gas where and as they were typed:
// its PO2 of 8 to 40 mmHg is lower than its PCO2 and than that of any other
// blood, and would be taken for kPa or for the other place, common practice.
func (d *decider) cordPressures() {
	c, o := d.raw[physio.PaCO2], d.raw[physio.PaO2]
	if c == nil || o == nil {
		return
	}
	c.labelled, o.labelled = true, true
	if c.v > mostKPa && c.unit == "" && o.unit == "" {
		c.unit, o.unit = uMmHg, uMmHg
	}
}

// setBaseExcessAside keeps the base excess of a cord gas out of the weighing,
// where it does not tell which reading fits, and gives the function that puts
// it back.
func (d *decider) setBaseExcessAside() func() {
	be := d.raw[physio.BE]
	if be == nil || !d.cord() {
		return func() {}
	}
	delete(d.raw, physio.BE)
	return func() {
		if physio.BE.Possible(be.v) {
			d.gas.Sample.Set(physio.BE, be.v)
		}
	}
}
