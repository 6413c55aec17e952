package rep

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/internal/gf2x"
	"adjoin/algebra/poly"
)

// binary is F_{2^n} over packed bits: a residue in Words(n) words.
type binary struct {
	mod  *packedModulus
	n    int
	u    int
	q    *big.Int
	unit []uint64
}

func newBinary(m *poly.Poly) *binary {
	b := &binary{mod: newPackedModulus(m), n: m.Degree()}
	b.u = gf2x.Words(b.n)
	b.q = new(big.Int).Lsh(big.NewInt(1), uint(b.n))
	b.unit = make([]uint64, b.u)
	b.unit[0] = 1
	return b
}

func (b *binary) base() poly.Arith    { return packed{} }
func (b *binary) modulus() *poly.Poly { return b.mod.m }

func (b *binary) toPoly(a poly.Elem) *poly.Poly {
	f := new(poly.Poly)
	copyBits(f, a)
	return f
}

func (b *binary) fromPoly(w *algebra.Work, z poly.Elem, f *poly.Poly) {
	m := w.Mark()
	t := w.Dirty(len(f.W))
	copy(t, f.W)
	t = b.mod.reduce(t)
	copy(z, t)
	clear(z[len(t):])
	w.Release(m)
}

func (b *binary) characteristic() *big.Int { return two }
func (b *binary) order() *big.Int          { return b.q }
func (b *binary) degree() int              { return b.n }
func (b *binary) width() int               { return b.u }
func (b *binary) one() []uint64            { return b.unit }

func (b *binary) add(z, x, y []uint64) { xorVec(z, x, y) }
func (b *binary) sub(z, x, y []uint64) { xorVec(z, x, y) }
func (b *binary) neg(z, x []uint64)    { copy(z, x) }

func xorVec(z, x, y []uint64) {
	z, y = z[:len(x)], y[:len(x)]
	for i, a := range x {
		z[i] = a ^ y[i]
	}
}

func (b *binary) split(n int) bool { return n >= BinarySplit }
func (b *binary) newton() int      { return BinaryNewton }

// Crossovers for F_{2^n} as for word primes.
var (
	BinarySplit  = 6
	BinaryNewton = 6
)

// square squares the coefficients, as the characteristic is 2.
func (b *binary) square(w *algebra.Work, z, x []uint64) {
	u := b.u
	clear(z)
	for i := 0; i < len(x); i += u {
		b.sqr(w, z[2*i:2*i+u], x[i:i+u])
	}
}

func (b *binary) convolve(w *algebra.Work, z, x, y []uint64) {
	u := b.u
	nx, ny := len(x)/u, len(y)/u
	for k := range nx + ny - 1 {
		from, to := max(0, k-ny+1), min(nx, k+1)
		b.dot(w, z[k*u:(k+1)*u], x[from*u:to*u], y[(k-to+1)*u:(k-from+1)*u])
	}
}

// dot adds up the products and reduces once.
func (b *binary) dot(w *algebra.Work, z, x, y []uint64) {
	u := b.u
	m := w.Mark()
	sum, p := w.Words(2*u), w.Dirty(2*u)
	scratch := w.Dirty(gf2x.Scratch(u, u))
	for i := 0; i < len(x); i += u {
		gf2x.Mul(p, x[i:i+u], y[len(y)-u-i:len(y)-i], scratch, nil)
		xorVec(sum, sum, p)
	}
	copy(z, b.mod.reduce(sum))
	w.Release(m)
}

func (b *binary) mul(w *algebra.Work, z, x, y []uint64) {
	m := w.Mark()
	p := w.Dirty(2 * b.u)
	gf2x.Mul(p, x[:b.u], y[:b.u], w.Dirty(gf2x.Scratch(b.u, b.u)), nil)
	copy(z, b.mod.reduce(p))
	w.Release(m)
}

func (b *binary) sqr(w *algebra.Work, z, x []uint64) {
	m := w.Mark()
	p := w.Dirty(2 * b.u)
	gf2x.Sqr(p, x[:b.u])
	copy(z, b.mod.reduce(p))
	w.Release(m)
}

func (b *binary) scale(w *algebra.Work, z, x, c []uint64) {
	for i := 0; i < len(x); i += b.u {
		b.mul(w, z[i:i+b.u], x[i:i+b.u], c)
	}
}

func (b *binary) addScaled(w *algebra.Work, z, x, c []uint64) {
	m := w.Mark()
	p := w.Dirty(b.u)
	for i := 0; i < len(x); i += b.u {
		b.mul(w, p, x[i:i+b.u], c)
		xorVec(z[i:i+b.u], z[i:i+b.u], p)
	}
	w.Release(m)
}

func (b *binary) inv(w *algebra.Work, z, x []uint64) bool {
	m := w.Mark()
	ok := gf2x.Inverse(z, x[:b.u], b.mod.m.W, b.n, w.Dirty(gf2x.InverseScratch(len(b.mod.m.W))))
	w.Release(m)
	return ok
}

func (b *binary) frobenius(w *algebra.Work, z, x []uint64, k int) {
	copy(z, x)
	for range k {
		w.Poll()
		b.sqr(w, z, z)
	}
}

func (b *binary) setInt(z []uint64, n *big.Int) {
	clear(z)
	z[0] = uint64(n.Bit(0))
}

func (b *binary) code(x []uint64) *big.Int { return bigOfWords(x) }

func (b *binary) fromCode(z []uint64, n *big.Int) {
	buf := n.FillBytes(make([]byte, 8*len(z)))
	for i := range z {
		z[i] = 0
		for _, c := range buf[8*(len(z)-1-i) : 8*(len(z)-i)] {
			z[i] = z[i]<<8 | uint64(c)
		}
	}
}

func bigOfWords(x []uint64) *big.Int {
	buf := make([]byte, 8*len(x))
	for i, y := range x {
		for j := range 8 {
			buf[len(buf)-1-8*i-j] = byte(y >> (8 * j))
		}
	}
	return new(big.Int).SetBytes(buf)
}
