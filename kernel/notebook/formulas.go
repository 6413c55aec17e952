package notebook

import (
	"html"
	"strings"
)

// delimiters of formulas in text and tables, and whether they stand alone.
var delimiters = []struct {
	open, close string
	block       bool
}{
	{"$$", "$$", true}, {`\[`, `\]`, true}, {`\(`, `\)`, false}, {"$", "$", false},
}

// typesetHTML replaces the formulas in the text of HTML, which stand between
// \( and \), by MathML. Formulas that are not known stay as they are.
func typesetHTML(s string) string {
	var b strings.Builder
	for s != "" {
		n := strings.IndexAny(s, `<\`)
		if n < 0 {
			break
		}
		b.WriteString(s[:n])
		s = s[n:]
		length := 1
		if s[0] == '<' { // a tag stays as it is
			if end := strings.IndexByte(s, '>'); end > 0 {
				length = end + 1
			}
		} else if math, n := formulaAt(s, true); n > 0 {
			b.WriteString(math)
			s = s[n:]
			continue
		}
		b.WriteString(s[:length])
		s = s[length:]
	}
	return b.String() + s
}

// formulaAt is the formula at the beginning of s, as MathML, and its length
// there; 0 when there is none that is known. In HTML a dollar is a dollar.
func formulaAt(s string, inHTML bool) (math string, length int) {
	for _, d := range delimiters {
		rest, ok := strings.CutPrefix(s, d.open)
		if !ok || inHTML && d.open[0] == '$' {
			continue
		}
		end := strings.Index(rest, d.close)
		if end <= 0 {
			return "", 0
		}
		tex := rest[:end]
		if inHTML {
			tex = html.UnescapeString(tex)
		}
		if math, ok = MathML(tex, d.block); !ok {
			return "", 0
		}
		return math, len(d.open) + end + len(d.close)
	}
	return "", 0
}

// formula is a text/latex form as MathML; ok is false when it is not one
// formula, or not known.
func formula(latex string) (math string, ok bool) {
	latex = strings.TrimSpace(latex)
	math, length := formulaAt(latex, false)
	return math, length > 0 && length == len(latex)
}
