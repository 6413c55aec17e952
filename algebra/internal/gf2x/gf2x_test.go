package gf2x

import (
	"fmt"
	"math/rand/v2"
	"slices"
	"testing"
)

const guard = 0xdeadbeefcafef00d

// mulSlow is the product bit by bit.
func mulSlow(a, b []uint64) []uint64 {
	z := make([]uint64, len(a)+len(b)+1)
	for i := range 64 * len(b) {
		if b[i/64]>>(i%64)&1 == 1 {
			AddShl(z, a, i)
		}
	}
	return z[:len(a)+len(b)]
}

// random words with long runs and extremes.
func random(r *rand.Rand, n int) []uint64 {
	a := make([]uint64, n)
	for i := range a {
		switch r.IntN(6) {
		case 0:
		case 1:
			a[i] = ^uint64(0)
		case 2:
			a[i] = 1 << r.IntN(64)
		default:
			a[i] = r.Uint64()
		}
	}
	return a
}

func TestMul(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	for _, threshold := range []int{2, KaratsubaThreshold} {
		defer func(old int) { KaratsubaThreshold = old }(KaratsubaThreshold)
		KaratsubaThreshold = threshold
		for m := 1; m <= 130; m++ {
			for _, n := range []int{1, 2, m/3 + 1, (m + 1) / 2, m/2 + 1, m} {
				a, b := random(r, m), random(r, n)
				z := make([]uint64, m+n+1)
				z[m+n] = guard
				scratch := make([]uint64, Scratch(m, n)+1)
				scratch[len(scratch)-1] = guard
				Mul(z[:m+n], a, b, scratch[:len(scratch)-1], func() {})
				if !slices.Equal(z[:m+n], mulSlow(a, b)) {
					t.Fatalf("threshold %d: product of %d and %d words is wrong", threshold, m, n)
				}
				if z[m+n] != guard || scratch[len(scratch)-1] != guard {
					t.Fatalf("product of %d and %d words writes beyond its result", m, n)
				}
			}
		}
	}
}

func TestMul64(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	for range 1000 {
		a, b := random(r, 1), random(r, 1)
		hi, lo := Mul64(a[0], b[0])
		if want := mulSlow(a, b); lo != want[0] || hi != want[1] {
			t.Fatalf("%#x times %#x is %#x %#x, want %#x", a[0], b[0], hi, lo, want)
		}
	}
}

func TestSqr(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	for n := 1; n <= 130; n++ {
		a := random(r, n)
		z := make([]uint64, 2*n)
		Sqr(z, a)
		if !slices.Equal(z, mulSlow(a, a)) {
			t.Fatalf("square of %d words is wrong", n)
		}
		for i, x := range a {
			if uint64(Gather(z[2*i]))|uint64(Gather(z[2*i+1]))<<32 != x {
				t.Fatal("gathering does not undo spreading")
			}
		}
	}
}

func TestDivRem(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 8))
	for range 3000 {
		g := random(r, 1+r.IntN(5))
		d := Degree(g)
		if d < 0 {
			continue
		}
		g = g[:d/64+1]
		f := random(r, 1+r.IntN(9))
		rem := append(slices.Clone(f), guard)
		q := make([]uint64, len(f)+1)
		DivRem(q, rem[:len(f)], g, d)
		if rem[len(f)] != guard {
			t.Fatal("division writes beyond its operand")
		}
		rem = rem[:len(f)]
		if Degree(rem) >= d {
			t.Fatalf("remainder of degree %d by divisor of degree %d", Degree(rem), d)
		}
		back := mulSlow(q, g)
		for i, x := range rem {
			back[i] ^= x
		}
		if !slices.Equal(back[:len(f)], f) || Degree(back[len(f):]) >= 0 {
			t.Fatalf("%x is not quotient times %x plus remainder", f, g)
		}
	}
}

func TestInverse(t *testing.T) {
	r := rand.New(rand.NewPCG(13, 14))
	found := [2]int{}
	for d := 1; d <= 64*4; d++ {
		for range 6 {
			m := random(r, d/64+1)
			m[d/64] = m[d/64]&(1<<(d%64)-1) | 1<<(d%64)
			a := random(r, Words(d))
			if s := d % 64; s > 0 {
				a[len(a)-1] &= 1<<s - 1
			}
			z := append(random(r, Words(d)), guard)
			scratch := append(random(r, InverseScratch(len(m))), guard)
			ok := Inverse(z[:Words(d)], a, m, d, scratch[:len(scratch)-1])
			if z[Words(d)] != guard || scratch[len(scratch)-1] != guard {
				t.Fatal("the inverse writes beyond its result")
			}
			p := mulSlow(z[:Words(d)], a)
			if ok {
				found[1]++
				if Degree(p) >= d {
					DivRem(nil, p, m, d)
				}
				if Degree(p) != 0 {
					t.Fatalf("%x is not the inverse of %x modulo %x", z, a, m)
				}
				continue
			}
			found[0]++
			// Euclid by remainders finds a common factor.
			x, y := slices.Clone(m), slices.Clone(a)
			for Degree(y) >= 0 {
				e := Degree(y)
				DivRem(nil, x, y[:e/64+1], e)
				x, y = y, x
			}
			if Degree(x) < 1 {
				t.Fatalf("%x has an inverse modulo %x", a, m)
			}
		}
	}
	if found[0] < 100 || found[1] < 100 {
		t.Fatalf("one side of the test was hardly met: %v", found)
	}
}

func TestShift(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 10))
	for range 3000 {
		a, k := random(r, 1+r.IntN(5)), r.IntN(200)
		up := make([]uint64, len(a)+k/64+1)
		AddShl(up, a, k)
		z := make([]uint64, len(up))
		copy(z, a)
		Shl(z, z[:len(a)], k)
		if !slices.Equal(z, up) {
			t.Fatalf("shifting up by %d is wrong", k)
		}
		Shr(z, z, k)
		if !slices.Equal(z[:len(a)], a) {
			t.Fatalf("shifting down by %d does not undo shifting up", k)
		}
	}
}

func BenchmarkMul(b *testing.B) {
	r := rand.New(rand.NewPCG(11, 12))
	for _, n := range []int{1, 2, 4, 9, 16, 64, 256, 1024} {
		x, y, z, s := random(r, n), random(r, n), make([]uint64, 2*n), make([]uint64, Scratch(n, n))
		b.Run(fmt.Sprintf("words=%d", n), func(b *testing.B) {
			for range b.N {
				Mul(z, x, y, s, nil)
			}
		})
	}
}
