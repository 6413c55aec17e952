package rep

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Extension is K(b) for a field K and a root b of an irreducible polynomial
// over K: a poly.Arith whose elements are residues modulo that polynomial.
type Extension struct {
	dense
	e extension
}

// extension is what Extension needs of a representation beside its kernels.
type extension interface {
	vectors
	base() poly.Arith
	modulus() *poly.Poly
	toPoly(a poly.Elem) *poly.Poly
	fromPoly(w *algebra.Work, z poly.Elem, f *poly.Poly)
}

// Extend is the extension of base by a root of m, which is monic, irreducible
// and not constant; that is the caller's word. It picks the representation.
func Extend(w *algebra.Work, base poly.Arith, m *poly.Poly) *Extension {
	if _, ok := base.(packed); ok && m.Degree() <= TableDegree {
		e := newTable(newBinary(m))
		return &Extension{newDense(e), e}
	}
	g := Generic(w, base, m)
	if t, ok := g.e.(*tower); ok && t.q.Cmp(big.NewInt(ZechOrder)) <= 0 {
		e := newZech(w, t)
		return &Extension{newDense(e), e}
	}
	return g
}

// Generic is Extend without tables of logarithms: the elements are residues of
// polynomials over base as they stand.
func Generic(w *algebra.Work, base poly.Arith, m *poly.Poly) *Extension {
	var e extension
	switch b := base.(type) {
	case packed:
		e = newBinary(m)
	case *Extension:
		e = newTower(w, base, b.v, m)
	default:
		e = newTower(w, base, base.(dense).v, m)
	}
	return &Extension{newDense(e), e}
}

// Base is K.
func (e *Extension) Base() poly.Arith { return e.e.base() }

// Modulus is the polynomial over K that b is a root of.
func (e *Extension) Modulus() *poly.Poly { return e.e.modulus() }

// ToPoly is the polynomial f over K of degree below that of the modulus with
// f(b) = a: the coordinates of a.
func (e *Extension) ToPoly(a poly.Elem) *poly.Poly { return e.e.toPoly(a) }

// FromPoly sets z to f(b).
func (e *Extension) FromPoly(w *algebra.Work, z poly.Elem, f *poly.Poly) { e.e.fromPoly(w, z, f) }

// tower is an extension of any base with whole words for an element: n
// elements of the base side by side.
type tower struct {
	k    poly.Arith
	v    vectors // of k
	mod  *denseModulus
	n    int // degree of the modulus
	u    int // width of the base
	q    *big.Int
	unit []uint64
	conj conjugates
}

func newTower(w *algebra.Work, k poly.Arith, v vectors, m *poly.Poly) *tower {
	t := &tower{k: k, v: v, n: m.Degree(), u: v.width()}
	t.mod = newDense(v).NewModulus(w, m).(*denseModulus)
	t.q = new(big.Int).Exp(v.order(), big.NewInt(int64(t.n)), nil)
	t.unit = make([]uint64, t.width())
	copy(t.unit, v.one())
	return t
}

func (t *tower) base() poly.Arith    { return t.k }
func (t *tower) modulus() *poly.Poly { return t.mod.m }

func (t *tower) toPoly(a poly.Elem) *poly.Poly {
	f := new(poly.Poly)
	newDense(t.v).set(f, a)
	return f
}

func (t *tower) fromPoly(w *algebra.Work, z poly.Elem, f *poly.Poly) {
	r := new(poly.Poly)
	t.mod.Reduce(w, r, f)
	copy(z, r.W)
	clear(z[len(r.W):])
}

func (t *tower) characteristic() *big.Int { return t.v.characteristic() }
func (t *tower) order() *big.Int          { return t.q }
func (t *tower) degree() int              { return t.n * t.v.degree() }
func (t *tower) width() int               { return t.n * t.u }
func (t *tower) one() []uint64            { return t.unit }

func (t *tower) add(z, a, b []uint64) { t.v.add(z, a, b) }
func (t *tower) sub(z, a, b []uint64) { t.v.sub(z, a, b) }
func (t *tower) neg(z, a []uint64)    { t.v.neg(z, a) }

// Products of polynomials go by Kronecker's substitution: coefficients are
// laid 2n-1 elements of the base apart, so that one product over the base
// holds all of them. Karatsuba's method then works inside that product.
func (t *tower) split(int) bool { return false }
func (t *tower) newton() int    { return TowerNewton }

// TowerNewton is for towers what WordNewton is for word primes.
var TowerNewton = 4

func (t *tower) convolve(w *algebra.Work, z, a, b []uint64) {
	u := t.width()
	na, nb := len(a)/u, len(b)/u
	block := (2*t.n - 1) * t.u
	m := w.Mark()
	p := w.Dirty((na+nb-2)*block + (2*t.n-1)*t.u)
	product(w, t.v, p, t.apart(w, a, block), t.apart(w, b, block))
	for i := range na + nb - 1 {
		t.reduce(w, z[i*u:(i+1)*u], p[i*block:(i+1)*block])
	}
	w.Release(m)
}

func (t *tower) square(w *algebra.Work, z, a []uint64) {
	u := t.width()
	n := len(a) / u
	block := (2*t.n - 1) * t.u
	m := w.Mark()
	p := w.Dirty((2*n - 1) * block)
	square(w, t.v, p, t.apart(w, a, block))
	for i := range 2*n - 1 {
		t.reduce(w, z[i*u:(i+1)*u], p[i*block:(i+1)*block])
	}
	w.Release(m)
}

// apart lays the elements of a block words apart.
func (t *tower) apart(w *algebra.Work, a []uint64, block int) []uint64 {
	u := t.width()
	n := len(a) / u
	z := w.Words((n-1)*block + u)
	for i := range n {
		copy(z[i*block:], a[i*u:(i+1)*u])
	}
	return z
}

// reduce sets z to the residue of the product p, which it destroys.
func (t *tower) reduce(w *algebra.Work, z, p []uint64) {
	copy(z, t.mod.reduce(w, p))
}

func (t *tower) mul(w *algebra.Work, z, a, b []uint64) {
	m := w.Mark()
	p := w.Dirty((2*t.n - 1) * t.u)
	product(w, t.v, p, a, b)
	t.reduce(w, z, p)
	w.Release(m)
}

// dot adds up the products over the base and reduces once.
func (t *tower) dot(w *algebra.Work, z, a, b []uint64) {
	u := t.width()
	m := w.Mark()
	n := (2*t.n - 1) * t.u
	sum, p := w.Words(n), w.Dirty(n)
	for i := 0; i < len(a); i += u {
		product(w, t.v, p, a[i:i+u], b[len(b)-u-i:len(b)-i])
		t.v.add(sum, sum, p)
	}
	t.reduce(w, z, sum)
	w.Release(m)
}

func (t *tower) scale(w *algebra.Work, z, a, c []uint64) {
	u := t.width()
	for i := 0; i < len(a); i += u {
		t.mul(w, z[i:i+u], a[i:i+u], c)
	}
}

func (t *tower) addScaled(w *algebra.Work, z, a, c []uint64) {
	u := t.width()
	m := w.Mark()
	p := w.Dirty(u)
	for i := 0; i < len(a); i += u {
		t.mul(w, p, a[i:i+u], c)
		t.v.add(z[i:i+u], z[i:i+u], p)
	}
	w.Release(m)
}

func (t *tower) inv(w *algebra.Work, z, a []uint64) bool {
	f, ok := poly.InvMod(w, t.k, t.toPoly(a), t.mod.m)
	if ok {
		copy(z, f.W)
		clear(z[len(f.W):])
	}
	return ok
}

func (t *tower) setInt(z []uint64, n *big.Int) {
	clear(z[t.u:])
	t.v.setInt(z[:t.u], n)
}

func (t *tower) code(a []uint64) *big.Int {
	z := new(big.Int)
	for i := t.n - 1; i >= 0; i-- {
		z.Mul(z, t.v.order())
		z.Add(z, t.v.code(a[i*t.u:(i+1)*t.u]))
	}
	return z
}

func (t *tower) fromCode(z []uint64, n *big.Int) {
	n = new(big.Int).Set(n)
	c := new(big.Int)
	for i := range t.n {
		n.QuoRem(n, t.v.order(), c)
		t.v.fromCode(z[i*t.u:(i+1)*t.u], c)
	}
}
