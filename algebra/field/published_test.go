package field_test

import (
	"fmt"
	"math/big"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// TestByteField has the field of FIPS 197 (Advanced Encryption Standard),
// section 4.2: bytes are codes, bit i the coefficient of x^i.
func TestByteField(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	K := must(field.Adjoin(w, F, field.FromCode(F, big.NewInt(0x11b)), "x"))
	at := func(c int64) field.Elem { return K.Element(big.NewInt(c)) }
	// Section 4.2 and 4.2.1; the inverses: J. Daemen, V. Rijmen, The Design of
	// Rijndael, 2002.
	for _, c := range [][3]int64{{0x57, 0x83, 0xc1}, {0x57, 0x13, 0xfe}, {0x95, 0x8a, 1}, {2, 0x8d, 1}} {
		if got := at(c[0]).Mul(w, at(c[1])); !got.Equal(at(c[2])) {
			t.Errorf("{%x}{%x} = {%x}, published {%x}", c[0], c[1], got.Code(), c[2])
		}
	}
	if n, _, err := K.Generator().Order(w); err != nil || n.Int64() != 51 {
		t.Errorf("order of x: %s, published 51", n)
	}
	if v := must(K.Modulus().IsPrimitive(w)); v.Holds {
		t.Error("x^8+x^4+x^3+x+1 is primitive")
	}
	if v := must(at(3).IsPrimitive(w)); !v.Holds {
		t.Error("{03} is not primitive")
	}
	// The S-box, section 5.1.1: first and last rows of the table.
	rows := map[int64]string{
		0x00: "637c777bf26b6fc53001672bfed7ab76",
		0xf0: "8ca1890dbfe6426841992d0fb054bb16",
	}
	for start, want := range rows {
		got := ""
		for i := range int64(16) {
			b := int64(0)
			if a := at(start + i); !a.IsZero() {
				b = must(a.Inv(w)).Code().Int64()
			}
			s := b ^ rotate(b, 1) ^ rotate(b, 2) ^ rotate(b, 3) ^ rotate(b, 4) ^ 0x63
			got += fmt.Sprintf("%02x", s)
		}
		if got != want {
			t.Errorf("row %x: %s, published %s", start, got, want)
		}
	}
}

func rotate(b int64, k int) int64 { return (b<<k | b>>(8-k)) & 0xff }

// TestGCM has the product of NIST SP 800-38D, section 6.3: F_2[x] modulo
// x^128+x^7+x^2+x+1, where the first (leftmost) bit of a block is the
// coefficient of x^0. The values are test case 2 of D. McGrew, J. Viega, The
// Galois/Counter Mode of Operation, 2005, appendix B.
func TestGCM(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	K := must(field.Adjoin(w, F, fromExponents(F, []int{128, 7, 2, 1, 0}), "x"))
	block := func(s string) field.Elem {
		n, ok := new(big.Int).SetString(s, 16)
		if !ok {
			t.Fatal(s)
		}
		return K.Element(mirror(n, 128))
	}
	h := block("66e94bd4ef8a2c3b884cfa59ca342b2e")
	x := block("0388dace60b6a392f328c2b971b2fe78").Mul(w, h)
	if !x.Equal(block("5e2ec746917062882c85b0685353deb7")) {
		t.Errorf("C H = %032x", mirror(x.Code(), 128))
	}
	y := x.Add(block("00000000000000000000000000000080")).Mul(w, h)
	if !y.Equal(block("f38cbb1ad69223dcc3457ae5b6b0f885")) {
		t.Errorf("GHASH = %032x", mirror(y.Code(), 128))
	}
}

func mirror(n *big.Int, width int) *big.Int {
	z := new(big.Int)
	for i := range width {
		z.SetBit(z, width-1-i, n.Bit(i))
	}
	return z
}

// TestCurveFields has the reduction polynomials of SEC 2: Recommended Elliptic
// Curve Domain Parameters, versions 1.0 and 2.0, section 3, and FIPS 186-4,
// appendix D.1.3.
func TestCurveFields(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	for _, e := range [][]int{
		{113, 9, 0}, {131, 8, 3, 2, 0}, {163, 7, 6, 3, 0}, {193, 15, 0}, {233, 74, 0}, {239, 158, 0}, {283, 12, 7, 5, 0}, {409, 87, 0}, {571, 10, 5, 2, 0},
	} {
		K, err := field.Adjoin(w, F, fromExponents(F, e), "z")
		if err != nil {
			t.Fatal(err)
		}
		// Frobenius to the degree is the identity, and an inverse is one.
		a := K.Generator().Add(K.One())
		if !a.Frobenius(w, e[0]).Equal(a) || !must(a.Inv(w)).Mul(w, a).IsOne() {
			t.Errorf("degree %d", e[0])
		}
	}
}

// TestPrimitivePolynomials has E. J. Watson, Primitive polynomials (mod 2),
// 1962, and P. Alfke, Efficient Shift Registers, LFSR Counters, and Long
// Pseudo-Random Sequence Generators, 1996.
func TestPrimitivePolynomials(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	for _, e := range [][]int{
		{24, 4, 3, 1, 0}, {48, 7, 5, 4, 2, 1, 0}, {100, 8, 7, 2, 0},
		{16, 15, 13, 4, 0}, {32, 22, 2, 1, 0}, {64, 63, 61, 60, 0}, {127, 126, 0}, {128, 126, 101, 99, 0},
	} {
		v, err := fromExponents(F, e).IsPrimitive(w)
		if err != nil || !v.Holds {
			t.Errorf("%v: %v, %v", e, v.Holds, err)
		}
	}
}

// TestPolynomialsByCode has OEIS A014580: the irreducible polynomials over F_2
// as numbers, bit i the coefficient of x^i, below 200.
func TestPolynomialsByCode(t *testing.T) {
	w := algebra.NewWork(nil)
	F := standard(w, 2, 1)
	want := []int64{2, 3, 7, 11, 13, 19, 25, 31, 37, 41, 47, 55, 59, 61, 67, 73, 87, 91, 97, 103, 109, 115, 117, 131, 137, 143, 145, 157, 167, 171, 185, 191, 193}
	var got []int64
	for n := 1; n <= 7; n++ {
		for f := range field.IrreduciblePolynomials(w, F, n) {
			if c := f.Code().Int64(); c < 200 {
				got = append(got, c)
			}
		}
	}
	if fmt.Sprint(got) != fmt.Sprint(want) {
		t.Errorf("%v", got)
	}
}

// TestTower has the tower of A. Satoh, S. Morioka, K. Takano, S. Munetoh, A
// compact Rijndael hardware architecture with S-box optimization, 2001:
// F_4 = F_2(u), F_16 = F_4(v), F_256 = F_16(y) with u^2 = u + 1, v^2 = v + u,
// y^2 = y + (u + 1) v.
func TestTower(t *testing.T) {
	w := algebra.NewWork(nil)
	A := adjoin(w, standard(w, 2, 1), "u", 1, 1, 1)
	u := A.Generator()
	B := must(field.Adjoin(w, A, field.NewPolynomial(A, []field.Elem{u, A.One(), A.One()}), "v"))
	v := B.Generator()
	c := must(field.Embed(w, A, B)).Apply(w, u.Add(A.One())).Mul(w, v)
	C, err := field.Adjoin(w, B, field.NewPolynomial(B, []field.Elem{c, B.One(), B.One()}), "y")
	if err != nil || C.AbsoluteDegree() != 8 || C.Base() != B {
		t.Fatalf("the tower: %v", err)
	}
	// Inverses agree with those of the byte field along an isomorphism.
	F := standard(w, 2, 1)
	K := must(field.Adjoin(w, F, field.FromCode(F, big.NewInt(0x11b)), "x"))
	m := must(field.Isomorphism(w, K, C))
	for a := range K.All {
		if !a.IsZero() && !m.Apply(w, must(a.Inv(w))).Equal(must(m.Apply(w, a).Inv(w))) {
			t.Errorf("the inverse of %s", a)
		}
	}
}
