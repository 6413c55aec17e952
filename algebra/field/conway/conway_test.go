package conway

import (
	"flag"
	"fmt"
	"math/big"
	"os"
	"slices"
	"strings"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

var write = flag.Bool("write", false, "make table.txt anew from the definition")

// ranges are those that doc.go states: degrees n <= most for primes p <= upTo.
var ranges = []struct{ upTo, most int }{{2, 48}, {3, 30}, {5, 20}, {7, 16}, {31, 12}, {1000, 7}}

// most is the number of degrees in the table for the prime p.
func most(p int) int {
	for _, r := range ranges {
		if p <= r.upTo {
			return r.most
		}
	}
	return 0
}

func TestWrite(t *testing.T) {
	if !*write {
		t.Skip("only with -write")
	}
	w := algebra.NewWork(nil)
	var b strings.Builder
	for _, p := range integer.PrimesUpTo(1000) {
		var list [][]int64
		for n := 1; n <= most(p); n++ {
			c := Search(w, int64(p), n, func(m int) []int64 { return list[m-1] })
			list = append(list, c)
			fmt.Fprintln(&b, p, n, strings.Trim(fmt.Sprint(c[:n]), "[]"))
		}
	}
	if err := os.WriteFile("table.txt", []byte(b.String()), 0o644); err != nil {
		t.Fatal(err)
	}
}

func lookup(p, n int) []int64 {
	c, _ := Lookup(big.NewInt(int64(p)), n)
	return c
}

// TestTable checks that the table has what doc.go says and nothing else, and
// that each polynomial is primitive and compatible with those below it.
func TestTable(t *testing.T) {
	w := algebra.NewWork(nil)
	lines := 0
	for _, p := range integer.PrimesUpTo(1000) {
		for n := 1; n <= most(p); n++ {
			lines++
			c := lookup(p, n)
			if len(c) != n+1 || c[n] != 1 {
				t.Fatalf("p = %d, n = %d: %v", p, n, c)
			}
			if n == 1 || testing.Short() && p > 50 {
				continue
			}
			s := newSearch(w, int64(p), n, func(m int) []int64 { return lookup(p, m) })
			if f := poly.FromInts(s.F, c...); !s.isConway(f) {
				t.Errorf("p = %d, n = %d: %v is not primitive and compatible", p, n, c)
			}
		}
		if Has(big.NewInt(int64(p)), most(p)+1) {
			t.Errorf("p = %d, n = %d is in the table", p, most(p)+1)
		}
	}
	if n := len(table()); n != lines {
		t.Errorf("%d lines, not %d", n, lines)
	}
	if Has(big.NewInt(1009), 1) || Has(new(big.Int).Lsh(big.NewInt(1), 70), 1) {
		t.Error("the table goes beyond p = 1000")
	}
}

// TestSearch makes part of the table again, both ways where both are quick.
func TestSearch(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, r := range []struct{ p, most int }{{2, 18}, {3, 10}, {5, 6}, {7, 6}, {29, 5}, {31, 4}, {97, 3}, {997, 1}} {
		for n := 1; n <= r.most; n++ {
			known := func(m int) []int64 { return lookup(r.p, m) }
			if got := Search(w, int64(r.p), n, known); !slices.Equal(got, known(n)) {
				t.Errorf("p = %d, n = %d: %v, in the table %v", r.p, n, got, known(n))
			}
			if n > 1 && n <= r.most-2 {
				s := newSearch(w, int64(r.p), n, known)
				if a, b := s.inOrder(), s.amongCompatible(); !poly.Equal(a, b) {
					t.Errorf("p = %d, n = %d: %v in order and %v among the compatible", r.p, n, s.coefficients(a), s.coefficients(b))
				}
			}
		}
	}
}

// TestDefinition finds small Conway polynomials by the definition alone, with
// school arithmetic.
func TestDefinition(t *testing.T) {
	for _, r := range []struct{ p, most int }{{2, 9}, {3, 5}, {5, 3}, {7, 3}, {11, 2}, {13, 2}} {
		var list [][]int
		for n := 1; n <= r.most; n++ {
			c := byDefinition(r.p, n, list)
			list = append(list, c)
			for i, x := range lookup(r.p, n) {
				if int64(c[i]) != x {
					t.Errorf("p = %d, n = %d: %v, in the table %v", r.p, n, c, lookup(r.p, n))
					break
				}
			}
		}
	}
}

func byDefinition(p, n int, below [][]int) []int {
	total := 1
	for range n {
		total *= p
	}
	for word := range total {
		f := make([]int, n+1)
		f[n] = 1
		for i, rest := n, word; i >= 1; i, rest = i-1, rest/p {
			a := rest % p
			if i%2 == 1 {
				a = (p - a) % p
			}
			f[n-i] = a
		}
		if schoolOrder(p, f, total) != total-1 {
			continue
		}
		ok := true
		for m := 1; m < n; m++ {
			if n%m != 0 {
				continue
			}
			small := 1
			for range m {
				small *= p
			}
			x := schoolPower(p, f, (total-1)/(small-1))
			value := make([]int, n)
			for i := m; i >= 0; i-- {
				value = schoolMul(p, f, value, x)
				value[0] = (value[0] + below[m-1][i]) % p
			}
			ok = ok && !slices.ContainsFunc(value, func(c int) bool { return c != 0 })
		}
		if ok {
			return f
		}
	}
	return nil
}

// schoolMul is a b modulo f, monic of degree n; a and b have n coefficients.
func schoolMul(p int, f, a, b []int) []int {
	n := len(f) - 1
	c := make([]int, 2*n)
	for i, x := range a {
		for j, y := range b {
			c[i+j] = (c[i+j] + x*y) % p
		}
	}
	for i := 2*n - 1; i >= n; i-- {
		for j := 0; j <= n; j++ {
			if j < n {
				c[i-n+j] = ((c[i-n+j]-c[i]*f[j])%p + p) % p
			}
		}
	}
	return c[:n]
}

func schoolX(p int, f []int) []int {
	n := len(f) - 1
	x := make([]int, n)
	if n == 1 {
		x[0] = (p - f[0]) % p
	} else {
		x[1] = 1
	}
	return x
}

func schoolPower(p int, f []int, e int) []int {
	x := schoolX(p, f)
	z := make([]int, len(x))
	z[0] = 1
	for range e {
		z = schoolMul(p, f, z, x)
	}
	return z
}

// schoolOrder is the order of x modulo f, 0 if it is beyond the limit.
func schoolOrder(p int, f []int, limit int) int {
	x := schoolX(p, f)
	z := slices.Clone(x)
	for k := 1; k < limit; k++ {
		if z[0] == 1 && !slices.ContainsFunc(z[1:], func(c int) bool { return c != 0 }) {
			return k
		}
		z = schoolMul(p, f, z, x)
	}
	return 0
}

// TestPublished compares with published polynomials. Coefficients stand with
// the constant term first.
func TestPublished(t *testing.T) {
	for _, c := range []struct {
		p, n int
		f    []int64
	}{
		// C. Jansen, K. Lux, R. Parker, R. Wilson, An Atlas of Brauer
		// Characters, 1995, and L. Heath, N. Loehr, New algorithms for
		// generating Conway polynomials over finite fields, 2004.
		{3, 1, []int64{1, 1}},
		{3, 2, []int64{2, 2, 1}},
		{3, 3, []int64{1, 2, 0, 1}},
		{3, 4, []int64{2, 0, 0, 2, 1}},
		{3, 5, []int64{1, 2, 0, 0, 0, 1}},
		{3, 6, []int64{2, 2, 1, 0, 2, 0, 1}},
		{3, 7, []int64{1, 0, 2, 0, 0, 0, 0, 1}},
		{3, 8, []int64{2, 2, 2, 0, 1, 2, 0, 0, 1}},
		{3, 9, []int64{1, 1, 2, 2, 0, 0, 0, 0, 0, 1}},
		{3, 10, []int64{2, 1, 0, 0, 2, 2, 2, 0, 0, 0, 1}},
		{3, 11, []int64{1, 0, 2, 0, 0, 0, 0, 0, 0, 0, 0, 1}},
		{3, 12, []int64{2, 0, 1, 0, 1, 1, 1, 0, 0, 0, 0, 0, 1}},
		{11, 1, []int64{9, 1}},
		{11, 2, []int64{2, 7, 1}},
		{11, 3, []int64{9, 2, 0, 1}},
		{11, 4, []int64{2, 10, 8, 0, 1}},
		{11, 5, []int64{9, 0, 10, 0, 0, 1}},
		{11, 6, []int64{2, 7, 6, 4, 3, 0, 1}},
		{13, 2, []int64{2, 12, 1}},
		{13, 3, []int64{11, 2, 0, 1}},
		{13, 4, []int64{2, 12, 3, 0, 1}},
		{13, 5, []int64{11, 4, 0, 0, 0, 1}},
		{19, 2, []int64{2, 18, 1}},
		{19, 3, []int64{17, 4, 0, 1}},
		{19, 4, []int64{2, 11, 2, 0, 1}},
		{23, 2, []int64{5, 21, 1}},
		{23, 3, []int64{18, 2, 0, 1}},
		{23, 4, []int64{5, 19, 3, 0, 1}},
		// The same sources, from memory.
		{2, 2, []int64{1, 1, 1}},
		{2, 3, []int64{1, 1, 0, 1}},
		{2, 4, []int64{1, 1, 0, 0, 1}},
		{2, 5, []int64{1, 0, 1, 0, 0, 1}},
		{2, 6, []int64{1, 1, 0, 1, 1, 0, 1}},
		{2, 7, []int64{1, 1, 0, 0, 0, 0, 0, 1}},
		{2, 8, []int64{1, 0, 1, 1, 1, 0, 0, 0, 1}},
		{2, 9, []int64{1, 0, 0, 0, 1, 0, 0, 0, 0, 1}},
		{2, 10, []int64{1, 1, 1, 1, 0, 1, 1, 0, 0, 0, 1}},
		{2, 11, []int64{1, 0, 1, 0, 0, 0, 0, 0, 0, 0, 0, 1}},
		{2, 12, []int64{1, 1, 0, 1, 0, 1, 1, 1, 0, 0, 0, 0, 1}},
	} {
		if got := lookup(c.p, c.n); !slices.Equal(got, c.f) {
			t.Errorf("C_(%d,%d) = %v, published %v", c.p, c.n, got, c.f)
		}
	}
	// Least primitive roots: R. Lidl, H. Niederreiter, Finite Fields, 1997,
	// tables; OEIS A001918.
	for p, r := range map[int]int64{2: 1, 3: 2, 5: 2, 7: 3, 17: 3, 23: 5, 31: 3, 41: 6, 43: 3, 47: 5, 191: 19, 409: 21} {
		if got := int64(p) - lookup(p, 1)[0]; got != r {
			t.Errorf("p = %d: root %d, published %d", p, got, r)
		}
	}
}

// TestRepresentation checks that the search does not depend on how elements
// lie in memory: tables of logarithms and plain residues.
func TestRepresentation(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range []struct{ p, n int }{{2, 8}, {3, 4}, {2, 12}} {
		s := newSearch(w, int64(c.p), c.n, func(m int) []int64 { return lookup(c.p, m) })
		K := &elements{s: s, A: rep.Generic(w, s.F, poly.FindIrreducible(w, s.F, c.n))}
		if got := s.coefficients(K.least()); !slices.Equal(got, lookup(c.p, c.n)) {
			t.Errorf("C_(%d,%d) = %v", c.p, c.n, got)
		}
	}
}
