package shorthand

import "strconv"

// joinSpoken turns spoken numbers into numbers: "forty", "twenty five",
// "seven point two eight", "point four", "seven twenty eight". A small number
// word alone stays a word unless something beside it wants a number.
func joinSpoken(in []token) []token {
	out := in[:0:len(in)]
	for i := 0; i < len(in); {
		if n, t := spokenAt(in, i); n > 0 {
			out = append(out, t)
			i += n
			continue
		}
		if markPercent(out, &in[i]) {
			i++
			continue
		}
		out = append(out, in[i])
		i++
	}
	return out
}

// markPercent joins the word "percent" to the number before it.
func markPercent(out []token, t *token) bool {
	if !t.is(senseUnit) || t.e.unit != uPercent || len(out) == 0 {
		return false
	}
	last := &out[len(out)-1]
	if last.kind == tokNumber {
		last.percent, last.end = true, t.end
	}
	return last.kind == tokNumber
}

// spokenAt reads a spoken number at in[i] and gives the tokens it takes.
func spokenAt(in []token, i int) (int, token) {
	t := in[i]
	j := i
	whole, n := spokenWhole(in, j)
	j += n
	digits := ""
	if j < len(in) && in[j].word("point") {
		for k := j + 1; k < len(in) && in[k].is(senseNumber); {
			v, m := spokenWhole(in, k)
			digits += strconv.Itoa(v)
			k += m
			j = k
		}
	} else if n == 1 && (whole == 6 || whole == 7) && j < len(in) && in[j].is(senseNumber) {
		v, m := spokenWhole(in, j)
		switch {
		case v >= 10 && v < 100: // "seven twenty eight"
			digits, j = strconv.Itoa(v), j+m
		case v < 10 && j+1 < len(in) && in[j+1].is(senseNumber) && in[j+1].e.number < 10: // "seven two eight"
			digits, j = strconv.Itoa(v)+strconv.Itoa(int(in[j+1].e.number)), j+2
		}
	}
	if j == i || n == 0 && digits == "" || digits == "" && whole <= 12 && !wanted(in, i, j) {
		return 0, t
	}
	t.kind, t.s, t.e, t.end = tokNumber, strconv.Itoa(whole), nil, in[j-1].end
	if digits != "" {
		t.s, t.decimals = t.s+"."+digits, len(digits)
	}
	t.v, _ = strconv.ParseFloat(t.s, 64)
	return j - i, t
}

// spokenWhole reads a spoken whole number below 1000.
func spokenWhole(in []token, i int) (value, n int) {
	for ; i+n < len(in) && in[i+n].is(senseNumber) && n < 4; n++ {
		v := int(in[i+n].e.number)
		switch {
		case v == 100 && value > 0 && value < 10:
			value *= 100
		case n == 0:
			value = v
		case value >= 20 && value < 100 && value%10 == 0 && v > 0 && v < 10, value%100 == 0 && value > 0 && v < 100:
			value += v
		default:
			return value, n
		}
	}
	return value, n
}

// wanted says that the tokens beside a small number word want a number.
func wanted(in []token, from, to int) bool {
	if to < len(in) && (in[to].is(senseUnit) || in[to].is(senseOver)) {
		return true
	}
	if from == 0 {
		return false
	}
	p := &in[from-1]
	return p.is(senseLabel) || p.is(senseOver) || p.is(senseDevice)
}
