package value

import (
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// FieldPolynomial is a polynomial over a finite field in one letter.
type FieldPolynomial struct {
	P      field.Polynomial
	Letter string
}

func (f FieldPolynomial) Kind() string { return "a polynomial over " + orderText(f.P.Field()) }

func (f FieldPolynomial) Text(p *Printer) string { return withRing(p, f) }

func (f FieldPolynomial) overText(p *Printer) (bare, ring string) {
	K := f.P.Field()
	bare = sumText(terms(p, f.P.Coefficients(), f.Letter))
	// A coefficient that shows the generator says by itself where it lies.
	if !K.IsPrime() && f.P.Degree() > 0 {
		for _, e := range f.P.Coefficients() {
			if strings.Contains(elementText(p, e), generatorText(K)) {
				return bare, ""
			}
		}
	}
	if f.P.Degree() <= 0 { // else the text would be an element of K
		return bare, operandName(p, K) + "[" + f.Letter + "]"
	}
	return bare, operandName(p, K)
}

func (f FieldPolynomial) TeX(p *Printer) string {
	return sumTeX(termsTeX(p, f.P.Coefficients(), LetterTeX(f.Letter)))
}

func (f FieldPolynomial) Canonical() (string, map[string]any) {
	return "polynomial", map[string]any{
		"over": machineField(f.P.Field()), "letter": f.Letter, "coefficients": machineCoefficients(f.P.Coefficients()),
	}
}

func (FieldPolynomial) rank() rank     { return fieldPolynomials }
func (f FieldPolynomial) isZero() bool { return f.P.IsZero() }

func (f FieldPolynomial) with(g field.Polynomial) FieldPolynomial {
	return FieldPolynomial{g, f.Letter}
}

func (f FieldPolynomial) add(_ *Context, b number) (Value, error) {
	return f.with(f.P.Add(b.(FieldPolynomial).P)), nil
}

func (f FieldPolynomial) sub(_ *Context, b number) (Value, error) {
	return f.with(f.P.Sub(b.(FieldPolynomial).P)), nil
}

func (f FieldPolynomial) mul(c *Context, b number) (Value, error) {
	g := b.(FieldPolynomial).P
	if err := c.CheckDegree(big.NewInt(int64(f.P.Degree()) + int64(g.Degree()))); err != nil {
		return nil, err
	}
	return f.with(f.P.Mul(c.W, g)), nil
}

// div is the exact quotient when there is one, and a rational function
// otherwise.
func (f FieldPolynomial) div(c *Context, b number) (Value, error) {
	g := b.(FieldPolynomial).P
	q, r, err := f.P.DivRem(c.W, g)
	if err != nil {
		return nil, err
	}
	if r.IsZero() {
		return f.with(q), nil
	}
	return newFraction(c, f.P, g, f.Letter)
}

func (f FieldPolynomial) neg(*Context) (Value, error) { return f.with(f.P.Neg()), nil }

func (f FieldPolynomial) pow(c *Context, n *big.Int) (Value, error) {
	switch {
	case n.Sign() < 0:
		return invertPower(c, f, n)
	case n.Sign() == 0:
		return constantOver(f.P.Field().One(), f.Letter), nil
	case f.P.Degree() <= 0:
		e, err := Element{f.constant().E}.pow(c, n)
		if err != nil {
			return nil, err
		}
		return constantOver(e.(Element).E, f.Letter), nil
	}
	if err := c.CheckDegree(new(big.Int).Mul(n, big.NewInt(int64(f.P.Degree())))); err != nil {
		return nil, err
	}
	return powerBySquaring(c, f, n, func(x, y FieldPolynomial) (FieldPolynomial, error) { return f.with(x.P.Mul(c.W, y.P)), nil })
}

func (f FieldPolynomial) equal(b number) bool { return f.P.Equal(b.(FieldPolynomial).P) }

// constant is the constant term.
func (f FieldPolynomial) constant() Element { return Element{f.P.Coefficient(0)} }

func constantOver(e field.Elem, letter string) FieldPolynomial {
	return FieldPolynomial{field.NewPolynomial(e.Field(), []field.Elem{e}), letter}
}

// toFieldPolynomial moves a number into K[letter].
func toFieldPolynomial(c *Context, v Value, K *field.Field, letter string) (FieldPolynomial, error) {
	switch f := operand(v).(type) {
	case FieldPolynomial:
		if f.P.Degree() > 0 {
			letter = f.Letter
		}
		if m, err := embed(c, f.P.Field(), K); err == nil {
			return FieldPolynomial{f.P.Map(c.W, m), letter}, nil
		}
		coefficients := f.P.Coefficients()
		for i, e := range coefficients {
			x, err := ToField(c, Element{e}, K)
			if err != nil {
				return FieldPolynomial{}, err
			}
			coefficients[i] = x.E
		}
		return FieldPolynomial{field.NewPolynomial(K, coefficients), letter}, nil
	case Polynomial:
		if f.P.Degree() > 0 {
			letter = f.Letter
		}
		rational := f.P.Coefficients()
		coefficients := make([]field.Elem, len(rational))
		for i, q := range rational {
			x, err := ToField(c, NewRational(q), K)
			if err != nil {
				return FieldPolynomial{}, err
			}
			coefficients[i] = x.E
		}
		return FieldPolynomial{field.NewPolynomial(K, coefficients), letter}, nil
	case Integer, Rational, Residue, Element:
		x, err := ToField(c, f, K)
		if err != nil {
			return FieldPolynomial{}, err
		}
		return constantOver(x.E, letter), nil
	}
	return FieldPolynomial{}, algebra.Errorf(algebra.Mismatch, "%s does not move into the polynomials over %s", v.Kind(), nameOf(c.Printer(), K))
}

// Call evaluates the polynomial, or composes it with another.
func (f FieldPolynomial) Call(c *Context, args []Value) (Value, error) {
	if len(args) != 1 {
		return nil, algebra.Errorf(algebra.Invalid, "a polynomial takes one argument, not %d", len(args))
	}
	switch x := operand(args[0]).(type) {
	case Element:
		_, h, g, err := common(c, f.P.Field(), x.E.Field())
		if err != nil {
			return nil, err
		}
		return Element{f.P.Map(c.W, h).Eval(c.W, g.Apply(c.W, x.E))}, nil
	case Integer, Rational, Residue:
		e, err := ToField(c, x, f.P.Field())
		if err != nil {
			return nil, err
		}
		return Element{f.P.Eval(c.W, e.E)}, nil
	case number, Matrix:
		return horner(c, f.P.Degree(), func(i int) Value { return Element{f.P.Coefficient(i)} }, x)
	}
	return nil, algebra.Errorf(algebra.Mismatch, "a polynomial is not evaluated at %s", args[0].Kind())
}

// horner evaluates a polynomial of the given degree by the scheme of W. G.
// Horner wherever + and * carry its coefficients.
func horner(c *Context, degree int, coefficient func(i int) Value, x Value) (Value, error) {
	if degree < 0 {
		return Operate(c, "*", Int(0), x)
	}
	unit, err := Operate(c, "^", x, Int(0))
	if err != nil {
		return nil, err
	}
	sum, err := Operate(c, "*", coefficient(degree), unit)
	for i := degree - 1; i >= 0 && err == nil; i-- {
		c.W.Poll()
		if sum, err = Operate(c, "*", sum, x); err != nil {
			break
		}
		var t Value
		if t, err = Operate(c, "*", coefficient(i), unit); err != nil {
			break
		}
		sum, err = Operate(c, "+", sum, t)
	}
	return sum, err
}
