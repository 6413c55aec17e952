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

// All pairs of congruences modulo small numbers, against a search.
func TestCRT(t *testing.T) {
	for m := int64(1); m <= 12; m++ {
		for n := int64(1); n <= 12; n++ {
			for a := range m {
				for b := range n {
					x, l, err := CRT([]*big.Int{big.NewInt(a), big.NewInt(b)}, []*big.Int{big.NewInt(m), big.NewInt(n)})
					want := int64(-1)
					for k := m*n - 1; k >= 0; k-- {
						if k%m == a && k%n == b {
							want = k
						}
					}
					lcm := m * n / int64(gcd64(uint64(m), uint64(n)))
					if (err == nil) != (want >= 0) || err == nil && (x.Int64() != want || l.Int64() != lcm) {
						t.Fatalf("%d mod %d and %d mod %d: %v %v %v, want %d", a, m, b, n, x, l, err, want)
					}
				}
			}
		}
	}
}

func TestPerfectPower(t *testing.T) {
	for n := int64(2); n < 2000; n++ {
		want := 1
		for b := int64(2); b*b <= n; b++ {
			k, q := 1, b
			for ; q < n; k++ {
				q *= b
			}
			if q == n {
				want = max(want, k)
			}
		}
		root, k := PerfectPower(big.NewInt(n))
		if k != want || new(big.Int).Exp(root, big.NewInt(int64(k)), nil).Int64() != n {
			t.Fatalf("%d is %v^%d, want exponent %d", n, root, k, want)
		}
	}
}

// What is said of composites is true of them: Fermat's test, and square roots
// of 1. Among them are the strong pseudoprimes to the base 2 below 30000 (C.
// Pomerance, J. Selfridge, S. Wagstaff, The pseudoprimes to 25 10^9, 1980) and
// the Carmichael numbers below 10000 (R. Carmichael, 1910).
func TestWitness(t *testing.T) {
	w := algebra.NewWork(nil)
	list := []string{"2047", "3277", "4033", "4681", "8321", "15841", "29341", "561", "1105", "1729", "2465", "2821", "6601", "8911",
		"3825123056546413051", "318665857834031151167461", "1000036000099", "0x10000000000000000000000000000000000000000000000000000000000000001"}
	for _, s := range list {
		n := number(s)
		if IsPrime(w, n).Holds {
			t.Errorf("%v is composite", n)
		}
		v := witness(n)
		if v.Holds || len(v.Evidence.Witness) != 1 {
			t.Fatalf("%v: %+v", n, v)
		}
		x := v.Evidence.Witness[0].Value.(*big.Int)
		if v.Evidence.Witness[0].Name == "square root of 1 mod n" {
			y := new(big.Int).Mul(x, x)
			if y.Mod(y, n).Cmp(one) != 0 || x.Cmp(one) == 0 || new(big.Int).Add(x, one).Cmp(n) == 0 {
				t.Errorf("%v is no witness against %v", x, n)
			}
		} else if x.Cmp(one) == 0 {
			t.Errorf("%v: Fermat's test passes", n)
		}
	}
}

func TestPMinus1(t *testing.T) {
	w := algebra.NewWork(nil)
	// 2^67 - 1: 193707721 - 1 = 2^3 3^3 5 67 2677 (F. Cole, 1903).
	n := new(big.Int).Lsh(one, 67)
	n.Sub(n, one)
	if d := pMinus1(w, n, 1); d == nil || d.String() != "193707721" {
		t.Errorf("p-1 finds %v in 2^67 - 1", d)
	}
	// A prime r with r-1 = 2 * 1000003 * k, k small: only the second stage.
	r := new(big.Int)
	for k := int64(1); ; k++ {
		if r.SetInt64(2000006*k + 1); r.ProbablyPrime(0) {
			break
		}
	}
	m := new(big.Int).Mul(r, number("170141183460469231731687303715884105727"))
	if d := pMinus1(w, m, 1); d == nil || d.Cmp(r) != 0 {
		t.Errorf("the second stage of p-1 finds %v, want %v", d, r)
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
