package eval

import (
	"math/big"

	"adjoin/eval/value"
	"adjoin/lang"
)

// modulo is the residue of an expression modulo m. Sums, products and powers
// are reduced as they grow, so that x^(2^100) mod f is never multiplied out.
func (c *cell) modulo(x lang.Expr, m value.Value) (value.Value, error) {
	v, err := c.moduloNode(x, m)
	if err != nil {
		return nil, at(x.Span(), err)
	}
	return v, nil
}

func (c *cell) moduloNode(x lang.Expr, m value.Value) (value.Value, error) {
	switch x := x.(type) {
	case *lang.Paren:
		return c.modulo(x.X, m)
	case *lang.Binary:
		switch x.Op {
		case "+", "-", "*":
			a, err := c.modulo(x.X, m)
			if err != nil {
				return nil, err
			}
			b, err := c.modulo(x.Y, m)
			if err != nil {
				return nil, err
			}
			return c.reduced(x.Op, a, b, m)
		case "^":
			exponent, err := c.plain(x.Y)
			if err != nil {
				return nil, err
			}
			if n, ok := exponent.(value.Integer); ok && n.N.Sign() > 0 {
				return c.powerModulo(x.X, n.N, m)
			}
		}
	}
	v, err := c.plain(x)
	if err != nil {
		return nil, err
	}
	return value.Remainder(c.ctx, v, m)
}

// powerModulo squares and multiplies.
func (c *cell) powerModulo(x lang.Expr, n *big.Int, m value.Value) (value.Value, error) {
	base, err := c.modulo(x, m)
	if err != nil {
		return nil, err
	}
	power := base
	for i := n.BitLen() - 2; i >= 0; i-- {
		c.ctx.W.Poll()
		if power, err = c.reduced("*", power, power, m); err != nil {
			return nil, err
		}
		if n.Bit(i) == 1 {
			if power, err = c.reduced("*", power, base, m); err != nil {
				return nil, err
			}
		}
	}
	return power, nil
}

func (c *cell) reduced(op string, a, b, m value.Value) (value.Value, error) {
	v, err := value.Operate(c.ctx, op, a, b)
	if err != nil {
		return nil, err
	}
	return value.Remainder(c.ctx, v, m)
}
