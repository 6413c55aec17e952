package funcfield

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/poly"
)

func standard(t *testing.T, p int64, n int) *field.Field {
	t.Helper()
	K, err := field.Standard(algebra.NewWork(nil), big.NewInt(p), n)
	if err != nil {
		t.Fatal(err)
	}
	return K
}

func random(K *field.Field, r *rand.Rand, n int) field.Polynomial {
	c := make([]field.Elem, r.IntN(n+1))
	for i := range c {
		c[i] = K.Element(K.Arith().Code(poly.RandomElem(K.Arith(), r)))
	}
	return field.NewPolynomial(K, c)
}

func fraction(t *testing.T, w *algebra.Work, K *field.Field, r *rand.Rand) Fraction {
	t.Helper()
	for {
		if d := random(K, r, 5); !d.IsZero() {
			u, err := New(w, random(K, r, 5), d)
			if err != nil {
				t.Fatal(err)
			}
			return u
		}
	}
}

func TestLaws(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, K := range []*field.Field{standard(t, 2, 1), standard(t, 3, 1), standard(t, 2, 4), standard(t, 3, 2), standard(t, 1009, 1)} {
		r := rand.New(rand.NewPCG(1, 1))
		same := func(law string, u, v Fraction) {
			t.Helper()
			if !u.Equal(v) {
				t.Fatalf("%s fails", law)
			}
			if d := u.d; d.IsZero() || !d.Coefficient(d.Degree()).Equal(K.One()) || u.n.GCD(w, d).Degree() > 0 {
				t.Fatalf("%s: not in lowest terms", law)
			}
		}
		p := int(K.Characteristic().Int64())
		for range 40 {
			u, v, x := fraction(t, w, K, r), fraction(t, w, K, r), fraction(t, w, K, r)
			same("u+v = v+u", u.Add(w, v), v.Add(w, u))
			same("u(v+x) = uv+ux", u.Mul(w, v.Add(w, x)), u.Mul(w, v).Add(w, u.Mul(w, x)))
			same("u-v+v = u", u.Sub(w, v).Add(w, v), u)
			same("(uv)' = u'v+uv'", u.Mul(w, v).Derivative(w), u.Derivative(w).Mul(w, v).Add(w, u.Mul(w, v.Derivative(w))))
			if !v.IsZero() {
				q, err := u.Div(w, v)
				if err != nil {
					t.Fatal(err)
				}
				same("u/v v = u", q.Mul(w, v), u)
			}
			if p > 100 {
				continue
			}
			// x -> x^p respects sums and products, and a p-th root undoes it.
			up, err1 := u.Frobenius(w, 1)
			vp, err2 := v.Frobenius(w, 1)
			sp, err3 := u.Add(w, v).Frobenius(w, 1)
			if err1 != nil || err2 != nil || err3 != nil {
				t.Fatal(err1, err2, err3)
			}
			same("(u+v)^p = u^p+v^p", sp, up.Add(w, vp))
			root, err := up.PthRoot(w)
			if err != nil {
				t.Fatal(err)
			}
			same("p-th root of u^p", root, u)
			if !up.Derivative(w).IsZero() {
				t.Fatal("the derivative of a p-th power is not zero")
			}
			if v := u.IsPthPower(w); v.Holds != u.Derivative(w).IsZero() {
				t.Fatal("p-th powers are those of derivative zero")
			}
		}
	}
}

func TestNoRootOfT(t *testing.T) {
	w := algebra.NewWork(nil)
	K := standard(t, 2, 3)
	x := FromPolynomial(field.NewPolynomial(K, []field.Elem{K.Zero(), K.One()}))
	if _, err := x.PthRoot(w); err == nil {
		t.Error("t has no p-th root")
	}
	if FrobeniusIsOnto(K).Holds {
		t.Error("Frobenius is not onto")
	}
	if _, err := x.Pow(w, big.NewInt(1<<40)); err == nil {
		t.Error("t^(2^40) passes the limit")
	}
	inv, err := x.Pow(w, big.NewInt(-3))
	if err != nil || inv.Denominator().Degree() != 3 {
		t.Errorf("t^-3: %v", err)
	}
}

// The elements of F_64 fixed by a -> a^(2^k), counted.
func TestFixed(t *testing.T) {
	w := algebra.NewWork(nil)
	K := standard(t, 2, 6)
	for k := 1; k <= 13; k++ {
		count := 0
		for n := range int64(64) {
			if a := K.Element(big.NewInt(n)); a.Frobenius(w, k).Equal(a) {
				count++
			}
		}
		if d := FixedDegree(K, k); count != 1<<d {
			t.Errorf("%d elements fixed by power %d, want 2^%d", count, k, d)
		}
	}
	if d := FiniteSubfields(K); len(d) != 4 || d[3] != 6 {
		t.Errorf("finite subfields of degrees %v", d)
	}
}

// Squares are squares, and times t or a non-square they are not; values add and
// multiply.
func TestSquareAndEval(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, K := range []*field.Field{standard(t, 2, 3), standard(t, 3, 2), standard(t, 7, 1)} {
		r := rand.New(rand.NewPCG(2, 2))
		x := FromPolynomial(field.NewPolynomial(K, []field.Elem{K.Zero(), K.One()}))
		if IsPerfect(K).Holds {
			t.Error("K(t) is not perfect")
		}
		for range 40 {
			u, v := fraction(t, w, K, r), fraction(t, w, K, r)
			s := u.Mul(w, u)
			if !s.IsSquare(w).Holds {
				t.Fatal("u^2 should be a square")
			}
			if !u.IsZero() && s.Mul(w, x).IsSquare(w).Holds {
				t.Fatal("t u^2 is no square")
			}
			for n := int64(1); n < K.Order().Int64(); n++ {
				a := K.Element(big.NewInt(n))
				if c := FromPolynomial(field.NewPolynomial(K, []field.Elem{a})); !u.IsZero() && s.Mul(w, c).IsSquare(w).Holds != a.IsSquare(w).Holds {
					t.Fatal("c u^2 is a square exactly when c is")
				}
				ua, err1 := u.Eval(w, a)
				va, err2 := v.Eval(w, a)
				if pole := u.d.Eval(w, a).IsZero(); (err1 != nil) != pole {
					t.Fatalf("pole %v: %v", pole, err1)
				}
				if err1 != nil || err2 != nil {
					continue
				}
				sum, err3 := u.Add(w, v).Eval(w, a)
				product, err4 := u.Mul(w, v).Eval(w, a)
				if err3 != nil || err4 != nil || !sum.Equal(ua.Add(va)) || !product.Equal(ua.Mul(w, va)) {
					t.Fatal("values do not add and multiply")
				}
			}
		}
	}
}
