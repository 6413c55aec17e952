package display

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"
)

// The notation of labels is that of the cells: F_{2^12}, x^(q + 1), g_256,
// a*b, x |-> x^2. It is read into runs of characters in one style, from which
// each form makes its own subscripts and superscripts.

// run is a stretch of text in one style. Path says how it is raised: one
// letter for each level, '^' for superscript and '_' for subscript, so that ""
// is the base line and "_^" is a superscript in a subscript.
type run struct {
	text   string
	italic bool
	path   string
}

// runs reads the notation. A single letter is a variable and italic; a word of
// more letters is upright, and so are digits.
func runs(s string) []run {
	p := notationParser{letters: true}
	p.read(visible(s), "")
	return p.out
}

// proseRuns reads a sentence that has formulas in it: as runs, but a single
// letter is a variable only when it bears a script, since it may be a word.
func proseRuns(s string) []run {
	p := notationParser{}
	p.read(visible(s), "")
	return p.out
}

type notationParser struct {
	letters bool // single letters are variables
	out     []run
}

func (p *notationParser) put(text string, italic bool, path string) {
	if n := len(p.out); n > 0 && p.out[n-1].italic == italic && p.out[n-1].path == path {
		p.out[n-1].text += text
		return
	}
	p.out = append(p.out, run{text, italic, path})
}

// deepest nesting of scripts that is drawn as such.
const deepest = 3

var signs = []struct{ written, shown string }{
	{"|->", "↦"}, {"...", "…"}, {"<=", "≤"}, {">=", "≥"}, {"!=", "≠"}, {"*", "·"}, {"->", "→"},
}

func (p *notationParser) read(s, path string) {
	for len(s) > 0 {
		if (s[0] == '^' || s[0] == '_') && len(path) < deepest && len(p.out) > 0 {
			if script, rest, ok := chainOf(s[0], s[1:]); ok {
				p.read(script, path+s[:1])
				s = rest
				continue
			}
		}
		if n := lettersAt(s); n > 0 {
			p.put(s[:n], utf8.RuneCountInString(s[:n]) == 1 && (p.letters || path != "" || bearsScript(s[n:])), path)
			s = s[n:]
			continue
		}
		shown, n := sign(s)
		if n == 0 {
			_, n = utf8.DecodeRuneInString(s)
			shown = s[:n]
		}
		if s[0] == '-' && n == 1 && p.letters {
			shown = "−"
		}
		p.put(shown, false, path)
		s = s[n:]
	}
}

func bearsScript(s string) bool {
	if s == "" || s[0] != '^' && s[0] != '_' {
		return false
	}
	_, _, ok := scriptOf(s[1:])
	return ok
}

func sign(s string) (shown string, n int) {
	for _, g := range signs {
		if strings.HasPrefix(s, g.written) {
			return g.shown, len(g.written)
		}
	}
	return "", 0
}

func lettersAt(s string) int {
	for i, r := range s {
		if !unicode.IsLetter(r) {
			return i
		}
	}
	return len(s)
}

// chainOf is scriptOf for what follows mark, where a script may bear a script
// of the same kind: x^2^3 is x^(2^3).
func chainOf(mark byte, s string) (script, rest string, ok bool) {
	script, rest, ok = scriptOf(s)
	if ok && rest != "" && rest[0] == mark {
		if upper, beyond, more := chainOf(mark, rest[1:]); more {
			if s[0] == '(' {
				script = "(" + script + ")"
			}
			return script + string(mark) + "{" + upper + "}", beyond, true
		}
	}
	return script, rest, ok
}

// scriptOf splits what follows ^ or _ into the script and the rest: a group in
// braces or parentheses, which are dropped, an integer, or one letter.
func scriptOf(s string) (script, rest string, ok bool) {
	if s == "" {
		return "", "", false
	}
	if s[0] == '{' || s[0] == '(' {
		depth := 0
		for i := range len(s) {
			switch s[i] {
			case '{', '(':
				depth++
			case '}', ')':
				depth--
			}
			if depth == 0 {
				return s[1:i], s[i+1:], i > 1
			}
		}
		return "", "", false
	}
	n := 0
	if s[0] == '-' {
		n = 1
	}
	first := n
	for n < len(s) && '0' <= s[n] && s[n] <= '9' {
		n++
	}
	if n > first {
		return s[:n], s[n:], true
	}
	if r, n := utf8.DecodeRuneInString(s); unicode.IsLetter(r) {
		return s[:n], s[n:], true
	}
	return "", "", false
}

// notationHTML is a label as HTML.
func notationHTML(s string) string { return runsHTML(runs(s)) }

// proseHTML is a sentence as HTML.
func proseHTML(s string) string { return runsHTML(proseRuns(s)) }

var opens = map[byte]string{'^': "<sup>", '_': "<sub>"}
var closes = map[byte]string{'^': "</sup>", '_': "</sub>"}

func runsHTML(list []run) string {
	var b strings.Builder
	path := ""
	move := func(to string) {
		common := 0
		for common < len(path) && common < len(to) && path[common] == to[common] {
			common++
		}
		for i := len(path) - 1; i >= common; i-- {
			b.WriteString(closes[path[i]])
		}
		for i := common; i < len(to); i++ {
			b.WriteString(opens[to[i]])
		}
		path = to
	}
	for _, r := range list {
		move(r.path)
		if r.italic {
			b.WriteString("<i>" + escapeHTML(r.text) + "</i>")
		} else {
			b.WriteString(escapeHTML(r.text))
		}
	}
	move("")
	return b.String()
}

// notationTeX is a label as the inside of a formula.
func notationTeX(s string) string { return runsTeX(runs(s)) }

func runsTeX(list []run) string {
	var b strings.Builder
	path := ""
	move := func(to string) {
		common := 0
		for common < len(path) && common < len(to) && path[common] == to[common] {
			common++
		}
		b.WriteString(strings.Repeat("}", len(path)-common))
		for i := common; i < len(to); i++ {
			b.WriteString(to[i:i+1] + "{")
		}
		path = to
	}
	for i, r := range list {
		move(r.path)
		var before, after rune
		if i > 0 {
			before, _ = utf8.DecodeLastRuneInString(list[i-1].text)
		}
		if i+1 < len(list) && list[i+1].path == r.path {
			after, _ = utf8.DecodeRuneInString(list[i+1].text)
		}
		mathText(&b, r.text, before, after)
	}
	move("")
	return b.String()
}

// mathText writes text as part of a formula, between two neighbours. A formula
// spaces operators and relations by itself, so that only a space that parts
// two operands is kept.
func mathText(b *strings.Builder, text string, before, after rune) {
	operand := func(c rune) bool { return unicode.IsLetter(c) || unicode.IsDigit(c) }
	for len(text) > 0 {
		if n := lettersAt(text); n > 0 {
			b.WriteString(mathWord(text[:n]))
			before, _ = utf8.DecodeLastRuneInString(text[:n])
			text = text[n:]
			continue
		}
		c, n := utf8.DecodeRuneInString(text)
		text = text[n:]
		next := after
		if text != "" {
			next, _ = utf8.DecodeRuneInString(text)
		}
		switch tex, known := texSymbols[c]; {
		case known:
			b.WriteString(tex + " ")
		case c == ' ' && operand(before) && operand(next):
			b.WriteString(`\ `)
		case c == '\\':
			b.WriteString(`\backslash `)
		case c == '^':
			b.WriteString(`\wedge `)
		case c == '~':
			b.WriteString(`\sim `)
		case strings.ContainsRune("{}$&#%_", c):
			b.WriteString(`\` + string(c))
		case c < 0x7f:
			b.WriteRune(c)
		default:
			b.WriteString(`\text{` + escapeLaTeX(string(c)) + "}")
		}
		before = c
	}
}

func mathWord(word string) string {
	if c, n := utf8.DecodeRuneInString(word); n == len(word) {
		if tex, ok := texSymbols[c]; ok {
			return tex + " "
		}
		if c < 0x7f {
			return word
		}
	}
	if strings.IndexFunc(word, func(c rune) bool { return c > 0x7f }) < 0 {
		return `\mathrm{` + word + "}"
	}
	return `\text{` + escapeLaTeX(word) + "}"
}

// proseLaTeX is a sentence as part of a LaTeX paragraph.
func proseLaTeX(s string) string {
	var b strings.Builder
	list := proseRuns(s)
	for len(list) > 0 {
		n := slices.IndexFunc(list, func(r run) bool { return !r.italic && r.path == "" })
		if n < 0 {
			n = len(list)
		}
		if n > 0 {
			b.WriteString("$" + runsTeX(list[:n]) + "$")
			list = list[n:]
			continue
		}
		b.WriteString(escapeLaTeX(list[0].text))
		list = list[1:]
	}
	return b.String()
}

// texSymbols are the characters of the notation that LaTeX knows by a name, as
// commands of a formula.
var texSymbols = map[rune]string{
	'↦': `\mapsto`, '→': `\to`, '≤': `\le`, '≥': `\ge`, '≠': `\ne`, '·': `\cdot`, '…': `\ldots`, '⋯': `\cdots`, '−': `-`,
	'×': `\times`, '÷': `\div`, '∈': `\in`, '∉': `\notin`, '⊂': `\subset`, '⊆': `\subseteq`, '∩': `\cap`, '∪': `\cup`,
	'≅': `\cong`, '≡': `\equiv`, '≈': `\approx`, '∞': `\infty`, '√': `\surd`, '±': `\pm`, '∘': `\circ`, '°': `{}^\circ`,
	'𝔽': `\mathbb{F}`, 'ℚ': `\mathbb{Q}`, 'ℤ': `\mathbb{Z}`, 'ℝ': `\mathbb{R}`, 'ℂ': `\mathbb{C}`, 'ℕ': `\mathbb{N}`,
	'α': `\alpha`, 'β': `\beta`, 'γ': `\gamma`, 'δ': `\delta`, 'ε': `\varepsilon`, 'ζ': `\zeta`, 'η': `\eta`, 'θ': `\theta`,
	'ι': `\iota`, 'κ': `\kappa`, 'λ': `\lambda`, 'μ': `\mu`, 'ν': `\nu`, 'ξ': `\xi`, 'π': `\pi`, 'ρ': `\rho`, 'σ': `\sigma`,
	'τ': `\tau`, 'υ': `\upsilon`, 'φ': `\varphi`, 'χ': `\chi`, 'ψ': `\psi`, 'ω': `\omega`,
	'Γ': `\Gamma`, 'Δ': `\Delta`, 'Θ': `\Theta`, 'Λ': `\Lambda`, 'Ξ': `\Xi`, 'Π': `\Pi`, 'Σ': `\Sigma`, 'Φ': `\Phi`, 'Ψ': `\Psi`, 'Ω': `\Omega`,
	'⁰': `{}^0`, '¹': `{}^1`, '²': `{}^2`, '³': `{}^3`, '⁴': `{}^4`, '⁵': `{}^5`, '⁶': `{}^6`, '⁷': `{}^7`, '⁸': `{}^8`, '⁹': `{}^9`,
	'₀': `{}_0`, '₁': `{}_1`, '₂': `{}_2`, '₃': `{}_3`, '₄': `{}_4`, '₅': `{}_5`, '₆': `{}_6`, '₇': `{}_7`, '₈': `{}_8`, '₉': `{}_9`,
}

func codePoint(r rune) string { return fmt.Sprintf("[U+%04X]", r) }
