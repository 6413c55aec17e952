package integer

import (
	"fmt"
	"math/big"
	"math/bits"

	"adjoin/algebra"
	"adjoin/algebra/internal/word"
)

// References:
//
//	[BPSW] R. Baillie, S. Wagstaff, Lucas pseudoprimes, 1980; C. Pomerance,
//	  J. Selfridge, S. Wagstaff, The pseudoprimes to 25 10^9, 1980. No composite
//	  below 2^64 passes: checked against J. Feitsma's list of pseudoprimes to
//	  the base 2, 2013. math/big implements it.
//	[Sinclair] J. Sinclair, the seven bases that decide below 2^64, 2011,
//	  checked against the same list (from memory).

var (
	one = big.NewInt(1)
	two = big.NewInt(2)
)

// IsPrime says whether n is prime. Below 2^64, and for every composite, the
// answer is proved; above, a number that passes the test of Baillie, Pomerance,
// Selfridge and Wagstaff is probably prime.
func IsPrime(w *algebra.Work, n *big.Int) algebra.Verdict {
	w.Poll()
	if n.Cmp(two) < 0 {
		return algebra.Because(false, "a prime is at least 2")
	}
	if d := smallDivisor(n); d != 0 {
		if n.IsInt64() && n.Int64() == d {
			return algebra.Because(true, "no smaller prime divides it")
		}
		v := algebra.Because(false, "%d divides it", d)
		v.Evidence = v.Evidence.With("divisor", big.NewInt(d))
		return v
	}
	const source = "R. Baillie, S. Wagstaff, Lucas pseudoprimes, 1980"
	if !n.ProbablyPrime(0) {
		v := witness(n)
		if v.Evidence.Source == "" {
			v.Evidence.Source = source
		}
		return v
	}
	if n.IsUint64() {
		v := algebra.Because(true, "it passes the Baillie-PSW test, which decides below 2^64")
		v.Evidence.Source = source
		return v
	}
	return algebra.Verdict{Holds: true, Evidence: algebra.Evidence{
		Standing: algebra.Probable,
		Reason:   "it passes the Baillie-PSW test; no composite is known that does",
		Source:   source,
	}}
}

// witness is why a composite n is not prime: a base a for which n fails the
// strong test (G. Miller, 1976; M. Rabin, 1980), which shows itself either in
// a^(n-1) or in a square root of 1.
func witness(n *big.Int) algebra.Verdict {
	minus := new(big.Int).Sub(n, one)
	s := minus.TrailingZeroBits()
	odd := new(big.Int).Rsh(minus, s)
	for _, p := range PrimesUpTo(50) {
		a := big.NewInt(int64(p))
		x := new(big.Int).Exp(a, odd, n)
		root := new(big.Int)
		for range s {
			if x.Cmp(one) == 0 {
				break
			}
			root.Set(x)
			x.Mul(x, x).Mod(x, n)
		}
		switch {
		case x.Cmp(one) != 0:
			v := algebra.Because(false, "%d^(n-1) is not 1 modulo n", p)
			v.Evidence = v.Evidence.With(fmt.Sprintf("%d^(n-1) mod n", p), x)
			v.Evidence.Source = "P. de Fermat, 1640"
			return v
		case root.Sign() != 0 && root.Cmp(minus) != 0:
			v := algebra.Because(false, "1 has a square root modulo n other than 1 and -1")
			v.Evidence = v.Evidence.With("square root of 1 mod n", root)
			v.Evidence.Source = "M. Rabin, Probabilistic algorithm for testing primality, 1980"
			return v
		}
	}
	return algebra.Because(false, "it fails a test that every prime passes")
}

// smallPrimes are those of trial division.
var smallPrimes = PrimesUpTo(1 << 12)

// smallDivisor is the least prime below 1000 that divides n, or 0.
func smallDivisor(n *big.Int) int64 {
	var m big.Int
	for _, p := range smallPrimes {
		if p > 1000 {
			break
		}
		if m.Mod(n, big.NewInt(int64(p))).Sign() == 0 {
			return int64(p)
		}
	}
	return 0
}

// isPrime64 decides n < 2^63 [Sinclair].
func isPrime64(n uint64) bool {
	if n < 2 {
		return false
	}
	for _, p := range []uint64{2, 3, 5, 7, 11, 13} {
		if n%p == 0 {
			return n == p
		}
	}
	m := word.New(n)
	s := bits.TrailingZeros64(n - 1)
	for _, a := range []uint64{2, 325, 9375, 28178, 450775, 9780504, 1795265022} {
		a %= n
		if a == 0 {
			continue
		}
		x := m.Pow(a, (n-1)>>s)
		if x == 1 || x == n-1 {
			continue
		}
		passed := false
		for range s - 1 {
			if x = m.Mul(x, x); x == n-1 {
				passed = true
				break
			}
		}
		if !passed {
			return false
		}
	}
	return true
}

func isProbablyPrime(n *big.Int) bool {
	if n.BitLen() <= 63 {
		return isPrime64(n.Uint64())
	}
	return n.ProbablyPrime(0)
}

// PrimesUpTo is the list of the primes at most n, by the sieve of
// Eratosthenes.
func PrimesUpTo(n int) []int {
	if n < 2 {
		return nil
	}
	composite := make([]bool, n+1)
	var list []int
	for p := 2; p <= n; p++ {
		if composite[p] {
			continue
		}
		list = append(list, p)
		for m := p * p; m <= n; m += p {
			composite[m] = true
		}
	}
	return list
}

// NextPrime is the least (probable) prime above n.
func NextPrime(w *algebra.Work, n *big.Int) *big.Int {
	m := new(big.Int).Set(n)
	if m.Cmp(one) <= 0 {
		return big.NewInt(2)
	}
	m.Add(m, one)
	if m.Bit(0) == 0 {
		m.Add(m, one)
	}
	for ; !IsPrime(w, m).Holds; m.Add(m, two) {
	}
	return m
}
