package word

import (
	"math/big"
	"math/rand/v2"
	"testing"
)

var primes = []uint64{3, 5, 7, 251, 65537, 1<<31 - 1, 4294967291, 1<<55 - 55, 1<<56 - 5, 1<<61 - 1, 1<<63 - 25}

// residues with many at the ends of the range.
func residues(r *rand.Rand, n int, p uint64) []uint64 {
	a := make([]uint64, n)
	for i := range a {
		switch r.IntN(5) {
		case 0:
			a[i] = p - 1
		case 1:
			a[i] = uint64(r.IntN(2))
		default:
			a[i] = r.Uint64N(p)
		}
	}
	return a
}

func slow(p uint64, f func(x, y *big.Int) *big.Int, a, b uint64) uint64 {
	z := f(new(big.Int).SetUint64(a), new(big.Int).SetUint64(b))
	return z.Mod(z, new(big.Int).SetUint64(p)).Uint64()
}

func mulBig(x, y *big.Int) *big.Int { return new(big.Int).Mul(x, y) }

func TestVectors(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 1))
	for _, p := range primes {
		m := New(p)
		for n := 0; n <= 130; n++ {
			a, b := residues(r, n, p), residues(r, n, p)
			c := residues(r, 1, p)[0]
			z := make([]uint64, n+1)
			z[n] = 77
			check := func(what string, want func(i int) uint64) {
				t.Helper()
				for i := range n {
					if z[i] != want(i) {
						t.Fatalf("%s modulo %d: entry %d of %d is %d, want %d", what, p, i, n, z[i], want(i))
					}
				}
				if z[n] != 77 {
					t.Fatalf("%s writes beyond its result", what)
				}
			}
			m.AddVec(z[:n], a, b)
			check("sum", func(i int) uint64 {
				return slow(p, func(x, y *big.Int) *big.Int { return x.Add(x, y) }, a[i], b[i])
			})
			m.SubVec(z[:n], a, b)
			check("difference", func(i int) uint64 {
				return slow(p, func(x, y *big.Int) *big.Int { return x.Sub(x, y) }, a[i], b[i])
			})
			m.NegVec(z[:n], a)
			check("negative", func(i int) uint64 {
				return slow(p, func(x, _ *big.Int) *big.Int { return x.Neg(x) }, a[i], 0)
			})
			m.MulVec(z[:n], a, b)
			check("product", func(i int) uint64 { return slow(p, mulBig, a[i], b[i]) })
			m.ScaleVec(z[:n], a, c)
			check("multiple", func(i int) uint64 { return slow(p, mulBig, a[i], c) })
			copy(z, b)
			m.AddScaledVec(z[:n], a, c)
			check("sum with multiple", func(i int) uint64 { return m.Add(b[i], slow(p, mulBig, a[i], c)) })
		}
		for range 200 {
			if a := residues(r, 1, p)[0]; a != 0 && m.Mul(a, m.Inv(a)) != 1 {
				t.Fatalf("the inverse of %d modulo %d is wrong", a, p)
			}
		}
	}
}

func TestConvolve(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 2))
	for _, p := range primes {
		m := New(p)
		for k := 1; k <= 130; k += 1 + k/20 {
			for _, l := range []int{1, 2, k, k/2 + 1} {
				a, b := residues(r, k, p), residues(r, l, p)
				z := make([]uint64, k+l-1)
				m.Convolve(z, a, b)
				want := make([]uint64, len(z))
				for i, x := range a {
					for j, y := range b {
						want[i+j] = m.Add(want[i+j], slow(p, mulBig, x, y))
					}
				}
				for i := range z {
					if z[i] != want[i] {
						t.Fatalf("product of lengths %d and %d modulo %d is wrong at %d", k, l, p, i)
					}
				}
			}
		}
	}
}

func TestKronecker(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 5))
	for _, p := range primes {
		m := New(p)
		for k := 1; k <= 130; k += 1 + k/20 {
			for _, l := range []int{1, 2, k, k/2 + 1} {
				a, b := residues(r, k, p), residues(r, l, p)
				if l == k {
					for i := range a { // the greatest sums
						a[i], b[i] = p-1, p-1
					}
				}
				z, want := make([]uint64, k+l), make([]uint64, k+l-1)
				z[k+l-1] = 77
				m.Kronecker(z[:k+l-1], a, b)
				m.Convolve(want, a, b)
				for i := range want {
					if z[i] != want[i] {
						t.Fatalf("product of lengths %d and %d modulo %d is wrong at %d", k, l, p, i)
					}
				}
				if z[k+l-1] != 77 {
					t.Fatal("the product writes beyond its result")
				}
			}
		}
		a := residues(r, 50, p)
		z, want := make([]uint64, 99), make([]uint64, 99)
		m.Kronecker(z, a, a)
		m.Convolve(want, a, a)
		for i := range want {
			if z[i] != want[i] {
				t.Fatalf("square modulo %d is wrong at %d", p, i)
			}
		}
	}
}

func TestSquare(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 4))
	for _, p := range primes {
		m := New(p)
		for n := 1; n <= 130; n++ {
			a := residues(r, n, p)
			z, want := make([]uint64, 2*n), make([]uint64, 2*n-1)
			z[2*n-1] = 77
			m.Square(z[:2*n-1], a)
			m.Convolve(want, a, a)
			for i := range want {
				if z[i] != want[i] {
					t.Fatalf("square of length %d modulo %d is wrong at %d", n, p, i)
				}
			}
			if z[2*n-1] != 77 {
				t.Fatal("the square writes beyond its result")
			}
		}
	}
}

func TestLongDot(t *testing.T) {
	for _, p := range primes {
		m := New(p)
		n := 1<<16 + 3
		a := make([]uint64, n)
		for i := range a {
			a[i] = p - 1
		}
		if got, want := m.Dot(a, a), uint64(n)%p; got != want {
			t.Fatalf("%d times 1 modulo %d is %d, want %d", n, p, got, want)
		}
	}
}

func BenchmarkConvolve(b *testing.B) {
	r := rand.New(rand.NewPCG(3, 3))
	for _, p := range []uint64{1<<31 - 1, 1<<61 - 1} {
		m := New(p)
		x, y, z := residues(r, 64, p), residues(r, 64, p), make([]uint64, 127)
		b.Run(new(big.Int).SetUint64(p).String(), func(b *testing.B) {
			for range b.N {
				m.Convolve(z, x, y)
			}
		})
	}
}
