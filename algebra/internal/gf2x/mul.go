package gf2x

import "math/bits"

// References:
//
//	[Pornin] T. Pornin, BearSSL: constant-time multiplication without carries,
//	  by integer products of operands with three holes between their bits.
//	[Karatsuba] A. Karatsuba, Yu. Ofman, Multiplication of multidigit numbers
//	  on automata, 1963.

// every holds the bits 0, 4, 8, ... of a word. Sixteen of them can meet in one
// column of a product; only the sixteenth column reaches the count 16, and its
// carry leaves the word.
const every = 0x1111111111111111

// low is the low word of the product x y.
func low(x, y uint64) uint64 {
	x0, x1, x2, x3 := x&every, x&(every<<1), x&(every<<2), x&(every<<3)
	y0, y1, y2, y3 := y&every, y&(every<<1), y&(every<<2), y&(every<<3)
	z0 := x0*y0 ^ x1*y3 ^ x2*y2 ^ x3*y1
	z1 := x0*y1 ^ x1*y0 ^ x2*y3 ^ x3*y2
	z2 := x0*y2 ^ x1*y1 ^ x2*y0 ^ x3*y3
	z3 := x0*y3 ^ x1*y2 ^ x2*y1 ^ x3*y0
	return z0&every | z1&(every<<1) | z2&(every<<2) | z3&(every<<3)
}

// Mul64 is the product of two words.
func Mul64(x, y uint64) (hi, lo uint64) {
	return bits.Reverse64(low(bits.Reverse64(x), bits.Reverse64(y))) >> 1, low(x, y)
}

// Windows of the schoolbook method: a table of the sixteen multiples of one
// word, each of up to 67 bits, kept as a low word and the bits above it.
type windows struct{ lo, hi [16]uint64 }

func (t *windows) set(y uint64) {
	t.lo[1] = y
	for i := 2; i < 16; i += 2 {
		t.lo[i] = t.lo[i/2] << 1
		t.hi[i] = t.hi[i/2]<<1 | t.lo[i/2]>>63
		t.lo[i+1], t.hi[i+1] = t.lo[i]^y, t.hi[i]
	}
}

func (t *windows) mul(x uint64) (hi, lo uint64) {
	for s := 60; s >= 0; s -= 4 {
		hi = hi<<4 | lo>>60
		lo <<= 4
		i := x >> s & 15
		lo ^= t.lo[i]
		hi ^= t.hi[i]
	}
	return hi, lo
}

// AddMulWord adds a y to z, where len(z) == len(a)+1.
func AddMulWord(z, a []uint64, y uint64) {
	if y == 0 {
		return
	}
	var t windows
	t.set(y)
	z = z[:len(a)+1]
	for i, x := range a {
		if x == 0 {
			continue
		}
		hi, lo := t.mul(x)
		z[i] ^= lo
		z[i+1] ^= hi
	}
}

// KaratsubaThreshold is the number of words of the shorter operand from which
// products are split.
var KaratsubaThreshold = 12

// Mul sets z to a b. len(z) == len(a)+len(b), both operands have at least one
// word, and z overlaps neither. scratch has at least Scratch(len(a), len(b))
// words. Long products call poll, which may be nil, every millisecond or so.
func Mul(z, a, b, scratch []uint64, poll func()) {
	if len(a) < len(b) {
		a, b = b, a
	}
	switch {
	case len(b) < KaratsubaThreshold:
		clear(z)
		for j, y := range b {
			AddMulWord(z[j:j+len(a)+1], a, y)
		}
	case 2*len(b) <= len(a)+1:
		// Unbalanced: products of b with pieces of its own length.
		clear(z)
		n := len(b)
		t := scratch[:2*n]
		for i := 0; i < len(a); i += n {
			piece := a[i:min(i+n, len(a))]
			p := t[:len(piece)+n]
			Mul(p, piece, b, scratch[2*n:], poll)
			xor(z[i:i+len(p)], p)
		}
	default:
		karatsuba(z, a, b, scratch, poll)
	}
}

// Scratch is the number of words that Mul needs beside its result for
// operands of m and n words.
func Scratch(m, n int) int { return 8*max(m, n) + 256 }

// karatsuba splits both operands at half of the longer one, h words:
// a b = a1 b1 X^2 + ((a0+a1)(b0+b1) + a0 b0 + a1 b1) X + a0 b0 with X = x^(64h).
func karatsuba(z, a, b, scratch []uint64, poll func()) {
	if poll != nil && len(a) > 256 {
		poll()
	}
	h := (len(a) + 1) / 2
	a0, a1, b0, b1 := a[:h], a[h:], b[:h], b[h:]
	s, t, m, rest := scratch[:h], scratch[h:2*h], scratch[2*h:4*h], scratch[4*h:]
	copy(s, a0)
	xor(s, a1)
	copy(t, b0)
	xor(t, b1)
	Mul(m, s, t, rest, poll)
	Mul(z[:2*h], a0, b0, rest, poll)
	Mul(z[2*h:], a1, b1, rest, poll)
	xor(m, z[:2*h])
	xor(m, z[2*h:])
	xor(z[h:], m[:min(len(m), len(z)-h)])
}

// xor adds a to the front of z.
func xor(z, a []uint64) {
	z = z[:len(a)]
	for i, x := range a {
		z[i] ^= x
	}
}

// Sqr sets z to a^2: the bits of a with a zero between every two. len(z) ==
// 2 len(a), and z does not overlap a.
func Sqr(z, a []uint64) {
	for i, x := range a {
		z[2*i], z[2*i+1] = spread(uint32(x)), spread(uint32(x>>32))
	}
}

// spread puts a zero between every two bits.
func spread(x uint32) uint64 {
	y := uint64(x)
	y = (y | y<<16) & 0x0000ffff0000ffff
	y = (y | y<<8) & 0x00ff00ff00ff00ff
	y = (y | y<<4) & 0x0f0f0f0f0f0f0f0f
	y = (y | y<<2) & 0x3333333333333333
	return (y | y<<1) & 0x5555555555555555
}

// Gather is the inverse of spread: the even bits of x, side by side.
func Gather(x uint64) uint32 {
	x &= 0x5555555555555555
	x = (x | x>>1) & 0x3333333333333333
	x = (x | x>>2) & 0x0f0f0f0f0f0f0f0f
	x = (x | x>>4) & 0x00ff00ff00ff00ff
	x = (x | x>>8) & 0x0000ffff0000ffff
	return uint32(x | x>>16)
}
