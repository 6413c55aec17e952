package ratpoly

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/integer"
)

// References:
//
//	[Dedekind] R. Dedekind, Beweis für die Irreductibilität der
//	  Kreistheilungs-Gleichungen, 1857.

// UnityDivides says whether x^m - 1 divides x^n - 1, m and n >= 1, and gives
// the quotient when it does: exactly when m divides n.
func UnityDivides(m, n int) (quotient Poly, v algebra.Verdict) {
	if r := n % m; r != 0 {
		v = algebra.Because(false, "x^%d - 1 modulo x^%d - 1 is x^%d - 1, because %d modulo %d is %d", n, m, r, n, m, r)
		v.Evidence = v.Evidence.With("remainder", Monomial(r).Sub(FromInts(1)))
		return Poly{}, v
	}
	c := make([]*big.Int, n-m+1)
	for i := range c {
		c[i] = zero
		if i%m == 0 {
			c[i] = one
		}
	}
	v = algebra.Because(true, "%d divides %d", m, n)
	v.Evidence = v.Evidence.With("quotient", Poly{c, nil})
	return Poly{c, nil}, v
}

// unity recognises x^n - 1 and x^n + 1, and lists the indices of the cyclotomic
// polynomials whose product they are.
func unity(f []*big.Int) (indices []int, ok bool) {
	n := len(f) - 1
	for _, x := range f[1:n] {
		if x.Sign() != 0 {
			return nil, false
		}
	}
	if f[n].Cmp(one) != 0 || f[0].CmpAbs(one) != 0 {
		return nil, false
	}
	if f[0].Sign() < 0 {
		return integer.DivisorsInt(n), true
	}
	for _, d := range integer.DivisorsInt(2 * n) {
		if n%d != 0 {
			indices = append(indices, d)
		}
	}
	return indices, true
}

// cyclotomicIndex is the n for which f is the n-th cyclotomic polynomial, or 0.
func cyclotomicIndex(w *algebra.Work, f []*big.Int) int {
	d := len(f) - 1
	if d < 1 || f[d].Cmp(one) != 0 || f[0].CmpAbs(one) != 0 {
		return 0
	}
	for i, x := range f {
		if x.CmpAbs(f[d-i]) != 0 {
			return 0
		}
	}
	// phi(n) > n/6 while fewer than nine primes divide n, which is below
	// 223092870; so n < 6 d.
	for n := d + 1; n <= 6*d+6; n++ {
		w.Poll()
		// The coefficient after the leading one is minus the sum of the roots.
		if integer.EulerPhiInt(n) != d || f[d-1].Cmp(big.NewInt(int64(-integer.Mobius(n)))) != 0 && d > 1 {
			continue
		}
		if compare(integer.Cyclotomic(n), f) == 0 {
			return n
		}
	}
	return 0
}
