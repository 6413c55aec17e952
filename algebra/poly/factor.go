package poly

import (
	"hash/fnv"
	"math/big"
	"math/bits"
	"math/rand/v2"
	"sort"

	"adjoin/algebra"
)

// References:
//
//	[Yun] D. Yun, On square-free decomposition algorithms, 1976; for
//	  characteristic p as in H. Cohen, A Course in Computational Algebraic
//	  Number Theory, 1993, algorithm 3.4.2.
//	[CZ] D. Cantor, H. Zassenhaus, A new algorithm for factoring polynomials
//	  over finite fields, 1981.
//	[vzGS] J. von zur Gathen, V. Shoup, Computing Frobenius maps and factoring
//	  polynomials, 1992.
//	[KS] E. Kaltofen, V. Shoup, Subquadratic-time factoring of polynomials
//	  over finite fields, 1998.

// Factor is a monic polynomial with its multiplicity.
type Factor struct {
	F *Poly
	E int
}

// SortFactors puts factors into the canonical order.
func SortFactors(A Arith, list []Factor) {
	sort.SliceStable(list, func(i, j int) bool {
		if c := Compare(A, list[i].F, list[j].F); c != 0 {
			return c < 0
		}
		return list[i].E < list[j].E
	})
}

// Squarefree is the decomposition of f, not zero, into powers of pairwise
// coprime squarefree monic polynomials, one for each multiplicity that occurs,
// in increasing order of multiplicity [Yun].
func Squarefree(w *algebra.Work, A Arith, f *Poly) []Factor {
	var list []Factor
	f, _ = Monic(w, A, f)
	p := 0 // the characteristic, where an exponent can reach it
	if c := A.Characteristic(); c.IsInt64() && c.Int64() <= int64(f.N) {
		p = int(c.Int64())
	}
	for e := 1; f.N > 1; e *= p {
		w.Poll()
		d := new(Poly)
		A.Derivative(d, f)
		c := GCD(w, A, f, d)
		rad := new(Poly) // the product of the factors whose exponent p does not divide
		A.DivRem(w, rad, nil, f, c)
		for k := 1; rad.N > 1; k++ {
			next := GCD(w, A, rad, c)
			g := new(Poly)
			A.DivRem(w, g, nil, rad, next)
			if g.N > 1 {
				list = append(list, Factor{g, k * e})
			}
			rad = next
			A.DivRem(w, c, nil, c, rad)
		}
		if c.N <= 1 {
			break
		}
		f = pthRoot(w, A, c, p)
	}
	sort.Slice(list, func(i, j int) bool { return list[i].E < list[j].E })
	return list
}

// pthRoot is the p-th root of f, a polynomial in x^p.
func pthRoot(w *algebra.Work, A Arith, f *Poly, p int) *Poly {
	g := new(Poly)
	e := make(Elem, A.Width())
	for i := f.Degree() / p; i >= 0; i-- {
		A.Coeff(e, f, i*p)
		A.SetCoeff(g, i, e)
	}
	A.FrobeniusCoeffs(w, g, g, -1)
	return g
}

// DistinctDegree splits a squarefree monic f into the products of its
// irreducible factors of one degree, which stands in E, in increasing order.
//
// The powers x^(q^i) come by raising to the q-th power where q is small and,
// otherwise, by composition as in [KS]: x^(q^i) for i < l (baby steps) and
// x^(q^(l j)) (giant steps). One product over an interval of degrees tells
// whether factors are there, and only then they are looked for one by one.
func DistinctDegree(w *algebra.Work, A Arith, f *Poly) []Factor {
	var list []Factor
	if f.N <= 1 {
		return nil
	}
	if f.N == 2 {
		return []Factor{{Clone(f), 1}}
	}
	fr := newFrobenius(w, A, f)
	n := f.Degree()
	l := 1
	for l*l < n/2 {
		l++
	}
	rest := Clone(f)
	take := func(g *Poly, d int) {
		if g.N > 1 {
			list = append(list, Factor{g, d})
			A.DivRem(w, rest, nil, rest, g)
		}
	}
	if fr.cheap {
		h := fr.x
		for from := 1; 2*from <= rest.Degree(); from += l {
			block := make([]*Poly, l)
			for i := range block {
				h = fr.next(w, h)
				block[i] = h
			}
			fr.interval(w, rest, block, from, fr.x, take)
		}
	} else {
		// baby[i] = x^(q^i); the giant step x^(q^(l j)) meets x^(q^i) in the
		// factors of degrees dividing l j - i.
		baby := make([]*Poly, l)
		h := fr.x
		for i := range baby {
			baby[l-1-i] = h // so that degrees increase
			h = fr.next(w, h)
		}
		giant := h // x^(q^l)
		var step *Composer
		for from := 1; 2*from <= rest.Degree(); from += l {
			if from > 1 {
				if step == nil {
					step = NewComposer(w, A, fr.M, h, n)
				}
				giant = step.Apply(w, giant)
			}
			fr.interval(w, rest, baby, from, giant, take)
		}
	}
	if rest.N > 1 {
		list = append(list, Factor{rest, rest.Degree()})
	}
	return list
}

// interval finds the factors of rest of the degrees from, from+1, ...: those
// of degree from+i divide h[i] - g, and no smaller degree is left in rest.
func (z *frobenius) interval(w *algebra.Work, rest *Poly, h []*Poly, from int, g *Poly, take func(*Poly, int)) {
	A := z.A
	all, t := One(A), new(Poly)
	for _, hi := range h {
		A.Sub(t, hi, g)
		z.M.MulMod(w, all, all, t)
		w.Poll()
	}
	common := GCD(w, A, rest, all)
	for i, hi := range h {
		if common.N <= 1 {
			return
		}
		A.Sub(t, hi, g)
		A.DivRem(w, nil, t, t, common)
		d := GCD(w, A, common, t)
		if d.N > 1 {
			A.DivRem(w, common, nil, common, d)
			take(d, from+i)
		}
	}
}

// seeded is a stream of random choices that depends on f alone.
func seeded(f *Poly) *rand.Rand {
	h := fnv.New64a()
	var b [8]byte
	for _, x := range f.W {
		for i := range b {
			b[i] = byte(x >> (8 * i))
		}
		h.Write(b[:])
	}
	return rand.New(rand.NewPCG(h.Sum64(), uint64(f.N)))
}

// Random is a polynomial of degree below n with coefficients from r.
func Random(A Arith, r *rand.Rand, n int) *Poly {
	f := new(Poly)
	if A.Packed() {
		f.W = make([]uint64, (n+63)/64)
		for i := range f.W {
			f.W[i] = r.Uint64()
		}
		f.N = 64 * len(f.W)
		A.Slice(f, f, 0, n)
		return f
	}
	for i := n - 1; i >= 0; i-- {
		A.SetCoeff(f, i, RandomElem(A, r))
	}
	return f
}

// RandomElem is a coefficient drawn from r.
func RandomElem(A Arith, r *rand.Rand) Elem {
	n := new(big.Int)
	for range A.Order().BitLen()/64 + 2 {
		n.Lsh(n, 64).Or(n, new(big.Int).SetUint64(r.Uint64()))
	}
	e := make(Elem, A.Width())
	A.FromCode(e, n)
	return e
}

// EqualDegree is the list of the irreducible factors of f, a squarefree monic
// polynomial all of whose irreducible factors have degree d, in canonical
// order.
func EqualDegree(w *algebra.Work, A Arith, f *Poly, d int) []*Poly {
	var list []*Poly
	if f.N <= 1 {
		return nil
	}
	r := seeded(f)
	var split func(fr *frobenius)
	split = func(fr *frobenius) {
		f := fr.M.Poly()
		if f.Degree() == d {
			list = append(list, Clone(f))
			return
		}
		g, h := fr.halve(w, r, d)
		split(fr.modulo(w, g))
		split(fr.modulo(w, h))
	}
	split(newFrobenius(w, A, f))
	sort.Slice(list, func(i, j int) bool { return Compare(A, list[i], list[j]) < 0 })
	return list
}

// halve is a factorization of the modulus, all of whose two or more
// irreducible factors have degree d, into two.
func (z *frobenius) halve(w *algebra.Work, r *rand.Rand, d int) (g, h *Poly) {
	f := z.M.Poly()
	for {
		if u := Random(z.A, r, f.Degree()); u.N > 1 {
			if g, h = parts(w, z.A, f, z.separator(w, u, d)); g != nil {
				return g, h
			}
		}
	}
}

// parts is f as its common factor g with t times the rest, and nil when one of
// them is constant.
func parts(w *algebra.Work, A Arith, f, t *Poly) (g, h *Poly) {
	w.Poll()
	g = GCD(w, A, f, t)
	if g.N <= 1 || g.N == f.N {
		return nil, nil
	}
	h = new(Poly)
	A.DivRem(w, h, nil, f, g)
	return g, h
}

// separator is a polynomial that vanishes modulo about half of the
// irreducible factors, all of degree d, for a random u: for odd q,
// u^((q^d-1)/2) - 1 [CZ], and for even q the trace of u to F_2.
func (z *frobenius) separator(w *algebra.Work, u *Poly, d int) *Poly {
	op := z.A.Add
	if z.A.Order().Bit(0) == 1 {
		op = func(y, f, g *Poly) { z.M.MulMod(w, y, f, g) }
	}
	return character(w, z.A, z.M, z.sum(w, u, d, op), z.A)
}

// character is t^((q-1)/2) - 1 for odd q, and the trace of t to F_2 for even q,
// where the values of t lie in B with q elements.
func character(w *algebra.Work, A Arith, M Modulus, t *Poly, B Arith) *Poly {
	if q := B.Order(); q.Bit(0) == 1 {
		t = powModulus(w, A, M, t, new(big.Int).Rsh(q, 1))
		A.Sub(t, t, One(A))
		return t
	}
	s := Clone(t)
	for range B.Degree() - 1 {
		w.Poll()
		M.SqrMod(w, s, s)
		A.Add(t, t, s)
	}
	return t
}

// sum is u op u^q op ... op u^(q^(d-1)): a trace or a norm, by doubling
// [vzGS].
func (z *frobenius) sum(w *algebra.Work, u *Poly, d int, op func(z, f, g *Poly)) *Poly {
	if z.cheap {
		s, h := Clone(u), u
		for range d - 1 {
			w.Poll()
			h = z.next(w, h)
			op(s, s, h)
		}
		return s
	}
	n := z.M.Poly().N
	// s covers i conjugates and h is x^(q^i), for the leading bits i of d.
	s := Clone(u)
	if d == 1 {
		return s
	}
	h, i := z.first(w), 1
	for b := bits.Len(uint(d)) - 2; b >= 0; b-- {
		c := NewComposer(w, z.A, z.M, h, n)
		op(s, s, c.Apply(w, s))
		h, i = c.Apply(w, h), 2*i
		if d>>b&1 == 1 {
			t := z.next(w, s)
			op(t, t, u)
			s, h, i = t, z.next(w, h), i+1
		}
	}
	return s
}

// Factorize is the factorization of f, not zero: its leading coefficient and
// its monic irreducible factors with their multiplicities, in canonical order.
func Factorize(w *algebra.Work, A Arith, f *Poly) (lead Elem, list []Factor) {
	f, lead = Monic(w, A, f)
	// Powers of x are seen at once.
	k := 0
	for k < f.N-1 && IsZeroElem(Coeff(A, f, k)) {
		k++
	}
	if k > 0 {
		list = append(list, Factor{X(A), k})
		A.Slice(f, f, k, f.N)
	}
	for _, s := range Squarefree(w, A, f) {
		for _, g := range DistinctDegree(w, A, s.F) {
			for _, h := range EqualDegree(w, A, g.F, g.E) {
				list = append(list, Factor{h, s.E})
			}
		}
	}
	SortFactors(A, list)
	return lead, list
}
