package physio

import (
	"encoding/json"
	"fmt"
)

// Values holds measured, set or said numbers by quantity, in canonical units.
// The zero Values is empty. It is a plain value: assignment copies it.
//
// One table by quantity, rather than a pointer field each, lets the echo, the
// store, the follow-up and the machine form be loops over the same list, so
// that a new quantity is one new row.
type Values struct {
	have uint64
	v    [quantityCount]float64
}

// The set of quantities must fit its bit set.
var _ [64 - quantityCount]struct{}

// Get gives the value of q and whether it is there.
func (vs *Values) Get(q Quantity) (float64, bool) {
	return vs.v[q], vs.have&(1<<q) != 0
}

// Has says that all of qs are there.
func (vs *Values) Has(qs ...Quantity) bool {
	for _, q := range qs {
		if vs.have&(1<<q) == 0 {
			return false
		}
	}
	return true
}

// Val gives the value of q, or 0 when it is absent: only after Has.
func (vs *Values) Val(q Quantity) float64 { return vs.v[q] }

// Set stores a value in the canonical unit of q.
func (vs *Values) Set(q Quantity, v float64) {
	vs.have |= 1 << q
	vs.v[q] = v
}

// Drop removes values.
func (vs *Values) Drop(qs ...Quantity) {
	for _, q := range qs {
		vs.have &^= 1 << q
		vs.v[q] = 0
	}
}

// Empty says that nothing is there.
func (vs *Values) Empty() bool { return vs.have == 0 }

// Each calls f for every value that is there, in echo order.
func (vs *Values) Each(f func(Quantity, float64)) {
	for q := Quantity(0); q < quantityCount; q++ {
		if vs.have&(1<<q) != 0 {
			f(q, vs.v[q])
		}
	}
}

// Merge takes every value of other over.
func (vs *Values) Merge(other *Values) { other.Each(vs.Set) }

// MarshalJSON writes the values under their keys.
func (vs Values) MarshalJSON() ([]byte, error) {
	m := make(map[string]float64)
	vs.Each(func(q Quantity, v float64) { m[q.Key()] = v })
	return json.Marshal(m)
}

// UnmarshalJSON reads values by key; an unknown key is an error, because a
// number that is lost in silence is worse than one that is refused.
func (vs *Values) UnmarshalJSON(b []byte) error {
	var m map[string]float64
	if err := json.Unmarshal(b, &m); err != nil {
		return err
	}
	*vs = Values{}
	for key, v := range m {
		q, ok := QuantityByKey(key)
		if !ok {
			return fmt.Errorf("physio: no quantity is called %q", key)
		}
		vs.Set(q, v)
	}
	return nil
}
