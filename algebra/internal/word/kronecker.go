package word

import (
	"math/big"
	"math/bits"
	"sync"
)

// References:
//
//	[Kronecker] Kronecker's substitution: the product of two polynomials is read
//	  off the product of their values at a power of 2 so high that the
//	  coefficients do not overlap. J. von zur Gathen, J. Gerhard, Modern Computer
//	  Algebra, 3rd edition 2013, section 8.4.

// buffers are the integers of one product; the pool keeps steady work free of
// allocation.
type buffers struct {
	x, y, z big.Int
	xw, yw  []big.Word
}

var pool = sync.Pool{New: func() any { return new(buffers) }}

// wide says whether a big.Word is a uint64, which Kronecker needs.
const wide = bits.UintSize == 64

// Kronecker is Convolve through one product of long integers [Kronecker].
func (m *Mod) Kronecker(z, a, b []uint64) {
	if !wide {
		m.Convolve(z, a, b)
		return
	}
	// A coefficient is a sum of at most n products below P^2.
	s := 2*bits.Len64(m.P) + bits.Len(uint(min(len(a), len(b))))
	t := pool.Get().(*buffers)
	t.xw = pack(t.xw, a, s)
	t.x.SetBits(t.xw)
	y := &t.x
	if &a[0] != &b[0] || len(a) != len(b) {
		t.yw = pack(t.yw, b, s)
		y = t.y.SetBits(t.yw)
	}
	m.unpack(z, t.z.Mul(&t.x, y).Bits(), s)
	pool.Put(t)
}

// pack lays the entries of a s bits apart. It reuses z.
func pack(z []big.Word, a []uint64, s int) []big.Word {
	n := (len(a)*s+63)/64 + 1
	if n > cap(z) {
		z = make([]big.Word, n)
	}
	z = z[:n]
	clear(z)
	at := 0
	for _, x := range a {
		j, k := at/64, uint(at%64)
		z[j] |= big.Word(x << k)
		z[j+1] |= big.Word(x >> 1 >> (63 - k))
		at += s
	}
	return z
}

// unpack sets z to the numbers of s bits, s < 192, that lie side by side in t,
// modulo P.
func (m *Mod) unpack(z []uint64, t []big.Word, s int) {
	word := func(j int) uint64 {
		if j < len(t) {
			return uint64(t[j])
		}
		return 0
	}
	// mask of the last word that a number reaches
	last := (s - 1) / 64
	mask := ^uint64(0) >> (63 - (s-1)%64)
	for i := range z {
		at := i * s
		j, k := at/64, uint(at%64)
		get := func(i int) uint64 { return word(j+i)>>k | word(j+i+1)<<1<<(63-k) }
		switch last {
		case 0:
			z[i] = m.Reduce(0, get(0)&mask)
		case 1:
			z[i] = m.Reduce(m.Reduce(0, get(1)&mask), get(0))
		default:
			z[i] = m.Reduce(m.Reduce(m.Reduce(0, get(2)&mask), get(1)), get(0))
		}
	}
}
