package value

import (
	"math/big"
	"strings"

	"adjoin/algebra/field"
)

// Element is an element of a finite field.
type Element struct{ E field.Elem }

func (a Element) Kind() string { return "an element of " + orderText(a.E.Field()) }

func (a Element) Text(p *Printer) string { return elementText(p, a.E) }
func (a Element) TeX(p *Printer) string  { return elementTeX(p, a.E) }

// elementText writes an element as a polynomial in the generator of its field,
// whose coefficients are written likewise.
func elementText(p *Printer, e field.Elem) string {
	K := e.Field()
	if K.IsPrime() {
		return e.Code().String()
	}
	return sumText(terms(p, e.Coordinates(), generatorText(K)))
}

func elementTeX(p *Printer, e field.Elem) string {
	K := e.Field()
	if K.IsPrime() {
		return e.Code().String()
	}
	return sumTeX(termsTeX(p, e.Coordinates(), LetterTeX(generatorText(K))))
}

func (a Element) Canonical() (string, map[string]any) {
	return "element", map[string]any{"field": machineField(a.E.Field()), "value": machineCoefficients([]field.Elem{a.E})[0]}
}

// machineCoefficients writes elements of one field as residues, or as lists of
// coordinates from the constant term up.
func machineCoefficients(c []field.Elem) []any {
	list := make([]any, len(c))
	for i, e := range c {
		if e.Field().IsPrime() {
			list[i] = e.Code().String()
		} else {
			list[i] = machineCoefficients(e.Coordinates())
		}
	}
	return list
}

func (Element) rank() rank     { return elements }
func (a Element) isZero() bool { return a.E.IsZero() }

func (a Element) add(_ *Context, b number) (Value, error) {
	return Element{a.E.Add(b.(Element).E)}, nil
}

func (a Element) sub(_ *Context, b number) (Value, error) {
	return Element{a.E.Sub(b.(Element).E)}, nil
}

func (a Element) mul(c *Context, b number) (Value, error) {
	return Element{a.E.Mul(c.W, b.(Element).E)}, nil
}

func (a Element) div(c *Context, b number) (Value, error) {
	e, err := a.E.Div(c.W, b.(Element).E)
	if err != nil {
		return nil, err
	}
	return Element{e}, nil
}

func (a Element) neg(*Context) (Value, error) { return Element{a.E.Neg()}, nil }

func (a Element) pow(c *Context, n *big.Int) (Value, error) {
	if a.E.IsZero() && n.Sign() < 0 {
		return nil, divisionByZero(a)
	}
	e, err := a.E.Pow(c.W, n)
	if err != nil {
		return nil, err
	}
	return Element{e}, nil
}

func (a Element) equal(b number) bool { return a.E.Equal(b.(Element).E) }

// GeneratorText is how the generator of K prints.
func GeneratorText(K *field.Field) string { return generatorText(K) }

// PowerText writes a power of an element.
func PowerText(g Element, n *big.Int) string {
	base := elementText(nil, g.E)
	if strings.Contains(base, " ") || strings.Contains(base, "*") || strings.Contains(base, "^") {
		base = "(" + base + ")"
	}
	switch {
	case n.Sign() == 0:
		return "1"
	case n.IsInt64() && n.Int64() == 1:
		return base
	}
	return base + "^" + n.String()
}
