package value

import (
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/algebra/ratpoly"
)

// Quotient is a fraction of polynomials over Q that is not a polynomial,
// reduced and with a monic denominator.
type Quotient struct {
	Num, Den ratpoly.Poly
	Letter   string
}

func newQuotient(c *Context, num, den ratpoly.Poly, letter string) Value {
	if g := num.GCD(c.W, den); g.Degree() > 0 {
		num, _ = num.DivRem(c.W, g)
		den, _ = den.DivRem(c.W, g)
	}
	lead := den.Coefficients()[den.Degree()]
	unit := ratpoly.New([]*big.Rat{new(big.Rat).Inv(lead)})
	num, den = num.Mul(c.W, unit), den.Mul(c.W, unit)
	if den.Degree() == 0 {
		return Polynomial{num, letter}
	}
	return Quotient{num, den, letter}
}

func (Quotient) Kind() string { return "a rational function over Q" }

func (u Quotient) Text(p *Printer) string {
	num, den := Polynomial{u.Num, u.Letter}.Text(p), Polynomial{u.Den, u.Letter}.Text(p)
	if strings.Contains(num, " ") {
		num = "(" + num + ")"
	}
	if strings.ContainsAny(den, " *") {
		den = "(" + den + ")"
	}
	return num + "/" + den
}

func (u Quotient) TeX(p *Printer) string {
	return `\frac{` + Polynomial{u.Num, u.Letter}.TeX(p) + `}{` + Polynomial{u.Den, u.Letter}.TeX(p) + `}`
}

func (u Quotient) Canonical() (string, map[string]any) {
	return "rational function", map[string]any{
		"over": "Q", "letter": u.Letter, "numerator": machinePart(Polynomial{u.Num, u.Letter}), "denominator": machinePart(Polynomial{u.Den, u.Letter}),
	}
}

func (Quotient) rank() rank     { return quotients }
func (u Quotient) isZero() bool { return u.Num.IsZero() }

func (u Quotient) add(c *Context, b number) (Value, error) {
	v := b.(Quotient)
	return newQuotient(c, u.Num.Mul(c.W, v.Den).Add(v.Num.Mul(c.W, u.Den)), u.Den.Mul(c.W, v.Den), u.Letter), nil
}

func (u Quotient) sub(c *Context, b number) (Value, error) {
	v := b.(Quotient)
	return u.add(c, Quotient{v.Num.Neg(), v.Den, v.Letter})
}

func (u Quotient) mul(c *Context, b number) (Value, error) {
	v := b.(Quotient)
	if err := c.CheckDegree(big.NewInt(int64(u.height() + v.height()))); err != nil {
		return nil, err
	}
	return newQuotient(c, u.Num.Mul(c.W, v.Num), u.Den.Mul(c.W, v.Den), u.Letter), nil
}

func (u Quotient) div(c *Context, b number) (Value, error) {
	v := b.(Quotient)
	return newQuotient(c, u.Num.Mul(c.W, v.Den), u.Den.Mul(c.W, v.Num), u.Letter), nil
}

func (u Quotient) neg(*Context) (Value, error) { return Quotient{u.Num.Neg(), u.Den, u.Letter}, nil }

func (u Quotient) height() int { return max(u.Num.Degree(), u.Den.Degree(), 0) }

func (u Quotient) pow(c *Context, n *big.Int) (Value, error) {
	if n.Sign() < 0 {
		return invertPower(c, u, n)
	}
	num, err := Polynomial{u.Num, u.Letter}.pow(c, n)
	if err != nil {
		return nil, err
	}
	den, err := Polynomial{u.Den, u.Letter}.pow(c, n)
	if err != nil {
		return nil, err
	}
	return newQuotient(c, num.(Polynomial).P, den.(Polynomial).P, u.Letter), nil
}

func (u Quotient) equal(b number) bool {
	v := b.(Quotient)
	return u.Num.Equal(v.Num) && u.Den.Equal(v.Den)
}

// Derivative is the formal derivative.
func (u Quotient) Derivative(c *Context) Value {
	num := u.Num.Derivative().Mul(c.W, u.Den).Sub(u.Num.Mul(c.W, u.Den.Derivative()))
	return newQuotient(c, num, u.Den.Mul(c.W, u.Den), u.Letter)
}

// Call evaluates the function where its denominator is not zero.
func (u Quotient) Call(c *Context, args []Value) (Value, error) {
	num, err := Polynomial{u.Num, u.Letter}.Call(c, args)
	if err != nil {
		return nil, err
	}
	den, err := Polynomial{u.Den, u.Letter}.Call(c, args)
	if err != nil {
		return nil, err
	}
	if d, ok := den.(number); ok && d.isZero() {
		return nil, algebra.Errorf(algebra.Undefined, "%s has a pole at %s", u.Text(nil), args[0].Text(nil))
	}
	return Divide(c, num, den)
}

func intoQuotients(_ *Context, a Value, b number) (number, error) {
	u := b.(Quotient)
	one := ratpoly.New([]*big.Rat{big.NewRat(1, 1)})
	if f, ok := a.(Polynomial); ok {
		letter, err := commonLetter(f.Letter, f.P.Degree(), u.Letter, u.height())
		return Quotient{f.P, one, letter}, err
	}
	return Quotient{constantPolynomial(a, u.Letter).P, one, u.Letter}, nil
}

func sameQuotientLetter(_ *Context, a, b number) (number, number, error) {
	u, v := a.(Quotient), b.(Quotient)
	letter, err := commonLetter(u.Letter, u.height(), v.Letter, v.height())
	if err != nil {
		return nil, nil, err
	}
	return Quotient{u.Num, u.Den, letter}, Quotient{v.Num, v.Den, letter}, nil
}

// quotientOverField moves a fraction over Q, and what it meets over a finite
// field, to the rational functions over that field.
func quotientOverField(c *Context, a, b number) (number, number, error) {
	q, other := a, b
	_, first := a.(Quotient)
	if !first {
		q, other = b, a
	}
	x, err := toFraction(c, q, numberField(other), "")
	if err != nil {
		return nil, nil, err
	}
	y, err := toFraction(c, other, numberField(other), x.Letter)
	if err != nil {
		return nil, nil, err
	}
	if first {
		return x, y, nil
	}
	return y, x, nil
}
