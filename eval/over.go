package eval

import (
	"adjoin/eval/value"
	"adjoin/lang"
)

// over is X over K. Into a finite field the parts of sums, products and powers
// of integers and of polynomials over Z move first, since the way from Z[x] to
// K[x] respects all three: (x + 1)^1000000 over F_2 is squared over F_2, and
// never has the coefficients it would have over Z.
func (c *cell) over(x *lang.Over) (value.Value, error) {
	K, err := c.plain(x.K)
	if err != nil {
		return nil, err
	}
	if _, ok := K.(value.Field); ok && hasPower(x.X) {
		if v, ok, err := c.moved(x.X, K); ok || err != nil {
			return v, err
		}
	}
	v, err := c.plain(x.X)
	if err != nil {
		return nil, err
	}
	return value.Over(c.ctx, v, K)
}

// hasPower says whether a power stands among sums and products.
func hasPower(x lang.Expr) bool {
	switch x := x.(type) {
	case *lang.Paren:
		return hasPower(x.X)
	case *lang.Unary:
		return hasPower(x.X)
	case *lang.Binary:
		return x.Op == "^" || hasPower(x.X) || hasPower(x.Y)
	}
	return false
}

// moved is x over K, built from parts over K. It is not ok where x has other
// parts than those over speaks of.
func (c *cell) moved(x lang.Expr, K value.Value) (v value.Value, ok bool, err error) {
	v, ok, err = c.movedNode(x, K)
	if err != nil {
		err = at(x.Span(), err)
	}
	return v, ok, err
}

func (c *cell) movedNode(x lang.Expr, K value.Value) (value.Value, bool, error) {
	switch x := x.(type) {
	case *lang.Paren:
		return c.moved(x.X, K)
	case *lang.Unary:
		v, ok, err := c.moved(x.X, K)
		if err != nil || !ok || x.Op == "+" {
			return v, ok, err
		}
		v, err = value.Negate(c.ctx, v)
		return v, true, err
	case *lang.Binary:
		if x.Op == "/" {
			return nil, false, nil
		}
		a, ok, err := c.moved(x.X, K)
		if err != nil || !ok {
			return nil, false, err
		}
		var b value.Value
		if x.Op != "^" {
			if b, ok, err = c.moved(x.Y, K); err != nil || !ok {
				return nil, false, err
			}
		} else {
			if b, err = c.plain(x.Y); err != nil {
				return nil, false, err
			}
			if n, ok := b.(value.Integer); !ok || n.N.Sign() < 0 {
				return nil, false, nil
			}
		}
		v, err := value.Operate(c.ctx, x.Op, a, b)
		return v, true, err
	case *lang.Int, *lang.Name:
		v, err := c.plain(x)
		if err != nil {
			return nil, false, err
		}
		switch v.(type) {
		case value.Integer, value.Polynomial:
			v, err = value.Over(c.ctx, v, K)
			return v, true, err
		}
	}
	return nil, false, nil
}
