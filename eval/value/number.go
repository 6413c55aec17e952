package value

import (
	"math/big"

	"adjoin/algebra"
)

// Integer is an element of Z.
type Integer struct{ N *big.Int }

// Rational is an element of Q. Results that are integers are made Integers by
// NewRational, so that 4/2 and 2 are the same value.
type Rational struct{ Q *big.Rat }

// Int makes an Integer of a machine integer.
func Int(n int) Integer { return Integer{big.NewInt(int64(n))} }

// NewRational is the Integer or Rational equal to q.
func NewRational(q *big.Rat) Value {
	if q.IsInt() {
		return Integer{new(big.Int).Set(q.Num())}
	}
	return Rational{q}
}

func (Integer) Kind() string  { return "an integer" }
func (Rational) Kind() string { return "a rational number" }

func (a Integer) Text(*Printer) string  { return a.N.String() }
func (a Rational) Text(*Printer) string { return a.Q.RatString() }

func (a Integer) TeX(*Printer) string { return a.N.String() }
func (a Rational) TeX(*Printer) string {
	sign, num := "", a.Q.Num()
	if num.Sign() < 0 {
		sign, num = "-", new(big.Int).Neg(num)
	}
	return sign + `\frac{` + num.String() + `}{` + a.Q.Denom().String() + `}`
}

func (a Integer) Canonical() (string, map[string]any) {
	return "integer", map[string]any{"value": a.N.String()}
}

func (a Rational) Canonical() (string, map[string]any) {
	return "rational", map[string]any{"numerator": a.Q.Num().String(), "denominator": a.Q.Denom().String()}
}

func (Integer) rank() rank  { return integers }
func (Rational) rank() rank { return rationals }

func (a Integer) isZero() bool  { return a.N.Sign() == 0 }
func (a Rational) isZero() bool { return a.Q.Sign() == 0 }

func (a Integer) add(_ *Context, b number) (Value, error) {
	return Integer{new(big.Int).Add(a.N, b.(Integer).N)}, nil
}

func (a Integer) sub(_ *Context, b number) (Value, error) {
	return Integer{new(big.Int).Sub(a.N, b.(Integer).N)}, nil
}

func (a Integer) mul(c *Context, b number) (Value, error) {
	y := b.(Integer).N
	if err := c.CheckBits(float64(a.N.BitLen()) + float64(y.BitLen()) - 1); err != nil {
		return nil, err
	}
	return Integer{new(big.Int).Mul(a.N, y)}, nil
}

func (a Integer) div(_ *Context, b number) (Value, error) {
	return NewRational(new(big.Rat).SetFrac(a.N, b.(Integer).N)), nil
}

func (a Integer) neg(*Context) (Value, error) { return Integer{new(big.Int).Neg(a.N)}, nil }

func (a Integer) pow(c *Context, n *big.Int) (Value, error) {
	if n.Sign() < 0 {
		return invertPower(c, a, n)
	}
	if a.N.BitLen() <= 1 { // -1, 0, 1
		switch {
		case n.Sign() == 0 || a.N.Sign() < 0 && n.Bit(0) == 0:
			return Int(1), nil
		}
		return a, nil
	}
	if err := checkPower(c, a.N, n); err != nil {
		return nil, err
	}
	return Integer{new(big.Int).Exp(a.N, n, nil)}, nil
}

func (a Integer) equal(b number) bool { return a.N.Cmp(b.(Integer).N) == 0 }

func (a Rational) add(_ *Context, b number) (Value, error) {
	return NewRational(new(big.Rat).Add(a.Q, b.(Rational).Q)), nil
}

func (a Rational) sub(_ *Context, b number) (Value, error) {
	return NewRational(new(big.Rat).Sub(a.Q, b.(Rational).Q)), nil
}

func (a Rational) mul(c *Context, b number) (Value, error) {
	y := b.(Rational).Q
	if err := c.CheckBits(float64(a.Q.Num().BitLen()) + float64(y.Num().BitLen())); err != nil {
		return nil, err
	}
	if err := c.CheckBits(float64(a.Q.Denom().BitLen()) + float64(y.Denom().BitLen())); err != nil {
		return nil, err
	}
	return NewRational(new(big.Rat).Mul(a.Q, y)), nil
}

func (a Rational) div(_ *Context, b number) (Value, error) {
	return NewRational(new(big.Rat).Quo(a.Q, b.(Rational).Q)), nil
}

func (a Rational) neg(*Context) (Value, error) { return Rational{new(big.Rat).Neg(a.Q)}, nil }

func (a Rational) pow(c *Context, n *big.Int) (Value, error) {
	if n.Sign() < 0 {
		return invertPower(c, a, n)
	}
	for _, part := range []*big.Int{a.Q.Num(), a.Q.Denom()} {
		if part.BitLen() > 1 {
			if err := checkPower(c, part, n); err != nil {
				return nil, err
			}
		}
	}
	return NewRational(new(big.Rat).SetFrac(new(big.Int).Exp(a.Q.Num(), n, nil), new(big.Int).Exp(a.Q.Denom(), n, nil))), nil
}

func (a Rational) equal(b number) bool { return a.Q.Cmp(b.(Rational).Q) == 0 }

func checkPower(c *Context, a, n *big.Int) error {
	exponent, _ := new(big.Float).SetInt(n).Float64()
	return c.CheckBits(float64(a.BitLen()-1) * exponent)
}

// invertPower is a^n for negative n.
func invertPower(c *Context, a number, n *big.Int) (Value, error) {
	if a.isZero() {
		return nil, divisionByZero(a)
	}
	p, err := a.pow(c, new(big.Int).Neg(n))
	if err != nil {
		return nil, err
	}
	return Divide(c, Int(1), p)
}

func divisionByZero(a Value) error {
	where := ""
	switch v := a.(type) {
	case Element:
		where = " in " + orderText(v.E.Field())
	case Residue:
		where = " in Z/" + v.M.String()
	}
	return algebra.Errorf(algebra.Undefined, "division by zero%s", where)
}
