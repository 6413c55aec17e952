package value

import (
	"adjoin/algebra"
)

// eliminated is the result of the elimination of C. F. Gauss: the rows in
// reduced echelon form, with the determinant and the rank of the matrix.
type eliminated struct {
	rows [][]Value
	det  Value // of a square matrix
	rank int
}

// eliminate works on the first width columns; the others are carried along.
// The entries must lie in a field.
func eliminate(c *Context, m Matrix, width int) (eliminated, error) {
	rows := make([][]Value, len(m.Rows))
	for i, r := range m.Rows {
		rows[i] = append([]Value(nil), r...)
	}
	e := eliminated{rows: rows, det: Int(1)}
	var err error
	for col := 0; col < width && e.rank < len(rows); col++ {
		pivot := -1
		for i := e.rank; i < len(rows); i++ {
			if !rows[i][col].(number).isZero() {
				pivot = i
				break
			}
		}
		if pivot < 0 {
			continue
		}
		if pivot != e.rank {
			rows[pivot], rows[e.rank] = rows[e.rank], rows[pivot]
			if e.det, err = Negate(c, e.det); err != nil {
				return e, err
			}
		}
		p := rows[e.rank][col]
		if e.det, err = Operate(c, "*", e.det, p); err != nil {
			return e, err
		}
		for j := range rows[e.rank] {
			if rows[e.rank][j], err = Divide(c, rows[e.rank][j], p); err != nil {
				return e, err
			}
		}
		for i := range rows {
			if i == e.rank || rows[i][col].(number).isZero() {
				continue
			}
			if err := subtractMultiple(c, rows[i], rows[e.rank], rows[i][col]); err != nil {
				return e, err
			}
		}
		e.rank++
	}
	if e.rank < len(rows) {
		if e.det, err = Operate(c, "*", Int(0), m.Rows[0][0]); err != nil {
			return e, err
		}
	}
	return e, nil
}

// subtractMultiple subtracts f times b from the row a.
func subtractMultiple(c *Context, a, b []Value, f Value) error {
	c.W.Poll()
	for j := range a {
		t, err := Operate(c, "*", f, b[j])
		if err != nil {
			return err
		}
		if a[j], err = Operate(c, "-", a[j], t); err != nil {
			return err
		}
	}
	return nil
}

func (m Matrix) square() (int, error) {
	n, l := m.size()
	if n != l {
		return 0, algebra.Errorf(algebra.Undefined, "that is asked of a square matrix, and this one is %d by %d", n, l)
	}
	return n, nil
}

// Determinant is the determinant of a square matrix over a field, or over Z.
func (m Matrix) Determinant(c *Context) (Value, error) {
	n, err := m.square()
	if err != nil {
		return nil, err
	}
	e, err := eliminate(c, m, n)
	return e.det, err
}

// Rank is the dimension of the space of the rows.
func (m Matrix) Rank(c *Context) (Value, error) {
	_, width := m.size()
	e, err := eliminate(c, m, width)
	return Int(e.rank), err
}

// Inverse is the inverse of a square matrix over a field.
func (m Matrix) Inverse(c *Context) (Value, error) {
	n, err := m.square()
	if err != nil {
		return nil, err
	}
	one, err := identity(c, m)
	if err != nil {
		return nil, err
	}
	joined := Matrix{make([][]Value, n)}
	for i, r := range m.Rows {
		joined.Rows[i] = append(append([]Value(nil), r...), one.(Matrix).Rows[i]...)
	}
	e, err := eliminate(c, joined, n)
	if err != nil {
		return nil, err
	}
	if e.rank < n {
		return nil, algebra.Errorf(algebra.Undefined, "the matrix has no inverse: its rank is %d, not %d", e.rank, n)
	}
	rows := make([][]Value, n)
	for i := range rows {
		rows[i] = e.rows[i][n:]
	}
	return NewMatrix(c, rows)
}
