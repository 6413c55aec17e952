package field

import (
	"strconv"
	"strings"
)

// String writes the element as a polynomial in the generator, highest power
// first; the generator of a field without a letter is written g. It is meant
// for messages.
func (a Elem) String() string {
	if a.k == nil {
		return "no element"
	}
	if a.k.base == nil {
		return a.Code().String()
	}
	name := a.k.name
	if name == "" {
		name = "g"
	}
	return sum(a.Coordinates(), name)
}

// String writes the polynomial in x, highest power first. It is meant for
// messages.
func (f Polynomial) String() string { return sum(f.Coefficients(), "x") }

func sum(c []Elem, letter string) string {
	var b strings.Builder
	for i := len(c) - 1; i >= 0; i-- {
		if c[i].IsZero() {
			continue
		}
		if b.Len() > 0 {
			b.WriteString(" + ")
		}
		s := c[i].String()
		if strings.Contains(s, " ") {
			s = "(" + s + ")"
		}
		switch {
		case i == 0:
			b.WriteString(s)
			continue
		case !c[i].IsOne():
			b.WriteString(s + "*")
		}
		b.WriteString(letter)
		if i > 1 {
			b.WriteString("^" + strconv.Itoa(i))
		}
	}
	if b.Len() == 0 {
		return "0"
	}
	return b.String()
}
