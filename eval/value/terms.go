package value

import (
	"fmt"
	"strings"

	"adjoin/algebra/field"
)

// term is one summand: a coefficient as text, empty for 1, and a power of the
// letter, empty for the constant term. The sign stands apart.
type term struct {
	negative    bool
	coefficient string
	power       string
}

// terms lists the summands of a polynomial with the given coefficients,
// constant term first in c, highest power first in the result.
func terms(p *Printer, c []field.Elem, letter string) []term {
	return collect(c, letter, func(e field.Elem) string { return elementText(p, e) }, power)
}

func termsTeX(p *Printer, c []field.Elem, letter string) []term {
	return collect(c, letter, func(e field.Elem) string { return elementTeX(p, e) }, powerTeX)
}

func collect(c []field.Elem, letter string, text func(field.Elem) string, power func(string, int) string) []term {
	var list []term
	for i := len(c) - 1; i >= 0; i-- {
		if c[i].IsZero() {
			continue
		}
		t := term{coefficient: text(c[i]), power: power(letter, i)}
		if t.power != "" {
			switch {
			case t.coefficient == "1":
				t.coefficient = ""
			case strings.Contains(t.coefficient, " + "):
				t.coefficient = "(" + t.coefficient + ")"
			}
		}
		list = append(list, t)
	}
	return list
}

func power(letter string, n int) string {
	switch n {
	case 0:
		return ""
	case 1:
		return letter
	}
	return letter + "^" + fmt.Sprint(n)
}

func powerTeX(letter string, n int) string {
	switch n {
	case 0:
		return ""
	case 1:
		return letter
	}
	if strings.ContainsAny(letter, "'^") {
		letter = "{" + letter + "}"
	}
	return fmt.Sprintf("%s^{%d}", letter, n)
}

func sumText(list []term) string { return sum(list, "*") }
func sumTeX(list []term) string  { return sum(list, `\,`) }

func sum(list []term, times string) string {
	if len(list) == 0 {
		return "0"
	}
	var b strings.Builder
	for i, t := range list {
		switch {
		case i > 0 && t.negative:
			b.WriteString(" - ")
		case i > 0:
			b.WriteString(" + ")
		case t.negative:
			b.WriteString("-")
		}
		b.WriteString(t.coefficient)
		if t.coefficient != "" && t.power != "" {
			b.WriteString(times)
		}
		b.WriteString(t.power)
	}
	return b.String()
}
