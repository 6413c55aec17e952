package poly

import (
	"math/big"

	"adjoin/algebra"
)

// References:
//
//	[BK] R. Brent, H. Kung, Fast algorithms for manipulating formal power
//	  series, 1978: composition modulo a polynomial.
//	[vzGS] J. von zur Gathen, V. Shoup, Computing Frobenius maps and factoring
//	  polynomials, 1992.

// PowMod is f^e modulo m, e >= 0.
func PowMod(w *algebra.Work, A Arith, f *Poly, e *big.Int, m *Poly) *Poly {
	if m.N == 1 {
		return new(Poly)
	}
	r := new(Poly)
	A.DivRem(w, nil, r, f, m)
	return powModulus(w, A, A.NewModulus(w, m), r, e)
}

// powModulus is f^e, f reduced, with windows of four bits for long exponents.
func powModulus(w *algebra.Work, A Arith, M Modulus, f *Poly, e *big.Int) *Poly {
	k := 4
	if e.BitLen() <= 32 {
		k = 1
	}
	table := []*Poly{One(A), f}
	for i := 2; i < 1<<k; i++ {
		t := new(Poly)
		M.MulMod(w, t, table[i-1], f)
		table = append(table, t)
	}
	if e.Sign() == 0 {
		return One(A)
	}
	var z *Poly
	for i := (e.BitLen() - 1) / k * k; i >= 0; i -= k {
		w.Poll()
		digit := 0
		for j := k - 1; j >= 0; j-- {
			digit = digit<<1 | int(e.Bit(i+j))
		}
		if z == nil { // the leading digit
			z = Clone(table[digit])
			continue
		}
		for range k {
			M.SqrMod(w, z, z)
		}
		if digit > 0 {
			M.MulMod(w, z, z, table[digit])
		}
	}
	return z
}

// Composer composes with one fixed polynomial g modulo M: f -> f(g) mod M, by
// [BK] with the powers of g kept.
type Composer struct {
	A      Arith
	M      Modulus
	powers []*Poly // g^0 ... g^s
}

// NewComposer prepares composition with g, reduced, of polynomials of degree
// below n.
func NewComposer(w *algebra.Work, A Arith, M Modulus, g *Poly, n int) *Composer {
	s := 1
	for s*s < n {
		s++
	}
	c := &Composer{A, M, []*Poly{One(A), Clone(g)}}
	for i := 2; i <= s; i++ {
		w.Poll()
		t := new(Poly)
		M.MulMod(w, t, c.powers[i-1], g)
		c.powers = append(c.powers, t)
	}
	return c
}

// Apply is f(g) mod M.
func (c *Composer) Apply(w *algebra.Work, f *Poly) *Poly {
	s := len(c.powers) - 1
	z, e := new(Poly), make(Elem, c.A.Width())
	for i := (f.N - 1) / s; i >= 0; i-- {
		w.Poll()
		c.M.MulMod(w, z, z, c.powers[s])
		for j := range s {
			if i*s+j >= f.N {
				break
			}
			c.A.Coeff(e, f, i*s+j)
			c.A.AddScaled(w, z, c.powers[j], e)
		}
	}
	return z
}

// ComposeMod is f(g) modulo m.
func ComposeMod(w *algebra.Work, A Arith, f, g, m *Poly) *Poly {
	if m.N == 1 {
		return new(Poly)
	}
	r := new(Poly)
	A.DivRem(w, nil, r, g, m)
	return NewComposer(w, A, A.NewModulus(w, m), r, f.N).Apply(w, f)
}

// FrobeniusMod is x^q modulo m.
func FrobeniusMod(w *algebra.Work, A Arith, m *Poly) *Poly {
	return PowMod(w, A, X(A), A.Order(), m)
}

// frobenius computes the powers x^(q^k) modulo M.
type frobenius struct {
	A     Arith
	M     Modulus
	x     *Poly
	xq    *Poly // x^q, or nil as long as nothing needs it
	cheap bool  // raising to the q-th power costs less than a composition
	comp  *Composer
}

func newFrobenius(w *algebra.Work, A Arith, f *Poly) *frobenius {
	z := &frobenius{A: A, M: A.NewModulus(w, f), x: new(Poly)}
	A.DivRem(w, nil, z.x, X(A), f)
	s := 1
	for s*s < f.N {
		s++
	}
	z.cheap = A.Order().BitLen() <= max(3, s/2)
	return z
}

// modulo is the same for a divisor g of the modulus.
func (z *frobenius) modulo(w *algebra.Work, g *Poly) *frobenius {
	y := newFrobenius(w, z.A, g)
	if z.xq != nil {
		y.xq = new(Poly)
		y.M.Reduce(w, y.xq, z.xq)
	}
	return y
}

// first is x^q.
func (z *frobenius) first(w *algebra.Work) *Poly {
	if z.xq == nil {
		z.xq = powModulus(w, z.A, z.M, z.x, z.A.Order())
	}
	return z.xq
}

// next is h^q, for h reduced: h(x^q).
func (z *frobenius) next(w *algebra.Work, h *Poly) *Poly {
	if z.cheap {
		return powModulus(w, z.A, z.M, h, z.A.Order())
	}
	if z.comp == nil {
		z.comp = NewComposer(w, z.A, z.M, z.first(w), z.M.Poly().N)
	}
	return z.comp.Apply(w, h)
}

// power is x^(q^k).
func (z *frobenius) power(w *algebra.Work, k int) *Poly {
	if z.cheap {
		h := z.x
		for range k {
			w.Poll()
			h = z.next(w, h)
		}
		return h
	}
	// h is x^(q^i) for the leading bits i of k.
	h := z.x
	for b := 62; b >= 0; b-- {
		if k>>b == 0 {
			continue
		}
		if h == z.x {
			h = z.first(w)
			continue
		}
		h = NewComposer(w, z.A, z.M, h, z.M.Poly().N).Apply(w, h)
		if k>>b&1 == 1 {
			h = z.next(w, h)
		}
	}
	return h
}
