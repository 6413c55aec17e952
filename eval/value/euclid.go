package value

import "adjoin/algebra"

// Bezout is (d, u, v) with d = u a + v b, the greatest common divisor of two
// integers or polynomials (Euclid, Elements, book VII; extended as in D. E.
// Knuth, The Art of Computer Programming, volume 2, 1997, algorithm 4.5.2X).
func Bezout(c *Context, a, b Value) (Value, error) {
	x, y, err := commonMultiplicands(c, a, b)
	if err != nil {
		return nil, err
	}
	if !is[Integer](x) && !isPolynomial(x) {
		return nil, algebra.Errorf(algebra.Mismatch, "a greatest common divisor is of integers or polynomials, not of %s", x.Kind())
	}
	one, err := Operate(c, "^", x, Int(0))
	if err != nil {
		return nil, err
	}
	zero, err := Operate(c, "-", one, one)
	if err != nil {
		return nil, err
	}
	// Each row (r, u, v) has r = u a + v b.
	row, next := [3]Value{x, one, zero}, [3]Value{y, zero, one}
	for !next[0].(number).isZero() {
		c.W.Poll()
		q, _, err := QuotientRemainder(c, next[0], row[0])
		if err != nil {
			return nil, err
		}
		var after [3]Value
		for i := range after {
			t, err := Operate(c, "*", q, next[i])
			if err != nil {
				return nil, err
			}
			if after[i], err = Operate(c, "-", row[i], t); err != nil {
				return nil, err
			}
		}
		row, next = next, after
	}
	if row[0].(number).isZero() {
		return Tuple{row[:]}, nil
	}
	normal, err := Normal(c, row[0])
	if err != nil {
		return nil, err
	}
	unit, err := Divide(c, normal, row[0])
	if err != nil {
		return nil, err
	}
	for i := range row {
		if row[i], err = Operate(c, "*", unit, row[i]); err != nil {
			return nil, err
		}
	}
	return Tuple{row[:]}, nil
}
