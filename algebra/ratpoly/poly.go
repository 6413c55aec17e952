package ratpoly

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/integer"
)

// Poly is a polynomial over Q: integer coefficients c, constant term first,
// over a common denominator d > 0. The leading coefficient is not zero, and d
// is 1 unless that is the least denominator. The zero value is the zero
// polynomial. Nobody changes the integers of a Poly once it is made.
type Poly struct {
	c []*big.Int
	d *big.Int // nil is 1
}

var (
	zero = new(big.Int)
	one  = big.NewInt(1)
)

// MostBits is the largest size of a result, in bits of all its coefficients:
// a computation that would pass it ends at once with an error of kind
// TooLarge.
const MostBits = 1 << 31

// limit refuses n coefficients of the given length when they pass MostBits.
func limit(n, bits int) {
	if float64(n)*float64(bits) > MostBits {
		algebra.Fail(algebra.Errorf(algebra.TooLarge,
			"a result of %d coefficients with up to %d bits each passes the limit of %d bits", n, bits, MostBits))
	}
}

// New is the polynomial with these coefficients, constant term first.
func New(coeffs []*big.Rat) Poly {
	d := big.NewInt(1)
	for _, q := range coeffs {
		g := new(big.Int).GCD(nil, nil, d, q.Denom())
		d = new(big.Int).Mul(d, g.Div(q.Denom(), g))
	}
	c := make([]*big.Int, len(coeffs))
	for i, q := range coeffs {
		c[i] = new(big.Int).Div(d, q.Denom())
		c[i].Mul(c[i], q.Num())
	}
	return over(c, d)
}

// FromInts is the polynomial with these integer coefficients, constant term
// first.
func FromInts(coeffs ...int64) Poly {
	c := make([]*big.Int, len(coeffs))
	for i, x := range coeffs {
		c[i] = big.NewInt(x)
	}
	return over(c, one)
}

// over is c/d in lowest terms. It may keep c.
func over(c []*big.Int, d *big.Int) Poly {
	for len(c) > 0 && c[len(c)-1].Sign() == 0 {
		c = c[:len(c)-1]
	}
	if len(c) == 0 || d.Cmp(one) == 0 {
		return Poly{c, nil}
	}
	g := new(big.Int).Set(d)
	for _, x := range c {
		if g.GCD(nil, nil, g, new(big.Int).Abs(x)); g.Cmp(one) == 0 {
			return Poly{c, d}
		}
	}
	z := make([]*big.Int, len(c))
	for i, x := range c {
		z[i] = new(big.Int).Quo(x, g)
	}
	return Poly{z, g.Quo(d, g)}
}

func (f Poly) den() *big.Int {
	if f.d == nil {
		return one
	}
	return f.d
}

// X is x.
func X() Poly { return Monomial(1) }

// Monomial is x^n.
func Monomial(n int) Poly {
	limit(n, 64)
	c := make([]*big.Int, n+1)
	for i := range n {
		c[i] = zero
	}
	c[n] = one
	return Poly{c, nil}
}

// Constant is the constant q.
func Constant(q *big.Rat) Poly { return New([]*big.Rat{q}) }

// Cyclotomic is the n-th cyclotomic polynomial.
func Cyclotomic(w *algebra.Work, n int) Poly {
	w.Poll()
	limit(integer.EulerPhiInt(n), 64)
	return over(integer.Cyclotomic(n), one)
}

// Coefficients is the list of coefficients, constant term first.
func (f Poly) Coefficients() []*big.Rat {
	list := make([]*big.Rat, len(f.c))
	for i, x := range f.c {
		list[i] = new(big.Rat).SetFrac(x, f.den())
	}
	return list
}

// Coefficient is the coefficient of x^i.
func (f Poly) Coefficient(i int) *big.Rat {
	if i >= len(f.c) {
		return new(big.Rat)
	}
	return new(big.Rat).SetFrac(f.c[i], f.den())
}

// Degree is the degree, -1 for zero.
func (f Poly) Degree() int { return len(f.c) - 1 }

// IsZero says whether f is zero.
func (f Poly) IsZero() bool { return len(f.c) == 0 }

// IsIntegral says whether all coefficients are integers.
func (f Poly) IsIntegral() bool { return f.d == nil || f.d.Cmp(one) == 0 }

// Equal says whether f = g.
func (f Poly) Equal(g Poly) bool {
	if len(f.c) != len(g.c) || f.den().Cmp(g.den()) != 0 {
		return false
	}
	for i, x := range f.c {
		if x.Cmp(g.c[i]) != 0 {
			return false
		}
	}
	return true
}

// Add is f + g.
func (f Poly) Add(g Poly) Poly { return f.combine(g, (*big.Int).Add) }

// Sub is f - g.
func (f Poly) Sub(g Poly) Poly { return f.combine(g, (*big.Int).Sub) }

func (f Poly) combine(g Poly, op func(z, x, y *big.Int) *big.Int) Poly {
	c := make([]*big.Int, max(len(f.c), len(g.c)))
	for i := range c {
		x, y := zero, zero
		if i < len(f.c) {
			x = f.c[i]
		}
		if i < len(g.c) {
			y = g.c[i]
		}
		if f.den() != g.den() {
			x, y = new(big.Int).Mul(x, g.den()), new(big.Int).Mul(y, f.den())
		}
		c[i] = op(new(big.Int), x, y)
	}
	if f.den() == g.den() {
		return over(c, f.den())
	}
	return over(c, new(big.Int).Mul(f.den(), g.den()))
}

// Neg is -f.
func (f Poly) Neg() Poly {
	c := make([]*big.Int, len(f.c))
	for i, x := range f.c {
		c[i] = new(big.Int).Neg(x)
	}
	return Poly{c, f.d}
}

// Scale is q f.
func (f Poly) Scale(q *big.Rat) Poly {
	c := make([]*big.Int, len(f.c))
	for i, x := range f.c {
		c[i] = new(big.Int).Mul(x, q.Num())
	}
	return over(c, new(big.Int).Mul(f.den(), q.Denom()))
}

// Mul is f g.
func (f Poly) Mul(w *algebra.Work, g Poly) Poly {
	return over(mul(w, f.c, g.c), new(big.Int).Mul(f.den(), g.den()))
}

// KroneckerThreshold is the number of coefficients of the shorter factor from
// which a product is one product of long integers.
var KroneckerThreshold = 12

// mul is the product of two lists of coefficients.
func mul(w *algebra.Work, a, b []*big.Int) []*big.Int {
	if len(a) == 0 || len(b) == 0 {
		return nil
	}
	w.Poll()
	limit(len(a)+len(b), bits(a)+bits(b))
	if min(len(a), len(b)) >= KroneckerThreshold {
		return mulKronecker(a, b)
	}
	z := make([]*big.Int, len(a)+len(b)-1)
	for i := range z {
		z[i] = new(big.Int)
	}
	t := new(big.Int)
	for i, x := range a {
		if x.Sign() == 0 {
			continue
		}
		w.Poll()
		for j, y := range b {
			if y.Sign() != 0 {
				z[i+j].Add(z[i+j], t.Mul(x, y))
			}
		}
	}
	return z
}

// mulKronecker evaluates at a power of 2^8 beyond all coefficients of the
// product, multiplies, and reads the coefficients off: L. Kronecker, 1882.
func mulKronecker(a, b []*big.Int) []*big.Int {
	size := (bits(a)+bits(b)+big.NewInt(int64(min(len(a), len(b)))).BitLen()+2)/8 + 1
	p := new(big.Int).Mul(pack(a, size), pack(b, size))
	return unpack(p, size, len(a)+len(b)-1)
}

// bits is the greatest length of a coefficient.
func bits(a []*big.Int) int {
	n := 0
	for _, x := range a {
		n = max(n, x.BitLen())
	}
	return n
}

// pack is the value at 2^(8 size).
func pack(a []*big.Int, size int) *big.Int {
	positive, negative := make([]byte, size*len(a)), make([]byte, size*len(a))
	for i, x := range a {
		to := positive
		if x.Sign() < 0 {
			to = negative
		}
		x.FillBytes(to[size*(len(a)-1-i) : size*(len(a)-i)])
	}
	p := new(big.Int).SetBytes(positive)
	return p.Sub(p, new(big.Int).SetBytes(negative))
}

// unpack is the inverse of pack, for n coefficients shorter than 8 size - 1
// bits.
func unpack(p *big.Int, size, n int) []*big.Int {
	buf := new(big.Int).Abs(p).FillBytes(make([]byte, size*n+size))
	base := new(big.Int).Lsh(one, uint(8*size))
	half := new(big.Int).Rsh(base, 1)
	z := make([]*big.Int, n)
	carry := false
	for i := range z {
		x := new(big.Int).SetBytes(buf[size*(n-i) : size*(n-i+1)])
		if carry {
			x.Add(x, one)
		}
		if carry = x.Cmp(half) >= 0; carry {
			x.Sub(x, base)
		}
		if p.Sign() < 0 {
			x.Neg(x)
		}
		z[i] = x
	}
	return z
}

// DivRem is the quotient and the remainder over Q: f = q g + r with deg r <
// deg g. g is not zero.
func (f Poly) DivRem(w *algebra.Work, g Poly) (q, r Poly) {
	if len(f.c) < len(g.c) {
		return Poly{}, f
	}
	// Integer division first: it is exact in the cases people ask about.
	if quo, rem, ok := divInts(w, f.c, g.c); ok {
		return over(quo, one).Scale(new(big.Rat).SetFrac(g.den(), f.den())), over(rem, f.den())
	}
	// lead^k f = q g + r over the integers, and so for any larger power.
	lead := g.c[len(g.c)-1]
	k := len(f.c) - len(g.c) + 1
	limit(len(f.c), k*lead.BitLen()+bits(f.c))
	power := new(big.Int).Exp(lead, big.NewInt(int64(k+k%2)), nil) // positive
	scaled := make([]*big.Int, len(f.c))
	for i, x := range f.c {
		scaled[i] = new(big.Int).Mul(x, power)
	}
	quo, rem, _ := divInts(w, scaled, g.c)
	return over(quo, one).Scale(new(big.Rat).SetFrac(g.den(), new(big.Int).Mul(power, f.den()))),
		over(rem, new(big.Int).Mul(power, f.den()))
}

// PseudoDivRem is the q and the r with lead(g)^(deg f - deg g + 1) f = q g + r
// and deg r < deg g, which are integral when f and g are. When deg f < deg g, q
// is 0 and r is f. g is not zero.
func (f Poly) PseudoDivRem(w *algebra.Work, g Poly) (q, r Poly) {
	k := len(f.c) - len(g.c) + 1
	if k <= 0 {
		return Poly{}, f
	}
	lead := g.Coefficient(g.Degree())
	limit(len(f.c), k*(lead.Num().BitLen()+lead.Denom().BitLen())+bits(f.c))
	e := big.NewInt(int64(k))
	return f.Scale(new(big.Rat).SetFrac(new(big.Int).Exp(lead.Num(), e, nil), new(big.Int).Exp(lead.Denom(), e, nil))).DivRem(w, g)
}

// divInts divides when every coefficient of the quotient is an integer.
func divInts(w *algebra.Work, f, g []*big.Int) (q, r []*big.Int, ok bool) {
	n := len(g) - 1
	lead := g[n]
	r = make([]*big.Int, len(f))
	for i, x := range f {
		r[i] = new(big.Int).Set(x)
	}
	q = make([]*big.Int, len(f)-n)
	var sparse []int // the terms of g below its leading one
	for j, y := range g[:n] {
		if y.Sign() != 0 {
			sparse = append(sparse, j)
		}
	}
	rem, t := new(big.Int), new(big.Int)
	for i := len(f) - 1; i >= n; i-- {
		w.Poll()
		c := new(big.Int)
		if r[i].Sign() != 0 {
			if c.QuoRem(r[i], lead, rem); rem.Sign() != 0 {
				return nil, nil, false
			}
			for _, j := range sparse {
				r[i-n+j].Sub(r[i-n+j], t.Mul(c, g[j]))
			}
		}
		q[i-n] = c
	}
	return q, r[:n], true
}

// Derivative is f'.
func (f Poly) Derivative() Poly {
	if len(f.c) < 2 {
		return Poly{}
	}
	c := make([]*big.Int, len(f.c)-1)
	for i := range c {
		c[i] = new(big.Int).Mul(f.c[i+1], big.NewInt(int64(i+1)))
	}
	return over(c, f.den())
}

// Reverse is x^n f(1/x), n the degree.
func (f Poly) Reverse() Poly {
	c := make([]*big.Int, len(f.c))
	for i, x := range f.c {
		c[len(c)-1-i] = x
	}
	return over(c, f.den())
}

// Content is the positive rational number c with f = c g for a primitive g,
// one with coprime integer coefficients; 0 for zero.
func (f Poly) Content() *big.Rat {
	return new(big.Rat).SetFrac(content(f.c), f.den())
}

func content(c []*big.Int) *big.Int {
	g := new(big.Int)
	for _, x := range c {
		if g.GCD(nil, nil, g, new(big.Int).Abs(x)); g.Cmp(one) == 0 {
			break
		}
	}
	return g
}

// Primitive is f divided by its content and by the sign of its leading
// coefficient.
func (f Poly) Primitive() Poly { return Poly{primitive(f.c), nil} }

func primitive(c []*big.Int) []*big.Int {
	if len(c) == 0 {
		return nil
	}
	g := content(c)
	if c[len(c)-1].Sign() < 0 {
		g.Neg(g)
	}
	z := make([]*big.Int, len(c))
	for i, x := range c {
		z[i] = new(big.Int).Quo(x, g)
	}
	return z
}

// Eval is f(q).
func (f Poly) Eval(w *algebra.Work, q *big.Rat) *big.Rat {
	z := new(big.Rat)
	for i := len(f.c) - 1; i >= 0; i-- {
		w.Poll()
		z.Mul(z, q)
		z.Add(z, new(big.Rat).SetInt(f.c[i]))
	}
	return z.Quo(z, new(big.Rat).SetInt(f.den()))
}

// Compose is f(g).
func (f Poly) Compose(w *algebra.Work, g Poly) Poly {
	if n := f.Degree(); n > 0 {
		limit(n*max(g.Degree(), 0)+1, n*bits(g.c)+bits(f.c))
	}
	var z Poly
	for i := len(f.c) - 1; i >= 0; i-- {
		z = z.Mul(w, g).Add(over([]*big.Int{f.c[i]}, one))
	}
	return z.Scale(new(big.Rat).SetFrac(one, f.den()))
}
