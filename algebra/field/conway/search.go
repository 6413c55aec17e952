package conway

import (
	"math/big"
	"math/bits"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

// References:
//
//	[HL] L. Heath, N. Loehr, New algorithms for generating Conway polynomials
//	  over finite fields, 2004: the search among the elements that are
//	  compatible, instead of among all polynomials.

// search is the hunt for one C_{p,n}, n > 1.
type search struct {
	w     *algebra.Work
	p     *big.Int
	n     int
	F     poly.Arith // F_p
	root  *big.Int   // C_{p,1} = x - root
	units *big.Int   // N = p^n - 1
	fac   integer.Factorization
	below map[int]*poly.Poly // C_{p,m} for the maximal divisors m of n
}

// Search is C_{p,n} as a list of coefficients, constant term first and the
// leading 1 included. known(m) is C_{p,m} in the same form for m = 1 and the
// divisors m = n/l, l prime; it is not called for n = 1. p^n - 1 must be one
// that integer.FactorPower factors.
func Search(w *algebra.Work, p int64, n int, known func(m int) []int64) []int64 {
	if n == 1 {
		return []int64{p - leastPrimitiveRoot(w, big.NewInt(p)), 1}
	}
	s := newSearch(w, p, n, known)
	// About p^(n - phi(n)) polynomials come before the right one, and there are
	// about p^phi(n) compatible elements.
	if 2*integer.EulerPhiInt(n) > n {
		return s.coefficients(s.inOrder())
	}
	return s.coefficients(s.amongCompatible())
}

func newSearch(w *algebra.Work, p int64, n int, known func(m int) []int64) *search {
	s := &search{w: w, p: big.NewInt(p), n: n}
	s.F = rep.Prime(s.p)
	s.root = big.NewInt(p - known(1)[0])
	s.units = units(s.p, n)
	s.fac = integer.FactorPower(w, s.p, n)
	s.below = map[int]*poly.Poly{}
	for _, q := range integer.FactorInt(n) {
		s.below[n/q.P] = poly.FromInts(s.F, known(n/q.P)...)
	}
	return s
}

func (s *search) coefficients(f *poly.Poly) []int64 {
	c := make([]int64, s.n+1)
	for i := range c {
		c[i] = s.F.Code(poly.Coeff(s.F, f, i)).Int64()
	}
	return c
}

func leastPrimitiveRoot(w *algebra.Work, p *big.Int) int64 {
	n := units(p, 1)
	f := integer.FactorPower(w, p, 1)
	for r := int64(1); ; r++ {
		primitive := true
		for _, q := range f.Primes {
			e := new(big.Int).Div(n, q.P)
			if new(big.Int).Exp(big.NewInt(r), e, p).Cmp(big.NewInt(1)) == 0 {
				primitive = false
			}
		}
		if primitive {
			return r
		}
	}
}

func units(p *big.Int, n int) *big.Int {
	z := new(big.Int).Exp(p, big.NewInt(int64(n)), nil)
	return z.Sub(z, big.NewInt(1))
}

// inOrder tries the words a_1, ..., a_(n-1) in their order; a_n is the norm of
// a root, and so the root of C_{p,1}.
func (s *search) inOrder() *poly.Poly {
	word := make([]int64, s.n+1)
	word[s.n] = s.root.Int64()
	for {
		s.w.Poll()
		if f := s.fromWord(word); s.isConway(f) {
			return f
		}
		i := s.n - 1
		for word[i]++; word[i] == s.p.Int64(); word[i]++ {
			word[i] = 0
			i--
		}
	}
}

// fromWord is x^n - a_1 x^(n-1) + a_2 x^(n-2) - ... for word[i] = a_i.
func (s *search) fromWord(word []int64) *poly.Poly {
	c := make([]int64, s.n+1)
	c[s.n] = 1
	for i := 1; i <= s.n; i++ {
		c[s.n-i] = word[i]
		if i%2 == 1 {
			c[s.n-i] = -word[i]
		}
	}
	return poly.FromInts(s.F, c...)
}

// less compares the words of two polynomials of degree n.
func (s *search) less(f, g *poly.Poly) bool {
	a, b := make(poly.Elem, s.F.Width()), make(poly.Elem, s.F.Width())
	for i := 1; i <= s.n; i++ {
		s.F.Coeff(a, f, s.n-i)
		s.F.Coeff(b, g, s.n-i)
		if i%2 == 1 {
			s.F.NegElem(a, a)
			s.F.NegElem(b, b)
		}
		if c := poly.CompareElem(s.F, a, b); c != 0 {
			return c < 0
		}
	}
	return false
}

// isConway says whether f is primitive and compatible with those below.
func (s *search) isConway(f *poly.Poly) bool {
	if !poly.Irreducible(s.w, s.F, f) {
		return false
	}
	for m, c := range s.below {
		y := poly.PowMod(s.w, s.F, poly.X(s.F), new(big.Int).Div(s.units, units(s.p, m)), f)
		if !poly.ComposeMod(s.w, s.F, c, y, f).IsZero() {
			return false
		}
	}
	for _, q := range s.fac.Primes {
		if poly.IsOne(s.F, poly.PowMod(s.w, s.F, poly.X(s.F), new(big.Int).Div(s.units, q.P), f)) {
			return false
		}
	}
	return true
}

// amongCompatible looks through the elements a of F_{p^n} whose powers are
// given roots of the polynomials below: the least polynomial of a primitive
// one.
//
// Fix roots r_m that are compatible with each other; other choices are their
// conjugates and give the same polynomials. The a with a^(N/(p^m-1)) = r_m for
// all m are a coset of the group of order M = gcd of the N/(p^m-1): a M-th
// root of the right element, times the powers of an element z of order M.
func (s *search) amongCompatible() *poly.Poly {
	K := &elements{s: s, A: rep.Extend(s.w, s.F, poly.FindIrreducible(s.w, s.F, s.n))}
	return K.least()
}

// least is the least of the minimal polynomials of the compatible primitive
// elements.
func (K *elements) least() *poly.Poly {
	s := K.s
	M, target := K.condition()
	a, z, free := K.rootsOf(M, target)
	K.prepareTrace()
	var best *poly.Poly
	least := new(big.Int).Set(s.p) // trace of the best
	gcd, j, one := new(big.Int), new(big.Int), big.NewInt(1)
	for ; j.Cmp(M) < 0; j.Add(j, one) {
		s.w.Poll()
		// Its order is N if it is prime to the primes that only M has.
		if gcd.GCD(nil, nil, j, free).Cmp(one) == 0 {
			if t := K.trace(a); t.Cmp(least) <= 0 {
				if f := K.minimal(a); f.Degree() == s.n && (best == nil || s.less(f, best)) {
					best, least = f, t
				}
			}
		}
		K.A.MulElem(s.w, a, a, z)
	}
	return best
}

// elements is F_{p^n} for amongCompatible.
type elements struct {
	s      *search
	A      *rep.Extension
	traces []poly.Elem // of x^i
	mask   []uint64    // the same for packed bits
}

func (K *elements) pow(a poly.Elem, e *big.Int) poly.Elem {
	z := append(poly.Elem(nil), K.A.One()...)
	e = new(big.Int).Mod(e, K.s.units)
	for i := e.BitLen() - 1; i >= 0; i-- {
		K.A.MulElem(K.s.w, z, z, z)
		if e.Bit(i) == 1 {
			K.A.MulElem(K.s.w, z, z, a)
		}
	}
	return z
}

func (K *elements) mul(a, b poly.Elem) poly.Elem {
	z := make(poly.Elem, K.A.Width())
	K.A.MulElem(K.s.w, z, a, b)
	return z
}

// condition is M and the value of a^M for the elements a that are sought.
func (K *elements) condition() (*big.Int, poly.Elem) {
	s := K.s
	var degrees []int
	for _, q := range integer.FactorInt(s.n) {
		degrees = append(degrees, s.n/q.P)
	}
	var roots []poly.Elem
	M, value := new(big.Int), K.A.One() // a^0 = 1
	for i, m := range degrees {
		r := K.rootOf(s.below[m])
		for !K.agrees(r, m, roots, degrees[:i]) {
			K.A.FrobeniusElem(s.w, r, r, 1)
		}
		roots = append(roots, r)
		u, v := new(big.Int), new(big.Int)
		e := new(big.Int).Div(s.units, units(s.p, m))
		M = new(big.Int).GCD(u, v, M, e)
		value = K.mul(K.pow(value, u), K.pow(r, v))
	}
	return M, value
}

// agrees says whether r, of degree m, has the same powers in common subfields
// as the roots before.
func (K *elements) agrees(r poly.Elem, m int, roots []poly.Elem, degrees []int) bool {
	for i, k := range degrees {
		d := units(K.s.p, int(new(big.Int).GCD(nil, nil, big.NewInt(int64(m)), big.NewInt(int64(k))).Int64()))
		x := K.pow(r, new(big.Int).Div(units(K.s.p, m), d))
		y := K.pow(roots[i], new(big.Int).Div(units(K.s.p, k), d))
		if !poly.EqualElem(x, y) {
			return false
		}
	}
	return true
}

// rootOf is some root of f, a polynomial over F_p.
func (K *elements) rootOf(f *poly.Poly) poly.Elem {
	g, e := new(poly.Poly), make(poly.Elem, K.A.Width())
	for i := f.N - 1; i >= 0; i-- {
		K.A.FromPoly(K.s.w, e, poly.Constant(K.s.F, poly.Coeff(K.s.F, f, i)))
		K.A.SetCoeff(g, i, e)
	}
	return poly.Root1(K.s.w, K.A, g)
}

// rootsOf is one a with a^M = value, an element z of order M, and the product
// of the primes of M that do not divide N/M. For the primes of M that do not,
// the part of a of that order is 1.
func (K *elements) rootsOf(M *big.Int, value poly.Elem) (a, z poly.Elem, free *big.Int) {
	N := K.s.units
	L := new(big.Int).Div(N, M)
	one, zero := big.NewInt(1), new(big.Int)
	a, z, free = K.A.One(), K.A.One(), big.NewInt(1)
	rest := new(big.Int).Set(N) // the part of N prime to M
	for _, q := range K.s.fac.Primes {
		if new(big.Int).Mod(M, q.P).Cmp(zero) != 0 {
			continue
		}
		whole := new(big.Int).Exp(q.P, big.NewInt(int64(q.E)), nil)
		rest.Div(rest, whole)
		inM := new(big.Int).GCD(nil, nil, M, whole)
		h := K.sylow(q.P, whole)
		z = K.mul(z, K.pow(h, new(big.Int).Div(whole, inM)))
		if new(big.Int).Mod(L, q.P).Cmp(zero) != 0 {
			free.Mul(free, q.P)
			continue
		}
		// The q-part: h^j with j M = k, for the logarithm k of that of value.
		co := new(big.Int).Div(N, whole)
		part := K.pow(value, new(big.Int).Mul(co, new(big.Int).ModInverse(co, whole)))
		k, t := new(big.Int), K.A.One()
		for !poly.EqualElem(t, part) {
			t = K.mul(t, h)
			k.Add(k, one)
		}
		modulus := new(big.Int).Div(whole, inM)
		j := new(big.Int).Div(k, inM)
		if modulus.Cmp(one) > 0 {
			j.Mul(j, new(big.Int).ModInverse(new(big.Int).Div(M, inM), modulus))
		}
		a = K.mul(a, K.pow(h, j))
	}
	if rest.Cmp(one) > 0 {
		co := new(big.Int).Div(N, rest)
		part := K.pow(value, new(big.Int).Mul(co, new(big.Int).ModInverse(co, rest)))
		a = K.mul(a, K.pow(part, new(big.Int).ModInverse(M, rest)))
	}
	return K.mul(a, K.A.One()), z, free
}

// sylow is an element of order q^e = whole, the full power of q in N.
func (K *elements) sylow(q, whole *big.Int) poly.Elem {
	e := make(poly.Elem, K.A.Width())
	for c := new(big.Int).Set(K.s.p); ; c.Add(c, big.NewInt(1)) {
		K.A.FromCode(e, c)
		h := K.pow(e, new(big.Int).Div(K.s.units, whole))
		if !poly.EqualElem(K.pow(h, new(big.Int).Div(whole, q)), K.A.One()) {
			return h
		}
	}
}

// prepareTrace computes the traces of the powers of x.
func (K *elements) prepareTrace() {
	s := K.s
	K.mask = make([]uint64, s.n/64+1)
	x := poly.One(s.F)
	for i := range s.n {
		a := make(poly.Elem, K.A.Width())
		K.A.FromPoly(s.w, a, x)
		sum, b := make(poly.Elem, K.A.Width()), append(poly.Elem(nil), a...)
		for range s.n {
			K.A.AddElem(sum, sum, b)
			K.A.FrobeniusElem(s.w, b, b, 1)
		}
		t := poly.Coeff(s.F, K.A.ToPoly(sum), 0)
		K.traces = append(K.traces, t)
		K.mask[i/64] |= t[0] & 1 << (i % 64)
		s.F.Shift(x, x, 1)
	}
}

func (K *elements) trace(a poly.Elem) *big.Int {
	s := K.s
	f := K.A.ToPoly(a)
	if s.F.Packed() {
		n := 0
		for i, x := range f.W {
			n += bits.OnesCount64(x & K.mask[i])
		}
		return big.NewInt(int64(n & 1))
	}
	sum, c := make(poly.Elem, s.F.Width()), make(poly.Elem, s.F.Width())
	for i := range f.N {
		s.F.Coeff(c, f, i)
		s.F.MulElem(s.w, c, c, K.traces[i])
		s.F.AddElem(sum, sum, c)
	}
	return s.F.Code(sum)
}

// minimal is the minimal polynomial of a over F_p.
func (K *elements) minimal(a poly.Elem) *poly.Poly {
	s := K.s
	seq := make([]poly.Elem, 2*s.n)
	b := append(poly.Elem(nil), K.A.One()...)
	for i := range seq {
		seq[i] = poly.Coeff(s.F, K.A.ToPoly(b), 0)
		K.A.MulElem(s.w, b, b, a)
	}
	return poly.BerlekampMassey(s.w, s.F, seq)
}
