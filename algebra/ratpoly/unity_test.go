package ratpoly

import (
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/integer"
)

func TestUnityDivides(t *testing.T) {
	w := algebra.NewWork(nil)
	unity := func(n int) Poly { return Monomial(n).Sub(FromInts(1)) }
	for m := 1; m <= 12; m++ {
		for n := 1; n <= 40; n++ {
			q, v := UnityDivides(m, n)
			quo, rem := unity(n).DivRem(w, unity(m))
			if v.Holds != rem.IsZero() {
				t.Fatalf("x^%d - 1 divides x^%d - 1: %v", m, n, v.Holds)
			}
			if v.Holds {
				same(t, "quotient", q, quo)
			} else {
				same(t, "remainder", v.Evidence.Witness[0].Value.(Poly), rem)
			}
		}
	}
}

func TestUnityFactors(t *testing.T) {
	w := algebra.NewWork(nil)
	for n := 1; n <= 130; n++ {
		for _, sign := range []int64{-1, 1} {
			f := Monomial(n).Add(FromInts(sign))
			_, list := f.Factor(w)
			product := FromInts(1)
			for _, g := range list {
				product = product.Mul(w, g.F)
			}
			same(t, "product", product, f)
			want := len(integer.DivisorsInt(n))
			if sign > 0 {
				want = len(integer.DivisorsInt(2*n)) - want
			}
			if len(list) != want {
				t.Errorf("x^%d %+d has %d factors, want %d", n, sign, len(list), want)
			}
		}
	}
}

// Reasons that a reader can check: the degrees are beyond recombination for
// some indices, so they test that the cyclotomic polynomials are recognised.
func TestCyclotomicIrreducible(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, n := range []int{3, 5, 12, 97, 105, 420, 840, 1155, 2310} {
		f := Cyclotomic(w, n)
		if k := cyclotomicIndex(w, f.c); k != n {
			t.Errorf("cyclotomic polynomial %d is taken for %d", n, k)
		}
		if !f.IsIrreducible(w).Holds {
			t.Errorf("cyclotomic polynomial %d is irreducible", n)
		}
	}
	if k := cyclotomicIndex(w, FromInts(1, 1, 0, -1, -1, -1, -1, -1, 0, 1, 1).c); k != 0 {
		t.Errorf("Lehmer's polynomial is taken for cyclotomic polynomial %d", k)
	}
}

// The classical example of the shifted criterion: x^4 + 1 at x + 1, p = 2. It
// is reducible modulo every prime: D. Hilbert, 1897.
func TestEisensteinShifted(t *testing.T) {
	w := algebra.NewWork(nil)
	v := FromInts(1, 0, 0, 0, 1).IsIrreducible(w)
	if !v.Holds || len(v.Evidence.Witness) != 2 {
		t.Fatalf("x^4 + 1: %+v", v)
	}
	same(t, "f(x+1)", v.Evidence.Witness[0].Value.(Poly), FromInts(2, 4, 6, 4, 1))
}
