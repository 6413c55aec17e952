package field

import (
	"fmt"
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/integer"
)

// References:
//
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997, theorem 2.8:
//	  the multiplicative group is cyclic.

// Units is the factorization of |K| - 1, the order of the multiplicative
// group. It may have a cofactor that could not be split.
func (K *Field) Units(w *algebra.Work) integer.Factorization {
	return integer.FactorPower(w, K.p, K.absolute)
}

// Order is the least n >= 1 with a^n = 1. It is an error of kind Undefined for
// 0, and of kind Unable when it depends on prime factors that are not known.
func (a Elem) Order(w *algebra.Work) (n *big.Int, e algebra.Evidence, err error) {
	defer algebra.Catch(&err)
	if a.IsZero() {
		return nil, e, algebra.Errorf(algebra.Undefined, "0 has no multiplicative order")
	}
	// The order divides p^d - 1 for the degree d of a.
	d := a.degreeOver(w, 1)
	f := integer.FactorPower(w, a.k.p, d)
	n = new(big.Int).Exp(a.k.p, big.NewInt(int64(d)), nil)
	n.Sub(n, big.NewInt(1))
	if f.Cofactor != nil {
		rest := new(big.Int).Div(n, f.Cofactor)
		if !a.power(w, rest).IsOne() {
			return nil, e, algebra.Errorf(algebra.Unable, "the order of the element needs the prime factors of %s, a composite factor of %s - 1 that was not split", f.Cofactor, orderText(a.k.p, d))
		}
		n = rest
	}
	whole := new(big.Int).Set(n)
	for _, q := range f.Primes {
		for {
			w.Poll()
			t, r := new(big.Int).QuoRem(n, q.P, new(big.Int))
			if r.Sign() != 0 || !a.power(w, t).IsOne() {
				break
			}
			n = t
		}
	}
	e = algebra.Evidence{
		Standing: algebra.Weakest(f.Standing, a.k.standing.Standing),
		Reason:   fmt.Sprintf("a^n = 1, and a^(n/r) is not 1 for any prime r that divides n; n divides %s - 1", orderText(a.k.p, d)),
		Source:   "R. Lidl and H. Niederreiter, Finite Fields, 1997, section 2.1",
	}
	e = e.With("factorization of "+orderText(a.k.p, d)+" - 1", factorText(whole, f))
	return n, e, nil
}

// IsPrimitive says whether a generates the multiplicative group. The evidence
// has the factorization of |K| - 1 and the powers a^((|K|-1)/r). It is an
// error of kind Unable when prime factors that are not known decide.
func (a Elem) IsPrimitive(w *algebra.Work) (v algebra.Verdict, err error) {
	defer algebra.Catch(&err)
	if a.IsZero() {
		return algebra.Because(false, "0 is not in the multiplicative group"), nil
	}
	f, n := a.k.Units(w), a.k.units()
	source := "R. Lidl and H. Niederreiter, Finite Fields, 1997, section 2.1"
	e := algebra.Evidence{Standing: algebra.Weakest(f.Standing, a.k.standing.Standing), Source: source}
	e = e.With("factorization of "+a.k.orderText()+" - 1", factorText(n, f))
	for _, q := range f.Primes {
		w.Poll()
		t := a.power(w, new(big.Int).Div(n, q.P))
		e = e.With(fmt.Sprintf("a^((%s - 1)/%s)", a.k.orderText(), q.P), t)
		if t.IsOne() {
			v = algebra.Because(false, "the power by (%s - 1)/%s is 1", a.k.orderText(), q.P)
			v.Evidence.Witness, v.Evidence.Source = e.Witness[len(e.Witness)-1:], source
			return v, nil
		}
	}
	if f.Cofactor != nil {
		return v, algebra.Errorf(algebra.Unable, "whether the element is primitive needs the prime factors of %s, a composite factor of %s - 1 that was not split", f.Cofactor, a.k.orderText())
	}
	e.Reason = fmt.Sprintf("the power by (%s - 1)/r is not 1 for any prime r that divides %s - 1", a.k.orderText(), a.k.orderText())
	return algebra.Verdict{Holds: true, Evidence: e}, nil
}

func factorText(n *big.Int, f integer.Factorization) string {
	s := ""
	for _, q := range f.Primes {
		if s != "" {
			s += " * "
		}
		s += q.P.String()
		if q.E > 1 {
			s += fmt.Sprintf("^%d", q.E)
		}
	}
	if f.Cofactor != nil {
		s += fmt.Sprintf(" * (%s, composite)", f.Cofactor)
	}
	if s == "" {
		return n.String()
	}
	return s
}
