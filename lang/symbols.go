package lang

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// keywords are the words that the grammar keeps for itself.
var keywords = set("let", "where", "for", "in", "of", "over", "by", "to", "at", "from", "with", "as",
	"is", "not", "and", "or", "if", "then", "else", "claim", "mod", "divides")

// prepositions part the objects of a phrase or predicate.
var prepositions = set("of", "over", "by", "to", "at", "from", "with", "in")

// starters begin a statement. They are ordinary words elsewhere in a phrase,
// but no name may take their place.
var starters = set("say", "explain")

// spellings gives the ASCII form of the symbols that have one.
var spellings = map[string]string{
	"−": "-", "·": "*", "⋅": "*", "×": "*",
	"≠": "!=", "≤": "<=", "≥": ">=", "∈": "in", "∉": "not in", "↦": "|->", "′": "'",
}

// letters gives the plain form of the letters that name the usual rings.
var letters = map[rune]rune{'𝔽': 'F', 'ℚ': 'Q', 'ℤ': 'Z', 'ℝ': 'R', 'ℂ': 'C', 'ℕ': 'N'}

// operators, longest first where one begins another.
var operators = []string{"|->", "..", "!=", "<=", ">=", "+", "-", "*", "/", "^", "=", "<", ">", ",", ":", "'"}

// foreign gives the way out for marks that other notations use.
var foreign = map[string]string{
	"==": "equality is written =", ":=": "a name is bound with let x = ...", "**": "a power is written ^",
	"//": "a quotient is written /, and a comment begins with #", "/=": "write != or ≠", "=/=": "write != or ≠", "<>": "write != or ≠",
	"->": "a function is written x |-> ...", "=>": "write >= for an order, or x |-> ... for a function",
	"&&": "write and", "||": "write or", "...": "a range is written 1..20", "…": "a range is written 1..20",
	"!": "write not, or != for unequal", "|": "write a divides b, or x |-> ... for a function", "∣": "write a divides b", "∤": "write a does not divide b",
	"%": "a remainder is written a mod n", "&": "write and", "∧": "write and", "∨": "write or", "¬": "write not",
	".": "a range is written 1..20, and there are no decimal fractions", "÷": "a quotient is written /", "∘": "maps are composed with *",
	"→": "a function is written x |-> ...", "⊂": "write <=", "⊆": "write <=", "≅": "write is isomorphic to", "≡": "write a = b mod n",
	"∞": "there is no infinity here", "“": `a string stands in plain quotes "..."`, "”": `a string stands in plain quotes "..."`,
	"‘": "the derivative is written f'", "’": "the derivative is written f'", "`": "the derivative is written f'", "_": "an index follows its letter at once, as in x_1",
	"$": "formulas are written without dollar signs", "\\": "write the symbol itself: the notebook completes \\alpha to α",
	"ⁿ": "write ^n", "ⁱ": "write ^i", "≢": "write not (a = b mod n)", "∅": "the empty set is written {}", "∏": "write product of", "∑": "write sum of",
}

func set(words ...string) map[string]bool {
	m := make(map[string]bool, len(words))
	for _, w := range words {
		m[w] = true
	}
	return m
}

func isLetter(r rune) bool {
	if r < utf8.RuneSelf {
		return 'a' <= r && r <= 'z' || 'A' <= r && r <= 'Z'
	}
	return unicode.IsLetter(r) && !isSuperscript(r) && !isSubscript(r) && r != 'ⁿ' && r != 'ⁱ'
}

func isDigit(r rune) bool { return '0' <= r && r <= '9' }

func isSubscript(r rune) bool { return '₀' <= r && r <= '₉' }

func isSuperscript(r rune) bool {
	return r == '⁰' || r == '¹' || r == '²' || r == '³' || '⁴' <= r && r <= '⁹' || r == '⁺' || r == '⁻'
}

func isBlank(r rune) bool { return r != '\n' && (unicode.IsSpace(r) || r == '\uFEFF') }

// plainName is the name that a text of letters means: 𝔽₈ is F_8, ζ₇ is
// zeta_7, √ is sqrt, and α stays α.
func plainName(text string) string {
	if isASCII(text) {
		return text
	}
	if text == "√" {
		return "sqrt"
	}
	var b strings.Builder
	indexed := false
	for i, r := range text {
		if isSubscript(r) {
			if !indexed {
				b.WriteByte('_')
			}
			indexed = true
			b.WriteRune('0' + r - '₀')
			continue
		}
		indexed = r == '_'
		if p, ok := letters[r]; ok {
			r = p
		}
		if r == 'ζ' && i == 0 && startsIndex(text[len("ζ"):]) {
			b.WriteString("zeta")
			continue
		}
		b.WriteRune(r)
	}
	return b.String()
}

func startsIndex(s string) bool {
	r, _ := utf8.DecodeRuneInString(s)
	return r == '_' || isSubscript(r)
}

// plainSuperscript is the text of an exponent written in raised digits.
func plainSuperscript(text string) string {
	var b strings.Builder
	for _, r := range text {
		switch r {
		case '¹':
			b.WriteByte('1')
		case '²':
			b.WriteByte('2')
		case '³':
			b.WriteByte('3')
		case '⁻':
			b.WriteByte('-')
		case '⁺':
			b.WriteByte('+')
		case '⁰':
			b.WriteByte('0')
		default:
			b.WriteRune('4' + r - '⁴')
		}
	}
	return b.String()
}

func isASCII(s string) bool {
	for i := 0; i < len(s); i++ {
		if s[i] >= utf8.RuneSelf {
			return false
		}
	}
	return true
}
