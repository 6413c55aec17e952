package vocabulary

import (
	"encoding/json"
	"fmt"
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/eval/display"
	"adjoin/eval/value"
)

var forms = []Entry{
	{
		Words: "table", Class: Form, Topic: "forms",
		Meaning: "shows a list, a factorization or a field as a table",
		Cases: []Case{
			{Args: []Arg{{Kind: Shown}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				t, err := tableOf(c, value.Plain(a[0]))
				if err != nil {
					return nil, err
				}
				return shown(a[0], "table", *t), nil
			}},
		},
		Examples: []Example{{"number of ([1, 2] as table)", "2"}},
	},
	{
		Words: "diagram", Class: Form, Topic: "forms",
		Meaning: "draws the lattice of subfields",
		Cases: []Case{{Args: []Arg{{Kind: Shown}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			d, err := diagramOf(c, value.Plain(a[0]))
			if err != nil {
				return nil, err
			}
			return shown(a[0], "diagram", d), nil
		}}},
		Examples: []Example{{"number of (subfields of F_64 as diagram)", "4"}},
	},
	numeral("hex", "%X", "0x", "0x11B"),
	numeral("bits", "%b", "0b", "0b100011011"),
	numeral("octal", "%o", "", "433"),
	{
		Words: "exponents", Class: Form, Topic: "forms",
		Meaning: "shows a polynomial over F_2 or an element by the exponents of its terms, highest first",
		Cases: []Case{{Args: []Arg{{Kind: Shown}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			n, letter, err := maskOf(value.Plain(a[0]))
			if err != nil {
				return nil, err
			}
			var list []string
			for i := n.BitLen() - 1; i >= 0; i-- {
				if n.Bit(i) == 1 {
					list = append(list, fmt.Sprint(i))
				}
			}
			return value.Noted(a[0], "exponents", "("+strings.Join(list, ", ")+")", "exponents of "+letter), nil
		}}},
		Examples: []Example{{"x^3 + 1 over F_2 as exponents", "(3, 0)"}},
	},
	{
		Words: "powers", Class: Form, Topic: "forms",
		Meaning: "shows an element, or each of a list, as a power of g",
		Cases: []Case{{Args: []Arg{{Kind: Shown}, {Prep: "of", Kind: Element.named("g")}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			g := a[1].(value.Element)
			t, err := eachValue(c, value.Plain(a[0]), func(x value.Value) (string, error) {
				b, h, err := value.Meet(c, x, g)
				if err != nil {
					return "", err
				}
				y, ok := b.(value.Element)
				if !ok {
					return "", algebra.Errorf(algebra.Invalid, "only elements of a finite field are powers of g, not %s", x.Kind())
				}
				if y.E.IsZero() {
					return "0", nil
				}
				n, err := y.E.Log(c.W, h.(value.Element).E)
				if err != nil {
					return "", err
				}
				return value.PowerText(g, n), nil
			})
			if err != nil {
				return nil, err
			}
			return shown(a[0], "powers", display.Text{Text: t}), nil
		}}},
		Examples: []Example{{"g_8 + 1 as powers of g_8", "g_8^3"}},
	},
	{
		Words: "coordinates", Class: Form, Topic: "forms",
		Meaning: "shows an element by its coordinates in the basis B, in the order of B",
		Cases: []Case{{Args: []Arg{{Kind: Shown}, {Prep: "in", Kind: Basis}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			v := value.Plain(a[0])
			objects := []value.Value{v}
			if l, ok := v.(value.Collection); ok {
				items, err := value.Members(c, l)
				if err != nil {
					return nil, err
				}
				objects = items
			}
			b, err := basisFor(c, objects, a[1].(value.List), nil)
			if err != nil {
				return nil, err
			}
			t, err := eachValue(c, v, func(x value.Value) (string, error) {
				l, err := coordinates(c, b, x)
				return l.Text(nil), err
			})
			if err != nil {
				return nil, err
			}
			return shown(a[0], "coordinates", display.Text{Text: t + "  # in the order of the basis"}), nil
		}}},
		Examples: []Example{{"g_8^4 as coordinates in [1, g_8, g_8^2]", "[0, 1, 1]"}},
	},
	{
		Words: "LaTeX", Class: Form, Topic: "forms",
		Meaning: "shows the source that typesets the value",
		Cases: []Case{{Args: []Arg{{Kind: Shown}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			text := value.TeX(c.Printer(), value.Plain(a[0]))
			if t, err := tableFor(c, a[0]); err == nil {
				text = t.LaTeX()
			}
			return shown(a[0], "LaTeX", display.Text{Text: text}), nil
		}}},
		Examples: []Example{{"x^10 as LaTeX", "x^{10}"}},
	},
	{
		Words: "CSV", Class: Form, Topic: "forms",
		Meaning: "shows a table as comma-separated values",
		Source:  "Y. Shafranovich, RFC 4180, 2005",
		Cases: []Case{{Args: []Arg{{Kind: Shown}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			t, err := tableOf(c, value.Plain(a[0]))
			if err != nil {
				return nil, err
			}
			return shown(a[0], "CSV", display.Text{Text: t.CSV()}), nil
		}}},
		Examples: []Example{{"number of ([1, 2] as CSV)", "2"}},
	},
	{
		Words: "JSON", Class: Form, Topic: "forms",
		Meaning: "shows the machine form of the value",
		Cases: []Case{{Args: []Arg{{Kind: Shown}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			text, err := json.MarshalIndent(value.Machine(a[0]), "", "  ")
			if err != nil {
				return nil, err
			}
			return shown(a[0], "JSON", display.Text{Text: string(text)}), nil
		}}},
		Examples: []Example{{"(1/2 as JSON) + 1/2", "1"}},
	},
	{
		Words: "TikZ", Class: Form, Topic: "forms",
		Meaning: "shows the source that draws a diagram with the TikZ package",
		Cases: []Case{{Args: []Arg{{Kind: Shown}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			d, err := diagramOf(c, value.Plain(a[0]))
			if err != nil {
				return nil, err
			}
			return shown(a[0], "TikZ", display.Text{Text: d.TikZ()}), nil
		}}},
		Examples: []Example{{"number of (subfields of F_64 as TikZ)", "4"}},
	},
}

func shown(v value.Value, name string, d display.Document) value.Value {
	return value.Shown{Value: value.Plain(v), Form: d, Name: name}
}

// tableFor is the table a value is shown as anyhow.
func tableFor(c *value.Context, v value.Value) (*display.Table, error) {
	switch v := value.Plain(v).(type) {
	case value.List:
		if v.Notes != nil {
			t := v.Notes.Table(c.Printer())
			return &t, nil
		}
	}
	return nil, algebra.Errorf(algebra.Invalid, "no table")
}

// most rows of a table that is made of a long collection.
const tableRows = 1 << 12

func tableOf(c *value.Context, v value.Value) (*display.Table, error) {
	if t, err := tableFor(c, v); err == nil {
		return t, nil
	}
	n := &value.Notes{}
	switch v := v.(type) {
	case value.Factorization:
		n.Caption, n.Heads = "Factors", []string{"factor", "multiplicity"}
		for _, f := range v.Factors {
			n.Rows = append(n.Rows, []value.Value{f.F, value.Int(f.E)})
		}
	case value.Field:
		return tableOf(c, value.Elements(v))
	case value.Matrix:
		for j := range v.Rows[0] {
			n.Heads = append(n.Heads, fmt.Sprint(j+1))
		}
		n.Caption, n.Rows = "Matrix", v.Rows
	case value.Collection:
		if v.Len() == nil || v.Len().Cmp(big.NewInt(tableRows)) > 0 {
			return nil, algebra.Errorf(algebra.TooLarge, "that table would have more than %s rows", value.Grouped(tableRows))
		}
		items, err := value.Members(c, v)
		if err != nil {
			return nil, err
		}
		rowsOf(n, items)
		if l, ok := v.(value.List); ok && l.Wrote != nil && len(l.Wrote.Heads) == len(n.Heads) && len(items) > 0 && rowOf(items[0]) != nil {
			asWritten(n, l.Wrote)
		}
	default:
		return nil, algebra.Errorf(algebra.Invalid, "%s has no form as a table", v.Kind())
	}
	t := n.Table(c.Printer())
	return &t, nil
}

// asWritten heads the columns with what their places were written as, and
// shows the cells in the forms that were chosen there, with their notes below.
func asWritten(n *value.Notes, w *value.Written) {
	n.Heads = w.Heads
	if w.Rows == nil {
		return
	}
	n.Rows = w.Rows
	var notes []string
	for j, v := range w.Rows[0] {
		if s, ok := v.(value.Shown); ok && s.Note != "" {
			notes = append(notes, w.Heads[j]+": "+s.Note)
		}
	}
	n.Note = strings.Join(notes, "; ")
}

// rowsOf makes rows of tuples or lists of one length, of elements of a field,
// or of single values.
func rowsOf(n *value.Notes, items []value.Value) {
	width := -1
	for _, v := range items {
		row := rowOf(v)
		if row == nil || width >= 0 && len(row) != width {
			width = 0
			break
		}
		width = len(row)
	}
	if width > 0 {
		for j := range width {
			n.Heads = append(n.Heads, fmt.Sprint(j+1))
		}
		for _, v := range items {
			n.Rows = append(n.Rows, rowOf(v))
		}
		return
	}
	n.Heads = []string{"number", "value"}
	for i, v := range items {
		n.Rows = append(n.Rows, []value.Value{value.Int(i + 1), v})
	}
}

func rowOf(v value.Value) []value.Value {
	switch v := v.(type) {
	case value.Tuple:
		return v.Items
	case value.List:
		return v.Items
	}
	return nil
}

func diagramOf(c *value.Context, v value.Value) (display.Diagram, error) {
	switch v := v.(type) {
	case value.Lattice:
		return v.Diagram(c.Printer()), nil
	case value.Extension:
		l, err := value.NewLattice(c, v)
		return l.Diagram(c.Printer()), err
	case value.List:
		if v.Notes != nil && v.Notes.Diagram != nil {
			return v.Notes.Diagram(c.Printer()), nil
		}
	}
	return display.Diagram{}, algebra.Errorf(algebra.Invalid, "%s has no form as a diagram", v.Kind()).
		WithRemedy("a lattice has one, and so have an extension K/F_2 and the subfields of K")
}

// numeral shows an integer, a polynomial over F_2 or an element of a field of
// characteristic 2 as a number, and says the order of its bits.
func numeral(name, format, prefix, example string) Entry {
	return Entry{
		Words: name, Class: Form, Topic: "forms",
		Meaning: "shows a polynomial over F_2, or an element in characteristic 2, as a number whose bit i is the coefficient of the i-th power; also an integer",
		Cases: []Case{{Args: []Arg{{Kind: Shown}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			v := value.Plain(a[0])
			letter := ""
			t, err := eachValue(c, v, func(x value.Value) (string, error) {
				n, l, err := maskOf(x)
				if err != nil {
					return "", err
				}
				letter = l
				return numeralText(n, x, name, format, prefix), nil
			})
			if err != nil {
				return nil, err
			}
			note := ""
			if letter != "" {
				note = "bit i, counted from the right and from 0, is the coefficient of " + letter + "^i"
			}
			return value.Noted(a[0], name, t, note), nil
		}}},
		Examples: []Example{{"x^8 + x^4 + x^3 + x + 1 over F_2 as " + name, example}},
	}
}

// numeralText pads elements to the width of their field.
func numeralText(n *big.Int, x value.Value, name, format, prefix string) string {
	s := fmt.Sprintf(format, n)
	if e, ok := x.(value.Element); ok {
		width := e.E.Field().AbsoluteDegree()
		switch name {
		case "hex":
			width = (width + 3) / 4
		case "octal":
			width = (width + 2) / 3
		}
		s = strings.Repeat("0", max(0, width-len(s))) + s
	}
	if strings.HasPrefix(s, "-") {
		return "-" + prefix + s[1:]
	}
	return prefix + s
}

// maskOf is the number that stands for a value, and the letter whose powers
// its bits belong to, empty for an integer.
func maskOf(v value.Value) (*big.Int, string, error) {
	two := big.NewInt(2)
	switch v := v.(type) {
	case value.Integer:
		return v.N, "", nil
	case value.Element:
		if K := v.E.Field(); K.Characteristic().Cmp(two) == 0 && !K.IsPrime() && K.Base().IsPrime() {
			return v.E.Code(), value.GeneratorText(K), nil
		}
	case value.FieldPolynomial:
		if v.P.Field().Order().Cmp(two) == 0 {
			n := new(big.Int)
			for i, e := range v.P.Coefficients() {
				if !e.IsZero() {
					n.SetBit(n, i, 1)
				}
			}
			return n, v.Letter, nil
		}
	}
	return nil, "", algebra.Errorf(algebra.Invalid, "only polynomials over F_2 and elements of F_2(a) have bits; this is %s", v.Kind())
}

func eachValue(c *value.Context, v value.Value, text func(value.Value) (string, error)) (string, error) {
	l, ok := v.(value.Collection)
	if !ok {
		return text(v)
	}
	items, err := value.Members(c, l)
	if err != nil {
		return "", err
	}
	parts := make([]string, len(items))
	for i, x := range items {
		c.W.Poll()
		if parts[i], err = text(x); err != nil {
			return "", err
		}
	}
	return "[" + strings.Join(parts, ", ") + "]", nil
}
