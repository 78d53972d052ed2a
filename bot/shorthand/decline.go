package shorthand

import "galeward/physio"

// declines are the requests that are not answered, by the words they come in.
var declines = []struct {
	what  Refused
	words *sieve
}{
	{DeclinedOverride, sift(`\b(ignore|disregard|forget|override|bypass|drop) (all |any |about )?(your|the|previous|prior|all|those|these|above)( previous| prior)? ?(rules|instructions?|guidelines|prompts?|safety|restrictions|limits)|\b(jailbreak|system prompt|developer mode|pretend (to be|you are|youre|you're)|act as (a|an|my)|you are now (a|an|my)|roleplay|new instructions?:|just say (intubate|extubate)|no more rules)\b`)},
	{DeclinedDose, sift(`\b(how much|how many|what dose|which dose|dose of|dosing|what rate of|dosage)\b.{0,40}\b(bicarb|bicarbonate|nahco3|amp|amps|meq|propofol|fentanyl|ketamine|roc|rocuronium|sux|morphine|midazolam|lasix|furosemide|narcan|naloxone|acetazolamide|diamox|epi|adrenaline|albuterol|salbutamol|mag|magnesium|insulin|fluid|fluids|levo|norepi|steroid|solumedrol|thiamine|sedation|mg|mcg|ml/hr|units|potassium|kcl|surfactant|caffeine|tris|tham)\b|\b(bicarb|bicarbonate|drug|propofol|fentanyl|ketamine|rocuronium|narcan|naloxone|acetazolamide|diamox|lasix|insulin|magnesium|surfactant|caffeine|morphine|sedation|sedative|albuterol|salbutamol) (dose|dosing|drip rate|infusion|bolus)\b|\bdose\b.{0,20}\?|\b(give|push|start) (\w+ ){0,2}(bicarb|bicarbonate|amps?|narcan|lasix|bolus)\b.*\?|\b(amps?|meqs?) of bicarb\b`)},
	{DeclinedDiagnosis, sift(`\bdiagnos(e|is|es|ing|tic)\b|\bddx\b|\bdx\?|\bdifferential\b|\bwhats? (is )?(wrong|the matter) with\b|\bwhat (does|do) (he|she|they|pt|the pt|the patient|this patient|patient) have\b|\bis (it|this|that) (a )?(pe|dka|sepsis|pneumonia|chf|pna|asthma|copd|covid|embolism|an mi|ards)\b\s*\??|\bwhat disease\b|\bwhat (condition|illness) \b|\bwhat(s| is) causing\b|\bwhy is (he|she|the pt|pt|the patient|patient) (so |)(acidotic|hypoxic|hypercapnic|sick|alkalotic)\b`)},
	{DeclinedPrognosis, sift(`\bprognos|\b(will|is|are|gonna|going to) (he|she|they|pt|the pt|the patient|patient|this patient)?\s*(going to |gonna )?(die|survive|make it|live|code|pull through)\b|\b(is|are|isnt|looks?|looking|might be|maybe) (he|she|they|pt|the pt|the patient|patient|this patient|like)?\s*(like )?(he is |hes |she is |shes |theyre )?(dying|a goner|moribund|palliative|for palliation|salvageable|hopeless|going to die|end of life|not going to make it)\b|\b(he|she|they|pt|patient)s? (is |are )?(dying|going to die|gonna die)\b|\bsurviv(al|e)\b|\bmortality\b|\bchances?\b.{0,30}\b(surviv|dying|die|living|make it|death)|\bhow long (does|do|has|have|will) (he|she|they|pt|the patient) (have|got|live)\b|\bterminal\b|\bfutile\b`)},
	{DeclinedOrder, sift(`\b(should|shall|do|can|could|must|would|when (do|can|should)) (i|we|you|they|he|she|rt|you guys) (\w+ ){0,2}(intubate|extubate|tube|increase|decrease|go up|go down|raise|lower|drop|bump|change|wean|start|stop|give|put|switch|turn|prone|paralyse|paralyze|sedate|cancel|escalate|transfer|trach|bag|bipap|adjust|set|do|call|cannulate|titrate|move|dc|discharge|pull)\b|\b(tell|give|advise) (me|us) (\w+ ){0,3}(vent )?(what|which|orders?|settings|changes)\b|\bwhat (vent )?(changes|settings|setting|orders?) (to|should|do|would|can|shall|are|for)\b|\bwhat (should|do|would|shall|can) (i|we|you) (do|set|change|adjust|give|recommend|suggest|order|try|order)\b|\b(orders?|recommend(ation)?s?|advice|suggest(ion)?s?)\b.{0,15}(please|pls|\?)|\b(write|put in|enter|place) (an |the |some )?orders?\b|\b(give|need|want|get) (me |us |some |vent |new )*orders\b|\bwhat to do\b|\bwhat now\?|\bready to (extubate|wean|come off|be extubated)\b.*\?|\b(ok|okay|safe|fine|good) to (extubate|wean|intubate|fly|transfer|discharge|send|pull|sbt|come off)\b|\bextubate\?|\bintubate\?|\btube (him|her|them)\b|\bneeds? (a tube|tubed|intubat\w+|intubation)\s*\?|\bhow (do|should|would|can) (i|we) (fix|treat|correct|manage|ventilate|wean)\b`)},
}

// declined lists the requests in the text that are not answered.
func declined(s string, g *grams) []Refused {
	if len(s) > 2000 {
		s = s[:2000]
	}
	var out []Refused
	for _, d := range declines {
		if d.words.in(s, g) {
			out = append(out, d.what)
		}
	}
	return out
}

// declines says that the message makes a request that is not answered.
func (p *parser) declines(what Refused) bool {
	for _, d := range p.line.Declined {
		if d == what {
			return true
		}
	}
	return false
}

// predictsPressure says that a change of an airway pressure is asked to be
// turned into an oxygenation: no formula does that.
func predictsPressure(change *physio.Values, s string) bool {
	pressures := false
	for _, q := range []physio.Quantity{physio.PEEP, physio.IPAP, physio.EPAP, physio.CPAP, physio.PS, physio.PC, physio.PIP, physio.Pmean, physio.PHigh} {
		pressures = pressures || change.Has(q)
	}
	return pressures && asksOxygen.compiled().MatchString(s)
}

var asksOxygen = sift(`\b(what|how|whats|which|does|will|would|effect|predict)\b.{0,40}\b(po2|pao2|o2|sat|sats|spo2|oxygen\w*|p/f|co2|pco2)\b|\b(po2|pao2|o2|sat|sats|spo2|p/f)\s*\?`)
