package display

import (
	"fmt"
	"strings"
)

// Matrix is a matrix of entries.
type Matrix struct {
	Caption string
	Rows    [][]Cell
}

// wideMatrix is the most columns, and rows, that a typeset matrix shows; a
// larger one is shown as text only, which can be scrolled.
const wideMatrix = 32

// Bundle has the matrix as text and typeset.
func (m Matrix) Bundle() Bundle {
	b := Bundle{Data: map[string]any{MIMEText: m.Text()}}
	if rows, columns := m.size(); rows <= wideMatrix && columns <= wideMatrix {
		b.Data[MIMELaTeX] = m.LaTeX()
	}
	return b
}

func (m Matrix) size() (rows, columns int) {
	for _, r := range m.Rows {
		columns = max(columns, len(r))
	}
	return len(m.Rows), columns
}

// table is the matrix as a table without heads.
func (m Matrix) table() Table {
	_, columns := m.size()
	t := Table{Caption: m.Caption, Rows: m.Rows, Columns: make([]Column, columns)}
	for i := range t.Columns {
		t.Columns[i].Align = Right
	}
	return t
}

// Text is the matrix in aligned columns between brackets.
func (m Matrix) Text() string {
	_, columns := m.size()
	width := make([]int, columns)
	for _, row := range m.Rows {
		for i, c := range row {
			width[i] = max(width[i], textWidth(plain(c.Text)))
		}
	}
	var lines []string
	if m.Caption != "" {
		lines = append(lines, oneLine(m.Caption))
	}
	for _, row := range m.Rows {
		parts := make([]string, columns)
		for i := range parts {
			text := ""
			if i < len(row) {
				text = plain(row[i].Text)
			}
			parts[i] = pad(text, width[i], Right)
		}
		lines = append(lines, "["+strings.Join(parts, " ")+"]")
	}
	return strings.Join(lines, "\n")
}

// HTML is the matrix as an HTML table without heads.
func (m Matrix) HTML() string { return m.table().HTML() }

// LaTeX is the matrix as a formula. The environment array takes any number of
// columns, where pmatrix stops at ten.
func (m Matrix) LaTeX() string {
	_, columns := m.size()
	rows := make([]string, len(m.Rows))
	for i, row := range m.Rows {
		cells := make([]string, len(row))
		for j, c := range row {
			cells[j] = c.math()
		}
		rows[i] = strings.Join(cells, " & ")
	}
	return fmt.Sprintf(`$\left(\begin{array}{%s}%s\end{array}\right)$`, strings.Repeat("c", max(1, columns)), strings.Join(rows, ` \\ `))
}

// math is the cell as the inside of a formula.
func (c Cell) math() string {
	if c.TeX != "" && balanced(c.TeX) {
		return c.TeX
	}
	return notationTeX(c.Text)
}

// Sequence is a list or a set of items that are few enough to be read in a
// row, or are folded to that.
type Sequence struct {
	Open, Close string // such as [ and ], or { and }
	Items       []Cell
	Total       int // number of items of the whole when Items holds only the first ones
}

// A sequence of more than manyItems items shows its first and its last ones.
const (
	manyItems = 40
	headItems = 24
	tailItems = 4
)

// Bundle has the sequence as text and typeset.
func (s Sequence) Bundle() Bundle {
	return Bundle{Data: map[string]any{MIMEText: s.Text(), MIMELaTeX: s.LaTeX()}}
}

// fold lists the items that are shown, with gap in the place of those left
// out, and a remark on the number of all when some are.
func (s Sequence) fold(item func(Cell) string, gap string) (list []string, remark string) {
	total := max(s.Total, len(s.Items))
	items := make([]string, 0, manyItems)
	for i, c := range s.Items {
		if len(s.Items) > manyItems && i >= headItems && i < len(s.Items)-tailItems {
			if i == headItems {
				items = append(items, gap)
			}
			continue
		}
		items = append(items, item(c))
	}
	if total > len(s.Items) {
		items = append(items, gap)
	}
	if total > manyItems || total > len(s.Items) {
		remark = fmt.Sprintf("(%d items)", total)
	}
	return items, remark
}

// Text is the sequence on one line.
func (s Sequence) Text() string {
	items, remark := s.fold(func(c Cell) string { return plain(c.Text) }, "...")
	text := s.Open + strings.Join(items, ", ") + s.Close
	if remark != "" {
		text += "  # " + remark
	}
	return text
}

// LaTeX is the sequence as a formula. Items may be put on the next line.
func (s Sequence) LaTeX() string {
	items, remark := s.fold(Cell.math, `\ldots`)
	if remark != "" {
		remark = `\quad\text{` + remark + `}`
	}
	return "$" + notationTeX(s.Open) + strings.Join(items, `, `) + notationTeX(s.Close) + remark + "$"
}
