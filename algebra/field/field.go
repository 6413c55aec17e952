package field

import (
	"math/big"
	"sync"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

// Field is a finite field in a presentation, with a letter for its generator.
// It is immutable and safe for concurrent use.
type Field struct {
	*structure
	name string
}

// structure is a presentation without the letter; several Fields may share it.
type structure struct {
	p        *big.Int
	prime    *Field // F_p
	base     *Field // nil for F_p
	modulus  *poly.Poly
	arith    poly.Arith
	ext      *rep.Extension // nil for F_p
	n        int            // degree over the base
	absolute int            // degree over F_p
	standard bool
	standing algebra.Evidence // why p is prime
	lattice  *lattice         // of the standard fields; on the prime field only

	mu    sync.Mutex
	fixed *Map // the fixed embedding into the standard field of this degree
}

// Prime is the field F_p. It is an error of kind Invalid when p is not prime.
// A p beyond the reach of a proof is taken when it passes the tests that
// integer.IsPrime states; Standing then says that it is probable.
func Prime(w *algebra.Work, p *big.Int) (*Field, error) {
	if K := knownPrime(p); K != nil {
		return K, nil
	}
	v := integer.IsPrime(w, p)
	if !v.Holds {
		return nil, algebra.Errorf(algebra.Invalid, "there is no field of %s elements with characteristic %s: %s is not prime", p, p, p).
			WithRemedy("take a prime for the characteristic")
	}
	K := &Field{structure: &structure{p: new(big.Int).Set(p), n: 1, absolute: 1, standard: true, standing: v.Evidence}}
	K.prime = K
	K.arith = rep.Prime(K.p)
	K.lattice = newLattice()
	return rememberPrime(K), nil
}

// extend is base(a) with a root of m, which the caller knows to be monic and
// irreducible over base.
func extend(w *algebra.Work, base *Field, m *poly.Poly, standard bool) *Field {
	s := &structure{
		p: base.p, prime: base.prime, base: base, modulus: m,
		n: m.Degree(), absolute: m.Degree() * base.absolute,
		standard: standard, standing: base.standing,
	}
	s.ext = rep.Extend(w, base.arith, m)
	s.arith = s.ext
	return &Field{structure: s}
}

// Characteristic is p. The caller does not change it.
func (K *Field) Characteristic() *big.Int { return K.p }

// Order is the number of elements. The caller does not change it.
func (K *Field) Order() *big.Int { return K.arith.Order() }

// Degree is the degree over the base; 1 for a prime field.
func (K *Field) Degree() int { return K.n }

// AbsoluteDegree is the degree over the prime field.
func (K *Field) AbsoluteDegree() int { return K.absolute }

// Base is the field that K was made over: the prime field for a standard
// field, and K itself for a prime field.
func (K *Field) Base() *Field {
	if K.base == nil {
		return K
	}
	return K.base
}

// PrimeField is F_p.
func (K *Field) PrimeField() *Field { return K.prime }

// Modulus is the minimal polynomial of the generator over the base; x - 1 for
// a prime field.
func (K *Field) Modulus() Polynomial {
	if K.base == nil {
		return Polynomial{K, poly.FromInts(K.arith, -1, 1)}
	}
	return Polynomial{K.base, K.modulus}
}

// IsStandard says whether K came from Standard or Prime, and so is the fixed
// presentation of its order.
func (K *Field) IsStandard() bool { return K.standard }

// IsPrime says whether K is a prime field.
func (K *Field) IsPrime() bool { return K.base == nil }

// Name is the letter of the generator, "" for none.
func (K *Field) Name() string { return K.name }

// Named is the same field with another letter for its generator.
func (K *Field) Named(name string) *Field {
	if name == K.name {
		return K
	}
	return &Field{K.structure, name}
}

// Arith is the arithmetic under K, for packages that work on vectors and
// polynomials of raw elements.
func (K *Field) Arith() poly.Arith { return K.arith }

// Standing says how well it is known that the characteristic is prime.
func (K *Field) Standing() algebra.Evidence { return K.standing }

// Same says whether K and L are the same presentation: the same prime field,
// or the same polynomial over the same base. Letters do not count.
func Same(K, L *Field) bool {
	switch {
	case K == nil || L == nil:
		return K == L
	case K.structure == L.structure:
		return true
	case K.absolute != L.absolute || K.n != L.n || K.p.Cmp(L.p) != 0:
		return false
	case K.base == nil || L.base == nil:
		return K.base == nil && L.base == nil
	}
	return Same(K.base, L.base) && poly.Equal(K.modulus, L.modulus)
}

// Zero is 0 in K.
func (K *Field) Zero() Elem { return Elem{K, make(poly.Elem, K.arith.Width())} }

// One is 1 in K.
func (K *Field) One() Elem { return Elem{K, K.arith.One()} }

// Generator is the root of the modulus that K was made with; 1 for a prime
// field.
func (K *Field) Generator() Elem {
	if K.base == nil {
		return K.One()
	}
	z := K.Zero()
	// A modulus of degree one has its root in the base.
	K.ext.FromPoly(algebra.NewWork(nil), z.w, poly.X(K.base.arith))
	return z
}

// Int is the image of an integer.
func (K *Field) Int(n *big.Int) Elem {
	z := K.Zero()
	K.arith.SetInt(z.w, n)
	return z
}

// Element is the element with the given code, taken modulo the order of K: see
// Elem.Code.
func (K *Field) Element(code *big.Int) Elem {
	z := K.Zero()
	K.arith.FromCode(z.w, new(big.Int).Mod(code, K.Order()))
	return z
}

// FromCoordinates is sum c_i a^i for the generator a and c_i in the base,
// constant term first.
func (K *Field) FromCoordinates(c []Elem) Elem {
	f := NewPolynomial(K.Base(), c)
	if K.base == nil {
		z := K.Zero()
		for _, x := range c {
			z = z.Add(x)
		}
		return z
	}
	z := K.Zero()
	K.ext.FromPoly(algebra.NewWork(nil), z.w, f.f)
	return z
}

// FromRaw is the element with the words e of Arith; it keeps a copy.
func (K *Field) FromRaw(e poly.Elem) Elem {
	z := K.Zero()
	copy(z.w, e)
	return z
}

// All yields the elements of K in the order of their codes; range over it.
func (K *Field) All(yield func(Elem) bool) {
	one := big.NewInt(1)
	for c := new(big.Int); c.Cmp(K.Order()) < 0; c.Add(c, one) {
		if !yield(K.Element(c)) {
			return
		}
	}
}
