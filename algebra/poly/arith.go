package poly

import (
	"math/big"

	"adjoin/algebra"
)

// Elem is one coefficient on its own: as many words as Arith.Width says. Zero
// is all words zero in every representation.
type Elem = []uint64

// Poly is a dense polynomial with N coefficients, constant term first. The
// leading coefficient is not zero, and the zero polynomial has N == 0.
//
// Over packed bits (Arith.Packed), coefficient i is bit i of W; otherwise it
// is the words [i*Width, (i+1)*Width). W has exactly the words that N
// coefficients need, and bits beyond the last coefficient are zero.
type Poly struct {
	W []uint64
	N int
}

// Degree is the degree of f, and -1 for the zero polynomial.
func (f *Poly) Degree() int { return f.N - 1 }

// IsZero says whether f is the zero polynomial.
func (f *Poly) IsZero() bool { return f.N == 0 }

// Arith is arithmetic in K[x] for one finite field K. Its methods work on
// whole polynomials, so that a call through the interface costs nothing beside
// the work. The receiver is immutable and safe for concurrent use.
//
// A parameter z receives the result and may be an operand of the same call.
type Arith interface {
	// Characteristic is p, Order is q = |K|, Degree is [K : F_p]. Callers do
	// not change the integers.
	Characteristic() *big.Int
	Order() *big.Int
	Degree() int
	// Width is the number of words of an Elem; Packed says that polynomials
	// hold their coefficients as single bits all the same.
	Width() int
	Packed() bool

	// One is the element 1; callers do not change it.
	One() Elem
	// SetInt sets z to the image of an integer.
	SetInt(z Elem, n *big.Int)
	AddElem(z, a, b Elem)
	SubElem(z, a, b Elem)
	NegElem(z, a Elem)
	MulElem(w *algebra.Work, z, a, b Elem)
	// InvElem sets z to 1/a and says whether it could: not for zero.
	InvElem(w *algebra.Work, z, a Elem) bool
	// FrobeniusElem sets z to a^(p^k); k may be negative.
	FrobeniusElem(w *algebra.Work, z, a Elem, k int)
	// Code numbers the elements 0..q-1: the residue for F_p, and for an
	// extension the sum of Code(c_i) |base|^i over the coordinates c_i. It is
	// the canonical order of elements and, in characteristic 2, the mask.
	Code(a Elem) *big.Int
	// FromCode is the inverse of Code; n is taken modulo q.
	FromCode(z Elem, n *big.Int)

	// Coeff sets z to coefficient i of f, which may lie beyond its degree.
	Coeff(z Elem, f *Poly, i int)
	// SetCoeff sets coefficient i of f, which grows or shrinks as needed.
	SetCoeff(f *Poly, i int, a Elem)
	Add(z, f, g *Poly)
	Sub(z, f, g *Poly)
	Neg(z, f *Poly)
	Scale(w *algebra.Work, z, f *Poly, c Elem)
	// AddScaled adds c f to z, which is not f.
	AddScaled(w *algebra.Work, z, f *Poly, c Elem)
	// Slice sets z to the coefficients from..to-1 of f, moved down to 0: f
	// without its terms below x^from, over x^from, modulo x^(to-from).
	Slice(z, f *Poly, from, to int)
	// Shift sets z to x^k f, k >= 0.
	Shift(z, f *Poly, k int)
	// Reverse sets z to x^n f(1/x), n at least the degree of f.
	Reverse(z, f *Poly, n int)
	// Dot sets z to the sum of the products of the coefficients of f and g of
	// equal index: their inner product as vectors.
	Dot(w *algebra.Work, z Elem, f, g *Poly)
	Mul(w *algebra.Work, z, f, g *Poly)
	Sqr(w *algebra.Work, z, f *Poly)
	// DivRem sets q and r (either may be nil) with f = q g + r, deg r < deg g.
	// g is not zero.
	DivRem(w *algebra.Work, q, r, f, g *Poly)
	Derivative(z, f *Poly)
	// FrobeniusCoeffs applies a -> a^(p^k) to every coefficient.
	FrobeniusCoeffs(w *algebra.Work, z, f *Poly, k int)
	// NewModulus prepares for many reductions modulo m, which is not constant.
	NewModulus(w *algebra.Work, m *Poly) Modulus
}

// Modulus is a polynomial prepared for many reductions. It is immutable and
// safe for concurrent use. Operands of products are reduced.
type Modulus interface {
	Poly() *Poly
	Reduce(w *algebra.Work, z, f *Poly)
	MulMod(w *algebra.Work, z, f, g *Poly)
	SqrMod(w *algebra.Work, z, f *Poly)
}
