package vocabulary

import (
	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/funcfield"
	"adjoin/eval/value"
)

var functions = []Entry{
	{
		Words: "numerator", Class: Noun, Topic: "rational functions",
		Meaning: "what stands above in the reduced fraction with a monic denominator",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Fraction}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				u := a[0].(value.RationalFunction)
				return value.FieldPolynomial{P: u.F.Numerator(), Letter: u.Letter}, nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Number}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return part(a[0], true)
			}},
		},
		Examples: []Example{{"numerator of 6/4", "3"}, {"numerator of t/(t + 1) over F_2(t)", "t over F_2"}},
	},
	{
		Words: "denominator", Class: Noun, Topic: "rational functions",
		Meaning: "what stands below in the reduced fraction; monic for rational functions, positive for numbers",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Fraction}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				u := a[0].(value.RationalFunction)
				return value.FieldPolynomial{P: u.F.Denominator(), Letter: u.Letter}, nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Number}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return part(a[0], false)
			}},
		},
		Examples: []Example{{"denominator of 6/4", "2"}},
	},
	{
		Words: "finite subfields", Class: Noun, Topic: "rational functions",
		Meaning: "the finite fields inside a field of characteristic p, by ascending degree: what the powers of x |-> x^p fix",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.6",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: FunField}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return finiteSubfields(c, a[0].(value.FunctionField).K)
			}},
			{Args: []Arg{{Prep: "of", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return finiteSubfields(c, a[0].(value.Field).K)
			}},
		},
		Examples: []Example{{"finite subfields of F_16(t)", "[F_2, F_4, F_16]"}},
	},
	{
		Words: "p-th power", Class: Predicate, Topic: "rational functions",
		Meaning: "said of an element or rational function that is a p-th power in its field, p the characteristic: exactly when the derivative is zero",
		Cases: []Case{
			{Args: []Arg{{Kind: Element}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return verdict(algebra.Because(true, "in a finite field x |-> x^p is onto"), nil)
			}},
			{Args: []Arg{{Kind: Fraction}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return verdict(a[0].(value.RationalFunction).F.IsPthPower(c.W), nil)
			}},
		},
		Examples: []Example{{"(t^2 over F_2(t)) is a p-th power", "true"}, {"(t over F_2(t)) is a p-th power", "false"}},
	},
}

func finiteSubfields(c *value.Context, K *field.Field) (value.Value, error) {
	var items []value.Value
	for _, d := range funcfield.FiniteSubfields(K) {
		F, err := subfieldOfDegree(c, K, d)
		if err != nil {
			return nil, err
		}
		items = append(items, F)
	}
	return value.List{Items: items}, nil
}

// part is the numerator or the denominator of a rational number, or of a
// fraction over Q.
func part(v value.Value, above bool) (value.Value, error) {
	switch v := v.(type) {
	case value.Integer:
		if above {
			return v, nil
		}
		return value.Int(1), nil
	case value.Rational:
		if above {
			return value.Integer{N: v.Q.Num()}, nil
		}
		return value.Integer{N: v.Q.Denom()}, nil
	case value.Quotient:
		if above {
			return value.Polynomial{P: v.Num, Letter: v.Letter}, nil
		}
		return value.Polynomial{P: v.Den, Letter: v.Letter}, nil
	}
	return nil, algebra.Errorf(algebra.Invalid, "a numerator and a denominator belong to fractions, not to %s", v.Kind())
}
