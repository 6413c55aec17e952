package poly

import (
	"math/big"

	"adjoin/algebra"
)

// Clone is a copy of f.
func Clone(f *Poly) *Poly { return &Poly{append([]uint64(nil), f.W...), f.N} }

// Equal says whether f and g are the same polynomial over the same Arith.
func Equal(f, g *Poly) bool {
	if f.N != g.N || len(f.W) != len(g.W) {
		return false
	}
	for i, x := range f.W {
		if g.W[i] != x {
			return false
		}
	}
	return true
}

// Constant is the polynomial a of degree 0, or zero.
func Constant(A Arith, a Elem) *Poly {
	f := new(Poly)
	A.SetCoeff(f, 0, a)
	return f
}

// One is the polynomial 1.
func One(A Arith) *Poly { return Constant(A, A.One()) }

// X is the polynomial x.
func X(A Arith) *Poly { return Monomial(A, A.One(), 1) }

// Monomial is a x^n.
func Monomial(A Arith, a Elem, n int) *Poly {
	f := new(Poly)
	A.SetCoeff(f, n, a)
	return f
}

// FromElems is the polynomial with the given coefficients, constant term
// first.
func FromElems(A Arith, coeffs []Elem) *Poly {
	f := new(Poly)
	for i := len(coeffs) - 1; i >= 0; i-- {
		A.SetCoeff(f, i, coeffs[i])
	}
	return f
}

// FromInts is the polynomial with the images of integers as coefficients,
// constant term first.
func FromInts(A Arith, coeffs ...int64) *Poly {
	f := new(Poly)
	e := make(Elem, A.Width())
	for i := len(coeffs) - 1; i >= 0; i-- {
		A.SetInt(e, big.NewInt(coeffs[i]))
		A.SetCoeff(f, i, e)
	}
	return f
}

// Elems is the list of coefficients of f, constant term first.
func Elems(A Arith, f *Poly) []Elem {
	list := make([]Elem, f.N)
	for i := range list {
		list[i] = Coeff(A, f, i)
	}
	return list
}

// Coeff is coefficient i of f.
func Coeff(A Arith, f *Poly, i int) Elem {
	e := make(Elem, A.Width())
	A.Coeff(e, f, i)
	return e
}

// Lead is the leading coefficient of f, zero for the zero polynomial.
func Lead(A Arith, f *Poly) Elem {
	if f.N == 0 {
		return make(Elem, A.Width())
	}
	return Coeff(A, f, f.N-1)
}

// IsZeroElem says whether a is zero.
func IsZeroElem(a Elem) bool {
	for _, x := range a {
		if x != 0 {
			return false
		}
	}
	return true
}

// EqualElem says whether a and b are the same element.
func EqualElem(a, b Elem) bool {
	for i, x := range a {
		if b[i] != x {
			return false
		}
	}
	return true
}

// IsOne says whether f is the polynomial 1.
func IsOne(A Arith, f *Poly) bool { return f.N == 1 && EqualElem(Coeff(A, f, 0), A.One()) }

// Monic is f divided by its leading coefficient, and that coefficient. f is
// not zero.
func Monic(w *algebra.Work, A Arith, f *Poly) (*Poly, Elem) {
	lead := Lead(A, f)
	g := Clone(f)
	if !EqualElem(lead, A.One()) {
		inv := make(Elem, A.Width())
		A.InvElem(w, inv, lead)
		A.Scale(w, g, g, inv)
	}
	return g, lead
}

// Reverse is x^n f(1/x), for n at least the degree of f.
func Reverse(A Arith, f *Poly, n int) *Poly {
	g := new(Poly)
	A.Reverse(g, f, n)
	return g
}

// Pow is f^n, n >= 0.
func Pow(w *algebra.Work, A Arith, f *Poly, n int) *Poly {
	z := One(A)
	for i := 62; i >= 0; i-- {
		if z.N > 1 || n>>i != 0 {
			A.Sqr(w, z, z)
		}
		if n>>i&1 == 1 {
			A.Mul(w, z, z, f)
		}
	}
	return z
}

// Eval is f(a), by Horner's rule.
func Eval(w *algebra.Work, A Arith, f *Poly, a Elem) Elem {
	z, c := make(Elem, A.Width()), make(Elem, A.Width())
	for i := f.N - 1; i >= 0; i-- {
		A.MulElem(w, z, z, a)
		A.Coeff(c, f, i)
		A.AddElem(z, z, c)
	}
	return z
}

// Compose is f(g).
func Compose(w *algebra.Work, A Arith, f, g *Poly) *Poly {
	// Halves: f = f0 + x^h f1, so f(g) = f0(g) + g^h f1(g).
	if f.N <= 1 {
		return Clone(f)
	}
	w.Poll()
	if f.N == 2 {
		z := new(Poly)
		A.Scale(w, z, g, Coeff(A, f, 1))
		A.Add(z, z, Constant(A, Coeff(A, f, 0)))
		return z
	}
	h := 1
	for 2*h < f.N {
		h *= 2
	}
	low, high := new(Poly), new(Poly)
	A.Slice(low, f, 0, h)
	A.Slice(high, f, h, f.N)
	z := Compose(w, A, high, g)
	A.Mul(w, z, z, Pow(w, A, g, h))
	A.Add(z, z, Compose(w, A, low, g))
	return z
}

// CompareElem orders elements by their codes.
func CompareElem(A Arith, a, b Elem) int { return A.Code(a).Cmp(A.Code(b)) }

// Compare is the canonical order of polynomials: by degree, then by the codes
// of the coefficients from the highest down.
func Compare(A Arith, f, g *Poly) int {
	if f.N != g.N {
		return f.N - g.N
	}
	a, b := make(Elem, A.Width()), make(Elem, A.Width())
	for i := f.N - 1; i >= 0; i-- {
		A.Coeff(a, f, i)
		A.Coeff(b, g, i)
		if c := CompareElem(A, a, b); c != 0 {
			return c
		}
	}
	return 0
}
