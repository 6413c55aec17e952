package lang

import (
	"math/big"
	"strings"

	"github.com/alecthomas/participle/v2/lexer"
)

// power is how tightly an operator binds, loosest first.
type power int

const (
	pAs       power = iota + 1
	pClause         // if ... then ... else, x |-> ...
	pOr             //
	pAnd            //
	pNot            //
	pRelation       // = != <= in is divides mod: one chain, not nested
	pOver           // a coercion
	pRange          // a..b; objects of prepositions stand at this level
	pSum            //
	pProduct        //
	pSign           //
	pBeside         // 2x
	pPower          // from right to left
	pPostfix        // call, index, prime
	pAtom           //
)

// infix is the binding power of what may stand behind an operand. Left and
// right operand bind tighter than the operator itself, except that chains of
// left-to-right operators take their own result on the left, and ^ on the right.
var infix = map[string]power{
	"as": pAs,
	"or": pOr, "and": pAnd,
	"=": pRelation, "!=": pRelation, "<": pRelation, "<=": pRelation, ">": pRelation, ">=": pRelation,
	"in": pRelation, "not in": pRelation, "not": pRelation, "divides": pRelation, "is": pRelation, "mod": pRelation,
	"over": pOver,
	"..":   pRange,
	"+":    pSum, "-": pSum,
	"*": pProduct, "/": pProduct,
	"^": pPower,
}

// expression reads a whole expression, closing forms (as table) included.
func (p *parser) expression() Expr { return p.binary(pAs) }

// clause reads an expression without a closing form.
func (p *parser) clause() Expr { return p.binary(pClause) }

// binary reads an operand and the operators behind it that bind at least as
// tightly as min.
func (p *parser) binary(min power) Expr {
	start := p.start()
	x := p.operand(min)
	loosest := pAtom // of the operators so far
	for {
		op, bind := p.operator()
		if bind == 0 || bind < min {
			break
		}
		if bind > loosest { // x as table * 2, a is prime + 1
			p.unexpected(nothing)
		}
		loosest = bind
		switch bind {
		case pAs:
			x = p.form(start, x)
		case pOr, pAnd:
			p.next()
			y := p.binary(bind + 1)
			x = &Logic{p.place(start, x, y), op, x, y}
		case pRelation:
			x = p.relation(start, x)
			if _, again := p.operator(); again == pRelation {
				p.fail(p.peek(), "a relation stands beside another one",
					"join them with and, or put one in parentheses")
			}
		case pOver:
			p.next()
			y := p.binary(pOver + 1)
			x = &Over{p.place(start, x, y), x, y}
		case pRange:
			x = p.rangeTo(start, x)
		case pPower:
			x = p.raise(start, x)
		default:
			p.next()
			y := p.binary(bind + 1)
			if op == "/" && besides(y) {
				p.fail(p.previous(), "a quotient by a product without a sign can be read in two ways",
					"write a/(2x) or (a/2)*x")
			}
			x = &Binary{p.place(start, x, y), op, x, y, false}
		}
	}
	if min <= pClause && p.isOp("|->") {
		x = p.lambda(start, x)
		for min <= pAs && p.isWord(0, "as") {
			x = p.form(start, x)
		}
	}
	return x
}

// operator is the operator that comes next, with its power; 0 if none does.
func (p *parser) operator() (string, power) {
	t := p.peek()
	switch t.Type {
	case tOp, tKeyword:
		op := plain(t)
		if op == "not" && !p.isIn(1) {
			return "", 0
		}
		return op, infix[op]
	case tSup:
		return "^", pPower
	case tName:
		if p.isVerb(0) {
			return "", pRelation
		}
	}
	return "", 0
}

func (p *parser) isIn(k int) bool {
	t := p.ahead(k)
	return t.Type == tKeyword && t.Value == "in" || t.Type == tOp && plain(t) == "in"
}

// operand reads what stands before the operators: a signed or negated
// operand, a condition, or a primary with what is attached to it.
func (p *parser) operand(min power) Expr {
	t := p.peek()
	start := p.start()
	switch {
	case t.Type == tOp && (plain(t) == "-" || plain(t) == "+"):
		p.next()
		p.deeper()
		x := p.binary(max(min, pSign))
		p.shallower()
		return &Unary{p.place(start, x), plain(t), x}
	case t.Type == tKeyword && t.Value == "not":
		if min > pNot {
			p.fail(t, "not stands before a whole statement", "put it in parentheses: (not ...)")
		}
		p.next()
		p.deeper()
		x := p.binary(pNot)
		p.shallower()
		return &Logic{p.place(start, x), "not", x, nil}
	case t.Type == tKeyword && t.Value == "if":
		if min > pClause {
			p.fail(t, "if stands inside a larger expression", "put it in parentheses: (if ... then ... else ...)")
		}
		return p.ifThenElse()
	}
	x := p.attached(start, p.primary())
	if n, ok := x.(*Int); ok && min <= pBeside && p.startsFactor() {
		y := p.binary(pPower)
		return &Binary{p.place(start, n, y), "*", n, y, true}
	}
	return x
}

// startsFactor says whether a number before the next token multiplies it.
func (p *parser) startsFactor() bool {
	return p.isBracket("(") || p.peek().Type == tName && !p.isConnective(0)
}

// besides says whether x is a product without a sign, as 2x.
func besides(x Expr) bool {
	if u, ok := x.(*Unary); ok {
		return besides(u.X)
	}
	b, ok := x.(*Binary)
	return ok && b.Juxtaposed && !isCycles(b)
}

func (p *parser) ifThenElse() Expr {
	start := p.start()
	p.next()
	p.deeper()
	cond := p.binary(pOr)
	p.expect("then", "an if needs its then on the same line", "write if ... then ... else ...")
	yes := p.binary(pOr)
	p.expect("else", "an if needs its else on the same line", "write if ... then ... else ...")
	no := p.clause()
	p.shallower()
	return &If{p.place(start, cond, yes, no), cond, yes, no}
}

func (p *parser) expect(word, reason, remedy string) {
	if !p.isWord(0, word) {
		if p.startsOperand(0) || p.peek().Type == tBad {
			p.unexpected(nothing)
		}
		p.failUnlessEnd(reason, remedy)
	}
	p.next()
}

func (p *parser) lambda(start int, x Expr) Expr {
	t := p.next()
	params, ok := parameters(x)
	if !ok {
		p.fail(t, "before |-> stands what the function depends on", "write x |-> ... or (x, y) |-> ..., in parentheses inside a larger expression")
	}
	p.deeper()
	body := p.clause()
	p.shallower()
	return &Lambda{p.place(start, body), params, body}
}

// parameters reads names from an expression that turns out to be the left
// side of |->.
func parameters(x Expr) ([]Name, bool) {
	switch x := x.(type) {
	case *Paren:
		n, ok := plainNameOf(x.X)
		return []Name{n}, ok
	case *Tuple:
		var list []Name
		for _, item := range x.Items {
			n, ok := plainNameOf(item)
			if !ok {
				return nil, false
			}
			list = append(list, n)
		}
		return list, true
	}
	n, ok := plainNameOf(x)
	return []Name{n}, ok
}

func plainNameOf(x Expr) (Name, bool) {
	primes := 0
	for {
		switch y := x.(type) {
		case *Name:
			return Name{y.at, y.Value + strings.Repeat("'", primes)}, true
		case *Prime:
			primes++
			x = y.X
			continue
		}
		return Name{}, false
	}
}

func (p *parser) rangeTo(start int, x Expr) Expr {
	p.next()
	y := p.binary(pRange + 1)
	if p.isOp("..") {
		p.fail(p.peek(), "a range has two ends", "write a..b")
	}
	return &Range{p.place(start, x, y), x, y}
}

// raise reads an exponent: ^E, ^{E} or raised digits.
func (p *parser) raise(start int, x Expr) Expr {
	t := p.next()
	if t.Type == tSup {
		y := superscript(t)
		p.noSecondExponent()
		return &Binary{p.place(start, x, y), "^", x, y, false}
	}
	p.deeper()
	var y Expr
	if p.isBracket("{") {
		from := p.start()
		p.open()
		y = p.expression()
		p.close()
		switch y.(type) {
		case *Int, *Name, *Subscript, *Paren:
		default:
			y = &Paren{p.place(from, y), y}
		}
		p.noSecondExponent()
	} else {
		y = p.binary(pPower)
	}
	p.shallower()
	return &Binary{p.place(start, x, y), "^", x, y, false}
}

func (p *parser) noSecondExponent() {
	if p.peek().Type == tSup || p.isOp("^") {
		p.fail(p.peek(), "two exponents stand side by side", "write x^(a^b) or (x^a)^b")
	}
}

func superscript(t *lexer.Token) Expr {
	place := at{S: tokenSpan(t), height: 1}
	text := plainSuperscript(t.Value)
	digits := strings.TrimLeft(text, "+-")
	n := &Int{place, integer(digits), digits}
	if digits != text {
		place.height = 2
		return &Unary{place, text[:1], n}
	}
	return n
}

// integer is the value of the text of an integer token.
func integer(text string) *big.Int {
	base := 10
	if len(text) > 1 && text[0] == '0' {
		switch text[1] {
		case 'x', 'X':
			base, text = 16, text[2:]
		case 'b', 'B':
			base, text = 2, text[2:]
		}
	}
	n, _ := new(big.Int).SetString(strings.ReplaceAll(text, "_", ""), base)
	return n
}

// attached reads what binds tightest behind x: calls, indices, primes,
// generated by. A number and a string take none of them, and neither does
// sqrt 2 or a phrase, whose operand has taken its own.
func (p *parser) attached(start int, x Expr) Expr {
	switch x.(type) {
	case *Int, *Str, *Apply, *Phrase:
		return x
	}
	for {
		switch {
		case p.isBracket("(") && isCycles(x) && p.ahead(1).Type == tInt && p.ahead(2).Type == tInt:
			y := p.parentheses()
			x = &Binary{p.place(start, x, y), "*", x, y, true}
		case p.isBracket("("):
			c := p.call(start, x)
			if len(c.Where) > 0 { // the last equation has taken what follows
				return c
			}
			x = c
		case p.isBracket("["):
			args := p.items()
			x = &Index{p.placeAll(start, x, args), x, args}
		case p.isOp("'"):
			p.next()
			x = &Prime{p.place(start, x), x}
		case p.isGeneratedBy(0):
			p.next()
			p.next()
			n := p.name("generated by")
			x = &GeneratedBy{p.place(start, x), x, n}
		default:
			return x
		}
	}
}

// call reads (args), and the equations of an adjunction behind it.
func (p *parser) call(start int, fn Expr) *Call {
	args := p.items()
	var where []Expr
	if p.isWord(0, "where") && !p.condition && len(args) > 0 {
		p.next()
		where = p.equations(len(args))
	}
	place := p.placeAll(start, fn, args)
	for _, x := range where {
		place = p.above(place, x)
	}
	return &Call{place, fn, args, where}
}

// equations reads at most n equations, parted by commas.
func (p *parser) equations(n int) []Expr {
	p.deeper()
	defer p.shallower()
	var list []Expr
	for {
		start := p.start()
		x := p.binary(pOver)
		if !p.isOp("=") {
			p.failUnlessEnd("where holds equations for what is adjoined", "write K(a) where a^2 = ..., and parentheses around it inside a list")
		}
		list = append(list, p.chain(start, x, true))
		if len(list) >= n || !p.isOp(",") {
			return list
		}
		p.next()
	}
}
