package poly_test

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

func TestPoints(t *testing.T) {
	each(t, func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand) {
		for n := range 20 {
			if A.Order().Cmp(big.NewInt(int64(n))) < 0 {
				break
			}
			at, values := make([]poly.Elem, n), make([]poly.Elem, n)
			first := r.IntN(1000)
			for i := range at {
				at[i] = make(poly.Elem, A.Width())
				A.FromCode(at[i], big.NewInt(int64(first+i)))
				values[i] = poly.RandomElem(A, r)
			}
			f, ok := poly.Interpolate(w, A, at, values)
			if !ok || f.N > n {
				t.Fatalf("%d points: interpolation of degree %d, %v", n, f.Degree(), ok)
			}
			g := poly.Random(A, r, 30)
			many := poly.EvalMany(w, A, g, at)
			for i, a := range at {
				if !poly.EqualElem(poly.Eval(w, A, f, a), values[i]) {
					t.Fatalf("%d points: the interpolation misses one", n)
				}
				if !poly.EqualElem(poly.Eval(w, A, g, a), many[i]) {
					t.Fatalf("%d points: the values differ from Horner's", n)
				}
			}
			if n > 1 {
				if _, ok := poly.Interpolate(w, A, append(at[:n-1:n-1], at[0]), values); ok {
					t.Fatal("interpolation at a point twice")
				}
			}
		}
	})
}

func TestRoot1(t *testing.T) {
	each(t, func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand) {
		with := 0
		for range 60 {
			f := monic(A, r, 1+r.IntN(6))
			a, roots := poly.Root1(w, A, f), poly.Roots(w, A, f)
			if (a != nil) != (len(roots) > 0) {
				t.Fatalf("one root %v, all roots %v", a, roots)
			}
			if a != nil {
				with++
				if !poly.IsZeroElem(poly.Eval(w, A, f, a)) {
					t.Fatal("the root does not vanish")
				}
			}
		}
		if with == 0 || with == 60 {
			t.Fatal("one side of the test was never met")
		}
	})
}

// The number of monic primitive polynomials of degree n over F_q is
// phi(q^n - 1)/n: R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997,
// theorem 3.16 and the remark after it.
func TestCountPrimitive(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		A    poly.Arith
		n, k int
	}{
		{prime(2), 1, 1}, {prime(2), 4, 2}, {prime(2), 6, 6}, {prime(2), 8, 16}, {prime(3), 1, 1}, {prime(3), 3, 4}, {prime(3), 4, 8}, {prime(7), 2, 8},
		{extend(2, 1, 1, 1), 2, 4},
	} {
		q := int(c.A.Order().Int64())
		total := 1
		for range c.n {
			total *= q
		}
		primes := primesBelow(total)
		count := 0
		e := make(poly.Elem, c.A.Width())
		for code := range total {
			f := poly.Monomial(c.A, c.A.One(), c.n)
			for i, x := 0, code; i < c.n; i, x = i+1, x/q {
				c.A.FromCode(e, big.NewInt(int64(x%q)))
				c.A.SetCoeff(f, i, e)
			}
			v := poly.IsPrimitive(w, c.A, f, primes)
			if v.Holds {
				count++
			}
			if v.Evidence.Standing != algebra.Proved {
				t.Fatal("not proved with all primes known")
			}
		}
		if count != c.k {
			t.Errorf("%d primitive polynomials of degree %d over F_%d, want %d", count, c.n, q, c.k)
		}
	}
}

// primesBelow gives the primes of q^n - 1 for the one q^n = total.
func primesBelow(total int) poly.Primes {
	return func(int) ([]*big.Int, bool) {
		var list []*big.Int
		for p, m := 2, total-1; m > 1; p++ {
			if m%p == 0 {
				list = append(list, big.NewInt(int64(p)))
			}
			for m%p == 0 {
				m /= p
			}
		}
		return list, true
	}
}

// Without all primes a yes is not a proof, and a no still is.
func TestPrimitiveWithoutAllPrimes(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	few := func(int) ([]*big.Int, bool) { return []*big.Int{big.NewInt(5)}, false }
	if v := poly.IsPrimitive(w, A, poly.FromInts(A, 1, 1, 0, 0, 1), few); !v.Holds || v.Evidence.Standing != algebra.Probable {
		t.Errorf("x^4+x+1: %+v", v)
	}
	three := func(int) ([]*big.Int, bool) { return []*big.Int{big.NewInt(3)}, false }
	if v := poly.IsPrimitive(w, A, poly.FromInts(A, 1, 1, 1, 1, 1), three); v.Holds || v.Evidence.Standing != algebra.Proved {
		t.Errorf("x^4+x^3+x^2+x+1: %+v", v)
	}
}
