package value

import (
	"math/big"

	"adjoin/algebra"
)

// row is one line of the table of operators: for operands that the two tests
// accept, what the operator does.
type row struct {
	op    string
	a, b  func(Value) bool
	apply func(c *Context, a, b Value) (Value, error)
}

// The table of the binary operators. The first row that accepts both operands
// counts.
var table []row

func init() {
	table = []row{
		{"+", isNumber, isNumber, arithmetic(number.add)},
		{"-", isNumber, isNumber, arithmetic(number.sub)},
		{"*", isNumber, isNumber, arithmetic(number.mul)},
		{"/", isNumber, isNumber, divide},
		{"^", isNumber, is[Integer], raise},

		{"/", is[Field], is[Field], extension},
		{"/", is[Ring], is[Integer], residueRing},
		{"/", is[PolynomialRing], isPolynomial, quotientRing},

		{"*", is[Map], is[Map], compose},
		{"^", is[Map], is[Integer], iterate},
		{"*", is[Function], is[Function], composeFunctions},

		{"+", is[Matrix], is[Matrix], matrixSum},
		{"-", is[Matrix], is[Matrix], matrixDifference},
		{"*", is[Matrix], is[Matrix], matrixProduct},
		{"*", isNumber, is[Matrix], scalarTimesMatrix},
		{"*", is[Matrix], is[Vector], matrixTimesVector},
		{"*", is[Matrix], isNumber, func(c *Context, a, b Value) (Value, error) { return scalarTimesMatrix(c, b, a) }},
		{"^", is[Matrix], is[Integer], matrixPower},
	}
}

// Operate applies a binary operator: + - * / ^.
func Operate(c *Context, op string, a, b Value) (Value, error) {
	a, b = operand(a), operand(b)
	for _, r := range table {
		if r.op == op && r.a(a) && r.b(b) {
			return r.apply(c, a, b)
		}
	}
	return nil, noOperator(op, a, b)
}

// Negate is -a.
func Negate(c *Context, a Value) (Value, error) {
	switch a := operand(a).(type) {
	case number:
		return a.neg(c)
	case Matrix:
		return scalarTimesMatrix(c, Int(-1), a)
	}
	return nil, algebra.Errorf(algebra.Mismatch, "%s has no negative", a.Kind())
}

// Divide is a/b.
func Divide(c *Context, a, b Value) (Value, error) { return Operate(c, "/", a, b) }

// operand is the value that an operator sees: a factorization stands for its
// product.
func operand(v Value) Value {
	v = Plain(v)
	if f, ok := v.(Factorization); ok {
		return f.Of
	}
	return v
}

func is[T Value](v Value) bool  { _, ok := v.(T); return ok }
func isNumber(v Value) bool     { _, ok := v.(number); return ok }
func isPolynomial(v Value) bool { return is[Polynomial](v) || is[FieldPolynomial](v) }

func arithmetic(f func(a number, c *Context, b number) (Value, error)) func(c *Context, a, b Value) (Value, error) {
	return func(c *Context, a, b Value) (Value, error) {
		x, y, err := meet(c, a.(number), b.(number))
		if err != nil {
			return nil, err
		}
		return f(x, c, y)
	}
}

func divide(c *Context, a, b Value) (Value, error) {
	x, y, err := meet(c, a.(number), b.(number))
	if err != nil {
		return nil, err
	}
	if y.isZero() {
		return nil, divisionByZero(y)
	}
	return x.div(c, y)
}

func raise(c *Context, a, n Value) (Value, error) { return a.(number).pow(c, n.(Integer).N) }

func noOperator(op string, a, b Value) error {
	verb := map[string]string{"+": "added to", "-": "subtracted from", "*": "multiplied by", "/": "divided by", "^": "raised to the power of"}[op]
	if op == "-" {
		a, b = b, a
	}
	e := algebra.Errorf(algebra.Mismatch, "%s cannot be %s %s", a.Kind(), verb, b.Kind())
	if op == "^" {
		return e.WithRemedy("an exponent is an integer")
	}
	return e
}

// powerBySquaring is a^n for n >= 1 in any structure.
func powerBySquaring[T any](c *Context, a T, n *big.Int, mul func(x, y T) (T, error)) (T, error) {
	r := a
	for i := n.BitLen() - 2; i >= 0; i-- {
		c.W.Poll()
		var err error
		if r, err = mul(r, r); err != nil {
			return r, err
		}
		if n.Bit(i) == 1 {
			if r, err = mul(r, a); err != nil {
				return r, err
			}
		}
	}
	return r, nil
}

// AsNumber is v as something that is added and multiplied: a number, an
// element, a polynomial, a rational function. A factorization is its product.
func AsNumber(v Value) (Value, bool) {
	v = operand(v)
	return v, isNumber(v)
}

// Meet moves two numbers into one structure.
func Meet(c *Context, a, b Value) (Value, Value, error) {
	a, b = operand(a), operand(b)
	if !isNumber(a) || !isNumber(b) {
		return nil, nil, doNotMeet(a, b)
	}
	x, y, err := meet(c, a.(number), b.(number))
	if err != nil {
		return nil, nil, err
	}
	return x, y, nil
}
