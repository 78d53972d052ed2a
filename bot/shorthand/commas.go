package shorthand

import (
	"strconv"
	"strings"

	"galeward/physio"
)

// commas settles what each comma between digits is: a decimal comma becomes a
// point, a separator becomes a slash or stays. mixed says that one chain used
// commas for both and was cut in the one way that fits.
func commas(s string) (out string, mixed bool) {
	if !strings.Contains(s, ",") {
		return s, false
	}
	var b strings.Builder
	for i := 0; i < len(s); {
		if !isDigit(s[i]) || i > 0 && (isDigit(s[i-1]) || s[i-1] == '.') {
			b.WriteByte(s[i])
			i++
			continue
		}
		end := chainEnd(s, i)
		text, both := settle(s[i:end])
		mixed = mixed || both
		b.WriteString(text)
		i = end
	}
	return b.String(), mixed
}

// chainEnd gives the end of a run of digits, points and commas between digits.
func chainEnd(s string, i int) int {
	for i < len(s) {
		joins := (s[i] == ',' || s[i] == '.') && i+1 < len(s) && isDigit(s[i+1])
		if !isDigit(s[i]) && !joins {
			break
		}
		i++
	}
	return i
}

// settle reads one chain of digit groups.
func settle(chain string) (text string, mixed bool) {
	groups := strings.Split(chain, ",")
	if len(groups) == 1 {
		return chain, false
	}
	if strings.Contains(chain, ".") {
		return strings.Join(groups, "/"), false
	}
	if len(groups) == 2 {
		if len(groups[1]) == 3 && len(groups[0]) < 4 && groups[0] != "0" && groups[0] != "7" && groups[0] != "6" {
			return groups[0] + groups[1], false // thousands: 1,600 m
		}
		return groups[0] + "." + groups[1], false
	}
	if (groups[0] == "7" || groups[0] == "6") && len(groups[1]) >= 1 && len(groups) <= 12 {
		if cut := bestCut(groups); cut != nil {
			return strings.Join(cut, "/"), len(cut) < len(groups)-1
		}
	}
	if (len(groups[0]) == 3 || len(groups[0]) == 2 && groups[0][0] == '7') && len(groups) >= 3 {
		return strings.Join(groups, "/"), false
	}
	return chain, false // a list: 3,5,7,9,11
}

// bestCut cuts the groups of a chain that starts with a pH into the values of
// a gas, each of one or two groups, so that the values fit best. It gives nil
// when no cut makes a gas.
func bestCut(groups []string) []string {
	var best []string
	bestDoubt := impossible
	var cut func(rest, values []string)
	cut = func(rest, values []string) {
		if len(rest) == 0 {
			if d := cutDoubt(values); d < bestDoubt {
				best, bestDoubt = append([]string(nil), values...), d
			}
			return
		}
		if len(values) >= 6 {
			return
		}
		cut(rest[1:], append(values[:len(values):len(values)], rest[0]))
		if len(rest) > 1 && len(rest[0]) < 3 && len(rest[1]) < 3 {
			cut(rest[2:], append(values[:len(values):len(values)], rest[0]+"."+rest[1]))
		}
	}
	cut(groups[2:], []string{groups[0] + "." + groups[1]})
	return best
}

// cutDoubt scores a cut by the same measure as any reading of a gas.
func cutDoubt(values []string) float64 {
	if len(values) < 3 {
		return impossible
	}
	v := make([]float64, len(values))
	for i := range values {
		v[i], _ = strconv.ParseFloat(values[i], 64)
	}
	doubt := impossible
	for _, scale := range []float64{1, physio.KPa(1).MmHg()} {
		var f physio.Values
		f.Set(physio.PHq, v[0])
		f.Set(physio.PaCO2, v[1]*scale)
		f.Set(physio.PaO2, v[2]*scale)
		if len(v) > 3 {
			f.Set(physio.HCO3, v[3])
		}
		doubt = min(doubt, doubtOf(&f, surroundings{}))
	}
	if len(v) > 4 && (v[4] > 100 || v[4] < 40) {
		return impossible
	}
	for _, s := range values[1:] { // a joined pair costs, the more the odder it looks
		if _, fraction, ok := strings.Cut(s, "."); ok {
			doubt += 0.2 + 1.5*float64(len(fraction)-1)
		}
	}
	return doubt
}
