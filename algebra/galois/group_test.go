package galois_test

import (
	"math/big"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/galois"
	"adjoin/algebra/integer"
)

func must[T any](x T, err error) T {
	if err != nil {
		panic(err)
	}
	return x
}

func standard(w *algebra.Work, p int64, n int) *field.Field {
	return must(field.Standard(w, big.NewInt(p), n))
}

// fields are extensions L of K.
func fields(w *algebra.Work) [][2]*field.Field {
	F := standard(w, 2, 1)
	B := must(field.Adjoin(w, F, field.FromInts(F, 1, 1, 1), "a"))
	C := must(field.Adjoin(w, B, field.FromInts(B, 1, 1, 0, 1), "b"))
	return [][2]*field.Field{
		{standard(w, 2, 12), F},
		{standard(w, 2, 12), standard(w, 2, 2)},
		{C, F}, {C, B}, {C, standard(w, 2, 3)},
		{standard(w, 3, 8), standard(w, 3, 2)},
		{F, F},
	}
}

func TestGroup(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, pair := range fields(w) {
		L, K := pair[0], pair[1]
		G := must(galois.Of(w, L, K))
		n := L.AbsoluteDegree() / K.AbsoluteDegree()
		into := must(field.Embed(w, K, L))
		elements := G.Elements(w)
		if G.Order() != n || len(elements) != n {
			t.Fatalf("order %d, %d elements, degree %d", G.Order(), len(elements), n)
		}
		power := must(field.Embed(w, L, L))
		for i, s := range elements {
			if !s.Equal(w, power) || must(G.Exponent(w, s)) != i {
				t.Errorf("element %d is not the power of the generator", i)
			}
			// It fixes K, and moves the generator of L unless it is the identity.
			if x := into.Image(); !s.Apply(w, x).Equal(x) {
				t.Errorf("element %d moves K", i)
			}
			power = power.Then(w, G.Generator())
		}
		if !power.Equal(w, elements[0]) {
			t.Error("the generator has another order")
		}
		if !G.Element(w, -1).Equal(w, elements[n-1]) {
			t.Error("the inverse of the generator")
		}
	}
}

func TestCorrespondence(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, pair := range fields(w) {
		L, K := pair[0], pair[1]
		G := must(galois.Of(w, L, K))
		list := must(G.Correspondence(w))
		if len(list) != len(integer.DivisorsInt(G.Order())) {
			t.Fatalf("%d fields between", len(list))
		}
		for i, p := range list {
			M, H := p.Field, p.Subgroup
			if M.Degree != K.AbsoluteDegree()*H.Index() || H.Order()*H.Index() != G.Order() {
				t.Errorf("degree %d, index %d, order %d", M.Degree, H.Index(), H.Order())
			}
			// The elements that H fixes are those of M, by counting.
			if L.Order().BitLen() <= 13 {
				fixed, s := int64(0), H.Generator(w)
				for a := range L.All {
					if s.Apply(w, a).Equal(a) {
						fixed++
						if _, ok := M.Into.Preimage(w, a); !ok {
							t.Errorf("%s is fixed and not in the field", a)
						}
					}
				}
				if M.Field.Order().Cmp(big.NewInt(fixed)) != 0 {
					t.Errorf("%d elements are fixed, the field has %s", fixed, M.Field.Order())
				}
			}
			back := must(G.Fixing(w, M.Field))
			if back.Order() != H.Order() {
				t.Errorf("there and back: order %d, not %d", back.Order(), H.Order())
			}
			if again := must(G.Generated(w, H.Elements(w)...)); again.Order() != H.Order() {
				t.Errorf("the elements generate order %d, not %d", again.Order(), H.Order())
			}
			if F := must(galois.FixedField(w, H.Generator(w))); F.Degree != M.Degree {
				t.Errorf("the fixed field of the generator has degree %d, not %d", F.Degree, M.Degree)
			}
			for _, q := range list[:i] {
				if (M.Degree%q.Field.Degree == 0) != q.Subgroup.Contains(H) {
					t.Errorf("inclusion of degrees %d and %d", q.Field.Degree, M.Degree)
				}
			}
		}
	}
}

func TestOutside(t *testing.T) {
	w := algebra.NewWork(nil)
	G := must(galois.Of(w, standard(w, 2, 12), standard(w, 2, 2)))
	kind := func(err error, k algebra.Kind) bool {
		e, ok := err.(*algebra.Error)
		return ok && e.Kind == k
	}
	if _, err := galois.Of(w, standard(w, 2, 3), standard(w, 2, 2)); !kind(err, algebra.Mismatch) {
		t.Errorf("F_8 over F_4: %v", err)
	}
	if s := field.FrobeniusPower(w, standard(w, 2, 12), 1); G.Contains(w, s) {
		t.Error("squaring fixes F_4")
	}
	if _, err := G.Generated(w, field.FrobeniusPower(w, standard(w, 2, 6), 2)); !kind(err, algebra.Invalid) {
		t.Errorf("an automorphism of another field: %v", err)
	}
	if _, err := G.Fixing(w, standard(w, 2, 3)); !kind(err, algebra.Mismatch) {
		t.Errorf("a field that does not contain F_4: %v", err)
	}
	if _, err := galois.FixedField(w, must(field.Embed(w, standard(w, 2, 2), standard(w, 2, 4)))); !kind(err, algebra.Undefined) {
		t.Errorf("the fixed field of an embedding: %v", err)
	}
}
