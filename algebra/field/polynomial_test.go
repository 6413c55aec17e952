package field_test

import (
	"errors"
	"math/big"
	"math/rand/v2"
	"strings"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

func polynomial(r *rand.Rand, K *field.Field, n int) field.Polynomial {
	c := make([]field.Elem, r.IntN(n+1))
	for i := range c {
		c[i] = element(r, K)
	}
	return field.NewPolynomial(K, c)
}

func TestPolynomialLaws(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 108)
	for name, K := range samples(w) {
		for range 10 {
			f, g, h := polynomial(r, K, 6), polynomial(r, K, 5), polynomial(r, K, 4)
			a := element(r, K)
			if !f.Mul(w, g.Add(h)).Equal(f.Mul(w, g).Add(f.Mul(w, h))) {
				t.Fatalf("%s: f(g+h) = fg+fh fails for %s, %s, %s", name, f, g, h)
			}
			if !f.Mul(w, g).Eval(w, a).Equal(f.Eval(w, a).Mul(w, g.Eval(w, a))) {
				t.Fatalf("%s: (fg)(a) = f(a)g(a) fails for %s, %s", name, f, g)
			}
			if !f.Compose(w, g).Eval(w, a).Equal(f.Eval(w, g.Eval(w, a))) {
				t.Fatalf("%s: f(g)(a) = f(g(a)) fails for %s, %s", name, f, g)
			}
			if !field.NewPolynomial(K, f.Coefficients()).Equal(f) || !field.FromCode(K, f.Code()).Equal(f) {
				t.Fatalf("%s: %s is not its coefficients or not its code", name, f)
			}
			product := f.Mul(w, g).Derivative()
			if !product.Equal(f.Derivative().Mul(w, g).Add(f.Mul(w, g.Derivative()))) {
				t.Fatalf("%s: the product rule fails for %s, %s", name, f, g)
			}
			if q, rem, err := f.DivRem(w, g); g.IsZero() != (err != nil) {
				t.Fatalf("%s: division of %s by %s: %v", name, f, g, err)
			} else if err == nil && (!q.Mul(w, g).Add(rem).Equal(f) || rem.Degree() >= g.Degree()) {
				t.Fatalf("%s: division of %s by %s", name, f, g)
			}
			d, u, v := f.XGCD(w, g)
			if !u.Mul(w, f).Add(v.Mul(w, g)).Equal(d) || !d.Equal(f.GCD(w, g)) {
				t.Fatalf("%s: greatest common divisor of %s and %s", name, f, g)
			}
		}
	}
}

func TestFactor(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 109)
	for name, K := range samples(w) {
		for range 4 {
			f := polynomial(r, K, 4).Mul(w, polynomial(r, K, 3)).Mul(w, polynomial(r, K, 3))
			if f.IsZero() {
				continue
			}
			lead, factors := f.Factor(w)
			product := field.NewPolynomial(K, []field.Elem{lead})
			for i, g := range factors {
				product = product.Mul(w, g.F.Pow(w, g.E))
				if !g.F.IsIrreducible(w).Holds || !g.F.Leading().IsOne() {
					t.Errorf("%s: factor %s of %s", name, g.F, f)
				}
				if i > 0 && field.ComparePolynomials(factors[i-1].F, g.F) >= 0 {
					t.Errorf("%s: the factors of %s are out of order", name, f)
				}
			}
			if !product.Equal(f) {
				t.Errorf("%s: the factors of %s multiply to %s", name, f, product)
			}
			squarefree, irreducible := true, len(factors) == 1 && factors[0].E == 1
			for _, g := range factors {
				squarefree = squarefree && g.E == 1
			}
			if f.IsSquarefree(w).Holds != squarefree || f.IsIrreducible(w).Holds != irreducible {
				t.Errorf("%s: verdicts on %s", name, f)
			}
			// The splitting field splits, and no smaller one does.
			n := f.SplittingDegree(w)
			if K.AbsoluteDegree()*n > 40 || !K.Characteristic().IsInt64() {
				continue
			}
			L, g, err := f.SplittingField(w)
			if err != nil {
				t.Fatal(err)
			}
			count := 0
			for _, root := range g.Roots(w) {
				count += root.E
				if !g.Eval(w, root.A).IsZero() {
					t.Errorf("%s: %s is no root of %s", name, root.A, g)
				}
			}
			if count != f.Degree() || L.AbsoluteDegree() != n*K.AbsoluteDegree() {
				t.Errorf("%s: %s has %d roots in degree %d", name, f, count, n)
			}
		}
	}
}

// TestCounts has published numbers: OEIS A001037, A027376, A027377
// (irreducible over F_2, F_3, F_4), A011260, A027385 (primitive over F_2, F_3);
// R. Lidl, H. Niederreiter, Finite Fields, 1997, theorems 3.25 and 3.5.
func TestCounts(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		q                      int64
		listed                 int // so many degrees are listed too
		irreducible, primitive []int64
	}{
		{2, 9, []int64{2, 1, 2, 3, 6, 9, 18, 30, 56, 99, 186, 335, 630, 1161, 2182, 4080, 7710, 14532, 27594, 52377, 99858, 190557, 364722, 698870},
			[]int64{1, 1, 2, 2, 6, 6, 18, 16, 48, 60, 176, 144, 630, 756, 1800, 2048, 7710, 7776, 27594, 24000}},
		{3, 5, []int64{3, 3, 8, 18, 48, 116, 312, 810, 2184, 5880, 16104, 44220}, []int64{1, 2, 4, 8, 22, 48, 156, 320, 1008, 2640}},
		{4, 4, []int64{4, 6, 20, 60, 204, 670, 2340, 8160, 29120, 104754}, nil},
	} {
		K := standard(w, 2+c.q%2, int(3-c.q%2)/2+int(c.q/4))
		if c.q == 2 {
			K = standard(w, 2, 1)
		}
		if K.Order().Int64() != c.q {
			t.Fatalf("a field of %s elements, not %d", K.Order(), c.q)
		}
		for i, want := range c.irreducible {
			n := i + 1
			if got := field.CountIrreducible(K.Order(), n); got.Cmp(big.NewInt(want)) != 0 {
				t.Errorf("%s irreducible polynomials of degree %d over F_%d, published %d", got, n, c.q, want)
			}
			if n > c.listed {
				continue
			}
			var last field.Polynomial
			count := int64(0)
			for f := range field.IrreduciblePolynomials(w, K, n) {
				if count > 0 && field.ComparePolynomials(last, f) >= 0 {
					t.Errorf("%s comes before %s", last, f)
				}
				last = f
				count++
			}
			if count != want {
				t.Errorf("%d irreducible polynomials of degree %d over F_%d are listed, published %d", count, n, c.q, want)
			}
		}
		for i, want := range c.primitive {
			n := i + 1
			if got := must(field.CountPrimitive(w, K, n)); got.Cmp(big.NewInt(want)) != 0 {
				t.Errorf("%s primitive polynomials of degree %d over F_%d, published %d", got, n, c.q, want)
			}
			if n > c.listed {
				continue
			}
			count := int64(0)
			for f := range must(field.PrimitivePolynomials(w, K, n)) {
				count++
				if f.Degree() != n {
					t.Errorf("%s is of degree %d", f, n)
				}
			}
			if count != want {
				t.Errorf("%d primitive polynomials of degree %d over F_%d are listed, published %d", count, n, c.q, want)
			}
		}
	}
}

// TestOrdersOfPolynomials counts the irreducible polynomials of degree 8 over
// F_2 by order: there are phi(e)/8 of order e. R. Lidl, H. Niederreiter, Finite
// Fields, 1997, theorem 3.5; W. Peterson, E. Weldon, Error-Correcting Codes,
// 1972, tables.
func TestOrdersOfPolynomials(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	count := map[int64]int{}
	for f := range field.IrreduciblePolynomials(w, F, 8) {
		n := must(f.Order(w)).Int64()
		count[n]++
		// The order of a root is that of the polynomial.
		K := must(field.Adjoin(w, F, f, "a"))
		if m, _, err := K.Generator().Order(w); err != nil || m.Int64() != n {
			t.Errorf("order %d of %s, %s of its root", n, f, m)
		}
		if v := must(f.IsPrimitive(w)); v.Holds != (n == 255) {
			t.Errorf("%s has order %d and is primitive: %v", f, n, v.Holds)
		}
	}
	for n, want := range map[int64]int{17: 2, 51: 4, 85: 8, 255: 16} {
		if count[n] != want {
			t.Errorf("%d polynomials of order %d, published %d", count[n], n, want)
		}
	}
	// Any polynomial, by counting.
	r := seeded(t, 110)
	for _, K := range []*field.Field{F, standard(w, 3, 1), standard(w, 2, 2)} {
		for range 12 {
			f := polynomial(r, K, 5)
			if f.Degree() < 1 {
				continue
			}
			g := f
			for g.Coefficient(0).IsZero() {
				g, _, _ = g.DivRem(w, field.FromInts(K, 0, 1))
			}
			if g.Degree() < 1 {
				continue
			}
			n := int64(1)
			for ; ; n++ {
				_, rem, _ := field.FromInts(K, 1).Shift(int(n)).Sub(field.FromInts(K, 1)).DivRem(w, g)
				if rem.IsZero() {
					break
				}
			}
			if got := must(f.Order(w)); got.Cmp(big.NewInt(n)) != 0 {
				t.Errorf("order of %s is %s, not %d", f, got, n)
			}
		}
	}
	if _, err := field.FromInts(F).Order(w); !isKind(err, algebra.Undefined) {
		t.Errorf("order of 0: %v", err)
	}
}

func TestReducibleModulus(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	_, err := field.Adjoin(w, F, field.FromInts(F, 1, 0, 1, 0, 1), "b")
	var e *field.ReducibleError
	if !errors.As(err, &e) {
		t.Fatalf("x^4 + x^2 + 1: %v", err)
	}
	if !e.Factor.Equal(field.FromInts(F, 1, 1, 1)) || e.Multiplicity != 2 {
		t.Errorf("factor %s, %d times", e.Factor, e.Multiplicity)
	}
	if !e.Instead.Equal(field.FromInts(F, 1, 1, 0, 0, 1)) {
		t.Errorf("instead %s", e.Instead)
	}
	for _, part := range []string{"x^4 + x^2 + 1 is reducible", "x^2 + x + 1", "x^4 + x + 1 is one of degree 4"} {
		if !strings.Contains(e.Error(), part) {
			t.Errorf("%q does not say %q", e.Error(), part)
		}
	}
	if _, err := field.Adjoin(w, F, field.FromInts(F, 1), "b"); !isKind(err, algebra.Invalid) {
		t.Errorf("a constant: %v", err)
	}
	if _, err := field.Adjoin(w, standard(w, 2, 2), field.FromInts(F, 1, 1, 1), "b"); !isKind(err, algebra.Mismatch) {
		t.Errorf("a polynomial over another field: %v", err)
	}
}
