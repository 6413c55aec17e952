// Package word has the kernels of arithmetic modulo one odd number below 2^63
// on vectors of reduced residues. The functions are free and know no types of
// ours. Everything here is portable Go; faster twins may stand beside it under
// the same names.
package word

import "math/bits"

// References:
//
//	[MG] N. Möller, T. Granlund, Improved division by invariant integers, 2011.
//	[Shoup] V. Shoup's multiplication by an invariant residue with a
//	  precomputed quotient; D. Harvey, Faster arithmetic for number-theoretic
//	  transforms, 2014, section 2.

// Mod is a modulus with the constants of its reduction.
type Mod struct {
	P     uint64
	shift uint   // leading zeros of P
	d     uint64 // P << shift
	v     uint64 // floor((2^128 - 1)/d) - 2^64
}

// New prepares p, 2 <= p < 2^63.
func New(p uint64) Mod {
	s := uint(bits.LeadingZeros64(p))
	d := p << s
	v, _ := bits.Div64(^d, ^uint64(0), d)
	return Mod{p, s, d, v}
}

// Reduce is hi 2^64 + lo modulo P, for hi < P.
func (m *Mod) Reduce(hi, lo uint64) uint64 {
	u1 := hi<<m.shift | lo>>(64-m.shift)
	u0 := lo << m.shift
	q1, q0 := bits.Mul64(m.v, u1)
	var c uint64
	q0, c = bits.Add64(q0, u0, 0)
	q1, _ = bits.Add64(q1, u1, c)
	q1++
	r := u0 - q1*m.d
	if r > q0 {
		r += m.d
	}
	if r >= m.d {
		r -= m.d
	}
	return r >> m.shift
}

// Mul is a b modulo P.
func (m *Mod) Mul(a, b uint64) uint64 {
	hi, lo := bits.Mul64(a, b)
	return m.Reduce(hi, lo)
}

// Add is a + b modulo P.
func (m *Mod) Add(a, b uint64) uint64 {
	s := a + b
	if s >= m.P {
		s -= m.P
	}
	return s
}

// Sub is a - b modulo P.
func (m *Mod) Sub(a, b uint64) uint64 {
	s := a - b
	if a < b {
		s += m.P
	}
	return s
}

// Pow is a^e modulo P.
func (m *Mod) Pow(a, e uint64) uint64 {
	r := uint64(1) % m.P
	for ; e > 0; e >>= 1 {
		if e&1 == 1 {
			r = m.Mul(r, a)
		}
		a = m.Mul(a, a)
	}
	return r
}

// Inv is 1/a modulo a prime P, for a not 0.
func (m *Mod) Inv(a uint64) uint64 {
	// Euclid with the cofactor of a alone; signs alternate.
	r0, r1 := m.P, a
	var s0, s1 uint64 = 0, 1
	negative := false
	for r1 > 1 {
		q := r0 / r1
		r0, r1 = r1, r0-q*r1
		s0, s1 = s1, s0+q*s1
		negative = !negative
	}
	if negative {
		return m.P - s1
	}
	return s1
}

// AddVec sets z to a + b.
func (m *Mod) AddVec(z, a, b []uint64) {
	z, b = z[:len(a)], b[:len(a)]
	for i, x := range a {
		z[i] = m.Add(x, b[i])
	}
}

// SubVec sets z to a - b.
func (m *Mod) SubVec(z, a, b []uint64) {
	z, b = z[:len(a)], b[:len(a)]
	for i, x := range a {
		z[i] = m.Sub(x, b[i])
	}
}

// NegVec sets z to -a.
func (m *Mod) NegVec(z, a []uint64) {
	z = z[:len(a)]
	for i, x := range a {
		if x != 0 {
			x = m.P - x
		}
		z[i] = x
	}
}

// Quotient is floor(c 2^64 / P), which multiplication by an invariant c needs.
func (m *Mod) Quotient(c uint64) uint64 {
	q, _ := bits.Div64(c, 0, m.P)
	return q
}

// ScaleVec sets z to c a.
func (m *Mod) ScaleVec(z, a []uint64, c uint64) {
	q := m.Quotient(c)
	z = z[:len(a)]
	for i, x := range a {
		h, _ := bits.Mul64(q, x)
		y := c*x - h*m.P // in [0, 2P)
		if y >= m.P {
			y -= m.P
		}
		z[i] = y
	}
}

// AddScaledVec adds c a to z.
func (m *Mod) AddScaledVec(z, a []uint64, c uint64) {
	q := m.Quotient(c)
	z = z[:len(a)]
	for i, x := range a {
		h, _ := bits.Mul64(q, x)
		y := c*x - h*m.P // in [0, 2P)
		if y >= m.P {
			y -= m.P
		}
		z[i] = m.Add(z[i], y)
	}
}

// MulVec sets z to the products a[i] b[i].
func (m *Mod) MulVec(z, a, b []uint64) {
	z, b = z[:len(a)], b[:len(a)]
	for i, x := range a {
		z[i] = m.Mul(x, b[i])
	}
}

// Dot is the sum of a[i] b[len(a)-1-i]: the order of a convolution.
func (m *Mod) Dot(a, b []uint64) uint64 {
	b = b[:len(a)]
	var hi, lo, c uint64
	if m.shift >= 8 {
		// A product is below 2^112, so 2^16 of them fit.
		for len(a) > 1<<15 {
			k := len(a) - 1<<15
			lo2 := m.Dot(a[:1<<15], b[k:])
			lo, c = bits.Add64(lo, lo2, 0)
			hi += c
			a, b = a[1<<15:], b[:k]
		}
		for i, x := range a {
			h, l := bits.Mul64(x, b[len(b)-1-i])
			lo, c = bits.Add64(lo, l, 0)
			hi, _ = bits.Add64(hi, h, c)
		}
		return m.Reduce(m.Reduce(0, hi), lo)
	}
	for i, x := range a {
		h, l := bits.Mul64(x, b[len(b)-1-i])
		lo, c = bits.Add64(lo, l, 0)
		hi, _ = bits.Add64(hi, h, c)
		if hi >= m.P { // both parts were below P < 2^63
			hi -= m.P
		}
	}
	return m.Reduce(hi, lo)
}

// Convolve sets z to the product of the polynomials a and b, neither empty.
// len(z) == len(a)+len(b)-1, and z overlaps neither.
func (m *Mod) Convolve(z, a, b []uint64) {
	for k := range z {
		from, to := max(0, k-len(b)+1), min(len(a), k+1)
		z[k] = m.Dot(a[from:to], b[k-to+1:k-from+1])
	}
}

// Square is Convolve of a with itself: the products of two different entries
// are taken once.
func (m *Mod) Square(z, a []uint64) {
	n := len(a)
	for k := range z {
		from, to := max(0, k-n+1), (k+1)/2 // pairs i < k-i
		s := m.Dot(a[from:to], a[k-to+1:k-from+1])
		s = m.Add(s, s)
		if k%2 == 0 {
			s = m.Add(s, m.Mul(a[k/2], a[k/2]))
		}
		z[k] = s
	}
}
