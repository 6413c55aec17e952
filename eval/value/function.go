package value

import (
	"math/big"

	"adjoin/algebra"
)

// Function is a rule x |-> ... with the names it was written among.
type Function struct {
	Source string   // x |-> x^3 + 1
	Params []string // the names before |->, nil for a function not written so
	Arity  int
	Apply  func(c *Context, args []Value) (Value, error)
}

func (Function) Kind() string           { return "a function" }
func (f Function) Text(*Printer) string { return f.Source }
func (f Function) Canonical() (string, map[string]any) {
	return "function", map[string]any{"text": f.Source}
}

// Call applies the function.
func (f Function) Call(c *Context, args []Value) (Value, error) {
	if len(args) != f.Arity {
		return nil, algebra.Errorf(algebra.Invalid, "the function %s takes %s, not %d", f.Source, arguments(f.Arity), len(args))
	}
	return f.Apply(c, args)
}

func arguments(n int) string {
	if n == 1 {
		return "one argument"
	}
	return Grouped(n) + " arguments"
}

func composeFunctions(_ *Context, a, b Value) (Value, error) {
	f, g := a.(Function), b.(Function)
	if f.Arity != 1 {
		return nil, algebra.Errorf(algebra.Invalid, "only a function of one argument follows another")
	}
	return Function{
		Source: "(" + f.Source + ") * (" + g.Source + ")",
		Arity:  g.Arity,
		Apply: func(c *Context, args []Value) (Value, error) {
			v, err := g.Apply(c, args)
			if err != nil {
				return nil, err
			}
			return f.Apply(c, []Value{v})
		},
	}, nil
}

// At is the item with the given number, from 1.
func At(v Value, n *big.Int) (Value, error) {
	var items []Value
	switch l := Plain(v).(type) {
	case List:
		items = l.Items
	case Tuple:
		items = l.Items
	case Vector:
		return At(List{Items: l.items()}, n)
	default:
		return nil, algebra.Errorf(algebra.Mismatch, "%s has no numbered places", v.Kind())
	}
	if n.Sign() <= 0 || n.Cmp(big.NewInt(int64(len(items)))) > 0 {
		return nil, algebra.Errorf(algebra.Undefined, "there is no place %s in a list of %d; places count from 1", Short(n), len(items))
	}
	return items[n.Int64()-1], nil
}
