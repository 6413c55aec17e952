package value

import (
	"fmt"
	"iter"
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/linalg"
	"adjoin/algebra/poly"
)

// traces is the matrix of trace(a_i b_j) over K: row i, column j.
func (e Extension) traces(c *Context, a, b []field.Elem) (*linalg.Matrix, error) {
	m := linalg.New(e.K.Arith(), len(a), len(b))
	for i := range a {
		for j := range b {
			t, err := a[i].Mul(c.W, b[j]).Trace(c.W, e.K)
			if err != nil {
				return nil, err
			}
			m.Set(i, j, t.Raw())
		}
	}
	return m, nil
}

// DualBasis is the basis C with trace(b_i c_j) = 1 for i = j and 0 otherwise.
// It solves (trace(b_i b_k)) X = 1; c_j is the combination of B by column j.
func (e Extension) DualBasis(c *Context, b []field.Elem) ([]field.Elem, error) {
	n := e.Degree()
	if len(b) != n {
		return nil, algebra.Errorf(algebra.Invalid, "a basis of %s over %s has %d elements, not %d", nameOf(c.Printer(), e.L), nameOf(c.Printer(), e.K), n, len(b))
	}
	m, err := e.traces(c, b, b)
	if err != nil {
		return nil, err
	}
	x, ok := m.Inverse(c.W)
	if !ok {
		return nil, notBasis(c, e)
	}
	dual := make([]field.Elem, n)
	for j := range dual {
		sum := e.L.Zero()
		for k := range b {
			sum = sum.Add(e.scale(c, x.At(k, j), b[k]))
		}
		dual[j] = sum
	}
	return dual, nil
}

// scale is b times the element of K with the given words.
func (e Extension) scale(c *Context, raw poly.Elem, b field.Elem) field.Elem {
	return e.Into.Apply(c.W, e.K.FromRaw(raw)).Mul(c.W, b)
}

func notBasis(c *Context, e Extension) error {
	return algebra.Errorf(algebra.Invalid, "these elements are linearly dependent over %s: they are no basis", nameOf(c.Printer(), e.K))
}

// Coordinates of x in the basis b of L/K: the elements x_i of K with
// x = sum x_i b_i. They are the traces of x with the dual basis.
func (e Extension) Coordinates(c *Context, x field.Elem, b []field.Elem) ([]field.Elem, error) {
	dual, err := e.DualBasis(c, b)
	if err != nil {
		return nil, err
	}
	list := make([]field.Elem, len(b))
	for i, d := range dual {
		if list[i], err = x.Mul(c.W, d).Trace(c.W, e.K); err != nil {
			return nil, err
		}
	}
	return list, nil
}

// IsNormal decides whether the conjugates of x over K form a basis of L/K: the
// matrix of the traces of their products must be invertible.
func (e Extension) IsNormal(c *Context, x field.Elem) (algebra.Verdict, error) {
	list, err := x.Conjugates(c.W, e.K)
	if err != nil {
		return algebra.Verdict{}, err
	}
	if len(list) < e.Degree() {
		return algebra.Because(false, "it has %d conjugates over %s, fewer than the degree %d", len(list), nameOf(c.Printer(), e.K), e.Degree()), nil
	}
	m, err := e.traces(c, list, list)
	if err != nil {
		return algebra.Verdict{}, err
	}
	rank := m.Rank(c.W)
	v := algebra.Because(rank == e.Degree(), "the matrix of the traces of the products of its conjugates has rank %d of %d", rank, e.Degree())
	v.Evidence.Source = "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.37"
	return v, nil
}

// NormalElement is the first element, by code, whose conjugates form a basis.
func (e Extension) NormalElement(c *Context) (field.Elem, error) {
	for n := big.NewInt(1); n.Cmp(e.L.Order()) < 0; n.Add(n, big.NewInt(1)) {
		c.W.Poll()
		x := e.L.Element(n)
		v, err := e.IsNormal(c, x)
		if err != nil || v.Holds {
			return x, err
		}
	}
	return field.Elem{}, fmt.Errorf("no normal element")
}

// NormalElements lists them, and counts them by the units of K[x]/(x^n - 1).
func (e Extension) NormalElements(c *Context) (Value, error) {
	n := e.Degree()
	coefficients := make([]field.Elem, n+1)
	for i := range coefficients {
		coefficients[i] = e.K.Zero()
	}
	coefficients[n], coefficients[0] = e.K.One(), e.K.One().Neg()
	if n == 0 {
		return nil, fmt.Errorf("degree 0")
	}
	// The number of residues prime to f is the product of
	// q^(d (m-1)) (q^d - 1) over the irreducible factors, of degree d and
	// multiplicity m.
	_, factors := field.NewPolynomial(e.K, coefficients).Factor(c.W)
	count, q := big.NewInt(1), e.K.Order()
	for _, f := range factors {
		qd := new(big.Int).Exp(q, big.NewInt(int64(f.F.Degree())), nil)
		count.Mul(count, new(big.Int).Exp(qd, big.NewInt(int64(f.E-1)), nil))
		count.Mul(count, qd.Sub(qd, big.NewInt(1)))
	}
	return Lazy{
		Source: func(p *Printer) string { return "normal elements of " + e.Text(p) },
		Count:  count,
		Members: func(c *Context) iter.Seq2[Value, error] {
			return func(yield func(Value, error) bool) {
				for n := big.NewInt(1); n.Cmp(e.L.Order()) < 0; n.Add(n, big.NewInt(1)) {
					c.W.Poll()
					x := e.L.Element(n)
					v, err := e.IsNormal(c, x)
					if err == nil && !v.Holds {
						continue
					}
					if !yield(Element{x}, err) {
						return
					}
				}
			}
		},
	}, nil
}
