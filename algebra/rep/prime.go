package rep

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/internal/limbs"
	"adjoin/algebra/internal/word"
	"adjoin/algebra/poly"
)

// Prime is the field F_p. That p is prime is the caller's word.
func Prime(p *big.Int) poly.Arith {
	switch {
	case p.Cmp(two) == 0:
		return packed{}
	case p.BitLen() <= 63:
		return newDense(&wordPrime{word.New(p.Uint64()), new(big.Int).Set(p)})
	}
	return newDense(&longPrime{limbs.New(p), new(big.Int).Set(p)})
}

// wordPrime is F_p for an odd p below 2^63.
type wordPrime struct {
	m word.Mod
	p *big.Int
}

func (f *wordPrime) characteristic() *big.Int { return f.p }
func (f *wordPrime) order() *big.Int          { return f.p }
func (f *wordPrime) degree() int              { return 1 }
func (f *wordPrime) width() int               { return 1 }
func (f *wordPrime) one() []uint64            { return bitOne }

// split leaves what Kronecker's substitution does well to convolve.
func (f *wordPrime) split(n int) bool { return n >= WordSplit && !f.kronecker(n) }

func (f *wordPrime) kronecker(n int) bool {
	return f.p.BitLen() <= WordKroneckerBits && WordKronecker <= n && n < 1<<14
}

func (f *wordPrime) newton() int { return WordNewton }

// Crossovers, in coefficients: Split is where products are split in two,
// Newton where division by a fixed modulus goes through its inverse power
// series. Word is for word primes, Long for longer ones.
var (
	WordSplit = 48
	// Kronecker's substitution takes over from WordKronecker for primes of up to
	// WordKroneckerBits bits.
	WordKronecker     = 32
	WordKroneckerBits = 40
	WordNewton        = 48
	LongSplit         = 16
	LongNewton        = 16
)

func (f *wordPrime) add(z, a, b []uint64) { f.m.AddVec(z, a, b) }
func (f *wordPrime) sub(z, a, b []uint64) { f.m.SubVec(z, a, b) }
func (f *wordPrime) neg(z, a []uint64)    { f.m.NegVec(z, a) }

func (f *wordPrime) scale(_ *algebra.Work, z, a, c []uint64)     { f.m.ScaleVec(z, a, c[0]) }
func (f *wordPrime) addScaled(_ *algebra.Work, z, a, c []uint64) { f.m.AddScaledVec(z, a, c[0]) }
func (f *wordPrime) dot(_ *algebra.Work, z, a, b []uint64)       { z[0] = f.m.Dot(a, b) }
func (f *wordPrime) mul(_ *algebra.Work, z, a, b []uint64)       { z[0] = f.m.Mul(a[0], b[0]) }

func (f *wordPrime) inv(_ *algebra.Work, z, a []uint64) bool {
	z[0] = f.m.Inv(a[0])
	return true
}

func (f *wordPrime) convolve(_ *algebra.Work, z, a, b []uint64) {
	if f.kronecker(min(len(a), len(b))) {
		f.m.Kronecker(z, a, b)
	} else {
		f.m.Convolve(z, a, b)
	}
}

func (f *wordPrime) square(_ *algebra.Work, z, a []uint64) {
	if f.kronecker(len(a)) {
		f.m.Kronecker(z, a, a)
	} else {
		f.m.Square(z, a)
	}
}

func (f *wordPrime) frobenius(_ *algebra.Work, z, a []uint64, _ int) { z[0] = a[0] }

func (f *wordPrime) setInt(z []uint64, n *big.Int) {
	if n.Sign() < 0 || n.Cmp(f.p) >= 0 {
		n = new(big.Int).Mod(n, f.p)
	}
	z[0] = n.Uint64()
}

func (f *wordPrime) code(a []uint64) *big.Int        { return new(big.Int).SetUint64(a[0]) }
func (f *wordPrime) fromCode(z []uint64, n *big.Int) { z[0] = n.Uint64() }

// longPrime is F_p for an odd p of any length.
type longPrime struct {
	m *limbs.Mod
	p *big.Int
}

func (f *longPrime) characteristic() *big.Int { return f.p }
func (f *longPrime) order() *big.Int          { return f.p }
func (f *longPrime) degree() int              { return 1 }
func (f *longPrime) width() int               { return f.m.K }
func (f *longPrime) one() []uint64            { return f.m.One() }
func (f *longPrime) split(n int) bool         { return n >= LongSplit }
func (f *longPrime) newton() int              { return LongNewton }

func (f *longPrime) add(z, a, b []uint64) { f.m.AddVec(z, a, b) }
func (f *longPrime) sub(z, a, b []uint64) { f.m.SubVec(z, a, b) }
func (f *longPrime) neg(z, a []uint64)    { f.m.NegVec(z, a) }

func (f *longPrime) scale(w *algebra.Work, z, a, c []uint64) {
	m := w.Mark()
	f.m.ScaleVec(z, a, c, w.Dirty(f.m.Scratch()))
	w.Release(m)
}

func (f *longPrime) addScaled(w *algebra.Work, z, a, c []uint64) {
	m := w.Mark()
	f.m.AddScaledVec(z, a, c, w.Dirty(f.m.Scratch()+f.m.K))
	w.Release(m)
}

func (f *longPrime) convolve(w *algebra.Work, z, a, b []uint64) {
	m := w.Mark()
	f.m.Convolve(z, a, b, w.Dirty(f.m.Scratch()))
	w.Release(m)
}

func (f *longPrime) square(w *algebra.Work, z, a []uint64) { f.convolve(w, z, a, a) }

func (f *longPrime) dot(w *algebra.Work, z, a, b []uint64) {
	m := w.Mark()
	f.m.Dot(z, a, b, w.Dirty(f.m.Scratch()))
	w.Release(m)
}

func (f *longPrime) mul(w *algebra.Work, z, a, b []uint64) {
	m := w.Mark()
	f.m.Mul(z, a, b, w.Dirty(f.m.Scratch()))
	w.Release(m)
}

func (f *longPrime) inv(_ *algebra.Work, z, a []uint64) bool {
	n := f.code(a)
	if n.ModInverse(n, f.p) == nil {
		return false
	}
	f.fromCode(z, n)
	return true
}

func (f *longPrime) frobenius(_ *algebra.Work, z, a []uint64, _ int) { copy(z, a) }

func (f *longPrime) setInt(z []uint64, n *big.Int) {
	if n.Sign() < 0 || n.Cmp(f.p) >= 0 {
		n = new(big.Int).Mod(n, f.p)
	}
	f.fromCode(z, n)
}

func (f *longPrime) code(a []uint64) *big.Int { return f.m.From(a, make([]uint64, f.m.Scratch())) }

func (f *longPrime) fromCode(z []uint64, n *big.Int) {
	f.m.Into(z, n, make([]uint64, f.m.Scratch()))
}
