package lang

import (
	"strings"

	"github.com/alecthomas/participle/v2"
	"github.com/alecthomas/participle/v2/lexer"
)

// statement is one statement as the grammar library reads it. One token
// decides between the alternatives. Expressions, and what stands on the left
// of let, are read by our own functions (expression.go, binder.go), whose
// faults come through unchanged.
type statement struct {
	Pos     lexer.Position
	Let     *letStatement     `parser:"@@"`
	Claim   Expr              `parser:"| 'claim' @@"`
	Say     *sayStatement     `parser:"| @@"`
	Explain *explainStatement `parser:"| @@"`
	Clear   bool              `parser:"| @('clear' 'output')"`
	Expr    Expr              `parser:"| @@"`
}

type letStatement struct {
	Binder binder `parser:"'let' @@"`
	Value  Expr   `parser:"'=' @@"`
}

type sayStatement struct {
	Args []Expr `parser:"'say' @@ (',' @@)*"`
}

type explainStatement struct {
	Words topic `parser:"'explain' @@"`
}

// binder is the left side of a let; topic is the words after explain.
// The grammar library wants interfaces for what it does not read itself.
type (
	binder interface{ binds() *Let }
	topic  interface{ about() []string }
)

type topicWords []string

func (l *Let) binds() *Let           { return l }
func (t topicWords) about() []string { return t }

func newGrammar(w *words) *participle.Parser[statement] {
	return participle.MustBuild[statement](
		participle.Lexer(notation{}),
		participle.ParseTypeWith(part(w, func(p *parser) Expr { return p.expression() })),
		participle.ParseTypeWith(part(w, func(p *parser) binder { return p.binder() })),
		participle.ParseTypeWith(part(w, func(p *parser) topic { return p.topic() })),
	)
}

// part makes a function of ours one of the grammar library's productions.
func part[T any](w *words, f func(p *parser) T) func(*lexer.PeekingLexer) (T, error) {
	return func(tokens *lexer.PeekingLexer) (T, error) {
		var result T
		if fault := attempt(w, tokens, func(p *parser) { result = f(p) }); fault != nil {
			return result, fault
		}
		return result, nil
	}
}

// tree lowers the statement just read to the syntax tree.
func (s *statement) tree(tokens *lexer.PeekingLexer) Stmt {
	end := tokens.RawCursor() - 1
	place := at{S: Span{s.Pos.Offset, tokenSpan(&tokens.Range(end, end+1)[0]).End}}
	switch {
	case s.Let != nil:
		let := *s.Let.Binder.binds()
		let.at, let.Value = place, s.Let.Value
		return &let
	case s.Claim != nil:
		return &Claim{place, s.Claim}
	case s.Say != nil:
		return &Say{place, s.Say.Args}
	case s.Explain != nil:
		return &Explain{place, s.Explain.Words.about()}
	case s.Clear:
		return &Clear{place}
	}
	return &ExprStmt{place, s.Expr}
}

// last is the expression that the statement ends in, or nil.
func (s *statement) last() Expr {
	switch {
	case s.Let != nil:
		return s.Let.Value
	case s.Claim != nil:
		return s.Claim
	}
	return s.Expr
}

// binder reads what let binds: x, (x, y) or f(x, y).
func (p *parser) binder() *Let {
	if p.isBracket("(") {
		return &Let{Names: p.names("let")}
	}
	let := &Let{Names: []Name{p.name("let")}}
	if p.isBracket("(") {
		let.Params = p.names("the brackets of a function")
		if len(let.Params) == 0 {
			p.fail(p.peek(), "a function needs the name of what it depends on", "write let f(n) = ...")
		}
	}
	return let
}

// names reads (a, b, ...) and may be empty.
func (p *parser) names(place string) []Name {
	p.open()
	var list []Name
	for !p.isBracket(")") {
		list = append(list, p.name(place))
		if !p.isOp(",") {
			break
		}
		p.next()
	}
	p.close()
	return list
}

// name reads a name that is about to be bound, with the primes behind it.
func (p *parser) name(place string) Name {
	t := p.peek()
	if t.Type != tName {
		p.notAName(t, place)
	}
	start := p.start()
	text := plain(p.next())
	if starters[text] {
		p.fail(t, text+" begins a statement and cannot be a name", "choose another name")
	}
	if head, _, ok := p.indexed(text); ok {
		p.fail(t, text+" is notation ("+head+" with an index) and cannot be bound", "choose another name")
	}
	if text == "sqrt" || strings.HasSuffix(text, "_") {
		p.fail(t, text+" cannot be bound", "choose another name")
	}
	for p.isOp("'") {
		p.next()
		text += "'"
	}
	return Name{p.place(start), text}
}

// topic reads the words after explain up to the end of the statement;
// marks that touch belong to one word, as in p-th.
func (p *parser) topic() topicWords {
	list := topicWords{}
	for {
		t := p.peek()
		if t.EOF() || t.Type == tEnd {
			return list
		}
		if t.Type == tBad {
			p.unexpected(nothing)
		}
		text := t.Value
		if t.Type == tOp {
			text = plain(t)
		}
		if n := len(list); n > 0 && p.end() == t.Pos.Offset {
			list[n-1] += text
		} else {
			list = append(list, text)
		}
		p.next()
	}
}
