package display

import (
	"encoding/xml"
	"io"
	"strings"
	"testing"
	"unicode/utf8"
)

var nasty = []string{
	"", "a", "<script>alert(1)</script>", "a && b", `"quoted" 'twice'`, "$x$ and $y$", `\(x\) \begin{a}`, "]]>", "<!--", "&amp;",
	"100% #1 _x_ {y} ~z^2 |w|", "\x00\x01\x7f\u0085", "\xff\xfe", "a\tb\nc\r\n", "𝔽₂ ↦ ζ", "\u202e\u200b\ufeff", "漢字", "^^_{{", "F_{2^{3^{4^{5}}}}", "x^", "_", "^{", "a_{}", "\ufffe",
}

func FuzzEscapes(f *testing.F) {
	for _, s := range nasty {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		// HTML and XML give the text back; no stretch of HTML text holds a
		// delimiter together with anything else.
		if got := wellFormed(t, "<p>"+escapeXML(s)+"</p>"); got != visible(s) {
			t.Errorf("as XML %q reads %q", s, got)
		}
		if got := wellFormed(t, "<p>"+escapeHTML(s)+"</p>"); got != visible(s) {
			t.Errorf("as HTML %q reads %q", s, got)
		}
		noDelimiters(t, escapeHTML(s))
		noDelimiters(t, notationHTML(s))
		wellFormed(t, "<p>"+notationHTML(s)+proseHTML(s)+"</p>")
		wellFormed(t, Diagram{Title: s, Caption: s, Nodes: []Node{{ID: s, Label: s, Sub: s}, {ID: "b", Label: s, Rank: 1}}, Edges: []Edge{{s, "b", s}}}.SVG())
		for _, tex := range []string{escapeLaTeX(s), notationTeX(s)} {
			if !latexIsSafe(tex) {
				t.Errorf("LaTeX of %q is %q", s, tex)
			}
		}
		if isASCII(s) && unescapeLaTeX(escapeLaTeX(s)) != visible(s) {
			t.Errorf("LaTeX of %q is %q", s, escapeLaTeX(s))
		}
		if tex := notationTeX(s); !balanced(strings.NewReplacer(`\$`, "", `\%`, "").Replace(tex)) {
			t.Errorf("formula %q of %q cannot stand between delimiters", tex, s)
		}
	})
}

func noDelimiters(t *testing.T, html string) {
	d := xml.NewDecoder(strings.NewReader("<p>" + html + "</p>"))
	for {
		token, err := d.Token()
		if err == io.EOF {
			return
		}
		if err != nil {
			t.Fatal(err)
		}
		if data, ok := token.(xml.CharData); ok && len(data) > 1 && strings.ContainsAny(string(data), `$\`) {
			t.Errorf("%q could open a formula in %s", data, html)
		}
	}
}

// latexIsSafe says whether every brace is closed and no character has a special
// meaning that was not meant.
func latexIsSafe(tex string) bool {
	depth := 0
	for i := 0; i < len(tex); i++ {
		switch tex[i] {
		case '\\':
			if i++; i == len(tex) {
				return false
			}
		case '{':
			depth++
		case '}':
			depth--
		case '$', '&', '#', '%':
			return false
		}
		if depth < 0 {
			return false
		}
	}
	return depth == 0
}

func isASCII(s string) bool {
	return strings.IndexFunc(s, func(r rune) bool { return r > 0x7e }) < 0 && utf8.ValidString(s) && !strings.ContainsFunc(s, func(r rune) bool { return r < 0x20 && r != '\n' && r != '\t' && r != '\r' })
}

func unescapeLaTeX(tex string) string {
	return strings.NewReplacer(`\textbackslash{}`, `\`, `\{`, "{", `\}`, "}", `\$`, "$", `\&`, "&", `\#`, "#", `\%`, "%", `\_`, "_",
		`\textasciicircum{}`, "^", `\textasciitilde{}`, "~", `\textless{}`, "<", `\textgreater{}`, ">", `\textbar{}`, "|").Replace(tex)
}

func TestNotation(t *testing.T) {
	for _, c := range []struct{ in, html, tex string }{
		{"F_{2^12}", "<i>F</i><sub>2<sup>12</sup></sub>", "F_{2^{12}}"},
		{"F_4096", "<i>F</i><sub>4096</sub>", "F_{4096}"},
		{"x^(q + 1)", "<i>x</i><sup><i>q</i> + 1</sup>", `x^{q + 1}`},
		{"x^-1*y", "<i>x</i><sup>−1</sup>·<i>y</i>", `x^{- 1}\cdot y`},
		{"x_1^2", "<i>x</i><sub>1</sub><sup>2</sup>", "x_{1}^{2}"},
		{"x |-> x^2", "<i>x</i> ↦ <i>x</i><sup>2</sup>", `x \mapsto  x^{2}`},
		{"K = Q(zeta_7)", "<i>K</i> = <i>Q</i>(zeta<sub>7</sub>)", `K = Q(\mathrm{zeta}_{7})`},
		{"x^2^3", "<i>x</i><sup>2<sup>3</sup></sup>", "x^{2^{3}}"},
		{"x^(a+1)^2", "<i>x</i><sup>(<i>a</i>+1)<sup>2</sup></sup>", "x^{(a+1)^{2}}"},
		{"2 x", "2 <i>x</i>", `2\ x`},
		{"^2", "^2", `\wedge 2`},
		{"a^", "<i>a</i>^", `a\wedge `},
		{"a^{", "<i>a</i>^{", `a\wedge \{`},
	} {
		if got := notationHTML(c.in); got != c.html {
			t.Errorf("HTML of %q: got %q, want %q", c.in, got, c.html)
		}
		if got := notationTeX(c.in); got != c.tex {
			t.Errorf("TeX of %q: got %q, want %q", c.in, got, c.tex)
		}
	}
}
