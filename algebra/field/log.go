package field

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
)

// References:
//
//	[PH] S. Pohlig, M. Hellman, An improved algorithm for computing logarithms
//	  over GF(p) and its cryptographic significance, 1978.
//	[Sh] D. Shanks, Class number, a theory of factorization, and genera, 1971:
//	  baby steps and giant steps.

// MaxLogPrime bounds the primes in the order of the base of a logarithm, in
// bits; MaxBabySteps bounds the table.
const (
	MaxLogPrime  = 44
	MaxBabySteps = 1 << 20
)

// Log is the discrete logarithm of a to base g: the least n >= 0 with g^n = a.
// It is an error of kind Undefined when a is not a power of g, and of kind
// Unable when the order of g has a prime factor of more than MaxLogPrime bits
// or one that is not known.
func (a Elem) Log(w *algebra.Work, g Elem) (n *big.Int, err error) {
	defer algebra.Catch(&err)
	g.meet(a)
	if a.IsZero() || g.IsZero() {
		return nil, algebra.Errorf(algebra.Undefined, "0 is not in the multiplicative group: it has no logarithm and is no base of one")
	}
	order, _, err := g.Order(w)
	if err != nil {
		return nil, err
	}
	if !a.power(w, order).IsOne() {
		return nil, algebra.Errorf(algebra.Undefined, "%s is not a power of %s, whose order is %s", a, g, order)
	}
	n, m := new(big.Int), big.NewInt(1) // n modulo m so far
	for _, q := range integer.FactorPower(w, a.k.p, g.degreeOver(w, 1)).Primes {
		e := 0
		part := big.NewInt(1)
		for t := new(big.Int).Set(order); new(big.Int).Mod(t, q.P).Sign() == 0; t.Div(t, q.P) {
			part.Mul(part, q.P)
			e++
		}
		if e == 0 {
			continue
		}
		if q.P.BitLen() > MaxLogPrime {
			return nil, algebra.Errorf(algebra.Unable, "the order of the base has the prime factor %s, too large for baby steps and giant steps (%d bits at most)", q.P, MaxLogPrime)
		}
		rest := new(big.Int).Div(order, part)
		k := logPrimePower(w, a.power(w, rest), g.power(w, rest), q.P, e)
		// n + m t = k modulo part.
		t := new(big.Int).Sub(k, n)
		t.Mul(t, new(big.Int).ModInverse(m, part)).Mod(t, part)
		n.Add(n, t.Mul(t, m))
		m.Mul(m, part)
	}
	return n, nil
}

// logPrimePower is the logarithm of a to base g, of order r^e, digit by digit
// [PH].
func logPrimePower(w *algebra.Work, a, g Elem, r *big.Int, e int) *big.Int {
	top := new(big.Int).Exp(r, big.NewInt(int64(e-1)), nil)
	steps := newSteps(w, g.power(w, top), r)
	inverse, _ := g.Inv(w)
	n, unit := new(big.Int), big.NewInt(1)
	for range e {
		w.Poll()
		// a g^-n has order dividing r^(e-i): its power is the next digit's.
		t := a.Mul(w, inverse.power(w, n))
		d := steps.log(w, t.power(w, new(big.Int).Div(top, unit)))
		n.Add(n, d.Mul(d, unit))
		unit = new(big.Int).Mul(unit, r)
	}
	return n
}

// steps finds logarithms to a base h of prime order r [Sh].
type steps struct {
	baby  map[string]int64 // of h^i, 0 <= i < len
	giant Elem             // h^-len
}

func newSteps(w *algebra.Work, h Elem, r *big.Int) *steps {
	size := new(big.Int).Sqrt(r)
	size.Add(size, big.NewInt(1))
	n := min(size.Int64(), MaxBabySteps)
	s := &steps{baby: make(map[string]int64, n)}
	t := Elem{h.k, append(poly.Elem(nil), h.k.arith.One()...)}
	buf := make([]byte, 0, 8*len(t.w))
	for i := range n {
		w.Poll()
		buf = key(buf[:0], t.w)
		s.baby[string(buf)] = i
		h.k.arith.MulElem(w, t.w, t.w, h.w)
	}
	s.giant, _ = t.Inv(w)
	return s
}

// log is the logarithm of a, a power of the base.
func (s *steps) log(w *algebra.Work, a Elem) *big.Int {
	t := Elem{a.k, append(poly.Elem(nil), a.w...)}
	buf := make([]byte, 0, 8*len(t.w))
	for j := int64(0); ; j++ {
		w.Poll()
		buf = key(buf[:0], t.w)
		if i, ok := s.baby[string(buf)]; ok {
			n := new(big.Int).Mul(big.NewInt(j), big.NewInt(int64(len(s.baby))))
			return n.Add(n, big.NewInt(i))
		}
		a.k.arith.MulElem(w, t.w, t.w, s.giant.w)
	}
}

func key(buf []byte, e poly.Elem) []byte {
	for _, x := range e {
		for i := range 8 {
			buf = append(buf, byte(x>>(8*i)))
		}
	}
	return buf
}
