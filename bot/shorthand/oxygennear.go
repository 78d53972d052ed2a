package shorthand

import (
	"strings"

	"galeward/physio"
)

// besideOxygen says that oxygen, and not blood, is bled in at the word at i:
// the word itself says so, or a flow or an oxygen word stands within three
// tokens. Common practice.
func (r *reader) besideOxygen(i int) bool {
	for j := max(0, i-3); j <= i+3 && j < len(r.t); j++ {
		t := &r.t[j]
		u := ""
		if t.kind == tokNumber {
			u, _ = r.unitAfter(j)
		}
		if u == uLitre || u == uLPM || t.kind == tokWord && (strings.Contains(t.s, "o2") && t.e.notCO2() || strings.Contains(t.s, "oxygen")) {
			return true
		}
	}
	return false
}

// notCO2 says that a word with "o2" in it is no label of a value.
func (e *entry) notCO2() bool {
	return e == nil || e.sense != senseLabel || e.q == physio.PaO2
}

// valveSize says that the number at i, behind a whole gas, is the
// percentage of a Venturi valve: they are made in these sizes, common practice.
func (r *reader) valveSize(i int) bool {
	switch r.t[i].v {
	case 24, 26, 28, 31, 35, 40, 50, 60:
		return r.t[i].decimals == 0 && (r.joined(i-1) || r.fifthNumber(i))
	}
	return false
}

// flowAtFiO2 words a whole setting of high flow.
func flowAtFiO2(flow, percent float64) string {
	return number(flow) + " L/min at " + number(percent) + " %"
}

// fifthNumber says that four numbers of a gas that blanks part stand before
// the one at i.
func (r *reader) fifthNumber(i int) bool {
	if i < 4 {
		return false
	}
	for j := i - 4; j < i; j++ {
		if !r.t[j].free() {
			return false
		}
	}
	return r.gasStart(i - 4)
}

// valveBefore leaves out the litres behind a Venturi mask whose percentage
// stands in front: "28 venturi 4L".
func (r *reader) valveBefore(i int, nums []int) []int {
	if len(nums) == 0 || i == 0 || !r.t[i-1].free() || r.t[i-1].v < 21 || r.joined(i-1) {
		return nums
	}
	if u, _ := r.unitAfter(nums[0]); u == uLitre || u == uLPM {
		return nil
	}
	return nums
}
