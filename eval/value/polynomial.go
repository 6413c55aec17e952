package value

import (
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/algebra/ratpoly"
)

// Polynomial is a polynomial over Q in one letter.
type Polynomial struct {
	P      ratpoly.Poly
	Letter string
}

// Indeterminate is the polynomial that is the letter alone.
func Indeterminate(letter string) Polynomial { return Polynomial{ratpoly.X(), letter} }

func (f Polynomial) Kind() string {
	if f.P.IsIntegral() {
		return "a polynomial with integer coefficients"
	}
	return "a polynomial with rational coefficients"
}

func (f Polynomial) Text(*Printer) string {
	return sumText(f.terms(f.Letter, power, func(q *big.Rat) string { return q.RatString() }))
}

func (f Polynomial) TeX(p *Printer) string {
	return sumTeX(f.terms(LetterTeX(f.Letter), powerTeX, func(q *big.Rat) string { return TeX(p, NewRational(q)) }))
}

func (f Polynomial) terms(letter string, power func(string, int) string, text func(*big.Rat) string) []term {
	var list []term
	c := f.P.Coefficients()
	for i := len(c) - 1; i >= 0; i-- {
		if c[i].Sign() == 0 {
			continue
		}
		size := new(big.Rat).Abs(c[i])
		t := term{negative: c[i].Sign() < 0, coefficient: text(size), power: power(letter, i)}
		if t.power != "" && t.coefficient == "1" {
			t.coefficient = ""
		}
		list = append(list, t)
	}
	return list
}

func (f Polynomial) Canonical() (string, map[string]any) {
	var list []any
	for _, q := range f.P.Coefficients() {
		list = append(list, q.RatString())
	}
	return "polynomial", map[string]any{"over": "Q", "letter": f.Letter, "coefficients": list}
}

func (Polynomial) rank() rank     { return polynomials }
func (f Polynomial) isZero() bool { return f.P.IsZero() }

func (f Polynomial) with(g ratpoly.Poly) Polynomial { return Polynomial{g, f.Letter} }

func (f Polynomial) add(_ *Context, b number) (Value, error) {
	return f.with(f.P.Add(b.(Polynomial).P)), nil
}

func (f Polynomial) sub(_ *Context, b number) (Value, error) {
	return f.with(f.P.Sub(b.(Polynomial).P)), nil
}

func (f Polynomial) mul(c *Context, b number) (Value, error) {
	g := b.(Polynomial).P
	if err := c.CheckDegree(big.NewInt(int64(f.P.Degree()) + int64(g.Degree()))); err != nil {
		return nil, err
	}
	return f.with(f.P.Mul(c.W, g)), nil
}

func (f Polynomial) div(c *Context, b number) (Value, error) {
	g := b.(Polynomial)
	if q, r := f.P.DivRem(c.W, g.P); r.IsZero() {
		return f.with(q), nil
	}
	return newQuotient(c, f.P, g.P, f.Letter), nil
}

func (f Polynomial) neg(*Context) (Value, error) { return f.with(f.P.Neg()), nil }

func (f Polynomial) pow(c *Context, n *big.Int) (Value, error) {
	if n.Sign() < 0 {
		return invertPower(c, f, n)
	}
	if n.Sign() == 0 {
		return constantPolynomial(Int(1), f.Letter), nil
	}
	if f.P.Degree() <= 0 {
		q, err := Operate(c, "^", f.constant(), Integer{n})
		if err != nil {
			return nil, err
		}
		return constantPolynomial(q, f.Letter), nil
	}
	if err := c.CheckDegree(new(big.Int).Mul(n, big.NewInt(int64(f.P.Degree())))); err != nil {
		return nil, err
	}
	if c := f.P.Coefficients(); isMonomial(c) && c[len(c)-1].Cmp(big.NewRat(1, 1)) == 0 {
		return f.with(ratpoly.Monomial(int(n.Int64()) * f.P.Degree())), nil
	}
	return powerBySquaring(c, f, n, func(x, y Polynomial) (Polynomial, error) { return f.with(x.P.Mul(c.W, y.P)), nil })
}

func isMonomial(c []*big.Rat) bool {
	for _, q := range c[:len(c)-1] {
		if q.Sign() != 0 {
			return false
		}
	}
	return true
}

func (f Polynomial) equal(b number) bool { return f.P.Equal(b.(Polynomial).P) }

// constant is the constant term.
func (f Polynomial) constant() Value {
	if f.P.IsZero() {
		return Int(0)
	}
	return NewRational(f.P.Coefficients()[0])
}

func constantPolynomial(v Value, letter string) Polynomial {
	q := new(big.Rat)
	switch v := v.(type) {
	case Integer:
		q.SetInt(v.N)
	case Rational:
		q = v.Q
	}
	return Polynomial{ratpoly.New([]*big.Rat{q}), letter}
}

// Call evaluates the polynomial, or composes it with another.
func (f Polynomial) Call(c *Context, args []Value) (Value, error) {
	if len(args) != 1 {
		return nil, algebra.Errorf(algebra.Invalid, "a polynomial takes one argument, not %d", len(args))
	}
	coefficients := f.P.Coefficients()
	switch x := operand(args[0]).(type) {
	case number:
		if y, ok := x.(Polynomial); ok {
			if err := c.CheckDegree(big.NewInt(int64(max(0, f.P.Degree())) * int64(max(0, y.P.Degree())))); err != nil {
				return nil, err
			}
		}
		return horner(c, f.P.Degree(), func(i int) Value { return NewRational(coefficients[i]) }, x)
	case Matrix, Map:
		return horner(c, f.P.Degree(), func(i int) Value { return NewRational(coefficients[i]) }, x)
	}
	return nil, algebra.Errorf(algebra.Mismatch, "a polynomial is not evaluated at %s", strings.TrimSpace(args[0].Kind()))
}
