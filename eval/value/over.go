package value

import (
	"adjoin/algebra"
)

// Over is X over K: x moved to where it is said to live. A collection moves
// member by member, and a function becomes the map of K that it describes on
// the generator.
func Over(c *Context, x, K Value) (Value, error) {
	switch x := x.(type) {
	case List:
		items, err := overEach(c, x.Items, K)
		return List{Items: items}, err
	case Set:
		items, err := overEach(c, x.Items, K)
		if err != nil {
			return nil, err
		}
		return NewSet(c, items)
	case Tuple:
		items, err := overEach(c, x.Items, K)
		return Tuple{items}, err
	case Factorization:
		v, err := Over(c, x.Of, K)
		return v, err
	case Function:
		if f, ok := K.(Field); ok {
			return mapByImage(c, x, f.K)
		}
	case Matrix:
		if f, ok := K.(Field); ok {
			return x.over(c, f.K)
		}
	case Verdict:
		// x = y over F_2 is read as (x = y) over F_2 by nobody.
		return nil, algebra.Errorf(algebra.Invalid, "true and false do not move into %s", K.Text(nil)).
			WithRemedy("write over behind each side of a relation, in parentheses")
	}
	if !isNumber(x) {
		return nil, algebra.Errorf(algebra.Mismatch, "%s does not move into %s", x.Kind(), K.Text(nil))
	}
	switch K := K.(type) {
	case Field:
		switch operand(x).(type) {
		case Polynomial, FieldPolynomial:
			return toFieldPolynomial(c, x, K.K, "x")
		case RationalFunction, Quotient:
			return toFraction(c, x, K.K, "")
		}
		return ToField(c, x, K.K)
	case Ring:
		return overRingOf(c, x, K)
	case PolynomialRing:
		v, err := Over(c, x, K.Over)
		if err != nil {
			return nil, err
		}
		switch f := v.(type) {
		case Polynomial:
			if f.P.Degree() <= 0 || f.Letter == K.Letter {
				return Polynomial{f.P, K.Letter}, nil
			}
		case FieldPolynomial:
			if f.P.Degree() <= 0 || f.Letter == K.Letter {
				return FieldPolynomial{f.P, K.Letter}, nil
			}
		case Element:
			return constantOver(f.E, K.Letter), nil
		case Integer, Rational:
			return constantPolynomial(f, K.Letter), nil
		}
		return nil, algebra.Errorf(algebra.Mismatch, "%s does not lie in %s", x.Text(nil), K.Text(nil))
	case FunctionField:
		return toFraction(c, x, K.K, K.Letter)
	}
	return nil, algebra.Errorf(algebra.Invalid, "over is followed by a ring or a field, not by %s", K.Kind())
}

func overEach(c *Context, items []Value, K Value) ([]Value, error) {
	moved := make([]Value, len(items))
	for i, v := range items {
		w, err := Over(c, Plain(v), K)
		if err != nil {
			return nil, err
		}
		moved[i] = w
	}
	return moved, nil
}

// overRingOf moves a number into Z, Q or Z/n.
func overRingOf(c *Context, x Value, R Ring) (Value, error) {
	switch v := operand(x).(type) {
	case Integer, Rational, Residue:
		if R.Modulus != nil {
			return toResidue(c, v, R.Modulus)
		}
		if _, ok := v.(Residue); ok {
			break
		}
		if _, ok := v.(Rational); ok && R.Name == "Z" {
			break
		}
		return v, nil
	case Quotient:
		if R.Name == "Q" {
			return v, nil
		}
	case Polynomial:
		if R.Name == "Q" || R.Name == "Z" && v.P.IsIntegral() {
			return v, nil
		}
	}
	return nil, algebra.Errorf(algebra.Mismatch, "%s does not move into %s", x.Kind(), R.Text(nil))
}
