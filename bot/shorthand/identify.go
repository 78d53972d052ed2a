package shorthand

import "strings"

// The identifiers that a typed line can hold, after the list of 45 CFR
// 164.514(b)(2). They are looked for in the folded text, upper case kept. The
// rules ask for context, since a line of gas values is full of numbers.
var (
	// strongID are labels that are followed by an identifier, whatever it is.
	strongID = sift(`(?i)\b(mrn|urn|m\.r\.n\.?|u\.r\.n\.?|nhi|chi no|nhs( ?(no|number|num))?|ssn|social security( number| no)?|social|hosp(ital)?\.? ?(no|num|number|id)|hosp ?#|medical record( number| no)?|med ?rec( ?(no|num|number))?|record ?(no|num|number)|unit ?(no|number)|patient ?(id|no|num|number)|pat ?(id|nr|no)|pt ?(id|no|num|number|#)|patienten ?(nr|nummer|id)|fallnummer|fall ?nr|dob|d\.o\.b\.?|date of birth|birth ?date|geb\.?|geboren|medicare( ?(no|number))?|medicaid( ?(no|number))?|cpf|dni|nir|bsn|passport( ?(no|number))?|ohip|phn|hcn|health ?card( ?(no|number))?|ihi|insurance ?(no|id|number))[\s.:#=]*(is|was|no\.?|number|num)?[\s.:#=]*[a-z]{0,4}[-\s]?\d`)
	// weakID are words that also stand in ordinary lines: four digits are
	// asked for, or a number sign.
	weakID     = sift(`(?i)\b(acct|account|acc|accession|fin|csn|enc|encounter|visit|policy|member(ship)?|subscriber|plan|licen[cs]e|plate|serial|sn|device ?id|claim|id|i\.d\.|ident|case ?(no|number)|order ?(no|number)|req(uisition)?|specimen|sample ?(id|no|number)|lab ?(no|number|id)|barcode|wristband|label|ref(erence)?|admission ?(no|number)|episode|chart|file|hsp|har|cid|uhid|hn|ip ?no|cr ?no)\b[\s.:=]*(no\.?|num|number|nr|#|is)?[\s.:#=]*([a-z]{1,4}[-\s]?)?\d[\d-]{4,}|(?i)\b(id|acct|account|fin|csn)\b[\s.:#=]*\d{4}\b`)
	numberSign = sift(`(?i)\b(acct|account|accession|fin|csn|encounter|visit|policy|member|licen[cs]e|plate|serial|id|chart|case|episode|hsp|har) ?(#|no\.? ?|number:? ?)\s*[a-z]{0,3}-?\d{3,}`)
	email      = sift(`(?i)[a-z0-9._%+-]+\s?@\s?[a-z0-9-]+(\.[a-z0-9-]+)*\.[a-z]{2,}\b`)
	longDigits = sift(`\d{6,}`)
	phone      = sift(`(^|[^\d./])(\+\d{1,3}[ .-]?)?(\(\d{2,4}\)[ .-]?\d{3,4}[ -]\d{3,4}|\d{3,4}-\d{3,4}-\d{3,4})([^\d./%]|$)|\(\d{3}\) ?\d{3}-?\d{4}|\+\d[\d -]{7,}\d|\b\d{3}\.\d{3}\.\d{4}\b|\b0\d{2,4}[ -]\d{5,}|\b\d{5}[ -]\d{5,6}\b`)
	phoneWord  = sift(`(?i)\b(phone|tel|telephone|mobile|cell|fax|pager|beeper|callback|call back|ring|handy)\b[\s.:#]*(no\.?|number|is|at|on)?[\s.:#]*\+?\(?\d{3,}[\d -]*`)
	socialNo   = sift(`\b\d{3}-\d{2}-\d{4}\b`)
	ninePair   = sift(`\b\d{3}[ -]\d{3}[ -]\d{4}\b|\b\d{3}-\d{3}-\d{3}\b`)
	yearDate   = sift(`\b\d{1,2}[./-]\d{1,2}[./-](19|20)\d\d\b|\b(19|20)\d\d[./-]\d{1,2}[./-]\d{1,2}\b`)
	monthDate  = sift(`(?i)\b\d{1,2}(st|nd|rd|th)?[ -]?(of )?` + months + `\.?[ ,-]*(19|20)\d\d\b|\b` + months + `\.? ?\d{1,2}(st|nd|rd|th)?[ ,]+(19|20)\d\d\b`)
	bornWord   = sift(`(?i)\b(born|birthday|bday|b-day)( (on|in))?[\s:]+(\d|` + months + `)|\b(dob|d\.o\.b|geb)\b`)
	title      = sift(`(^|[^A-Za-z])(?:(?:(?i:mr|mrs|mister|missus|monsieur|madame|senora|herr|frau)|Ms|MS|Miss|MISS|Mx|Dr|DR|Prof|Sr|Sra|Mme|Mlle)\.? +)([A-Za-z][A-Za-z'-]+)`)
	namedAs    = sift(`(?i)\b(?:pt|patient|pat|name|named|surname|last ?name|first ?name|re|nom|nombre|for pt|for patient|pt name)\b *(?::|=| is | name | named )\s*([A-Za-z][a-z'-]+)((?:,? +[A-Za-z][a-z'-]+)?)`)
	lastFirst  = sift(`\b([A-Z][a-z'-]{1,}|[A-Z]{3,}), ?([A-Z][a-z'-]{1,}|[A-Z]{3,}|[A-Z]\b)`)
	twoNames   = sift(`\b([A-Z][a-z'-]{1,}|[A-Z]\.?) ([A-Z][a-z'-]{2,})[ ,:;-]+`)
	initials   = sift(`(?i:\b(?:room|rm|bed|bay|rm#|initials?)) *#?:? *[0-9]{0,4}[a-z]? *[,:-]? *([A-Z]\.? ?[A-Z]\.?)(?:[^A-Za-z0-9.+]|$)`)
	dotted     = sift(`(?:^|[\s(])([A-Z]\.\s?[A-Z]\.)(?:[\s,):]|$)`)
	localPhone = sift(`(?i)\b(call|reach|contact|text|me at|number)\b\D{0,14}\d{3}-\d{4}\b`)
	bedName    = sift(`(?i:\b(?:room|rm|bed|bay|b)) *#?[0-9]{1,4}[a-z]?[ ,:(-]+([A-Z][a-z'-]{2,})[ ,:)-]+(?:(?i:ph|abg|gas)|[67][.,]?\d)`)
	ptName     = sift(`\b(?i:pt|patient|baby|bb|infant of|mother of|baby of) ([A-Z][a-z'-]{2,})\b`)
	street     = sift(`(?i)\b\d{1,5} (?:[a-z]+ ){1,3}(street|st|avenue|ave|road|rd|lane|ln|drive|dr|boulevard|blvd|court|crescent|way|strasse)\b`)
	zipCode    = sift(`(?i)\b(zip|post ?code|postal code|plz)[\s:]*[a-z0-9]{3,}`)
	ipAddress  = sift(`\b(\d{2,3})\.\d{1,3}\.\d{1,3}\.\d{1,3}\b`)
	picture    = sift(`(?i)\b[\w-]+\.(jpe?g|png|heic|heif|gif|bmp|tiff?|webp|pdf|dcm)\b|\b(img|dsc|pxl|scan|screenshot)[_-]\d{2,}|\b(pic|pics|photo|picture|image|screenshot|screen shot|snap|snapshot|scan|screen grab|foto) (of|from) (the |a |my |this |his |her |our |that )?(print|gas|abg|vbg|result|slip|screen|report|strip|monitor|vent|analy|chart|paper|label|wrist|numbers|values|ticket|patient|pt)|\b(read|see|here is|heres|attached|attaching|sending) (the |a |my |this |attached )?(pic|photo|picture|image|screenshot|attachment|attached)\b`)
)

const months = `(jan|feb|mar|apr|may|jun|jul|aug|sept?|oct|nov|dec|january|february|march|april|june|july|august|september|october|november|december|mai|okt|dez)`

// identifiers are the rules that need no further look at the words.
var identifiers = []*sieve{strongID, weakID, numberSign, email, longDigits, phone, phoneWord,
	socialNo, localPhone, ninePair, yearDate, monthDate, bornWord, street, zipCode, ipAddress}

// identified says what in the text is not processed at all.
func identified(s string) Refused {
	var g, gm grams
	gm.readMasked(s)
	masked := ""
	for _, r := range identifiers {
		if !r.may(&gm) {
			continue
		}
		if masked == "" {
			masked = maskGas(s)
		}
		if r.compiled().MatchString(masked) {
			return RefusedIdentifier
		}
	}
	g.read(s)
	if named(s, &g) {
		return RefusedIdentifier
	}
	if picture.in(s, &g) {
		return RefusedPicture
	}
	return RefusedNone
}

// gasChain is a run of gas values, which no rule on digits may trip over.
var gasChain = lazily(`\b[67][.,]\d{1,3}(\s?[/|\\;:,.-]\s?[<>+-]?\d{1,3}([.,]\d{1,2})?\b){1,7}|\b\d{3,4} ?(-|to) ?\d{3,4} ?(?i:ml|m|ft|feet)\b`)

// gasMask stands in for a run of gas values.
const gasMask = " gas "

func maskGas(s string) string { return gasChain().ReplaceAllString(s, gasMask) }

// named looks for names: behind a title, behind "patient:", as "Last, First",
// behind a bed label, as initials behind a room.
func named(s string, g *grams) bool {
	for _, m := range title.all(s, g) {
		if !known(m[2]) {
			return true
		}
	}
	for _, m := range namedAs.all(s, g) {
		second := strings.Trim(m[2], ", ")
		if !known(m[1]) && (second != "" && !known(second) || second == "" && m[1][0] <= 'Z') {
			return true
		}
	}
	for _, m := range lastFirst.all(s, g) {
		if !known(m[1]) && !known(m[2]) {
			return true
		}
	}
	for _, r := range []*sieve{bedName, ptName, initials, dotted} {
		for _, m := range r.all(s, g) {
			if !known(m[1]) {
				return true
			}
		}
	}
	return beforeGas(s, g)
}

// beforeGas says that two capitalised words that are no trade words stand
// together in a line that holds a gas: a first and a last name.
func beforeGas(s string, g *grams) bool {
	for _, m := range twoNames.all(s, g) {
		if !known(m[1]) && !known(m[2]) {
			return gasChain().MatchString(s)
		}
	}
	return false
}

// known says that the vocabulary knows the word, alone or as the start of a
// phrase, so that it is not a name.
func known(word string) bool {
	w := strings.ToLower(strings.Trim(word, ". ,'-"))
	w = strings.ReplaceAll(w, ". ", "")
	w = strings.ReplaceAll(w, ".", "")
	w = strings.ReplaceAll(w, "'", "")
	if w == "" || look(w) != nil || phraseLength[w] > 0 {
		return true
	}
	for _, end := range []string{"s", "d", "ed", "ing", "ly"} {
		if base, ok := strings.CutSuffix(w, end); ok && (look(base) != nil || look(base+"e") != nil) {
			return true
		}
	}
	return false
}
