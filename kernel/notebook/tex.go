package notebook

import (
	"errors"
	"html"
	"strings"
	"unicode"
	"unicode/utf8"
)

// Formulas in TeX become MathML, which browsers draw by themselves. The TeX is
// what values print as and what people write into the text of a notebook:
// scripts, fractions, roots, letters and signs, words, matrices. A formula with
// anything else stays as it is written.
//
// References: "MathML Core", W3C; American Mathematical Society, "User's Guide
// for the amsmath Package", 2020, for the commands.

// MathML is the TeX formula as an element math; ok is false when the formula
// has something in it that is not known here.
func MathML(tex string, block bool) (math string, ok bool) {
	p := &texParser{rest: tex}
	body, err := p.row("")
	if err != nil {
		return "", false
	}
	attribute := ""
	if block {
		attribute = ` display="block"`
	}
	return "<math" + attribute + `>` + body + "</math>", true
}

var errTeX = errors.New("TeX that is not known")

// texParser reads TeX and writes MathML. Depth keeps hostile input from
// exhausting the stack.
type texParser struct {
	rest  string
	depth int
}

const maxTeXDepth = 100

func (p *texParser) space() { p.rest = strings.TrimLeft(p.rest, " \t\n\r") }

func (p *texParser) eat(s string) bool {
	p.space()
	if !strings.HasPrefix(p.rest, s) {
		return false
	}
	if s[0] == '\\' && len(s) > 2 && len(p.rest) > len(s) && isASCIILetter(p.rest[len(s)]) {
		return false // the beginning of a longer command
	}
	p.rest = p.rest[len(s):]
	return true
}

func isASCIILetter(c byte) bool { return 'a' <= c|0x20 && c|0x20 <= 'z' }

// row reads up to end, which it eats, or to the end of the text when end is
// empty.
func (p *texParser) row(end string) (string, error) {
	if p.depth++; p.depth > maxTeXDepth {
		return "", errTeX
	}
	defer func() { p.depth-- }()
	var b strings.Builder
	for {
		p.space()
		if end != "" && p.eat(end) {
			return "<mrow>" + b.String() + "</mrow>", nil
		}
		if p.rest == "" {
			if end != "" {
				return "", errTeX
			}
			return "<mrow>" + b.String() + "</mrow>", nil
		}
		x, err := p.scripted()
		if err != nil {
			return "", err
		}
		b.WriteString(x)
	}
}

// scripted reads an atom and its scripts.
func (p *texParser) scripted() (string, error) {
	base, err := p.atom()
	if err != nil {
		return "", err
	}
	var sub, sup string
	for {
		switch {
		case sub == "" && p.eat("_"):
			sub, err = p.atom()
		case sup == "" && p.eat("^"):
			sup, err = p.atom()
		case p.eat("'"):
			sup += "<mo>′</mo>"
		default:
			switch {
			case sub != "" && sup != "":
				return "<msubsup>" + base + sub + group(sup) + "</msubsup>", nil
			case sub != "":
				return "<msub>" + base + sub + "</msub>", nil
			case sup != "":
				return "<msup>" + base + group(sup) + "</msup>", nil
			}
			return base, nil
		}
		if err != nil {
			return "", err
		}
	}
}

func group(x string) string { return "<mrow>" + x + "</mrow>" }

// atom reads one symbol, number, group or command with what it takes.
func (p *texParser) atom() (string, error) {
	p.space()
	if p.rest == "" {
		return "", errTeX
	}
	switch c := p.rest[0]; {
	case c == '{':
		p.rest = p.rest[1:]
		return p.row("}")
	case c == '\\':
		return p.command()
	case strings.IndexByte("}&#%$_^~", c) >= 0:
		return "", errTeX
	case '0' <= c && c <= '9':
		n := len(p.rest) - len(strings.TrimLeft(p.rest, "0123456789"))
		x := p.rest[:n]
		p.rest = p.rest[n:]
		return "<mn>" + x + "</mn>", nil
	}
	r, n := utf8.DecodeRuneInString(p.rest)
	p.rest = p.rest[n:]
	switch {
	case r == utf8.RuneError || unicode.IsControl(r):
		return "", errTeX
	case unicode.IsLetter(r):
		return "<mi>" + string(r) + "</mi>", nil
	case r == '-':
		return "<mo>−</mo>", nil
	case r == '*':
		return "<mo>∗</mo>", nil
	case strings.ContainsRune("()[]|/", r):
		return `<mo stretchy="false">` + string(r) + "</mo>", nil
	}
	return "<mo>" + html.EscapeString(string(r)) + "</mo>", nil
}

// name reads the name of a command after its backslash.
func (p *texParser) name() string {
	n := 0
	for n < len(p.rest) && isASCIILetter(p.rest[n]) {
		n++
	}
	if n == 0 && p.rest != "" {
		_, n = utf8.DecodeRuneInString(p.rest)
	}
	name := p.rest[:n]
	p.rest = p.rest[n:]
	return name
}

func (p *texParser) command() (string, error) {
	if p.depth++; p.depth > maxTeXDepth {
		return "", errTeX
	}
	defer func() { p.depth-- }()
	p.rest = p.rest[1:]
	name := p.name()
	if s, ok := texLetters[name]; ok {
		return "<mi>" + s + "</mi>", nil
	}
	if s, ok := texOperators[name]; ok {
		return "<mo>" + s + "</mo>", nil
	}
	if s, ok := texFences[name]; ok {
		return `<mo stretchy="false">` + s + "</mo>", nil
	}
	if s, ok := texSpaces[name]; ok {
		return `<mspace width="` + s + `"/>`, nil
	}
	if texFunctions[name] {
		return `<mi mathvariant="normal">` + name + "</mi>", nil
	}
	switch name {
	case "frac", "tfrac", "dfrac":
		a, err := p.atom()
		if err != nil {
			return "", err
		}
		b, err := p.atom()
		return "<mfrac>" + a + b + "</mfrac>", err
	case "sqrt":
		if p.eat("[") {
			n, err := p.row("]")
			if err != nil {
				return "", err
			}
			x, err := p.atom()
			return "<mroot>" + x + n + "</mroot>", err
		}
		x, err := p.atom()
		return "<msqrt>" + x + "</msqrt>", err
	case "overline", "bar":
		x, err := p.atom()
		return "<mover>" + x + `<mo stretchy="true">¯</mo></mover>`, err
	case "mathbb":
		return p.variant(doubleStruck)
	case "mathrm", "operatorname", "text", "textrm", "mathit", "mathbf", "texttt", "mathtt":
		return p.words(name)
	case "left", "right", "big", "Big", "bigl", "bigr":
		return p.fence()
	case "begin":
		return p.environment()
	case "displaystyle", "limits", "nolimits":
		return "", nil
	}
	return "", errTeX
}

// braced reads the text between braces as it is.
func (p *texParser) braced() (string, error) {
	if !p.eat("{") {
		p.space()
		if p.rest == "" || strings.IndexByte("\\{}", p.rest[0]) >= 0 {
			return "", errTeX
		}
		_, n := utf8.DecodeRuneInString(p.rest)
		x := p.rest[:n]
		p.rest = p.rest[n:]
		return x, nil
	}
	x, rest, ok := strings.Cut(p.rest, "}")
	if !ok {
		return "", errTeX
	}
	p.rest = rest
	x = strings.NewReplacer(`\_`, "_", `\ `, " ", `\#`, "#", `\,`, " ").Replace(x)
	if strings.ContainsAny(x, "\\{") {
		return "", errTeX
	}
	return x, nil
}

func (p *texParser) words(style string) (string, error) {
	x, err := p.braced()
	if err != nil {
		return "", err
	}
	x = html.EscapeString(x)
	switch style {
	case "mathit":
		return "<mi>" + x + "</mi>", nil
	case "mathbf":
		return `<mi style="font-weight:bold;font-style:normal">` + x + "</mi>", nil
	case "texttt", "mathtt":
		return `<mtext style="font-family:monospace">` + x + "</mtext>", nil
	case "text", "textrm":
		return "<mtext>" + x + "</mtext>", nil
	}
	return `<mi mathvariant="normal">` + x + "</mi>", nil
}

func (p *texParser) variant(of map[rune]rune) (string, error) {
	x, err := p.braced()
	if err != nil {
		return "", err
	}
	var b strings.Builder
	for _, r := range x {
		if v, ok := of[r]; ok {
			r = v
		} else if 'A' <= r && r <= 'Z' {
			r += 0x1d538 - 'A'
		}
		b.WriteRune(r)
	}
	return "<mi>" + html.EscapeString(b.String()) + "</mi>", nil
}

// The double-struck letters that stand outside their block.
var doubleStruck = map[rune]rune{'C': 'ℂ', 'H': 'ℍ', 'N': 'ℕ', 'P': 'ℙ', 'Q': 'ℚ', 'R': 'ℝ', 'Z': 'ℤ'}

// fence reads what follows \left or \right: one delimiter, or a dot for none.
func (p *texParser) fence() (string, error) {
	p.space()
	if p.rest == "" {
		return "", errTeX
	}
	if p.eat(".") {
		return "", nil
	}
	if p.rest[0] == '\\' {
		p.rest = p.rest[1:]
		s, ok := texFences[p.name()]
		if !ok {
			return "", errTeX
		}
		return `<mo stretchy="true">` + s + "</mo>", nil
	}
	c := p.rest[:1]
	if !strings.Contains("()[]|/", c) {
		return "", errTeX
	}
	p.rest = p.rest[1:]
	return `<mo stretchy="true">` + c + "</mo>", nil
}

// environment reads a matrix or the like.
func (p *texParser) environment() (string, error) {
	name, err := p.braced()
	if err != nil {
		return "", err
	}
	fences, ok := texEnvironments[strings.TrimSuffix(name, "*")]
	if !ok {
		return "", errTeX
	}
	if name == "array" {
		if _, err := p.braced(); err != nil { // how columns are aligned
			return "", err
		}
	}
	end := `\end{` + name + "}"
	var b strings.Builder
	b.WriteString("<mtable><mtr><mtd>")
	for {
		p.space()
		switch {
		case p.eat(end):
			b.WriteString("</mtd></mtr></mtable>")
			return fences[0] + b.String() + fences[1], nil
		case p.eat("&"):
			b.WriteString("</mtd><mtd>")
		case p.eat(`\\`):
			p.space()
			if !strings.HasPrefix(p.rest, end) {
				b.WriteString("</mtd></mtr><mtr><mtd>")
			}
		case p.eat(`\hline`):
		case p.rest == "":
			return "", errTeX
		default:
			x, err := p.scripted()
			if err != nil {
				return "", err
			}
			b.WriteString(x)
		}
	}
}
