package display

import "fmt"

// Align is where the content of a column stands.
type Align int

// The alignments; columns of numbers are right aligned.
const (
	Left Align = iota
	Right
	Center
)

// Column is the head of a column and the alignment of its cells.
type Column struct {
	Head  string
	Align Align
}

// Cell is one entry: as plain text in the notation of the cells, and as the
// inside of a TeX formula where there is one.
type Cell struct{ Text, TeX string }

// Table is a table with a caption above and a note below. Each row has at most
// as many cells as there are columns; missing cells are empty.
type Table struct {
	Caption string
	Columns []Column
	Rows    [][]Cell
	Note    string
	// Total is the number of rows of the whole table when Rows holds only its
	// first ones, else 0 or len(Rows).
	Total int
}

// Rows of a folded table: a table of more than longTable rows shows its first
// headRows and its last tailRows.
const (
	longTable = 60
	headRows  = 20
	tailRows  = 5
)

// fewFormulas is how many cells of a table may be typeset by the notebook;
// beyond, that is too slow, and the cells use sub- and superscripts.
const fewFormulas = 100

// part is a stretch of rows that are shown, and the number left out after it.
type part struct {
	rows    [][]Cell
	omitted int
}

// parts folds the rows.
func (t Table) parts() []part {
	unseen := max(0, t.Total-len(t.Rows))
	if len(t.Rows) <= longTable {
		return []part{{t.Rows, unseen}}
	}
	tail := tailRows
	if unseen > 0 { // the last rows of all are not at hand
		tail = 0
	}
	cut := len(t.Rows) - tail
	list := []part{{t.Rows[:headRows], cut - headRows + unseen}}
	if tail > 0 {
		list = append(list, part{t.Rows[cut:], 0})
	}
	return list
}

// total is the number of rows of the whole table.
func (t Table) total() int { return max(t.Total, len(t.Rows)) }

// omission says in the place of left out rows how many there are.
func omission(n int) string {
	if n == 1 {
		return "1 row not shown"
	}
	return fmt.Sprintf("%d rows not shown", n)
}

// notes are the lines under the table: the note, and the exact counts when
// rows are left out.
func (t Table) notes() []string {
	var list []string
	shown := 0
	for _, p := range t.parts() {
		shown += len(p.rows)
	}
	if shown < t.total() {
		line := fmt.Sprintf("%d of %d rows are shown", shown, t.total())
		if len(t.Rows) == t.total() {
			line += "; as CSV gives all of them"
		}
		list = append(list, line)
	}
	if t.Note != "" {
		list = append(list, oneLine(t.Note))
	}
	return list
}

func (t Table) cell(row []Cell, i int) Cell {
	if i < len(row) {
		return row[i]
	}
	return Cell{}
}

// Bundle has the table as text, HTML and LaTeX.
func (t Table) Bundle() Bundle {
	return Bundle{Data: map[string]any{
		MIMEText:  t.Text(),
		MIMEHTML:  t.HTML(),
		MIMELaTeX: t.LaTeX(),
	}}
}
