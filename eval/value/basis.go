package value

import (
	"iter"
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/linalg"
	"adjoin/algebra/poly"
)

// DualBasis is the basis C with trace(b_i c_j) = 1 for i = j and 0 otherwise.
// It solves (trace(b_i b_k)) X = 1; c_j is the combination of B by column j.
func (e Extension) DualBasis(c *Context, b []field.Elem) ([]field.Elem, error) {
	n := e.Degree()
	if len(b) != n {
		return nil, algebra.Errorf(algebra.Invalid, "a basis of %s over %s has %d elements, not %d", nameOf(c.Printer(), e.L), nameOf(c.Printer(), e.K), n, len(b))
	}
	m := linalg.New(e.K.Arith(), n, n)
	for i := range b {
		for j := range b {
			t, err := b[i].Mul(c.W, b[j]).Trace(c.W, e.K)
			if err != nil {
				return nil, err
			}
			m.Set(i, j, t.Raw())
		}
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

// NormalElements lists the elements of L whose conjugates form a basis of L/K,
// by their codes, and counts them by the units of K[x]/(x^n - 1).
func (e Extension) NormalElements(c *Context) (Value, error) {
	n := e.Degree()
	coefficients := make([]field.Elem, n+1)
	for i := range coefficients {
		coefficients[i] = e.K.Zero()
	}
	coefficients[n], coefficients[0] = e.K.One(), e.K.One().Neg()
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
					v, err := x.IsNormal(c.W, e.K)
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
