package field

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// Elem is an element of a finite field: an immutable value.
type Elem struct {
	k *Field
	w poly.Elem
}

// Field is the field the element lies in.
func (a Elem) Field() *Field { return a.k }

// Raw has the words of the element under Field().Arith(). The caller does not
// change them.
func (a Elem) Raw() poly.Elem { return a.w }

// Code is the number of the element: the residue 0..p-1 in a prime field, and
// sum Code(c_i) |K|^i for the coordinates c_i over the base K, constant term
// first. In characteristic 2 it is the bit mask with the constant term lowest.
func (a Elem) Code() *big.Int { return a.k.arith.Code(a.w) }

// Coordinates are the c_i in the base with a = sum c_i g^i for the generator g:
// as many as the degree, constant term first. An element of a prime field is
// its own only coordinate.
func (a Elem) Coordinates() []Elem {
	if a.k.base == nil {
		return []Elem{a}
	}
	f := a.k.ext.ToPoly(a.w)
	c := make([]Elem, a.k.n)
	for i := range c {
		c[i] = a.k.base.Zero()
		a.k.base.arith.Coeff(c[i].w, f, i)
	}
	return c
}

// IsZero says whether a is 0.
func (a Elem) IsZero() bool { return poly.IsZeroElem(a.w) }

// IsOne says whether a is 1.
func (a Elem) IsOne() bool { return poly.EqualElem(a.w, a.k.arith.One()) }

// Equal says whether a and b, of the same field, are equal. Elements of
// different fields are never Equal; see Combine.
func (a Elem) Equal(b Elem) bool { return Same(a.k, b.k) && poly.EqualElem(a.w, b.w) }

// Compare orders elements of one field by their codes.
func Compare(a, b Elem) int { return a.Code().Cmp(b.Code()) }

// meet unwinds with a Mismatch when b is not of the field of a.
func (a Elem) meet(b Elem) {
	if a.k.structure != b.k.structure && !Same(a.k, b.k) {
		algebra.Fail(mismatch(a.k, b.k))
	}
}

// Add is a + b.
func (a Elem) Add(b Elem) Elem {
	a.meet(b)
	z := a.k.Zero()
	a.k.arith.AddElem(z.w, a.w, b.w)
	return z
}

// Sub is a - b.
func (a Elem) Sub(b Elem) Elem {
	a.meet(b)
	z := a.k.Zero()
	a.k.arith.SubElem(z.w, a.w, b.w)
	return z
}

// Neg is -a.
func (a Elem) Neg() Elem {
	z := a.k.Zero()
	a.k.arith.NegElem(z.w, a.w)
	return z
}

// Mul is a b.
func (a Elem) Mul(w *algebra.Work, b Elem) Elem {
	a.meet(b)
	z := a.k.Zero()
	a.k.arith.MulElem(w, z.w, a.w, b.w)
	return z
}

// Inv is 1/a; an error of kind Undefined for 0.
func (a Elem) Inv(w *algebra.Work) (Elem, error) {
	if a.IsZero() {
		return Elem{}, algebra.Errorf(algebra.Undefined, "0 has no inverse")
	}
	z := a.k.Zero()
	a.k.arith.InvElem(w, z.w, a.w)
	return z, nil
}

// Div is a/b; an error of kind Undefined for b = 0.
func (a Elem) Div(w *algebra.Work, b Elem) (Elem, error) {
	a.meet(b)
	if b.IsZero() {
		return Elem{}, algebra.Errorf(algebra.Undefined, "division by zero in a field of %s elements", a.k.orderText())
	}
	z, err := b.Inv(w)
	if err != nil {
		return Elem{}, err
	}
	return a.Mul(w, z), nil
}

// Pow is a^n; 0^0 is 1, and a negative power of 0 is an error of kind
// Undefined. The exponent is taken modulo the order of the multiplicative
// group, so that it may be of any size.
func (a Elem) Pow(w *algebra.Work, n *big.Int) (Elem, error) {
	if a.IsZero() {
		switch n.Sign() {
		case 0:
			return a.k.One(), nil
		case 1:
			return a, nil
		}
		return Elem{}, algebra.Errorf(algebra.Undefined, "0 has no negative powers")
	}
	return a.power(w, new(big.Int).Mod(n, a.k.units())), nil
}

// units is |K| - 1.
func (K *Field) units() *big.Int { return new(big.Int).Sub(K.Order(), big.NewInt(1)) }

// power is a^n for n >= 0, by windows of four bits.
func (a Elem) power(w *algebra.Work, n *big.Int) Elem {
	A := a.k.arith
	k := 4
	if n.BitLen() <= 32 {
		k = 1
	}
	table := make([]poly.Elem, 1<<k)
	table[0] = A.One()
	for i := 1; i < len(table); i++ {
		table[i] = make(poly.Elem, A.Width())
		A.MulElem(w, table[i], table[i-1], a.w)
	}
	z := a.k.Zero()
	copy(z.w, A.One())
	for i := (n.BitLen() - 1) / k * k; i >= 0; i -= k {
		w.Poll()
		digit := 0
		for j := k - 1; j >= 0; j-- {
			A.MulElem(w, z.w, z.w, z.w)
			digit = digit<<1 | int(n.Bit(i+j))
		}
		if digit > 0 {
			A.MulElem(w, z.w, z.w, table[digit])
		}
	}
	return z
}

// Frobenius is a^(p^k); k may be negative, which takes roots.
func (a Elem) Frobenius(w *algebra.Work, k int) Elem {
	z := a.k.Zero()
	a.k.arith.FrobeniusElem(w, z.w, a.w, k)
	return z
}

// degreeOver is the degree of a over the subfield with p^d elements, d a
// divisor of the absolute degree: the number of its conjugates a^(p^(d i)).
func (a Elem) degreeOver(w *algebra.Work, d int) int {
	b := a
	for i := 1; ; i++ {
		w.Poll()
		if b = b.Frobenius(w, d); poly.EqualElem(a.w, b.w) {
			return i
		}
	}
}
