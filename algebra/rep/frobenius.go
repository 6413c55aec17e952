package rep

import (
	"math/big"
	"sync"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// References:
//
//	[vzGS] J. von zur Gathen, V. Shoup, Computing Frobenius maps and factoring
//	  polynomials, 1992, section 5: powers of the Frobenius map by composition.

// conjugates keeps, for some k, composition with the image of the generator b
// under a -> a^(p^k): that map takes f(b) to f'(b^(p^k)), where f' has the
// images of the coefficients of f.
type conjugates struct {
	mu sync.Mutex
	by map[int]*poly.Composer
}

// keptConjugates bounds the number of maps that one field keeps.
const keptConjugates = 64

// frobenius raises to the p-th power k times: one after the other where that
// is less work than a composition.
func (t *tower) frobenius(w *algebra.Work, z, a []uint64, k int) {
	switch {
	case k == 0:
		copy(z, a)
	case isZero(a[t.u:]): // a lies in the base
		t.v.frobenius(w, z[:t.u], a[:t.u], k%t.v.degree())
		clear(z[t.u:])
	case t.powersAreQuick(k):
		m := w.Mark()
		s := w.Dirty(t.width())
		copy(z, a)
		for range k {
			copy(s, z)
			power(w, t, z, s, t.characteristic())
		}
		w.Release(m)
	default:
		f := t.toPoly(a)
		d := newDense(t.v)
		d.FrobeniusCoeffs(w, f, f, k)
		f = t.conjugation(w, k).Apply(w, f)
		copy(z, f.W)
		clear(z[len(f.W):])
	}
}

// powersAreQuick compares the products in k p-th powers with the about
// sqrt(n) + 2 of a composition.
func (t *tower) powersAreQuick(k int) bool {
	products := max(1, t.characteristic().BitLen()*3/2-2)
	return k <= 1<<20 && (k*products-2)*(k*products-2) <= t.n
}

// conjugation is composition with b^(p^k), k >= 1.
func (t *tower) conjugation(w *algebra.Work, k int) *poly.Composer {
	t.conj.mu.Lock()
	c := t.conj.by[k]
	t.conj.mu.Unlock()
	if c != nil {
		return c
	}
	x := make([]uint64, t.width())
	b := make([]uint64, t.width())
	t.fromPoly(w, b, poly.X(t.k))
	if k == 1 {
		power(w, t, x, b, t.characteristic())
	} else {
		t.frobenius(w, x, b, k/2)
		t.frobenius(w, x, x, k/2)
		if k%2 == 1 {
			t.frobenius(w, x, x, 1)
		}
	}
	c = poly.NewComposer(w, t.k, t.mod, t.toPoly(x), t.n)
	t.conj.mu.Lock()
	defer t.conj.mu.Unlock()
	if t.conj.by == nil {
		t.conj.by = map[int]*poly.Composer{}
	}
	if len(t.conj.by) < keptConjugates {
		t.conj.by[k] = c
	}
	return c
}

// power sets z to a^e, e >= 0. z does not overlap a.
func power(w *algebra.Work, v vectors, z, a []uint64, e *big.Int) {
	copy(z, v.one())
	for i := e.BitLen() - 1; i >= 0; i-- {
		w.Poll()
		v.mul(w, z, z, z)
		if e.Bit(i) == 1 {
			v.mul(w, z, z, a)
		}
	}
}
