package ratpoly

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// References:
//
//	[vzGG] J. von zur Gathen, J. Gerhard, Modern Computer Algebra, 3rd edition
//	  2013, section 6.10: the cofactors are quotients of minors of Sylvester's
//	  matrix by the resultant, so all can be found modulo primes.

// XGCD is the monic greatest common divisor d over Q and the u and v with
// u f + v g = d, deg u < deg g - deg d and deg v < deg f - deg d wherever these
// bounds are positive. All are zero when f and g are.
func (f Poly) XGCD(w *algebra.Work, g Poly) (d, u, v Poly) {
	d = f.GCD(w, g)
	inverse := func(h Poly) Poly { // of a constant
		return Constant(new(big.Rat).Inv(h.Coefficient(0)))
	}
	if d.IsZero() {
		return d, Poly{}, Poly{}
	}
	a, _ := f.DivRem(w, d)
	b, _ := g.DivRem(w, d)
	switch {
	case b.Degree() == 0 && a.Degree() != 0:
		return d, Poly{}, inverse(b)
	case a.Degree() == 0:
		return d, inverse(a), Poly{}
	}
	r, s, t := bezout(w, a.c, b.c)
	scale := func(c []*big.Int, den *big.Int) Poly {
		return over(c, one).Scale(new(big.Rat).SetFrac(den, r))
	}
	return d, scale(s, a.den()), scale(t, b.den())
}

// bezout is the resultant r of coprime a and b, both of positive degree, and
// the s and t with s a + t b = r, deg s < deg b and deg t < deg a.
func bezout(w *algebra.Work, a, b []*big.Int) (r *big.Int, s, t []*big.Int) {
	m, n := len(a)-1, len(b)-1
	bound := sylvester(w, a, b)
	var c crt
	images(w, func(p *big.Int, A poly.Arith) bool {
		f, g := mod(A, a), mod(A, b)
		if f.N <= m || g.N <= n {
			return true
		}
		res := poly.Resultant(w, A, f, g)
		if poly.IsZeroElem(res) {
			return true
		}
		_, u, v := poly.XGCD(w, A, f, g)
		A.Scale(w, u, u, res)
		A.Scale(w, v, v, res)
		values := []*big.Int{A.Code(res)}
		for i := range n {
			values = append(values, A.Code(poly.Coeff(A, u, i)))
		}
		for i := range m {
			values = append(values, A.Code(poly.Coeff(A, v, i)))
		}
		c.add(p, values)
		return c.modulus.Cmp(bound) <= 0
	})
	all := c.balanced()
	return all[0], all[1 : n+1], all[n+1:]
}
