package ratpoly

import (
	"math/big"

	"adjoin/algebra"
)

// References:
//
//	[Sturm] C. Sturm, Mémoire sur la résolution des équations numériques, 1835.
//	[BPR] S. Basu, R. Pollack, M.-F. Roy, Algorithms in Real Algebraic Geometry,
//	  2nd edition 2006, section 2.2.2: the theorem and its proof.

// RealRoots is the number of distinct real roots of f, which is not zero
// [Sturm].
func (f Poly) RealRoots(w *algebra.Work) int {
	low, high := 0, 0
	var before, after int
	for _, g := range f.sturm(w) {
		lead := g[len(g)-1].Sign()
		low += changes(&before, lead*(1-(len(g)-1)%2*2)) // far to the left
		high += changes(&after, lead)
	}
	return low - high
}

// RealRootsIn is the number of distinct real roots x of f, which is not zero,
// with a < x <= b.
func (f Poly) RealRootsIn(w *algebra.Work, a, b *big.Rat) int {
	if a.Cmp(b) >= 0 {
		return 0
	}
	low, high := 0, 0
	var before, after int
	for _, g := range f.sturm(w) {
		low += changes(&before, Poly{g, nil}.Eval(w, a).Sign())
		high += changes(&after, Poly{g, nil}.Eval(w, b).Sign())
	}
	return low - high
}

// changes counts one change of sign when sign differs from the last one that
// was not zero.
func changes(last *int, sign int) int {
	if sign == 0 {
		return 0
	}
	changed := *last == -sign
	*last = sign
	if changed {
		return 1
	}
	return 0
}

// sturm is Sturm's sequence of the squarefree part of f: each member is a
// positive multiple of minus the remainder of the two before it.
func (f Poly) sturm(w *algebra.Work) [][]*big.Int {
	a := primitive(f.c)
	if len(a) <= 1 {
		return [][]*big.Int{a}
	}
	b := Poly{a, nil}.Derivative()
	a, _, _ = divInts(w, a, gcd(w, a, b.Primitive().c))
	list := [][]*big.Int{a}
	for g := (Poly{a, nil}).Derivative(); !g.IsZero(); {
		// Content is positive, so the sign stays.
		g = g.Scale(new(big.Rat).Inv(g.Content()))
		list = append(list, g.c)
		_, r := Poly{a, nil}.DivRem(w, g)
		a, g = g.c, r.Neg()
	}
	return list
}
