package vocabulary

import (
	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/eval/value"
)

var bases = []Entry{
	{
		Words: "basis", Class: Noun, Topic: "bases",
		Meaning: "the powers 1, a, a^2, ... of a generator of L over K, as a list",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, section 2.3",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return powerBasis(c, a[0].(value.Extension)), nil
		}}},
		Examples: []Example{{"basis of F_16/F_2", "[1, g_16, g_16^2, g_16^3]"}, {"basis of F_16/F_4", "[1, g_16]"}},
	},
	{
		Words: "normal basis", Class: Noun, Topic: "bases",
		Meaning: "the conjugates b, b^q, b^(q^2), ... of the first element whose conjugates form a basis of L/K",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.35",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			e := a[0].(value.Extension)
			x, err := e.NormalElement(c)
			if err != nil {
				return nil, err
			}
			list, err := x.Conjugates(c.W, e.K)
			return elementList(list), err
		}}},
		Examples: []Example{{"normal basis of F_8/F_2", "[g_8 + 1, g_8^2 + 1, g_8^2 + g_8 + 1]"}},
	},
	{
		Words: "dual basis", Class: Noun, Topic: "bases",
		Meaning: "the basis C of L/K with trace(b_i c_j) = 1 when i = j and 0 otherwise",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 2.30",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Basis}, {Prep: "in", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			e := a[1].(value.Extension)
			b, err := elementsIn(c, a[0].(value.List), e.L)
			if err != nil {
				return nil, err
			}
			list, err := e.DualBasis(c, b)
			return elementList(list), err
		}}},
		Examples: []Example{{"dual basis of [1, g_4] in F_4/F_2", "[g_4 + 1, 1]"}},
	},
	{
		Words: "coordinates", Class: Noun, Topic: "bases",
		Meaning: "the coefficients of an element in a basis of L/K, in the order of the basis",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Element}, {Prep: "in", Kind: Basis}, {Prep: "over", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return coordinatesIn(c, a[0].(value.Element), a[1].(value.List), a[2])
			}},
		},
		Examples: []Example{{"coordinates of g_8^4 in [1, g_8, g_8^2]", "[0, 1, 1]"}},
	},
	{
		Words: "normal elements", Class: Noun, Topic: "bases",
		Meaning: "the elements of L whose conjugates over K form a basis of L/K, in canonical order",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 3.73 (their number)",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			e := a[0].(value.Extension)
			return e.NormalElements(c)
		}}},
		Examples: []Example{{"number of normal elements of F_256/F_2", "128"}},
	},
}

var normalElementCase = Case{
	Args: []Arg{{Kind: Element}, {Prep: "in", Kind: Extension}},
	Do: func(c *value.Context, a []value.Value) (value.Value, error) {
		e := a[1].(value.Extension)
		x, err := value.ToField(c, a[0], e.L)
		if err != nil {
			return nil, err
		}
		return verdict(e.IsNormal(c, x.E))
	},
}

func powerBasis(c *value.Context, e value.Extension) value.List {
	list := make([]field.Elem, e.Degree())
	x := e.L.One()
	for i := range list {
		list[i] = x
		x = x.Mul(c.W, e.L.Generator())
	}
	return elementList(list)
}

func elementsIn(c *value.Context, l value.List, L *field.Field) ([]field.Elem, error) {
	list := make([]field.Elem, len(l.Items))
	for i, v := range l.Items {
		x, err := value.ToField(c, v, L)
		if err != nil {
			return nil, err
		}
		list[i] = x.E
	}
	return list, nil
}

// coordinatesIn solves for the coordinates of x in a basis over K; without K
// the size of the basis says which subfield it is over.
func coordinatesIn(c *value.Context, x value.Element, basis value.List, over value.Value) (value.Value, error) {
	e, b, err := extensionOfBasis(c, x, basis, over)
	if err != nil {
		return nil, err
	}
	y, err := value.ToField(c, x, e.L)
	if err != nil {
		return nil, err
	}
	list, err := e.Coordinates(c, y.E, b)
	return elementList(list), err
}

func extensionOfBasis(c *value.Context, x value.Element, basis value.List, over value.Value) (value.Extension, []field.Elem, error) {
	L := x.E.Field()
	for _, v := range basis.Items {
		M, _, _, err := field.Common(c.W, L, v.(value.Element).E.Field())
		if err != nil {
			return value.Extension{}, nil, err
		}
		L = M
	}
	n := len(basis.Items)
	K := over
	if K == nil {
		if L.AbsoluteDegree()%n != 0 {
			return value.Extension{}, nil, algebra.Errorf(algebra.Invalid, "%d elements are no basis of %s over a subfield", n, value.Field{K: L}.Text(nil))
		}
		var err error
		if K, err = subfieldOfDegree(c, L, L.AbsoluteDegree()/n); err != nil {
			return value.Extension{}, nil, err
		}
	}
	e, err := value.Operate(c, "/", value.Field{K: L}, K)
	if err != nil {
		return value.Extension{}, nil, err
	}
	if d := e.(value.Extension).Degree(); d != n {
		return value.Extension{}, nil, algebra.Errorf(algebra.Invalid, "a basis has %d elements here, not %d", d, n)
	}
	b, err := elementsIn(c, basis, L)
	return e.(value.Extension), b, err
}
