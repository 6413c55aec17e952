package value

import (
	"iter"
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/eval/display"
)

// List is [a, b]: values in an order, repeats allowed.
type List struct {
	Items []Value
	Notes *Notes   // how the list is shown, or nil
	Wrote *Written // how its tuples were written, or nil
}

// Written is how the tuples of a list were written: the text of each place
// and, where one of them chose a form, the rows with their forms.
type Written struct {
	Heads []string
	Rows  [][]Value
}

// Notes turn the display of a list into a table: one row for each item.
type Notes struct {
	Caption string
	Heads   []string
	Rows    [][]Value
	Note    string
	Diagram func(p *Printer) display.Diagram // nil when there is nothing to draw
}

// Keep is the list of the items whose place, from 0, is kept, with their notes.
func (l List) Keep(keep func(i int) bool) List {
	r := List{}
	if l.Notes != nil {
		n := *l.Notes
		n.Rows, n.Diagram, r.Notes = nil, nil, &n
	}
	for i, v := range l.Items {
		if keep(i) {
			r.Items = append(r.Items, v)
			if l.Notes != nil {
				r.Notes.Rows = append(r.Notes.Rows, l.Notes.Rows[i])
			}
		}
	}
	return r
}

// Table is the table of the notes.
func (n *Notes) Table(p *Printer) display.Table { return n.table(p) }

// Set is {a, b}: distinct values, kept in the order of their first appearance.
type Set struct{ Items []Value }

// Tuple is (a, b): a fixed number of values.
type Tuple struct{ Items []Value }

// Range is a..b in steps of one; empty when b < a.
type Range struct{ From, To *big.Int }

// Lazy is a collection that is counted without being listed, such as the
// elements of a field. Source is the expression it came from.
type Lazy struct {
	Source  func(p *Printer) string
	Count   *big.Int // nil for infinitely many
	Members func(c *Context) iter.Seq2[Value, error]
	Has     func(c *Context, v Value) (algebra.Verdict, error) // nil: search
	Quick   bool                                               // listing costs little, so that the first members are shown
}

func (List) Kind() string  { return "a list" }
func (Set) Kind() string   { return "a set" }
func (Tuple) Kind() string { return "a tuple" }
func (Range) Kind() string { return "a range" }
func (Lazy) Kind() string  { return "a list" }

func (l List) Len() *big.Int  { return big.NewInt(int64(len(l.Items))) }
func (s Set) Len() *big.Int   { return big.NewInt(int64(len(s.Items))) }
func (t Tuple) Len() *big.Int { return big.NewInt(int64(len(t.Items))) }
func (l Lazy) Len() *big.Int  { return l.Count }

func (r Range) Len() *big.Int {
	n := new(big.Int).Sub(r.To, r.From)
	n.Add(n, big.NewInt(1))
	if n.Sign() < 0 {
		n.SetInt64(0)
	}
	return n
}

func (l List) All(*Context) iter.Seq2[Value, error]  { return each(l.Items) }
func (s Set) All(*Context) iter.Seq2[Value, error]   { return each(s.Items) }
func (t Tuple) All(*Context) iter.Seq2[Value, error] { return each(t.Items) }

func (l Lazy) All(c *Context) iter.Seq2[Value, error] { return l.Members(c) }

func (r Range) All(c *Context) iter.Seq2[Value, error] {
	return func(yield func(Value, error) bool) {
		for n := new(big.Int).Set(r.From); n.Cmp(r.To) <= 0; n = new(big.Int).Add(n, big.NewInt(1)) {
			c.W.Poll()
			if !yield(Integer{n}, nil) {
				return
			}
		}
	}
}

func each(items []Value) iter.Seq2[Value, error] {
	return func(yield func(Value, error) bool) {
		for _, v := range items {
			if !yield(v, nil) {
				return
			}
		}
	}
}

// Members lists a collection, when it is not too long to be listed.
func Members(c *Context, s Collection) ([]Value, error) {
	switch s := s.(type) {
	case List:
		return s.Items, nil
	case Set:
		return s.Items, nil
	case Tuple:
		return s.Items, nil
	}
	if err := c.CheckLength(s.Len()); err != nil {
		return nil, err
	}
	items := make([]Value, 0, s.Len().Int64())
	for v, err := range s.All(c) {
		if err != nil {
			return nil, err
		}
		items = append(items, v)
	}
	return items, nil
}

// NewSet is the set of the given values.
func NewSet(c *Context, items []Value) (Set, error) {
	distinct, _, err := Distinct(c, items)
	return Set{distinct}, err
}

// Distinct lists the different ones among the values, in the order of their
// first appearance, and how often each occurs.
func Distinct(c *Context, items []Value) (distinct []Value, counts []int, err error) {
	// Numbers of one kind are equal exactly when their texts are, and a map
	// finds them at once; everything else has to be compared.
	seen := map[string]int{}
	var kinds []string
	for _, v := range items {
		c.W.Poll()
		kind, key := "", ""
		if isNumber(v) {
			kind = structure(v)
			key = kind + "\x00" + v.Text(nil)
			if i, ok := seen[key]; ok {
				counts[i]++
				continue
			}
		}
		i := -1
		for j, u := range distinct {
			if kind != "" && kinds[j] == kind {
				continue
			}
			if same, err := Equal(c, u, v); err == nil && same.Holds {
				i = j
				break
			}
		}
		if i < 0 {
			i = len(distinct)
			distinct, counts, kinds = append(distinct, v), append(counts, 0), append(kinds, kind)
		}
		if kind != "" {
			seen[key] = i
		}
		counts[i]++
	}
	return distinct, counts, nil
}

func (l List) Text(p *Printer) string { return enclosed(p, "[", l.Items, "]") }
func (s Set) Text(p *Printer) string  { return enclosed(p, "{", s.Items, "}") }
func (r Range) Text(*Printer) string  { return r.From.String() + ".." + r.To.String() }
func (l Lazy) Text(p *Printer) string { return l.Source(p) }
func (t Tuple) Text(p *Printer) string {
	if len(t.Items) == 1 {
		return "(" + t.Items[0].Text(p) + ",)"
	}
	return enclosed(p, "(", t.Items, ")")
}

// structure names the structure that a number lies in.
func structure(v Value) string {
	switch v := v.(type) {
	case Element:
		return definition(nil, v.E.Field())
	case FieldPolynomial:
		return definition(nil, v.P.Field()) + "[]"
	case RationalFunction:
		return definition(nil, v.F.Numerator().Field()) + "()"
	}
	return v.Kind()
}

// itemText is the text of a value inside a larger one. A field that has a name
// is written by it.
func itemText(p *Printer, v Value) string {
	if f, ok := v.(Field); ok {
		return operandName(p, f.K)
	}
	return v.Text(p)
}

// enclosed lists the items. When all of them live over one ring that has to be
// named, it is named once, behind the bracket.
func enclosed(p *Printer, open string, items []Value, end string) string {
	bare, over := make([]string, len(items)), ""
	for i, v := range items {
		o, ok := v.(overRing)
		if !ok {
			over = ""
			break
		}
		b, ring := o.overText(p)
		if i > 0 {
			ring = commonRing(over, ring)
		}
		if bare[i], over = b, ring; over == "" {
			break
		}
	}
	if over != "" {
		return open + strings.Join(bare, ", ") + end + " over " + over
	}
	for i, v := range items {
		bare[i] = itemText(p, v)
		if o, ok := v.(overRing); ok {
			if _, ring := o.overText(p); ring != "" {
				bare[i] = "(" + bare[i] + ")"
			}
		}
	}
	return open + strings.Join(bare, ", ") + end
}

// commonRing is the ring to name for values over the rings a and b: K[x] for
// constants, which name it, among polynomials over K, which name K.
func commonRing(a, b string) string {
	switch {
	case a == b || strings.HasPrefix(a, b+"["):
		return a
	case strings.HasPrefix(b, a+"["):
		return b
	}
	return ""
}

// overRing values print as TEXT over RING; an empty ring is not printed.
type overRing interface {
	overText(p *Printer) (bare, ring string)
}

func withRing(p *Printer, v overRing) string {
	bare, ring := v.overText(p)
	if ring == "" {
		return bare
	}
	return bare + " over " + ring
}

func (l List) TeX(p *Printer) string  { return `\left[` + texList(p, l.Items) + `\right]` }
func (s Set) TeX(p *Printer) string   { return `\left\{` + texList(p, s.Items) + `\right\}` }
func (t Tuple) TeX(p *Printer) string { return `\left(` + texList(p, t.Items) + `\right)` }
func (r Range) TeX(*Printer) string   { return r.From.String() + `, \dots, ` + r.To.String() }

func texList(p *Printer, items []Value) string {
	parts := make([]string, len(items))
	for i, v := range items {
		parts[i] = TeX(p, v)
	}
	return strings.Join(parts, `,\; `)
}

func (l List) Canonical() (string, map[string]any)  { return "list", machineItems(l.Items) }
func (s Set) Canonical() (string, map[string]any)   { return "set", machineItems(s.Items) }
func (t Tuple) Canonical() (string, map[string]any) { return "tuple", machineItems(t.Items) }
func (r Range) Canonical() (string, map[string]any) {
	return "range", map[string]any{"from": r.From.String(), "to": r.To.String()}
}

func machineItems(items []Value) map[string]any {
	m := make([]any, len(items))
	for i, v := range items {
		m[i] = machinePart(v)
	}
	return map[string]any{"items": m}
}

// most members of a quick collection that are shown beside its text.
const firstMembers = 16

// Document shows the first members of a quick collection.
func (l Lazy) Document(p *Printer) display.Document {
	if !l.Quick || l.Count == nil || l.Count.Sign() == 0 {
		return display.Text{Text: l.Text(p)}
	}
	s := display.Sequence{Open: "[", Close: "]"}
	for v, err := range l.Members(&Context{W: algebra.NewWork(nil), Limits: DefaultLimits}) {
		if err != nil {
			break
		}
		if s.Items = append(s.Items, cell(p, v)); len(s.Items) == firstMembers {
			break
		}
	}
	switch {
	case l.Count.IsInt64():
		s.Total = int(l.Count.Int64())
	default: // more than a reader wants to see counted
		s.Items = append(s.Items, display.Cell{Text: "...", TeX: `\dots`})
		s.Total = len(s.Items)
	}
	return s
}

// Document is a table when the list has notes.
func (l List) Document(p *Printer) display.Document {
	if l.Notes == nil {
		return formula(p, l)
	}
	return l.Notes.table(p)
}

func (n *Notes) table(p *Printer) display.Table {
	t := display.Table{Caption: n.Caption, Note: n.Note, Total: len(n.Rows)}
	for i, head := range n.Heads {
		align := display.Left
		if len(n.Rows) > 0 && is[Integer](n.Rows[0][i]) {
			align = display.Right
		}
		t.Columns = append(t.Columns, display.Column{Head: head, Align: align})
	}
	for _, row := range n.Rows {
		cells := make([]display.Cell, len(row))
		for i, v := range row {
			cells[i] = cell(p, v)
		}
		t.Rows = append(t.Rows, cells)
	}
	return t
}

func cell(p *Printer, v Value) display.Cell {
	if s, ok := v.(Shown); ok {
		return s.cell(p)
	}
	text := itemText(p, v)
	if o, ok := v.(overRing); ok { // the caption says where they live
		text, _ = o.overText(p)
	}
	if t, ok := v.(Text); ok {
		return display.Cell{Text: t.S}
	}
	if f, ok := v.(Field); ok {
		return display.Cell{Text: text, TeX: fieldNameTeX(p, f.K)}
	}
	return display.Cell{Text: text, TeX: TeX(p, v)}
}
