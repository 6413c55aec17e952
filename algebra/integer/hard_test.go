package integer

import (
	"math/big"
	"testing"

	"adjoin/algebra"
)

// Every shipped factor is a number, a prime, and divides where it stands.
func TestHard(t *testing.T) {
	for at, list := range hard {
		p := big.NewInt(int64(at[0]))
		n := CyclotomicValue(at[1], p)
		known := hints(p, at[1])
		if len(known) != len(list) {
			t.Fatalf("Phi_%d(%d): %d factors of %d are read", at[1], at[0], len(known), len(list))
		}
		for _, q := range known {
			if q == nil || !q.ProbablyPrime(20) {
				t.Fatalf("Phi_%d(%d): %v is not prime", at[1], at[0], q)
			}
			if new(big.Int).Mod(n, q).Sign() != 0 {
				t.Errorf("%v does not divide Phi_%d(%d)", q, at[1], at[0])
			}
		}
	}
}

// J. Brillhart et al., Factorizations of b^n +- 1, 3rd edition 2002, table 2-,
// except for 67: F. Cole, On the factoring of large numbers, 1903.
func TestMersenneKnown(t *testing.T) {
	w := algebra.NewWork(nil)
	for n, want := range map[int][]string{
		67:  {"193707721", "761838257287"},
		103: {"2550183799", "3976656429941438590393"},
		109: {"745988807", "870035986098720987332873"},
		113: {"3391", "23279", "65993", "1868569", "1066818132868207"},
		131: {"263", "10350794431055162386718619237468234569"},
		137: {"32032215596496435569", "5439042183600204290159"},
		149: {"86656268566282183151", "8235109336690846723986161"},
		163: {"150287", "704161", "110211473", "27669118297", "36230454570129675721"},
		257: {"535006138814359", "1155685395246619182673033", "374550598501810936581776630096313181393"},
	} {
		f := FactorPower(w, two, n)
		got := f.Distinct()
		if !f.Complete() || len(got) != len(want) {
			t.Fatalf("2^%d - 1: %v", n, f)
		}
		for i, q := range got {
			if q.String() != want[i] {
				t.Errorf("2^%d - 1: factor %v, want %s", n, q, want[i])
			}
		}
	}
	for n := 101; n <= 260; n++ {
		if testing.Short() && n > 130 {
			break
		}
		f := FactorPower(w, two, n)
		m := new(big.Int).Lsh(one, uint(n))
		check(t, m.Sub(m, one), f)
		if !f.Complete() {
			t.Errorf("2^%d - 1 was not factored", n)
		}
	}
}
