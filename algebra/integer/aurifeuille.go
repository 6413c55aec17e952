package integer

import "math/big"

// References:
//
//	[Schinzel] A. Schinzel, On primitive prime factors of a^n - b^n, 1962: when
//	  Phi_d(p) is a product of two factors of about the same size.
//	[Brent] R. Brent, On computing factors of cyclotomic polynomials, 1993,
//	  algorithm L: the coefficients of Lucas's polynomials.

// aurifeuillian splits n = Phi_d(p) in two where an identity does. With
// C = C_p and D = D_p from lucas, Phi_p'(x) = C(x)^2 - p x D(x)^2, where p' is
// p when p = 1 mod 4, else 2p; at x = p^h, h odd, the right side is a
// difference of squares, and Phi_(p'h)(p) divides the left side.
func aurifeuillian(n, p *big.Int, d int) []*big.Int {
	whole := []*big.Int{n}
	if !p.IsInt64() || p.Int64() > int64(d) {
		return whole
	}
	b := int(p.Int64())
	k := b
	if b%4 != 1 {
		k = 2 * b
	}
	h := d / k
	if d%k != 0 || h%2 == 0 {
		return whole
	}
	c, e := lucas(b)
	x := new(big.Int).Exp(p, big.NewInt(int64(h)), nil)
	l := valueAt(c, x)
	t := valueAt(e, x)
	l.Sub(l, t.Mul(t, new(big.Int).Exp(p, big.NewInt(int64(h+1)/2), nil)))
	g := new(big.Int).GCD(nil, nil, l, n)
	if g.Cmp(one) == 0 || g.Cmp(n) == 0 {
		return whole
	}
	return []*big.Int{g, new(big.Int).Div(n, g)}
}

func valueAt(c []*big.Int, x *big.Int) *big.Int {
	v := new(big.Int)
	for i := len(c) - 1; i >= 0; i-- {
		v.Mul(v, x).Add(v, c[i])
	}
	return v
}

// lucas is the pair of polynomials C and D with Phi_n(x) = C(x)^2 - n x D(x)^2
// for a prime n = 1 mod 4, and the same with Phi_2n for the other primes
// [Brent]. Both are palindromes.
func lucas(n int) (c, d []*big.Int) {
	prime := n
	if n%4 != 1 {
		prime = 2 * n
	}
	half := EulerPhiInt(prime) / 2
	// Power sums of the roots, up to sign and the factor sqrt n of odd ones.
	q := make([]*big.Int, half+2)
	for k := 1; k < len(q); k++ {
		if k%2 == 1 {
			q[k] = big.NewInt(int64(big.Jacobi(big.NewInt(int64(n)), big.NewInt(int64(k)))))
			continue
		}
		g := int(gcd64(uint64(k), uint64(prime)))
		v := int64(Mobius(prime/g) * EulerPhiInt(g))
		switch (n - 1) * k / 2 % 4 { // cos of that many right angles
		case 1, 3:
			v = 0
		case 2:
			v = -v
		}
		q[k] = big.NewInt(v)
	}
	c, d = make([]*big.Int, half+1), make([]*big.Int, half)
	c[0], d[0] = big.NewInt(1), big.NewInt(1)
	nb, s, t := big.NewInt(int64(n)), new(big.Int), new(big.Int)
	for k := 1; k <= half/2; k++ {
		s.SetInt64(0)
		for j := range k {
			s.Add(s, t.Mul(t.Mul(nb, q[2*k-2*j-1]), d[j]))
			s.Sub(s, t.Mul(q[2*k-2*j], c[j]))
		}
		c[k] = new(big.Int).Quo(s, big.NewInt(int64(2*k)))
		if k >= half {
			break
		}
		s.Set(c[k])
		for j := range k {
			s.Add(s, t.Mul(q[2*k+1-2*j], c[j]))
			s.Sub(s, t.Mul(q[2*k-2*j], d[j]))
		}
		d[k] = new(big.Int).Quo(s, big.NewInt(int64(2*k+1)))
	}
	for k := range c {
		if c[k] == nil || k > half/2 {
			c[k] = c[half-k]
		}
	}
	for k := range d {
		if d[k] == nil || k > (half-1)/2 {
			d[k] = d[half-1-k]
		}
	}
	return c, d
}
