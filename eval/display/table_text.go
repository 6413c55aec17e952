package display

import (
	"encoding/csv"
	"strings"
)

// gutter parts the columns of a text table.
const gutter = "  "

// Text is the table in aligned columns, with a rule under the heads.
func (t Table) Text() string {
	width := make([]int, len(t.Columns))
	for i, c := range t.Columns {
		width[i] = textWidth(plain(c.Head))
		for _, p := range t.parts() {
			for _, row := range p.rows {
				width[i] = max(width[i], textWidth(plain(t.cell(row, i).Text)))
			}
		}
	}
	var b strings.Builder
	if t.Caption != "" {
		b.WriteString(oneLine(t.Caption) + "\n")
	}
	line := func(cell func(i int) string) {
		parts := make([]string, len(t.Columns))
		for i, c := range t.Columns {
			parts[i] = pad(cell(i), width[i], c.Align)
		}
		b.WriteString(strings.TrimRight(strings.Join(parts, gutter), " ") + "\n")
	}
	if t.hasHeads() {
		line(func(i int) string { return plain(t.Columns[i].Head) })
		line(func(i int) string { return strings.Repeat("-", width[i]) })
	}
	for _, p := range t.parts() {
		for _, row := range p.rows {
			line(func(i int) string { return plain(t.cell(row, i).Text) })
		}
		if p.omitted > 0 {
			b.WriteString("... " + omission(p.omitted) + "\n")
		}
	}
	for _, note := range t.notes() {
		b.WriteString(note + "\n")
	}
	return strings.TrimRight(b.String(), "\n")
}

// plain keeps a cell on one line.
func plain(s string) string { return visible(s) }

func pad(s string, width int, a Align) string {
	free := max(0, width-textWidth(s))
	switch a {
	case Right:
		return strings.Repeat(" ", free) + s
	case Center:
		return strings.Repeat(" ", free/2) + s + strings.Repeat(" ", free-free/2)
	}
	return s + strings.Repeat(" ", free)
}

// CSV is the whole table, not folded, with the heads as its first line, after
// RFC 4180 (Y. Shafranovich, Common Format and MIME Type for Comma-Separated
// Values (CSV) Files, 2005): lines end in CRLF. Caption and note are left out.
func (t Table) CSV() string {
	var b strings.Builder
	w := csv.NewWriter(&b)
	w.UseCRLF = true
	record := make([]string, len(t.Columns))
	if t.hasHeads() {
		for i, c := range t.Columns {
			record[i] = c.Head
		}
		w.Write(record) // a strings.Builder takes everything
	}
	for _, row := range t.Rows {
		for i := range t.Columns {
			record[i] = t.cell(row, i).Text
		}
		w.Write(record)
	}
	w.Flush()
	return b.String()
}
