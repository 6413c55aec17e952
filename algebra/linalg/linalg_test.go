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
