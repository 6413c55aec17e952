package poly

import (
	"math/big"

	"adjoin/algebra"
)

// References:
//
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997, section 3.1:
//	  the order of a polynomial.

// Primes gives the primes that divide q^d - 1, and whether these are all of
// them.
type Primes func(d int) (primes []*big.Int, all bool)

// OrderMod is the multiplicative order of h modulo an irreducible f that does
// not divide it. Without all primes of q^d - 1 it is a multiple of the order,
// and exact is false.
func OrderMod(w *algebra.Work, A Arith, h, f *Poly, primes Primes) (order *big.Int, exact bool) {
	d := f.Degree()
	M := A.NewModulus(w, f)
	r := new(Poly)
	M.Reduce(w, r, h)
	list, all := primes(d)
	n := new(big.Int).Exp(A.Order(), big.NewInt(int64(d)), nil)
	n.Sub(n, big.NewInt(1))
	q, rem := new(big.Int), new(big.Int)
	for _, p := range list {
		// The part of the order that is a power of p.
		pow, count := new(big.Int).Set(n), 0
		for q.QuoRem(pow, p, rem); rem.Sign() == 0; q.QuoRem(pow, p, rem) {
			pow.Set(q)
			count++
		}
		t := powModulus(w, A, M, r, pow)
		n.Set(pow)
		for ; count > 0 && !IsOne(A, t); count-- {
			t = powModulus(w, A, M, t, p)
			n.Mul(n, p)
		}
	}
	return n, all
}

// Order is the least n >= 1 with f dividing x^n - 1, for f with f(0) not 0
// [LN, theorem 3.11]. exact is as for OrderMod.
func Order(w *algebra.Work, A Arith, f *Poly, primes Primes) (order *big.Int, exact bool) {
	order, exact = big.NewInt(1), true
	_, list := Factorize(w, A, f)
	most := 1
	for _, g := range list {
		n, ok := OrderMod(w, A, X(A), g.F, primes)
		exact = exact && ok
		gcd := new(big.Int).GCD(nil, nil, order, n)
		order.Mul(order, n.Div(n, gcd))
		most = max(most, g.E)
	}
	// The least power of p that reaches the highest multiplicity.
	for t := big.NewInt(1); t.Cmp(big.NewInt(int64(most))) < 0; t.Mul(t, A.Characteristic()) {
		order.Mul(order, A.Characteristic())
	}
	return order, exact
}
