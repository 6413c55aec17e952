package funcfield

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// Fraction is an element of F_q(t): a numerator over a monic denominator
// without a common factor. Fractions are immutable; those of one operation lie
// over the same finite field.
type Fraction struct{ n, d field.Polynomial }

// New is n/d in lowest terms. It is an error of kind Undefined when d is zero.
func New(w *algebra.Work, n, d field.Polynomial) (Fraction, error) {
	if d.IsZero() {
		return Fraction{}, algebra.Errorf(algebra.Undefined, "division by zero in the rational functions")
	}
	return reduced(w, n, d), nil
}

// FromPolynomial is n/1.
func FromPolynomial(n field.Polynomial) Fraction {
	return Fraction{n, field.NewPolynomial(n.Field(), []field.Elem{n.Field().One()})}
}

// reduced is n/d in lowest terms, d not zero.
func reduced(w *algebra.Work, n, d field.Polynomial) Fraction {
	if g := n.GCD(w, d); g.Degree() > 0 {
		n, d = quotient(w, n, g), quotient(w, d, g)
	}
	lead := field.NewPolynomial(d.Field(), []field.Elem{d.Coefficient(d.Degree())})
	return Fraction{quotient(w, n, lead), quotient(w, d, lead)}
}

// quotient is f/g for a g that divides f.
func quotient(w *algebra.Work, f, g field.Polynomial) field.Polynomial {
	q, _, err := f.DivRem(w, g)
	if err != nil {
		panic(err) // g is not zero
	}
	return q
}

// Numerator is the numerator.
func (u Fraction) Numerator() field.Polynomial { return u.n }

// Denominator is the denominator, which is monic.
func (u Fraction) Denominator() field.Polynomial { return u.d }

// Constants is F_q.
func (u Fraction) Constants() *field.Field { return u.n.Field() }

// IsZero says whether u is zero.
func (u Fraction) IsZero() bool { return u.n.IsZero() }

// IsConstant says whether u lies in F_q.
func (u Fraction) IsConstant() bool { return u.n.Degree() <= 0 && u.d.Degree() == 0 }

// Equal says whether u = v.
func (u Fraction) Equal(v Fraction) bool { return u.n.Equal(v.n) && u.d.Equal(v.d) }

// Add is u + v.
func (u Fraction) Add(w *algebra.Work, v Fraction) Fraction {
	return reduced(w, u.n.Mul(w, v.d).Add(v.n.Mul(w, u.d)), u.d.Mul(w, v.d))
}

// Sub is u - v.
func (u Fraction) Sub(w *algebra.Work, v Fraction) Fraction { return u.Add(w, v.Neg()) }

// Neg is -u.
func (u Fraction) Neg() Fraction { return Fraction{u.n.Neg(), u.d} }

// Mul is u v.
func (u Fraction) Mul(w *algebra.Work, v Fraction) Fraction {
	return reduced(w, u.n.Mul(w, v.n), u.d.Mul(w, v.d))
}

// Div is u/v. It is an error of kind Undefined when v is zero.
func (u Fraction) Div(w *algebra.Work, v Fraction) (Fraction, error) {
	if v.IsZero() {
		return Fraction{}, algebra.Errorf(algebra.Undefined, "division by zero in the rational functions")
	}
	return reduced(w, u.n.Mul(w, v.d), u.d.Mul(w, v.n)), nil
}

// Pow is u^e; a negative e inverts. It is an error when u is zero and e
// negative, and when the degree of the result would pass MaxDegree.
func (u Fraction) Pow(w *algebra.Work, e *big.Int) (Fraction, error) {
	if e.Sign() < 0 {
		v, err := FromPolynomial(u.d).Div(w, FromPolynomial(u.n))
		if err != nil {
			return Fraction{}, err
		}
		return v.Pow(w, new(big.Int).Neg(e))
	}
	degree := big.NewInt(int64(max(u.n.Degree(), u.d.Degree(), 0)))
	if degree.Mul(degree, e); degree.Cmp(big.NewInt(MaxDegree)) > 0 {
		return Fraction{}, algebra.Errorf(algebra.TooLarge, "a power of degree %v passes the limit of %d", degree, MaxDegree)
	}
	if u.IsConstant() {
		c, err := u.n.Coefficient(0).Pow(w, e)
		if err != nil {
			return Fraction{}, err
		}
		return FromPolynomial(field.NewPolynomial(u.Constants(), []field.Elem{c})), nil
	}
	// Powers of coprime polynomials are coprime.
	one := field.NewPolynomial(u.Constants(), []field.Elem{u.Constants().One()})
	n, d := one, one
	for i := e.BitLen() - 1; i >= 0; i-- {
		n, d = n.Mul(w, n), d.Mul(w, d)
		if e.Bit(i) == 1 {
			n, d = n.Mul(w, u.n), d.Mul(w, u.d)
		}
	}
	return Fraction{n, d}, nil
}

// Eval is u at the constant a. It is an error of kind Undefined when a is a
// pole.
func (u Fraction) Eval(w *algebra.Work, a field.Elem) (field.Elem, error) {
	d := u.d.Eval(w, a)
	if d.IsZero() {
		return field.Elem{}, algebra.Errorf(algebra.Undefined, "the rational function has a pole there: its denominator is 0")
	}
	return u.n.Eval(w, a).Div(w, d)
}

// MaxDegree is the largest degree of a numerator or denominator that Pow and
// Frobenius make.
const MaxDegree = 1 << 20
