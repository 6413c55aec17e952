package display

import (
	"fmt"
	"strings"
)

// TikZ is the figure as a tikzpicture, which needs the packages tikz and
// amsmath (amssymb where a label has a letter such as 𝔽) and no TikZ library.
func (d Diagram) TikZ() string {
	pic := d.draw()
	l := d.layered()
	var b strings.Builder
	if d.Title != "" {
		b.WriteString("% " + oneLine(visible(d.Title)) + "\n")
	}
	b.WriteString("\\begin{tikzpicture}[x=1bp,y=1bp,\n" +
		"  field/.style={draw=black!45,rounded corners=3bp,fill=white,align=center,inner sep=4bp},\n" +
		"  strong/.style={field,draw=black,line width=0.9bp},\n" +
		"  degree/.style={fill=white,inner sep=1.2bp,font=\\scriptsize}]\n")
	for i, n := range d.Nodes {
		style := "field"
		if n.Emph {
			style = "strong"
		}
		text := "$" + notationTeX(n.Label) + "$"
		if n.Sub != "" {
			text += `\\[-1pt]{\scriptsize$` + notationTeX(n.Sub) + "$}"
		}
		c := pic.boxes[i].center
		fmt.Fprintf(&b, "  \\node[%s] (n%d) at (%s,%s) {%s};\n", style, i, number(c.x), number(pic.height-c.y), text)
	}
	for k, e := range l.edges {
		points := pic.lines[k].points
		fmt.Fprintf(&b, "  \\draw (n%d)", e.lower)
		for _, p := range points[1 : len(points)-1] {
			fmt.Fprintf(&b, " -- (%s,%s)", number(p.x), number(pic.height-p.y))
		}
		fmt.Fprintf(&b, " -- (n%d);\n", e.upper)
	}
	for _, m := range pic.marks {
		fmt.Fprintf(&b, "  \\node[degree] at (%s,%s) {$%s$};\n", number(m.center.x), number(pic.height-m.center.y), notationTeX(l.edges[m.edge].label))
	}
	b.WriteString("\\end{tikzpicture}\n")
	return b.String()
}
