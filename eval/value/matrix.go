package value

import (
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// Matrix is a matrix of numbers that lie in one structure.
type Matrix struct{ Rows [][]Value }

// Vector is the list of the coordinates of something, first coordinate first.
type Vector struct {
	Entries []field.Elem
	Order   string // what the places mean, for the reader
}

func (m Matrix) Kind() string { return "a matrix" }
func (Vector) Kind() string   { return "a vector" }

func (m Matrix) Text(p *Printer) string {
	rows := make([]Value, len(m.Rows))
	for i, r := range m.Rows {
		rows[i] = List{Items: r}
	}
	bare, ring := make([]string, len(rows)), ""
	for i, r := range m.Rows {
		b, o := entries(p, r)
		bare[i] = "[" + b + "]"
		if o != "" {
			ring = o
		}
	}
	text := "matrix of [" + strings.Join(bare, ", ") + "]"
	if ring != "" {
		return "(" + text + ") over " + ring
	}
	return text
}

// entries lists numbers without their ring, and the ring that has to be named.
func entries(p *Printer, row []Value) (string, string) {
	texts, ring := make([]string, len(row)), ""
	for i, v := range row {
		if o, ok := v.(overRing); ok {
			texts[i], ring = o.overText(p)
			continue
		}
		if e, ok := v.(Element); ok && e.E.Field().IsPrime() {
			ring = nameOf(p, e.E.Field())
		}
		texts[i] = v.Text(p)
	}
	return strings.Join(texts, ", "), ring
}

func (m Matrix) TeX(p *Printer) string {
	rows := make([]string, len(m.Rows))
	for i, r := range m.Rows {
		cells := make([]string, len(r))
		for j, v := range r {
			cells[j] = TeX(p, v)
		}
		rows[i] = strings.Join(cells, " & ")
	}
	return `\begin{pmatrix} ` + strings.Join(rows, ` \\ `) + ` \end{pmatrix}`
}

func (m Matrix) Canonical() (string, map[string]any) {
	rows := make([]any, len(m.Rows))
	for i, r := range m.Rows {
		row := make([]any, len(r))
		for j, v := range r {
			row[j] = machinePart(v)
		}
		rows[i] = row
	}
	return "matrix", map[string]any{"rows": rows}
}

func (v Vector) items() []Value {
	items := make([]Value, len(v.Entries))
	for i, e := range v.Entries {
		items[i] = Element{e}
	}
	return items
}

func (v Vector) Text(p *Printer) string { return List{Items: v.items()}.Text(p) }
func (v Vector) TeX(p *Printer) string  { return `\left(` + texList(p, v.items()) + `\right)` }
func (v Vector) Canonical() (string, map[string]any) {
	return "vector", map[string]any{"entries": machineCoefficients(v.Entries)}
}

// NewMatrix is the matrix with the given rows, all of one length, moved to
// where their entries meet.
func NewMatrix(c *Context, rows [][]Value) (Matrix, error) {
	var where number
	for _, r := range rows {
		for _, v := range r {
			x, ok := operand(v).(number)
			if !ok {
				return Matrix{}, algebra.Errorf(algebra.Invalid, "the entries of a matrix are numbers, not %s", v.Kind())
			}
			if where == nil {
				where = x
				continue
			}
			var err error
			if where, _, err = meet(c, where, x); err != nil {
				return Matrix{}, err
			}
		}
	}
	m := Matrix{make([][]Value, len(rows))}
	for i, r := range rows {
		m.Rows[i] = make([]Value, len(r))
		for j, v := range r {
			_, x, err := meet(c, where, operand(v).(number))
			if err != nil {
				return Matrix{}, err
			}
			m.Rows[i][j] = x
			if q, ok := x.(Rational); ok {
				m.Rows[i][j] = NewRational(q.Q)
			}
		}
	}
	return m, nil
}

func (m Matrix) size() (int, int) { return len(m.Rows), len(m.Rows[0]) }

func (m Matrix) over(c *Context, K *field.Field) (Value, error) {
	rows := make([][]Value, len(m.Rows))
	for i, r := range m.Rows {
		moved, err := overEach(c, r, Field{K})
		if err != nil {
			return nil, err
		}
		rows[i] = moved
	}
	return Matrix{rows}, nil
}

func matrixSum(c *Context, a, b Value) (Value, error) {
	return entrywise(c, "+", a.(Matrix), b.(Matrix))
}
func matrixDifference(c *Context, a, b Value) (Value, error) {
	return entrywise(c, "-", a.(Matrix), b.(Matrix))
}

func entrywise(c *Context, op string, a, b Matrix) (Value, error) {
	n, m := a.size()
	if k, l := b.size(); n != k || m != l {
		return nil, algebra.Errorf(algebra.Undefined, "a %d by %d matrix and a %d by %d matrix have no sum", n, m, k, l)
	}
	rows := make([][]Value, n)
	for i := range rows {
		rows[i] = make([]Value, m)
		for j := range rows[i] {
			v, err := Operate(c, op, a.Rows[i][j], b.Rows[i][j])
			if err != nil {
				return nil, err
			}
			rows[i][j] = v
		}
	}
	return Matrix{rows}, nil
}

func matrixProduct(c *Context, x, y Value) (Value, error) {
	a, b := x.(Matrix), y.(Matrix)
	n, m := a.size()
	k, l := b.size()
	if m != k {
		return nil, algebra.Errorf(algebra.Undefined, "a %d by %d matrix and a %d by %d matrix have no product: the first has %d columns, the second %d rows", n, m, k, l, m, k)
	}
	rows := make([][]Value, n)
	for i := range rows {
		rows[i] = make([]Value, l)
		for j := range rows[i] {
			c.W.Poll()
			var sum Value
			for t := range m {
				v, err := Operate(c, "*", a.Rows[i][t], b.Rows[t][j])
				if err == nil && sum != nil {
					v, err = Operate(c, "+", sum, v)
				}
				if err != nil {
					return nil, err
				}
				sum = v
			}
			rows[i][j] = sum
		}
	}
	return NewMatrix(c, rows)
}

func scalarTimesMatrix(c *Context, a, b Value) (Value, error) {
	m := b.(Matrix)
	rows := make([][]Value, len(m.Rows))
	for i, r := range m.Rows {
		rows[i] = make([]Value, len(r))
		for j, v := range r {
			w, err := Operate(c, "*", a, v)
			if err != nil {
				return nil, err
			}
			rows[i][j] = w
		}
	}
	return Matrix{rows}, nil
}

func matrixTimesVector(c *Context, a, b Value) (Value, error) {
	column := Matrix{}
	for _, v := range b.(Vector).items() {
		column.Rows = append(column.Rows, []Value{v})
	}
	p, err := matrixProduct(c, a, column)
	if err != nil {
		return nil, err
	}
	var entries []field.Elem
	for _, r := range p.(Matrix).Rows {
		e, ok := r[0].(Element)
		if !ok {
			return p, nil
		}
		entries = append(entries, e.E)
	}
	return Vector{Entries: entries}, nil
}

func matrixPower(c *Context, a, b Value) (Value, error) {
	m, e := a.(Matrix), b.(Integer).N
	if _, err := m.square(); err != nil {
		return nil, err
	}
	switch {
	case e.Sign() < 0:
		inverse, err := m.Inverse(c)
		if err != nil {
			return nil, err
		}
		return matrixPower(c, inverse, Integer{new(big.Int).Neg(e)})
	case e.Sign() == 0:
		return identity(c, m)
	}
	return powerBySquaring(c, m, e, func(x, y Matrix) (Matrix, error) {
		v, err := matrixProduct(c, x, y)
		if err != nil {
			return Matrix{}, err
		}
		return v.(Matrix), nil
	})
}

func identity(c *Context, m Matrix) (Value, error) {
	rows := make([][]Value, len(m.Rows))
	for i := range rows {
		rows[i] = make([]Value, len(m.Rows))
		for j := range rows[i] {
			v, err := Operate(c, "^", m.Rows[0][0], Int(0))
			if err == nil && i != j {
				v, err = Operate(c, "-", v, v)
			}
			if err != nil {
				return nil, err
			}
			rows[i][j] = v
		}
	}
	return Matrix{rows}, nil
}

func equalMatrices(c *Context, a, b Matrix) (algebra.Verdict, error) {
	n, m := a.size()
	if k, l := b.size(); n != k || m != l {
		return algebra.Because(false, "their sizes differ"), nil
	}
	for i := range a.Rows {
		for j := range a.Rows[i] {
			v, err := Equal(c, a.Rows[i][j], b.Rows[i][j])
			if err != nil || !v.Holds {
				if err == nil {
					v = algebra.Because(false, "they differ in row %d, column %d", i+1, j+1)
				}
				return v, err
			}
		}
	}
	return algebra.Because(true, "compared entry by entry"), nil
}

// Trace is the sum of the diagonal.
func (m Matrix) Trace(c *Context) (Value, error) {
	n, err := m.square()
	if err != nil {
		return nil, err
	}
	sum := m.Rows[0][0]
	for i := 1; i < n; i++ {
		if sum, err = Operate(c, "+", sum, m.Rows[i][i]); err != nil {
			return nil, err
		}
	}
	return sum, nil
}
