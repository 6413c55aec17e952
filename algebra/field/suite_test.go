package field_test

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// must stops the test on an error.
func must[T any](x T, err error) T {
	if err != nil {
		panic(err)
	}
	return x
}

func standard(w *algebra.Work, p int64, n int) *field.Field {
	return must(field.Standard(w, big.NewInt(p), n))
}

// adjoin is base(name) with a root of the polynomial with the given integer
// coefficients, constant term first.
func adjoin(w *algebra.Work, base *field.Field, name string, c ...int64) *field.Field {
	return must(field.Adjoin(w, base, field.FromInts(base, c...), name))
}

// above is base(name) with a root of the first irreducible polynomial of
// degree n that has the given least code of its lower part.
func above(w *algebra.Work, base *field.Field, name string, n int, least int64) *field.Field {
	q := new(big.Int).Exp(base.Order(), big.NewInt(int64(n)), nil)
	for c := big.NewInt(least); ; c.Add(c, big.NewInt(1)) {
		f := field.FromCode(base, new(big.Int).Add(q, c))
		if f.IsIrreducible(w).Holds {
			return must(field.Adjoin(w, base, f, name))
		}
	}
}

// samples are fields of all kinds: prime, standard inside and outside the
// table, given by a polynomial, and towers.
func samples(w *algebra.Work) map[string]*field.Field {
	F2, F3, F7 := standard(w, 2, 1), standard(w, 3, 1), standard(w, 7, 1)
	B := adjoin(w, F2, "a", 1, 1, 1)
	C := adjoin(w, B, "b", 1, 1, 0, 1)
	q := must(field.Prime(w, new(big.Int).Sub(new(big.Int).Lsh(big.NewInt(1), 89), big.NewInt(1))))
	return map[string]*field.Field{
		"F_2":              F2,
		"F_7":              F7,
		"F_(2^89-1)":       q,
		"F_256":            standard(w, 2, 8),
		"F_(2^60)":         standard(w, 2, 60),
		"F_(3^6)":          standard(w, 3, 6),
		"F_(5^9)":          standard(w, 5, 9),
		"F_(1009^4)":       standard(w, 1009, 4),
		"byte field":       adjoin(w, F2, "a", 1, 1, 0, 1, 1, 0, 0, 0, 1),
		"F_4(b), degree 3": C,
		"F_64(c)":          above(w, C, "c", 2, 40),
		"F_3(i)(d)":        above(w, adjoin(w, F3, "i", 1, 0, 1), "d", 3, 11),
		"degree 1 over F7": adjoin(w, F7, "e", 4, 1),
		"(2^89-1)^2":       above(w, q, "u", 2, 3),
	}
}

// element is a random element of K, often one at an edge.
func element(r *rand.Rand, K *field.Field) field.Elem {
	switch r.IntN(8) {
	case 0:
		return K.Zero()
	case 1:
		return K.One()
	case 2:
		return K.Generator()
	case 3:
		return K.Element(big.NewInt(-1))
	}
	n := new(big.Int)
	for range K.Order().BitLen()/64 + 2 {
		n.Lsh(n, 64).Or(n, new(big.Int).SetUint64(r.Uint64()))
	}
	return K.Element(n)
}

func seeded(t *testing.T, seed uint64) *rand.Rand {
	t.Helper()
	t.Logf("seed %d", seed)
	return rand.New(rand.NewPCG(seed, 1))
}
