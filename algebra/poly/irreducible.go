package poly

import (
	"math/big"
	"math/bits"

	"adjoin/algebra"
)

// References:
//
//	[Rabin] M. Rabin, Probabilistic algorithms in finite fields, 1980.
//	[Ben-Or] M. Ben-Or, Probabilistic algorithms in finite fields, 1981.
//	[GP] S. Gao, D. Panario, Tests and constructions of irreducible polynomials
//	  over finite fields, 1997: when which test is the better one.
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997.

// Irreducibility is the outcome of a test for irreducibility, with what a
// reader needs to check it.
type Irreducibility struct {
	Holds bool
	// Factor is a proper monic factor of a reducible polynomial, of the least
	// degree there is, and Multiplicity how often it divides. Factor is nil
	// for constants.
	Factor       *Poly
	Multiplicity int
	// Primes are the prime divisors r of the degree n. For an irreducible f,
	// x^(q^n) = x mod f and gcd(x^(q^(n/r)) - x, f) = 1 for each of them.
	Primes []int
}

// IsIrreducible tests f for irreducibility over K. Both directions are
// proofs: a factor, or the conditions of [Rabin]. Degrees up to about the
// logarithm of n are tried first, as in [Ben-Or], since most reducible
// polynomials have a factor there [GP].
func IsIrreducible(w *algebra.Work, A Arith, f *Poly) Irreducibility {
	n := f.Degree()
	if n < 1 {
		return Irreducibility{}
	}
	primes := primesOf(n)
	if n == 1 {
		return Irreducibility{Holds: true}
	}
	f, _ = Monic(w, A, f)
	if irreducible(w, A, f, primes) {
		return Irreducibility{Holds: true, Primes: primes}
	}
	g, e := leastFactor(w, A, f)
	return Irreducibility{Factor: g, Multiplicity: e}
}

// Irreducible is the answer of IsIrreducible without its reasons: a search
// among many polynomials does not ask for the factors of those it passes by.
func Irreducible(w *algebra.Work, A Arith, f *Poly) bool {
	switch n := f.Degree(); {
	case n < 1:
		return false
	case n == 1:
		return true
	default:
		f, _ = Monic(w, A, f)
		return irreducible(w, A, f, primesOf(n))
	}
}

func irreducible(w *algebra.Work, A Arith, f *Poly, primes []int) bool {
	n := f.Degree()
	if IsZeroElem(Coeff(A, f, 0)) || IsZeroElem(Eval(w, A, f, A.One())) {
		return false
	}
	fr := newFrobenius(w, A, f)
	t, all, h := new(Poly), One(A), fr.x
	for i := 1; i <= min(n/2, bits.Len(uint(n))+2); i++ {
		h = fr.next(w, h)
		A.Sub(t, h, fr.x)
		fr.M.MulMod(w, all, all, t)
	}
	if GCD(w, A, f, all).N > 1 {
		return false
	}
	for _, r := range primes {
		A.Sub(t, fr.power(w, n/r), fr.x)
		if GCD(w, A, f, t).N > 1 {
			return false
		}
	}
	return Equal(fr.power(w, n), fr.x)
}

// leastFactor is the first irreducible factor of f in canonical order.
func leastFactor(w *algebra.Work, A Arith, f *Poly) (*Poly, int) {
	_, list := Factorize(w, A, f)
	return list[0].F, list[0].E
}

func primesOf(n int) []int {
	var list []int
	for r := 2; r*r <= n; r++ {
		if n%r == 0 {
			list = append(list, r)
			for n%r == 0 {
				n /= r
			}
		}
	}
	if n > 1 {
		list = append(list, n)
	}
	return list
}

// FindIrreducible is the first monic irreducible polynomial of degree n >= 1 in
// this order: coefficients with codes up to 16 before those up to 256 and so
// on; then fewest terms first; then the canonical order. Over F_2 it is the
// least of those with fewest terms.
//
// The bound on the codes is there because over a large field whole shapes, such
// as trinomials of some degree, may have no irreducible member, and nobody
// wants to try all of them.
func FindIrreducible(w *algebra.Work, A Arith, n int) *Poly {
	if n == 1 {
		return X(A)
	}
	primes := primesOf(n)
	q1 := new(big.Int).Sub(A.Order(), big.NewInt(1))
	for bound := int64(16); ; bound *= 16 {
		if q1.IsInt64() {
			bound = min(bound, q1.Int64())
		}
		for terms := 1; terms <= n && terms <= 6; terms++ {
			f := Monomial(A, A.One(), n)
			if placeTerms(w, A, f, n, terms, bound, primes) {
				return f
			}
		}
	}
}

// placeTerms gives f terms more terms below x^top, with codes up to bound and
// the last of them constant, so that it becomes irreducible.
func placeTerms(w *algebra.Work, A Arith, f *Poly, top, terms int, bound int64, primes []int) bool {
	if terms == 1 {
		if top == f.Degree() && !binomialPossible(A, top, primes) {
			return false
		}
		top = 1
	}
	e, code := make(Elem, A.Width()), new(big.Int)
	for k := terms - 1; k < top; k++ {
		for c := int64(1); c <= bound; c++ {
			w.Poll()
			A.FromCode(e, code.SetInt64(c))
			A.SetCoeff(f, k, e)
			if terms == 1 && irreducible(w, A, f, primes) || terms > 1 && placeTerms(w, A, f, k, terms-1, bound, primes) {
				return true
			}
		}
		clear(e)
		A.SetCoeff(f, k, e)
	}
	return false
}

// binomialPossible says whether some x^n - a is irreducible over K [LN,
// theorem 3.75]: every prime of n divides q-1, and 4 does if it divides n.
func binomialPossible(A Arith, n int, primes []int) bool {
	q1 := new(big.Int).Sub(A.Order(), big.NewInt(1))
	t := new(big.Int)
	for _, r := range primes {
		if t.Mod(q1, big.NewInt(int64(r))).Sign() != 0 {
			return false
		}
	}
	return n%4 != 0 || t.Mod(q1, big.NewInt(4)).Sign() == 0
}
