package poly_test

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

func prime(p int64) poly.Arith { return rep.Prime(big.NewInt(p)) }

// extend is the extension by a polynomial over F_p.
func extend(p int64, coeffs ...int64) poly.Arith {
	k := prime(p)
	return rep.Extend(algebra.NewWork(nil), k, poly.FromInts(k, coeffs...))
}

func fields() map[string]poly.Arith {
	return map[string]poly.Arith{
		"F_2":   prime(2),
		"F_3":   prime(3),
		"F_7":   prime(7),
		"F_101": prime(101),
		"F_p":   prime(1<<31 - 1),
		"F_q":   prime(1<<61 - 1),
		"F_4":   extend(2, 1, 1, 1),
		"F_9":   extend(3, 1, 0, 1),
		"F_256": extend(2, 1, 1, 0, 1, 1, 0, 0, 0, 1),
	}
}

func each(t *testing.T, f func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand)) {
	for name, A := range fields() {
		t.Run(name, func(t *testing.T) {
			f(t, algebra.NewWork(nil), A, rand.New(rand.NewPCG(1, uint64(len(name)))))
		})
	}
}

func monic(A poly.Arith, r *rand.Rand, n int) *poly.Poly {
	f := poly.Random(A, r, n)
	A.SetCoeff(f, n, A.One())
	return f
}

func mul(w *algebra.Work, A poly.Arith, fs ...*poly.Poly) *poly.Poly {
	z := poly.One(A)
	for _, f := range fs {
		A.Mul(w, z, z, f)
	}
	return z
}

func TestGCD(t *testing.T) {
	each(t, func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand) {
		for range 40 {
			// a and b with a known common factor.
			a, b, c := monic(A, r, r.IntN(8)), monic(A, r, r.IntN(8)), monic(A, r, r.IntN(6))
			f, g := mul(w, A, a, c), mul(w, A, b, c)
			d, u, v := poly.XGCD(w, A, f, g)
			if !poly.Equal(d, poly.GCD(w, A, f, g)) {
				t.Fatal("the two gcds differ")
			}
			rem := new(poly.Poly)
			A.DivRem(w, nil, rem, d, c)
			if !rem.IsZero() {
				t.Fatal("the known common factor does not divide the gcd")
			}
			s, p := new(poly.Poly), new(poly.Poly)
			A.Mul(w, s, u, f)
			A.Mul(w, p, v, g)
			A.Add(s, s, p)
			if !poly.Equal(s, d) {
				t.Fatal("u f + v g is not the gcd")
			}
		}
	})
}

func TestResultant(t *testing.T) {
	each(t, func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand) {
		for range 20 {
			// From the roots: the product of (a - b).
			var as, bs []poly.Elem
			f, g := poly.One(A), poly.One(A)
			lin := func(e poly.Elem) *poly.Poly {
				n := make(poly.Elem, A.Width())
				A.NegElem(n, e)
				return poly.FromElems(A, []poly.Elem{n, A.One()})
			}
			for range 1 + r.IntN(4) {
				as = append(as, poly.RandomElem(A, r))
				A.Mul(w, f, f, lin(as[len(as)-1]))
			}
			for range 1 + r.IntN(4) {
				bs = append(bs, poly.RandomElem(A, r))
				A.Mul(w, g, g, lin(bs[len(bs)-1]))
			}
			want := append(poly.Elem(nil), A.One()...)
			d := make(poly.Elem, A.Width())
			for _, a := range as {
				for _, b := range bs {
					A.SubElem(d, a, b)
					A.MulElem(w, want, want, d)
				}
			}
			if !poly.EqualElem(poly.Resultant(w, A, f, g), want) {
				t.Fatal("the resultant is not the product over the roots")
			}
			disc := append(poly.Elem(nil), A.One()...)
			for i, a := range as {
				for _, b := range as[:i] {
					A.SubElem(d, a, b)
					A.MulElem(w, d, d, d)
					A.MulElem(w, disc, disc, d)
				}
			}
			if !poly.EqualElem(poly.Discriminant(w, A, f), disc) {
				t.Fatal("the discriminant is not the product over the roots")
			}
		}
	})
}

func TestPowersAndCompositions(t *testing.T) {
	each(t, func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand) {
		for range 20 {
			m := monic(A, r, 1+r.IntN(9))
			f, g := poly.Random(A, r, 8), poly.Random(A, r, 8)
			e := r.IntN(200) * r.IntN(2)
			want := poly.Pow(w, A, f, e)
			A.DivRem(w, nil, want, want, m)
			if !poly.Equal(poly.PowMod(w, A, f, big.NewInt(int64(e)), m), want) {
				t.Fatalf("power %d modulo m is wrong", e)
			}
			// Composition term by term.
			slow, c := new(poly.Poly), poly.Compose(w, A, f, g)
			for i := f.N - 1; i >= 0; i-- {
				A.Mul(w, slow, slow, g)
				A.Add(slow, slow, poly.Constant(A, poly.Coeff(A, f, i)))
			}
			if !poly.Equal(c, slow) {
				t.Fatal("composition is wrong")
			}
			A.DivRem(w, nil, slow, slow, m)
			if !poly.Equal(poly.ComposeMod(w, A, f, g, m), slow) {
				t.Fatal("composition modulo m is wrong")
			}
		}
	})
}

func TestFactorize(t *testing.T) {
	each(t, func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand) {
		for range 15 {
			f := poly.Constant(A, A.One())
			for range 1 + r.IntN(4) {
				g := monic(A, r, r.IntN(7))
				f = mul(w, A, f, poly.Pow(w, A, g, 1+r.IntN(5)))
			}
			c := poly.RandomElem(A, r)
			if poly.IsZeroElem(c) {
				c = A.One()
			}
			A.Scale(w, f, f, c)
			lead, list := poly.Factorize(w, A, f)
			back := poly.Constant(A, lead)
			for i, g := range list {
				back = mul(w, A, back, poly.Pow(w, A, g.F, g.E))
				if !poly.IsIrreducible(w, A, g.F).Holds {
					t.Fatal("a factor is reducible")
				}
				if i > 0 && poly.Compare(A, list[i-1].F, g.F) >= 0 {
					t.Fatal("factors out of order")
				}
			}
			if !poly.Equal(back, f) {
				t.Fatal("the product of the factors is not f")
			}
			// The roots are the linear factors.
			k := 0
			for _, g := range list {
				if g.F.N == 2 {
					k++
				}
			}
			roots := poly.Roots(w, A, f)
			if len(roots) != k {
				t.Fatalf("%d roots and %d linear factors", len(roots), k)
			}
			for _, x := range roots {
				if !poly.IsZeroElem(poly.Eval(w, A, f, x.A)) {
					t.Fatal("a root does not vanish")
				}
			}
		}
	})
}

// The number of monic irreducible polynomials of degree n over F_q is
// (1/n) sum over d | n of mu(n/d) q^d: R. Lidl, H. Niederreiter, Finite
// Fields, 2nd edition 1997, theorem 3.25. Irreducibility by the test, by
// factoring, and by division by everything smaller must agree.
func TestCountIrreducible(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		A    poly.Arith
		n, k int
	}{
		{prime(2), 1, 2}, {prime(2), 4, 3}, {prime(2), 8, 30}, {prime(2), 10, 99},
		{prime(3), 3, 8}, {prime(3), 5, 48}, {prime(5), 4, 150}, {extend(2, 1, 1, 1), 3, 20}, {extend(3, 1, 0, 1), 2, 36},
	} {
		q := int(c.A.Order().Int64())
		total := 1
		for range c.n {
			total *= q
		}
		count := 0
		e := make(poly.Elem, c.A.Width())
		for code := range total {
			f := poly.Monomial(c.A, c.A.One(), c.n)
			for i, x := 0, code; i < c.n; i, x = i+1, x/q {
				c.A.FromCode(e, big.NewInt(int64(x%q)))
				c.A.SetCoeff(f, i, e)
			}
			test := poly.IsIrreducible(w, c.A, f)
			_, list := poly.Factorize(w, c.A, f)
			if test.Holds != (len(list) == 1 && list[0].E == 1) {
				t.Fatalf("test and factorization disagree on %x over F_%d", f.W, q)
			}
			if test.Holds {
				count++
			} else {
				rem := new(poly.Poly)
				c.A.DivRem(w, nil, rem, f, test.Factor)
				if !rem.IsZero() || test.Factor.N >= f.N || test.Factor.N < 2 {
					t.Fatal("the factor shown is none")
				}
			}
		}
		if count != c.k {
			t.Errorf("%d irreducible polynomials of degree %d over F_%d, want %d", count, c.n, q, c.k)
		}
	}
}

func TestOrder(t *testing.T) {
	w := algebra.NewWork(nil)
	// Trial division is enough for these fields.
	primes := func(q int64) poly.Primes {
		return func(d int) ([]*big.Int, bool) {
			n := new(big.Int).Exp(big.NewInt(q), big.NewInt(int64(d)), nil)
			m := n.Int64() - 1
			var list []*big.Int
			for p := int64(2); p <= m; p++ {
				if m%p == 0 {
					list = append(list, big.NewInt(p))
					for m%p == 0 {
						m /= p
					}
				}
			}
			return list, true
		}
	}
	for _, q := range []int64{2, 3, 5} {
		A := prime(q)
		r := rand.New(rand.NewPCG(4, uint64(q)))
		for range 60 {
			f := monic(A, r, 1+r.IntN(6))
			if poly.IsZeroElem(poly.Coeff(A, f, 0)) {
				continue
			}
			n, _ := poly.Order(w, A, f, primes(q))
			slow := int64(1)
			x := poly.X(A)
			A.DivRem(w, nil, x, x, f)
			one := poly.One(A)
			A.DivRem(w, nil, one, one, f)
			for h := poly.Clone(x); !poly.Equal(h, one); slow++ {
				A.Mul(w, h, h, x)
				A.DivRem(w, nil, h, h, f)
			}
			if n.Int64() != slow {
				t.Fatalf("order of %x over F_%d is %v, counted %d", f.W, q, n, slow)
			}
		}
	}
	// x^8+x^4+x^3+x+1 has order 51: FIPS 197 for the polynomial, the order from
	// R. Lidl, H. Niederreiter, Finite Fields, table C.
	n, _ := poly.Order(w, prime(2), poly.FromInts(prime(2), 1, 1, 0, 1, 1, 0, 0, 0, 1), primes(2))
	if n.Int64() != 51 {
		t.Errorf("order %v, want 51", n)
	}
}

func TestMinimalPolynomialMod(t *testing.T) {
	each(t, func(t *testing.T, w *algebra.Work, A poly.Arith, r *rand.Rand) {
		for range 20 {
			m, g := monic(A, r, 1+r.IntN(7)), poly.Random(A, r, 7)
			f := poly.MinimalPolynomialMod(w, A, g, m)
			if !poly.ComposeMod(w, A, f, g, m).IsZero() {
				t.Fatal("the minimal polynomial does not vanish")
			}
			// No proper divisor by an irreducible factor vanishes.
			_, list := poly.Factorize(w, A, f)
			for _, p := range list {
				q := new(poly.Poly)
				A.DivRem(w, q, nil, f, p.F)
				if poly.ComposeMod(w, A, q, g, m).IsZero() {
					t.Fatal("a proper divisor of the minimal polynomial vanishes")
				}
			}
		}
	})
}

// Trinomials and pentanomials of least middle terms: G. Seroussi, Table of
// low-weight binary irreducible polynomials, HPL-98-135, 1998.
func TestFindIrreducible(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	for n, exponents := range map[int][]int{
		2: {1}, 7: {1}, 8: {4, 3, 1}, 16: {5, 3, 1}, 64: {4, 3, 1}, 127: {1}, 128: {7, 2, 1}, 163: {7, 6, 3}, 233: {74},
	} {
		want := poly.Monomial(A, A.One(), n)
		for _, e := range append(exponents, 0) {
			A.Add(want, want, poly.Monomial(A, A.One(), e))
		}
		if f := poly.FindIrreducible(w, A, n); !poly.Equal(f, want) {
			t.Errorf("degree %d: %x, want %x", n, f.W, want.W)
		}
	}
}

func TestInterrupt(t *testing.T) {
	var stop algebra.Stop
	stop.Pull(algebra.Errorf(algebra.Interrupted, "stopped"))
	w := algebra.NewWork(&stop)
	err := func() (err error) {
		defer algebra.Catch(&err)
		poly.Factorize(w, prime(2), poly.FindIrreducible(algebra.NewWork(nil), prime(2), 64))
		return nil
	}()
	if err == nil {
		t.Error("the factorization went on after a stop")
	}
}

func BenchmarkFactorize(b *testing.B) {
	for _, c := range []struct {
		name string
		p    int64
		n    int
	}{{"31_bit_degree_256", 1<<31 - 1, 256}, {"F_2_degree_1024", 2, 1024}, {"61_bit_degree_128", 1<<61 - 1, 128}} {
		b.Run(c.name, func(b *testing.B) {
			A, w := prime(c.p), algebra.NewWork(nil)
			f := monic(A, rand.New(rand.NewPCG(9, 9)), c.n)
			for range b.N {
				poly.Factorize(w, A, f)
			}
		})
	}
}
