package field_test

import (
	"math/big"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/integer"
)

// TestRelative checks traces, norms, conjugates and minimal polynomials over
// every subfield against their definitions.
func TestRelative(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 104)
	for name, L := range samples(w) {
		for _, d := range integer.DivisorsInt(L.AbsoluteDegree()) {
			K := must(field.Standard(w, L.Characteristic(), d))
			m := must(field.Embed(w, K, L))
			q, n := K.Order(), L.AbsoluteDegree()/d
			for range 4 {
				a := element(r, L)
				// The conjugates by powers.
				all, power := []field.Elem{}, a
				for range n {
					all = append(all, power)
					power = must(power.Pow(w, q))
				}
				sum, product := L.Zero(), L.One()
				for _, b := range all {
					sum, product = sum.Add(b), product.Mul(w, b)
				}
				if x := m.Apply(w, must(a.Trace(w, K))); !x.Equal(sum) {
					t.Errorf("%s over degree %d: trace of %s is %s, not %s", name, d, a, x, sum)
				}
				if x := m.Apply(w, must(a.Norm(w, K))); !x.Equal(product) {
					t.Errorf("%s over degree %d: norm of %s is %s, not %s", name, d, a, x, product)
				}
				conjugates := must(a.Conjugates(w, K))
				for i, b := range conjugates {
					if !b.Equal(all[i]) {
						t.Errorf("%s over degree %d: conjugate %d of %s", name, d, i, a)
					}
				}
				f := must(a.MinimalPolynomial(w, K))
				if !f.Map(w, m).Eval(w, a).IsZero() || !f.Leading().IsOne() || !f.IsIrreducible(w).Holds || f.Degree() != len(conjugates) {
					t.Errorf("%s over degree %d: minimal polynomial of %s is %s", name, d, a, f)
				}
				if k := must(a.Degree(w, K)); k != f.Degree() {
					t.Errorf("%s over degree %d: degree %d of %s", name, d, k, a)
				}
				c := must(a.CharacteristicPolynomial(w, K))
				if tr := must(a.Trace(w, K)); c.Degree() != n || !c.Coefficient(n-1).Neg().Equal(tr) && n > 0 {
					t.Errorf("%s over degree %d: characteristic polynomial of %s is %s", name, d, a, c)
				}
				x, ok := a.InSubfield(w, K)
				if ok != (f.Degree() == 1) || ok && !m.Apply(w, x).Equal(a) {
					t.Errorf("%s over degree %d: %s in the subfield: %v", name, d, a, ok)
				}
			}
		}
	}
}

// TestFibres checks that trace and norm of F_64 are onto with equal fibres.
// R. Lidl, H. Niederreiter, Finite Fields, 1997, theorems 2.23 and 2.28.
func TestFibres(t *testing.T) {
	w := algebra.NewWork(nil)
	L := adjoin(w, adjoin(w, standard(w, 2, 1), "a", 1, 1, 1), "b", 1, 1, 0, 1)
	for _, c := range []struct{ d, trace, norm int }{{3, 8, 9}, {2, 16, 21}} {
		K := standard(w, 2, c.d)
		traces, norms := map[string]int{}, map[string]int{}
		for a := range L.All {
			traces[must(a.Trace(w, K)).String()]++
			if !a.IsZero() {
				norms[must(a.Norm(w, K)).String()]++
			}
		}
		if len(traces) != 1<<c.d || len(norms) != 1<<c.d-1 {
			t.Errorf("%d traces and %d norms in F_%s", len(traces), len(norms), K.Order())
		}
		for _, n := range traces {
			if n != c.trace {
				t.Errorf("a trace to F_%s has %d elements", K.Order(), n)
			}
		}
		for _, n := range norms {
			if n != c.norm {
				t.Errorf("a norm to F_%s has %d elements", K.Order(), n)
			}
		}
	}
}

// TestTraceOnePowers counts by published positions: the exponents i with
// Tr(z^i) = 1 in polynomial bases of F_{2^n}. O. Ahmadi, A. Menezes, On the
// number of trace-one elements in polynomial bases for F_2^n, 2005.
func TestTraceOnePowers(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	for _, c := range []struct{ exponents, ones []int }{
		{[]int{163, 7, 6, 3, 0}, []int{0, 157}},
		{[]int{233, 74, 0}, []int{0, 159}},
		{[]int{283, 12, 7, 5, 0}, []int{0, 271}},
	} {
		K := must(field.Adjoin(w, F, fromExponents(F, c.exponents), "z"))
		z, ones := K.One(), []int{}
		for i := range K.Degree() {
			if must(z.Trace(w, F)).IsOne() {
				ones = append(ones, i)
			}
			z = z.Mul(w, K.Generator())
		}
		if len(ones) != len(c.ones) || ones[0] != c.ones[0] || ones[len(ones)-1] != c.ones[len(c.ones)-1] {
			t.Errorf("degree %d: %v, published %v", K.Degree(), ones, c.ones)
		}
	}
}

func fromExponents(F *field.Field, exponents []int) field.Polynomial {
	code := new(big.Int)
	for _, e := range exponents {
		code.SetBit(code, e, 1)
	}
	return field.FromCode(F, code)
}

// TestNormalElements counts them: OEIS A027362 has the numbers of normal bases
// of F_{2^n} over F_2, n = 1, ..., 11.
func TestNormalElements(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	for i, want := range []int{1, 1, 1, 2, 3, 4, 7, 16, 21, 48, 93} {
		n, count := i+1, 0
		K := standard(w, 2, n)
		for a := range K.All {
			if must(a.IsNormal(w, F)).Holds {
				count++
			}
		}
		if count != n*want {
			t.Errorf("%d normal elements of F_{2^%d}, published %d bases", count, n, want)
		}
	}
	// Over a subfield, against the rank of the conjugates.
	L, K := standard(w, 3, 6), standard(w, 3, 2)
	for code := range int64(200) {
		a := L.Element(big.NewInt(code))
		var list []field.Elem
		for i := range 3 {
			list = append(list, a.Frobenius(w, 2*i))
		}
		_, err := field.NewBasis(w, L, K, list)
		if must(a.IsNormal(w, K)).Holds != (err == nil) {
			t.Errorf("%s: normal and basis disagree", a)
		}
	}
}

func TestBasis(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 105)
	for name, L := range samples(w) {
		for F := L; ; F = F.Base() {
			for _, b := range []*field.Basis{must(field.PowerBasis(w, L, F)), must(field.NormalBasis(w, L, F))} {
				for range 5 {
					a := element(r, L)
					c := b.Coordinates(w, a)
					if len(c)*F.AbsoluteDegree() != L.AbsoluteDegree() || !field.Same(c[0].Field(), F) || !b.Combine(w, c).Equal(a) {
						t.Errorf("%s over %s: coordinates %v of %s", name, F.Modulus(), c, a)
					}
				}
			}
			if F.IsPrime() {
				break
			}
		}
	}
	K := standard(w, 2, 4)
	if _, err := field.NewBasis(w, K, standard(w, 2, 2), []field.Elem{K.One(), K.One()}); !isKind(err, algebra.Invalid) {
		t.Errorf("dependent elements: %v", err)
	}
	if _, err := field.NewBasis(w, K, standard(w, 2, 2), []field.Elem{K.One()}); !isKind(err, algebra.Invalid) {
		t.Errorf("too few elements: %v", err)
	}
}
