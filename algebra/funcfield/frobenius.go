package funcfield

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/integer"
)

// References:
//
//	[Lang] S. Lang, Algebra, 3rd edition 2002, V section 6 and VIII section 4:
//	  perfect fields and p-th roots in function fields.

// Derivative is du/dt.
func (u Fraction) Derivative(w *algebra.Work) Fraction {
	n := u.n.Derivative().Mul(w, u.d).Sub(u.n.Mul(w, u.d.Derivative()))
	return reduced(w, n, u.d.Mul(w, u.d))
}

// Frobenius is u^(p^k), k >= 0.
func (u Fraction) Frobenius(w *algebra.Work, k int) (Fraction, error) {
	p := u.Constants().Characteristic()
	return u.Pow(w, new(big.Int).Exp(p, big.NewInt(int64(k)), nil))
}

// IsPthPower says whether u = v^p for some v. The derivative decides: u lies
// in F_q(t^p), which is the field of p-th powers because F_q is perfect,
// exactly when du/dt = 0.
func (u Fraction) IsPthPower(w *algebra.Work) algebra.Verdict {
	d := u.Derivative(w)
	if d.IsZero() {
		v := algebra.Because(true, "its derivative is zero, and the constants are perfect, so it is a p-th power")
		v.Evidence.Source = "S. Lang, Algebra, 3rd edition 2002, chapter V, section 6"
		return v
	}
	v := algebra.Because(false, "the derivative of a p-th power is zero, and the derivative here is not")
	v.Evidence = v.Evidence.With("derivative", d)
	return v
}

// PthRoot is the v with v^p = u: there is at most one, since x -> x^p is
// one-to-one. It is an error of kind Undefined, saying why, when there is none.
func (u Fraction) PthRoot(w *algebra.Work) (Fraction, error) {
	p := u.Constants().Characteristic()
	if !u.IsPthPower(w).Holds {
		return Fraction{}, algebra.Errorf(algebra.Undefined,
			"there is no p-th root for p = %v: a p-th power has derivative 0, and the derivative here is not 0", p).
			WithRemedy("adjoin the root: an inseparable extension of degree %v", p)
	}
	return Fraction{pthRoot(w, u.n, p), pthRoot(w, u.d, p)}, nil
}

// pthRoot is the p-th root of a polynomial in t^p.
func pthRoot(w *algebra.Work, f field.Polynomial, p *big.Int) field.Polynomial {
	if f.Degree() <= 0 {
		p = big.NewInt(1) // constants only: whatever p is
	}
	k := int(p.Int64())
	var c []field.Elem
	for i := 0; i <= f.Degree(); i += k {
		c = append(c, f.Coefficient(i).Frobenius(w, -1))
	}
	return field.NewPolynomial(f.Field(), c)
}

// FrobeniusIsOnto says whether every element of K(t) is a p-th power, for the
// field K of constants: never, for t is not.
func FrobeniusIsOnto(K *field.Field) algebra.Verdict {
	v := algebra.Because(false,
		"x -> x^p is one-to-one but not onto: t is no p-th power, for its derivative is 1 and that of a p-th power is 0")
	v.Evidence = v.Evidence.With("not a p-th power", "t")
	v.Evidence.Source = "S. Lang, Algebra, 3rd edition 2002, chapter V, section 6"
	return v
}

// IsPerfect says whether every element of K(t) is a p-th power, which is what
// perfect means in characteristic p: no, unlike the finite field K.
func IsPerfect(K *field.Field) algebra.Verdict { return FrobeniusIsOnto(K) }

// IsSquare says whether u = v^2 for some v: in lowest terms, when every
// irreducible factor of numerator and denominator has even multiplicity and the
// leading coefficient is a square in F_q. In characteristic 2 this is the test
// for p-th powers.
func (u Fraction) IsSquare(w *algebra.Work) algebra.Verdict {
	if u.IsZero() {
		return algebra.Because(true, "0 = 0^2")
	}
	if u.Constants().Characteristic().Cmp(big.NewInt(2)) == 0 {
		return u.IsPthPower(w)
	}
	for _, f := range []field.Polynomial{u.n, u.d} {
		_, list := f.Factor(w)
		for _, g := range list {
			if g.E%2 == 1 {
				v := algebra.Because(false, "an irreducible factor has odd multiplicity %d", g.E)
				v.Evidence = v.Evidence.With("factor", g.F)
				return v
			}
		}
	}
	if lead := u.n.Leading(); !lead.IsSquare(w).Holds {
		v := algebra.Because(false, "the leading coefficient is not a square in the constants")
		v.Evidence = v.Evidence.With("leading coefficient", lead)
		return v
	}
	return algebra.Because(true, "all multiplicities are even, and the leading coefficient is a square")
}

// FixedDegree is the degree over F_p of the field of the u in K(t) with
// u^(p^k) = u, k >= 1. A non-constant u is not fixed, since its degree is
// multiplied by p^k; so this is the fixed field in K, of degree gcd(k, n).
func FixedDegree(K *field.Field, k int) int {
	n := K.AbsoluteDegree()
	for k%n != 0 {
		n, k = k%n, n
	}
	return n
}

// FiniteSubfields is the list of the degrees over F_p of the finite subfields
// of K(t), in increasing order: they are the subfields of K, each the fixed
// field of a power of Frobenius.
func FiniteSubfields(K *field.Field) []int { return integer.DivisorsInt(K.AbsoluteDegree()) }
