package field

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Polynomial is a polynomial in one letter over a finite field: an immutable
// value. Operands of one operation are over the same field; others unwind with
// an error of kind Mismatch, see Combine and Map.
type Polynomial struct {
	k *Field
	f *poly.Poly
}

// NewPolynomial is sum c_i x^i over K, for c_i in K, constant term first.
func NewPolynomial(K *Field, c []Elem) Polynomial {
	f := new(poly.Poly)
	for i := len(c) - 1; i >= 0; i-- {
		if !Same(K, c[i].k) {
			algebra.Fail(mismatch(K, c[i].k))
		}
		K.arith.SetCoeff(f, i, c[i].w)
	}
	return Polynomial{K, f}
}

// FromInts is sum c_i x^i over K, constant term first.
func FromInts(K *Field, c ...int64) Polynomial { return Polynomial{K, poly.FromInts(K.arith, c...)} }

// FromPoly is f over K; f is no longer the caller's to change.
func FromPoly(K *Field, f *poly.Poly) Polynomial { return Polynomial{K, f} }

// FromCode is the polynomial over K whose coefficients are the digits of code
// to base |K|, constant term first: over F_2, bit i is the coefficient of x^i.
func FromCode(K *Field, code *big.Int) Polynomial {
	f := new(poly.Poly)
	decode(f, K.arith, code)
	return Polynomial{K, f}
}

// Code is the number that FromCode takes.
func (f Polynomial) Code() *big.Int {
	z := new(big.Int)
	for i := f.f.Degree(); i >= 0; i-- {
		z.Mul(z, f.k.Order())
		z.Add(z, f.Coefficient(i).Code())
	}
	return z
}

// Field is the field of the coefficients.
func (f Polynomial) Field() *Field { return f.k }

// Raw is the polynomial under Field().Arith(). The caller does not change it.
func (f Polynomial) Raw() *poly.Poly { return f.f }

// Degree is the degree, -1 for 0.
func (f Polynomial) Degree() int { return f.f.Degree() }

// IsZero says whether f is 0.
func (f Polynomial) IsZero() bool { return f.f.IsZero() }

// Coefficient is the coefficient of x^i, 0 beyond the degree.
func (f Polynomial) Coefficient(i int) Elem { return Elem{f.k, poly.Coeff(f.k.arith, f.f, i)} }

// Coefficients lists the coefficients, constant term first; none for 0.
func (f Polynomial) Coefficients() []Elem {
	c := make([]Elem, f.f.N)
	for i := range c {
		c[i] = f.Coefficient(i)
	}
	return c
}

// Leading is the leading coefficient, 0 for 0.
func (f Polynomial) Leading() Elem { return f.Coefficient(max(f.Degree(), 0)) }

// Equal says whether f and g are the same polynomial over the same field.
func (f Polynomial) Equal(g Polynomial) bool { return Same(f.k, g.k) && poly.Equal(f.f, g.f) }

// ComparePolynomials is the canonical order of polynomials over one field: by
// degree, then by the codes of the coefficients from the highest down.
func ComparePolynomials(f, g Polynomial) int { return poly.Compare(f.k.arith, f.f, g.f) }

func (f Polynomial) meet(g Polynomial) {
	if !Same(f.k, g.k) {
		algebra.Fail(mismatch(f.k, g.k))
	}
}

// Add is f + g.
func (f Polynomial) Add(g Polynomial) Polynomial {
	f.meet(g)
	z := new(poly.Poly)
	f.k.arith.Add(z, f.f, g.f)
	return Polynomial{f.k, z}
}

// Sub is f - g.
func (f Polynomial) Sub(g Polynomial) Polynomial {
	f.meet(g)
	z := new(poly.Poly)
	f.k.arith.Sub(z, f.f, g.f)
	return Polynomial{f.k, z}
}

// Neg is -f.
func (f Polynomial) Neg() Polynomial {
	z := new(poly.Poly)
	f.k.arith.Neg(z, f.f)
	return Polynomial{f.k, z}
}

// Mul is f g.
func (f Polynomial) Mul(w *algebra.Work, g Polynomial) Polynomial {
	f.meet(g)
	z := new(poly.Poly)
	f.k.arith.Mul(w, z, f.f, g.f)
	return Polynomial{f.k, z}
}

// Scale is c f.
func (f Polynomial) Scale(w *algebra.Work, c Elem) Polynomial {
	f.meet(Polynomial{c.k, nil})
	z := new(poly.Poly)
	f.k.arith.Scale(w, z, f.f, c.w)
	return Polynomial{f.k, z}
}

// Shift is x^k f, k >= 0.
func (f Polynomial) Shift(k int) Polynomial {
	z := new(poly.Poly)
	f.k.arith.Shift(z, f.f, k)
	return Polynomial{f.k, z}
}

// Pow is f^n, n >= 0.
func (f Polynomial) Pow(w *algebra.Work, n int) Polynomial {
	return Polynomial{f.k, poly.Pow(w, f.k.arith, f.f, n)}
}

// PowMod is the remainder of f^n by m, n >= 0; an error of kind Undefined for
// m = 0.
func (f Polynomial) PowMod(w *algebra.Work, n *big.Int, m Polynomial) (Polynomial, error) {
	f.meet(m)
	if m.IsZero() {
		return Polynomial{}, errDivisionByZero
	}
	return Polynomial{f.k, poly.PowMod(w, f.k.arith, f.f, n, m.f)}, nil
}

var errDivisionByZero = algebra.Errorf(algebra.Undefined, "division by the polynomial 0")

// DivRem are q and r with f = q g + r and deg r < deg g; an error of kind
// Undefined for g = 0.
func (f Polynomial) DivRem(w *algebra.Work, g Polynomial) (q, r Polynomial, err error) {
	f.meet(g)
	if g.IsZero() {
		return Polynomial{}, Polynomial{}, errDivisionByZero
	}
	q, r = Polynomial{f.k, new(poly.Poly)}, Polynomial{f.k, new(poly.Poly)}
	f.k.arith.DivRem(w, q.f, r.f, f.f, g.f)
	return q, r, nil
}

// Derivative is the formal derivative.
func (f Polynomial) Derivative() Polynomial {
	z := new(poly.Poly)
	f.k.arith.Derivative(z, f.f)
	return Polynomial{f.k, z}
}

// Reverse is the reciprocal polynomial x^deg f(1/x).
func (f Polynomial) Reverse() Polynomial {
	if f.IsZero() {
		return f
	}
	return Polynomial{f.k, poly.Reverse(f.k.arith, f.f, f.Degree())}
}

// Monic is f over its leading coefficient; 0 for 0.
func (f Polynomial) Monic(w *algebra.Work) Polynomial {
	if f.IsZero() {
		return f
	}
	g, _ := poly.Monic(w, f.k.arith, f.f)
	return Polynomial{f.k, g}
}

// Eval is f(a), for a in the field of f.
func (f Polynomial) Eval(w *algebra.Work, a Elem) Elem {
	f.meet(Polynomial{a.k, nil})
	return Elem{f.k, poly.Eval(w, f.k.arith, f.f, a.w)}
}

// Compose is f(g(x)).
func (f Polynomial) Compose(w *algebra.Work, g Polynomial) Polynomial {
	f.meet(g)
	return Polynomial{f.k, poly.Compose(w, f.k.arith, f.f, g.f)}
}

// Map is the polynomial with m applied to each coefficient.
func (f Polynomial) Map(w *algebra.Work, m *Map) Polynomial {
	z := new(poly.Poly)
	for i := f.Degree(); i >= 0; i-- {
		m.to.arith.SetCoeff(z, i, m.Apply(w, f.Coefficient(i)).w)
	}
	return Polynomial{m.to, z}
}

// In is f over L, along the fixed embedding of its field; the errors are those
// of Embed.
func (f Polynomial) In(w *algebra.Work, L *Field) (Polynomial, error) {
	m, err := Embed(w, f.k, L)
	if err != nil {
		return Polynomial{}, err
	}
	return f.Map(w, m), nil
}

// GCD is the monic greatest common divisor; 0 for two zeros.
func (f Polynomial) GCD(w *algebra.Work, g Polynomial) Polynomial {
	f.meet(g)
	return Polynomial{f.k, poly.GCD(w, f.k.arith, f.f, g.f)}
}

// XGCD are the monic greatest common divisor d and u, v with u f + v g = d.
func (f Polynomial) XGCD(w *algebra.Work, g Polynomial) (d, u, v Polynomial) {
	f.meet(g)
	a, b, c := poly.XGCD(w, f.k.arith, f.f, g.f)
	return Polynomial{f.k, a}, Polynomial{f.k, b}, Polynomial{f.k, c}
}

// Resultant is the resultant of f and g.
func (f Polynomial) Resultant(w *algebra.Work, g Polynomial) Elem {
	f.meet(g)
	return Elem{f.k, poly.Resultant(w, f.k.arith, f.f, g.f)}
}

// Discriminant is the discriminant of f.
func (f Polynomial) Discriminant(w *algebra.Work) Elem {
	return Elem{f.k, poly.Discriminant(w, f.k.arith, f.f)}
}
