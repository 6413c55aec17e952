package integer

import (
	"math/big"
	"testing"
)

// Lucas's identity Phi_n'(x) = C(x)^2 - n x D(x)^2, at more points than its
// degree.
func TestLucas(t *testing.T) {
	for _, n := range PrimesUpTo(200) {
		c, d := lucas(n)
		k := n
		if n%4 != 1 {
			k = 2 * n
		}
		for x := int64(2); x < int64(EulerPhiInt(k)+4); x++ {
			xb := big.NewInt(x)
			l, r := valueAt(c, xb), valueAt(d, xb)
			l.Mul(l, l)
			r.Mul(r, r).Mul(r, big.NewInt(x*int64(n)))
			if l.Sub(l, r).Cmp(CyclotomicValue(k, xb)) != 0 {
				t.Fatalf("Lucas's identity fails for n = %d at %d", n, x)
			}
		}
	}
}

// Lucas's polynomials for n = 2, 3, 5, 7: R. Brent, On computing factors of
// cyclotomic polynomials, 1993, and J. Brillhart et al., Factorizations of
// b^n +- 1, 3rd edition 2002, III C 2.
func TestLucasKnown(t *testing.T) {
	for n, want := range map[int][2][]int64{
		2: {{1, 1}, {1}},
		3: {{1, 1}, {1}},
		5: {{1, 3, 1}, {1, 1}},
		7: {{1, 3, 3, 1}, {1, 1, 1}},
	} {
		c, d := lucas(n)
		for i, got := range [][]*big.Int{c, d} {
			if len(got) != len(want[i]) {
				t.Fatalf("n = %d: %v %v", n, c, d)
			}
			for k, x := range want[i] {
				if got[k].Int64() != x {
					t.Errorf("n = %d: %v %v", n, c, d)
				}
			}
		}
	}
}

// Where Schinzel's theorem promises two factors: A. Schinzel, On primitive
// prime factors of a^n - b^n, 1962. The one of 2^58 + 1 was found by A.
// Aurifeuille, 1871; Phi_15(5) = 181 * 1741.
func TestAurifeuillian(t *testing.T) {
	for _, p := range []int{2, 3, 5, 7, 11, 13, 17, 19, 23} {
		k := p
		if p%4 != 1 {
			k = 2 * p
		}
		for d := 1; d <= 9*k; d++ {
			pb := big.NewInt(int64(p))
			n := CyclotomicValue(d, pb)
			parts := aurifeuillian(n, pb, d)
			product := big.NewInt(1)
			for _, x := range parts {
				product.Mul(product, x)
			}
			if product.Cmp(n) != 0 {
				t.Fatalf("the parts of Phi_%d(%d) do not multiply to it", d, p)
			}
			// Small values may have a trivial part.
			if promised := d%k == 0 && d/k%2 == 1; promised && d > 12 && len(parts) != 2 || !promised && len(parts) != 1 {
				t.Errorf("Phi_%d(%d) has %d parts", d, p, len(parts))
			}
		}
	}
	parts := aurifeuillian(CyclotomicValue(15, big.NewInt(5)), big.NewInt(5), 15)
	if len(parts) != 2 || parts[0].Int64()*parts[1].Int64() != 181*1741 || parts[0].Int64() != 181 && parts[0].Int64() != 1741 {
		t.Errorf("Phi_15(5) splits into %v", parts)
	}
	// 2^58 + 1 = 536838145 * 536903681, and Phi_116(2) is that over 5.
	parts = aurifeuillian(CyclotomicValue(116, two), two, 116)
	if len(parts) != 2 || parts[0].Int64() != 536838145/5 || parts[1].Int64() != 536903681 {
		t.Errorf("Phi_116(2) splits into %v", parts)
	}
}
