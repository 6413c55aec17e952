package poly_test

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Zero, constants, x^n and x^n - a through everything.
func TestEdges(t *testing.T) {
	each(t, func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand) {
		zero, one, x := new(poly.Poly), poly.One(A), poly.X(A)
		c := poly.Constant(A, A.One())
		A.Add(c, c, c)
		if c.IsZero() {
			c = one
		}
		check := func(what string, ok bool) {
			t.Helper()
			if !ok {
				t.Error(what)
			}
		}
		check("gcd(0, 0)", poly.GCD(w, A, zero, zero).IsZero())
		check("gcd(0, c)", poly.Equal(poly.GCD(w, A, zero, c), one))
		check("gcd(x, 0)", poly.Equal(poly.GCD(w, A, x, zero), x))
		for _, f := range []*poly.Poly{zero, c, x} {
			for _, g := range []*poly.Poly{zero, c, x} {
				d, u, v := poly.XGCD(w, A, f, g)
				s, p := new(poly.Poly), new(poly.Poly)
				A.Mul(w, s, u, f)
				A.Mul(w, p, v, g)
				A.Add(s, s, p)
				check("u f + v g = d", poly.Equal(s, d) && poly.Equal(d, poly.GCD(w, A, f, g)))
			}
		}
		_, ok := poly.InvMod(w, A, zero, x)
		check("0 has an inverse mod x", !ok)
		check("0^0 mod x", poly.IsOne(A, poly.PowMod(w, A, zero, new(big.Int), x)))
		check("0^5 mod x", poly.PowMod(w, A, zero, big.NewInt(5), x).IsZero())
		check("x^5 mod c", poly.PowMod(w, A, x, big.NewInt(5), c).IsZero())
		check("x^0", poly.IsOne(A, poly.Pow(w, A, zero, 0)))
		check("0 after x", poly.Compose(w, A, zero, x).IsZero())
		check("x after 0", poly.Compose(w, A, x, zero).IsZero())
		check("0 after x mod x", poly.ComposeMod(w, A, zero, x, x).IsZero())
		check("res(x, c)", poly.EqualElem(poly.Resultant(w, A, x, c), poly.Coeff(A, c, 0)))
		check("res(c, x)", poly.EqualElem(poly.Resultant(w, A, c, x), poly.Coeff(A, c, 0)))
		check("res(c, c)", poly.EqualElem(poly.Resultant(w, A, c, c), A.One()))
		check("disc(x)", poly.EqualElem(poly.Discriminant(w, A, x), A.One()))
		check("disc(x^3)", poly.IsZeroElem(poly.Discriminant(w, A, poly.Monomial(A, A.One(), 3))))
		lead, list := poly.Factorize(w, A, c)
		check("factors of c", len(list) == 0 && poly.EqualElem(lead, poly.Coeff(A, c, 0)))
		check("roots of c", len(poly.Roots(w, A, c)) == 0 && poly.Root1(w, A, c) == nil)
		check("c irreducible", !poly.IsIrreducible(w, A, c).Holds && !poly.IsIrreducible(w, A, zero).Holds)
		check("x irreducible", poly.IsIrreducible(w, A, x).Holds)
		for _, n := range []int{1, 2, 3, 4, 8, 9, 25, 49, 101} {
			f := poly.Monomial(A, A.One(), n)
			_, list := poly.Factorize(w, A, f)
			check("factors of x^n", len(list) == 1 && list[0].E == n && poly.Equal(list[0].F, x))
			roots := poly.Roots(w, A, f)
			check("roots of x^n", len(roots) == 1 && roots[0].E == n && poly.IsZeroElem(roots[0].A))
			check("a root of x^n", poly.IsZeroElem(poly.Root1(w, A, f)))
			parts := poly.Squarefree(w, A, f)
			check("squarefree parts of x^n", len(parts) == 1 && parts[0].E == n && poly.Equal(parts[0].F, x))
			// (x - a)^n, whose derivative vanishes where p divides n.
			g := poly.Pow(w, A, poly.FromElems(A, []poly.Elem{poly.RandomElem(A, r), A.One()}), n)
			check("root of (x - a)^n", len(poly.Roots(w, A, g)) == 1 && poly.Roots(w, A, g)[0].E == n)
			check("discriminant of (x - a)^n", n == 1 || poly.IsZeroElem(poly.Discriminant(w, A, g)))
			m := poly.MinimalPolynomialMod(w, A, x, f)
			check("minimal polynomial of x mod x^n", poly.Equal(m, f))
			check("minimal polynomial of 0", poly.Equal(poly.MinimalPolynomialMod(w, A, zero, f), x))
		}
	})
}

// x^(q^n) - x is the product of all monic irreducible polynomials whose degree
// divides n: R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997, theorem
// 3.20; their number is theorem 3.25.
func TestAllIrreducible(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		A     poly.Arith
		n     int
		count map[int]int
	}{
		{prime(2), 8, map[int]int{1: 2, 2: 1, 4: 3, 8: 30}},
		{prime(3), 4, map[int]int{1: 3, 2: 3, 4: 18}},
		{prime(5), 3, map[int]int{1: 5, 3: 40}},
		{extend(2, 1, 1, 1), 3, map[int]int{1: 4, 3: 20}},
		{extend(3, 1, 0, 1), 2, map[int]int{1: 9, 2: 36}},
	} {
		q := int(c.A.Order().Int64())
		total := 1
		for range c.n {
			total *= q
		}
		f := poly.Monomial(c.A, c.A.One(), total)
		c.A.Sub(f, f, poly.X(c.A))
		got := map[int]int{}
		_, list := poly.Factorize(w, c.A, f)
		for _, g := range list {
			if g.E != 1 {
				t.Fatal("a multiple factor")
			}
			got[g.F.Degree()]++
		}
		if len(got) != len(c.count) {
			t.Errorf("q = %d, n = %d: %v", q, c.n, got)
		}
		for d, k := range c.count {
			if got[d] != k {
				t.Errorf("q = %d, n = %d: %d of degree %d, want %d", q, c.n, got[d], d, k)
			}
		}
	}
}
