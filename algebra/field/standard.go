package field

import (
	"math/big"
	"sync"

	"adjoin/algebra"
	"adjoin/algebra/field/conway"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
)

// References:
//
//	[JLPW] C. Jansen, K. Lux, R. Parker, R. Wilson, An Atlas of Brauer
//	  Characters, 1995: Conway polynomials, defined by R. Parker.
//	[L] F. Luebeck, Standard generators of finite fields and their cyclic
//	  subgroups, 2023 (arXiv 2107.02257): fields as composita of towers of prime
//	  degrees, with sums of generators.
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997.
//
// # The rule
//
// F_{p^n} = F_p(g_n), and g_n is a root of the polynomial f_n over F_p:
//
//  1. If conway.Lookup has C_{p,n}, f_n = C_{p,n}.
//
//  2. If n = l^e is the power of a prime l and not in the table, let K be the
//     standard field of degree l^(e-1), q its order, and g = g_(l^(e-1)), or 1
//     for K = F_p. Then g_n is a root of this polynomial over K, and f_n its
//     minimal polynomial over F_p:
//
//     l = p: x^p - x - g^i with the least i >= 0 for which the trace of g^i to
//     F_p is not 0 [LN, theorem 3.78].
//
//     l divides p-1: x^l - a with the a of least code that is not an l-th power
//     in K [LN, theorem 3.75]. (l divides q-1 only if it divides p-1, since
//     the order of p modulo l is a power of l then.)
//
//     otherwise: x^l + x t(x) + g, irreducible over K, with a polynomial t of
//     degree at most l-2 over K, not 0: of those whose coefficients have codes
//     below B, the one of least code sum Code(t_i) q^i, and B the least power
//     of 2 for which there is one. (Without B, t would run through the
//     constants first; but where all x^l + c x + g have a discriminant of the
//     same kind, by a theorem of Stickelberger none of them may be
//     irreducible.)
//
//     Between K and F_{p^n} there is no field, and between F_p and F_{p^n} there
//     are only those below K; so g_n generates F_{p^n} over F_p.
//
//  3. If n is not the power of a prime and not in the table, g_n is the sum of
//     the g_(l^e) over the prime powers l^e that divide n exactly, taken in the
//     compositum of these fields. That it generates: where an automorphism
//     fixes the sum, it moves each summand by an element of F_p; a summand
//     whose degree is prime to p is not moved by a constant at all, so the one
//     of degree a power of p is not moved either.
//
// The layout of 2 and 3 is that of [L]. The polynomials of a step are not the
// pseudo-random ones of [L] but the least ones in the order of codes, which
// tend to be sparse; so beyond the table g_n is another generator than there.
//
// # The embeddings
//
// Inside the table g_m goes to g_n^((p^n-1)/(p^m-1)) for m | n. The step of 2
// gives the embedding of K. Each field of composite degree n has the fields of
// degree l^e, for l^e dividing n exactly, inside it: by the first rule inside
// the table, by construction outside. All other embeddings follow, since
// F_{p^m} is the compositum of its fields of prime power degree: the embedding
// of m into n is the only one that agrees with the given ones on them. So all
// triangles commute.

// MaxStandardDegree bounds the absolute degree of a standard field, and
// MaxStandardBits the length of its order in bits: beyond them the linear
// algebra behind the embeddings is no longer something to wait for.
const (
	MaxStandardDegree = 2048
	MaxStandardBits   = 1 << 15
)

// lattice has the standard fields of one characteristic that were asked for,
// and the images of generators in them. It hangs on the prime field. It is a
// memory only: what it holds is determined by p.
type lattice struct {
	mu     sync.Mutex
	fields map[int]*Field
	images map[[2]int]Elem    // of g_m in F_{p^n}
	parts  map[int][]Elem     // of the g_(l^e), l^e exactly dividing n, in F_{p^n}
	maps   map[[2]int]*Map    // the fixed embeddings, with their linear algebra
	mixes  map[int]*poly.Poly // g_n in terms of its parts, as mix says
}

func newLattice() *lattice {
	return &lattice{
		fields: map[int]*Field{}, images: map[[2]int]Elem{}, parts: map[int][]Elem{},
		maps: map[[2]int]*Map{}, mixes: map[int]*poly.Poly{},
	}
}

// primes has the prime fields in use, so that equal questions give the same
// pointer. When it is full it starts anew.
var primes struct {
	sync.Mutex
	known map[string]*Field
}

const maxPrimes = 1 << 14

func knownPrime(p *big.Int) *Field {
	primes.Lock()
	defer primes.Unlock()
	return primes.known[p.String()]
}

// rememberPrime keeps a prime field; whoever came first wins.
func rememberPrime(F *Field) *Field {
	primes.Lock()
	defer primes.Unlock()
	key := F.p.String()
	if old := primes.known[key]; old != nil {
		return old
	}
	if primes.known == nil || len(primes.known) >= maxPrimes {
		primes.known = map[string]*Field{}
	}
	primes.known[key] = F
	return F
}

// remember keeps a standard field; whoever came first wins.
func remember(K *Field) *Field {
	l := K.prime.lattice
	l.mu.Lock()
	defer l.mu.Unlock()
	if old := l.fields[K.absolute]; old != nil {
		return old
	}
	l.fields[K.absolute] = K
	return K
}

// recall and keep work on one table of a lattice under its lock.
func recall[K comparable, V any](l *lattice, table map[K]V, key K) (V, bool) {
	l.mu.Lock()
	defer l.mu.Unlock()
	v, ok := table[key]
	return v, ok
}

func keep[K comparable, V any](l *lattice, table map[K]V, key K, v V) V {
	l.mu.Lock()
	defer l.mu.Unlock()
	table[key] = v
	return v
}

// Standard is the standard field of p^n elements: always the same one for the
// same p and n, with the generator g_n that the rule above says. It is an
// error of kind Invalid when p is not prime or n < 1, and of kind TooLarge
// beyond MaxStandardDegree or MaxStandardBits.
func Standard(w *algebra.Work, p *big.Int, n int) (K *Field, err error) {
	defer algebra.Catch(&err)
	switch {
	case n < 1:
		return nil, algebra.Errorf(algebra.Invalid, "there is no field of degree %d over its prime field", n)
	case n > 1 && (n > MaxStandardDegree || (n-1)*(p.BitLen()-1) > MaxStandardBits):
		return nil, algebra.Errorf(algebra.TooLarge, "the standard field of degree %d in characteristic %s is beyond the limits: degree %d, and %d bits for its order", n, p, MaxStandardDegree, MaxStandardBits).
			WithRemedy("adjoin a root of a polynomial of your own")
	case n == 1:
		return Prime(w, p)
	}
	F, err := Prime(w, p)
	if err != nil {
		return nil, err
	}
	return standardField(w, F, n), nil
}

// standardField is the standard field of degree n over F_p.
func standardField(w *algebra.Work, F *Field, n int) *Field {
	if n == 1 {
		return F
	}
	if K, ok := recall(F.lattice, F.lattice.fields, n); ok {
		return K
	}
	if c, ok := conway.Lookup(F.p, n); ok {
		return remember(extend(w, F, poly.FromInts(F.arith, c...), true))
	}
	if f := integer.FactorInt(n); len(f) > 1 {
		return composite(w, F, f)
	}
	return step(w, F, n)
}

// standardMap is the fixed embedding between standard fields, for degrees that
// divide.
func standardMap(w *algebra.Work, K, L *Field) (*Map, error) {
	l, key := K.prime.lattice, [2]int{K.absolute, L.absolute}
	m, ok := recall(l, l.maps, key)
	if !ok {
		m = newMap(standardField(w, K.prime, K.absolute), standardField(w, K.prime, L.absolute), standardImage(w, K.prime, K.absolute, L.absolute), nil)
		m = keep(l, l.maps, key, m)
	}
	if m.from == K && m.to == L {
		return m, nil
	}
	// The same map between the fields under other names.
	return m.between(K, L), nil
}

// standardImage is the image of g_m in the standard field of degree n, m | n.
func standardImage(w *algebra.Work, F *Field, m, n int) Elem {
	L := standardField(w, F, n)
	l, key := F.lattice, [2]int{m, n}
	switch {
	case m == 1:
		return L.One()
	case m == n:
		return L.Generator()
	case conway.Has(F.p, n):
		return L.Generator().power(w, quotient(F.p, m, n))
	}
	if e, ok := recall(l, l.images, key); ok {
		return e
	}
	var e Elem
	if f := integer.FactorInt(n); len(f) == 1 {
		// step has put down the image of the field below.
		below := n / f[0].P
		if m == below {
			e, _ = recall(l, l.images, key)
			return e
		}
		e = imageUnder(w, F, below, n, standardImage(w, F, m, below))
	} else {
		e = combineParts(w, F, m, n)
	}
	return keep(l, l.images, key, e)
}

// imageUnder is the image of a in F_{p^m} under the fixed embedding into
// F_{p^n}.
func imageUnder(w *algebra.Work, F *Field, m, n int, a Elem) Elem {
	L := standardField(w, F, n)
	M, _ := standardMap(w, standardField(w, F, m), L)
	return M.Apply(w, a)
}

// quotient is (p^n - 1)/(p^m - 1).
func quotient(p *big.Int, m, n int) *big.Int {
	q := new(big.Int).Exp(p, big.NewInt(int64(m)), nil)
	z, t := new(big.Int), big.NewInt(1)
	for range n / m {
		z.Add(z, t)
		t.Mul(t, q)
	}
	return z
}

// step makes the standard field of degree n = l^e by one step from below.
func step(w *algebra.Work, F *Field, n int) *Field {
	l := integer.FactorInt(n)[0].P
	K := standardField(w, F, n/l)
	f := stepPolynomial(w, K, l)
	if K.IsPrime() {
		L := remember(extend(w, F, f, true))
		t := F.lattice
		keep(t, t.images, [2]int{1, n}, L.One())
		return L
	}
	T := extend(w, K, f, false)
	return simple(w, T, T.Generator(), func(L *Field, in func(Elem) Elem) {
		t := F.lattice
		keep(t, t.images, [2]int{K.absolute, n}, in(lift(w, K.Generator(), T)))
	})
}

// simple is the standard field F_p(s) for a generator s of T over F_p. Before
// anybody else sees it, note receives it, with the way to carry elements of T
// over.
func simple(w *algebra.Work, T *Field, s Elem, note func(L *Field, in func(Elem) Elem)) *Field {
	F, n := T.prime, T.absolute
	powers := make([]*poly.Poly, n+1)
	for i, a := 0, T.One(); i <= n; i++ {
		w.Poll()
		powers[i] = T.vector(a.w)
		a = a.Mul(w, s)
	}
	basis, ok := newSpan(w, F.arith, n, powers[:n])
	if !ok {
		panic("field: the sum of the generators does not generate")
	}
	m, _ := basis.solve(w, powers[n])
	F.arith.Sub(m, poly.Monomial(F.arith, F.arith.One(), n), m)
	L := extend(w, F, m, true)
	note(L, func(a Elem) Elem {
		c, _ := basis.solve(w, T.vector(a.w))
		return L.fromVectorElem(w, c)
	})
	return remember(L)
}

// stepPolynomial is the polynomial of degree l over K of rule 2.
func stepPolynomial(w *algebra.Work, K *Field, l int) *poly.Poly {
	A, p := K.arith, K.p
	f := poly.Monomial(A, A.One(), l)
	switch {
	case p.IsInt64() && p.Int64() == int64(l):
		a := K.One()
		for a.absoluteTrace(w).IsZero() {
			a = a.Mul(w, K.Generator())
		}
		A.SetCoeff(f, 1, K.One().Neg().w)
		A.SetCoeff(f, 0, a.Neg().w)
	case new(big.Int).Mod(K.prime.units(), big.NewInt(int64(l))).Sign() == 0:
		e := new(big.Int).Div(K.units(), big.NewInt(int64(l)))
		c := big.NewInt(2)
		if !K.IsPrime() {
			c.Set(p) // all elements of F_p are l-th powers in K
		}
		for ; ; c.Add(c, big.NewInt(1)) {
			if a := K.Element(c); !a.power(w, e).IsOne() {
				A.SetCoeff(f, 0, a.Neg().w)
				return f
			}
		}
	default:
		A.SetCoeff(f, 0, K.Generator().w)
		for bound := 2; ; bound *= 2 {
			if t := search(w, A, f, bound); t != nil {
				return t
			}
		}
	}
	return f
}

// search is the first irreducible f + x t, for f = x^l + g and the polynomials
// t, not 0, of degree at most l-2 whose coefficients have codes below bound,
// in the order of their codes; nil if there is none.
func search(w *algebra.Work, A poly.Arith, f *poly.Poly, bound int) *poly.Poly {
	t, e, code := poly.Clone(f), make(poly.Elem, A.Width()), new(big.Int)
	if b := A.Order(); b.IsInt64() && b.Int64() < int64(bound) {
		bound = int(b.Int64())
	}
	digits := make([]int, f.Degree()) // of t, at the exponents 1, ..., l-1
	for {
		w.Poll()
		i := 1
		for ; i < len(digits); i++ {
			digits[i] = (digits[i] + 1) % bound
			A.FromCode(e, code.SetInt64(int64(digits[i])))
			A.SetCoeff(t, i, e)
			if digits[i] > 0 {
				break
			}
		}
		if i == len(digits) {
			return nil
		}
		if poly.Irreducible(w, A, t) {
			return t
		}
	}
}

// decode sets t to the polynomial of code c: sum Code(t_i) q^i = c.
func decode(t *poly.Poly, A poly.Arith, c *big.Int) {
	*t = poly.Poly{}
	e, digit := make(poly.Elem, A.Width()), new(big.Int)
	rest := new(big.Int).Set(c)
	for i := 0; rest.Sign() > 0; i++ {
		rest.QuoRem(rest, A.Order(), digit)
		A.FromCode(e, digit)
		A.SetCoeff(t, i, e)
	}
}

// composite makes the standard field of degree n = prod l^e, at least two
// primes, outside the table: rule 3.
func composite(w *algebra.Work, F *Field, factors []integer.IntPower) *Field {
	// The largest part is at the bottom, where arithmetic is best.
	var parts []*Field
	for _, q := range factors {
		parts = append(parts, standardField(w, F, power(q.P, q.E)))
	}
	T := parts[0]
	for _, K := range parts[1:] {
		if K.absolute > T.absolute {
			T = K
		}
	}
	bottom := T
	gens := make([]Elem, len(parts))
	for i, K := range parts {
		if gens[i] = K.Generator(); K != bottom {
			T = extend(w, T, lifted(w, K.modulus, F, T), false)
			gens[i] = T.Generator()
		}
	}
	sum := T.Zero()
	for i := range gens {
		gens[i] = lift(w, gens[i], T)
		sum = sum.Add(gens[i])
	}
	return simple(w, T, sum, func(L *Field, in func(Elem) Elem) {
		list := make([]Elem, len(gens))
		for i := range gens {
			list[i] = in(gens[i])
		}
		l := F.lattice
		keep(l, l.parts, L.absolute, list)
	})
}

// lifted has the coefficients of f, over F, moved up the tower to T.
func lifted(w *algebra.Work, f *poly.Poly, F, T *Field) *poly.Poly {
	g := new(poly.Poly)
	for i := f.N - 1; i >= 0; i-- {
		T.arith.SetCoeff(g, i, lift(w, Elem{F, poly.Coeff(F.arith, f, i)}, T).w)
	}
	return g
}

func power(b, e int) int {
	n := 1
	for range e {
		n *= b
	}
	return n
}

// partsOf lists the images in F_{p^n} of the generators of its subfields of
// degrees l^e exactly dividing n, by increasing l.
func partsOf(w *algebra.Work, F *Field, n int) []Elem {
	L := standardField(w, F, n)
	l := F.lattice
	if list, ok := recall(l, l.parts, n); ok {
		return list
	}
	f := integer.FactorInt(n)
	list := make([]Elem, len(f))
	for i, q := range f {
		switch m := power(q.P, q.E); {
		case m == n:
			list[i] = L.Generator()
		default: // inside the table
			list[i] = L.Generator().power(w, quotient(F.p, m, n))
		}
	}
	return keep(l, l.parts, n, list)
}

// combineParts is the image of g_m in F_{p^n} for a composite n outside the
// table: g_m in terms of the parts of m, and these in terms of the parts of n.
func combineParts(w *algebra.Work, F *Field, m, n int) Elem {
	L := standardField(w, F, n)
	up := partsOf(w, F, n)
	fm, fn := integer.FactorInt(m), integer.FactorInt(n)
	images := make([]Elem, len(fm)) // of the parts of m in L
	for i, q := range fm {
		for j, r := range fn {
			if r.P != q.P {
				continue
			}
			part := standardField(w, F, power(r.P, r.E))
			images[i] = newMap(part, L, up[j], nil).Apply(w, standardImage(w, F, power(q.P, q.E), part.absolute))
		}
	}
	return assemble(w, F, m, L, images)
}

// assemble is the image of g_m under the homomorphism into L that sends the
// parts of g_m to the given images.
func assemble(w *algebra.Work, F *Field, m int, L *Field, images []Elem) Elem {
	f := integer.FactorInt(m)
	switch {
	case len(f) == 1:
		return images[0]
	case !conway.Has(F.p, m):
		sum := L.Zero()
		for _, a := range images {
			sum = sum.Add(a)
		}
		return sum
	}
	vectors := make([]*poly.Poly, m)
	for i, a := range products(w, L, images, f) {
		vectors[i] = L.vector(a.w)
	}
	return L.fromVectorElem(w, combine(w, F.arith, mix(w, F, m), vectors))
}

// mix has the coordinates of g_m in the basis of products of powers of its
// parts.
func mix(w *algebra.Work, F *Field, m int) *poly.Poly {
	l := F.lattice
	if c, ok := recall(l, l.mixes, m); ok {
		return c
	}
	K := standardField(w, F, m)
	vectors := make([]*poly.Poly, m)
	for i, a := range products(w, K, partsOf(w, F, m), integer.FactorInt(m)) {
		vectors[i] = K.vector(a.w)
	}
	s, _ := newSpan(w, F.arith, m, vectors)
	c, _ := s.solve(w, K.vector(K.Generator().w))
	return keep(l, l.mixes, m, c)
}

// products lists the products of powers of the parts, below their degrees, the
// exponent of the first part changing fastest.
func products(w *algebra.Work, K *Field, parts []Elem, f []integer.IntPower) []Elem {
	list := []Elem{K.One()}
	for i, g := range parts {
		n, t := len(list), g
		for range power(f[i].P, f[i].E) - 1 {
			for _, a := range list[:n] {
				list = append(list, a.Mul(w, t))
			}
			t = t.Mul(w, g)
		}
	}
	return list
}
