package field

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Basis is an ordered basis of a field L as a vector space over a subfield K.
// It is immutable.
type Basis struct {
	into     *Map   // K into L
	elements []Elem // of L
	span     *span  // of the b_i k_j, for the basis k_j of K over F_p
}

// NewBasis is the basis of L over K with the given elements of L, in that
// order. It is an error of kind Invalid when they are not a basis.
func NewBasis(w *algebra.Work, L, K *Field, elements []Elem) (b *Basis, err error) {
	defer algebra.Catch(&err)
	m, err := Embed(w, K, L)
	if err != nil {
		return nil, err
	}
	n := L.absolute / K.absolute
	if len(elements) != n {
		return nil, algebra.Errorf(algebra.Invalid, "a basis of the field of %s elements over that of %s has %d elements, not %d", L.orderText(), K.orderText(), n, len(elements))
	}
	b = &Basis{into: m, elements: append([]Elem(nil), elements...)}
	scalars := make([]Elem, K.absolute)
	for j, v := range m.prepare(w) {
		scalars[j] = L.fromVectorElem(w, v)
	}
	var vectors []*poly.Poly
	for i, x := range elements {
		if !Same(x.k, L) {
			return nil, mismatch(x.k, L)
		}
		b.elements[i] = Elem{L, x.w}
		for _, k := range scalars {
			vectors = append(vectors, L.vector(x.Mul(w, k).w))
		}
	}
	var ok bool
	if b.span, ok = newSpan(w, L.prime.arith, L.absolute, vectors); !ok {
		return nil, algebra.Errorf(algebra.Invalid, "the elements are linearly dependent over the field of %s elements", K.orderText())
	}
	return b, nil
}

// PowerBasis is 1, c, ..., c^(n-1) for a generator c of L over K: that of L
// when it serves, and otherwise the first of Scattered that does.
func PowerBasis(w *algebra.Work, L, K *Field) (b *Basis, err error) {
	defer algebra.Catch(&err)
	if err := below(K, L); err != nil {
		return nil, err
	}
	n := L.absolute / K.absolute
	c := L.Generator()
	if c.degreeOver(w, K.absolute) < n {
		for c = range L.Scattered {
			if c.degreeOver(w, K.absolute) == n {
				break
			}
		}
	}
	elements := []Elem{L.One()}
	for i := 1; i < n; i++ {
		elements = append(elements, elements[i-1].Mul(w, c))
	}
	return NewBasis(w, L, K, elements)
}

// NormalBasis is c, c^|K|, c^(|K|^2), ... for the first of Scattered that is
// normal over K. Normal elements are frequent, but those of small code may lie
// in a subspace that has none.
func NormalBasis(w *algebra.Work, L, K *Field) (b *Basis, err error) {
	defer algebra.Catch(&err)
	if err := below(K, L); err != nil {
		return nil, err
	}
	for c := range L.Scattered {
		w.Poll()
		if v, err := c.IsNormal(w, K); err != nil {
			return nil, err
		} else if v.Holds {
			return NewBasis(w, L, K, c.conjugates(w, K.absolute))
		}
	}
	return nil, algebra.Errorf(algebra.Unable, "no normal element was found")
}

// Scattered yields all elements of K in an order without regularity: those of
// the codes a, a+m, a+2m, ... modulo |K|, where a is the largest integer up to
// 2|K|/3 and m the largest up to 4|K|/5 that is prime to |K|. (F. Luebeck,
// Standard generators of finite fields and their cyclic subgroups, 2023, takes
// pseudo-random elements in this order.)
func (K *Field) Scattered(yield func(Elem) bool) {
	q, one := K.Order(), big.NewInt(1)
	a := new(big.Int).Mul(q, big.NewInt(2))
	a.Div(a, big.NewInt(3))
	m := new(big.Int).Mul(q, big.NewInt(4))
	m.Div(m, big.NewInt(5))
	for new(big.Int).GCD(nil, nil, m, q).Cmp(one) != 0 {
		m.Sub(m, one)
	}
	for i := new(big.Int); i.Cmp(q) < 0; i.Add(i, one) {
		if !yield(K.Element(a)) {
			return
		}
		a.Add(a, m).Mod(a, q)
	}
}

// Elements lists the basis.
func (b *Basis) Elements() []Elem { return append([]Elem(nil), b.elements...) }

// Field is L, Over is K.
func (b *Basis) Field() *Field { return b.into.to }
func (b *Basis) Over() *Field  { return b.into.from }

// Coordinates are the c_i in K with a = sum c_i b_i, for a in L.
func (b *Basis) Coordinates(w *algebra.Work, a Elem) []Elem {
	if !Same(a.k, b.into.to) {
		algebra.Fail(mismatch(a.k, b.into.to))
	}
	v, _ := b.span.solve(w, b.into.to.vector(a.w))
	K := b.into.from
	c := make([]Elem, len(b.elements))
	for i := range c {
		part := new(poly.Poly)
		K.prime.arith.Slice(part, v, i*K.absolute, (i+1)*K.absolute)
		c[i] = K.fromVectorElem(w, part)
	}
	return c
}

// Combine is sum c_i b_i for c_i in K.
func (b *Basis) Combine(w *algebra.Work, c []Elem) Elem {
	z := b.into.to.Zero()
	for i, x := range c {
		z = z.Add(b.into.Apply(w, x).Mul(w, b.elements[i]))
	}
	return z
}
