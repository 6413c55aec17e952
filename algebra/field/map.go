package field

import (
	"sync"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Map is a homomorphism of finite fields, and so an embedding: an immutable
// value, safe for concurrent use.
type Map struct {
	from, to *Field
	image    Elem // of the generator of from
	base     *Map // its restriction to the base of from; nil when that is F_p
	included bool // from is in the tower of to, and the map is the inclusion

	mu     sync.Mutex
	images []*poly.Poly // of the basis of from over F_p, as vectors of to
	span   *span        // of images
}

// newMap is the homomorphism with the given restriction to the base of K that
// sends the generator to image, a root of the image of the modulus.
func newMap(K, L *Field, image Elem, base *Map) *Map {
	return &Map{from: K, to: L, image: Elem{L, image.w}, base: base}
}

// NewMap is the homomorphism from K to L that follows the fixed embedding on
// the base of K and sends the generator of K to image. It is an error of kind
// Invalid when image is not a root of the image of the modulus.
func NewMap(w *algebra.Work, K, L *Field, image Elem) (m *Map, err error) {
	defer algebra.Catch(&err)
	if !Same(image.k, L) {
		return nil, mismatch(image.k, L)
	}
	var base *Map
	f := K.Modulus()
	if base, err = Embed(w, K.Base(), L); err != nil {
		return nil, err
	}
	g := f.Map(w, base)
	if v := g.Eval(w, Elem{L, image.w}); !v.IsZero() {
		return nil, algebra.Errorf(algebra.Invalid, "a homomorphism sends the generator to a root of its minimal polynomial %s, and %s is not one: the value there is %s", f, image, v).
			WithRemedy("the roots of that polynomial in the target are the possible images")
	}
	if K.Base().IsPrime() {
		base = nil
	}
	return newMap(K, L, image, base), nil
}

// From is the field the map is defined on.
func (m *Map) From() *Field { return m.from }

// To is the field the map goes into.
func (m *Map) To() *Field { return m.to }

// Image is the image of the generator of From.
func (m *Map) Image() Elem { return m.image }

// Base is the restriction to the base of From.
func (m *Map) Base(w *algebra.Work) *Map {
	if m.base == nil {
		return inclusion(w, m.from.prime, m.to)
	}
	return m.base
}

// prepare makes the images of the basis of From over F_p.
func (m *Map) prepare(w *algebra.Work) []*poly.Poly {
	m.mu.Lock()
	images := m.images
	m.mu.Unlock()
	if images != nil {
		return images
	}
	// g^i b_j, with i slow and j fast, as structure.vector has it.
	low := []Elem{m.to.One()}
	if m.base != nil {
		low = low[:0]
		for _, v := range m.base.prepare(w) {
			low = append(low, m.to.fromVectorElem(w, v))
		}
	}
	power := m.to.One()
	for i := range m.from.n {
		w.Poll()
		if i > 0 {
			power = power.Mul(w, m.image)
		}
		for _, b := range low {
			images = append(images, m.to.vector(b.Mul(w, power).w))
		}
	}
	m.mu.Lock()
	defer m.mu.Unlock()
	m.images = images
	return images
}

func (K *Field) fromVectorElem(w *algebra.Work, v *poly.Poly) Elem {
	z := K.Zero()
	K.fromVector(w, z.w, v)
	return z
}

// Apply is the image of a, an element of From.
func (m *Map) Apply(w *algebra.Work, a Elem) Elem {
	if !Same(a.k, m.from) {
		algebra.Fail(mismatch(a.k, m.from))
	}
	if m.included {
		return lift(w, a, m.to)
	}
	P := m.to.prime.arith
	return m.to.fromVectorElem(w, combine(w, P, m.from.vector(a.w), m.prepare(w)))
}

// Preimage is the a in From with image b; ok is false when there is none.
func (m *Map) Preimage(w *algebra.Work, b Elem) (a Elem, ok bool) {
	if !Same(b.k, m.to) {
		algebra.Fail(mismatch(b.k, m.to))
	}
	if m.included {
		return lower(b, m.from)
	}
	images := m.prepare(w)
	m.mu.Lock()
	s := m.span
	m.mu.Unlock()
	if s == nil {
		s, _ = newSpan(w, m.to.prime.arith, m.to.absolute, images)
		m.mu.Lock()
		m.span = s
		m.mu.Unlock()
	}
	c, ok := s.solve(w, m.to.vector(b.w))
	if !ok {
		return Elem{}, false
	}
	return m.from.fromVectorElem(w, c), true
}

// Then is x -> n(m(x)): first m, then n. The fields in the middle are the same.
func (m *Map) Then(w *algebra.Work, n *Map) *Map {
	if !Same(m.to, n.from) {
		algebra.Fail(mismatch(m.to, n.from))
	}
	var base *Map
	if m.base != nil {
		base = m.base.Then(w, n)
	}
	return newMap(m.from, n.to, n.Apply(w, m.image), base)
}

// between is the same map between the same fields under other letters.
func (m *Map) between(K, L *Field) *Map {
	n := newMap(K, L, m.image, m.base)
	m.mu.Lock()
	defer m.mu.Unlock()
	n.images, n.span = m.images, m.span
	return n
}

// Compose is x -> m(n(x)): first n, then m, as functions compose.
func (m *Map) Compose(w *algebra.Work, n *Map) *Map { return n.Then(w, m) }

// Equal says whether two maps between the same fields send each element to the
// same image.
func (m *Map) Equal(w *algebra.Work, n *Map) bool {
	if !Same(m.from, n.from) || !Same(m.to, n.to) || !m.image.Equal(n.image) {
		return false
	}
	return m.base == nil || m.base.Equal(w, n.base)
}

// IsAutomorphism says whether the map goes from a field to itself.
func (m *Map) IsAutomorphism() bool { return Same(m.from, m.to) }

// IsIsomorphism says whether the map is onto.
func (m *Map) IsIsomorphism() bool { return m.from.absolute == m.to.absolute }

// Inverse is the inverse of a map that is onto; an error of kind Undefined for
// any other.
func (m *Map) Inverse(w *algebra.Work) (*Map, error) {
	if !m.IsIsomorphism() {
		return nil, algebra.Errorf(algebra.Undefined, "the map is not onto: its image has degree %d over the prime field and its target %d", m.from.absolute, m.to.absolute)
	}
	return m.pullBack(w, m.to), nil
}

// pullBack is the inverse of m, restricted to K, which is m.to or below it.
func (m *Map) pullBack(w *algebra.Work, K *Field) *Map {
	var base *Map
	if K.base != nil && K.base.base != nil {
		base = m.pullBack(w, K.base)
	}
	a, _ := m.Preimage(w, lift(w, K.Generator(), m.to))
	return newMap(K, m.from, a, base)
}

// Exponent is the k, 0 <= k < n, with m(x) = x^(p^k) on From, for an
// automorphism of a field of absolute degree n.
func (m *Map) Exponent(w *algebra.Work) (int, error) {
	if !m.IsAutomorphism() {
		return 0, algebra.Errorf(algebra.Undefined, "only an automorphism is a power of the Frobenius automorphism")
	}
	f := frobenius(w, m.from, 1)
	t := identity(w, m.from)
	for k := 0; k < m.from.absolute; k++ {
		w.Poll()
		if t.Equal(w, m) {
			return k, nil
		}
		t = t.Then(w, f)
	}
	return 0, algebra.Errorf(algebra.Invalid, "the map is not a homomorphism")
}

// Order is the least k >= 1 with m^k the identity, for an automorphism.
func (m *Map) Order(w *algebra.Work) (int, error) {
	k, err := m.Exponent(w)
	if err != nil {
		return 0, err
	}
	return m.from.absolute / gcd(m.from.absolute, k), nil
}

// inclusion is the map from a field K of the tower of L into L.
func inclusion(w *algebra.Work, K, L *Field) *Map {
	m := newMap(K, L, lift(w, K.Generator(), L), nil)
	if K.base != nil && K.base.base != nil {
		m.base = inclusion(w, K.base, L)
	}
	m.included = true
	return m
}

// inTower says whether K is L, or the base of L, and so on down.
func inTower(K, L *Field) bool {
	for ; L != nil; L = L.base {
		if Same(K, L) {
			return true
		}
	}
	return false
}

// lift is a, of a field in the tower of L, as a constant of L.
func lift(w *algebra.Work, a Elem, L *Field) Elem {
	if Same(a.k, L) {
		return Elem{L, a.w}
	}
	z := L.Zero()
	L.ext.FromPoly(w, z.w, poly.Constant(L.base.arith, lift(w, a, L.base).w))
	return z
}

// lower is b as an element of K, a field in the tower of its own, if it lies
// there.
func lower(b Elem, K *Field) (a Elem, ok bool) {
	if Same(b.k, K) {
		return Elem{K, b.w}, true
	}
	f := b.k.ext.ToPoly(b.w)
	if f.N > 1 {
		return Elem{}, false
	}
	return lower(Elem{b.k.base, poly.Coeff(b.k.base.arith, f, 0)}, K)
}

func identity(w *algebra.Work, K *Field) *Map { return inclusion(w, K, K) }

// frobenius is x -> x^(p^k) on K.
func frobenius(w *algebra.Work, K *Field, k int) *Map { return twist(w, identity(w, K), k) }

// twist is x -> m(x)^(p^k).
func twist(w *algebra.Work, m *Map, k int) *Map {
	if m == nil {
		return nil
	}
	return newMap(m.from, m.to, m.image.Frobenius(w, k), twist(w, m.base, k))
}

// Frobenius is x -> x^|K| on L, the generator of the Galois group of L over
// its subfield K.
func Frobenius(w *algebra.Work, L, K *Field) *Map {
	return frobenius(w, L, K.absolute%L.absolute)
}

// FrobeniusPower is x -> x^(p^k) on L, for any integer k.
func FrobeniusPower(w *algebra.Work, L *Field, k int) *Map {
	return frobenius(w, L, (k%L.absolute+L.absolute)%L.absolute)
}

func gcd(a, b int) int {
	for b != 0 {
		a, b = b, a%b
	}
	return a
}
