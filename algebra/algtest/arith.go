// Package algtest has the conformance suites of the algebra: a new
// representation of a field gets its tests by one line. It holds no tests of
// its own and is imported by tests only.
package algtest

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Arith checks that A obeys the laws of polynomial arithmetic over a field, in
// all aliasings, and leaves its operands alone. Failures name the seed.
func Arith(t *testing.T, A poly.Arith, seed uint64) {
	t.Helper()
	s := &suite{t, A, rand.New(rand.NewPCG(seed, seed)), algebra.NewWork(nil), seed}
	rounds := 30
	if A.Width() > 8 {
		rounds = 8
	}
	for range rounds {
		s.elements()
		s.polynomials()
		s.division()
		s.modulus()
		s.aliases()
	}
	s.codes()
}

type suite struct {
	t    *testing.T
	A    poly.Arith
	r    *rand.Rand
	w    *algebra.Work
	seed uint64
}

// elem is a random element, often one at an edge.
func (s *suite) elem() poly.Elem {
	e := make(poly.Elem, s.A.Width())
	switch s.r.IntN(6) {
	case 0:
	case 1:
		copy(e, s.A.One())
	case 2:
		s.A.NegElem(e, s.A.One())
	case 3:
		s.A.FromCode(e, new(big.Int).Sub(s.A.Order(), big.NewInt(1)))
	default:
		return poly.RandomElem(s.A, s.r)
	}
	return e
}

// poly is a random polynomial, often short, sparse or monic.
func (s *suite) poly() *poly.Poly {
	f := new(poly.Poly)
	n := s.r.IntN(9)
	if s.A.Packed() {
		n = s.r.IntN(200)
	}
	if s.r.IntN(8) == 0 {
		n *= 5
	}
	for i := n - 1; i >= 0; i-- {
		s.A.SetCoeff(f, i, s.elem())
	}
	return f
}

func (s *suite) nonzero() *poly.Poly {
	for {
		if f := s.poly(); !f.IsZero() {
			return f
		}
	}
}

func (s *suite) sameElem(law string, a, b poly.Elem) {
	s.t.Helper()
	if !poly.EqualElem(a, b) {
		s.t.Fatalf("seed %d: %s: %x is not %x", s.seed, law, a, b)
	}
}

func (s *suite) same(law string, f, g *poly.Poly) {
	s.t.Helper()
	s.valid(law, f)
	s.valid(law, g)
	if !poly.Equal(f, g) {
		s.t.Fatalf("seed %d: %s: %x is not %x", s.seed, law, f, g)
	}
}

// valid checks the invariants that Poly states.
func (s *suite) valid(law string, f *poly.Poly) {
	s.t.Helper()
	words := f.N * s.A.Width()
	if s.A.Packed() {
		words = (f.N + 63) / 64
		if r := f.N % 64; r > 0 && f.W[words-1]>>r != 0 {
			s.t.Fatalf("seed %d: %s: bits beyond the last coefficient", s.seed, law)
		}
	}
	if len(f.W) != words {
		s.t.Fatalf("seed %d: %s: %d coefficients in %d words", s.seed, law, f.N, len(f.W))
	}
	if f.N > 0 && poly.IsZeroElem(poly.Coeff(s.A, f, f.N-1)) {
		s.t.Fatalf("seed %d: %s: the leading coefficient is zero", s.seed, law)
	}
}

func (s *suite) elements() {
	A, w := s.A, s.w
	op := func(f func(z poly.Elem)) poly.Elem {
		z := make(poly.Elem, A.Width())
		f(z)
		return z
	}
	add := func(a, b poly.Elem) poly.Elem { return op(func(z poly.Elem) { A.AddElem(z, a, b) }) }
	sub := func(a, b poly.Elem) poly.Elem { return op(func(z poly.Elem) { A.SubElem(z, a, b) }) }
	neg := func(a poly.Elem) poly.Elem { return op(func(z poly.Elem) { A.NegElem(z, a) }) }
	mul := func(a, b poly.Elem) poly.Elem { return op(func(z poly.Elem) { A.MulElem(w, z, a, b) }) }
	a, b, c := s.elem(), s.elem(), s.elem()
	zero := make(poly.Elem, A.Width())
	s.sameElem("a+b = b+a", add(a, b), add(b, a))
	s.sameElem("(a+b)+c = a+(b+c)", add(add(a, b), c), add(a, add(b, c)))
	s.sameElem("a+0 = a", add(a, zero), a)
	s.sameElem("a-a = 0", sub(a, a), zero)
	s.sameElem("a-b = a+(-b)", sub(a, b), add(a, neg(b)))
	s.sameElem("ab = ba", mul(a, b), mul(b, a))
	s.sameElem("(ab)c = a(bc)", mul(mul(a, b), c), mul(a, mul(b, c)))
	s.sameElem("a(b+c) = ab+ac", mul(a, add(b, c)), add(mul(a, b), mul(a, c)))
	s.sameElem("1a = a", mul(A.One(), a), a)
	inv := make(poly.Elem, A.Width())
	if ok := A.InvElem(w, inv, a); ok == poly.IsZeroElem(a) {
		s.t.Fatalf("seed %d: the inverse of %x: %v", s.seed, a, ok)
	} else if ok {
		s.sameElem("a (1/a) = 1", mul(a, inv), A.One())
	}
	frob := func(a poly.Elem, k int) poly.Elem {
		return op(func(z poly.Elem) { A.FrobeniusElem(w, z, a, k) })
	}
	slow := append(poly.Elem(nil), A.One()...)
	for i := A.Characteristic().BitLen() - 1; i >= 0; i-- {
		slow = mul(slow, slow)
		if A.Characteristic().Bit(i) == 1 {
			slow = mul(slow, a)
		}
	}
	s.sameElem("Frobenius(a) = a^p", frob(a, 1), slow)
	k := s.r.IntN(A.Degree()+3) - 1
	if A.Degree() <= 40 {
		step := a
		for range max(0, k) {
			step = frob(step, 1)
		}
		s.sameElem("Frobenius^k step by step", frob(a, max(0, k)), step)
	}
	s.sameElem("Frobenius^-k Frobenius^k = 1", frob(frob(a, k), -k), a)
	s.sameElem("Frobenius adds", frob(add(a, b), k), add(frob(a, k), frob(b, k)))
	s.sameElem("Frobenius multiplies", frob(mul(a, b), k), mul(frob(a, k), frob(b, k)))
	s.sameElem("Frobenius^n = 1", frob(a, A.Degree()), a)
	s.sameElem("FromCode(Code(a)) = a", op(func(z poly.Elem) { A.FromCode(z, A.Code(a)) }), a)
	m, n := big.NewInt(int64(s.r.Uint64())), big.NewInt(s.r.Int64())
	int1 := func(n *big.Int) poly.Elem { return op(func(z poly.Elem) { A.SetInt(z, n) }) }
	s.sameElem("m+n in the field", int1(new(big.Int).Add(m, n)), add(int1(m), int1(n)))
	s.sameElem("mn in the field", int1(new(big.Int).Mul(m, n)), mul(int1(m), int1(n)))
	s.sameElem("p = 0", int1(A.Characteristic()), zero)
}

func (s *suite) polynomials() {
	A, w := s.A, s.w
	f, g, h := s.poly(), s.poly(), s.poly()
	op := func(do func(z *poly.Poly)) *poly.Poly {
		z := new(poly.Poly)
		do(z)
		return z
	}
	add := func(f, g *poly.Poly) *poly.Poly { return op(func(z *poly.Poly) { A.Add(z, f, g) }) }
	mul := func(f, g *poly.Poly) *poly.Poly { return op(func(z *poly.Poly) { A.Mul(w, z, f, g) }) }
	s.same("f+g = g+f", add(f, g), add(g, f))
	s.same("(f+g)+h = f+(g+h)", add(add(f, g), h), add(f, add(g, h)))
	s.same("f-g+g = f", add(op(func(z *poly.Poly) { A.Sub(z, f, g) }), g), f)
	s.same("f+(-f) = 0", add(f, op(func(z *poly.Poly) { A.Neg(z, f) })), new(poly.Poly))
	s.same("fg = gf", mul(f, g), mul(g, f))
	s.same("(fg)h = f(gh)", mul(mul(f, g), h), mul(f, mul(g, h)))
	s.same("f(g+h) = fg+fh", mul(f, add(g, h)), add(mul(f, g), mul(f, h)))
	s.same("f^2 = ff", op(func(z *poly.Poly) { A.Sqr(w, z, f) }), mul(f, f))
	s.same("fg term by term", s.slowMul(f, g), mul(f, g))
	c := s.elem()
	s.same("cf", op(func(z *poly.Poly) { A.Scale(w, z, f, c) }), mul(poly.Constant(A, c), f))
	s.same("g + cf", op(func(z *poly.Poly) { A.Add(z, z, g); A.AddScaled(w, z, f, c) }), add(g, mul(poly.Constant(A, c), f)))
	k := s.r.IntN(70)
	up := op(func(z *poly.Poly) { A.Shift(z, f, k) })
	s.same("x^k f", up, mul(poly.Monomial(A, A.One(), k), f))
	s.same("x^k f over x^k", op(func(z *poly.Poly) { A.Slice(z, up, k, up.N) }), f)
	low := op(func(z *poly.Poly) { A.Slice(z, f, 0, k) })
	s.same("f = low + x^k high", add(low, op(func(z *poly.Poly) { A.Slice(z, f, k, f.N); A.Shift(z, z, k) })), f)
	n := f.N + s.r.IntN(70)
	s.same("x^n f(1/x)", op(func(z *poly.Poly) { A.Reverse(z, f, n) }), s.slowReverse(f, n))
	dot, slow, t := make(poly.Elem, A.Width()), make(poly.Elem, A.Width()), make(poly.Elem, A.Width())
	A.Dot(w, dot, f, g)
	for i := range min(f.N, g.N) {
		A.MulElem(w, t, poly.Coeff(A, f, i), poly.Coeff(A, g, i))
		A.AddElem(slow, slow, t)
	}
	s.sameElem("inner product", dot, slow)
	d := func(f *poly.Poly) *poly.Poly { return op(func(z *poly.Poly) { A.Derivative(z, f) }) }
	s.same("(fg)' = f'g + fg'", d(mul(f, g)), add(mul(d(f), g), mul(f, d(g))))
	fr := func(f *poly.Poly) *poly.Poly { return op(func(z *poly.Poly) { A.FrobeniusCoeffs(w, z, f, 1) }) }
	s.same("Frobenius of fg", fr(mul(f, g)), mul(fr(f), fr(g)))
	s.same("coefficients", poly.FromElems(A, poly.Elems(A, f)), f)
}

func (s *suite) slowMul(f, g *poly.Poly) *poly.Poly {
	z := make([]poly.Elem, max(0, f.N+g.N-1))
	for i := range z {
		z[i] = make(poly.Elem, s.A.Width())
	}
	t := make(poly.Elem, s.A.Width())
	for i, a := range poly.Elems(s.A, f) {
		for j, b := range poly.Elems(s.A, g) {
			s.A.MulElem(s.w, t, a, b)
			s.A.AddElem(z[i+j], z[i+j], t)
		}
	}
	return poly.FromElems(s.A, z)
}

func (s *suite) slowReverse(f *poly.Poly, n int) *poly.Poly {
	z := new(poly.Poly)
	for i, a := range poly.Elems(s.A, f) {
		s.A.Add(z, z, poly.Monomial(s.A, a, n-i))
	}
	return z
}

func (s *suite) division() {
	A, w := s.A, s.w
	f, g := s.poly(), s.nonzero()
	q, r, back := new(poly.Poly), new(poly.Poly), new(poly.Poly)
	A.DivRem(w, q, r, f, g)
	if r.N >= g.N {
		s.t.Fatalf("seed %d: remainder of degree %d by degree %d", s.seed, r.Degree(), g.Degree())
	}
	A.Mul(w, back, q, g)
	A.Add(back, back, r)
	s.same("f = qg + r", back, f)
	q2, r2 := new(poly.Poly), new(poly.Poly)
	poly.DivRemBySeries(w, A, q2, r2, s.longer(f, g), g)
	A.Mul(w, back, q2, g)
	A.Add(back, back, r2)
	s.same("f = qg + r by series", back, s.longer(f, g))
	s.same("remainder by series", r2, s.rem(s.longer(f, g), g))
}

// longer is f, made at least as long as g.
func (s *suite) longer(f, g *poly.Poly) *poly.Poly {
	if f.N >= g.N {
		return f
	}
	z := new(poly.Poly)
	s.A.Shift(z, g, 2)
	s.A.Add(z, z, f)
	return z
}

func (s *suite) rem(f, g *poly.Poly) *poly.Poly {
	r := new(poly.Poly)
	s.A.DivRem(s.w, nil, r, f, g)
	return r
}

func (s *suite) modulus() {
	A, w := s.A, s.w
	m := s.nonzero()
	if m.N == 1 {
		m = poly.X(A)
	}
	M := A.NewModulus(w, m)
	f, g := s.poly(), s.poly()
	a, b, z := new(poly.Poly), new(poly.Poly), new(poly.Poly)
	M.Reduce(w, a, f)
	s.same("f mod m", a, s.rem(f, m))
	M.Reduce(w, b, g)
	M.MulMod(w, z, a, b)
	p := new(poly.Poly)
	A.Mul(w, p, f, g)
	s.same("fg mod m", z, s.rem(p, m))
	M.Reduce(w, p, p)
	s.same("fg mod m, reduced", z, p)
	M.SqrMod(w, z, a)
	A.Mul(w, p, f, f)
	s.same("f^2 mod m", z, s.rem(p, m))
}

// aliases repeats every operation with its result on top of an operand.
func (s *suite) aliases() {
	A, w := s.A, s.w
	f, g := s.poly(), s.nonzero()
	c := s.elem()
	binary := map[string]func(z, f, g *poly.Poly){
		"sum":        A.Add,
		"difference": A.Sub,
		"product":    func(z, f, g *poly.Poly) { A.Mul(w, z, f, g) },
		"quotient":   func(z, f, g *poly.Poly) { A.DivRem(w, z, nil, f, g) },
		"remainder":  func(z, f, g *poly.Poly) { A.DivRem(w, nil, z, f, g) },
	}
	for name, op := range binary {
		want, f1, g1 := new(poly.Poly), poly.Clone(f), poly.Clone(g)
		op(want, f1, g1)
		s.same(name+" leaves f alone", f1, f)
		s.same(name+" leaves g alone", g1, g)
		op(f1, f1, g1)
		s.same(name+" onto f", f1, want)
		f1 = poly.Clone(f)
		op(g1, f1, g1)
		s.same(name+" onto g", g1, want)
		dirty := s.nonzero()
		op(dirty, f, g)
		s.same(name+" onto something else", dirty, want)
		g1 = poly.Clone(g)
		op(want, g, poly.Clone(g))
		op(g1, g1, g1)
		s.same(name+" of g with itself", g1, want)
	}
	unary := map[string]func(z, f *poly.Poly){
		"negative":   A.Neg,
		"multiple":   func(z, f *poly.Poly) { A.Scale(w, z, f, c) },
		"slice":      func(z, f *poly.Poly) { A.Slice(z, f, 1, 5) },
		"shift":      func(z, f *poly.Poly) { A.Shift(z, f, 3) },
		"reverse":    func(z, f *poly.Poly) { A.Reverse(z, f, f.N+2) },
		"square":     func(z, f *poly.Poly) { A.Sqr(w, z, f) },
		"derivative": A.Derivative,
		"Frobenius":  func(z, f *poly.Poly) { A.FrobeniusCoeffs(w, z, f, 1) },
	}
	for name, op := range unary {
		want, f1 := new(poly.Poly), poly.Clone(f)
		op(want, f1)
		s.same(name+" leaves f alone", f1, f)
		op(f1, f1)
		s.same(name+" onto f", f1, want)
		dirty := s.nonzero()
		op(dirty, f)
		s.same(name+" onto something else", dirty, want)
	}
}

// codes checks the numbering of a small field whole.
func (s *suite) codes() {
	A := s.A
	if !A.Order().IsInt64() || A.Order().Int64() > 1000 {
		return
	}
	for n := range A.Order().Int64() {
		e := make(poly.Elem, A.Width())
		A.FromCode(e, big.NewInt(n))
		if A.Code(e).Cmp(big.NewInt(n)) != 0 {
			s.t.Fatalf("the element of code %d has code %v", n, A.Code(e))
		}
	}
}

// Agree checks that two representations of the field with the same codes give
// the same results on random programs.
func Agree(t *testing.T, A, B poly.Arith, seed uint64) {
	t.Helper()
	s := &suite{t, A, rand.New(rand.NewPCG(seed, seed)), algebra.NewWork(nil), seed}
	move := func(f *poly.Poly) *poly.Poly {
		g, e := new(poly.Poly), make(poly.Elem, B.Width())
		for i := f.N - 1; i >= 0; i-- {
			B.FromCode(e, A.Code(poly.Coeff(A, f, i)))
			B.SetCoeff(g, i, e)
		}
		return g
	}
	for range 20 {
		f, g := s.poly(), s.nonzero()
		x, y := move(f), move(g)
		for range 8 {
			switch s.r.IntN(5) {
			case 0:
				A.Add(f, f, g)
				B.Add(x, x, y)
			case 1:
				A.Mul(s.w, f, f, g)
				B.Mul(s.w, x, x, y)
			case 2:
				A.DivRem(s.w, f, nil, f, g)
				B.DivRem(s.w, x, nil, x, y)
			case 3:
				A.Sub(f, g, f)
				B.Sub(x, y, x)
			case 4:
				A.FrobeniusCoeffs(s.w, f, f, 1)
				B.FrobeniusCoeffs(s.w, x, x, 1)
			}
			if f.N > 40 {
				A.DivRem(s.w, nil, f, f, g)
				B.DivRem(s.w, nil, x, x, y)
			}
			if !poly.Equal(move(f), x) {
				t.Fatalf("seed %d: the representations differ: %x and %x", seed, move(f), x)
			}
		}
	}
}
