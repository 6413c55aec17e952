package field

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// References:
//
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997, section 2.1.

// MaxRoots bounds the number of n-th roots that are computed at a time.
const MaxRoots = 1 << 12

// IsPower says whether a is an n-th power in its field, n >= 1: whether
// a^((|K|-1)/d) = 1 for d = gcd(n, |K|-1), or a = 0.
func (a Elem) IsPower(w *algebra.Work, n *big.Int) (v algebra.Verdict, err error) {
	defer algebra.Catch(&err)
	if n.Sign() <= 0 {
		return v, algebra.Errorf(algebra.Invalid, "the exponent of a root is positive, not %s", n)
	}
	return a.isPower(w, n), nil
}

func (a Elem) isPower(w *algebra.Work, n *big.Int) (v algebra.Verdict) {
	if a.IsZero() {
		return algebra.Because(true, "0 = 0^%s", n)
	}
	u := a.k.units()
	d := new(big.Int).GCD(nil, nil, n, u)
	if d.Cmp(big.NewInt(1)) == 0 {
		v = algebra.Because(true, "x -> x^%s is one-to-one, since %s and %s - 1 have no common factor", n, n, a.k.orderText())
	} else {
		t := a.power(w, u.Div(u, d))
		if t.IsOne() {
			v = algebra.Because(true, "the power by (%s - 1)/%s is 1", a.k.orderText(), d)
		} else {
			v = algebra.Because(false, "the power by (%s - 1)/%s is %s, not 1", a.k.orderText(), d, t)
		}
	}
	v.Evidence.Source = "L. Euler's criterion; R. Lidl and H. Niederreiter, Finite Fields, 1997, section 2.1"
	return v
}

// IsSquare says whether a is a square in its field.
func (a Elem) IsSquare(w *algebra.Work) algebra.Verdict { return a.isPower(w, big.NewInt(2)) }

// Sqrt is the square root of a with the least code; ok is false when a is not
// a square.
func (a Elem) Sqrt(w *algebra.Work) (r Elem, ok bool, err error) {
	return a.Root(w, big.NewInt(2))
}

// Root is the n-th root of a with the least code, n >= 1; ok is false when
// there is none. It is an error of kind TooLarge when a has more than MaxRoots
// of them.
func (a Elem) Root(w *algebra.Work, n *big.Int) (r Elem, ok bool, err error) {
	list, err := a.Roots(w, n)
	if err != nil || len(list) == 0 {
		return Elem{}, false, err
	}
	return list[0], true, nil
}

// Roots lists the n-th roots of a in its field by increasing code, n >= 1:
// none or gcd(n, |K|-1) of them, one for a = 0. More than MaxRoots of them are
// an error of kind TooLarge.
//
// With d = gcd(n, |K|-1) and n = d m, raising to the power m is one-to-one on
// the d-th powers, since m is prime to their number. So the roots are those of
// x^d - b for the d-th power b with b^m = a.
func (a Elem) Roots(w *algebra.Work, n *big.Int) (list []Elem, err error) {
	defer algebra.Catch(&err)
	v, err := a.IsPower(w, n)
	switch {
	case err != nil:
		return nil, err
	case a.IsZero():
		return []Elem{a}, nil
	case !v.Holds:
		return nil, nil
	}
	u := a.k.units()
	d := new(big.Int).GCD(nil, nil, n, u)
	if d.Cmp(big.NewInt(MaxRoots)) > 0 {
		return nil, algebra.Errorf(algebra.TooLarge, "there are %s roots of degree %s, more than the limit of %d", d, n, MaxRoots)
	}
	powers := new(big.Int).Div(u, d)
	m := new(big.Int).Div(n, d)
	b := a
	if powers.Cmp(big.NewInt(1)) > 0 {
		b = a.power(w, m.ModInverse(m, powers))
	}
	A := a.k.arith
	f := poly.Monomial(A, A.One(), int(d.Int64()))
	A.Sub(f, f, poly.Constant(A, b.w))
	for _, r := range poly.Roots(w, A, f) {
		list = append(list, Elem{a.k, r.A})
	}
	return list, nil
}
