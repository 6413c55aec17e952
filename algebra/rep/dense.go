package rep

import (
	"math/big"
	"slices"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// dense makes a poly.Arith of the kernels of one representation.
type dense struct {
	v vectors
	u int // v.width()
}

func newDense(v vectors) dense { return dense{v, v.width()} }

func (d dense) Characteristic() *big.Int { return d.v.characteristic() }
func (d dense) Order() *big.Int          { return d.v.order() }
func (d dense) Degree() int              { return d.v.degree() }
func (d dense) Width() int               { return d.u }
func (d dense) Packed() bool             { return false }
func (d dense) One() poly.Elem           { return d.v.one() }

func (d dense) SetInt(z poly.Elem, n *big.Int) { d.v.setInt(z, n) }
func (d dense) AddElem(z, a, b poly.Elem)      { d.v.add(z, a, b) }
func (d dense) SubElem(z, a, b poly.Elem)      { d.v.sub(z, a, b) }
func (d dense) NegElem(z, a poly.Elem)         { d.v.neg(z, a) }

func (d dense) MulElem(w *algebra.Work, z, a, b poly.Elem) { d.v.mul(w, z, a, b) }

func (d dense) InvElem(w *algebra.Work, z, a poly.Elem) bool {
	return !isZero(a) && d.v.inv(w, z, a)
}

func (d dense) FrobeniusElem(w *algebra.Work, z, a poly.Elem, k int) {
	n := d.v.degree()
	d.v.frobenius(w, z, a, (k%n+n)%n)
}

func (d dense) Code(a poly.Elem) *big.Int { return d.v.code(a) }

func (d dense) FromCode(z poly.Elem, n *big.Int) {
	if n.Sign() < 0 || n.Cmp(d.v.order()) >= 0 {
		n = new(big.Int).Mod(n, d.v.order())
	}
	d.v.fromCode(z, n)
}

// resize makes room for n coefficients in z and keeps those it has; new ones
// are zero.
func (d dense) resize(z *poly.Poly, n int) {
	old := len(z.W)
	n *= d.u
	if n > cap(z.W) {
		w := make([]uint64, n)
		copy(w, z.W)
		z.W = w
		return
	}
	z.W = z.W[:n]
	if n > old {
		clear(z.W[old:])
	}
}

// trim cuts leading zeros.
func (d dense) trim(z *poly.Poly) {
	n := len(z.W)
	for n > 0 && z.W[n-1] == 0 && isZero(z.W[n-d.u:n]) {
		n -= d.u
	}
	z.W, z.N = z.W[:n], n/d.u
}

func (d dense) Coeff(z poly.Elem, f *poly.Poly, i int) {
	if i >= f.N {
		clear(z)
		return
	}
	copy(z, f.W[i*d.u:(i+1)*d.u])
}

func (d dense) SetCoeff(f *poly.Poly, i int, a poly.Elem) {
	if i >= f.N {
		d.resize(f, i+1)
	}
	copy(f.W[i*d.u:(i+1)*d.u], a)
	d.trim(f)
}

func (d dense) Add(z, f, g *poly.Poly) {
	if f.N < g.N {
		f, g = g, f
	}
	n, m := len(f.W), len(g.W)
	fw, gw := f.W, g.W
	d.resize(z, n/d.u)
	copy(z.W[m:], fw[m:])
	d.v.add(z.W[:m], fw[:m], gw)
	d.trim(z)
}

func (d dense) Sub(z, f, g *poly.Poly) {
	n, m := len(f.W), len(g.W)
	fw, gw := f.W, g.W
	d.resize(z, max(n, m)/d.u)
	k := min(n, m)
	if n >= m {
		copy(z.W[k:], fw[k:])
	} else {
		d.v.neg(z.W[k:], gw[k:])
	}
	d.v.sub(z.W[:k], fw[:k], gw[:k])
	d.trim(z)
}

func (d dense) Neg(z, f *poly.Poly) {
	fw := f.W
	d.resize(z, f.N)
	d.v.neg(z.W, fw)
	z.N = len(z.W) / d.u
}

func (d dense) Scale(w *algebra.Work, z, f *poly.Poly, c poly.Elem) {
	if isZero(c) || f.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	fw := f.W
	d.resize(z, f.N)
	d.v.scale(w, z.W, fw, c)
	z.N = len(z.W) / d.u
}

func (d dense) AddScaled(w *algebra.Work, z, f *poly.Poly, c poly.Elem) {
	if isZero(c) || f.N == 0 {
		return
	}
	d.resize(z, max(z.N, f.N))
	d.v.addScaled(w, z.W[:len(f.W)], f.W, c)
	d.trim(z)
}

func (d dense) Slice(z, f *poly.Poly, from, to int) {
	to = min(to, f.N)
	if from >= to {
		z.W, z.N = z.W[:0], 0
		return
	}
	fw := f.W[from*d.u : to*d.u]
	if z != f {
		d.resize(z, to-from)
	}
	copy(z.W, fw)
	z.W = z.W[:len(fw)]
	d.trim(z)
}

func (d dense) Shift(z, f *poly.Poly, k int) {
	if f.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	fw := f.W
	d.resize(z, f.N+k)
	copy(z.W[k*d.u:], fw)
	clear(z.W[:k*d.u])
	z.N = len(z.W) / d.u
}

func (d dense) Reverse(z, f *poly.Poly, n int) {
	fw := f.W
	if z == f {
		fw = slices.Clone(fw)
	}
	d.resize(z, n+1)
	low := len(z.W) - len(fw)
	clear(z.W[:low])
	reverse(z.W[low:], fw, d.u)
	d.trim(z)
}

func (d dense) Dot(w *algebra.Work, z poly.Elem, f, g *poly.Poly) {
	n := min(len(f.W), len(g.W))
	if n == 0 {
		clear(z)
		return
	}
	m := w.Mark()
	t := w.Dirty(n)
	reverse(t, g.W[:n], d.u)
	d.v.dot(w, z, f.W[:n], t)
	w.Release(m)
}

func (d dense) Mul(w *algebra.Work, z, f, g *poly.Poly) {
	if f.N == 0 || g.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	n := f.N + g.N - 1
	if z != f && z != g {
		d.resize(z, n)
		product(w, d.v, z.W, f.W, g.W)
		z.N = n
		return
	}
	m := w.Mark()
	t := w.Dirty(n * d.u)
	product(w, d.v, t, f.W, g.W)
	d.set(z, t)
	w.Release(m)
}

// set makes z the polynomial with these coefficients.
func (d dense) set(z *poly.Poly, words []uint64) {
	d.resize(z, len(words)/d.u)
	copy(z.W, words)
	d.trim(z)
}

func (d dense) Sqr(w *algebra.Work, z, f *poly.Poly) {
	if f.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	m := w.Mark()
	t := w.Dirty((2*f.N - 1) * d.u)
	square(w, d.v, t, f.W)
	d.set(z, t)
	w.Release(m)
}

func (d dense) Derivative(z, f *poly.Poly) {
	n := f.N - 1
	if n < 1 {
		z.W, z.N = z.W[:0], 0
		return
	}
	fw := f.W
	if z != f {
		d.resize(z, n)
	}
	p := d.v.characteristic()
	c, i := make([]uint64, d.u), new(big.Int)
	var w algebra.Work
	for k := 1; k <= n; k++ {
		zk := z.W[(k-1)*d.u : k*d.u]
		if i.Mod(i.SetInt64(int64(k)), p).Sign() == 0 {
			clear(zk)
			continue
		}
		d.v.setInt(c, i)
		d.v.scale(&w, zk, fw[k*d.u:(k+1)*d.u], c)
	}
	z.W = z.W[:n*d.u]
	d.trim(z)
}

func (d dense) FrobeniusCoeffs(w *algebra.Work, z, f *poly.Poly, k int) {
	fw := f.W
	d.resize(z, f.N)
	n := d.v.degree()
	k = (k%n + n) % n
	for i := 0; i < len(fw); i += d.u {
		d.v.frobenius(w, z.W[i:i+d.u], fw[i:i+d.u], k)
	}
	z.N = len(z.W) / d.u
}

func (d dense) DivRem(w *algebra.Work, q, r, f, g *poly.Poly) {
	if f.N < g.N {
		if r != nil && r != f {
			d.set(r, f.W)
		}
		if q != nil {
			q.W, q.N = q.W[:0], 0
		}
		return
	}
	// The series costs about two products more.
	if least := 3 * d.v.newton(); f.N-g.N+1 >= least && g.N >= least {
		poly.DivRemBySeries(w, d, q, r, f, g)
		return
	}
	m := w.Mark()
	defer w.Release(m)
	t := w.Dirty(len(f.W))
	copy(t, f.W)
	var quo []uint64
	if q != nil {
		quo = w.Dirty((f.N - g.N + 1) * d.u)
	}
	inv := w.Dirty(d.u)
	d.v.inv(w, inv, g.W[(g.N-1)*d.u:])
	d.divide(w, quo, t, g.W, inv)
	n := (g.N - 1) * d.u
	if q != nil {
		d.set(q, quo)
	}
	if r != nil {
		d.set(r, t[:n])
	}
}

// divide divides t by g, whose leading coefficient has the inverse inv. The
// remainder stands in the low part of t, the quotient in q unless that is nil.
func (d dense) divide(w *algebra.Work, q, t, g, inv []uint64) {
	m := w.Mark()
	c := w.Dirty(d.u)
	n := len(g) - d.u
	for i := len(t) - d.u; i >= n; i -= d.u {
		w.Poll()
		d.v.mul(w, c, t[i:i+d.u], inv)
		if q != nil {
			copy(q[i-n:i-n+d.u], c)
		}
		if !isZero(c) {
			d.v.neg(c, c)
			d.v.addScaled(w, t[i-n:i], g[:n], c)
		}
	}
	w.Release(m)
}

// denseModulus reduces by the inverse power series of its modulus, or by long
// division when that is short.
type denseModulus struct {
	d      dense
	m      *poly.Poly
	inv    []uint64   // of the leading coefficient
	series *poly.Poly // 1/reverse(m) to deg m + 1 terms, or nil
}

func (d dense) NewModulus(w *algebra.Work, m *poly.Poly) poly.Modulus {
	z := &denseModulus{d: d, m: &poly.Poly{W: append([]uint64(nil), m.W...), N: m.N}, inv: make([]uint64, d.u)}
	d.v.inv(w, z.inv, m.W[(m.N-1)*d.u:])
	if m.N > d.v.newton() {
		z.series = poly.InverseSeries(w, d, poly.Reverse(d, m, m.Degree()), m.N)
	}
	return z
}

func (m *denseModulus) Poly() *poly.Poly { return m.m }

func (m *denseModulus) Reduce(w *algebra.Work, z, f *poly.Poly) {
	if f.N >= 2*m.m.N && m.series != nil {
		m.d.DivRem(w, nil, z, f, m.m)
		return
	}
	mark := w.Mark()
	t := w.Dirty(len(f.W))
	copy(t, f.W)
	m.d.set(z, m.reduce(w, t))
	w.Release(mark)
}

// reduce reduces t, of at most 2 deg m + 1 coefficients, in place.
func (m *denseModulus) reduce(w *algebra.Work, t []uint64) []uint64 {
	u := m.d.u
	n := len(m.m.W) - u
	if len(t) <= n {
		return t
	}
	if k := len(t) - n; m.series == nil || k < m.d.v.newton()*u {
		m.d.divide(w, nil, t, m.m.W, m.inv)
		return t[:n]
	} else {
		// The quotient, read backwards, is reverse(t)/reverse(m) to k terms.
		mark := w.Mark()
		top := w.Dirty(k)
		reverse(top, t[n:], u)
		s := m.series.W[:min(k, len(m.series.W))]
		p := w.Dirty(len(top) + len(s) - u)
		product(w, m.d.v, p, top, s)
		q := w.Dirty(k)
		reverse(q, p[:k], u)
		back := w.Dirty(k + n)
		product(w, m.d.v, back, q, m.m.W)
		m.d.v.sub(t[:n], t[:n], back[:n])
		w.Release(mark)
		return t[:n]
	}
}

// reverse sets z to the elements of a, last first.
func reverse(z, a []uint64, u int) {
	for i := 0; i < len(a); i += u {
		copy(z[len(a)-u-i:], a[i:i+u])
	}
}

func (m *denseModulus) MulMod(w *algebra.Work, z, f, g *poly.Poly) {
	if f.N == 0 || g.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	mark := w.Mark()
	t := w.Dirty((f.N + g.N - 1) * m.d.u)
	product(w, m.d.v, t, f.W, g.W)
	m.d.set(z, m.reduce(w, t))
	w.Release(mark)
}

func (m *denseModulus) SqrMod(w *algebra.Work, z, f *poly.Poly) {
	if f.N == 0 {
		z.W, z.N = z.W[:0], 0
		return
	}
	mark := w.Mark()
	t := w.Dirty((2*f.N - 1) * m.d.u)
	square(w, m.d.v, t, f.W)
	m.d.set(z, m.reduce(w, t))
	w.Release(mark)
}
