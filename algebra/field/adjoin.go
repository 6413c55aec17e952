package field

import (
	"fmt"

	"adjoin/algebra"
	"adjoin/algebra/poly"
)

// ReducibleError says that a polynomial does not make a field, with a factor
// that shows it and a polynomial of the same degree that does.
type ReducibleError struct {
	Modulus      Polynomial
	Factor       Polynomial // monic, irreducible, of least degree
	Multiplicity int        // how often it divides
	Instead      Polynomial // irreducible, of the degree of Modulus
}

// Reason says what is wrong, in words.
func (e *ReducibleError) Reason() string {
	times := ""
	if e.Multiplicity > 1 {
		times = fmt.Sprintf(" to the power %d", e.Multiplicity)
	}
	return fmt.Sprintf("%s is reducible over the field of %s elements: %s divides it%s", e.Modulus, e.Modulus.k.orderText(), e.Factor, times)
}

// Remedy says the way out.
func (e *ReducibleError) Remedy() string {
	return fmt.Sprintf("a field needs an irreducible polynomial; %s is one of degree %d", e.Instead, e.Instead.Degree())
}

func (e *ReducibleError) Error() string { return e.Reason() + "; " + e.Remedy() }

// Adjoin is base(a) with a root a of the modulus, a monic irreducible
// polynomial over base of degree at least 1; name is the letter of a. A
// reducible modulus gives a *ReducibleError; a constant one, or one over
// another field, an error of kind Invalid or Mismatch.
func Adjoin(w *algebra.Work, base *Field, modulus Polynomial, name string) (K *Field, err error) {
	defer algebra.Catch(&err)
	if !Same(base, modulus.k) {
		return nil, algebra.Errorf(algebra.Mismatch, "the polynomial %s is over the field of %s elements, not over that of %s", modulus, modulus.k.orderText(), base.orderText())
	}
	if modulus.Degree() < 1 {
		return nil, algebra.Errorf(algebra.Invalid, "a constant polynomial has no root to adjoin")
	}
	f := modulus.Monic(w)
	if v := poly.IsIrreducible(w, base.arith, f.f); !v.Holds {
		return nil, &ReducibleError{
			Modulus: modulus, Factor: Polynomial{modulus.k, v.Factor}, Multiplicity: v.Multiplicity,
			Instead: Polynomial{modulus.k, poly.FindIrreducible(w, base.arith, f.Degree())},
		}
	}
	K = extend(w, base, f.f, false)
	K.name = name
	return K, nil
}
