package physio

import "time"

// TimeCourse says when a secondary response sets in, when it is complete, and
// where it ends.
type TimeCourse struct {
	Begins time.Duration // after the disorder
	// FullFrom and FullTo bound the time at which it is complete.
	FullFrom, FullTo time.Duration
	// Responds is PaCO2 (mmHg) or HCO3 (mmol/L), and Limit the range in which
	// its response ends: beyond it there is a second disorder.
	Responds Quantity
	Limit    Span
}

const day = 24 * time.Hour

// timeCourses: breathing answers within minutes and fully in 12 to 24 hours
// (Brandis); the kidney begins after 6 to 12 hours. Its full times and the
// limits are common practice, from memory.
var timeCourses = map[Process]TimeCourse{
	MetabolicAcidosis:    {5 * time.Minute, 12 * time.Hour, day, PaCO2, Span{8, 15}},
	MetabolicAlkalosis:   {5 * time.Minute, 12 * time.Hour, day, PaCO2, Span{55, 60}},
	RespiratoryAcidosis:  {6 * time.Hour, 3 * day, 5 * day, HCO3, Span{45, 45}},
	RespiratoryAlkalosis: {6 * time.Hour, 2 * day, 3 * day, HCO3, Span{12, 15}},
}

// ResponseTime gives the time course of the slow response to a process: the
// breathing's to a metabolic one, the kidney's to a respiratory one. The
// buffering of an acute change of PaCO2 is there within minutes and moves
// bicarbonate to no more than about 30 or less than about 18 mmol/L. It is
// false for a process without a response of its own.
func ResponseTime(p Process) (TimeCourse, bool) {
	tc, ok := timeCourses[p]
	return tc, ok
}
