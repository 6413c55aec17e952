package value

import (
	"iter"
	"math/big"

	"adjoin/algebra"
)

// Residue is an element of Z/M, with 0 <= N < M.
type Residue struct{ N, M *big.Int }

func (a Residue) Kind() string           { return "a residue modulo " + Short(a.M) }
func (a Residue) Text(p *Printer) string { return withRing(p, a) }

func (a Residue) overText(*Printer) (bare, ring string) { return a.N.String(), "Z/" + a.M.String() }

func (a Residue) TeX(*Printer) string { return a.N.String() }
func (a Residue) Canonical() (string, map[string]any) {
	return "residue", map[string]any{"value": a.N.String(), "modulus": a.M.String()}
}

func (Residue) rank() rank     { return residues }
func (a Residue) isZero() bool { return a.N.Sign() == 0 }

func (a Residue) make(n *big.Int) Value { return Residue{n.Mod(n, a.M), a.M} }

func (a Residue) add(_ *Context, b number) (Value, error) {
	return a.make(new(big.Int).Add(a.N, b.(Residue).N)), nil
}

func (a Residue) sub(_ *Context, b number) (Value, error) {
	return a.make(new(big.Int).Sub(a.N, b.(Residue).N)), nil
}

func (a Residue) mul(_ *Context, b number) (Value, error) {
	return a.make(new(big.Int).Mul(a.N, b.(Residue).N)), nil
}

func (a Residue) div(c *Context, b number) (Value, error) {
	y, err := b.(Residue).inverse()
	if err != nil {
		return nil, err
	}
	return a.mul(c, y)
}

func (a Residue) inverse() (Residue, error) {
	n := new(big.Int).ModInverse(a.N, a.M)
	if n == nil {
		return Residue{}, algebra.Errorf(algebra.Undefined, "%s has no inverse modulo %s: their greatest common divisor is %s",
			a.N, a.M, new(big.Int).GCD(nil, nil, a.N, a.M))
	}
	return Residue{n, a.M}, nil
}

func (a Residue) neg(*Context) (Value, error) { return a.make(new(big.Int).Neg(a.N)), nil }

func (a Residue) pow(_ *Context, n *big.Int) (Value, error) {
	if n.Sign() < 0 {
		b, err := a.inverse()
		if err != nil {
			return nil, err
		}
		a, n = b, new(big.Int).Neg(n)
	}
	return Residue{new(big.Int).Exp(a.N, n, a.M), a.M}, nil
}

func (a Residue) equal(b number) bool { return a.N.Cmp(b.(Residue).N) == 0 }

// toResidue moves an integer, or a rational number whose denominator has an
// inverse, into Z/m.
func toResidue(c *Context, v Value, m *big.Int) (Residue, error) {
	switch v := v.(type) {
	case Integer:
		return Residue{new(big.Int).Mod(v.N, m), m}, nil
	case Rational:
		d, err := Residue{new(big.Int).Mod(v.Q.Denom(), m), m}.inverse()
		if err != nil {
			return Residue{}, err
		}
		n := new(big.Int).Mul(v.Q.Num(), d.N)
		return Residue{n.Mod(n, m), m}, nil
	case Residue:
		if new(big.Int).Mod(v.M, m).Sign() == 0 {
			return Residue{new(big.Int).Mod(v.N, m), m}, nil
		}
	}
	return Residue{}, algebra.Errorf(algebra.Mismatch, "%s does not move into Z/%s", v.Kind(), m)
}

// Residues lists the elements of Z/n; Z and Q have infinitely many.
func Residues(R Ring) Lazy {
	return Lazy{
		Source: func(p *Printer) string { return "elements of " + ringName(p, R) },
		Count:  R.Modulus,
		Members: func(c *Context) iter.Seq2[Value, error] {
			return func(yield func(Value, error) bool) {
				if R.Modulus == nil {
					yield(nil, c.CheckLength(nil))
					return
				}
				for n := new(big.Int); n.Cmp(R.Modulus) < 0; n = new(big.Int).Add(n, big.NewInt(1)) {
					c.W.Poll()
					if !yield(Residue{n, R.Modulus}, nil) {
						return
					}
				}
			}
		},
		Has:   R.Contains,
		Quick: true,
	}
}
