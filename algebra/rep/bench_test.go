package rep_test

import (
	"fmt"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

var benched = []string{"F_2", "F_p 31 bits", "F_p 61 bits", "F_p 127 bits", "F_p 521 bits", "F_256", "F_2^11", "F_2^64", "F_2^127", "F_2^571", "F_3^5", "F_3^5 generic", "F_3^9", "F_p^3 31 bits", "((F_4)^3)^2", "generic tower"}

func BenchmarkElem(b *testing.B) {
	w := algebra.NewWork(nil)
	for _, name := range benched {
		A := fields()[name]
		r := rand.New(rand.NewPCG(1, 1))
		x, y, z := poly.RandomElem(A, r), poly.RandomElem(A, r), make(poly.Elem, A.Width())
		b.Run(name+"/multiply", func(b *testing.B) {
			for range b.N {
				A.MulElem(w, z, x, y)
			}
		})
		b.Run(name+"/invert", func(b *testing.B) {
			for range b.N {
				A.InvElem(w, z, x)
			}
		})
		b.Run(name+"/Frobenius", func(b *testing.B) {
			for range b.N {
				A.FrobeniusElem(w, z, x, max(1, A.Degree()/2))
			}
		})
	}
}

func BenchmarkPoly(b *testing.B) {
	w := algebra.NewWork(nil)
	for _, name := range benched {
		A := fields()[name]
		r := rand.New(rand.NewPCG(1, 1))
		n := 64
		f, g, z := poly.Random(A, r, n), poly.Random(A, r, n), new(poly.Poly)
		M := A.NewModulus(w, f)
		M.Reduce(w, g, g)
		b.Run(name+"/multiply", func(b *testing.B) {
			for range b.N {
				A.Mul(w, z, f, g)
			}
		})
		b.Run(name+"/square modulo", func(b *testing.B) {
			for range b.N {
				M.SqrMod(w, z, g)
			}
		})
	}
}

func BenchmarkPackedSquareModulo(b *testing.B) {
	w := algebra.NewWork(nil)
	A := fields()["F_2"]
	for _, n := range []int{1000, 4000, 6000, 8000, 16000, 64000} {
		for _, by := range []string{"division", "inverse"} {
			b.Run(fmt.Sprint(n, " bits by ", by), func(b *testing.B) {
				defer func(old int) { rep.PackedNewton = old }(rep.PackedNewton)
				if rep.PackedNewton = 1 << 62; by == "inverse" {
					rep.PackedNewton = 1
				}
				r := rand.New(rand.NewPCG(1, 1))
				f, m := poly.Random(A, r, n), poly.Random(A, r, n+1)
				A.SetCoeff(m, n, A.One())
				M := A.NewModulus(w, m)
				for range b.N {
					M.SqrMod(w, f, f)
				}
			})
		}
	}
}
