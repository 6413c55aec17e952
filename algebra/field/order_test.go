package field_test

import (
	"math/big"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// TestOrders compares with counting powers, for all elements of small fields.
func TestOrders(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, K := range []*field.Field{standard(w, 31, 1), standard(w, 2, 6), standard(w, 3, 4), adjoin(w, standard(w, 2, 2), "b", 1, 1, 0, 1)} {
		primitive := 0
		for a := range K.All {
			if a.IsZero() {
				continue
			}
			n, b := int64(1), a
			for ; !b.IsOne(); n++ {
				b = b.Mul(w, a)
			}
			got, e, err := a.Order(w)
			if err != nil || got.Cmp(big.NewInt(n)) != 0 || e.Standing != algebra.Proved {
				t.Fatalf("%s in %s: order %s (%v), not %d", a, K.Modulus(), got, err, n)
			}
			v := must(a.IsPrimitive(w))
			if v.Holds != (new(big.Int).Add(got, big.NewInt(1)).Cmp(K.Order()) == 0) {
				t.Errorf("%s in %s: primitive %v, order %d", a, K.Modulus(), v.Holds, n)
			}
			if v.Holds {
				primitive++
			}
		}
		if want := must(field.CountPrimitive(w, K, 1)); want.Cmp(big.NewInt(int64(primitive))) != 0 {
			t.Errorf("%s: %d primitive elements, not %s", K.Modulus(), primitive, want)
		}
	}
	if _, _, err := standard(w, 2, 3).Zero().Order(w); !isKind(err, algebra.Undefined) {
		t.Errorf("order of 0: %v", err)
	}
}

// TestLargeOrders has the generators of Conway fields, primitive by
// definition, and Mersenne exponents, where every element but 0 and 1 is.
func TestLargeOrders(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		p int64
		n int
	}{{2, 127}, {2, 61}, {2, 48}, {3, 30}, {997, 7}} {
		K := standard(w, c.p, c.n)
		n, _, err := K.Generator().Order(w)
		if err != nil || new(big.Int).Add(n, big.NewInt(1)).Cmp(K.Order()) != 0 {
			t.Errorf("%d^%d: order %s, %v", c.p, c.n, n, err)
		}
		if v := must(K.Generator().IsPrimitive(w)); !v.Holds {
			t.Errorf("%d^%d: the generator is not primitive", c.p, c.n)
		}
	}
}

func TestRoots(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, K := range []*field.Field{standard(w, 31, 1), standard(w, 2, 6), standard(w, 3, 4), adjoin(w, standard(w, 2, 2), "b", 1, 1, 0, 1), standard(w, 17, 1)} {
		for _, n := range []int64{1, 2, 3, 5, 6, 7, 8, 9, 10, 30, 126, 1000} {
			want := map[string][]field.Elem{}
			for x := range K.All {
				a := must(x.Pow(w, big.NewInt(n)))
				want[a.String()] = append(want[a.String()], x)
			}
			for a := range K.All {
				got, list := must(a.Roots(w, big.NewInt(n))), want[a.String()]
				if len(got) != len(list) {
					t.Fatalf("%s: roots of degree %d of %s: %v, not %v", K.Modulus(), n, a, got, list)
				}
				for i := range got {
					if !got[i].Equal(list[i]) {
						t.Fatalf("%s: roots of degree %d of %s: %v, not %v", K.Modulus(), n, a, got, list)
					}
				}
				if must(a.IsPower(w, big.NewInt(n))).Holds != (len(list) > 0) {
					t.Errorf("%s: is %s a power of degree %d", K.Modulus(), a, n)
				}
			}
		}
	}
	K := standard(w, 2, 60)
	if _, err := K.One().Roots(w, K.Order()); err != nil {
		t.Errorf("a root of degree a power of p: %v", err)
	}
	if _, err := K.One().Roots(w, new(big.Int).Sub(K.Order(), big.NewInt(1))); !isKind(err, algebra.TooLarge) {
		t.Errorf("all roots of unity of F_(2^60): %v", err)
	}
	if _, err := K.One().Roots(w, new(big.Int)); !isKind(err, algebra.Invalid) {
		t.Errorf("roots of degree 0: %v", err)
	}
}

func TestSqrt(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 106)
	for name, K := range samples(w) {
		for range 8 {
			a := element(r, K)
			x, ok, err := a.Sqrt(w)
			if err != nil || ok != a.IsSquare(w).Holds {
				t.Fatalf("%s: root of %s: %v", name, a, err)
			}
			if ok && (!x.Mul(w, x).Equal(a) || field.Compare(x, x.Neg()) > 0) {
				t.Errorf("%s: root of %s is %s", name, a, x)
			}
			if !a.Mul(w, a).IsSquare(w).Holds {
				t.Errorf("%s: %s squared is no square", name, a)
			}
		}
	}
}

func TestLog(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 107)
	for _, K := range []*field.Field{standard(w, 31, 1), standard(w, 2, 30), standard(w, 3, 12), standard(w, 101, 4), adjoin(w, standard(w, 2, 4), "b", 1, 1, 0, 1), standard(w, 2, 61-1)} {
		for range 5 {
			g, a := element(r, K), element(r, K)
			if g.IsZero() || a.IsZero() {
				continue
			}
			k := a.Code()
			b := must(g.Pow(w, k))
			order, _, err := g.Order(w)
			if err != nil {
				t.Fatal(err)
			}
			n, err := b.Log(w, g)
			if err != nil || n.Cmp(k.Mod(k, order)) != 0 {
				t.Errorf("%s: logarithm of %s to base %s is %s (%v), not %s", K.Modulus(), b, g, n, err, k)
			}
		}
	}
	// A. Menezes, P. van Oorschot, S. Vanstone, Handbook of Applied
	// Cryptography, 1996, section 3.6, worked examples.
	for _, c := range [][4]int64{{113, 3, 57, 100}, {251, 71, 210, 197}, {383, 2, 228, 110}, {229, 6, 13, 117}} {
		F := standard(w, c[0], 1)
		n, err := F.Int(big.NewInt(c[2])).Log(w, F.Int(big.NewInt(c[1])))
		if err != nil || n.Cmp(big.NewInt(c[3])) != 0 {
			t.Errorf("logarithm of %d to base %d modulo %d: %s, published %d", c[2], c[1], c[0], n, c[3])
		}
	}
	K := standard(w, 2, 8)
	g := must(K.Generator().Pow(w, big.NewInt(5)))
	if _, err := K.Generator().Log(w, g); !isKind(err, algebra.Undefined) {
		t.Errorf("a logarithm outside the group: %v", err)
	}
	if _, err := K.Zero().Log(w, g); !isKind(err, algebra.Undefined) {
		t.Errorf("the logarithm of 0: %v", err)
	}
	M := standard(w, 2, 127)
	if _, err := must(M.Generator().Pow(w, big.NewInt(99))).Log(w, M.Generator()); !isKind(err, algebra.Unable) {
		t.Errorf("a logarithm in a group of prime order of 127 bits: %v", err)
	}
}
