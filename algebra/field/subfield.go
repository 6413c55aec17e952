package field

import (
	"fmt"

	"adjoin/algebra"
	"adjoin/algebra/integer"
)

// References:
//
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997, theorem 2.6:
//	  a field of p^n elements has one subfield of p^d for each d | n, and no
//	  others.

// Subfield is a subfield of a field L.
type Subfield struct {
	Degree            int        // over F_p
	Field             *Field     // a presentation of it, see SubfieldOf
	Into              *Map       // its fixed embedding into L
	Generator         Elem       // over F_p: the image of the generator of Field, in L
	MinimalPolynomial Polynomial // of that, over F_p
}

// Subfields lists all subfields of L by increasing degree, the prime field and
// L itself included: one for each divisor of the absolute degree [LN].
func Subfields(w *algebra.Work, L *Field) (list []*Subfield, err error) {
	defer algebra.Catch(&err)
	for _, d := range integer.DivisorsInt(L.absolute) {
		w.Poll()
		s, err := SubfieldOf(w, L, d)
		if err != nil {
			return nil, err
		}
		list = append(list, s)
	}
	return list, nil
}

// SubfieldOf is the subfield of L of absolute degree d. Its presentation is
// L itself or the field in the tower of L that has this degree, if its
// generator generates it over F_p, and the standard field otherwise. It is an
// error of kind Mismatch when d does not divide the absolute degree of L.
func SubfieldOf(w *algebra.Work, L *Field, d int) (s *Subfield, err error) {
	defer algebra.Catch(&err)
	for F := L; F != nil; F = F.base {
		if F.absolute == d && (F.base == nil || F.base.base == nil || F.Generator().degreeOver(w, 1) == d) {
			m := inclusion(w, F, L)
			return &Subfield{d, F, m, m.image, F.Generator().minimalOverPrime(w)}, nil
		}
	}
	K, err := Standard(w, L.p, d)
	if err != nil {
		return nil, err
	}
	m, err := Embed(w, K, L)
	if err != nil {
		return nil, err
	}
	return &Subfield{d, K, m, m.image, K.Modulus()}, nil
}

// IsSubfield says whether L has a subfield isomorphic to K; it has at most
// one. The witness is the fixed embedding.
func IsSubfield(w *algebra.Work, K, L *Field) (v algebra.Verdict, err error) {
	source := "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.6"
	switch {
	case K.p.Cmp(L.p) != 0:
		return algebra.Because(false, "the characteristics %s and %s differ", K.p, L.p), nil
	case L.absolute%K.absolute != 0:
		v = algebra.Because(false, "%s = %s^%d and %s = %s^%d, and %d does not divide %d", K.orderText(), K.p, K.absolute, L.orderText(), L.p, L.absolute, K.absolute, L.absolute)
		v.Evidence.Source = source
		return v, nil
	}
	m, err := Embed(w, K, L)
	if err != nil {
		return v, err
	}
	v = algebra.Because(true, "%d divides %d", K.absolute, L.absolute)
	v.Evidence.Source = source
	v.Evidence = v.Evidence.With(fmt.Sprintf("root of %s", K.Modulus()), m.image)
	return v, nil
}

// Compositum is the smallest field in which K and L lie along the fixed
// embeddings: see Common.
func Compositum(w *algebra.Work, K, L *Field) (*Field, error) {
	M, _, _, err := Common(w, K, L)
	return M, err
}

// Intersection is the largest field that lies in both K and L: K or L where it
// is one of them, and the standard field otherwise. It is an error of kind
// Mismatch when the characteristics differ.
func Intersection(w *algebra.Work, K, L *Field) (*Field, error) {
	if K.p.Cmp(L.p) != 0 {
		_, err := Embed(w, K, L)
		return nil, err
	}
	switch d := gcd(K.absolute, L.absolute); {
	case d == K.absolute && (d != L.absolute || inTower(K, L)):
		return K, nil
	case d == L.absolute:
		return L, nil
	default:
		return Standard(w, K.p, d)
	}
}
