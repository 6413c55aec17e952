package field_test

import (
	"fmt"
	"math/big"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
)

// lattices are degrees whose divisors are inside the table, outside, and on
// both sides.
var lattices = []struct {
	p int64
	n int
}{
	{2, 12}, {2, 24}, {2, 30}, {2, 36}, {2, 60}, {2, 96}, {2, 210}, {3, 12}, {3, 36}, {5, 6}, {5, 50},
	{7, 30}, {37, 16}, {1009, 12}, {1009, 27}, {65537, 8},
}

func TestTrianglesCommute(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range lattices {
		for _, n := range integer.DivisorsInt(c.n) {
			N := standard(w, c.p, n)
			for _, m := range integer.DivisorsInt(n) {
				M := standard(w, c.p, m)
				up := must(field.Embed(w, M, N))
				if v := must(M.Modulus().In(w, N)).Eval(w, up.Image()); !v.IsZero() && m > 1 {
					t.Fatalf("p = %d: the image of g_%d in degree %d is no root of its polynomial", c.p, m, n)
				}
				for _, k := range integer.DivisorsInt(m) {
					K := standard(w, c.p, k)
					direct := must(field.Embed(w, K, N))
					around := must(field.Embed(w, K, M)).Then(w, up)
					if !direct.Image().Equal(around.Image()) {
						t.Fatalf("p = %d: the embeddings of degree %d in %d in %d do not compose", c.p, k, m, n)
					}
				}
			}
		}
	}
}

// TestOrderOfCreation makes the same lattice from the top and from the bottom.
func TestOrderOfCreation(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range lattices {
		P := standard(w, c.p, 1)
		up, down := field.Fresh(P), field.Fresh(P)
		d := integer.DivisorsInt(c.n)
		for i := range d {
			field.StandardOver(w, up, d[i])
			field.StandardOver(w, down, d[len(d)-1-i])
		}
		for i, n := range d {
			A, B := field.StandardOver(w, up, n), field.StandardOver(w, down, n)
			if !field.Same(A, B) {
				t.Errorf("p = %d, n = %d: %s and %s", c.p, n, A.Modulus(), B.Modulus())
			}
			for _, m := range d[:i] {
				if n%m != 0 {
					continue
				}
				a := must(field.StandardMap(w, field.StandardOver(w, up, m), A)).Image()
				b := must(field.StandardMap(w, field.StandardOver(w, down, m), B)).Image()
				if !a.Equal(b) {
					t.Errorf("p = %d: the embeddings of degree %d in %d differ", c.p, m, n)
				}
			}
		}
	}
}

// TestRule checks the polynomials outside the table against the rule, as its
// sentences read.
func TestRule(t *testing.T) {
	w := algebra.NewWork(nil)
	// From F_p, l neither p nor a divisor of p - 1.
	for _, c := range []struct{ p, n int }{{2, 53}, {2, 61}, {2, 127}, {1009, 11}, {1013, 13}, {5, 23}} {
		checkStep(t, w, c.p, c.n, c.n)
	}
	// l = p from F_p and from F_(p^(p^i)).
	for _, c := range []struct{ p, n int }{{53, 53}, {2, 64}, {3, 81}, {5, 25}} {
		checkStep(t, w, c.p, c.n, c.p)
	}
	// l | p - 1, and the general step above F_p.
	for _, c := range []struct{ p, n, l int }{{1009, 4, 2}, {1009, 9, 3}, {3, 32, 2}, {2, 81, 3}, {2, 49, 7}, {2, 125, 5}, {11, 27, 3}} {
		checkStep(t, w, c.p, c.n, c.l)
	}
	// Composite degrees: the generator is the sum of the generators of prime
	// power degree.
	for _, c := range []struct{ p, n int }{{2, 60}, {2, 210}, {1009, 12}, {7, 30}} {
		L, sum := standard(w, int64(c.p), c.n), standard(w, int64(c.p), c.n).Zero()
		for _, q := range integer.FactorInt(c.n) {
			n := 1
			for range q.E {
				n *= q.P
			}
			sum = sum.Add(must(field.Embed(w, standard(w, int64(c.p), n), L)).Image())
		}
		if !sum.Equal(L.Generator()) {
			t.Errorf("p = %d, n = %d: the sum is not the generator", c.p, c.n)
		}
	}
}

// checkStep checks the relative minimal polynomial of g_n over the field of
// degree n/l.
func checkStep(t *testing.T, w *algebra.Work, p, n, l int) {
	t.Helper()
	K, L := standard(w, int64(p), n/l), standard(w, int64(p), n)
	f := must(L.Generator().MinimalPolynomial(w, K))
	g := K.Generator()
	name := fmt.Sprintf("p = %d, degree %d over %d: %s", p, n, n/l, f)
	if f.Degree() != l {
		t.Fatal(name)
	}
	switch {
	case l == p:
		// x^p - x - g^i with the least i of trace not 0.
		for i := int64(0); ; i++ {
			a := must(g.Pow(w, big.NewInt(i)))
			if !must(a.Trace(w, K.PrimeField())).IsZero() {
				c := []field.Elem{a.Neg(), K.One().Neg()}
				for range l - 2 {
					c = append(c, K.Zero())
				}
				if want := field.NewPolynomial(K, append(c, K.One())); !f.Equal(want) {
					t.Errorf("%s, not %s", name, want)
				}
				return
			}
		}
	case (p-1)%l == 0:
		// x^l - a with the a of least code that is no l-th power.
		for a := range K.All {
			if !must(a.IsPower(w, big.NewInt(int64(l)))).Holds {
				want := field.NewPolynomial(K, []field.Elem{K.One()}).Shift(l).Sub(field.NewPolynomial(K, []field.Elem{a}))
				if !f.Equal(want) {
					t.Errorf("%s, not %s", name, want)
				}
				return
			}
		}
	default:
		// x^l + x t(x) + g with the first t by bound and code.
		for bound := int64(2); ; bound *= 2 {
			bound = min(bound, K.Order().Int64())
			number := big.NewInt(1)
			for range l - 1 {
				number.Mul(number, big.NewInt(bound))
			}
			for i := big.NewInt(1); i.Cmp(number) < 0; i.Add(i, big.NewInt(1)) {
				want := field.FromInts(K, 1).Shift(l).Add(field.NewPolynomial(K, []field.Elem{g}))
				rest, digit := new(big.Int).Set(i), new(big.Int)
				for k := 1; rest.Sign() > 0; k++ {
					rest.QuoRem(rest, big.NewInt(bound), digit)
					want = want.Add(field.NewPolynomial(K, []field.Elem{K.Element(digit)}).Shift(k))
				}
				if want.IsIrreducible(w).Holds {
					if !f.Equal(want) {
						t.Errorf("%s, not %s", name, want)
					}
					return
				}
			}
		}
	}
}

func TestStandardModuliAreIrreducible(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range lattices {
		for _, n := range integer.DivisorsInt(c.n) {
			if f := standard(w, c.p, n).Modulus(); f.Degree() != n || !f.IsIrreducible(w).Holds {
				t.Errorf("p = %d, n = %d: %s", c.p, n, f)
			}
		}
	}
}

// TestStandardIsOne checks that the same question gives the same pointer, also
// when it is asked from many goroutines.
func TestStandardIsOne(t *testing.T) {
	const workers = 8
	answers := make(chan *field.Field, workers)
	for range workers {
		go func() {
			w := algebra.NewWork(nil)
			K := standard(w, 13, 60)
			must(field.Subfields(w, K))
			answers <- K
		}()
	}
	K := <-answers
	for range workers - 1 {
		if <-answers != K {
			t.Error("two fields of 13^60 elements")
		}
	}
}

// others are presentations of the field of p^n elements that differ from the
// standard one.
func others(w *algebra.Work, p int64, n int) []*field.Field {
	F := standard(w, p, 1)
	list := []*field.Field{
		must(field.Adjoin(w, F, field.FromPoly(F, poly.FindIrreducible(w, F.Arith(), n)), "a")),
		above(w, F, "b", n, 2*p*p),
	}
	for _, m := range integer.DivisorsInt(n) {
		if m > 1 && m < n {
			list = append(list, above(w, above(w, F, "c", m, p+1), "d", n/m, p*p), above(w, standard(w, p, m), "e", n/m, p))
		}
	}
	return list
}

// TestPresentationsAgree compares different presentations of one field by
// what does not depend on them, along the fixed embeddings.
func TestPresentationsAgree(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 103)
	for _, c := range []struct {
		p int64
		n int
	}{{2, 6}, {2, 8}, {3, 4}, {5, 6}, {1009, 4}, {2, 12}} {
		S := standard(w, c.p, c.n)
		for _, K := range append(others(w, c.p, c.n), S) {
			m := must(field.Isomorphism(w, K, S))
			back := must(field.Isomorphism(w, S, K))
			for range 10 {
				a, b := element(r, K), element(r, K)
				x, y := m.Apply(w, a), m.Apply(w, b)
				if !m.Apply(w, a.Mul(w, b)).Equal(x.Mul(w, y)) || !m.Apply(w, a.Add(b)).Equal(x.Add(y)) {
					t.Fatalf("%s: not a homomorphism", K.Modulus())
				}
				if !back.Apply(w, x).Equal(a) {
					t.Fatalf("%s: the isomorphisms are not inverse", K.Modulus())
				}
				if !a.IsZero() {
					n1, _, err1 := a.Order(w)
					n2, _, err2 := x.Order(w)
					if err1 != nil || err2 != nil || n1.Cmp(n2) != 0 {
						t.Fatalf("%s: orders %s and %s", K.Modulus(), n1, n2)
					}
				}
				for _, d := range integer.DivisorsInt(c.n) {
					D := standard(w, c.p, d)
					if !must(a.Trace(w, D)).Equal(must(x.Trace(w, D))) || !must(a.Norm(w, D)).Equal(must(x.Norm(w, D))) {
						t.Fatalf("%s: traces or norms of %s differ", K.Modulus(), a)
					}
					if !must(a.MinimalPolynomial(w, D)).Equal(must(x.MinimalPolynomial(w, D))) {
						t.Fatalf("%s: minimal polynomials of %s differ", K.Modulus(), a)
					}
				}
			}
			// The documented choice: no conjugate over the base has a lower code.
			for _, z := range must(m.Image().Conjugates(w, standard(w, c.p, K.Base().AbsoluteDegree()))) {
				if K != S && field.Compare(z, m.Image()) < 0 {
					t.Errorf("%s: the root %s has a lower code than %s", K.Modulus(), z, m.Image())
				}
			}
		}
	}
}

// TestTrianglesOfPresentations checks that fixed embeddings compose through
// presentations of users and towers.
func TestTrianglesOfPresentations(t *testing.T) {
	w := algebra.NewWork(nil)
	var all []*field.Field
	for _, n := range []int{1, 2, 3, 6, 12} {
		all = append(all, standard(w, 2, n))
		if n > 1 {
			all = append(all, others(w, 2, n)...)
		}
	}
	for _, K := range all {
		for _, L := range all {
			up, err := field.Embed(w, K, L)
			if L.AbsoluteDegree()%K.AbsoluteDegree() != 0 {
				if !isKind(err, algebra.Mismatch) {
					t.Fatalf("degree %d in %d: %v", K.AbsoluteDegree(), L.AbsoluteDegree(), err)
				}
				continue
			}
			for _, M := range all {
				if M.AbsoluteDegree()%L.AbsoluteDegree() != 0 {
					continue
				}
				direct, around := must(field.Embed(w, K, M)), up.Then(w, must(field.Embed(w, L, M)))
				if !direct.Equal(w, around) {
					t.Fatalf("%s in %s in %s: the embeddings do not compose", K.Modulus(), L.Modulus(), M.Modulus())
				}
			}
		}
	}
}
