package vocabulary

import (
	"math/big"
	"sort"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/eval/value"
)

var collections = []Entry{
	{
		Words: "number", Class: Noun, Topic: "collections",
		Meaning: "how many members a list or set has; number of X of Y counts X of Y, without listing where it can",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Collection}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			n := a[0].(value.Collection).Len()
			if n == nil {
				return nil, algebra.Errorf(algebra.Undefined, "there are infinitely many")
			}
			return value.Integer{N: n}, nil
		}}},
		Examples: []Example{{"number of divisors of 360", "24"}, {"number of elements of {1, 1, 2}", "2"}},
	},
	{
		Words: "sum", Class: Noun, Topic: "collections",
		Meaning:  "all members added up; of none: 0",
		Cases:    []Case{{Args: []Arg{{Prep: "of", Kind: Collection}}, Do: accumulate("+", 0)}},
		Examples: []Example{{"sum of 1..100", "5050"}},
	},
	{
		Words: "product", Class: Noun, Topic: "collections",
		Meaning:  "all members multiplied; of none: 1",
		Cases:    []Case{{Args: []Arg{{Prep: "of", Kind: Collection}}, Do: accumulate("*", 1)}},
		Examples: []Example{{"product of [x - a for a in elements of F_4]", "x^4 + x over F_4"}},
	},
	{
		Words: "frequencies", Class: Noun, Topic: "collections",
		Meaning: "how often each value occurs: a list of pairs (value, count) in the order of first appearance",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Collection}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			items, err := value.Members(c, a[0].(value.Collection))
			if err != nil {
				return nil, err
			}
			distinct, counts, err := value.Distinct(c, items)
			if err != nil {
				return nil, err
			}
			n := &value.Notes{Caption: "Frequencies", Heads: []string{"value", "count"}}
			var pairs []value.Value
			for i, v := range distinct {
				pairs = append(pairs, value.Tuple{Items: []value.Value{v, value.Int(counts[i])}})
				n.Rows = append(n.Rows, []value.Value{v, value.Int(counts[i])})
			}
			return value.List{Items: pairs, Notes: n}, nil
		}}},
		Examples: []Example{{"frequencies of [order of a for a in elements of F_8 where a != 0]", "[(1, 1), (7, 6)]"}},
	},
	{
		Words: "sorted", Class: Noun, Topic: "collections",
		Meaning: "the members in ascending order: integers and rational numbers",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Collection}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			items, err := value.Members(c, a[0].(value.Collection))
			if err != nil {
				return nil, err
			}
			list := append([]value.Value(nil), items...)
			var failed error
			sort.SliceStable(list, func(i, j int) bool {
				v, err := value.Relate(c, "<", list[i], list[j], nil)
				if err != nil {
					failed = err
				}
				return v.Holds
			})
			return value.List{Items: list}, failed
		}}},
		Examples: []Example{{"sorted of [3, 1, 2]", "[1, 2, 3]"}},
	},
	{
		Words: "random element", Class: Noun, Topic: "collections",
		Meaning: "a member chosen at random from the stream that the session is seeded with; the same cells in the same order choose the same",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				K := a[0].(value.Field).K
				return value.Element{E: K.Element(value.RandomBelow(c, K.Order()))}, nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Collection}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return randomMember(c, a[0].(value.Collection))
			}},
		},
		Examples: []Example{{"(random element of F_16) in F_16", "true"}},
	},
	{
		Words: "random polynomial", Class: Noun, Topic: "collections",
		Meaning: "a monic polynomial of the given degree over K, chosen at random from the session's stream",
		Cases: []Case{{Args: []Arg{{Prep: "of", Role: "degree", Kind: Natural}, {Prep: "over", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			n := a[0].(value.Integer).N
			if err := c.CheckDegree(n); err != nil {
				return nil, err
			}
			K := a[1].(value.Field).K
			list := make([]field.Elem, n.Int64()+1)
			for i := range list {
				list[i] = K.Element(value.RandomBelow(c, K.Order()))
			}
			list[len(list)-1] = K.One()
			return value.FieldPolynomial{P: field.NewPolynomial(K, list), Letter: "x"}, nil
		}}},
		Examples: []Example{{"degree of random polynomial of degree 5 over F_3", "5"}},
	},
	{
		Words: "certificate", Class: Noun, Topic: "collections",
		Meaning: "the evidence of a statement in full: how well it is known, why, and by what witness",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Truth}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return value.Certificate{Of: a[0].(value.Verdict)}, nil
		}}},
		Examples: []Example{{"certificate of (7 is prime)", "certificate of (7 is prime)"}},
	},
	{
		Words: "determinant", Class: Noun, Topic: "collections",
		Meaning: "the determinant of a square matrix",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Matrix}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return a[0].(value.Matrix).Determinant(c)
		}}},
		Examples: []Example{{"determinant of matrix of [[1, 2], [3, 4]]", "-2"}},
	},
	{
		Words: "rank", Class: Noun, Topic: "collections",
		Meaning: "the dimension of the space that the rows of a matrix span",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Matrix}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return a[0].(value.Matrix).Rank(c)
		}}},
		Examples: []Example{{"rank of (matrix of [[1, 1], [1, 1]])", "1"}},
	},
	{
		Words: "matrix", Class: Noun, Topic: "collections",
		Meaning: "the matrix with the given rows; of a map in a basis, or from one basis to another: column j has the coordinates of the image of the j-th element",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Rows}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				var rows [][]value.Value
				for _, r := range a[0].(value.List).Items {
					rows = append(rows, r.(value.List).Items)
				}
				return value.NewMatrix(c, rows)
			}},
			{Args: []Arg{{Prep: "of", Kind: Function}, {Prep: "in", Kind: Basis}, {Prep: "over", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return matrixOfMap(c, a[0].(value.Callable), a[1].(value.List), a[1].(value.List), a[2])
			}},
			{Args: []Arg{{Prep: "of", Kind: Function}, {Prep: "from", Kind: Basis}, {Prep: "to", Kind: Basis}, {Prep: "over", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return matrixOfMap(c, a[0].(value.Callable), a[1].(value.List), a[2].(value.List), a[3])
			}},
		},
		Examples: []Example{
			{"(matrix of [[1, 1], [1, 0]])^10", "matrix of [[89, 55], [55, 34]]"},
			{"matrix of (Frobenius of F_4/F_2) in [1, g_4]", "(matrix of [[1, 1], [0, 1]]) over F_2"},
		},
	},
}

// accumulate combines the members from the left.
func accumulate(op string, empty int) func(c *value.Context, a []value.Value) (value.Value, error) {
	return func(c *value.Context, a []value.Value) (value.Value, error) {
		l := a[0].(value.Collection)
		if l.Len() == nil {
			return nil, c.CheckLength(nil)
		}
		if r, ok := l.(value.Range); ok && op == "+" && r.Len().Sign() > 0 {
			s := new(big.Int).Add(r.From, r.To)
			s.Mul(s, r.Len())
			return value.Integer{N: s.Rsh(s, 1)}, nil
		}
		// Neighbours of equal size are joined, so that the operands of one
		// operation are about equally long and long multiplication pays.
		type part struct {
			v value.Value
			n int
		}
		var parts []part
		join := func() error {
			k := len(parts) - 2
			v, err := value.Operate(c, op, parts[k].v, parts[k+1].v)
			parts[k] = part{v, parts[k].n + parts[k+1].n}
			parts = parts[:k+1]
			return err
		}
		for v, err := range l.All(c) {
			c.W.Poll()
			if err != nil {
				return nil, err
			}
			parts = append(parts, part{v, 1})
			for k := len(parts) - 1; k > 0 && parts[k].n == parts[k-1].n; k-- {
				if err := join(); err != nil {
					return nil, err
				}
			}
		}
		for len(parts) > 1 {
			if err := join(); err != nil {
				return nil, err
			}
		}
		if len(parts) == 0 {
			return value.Int(empty), nil
		}
		return parts[0].v, nil
	}
}

func randomMember(c *value.Context, l value.Collection) (value.Value, error) {
	n := l.Len()
	if n == nil || n.Sign() == 0 {
		return nil, algebra.Errorf(algebra.Undefined, "there is nothing to choose from, or infinitely much")
	}
	k := value.RandomBelow(c, n)
	if r, ok := l.(value.Range); ok {
		return value.Integer{N: k.Add(k, r.From)}, nil
	}
	items, err := value.Members(c, l)
	if err != nil {
		return nil, err
	}
	return items[k.Int64()], nil
}

// matrixOfMap has in its j-th column the coordinates, in the basis to, of the
// image of the j-th element of the basis from.
func matrixOfMap(c *value.Context, f value.Callable, from, to value.List, over value.Value) (value.Value, error) {
	images := make([]value.Value, len(from.Items))
	for j, x := range from.Items {
		y, err := f.Call(c, []value.Value{x})
		if err != nil {
			return nil, err
		}
		images[j] = y
	}
	b, err := basisFor(c, images, to, over)
	if err != nil {
		return nil, err
	}
	rows := make([][]value.Value, len(to.Items))
	for _, y := range images {
		column, err := coordinates(c, b, y)
		if err != nil {
			return nil, err
		}
		for i, v := range column.Items {
			rows[i] = append(rows[i], v)
		}
	}
	return value.NewMatrix(c, rows)
}
