package integer

import (
	"math/big"
	"sort"
	"sync"

	"adjoin/algebra"
)

// References:
//
//	[BLSTW] J. Brillhart, D. Lehmer, J. Selfridge, B. Tuckerman, S. Wagstaff,
//	  Factorizations of b^n +- 1, 3rd edition 2002: cyclotomic values and the
//	  intrinsic prime.

type powerKey struct {
	p string
	n int
}

var powers struct {
	sync.Mutex
	known map[powerKey]Factorization
}

// FactorPower factors p^n - 1 for a prime p and n >= 1: it is the product of
// the values Phi_d(p) over d | n. The prime factors of Phi_d(p) are 1 modulo
// d, apart from at most one, the largest prime of d. Results are remembered, so
// nobody changes them.
func FactorPower(w *algebra.Work, p *big.Int, n int) Factorization {
	key := powerKey{p.String(), n}
	powers.Lock()
	f, ok := powers.known[key]
	powers.Unlock()
	if ok {
		return f
	}
	all := &collector{w: w, count: map[string]*PrimePower{}}
	for _, d := range DivisorsInt(n) {
		part := factorCyclotomic(w, p, d)
		for _, q := range part.Primes {
			all.add(q.P, q.E)
		}
		if part.Cofactor != nil {
			if all.left == nil {
				all.left = big.NewInt(1)
			}
			all.left.Mul(all.left, part.Cofactor)
		}
	}
	f = all.result()
	powers.Lock()
	defer powers.Unlock()
	if powers.known == nil || len(powers.known) > 10000 {
		powers.known = map[powerKey]Factorization{}
	}
	powers.known[key] = f
	return f
}

// factorCyclotomic factors Phi_d(p).
func factorCyclotomic(w *algebra.Work, p *big.Int, d int) Factorization {
	n := CyclotomicValue(d, p)
	all := &collector{w: w, count: map[string]*PrimePower{}}
	for _, part := range aurifeuillian(n, p, d) {
		f := factor(w, part, d, hints(p, d))
		for _, q := range f.Primes {
			all.add(q.P, q.E)
		}
		if f.Cofactor != nil {
			if all.left == nil {
				all.left = big.NewInt(1)
			}
			all.left.Mul(all.left, f.Cofactor)
		}
	}
	return all.result()
}

// CyclotomicValue is Phi_d(x), for x >= 2: the product of (x^(d/e) - 1)^mu(e)
// over e | d.
func CyclotomicValue(d int, x *big.Int) *big.Int {
	num, den := big.NewInt(1), big.NewInt(1)
	for _, e := range DivisorsInt(d) {
		m := Mobius(e)
		if m == 0 {
			continue
		}
		t := new(big.Int).Exp(x, big.NewInt(int64(d/e)), nil)
		t.Sub(t, one)
		if m > 0 {
			num.Mul(num, t)
		} else {
			den.Mul(den, t)
		}
	}
	return num.Div(num, den)
}

// Cyclotomic is the list of the coefficients of Phi_n, constant term first.
func Cyclotomic(n int) []*big.Int {
	// The product of (1 - x^(n/e))^mu(e) as a power series to half the degree;
	// the rest follows from symmetry.
	phi := EulerPhiInt(n)
	if n == 1 {
		return []*big.Int{big.NewInt(-1), big.NewInt(1)}
	}
	half := phi/2 + 1
	c := make([]*big.Int, half)
	for i := range c {
		c[i] = new(big.Int)
	}
	c[0].SetInt64(1)
	for _, e := range DivisorsInt(n) {
		k := n / e
		switch Mobius(e) {
		case 1:
			for i := half - 1; i >= k; i-- {
				c[i].Sub(c[i], c[i-k])
			}
		case -1:
			for i := k; i < half; i++ {
				c[i].Add(c[i], c[i-k])
			}
		}
	}
	full := make([]*big.Int, phi+1)
	for i := range full {
		full[i] = new(big.Int).Set(c[min(i, phi-i)])
	}
	return full
}

// Divisors is the list of the divisors of a completely factored number, in
// increasing order.
func Divisors(f Factorization) []*big.Int {
	list := []*big.Int{big.NewInt(1)}
	for _, p := range f.Primes {
		k := len(list)
		q := big.NewInt(1)
		for range p.E {
			q = new(big.Int).Mul(q, p.P)
			for _, d := range list[:k] {
				list = append(list, new(big.Int).Mul(d, q))
			}
		}
	}
	sort.Slice(list, func(i, j int) bool { return list[i].Cmp(list[j]) < 0 })
	return list
}

// EulerPhi is the number of units modulo a completely factored number.
func EulerPhi(f Factorization) *big.Int {
	n := big.NewInt(1)
	for _, p := range f.Primes {
		n.Mul(n, new(big.Int).Exp(p.P, big.NewInt(int64(p.E-1)), nil))
		n.Mul(n, new(big.Int).Sub(p.P, one))
	}
	return n
}
