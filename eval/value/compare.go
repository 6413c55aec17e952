package value

import (
	"math/big"

	"adjoin/algebra"
)

// Relate decides a relation: = != < <= > >= in, not in, divides, does not
// divide; with a modulus, = and != are congruences. A relation between things
// that mathematics does not compare is an error.
func Relate(c *Context, op string, a, b, modulus Value) (algebra.Verdict, error) {
	a, b = Plain(a), Plain(b)
	if modulus != nil && op != "=" && op != "!=" {
		return algebra.Verdict{}, algebra.Errorf(algebra.Invalid, "mod closes a congruence a = b mod n, not a relation with %s", op)
	}
	switch op {
	case "=":
		if modulus != nil {
			return congruent(c, a, b, modulus)
		}
		return Equal(c, a, b)
	case "!=":
		v, err := Relate(c, "=", a, b, modulus)
		return Not(v), err
	case "in":
		return contains(c, a, b)
	case "not in":
		v, err := contains(c, a, b)
		return Not(v), err
	case "divides":
		return divides(c, a, b)
	case "does not divide":
		v, err := divides(c, a, b)
		return Not(v), err
	case "<=":
		return atMost(c, a, b)
	case ">=":
		return atMost(c, b, a)
	case "<", ">":
		if op == ">" {
			a, b = b, a
		}
		v, err := atMost(c, a, b)
		if err != nil || !v.Holds {
			return v, err
		}
		same, err := Equal(c, a, b)
		if err != nil {
			return same, err
		}
		if same.Holds {
			return algebra.Because(false, "they are equal"), nil
		}
		return v, nil
	}
	return algebra.Verdict{}, algebra.Errorf(algebra.Invalid, "there is no relation %s", op)
}

// IsPlainRelation says whether the relation only compares what both sides say,
// so that its evidence goes without saying: numbers, texts, lists.
func IsPlainRelation(op string, a Value) bool {
	switch op {
	case "=", "!=", "<", "<=", ">", ">=":
		switch a := operand(a).(type) {
		case Text, Collection:
			return true
		default:
			return isNumber(a)
		}
	}
	return false
}

func notComparable(op string, a, b Value) error {
	if op == "in" {
		return algebra.Errorf(algebra.Mismatch, "whether %s lies in %s is not a question of mathematics", a.Kind(), b.Kind())
	}
	return algebra.Errorf(algebra.Mismatch, "%s and %s are not compared by %s", a.Kind(), b.Kind(), op)
}

// Equal decides a = b.
func Equal(c *Context, a, b Value) (algebra.Verdict, error) {
	a, b = Plain(a), Plain(b)
	if f, ok := a.(Factorization); ok && !is[Factorization](b) {
		a = f.Of
	} else if f, ok := b.(Factorization); ok && !is[Factorization](a) {
		b = f.Of
	}
	if isNumber(a) && isNumber(b) {
		return equalNumbers(c, a.(number), b.(number))
	}
	switch x := a.(type) {
	case Text:
		if y, ok := b.(Text); ok {
			return algebra.Because(x.S == y.S, "the texts were compared letter by letter"), nil
		}
	case Verdict:
		if y, ok := b.(Verdict); ok {
			return algebra.Verdict{Holds: x.Holds == y.Holds, Evidence: both(x.Evidence, y.Evidence)}, nil
		}
	case Set:
		if y, ok := b.(Set); ok {
			return equalSets(c, x, y)
		}
	case Matrix:
		if y, ok := b.(Matrix); ok {
			return equalMatrices(c, x, y)
		}
	case Field:
		if y, ok := b.(Field); ok {
			return equalFields(c, x, y)
		}
	case Ring:
		if y, ok := b.(Ring); ok {
			same := x.Name == y.Name && (x.Modulus == nil) == (y.Modulus == nil) && (x.Modulus == nil || x.Modulus.Cmp(y.Modulus) == 0)
			return algebra.Because(same, "both were compared as rings by definition"), nil
		}
	case PolynomialRing:
		if y, ok := b.(PolynomialRing); ok {
			v, err := Equal(c, x.Over, y.Over)
			if err == nil && v.Holds && x.Letter != y.Letter {
				v = algebra.Because(false, "the letters %s and %s differ", x.Letter, y.Letter)
			}
			return v, err
		}
	case FunctionField:
		if y, ok := b.(FunctionField); ok {
			v, err := Equal(c, Field{x.K}, Field{y.K})
			if err == nil && v.Holds && x.Letter != y.Letter {
				v = algebra.Because(false, "the letters %s and %s differ", x.Letter, y.Letter)
			}
			return v, err
		}
	case Extension:
		if y, ok := b.(Extension); ok {
			v, err := equalFields(c, Field{x.L}, Field{y.L})
			if err != nil || !v.Holds {
				return v, err
			}
			return equalFields(c, Field{x.K}, Field{y.K})
		}
	case Map:
		if y, ok := b.(Map); ok {
			return equalMaps(c, x, y)
		}
	case Group:
		if y, ok := b.(Group); ok {
			return equalGroups(c, x, y)
		}
	case Factorization:
		if y, ok := b.(Factorization); ok {
			return Equal(c, x.Of, y.Of)
		}
	}
	x, ok := a.(Collection)
	y, ok2 := b.(Collection)
	if ok && ok2 && !is[Set](a) && !is[Set](b) && is[Tuple](a) == is[Tuple](b) {
		return equalLists(c, x, y)
	}
	return algebra.Verdict{}, notComparable("=", a, b)
}

func equalNumbers(c *Context, a, b number) (algebra.Verdict, error) {
	if x, y := freeLetter(a), freeLetter(b); x != "" && y != "" && x != y {
		return algebra.Because(false, "one depends on %s and the other on %s", x, y), nil
	}
	x, y, err := meet(c, a, b)
	if err != nil {
		return algebra.Verdict{}, err
	}
	same := x.rank() == y.rank() && x.equal(y)
	where := ""
	switch v := x.(type) {
	case Integer:
		where = "in Z"
	case Rational, Polynomial:
		where = "over Q"
	case Residue:
		where = "modulo " + Short(v.M)
	case Element:
		where = "in " + nameOf(c.Printer(), v.E.Field())
	case FieldPolynomial:
		where = "coefficient by coefficient over " + nameOf(c.Printer(), v.P.Field())
	case RationalFunction:
		where = "as reduced fractions"
	}
	return algebra.Because(same, "compared %s", where), nil
}

// freeLetter is the letter that a polynomial or fraction depends on, or empty.
func freeLetter(v number) string {
	switch v := v.(type) {
	case Polynomial:
		if v.P.Degree() > 0 {
			return v.Letter
		}
	case Quotient:
		return v.Letter
	case FieldPolynomial:
		if v.P.Degree() > 0 {
			return v.Letter
		}
	case RationalFunction:
		if v.height() > 0 {
			return v.Letter
		}
	}
	return ""
}

func equalLists(c *Context, a, b Collection) (algebra.Verdict, error) {
	n, m := a.Len(), b.Len()
	if (n == nil) != (m == nil) || n != nil && n.Cmp(m) != 0 {
		return algebra.Because(false, "their lengths differ"), nil
	}
	x, err := Members(c, a)
	if err != nil {
		return algebra.Verdict{}, err
	}
	y, err := Members(c, b)
	if err != nil {
		return algebra.Verdict{}, err
	}
	for i := range x {
		v, err := Equal(c, x[i], y[i])
		if err != nil || !v.Holds {
			if err == nil {
				v = algebra.Because(false, "they differ at place %d", i+1)
			}
			return v, err
		}
	}
	return algebra.Because(true, "compared place by place"), nil
}

func equalSets(c *Context, a, b Set) (algebra.Verdict, error) {
	if len(a.Items) != len(b.Items) {
		return algebra.Because(false, "they have %d and %d members", len(a.Items), len(b.Items)), nil
	}
	for _, x := range a.Items {
		v, err := search(c, x, b)
		if err != nil {
			return v, err
		}
		if !v.Holds {
			return algebra.Because(false, "%s lies in one of them only", x.Text(nil)), nil
		}
	}
	return algebra.Because(true, "each member of one is a member of the other"), nil
}

// contains decides v in s.
func contains(c *Context, v, s Value) (algebra.Verdict, error) {
	if k, ok := s.(Container); ok {
		return k.Contains(c, v)
	}
	if l, ok := s.(Lazy); ok && l.Has != nil {
		return l.Has(c, v)
	}
	if r, ok := s.(Range); ok {
		if n, ok := operand(v).(Integer); ok {
			return algebra.Because(r.From.Cmp(n.N) <= 0 && n.N.Cmp(r.To) <= 0, "compared with the ends of the range"), nil
		}
	}
	l, ok := s.(Collection)
	if !ok {
		return algebra.Verdict{}, notComparable("in", v, s)
	}
	return search(c, v, l)
}

// search looks for v among the members. Members that mathematics does not
// compare with v are not equal to it.
func search(c *Context, v Value, s Collection) (algebra.Verdict, error) {
	comparable, n := false, 0
	for u, err := range s.All(c) {
		if err != nil {
			return algebra.Verdict{}, err
		}
		c.W.Poll()
		same, err := Equal(c, v, u)
		n++
		if err == nil {
			comparable = true
			if same.Holds {
				return algebra.Because(true, "it stands at place %d", n), nil
			}
		}
	}
	if !comparable && n > 0 {
		return algebra.Verdict{}, notComparable("in", v, s)
	}
	return algebra.Verdict{Evidence: algebra.Evidence{Standing: algebra.Exhausted, Reason: "it is none of the " + Grouped(n) + " members"}}, nil
}

// atMost decides a <= b: the order of numbers, subfields, subgroups, subsets.
func atMost(c *Context, a, b Value) (algebra.Verdict, error) {
	a, b = operand(a), operand(b)
	switch x := a.(type) {
	case Integer, Rational:
		switch b.(type) {
		case Integer, Rational:
			d, err := Operate(c, "-", b, x)
			if err != nil {
				return algebra.Verdict{}, err
			}
			sign := 0
			switch d := d.(type) {
			case Integer:
				sign = d.N.Sign()
			case Rational:
				sign = d.Q.Sign()
			}
			return algebra.Because(sign >= 0, "compared in Q"), nil
		}
	case Field:
		if y, ok := b.(Field); ok {
			return Subfield(c, x, y)
		}
	case Group:
		if y, ok := b.(Group); ok {
			return subgroup(c, x, y)
		}
	case Set:
		if y, ok := b.(Set); ok {
			for _, u := range x.Items {
				v, err := search(c, u, y)
				if err != nil || !v.Holds {
					return v, err
				}
			}
			return algebra.Because(true, "each member is a member of the other"), nil
		}
	}
	if isNumber(a) && isNumber(b) {
		return algebra.Verdict{}, algebra.Errorf(algebra.Mismatch, "%s has no order that fits its arithmetic", a.Kind()).
			WithRemedy("integers and rational numbers are compared by <=, fields and groups by inclusion")
	}
	return algebra.Verdict{}, notComparable("<=", a, b)
}

// divides decides a | b for integers and polynomials.
func divides(c *Context, a, b Value) (algebra.Verdict, error) {
	a, b = operand(a), operand(b)
	if x, ok := a.(Integer); ok {
		if y, ok := b.(Integer); ok {
			if x.N.Sign() == 0 {
				return algebra.Because(y.N.Sign() == 0, "0 divides only 0"), nil
			}
			q, r := new(big.Int).QuoRem(y.N, x.N, new(big.Int))
			if r.Sign() != 0 {
				return algebra.Verdict{Evidence: algebra.Evidence{Reason: "the division leaves the remainder " + Short(r.Mod(y.N, x.N))}}, nil
			}
			v := algebra.Because(true, "the quotient is an integer")
			v.Evidence = v.Evidence.With("quotient", Short(q))
			return v, nil
		}
	}
	if isNumber(a) && isNumber(b) {
		f, g, err := meet(c, a.(number), b.(number))
		if err != nil {
			return algebra.Verdict{}, err
		}
		if isPolynomial(f) {
			if f.isZero() {
				return algebra.Because(g.isZero(), "0 divides only 0"), nil
			}
			q, r, err := QuotientRemainder(c, f, g)
			if err != nil {
				return algebra.Verdict{}, err
			}
			if r.(number).isZero() {
				v := algebra.Because(true, "the division leaves no remainder")
				v.Evidence = v.Evidence.With("quotient", q.Text(nil))
				return v, nil
			}
			v := algebra.Because(false, "the division leaves a remainder")
			v.Evidence = v.Evidence.With("remainder", r.Text(nil))
			return v, nil
		}
		return algebra.Verdict{}, algebra.Errorf(algebra.Mismatch, "divisibility is a question about integers and polynomials, not about %s and %s", a.Kind(), b.Kind()).
			WithRemedy("in a field everything but 0 divides everything")
	}
	return algebra.Verdict{}, notComparable("divides", a, b)
}

// QuotientRemainder divides g by f, which are polynomials of one structure or
// integers, and f is not zero.
func QuotientRemainder(c *Context, f, g Value) (q, r Value, err error) {
	switch f := f.(type) {
	case Integer:
		m := new(big.Int)
		d, _ := new(big.Int).DivMod(g.(Integer).N, f.N, m)
		return Integer{d}, Integer{m}, nil
	case Polynomial:
		d, m := g.(Polynomial).P.DivRem(c.W, f.P)
		return f.with(d), f.with(m), nil
	case FieldPolynomial:
		d, m, err := g.(FieldPolynomial).P.DivRem(c.W, f.P)
		return f.with(d), f.with(m), err
	}
	return nil, nil, algebra.Errorf(algebra.Mismatch, "%s is not divided with remainder", g.Kind())
}

// Division divides a by b with remainder, in the structure where they meet.
func Division(c *Context, a, b Value) (q, r Value, err error) {
	a, b = operand(a), operand(b)
	if !isNumber(a) || !isNumber(b) {
		return nil, nil, algebra.Errorf(algebra.Mismatch, "%s is not divided by %s", a.Kind(), b.Kind())
	}
	x, y, err := meet(c, a.(number), b.(number))
	if err != nil {
		return nil, nil, err
	}
	if y.isZero() {
		return nil, nil, divisionByZero(y)
	}
	return QuotientRemainder(c, y, x)
}

// Remainder is a mod n. A fraction has one modulo an integer when its
// denominator is a unit there.
func Remainder(c *Context, a, n Value) (Value, error) {
	if q, ok := operand(a).(Rational); ok {
		if m, ok := operand(n).(Integer); ok && m.N.Sign() != 0 {
			r, err := toResidue(c, q, new(big.Int).Abs(m.N))
			return Integer{r.N}, err
		}
	}
	_, r, err := Division(c, a, n)
	return r, err
}

// congruent decides a = b mod n.
func congruent(c *Context, a, b, n Value) (algebra.Verdict, error) {
	d, err := Operate(c, "-", a, b)
	if err != nil {
		return algebra.Verdict{}, err
	}
	r, err := Remainder(c, d, n)
	if err != nil {
		return algebra.Verdict{}, err
	}
	if r.(number).isZero() {
		return algebra.Because(true, "the difference is divisible by %s", n.Text(nil)), nil
	}
	return algebra.Because(false, "the difference leaves the remainder %s", r.Text(nil)), nil
}

// GCD is the greatest common divisor of two integers or polynomials.
func GCD(c *Context, a, b Value) (Value, error) {
	x, y, err := commonMultiplicands(c, a, b)
	if err != nil {
		return nil, err
	}
	switch f := x.(type) {
	case Integer:
		return Integer{new(big.Int).GCD(nil, nil, new(big.Int).Abs(f.N), new(big.Int).Abs(y.(Integer).N))}, nil
	case Polynomial:
		return f.with(f.P.GCD(c.W, y.(Polynomial).P)), nil
	case FieldPolynomial:
		return f.with(f.P.GCD(c.W, y.(FieldPolynomial).P)), nil
	}
	return nil, algebra.Errorf(algebra.Mismatch, "a greatest common divisor is of integers or polynomials, not of %s", x.Kind())
}

// LCM is the least common multiple of two integers or polynomials.
func LCM(c *Context, a, b Value) (Value, error) {
	x, y, err := commonMultiplicands(c, a, b)
	if err != nil {
		return nil, err
	}
	if x.isZero() || y.isZero() {
		return x.mul(c, y)
	}
	d, err := GCD(c, x, y)
	if err != nil {
		return nil, err
	}
	q, err := Divide(c, y, d)
	if err != nil {
		return nil, err
	}
	m, err := Operate(c, "*", x, q)
	if err != nil {
		return nil, err
	}
	if n, ok := m.(Integer); ok {
		return Integer{new(big.Int).Abs(n.N)}, nil
	}
	return Normal(c, m)
}

func commonMultiplicands(c *Context, a, b Value) (number, number, error) {
	x, ok := operand(a).(number)
	y, ok2 := operand(b).(number)
	if !ok || !ok2 {
		return nil, nil, algebra.Errorf(algebra.Mismatch, "divisors and multiples are of integers or polynomials, not of %s and %s", a.Kind(), b.Kind())
	}
	return meet(c, x, y)
}

// Normal is the associate that stands for all: monic over a field, primitive
// with positive leading coefficient over Q, positive in Z.
func Normal(c *Context, v Value) (Value, error) {
	switch f := v.(type) {
	case Integer:
		return Integer{new(big.Int).Abs(f.N)}, nil
	case Polynomial:
		return f.with(f.P.Primitive()), nil
	case FieldPolynomial:
		if f.isZero() {
			return f, nil
		}
		return f.with(f.P.Monic(c.W)), nil
	}
	return v, nil
}
