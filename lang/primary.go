package lang

import (
	"math/big"
	"strings"
)

// primary reads an atom, a bracket or a phrase.
func (p *parser) primary() Expr {
	t := p.peek()
	start := p.start()
	switch t.Type {
	case tInt:
		p.next()
		return &Int{p.place(start), integer(t.Value), t.Value}
	case tStr:
		p.next()
		return &Str{p.place(start), unescape(t.Value)}
	case tName:
		return p.word()
	case tBracket:
		switch t.Value {
		case "(":
			return p.parentheses()
		case "[":
			return p.list()
		case "{":
			return p.braces()
		}
	}
	p.unexpected(anOperand)
	return nil
}

func unescape(text string) string {
	text = text[1 : len(text)-1]
	if !strings.Contains(text, `\`) {
		return text
	}
	var b strings.Builder
	for i := 0; i < len(text); i++ {
		if text[i] == '\\' {
			i++
			b.WriteByte(escapes[text[i]])
		} else {
			b.WriteByte(text[i])
		}
	}
	return b.String()
}

// parentheses reads (x), (x, y), () or a cycle (1 2 3).
func (p *parser) parentheses() Expr {
	start := p.start()
	if p.ahead(1).Type == tInt && p.ahead(2).Type == tInt {
		return p.cycle()
	}
	p.open()
	var items []Expr
	if !p.isBracket(")") {
		items = p.sequence()
	}
	p.close()
	if len(items) == 1 {
		return &Paren{p.place(start, items[0]), items[0]}
	}
	return &Tuple{p.placeAll(start, nil, items), items}
}

func (p *parser) cycle() Expr {
	start := p.start()
	p.open()
	var points []*big.Int
	for p.peek().Type == tInt {
		points = append(points, integer(p.next().Value))
	}
	if p.startsOperand(0) || p.isOp(",") {
		p.fail(p.peek(), "a cycle holds integers parted by spaces alone", "write (1 2 3), or (a, b) for a tuple")
	}
	p.close()
	return &Cycle{p.place(start), points}
}

// isCycles says whether x is a product of cycles as (1 2)(3 4).
func isCycles(x Expr) bool {
	if b, ok := x.(*Binary); ok && b.Juxtaposed {
		x = b.Y // the left one is a number or itself such a product
		if _, number := b.X.(*Int); number {
			return false
		}
	}
	_, ok := x.(*Cycle)
	return ok
}

// items reads the arguments in brackets, which may be none.
func (p *parser) items() []Expr {
	end := closing[p.peek().Value]
	p.open()
	items := []Expr{}
	if !p.isBracket(end) {
		items = p.sequence()
	}
	p.close()
	return items
}

// sequence reads expressions parted by commas, one at least.
func (p *parser) sequence() []Expr {
	items := []Expr{p.expression()}
	for p.isOp(",") {
		p.next()
		items = append(items, p.expression())
	}
	return items
}

// list reads [a, b], [L : K] or a comprehension.
func (p *parser) list() Expr {
	start := p.start()
	p.open()
	if p.isBracket("]") {
		p.close()
		return &List{p.place(start), []Expr{}}
	}
	items := p.sequence()
	if len(items) == 1 && p.isOp(":") {
		p.next()
		k := p.expression()
		p.close()
		return &Degree{p.place(start, items[0], k), items[0], k}
	}
	if len(items) == 1 && p.isWord(0, "for") {
		c := p.comprehension(items[0])
		p.close()
		c.at = p.placeClauses(start, c)
		return c
	}
	p.close()
	return &List{p.placeAll(start, nil, items), items}
}

// braces reads {a, b} or {x for x in S}.
func (p *parser) braces() Expr {
	start := p.start()
	p.open()
	if p.isBracket("}") {
		p.close()
		return &Set{p.place(start), []Expr{}}
	}
	items := p.sequence()
	if len(items) == 1 && p.isWord(0, "for") {
		c := p.comprehension(items[0])
		c.Braces = true
		p.close()
		c.at = p.placeClauses(start, c)
		return c
	}
	p.close()
	return &Set{p.placeAll(start, nil, items), items}
}

// comprehension reads for x in S, y in T where C behind x.
func (p *parser) comprehension(x Expr) *Comprehension {
	c := &Comprehension{X: x}
	p.condition = true
	for {
		p.next() // for, or a comma
		start := p.start()
		var names []Name
		if p.isBracket("(") {
			names = p.names("for")
		} else {
			names = []Name{p.name("for")}
		}
		if !p.isIn(0) {
			p.failUnlessEnd("for needs in and what it runs through", "write for n in 1..20")
		}
		p.next()
		in := p.binary(pRange)
		c.Clause = append(c.Clause, Clause{p.place(start, in), names, in})
		if !p.isOp(",") {
			break
		}
	}
	if p.isWord(0, "where") {
		p.next()
		c.Where = p.binary(pOr)
	}
	return c
}

func (p *parser) placeClauses(start int, c *Comprehension) at {
	a := p.place(start, c.X)
	for _, clause := range c.Clause {
		a = p.above(a, clause.In)
	}
	if c.Where != nil {
		a = p.above(a, c.Where)
	}
	return a
}

// indexed splits a name with an index whose head the lexicon knows.
func (p *parser) indexed(text string) (head, index string, ok bool) {
	head, index, ok = strings.Cut(text, "_")
	return head, index, ok && p.words.heads[head]
}

// subscript reads a head with its index: F_8, F_q, F_{2^8}.
func (p *parser) subscript(head, index string) Expr {
	t := p.peek()
	start := p.start()
	p.next()
	if index != "" {
		x := p.index(start, index)
		if x == nil {
			p.fail(t, "the index of "+t.Value+" is neither a number nor a name", "put it in braces: "+head+"_{...}")
		}
		return &Subscript{p.place(start, x), head, x}
	}
	if !p.isBracket("{") || p.start() != p.end() {
		p.failUnlessEnd("the index of "+head+" is missing", "write "+head+"_8 or "+head+"_{2^3}")
	}
	p.open()
	x := p.expression()
	p.close()
	return &Subscript{p.place(start, x), head, x}
}

// index is the index after the first _ of a name, or nil.
func (p *parser) index(start int, text string) Expr {
	if wellParted(text, "0123456789") {
		return &Int{p.place(start), integer(text), text}
	}
	if head, index, ok := p.indexed(text); ok {
		p.deeper()
		x := p.index(start, index)
		p.shallower()
		if x != nil {
			return &Subscript{p.place(start, x), head, x}
		}
		return nil
	}
	if r, _ := decode(text); !isLetter(r) || keywords[text] || strings.HasSuffix(text, "_") {
		return nil
	}
	return &Name{p.place(start), text}
}
