package value

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// rank orders the structures that numbers live in, from the one whose members
// move most readily.
type rank int

const (
	integers rank = iota
	rationals
	residues
	elements
	polynomials      // over Q
	quotients        // of polynomials over Q
	fieldPolynomials // over a finite field
	functions        // rational functions over a finite field
)

// number is a value that is added and multiplied. The binary methods want
// another of the same structure, which meet arranges.
type number interface {
	Value
	rank() rank
	isZero() bool
	add(c *Context, b number) (Value, error)
	sub(c *Context, b number) (Value, error)
	mul(c *Context, b number) (Value, error)
	div(c *Context, b number) (Value, error) // b is not zero
	neg(c *Context) (Value, error)
	pow(c *Context, n *big.Int) (Value, error)
	equal(b number) bool
}

// The rules by which numbers move, and there are no others: how a and b, of
// the given ranks, come to lie in one structure. The lower rank stands first.
//
//	integers -> rationals -> Z/n and finite fields -> polynomials and rational
//	functions over them; polynomials with rational coefficients move with
//	their coefficients; elements of finite fields along the fixed embeddings.
var meetings = map[[2]rank]func(c *Context, a, b number) (number, number, error){
	{integers, integers}:   stay,
	{rationals, rationals}: stay,
	{integers, rationals}:  moveFirst(intoRationals),

	{residues, residues}:  sameModulus,
	{integers, residues}:  moveFirst(intoResidues),
	{rationals, residues}: moveFirst(intoResidues),

	{elements, elements}:  commonField,
	{integers, elements}:  moveFirst(intoField),
	{rationals, elements}: moveFirst(intoField),
	{residues, elements}:  moveFirst(intoField),

	{polynomials, polynomials}: sameLetter,
	{integers, polynomials}:    moveFirst(intoPolynomials),
	{rationals, polynomials}:   moveFirst(intoPolynomials),
	{elements, polynomials}:    moveCoefficients,

	{quotients, quotients}:   sameQuotientLetter,
	{integers, quotients}:    moveFirst(intoQuotients),
	{rationals, quotients}:   moveFirst(intoQuotients),
	{polynomials, quotients}: moveFirst(intoQuotients),
	{elements, quotients}:    quotientOverField,

	{quotients, fieldPolynomials}: quotientOverField,
	{quotients, functions}:        quotientOverField,

	{fieldPolynomials, fieldPolynomials}: commonCoefficients,
	{integers, fieldPolynomials}:         moveFirst(intoFieldPolynomials),
	{rationals, fieldPolynomials}:        moveFirst(intoFieldPolynomials),
	{residues, fieldPolynomials}:         moveFirst(intoFieldPolynomials),
	{elements, fieldPolynomials}:         extendCoefficients,
	{polynomials, fieldPolynomials}:      moveFirst(intoFieldPolynomials),

	{functions, functions}:        commonFunctions,
	{integers, functions}:         moveFirst(intoFunctions),
	{rationals, functions}:        moveFirst(intoFunctions),
	{residues, functions}:         moveFirst(intoFunctions),
	{elements, functions}:         extendConstants,
	{polynomials, functions}:      moveFirst(intoFunctions),
	{fieldPolynomials, functions}: moveFirst(intoFunctions),
}

// meet moves a and b into one structure.
func meet(c *Context, a, b number) (number, number, error) {
	if a.rank() > b.rank() {
		y, x, err := meet(c, b, a)
		return x, y, err
	}
	rule, ok := meetings[[2]rank{a.rank(), b.rank()}]
	if !ok {
		return nil, nil, doNotMeet(a, b)
	}
	return rule(c, a, b)
}

func doNotMeet(a, b Value) error {
	return algebra.Errorf(algebra.Mismatch, "%s and %s do not lie in one structure", a.Kind(), b.Kind()).
		WithRemedy("a map between them has to be written; integers, rationals and polynomials over them move into a field with over")
}

func stay(_ *Context, a, b number) (number, number, error) { return a, b, nil }

func moveFirst(move func(c *Context, a Value, b number) (number, error)) func(c *Context, a, b number) (number, number, error) {
	return func(c *Context, a, b number) (number, number, error) {
		x, err := move(c, a, b)
		return x, b, err
	}
}

func intoRationals(_ *Context, a Value, _ number) (number, error) {
	return Rational{new(big.Rat).SetInt(a.(Integer).N)}, nil
}

func intoResidues(c *Context, a Value, b number) (number, error) {
	return toResidue(c, a, b.(Residue).M)
}

func intoField(c *Context, a Value, b number) (number, error) {
	e, err := ToField(c, a, b.(Element).E.Field())
	return e, err
}

func intoPolynomials(_ *Context, a Value, b number) (number, error) {
	return constantPolynomial(a, b.(Polynomial).Letter), nil
}

func sameModulus(_ *Context, a, b number) (number, number, error) {
	x, y := a.(Residue), b.(Residue)
	if x.M.Cmp(y.M) != 0 {
		return nil, nil, algebra.Errorf(algebra.Mismatch, "residues modulo %s and modulo %s do not combine", x.M, y.M)
	}
	return a, b, nil
}

func commonField(c *Context, a, b number) (number, number, error) {
	x, y := a.(Element).E, b.(Element).E
	if field.Same(x.Field(), y.Field()) {
		return a, b, nil
	}
	_, f, g, err := common(c, x.Field(), y.Field())
	if err != nil {
		return nil, nil, err
	}
	return Element{f.Apply(c.W, x)}, Element{g.Apply(c.W, y)}, nil
}

func sameLetter(_ *Context, a, b number) (number, number, error) {
	x, y := a.(Polynomial), b.(Polynomial)
	letter, err := commonLetter(x.Letter, x.P.Degree(), y.Letter, y.P.Degree())
	if err != nil {
		return nil, nil, err
	}
	return Polynomial{x.P, letter}, Polynomial{y.P, letter}, nil
}

// commonLetter is the letter in which two polynomials are polynomials; a
// constant takes any.
func commonLetter(x string, degree int, y string, other int) (string, error) {
	switch {
	case x == y || other <= 0:
		return x, nil
	case degree <= 0:
		return y, nil
	}
	return "", algebra.Errorf(algebra.Unable, "polynomials in several letters, here %s and %s, are not supported", x, y).
		WithRemedy("bind one of the letters with let, or write both polynomials in one letter")
}

func moveCoefficients(c *Context, a, b number) (number, number, error) {
	K := a.(Element).E.Field()
	g, err := toFieldPolynomial(c, b, K, b.(Polynomial).Letter)
	if err != nil {
		return nil, nil, err
	}
	return constantOver(a.(Element).E, g.Letter), g, nil
}

func intoFieldPolynomials(c *Context, a Value, b number) (number, error) {
	g := b.(FieldPolynomial)
	if f, ok := a.(Polynomial); ok {
		letter, err := commonLetter(f.Letter, f.P.Degree(), g.Letter, g.P.Degree())
		if err != nil {
			return nil, err
		}
		return toFieldPolynomial(c, f, g.P.Field(), letter)
	}
	return toFieldPolynomial(c, a, g.P.Field(), g.Letter)
}

func extendCoefficients(c *Context, a, b number) (number, number, error) {
	x, g := a.(Element).E, b.(FieldPolynomial)
	_, f, h, err := common(c, x.Field(), g.P.Field())
	if err != nil {
		return nil, nil, err
	}
	return constantOver(f.Apply(c.W, x), g.Letter), FieldPolynomial{g.P.Map(c.W, h), g.Letter}, nil
}

func commonCoefficients(c *Context, a, b number) (number, number, error) {
	x, y := a.(FieldPolynomial), b.(FieldPolynomial)
	letter, err := commonLetter(x.Letter, x.P.Degree(), y.Letter, y.P.Degree())
	if err != nil {
		return nil, nil, err
	}
	if field.Same(x.P.Field(), y.P.Field()) {
		return FieldPolynomial{x.P, letter}, FieldPolynomial{y.P, letter}, nil
	}
	_, f, g, err := common(c, x.P.Field(), y.P.Field())
	if err != nil {
		return nil, nil, err
	}
	return FieldPolynomial{x.P.Map(c.W, f), letter}, FieldPolynomial{y.P.Map(c.W, g), letter}, nil
}

// ToField moves v into K: integers, rationals, residues modulo the
// characteristic, and elements along the fixed embedding.
func ToField(c *Context, v Value, K *field.Field) (Element, error) {
	switch v := Plain(v).(type) {
	case Integer:
		return Element{K.Int(v.N)}, nil
	case Rational:
		d := K.Int(v.Q.Denom())
		if d.IsZero() {
			return Element{}, algebra.Errorf(algebra.Undefined, "%s has no value in characteristic %s: the denominator is zero there", v.Q, K.Characteristic())
		}
		q, err := K.Int(v.Q.Num()).Div(c.W, d)
		return Element{q}, err
	case Residue:
		if v.M.Cmp(K.Characteristic()) != 0 {
			return Element{}, algebra.Errorf(algebra.Mismatch, "residues modulo %s do not move into %s", v.M, nameOf(c.Printer(), K))
		}
		return Element{K.Int(v.N)}, nil
	case Element:
		if field.Same(v.E.Field(), K) {
			return Element{K.FromRaw(v.E.Raw())}, nil // under the name that K has for its generator
		}
		if m, err := embed(c, v.E.Field(), K); err == nil {
			return Element{m.Apply(c.W, v.E)}, nil
		}
		// An element of a larger field may still lie in K.
		if e, ok := v.E.InSubfield(c.W, K); ok {
			return Element{e}, nil
		}
		return Element{}, notInField(c, v, K)
	case Polynomial:
		if v.P.Degree() <= 0 {
			return ToField(c, v.constant(), K)
		}
	case FieldPolynomial:
		if v.P.Degree() <= 0 {
			return ToField(c, v.constant(), K)
		}
	}
	return Element{}, algebra.Errorf(algebra.Mismatch, "%s does not move into %s", v.Kind(), nameOf(c.Printer(), K))
}

func notInField(c *Context, v Element, K *field.Field) error {
	if v.E.Field().Characteristic().Cmp(K.Characteristic()) != 0 {
		return algebra.Errorf(algebra.Mismatch, "an element of characteristic %s has no place in %s, of characteristic %s",
			v.E.Field().Characteristic(), nameOf(c.Printer(), K), K.Characteristic())
	}
	return algebra.Errorf(algebra.Mismatch, "%s is not an element of %s", v.Text(c.Printer()), nameOf(c.Printer(), K))
}

// numberField is the finite field that a number lies over.
func numberField(v number) *field.Field {
	switch v := v.(type) {
	case Element:
		return v.E.Field()
	case FieldPolynomial:
		return v.P.Field()
	case RationalFunction:
		return v.F.Numerator().Field()
	}
	return nil
}

// common is where elements of K and L meet.
func common(c *Context, K, L *field.Field) (*field.Field, *field.Map, *field.Map, error) {
	M, f, g, err := field.Common(c.W, K, L)
	return M, f, g, err
}

func embed(c *Context, K, L *field.Field) (*field.Map, error) { return field.Embed(c.W, K, L) }
