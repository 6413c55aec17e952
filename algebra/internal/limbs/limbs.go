// Package limbs has the kernels of arithmetic modulo one odd number of several
// words, least word first, in Montgomery's form. The functions are free and
// know no types of ours. Everything here is portable Go; faster twins may
// stand beside it under the same names.
package limbs

import (
	"math/big"
	"math/bits"
)

// References:
//
//	[Montgomery] P. Montgomery, Modular multiplication without trial division,
//	  1985. The radix here is R = 2^(64 (k+1)) for a modulus of k words: one
//	  word more than usual, so that a sum of up to 2^64 products is reduced as
//	  cheaply as one of them.

// Mod is a modulus of K words with the constants of its reduction. Residues
// have K words, are below P, and stand for their value times R.
type Mod struct {
	K   int
	P   []uint64
	neg uint64   // -1/P modulo 2^64
	one []uint64 // R modulo P
	sqr []uint64 // R^2 modulo P
}

// New prepares p, which is odd.
func New(p *big.Int) *Mod {
	k := (p.BitLen() + 63) / 64
	m := &Mod{K: k, P: words(p, k)}
	inv := m.P[0] // right to 3 bits; each step doubles them
	for range 5 {
		inv *= 2 - m.P[0]*inv
	}
	m.neg = -inv
	r := new(big.Int).Lsh(big.NewInt(1), uint(64*(k+1)))
	m.one = words(new(big.Int).Mod(r, p), k)
	m.sqr = words(r.Mod(r.Mul(r, r), p), k)
	return m
}

func words(n *big.Int, k int) []uint64 {
	z := make([]uint64, k)
	b := n.FillBytes(make([]byte, 8*k))
	for i := range z {
		for _, c := range b[8*(k-1-i) : 8*(k-i)] {
			z[i] = z[i]<<8 | uint64(c)
		}
	}
	return z
}

// Int is the number with the given words.
func Int(a []uint64) *big.Int {
	b := make([]byte, 8*len(a))
	for i, x := range a {
		for j := range 8 {
			b[len(b)-1-8*i-j] = byte(x >> (8 * j))
		}
	}
	return new(big.Int).SetBytes(b)
}

// One is the residue 1; callers do not change it.
func (m *Mod) One() []uint64 { return m.one }

// Into sets z to the residue of n, 0 <= n < P. t has Scratch words.
func (m *Mod) Into(z []uint64, n *big.Int, t []uint64) { m.Mul(z, words(n, m.K), m.sqr, t) }

// From is the number that the residue a stands for. t has Scratch words.
func (m *Mod) From(a, t []uint64) *big.Int {
	t = t[:m.Scratch()]
	clear(t)
	copy(t, a)
	z := make([]uint64, m.K)
	m.redc(z, t)
	return Int(z)
}

// Scratch is the number of scratch words that products need.
func (m *Mod) Scratch() int { return 2*m.K + 2 }

// redc sets z to t/R modulo P, for t < P R in 2K+2 words, which it destroys.
func (m *Mod) redc(z, t []uint64) {
	k := m.K
	for i := range k + 1 {
		u := t[i] * m.neg
		carry := addMul(t[i:i+k], m.P, u)
		for j := i + k; carry != 0; j++ {
			t[j], carry = bits.Add64(t[j], carry, 0)
		}
	}
	m.fold(z, t[k+1:2*k+1], t[2*k+1])
}

// fold sets z to a, with one more word, less P where that is needed: the value
// is below 2P.
func (m *Mod) fold(z, a []uint64, top uint64) {
	if top == 0 && less(a, m.P) {
		copy(z, a)
		return
	}
	sub(z, a, m.P)
}

func less(a, b []uint64) bool {
	for i := len(a) - 1; i >= 0; i-- {
		if a[i] != b[i] {
			return a[i] < b[i]
		}
	}
	return false
}

// addMul adds a y to z, of the same length, and returns the carry.
func addMul(z, a []uint64, y uint64) (carry uint64) {
	z = z[:len(a)]
	for i, x := range a {
		hi, lo := bits.Mul64(x, y)
		var c uint64
		lo, c = bits.Add64(lo, carry, 0)
		hi += c
		z[i], c = bits.Add64(z[i], lo, 0)
		carry = hi + c
	}
	return carry
}

func add(z, a, b []uint64) (carry uint64) {
	for i, x := range a {
		z[i], carry = bits.Add64(x, b[i], carry)
	}
	return carry
}

func sub(z, a, b []uint64) (borrow uint64) {
	for i, x := range a {
		z[i], borrow = bits.Sub64(x, b[i], borrow)
	}
	return borrow
}

// Mul sets z to a b; z may be a or b. t has Scratch words.
func (m *Mod) Mul(z, a, b, t []uint64) {
	t = t[:m.Scratch()]
	clear(t)
	m.accumulate(t, a, b)
	m.redc(z, t)
}

// accumulate adds the product of a and b to t.
func (m *Mod) accumulate(t, a, b []uint64) {
	k := m.K
	for i, y := range b[:k] {
		carry := addMul(t[i:i+k], a[:k], y)
		for j := i + k; carry != 0; j++ {
			t[j], carry = bits.Add64(t[j], carry, 0)
		}
	}
}

// AddVec sets z to a + b, vectors of residues.
func (m *Mod) AddVec(z, a, b []uint64) {
	for i := 0; i < len(a); i += m.K {
		zi := z[i : i+m.K]
		m.fold(zi, zi, add(zi, a[i:i+m.K], b[i:i+m.K]))
	}
}

// SubVec sets z to a - b.
func (m *Mod) SubVec(z, a, b []uint64) {
	for i := 0; i < len(a); i += m.K {
		zi := z[i : i+m.K]
		if sub(zi, a[i:i+m.K], b[i:i+m.K]) != 0 {
			add(zi, zi, m.P)
		}
	}
}

// NegVec sets z to -a.
func (m *Mod) NegVec(z, a []uint64) {
	for i := 0; i < len(a); i += m.K {
		zi, ai := z[i:i+m.K], a[i:i+m.K]
		zero := true
		for _, x := range ai {
			zero = zero && x == 0
		}
		if zero {
			clear(zi)
		} else {
			sub(zi, m.P, ai)
		}
	}
}

// ScaleVec sets z to c a. t has Scratch words.
func (m *Mod) ScaleVec(z, a, c, t []uint64) {
	for i := 0; i < len(a); i += m.K {
		m.Mul(z[i:i+m.K], a[i:i+m.K], c, t)
	}
}

// AddScaledVec adds c a to z. t has Scratch words and K more.
func (m *Mod) AddScaledVec(z, a, c, t []uint64) {
	p := t[m.Scratch() : m.Scratch()+m.K]
	for i := 0; i < len(a); i += m.K {
		m.Mul(p, a[i:i+m.K], c, t)
		m.AddVec(z[i:i+m.K], z[i:i+m.K], p)
	}
}

// Convolve sets z to the product of the polynomials a and b, neither empty:
// len(z) == len(a)+len(b)-K, and z overlaps neither. t has Scratch words.
func (m *Mod) Convolve(z, a, b, t []uint64) {
	k := m.K
	na, nb := len(a)/k, len(b)/k
	for i := range na + nb - 1 {
		from, to := max(0, i-nb+1), min(na, i+1)
		m.Dot(z[i*k:(i+1)*k], a[from*k:to*k], b[(i-to+1)*k:(i-from+1)*k], t)
	}
}

// Dot sets z to the sum of a[i] b[n-1-i] for vectors of n residues: the order
// of a convolution. z overlaps neither. t has Scratch words.
func (m *Mod) Dot(z, a, b, t []uint64) {
	k := m.K
	t = t[:m.Scratch()]
	clear(t)
	for i := 0; i < len(a); i += k {
		m.accumulate(t, a[i:i+k], b[len(b)-k-i:len(b)-i])
	}
	m.redc(z, t)
}
