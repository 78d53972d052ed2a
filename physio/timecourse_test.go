package physio

import "testing"

// Breathing answers before the kidney does, and each response ends in a limit
// that a patient can have (common practice).
func TestResponsesHaveACourseAndALimit(t *testing.T) {
	for _, p := range []Process{MetabolicAcidosis, MetabolicAlkalosis, RespiratoryAcidosis, RespiratoryAlkalosis} {
		tc, ok := ResponseTime(p)
		if !ok || tc.Begins <= 0 || tc.FullFrom <= tc.Begins || tc.FullTo <= tc.FullFrom {
			t.Errorf("%s: %+v, %v", p, tc, ok)
		}
		if !tc.Responds.Possible(tc.Limit.Low) || !tc.Responds.Possible(tc.Limit.High) || tc.Limit.Low > tc.Limit.High {
			t.Errorf("%s: limit %+v of %s", p, tc.Limit, tc.Responds.Key())
		}
	}
	metabolic, _ := ResponseTime(MetabolicAcidosis)
	respiratory, _ := ResponseTime(RespiratoryAcidosis)
	if metabolic.Begins >= respiratory.Begins || metabolic.Responds != PaCO2 || respiratory.Responds != HCO3 {
		t.Errorf("breathing %+v is not faster than the kidney %+v", metabolic, respiratory)
	}
	if _, ok := ResponseTime(NoProcess); ok {
		t.Error("no process has a response")
	}
}
