package rep

import (
	"math/big"
	"math/bits"

	"adjoin/algebra"
	"adjoin/algebra/internal/gf2x"
	"adjoin/algebra/poly"
)

// packed is F_2 with polynomials of packed bits.
type packed struct{}

var (
	two    = big.NewInt(2)
	bitOne = []uint64{1}
)

func (packed) Characteristic() *big.Int { return two }
func (packed) Order() *big.Int          { return two }
func (packed) Degree() int              { return 1 }
func (packed) Width() int               { return 1 }
func (packed) Packed() bool             { return true }
func (packed) One() poly.Elem           { return bitOne }

func (packed) SetInt(z poly.Elem, n *big.Int)                       { z[0] = uint64(n.Bit(0)) }
func (packed) AddElem(z, a, b poly.Elem)                            { z[0] = a[0] ^ b[0] }
func (packed) SubElem(z, a, b poly.Elem)                            { z[0] = a[0] ^ b[0] }
func (packed) NegElem(z, a poly.Elem)                               { z[0] = a[0] }
func (packed) MulElem(w *algebra.Work, z, a, b poly.Elem)           { z[0] = a[0] & b[0] }
func (packed) FrobeniusElem(w *algebra.Work, z, a poly.Elem, _ int) { z[0] = a[0] }
func (packed) Code(a poly.Elem) *big.Int                            { return new(big.Int).SetUint64(a[0]) }
func (packed) FromCode(z poly.Elem, n *big.Int)                     { z[0] = uint64(n.Bit(0)) }

func (packed) InvElem(w *algebra.Work, z, a poly.Elem) bool {
	z[0] = a[0]
	return a[0] != 0
}

// trimBits makes z the polynomial with these bits.
func trimBits(z *poly.Poly, words []uint64) {
	z.N = gf2x.Degree(words) + 1
	z.W = words[:gf2x.Words(z.N)]
}

// room returns n words for the result in z, with what they hold undefined.
func room(z *poly.Poly, n int) []uint64 {
	if n > cap(z.W) {
		return make([]uint64, n)
	}
	return z.W[:n]
}

func (packed) Coeff(z poly.Elem, f *poly.Poly, i int) {
	z[0] = 0
	if i < f.N {
		z[0] = f.W[i/64] >> (i % 64) & 1
	}
}

func (packed) SetCoeff(f *poly.Poly, i int, a poly.Elem) {
	n := max(len(f.W), i/64+1)
	words := room(f, n)
	copy(words, f.W)
	clear(words[len(f.W):])
	words[i/64] = words[i/64]&^(1<<(i%64)) | a[0]<<(i%64)
	trimBits(f, words)
}

func (packed) Add(z, f, g *poly.Poly) {
	if f.N < g.N {
		f, g = g, f
	}
	fw, gw := f.W, g.W
	words := room(z, len(fw))
	// Where both are, first: z may be g.
	for i, x := range gw {
		words[i] = fw[i] ^ x
	}
	copy(words[len(gw):], fw[len(gw):])
	trimBits(z, words)
}

func (p packed) Sub(z, f, g *poly.Poly) { p.Add(z, f, g) }

func (packed) Neg(z, f *poly.Poly) { copyBits(z, f.W) }

func copyBits(z *poly.Poly, from []uint64) {
	words := room(z, len(from))
	copy(words, from)
	trimBits(z, words)
}

func (packed) Scale(w *algebra.Work, z, f *poly.Poly, c poly.Elem) {
	if c[0] == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	copyBits(z, f.W)
}

func (p packed) AddScaled(w *algebra.Work, z, f *poly.Poly, c poly.Elem) {
	if c[0] != 0 {
		p.Add(z, z, f)
	}
}

func (packed) Slice(z, f *poly.Poly, from, to int) {
	to = min(to, f.N)
	if from >= to {
		z.W, z.N = z.W[:0], 0
		return
	}
	n := gf2x.Words(to - from)
	words := room(z, n)
	gf2x.Shr(words, f.W, from)
	if s := (to - from) % 64; s > 0 {
		words[n-1] &= 1<<s - 1
	}
	trimBits(z, words)
}

func (packed) Shift(z, f *poly.Poly, k int) {
	if f.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	words := room(z, gf2x.Words(f.N+k))
	gf2x.Shl(words, f.W, k)
	trimBits(z, words)
}

func (packed) Reverse(z, f *poly.Poly, n int) {
	// Coefficient i goes to 64 len(f.W) - 1 - i first, then to n - i.
	t := make([]uint64, len(f.W))
	for i, x := range f.W {
		t[len(t)-1-i] = bits.Reverse64(x)
	}
	words := room(z, gf2x.Words(n+1))
	if k := n + 1 - 64*len(t); k >= 0 {
		gf2x.Shl(words, t, k)
	} else {
		gf2x.Shr(words, t, -k)
	}
	trimBits(z, words)
}

func (packed) Dot(_ *algebra.Work, z poly.Elem, f, g *poly.Poly) {
	var sum uint64
	for i := range min(len(f.W), len(g.W)) {
		sum ^= f.W[i] & g.W[i]
	}
	z[0] = uint64(bits.OnesCount64(sum) & 1)
}

func (packed) Mul(w *algebra.Work, z, f, g *poly.Poly) {
	if f.N == 0 || g.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	m := w.Mark()
	t := mulBits(w, f.W, g.W)
	copyBits(z, t)
	w.Release(m)
}

// mulBits is the product in the arena. Neither operand is empty.
func mulBits(w *algebra.Work, a, b []uint64) []uint64 {
	w.Poll()
	t := w.Dirty(len(a) + len(b))
	gf2x.Mul(t, a, b, w.Dirty(gf2x.Scratch(len(a), len(b))), w.Poll)
	return t
}

func (packed) Sqr(w *algebra.Work, z, f *poly.Poly) {
	m := w.Mark()
	t := w.Dirty(2 * len(f.W))
	gf2x.Sqr(t, f.W)
	copyBits(z, t)
	w.Release(m)
}

func (p packed) DivRem(w *algebra.Work, q, r, f, g *poly.Poly) {
	if min(f.N-g.N, g.N) >= PackedDivisionThreshold {
		poly.DivRemBySeries(w, p, q, r, f, g)
		return
	}
	w.Poll()
	m := w.Mark()
	t := w.Dirty(len(f.W))
	copy(t, f.W)
	var quo []uint64
	if q != nil {
		quo = w.Words(gf2x.Words(max(0, f.N-g.N+1)))
	}
	gf2x.DivRemBy(quo, t, g.W, g.Degree(), gf2x.TopInverse(g.W, g.Degree()), w.Poll)
	if q != nil {
		copyBits(q, quo)
	}
	if r != nil {
		copyBits(r, t)
	}
	w.Release(m)
}

// PackedDivisionThreshold is the number of bits of quotient and divisor from
// which division goes by the inverse power series.
var PackedDivisionThreshold = 20000

func (packed) Derivative(z, f *poly.Poly) {
	// d/dx keeps the terms of odd degree and moves them down by one.
	n := len(f.W)
	words := room(z, n)
	for i, x := range f.W {
		words[i] = x >> 1 & 0x5555555555555555
	}
	trimBits(z, words)
}

func (packed) FrobeniusCoeffs(w *algebra.Work, z, f *poly.Poly, k int) { copyBits(z, f.W) }

// References:
//
//	[Barrett] P. Barrett, Implementing the RSA public key encryption algorithm on
//	  a standard digital signal processor, 1986: the quotient by two products.
//	  For polynomials it is exact.

// packedModulus reduces by folding, when its terms below the leading one are
// few and far below it, as in [Barrett] when it is long, and by long division
// otherwise.
type packedModulus struct {
	m       *poly.Poly
	inverse uint64
	terms   []int      // exponents below the leading one, or nil
	barrett *poly.Poly // quotient of x^(2n) by m of degree n, or nil
}

func (p packed) NewModulus(w *algebra.Work, m *poly.Poly) poly.Modulus {
	z := newPackedModulus(m)
	if n := m.Degree(); z.terms == nil && n >= PackedNewton {
		z.barrett = new(poly.Poly)
		poly.DivRemBySeries(w, p, z.barrett, nil, poly.Monomial(p, bitOne, 2*n), m)
	}
	return z
}

// PackedNewton is the degree from which reduction by a fixed modulus goes
// through its inverse.
var PackedNewton = 6000

func newPackedModulus(m *poly.Poly) *packedModulus {
	z := &packedModulus{m: &poly.Poly{W: append([]uint64(nil), m.W...), N: m.N}}
	n := m.Degree()
	z.inverse = gf2x.TopInverse(z.m.W, n)
	var terms []int
	for i := range n {
		if m.W[i/64]>>(i%64)&1 == 1 {
			terms = append(terms, i)
		}
	}
	// A folded word must not come back into itself.
	if k := len(terms); k > 0 && k <= 6 && n-terms[k-1] >= 64 {
		z.terms = terms
	}
	return z
}

func (m *packedModulus) Poly() *poly.Poly { return m.m }

// reduce reduces t in place and returns the words that may not be zero.
func (m *packedModulus) reduce(t []uint64) []uint64 {
	n := m.m.Degree()
	if m.terms == nil {
		gf2x.DivRemBy(nil, t, m.m.W, n, m.inverse, nil)
	} else {
		for j := len(t) - 1; 64*j >= n; j-- {
			x := t[j]
			t[j] = 0
			for _, e := range m.terms {
				m.fold(t, x, 64*j-n+e)
			}
		}
		// The word that holds x^n keeps its lower part.
		if j, s := n/64, uint(n%64); j < len(t) && s > 0 {
			x := t[j] >> s
			t[j] &= 1<<s - 1
			for _, e := range m.terms {
				m.fold(t, x, e)
			}
		}
	}
	return t[:min(len(t), gf2x.Words(n))]
}

// fold adds x^k times the word x.
func (*packedModulus) fold(t []uint64, x uint64, k int) {
	j, s := k/64, uint(k%64)
	t[j] ^= x << s
	if s > 0 && j+1 < len(t) {
		t[j+1] ^= x >> (64 - s)
	}
}

// reduceLong is reduce that may take long.
func (m *packedModulus) reduceLong(w *algebra.Work, t []uint64) []uint64 {
	n := m.m.Degree()
	d := gf2x.Degree(t)
	if m.terms != nil || d < n {
		return m.reduce(t)
	}
	if m.barrett == nil || d > 2*n {
		gf2x.DivRemBy(nil, t, m.m.W, n, m.inverse, w.Poll)
		return t[:gf2x.Words(n)]
	}
	mark := w.Mark()
	high := w.Dirty(gf2x.Words(d + 1 - n))
	gf2x.Shr(high, t, n)
	p := mulBits(w, high, m.barrett.W)
	gf2x.Shr(high, p, n)
	t = t[:gf2x.Words(n)]
	xorVec(t, t, mulBits(w, high, m.m.W))
	if s := n % 64; s > 0 {
		t[len(t)-1] &= 1<<s - 1
	}
	w.Release(mark)
	return t
}

func (m *packedModulus) Reduce(w *algebra.Work, z, f *poly.Poly) {
	mark := w.Mark()
	t := w.Dirty(len(f.W))
	copy(t, f.W)
	copyBits(z, m.reduceLong(w, t))
	w.Release(mark)
}

func (m *packedModulus) MulMod(w *algebra.Work, z, f, g *poly.Poly) {
	if f.N == 0 || g.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	mark := w.Mark()
	copyBits(z, m.reduceLong(w, mulBits(w, f.W, g.W)))
	w.Release(mark)
}

func (m *packedModulus) SqrMod(w *algebra.Work, z, f *poly.Poly) {
	w.Poll()
	mark := w.Mark()
	t := w.Dirty(2 * len(f.W))
	gf2x.Sqr(t, f.W)
	copyBits(z, m.reduceLong(w, t))
	w.Release(mark)
}
