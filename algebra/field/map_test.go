package field_test

import (
	"math/big"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// TestNumberOfIsomorphisms has the published counts of R. Lidl, H.
// Niederreiter, Finite Fields, 1997, theorem 2.21: as many as the degree.
func TestNumberOfIsomorphisms(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	for _, c := range []struct {
		f, g []int
		n    int
	}{
		{[]int{8, 4, 3, 1, 0}, []int{8, 4, 3, 2, 0}, 8},
		{[]int{5, 2, 0}, []int{5, 3, 0}, 5},
	} {
		K := must(field.Adjoin(w, F, fromExponents(F, c.f), "a"))
		L := must(field.Adjoin(w, F, fromExponents(F, c.g), "b"))
		maps := must(field.Embeddings(w, K, L))
		if len(maps) != c.n {
			t.Errorf("%d isomorphisms, not %d", len(maps), c.n)
		}
		images := map[string]bool{}
		for _, m := range maps {
			if !must(K.Modulus().In(w, L)).Eval(w, m.Image()).IsZero() {
				t.Errorf("%s is no root of %s", m.Image(), K.Modulus())
			}
			images[m.Image().String()] = true
			if n := must(field.NewMap(w, K, L, m.Image())); !n.Equal(w, m) {
				t.Error("the map with this image is another one")
			}
			inverse := must(m.Inverse(w))
			if !m.Then(w, inverse).Equal(w, must(field.Embed(w, K, K))) || !m.Compose(w, inverse).Equal(w, must(field.Embed(w, L, L))) {
				t.Error("the inverse is none")
			}
		}
		if len(images) != c.n {
			t.Errorf("%d different images, not %d", len(images), c.n)
		}
		if _, err := field.NewMap(w, K, L, L.One()); !isKind(err, algebra.Invalid) {
			t.Errorf("a map with the image 1: %v", err)
		}
	}
}

// TestMapsAreHomomorphisms checks all embeddings into fields over different
// bases, and preimages.
func TestMapsAreHomomorphisms(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 111)
	B := adjoin(w, standard(w, 2, 1), "a", 1, 1, 1)
	L := above(w, adjoin(w, B, "b", 1, 1, 0, 1), "c", 2, 40) // of degree 12
	for _, K := range []*field.Field{standard(w, 2, 1), B, adjoin(w, B, "b", 1, 1, 0, 1), standard(w, 2, 6), standard(w, 2, 12), above(w, standard(w, 2, 1), "d", 4, 5)} {
		maps := must(field.Embeddings(w, K, L))
		if len(maps) != K.AbsoluteDegree() {
			t.Fatalf("%d embeddings of degree %d", len(maps), K.AbsoluteDegree())
		}
		for i, m := range maps {
			a, b := element(r, K), element(r, K)
			x, y := m.Apply(w, a), m.Apply(w, b)
			if !m.Apply(w, a.Mul(w, b)).Equal(x.Mul(w, y)) || !m.Apply(w, a.Add(b)).Equal(x.Add(y)) || !m.Apply(w, K.One()).IsOne() {
				t.Errorf("%s, map %d: not a homomorphism", K.Modulus(), i)
			}
			if z, ok := m.Preimage(w, x); !ok || !z.Equal(a) {
				t.Errorf("%s, map %d: preimage of %s is %s, not %s", K.Modulus(), i, x, z, a)
			}
			c := element(r, L)
			if _, ok := m.Preimage(w, c); ok != (K.AbsoluteDegree()%must(c.Degree(w, standard(w, 2, 1))) == 0) {
				t.Errorf("%s, map %d: preimage of %s: %v", K.Modulus(), i, c, ok)
			}
			for _, n := range maps[:i] {
				if m.Equal(w, n) {
					t.Errorf("%s: map %d occurs twice", K.Modulus(), i)
				}
			}
		}
	}
}

func TestFrobenius(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 112)
	for name, L := range samples(w) {
		for K := L; ; K = K.Base() {
			s := field.Frobenius(w, L, K)
			a := element(r, L)
			if !s.Apply(w, a).Equal(must(a.Pow(w, K.Order()))) {
				t.Errorf("%s over %s: Frobenius of %s", name, K.Modulus(), a)
			}
			if n := must(s.Order(w)); n != L.AbsoluteDegree()/K.AbsoluteDegree() {
				t.Errorf("%s over %s: order %d", name, K.Modulus(), n)
			}
			if k := must(s.Exponent(w)); k != K.AbsoluteDegree()%L.AbsoluteDegree() {
				t.Errorf("%s over %s: exponent %d", name, K.Modulus(), k)
			}
			if K.IsPrime() {
				break
			}
		}
	}
	m := must(field.Embed(w, standard(w, 2, 2), standard(w, 2, 4)))
	if _, err := m.Order(w); !isKind(err, algebra.Undefined) {
		t.Errorf("the order of an embedding: %v", err)
	}
	if _, err := m.Inverse(w); !isKind(err, algebra.Undefined) {
		t.Errorf("the inverse of an embedding: %v", err)
	}
}

// TestSubfields has F_4096 (R. Lidl, H. Niederreiter, Finite Fields, 1997,
// theorem 2.6 and its example), and F_8, which F_4 is no subfield of.
func TestSubfields(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	var orders []int64
	for _, s := range must(field.Subfields(w, standard(w, 2, 12))) {
		orders = append(orders, s.Field.Order().Int64())
		if !s.MinimalPolynomial.Map(w, must(field.Embed(w, F, s.Into.To()))).Eval(w, s.Generator).IsZero() || s.MinimalPolynomial.Degree() != s.Degree {
			t.Errorf("degree %d: %s is not the minimal polynomial of %s", s.Degree, s.MinimalPolynomial, s.Generator)
		}
	}
	for i, want := range []int64{2, 4, 8, 16, 64, 4096} {
		if orders[i] != want {
			t.Fatalf("subfields of orders %v", orders)
		}
	}
	// With a^2 = a + 1 and b^3 = b^2 + 1.
	K, L := adjoin(w, F, "a", 1, 1, 1), adjoin(w, F, "b", 1, 0, 1, 1)
	v := must(field.IsSubfield(w, K, L))
	if v.Holds || v.Evidence.Reason != "4 = 2^2 and 8 = 2^3, and 2 does not divide 3" {
		t.Errorf("F_4 in F_8: %v, %s", v.Holds, v.Evidence.Reason)
	}
	if _, err := field.Embed(w, K, L); !isKind(err, algebra.Mismatch) {
		t.Errorf("F_4 in F_8: %v", err)
	}
	if v := must(field.IsSubfield(w, K, standard(w, 2, 4))); !v.Holds || len(v.Evidence.Witness) == 0 {
		t.Errorf("F_4 in F_16: %v", v)
	}
	if v := must(field.IsSubfield(w, standard(w, 3, 1), L)); v.Holds {
		t.Error("F_3 in F_8")
	}
	if M := must(field.Compositum(w, K, L)); M.AbsoluteDegree() != 6 {
		t.Errorf("the compositum of F_4 and F_8 has degree %d", M.AbsoluteDegree())
	}
	if M := must(field.Intersection(w, standard(w, 2, 12), standard(w, 2, 18))); M != standard(w, 2, 6) {
		t.Errorf("the intersection of degrees 12 and 18 has degree %d", M.AbsoluteDegree())
	}
	if M := must(field.Intersection(w, K, L)); M != F {
		t.Errorf("the intersection of F_4 and F_8 has degree %d", M.AbsoluteDegree())
	}
	if M := must(field.Intersection(w, K, standard(w, 2, 4))); M != K {
		t.Errorf("the intersection of F_4 and F_16 is %s", M.Modulus())
	}
}

func TestCommonIsSymmetric(t *testing.T) {
	w := algebra.NewWork(nil)
	list := append(others(w, 2, 6), standard(w, 2, 4), standard(w, 2, 6), standard(w, 2, 12), standard(w, 2, 1))
	for _, K := range list {
		for _, L := range list {
			M, f, g, err := field.Common(w, K, L)
			N, _, _, err2 := field.Common(w, L, K)
			if err != nil || err2 != nil || !field.Same(M, N) {
				t.Fatalf("%s and %s: %v, %v", K.Modulus(), L.Modulus(), err, err2)
			}
			if f.From() != K || g.From() != L || f.To() != M || g.To() != M {
				t.Errorf("%s and %s: the maps go elsewhere", K.Modulus(), L.Modulus())
			}
		}
	}
	if _, _, _, err := field.Common(w, standard(w, 2, 2), standard(w, 3, 2)); !isKind(err, algebra.Mismatch) {
		t.Errorf("characteristics 2 and 3: %v", err)
	}
}

// TestNames checks that a letter changes nothing but the printing.
func TestNames(t *testing.T) {
	w := algebra.NewWork(nil)
	K := standard(w, 2, 8)
	L := K.Named("a")
	if K == L || !field.Same(K, L) || L.Generator().String() != "a" || !L.IsStandard() {
		t.Error("the field with another letter is another field")
	}
	if x := L.Generator().Add(K.Generator()); !x.IsZero() || x.Field() != L {
		t.Errorf("a + g = %s", x)
	}
	m := must(field.Embed(w, L, standard(w, 2, 16).Named("b")))
	if m.From() != L || m.To().Name() != "b" || m.Image().Field() != m.To() {
		t.Error("the embedding forgets the letters")
	}
	if x := m.Apply(w, K.Generator()); x.Field() != m.To() {
		t.Error("the image forgets its letter")
	}
	e := K.Element(big.NewInt(0x53))
	if e.String() != "g^6 + g^4 + g + 1" {
		t.Errorf("code 0x53 is %s", e)
	}
}
