package limbs

import (
	"math/big"
	"math/rand/v2"
	"testing"
)

func moduli() []*big.Int {
	var list []*big.Int
	for _, s := range []string{
		"0xffffffffffffffc5",                 // 2^64 - 59
		"0xffffffffffffffffffffffffffffff61", // 2^128 - 159
		"0x800000000000001d",
		"0x1a0111ea397fe69a4b1ba7b6434bacd764774b84f38512bf6730d2a0f6b0f6241eabfffeb153ffffb9feffffffffaaab",
	} {
		n, _ := new(big.Int).SetString(s, 0)
		list = append(list, n)
	}
	n := new(big.Int).Lsh(big.NewInt(1), 521)
	return append(list, n.Sub(n, big.NewInt(1)))
}

func random(r *rand.Rand, p *big.Int) *big.Int {
	n := new(big.Int)
	switch r.IntN(5) {
	case 0:
		return n.Sub(p, big.NewInt(1))
	case 1:
		return n.SetInt64(int64(r.IntN(2)))
	}
	for range p.BitLen()/64 + 2 {
		n.Lsh(n, 64).Or(n, new(big.Int).SetUint64(r.Uint64()))
	}
	return n.Mod(n, p)
}

func TestVectors(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 1))
	for _, p := range moduli() {
		m := New(p)
		k, s := m.K, make([]uint64, m.Scratch()+m.K)
		vector := func(n int) ([]uint64, []*big.Int) {
			v, ints := make([]uint64, n*k), make([]*big.Int, n)
			for i := range ints {
				ints[i] = random(r, p)
				m.Into(v[i*k:(i+1)*k], ints[i], s)
			}
			return v, ints
		}
		check := func(what string, z []uint64, want func(i int) *big.Int) {
			t.Helper()
			for i := range len(z) / k {
				w := want(i)
				if got := m.From(z[i*k:(i+1)*k], s); got.Cmp(w.Mod(w, p)) != 0 {
					t.Fatalf("%s modulo %v: entry %d is %v, want %v", what, p, i, got, w)
				}
			}
		}
		for _, n := range []int{1, 2, 3, 7, 20} {
			a, ai := vector(n)
			b, bi := vector(n)
			c, ci := vector(1)
			z := make([]uint64, n*k)
			m.AddVec(z, a, b)
			check("sum", z, func(i int) *big.Int { return new(big.Int).Add(ai[i], bi[i]) })
			m.SubVec(z, a, b)
			check("difference", z, func(i int) *big.Int { return new(big.Int).Sub(ai[i], bi[i]) })
			m.NegVec(z, a)
			check("negative", z, func(i int) *big.Int { return new(big.Int).Neg(ai[i]) })
			m.ScaleVec(z, a, c, s)
			check("multiple", z, func(i int) *big.Int { return new(big.Int).Mul(ai[i], ci[0]) })
			copy(z, b)
			m.AddScaledVec(z, a, c, s)
			check("sum with multiple", z, func(i int) *big.Int {
				w := new(big.Int).Mul(ai[i], ci[0])
				return w.Add(w, bi[i])
			})
			d, di := vector(n/2 + 1)
			z = make([]uint64, (n+len(di)-1)*k)
			m.Convolve(z, a, d, s)
			check("convolution", z, func(i int) *big.Int {
				w := new(big.Int)
				for j := range ai {
					if l := i - j; l >= 0 && l < len(di) {
						w.Add(w, new(big.Int).Mul(ai[j], di[l]))
					}
				}
				return w
			})
		}
		if m.From(m.One(), s).Cmp(big.NewInt(1)) != 0 {
			t.Fatalf("one modulo %v is wrong", p)
		}
	}
}
