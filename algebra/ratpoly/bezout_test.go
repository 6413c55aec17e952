package ratpoly

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/rep"
)

func TestXGCD(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(8, 8))
	for range 300 {
		c := random(r, 4, 1000)
		f, g := random(r, 9, 1000).Mul(w, c), random(r, 9, 1000).Mul(w, c)
		d, u, v := f.XGCD(w, g)
		same(t, "uf + vg = d", u.Mul(w, f).Add(v.Mul(w, g)), d)
		same(t, "d = gcd", d, f.GCD(w, g))
		if k := g.Degree() - d.Degree(); k > 0 && u.Degree() >= k {
			t.Fatalf("deg u is %d, should be below %d", u.Degree(), k)
		}
		if k := f.Degree() - d.Degree(); k > 0 && v.Degree() >= k {
			t.Fatalf("deg v is %d, should be below %d", v.Degree(), k)
		}
	}
}

func TestPseudoDivRem(t *testing.T) {
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(9, 9))
	for range 200 {
		f, g := random(r, 12, 50), nonzero(r, 6, 50)
		q, rem := f.PseudoDivRem(w, g)
		scaled := f
		for range f.Degree() - g.Degree() + 1 {
			scaled = scaled.Scale(g.Coefficient(g.Degree()))
		}
		same(t, "lead^k f = qg + r", q.Mul(w, g).Add(rem), scaled)
		if rem.Degree() >= g.Degree() || !q.IsIntegral() || !rem.IsIntegral() {
			t.Fatal("the pseudo-remainder is not reduced or not integral")
		}
	}
}

func TestLift(t *testing.T) {
	w := algebra.NewWork(nil)
	A := rep.Prime(big.NewInt(101))
	r := rand.New(rand.NewPCG(10, 10))
	for range 100 {
		f := random(r, 12, 50) // between -50 and 50
		same(t, "Lift(Mod f) = f", Lift(A, f.Mod(w, A)), f)
	}
}
