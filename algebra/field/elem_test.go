package field_test

import (
	"math/big"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

func TestFieldLaws(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 101)
	for name, K := range samples(w) {
		for range 25 {
			a, b, c := element(r, K), element(r, K), element(r, K)
			equal := func(law string, x, y field.Elem) {
				t.Helper()
				if !x.Equal(y) {
					t.Fatalf("%s: %s fails for a = %s, b = %s, c = %s: %s and %s", name, law, a, b, c, x, y)
				}
			}
			equal("(a+b)+c = a+(b+c)", a.Add(b).Add(c), a.Add(b.Add(c)))
			equal("(ab)c = a(bc)", a.Mul(w, b).Mul(w, c), a.Mul(w, b.Mul(w, c)))
			equal("a(b+c) = ab+ac", a.Mul(w, b.Add(c)), a.Mul(w, b).Add(a.Mul(w, c)))
			equal("a-b = -(b-a)", a.Sub(b), b.Sub(a).Neg())
			equal("(a+b)^p = a^p+b^p", a.Add(b).Frobenius(w, 1), a.Frobenius(w, 1).Add(b.Frobenius(w, 1)))
			equal("a^p by Frobenius and by power", a.Frobenius(w, 1), must(a.Pow(w, K.Characteristic())))
			equal("a^(p^n) = a", a.Frobenius(w, K.AbsoluteDegree()), a)
			equal("root of the Frobenius power", a.Frobenius(w, 3).Frobenius(w, -3), a)
			equal("code and back", K.Element(a.Code()), a)
			equal("coordinates and back", K.FromCoordinates(a.Coordinates()), a)
			equal("words and back", K.FromRaw(a.Raw()), a)
			if !b.IsZero() {
				equal("(a/b)b = a", must(a.Div(w, b)).Mul(w, b), a)
				equal("b^-2", must(b.Pow(w, big.NewInt(-2))).Mul(w, b).Mul(w, b), K.One())
			}
		}
	}
}

// TestPower compares with repeated multiplication.
func TestPower(t *testing.T) {
	w := algebra.NewWork(nil)
	r := seeded(t, 102)
	for name, K := range samples(w) {
		a := element(r, K)
		b := K.One()
		for n := range int64(40) {
			if got := must(a.Pow(w, big.NewInt(n))); !got.Equal(b) {
				t.Fatalf("%s: (%s)^%d = %s, not %s", name, a, n, got, b)
			}
			b = b.Mul(w, a)
		}
	}
}

// TestCode checks the numbering of elements by the definition.
func TestCode(t *testing.T) {
	w := algebra.NewWork(nil)
	for name, K := range samples(w) {
		q := K.Base().Order()
		for _, c := range []int64{0, 1, 5, 77, 1234567} {
			a := K.Element(big.NewInt(c))
			code := new(big.Int)
			for i := len(a.Coordinates()) - 1; i >= 0; i-- {
				code.Mul(code, q)
				code.Add(code, a.Coordinates()[i].Code())
			}
			want := new(big.Int).Mod(big.NewInt(c), K.Order())
			if a.Code().Cmp(want) != 0 || code.Cmp(want) != 0 {
				t.Errorf("%s: code %d gives %s with code %s, by coordinates %s", name, c, a, a.Code(), code)
			}
		}
	}
	n := 0
	K := standard(w, 3, 3)
	for a := range K.All {
		if a.Code().Cmp(big.NewInt(int64(n))) != 0 {
			t.Fatalf("element %d has code %s", n, a.Code())
		}
		n++
	}
	if n != 27 {
		t.Errorf("%d elements of F_27", n)
	}
}

func TestNoInverse(t *testing.T) {
	w := algebra.NewWork(nil)
	K := standard(w, 2, 8)
	if _, err := K.One().Div(w, K.Zero()); !isKind(err, algebra.Undefined) {
		t.Errorf("1/0: %v", err)
	}
	if _, err := K.Zero().Pow(w, big.NewInt(-1)); !isKind(err, algebra.Undefined) {
		t.Errorf("0^-1: %v", err)
	}
	if x := must(K.Zero().Pow(w, new(big.Int))); !x.IsOne() {
		t.Errorf("0^0 = %s", x)
	}
}

func TestDifferentFieldsDoNotMix(t *testing.T) {
	w := algebra.NewWork(nil)
	a, b := standard(w, 2, 8).Generator(), adjoin(w, standard(w, 2, 1), "a", 1, 1, 0, 1, 1, 0, 0, 0, 1).Generator()
	for _, pair := range [][2]field.Elem{{a, b}, {a, standard(w, 2, 4).One()}, {a, standard(w, 3, 2).One()}} {
		err := func() (err error) {
			defer algebra.Catch(&err)
			pair[0].Add(pair[1])
			return nil
		}()
		if !isKind(err, algebra.Mismatch) {
			t.Errorf("%s + %s: %v", pair[0], pair[1], err)
		}
	}
	x, y, err := field.Combine(w, a, b)
	if err != nil || !field.Same(x.Field(), y.Field()) {
		t.Errorf("Combine: %v", err)
	}
}

func TestStandardLimits(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		p    int64
		n    int
		kind algebra.Kind
	}{{2, 1_000_000_000, algebra.TooLarge}, {2, 0, algebra.Invalid}, {4, 3, algebra.Invalid}, {1, 1, algebra.Invalid}, {91, 1, algebra.Invalid}} {
		if _, err := field.Standard(w, big.NewInt(c.p), c.n); !isKind(err, c.kind) {
			t.Errorf("Standard(%d, %d): %v", c.p, c.n, err)
		}
	}
	p := new(big.Int).Sub(new(big.Int).Lsh(big.NewInt(1), 521), big.NewInt(1))
	if _, err := field.Standard(w, p, 1000); !isKind(err, algebra.TooLarge) {
		t.Errorf("a field of half a million bits: %v", err)
	}
}

func isKind(err error, kind algebra.Kind) bool {
	e, ok := err.(*algebra.Error)
	return ok && e.Kind == kind
}

// TestInterrupt checks that a pulled brake gives an error and never an answer,
// and that nothing half-made is remembered.
func TestInterrupt(t *testing.T) {
	stop := new(algebra.Stop)
	stopped, w := algebra.NewWork(stop), algebra.NewWork(nil)
	stop.Pull(algebra.Errorf(algebra.Interrupted, "interrupted"))
	if _, err := field.Standard(stopped, big.NewInt(13), 210); !isKind(err, algebra.Interrupted) {
		t.Errorf("Standard: %v", err)
	}
	K := above(w, standard(w, 13, 1), "a", 12, 170)
	if _, err := field.Subfields(stopped, K); !isKind(err, algebra.Interrupted) {
		t.Errorf("Subfields: %v", err)
	}
	err := func() (err error) {
		defer algebra.Catch(&err)
		K.Generator().InSubfield(stopped, standard(w, 13, 6))
		return nil
	}()
	if !isKind(err, algebra.Interrupted) {
		t.Errorf("InSubfield: %v", err)
	}
	for _, L := range []*field.Field{standard(w, 13, 210), K} {
		if n := len(must(field.Subfields(w, L))); n != 16 && n != 6 {
			t.Errorf("%d subfields afterwards", n)
		}
	}
}
