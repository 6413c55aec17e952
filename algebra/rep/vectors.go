package rep

import (
	"math/big"

	"adjoin/algebra"
)

// vectors is what a representation with whole words for an element provides:
// kernels on vectors of elements, side by side. Lengths are in words. z may be
// a or b where nothing else is said.
type vectors interface {
	characteristic() *big.Int
	order() *big.Int
	degree() int
	width() int
	one() []uint64

	add(z, a, b []uint64)
	sub(z, a, b []uint64)
	neg(z, a []uint64)
	// scale sets z to c a, addScaled adds c a to z; c is one element and
	// overlaps nothing.
	scale(w *algebra.Work, z, a, c []uint64)
	addScaled(w *algebra.Work, z, a, c []uint64)
	// convolve sets z to the product of the polynomials a and b, neither
	// empty, by a method of its own: len(z) == len(a)+len(b)-width, and
	// z overlaps neither.
	convolve(w *algebra.Work, z, a, b []uint64)
	// square is convolve of a with itself.
	square(w *algebra.Work, z, a []uint64)
	// dot sets z to the sum of a[i] b[n-1-i] for vectors of n >= 1 elements, one
	// coefficient of a convolution. z overlaps neither.
	dot(w *algebra.Work, z, a, b []uint64)
	// split says whether Karatsuba's method beats convolve for n coefficients,
	// or is wanted so that the computation polls.
	split(n int) bool
	// newton is the number of coefficients from which division through the
	// inverse power series beats long division, when the series is at hand.
	newton() int

	mul(w *algebra.Work, z, a, b []uint64)
	inv(w *algebra.Work, z, a []uint64) bool
	// frobenius sets z to a^(p^k), 0 <= k < degree.
	frobenius(w *algebra.Work, z, a []uint64, k int)
	setInt(z []uint64, n *big.Int)
	code(a []uint64) *big.Int
	fromCode(z []uint64, n *big.Int)
}

// product sets z to the product of the polynomials a and b, neither empty:
// len(z) == len(a)+len(b)-width, and z overlaps neither.
//
// References: A. Karatsuba, Yu. Ofman, Multiplication of multidigit numbers on
// automata, 1963.
func product(w *algebra.Work, v vectors, z, a, b []uint64) {
	if len(a) < len(b) {
		a, b = b, a
	}
	u := v.width()
	na, nb := len(a)/u, len(b)/u
	if nb < 2 || !v.split(nb) {
		v.convolve(w, z, a, b)
		return
	}
	w.Poll()
	m := w.Mark()
	defer w.Release(m)
	h := (na + 1) / 2 * u
	if len(b) <= h {
		// Unbalanced: products of b with pieces of its own length.
		clear(z)
		t := w.Dirty(2*len(b) - u)
		for i := 0; i < len(a); i += len(b) {
			piece := a[i:min(i+len(b), len(a))]
			p := t[:len(piece)+len(b)-u]
			product(w, v, p, piece, b)
			v.add(z[i:i+len(p)], z[i:i+len(p)], p)
		}
		return
	}
	a0, a1, b0, b1 := a[:h], a[h:], b[:h], b[h:]
	s, t, mid := w.Dirty(h), w.Dirty(h), w.Dirty(2*h-u)
	copy(s, a0)
	v.add(s[:len(a1)], s[:len(a1)], a1)
	copy(t, b0)
	v.add(t[:len(b1)], t[:len(b1)], b1)
	product(w, v, mid, s, t)
	low, high := z[:2*h-u], z[2*h:]
	product(w, v, low, a0, b0)
	product(w, v, high, a1, b1)
	clear(z[2*h-u : 2*h])
	v.sub(mid, mid, low)
	v.sub(mid[:len(high)], mid[:len(high)], high)
	v.add(z[h:h+len(mid)], z[h:h+len(mid)], mid)
}

// square is product of a with itself.
func square(w *algebra.Work, v vectors, z, a []uint64) {
	u := v.width()
	if n := len(a) / u; n < 2 || !v.split(n) {
		v.square(w, z, a)
		return
	}
	w.Poll()
	m := w.Mark()
	h := (len(a)/u + 1) / 2 * u
	a0, a1 := a[:h], a[h:]
	s, mid := w.Dirty(h), w.Dirty(2*h-u)
	copy(s, a0)
	v.add(s[:len(a1)], s[:len(a1)], a1)
	square(w, v, mid, s)
	low, high := z[:2*h-u], z[2*h:]
	square(w, v, low, a0)
	square(w, v, high, a1)
	clear(z[2*h-u : 2*h])
	v.sub(mid, mid, low)
	v.sub(mid[:len(high)], mid[:len(high)], high)
	v.add(z[h:h+len(mid)], z[h:h+len(mid)], mid)
	w.Release(m)
}

// isZero says whether all words of a are zero.
func isZero(a []uint64) bool {
	for _, x := range a {
		if x != 0 {
			return false
		}
	}
	return true
}
