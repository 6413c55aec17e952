package value

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
)

func newContext() *Context {
	return &Context{W: algebra.NewWork(nil), Limits: DefaultLimits, Random: rand.New(rand.NewPCG(1, 2))}
}

// samples has values of every rank, some of them in different structures.
func samples(t *testing.T, c *Context) []Value {
	t.Helper()
	must := func(v Value, err error) Value {
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
	F4, F8, F7 := must(StandardField(c, big.NewInt(4), big.NewInt(1))), must(StandardField(c, big.NewInt(2), big.NewInt(3))), must(StandardField(c, big.NewInt(7), big.NewInt(1)))
	x := Indeterminate("x")
	half := NewRational(big.NewRat(1, 2))
	return []Value{
		Int(0), Int(1), Int(-6), half, Rational{big.NewRat(-7, 3)},
		Residue{big.NewInt(3), big.NewInt(7)}, Residue{big.NewInt(5), big.NewInt(12)},
		must(StandardGenerator(c, big.NewInt(4), big.NewInt(1))), must(StandardGenerator(c, big.NewInt(8), big.NewInt(1))),
		must(Over(c, Int(3), F7)), must(Over(c, Int(1), F4)),
		x, must(Operate(c, "-", must(Operate(c, "^", x, Int(3))), half)), Indeterminate("y"),
		must(Over(c, x, F4)), must(Over(c, must(Operate(c, "+", x, Int(1))), F8)), must(Over(c, x, F7)),
		must(Operate(c, "/", Int(1), x)), must(Over(c, must(Operate(c, "/", Int(1), x)), F7)),
	}
}

// TestMeet: two values either meet, in one structure whatever the order in
// which they stand, or the error names a mismatch.
func TestMeet(t *testing.T) {
	c := newContext()
	for _, a := range samples(t, c) {
		for _, b := range samples(t, c) {
			x, y, err := Meet(c, a, b)
			v, u, err2 := Meet(c, b, a)
			if (err == nil) != (err2 == nil) {
				t.Errorf("%s and %s meet in one order only: %v, %v", a.Text(nil), b.Text(nil), err, err2)
				continue
			}
			if err != nil {
				continue
			}
			if structure(x) != structure(y) && !(is[Polynomial](x) && is[Polynomial](y)) {
				t.Errorf("%s and %s meet as %s and %s", a.Text(nil), b.Text(nil), x.Kind(), y.Kind())
			}
			if x.Text(nil) != u.Text(nil) || y.Text(nil) != v.Text(nil) {
				t.Errorf("%s and %s meet differently in the other order", a.Text(nil), b.Text(nil))
			}
		}
	}
}

// TestLaws: wherever the operations are defined, they obey the laws of rings,
// across structures too.
func TestLaws(t *testing.T) {
	c := newContext()
	list := samples(t, c)
	same := func(what string, x, y Value, err, err2 error) {
		t.Helper()
		if err != nil || err2 != nil {
			return
		}
		if v, err := Equal(c, x, y); err != nil || !v.Holds {
			t.Errorf("%s: %s and %s (%v)", what, x.Text(nil), y.Text(nil), err)
		}
	}
	for _, a := range list {
		for _, b := range list {
			p, err := Operate(c, "*", a, b)
			q, err2 := Operate(c, "*", b, a)
			same("a*b = b*a", p, q, err, err2)
			s, err := Operate(c, "+", a, b)
			if err != nil {
				continue
			}
			back, err := Operate(c, "-", s, b)
			same("a + b - b = a", back, a, err, nil)
			for _, d := range list {
				x, err := Operate(c, "*", s, d)
				if err != nil {
					continue
				}
				y, err := Operate(c, "*", a, d)
				if err != nil {
					continue
				}
				z, err := Operate(c, "*", b, d)
				if err != nil {
					continue
				}
				w, err := Operate(c, "+", y, z)
				same("(a + b)*d = a*d + b*d", x, w, err, nil)
			}
		}
		if n, ok := a.(number); ok && !n.isZero() {
			x, err := Operate(c, "^", a, Int(-2))
			if err != nil {
				continue
			}
			y, err := Operate(c, "*", a, a)
			if err != nil {
				t.Fatal(err)
			}
			one, err := Operate(c, "*", x, y)
			same("a^-2 * a^2 = 1", one, Int(1), err, nil)
		}
	}
}

// TestDistinct compares with looking at every pair.
func TestDistinct(t *testing.T) {
	c := newContext()
	r := rand.New(rand.NewPCG(3, 4)) // fixed seed
	pool := samples(t, c)
	pool = append(pool, List{Items: pool[:2]}, List{Items: pool[2:4]}, Text{"a"}, Text{"b"})
	for range 50 {
		var items []Value
		for range r.IntN(30) {
			items = append(items, pool[r.IntN(len(pool))])
		}
		got, counts, err := Distinct(c, items)
		if err != nil {
			t.Fatal(err)
		}
		var want []Value
		for _, v := range items {
			known := false
			for _, u := range want {
				if same, err := Equal(c, u, v); err == nil && same.Holds {
					known = true
				}
			}
			if !known {
				want = append(want, v)
			}
		}
		total := 0
		for _, n := range counts {
			total += n
		}
		if len(got) != len(want) || total != len(items) {
			t.Fatalf("%d distinct of %d counted, want %d of %d", len(got), total, len(want), len(items))
		}
		for i := range got {
			if got[i].Text(nil) != want[i].Text(nil) {
				t.Fatalf("place %d: %s, want %s", i+1, got[i].Text(nil), want[i].Text(nil))
			}
		}
	}
}
