package field

import (
	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// References:
//
//	[LN] R. Lidl, H. Niederreiter, Finite Fields, 2nd edition 1997, sections
//	  2.2 and 2.3: conjugates, traces, norms, bases.
//	[S] V. Shoup, Fast construction of irreducible polynomials over finite
//	  fields, 1994: minimal polynomials from a projection of the powers.

// What is asked over a subfield K follows the fixed embedding of K into the
// field of the element, and answers with elements of K. Without an embedding
// the error is that of Embed.

// Conjugates lists the distinct conjugates of a over K: a^(|K|^i) for
// i = 0, 1, ..., as many as the degree of a over K.
func (a Elem) Conjugates(w *algebra.Work, K *Field) (list []Elem, err error) {
	defer algebra.Catch(&err)
	if err := below(K, a.k); err != nil {
		return nil, err
	}
	return a.conjugates(w, K.absolute), nil
}

func (a Elem) conjugates(w *algebra.Work, d int) []Elem {
	list := []Elem{a}
	for b := a.Frobenius(w, d); !poly.EqualElem(a.w, b.w); b = b.Frobenius(w, d) {
		w.Poll()
		list = append(list, b)
	}
	return list
}

// fold is a op a^(p^d) op ..., with one term for each automorphism over the
// field with p^d elements.
func (a Elem) fold(w *algebra.Work, d int, op func(x, y Elem) Elem) Elem {
	z, b := a, a
	for range a.k.absolute/d - 1 {
		w.Poll()
		b = b.Frobenius(w, d)
		z = op(z, b)
	}
	return z
}

// Trace is the sum of the conjugates of a over K, each as often as there are
// automorphisms that give it: an element of K.
func (a Elem) Trace(w *algebra.Work, K *Field) (Elem, error) {
	return a.folded(w, K, Elem.Add)
}

// Norm is the product of the conjugates of a over K, each as often as there
// are automorphisms that give it: an element of K.
func (a Elem) Norm(w *algebra.Work, K *Field) (Elem, error) {
	return a.folded(w, K, func(x, y Elem) Elem { return x.Mul(w, y) })
}

func (a Elem) folded(w *algebra.Work, K *Field, op func(x, y Elem) Elem) (z Elem, err error) {
	defer algebra.Catch(&err)
	m, err := Embed(w, K, a.k)
	if err != nil {
		return Elem{}, err
	}
	z, ok := m.Preimage(w, a.fold(w, K.absolute, op))
	if !ok {
		return Elem{}, errSubfield
	}
	return z, nil
}

// errSubfield cannot happen unless a modulus is reducible after all.
var errSubfield = algebra.Errorf(algebra.Invalid, "the structure is not a field: a conjugate sum is not fixed by Frobenius")

// absoluteTrace is the trace of a to F_p.
func (a Elem) absoluteTrace(w *algebra.Work) Elem {
	z, _ := lower(a.fold(w, 1, Elem.Add), a.k.prime)
	return z
}

// MinimalPolynomial is the monic polynomial over K of least degree with the
// root a.
func (a Elem) MinimalPolynomial(w *algebra.Work, K *Field) (f Polynomial, err error) {
	defer algebra.Catch(&err)
	m, err := Embed(w, K, a.k)
	if err != nil {
		return Polynomial{}, err
	}
	if K.IsPrime() {
		return a.minimalOverPrime(w), nil
	}
	// The product of x - b over the conjugates b.
	A, product := a.k.arith, poly.One(a.k.arith)
	t, c := new(poly.Poly), make(poly.Elem, A.Width())
	for _, b := range a.conjugates(w, K.absolute) {
		w.Poll()
		A.NegElem(c, b.w)
		A.Scale(w, t, product, c)
		A.Shift(product, product, 1)
		A.Add(product, product, t)
	}
	coefficients := make([]Elem, product.N)
	for i := range coefficients {
		var ok bool
		if coefficients[i], ok = m.Preimage(w, Elem{a.k, poly.Coeff(A, product, i)}); !ok {
			return Polynomial{}, errSubfield
		}
	}
	return NewPolynomial(K, coefficients), nil
}

// minimalOverPrime is the minimal polynomial over F_p: that of the sequence of
// the first coordinates of 1, a, a^2, ..., which is not zero since 1 is not
// [S].
func (a Elem) minimalOverPrime(w *algebra.Work) Polynomial {
	F := a.k.prime
	s := make([]poly.Elem, 2*a.k.absolute)
	b := Elem{a.k, append(poly.Elem(nil), a.k.arith.One()...)}
	for i := range s {
		w.Poll()
		s[i] = b.constant()
		a.k.arith.MulElem(w, b.w, b.w, a.w)
	}
	return Polynomial{F, poly.BerlekampMassey(w, F.arith, s)}
}

// constant is the first coordinate of a over F_p.
func (a Elem) constant() poly.Elem {
	for ; a.k.base != nil; a = (Elem{a.k.base, poly.Coeff(a.k.base.arith, a.k.ext.ToPoly(a.w), 0)}) {
	}
	return append(poly.Elem(nil), a.w...)
}

// CharacteristicPolynomial is that of the multiplication by a, as a map of the
// vector space over K: a power of the minimal polynomial, of degree the degree
// of the field over K.
func (a Elem) CharacteristicPolynomial(w *algebra.Work, K *Field) (Polynomial, error) {
	f, err := a.MinimalPolynomial(w, K)
	if err != nil {
		return Polynomial{}, err
	}
	return f.Pow(w, a.k.absolute/K.absolute/f.Degree()), nil
}

// InSubfield is a as an element of K, if it lies there: a and K meet as Common
// says, and K need not be below the field of a. In another characteristic it
// does not. Where Common fails for another reason, such as an interrupt, it
// unwinds: that is no answer.
func (a Elem) InSubfield(w *algebra.Work, K *Field) (x Elem, ok bool) {
	if a.k.p.Cmp(K.p) != 0 {
		return Elem{}, false
	}
	_, f, g, err := Common(w, a.k, K)
	if err != nil {
		algebra.Fail(asError(err))
	}
	return g.Preimage(w, f.Apply(w, a))
}

// asError is err as what algebra.Fail takes.
func asError(err error) *algebra.Error {
	if e, ok := err.(*algebra.Error); ok {
		return e
	}
	return algebra.Errorf(algebra.Invalid, "%s", err)
}

// Degree is the degree of a over the subfield K.
func (a Elem) Degree(w *algebra.Work, K *Field) (n int, err error) {
	defer algebra.Catch(&err)
	if err := below(K, a.k); err != nil {
		return 0, err
	}
	return a.degreeOver(w, K.absolute), nil
}

// IsNormal says whether a generates a normal basis over K: whether its
// conjugates a^(|K|^i), i < n, are linearly independent over K. By Hensel's
// criterion [LN, theorem 2.39] they are unless x^n - 1 and
// sum a^(|K|^i) x^(n-1-i) have a common factor.
func (a Elem) IsNormal(w *algebra.Work, K *Field) (v algebra.Verdict, err error) {
	defer algebra.Catch(&err)
	if err := below(K, a.k); err != nil {
		return algebra.Verdict{}, err
	}
	n := a.k.absolute / K.absolute
	c, x := make([]Elem, n), make([]Elem, n+1)
	for i, b := 0, a; i < n; i, b = i+1, b.Frobenius(w, K.absolute) {
		w.Poll()
		c[n-1-i], x[i] = b, a.k.Zero()
	}
	x[0], x[n] = a.k.One().Neg(), a.k.One()
	d := NewPolynomial(a.k, c).GCD(w, NewPolynomial(a.k, x))
	if v.Holds = d.Degree() == 0; v.Holds {
		v = algebra.Because(true, "the polynomial of its conjugates has no common factor with x^%d - 1", n)
	} else {
		v = algebra.Because(false, "the polynomial of its conjugates and x^%d - 1 have a common factor, so the conjugates are linearly dependent", n)
	}
	v.Evidence = v.Evidence.With("greatest common divisor", d)
	v.Evidence.Source = "K. Hensel, 1888; R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.39"
	return v, nil
}
