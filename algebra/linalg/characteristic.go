package linalg

import (
	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// References:
//
//	[Cohen] H. Cohen, A Course in Computational Algebraic Number Theory, 1993,
//	  algorithm 2.2.9: the characteristic polynomial by Hessenberg form.

// CharacteristicPolynomial is det(x - m) for a square matrix: monic, of degree
// the size of m [Cohen].
func (m *Matrix) CharacteristicPolynomial(w *algebra.Work) *poly.Poly {
	A, h := m.A, m.Clone()
	h.hessenberg(w)
	// p[k] is the characteristic polynomial of the first k rows and columns:
	// p[k] = (x - h_kk) p[k-1] - sum over i < k of h_ik s p[i-1], where s is the
	// product of the entries below the diagonal from row i+1 to row k.
	p := make([]*poly.Poly, len(m.Rows)+1)
	p[0] = poly.One(A)
	e, s := make(poly.Elem, A.Width()), make(poly.Elem, A.Width())
	for k := range len(m.Rows) {
		f := new(poly.Poly)
		A.Shift(f, p[k], 1)
		copy(s, A.One())
		for i := k; ; i-- {
			w.Poll()
			A.Coeff(e, h.Rows[i], k)
			A.MulElem(w, e, e, s)
			A.NegElem(e, e)
			A.AddScaled(w, f, p[i], e)
			if i == 0 {
				break
			}
			A.Coeff(e, h.Rows[i], i-1)
			A.MulElem(w, s, s, e)
			if poly.IsZeroElem(s) {
				break
			}
		}
		p[k+1] = f
	}
	return p[len(m.Rows)]
}

// hessenberg replaces m by a similar matrix that is zero below the entries next
// below the diagonal.
func (m *Matrix) hessenberg(w *algebra.Work) {
	A := m.A
	e, c, t := make(poly.Elem, A.Width()), make(poly.Elem, A.Width()), make(poly.Elem, A.Width())
	for j := 0; j+2 < len(m.Rows); j++ {
		i := m.pivot(e, j+1, j)
		if i == len(m.Rows) {
			continue
		}
		if i != j+1 {
			m.Rows[i], m.Rows[j+1] = m.Rows[j+1], m.Rows[i]
			for _, r := range m.Rows {
				A.Coeff(c, r, i)
				A.Coeff(t, r, j+1)
				A.SetCoeff(r, i, t)
				A.SetCoeff(r, j+1, c)
			}
		}
		// Row i gets -u_i times row j+1, which is undone on the other side by
		// adding u_i times column i to column j+1, for all i at once.
		A.InvElem(w, e, e)
		u := new(poly.Poly)
		for k := len(m.Rows) - 1; k > j+1; k-- {
			w.Poll()
			A.Coeff(c, m.Rows[k], j)
			if poly.IsZeroElem(c) {
				continue
			}
			A.MulElem(w, c, c, e)
			A.SetCoeff(u, k, c)
			A.NegElem(c, c)
			A.AddScaled(w, m.Rows[k], m.Rows[j+1], c)
		}
		for _, r := range m.Rows {
			w.Poll()
			A.Dot(w, t, r, u)
			A.Coeff(c, r, j+1)
			A.AddElem(c, c, t)
			A.SetCoeff(r, j+1, c)
		}
	}
}
