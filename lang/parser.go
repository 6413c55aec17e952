package lang

import (
	"github.com/alecthomas/participle/v2/lexer"
)

// parser reads expressions. Its methods stop at a fault by a panic with
// *Error, which attempt turns back into a result.
type parser struct {
	tokens  *lexer.PeekingLexer
	words   *words
	nesting int
	opened  []bracket // those that are open
	inside
}

// inside is what surrounds the place that is read, up to the next bracket.
type inside struct {
	condition bool // of a comprehension: where holds it, not the equations of an adjunction
	object    bool // of a phrase or predicate, which takes the prepositions that follow a name
}

// bracket is an opened one, with what surrounds it.
type bracket struct {
	token *lexer.Token
	inside
}

func (p *parser) peek() *lexer.Token { return p.tokens.Peek() }

func (p *parser) next() *lexer.Token { return p.tokens.Next() }

// ahead is the k-th token from here, peek being the 0th. It stops at the end.
func (p *parser) ahead(k int) *lexer.Token {
	from := p.tokens.RawCursor()
	t := p.tokens.Peek()
	for i := lexer.RawCursor(1); i <= lexer.RawCursor(k) && !t.EOF(); i++ {
		t = &p.tokens.Range(from+i, from+i+1)[0]
	}
	return t
}

// previous is the token just read; there is always one when it is asked for,
// or the text is empty.
func (p *parser) previous() *lexer.Token {
	from := p.tokens.RawCursor()
	if from == 0 {
		return &lexer.Token{Type: tEnd}
	}
	return &p.tokens.Range(from-1, from)[0]
}

func (p *parser) start() int { return p.peek().Pos.Offset }

func (p *parser) end() int { return tokenSpan(p.previous()).End }

func (p *parser) isOp(op string) bool {
	t := p.peek()
	return t.Type == tOp && plain(t) == op
}

func (p *parser) isBracket(b string) bool {
	t := p.peek()
	return t.Type == tBracket && t.Value == b
}

func (p *parser) isWord(k int, word string) bool {
	t := p.ahead(k)
	return (t.Type == tName || t.Type == tKeyword) && t.Value == word
}

func (p *parser) isPreposition() bool {
	t := p.peek()
	return t.Type == tKeyword && prepositions[t.Value] || t.Type == tOp && plain(t) == "in"
}

// place is the at of a node that began at byte start, ends here, and has kids.
func (p *parser) place(start int, kids ...Expr) at {
	a := at{S: Span{start, p.end()}, height: 1}
	for _, k := range kids {
		a = p.above(a, k)
	}
	return a
}

// placeAll is place for a node over x, which may be nil, and a list.
func (p *parser) placeAll(start int, x Expr, items []Expr) at {
	a := p.place(start, items...)
	if x != nil {
		a = p.above(a, x)
	}
	return a
}

// placeArgs is place for a node over x, which may be nil, and its prepositions.
func (p *parser) placeArgs(start int, x Expr, args []Arg) at {
	a := p.placeAll(start, x, nil)
	for _, arg := range args {
		a = p.above(a, arg.X)
	}
	return a
}

// above raises a over one more kid.
func (p *parser) above(a at, kid Expr) at {
	if h := kid.levels() + 1; h > a.height {
		a.height = h
		if h > maxHeight {
			p.tooHigh()
		}
	}
	return a
}

// deeper counts one nesting; shallower takes it back.
func (p *parser) deeper() {
	if p.nesting++; p.nesting > maxNesting {
		p.tooDeep()
	}
}

func (p *parser) shallower() { p.nesting-- }

// open reads an opening bracket, and close the one that belongs to it.
// What surrounds a bracket does not reach into it.
func (p *parser) open() {
	p.opened = append(p.opened, bracket{p.next(), p.inside})
	p.inside = inside{}
	p.deeper()
}

// skip reads n tokens.
func (p *parser) skip(n int) {
	for range n {
		p.next()
	}
}

var closing = map[string]string{"(": ")", "[": "]", "{": "}"}

func (p *parser) close() {
	last := p.opened[len(p.opened)-1]
	if !p.isBracket(closing[last.token.Value]) {
		p.unexpected(closer)
	}
	p.next()
	p.inside = last.inside
	p.opened = p.opened[:len(p.opened)-1]
	p.shallower()
}
