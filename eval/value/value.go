package value

import (
	"iter"
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/eval/display"
)

// Value is anything a name can stand for.
type Value interface {
	// Kind is what the value is, with its article, for error texts: "an
	// integer", "an element of F_256".
	Kind() string
	// Text is an expression that evaluates to the value again.
	Text(p *Printer) string
}

// The abilities a value may have beside that.
type (
	// Typeset values have a form in mathematical typesetting, without
	// delimiters.
	Typeset interface{ TeX(p *Printer) string }

	// Documented values are shown as something richer than a formula.
	Documented interface {
		Document(p *Printer) display.Document
	}

	// Canonical values have a machine form: an object of strings, numbers,
	// lists and objects, without the fields v and kind that Machine adds.
	Canonical interface {
		Canonical() (kind string, fields map[string]any)
	}

	// Callable values stand before parentheses.
	Callable interface {
		Value
		Call(c *Context, args []Value) (Value, error)
	}

	// Collection values have members in a fixed order.
	Collection interface {
		Value
		Len() *big.Int // nil when there are infinitely many
		All(c *Context) iter.Seq2[Value, error]
	}

	// Container values say what lies in them. A collection that is no
	// Container is searched.
	Container interface {
		Contains(c *Context, v Value) (algebra.Verdict, error)
	}
)

// Printer holds what the text of a value depends on beside the value: the
// names that the session has given to fields. A nil Printer knows no names.
type Printer struct {
	FieldName func(K *field.Field) (name string, ok bool)
}

// Plain strips what only concerns how a value is shown.
func Plain(v Value) Value {
	for {
		s, ok := v.(Shown)
		if !ok {
			return v
		}
		v = s.Value
	}
}
