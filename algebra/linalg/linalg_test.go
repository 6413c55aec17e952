package linalg_test

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/linalg"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

func random(A poly.Arith, r *rand.Rand, rows, cols int) *linalg.Matrix {
	m := linalg.New(A, rows, cols)
	for i := range rows {
		m.Rows[i] = poly.Random(A, r, cols)
	}
	// Often not of full rank.
	if rows > 1 && r.IntN(2) == 0 {
		m.Rows[rows-1] = poly.Clone(m.Rows[0])
	}
	return m
}

func same(a, b *linalg.Matrix) bool {
	for i := range a.Rows {
		if !poly.Equal(a.Rows[i], b.Rows[i]) {
			return false
		}
	}
	return len(a.Rows) == len(b.Rows)
}

// leibniz is the determinant by expansion along the first row.
func leibniz(w *algebra.Work, m *linalg.Matrix) poly.Elem {
	A, n := m.A, m.Cols
	d := make(poly.Elem, A.Width())
	if n == 0 {
		copy(d, A.One())
		return d
	}
	for j := range n {
		minor := linalg.New(A, n-1, n-1)
		for i := 1; i < n; i++ {
			for k, to := n-1, n-2; k >= 0; k-- {
				if k != j {
					minor.Set(i-1, to, m.At(i, k))
					to--
				}
			}
		}
		t := make(poly.Elem, A.Width())
		A.MulElem(w, t, m.At(0, j), leibniz(w, minor))
		if j%2 == 1 {
			A.NegElem(t, t)
		}
		A.AddElem(d, d, t)
	}
	return d
}

// characteristic is det(x - m) from the sums of principal minors: the
// coefficient of x^(n-k) is (-1)^k times the sum of those of size k.
func characteristic(w *algebra.Work, m *linalg.Matrix) *poly.Poly {
	A, n := m.A, m.Cols
	f := new(poly.Poly)
	for set := range 1 << n {
		var of []int
		for i := range n {
			if set>>i&1 == 1 {
				of = append(of, i)
			}
		}
		minor := linalg.New(A, len(of), len(of))
		for i, a := range of {
			for j, b := range of {
				minor.Set(i, j, m.At(a, b))
			}
		}
		d := leibniz(w, minor)
		if len(of)%2 == 1 {
			A.NegElem(d, d)
		}
		A.Add(f, f, poly.Monomial(A, d, n-len(of)))
	}
	return f
}

// By the theorem of Cayley and Hamilton a matrix is a root of its
// characteristic polynomial; and the companion matrix of f has f.
func TestCharacteristicPolynomial(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, p := range []int64{2, 3, 1<<31 - 1} {
		A := rep.Prime(big.NewInt(p))
		r := rand.New(rand.NewPCG(9, uint64(p)))
		for n := range 14 {
			m := random(A, r, n, n)
			f := m.CharacteristicPolynomial(w)
			z := linalg.New(A, n, n)
			for i := f.Degree(); i >= 0; i-- {
				z = z.Mul(w, m)
				for j := range n {
					e := z.At(j, j)
					A.AddElem(e, e, poly.Coeff(A, f, i))
					z.Set(j, j, e)
				}
			}
			if f.Degree() != n || !same(z, linalg.New(A, n, n)) {
				t.Fatalf("size %d over F_%d: the matrix is not a root of its characteristic polynomial", n, p)
			}
			g := poly.Random(A, r, n)
			c := linalg.New(A, n, n)
			for i := range n {
				if i > 0 {
					c.Set(i, i-1, A.One())
				}
				e := poly.Coeff(A, g, i)
				A.NegElem(e, e)
				c.Set(i, n-1, e)
			}
			A.SetCoeff(g, n, A.One())
			if !poly.Equal(c.CharacteristicPolynomial(w), g) {
				t.Fatalf("size %d over F_%d: the companion matrix has another characteristic polynomial", n, p)
			}
		}
	}
}

func TestMatrices(t *testing.T) {
	w := algebra.NewWork(nil)
	k := rep.Prime(big.NewInt(2))
	for name, A := range map[string]poly.Arith{
		"F_2": k, "F_7": rep.Prime(big.NewInt(7)), "F_p": rep.Prime(big.NewInt(1<<61 - 1)),
		"F_16": rep.Extend(w, k, poly.FromInts(k, 1, 1, 0, 0, 1)),
	} {
		r := rand.New(rand.NewPCG(8, 8))
		for range 60 {
			n, m := 1+r.IntN(5), 1+r.IntN(5)
			a, b := random(A, r, n, m), random(A, r, m, n)
			if !same(a.Mul(w, b).Transpose(), b.Transpose().Mul(w, a.Transpose())) {
				t.Fatalf("%s: (ab)^T is not b^T a^T", name)
			}
			rank := a.Rank(w)
			kernel := a.Kernel(w)
			if rank+len(kernel) != n || rank != a.Transpose().Rank(w) {
				t.Fatalf("%s: rank %d and kernel of dimension %d for %d rows", name, rank, len(kernel), n)
			}
			for _, v := range kernel {
				if v.IsZero() || !a.Apply(w, v).IsZero() {
					t.Fatalf("%s: a kernel vector is zero or is not killed", name)
				}
			}
			sq := random(A, r, n, n)
			d := sq.Determinant(w)
			if !poly.EqualElem(d, leibniz(w, sq)) {
				t.Fatalf("%s: determinant is wrong", name)
			}
			if !poly.Equal(sq.CharacteristicPolynomial(w), characteristic(w, sq)) {
				t.Fatalf("%s: characteristic polynomial is wrong", name)
			}
			inv, ok := sq.Inverse(w)
			if ok == poly.IsZeroElem(d) || ok && !same(inv.Mul(w, sq), linalg.Identity(A, n)) {
				t.Fatalf("%s: inverse is wrong", name)
			}
			if s, ok := linalg.NewSolver(w, a); ok {
				x := poly.Random(A, r, n)
				if got, ok := s.Solve(w, a.Apply(w, x)); !ok || !poly.Equal(got, x) {
					t.Fatalf("%s: solution is wrong", name)
				}
				v := poly.Random(A, r, m)
				if got, ok := s.Solve(w, v); ok && !poly.Equal(a.Apply(w, got), v) {
					t.Fatalf("%s: a solution does not solve", name)
				}
			}
		}
	}
}
