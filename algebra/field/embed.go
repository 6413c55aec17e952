package field

import (
	"fmt"
	"math/big"

	"adjoin/algebra"
)

// References:
//
//	[BCS] W. Bosma, J. Cannon, A. Steel, Lattices of compatibly embedded finite
//	  fields, 1997: presentations of users joined to one lattice.

// Embed is the fixed embedding of K into L:
//
//   - the inclusion, when K is in the tower that L was made by;
//   - the one that standard.go fixes, between standard fields;
//   - otherwise through the standard fields, which K and L join as Standardize
//     says.
//
// The fixed embeddings of a chain compose. It is an error of kind Mismatch when
// the characteristics differ or the degree of K does not divide that of L.
func Embed(w *algebra.Work, K, L *Field) (m *Map, err error) {
	defer algebra.Catch(&err)
	switch {
	case K.p.Cmp(L.p) != 0:
		return nil, algebra.Errorf(algebra.Mismatch, "there is no map between fields of characteristic %s and %s: 1 added to itself %s times is zero in one of them only", K.p, L.p, K.p)
	case inTower(K, L):
		return inclusion(w, K, L), nil
	case L.absolute%K.absolute != 0:
		return nil, algebra.Errorf(algebra.Mismatch, "the field of %s elements does not embed in the field of %s: %d does not divide %d", K.orderText(), L.orderText(), K.absolute, L.absolute).
			WithRemedy("both lie in the field of %s", orderText(K.p, lcm(K.absolute, L.absolute)))
	case K.standard && L.standard:
		return standardMap(w, K, L)
	}
	up, err := Standardize(w, K)
	if err != nil {
		return nil, err
	}
	down, err := Standardize(w, L)
	if err != nil {
		return nil, err
	}
	across, err := standardMap(w, up.to, down.to)
	if err != nil {
		return nil, err
	}
	back, err := down.Inverse(w)
	if err != nil {
		return nil, err
	}
	return up.Then(w, across).Then(w, back).between(K, L), nil
}

// Standardize is the fixed isomorphism from K to the standard field of its
// order. For K = B(a) it extends that of B, followed by the fixed embedding of
// standard fields, and sends a to the root of the image of its minimal
// polynomial that has the least code. On a standard field it is the identity.
func Standardize(w *algebra.Work, K *Field) (m *Map, err error) {
	defer algebra.Catch(&err)
	K.mu.Lock()
	m = K.fixed
	K.mu.Unlock()
	if m != nil {
		return m, nil
	}
	S, err := Standard(w, K.p, K.absolute)
	if err != nil {
		return nil, err
	}
	if Same(K, S) {
		m = inclusion(w, K, S)
	} else if m, err = standardize(w, K, S); err != nil {
		return nil, err
	}
	K.mu.Lock()
	defer K.mu.Unlock()
	K.fixed = m
	return m, nil
}

// standardize finds the map that Standardize describes from any isomorphism
// and the conjugates of the image of the generator.
func standardize(w *algebra.Work, K, S *Field) (*Map, error) {
	m, err := someIsomorphism(w, S, K).Inverse(w)
	if err != nil {
		return nil, err
	}
	if m.base != nil {
		base, err := Embed(w, K.base, S)
		if err != nil {
			return nil, err
		}
		f := frobenius(w, S, 1)
		for !m.base.Equal(w, base) {
			w.Poll()
			m = m.Then(w, f)
		}
	}
	least := m.image
	for i, a := 1, m.image; i < K.n; i++ {
		w.Poll()
		if a = a.Frobenius(w, K.base.absolute); Compare(a, least) < 0 {
			least = a
		}
	}
	return newMap(K, S, least, m.base), nil
}

// Embeddings lists all homomorphisms from K to L, as many as the absolute
// degree n of K: x -> m(x)^(p^i) for the fixed embedding m and i = 0, ..., n-1.
// The errors are those of Embed.
func Embeddings(w *algebra.Work, K, L *Field) (list []*Map, err error) {
	defer algebra.Catch(&err)
	m, err := Embed(w, K, L)
	if err != nil {
		return nil, err
	}
	for i := range K.absolute {
		w.Poll()
		list = append(list, twist(w, m, i))
	}
	return list, nil
}

// Automorphisms lists the automorphisms of L that fix its subfield K: the
// powers of Frobenius, beginning with the identity.
func Automorphisms(w *algebra.Work, L, K *Field) (list []*Map, err error) {
	defer algebra.Catch(&err)
	if err := below(K, L); err != nil {
		return nil, err
	}
	for i := 0; i < L.absolute; i += K.absolute {
		list = append(list, frobenius(w, L, i))
	}
	return list, nil
}

// Isomorphism is the fixed isomorphism from K to L. Fields of different orders
// give an error of kind Mismatch. Embeddings has the other isomorphisms.
func Isomorphism(w *algebra.Work, K, L *Field) (*Map, error) {
	if K.p.Cmp(L.p) == 0 && K.absolute != L.absolute {
		return nil, algebra.Errorf(algebra.Mismatch, "fields of %s and of %s elements are not isomorphic", K.orderText(), L.orderText())
	}
	return Embed(w, K, L)
}

// Common is where the elements of K and L meet, with the fixed embeddings of
// both: the larger field when the degree of one divides that of the other; of
// two presentations of equal degree, the one that stands higher in a tower, or
// the standard field; and otherwise the standard field that is their
// compositum. It is an error of kind Mismatch when the characteristics differ.
func Common(w *algebra.Work, K, L *Field) (M *Field, f, g *Map, err error) {
	if K.p.Cmp(L.p) != 0 {
		_, err = Embed(w, K, L)
		return nil, nil, nil, err
	}
	switch {
	case inTower(L, K):
		M = K
	case inTower(K, L):
		M = L
	case K.absolute == L.absolute:
		M, err = Standard(w, K.p, K.absolute)
	case L.absolute%K.absolute == 0:
		M = L
	case K.absolute%L.absolute == 0:
		M = K
	default:
		M, err = Standard(w, K.p, lcm(K.absolute, L.absolute))
	}
	if err != nil {
		return nil, nil, nil, err
	}
	if f, err = Embed(w, K, M); err != nil {
		return nil, nil, nil, err
	}
	g, err = Embed(w, L, M)
	return M, f, g, err
}

// Combine moves two elements to the field where they meet: see Common.
func Combine(w *algebra.Work, a, b Elem) (x, y Elem, err error) {
	defer algebra.Catch(&err)
	if Same(a.k, b.k) {
		return a, Elem{a.k, b.w}, nil
	}
	_, f, g, err := Common(w, a.k, b.k)
	if err != nil {
		return Elem{}, Elem{}, err
	}
	return f.Apply(w, a), g.Apply(w, b), nil
}

// mismatch is the error for elements of two fields in one operation.
func mismatch(K, L *Field) *algebra.Error {
	switch {
	case K.p.Cmp(L.p) != 0:
		return algebra.Errorf(algebra.Mismatch, "elements of characteristic %s and of characteristic %s do not combine", K.p, L.p)
	case K.absolute == L.absolute:
		return algebra.Errorf(algebra.Mismatch, "the elements lie in two presentations of the field of %s elements, by %s and by %s, with %d isomorphisms between them", K.orderText(), K.Modulus(), L.Modulus(), K.absolute).
			WithRemedy("move one of them along an isomorphism")
	}
	return algebra.Errorf(algebra.Mismatch, "the elements lie in the fields of %s elements, by %s, and of %s elements, by %s", K.orderText(), K.Modulus(), L.orderText(), L.Modulus()).
		WithRemedy("move both into one field along an embedding")
}

// below says why K is not a subfield of L, if it is not.
func below(K, L *Field) error {
	if K.p.Cmp(L.p) == 0 && L.absolute%K.absolute == 0 {
		return nil
	}
	if K.p.Cmp(L.p) != 0 {
		return algebra.Errorf(algebra.Mismatch, "a field of characteristic %s is not below one of characteristic %s", K.p, L.p)
	}
	return algebra.Errorf(algebra.Mismatch, "the field of %s elements is not a subfield of that of %s: %d does not divide %d", K.orderText(), L.orderText(), K.absolute, L.absolute)
}

func (K *Field) orderText() string { return orderText(K.p, K.absolute) }

// orderText writes p^n out when that is short.
func orderText(p *big.Int, n int) string {
	if n == 1 {
		return p.String()
	}
	if p.BitLen()*n <= 32 {
		return new(big.Int).Exp(p, big.NewInt(int64(n)), nil).String()
	}
	return fmt.Sprintf("%s^%d", p, n)
}

func lcm(a, b int) int { return a / gcd(a, b) * b }
