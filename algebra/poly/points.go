package poly

import "adjoin/algebra"

// References:
//
//	[vzGG] J. von zur Gathen, J. Gerhard, Modern Computer Algebra, 3rd edition
//	  2013, sections 10.1 and 10.2: evaluation and interpolation along a tree of
//	  subproducts.

// points is a node of the tree over a list of points: the product of x - a over
// its points, and the halves of the list.
type points struct {
	m           *Poly
	left, right *points
}

func newPoints(w *algebra.Work, A Arith, at []Elem) *points {
	if len(at) == 1 {
		e := make(Elem, A.Width())
		A.NegElem(e, at[0])
		return &points{m: FromElems(A, []Elem{e, A.One()})}
	}
	w.Poll()
	h := len(at) / 2
	t := &points{new(Poly), newPoints(w, A, at[:h]), newPoints(w, A, at[h:])}
	A.Mul(w, t.m, t.left.m, t.right.m)
	return t
}

// eval appends the values of f at the points.
func (t *points) eval(w *algebra.Work, A Arith, f *Poly, values []Elem) []Elem {
	r := new(Poly)
	A.DivRem(w, nil, r, f, t.m)
	if t.left == nil {
		return append(values, Coeff(A, r, 0))
	}
	return t.right.eval(w, A, r, t.left.eval(w, A, r, values))
}

// combine is the sum of c_i m/(x - a_i), m being the product over the points.
func (t *points) combine(w *algebra.Work, A Arith, c []Elem) *Poly {
	if t.left == nil {
		return Constant(A, c[0])
	}
	h := len(c) / 2
	f, g := t.left.combine(w, A, c[:h]), t.right.combine(w, A, c[h:])
	A.Mul(w, f, f, t.right.m)
	A.Mul(w, g, g, t.left.m)
	A.Add(f, f, g)
	return f
}

// EvalMany is the list of the values of f at the given points [vzGG, 10.1].
func EvalMany(w *algebra.Work, A Arith, f *Poly, at []Elem) []Elem {
	if len(at) == 0 {
		return nil
	}
	return newPoints(w, A, at).eval(w, A, f, make([]Elem, 0, len(at)))
}

// Interpolate is the polynomial of degree below len(at) with the given values
// at the given points, and whether the points are different, as they must be
// [vzGG, 10.2].
func Interpolate(w *algebra.Work, A Arith, at, values []Elem) (*Poly, bool) {
	if len(at) == 0 {
		return new(Poly), true
	}
	t := newPoints(w, A, at)
	d := new(Poly)
	A.Derivative(d, t.m)
	c := t.eval(w, A, d, nil) // the product of a_i - a_j over j != i
	for i, e := range c {
		if !A.InvElem(w, e, e) {
			return nil, false
		}
		A.MulElem(w, e, e, values[i])
	}
	return t.combine(w, A, c), true
}
