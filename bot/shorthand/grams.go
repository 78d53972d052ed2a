package shorthand

// grams marks which pieces of one, two and three characters a text holds: one
// bit for each, several pieces may share a bit. A piece whose bit is not set
// does not occur.
type grams [gramBits / 64]uint64

const (
	gramWidth = 14
	gramBits  = 1 << gramWidth
	// capital marks that a text holds a capital letter.
	capital = "\x01"
)

// plain is the class of a character: capitals as small letters, any digit as
// a zero, any blank as a space.
func plain(c byte) byte {
	switch {
	case c >= 'A' && c <= 'Z':
		return c + 'a' - 'A'
	case isDigit(c):
		return '0'
	case c == '\t' || c == '\n' || c == '\r' || c == '\f' || c == '\v':
		return ' '
	}
	return c
}

// plainText gives the classes of a text, blanks in a row as one.
func plainText(s string) string {
	out := make([]byte, 0, len(s))
	for i := 0; i < len(s); i++ {
		if c := plain(s[i]); c != ' ' || len(out) == 0 || out[len(out)-1] != ' ' {
			out = append(out, c)
		}
	}
	return string(out)
}

func gram1(a byte) uint16       { return gram(2<<24 | uint32(a)) }
func gram2(a, b byte) uint16    { return gram(1<<24 | uint32(a)<<8 | uint32(b)) }
func gram3(a, b, c byte) uint16 { return gram(uint32(a)<<16 | uint32(b)<<8 | uint32(c)) }

// gramRun is the piece of n digits in a row.
func gramRun(n int) uint16 { return gram(3<<24 | uint32(n)) }

// gram spreads the pieces over the bits by a multiplication (Knuth 1973).
func gram(piece uint32) uint16 { return uint16(piece * 2654435761 >> (32 - gramWidth)) }

func (g *grams) set(i uint16)      { g[i/64] |= 1 << (i % 64) }
func (g *grams) has(i uint16) bool { return g[i/64]&(1<<(i%64)) != 0 }

// read marks the pieces of s.
func (g *grams) read(s string) {
	var a, b byte // the two characters before, 0 for none
	digits := 0
	for i := 0; i < len(s); i++ {
		if s[i] >= 'A' && s[i] <= 'Z' {
			g.set(gram1(capital[0]))
		}
		c := plain(s[i])
		if c == ' ' && b == ' ' {
			continue
		}
		g.set(gram1(c))
		if digits = digitsTo(digits, c); digits > 3 {
			g.set(gramRun(digits))
		}
		if b != 0 {
			g.set(gram2(b, c))
		}
		if a != 0 {
			g.set(gram3(a, b, c))
		}
		a, b = b, c
	}
}

// readMasked marks the pieces that s can hold after any part of it has been
// replaced by the mask of a gas.
func (g *grams) readMasked(s string) {
	g.read(s)
	g.read(gasMask)
	g.set(gram3('s', ' ', 'g')) // one mask behind another
	var b byte
	for i := 0; i < len(s); i++ {
		c := plain(s[i])
		if !wordByte(c) { // a gas begins behind no letter or digit
			g.set(gram2(c, ' '))
			g.set(gram3(c, ' ', 'g'))
			g.set(gram3(b, c, ' '))
		}
		g.set(gram2(' ', c))
		g.set(gram3('s', ' ', c))
		g.set(gram3(' ', b, c))
		b = c
	}
}

// gramsOf lists the pieces that text is made of. A short text lists the
// smaller ones too, since one bit alone may be set by another piece.
func gramsOf(text string) member {
	if len(text) == 1 {
		return member{gram1(text[0])}
	}
	var out member
	digits := 0
	for i := 0; i < len(text); i++ {
		if i > 1 {
			out = append(out, gram3(text[i-2], text[i-1], text[i]))
		}
		if i > 0 && len(text) < 5 {
			out = append(out, gram2(text[i-1], text[i]))
		}
		if digits = digitsTo(digits, text[i]); digits > 3 {
			out = append(out, gramRun(digits))
		}
	}
	return out
}

// digitsTo counts the digits in a row up to c.
func digitsTo(before int, c byte) int {
	if c == '0' {
		return min(before+1, 9)
	}
	return 0
}

// part gives the part at the front of laid out needs, and what is behind it.
func part(needs []uint16) (first, rest []uint16) {
	end := 1 + int(needs[0])
	return needs[1:end], needs[end:]
}

// holdsAll says that each group of the branch has a member that may occur.
func (g *grams) holdsAll(branch []uint16) bool {
	for len(branch) > 0 {
		var group []uint16
		if group, branch = part(branch); !g.holdsOne(group) {
			return false
		}
	}
	return true
}

// holdsOne says that a member of the group may occur. It is the inner loop of
// all sieves, and so cuts no slices.
func (g *grams) holdsOne(group []uint16) bool {
	for i := 0; i < len(group); {
		end := i + 1 + int(group[i])
		for i++; i < end && g.has(group[i]); i++ {
		}
		if i == end {
			return true
		}
		i = end
	}
	return false
}
