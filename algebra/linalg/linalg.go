// Package linalg has linear algebra over a finite field. A row is a
// polynomial, coefficient j being entry j: so rows over F_2 are packed, and
// every row operation is one call on a whole vector.
package linalg

import (
	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Matrix has Rows of Cols entries. A method that returns a matrix makes a new
// one.
type Matrix struct {
	A    poly.Arith
	Rows []*poly.Poly
	Cols int
}

// New is the zero matrix.
func New(A poly.Arith, rows, cols int) *Matrix {
	m := &Matrix{A, make([]*poly.Poly, rows), cols}
	for i := range m.Rows {
		m.Rows[i] = new(poly.Poly)
	}
	return m
}

// Identity is the n by n identity.
func Identity(A poly.Arith, n int) *Matrix {
	m := New(A, n, n)
	for i := range n {
		m.Set(i, i, A.One())
	}
	return m
}

// At is the entry in row i, column j.
func (m *Matrix) At(i, j int) poly.Elem { return poly.Coeff(m.A, m.Rows[i], j) }

// Set sets the entry in row i, column j.
func (m *Matrix) Set(i, j int, a poly.Elem) { m.A.SetCoeff(m.Rows[i], j, a) }

// Clone is a copy of m.
func (m *Matrix) Clone() *Matrix {
	c := &Matrix{m.A, make([]*poly.Poly, len(m.Rows)), m.Cols}
	for i, r := range m.Rows {
		c.Rows[i] = poly.Clone(r)
	}
	return c
}

// Transpose is m with rows and columns exchanged.
func (m *Matrix) Transpose() *Matrix {
	t := New(m.A, m.Cols, len(m.Rows))
	for i := len(m.Rows) - 1; i >= 0; i-- {
		for j := range m.Rows[i].N {
			if a := m.At(i, j); !poly.IsZeroElem(a) {
				t.Set(j, i, a)
			}
		}
	}
	return t
}

// Mul is the product m n.
func (m *Matrix) Mul(w *algebra.Work, n *Matrix) *Matrix {
	z := New(m.A, len(m.Rows), n.Cols)
	e := make(poly.Elem, m.A.Width())
	for i, r := range m.Rows {
		w.Poll()
		for j := range r.N {
			m.A.Coeff(e, r, j)
			m.A.AddScaled(w, z.Rows[i], n.Rows[j], e)
		}
	}
	return z
}

// Apply is the row vector v times m.
func (m *Matrix) Apply(w *algebra.Work, v *poly.Poly) *poly.Poly {
	z, e := new(poly.Poly), make(poly.Elem, m.A.Width())
	for j := range v.N {
		m.A.Coeff(e, v, j)
		m.A.AddScaled(w, z, m.Rows[j], e)
	}
	return z
}

// Echelon is the reduced row echelon form of m and the columns of its pivots,
// one for each row that is not zero.
func (m *Matrix) Echelon(w *algebra.Work) (*Matrix, []int) {
	z := m.Clone()
	return z, z.reduce(w, m.Cols)
}

// reduce brings the first cols columns of m to reduced echelon form.
func (m *Matrix) reduce(w *algebra.Work, cols int) (pivots []int) {
	A := m.A
	e := make(poly.Elem, A.Width())
	for j := 0; j < cols && len(pivots) < len(m.Rows); j++ {
		w.Poll()
		k := len(pivots)
		i := m.pivot(e, k, j)
		if i == len(m.Rows) {
			continue
		}
		m.Rows[i], m.Rows[k] = m.Rows[k], m.Rows[i]
		A.InvElem(w, e, e)
		A.Scale(w, m.Rows[k], m.Rows[k], e)
		for i, r := range m.Rows {
			if i == k {
				continue
			}
			w.Poll()
			if A.Coeff(e, r, j); !poly.IsZeroElem(e) {
				A.NegElem(e, e)
				A.AddScaled(w, r, m.Rows[k], e)
			}
		}
		pivots = append(pivots, j)
	}
	return pivots
}

// pivot is the first row from i on with an entry e, not zero, in column j, and
// the number of rows when there is none.
func (m *Matrix) pivot(e poly.Elem, i, j int) int {
	for ; i < len(m.Rows); i++ {
		if m.A.Coeff(e, m.Rows[i], j); !poly.IsZeroElem(e) {
			break
		}
	}
	return i
}

// Rank is the rank of m.
func (m *Matrix) Rank(w *algebra.Work) int {
	_, pivots := m.Echelon(w)
	return len(pivots)
}

// Determinant is the determinant of a square matrix.
func (m *Matrix) Determinant(w *algebra.Work) poly.Elem {
	A, z := m.A, m.Clone()
	d := append(poly.Elem(nil), A.One()...)
	e, inv := make(poly.Elem, A.Width()), make(poly.Elem, A.Width())
	for j := range z.Cols {
		w.Poll()
		i := z.pivot(e, j, j)
		if i == z.Cols {
			clear(d)
			return d
		}
		if i != j {
			z.Rows[i], z.Rows[j] = z.Rows[j], z.Rows[i]
			A.NegElem(d, d)
		}
		A.MulElem(w, d, d, e)
		A.InvElem(w, inv, e)
		A.NegElem(inv, inv)
		for _, r := range z.Rows[j+1:] {
			if A.Coeff(e, r, j); !poly.IsZeroElem(e) {
				A.MulElem(w, e, e, inv)
				A.AddScaled(w, r, z.Rows[j], e)
			}
		}
	}
	return d
}

// Inverse is the inverse of a square matrix, if there is one.
func (m *Matrix) Inverse(w *algebra.Work) (*Matrix, bool) {
	s, ok := NewSolver(w, m)
	if !ok {
		return nil, false
	}
	return s.inverse, len(m.Rows) == m.Cols
}

// Kernel is a basis of the row vectors v with v m = 0.
func (m *Matrix) Kernel(w *algebra.Work) []*poly.Poly {
	n := len(m.Rows)
	z := m.beside(Identity(m.A, n))
	k := len(z.reduce(w, m.Cols))
	var basis []*poly.Poly
	for _, r := range z.Rows[k:] {
		v := new(poly.Poly)
		m.A.Slice(v, r, m.Cols, m.Cols+n)
		basis = append(basis, v)
	}
	return basis
}

// beside is m with the columns of n added on its right.
func (m *Matrix) beside(n *Matrix) *Matrix {
	z := m.Clone()
	z.Cols += n.Cols
	t := new(poly.Poly)
	for i, r := range n.Rows {
		m.A.Shift(t, r, m.Cols)
		m.A.Add(z.Rows[i], z.Rows[i], t)
	}
	return z
}

// Solver solves x m = v for a matrix with independent rows, many times.
type Solver struct {
	m       *Matrix
	pivots  []int
	inverse *Matrix // of the columns of the pivots
}

// NewSolver prepares m, and says whether its rows are independent.
func NewSolver(w *algebra.Work, m *Matrix) (*Solver, bool) {
	n := len(m.Rows)
	z := m.beside(Identity(m.A, n))
	pivots := z.reduce(w, m.Cols)
	if len(pivots) < n {
		return nil, false
	}
	s := &Solver{m, pivots, New(m.A, n, n)}
	for i, r := range z.Rows {
		m.A.Slice(s.inverse.Rows[i], r, m.Cols, m.Cols+n)
	}
	return s, true
}

// Solve is the x with x m = v, if there is one.
func (s *Solver) Solve(w *algebra.Work, v *poly.Poly) (*poly.Poly, bool) {
	A := s.m.A
	part, e := new(poly.Poly), make(poly.Elem, A.Width())
	for i := len(s.pivots) - 1; i >= 0; i-- {
		A.Coeff(e, v, s.pivots[i])
		A.SetCoeff(part, i, e)
	}
	x := s.inverse.Apply(w, part)
	return x, poly.Equal(s.m.Apply(w, x), v)
}
