package field

import (
	"iter"
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
)

// References:
//
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997, theorems
//	  3.25 and 3.5: the numbers of irreducible and of primitive polynomials.

// IrreduciblePolynomials yields the monic irreducible polynomials of degree n
// over K, n >= 1, in canonical order (ComparePolynomials).
func IrreduciblePolynomials(w *algebra.Work, K *Field, n int) iter.Seq[Polynomial] {
	return func(yield func(Polynomial) bool) {
		for f := range monic(w, K, n) {
			if poly.Irreducible(w, K.arith, f.f) && !yield(f) {
				return
			}
		}
	}
}

// PrimitivePolynomials yields the primitive polynomials of degree n over K,
// n >= 1, in canonical order. It is an error of kind Unable when |K|^n - 1
// could not be factored.
func PrimitivePolynomials(w *algebra.Work, K *Field, n int) (iter.Seq[Polynomial], error) {
	if f := integer.FactorPower(w, K.p, K.absolute*n); f.Cofactor != nil {
		return nil, errCofactor(f, K, n)
	}
	return func(yield func(Polynomial) bool) {
		for f := range monic(w, K, n) {
			if !poly.Irreducible(w, K.arith, f.f) {
				continue
			}
			if v, err := f.IsPrimitive(w); err == nil && v.Holds && !yield(f) {
				return
			}
		}
	}, nil
}

// monic yields all monic polynomials of degree n in canonical order: that of
// their codes.
func monic(w *algebra.Work, K *Field, n int) iter.Seq[Polynomial] {
	return func(yield func(Polynomial) bool) {
		code := new(big.Int).Exp(K.Order(), big.NewInt(int64(n)), nil)
		one, end := big.NewInt(1), new(big.Int).Lsh(code, 1)
		for ; code.Cmp(end) < 0; code.Add(code, one) {
			w.Poll()
			if !yield(FromCode(K, code)) {
				return
			}
		}
	}
}

// CountIrreducible is the number of monic irreducible polynomials of degree n
// over a field of q elements, n >= 1: (1/n) sum mu(d) q^(n/d) over d | n
// [LN].
func CountIrreducible(q *big.Int, n int) *big.Int {
	z := new(big.Int)
	for _, d := range integer.DivisorsInt(n) {
		t := new(big.Int).Exp(q, big.NewInt(int64(n/d)), nil)
		z.Add(z, t.Mul(t, big.NewInt(int64(integer.Mobius(d)))))
	}
	return z.Div(z, big.NewInt(int64(n)))
}

// CountPrimitive is the number of primitive polynomials of degree n over K,
// n >= 1: phi(|K|^n - 1)/n [LN]. It is an error of kind Unable when |K|^n - 1
// could not be factored.
func CountPrimitive(w *algebra.Work, K *Field, n int) (count *big.Int, err error) {
	defer algebra.Catch(&err)
	f := integer.FactorPower(w, K.p, K.absolute*n)
	if f.Cofactor != nil {
		return nil, errCofactor(f, K, n)
	}
	z := integer.EulerPhi(f)
	return z.Div(z, big.NewInt(int64(n))), nil
}

func errCofactor(f integer.Factorization, K *Field, n int) error {
	return algebra.Errorf(algebra.Unable, "primitive polynomials of degree %d need the prime factors of %s - 1, of which the composite factor %s was not split", n, orderText(K.p, K.absolute*n), f.Cofactor)
}
