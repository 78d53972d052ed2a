package shorthand

import (
	"galeward/physio"
)

// flowOrFiO2 reads the bare number beside a mask or cannula: litres for those
// that are set in litres, per cent for those that are set in per cent.
func (r *reader) flowOrFiO2(i int, d physio.Device, nums []int) {
	j := -1
	if d == physio.Venturi {
		nums = r.valveBefore(i, nums)
	}
	if len(nums) > 0 {
		j = nums[0]
	} else if i > 0 && r.t[i-1].free() && r.t[i-1].line == r.t[i].line && !r.joined(i-1) && (i < 2 || r.t[i-2].kind != tokNumber || r.t[i].glued || d == physio.Venturi && r.valveSize(i-1)) {
		j = i - 1
	}
	if j < 0 || r.t[j].percent || r.t[j].sign != 0 || r.joinedAhead(j) || r.gasStart(j) {
		return
	}
	if u, _ := r.unitAfter(j); u != "" {
		return
	}
	v := r.t[j].v
	byPercent := d == physio.Venturi || d == physio.TracheostomyMask || d == physio.TPiece || d == physio.FaceTent || d == physio.Hood
	switch {
	case d == physio.PulseDose:
		r.take(j, 0)
	case byPercent && (v >= 21 && v <= 100 || v >= 0.21 && v <= 1 && r.t[j].decimals > 0):
		r.take(j, 0)
		r.sayFiO2(j, formOf(physio.FiO2, &r.t[j], "", true))
	case !byPercent && v > 0 && v <= 20 && d != physio.BagMask && d != physio.Chamber:
		r.take(j, 0)
		r.oxygen = append(r.oxygen, saying{at: j, flow: v, hasFlow: true})
	}
}

// highFlow reads what follows a high-flow word: 50 L 60 %, or a bare pair in
// which each number may be the flow.
func (r *reader) highFlow(nums []int) {
	var bare []int
	for _, n := range nums {
		if u, _ := r.unitAfter(n); u == "" && !r.t[n].percent && r.t[n].sign == 0 {
			bare = append(bare, n)
		}
	}
	if len(bare) == 0 || len(nums) > 0 && bare[0] != nums[0] && len(bare) > 1 {
		return
	}
	if len(bare) == 1 {
		r.highFlowOne(bare[0], len(nums) > 1)
		return
	}
	r.highFlowPair(bare[0], bare[1])
}

const mostHighFlow = 70.0 // L/min: adult devices end at 60 to 70, common practice

func canFlow(v float64) bool { return v >= 1 && v <= mostHighFlow }

func canFiO2(t *token) bool {
	return t.v >= 21 && t.v <= 100 && t.decimals == 0 || t.v >= 0.21 && t.v <= 1 && t.decimals > 0
}

// highFlowOne reads one bare number beside high flow.
func (r *reader) highFlowOne(n int, paired bool) {
	t := &r.t[n]
	switch {
	case paired && r.unitOfOther(n) == uPercent && canFlow(t.v):
		r.take(n, 0)
		r.oxygen = append(r.oxygen, saying{at: n, flow: t.v, hasFlow: true})
	case paired && canFiO2(t):
		r.take(n, 0)
		r.sayFiO2(n, formOf(physio.FiO2, t, "", true))
	case canFlow(t.v) && canFiO2(t) && t.decimals == 0:
		r.take(n, 0)
		r.askHighFlow(n, []Choice{withWord(choose(physio.OxygenFlow, t.v), number(t.v)+" L/min"), choose(physio.FiO2, t.v/100)})
	case canFiO2(t):
		r.take(n, 0)
		r.sayFiO2(n, formOf(physio.FiO2, t, "", true))
	case canFlow(t.v):
		r.take(n, 0)
		r.oxygen = append(r.oxygen, saying{at: n, flow: t.v, hasFlow: true})
	}
}

// unitOfOther is the unit of the number beside n.
func (r *reader) unitOfOther(n int) string {
	for _, j := range []int{n + 2, n + 1, n - 1, n - 2, n - 3} {
		if j >= 0 && j < len(r.t) && r.t[j].kind == tokNumber {
			if u, _ := r.unitAfter(j); u != "" {
				return u
			}
		}
	}
	return ""
}

func (r *reader) askHighFlow(n int, choices []Choice) {
	r.ask(Question{Code: AskFlowOrFiO2, Quantity: physio.FiO2, Typed: r.t[n].typed(), Choices: choices})
}

// highFlowPair reads a/b: said when one reading is possible, else asked.
func (r *reader) highFlowPair(n, m int) {
	a, b := &r.t[n], &r.t[m]
	first := canFlow(a.v) && canFiO2(b)
	second := canFiO2(a) && canFlow(b.v) && a.v != b.v && b.v >= 10 && b.decimals == 0
	switch {
	case first && second:
		r.take(n, 0)
		r.take(m, 0)
		one, two := choose(physio.OxygenFlow, a.v), choose(physio.OxygenFlow, b.v)
		one.Set.Set(physio.FiO2, b.v/100)
		two.Set.Set(physio.FiO2, a.v/100)
		one.Word, two.Word = flowAtFiO2(a.v, b.v), flowAtFiO2(b.v, a.v)
		r.askHighFlow(n, []Choice{one, two})
		return
	case second:
		n, m, a, b = m, n, b, a
	case !first:
		return
	}
	r.take(n, 0)
	r.take(m, 0)
	r.oxygen = append(r.oxygen, saying{at: n, flow: a.v, hasFlow: true})
	f := formOf(physio.FiO2, b, "", true)
	r.sayFiO2(m, f)
	r.note(NoteHighFlowPair, physio.OxygenFlow, a.typed(), a.v)
}
