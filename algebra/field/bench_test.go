package field_test

import (
	"math/big"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/poly"
)

// BenchmarkSubfields makes F_{2^60} and all its subfields with nothing known
// before.
func BenchmarkSubfields(b *testing.B) {
	for _, c := range []struct {
		name string
		p    int64
		n    int
	}{{"2^60", 2, 60}, {"3^60", 3, 60}, {"2^210", 2, 210}, {"10007^12", 10007, 12}} {
		b.Run(c.name, func(b *testing.B) {
			w := algebra.NewWork(nil)
			P := standard(w, c.p, 1)
			for b.Loop() {
				L := field.StandardOver(w, field.Fresh(P), c.n)
				for d := 1; d <= c.n; d++ {
					if c.n%d == 0 {
						must(field.StandardMap(w, field.StandardOver(w, L.PrimeField(), d), L))
					}
				}
			}
		})
	}
}

func BenchmarkOrder(b *testing.B) {
	w := algebra.NewWork(nil)
	for name, K := range map[string]*field.Field{"2^127": standard(w, 2, 127), "3^60": standard(w, 3, 60)} {
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				if _, _, err := K.Generator().Order(w); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkMinimalPolynomial(b *testing.B) {
	w := algebra.NewWork(nil)
	for name, K := range map[string]*field.Field{"2^60": standard(w, 2, 60), "3^60": standard(w, 3, 60)} {
		for _, d := range []int{1, 2} {
			S := must(field.Standard(w, K.Characteristic(), d))
			b.Run(name+" over degree "+big.NewInt(int64(d)).String(), func(b *testing.B) {
				for b.Loop() {
					must(K.Generator().MinimalPolynomial(w, S))
				}
			})
		}
	}
}

// BenchmarkStandardize joins a user's presentation to the standard field.
func BenchmarkStandardize(b *testing.B) {
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		name string
		p    int64
		n    int
	}{{"2^60", 2, 60}, {"2^128", 2, 128}, {"3^60", 3, 60}} {
		F := standard(w, c.p, 1)
		standard(w, c.p, c.n)
		f := field.FromPoly(F, poly.FindIrreducible(w, F.Arith(), c.n))
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				must(field.Standardize(w, must(field.Adjoin(w, F, f, "a"))))
			}
		})
	}
}
