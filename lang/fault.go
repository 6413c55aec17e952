package lang

import (
	"fmt"
	"sort"
	"strings"
	"unicode"
	"unicode/utf8"

	"github.com/alecthomas/participle/v2/lexer"
)

// What the parser was about to read when it met a token that does not fit.
type wanted int

const (
	nothing   wanted = iota // the expression could have ended here
	anOperand               // an expression must stand here
	closer                  // a bracket could have closed here, or a comma gone on
)

// fail stops the parser at a token.
func (p *parser) fail(t *lexer.Token, reason, remedy string) {
	panic(&Error{At: tokenSpan(t), Reason: reason, Remedy: remedy})
}

// failUnlessEnd stops at the next token with a reason of the caller's, unless
// the text ends there or holds no token: then that is the reason.
func (p *parser) failUnlessEnd(reason, remedy string) {
	t := p.peek()
	switch {
	case t.Type == tBad:
		p.unexpected(nothing)
	case t.EOF():
		panic(&Error{At: tokenSpan(t), Reason: reason, Remedy: remedy, Incomplete: true})
	}
	p.fail(t, reason, remedy)
}

// unexpected stops at the next token, which fits nowhere.
func (p *parser) unexpected(want wanted) {
	t := p.peek()
	switch t.Type {
	case tBad:
		reason, remedy := badToken(t.Value)
		p.fail(t, reason, remedy)
	case lexer.EOF, tEnd:
		p.unexpectedEnd(t)
	case tBracket:
		if strings.Contains(")]}", t.Value) {
			p.unexpectedCloser(t)
		}
	case tKeyword:
		p.unexpectedKeyword(t, want)
	case tSup:
		p.fail(t, "an exponent has nothing before it", "write x²")
	case tOp:
		p.unexpectedOperator(t, want)
	}
	p.missingOperator(t)
}

// trailing stops at the token behind a whole statement that ends in x.
func (p *parser) trailing(x Expr) {
	if p.isOp(",") && openEquations(x) != nil {
		p.fail(p.peek(), "where holds one equation for each name that is adjoined, and here are more", "write K(a, b) where a^2 = ..., b^3 = ...")
	}
	p.unexpected(nothing)
}

func (p *parser) unexpectedEnd(t *lexer.Token) {
	if n := len(p.opened); n > 0 {
		open := p.opened[n-1].token
		if t.Type == tEnd {
			p.fail(t, "; stands inside the bracket "+opened(open), "close it with "+closing[open.Value]+" before")
		}
		panic(&Error{At: tokenSpan(open), Reason: "the bracket " + opened(open) + " is not closed",
			Remedy: "close it with " + closing[open.Value], Incomplete: true})
	}
	fault := &Error{At: tokenSpan(t), Reason: "there is no expression", Remedy: "write one", Incomplete: t.EOF()}
	if last := p.previous(); last.Type != tEnd {
		fault.Reason = "an expression is missing after " + last.Value
		fault.Remedy = "write it, or leave " + last.Value + " out"
		if fault.Incomplete {
			fault.Remedy = "write it here or on the next line"
		}
	}
	panic(fault)
}

// opened names an opening bracket and its place.
func opened(t *lexer.Token) string {
	return fmt.Sprintf("%s opened at line %d, column %d", t.Value, t.Pos.Line, t.Pos.Column)
}

func (p *parser) unexpectedCloser(t *lexer.Token) {
	n := len(p.opened)
	if n == 0 {
		p.fail(t, "the bracket "+t.Value+" closes nothing", "leave it out, or open it before")
	}
	open := p.opened[n-1].token
	if closing[open.Value] != t.Value {
		p.fail(t, "the bracket "+opened(open)+" is closed by "+t.Value, "close it with "+closing[open.Value])
	}
	p.fail(t, "an expression is missing between "+p.previous().Value+" and "+t.Value, "write it, or leave "+p.previous().Value+" out")
}

func (p *parser) unexpectedKeyword(t *lexer.Token, want wanted) {
	if n := len(p.opened); n > 0 && (t.Value == "let" || t.Value == "claim") {
		open := p.opened[n-1].token
		p.fail(t, t.Value+" stands inside the bracket "+opened(open), "close it with "+closing[open.Value]+" before")
	}
	switch t.Value {
	case "let", "claim":
		p.fail(t, t.Value+" begins a statement", "write it at the beginning of a line, or after ;")
	case "where":
		p.fail(t, "where has nothing to say anything about", "write K(a) where a^2 = ..., or [f(n) for n in 1..20 where ...]")
	case "for":
		p.fail(t, "for stands outside a list or a set", "write [f(n) for n in 1..20]")
	case "then", "else":
		p.fail(t, t.Value+" has no if before it", "write if ... then ... else ... on one line")
	case "mod":
		if want != anOperand {
			p.fail(t, "a second mod follows the first", "put the first in parentheses")
		}
	}
	if want == anOperand {
		if last := p.previous(); last.Type == tEnd {
			p.fail(t, t.Value+" is a word of the grammar and cannot begin an expression", "a name must be another word")
		} else {
			p.fail(t, "an expression is missing between "+last.Value+" and "+t.Value, t.Value+" is a word of the grammar, not a name")
		}
	}
	if prepositions[t.Value] {
		p.fail(t, t.Value+" follows no noun or predicate", "write NOUN of ..., for example trace of a over K")
	}
	p.fail(t, t.Value+" cannot stand here", "put what belongs together in parentheses")
}

func (p *parser) unexpectedOperator(t *lexer.Token, want wanted) {
	last := p.previous()
	switch op := plain(t); {
	case want == anOperand && last.Type == tEnd:
		p.fail(t, "an expression is missing before "+t.Value, "a line goes on in the next one when it ends in an operator or a bracket is open")
	case want == anOperand:
		p.fail(t, "an expression is missing between "+last.Value+" and "+t.Value, "write it, or leave "+t.Value+" out")
	case op == ",":
		p.fail(t, "a comma parts nothing here", "a tuple is written (a, b), a list [a, b]")
	case op == ":":
		p.fail(t, "a colon belongs into a degree", "write [L : K]")
	case op == "'":
		p.fail(t, "a number has no derivative mark", "write f' behind a name or a bracket")
	case want == closer:
		open := p.opened[len(p.opened)-1].token
		p.fail(t, "the bracket "+opened(open)+" is not closed before "+t.Value, "close it with "+closing[open.Value])
	default:
		p.fail(t, t.Value+" cannot stand here", "put what belongs together in parentheses")
	}
}

// missingOperator stops at an operand that stands right behind another one.
func (p *parser) missingOperator(t *lexer.Token) {
	last := p.previous()
	a, b := brief(last.Value), brief(t.Value)
	reason := "an operator is missing between " + a + " and " + b
	switch {
	case last.Type == tInt && t.Type == tInt:
		p.fail(t, "two numbers stand side by side", "write "+a+"*"+b+" for the product; a cycle is written ("+a+" "+b+")")
	case last.Type == tInt && (t.Type == tName || t.Value == "("):
		p.fail(t, "an exponent or root ends with its number "+a, "write * before "+b+" for a product, or parentheses around the whole exponent")
	case last.Type == tName && isWordText(plain(last)) && t.Type != tStr && t.Type != tBracket,
		last.Type == tName && t.Type == tName && isWordText(plain(t)):
		p.fail(t, reason, "a phrase is written NOUN of ..., as in trace of a; a product with *")
	case t.Value == "(" && last.Type != tStr && t.Pos.Offset == tokenSpan(last).End:
		p.fail(t, reason, "write * for a product; only a number before a parenthesis multiplies by itself")
	case t.Type == tStr || last.Type == tStr:
		p.fail(t, "a string stands beside "+brief(other(last, t).Value), "several things are written with commas between them")
	}
	if last.Type == tBracket || t.Type == tBracket {
		p.fail(t, reason, "write * between them for the product")
	}
	p.fail(t, reason, "write "+a+"*"+b+" for the product")
}

// missingIndex stops at a name just read that ends in _.
func (p *parser) missingIndex(t *lexer.Token) {
	if p.isBracket("{") && len(p.words.heads) > 0 {
		known := make([]string, 0, len(p.words.heads))
		for head := range p.words.heads {
			known = append(known, head+"_{...}")
		}
		sort.Strings(known)
		p.fail(t, t.Value+"{...} is no notation that is known here", "braces stand in "+strings.Join(known, ", ")+"; a name is written x_1")
	}
	p.fail(t, "the index of "+t.Value+" is missing", "write "+t.Value+"1")
}

func other(a, b *lexer.Token) *lexer.Token {
	if a.Type == tStr {
		return b
	}
	return a
}

// brief is text cut to a length that an error can quote.
func brief(text string) string {
	if utf8.RuneCountInString(text) > 24 {
		return string([]rune(text)[:20]) + "..."
	}
	return text
}

func (p *parser) notAName(t *lexer.Token, place string) {
	switch {
	case t.Type == tBad:
		p.unexpected(nothing)
	case t.Type == tKeyword:
		p.fail(t, t.Value+" is a word of the grammar and cannot be a name", "choose another name")
	case t.EOF() || t.Type == tEnd:
		p.failUnlessEnd("a name is missing after "+place, "write a letter, then letters, digits or _")
	}
	p.fail(t, "a name is missing: "+brief(t.Value)+" stands where "+place+" wants one", "write a letter, then letters, digits or _")
}

func (p *parser) unknownRole(n *Name, prep string) {
	var known []string
	for _, first := range sortedKeys(p.words.roles[prep]) {
		for _, e := range p.words.roles[prep][first] {
			known = append(known, strings.Join(e.words, " "))
		}
	}
	remedy := "write an operator between them"
	if len(known) > 0 {
		remedy = "after " + prep + " may stand " + strings.Join(known, ", ")
	}
	panic(&Error{At: n.S, Reason: n.Value + " is not known as a word that says how " + brief(p.peek().Value) + " is meant", Remedy: remedy})
}

func (p *parser) tooDeep() {
	p.fail(p.previous(), fmt.Sprintf("the expression is nested more than %d deep", maxNesting), "give a name to an inner part with let")
}

func (p *parser) tooHigh() {
	p.fail(p.previous(), fmt.Sprintf("the expression chains more than %d operators", maxHeight), "write sum of [...] or product of [...], or give a name to a part with let")
}

func tooManyTokens(t *lexer.Token) *Error {
	return &Error{At: tokenSpan(t), Reason: fmt.Sprintf("the text has more than %d symbols", maxTokens), Remedy: "cut it into several cells"}
}

// strayContinuation is the fault of an indented line that begins with a sign:
// read as a statement of its own it would drop a term without a word.
func strayContinuation(t *lexer.Token) *Error {
	return &Error{At: tokenSpan(t), Reason: "this line looks as if it went on from the one before, which has ended",
		Remedy: "end that line with " + t.Value + ", or put the whole in parentheses; a line of its own is not indented"}
}

func missingEquals(t *lexer.Token) *Error {
	fault := &Error{At: tokenSpan(t), Reason: "let needs = behind what it binds", Remedy: "write let x = ..., let (x, y) = ... or let f(n) = ...", Incomplete: t.EOF()}
	if t.Type == tBad {
		fault.Reason, fault.Remedy = badToken(t.Value)
	}
	return fault
}

// badToken says what is wrong with a text that is no token.
func badToken(text string) (reason, remedy string) {
	r, n := decode(text)
	switch {
	case r == '"' && !utf8.ValidString(text):
		return "the string holds bytes that are not UTF-8", "save the text as UTF-8"
	case r == '"' && (len(text) == 1 || text[len(text)-1] != '"' || endsEscaped(text)):
		return "the string is not closed on its line", `close it with "; a quote inside is written \"`
	case r == '"':
		return "the string holds an unknown escape", `write \\ for a backslash, \" for a quote, \n for a new line, \t for a tab`
	case r == utf8.RuneError && n == 1:
		return "the text is not UTF-8 here", "save it as UTF-8, or type the character again"
	case isDigit(r):
		return badNumber(text)
	case isSuperscript(r):
		return "the exponent " + brief(text) + " is not an integer", "write x⁻¹ or x^(-1)"
	}
	if remedy, ok := foreign[text]; ok {
		return text + " is not part of the notation", remedy
	}
	if isSubscript(r) {
		return "the index " + text + " has no letter before it", "write x_1 or x₁"
	}
	if unicode.IsMark(r) {
		return fmt.Sprintf("the mark U+%04X stands on its own", r), "write the letter and its mark as one character"
	}
	if unicode.IsPrint(r) {
		return text + " is not part of the notation", "leave it out, or say it in words"
	}
	return fmt.Sprintf("the character U+%04X cannot be seen and means nothing here", r), "leave it out"
}

func endsEscaped(text string) bool {
	n := 0
	for i := len(text) - 2; i > 0 && text[i] == '\\'; i-- {
		n++
	}
	return n%2 == 1
}

func badNumber(text string) (reason, remedy string) {
	t := brief(text)
	switch {
	case strings.Contains(text, "."):
		whole, part, _ := strings.Cut(text, ".")
		if len(text) > 20 {
			return t + " is a decimal fraction, which is not exact", "write a fraction, as 3/2"
		}
		return t + " is a decimal fraction, which is not exact", "write " + integer(whole+part).String() + "/1" + strings.Repeat("0", len(part))
	case strings.HasPrefix(text, "0x") || strings.HasPrefix(text, "0X"):
		return t + " is not a hexadecimal number", "its digits are 0 to 9 and a to f, with single _ between them"
	case strings.HasPrefix(text, "0b") || strings.HasPrefix(text, "0B"):
		return t + " is not a binary number", "its digits are 0 and 1, with single _ between them"
	}
	return t + " is not a number", "single _ may stand between its digits"
}
