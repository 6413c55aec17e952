package ratpoly

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

// References:
//
//	[vzGG] J. von zur Gathen, J. Gerhard, Modern Computer Algebra, 3rd edition
//	  2013, sections 6.4 to 6.7: gcds and resultants modulo small primes.

// images calls f with primes just below 2^62, one after the other, until it
// returns false.
func images(w *algebra.Work, f func(p *big.Int, A poly.Arith) bool) {
	p := new(big.Int).Lsh(one, 62)
	for p.Sub(p, one); ; p.Sub(p, big.NewInt(2)) {
		w.Poll()
		if p.ProbablyPrime(0) && !f(p, rep.Prime(p)) {
			return
		}
	}
}

// mod is the image of integer coefficients over a prime field.
func mod(A poly.Arith, c []*big.Int) *poly.Poly {
	f, e := new(poly.Poly), make(poly.Elem, A.Width())
	for i := len(c) - 1; i >= 0; i-- {
		A.SetInt(e, c[i])
		A.SetCoeff(f, i, e)
	}
	return f
}

// Mod is the image of f over a prime field whose characteristic does not
// divide the denominator of f.
func (f Poly) Mod(w *algebra.Work, A poly.Arith) *poly.Poly {
	g := mod(A, f.c)
	d := make(poly.Elem, A.Width())
	A.SetInt(d, f.den())
	if !A.InvElem(w, d, d) {
		algebra.Fail(algebra.Errorf(algebra.Undefined, "a denominator is divisible by %v", A.Characteristic()))
	}
	A.Scale(w, g, g, d)
	return g
}

// GCD is the monic greatest common divisor over Q, zero when both are zero.
func (f Poly) GCD(w *algebra.Work, g Poly) Poly {
	d := Poly{gcd(w, primitive(f.c), primitive(g.c)), nil}
	if d.IsZero() {
		return d
	}
	return d.Scale(new(big.Rat).SetFrac(one, d.c[len(d.c)-1]))
}

// gcd is the primitive gcd of primitive polynomials: images modulo primes are
// put together until the result divides both [vzGG, algorithm 6.38].
func gcd(w *algebra.Work, f, g []*big.Int) []*big.Int {
	if len(f) == 0 {
		return g
	}
	if len(g) == 0 {
		return f
	}
	lead := new(big.Int).GCD(nil, nil, f[len(f)-1], g[len(g)-1])
	var c crt
	var result []*big.Int
	images(w, func(p *big.Int, A poly.Arith) bool {
		l := make(poly.Elem, A.Width())
		if A.SetInt(l, lead); poly.IsZeroElem(l) {
			return true
		}
		d := poly.GCD(w, A, mod(A, f), mod(A, g))
		if d.N == 1 {
			result = []*big.Int{one}
			return false
		}
		if c.values != nil && d.N > len(c.values) {
			return true // an unlucky prime
		}
		if d.N < len(c.values) {
			c = crt{} // all primes so far were unlucky
		}
		A.Scale(w, d, d, l)
		values := make([]*big.Int, d.N)
		for i := range values {
			values[i] = A.Code(poly.Coeff(A, d, i))
		}
		if changed := c.add(p, values); changed {
			return true
		}
		h := primitive(c.balanced())
		if divides(w, h, f) && divides(w, h, g) {
			result = h
			return false
		}
		return true
	})
	return result
}

func divides(w *algebra.Work, g, f []*big.Int) bool {
	if len(f) < len(g) {
		return false
	}
	_, r, ok := divInts(w, f, g)
	if !ok {
		return false
	}
	for _, x := range r {
		if x.Sign() != 0 {
			return false
		}
	}
	return true
}

// crt puts residues together by the Chinese remainder theorem.
type crt struct {
	modulus *big.Int
	values  []*big.Int
}

// add takes in residues modulo p, and says whether the balanced values changed.
func (c *crt) add(p *big.Int, values []*big.Int) bool {
	if c.values == nil {
		c.modulus, c.values = new(big.Int).Set(p), values
		return true
	}
	before := c.balanced()
	inv := new(big.Int).ModInverse(c.modulus, p)
	for i, v := range values {
		t := new(big.Int).Sub(v, c.values[i])
		t.Mul(t, inv).Mod(t, p)
		c.values[i].Add(c.values[i], t.Mul(t, c.modulus))
	}
	c.modulus.Mul(c.modulus, p)
	for i, x := range c.balanced() {
		if x.Cmp(before[i]) != 0 {
			return true
		}
	}
	return false
}

// balanced is the values as residues of least absolute value.
func (c *crt) balanced() []*big.Int {
	list := make([]*big.Int, len(c.values))
	for i, v := range c.values {
		list[i] = balance(v, c.modulus)
	}
	return list
}

// balance is the residue of least absolute value modulo m of v, 0 <= v < m.
func balance(v, m *big.Int) *big.Int {
	x := new(big.Int).Lsh(v, 1)
	if x.Cmp(m) > 0 {
		return x.Sub(v, m)
	}
	return x.Set(v)
}

// norm is an upper bound of the Euclidean norm.
func norm(c []*big.Int) *big.Int {
	s := new(big.Int)
	for _, x := range c {
		s.Add(s, new(big.Int).Mul(x, x))
	}
	return s.Sqrt(s).Add(s, one)
}

// Resultant is the product of lead(f)^deg g lead(g)^deg f (a - b) over the
// complex roots a of f and b of g; zero when either is zero.
func (f Poly) Resultant(w *algebra.Work, g Poly) *big.Rat {
	if f.IsZero() || g.IsZero() {
		return new(big.Rat)
	}
	m, n := f.Degree(), g.Degree()
	r := resultant(w, f.c, g.c)
	d := new(big.Int).Exp(f.den(), big.NewInt(int64(n)), nil)
	d.Mul(d, new(big.Int).Exp(g.den(), big.NewInt(int64(m)), nil))
	return new(big.Rat).SetFrac(r, d)
}

// resultant works modulo primes up to Hadamard's bound ||f||^deg g ||g||^deg f.
func resultant(w *algebra.Work, f, g []*big.Int) *big.Int {
	bound := sylvester(w, f, g)
	var c crt
	images(w, func(p *big.Int, A poly.Arith) bool {
		a, b := mod(A, f), mod(A, g)
		if a.N < len(f) || b.N < len(g) {
			return true
		}
		c.add(p, []*big.Int{A.Code(poly.Resultant(w, A, a, b))})
		return c.modulus.Cmp(bound) <= 0
	})
	return c.balanced()[0]
}

// sylvester is twice Hadamard's bound of the minors of Sylvester's matrix of f
// and g; the size is checked first.
func sylvester(w *algebra.Work, f, g []*big.Int) *big.Int {
	a, b := norm(f), norm(g)
	limit(len(g)-1, a.BitLen())
	limit(len(f)-1, b.BitLen())
	w.Poll()
	bound := a.Exp(a, big.NewInt(int64(len(g)-1)), nil)
	bound.Mul(bound, b.Exp(b, big.NewInt(int64(len(f)-1)), nil))
	return bound.Lsh(bound, 1)
}

// Lift is the polynomial whose coefficients are the residues of least absolute
// value of those of f, over a prime field.
func Lift(A poly.Arith, f *poly.Poly) Poly {
	c := make([]*big.Int, f.N)
	for i := range c {
		c[i] = balance(A.Code(poly.Coeff(A, f, i)), A.Characteristic())
	}
	return over(c, one)
}

// Discriminant is lead(f)^(2n-2) times the product of (a - b)^2 over pairs of
// complex roots, for f of degree n >= 1.
func (f Poly) Discriminant(w *algebra.Work) *big.Rat {
	n := f.Degree()
	r := f.Resultant(w, f.Derivative())
	r.Quo(r, f.Coefficient(n))
	if n*(n-1)/2%2 == 1 {
		r.Neg(r)
	}
	return r
}
