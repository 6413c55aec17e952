package vocabulary

import (
	"adjoin/algebra/field"
	"adjoin/eval/value"
)

// Kind is what an argument may be. Take gives the value in the Go type that
// the word works with, or says that it is not of this kind; it moves values
// only where nothing is lost, as from a factorization to its product.
type Kind struct {
	Name   string // for error texts, with its article: "an element of a finite field"
	Letter string // how signatures show it
	Take   func(c *value.Context, v value.Value) (value.Value, bool)
}

func kind[T value.Value](name, letter string) Kind {
	return Kind{name, letter, func(_ *value.Context, v value.Value) (value.Value, bool) {
		t, ok := value.Plain(v).(T)
		return t, ok
	}}
}

// named is k under another letter.
func (k Kind) named(letter string) Kind {
	k.Letter = letter
	return k
}

// The kinds of arguments, and the Go type that each one promises.
var (
	Anything   = Kind{"anything", "x", func(_ *value.Context, v value.Value) (value.Value, bool) { return value.Plain(v), true }} // value.Value
	Shown      = Kind{"anything", "x", func(_ *value.Context, v value.Value) (value.Value, bool) { return v, true }}              // value.Value, with its form
	Integer    = kind[value.Integer]("an integer", "n")                                                                           // value.Integer
	Natural    = Kind{"a positive integer", "n", takeNatural}                                                                     // value.Integer, at least 1
	Text       = kind[value.Text]("a text", `"..."`)                                                                              // value.Text
	Truth      = kind[value.Verdict]("a statement that is true or false", "(claim)")                                              // value.Verdict
	Collection = kind[value.Collection]("a list or set", "L")                                                                     // value.Collection
	Several    = Kind{"several things in parentheses", "(a, b, ...)", takeSeveral}                                                // value.Tuple, at least one member
	Number     = Kind{"a number, an element or a polynomial", "a", takeNumber}                                                    // one of the kinds with + and *
	Range      = kind[value.Range]("a range", "1..n")
	Pair       = Kind{"two things in parentheses", "(a, b)", takePair} // value.Tuple of two
	Function   = Kind{"a function", "f", takeFunction}                 // value.Callable

	Field      = kind[value.Field]("a finite field", "K")                               // value.Field
	AnyRing    = Kind{"a ring or field", "R", takeRing}                                 // value.Value
	Ring       = kind[value.Ring]("Z, Q or Z/n", "R")                                   // value.Ring
	Residue    = kind[value.Residue]("a residue", "a")                                  // value.Residue
	Extension  = Kind{"an extension of finite fields", "L/K", takeExtension}            // value.Extension; a field is one of its prime field
	Element    = kind[value.Element]("an element of a finite field", "a")               // value.Element
	Polynomial = Kind{"a polynomial", "f", takePolynomial}                              // value.Polynomial or value.FieldPolynomial
	FieldPoly  = kind[value.FieldPolynomial]("a polynomial over a finite field", "f")   // value.FieldPolynomial
	RatPoly    = kind[value.Polynomial]("a polynomial with rational coefficients", "f") // value.Polynomial
	Quotient   = kind[value.Quotient]("a rational function over Q", "u")                // value.Quotient
	Scalar     = Kind{"a number or an element", "c", takeScalar}                        // one of Integer, Rational, Residue, Element
	Fraction   = kind[value.RationalFunction]("a rational function", "u")               // value.RationalFunction
	FunField   = kind[value.FunctionField]("a field of rational functions", "K(t)")     // value.FunctionField
	Map        = kind[value.Map]("a map between finite fields", "s")                    // value.Map
	Group      = kind[value.Group]("a cyclic group of automorphisms", "G")              // value.Group
	Basis      = Kind{"a basis, as a list of elements", "B", takeElements}              // value.List of value.Element
	Matrix     = kind[value.Matrix]("a matrix", "M")                                    // value.Matrix
	Rows       = Kind{"a list of rows of equal length", "[[a, b], [c, d]]", takeRows}   // value.List of value.List
)

func takeNatural(_ *value.Context, v value.Value) (value.Value, bool) {
	n, ok := value.Plain(v).(value.Integer)
	return n, ok && n.N.Sign() > 0
}

func takeSeveral(_ *value.Context, v value.Value) (value.Value, bool) {
	switch v := value.Plain(v).(type) {
	case value.Tuple:
		return v, len(v.Items) > 0
	case value.List:
		return value.Tuple{Items: v.Items}, len(v.Items) > 0
	case value.Set:
		return value.Tuple(v), len(v.Items) > 0
	}
	return nil, false
}

func takeNumber(_ *value.Context, v value.Value) (value.Value, bool) {
	return value.AsNumber(v)
}

func takeScalar(_ *value.Context, v value.Value) (value.Value, bool) {
	v, _ = value.AsNumber(v)
	switch v.(type) {
	case value.Integer, value.Rational, value.Residue, value.Element:
		return v, true
	}
	return nil, false
}

func takePair(_ *value.Context, v value.Value) (value.Value, bool) {
	t, ok := value.Plain(v).(value.Tuple)
	return t, ok && len(t.Items) == 2
}

func takeFunction(_ *value.Context, v value.Value) (value.Value, bool) {
	f, ok := value.Plain(v).(value.Callable)
	return f, ok
}

func takeRing(_ *value.Context, v value.Value) (value.Value, bool) {
	v = value.Plain(v)
	return v, value.IsRing(v)
}

func takeExtension(c *value.Context, v value.Value) (value.Value, bool) {
	switch v := value.Plain(v).(type) {
	case value.Extension:
		return v, true
	case value.Field:
		e, err := value.OverPrimeField(c, v)
		return e, err == nil
	}
	return nil, false
}

func takePolynomial(_ *value.Context, v value.Value) (value.Value, bool) {
	switch v := value.Plain(v).(type) {
	case value.Polynomial, value.FieldPolynomial:
		return v, true
	case value.Factorization:
		return takePolynomial(nil, v.Of)
	}
	return nil, false
}

func takeElements(c *value.Context, v value.Value) (value.Value, bool) {
	var items []value.Value
	switch v := value.Plain(v).(type) {
	case value.List:
		items = v.Items
	case value.Tuple:
		items = v.Items
	default:
		return nil, false
	}
	// Integers among the elements, as the 1 of [1, a, a^2], move to their field.
	var field *field.Field
	for _, x := range items {
		if e, ok := x.(value.Element); ok {
			field = e.E.Field()
		}
	}
	if field == nil {
		return nil, false
	}
	list := make([]value.Value, len(items))
	for i, x := range items {
		list[i] = x
		if _, ok := x.(value.Element); ok {
			continue
		}
		e, err := value.ToField(c, x, field)
		if err != nil {
			return nil, false
		}
		list[i] = e
	}
	return value.List{Items: list}, true
}

func takeRows(_ *value.Context, v value.Value) (value.Value, bool) {
	l, ok := value.Plain(v).(value.List)
	if !ok || len(l.Items) == 0 {
		return nil, false
	}
	width := -1
	for _, r := range l.Items {
		row, ok := r.(value.List)
		if !ok || len(row.Items) == 0 || width >= 0 && len(row.Items) != width {
			return nil, false
		}
		width = len(row.Items)
	}
	return l, true
}
