package poly

import "adjoin/algebra"

// References:
//
//	[Massey] J. Massey, Shift-register synthesis and BCH decoding, 1969.
//	[Shoup] V. Shoup, Fast construction of irreducible polynomials over finite
//	  fields, 1994: minimal polynomials by projected powers.

// BerlekampMassey is the monic polynomial of least degree d with
// sum_i m_i s_(j+i) = 0 for all j: the minimal polynomial of a sequence that
// is known to have one of degree at most half its length [Massey].
func BerlekampMassey(w *algebra.Work, A Arith, s []Elem) *Poly {
	// c is the connection polynomial 1 + c_1 x + ...: s_j + c_1 s_(j-1) + ... = 0.
	c, b := One(A), One(A)
	length, shift := 0, 1
	last := append(Elem(nil), A.One()...)
	d, t, e := make(Elem, A.Width()), make(Elem, A.Width()), make(Elem, A.Width())
	for j := range s {
		w.Poll()
		clear(d)
		for i := 0; i <= length && i < c.N; i++ {
			A.Coeff(e, c, i)
			A.MulElem(w, t, e, s[j-i])
			A.AddElem(d, d, t)
		}
		if IsZeroElem(d) {
			shift++
			continue
		}
		A.InvElem(w, e, last)
		A.MulElem(w, e, e, d)
		A.NegElem(e, e)
		old := Clone(c)
		sb := new(Poly)
		A.Shift(sb, b, shift)
		A.AddScaled(w, c, sb, e)
		if 2*length <= j {
			length, b, shift = j+1-length, old, 1
			copy(last, d)
		} else {
			shift++
		}
	}
	return Reverse(A, c, length)
}

// MinimalPolynomialMod is the minimal polynomial of g modulo m, deg m >= 1:
// the monic polynomial f of least degree with f(g) = 0 mod m.
func MinimalPolynomialMod(w *algebra.Work, A Arith, g, m *Poly) *Poly {
	n := m.Degree()
	M := A.NewModulus(w, m)
	r := new(Poly)
	M.Reduce(w, r, g)
	// Coordinate i of the powers has a minimal polynomial that divides the one
	// wanted; modulo an irreducible m coordinate 0 gives it all.
	powers := make([]*Poly, 2*n)
	powers[0] = One(A)
	for i := 1; i < len(powers); i++ {
		w.Poll()
		powers[i] = new(Poly)
		M.MulMod(w, powers[i], powers[i-1], r)
	}
	f := One(A)
	for i := 0; ; i++ {
		s := make([]Elem, len(powers))
		for j := range s {
			s[j] = Coeff(A, powers[j], i)
		}
		f = LCM(w, A, f, BerlekampMassey(w, A, s))
		if i == n-1 || annihilates(w, A, f, powers) {
			return f
		}
	}
}

// annihilates says whether f(g) = 0 for the powers of g.
func annihilates(w *algebra.Work, A Arith, f *Poly, powers []*Poly) bool {
	z, e := new(Poly), make(Elem, A.Width())
	for i := range f.N {
		A.Coeff(e, f, i)
		A.AddScaled(w, z, powers[i], e)
	}
	return z.IsZero()
}
