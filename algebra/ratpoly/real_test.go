package ratpoly

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
)

// Products of known linear factors and of x^2 + positive ones.
func TestRealRoots(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(11, 11))
	for range 200 {
		f := Constant(big.NewRat(r.Int64N(9)-20, 7))
		roots := map[string]*big.Rat{}
		for range r.IntN(8) {
			q := big.NewRat(r.Int64N(21)-10, 1+r.Int64N(3))
			roots[q.String()] = q
			f = f.Mul(w, New([]*big.Rat{new(big.Rat).Neg(q), big.NewRat(1, 1)}))
			if r.IntN(2) == 0 {
				f = f.Mul(w, FromInts(1+r.Int64N(9), 0, 1))
			}
		}
		if got := f.RealRoots(w); got != len(roots) {
			t.Fatalf("%d real roots of %v, want %d", got, f.Coefficients(), len(roots))
		}
		a, b := big.NewRat(r.Int64N(21)-10, 2), big.NewRat(r.Int64N(21)-10, 1)
		want := 0
		for _, q := range roots {
			if a.Cmp(q) < 0 && q.Cmp(b) <= 0 {
				want++
			}
		}
		if got := f.RealRootsIn(w, a, b); got != want {
			t.Fatalf("%d roots of %v in (%v, %v], want %d", got, f.Coefficients(), a, b, want)
		}
	}
}

// Chebyshev's polynomial of degree n has n real roots, all between -1 and 1: T.
// Rivlin, Chebyshev Polynomials, 2nd edition 1990, section 1.2. D. Lehmer's
// polynomial has two (Salem's number and its inverse): D. Lehmer, Factorization
// of certain cyclotomic functions, 1933, and discriminant 1332031009.
func TestRealRootsKnown(t *testing.T) {
	w := algebra.NewWork(nil)
	a, b := FromInts(1), X()
	for n := 1; n <= 40; n++ {
		if b.RealRoots(w) != n || b.RealRootsIn(w, big.NewRat(-1, 1), big.NewRat(1, 1)) != n {
			t.Fatalf("Chebyshev's polynomial of degree %d has %d real roots", n, b.RealRoots(w))
		}
		a, b = b, b.Mul(w, FromInts(0, 2)).Sub(a)
	}
	lehmer := FromInts(1, 1, 0, -1, -1, -1, -1, -1, 0, 1, 1)
	if n := lehmer.RealRoots(w); n != 2 {
		t.Errorf("Lehmer's polynomial has %d real roots", n)
	}
	if d := lehmer.Discriminant(w); new(big.Rat).Abs(d).Cmp(big.NewRat(1332031009, 1)) != 0 {
		t.Errorf("the discriminant of Lehmer's polynomial is %v", d)
	}
	if !lehmer.IsIrreducible(w).Holds {
		t.Error("Lehmer's polynomial is irreducible")
	}
}
