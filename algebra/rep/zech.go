package rep

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// References:
//
//	[Zech] Zech's logarithms, after R. Lidl, H. Niederreiter, Finite Fields, 2nd
//	  edition 1997, exercise 2.8: Z(d) with 1 + g^d = g^Z(d).

// ZechOrder bounds the orders of fields that calculate with logarithms alone:
// their tables take a few milliseconds to fill and stay in cache.
const ZechOrder = 1 << 12

// zech is a small field whose elements are logarithms to the generator g of
// least code, plus one, so that 0 is 0. Sums go through Zech's logarithms.
type zech struct {
	t    *tower   // the same field with its elements as residues
	q1   uint64   // q - 1
	exp  []uint16 // exp[a-1] is the code of a, for a > 0
	log  []uint16 // its inverse, and 0 for 0
	plus []uint16 // plus[d] is 1 + g^d, for 0 <= d < 2(q-1)
	half uint64   // the logarithm of -1
}

func newZech(w *algebra.Work, t *tower) *zech {
	q := int(t.q.Int64())
	z := &zech{t: t, q1: uint64(q - 1), exp: make([]uint16, q-1), log: make([]uint16, q), plus: make([]uint16, 2*(q-1))}
	g := make([]uint64, t.width())
	for code := int64(1); ; code++ {
		t.fromCode(g, big.NewInt(code))
		if z.fill(w, g) {
			break
		}
	}
	p := int(t.characteristic().Int64())
	for d := range z.plus {
		c := int(z.exp[d%(q-1)])
		z.plus[d] = z.log[c-c%p+(c+1)%p]
	}
	if p > 2 {
		z.half = z.q1 / 2
	}
	return z
}

// fill sets the tables for g, and says whether g is a generator.
func (z *zech) fill(w *algebra.Work, g []uint64) bool {
	w.Poll()
	x := append([]uint64(nil), z.t.unit...)
	for i := range z.exp {
		code := z.t.code(x).Uint64()
		if i > 0 && code == 1 {
			return false
		}
		z.exp[i], z.log[code] = uint16(code), uint16(i+1)
		z.t.mul(w, x, x, g)
	}
	return true
}

func (z *zech) base() poly.Arith    { return z.t.k }
func (z *zech) modulus() *poly.Poly { return z.t.mod.m }

func (z *zech) toPoly(a poly.Elem) *poly.Poly {
	r := make([]uint64, z.t.width())
	z.t.fromCode(r, z.code(a))
	return z.t.toPoly(r)
}

func (z *zech) fromPoly(w *algebra.Work, y poly.Elem, f *poly.Poly) {
	m := w.Mark()
	r := w.Dirty(z.t.width())
	z.t.fromPoly(w, r, f)
	y[0] = uint64(z.log[z.t.code(r).Uint64()])
	w.Release(m)
}

func (z *zech) characteristic() *big.Int { return z.t.characteristic() }
func (z *zech) order() *big.Int          { return z.t.q }
func (z *zech) degree() int              { return z.t.degree() }
func (z *zech) width() int               { return 1 }
func (z *zech) one() []uint64            { return bitOne }

func (z *zech) split(n int) bool { return n >= ZechSplit }
func (z *zech) newton() int      { return ZechNewton }

// Crossovers for fields with Zech's logarithms as for word primes.
var (
	ZechSplit  = 48
	ZechNewton = 32
)

// sum is a + b.
func (z *zech) sum(a, b uint64) uint64 {
	if a == 0 {
		return b
	}
	if b == 0 {
		return a
	}
	return z.times(a, uint64(z.plus[b+z.q1-a]))
}

// times is a b.
func (z *zech) times(a, b uint64) uint64 {
	if a == 0 || b == 0 {
		return 0
	}
	c := a + b - 1
	if c > z.q1 {
		c -= z.q1
	}
	return c
}

func (z *zech) minus(a uint64) uint64 { return z.times(a, z.half+1) }

func (z *zech) add(y, a, b []uint64) {
	for i, x := range a {
		y[i] = z.sum(x, b[i])
	}
}

func (z *zech) sub(y, a, b []uint64) {
	for i, x := range a {
		y[i] = z.sum(x, z.minus(b[i]))
	}
}

func (z *zech) neg(y, a []uint64) {
	for i, x := range a {
		y[i] = z.minus(x)
	}
}

func (z *zech) scale(_ *algebra.Work, y, a, c []uint64) {
	for i, x := range a {
		y[i] = z.times(x, c[0])
	}
}

func (z *zech) addScaled(_ *algebra.Work, y, a, c []uint64) {
	for i, x := range a {
		y[i] = z.sum(y[i], z.times(x, c[0]))
	}
}

func (z *zech) dot(_ *algebra.Work, y, a, b []uint64) {
	var s uint64
	for i, x := range a {
		s = z.sum(s, z.times(x, b[len(b)-1-i]))
	}
	y[0] = s
}

func (z *zech) convolve(w *algebra.Work, y, a, b []uint64) {
	clear(y)
	for i := range a {
		z.addScaled(w, y[i:i+len(b)], b, a[i:i+1])
	}
}

func (z *zech) square(w *algebra.Work, y, a []uint64) { z.convolve(w, y, a, a) }

func (z *zech) mul(_ *algebra.Work, y, a, b []uint64) { y[0] = z.times(a[0], b[0]) }

func (z *zech) inv(_ *algebra.Work, y, a []uint64) bool {
	y[0] = (z.q1+1-a[0])%z.q1 + 1
	return true
}

func (z *zech) frobenius(_ *algebra.Work, y, a []uint64, k int) {
	if a[0] == 0 {
		y[0] = 0
		return
	}
	e, p := a[0]-1, z.characteristic().Uint64()
	for range k {
		e = e * p % z.q1
	}
	y[0] = e + 1
}

// setInt uses that the code of an integer is its residue.
func (z *zech) setInt(y []uint64, n *big.Int) {
	y[0] = uint64(z.log[new(big.Int).Mod(n, z.characteristic()).Uint64()])
}

func (z *zech) code(a []uint64) *big.Int {
	if a[0] == 0 {
		return new(big.Int)
	}
	return new(big.Int).SetUint64(uint64(z.exp[a[0]-1]))
}

func (z *zech) fromCode(y []uint64, n *big.Int) { y[0] = uint64(z.log[n.Uint64()]) }
