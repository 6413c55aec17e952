package poly

import (
	"math/big"

	"adjoin/algebra"
)

// IsPrimitive says whether f, of degree n >= 1, is primitive over K: the
// minimal polynomial of a generator of the multiplicative group of the field
// with q^n elements, times a constant. That is so exactly when f is irreducible
// and x has order q^n - 1 modulo f (R. Lidl, H. Niederreiter, Finite Fields, 2nd
// edition 1997, theorem 3.16).
//
// A no shows a smaller exponent e with x^e = 1 mod f, or that f is reducible. A
// yes without all primes of q^n - 1 is no proof: its standing is Probable.
func IsPrimitive(w *algebra.Work, A Arith, f *Poly, primes Primes) algebra.Verdict {
	n := f.Degree()
	if n < 1 {
		return algebra.Because(false, "a constant has no roots")
	}
	if IsZeroElem(Coeff(A, f, 0)) {
		return algebra.Because(false, "0 is a root")
	}
	if test := IsIrreducible(w, A, f); !test.Holds {
		v := algebra.Because(false, "it is reducible")
		v.Evidence = v.Evidence.With("factor", test.Factor)
		return v
	}
	M := A.NewModulus(w, f)
	x := new(Poly)
	M.Reduce(w, x, X(A))
	all := new(big.Int).Exp(A.Order(), big.NewInt(int64(n)), nil)
	all.Sub(all, big.NewInt(1))
	list, complete := primes(n)
	for _, p := range list {
		e := new(big.Int).Quo(all, p)
		if IsOne(A, powModulus(w, A, M, x, e)) {
			v := algebra.Because(false, "x has a smaller order than q^n - 1")
			v.Evidence = v.Evidence.With("e with x^e = 1", e)
			return v
		}
	}
	v := algebra.Because(true, "it is irreducible, and x has order q^n - 1: no power (q^n - 1)/r of x is 1, for the primes r of q^n - 1")
	if !complete {
		v.Evidence.Standing = algebra.Probable
		v.Evidence.Reason = "it is irreducible, and no known prime r of q^n - 1 has x^((q^n - 1)/r) = 1, but a part of q^n - 1 is not factored"
	}
	v.Evidence = v.Evidence.With("q^n - 1", all).With("primes", list)
	v.Evidence.Source = "R. Lidl, H. Niederreiter, Finite Fields, 1997, theorem 3.16"
	return v
}
