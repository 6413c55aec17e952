package field

import (
	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
)

// someIsomorphism is an isomorphism from the standard field S to a field K of
// the same order. Which one depends on K.
//
// No polynomial of the degree of K is split on the way: the generators of the
// subfields of prime power degree are found by steps of prime degree, each a
// root of a polynomial over the field of the step before, and g_n is put
// together from them as the rule of standard.go says.
func someIsomorphism(w *algebra.Work, S, K *Field) *Map {
	F := S.prime
	var images []Elem
	for _, q := range integer.FactorInt(S.absolute) {
		below := newMap(F, K, K.One(), nil)
		below.included = true
		for e := 1; e <= q.E; e++ {
			part := standardField(w, F, power(q.P, e))
			f, _ := part.Generator().MinimalPolynomial(w, below.from)
			r := poly.Root1(w, K.arith, f.Map(w, below).f)
			if r == nil {
				algebra.Fail(errSubfield)
			}
			below = newMap(part, K, Elem{K, r}, nil)
		}
		images = append(images, below.image)
	}
	return newMap(S, K, assemble(w, F, S.absolute, K, images), nil)
}
