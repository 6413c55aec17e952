package ratpoly

import (
	"fmt"
	"math/big"
	"sort"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

// References:
//
//	[Zassenhaus] H. Zassenhaus, On Hensel factorization I, 1969.
//	[vzGG] J. von zur Gathen, J. Gerhard, Modern Computer Algebra, 3rd edition
//	  2013, chapter 15: Hensel lifting and the recombination of factors.
//	[Musser] D. Musser, On the efficiency of a polynomial irreducibility test,
//	  1978: the degrees of factors modulo several primes.

// Factor is a primitive polynomial with positive leading coefficient and its
// multiplicity.
type Factor struct {
	F Poly
	E int
}

// MostLocalFactors is the number of factors modulo a prime up to which their
// combinations are tried: beyond it Factor is unable.
const MostLocalFactors = 24

// Factor is the factorization of f, not zero, over Q: a rational unit and the
// distinct irreducible factors, primitive with positive leading coefficients,
// in the order of degree and then of the coefficients from the highest down.
func (f Poly) Factor(w *algebra.Work) (*big.Rat, []Factor) {
	unit := f.Content()
	if f.c[len(f.c)-1].Sign() < 0 {
		unit.Neg(unit)
	}
	var list []Factor
	for e, g := range squarefree(w, primitive(f.c)) {
		for _, h := range factorSquarefree(w, g) {
			list = append(list, Factor{Poly{h, nil}, e + 1})
		}
	}
	sort.Slice(list, func(i, j int) bool { return compare(list[i].F.c, list[j].F.c) < 0 })
	return unit, list
}

func compare(f, g []*big.Int) int {
	if len(f) != len(g) {
		return len(f) - len(g)
	}
	for i := len(f) - 1; i >= 0; i-- {
		if c := f[i].Cmp(g[i]); c != 0 {
			return c
		}
	}
	return 0
}

// squarefree is the list of squarefree g_1, g_2, ... with f = g_1 g_2^2 ...
// (D. Yun, 1976).
func squarefree(w *algebra.Work, f []*big.Int) [][]*big.Int {
	if len(f) <= 1 {
		return nil
	}
	var list [][]*big.Int
	d := Poly{f, nil}.Derivative().c
	a := gcd(w, f, primitive(d))
	b, _, _ := divInts(w, f, a)
	for len(b) > 1 {
		c := gcd(w, b, a)
		g, _, _ := divInts(w, b, c)
		list = append(list, primitive(g))
		b = c
		a, _, _ = divInts(w, a, c)
	}
	return list
}

// factorSquarefree is the list of the irreducible factors of a primitive
// squarefree f with positive leading coefficient.
func factorSquarefree(w *algebra.Work, f []*big.Int) [][]*big.Int {
	if len(f) <= 1 {
		return nil
	}
	if f[0].Sign() == 0 {
		x := []*big.Int{zero, one}
		return append([][]*big.Int{x}, factorSquarefree(w, f[1:])...)
	}
	if len(f) == 2 {
		return [][]*big.Int{f}
	}
	if indices, ok := unity(f); ok {
		var list [][]*big.Int
		for _, d := range indices {
			list = append(list, integer.Cyclotomic(d))
		}
		return list
	}
	if cyclotomicIndex(w, f) > 0 {
		return [][]*big.Int{f}
	}
	l := bestPrime(w, f)
	if len(l.factors) == 1 || l.onlyWhole(len(f)-1) {
		return [][]*big.Int{f}
	}
	return l.recombine(w, f)
}

// local is a factorization modulo a small prime, and the degrees that factors
// over Q may have by the primes that were tried [Musser].
type local struct {
	p       *big.Int
	A       poly.Arith
	factors []*poly.Poly
	degrees *big.Int // bit d is set when a factor of degree d is possible
	primes  []*big.Int
}

// onlyWhole says whether no proper factor is possible.
func (l *local) onlyWhole(n int) bool {
	for d := 1; d < n; d++ {
		if l.degrees.Bit(d) == 1 {
			return false
		}
	}
	return true
}

// bestPrime tries several primes and keeps the one with the fewest factors.
func bestPrime(w *algebra.Work, f []*big.Int) *local {
	n := len(f) - 1
	best := &local{degrees: new(big.Int).Sub(new(big.Int).Lsh(one, uint(n+1)), one)}
	tried := 0
	for p := big.NewInt(3); tried < 8; p = integer.NextPrime(w, p) {
		A := rep.Prime(p)
		g := mod(A, f)
		d := new(poly.Poly)
		A.Derivative(d, g)
		if g.N < len(f) || poly.GCD(w, A, g, d).N > 1 {
			continue
		}
		tried++
		_, list := poly.Factorize(w, A, g)
		sums := big.NewInt(1)
		var factors []*poly.Poly
		for _, h := range list {
			sums.Or(sums, new(big.Int).Lsh(sums, uint(h.F.Degree())))
			factors = append(factors, h.F)
		}
		best.degrees.And(best.degrees, sums)
		best.primes = append(best.primes, p)
		if best.factors == nil || len(factors) < len(best.factors) {
			best.p, best.A, best.factors = p, A, factors
		}
		if len(best.factors) == 1 || best.onlyWhole(n) {
			break
		}
	}
	return best
}

// recombine lifts the local factors to p^k beyond twice the coefficients that
// a factor can have, and tries their products, fewest first [Zassenhaus].
func (l *local) recombine(w *algebra.Work, f []*big.Int) [][]*big.Int {
	if len(l.factors) > MostLocalFactors {
		algebra.Fail(algebra.Errorf(algebra.Unable,
			"a polynomial of degree %d splits into %d factors or more modulo every prime tried, too many to try all their combinations", len(f)-1, len(l.factors)))
	}
	// A factor of degree d has coefficients below 2^d ||f|| (M. Mignotte, 1974),
	// times the leading coefficient that is kept.
	bound := new(big.Int).Lsh(norm(f), uint(len(f)))
	bound.Mul(bound, f[len(f)-1])
	lifted, pk := l.lift(w, f, bound)
	var list [][]*big.Int
	left := make([]int, len(lifted))
	for i := range left {
		left[i] = i
	}
	for size := 1; 2*size <= len(left); {
		subset, g := l.find(w, f, lifted, left, size, pk)
		if subset == nil {
			size++
			continue
		}
		list = append(list, g)
		f, _, _ = divInts(w, f, g)
		left = without(left, subset)
	}
	return append(list, primitive(f))
}

func without(list, subset []int) []int {
	var rest []int
	for _, x := range list {
		if k := sort.SearchInts(subset, x); k == len(subset) || subset[k] != x {
			rest = append(rest, x)
		}
	}
	return rest
}

// find looks for a product of size lifted factors that is a factor of f.
func (l *local) find(w *algebra.Work, f []*big.Int, lifted [][]*big.Int, left []int, size int, pk *big.Int) ([]int, []*big.Int) {
	lead := f[len(f)-1]
	target := new(big.Int).Mul(f[0], lead)
	subset := make([]int, 0, size)
	var try func(from int) []*big.Int
	try = func(from int) []*big.Int {
		if len(subset) == size {
			w.Poll()
			degree := 0
			tail := new(big.Int).Set(lead)
			for _, i := range subset {
				degree += len(lifted[i]) - 1
				tail.Mul(tail, lifted[i][0]).Mod(tail, pk)
			}
			if l.degrees.Bit(degree) == 0 {
				return nil
			}
			// The constant term times the lead divides that of f times its lead.
			tail = balance(tail, pk)
			if tail.Sign() == 0 || new(big.Int).Rem(target, tail).Sign() != 0 {
				return nil
			}
			g := []*big.Int{lead}
			for _, i := range subset {
				g = reduce(mul(w, g, lifted[i]), pk)
			}
			for i, x := range g {
				g[i] = balance(x, pk)
			}
			if g = primitive(g); divides(w, g, f) {
				return g
			}
			return nil
		}
		for k := from; k <= len(left)-(size-len(subset)); k++ {
			subset = append(subset, left[k])
			if g := try(k + 1); g != nil {
				return g
			}
			subset = subset[:len(subset)-1]
		}
		return nil
	}
	if g := try(0); g != nil {
		return subset, g
	}
	return nil, nil
}

// reduce is c modulo m, with residues from 0.
func reduce(c []*big.Int, m *big.Int) []*big.Int {
	z := make([]*big.Int, len(c))
	for i, x := range c {
		z[i] = new(big.Int).Mod(x, m)
	}
	for len(z) > 0 && z[len(z)-1].Sign() == 0 {
		z = z[:len(z)-1]
	}
	return z
}

// lift is the list of monic factors modulo p^k > bound whose images modulo p
// are the local ones: quadratic lifting along a tree [vzGG, algorithm 15.17].
func (l *local) lift(w *algebra.Work, f []*big.Int, bound *big.Int) ([][]*big.Int, *big.Int) {
	pk := new(big.Int).Set(l.p)
	for pk.Cmp(bound) <= 0 {
		pk.Mul(pk, pk)
	}
	// f made monic modulo p^k.
	inv := new(big.Int).ModInverse(f[len(f)-1], pk)
	g := reduce(mul(w, f, []*big.Int{inv}), pk)
	var list [][]*big.Int
	var split func(f []*big.Int, factors []*poly.Poly)
	split = func(f []*big.Int, factors []*poly.Poly) {
		if len(factors) == 1 {
			list = append(list, f)
			return
		}
		h := len(factors) / 2
		a, b := l.product(w, factors[:h]), l.product(w, factors[h:])
		x, y := l.hensel(w, f, a, b, pk)
		split(x, factors[:h])
		split(y, factors[h:])
	}
	split(g, l.factors)
	return list, pk
}

func (l *local) product(w *algebra.Work, fs []*poly.Poly) *poly.Poly {
	z := poly.One(l.A)
	for _, f := range fs {
		l.A.Mul(w, z, z, f)
	}
	return z
}

// hensel lifts f = a b modulo p, with coprime monic a and b, to p^k.
func (l *local) hensel(w *algebra.Work, f []*big.Int, a, b *poly.Poly, pk *big.Int) (g, h []*big.Int) {
	_, u, v := poly.XGCD(w, l.A, a, b)
	g, h = l.ints(a), l.ints(b)
	s, t := l.ints(u), l.ints(v)
	for m := new(big.Int).Set(l.p); m.Cmp(pk) < 0; {
		m.Mul(m, m)
		// f = g h modulo m, and then s g + t h = 1.
		e := reduce(sub(reduce(f, m), mul(w, g, h)), m)
		q, r := divMonic(w, mul(w, s, e), h, m)
		g = reduce(add(g, add(mul(w, t, e), mul(w, q, g))), m)
		h = reduce(add(h, r), m)
		if m.Cmp(pk) >= 0 {
			break
		}
		d := reduce(sub(add(mul(w, s, g), mul(w, t, h)), []*big.Int{one}), m)
		c, r2 := divMonic(w, mul(w, s, d), h, m)
		s = reduce(sub(s, r2), m)
		t = reduce(sub(sub(t, mul(w, t, d)), mul(w, c, g)), m)
	}
	return g, h
}

func (l *local) ints(f *poly.Poly) []*big.Int {
	c := make([]*big.Int, f.N)
	for i := range c {
		c[i] = l.A.Code(poly.Coeff(l.A, f, i))
	}
	return c
}

func add(a, b []*big.Int) []*big.Int { return Poly{a, nil}.Add(Poly{b, nil}).c }
func sub(a, b []*big.Int) []*big.Int { return Poly{a, nil}.Sub(Poly{b, nil}).c }

// divMonic divides by a monic g modulo m.
func divMonic(w *algebra.Work, f, g []*big.Int, m *big.Int) (q, r []*big.Int) {
	f = reduce(f, m)
	if len(f) < len(g) {
		return nil, f
	}
	q, r, _ = divInts(w, f, g)
	return reduce(q, m), reduce(r, m)
}

// IsIrreducible says whether f is irreducible over Q, with a reason. Constants
// are not.
func (f Poly) IsIrreducible(w *algebra.Work) algebra.Verdict {
	if f.Degree() < 1 {
		return algebra.Because(false, "a constant is not irreducible over Q")
	}
	c := primitive(f.c)
	if len(c) == 2 {
		return algebra.Because(true, "its degree is 1")
	}
	if v, ok := byEisenstein(w, c); ok {
		return v
	}
	if n := cyclotomicIndex(w, c); n > 0 {
		v := algebra.Because(true, "it is the cyclotomic polynomial of index %d", n)
		v.Evidence.Source = "R. Dedekind, Beweis für die Irreductibilität der Kreistheilungs-Gleichungen, 1857"
		v.Evidence = v.Evidence.With("index", n)
		return v
	}
	if _, list := f.Factor(w); len(list) > 1 || list[0].E > 1 {
		v := algebra.Because(false, "it has a factor of degree %d", list[0].F.Degree())
		v.Evidence = v.Evidence.With("factor", list[0].F)
		return v
	}
	l := bestPrime(w, c)
	switch {
	case len(l.factors) == 1:
		v := algebra.Because(true, "it is irreducible modulo %v", l.p)
		v.Evidence = v.Evidence.With("prime", l.p)
		return v
	case l.onlyWhole(len(c) - 1):
		v := algebra.Because(true, "the degrees of its factors modulo several primes leave no degree for a proper factor")
		v.Evidence = v.Evidence.With("primes", l.primes)
		v.Evidence.Source = "D. Musser, On the efficiency of a polynomial irreducibility test, 1978"
		return v
	}
	v := algebra.Because(true, "no product of its %d factors modulo %v, lifted to a high power, divides it", len(l.factors), l.p)
	v.Evidence = v.Evidence.With("prime", l.p)
	v.Evidence.Source = "H. Zassenhaus, On Hensel factorization I, 1969"
	return v
}

// mostShifted is the degree up to which Eisenstein's criterion is also tried
// for f(x+a), small a.
const mostShifted = 200

// byEisenstein says that f is irreducible when Eisenstein's criterion holds for
// f(x) or for f(x+a) with a small a.
func byEisenstein(w *algebra.Work, c []*big.Int) (algebra.Verdict, bool) {
	for _, a := range []int64{0, 1, -1, 2, -2} {
		if a != 0 && len(c) > mostShifted {
			break
		}
		shifted := c
		if a != 0 {
			shifted = Poly{c, nil}.Compose(w, FromInts(a, 1)).c
		}
		p := eisenstein(w, shifted)
		if p == nil {
			continue
		}
		v := algebra.Because(true, "Eisenstein's criterion holds at %v", p)
		if a != 0 {
			where := fmt.Sprintf("f(x%+d)", a)
			v = algebra.Because(true, "Eisenstein's criterion holds at %v for %s", p, where)
			v.Evidence = v.Evidence.With(where, Poly{shifted, nil})
		}
		v.Evidence.Source = "G. Eisenstein, Über die Irreductibilität, 1850"
		v.Evidence = v.Evidence.With("prime", p)
		return v, true
	}
	return algebra.Verdict{}, false
}

// eisenstein is a prime at which Eisenstein's criterion holds, or nil. Only
// small primes are looked at.
func eisenstein(w *algebra.Work, c []*big.Int) *big.Int {
	n := len(c) - 1
	g := content(c[:n])
	t := new(big.Int)
	for _, q := range integer.PrimesUpTo(1000) {
		w.Poll()
		p := big.NewInt(int64(q))
		if g.Sign() == 0 || t.Mod(g, p).Sign() != 0 || t.Mod(c[n], p).Sign() == 0 {
			continue
		}
		if square := new(big.Int).Mul(p, p); t.Mod(c[0], square).Sign() != 0 {
			return p
		}
	}
	return nil
}
