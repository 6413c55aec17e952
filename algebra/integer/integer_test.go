package integer

import (
	"fmt"
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
)

func number(s string) *big.Int {
	n, ok := new(big.Int).SetString(s, 0)
	if !ok {
		panic(s)
	}
	return n
}

func TestIsPrimeSmall(t *testing.T) {
	w := algebra.NewWork(nil)
	next := 0
	primes := PrimesUpTo(5000)
	for n := range 5000 {
		is := next < len(primes) && primes[next] == n
		if is {
			next++
		}
		if IsPrime(w, big.NewInt(int64(n))).Holds != is || isPrime64(uint64(n)) != is {
			t.Errorf("%d: prime should be %v", n, is)
		}
	}
}

// Strong pseudoprimes to many bases, and Mersenne numbers: G. Jaeschke, On
// strong pseudoprimes to several bases, 1993; R. Crandall, C. Pomerance, Prime
// Numbers, 2nd edition 2005, section 1.3.
func TestIsPrimeKnown(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, s := range []string{"3215031751", "3825123056546413051", "318665857834031151167461", "561", "340561"} {
		if IsPrime(w, number(s)).Holds {
			t.Errorf("%s is composite", s)
		}
	}
	for _, n := range []uint{61, 89, 107, 127, 521, 607, 1279} {
		m := new(big.Int).Lsh(one, n)
		v := IsPrime(w, m.Sub(m, one))
		want := algebra.Proved
		if n > 64 {
			want = algebra.Probable
		}
		if !v.Holds || v.Evidence.Standing != want {
			t.Errorf("2^%d - 1: %+v", n, v)
		}
	}
}

func check(t *testing.T, n *big.Int, f Factorization) {
	t.Helper()
	if f.Value().Cmp(n) != 0 {
		t.Fatalf("the product of the factors of %v is %v", n, f.Value())
	}
	for i, p := range f.Primes {
		if !p.P.ProbablyPrime(10) {
			t.Fatalf("%v divides %v but is not prime", p.P, n)
		}
		if i > 0 && f.Primes[i-1].P.Cmp(p.P) >= 0 {
			t.Fatalf("factors of %v out of order", n)
		}
	}
}

func TestFactor(t *testing.T) {
	w := algebra.NewWork(nil)
	for n := int64(1); n < 3000; n++ {
		f := Factor(w, big.NewInt(n))
		check(t, big.NewInt(n), f)
		if !f.Complete() {
			t.Fatalf("%d was not factored", n)
		}
	}
	r := rand.New(rand.NewPCG(1, 2))
	for range 40 {
		n := big.NewInt(1)
		for range 1 + r.IntN(3) {
			p := NextPrime(w, new(big.Int).SetUint64(r.Uint64N(1<<(5+r.IntN(36)))))
			for range 1 + r.IntN(2) {
				n.Mul(n, p)
			}
		}
		f := Factor(w, n)
		check(t, n, f)
		if !f.Complete() {
			t.Fatalf("%v was not factored", n)
		}
	}
}

// J. Brillhart et al., Factorizations of b^n +- 1, 3rd edition 2002, tables
// 2-, 3- and 5-.
func TestFactorPower(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		p, n int64
		last string // the largest prime factor
	}{
		{2, 11, "89"}, {2, 67, "761838257287"}, {2, 101, "341117531003194129"},
		{2, 127, "170141183460469231731687303715884105727"}, {2, 128, "67280421310721"},
		{3, 60, "47763361"}, {5, 15, "1741"},
	} {
		f := FactorPower(w, big.NewInt(c.p), int(c.n))
		n := new(big.Int).Exp(big.NewInt(c.p), big.NewInt(c.n), nil)
		check(t, n.Sub(n, one), f)
		if !f.Complete() || f.Primes[len(f.Primes)-1].P.String() != c.last {
			t.Errorf("%d^%d - 1: largest prime %v, want %s", c.p, c.n, f.Primes[len(f.Primes)-1].P, c.last)
		}
	}
	for n := 1; n <= 100; n++ {
		f := FactorPower(w, two, n)
		m := new(big.Int).Lsh(one, uint(n))
		check(t, m.Sub(m, one), f)
		if !f.Complete() {
			t.Errorf("2^%d - 1 was not factored", n)
		}
	}
}

func TestCyclotomic(t *testing.T) {
	for n := 1; n <= 120; n++ {
		c := Cyclotomic(n)
		x := big.NewInt(7)
		v := new(big.Int)
		for i := len(c) - 1; i >= 0; i-- {
			v.Mul(v, x).Add(v, c[i])
		}
		if v.Cmp(CyclotomicValue(n, x)) != 0 {
			t.Fatalf("Phi_%d(7) by coefficients is %v, want %v", n, v, CyclotomicValue(n, x))
		}
	}
	// The first coefficient that is not 0 or +-1: A. Migotti, 1883.
	if c := Cyclotomic(105); c[7].Int64() != -2 {
		t.Errorf("coefficient 7 of Phi_105 is %v, want -2", c[7])
	}
}

func TestSmall(t *testing.T) {
	w := algebra.NewWork(nil)
	for n := 1; n < 300; n++ {
		phi, sum := 0, 0
		for k := 1; k <= n; k++ {
			if gcd64(uint64(k), uint64(n)) == 1 {
				phi++
				if n > 1 {
					order, err := OrderMod(w, big.NewInt(int64(k)), big.NewInt(int64(n)))
					slow := 1
					for x := k % n; x != 1; x = x * k % n {
						slow++
					}
					if err != nil || order.Int64() != int64(slow) {
						t.Fatalf("order of %d modulo %d: %v %v, want %d", k, n, order, err, slow)
					}
				}
			}
		}
		for _, d := range DivisorsInt(n) {
			sum += Mobius(d)
			if n%d != 0 {
				t.Fatalf("%d is no divisor of %d", d, n)
			}
		}
		if EulerPhiInt(n) != phi || EulerPhi(Factor(w, big.NewInt(int64(n)))).Int64() != int64(phi) {
			t.Fatalf("phi(%d) should be %d", n, phi)
		}
		if (sum == 1) != (n == 1) || (sum == 0) != (n > 1) {
			t.Fatalf("the sum of mu over the divisors of %d is %d", n, sum)
		}
	}
}

func TestRoot(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 5))
	for range 500 {
		n, k := new(big.Int).SetUint64(r.Uint64()), 1+r.IntN(9)
		n.Mul(n, n)
		x := Root(n, k)
		e := big.NewInt(int64(k))
		if new(big.Int).Exp(x, e, nil).Cmp(n) > 0 || new(big.Int).Exp(new(big.Int).Add(x, one), e, nil).Cmp(n) <= 0 {
			t.Fatalf("%d-th root of %v is not %v", k, n, x)
		}
	}
}

func BenchmarkFactorPower(b *testing.B) {
	for _, n := range []int{60, 101, 128, 191, 233, 251} {
		b.Run(fmt.Sprintf("2^%d-1", n), func(b *testing.B) {
			for range b.N {
				powers.known = nil
				FactorPower(algebra.NewWork(nil), two, n)
			}
		})
	}
}
