package value

import (
	"fmt"

	"adjoin/algebra/field"
	"adjoin/algebra/order"
	"adjoin/eval/display"
)

// Lattice is the ordered set of the fields between K and L, for finite fields:
// one for each divisor of [L : K].
type Lattice struct {
	Of    Extension
	Subs  []Subfields  // by ascending degree
	Order *order.Order // of Subs, by inclusion
}

// Subfields is one intermediate field: in its standard presentation, with the
// element of L that generates it.
type Subfields struct {
	Field     *field.Field
	Generator field.Elem       // in L
	Minimal   field.Polynomial // of the generator, over the prime field
}

// NewLattice finds the fields between K and L.
func NewLattice(c *Context, e Extension) (Lattice, error) {
	subs, err := field.Subfields(c.W, e.L)
	if err != nil {
		return Lattice{}, err
	}
	l := Lattice{Of: e}
	for _, s := range subs {
		if s.Degree%e.K.AbsoluteDegree() != 0 {
			continue
		}
		f := Subfields{s.Field, s.Generator, s.MinimalPolynomial}
		switch s.Degree {
		case e.K.AbsoluteDegree():
			f.Field = e.K
		case e.L.AbsoluteDegree():
			f.Field = e.L
			if err := f.ownGenerator(c); err != nil {
				return Lattice{}, err
			}
		}
		l.Subs = append(l.Subs, f)
	}
	l.Order, err = order.New(c.W, len(l.Subs), func(i, j int) bool { return l.degree(j)%l.degree(i) == 0 })
	return l, err
}

// ownGenerator takes the generator that the field was given with, if it
// generates the field over the prime field too.
func (s *Subfields) ownGenerator(c *Context) error {
	P, err := field.Prime(c.W, s.Field.Characteristic())
	if err != nil {
		return err
	}
	f, err := s.Field.Generator().MinimalPolynomial(c.W, P)
	if err != nil {
		return err
	}
	if f.Degree() == s.Field.AbsoluteDegree() {
		s.Generator, s.Minimal = s.Field.Generator(), f
	}
	return nil
}

func (Lattice) Kind() string             { return "a lattice of fields" }
func (l Lattice) Text(p *Printer) string { return "lattice of " + l.Of.Text(p) }
func (l Lattice) Canonical() (string, map[string]any) {
	var nodes, edges []any
	for i, s := range l.Subs {
		nodes = append(nodes, map[string]any{
			"field": machineField(s.Field), "generator": machineCoefficients([]field.Elem{s.Generator})[0],
			"minimal polynomial": machineCoefficients(s.Minimal.Coefficients()),
		})
		for _, j := range l.Order.UpperCovers(i) {
			edges = append(edges, map[string]any{"from": i, "to": j, "degree": l.degree(j) / l.degree(i)})
		}
	}
	return "lattice of fields", map[string]any{"of": machineField(l.Of.L), "over": machineField(l.Of.K), "nodes": nodes, "edges": edges}
}

func (l Lattice) degree(i int) int { return l.Subs[i].Field.AbsoluteDegree() }

// Document is the Hasse diagram: degrees on the edges, a generator at every
// field.
func (l Lattice) Document(p *Printer) display.Document { return l.Diagram(p) }

// Diagram is the Hasse diagram of the lattice.
func (l Lattice) Diagram(p *Printer) display.Diagram {
	d := display.Diagram{
		Title:   "Fields between " + nameOf(p, l.Of.K) + " and " + nameOf(p, l.Of.L),
		Caption: fmt.Sprintf("The fields between %s and %s; on each edge stands the degree.", nameOf(p, l.Of.K), nameOf(p, l.Of.L)),
	}
	for i, s := range l.Subs {
		n := display.Node{
			ID: fmt.Sprint(l.degree(i)), Label: shortName(p, s.Field),
			Rank: l.Order.Rank(i),
			Emph: i == 0 || i == len(l.Subs)-1,
		}
		if !s.Field.IsPrime() {
			n.Sub = l.generatorLabel(p, i)
		}
		d.Nodes = append(d.Nodes, n)
		for _, j := range l.Order.UpperCovers(i) {
			d.Edges = append(d.Edges, display.Edge{From: fmt.Sprint(l.degree(i)), To: fmt.Sprint(l.degree(j)), Label: fmt.Sprint(l.degree(j) / l.degree(i))})
		}
	}
	return d
}

// widest generator that is written out at a node, in characters.
const labelWidth = 24

// generatorLabel is the generator at a node. Where one of the fields between
// has a generator too wide to write out, they all show their standard ones, so
// that the labels are of one kind.
func (l Lattice) generatorLabel(p *Printer, i int) string {
	s := elementText(p, l.Subs[i].Generator)
	if K := l.Subs[i].Field; i < len(l.Subs)-1 && K.IsStandard() && l.wide(p) {
		return generatorText(K)
	}
	if len(s) > labelWidth {
		return s[:labelWidth-4] + " ..."
	}
	return s
}

func (l Lattice) wide(p *Printer) bool {
	for _, s := range l.Subs[:len(l.Subs)-1] {
		if len(elementText(p, s.Generator)) > labelWidth {
			return true
		}
	}
	return false
}

// shortName names a field at a node: by its name in the session or its order.
func shortName(p *Printer, K *field.Field) string {
	if p != nil && p.FieldName != nil {
		if name, ok := p.FieldName(K); ok {
			if K.IsPrime() || K.IsStandard() {
				return orderText(K)
			}
			return name + " = " + orderText(K)
		}
	}
	return orderText(K)
}

// List is the list of the fields, shown as a table and drawn as the lattice.
func (l Lattice) List() List {
	n := &Notes{
		Heads:   []string{"degree", "field", "generator", "minimal polynomial"},
		Diagram: l.Diagram,
	}
	n.Caption = "Subfields of " + orderText(l.Of.L)
	if !l.Of.K.IsPrime() {
		n.Caption = "Fields between " + orderText(l.Of.K) + " and " + orderText(l.Of.L)
	}
	n.Note = fmt.Sprintf("minimal polynomials over F_%s", l.Of.L.Characteristic())
	items := make([]Value, len(l.Subs))
	for i, s := range l.Subs {
		items[i] = Field{s.Field}
		n.Rows = append(n.Rows, []Value{
			Int(l.degree(i) / l.degree(0)), Text{shortName(nil, s.Field)}, Element{s.Generator}, FieldPolynomial{s.Minimal, "x"},
		})
	}
	return List{Items: items, Notes: n}
}
