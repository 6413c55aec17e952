package gf2x

import "math/bits"

// Degree is the degree of a, and -1 for zero.
func Degree(a []uint64) int {
	for i := len(a) - 1; i >= 0; i-- {
		if a[i] != 0 {
			return 64*i + bits.Len64(a[i]) - 1
		}
	}
	return -1
}

// Words is the number of words that n coefficients need.
func Words(n int) int { return (n + 63) / 64 }

// DivRem divides r by g, which has degree d >= 0 and d/64+1 words. r keeps the
// remainder; q, unless it is nil, is zero on entry and gets the quotient, for
// which it has Words(deg r - d + 1) words.
//
// The quotient comes a word at a time: read from the highest term down, it is
// the product of the power series r and 1/g, and 64 terms of it need only the
// 64 highest terms of both.
func DivRem(q, r, g []uint64, d int) {
	DivRemBy(q, r, g, d, TopInverse(g, d), nil)
}

// TopInverse is 1/g as a power series in 1/x to 64 terms, term i in bit i.
func TopInverse(g []uint64, d int) uint64 {
	t := bits.Reverse64(topWord(g, d))
	inv := uint64(1)
	for range 6 { // each step doubles the number of right terms
		inv = low(low(inv, inv), t)
	}
	return inv
}

// DivRemBy is DivRem with the TopInverse of g at hand. Long divisions call
// poll, which may be nil, every millisecond or so.
func DivRemBy(q, r, g []uint64, d int, inverse uint64, poll func()) {
	work := 0
	for n := Degree(r); n >= d; n = Degree(r[:n/64+1]) {
		if work += len(g); work > 1<<16 && poll != nil {
			poll()
			work = 0
		}
		// As many terms as leave a whole number of words below them.
		k := (n-d)%64 + 1
		t := bits.Reverse64(low(bits.Reverse64(topWord(r, n)), inverse)) >> (64 - k)
		j := (n - d) / 64
		if q != nil {
			q[j] ^= t
		}
		if over := j + len(g); over < len(r) {
			AddMulWord(r[j:over+1], g, t)
		} else {
			// The product ends in the last word of r.
			last := len(g) - 1
			AddMulWord(r[j:over], g[:last], t)
			_, lo := Mul64(g[last], t)
			r[over-1] ^= lo
		}
	}
}

// topWord is the 64 coefficients of a from x^d down, the highest in the top
// bit.
func topWord(a []uint64, d int) uint64 {
	j, s := d/64, uint(d%64)
	x := a[j] << (63 - s)
	if s < 63 && j > 0 {
		x |= a[j-1] >> (s + 1)
	}
	return x
}
