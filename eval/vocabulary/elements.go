package vocabulary

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/integer"
	"adjoin/eval/value"
)

var elements = []Entry{
	{
		Words: "minimal polynomial", Class: Noun, Topic: "elements",
		Meaning: "the monic polynomial of least degree over K with the element as a root",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 1.81",
		Cases: []Case{{Args: elementOver, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return minimalPolynomial(c, a[0].(value.Element), a[1])
		}}},
		Examples: []Example{
			{"minimal polynomial of g_16^5 over F_2", "x^2 + x + 1 over F_2"},
			{"let K = F_2(a) where a^8 = a^4 + a^3 + a^2 + 1; degree of minimal polynomial of a^17 over F_4", "2"},
		},
	},
	{
		Words: "characteristic polynomial", Class: Noun, Topic: "elements",
		Meaning: "the polynomial of multiplication by the element on L over K: a power of the minimal polynomial",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, section 2.3",
		Cases: []Case{{Args: elementOver, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			x := a[0].(value.Element).E
			K, err := baseOf(c, x, a[1])
			if err != nil {
				return nil, err
			}
			f, err := x.CharacteristicPolynomial(c.W, K)
			return value.FieldPolynomial{P: f, Letter: "x"}, err
		}}},
		Examples: []Example{{"characteristic polynomial of g_16^5 over F_2", "x^4 + x^2 + 1 over F_2"}},
	},
	{
		Words: "trace", Class: Noun, Topic: "elements",
		Meaning: "the sum of the conjugates of an element over K, an element of K",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 2.22",
		Cases: []Case{
			{Args: elementOver, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				x := a[0].(value.Element).E
				K, err := baseOf(c, x, a[1])
				if err != nil {
					return nil, err
				}
				t, err := x.Trace(c.W, K)
				return value.Element{E: t}, err
			}},
			{Args: []Arg{{Prep: "of", Kind: Matrix}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return a[0].(value.Matrix).Trace(c)
			}},
		},
		Examples: []Example{{"trace of g_16^3 over F_2", "1"}},
	},
	{
		Words: "norm", Class: Noun, Topic: "elements",
		Meaning: "the product of the conjugates of an element over K, an element of K",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 2.27",
		Cases: []Case{{Args: elementOver, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			x := a[0].(value.Element).E
			K, err := baseOf(c, x, a[1])
			if err != nil {
				return nil, err
			}
			t, err := x.Norm(c.W, K)
			return value.Element{E: t}, err
		}}},
		Examples: []Example{{"norm of g_16 over F_2", "1"}},
	},
	{
		Words: "conjugates", Class: Noun, Topic: "elements",
		Meaning: "the images of an element under Gal(L/K), beginning with the element: a, a^q, a^(q^2) and so on",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 2.17",
		Cases: []Case{{Args: elementOver, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			x := a[0].(value.Element).E
			K, err := baseOf(c, x, a[1])
			if err != nil {
				return nil, err
			}
			list, err := x.Conjugates(c.W, K)
			return elementList(list), err
		}}},
		Examples: []Example{{"conjugates of g_8 over F_2", "[g_8, g_8^2, g_8^2 + g_8]"}},
	},
	{
		Words: "order", Class: Noun, Topic: "elements",
		Meaning: "of a non-zero element: the least n > 0 with a^n = 1; of an integer modulo n; of a polynomial: the order of its root x; of an automorphism or a group",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 3.2",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Element}, {Prep: "in", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				n, _, err := a[0].(value.Element).E.Order(c.W)
				return value.Integer{N: n}, err
			}},
			{Args: []Arg{{Prep: "of", Kind: Number}, {Prep: "in", Kind: AnyRing}}, Do: orderIn},
			{Args: []Arg{{Prep: "of", Kind: Map}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				n, err := a[0].(value.Map).Order()
				return value.Int(n), err
			}},
			{Args: []Arg{{Prep: "of", Kind: Group}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return value.Int(a[0].(value.Group).Order()), nil
			}},
			{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				f, err := finitePolynomial(a[0])
				if err != nil {
					return nil, err
				}
				n, err := f.P.Order(c.W)
				return value.Integer{N: n}, err
			}},
			{Args: []Arg{{Prep: "of", Kind: Residue}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				r := a[0].(value.Residue)
				return orderModulo(c, r.N, r.M)
			}},
		},
		Examples: []Example{
			{"let K = F_2(a) where a^8 = a^4 + a^3 + a^2 + 1; order of a^3", "85"},
			{"order of 2 in Z/7", "3"},
			{"order of Frobenius of F_256/F_4", "4"},
			{"order of x^8 + x^4 + x^3 + x + 1 over F_2", "51"},
		},
	},
	{
		Words: "discrete logarithm", Class: Noun, Topic: "elements",
		Meaning: "the least n >= 0 with g^n = b",
		Source:  "S. C. Pohlig and M. E. Hellman, An improved algorithm for computing logarithms over GF(p), 1978",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Element.named("b")}, {Prep: "to", Role: "base", Kind: Element.named("g")}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			b, g, err := value.Meet(c, a[0], a[1])
			if err != nil {
				return nil, err
			}
			n, err := b.(value.Element).E.Log(c.W, g.(value.Element).E)
			return value.Integer{N: n}, err
		}}},
		Examples: []Example{{"let K = F_2(a) where a^8 = a^4 + a^3 + a^2 + 1; discrete logarithm of a^100 to base a", "100"}},
	},
	{
		Words: "square root", Also: []string{"sqrt"}, Class: Noun, Topic: "elements",
		Meaning: "an element whose square is given; of two, the one that comes first in canonical order",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Element}, {Prep: "in", Kind: Field, Optional: true}}, Do: squareRoot},
			{Args: []Arg{{Prep: "of", Kind: Integer}, {Prep: "in", Kind: Field, Optional: true}}, Do: squareRoot},
		},
		Examples: []Example{{"square root of 2 in F_7", "3"}, {"sqrt 49", "7"}, {"square root of g_16", "g_16^2 + 1"}},
	},
	{
		Words: "p-th root", Class: Noun, Topic: "elements",
		Meaning: "the one element whose p-th power is given, p the characteristic; in K(t) there may be none, and the error says why",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Element}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return value.Element{E: a[0].(value.Element).E.Frobenius(c.W, -1)}, nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Fraction}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				u := a[0].(value.RationalFunction)
				r, err := u.F.PthRoot(c.W)
				return value.RationalFunction{F: r, Letter: u.Letter}, err
			}},
		},
		Examples: []Example{{"p-th root of g_8", "g_8^2 + g_8"}},
	},
	{
		Words: "square", Class: Predicate, Topic: "elements",
		Meaning: "said of an element that is the square of an element of K",
		Cases: []Case{
			{Args: []Arg{{Kind: Element}, {Prep: "in", Kind: Field, Optional: true}}, Do: isSquare},
			{Args: []Arg{{Kind: Integer}, {Prep: "in", Kind: Field}}, Do: isSquare},
		},
		Examples: []Example{{"2 is a square in F_7", "true"}, {"3 is a square in F_7", "false"}},
	},
}

var elementOver = []Arg{{Prep: "of", Kind: Element}, {Prep: "over", Kind: Field, Optional: true}}

// baseOf is the subfield that a question about an element is asked over: the
// one given, or the prime field.
func baseOf(c *value.Context, x field.Elem, K value.Value) (*field.Field, error) {
	if K != nil {
		return K.(value.Field).K, nil
	}
	return field.Prime(c.W, x.Field().Characteristic())
}

func minimalPolynomial(c *value.Context, x value.Element, over value.Value) (value.FieldPolynomial, error) {
	K, err := baseOf(c, x.E, over)
	if err != nil {
		return value.FieldPolynomial{}, err
	}
	f, err := x.E.MinimalPolynomial(c.W, K)
	return value.FieldPolynomial{P: f, Letter: "x"}, err
}

func elementList(list []field.Elem) value.List {
	items := make([]value.Value, len(list))
	for i, e := range list {
		items[i] = value.Element{E: e}
	}
	return value.List{Items: items}
}

func orderIn(c *value.Context, a []value.Value) (value.Value, error) {
	x, err := value.Over(c, a[0], a[1])
	if err != nil {
		return nil, err
	}
	switch x := x.(type) {
	case value.Element:
		n, _, err := x.E.Order(c.W)
		return value.Integer{N: n}, err
	case value.Residue:
		return orderModulo(c, x.N, x.M)
	}
	return nil, algebra.Errorf(algebra.Unable, "the order of %s is not found here", x.Kind())
}

func orderModulo(c *value.Context, a, m *big.Int) (value.Value, error) {
	n, err := orderMod(c, a, m)
	if err != nil {
		return nil, err
	}
	return value.Integer{N: n}, nil
}

// inField moves the subject of a question into the field it is asked in.
func inField(c *value.Context, a []value.Value) (field.Elem, error) {
	if a[1] != nil {
		x, err := value.ToField(c, a[0], a[1].(value.Field).K)
		return x.E, err
	}
	if x, ok := a[0].(value.Element); ok {
		return x.E, nil
	}
	return field.Elem{}, algebra.Errorf(algebra.Unable, "%s is no square in Z, and number fields are not supported", a[0].Text(nil)).
		WithRemedy("in a finite field: square root of 2 in F_7")
}

func squareRoot(c *value.Context, a []value.Value) (value.Value, error) {
	if n, ok := a[0].(value.Integer); ok && a[1] == nil && n.N.Sign() >= 0 {
		if r := integer.Root(n.N, 2); new(big.Int).Mul(r, r).Cmp(n.N) == 0 {
			return value.Integer{N: r}, nil
		}
	}
	x, err := inField(c, a)
	if err != nil {
		return nil, err
	}
	r, ok, err := x.Sqrt(c.W)
	if err != nil {
		return nil, err
	}
	if !ok {
		return nil, algebra.Errorf(algebra.Undefined, "%s is not a square in %s", value.Element{E: x}.Text(nil), value.Field{K: x.Field()}.Text(nil))
	}
	return value.Element{E: r}, nil
}

func isSquare(c *value.Context, a []value.Value) (value.Value, error) {
	x, err := inField(c, a)
	if err != nil {
		return nil, err
	}
	return verdict(x.IsSquare(c.W), nil)
}
