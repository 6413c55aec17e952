package integer

import (
	"math/big"
	"math/bits"

	"adjoin/algebra"
	"adjoin/algebra/internal/limbs"
)

// References:
//
//	[Pollard] J. Pollard, Theorems on factorization and primality testing,
//	  1974.
//	[Montgomery] P. Montgomery, Speeding the Pollard and elliptic curve methods
//	  of factorization, 1987, section 4: the standard continuation.

// The bounds of p-1: all prime powers of r-1 up to the first, and one more
// prime up to the second.
const (
	minusFirst  = 50_000
	minusSecond = 2_500_000
)

// pMinus1 is a proper divisor of an odd n, or nil [Pollard]: a prime factor r
// is found when r-1 is step times a product of small primes.
func pMinus1(w *algebra.Work, n *big.Int, step int) *big.Int {
	m := limbs.New(n)
	t := make([]uint64, m.Scratch())
	number := func() []uint64 { return make([]uint64, m.K) }
	divisor := func(a []uint64) (g *big.Int, done bool) {
		g = new(big.Int).GCD(nil, nil, m.From(a, t), n)
		if g.Cmp(n) == 0 {
			return nil, true // all prime factors at once
		}
		return g, g.Cmp(one) != 0
	}
	a, base, x := number(), number(), number()
	power := func(e uint64) {
		copy(base, a)
		for i := bits.Len64(e) - 2; i >= 0; i-- {
			m.Mul(a, a, a, t)
			if e>>i&1 == 1 {
				m.Mul(a, a, base, t)
			}
		}
	}
	m.Into(a, big.NewInt(3), t)
	power(uint64(step))
	primes := PrimesUpTo(minusSecond)
	i := 0
	for ; primes[i] <= minusFirst; i++ {
		q := uint64(primes[i])
		for primes[i] < minusFirst/int(q) {
			q *= uint64(primes[i])
		}
		power(q)
		if i%256 == 255 {
			w.Poll()
			m.SubVec(x, a, m.One())
			if g, done := divisor(x); done {
				return g
			}
		}
	}
	// a^q for the primes q that follow, by the powers of their differences.
	square := number()
	m.Mul(square, a, a, t)
	jumps := [][]uint64{nil, square}
	jump := func(d int) []uint64 {
		for len(jumps) <= d/2 {
			z := number()
			m.Mul(z, jumps[len(jumps)-1], square, t)
			jumps = append(jumps, z)
		}
		return jumps[d/2]
	}
	product := append([]uint64(nil), m.One()...)
	last := primes[i]
	power(uint64(last))
	for ; i < len(primes); i++ {
		if d := primes[i] - last; d > 0 {
			m.Mul(a, a, jump(d), t)
			last = primes[i]
		}
		m.SubVec(x, a, m.One())
		m.Mul(product, product, x, t)
		if i%4096 == 0 {
			w.Poll()
			if g, done := divisor(product); done {
				return g
			}
		}
	}
	g, done := divisor(product)
	if !done {
		return nil
	}
	return g
}
