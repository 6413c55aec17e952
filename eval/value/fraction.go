package value

import (
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/funcfield"
)

// RationalFunction is a reduced fraction of polynomials over a finite field.
type RationalFunction struct {
	F      funcfield.Fraction
	Letter string
}

func (u RationalFunction) Kind() string {
	return "a rational function over " + orderText(u.F.Numerator().Field())
}

func (u RationalFunction) Text(p *Printer) string { return withRing(p, u) }

func (u RationalFunction) overText(p *Printer) (bare, ring string) {
	K := u.F.Numerator().Field()
	num := sumText(terms(p, u.F.Numerator().Coefficients(), u.Letter))
	den := sumText(terms(p, u.F.Denominator().Coefficients(), u.Letter))
	bare = num
	if den != "1" {
		if strings.Contains(num, " ") {
			num = "(" + num + ")"
		}
		if strings.ContainsAny(den, " *") {
			den = "(" + den + ")"
		}
		bare = num + "/" + den
	}
	return bare, operandName(p, K) + "(" + u.Letter + ")"
}

func (u RationalFunction) TeX(p *Printer) string {
	num := sumTeX(termsTeX(p, u.F.Numerator().Coefficients(), LetterTeX(u.Letter)))
	den := sumTeX(termsTeX(p, u.F.Denominator().Coefficients(), LetterTeX(u.Letter)))
	if den == "1" {
		return num
	}
	return `\frac{` + num + `}{` + den + `}`
}

func (u RationalFunction) Canonical() (string, map[string]any) {
	return "rational function", map[string]any{
		"over": machineField(u.F.Numerator().Field()), "letter": u.Letter,
		"numerator":   machineCoefficients(u.F.Numerator().Coefficients()),
		"denominator": machineCoefficients(u.F.Denominator().Coefficients()),
	}
}

func (RationalFunction) rank() rank     { return functions }
func (u RationalFunction) isZero() bool { return u.F.Numerator().IsZero() }

func (u RationalFunction) with(f funcfield.Fraction) RationalFunction {
	return RationalFunction{f, u.Letter}
}

func (u RationalFunction) add(c *Context, b number) (Value, error) {
	return u.with(u.F.Add(c.W, b.(RationalFunction).F)), nil
}

func (u RationalFunction) sub(c *Context, b number) (Value, error) {
	return u.with(u.F.Sub(c.W, b.(RationalFunction).F)), nil
}

func (u RationalFunction) mul(c *Context, b number) (Value, error) {
	v := b.(RationalFunction)
	if err := c.CheckDegree(big.NewInt(int64(u.height() + v.height()))); err != nil {
		return nil, err
	}
	return u.with(u.F.Mul(c.W, v.F)), nil
}

func (u RationalFunction) div(c *Context, b number) (Value, error) {
	f, err := u.F.Div(c.W, b.(RationalFunction).F)
	if err != nil {
		return nil, err
	}
	return u.with(f), nil
}

func (u RationalFunction) neg(c *Context) (Value, error) { return u.with(u.F.Neg()), nil }

// height is the larger of the two degrees.
func (u RationalFunction) height() int {
	return max(u.F.Numerator().Degree(), u.F.Denominator().Degree(), 0)
}

func (u RationalFunction) pow(c *Context, n *big.Int) (Value, error) {
	if u.isZero() && n.Sign() < 0 {
		return nil, divisionByZero(u)
	}
	if err := c.CheckDegree(new(big.Int).Mul(new(big.Int).Abs(n), big.NewInt(int64(u.height())))); err != nil {
		return nil, err
	}
	f, err := u.F.Pow(c.W, n)
	if err != nil {
		return nil, err
	}
	return u.with(f), nil
}

func (u RationalFunction) equal(b number) bool { return u.F.Equal(b.(RationalFunction).F) }

func newFraction(c *Context, num, den field.Polynomial, letter string) (Value, error) {
	f, err := funcfield.New(c.W, num, den)
	if err != nil {
		return nil, err
	}
	return RationalFunction{f, letter}, nil
}

// toFraction moves a number into K(letter); an empty letter keeps its own.
func toFraction(c *Context, v Value, K *field.Field, letter string) (RationalFunction, error) {
	if u, ok := operand(v).(RationalFunction); ok {
		if letter == "" {
			letter = u.Letter
		}
		if u.Letter != letter && u.height() > 0 {
			return u, algebra.Errorf(algebra.Mismatch, "%s is a rational function in %s, not in %s", u.Text(nil), u.Letter, letter)
		}
		num, err := toFieldPolynomial(c, FieldPolynomial{u.F.Numerator(), u.Letter}, K, letter)
		if err != nil {
			return u, err
		}
		den, err := toFieldPolynomial(c, FieldPolynomial{u.F.Denominator(), u.Letter}, K, letter)
		if err != nil {
			return u, err
		}
		f, err := funcfield.New(c.W, num.P, den.P)
		return RationalFunction{f, letter}, err
	}
	if u, ok := operand(v).(Quotient); ok {
		return quotientToFraction(c, u, K, letter)
	}
	g, err := toFieldPolynomial(c, v, K, letter)
	if err != nil {
		return RationalFunction{}, err
	}
	if letter != "" && g.Letter != letter && g.P.Degree() > 0 {
		return RationalFunction{}, algebra.Errorf(algebra.Mismatch, "%s is a polynomial in %s, not in %s", g.Text(nil), g.Letter, letter)
	}
	f, err := funcfield.New(c.W, g.P, field.NewPolynomial(K, []field.Elem{K.One()}))
	return RationalFunction{f, g.Letter}, err
}

func quotientToFraction(c *Context, u Quotient, K *field.Field, letter string) (RationalFunction, error) {
	num, err := toFraction(c, Polynomial{u.Num, u.Letter}, K, letter)
	if err != nil {
		return num, err
	}
	den, err := toFraction(c, Polynomial{u.Den, u.Letter}, K, letter)
	if err != nil {
		return den, err
	}
	if den.isZero() {
		return den, algebra.Errorf(algebra.Undefined, "the denominator of %s is zero over %s", u.Text(nil), nameOf(c.Printer(), K))
	}
	f, err := num.F.Div(c.W, den.F)
	return RationalFunction{f, u.Letter}, err
}

func intoFunctions(c *Context, a Value, b number) (number, error) {
	u := b.(RationalFunction)
	return toFraction(c, a, u.F.Numerator().Field(), u.Letter)
}

func extendConstants(c *Context, a, b number) (number, number, error) {
	u := b.(RationalFunction)
	M, _, _, err := common(c, a.(Element).E.Field(), u.F.Numerator().Field())
	if err != nil {
		return nil, nil, err
	}
	x, err := toFraction(c, a, M, u.Letter)
	if err != nil {
		return nil, nil, err
	}
	y, err := toFraction(c, b, M, u.Letter)
	return x, y, err
}

func commonFunctions(c *Context, a, b number) (number, number, error) {
	u, v := a.(RationalFunction), b.(RationalFunction)
	letter, err := commonLetter(u.Letter, u.height(), v.Letter, v.height())
	if err != nil {
		return nil, nil, err
	}
	M, _, _, err := common(c, u.F.Numerator().Field(), v.F.Numerator().Field())
	if err != nil {
		return nil, nil, err
	}
	x, err := toFraction(c, u, M, letter)
	if err != nil {
		return nil, nil, err
	}
	y, err := toFraction(c, v, M, letter)
	return x, y, err
}

// Call evaluates the function where its denominator is not zero.
func (u RationalFunction) Call(c *Context, args []Value) (Value, error) {
	num, err := FieldPolynomial{u.F.Numerator(), u.Letter}.Call(c, args)
	if err != nil {
		return nil, err
	}
	den, err := FieldPolynomial{u.F.Denominator(), u.Letter}.Call(c, args)
	if err != nil {
		return nil, err
	}
	if d, ok := den.(number); ok && d.isZero() {
		return nil, algebra.Errorf(algebra.Undefined, "%s has a pole at %s", u.Text(nil), args[0].Text(nil))
	}
	return Divide(c, num, den)
}
