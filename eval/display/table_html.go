package display

import (
	"fmt"
	"strings"
)

// Inline styles are the only ones that a notebook keeps which its reader has
// not declared trusted.
var alignStyle = map[Align]string{Left: "text-align:left", Right: "text-align:right", Center: "text-align:center"}

// HTML is the table as an HTML table that scrolls sideways when it is wide.
func (t Table) HTML() string {
	var b strings.Builder
	b.WriteString("<div style=\"overflow-x:auto\">\n<table>\n")
	if t.Caption != "" {
		fmt.Fprintf(&b, "<caption style=\"text-align:left\">%s</caption>\n", proseHTML(t.Caption))
	}
	if t.hasHeads() {
		b.WriteString("<thead>\n<tr>")
		for _, c := range t.Columns {
			fmt.Fprintf(&b, "<th scope=\"col\" style=%q>%s</th>", alignStyle[c.Align], proseHTML(c.Head))
		}
		b.WriteString("</tr>\n</thead>\n")
	}
	b.WriteString("<tbody>\n")
	typeset := t.formulas() <= fewFormulas
	for _, p := range t.parts() {
		for _, row := range p.rows {
			b.WriteString("<tr>")
			for i, c := range t.Columns {
				fmt.Fprintf(&b, "<td style=%q>%s</td>", alignStyle[c.Align], t.cell(row, i).html(typeset))
			}
			b.WriteString("</tr>\n")
		}
		if p.omitted > 0 {
			fmt.Fprintf(&b, "<tr><td colspan=\"%d\" style=\"text-align:center\">⋮ <small>%s</small></td></tr>\n", len(t.Columns), omission(p.omitted))
		}
	}
	b.WriteString("</tbody>\n</table>\n")
	for _, note := range t.notes() {
		fmt.Fprintf(&b, "<p><small>%s</small></p>\n", proseHTML(note))
	}
	b.WriteString("</div>")
	return b.String()
}

func (t Table) hasHeads() bool {
	for _, c := range t.Columns {
		if c.Head != "" {
			return true
		}
	}
	return false
}

// formulas counts the cells that would be typeset among those shown.
func (t Table) formulas() int {
	n := 0
	for _, p := range t.parts() {
		for _, row := range p.rows {
			for _, c := range row {
				if c.needsTypesetting() {
					n++
				}
			}
		}
	}
	return n
}

// needsTypesetting tells a formula from a plain number, which needs none.
func (c Cell) needsTypesetting() bool {
	return c.TeX != "" && strings.Trim(c.TeX, "0123456789") != ""
}

func (c Cell) html(typeset bool) string {
	switch {
	case c.TeX == "":
		return proseHTML(c.Text)
	case typeset && c.needsTypesetting() && balanced(c.TeX):
		return `\(` + escapeXML(c.TeX) + `\)`
	}
	return notationHTML(c.Text)
}

// balanced says whether TeX can stand between delimiters: no delimiter of its
// own and every brace closed.
func balanced(tex string) bool {
	depth := 0
	for i := 0; i < len(tex); i++ {
		switch tex[i] {
		case '\\':
			i++
			if i == len(tex) || strings.IndexByte("()[]", tex[i]) >= 0 {
				return false
			}
		case '{':
			depth++
		case '}':
			if depth--; depth < 0 {
				return false
			}
		case '$', '%':
			return false
		}
	}
	return depth == 0
}
