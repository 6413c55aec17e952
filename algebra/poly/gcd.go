package poly

import "adjoin/algebra"

// GCD is the monic greatest common divisor, zero when both are zero.
func GCD(w *algebra.Work, A Arith, f, g *Poly) *Poly {
	a, b := Clone(f), Clone(g)
	for !b.IsZero() {
		w.Poll()
		A.DivRem(w, nil, a, a, b)
		a, b = b, a
	}
	if a.IsZero() {
		return a
	}
	d, _ := Monic(w, A, a)
	return d
}

// XGCD is the monic greatest common divisor d with u f + v g = d, where
// deg u < deg g - deg d and deg v < deg f - deg d unless one divides the
// other.
func XGCD(w *algebra.Work, A Arith, f, g *Poly) (d, u, v *Poly) {
	d, u = halfXGCD(w, A, f, g)
	v = new(Poly)
	if !g.IsZero() {
		A.Mul(w, v, u, f)
		A.Sub(v, d, v)
		A.DivRem(w, v, nil, v, g)
	}
	return d, u, v
}

// halfXGCD is XGCD without the cofactor of g.
func halfXGCD(w *algebra.Work, A Arith, f, g *Poly) (d, u *Poly) {
	a, b := Clone(f), Clone(g)
	u, u1 := One(A), new(Poly)
	q, t := new(Poly), new(Poly)
	for !b.IsZero() {
		w.Poll()
		A.DivRem(w, q, a, a, b)
		A.Mul(w, t, q, u1)
		A.Sub(u, u, t)
		a, b = b, a
		u, u1 = u1, u
	}
	if a.IsZero() {
		return a, u
	}
	d, lead := Monic(w, A, a)
	inv := make(Elem, A.Width())
	A.InvElem(w, inv, lead)
	A.Scale(w, u, u, inv)
	return d, u
}

// InvMod is 1/f modulo m, when f and m have no common factor.
func InvMod(w *algebra.Work, A Arith, f, m *Poly) (*Poly, bool) {
	r := new(Poly)
	A.DivRem(w, nil, r, f, m)
	d, u := halfXGCD(w, A, r, m)
	return u, d.N == 1
}

// LCM is the monic least common multiple.
func LCM(w *algebra.Work, A Arith, f, g *Poly) *Poly {
	z := new(Poly)
	if f.IsZero() || g.IsZero() {
		return z
	}
	A.DivRem(w, z, nil, f, GCD(w, A, f, g))
	A.Mul(w, z, z, g)
	z, _ = Monic(w, A, z)
	return z
}

// Resultant is the product of lead(f)^deg g lead(g)^deg f (a - b) over the
// roots a of f and b of g; zero when either polynomial is zero.
func Resultant(w *algebra.Work, A Arith, f, g *Poly) Elem {
	z := make(Elem, A.Width())
	if f.IsZero() || g.IsZero() {
		return z
	}
	copy(z, A.One())
	a, b := Clone(f), Clone(g)
	for b.N > 1 {
		w.Poll()
		// res(a, b) = (-1)^(deg a deg b) lead(b)^(deg a - deg r) res(b, r)
		da, lead := a.Degree(), Lead(A, b)
		A.DivRem(w, nil, a, a, b)
		if a.IsZero() {
			clear(z)
			return z
		}
		if da&1 == 1 && b.Degree()&1 == 1 {
			A.NegElem(z, z)
		}
		A.MulElem(w, z, z, PowElem(w, A, lead, da-a.Degree()))
		a, b = b, a
	}
	A.MulElem(w, z, z, PowElem(w, A, Coeff(A, b, 0), a.Degree()))
	return z
}

// PowElem is a^n, n >= 0.
func PowElem(w *algebra.Work, A Arith, a Elem, n int) Elem {
	z := append(Elem(nil), A.One()...)
	for i := 62; i >= 0; i-- {
		A.MulElem(w, z, z, z)
		if n>>i&1 == 1 {
			A.MulElem(w, z, z, a)
		}
	}
	return z
}

// Discriminant is lead(f)^(2n-2) times the product of (a - b)^2 over pairs of
// roots, for f of degree n >= 1.
func Discriminant(w *algebra.Work, A Arith, f *Poly) Elem {
	n := f.Degree()
	d := new(Poly)
	A.Derivative(d, f)
	z := Resultant(w, A, f, d)
	if d.IsZero() {
		return z
	}
	// The formula counts deg f' as n-1: each missing degree is a factor lead(f),
	// and one more is divided out.
	lead := Lead(A, f)
	k := n - 1 - d.Degree() - 1
	if k < 0 {
		A.InvElem(w, lead, lead)
		k = 1
	}
	A.MulElem(w, z, z, PowElem(w, A, lead, k))
	if n*(n-1)/2%2 == 1 {
		A.NegElem(z, z)
	}
	return z
}
