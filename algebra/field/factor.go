package field

import (
	"fmt"
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
)

// References:
//
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997, chapter 3.

// Factor is a monic polynomial with its multiplicity.
type Factor struct {
	F Polynomial
	E int
}

// Root is a root with its multiplicity.
type Root struct {
	A Elem
	E int
}

// Factor is the factorization of f, not 0: the leading coefficient, and the
// monic irreducible factors in canonical order (ComparePolynomials).
func (f Polynomial) Factor(w *algebra.Work) (lead Elem, list []Factor) {
	c, factors := poly.Factorize(w, f.k.arith, f.f)
	return Elem{f.k, c}, f.wrap(factors)
}

// Squarefree lists pairwise coprime squarefree monic polynomials, one for each
// multiplicity of a factor of f, not 0, by increasing multiplicity.
func (f Polynomial) Squarefree(w *algebra.Work) []Factor {
	return f.wrap(poly.Squarefree(w, f.k.arith, f.f))
}

func (f Polynomial) wrap(factors []poly.Factor) []Factor {
	list := make([]Factor, len(factors))
	for i, g := range factors {
		list[i] = Factor{Polynomial{f.k, g.F}, g.E}
	}
	return list
}

// Roots lists the roots of f, not 0, in its field, by increasing code.
func (f Polynomial) Roots(w *algebra.Work) []Root {
	var list []Root
	for _, r := range poly.Roots(w, f.k.arith, f.f) {
		list = append(list, Root{Elem{f.k, r.A}, r.E})
	}
	return list
}

// RootsIn lists the roots of f, not 0, in L, along the fixed embedding.
func (f Polynomial) RootsIn(w *algebra.Work, L *Field) (list []Root, err error) {
	defer algebra.Catch(&err)
	g, err := f.In(w, L)
	if err != nil {
		return nil, err
	}
	return g.Roots(w), nil
}

// IsIrreducible says whether f is irreducible over its field: not constant and
// not a product of polynomials of lower degree.
func (f Polynomial) IsIrreducible(w *algebra.Work) algebra.Verdict {
	n := f.Degree()
	if n < 1 {
		return algebra.Because(false, "a constant is not irreducible")
	}
	t := poly.IsIrreducible(w, f.k.arith, f.f)
	if !t.Holds {
		g := Polynomial{f.k, t.Factor}
		v := algebra.Because(false, "%s divides it", g)
		v.Evidence = v.Evidence.With("factor", g).With("multiplicity", t.Multiplicity)
		return v
	}
	if n == 1 {
		return algebra.Because(true, "it has degree 1")
	}
	q := f.k.orderText()
	v := algebra.Because(true, "it divides x^(q^%d) - x and has no common factor with x^(q^(%d/r)) - x for any prime r that divides %d, where q = %s", n, n, n, q)
	v.Evidence = v.Evidence.With("primes r", t.Primes)
	v.Evidence.Source = "M. Rabin, Probabilistic algorithms in finite fields, 1980"
	return v
}

// IsSquarefree says whether no square of a polynomial of positive degree
// divides f.
func (f Polynomial) IsSquarefree(w *algebra.Work) algebra.Verdict {
	if f.IsZero() {
		return algebra.Because(false, "0 is divisible by every square")
	}
	d := f.GCD(w, f.Derivative())
	if d.Degree() == 0 {
		v := algebra.Because(true, "it has no common factor with its derivative")
		v.Evidence.Source = "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 1.68"
		return v
	}
	for _, g := range f.Squarefree(w) {
		if g.E > 1 {
			v := algebra.Because(false, "%s divides it %d times", g.F, g.E)
			v.Evidence = v.Evidence.With("factor", g.F).With("multiplicity", g.E)
			return v
		}
	}
	return algebra.Because(true, "no factor has a multiplicity")
}

// IsPrimitive says whether f is the minimal polynomial over its field K of a
// generator of the multiplicative group of an extension of degree deg f: monic,
// irreducible, with x of order |K|^n - 1 modulo f. It is an error of kind
// Unable when that depends on prime factors of |K|^n - 1 that are not known.
func (f Polynomial) IsPrimitive(w *algebra.Work) (v algebra.Verdict, err error) {
	defer algebra.Catch(&err)
	if f.Degree() >= 1 && !f.Leading().IsOne() {
		return algebra.Because(false, "it is not monic"), nil
	}
	if v := f.IsIrreducible(w); !v.Holds {
		v.Evidence.Reason = "it is not irreducible: " + v.Evidence.Reason
		return v, nil
	}
	if f.Coefficient(0).IsZero() {
		return algebra.Because(false, "x divides it"), nil
	}
	n, A := f.Degree(), f.k.arith
	u := new(big.Int).Exp(f.k.Order(), big.NewInt(int64(n)), nil)
	u.Sub(u, big.NewInt(1))
	fac := integer.FactorPower(w, f.k.p, f.k.absolute*n)
	size := orderText(f.k.p, f.k.absolute*n)
	source := "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 3.16"
	e := algebra.Evidence{Standing: algebra.Weakest(fac.Standing, f.k.standing.Standing), Source: source}
	e = e.With("factorization of "+size+" - 1", factorText(u, fac))
	for _, q := range fac.Primes {
		w.Poll()
		t := poly.PowMod(w, A, poly.X(A), new(big.Int).Div(u, q.P), f.f)
		if poly.IsOne(A, t) {
			v = algebra.Because(false, "x^((%s - 1)/%s) = 1 modulo it", size, q.P)
			v.Evidence.Source = source
			return v, nil
		}
		e = e.With(fmt.Sprintf("x^((%s - 1)/%s) mod f", size, q.P), Polynomial{f.k, t})
	}
	if fac.Cofactor != nil {
		return v, algebra.Errorf(algebra.Unable, "whether the polynomial is primitive needs the prime factors of %s, a composite factor of %s - 1 that was not split", fac.Cofactor, size)
	}
	e.Reason = fmt.Sprintf("it is irreducible, and x^((%s - 1)/r) is not 1 modulo it for any prime r that divides %s - 1", size, size)
	return algebra.Verdict{Holds: true, Evidence: e}, nil
}

// Order is the least n >= 1 for which f divides x^n - 1; a power of x that
// divides f is left out first [LN, definition 3.2]. It is an error of kind
// Undefined for 0, and of kind Unable when prime factors are not known.
func (f Polynomial) Order(w *algebra.Work) (n *big.Int, err error) {
	defer algebra.Catch(&err)
	if f.IsZero() {
		return nil, algebra.Errorf(algebra.Undefined, "the polynomial 0 has no order")
	}
	A, g, k := f.k.arith, new(poly.Poly), 0
	for f.Coefficient(k).IsZero() {
		k++
	}
	A.Slice(g, f.f, k, f.f.N)
	n, exact := poly.Order(w, A, g, func(d int) (list []*big.Int, all bool) {
		fac := integer.FactorPower(w, f.k.p, f.k.absolute*d)
		for _, q := range fac.Primes {
			list = append(list, q.P)
		}
		return list, fac.Cofactor == nil
	})
	if !exact {
		return nil, algebra.Errorf(algebra.Unable, "the order divides %s, and which divisor it is depends on a composite factor that was not split", n)
	}
	return n, nil
}

// SplittingDegree is the degree over the field of f, not 0, of the least
// extension in which f is a product of linear factors: the least common
// multiple of the degrees of its irreducible factors.
func (f Polynomial) SplittingDegree(w *algebra.Work) int {
	n := 1
	for _, s := range f.Squarefree(w) {
		for _, g := range poly.DistinctDegree(w, f.k.arith, s.F.f) {
			n = lcm(n, g.E)
		}
	}
	return n
}

// SplittingField is the standard field of the least degree over which f, not
// 0, is a product of linear factors, and f there.
func (f Polynomial) SplittingField(w *algebra.Work) (L *Field, g Polynomial, err error) {
	defer algebra.Catch(&err)
	if L, err = Standard(w, f.k.p, f.k.absolute*f.SplittingDegree(w)); err != nil {
		return nil, Polynomial{}, err
	}
	g, err = f.In(w, L)
	return L, g, err
}
