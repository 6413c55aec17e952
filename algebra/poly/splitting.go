package poly

import (
	"math/big"
	"math/rand/v2"

	"adjoin/algebra"
)

// ground is what an Arith says when it is an extension of another one. With it,
// polynomials whose coefficients lie lower down are worked on there.
type ground interface {
	Arith
	Base() Arith
	ToPoly(a Elem) *Poly
	FromPoly(w *algebra.Work, z Elem, f *Poly)
}

// descend is f over the lowest field of the tower below A where its
// coefficients lie, and the extensions from there up, the highest first.
func descend(A Arith, f *Poly) (B Arith, g *Poly, up []ground) {
	for {
		e, ok := A.(ground)
		if !ok {
			return A, f, up
		}
		below := new(Poly)
		for i := f.N - 1; i >= 0; i-- {
			c := e.ToPoly(Coeff(A, f, i))
			if c.N > 1 {
				return A, f, up
			}
			e.Base().SetCoeff(below, i, Coeff(e.Base(), c, 0))
		}
		A, f, up = e.Base(), below, append(up, e)
	}
}

// lift undoes descend.
func lift(w *algebra.Work, up []ground, f *Poly) *Poly {
	for i := len(up) - 1; i >= 0; i-- {
		e := up[i]
		above, c := new(Poly), make(Elem, e.Width())
		for j := f.N - 1; j >= 0; j-- {
			e.FromPoly(w, c, Constant(e.Base(), Coeff(e.Base(), f, j)))
			e.SetCoeff(above, j, c)
		}
		f = above
	}
	return f
}

// splitting takes a product of different linear factors apart.
//
// When its coefficients lie in a smaller field B with r elements, the powers
// x^(r^j) modulo f are found there, and the trace to B of c x,
// sum_j c^(r^j) x^(r^j), costs next to nothing for any c in K [Berlekamp].
type splitting struct {
	A, B       Arith
	f          *Poly   // the product of x - a over the roots a in K
	conjugates []*Poly // x^(r^j) mod f; nil when B is A
	random     *rand.Rand
}

// newSplitting is for a squarefree or other monic f, not constant.
func newSplitting(w *algebra.Work, A Arith, f *Poly) *splitting {
	s := &splitting{A: A, f: f}
	if f.N <= 2 {
		return s
	}
	B, g, up := descend(A, f)
	s.B = B
	fr := newFrobenius(w, B, g)
	n := A.Degree() / B.Degree()
	h := new(Poly)
	B.Sub(h, fr.power(w, n), fr.x)
	g = GCD(w, B, g, h)
	s.f = lift(w, up, g)
	s.random = seeded(s.f)
	if n == 1 || g.N <= 2 {
		return s
	}
	fr = fr.modulo(w, g)
	h = fr.x
	for range n {
		w.Poll()
		s.conjugates = append(s.conjugates, lift(w, up, h))
		h = fr.next(w, h)
	}
	return s
}

// halve is a factorization of f, of degree at least 2, into two.
func (s *splitting) halve(w *algebra.Work, f *Poly) (g, h *Poly) {
	A := s.A
	fr := newFrobenius(w, A, f)
	if s.conjugates == nil {
		return fr.halve(w, s.random, 1)
	}
	for {
		c, t := RandomElem(A, s.random), new(Poly)
		for _, x := range s.conjugates {
			A.AddScaled(w, t, x, c)
			A.FrobeniusElem(w, c, c, s.B.Degree())
		}
		// A shift, for roots a and b a with b in B: their traces differ by b.
		A.SetInt(c, new(big.Int).SetUint64(s.random.Uint64()))
		A.Add(t, t, Constant(A, c))
		fr.M.Reduce(w, t, t)
		if g, h = parts(w, A, f, character(w, A, fr.M, t, s.B)); g != nil {
			return g, h
		}
	}
}
