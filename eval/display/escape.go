package display

import "strings"

var htmlEscaper = strings.NewReplacer(
	"&", "&amp;", "<", "&lt;", ">", "&gt;", `"`, "&#34;", "'", "&#39;",
	// A dollar or a backslash in an element of its own never pairs with
	// another into the delimiters of a formula, which are sought within one
	// stretch of text.
	"$", "<span>$</span>", `\`, `<span>\</span>`,
)

// escapeHTML makes text the content of an HTML element.
func escapeHTML(text string) string { return htmlEscaper.Replace(visible(text)) }

var xmlEscaper = strings.NewReplacer("&", "&amp;", "<", "&lt;", ">", "&gt;", `"`, "&#34;", "'", "&#39;")

// escapeXML makes text the content of an XML element or attribute.
func escapeXML(text string) string { return xmlEscaper.Replace(visible(text)) }

// visible replaces what no form can show: invalid UTF-8 and control
// characters, which XML forbids. Line ends and tabs become spaces.
func visible(text string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == '\n' || r == '\t' || r == '\r':
			return ' '
		case r < 0x20 || 0x7f <= r && r < 0xa0 || r == 0xfffe || r == 0xffff:
			return '\uFFFD'
		}
		return r
	}, strings.ToValidUTF8(text, "\uFFFD"))
}

var latexEscaper = strings.NewReplacer(
	`\`, `\textbackslash{}`, "{", `\{`, "}", `\}`, "$", `\$`, "&", `\&`, "#", `\#`, "%", `\%`,
	"_", `\_`, "^", `\textasciicircum{}`, "~", `\textasciitilde{}`, "<", `\textless{}`, ">", `\textgreater{}`,
	"|", `\textbar{}`,
)

// escapeLaTeX makes text the content of a LaTeX paragraph. Mathematical
// characters become formulas; what pdfLaTeX cannot print is spelled out as
// U+ and its code, so that it compiles and nothing is lost silently.
func escapeLaTeX(text string) string {
	var b strings.Builder
	for _, r := range latexEscaper.Replace(visible(text)) {
		switch tex, known := texSymbols[r]; {
		case r < 0x7f:
			b.WriteRune(r)
		case known:
			b.WriteString(`\ensuremath{` + tex + `}`)
		case isLatin1Letter(r):
			b.WriteRune(r)
		case r == 0xa0:
			b.WriteString("~")
		default:
			b.WriteString(codePoint(r))
		}
	}
	return b.String()
}

func isLatin1Letter(r rune) bool { return 0xc0 <= r && r <= 0xff && r != 0xd7 && r != 0xf7 }
