package poly

import (
	"sort"

	"adjoin/algebra"
)

// References:
//
//	[Berlekamp] E. Berlekamp, Factoring polynomials over large finite fields,
//	  1970: separation of roots by the trace.
//	[Rabin] M. Rabin, Probabilistic algorithms in finite fields, 1980, section
//	  3: the roots in K are those of gcd(x^q - x, f).

// Root is a root with its multiplicity.
type Root struct {
	A Elem
	E int
}

// Roots is the list of the roots of f, not zero, in K, in the order of their
// codes.
func Roots(w *algebra.Work, A Arith, f *Poly) []Root {
	var list []Root
	for _, s := range Squarefree(w, A, f) {
		for _, g := range linear(w, A, s.F) {
			e := Coeff(A, g, 0)
			A.NegElem(e, e)
			list = append(list, Root{e, s.E})
		}
	}
	sort.Slice(list, func(i, j int) bool { return CompareElem(A, list[i].A, list[j].A) < 0 })
	return list
}

// linear is the list of the linear factors of a squarefree monic f.
func linear(w *algebra.Work, A Arith, f *Poly) []*Poly {
	var list []*Poly
	s := newSplitting(w, A, f)
	var split func(f *Poly)
	split = func(f *Poly) {
		switch f.N {
		case 0, 1:
		case 2:
			list = append(list, f)
		default:
			g, h := s.halve(w, f)
			split(g)
			split(h)
		}
	}
	split(s.f)
	return list
}

// Root1 is one root of f, not zero, in K, and nil when there is none. The
// smaller part is split again until it is linear, which is much less work than
// all roots. Which root it is depends on f alone.
func Root1(w *algebra.Work, A Arith, f *Poly) Elem {
	if f.N <= 1 {
		return nil
	}
	f, _ = Monic(w, A, f)
	s := newSplitting(w, A, f)
	g := s.f
	for g.N > 2 {
		a, b := s.halve(w, g)
		if g = a; b.N < a.N {
			g = b
		}
	}
	if g.N < 2 {
		return nil
	}
	g, _ = Monic(w, A, g)
	e := Coeff(A, g, 0)
	A.NegElem(e, e)
	return e
}
