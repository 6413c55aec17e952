package poly_test

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

// Roots in an extension of a polynomial over a smaller field are the linear
// factors that factoring over the extension finds.
func TestRootsFromBelow(t *testing.T) {
	w := algebra.NewWork(nil)
	over := func(A poly.Arith, n int) *rep.Extension {
		return rep.Generic(w, A, poly.FindIrreducible(w, A, n))
	}
	f4 := over(prime(2), 2)
	for name, c := range map[string]struct {
		chain []*rep.Extension // each over the one before
	}{
		"F_2^12":          {[]*rep.Extension{over(prime(2), 12)}},
		"F_3^6":           {[]*rep.Extension{over(prime(3), 6)}},
		"F_p^4":           {[]*rep.Extension{over(prime(1<<31-1), 4)}},
		"((F_2)^2)^3":     {[]*rep.Extension{f4, over(f4, 3)}},
		"(((F_2)^2)^3)^2": {[]*rep.Extension{f4, over(f4, 3), over(over(f4, 3), 2)}},
		"Zech F_3^6":      {[]*rep.Extension{rep.Extend(w, prime(3), poly.FindIrreducible(w, prime(3), 6))}},
	} {
		r := rand.New(rand.NewPCG(3, uint64(len(name))))
		L := c.chain[len(c.chain)-1]
		base := c.chain[0].Base()
		split := 0
		for n := 1; n <= 6; n++ {
			for range 4 {
				f := monic(base, r, n)
				for _, K := range c.chain {
					g, e := new(poly.Poly), make(poly.Elem, K.Width())
					for i := f.N - 1; i >= 0; i-- {
						K.FromPoly(w, e, poly.Constant(K.Base(), poly.Coeff(K.Base(), f, i)))
						K.SetCoeff(g, i, e)
					}
					f = g
				}
				_, list := poly.Factorize(w, L, f)
				var want []poly.Root
				for _, g := range list {
					if g.F.N == 2 {
						e := poly.Coeff(L, g.F, 0)
						L.NegElem(e, e)
						want = append(want, poly.Root{A: e, E: g.E})
					}
				}
				roots := poly.Roots(w, L, f)
				if len(roots) != len(want) {
					t.Fatalf("%s: %d roots, %d linear factors", name, len(roots), len(want))
				}
				split += max(0, len(roots)-1)
				for _, a := range roots {
					found := false
					for _, b := range want {
						found = found || poly.EqualElem(a.A, b.A) && a.E == b.E
					}
					if !found {
						t.Fatalf("%s: a root is no linear factor", name)
					}
				}
				one := poly.Root1(w, L, f)
				if (one == nil) != (len(want) == 0) || one != nil && !poly.IsZeroElem(poly.Eval(w, L, f, one)) {
					t.Fatalf("%s: one root %x of %d", name, one, len(want))
				}
			}
		}
		if split < 5 {
			t.Errorf("%s: hardly anything was split", name)
		}
	}
}

func BenchmarkRoot1(b *testing.B) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		name string
		p    int64
		n    int
	}{{"F_2^127", 2, 127}, {"F_3^40", 3, 40}, {"F_p^32 31 bits", 1<<31 - 1, 32}} {
		b.Run(c.name, func(b *testing.B) {
			k := rep.Prime(big.NewInt(c.p))
			m := poly.FindIrreducible(w, k, c.n)
			L := rep.Extend(w, k, m)
			f, e := new(poly.Poly), make(poly.Elem, L.Width())
			for i := m.N - 1; i >= 0; i-- {
				L.FromPoly(w, e, poly.Constant(k, poly.Coeff(k, m, i)))
				L.SetCoeff(f, i, e)
			}
			for range b.N {
				poly.Root1(w, L, f)
			}
		})
	}
}
