package ratpoly

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/integer"
)

func random(r *rand.Rand, n int, size int64) Poly {
	c := make([]*big.Rat, r.IntN(n+1))
	for i := range c {
		num := r.Int64N(2*size+1) - size
		if r.IntN(4) == 0 {
			num = 0
		}
		den := int64(1)
		if size > 100 {
			den = 1 + r.Int64N(6)
		}
		c[i] = big.NewRat(num, den)
	}
	return New(c)
}

func nonzero(r *rand.Rand, n int, size int64) Poly {
	for {
		if f := random(r, n, size); !f.IsZero() {
			return f
		}
	}
}

func same(t *testing.T, law string, f, g Poly) {
	t.Helper()
	if !f.Equal(g) {
		t.Fatalf("%s: %v is not %v", law, f.Coefficients(), g.Coefficients())
	}
}

func TestLaws(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(1, 1))
	for _, size := range []int64{3, 1000, 1 << 60} {
		for range 150 {
			f, g, h := random(r, 40, size), random(r, 40, size), random(r, 8, size)
			same(t, "f+g = g+f", f.Add(g), g.Add(f))
			same(t, "f-g+g = f", f.Sub(g).Add(g), f)
			same(t, "fg = gf", f.Mul(w, g), g.Mul(w, f))
			same(t, "f(g+h) = fg+fh", f.Mul(w, g.Add(h)), f.Mul(w, g).Add(f.Mul(w, h)))
			same(t, "coefficients", New(f.Coefficients()), f)
			same(t, "(fg)' = f'g+fg'", f.Mul(w, g).Derivative(), f.Derivative().Mul(w, g).Add(f.Mul(w, g.Derivative())))
			d := nonzero(r, 12, size)
			q, rem := f.DivRem(w, d)
			same(t, "f = qd + r", q.Mul(w, d).Add(rem), f)
			if rem.Degree() >= d.Degree() {
				t.Fatalf("remainder of degree %d by degree %d", rem.Degree(), d.Degree())
			}
			x := big.NewRat(r.Int64N(9)-4, 3)
			if got := f.Mul(w, g).Eval(w, x); got.Cmp(new(big.Rat).Mul(f.Eval(w, x), g.Eval(w, x))) != 0 {
				t.Fatal("evaluation does not multiply")
			}
			if !f.IsZero() {
				same(t, "f = content primitive", f.Primitive().Scale(signed(f)), f)
			}
		}
	}
}

func signed(f Poly) *big.Rat {
	c := f.Content()
	if f.c[len(f.c)-1].Sign() < 0 {
		c.Neg(c)
	}
	return c
}

func TestKronecker(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(2, 2))
	old := KroneckerThreshold
	defer func() { KroneckerThreshold = old }()
	for range 200 {
		f, g := random(r, 30, 1<<61).Primitive(), random(r, 30, 50).Primitive()
		KroneckerThreshold = 1000
		slow := f.Mul(w, g)
		KroneckerThreshold = 1
		same(t, "product", f.Mul(w, g), slow)
	}
}

func TestGCD(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(3, 3))
	for range 200 {
		a, b, c := nonzero(r, 8, 1000), nonzero(r, 8, 1000), nonzero(r, 8, 1000)
		f, g := a.Mul(w, c), b.Mul(w, c)
		d := f.GCD(w, g)
		for _, x := range []Poly{f, g} {
			if _, rem := x.DivRem(w, d); !rem.IsZero() {
				t.Fatal("the gcd does not divide")
			}
		}
		if _, rem := d.DivRem(w, c); !rem.IsZero() {
			t.Fatal("the known common factor does not divide the gcd")
		}
		// Euclid's algorithm over Q.
		x, y := f, g
		for !y.IsZero() {
			_, rem := x.DivRem(w, y)
			x, y = y, rem
		}
		same(t, "gcd by Euclid", x.Scale(new(big.Rat).Inv(x.Coefficient(x.Degree()))), d)
	}
}

func TestResultant(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(4, 4))
	for range 100 {
		// From rational roots.
		f, g := Constant(big.NewRat(r.Int64N(5)+1, 3)), Constant(big.NewRat(-r.Int64N(5)-1, 2))
		lf, lg := f.Coefficient(0), g.Coefficient(0)
		var as, bs []*big.Rat
		for range 1 + r.IntN(4) {
			as = append(as, big.NewRat(r.Int64N(21)-10, 1+r.Int64N(4)))
			f = f.Mul(w, X().Sub(Constant(as[len(as)-1])))
		}
		for range 1 + r.IntN(4) {
			bs = append(bs, big.NewRat(r.Int64N(21)-10, 1+r.Int64N(4)))
			g = g.Mul(w, X().Sub(Constant(bs[len(bs)-1])))
		}
		want := big.NewRat(1, 1)
		for range bs {
			want.Mul(want, lf)
		}
		for range as {
			want.Mul(want, lg)
		}
		for _, a := range as {
			for _, b := range bs {
				want.Mul(want, new(big.Rat).Sub(a, b))
			}
		}
		if got := f.Resultant(w, g); got.Cmp(want) != 0 {
			t.Fatalf("resultant %v, want %v", got, want)
		}
	}
	// H. Cohen, A Course in Computational Algebraic Number Theory, 1993: the
	// discriminant of x^3 + a x + b is -4a^3 - 27b^2.
	for range 50 {
		a, b := r.Int64N(100)-50, r.Int64N(100)-50
		if got := FromInts(b, a, 0, 1).Discriminant(w); got.Cmp(big.NewRat(-4*a*a*a-27*b*b, 1)) != 0 {
			t.Fatalf("discriminant of x^3 + %dx + %d is %v", a, b, got)
		}
	}
}

func TestFactor(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(5, 5))
	for range 60 {
		f := Constant(big.NewRat(r.Int64N(9)+1, r.Int64N(5)+1))
		known := 0
		for range 1 + r.IntN(4) {
			g := nonzero(r, 6, 20)
			if g.Degree() > 0 {
				known++
			}
			for range 1 + r.IntN(2) {
				f = f.Mul(w, g)
			}
		}
		unit, list := f.Factor(w)
		back := Constant(unit)
		count := 0
		for i, g := range list {
			for range g.E {
				back = back.Mul(w, g.F)
			}
			count += g.E
			if i > 0 && compare(list[i-1].F.c, g.F.c) >= 0 {
				t.Fatal("factors out of order")
			}
			if !g.F.IsIrreducible(w).Holds {
				t.Fatal("a factor is reducible")
			}
		}
		same(t, "product of the factors", back, f)
		if count < known {
			t.Fatalf("%d factors of a product of %d", count, known)
		}
	}
}

// L. Swinnerton-Dyer's polynomials are irreducible and split into factors of
// degree at most 2 modulo every prime: H. Cohen, A Course in Computational
// Algebraic Number Theory, 1993, section 3.5.
func TestFactorKnown(t *testing.T) {
	w := algebra.NewWork(nil)
	sd := FromInts(576, 0, -960, 0, 352, 0, -40, 0, 1) // sqrt 2 + sqrt 3 + sqrt 5
	if v := sd.IsIrreducible(w); !v.Holds {
		t.Errorf("the Swinnerton-Dyer polynomial of degree 8: %+v", v)
	}
	if v := FromInts(4, 0, 0, 0, 1).IsIrreducible(w); v.Holds {
		t.Error("x^4 + 4 = (x^2+2x+2)(x^2-2x+2): S. Germain")
	}
	for n := 1; n <= 60; n++ {
		_, list := Monomial(n).Sub(FromInts(1)).Factor(w)
		if len(list) != len(integer.DivisorsInt(n)) {
			t.Errorf("x^%d - 1 has %d factors", n, len(list))
		}
		if !Cyclotomic(w, n).IsIrreducible(w).Holds {
			t.Errorf("cyclotomic polynomial %d is irreducible", n)
		}
	}
}

func TestCompose(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(6, 6))
	for range 40 {
		f, g := random(r, 6, 1000), random(r, 5, 1000)
		x := big.NewRat(r.Int64N(9)-4, 5)
		if f.Compose(w, g).Eval(w, x).Cmp(f.Eval(w, g.Eval(w, x))) != 0 {
			t.Fatal("composition does not evaluate")
		}
	}
}
