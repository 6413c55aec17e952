package field

import (
	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Elements as vectors over the prime field. Every field homomorphism is linear
// over F_p, so that once the images of a basis are known, applying it and
// finding preimages is linear algebra. A vector is a polynomial over F_p whose
// coefficients are the coordinates: packed bits stay packed.

// vector has the coordinates of e over F_p: those of the coordinate of g^i
// over the base, from i = 0 on, one after another.
func (s *structure) vector(e poly.Elem) *poly.Poly {
	if s.base == nil {
		return poly.Constant(s.arith, e)
	}
	f := s.ext.ToPoly(e)
	if s.base.base == nil {
		return f
	}
	P, B := s.prime.arith, s.base
	z, c := new(poly.Poly), make(poly.Elem, B.arith.Width())
	for i := f.N - 1; i >= 0; i-- {
		B.arith.Coeff(c, f, i)
		P.Shift(z, z, B.absolute)
		P.Add(z, z, B.vector(c))
	}
	return z
}

// fromVector sets z to the element with the given coordinates over F_p.
func (s *structure) fromVector(w *algebra.Work, z poly.Elem, v *poly.Poly) {
	if s.base == nil {
		s.arith.Coeff(z, v, 0)
		return
	}
	if s.base.base == nil {
		s.ext.FromPoly(w, z, v)
		return
	}
	B := s.base
	f, part, c := new(poly.Poly), new(poly.Poly), make(poly.Elem, B.arith.Width())
	for i := s.n - 1; i >= 0; i-- {
		s.prime.arith.Slice(part, v, i*B.absolute, (i+1)*B.absolute)
		B.fromVector(w, c, part)
		B.arith.SetCoeff(f, i, c)
	}
	s.ext.FromPoly(w, z, f)
}

// span finds combinations: for vectors r_0, ..., r_(k-1) of length n, linearly
// independent over F_p, it answers which combination a given vector is.
//
// Its rows are combinations of r_i + x^(n+i), brought to echelon form by their
// lowest coefficients: what is left beyond x^n says which combination.
type span struct {
	P      poly.Arith
	n, k   int
	rows   []*poly.Poly
	pivots []int
}

// newSpan brings the vectors to echelon form. ok is false when they are
// linearly dependent.
func newSpan(w *algebra.Work, P poly.Arith, n int, vectors []*poly.Poly) (s *span, ok bool) {
	s = &span{P: P, n: n, k: len(vectors)}
	c := make(poly.Elem, P.Width())
	for i, r := range vectors {
		w.Poll()
		t := poly.Monomial(P, P.One(), n+i)
		P.Add(t, t, r)
		s.reduce(w, t)
		pivot := 0
		for P.Coeff(c, t, pivot); poly.IsZeroElem(c); P.Coeff(c, t, pivot) {
			pivot++
		}
		if pivot >= n {
			return nil, false
		}
		P.InvElem(w, c, c)
		P.Scale(w, t, t, c)
		s.rows, s.pivots = append(s.rows, t), append(s.pivots, pivot)
	}
	return s, true
}

// reduce clears the pivots of t.
func (s *span) reduce(w *algebra.Work, t *poly.Poly) {
	c := make(poly.Elem, s.P.Width())
	for i, r := range s.rows {
		s.P.Coeff(c, t, s.pivots[i])
		if !poly.IsZeroElem(c) {
			s.P.NegElem(c, c)
			s.P.AddScaled(w, t, r, c)
		}
	}
}

// solve is the vector of the c_i with v = sum c_i r_i; ok is false when v is
// not in the span.
func (s *span) solve(w *algebra.Work, v *poly.Poly) (c *poly.Poly, ok bool) {
	t, low := poly.Clone(v), new(poly.Poly)
	s.reduce(w, t)
	s.P.Slice(low, t, 0, s.n)
	if !low.IsZero() {
		return nil, false
	}
	s.P.Slice(t, t, s.n, s.n+s.k)
	s.P.Neg(t, t)
	return t, true
}

// combine is sum c_i r_i for the coefficients c_i of c.
func combine(w *algebra.Work, P poly.Arith, c *poly.Poly, r []*poly.Poly) *poly.Poly {
	z, e := new(poly.Poly), make(poly.Elem, P.Width())
	for i := range c.N {
		P.Coeff(e, c, i)
		if !poly.IsZeroElem(e) {
			P.AddScaled(w, z, r[i], e)
		}
	}
	return z
}
