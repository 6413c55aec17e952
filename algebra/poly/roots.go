package poly

import (
	"sort"

	"adjoin/algebra"
)

// References:
//
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
func linear(w *algebra.Work, A Arith, f *Poly) []*Poly { return EqualDegree(w, A, split(w, A, f), 1) }

// split is the product of x - a over the different roots a of f in K, not
// zero.
func split(w *algebra.Work, A Arith, f *Poly) *Poly {
	if f.N <= 1 {
		return One(A)
	}
	h := new(Poly)
	A.Sub(h, FrobeniusMod(w, A, f), X(A))
	return GCD(w, A, f, h)
}

// Root1 is one root of f, not zero, in K, and nil when there is none. The
// smaller part is split again until it is linear, which is much less work than
// all roots. Which root it is depends on f alone.
func Root1(w *algebra.Work, A Arith, f *Poly) Elem {
	g := split(w, A, f)
	if g.N <= 1 {
		return nil
	}
	r := seeded(g)
	for g.N > 2 {
		a, b := newFrobenius(w, A, g).halve(w, r, 1)
		if g = a; b.N < a.N {
			g = b
		}
		g, _ = Monic(w, A, g)
	}
	e := Coeff(A, g, 0)
	A.NegElem(e, e)
	return e
}
