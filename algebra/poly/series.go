package poly

import "adjoin/algebra"

// References:
//
//	[vzGG] J. von zur Gathen, J. Gerhard, Modern Computer Algebra, 3rd edition
//	  2013, section 9.1: division through the inverse power series, by Newton.

// InverseSeries is 1/f modulo x^n. The constant term of f is not zero.
func InverseSeries(w *algebra.Work, A Arith, f *Poly, n int) *Poly {
	c := make(Elem, A.Width())
	A.InvElem(w, c, Coeff(A, f, 0))
	g := Constant(A, c)
	t, fk := new(Poly), new(Poly)
	for k := 1; k < n; {
		// g <- g (2 - f g): twice as many right terms.
		k = min(2*k, n)
		A.Slice(fk, f, 0, k)
		A.Mul(w, t, fk, g)
		A.Slice(t, t, 0, k)
		A.Mul(w, t, t, g)
		A.Slice(t, t, 0, k)
		A.Add(g, g, g)
		A.Sub(g, g, t)
	}
	return g
}

// DivRemBySeries is Arith.DivRem for long quotients and divisors.
func DivRemBySeries(w *algebra.Work, A Arith, q, r, f, g *Poly) {
	k := f.N - g.N + 1
	inv := InverseSeries(w, A, Reverse(A, g, g.Degree()), k)
	t := new(Poly)
	A.Slice(t, Reverse(A, f, f.Degree()), 0, k)
	A.Mul(w, t, t, inv)
	A.Slice(t, t, 0, k)
	quo := Reverse(A, t, k-1)
	if r != nil {
		rem := new(Poly)
		A.Mul(w, rem, quo, g)
		A.Sub(r, f, rem)
	}
	if q != nil {
		*q = *quo
	}
}
