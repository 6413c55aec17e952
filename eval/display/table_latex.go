package display

import (
	"fmt"
	"strings"
)

// breakable is how many rows a table may have that stands in one piece on a
// printed page.
const breakable = 40

var alignLetter = map[Align]string{Left: "l", Right: "r", Center: "c"}

// LaTeX is the table as a tabular, or as a longtable when it has to be broken
// between pages; it needs the packages booktabs, longtable and amsmath.
func (t Table) LaTeX() string {
	shown := 0
	for _, p := range t.parts() {
		shown += len(p.rows)
	}
	var b strings.Builder
	format := ""
	for _, c := range t.Columns {
		format += alignLetter[c.Align]
	}
	if format == "" {
		format = "l"
	}
	caption := proseLaTeX(t.Caption)
	long := shown > breakable
	if long {
		fmt.Fprintf(&b, "\\begin{longtable}{%s}\n", format)
		if caption != "" {
			fmt.Fprintf(&b, "\\multicolumn{%d}{l}{%s}\\\\\n", len(t.Columns), caption)
		}
	} else {
		b.WriteString("\\begin{center}\n")
		if caption != "" {
			b.WriteString(caption + "\\par\\smallskip\n")
		}
		fmt.Fprintf(&b, "\\begin{tabular}{%s}\n", format)
	}
	b.WriteString("\\toprule\n")
	if t.hasHeads() {
		heads := make([]string, len(t.Columns))
		for i, c := range t.Columns {
			heads[i] = proseLaTeX(c.Head)
		}
		b.WriteString(strings.Join(heads, " & ") + ` \\` + "\n\\midrule\n")
		if long {
			b.WriteString("\\endhead\n")
		}
	}
	for _, p := range t.parts() {
		for _, row := range p.rows {
			cells := make([]string, len(t.Columns))
			for i := range t.Columns {
				cells[i] = t.cell(row, i).latex()
			}
			b.WriteString(latexRow(cells))
		}
		if p.omitted > 0 {
			fmt.Fprintf(&b, "\\multicolumn{%d}{c}{$\\vdots$ \\footnotesize %s} \\\\\n", max(1, len(t.Columns)), omission(p.omitted))
		}
	}
	b.WriteString("\\bottomrule\n")
	if long {
		b.WriteString("\\end{longtable}")
	} else {
		b.WriteString("\\end{tabular}")
	}
	for _, note := range t.notes() {
		b.WriteString("\\par\\smallskip\n{\\footnotesize " + proseLaTeX(note) + "}")
	}
	if !long {
		b.WriteString("\n\\end{center}")
	}
	return b.String()
}

// latexRow joins cells. A row whose first cell opens with a bracket or a star
// would be taken as an argument of the row before it.
func latexRow(cells []string) string {
	line := strings.Join(cells, " & ")
	if strings.HasPrefix(line, "[") || strings.HasPrefix(line, "*") {
		line = "{}" + line
	}
	return line + ` \\` + "\n"
}

func (c Cell) latex() string {
	switch {
	case c.TeX == "":
		return proseLaTeX(c.Text)
	case balanced(c.TeX):
		return "$" + c.TeX + "$"
	}
	return "$" + notationTeX(c.Text) + "$"
}
