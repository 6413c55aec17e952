package poly_test

import (
	"fmt"
	"math/big"
	"slices"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

// bits is the polynomial over F_2 with these exponents and the term 1.
func bits(exponents ...int) *poly.Poly {
	A := prime(2)
	f := poly.One(A)
	for _, e := range exponents {
		A.Add(f, f, poly.Monomial(A, A.One(), e))
	}
	return f
}

// primesOf gives the primes of q^d - 1.
func primesOf(q int64) poly.Primes {
	return func(d int) ([]*big.Int, bool) {
		f := integer.FactorPower(algebra.NewWork(nil), big.NewInt(q), d)
		return f.Distinct(), f.Complete()
	}
}

// G. Seroussi, Table of Low-Weight Binary Irreducible Polynomials,
// Hewlett-Packard Laboratories report HPL-98-135, 1998.
func TestLowWeight(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	for _, e := range [][]int{
		{2, 1}, {3, 1}, {4, 1}, {5, 2}, {6, 1}, {7, 1}, {8, 4, 3, 1}, {9, 1}, {10, 3}, {11, 2}, {12, 3}, {13, 4, 3, 1},
		{14, 5}, {15, 1}, {16, 5, 3, 1}, {17, 3}, {18, 3}, {19, 5, 2, 1}, {20, 3}, {21, 2}, {22, 1}, {23, 5},
		{24, 4, 3, 1}, {25, 3}, {26, 4, 3, 1}, {27, 5, 2, 1}, {28, 1}, {29, 2}, {30, 1}, {31, 3}, {32, 7, 3, 2},
		{33, 10}, {34, 7}, {35, 2}, {36, 9}, {37, 6, 4, 1}, {38, 6, 5, 1}, {39, 4}, {40, 5, 4, 3}, {64, 4, 3, 1},
		{96, 10, 9, 6}, {113, 9}, {127, 1}, {128, 7, 2, 1}, {131, 8, 3, 2}, {163, 7, 6, 3}, {191, 9}, {192, 7, 2, 1},
		{256, 10, 5, 2}, {283, 12, 7, 5}, {384, 12, 3, 2}, {512, 8, 5, 2},
	} {
		if f := poly.FindIrreducible(w, A, e[0]); !poly.Equal(f, bits(e...)) {
			t.Errorf("degree %d: %x, want %v", e[0], f.W, e)
		}
	}
}

// The n <= 600 with x^n + x + 1 irreducible over F_2: On-Line Encyclopedia of
// Integer Sequences, A002475.
func TestTrinomials(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	var list []int
	for n := 2; n <= 600; n++ {
		if testing.Short() && n > 100 {
			break
		}
		f := bits(n, 1)
		if poly.IsIrreducible(w, A, f).Holds {
			list = append(list, n)
		}
	}
	want := []int{2, 3, 4, 6, 7, 9, 15, 22, 28, 30, 46, 60, 63, 127, 153, 172, 303, 471, 532}
	if !slices.Equal(list, want[:len(list)]) || !testing.Short() && len(list) < len(want) {
		t.Errorf("%v, want %v", list, want)
	}
}

// The k <= n/2 with x^n + x^k + 1 primitive, which for these n is irreducible:
// N. Zierler, Primitive trinomials whose degree is a Mersenne exponent, 1969.
func TestPrimitiveTrinomials(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	for n, want := range map[int][]int{89: {38}, 127: {1, 7, 15, 30, 63}, 521: {32, 48, 158, 168}} {
		if testing.Short() && n > 200 {
			continue
		}
		var list []int
		for k := 1; k <= n/2; k++ {
			if poly.IsIrreducible(w, A, bits(n, k)).Holds {
				list = append(list, k)
			}
		}
		if !slices.Equal(list, want) {
			t.Errorf("degree %d: %v, want %v", n, list, want)
		}
	}
}

// Irreducible and primitive polynomials over F_2, coefficient i being bit i:
// On-Line Encyclopedia of Integer Sequences, A014580 below 200 and A091250
// below 140.
func TestLists(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	var irreducible, primitive []int
	for code := 2; code < 200; code++ {
		f := new(poly.Poly)
		for i := range 8 {
			if code>>i&1 == 1 {
				A.SetCoeff(f, i, A.One())
			}
		}
		if poly.IsIrreducible(w, A, f).Holds {
			irreducible = append(irreducible, code)
		}
		if code < 140 && poly.IsPrimitive(w, A, f, primesOf(2)).Holds {
			primitive = append(primitive, code)
		}
	}
	if want := []int{2, 3, 7, 11, 13, 19, 25, 31, 37, 41, 47, 55, 59, 61, 67, 73, 87, 91, 97, 103, 109, 115, 117, 131, 137, 143, 145, 157, 167, 171, 185, 191, 193}; !slices.Equal(irreducible, want) {
		t.Errorf("irreducible: %v, want %v", irreducible, want)
	}
	if want := []int{3, 7, 11, 13, 19, 25, 37, 41, 47, 55, 59, 61, 67, 91, 97, 103, 109, 115, 131, 137}; !slices.Equal(primitive, want) {
		t.Errorf("primitive: %v, want %v", primitive, want)
	}
}

// E. J. Watson, Primitive polynomials (mod 2), 1962.
func TestPrimitive(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	for _, e := range [][]int{{24, 4, 3, 1}, {48, 7, 5, 4, 2, 1}, {100, 8, 7, 2}} {
		if v := poly.IsPrimitive(w, A, bits(e...), primesOf(2)); !v.Holds || v.Evidence.Standing != algebra.Proved {
			t.Errorf("%v: %v", e, v)
		}
	}
}

// Generators of cyclic redundancy checks: IEEE 802.3, ITU-T V.41, RFC 4880
// section 6.1, USB 2.0 section 8.3.5, for the polynomials. The degrees and
// orders are common knowledge, no source.
func TestCyclicCodes(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	for _, c := range []struct {
		exponents, degrees []int
		order              int64
	}{
		{[]int{32, 26, 23, 22, 16, 12, 11, 10, 8, 7, 5, 4, 2, 1}, []int{32}, 4294967295},
		{[]int{16, 12, 5}, []int{1, 15}, 32767},
		{[]int{16, 15, 2}, []int{1, 15}, 32767},
		{[]int{24, 23, 18, 17, 14, 11, 10, 7, 6, 5, 4, 3, 1}, []int{1, 23}, 8388607},
		{[]int{5, 2}, []int{5}, 31},
	} {
		f := bits(c.exponents...)
		_, list := poly.Factorize(w, A, f)
		var degrees []int
		for _, g := range list {
			for range g.E {
				degrees = append(degrees, g.F.Degree())
			}
		}
		order, exact := poly.Order(w, A, f, primesOf(2))
		if !slices.Equal(degrees, c.degrees) || !exact || order.Int64() != c.order {
			t.Errorf("%v: degrees %v, order %v; want %v, %d", c.exponents, degrees, order, c.degrees, c.order)
		}
	}
}

// The orders of the 30 irreducible polynomials of degree 8 over F_2: phi(e)/8
// of them have order e (R. Lidl, H. Niederreiter, Finite Fields, theorem 3.5).
func TestOrdersOfDegree8(t *testing.T) {
	w, A := algebra.NewWork(nil), prime(2)
	count := map[int64]int{}
	for code := range 256 {
		f := poly.Monomial(A, A.One(), 8)
		for i := range 8 {
			if code>>i&1 == 1 {
				A.SetCoeff(f, i, A.One())
			}
		}
		if poly.IsIrreducible(w, A, f).Holds {
			n, _ := poly.Order(w, A, f, primesOf(2))
			count[n.Int64()]++
		}
	}
	if fmt.Sprint(count) != "map[17:2 51:4 85:8 255:16]" {
		t.Error(count)
	}
}

// aes is the field of FIPS 197, section 4.2.
func aes() (poly.Arith, func(int64) poly.Elem) {
	A := rep.Extend(algebra.NewWork(nil), prime(2), bits(8, 4, 3, 1))
	return A, func(n int64) poly.Elem {
		e := make(poly.Elem, A.Width())
		A.FromCode(e, big.NewInt(n))
		return e
	}
}

// The substitution of FIPS 197, section 5.1.1, as a polynomial: J. Daemen, V.
// Rijmen, The Design of Rijndael, 2002, its algebraic expression.
func TestInterpolateSubstitution(t *testing.T) {
	w := algebra.NewWork(nil)
	A, elem := aes()
	at, values := make([]poly.Elem, 256), make([]poly.Elem, 256)
	for i := range at {
		at[i] = elem(int64(i))
		inv := elem(0)
		A.InvElem(w, inv, at[i])
		b := A.Code(inv).Int64() // 0 stays 0
		s := int64(0x63)
		for k := range 5 { // b and its rotations by 1, 2, 3, 4
			s ^= (b<<k | b>>(8-k)) & 255
		}
		values[i] = elem(s)
	}
	for i, s := range []int64{0x63, 0x7c, 0x77, 0x7b, 0xf2, 0x6b, 0x6f, 0xc5} {
		if A.Code(values[i]).Int64() != s {
			t.Fatalf("entry %d is %x, want %x", i, A.Code(values[i]), s)
		}
	}
	f, ok := poly.Interpolate(w, A, at, values)
	want := map[int]int64{0: 0x63, 127: 0x8f, 191: 0xb5, 223: 0x01, 239: 0xf4, 247: 0x25, 251: 0xf9, 253: 0x09, 254: 0x05}
	for i := range 256 {
		if !ok || A.Code(poly.Coeff(A, f, i)).Int64() != want[i] {
			t.Errorf("coefficient %d is %x, want %x", i, A.Code(poly.Coeff(A, f, i)), want[i])
		}
	}
}

// FIPS 197, sections 4.3 and 5.3.3: {03}y^3+{01}y^2+{01}y+{02} and
// {0b}y^3+{0d}y^2+{09}y+{0e} are inverse modulo y^4+1.
func TestInverseModulo(t *testing.T) {
	w := algebra.NewWork(nil)
	A, elem := aes()
	f := poly.FromElems(A, []poly.Elem{elem(2), elem(1), elem(1), elem(3)})
	g := poly.FromElems(A, []poly.Elem{elem(0xe), elem(9), elem(0xd), elem(0xb)})
	m := poly.FromInts(A, 1, 0, 0, 0, 1)
	if h, ok := poly.InvMod(w, A, f, m); !ok || !poly.Equal(h, g) {
		t.Errorf("the inverse is %x, want %x", h, g)
	}
}
