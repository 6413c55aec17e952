package display

import (
	"fmt"
	"strings"
)

// Formula is a formula as text, in the notation of the cells, and as the
// inside of a TeX formula.
type Formula struct{ Text, TeX string }

// A formula of more than manyTerms terms shows its first and its last ones.
const (
	manyTerms = 24
	headTerms = 8
	tailTerms = 4
)

// lineWidth is the estimated width, in characters, at which a sum is broken
// into lines: notebooks do not break formulas by themselves.
const lineWidth = 90

// Bundle has the whole text and the typeset formula. Readers take text/html
// before text/latex, so there is none.
func (f Formula) Bundle() Bundle {
	b := Bundle{Data: map[string]any{MIMEText: f.Text}}
	if f.TeX != "" {
		b.Data[MIMELaTeX] = f.LaTeX()
	}
	return b
}

// LaTeX is the formula between dollars. A long sum is broken into lines, and a
// very long one folded, with the exact number of its terms.
func (f Formula) LaTeX() string {
	terms := topLevelTerms(f.TeX)
	if len(terms) > manyTerms {
		folded := append([]string{}, terms[:headTerms]...)
		folded = append(folded, `+ \cdots`)
		folded = append(folded, terms[len(terms)-tailTerms:]...)
		return "$" + breakLines(folded, fmt.Sprintf(`\quad\text{(%d terms)}`, len(terms))) + "$"
	}
	return "$" + breakLines(terms, "") + "$"
}

// topLevelTerms splits TeX before each + and - that stands between two terms
// outside of all brackets and environments. Joined by spaces they are the same
// formula again.
func topLevelTerms(tex string) []string {
	if strings.Contains(tex, `\begin`) || strings.Contains(tex, `\left`) || strings.Contains(tex, "&") {
		return []string{tex}
	}
	var list []string
	depth, start := 0, 0
	for i := 0; i < len(tex); i++ {
		switch tex[i] {
		case '\\':
			i++
		case '{', '(', '[':
			depth++
		case '}', ')', ']':
			depth--
		case '+', '-':
			if depth == 0 && isBinary(tex[:i]) {
				list = append(list, strings.TrimSpace(tex[start:i]))
				start = i
			}
		}
	}
	return append(list, strings.TrimSpace(tex[start:]))
}

// isBinary says whether a sign after before joins two terms: before ends in an
// operand, not in another sign, relation or script mark.
func isBinary(before string) bool {
	before = strings.TrimRight(before, " ")
	return before != "" && !strings.ContainsRune("+-=<>^_({[,", rune(before[len(before)-1])) &&
		!strings.HasSuffix(before, `\cdot`) && !strings.HasSuffix(before, `\mapsto`) && !strings.HasSuffix(before, `\to`)
}

// breakLines puts as many terms on a line as fit.
func breakLines(terms []string, tail string) string {
	var lines []string
	line, width := "", 0
	for i, t := range terms {
		w := formulaColumns(t)
		if i > 0 && width+w > lineWidth {
			lines = append(lines, line)
			line, width = "", 0
		}
		if line != "" {
			line += " "
		}
		line += t
		width += w
	}
	lines = append(lines, line+tail)
	if len(lines) == 1 {
		return lines[0]
	}
	for i := range lines {
		lines[i] = "&" + lines[i]
		if i > 0 {
			lines[i] = `&\quad ` + lines[i][1:]
		}
	}
	return `\begin{aligned}` + strings.Join(lines, `\\ `) + `\end{aligned}`
}

// formulaColumns estimates the width of TeX: a command counts as one
// character, braces and script marks as none.
func formulaColumns(tex string) int {
	n := 1
	for i := 0; i < len(tex); i++ {
		switch c := tex[i]; {
		case c == '\\':
			n++
			for i+1 < len(tex) && ('a' <= tex[i+1] && tex[i+1] <= 'z' || 'A' <= tex[i+1] && tex[i+1] <= 'Z') {
				i++
			}
		case strings.IndexByte("{}^_ ", c) < 0:
			n++
		}
	}
	return n
}
