package vocabulary

import (
	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/eval/value"
)

var bases = []Entry{
	{
		Words: "basis", Class: Noun, Topic: "bases",
		Meaning: "the powers 1, c, c^2, ... of a generator c of L over K, that of L when it serves, as a list",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, section 2.3",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			e := a[0].(value.Extension)
			b, err := field.PowerBasis(c.W, e.L, e.K)
			if err != nil {
				return nil, err
			}
			return elementList(b.Elements()), nil
		}}},
		Examples: []Example{{"basis of F_16/F_2", "[1, g_16, g_16^2, g_16^3]"}, {"basis of F_16/F_4", "[1, g_16]"}},
	},
	{
		Words: "normal basis", Class: Noun, Topic: "bases",
		Meaning: "the conjugates b, b^q, b^(q^2) and so on of an element, chosen by a fixed rule, whose conjugates form a basis of L/K",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.35",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			e := a[0].(value.Extension)
			b, err := field.NormalBasis(c.W, e.L, e.K)
			if err != nil {
				return nil, err
			}
			return elementList(b.Elements()), nil
		}}},
		Examples: []Example{{"normal basis of F_8/F_2", "[g_8^2 + 1, g_8^2 + g_8 + 1, g_8 + 1]"}},
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
				b, err := basisFor(c, a[:1], a[1].(value.List), a[2])
				if err != nil {
					return nil, err
				}
				return coordinates(c, b, a[0])
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
		return verdict(x.E.IsNormal(c.W, e.K))
	},
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

// basisFor is the basis with the given elements of a field that holds the
// objects too. Without over, the number of elements says over which subfield
// it is one.
func basisFor(c *value.Context, objects []value.Value, basis value.List, over value.Value) (*field.Basis, error) {
	L := basis.Items[0].(value.Element).E.Field()
	for _, v := range append(objects[:len(objects):len(objects)], basis.Items...) {
		x, ok := v.(value.Element)
		if !ok {
			continue
		}
		M, _, _, err := field.Common(c.W, L, x.E.Field())
		if err != nil {
			return nil, err
		}
		L = M
	}
	n := len(basis.Items)
	if over == nil {
		if L.AbsoluteDegree()%n != 0 {
			return nil, algebra.Errorf(algebra.Invalid, "%d elements are no basis of %s over a subfield", n, value.RingName(c.Printer(), value.Field{K: L}))
		}
		K, err := subfieldOfDegree(c, L, L.AbsoluteDegree()/n)
		if err != nil {
			return nil, err
		}
		over = K
	}
	b, err := elementsIn(c, basis, L)
	if err != nil {
		return nil, err
	}
	return field.NewBasis(c.W, L, over.(value.Field).K, b)
}

// coordinates lists the coordinates of x in the order of the basis.
func coordinates(c *value.Context, b *field.Basis, x value.Value) (value.List, error) {
	y, err := value.ToField(c, x, b.Field())
	if err != nil {
		return value.List{}, err
	}
	return elementList(b.Coordinates(c.W, y.E)), nil
}
