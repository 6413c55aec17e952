package field

import (
	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// leastRoot is the root of f with the least code. f is irreducible over the
// subfield with p^d elements and splits where its coefficients lie, so that
// its roots are the conjugates of any one of them.
func leastRoot(w *algebra.Work, f Polynomial, d int) Elem {
	g := Elem{f.k, poly.Root1(w, f.k.arith, f.f)}
	least := g
	for range f.Degree() - 1 {
		w.Poll()
		if g = g.Frobenius(w, d); Compare(g, least) < 0 {
			least = g
		}
	}
	return least
}
