package lang

import (
	"errors"
	"fmt"

	"github.com/alecthomas/participle/v2"
	"github.com/alecthomas/participle/v2/lexer"
)

// The limits of a text. They hold before the work starts, and they keep the
// tree low enough that whoever walks it may recurse.
const (
	maxSource  = 1 << 20 // bytes
	maxTokens  = 250_000
	maxNesting = 1000   // brackets and prefixes inside one another
	maxHeight  = 10_000 // of a tree: a sum of so many terms has it too
)

// Parse reads the text of a cell: its statements in order, or the first fault
// in the text. It never panics and takes time linear in the length of src.
// A cell that is blank or all comment has no statements and no fault.
func Parse(src string, lex *Lexicon) ([]Stmt, *Error) {
	w := lex.index()
	tokens, fault := read(src)
	if fault != nil {
		return nil, fault
	}
	var list []Stmt
	begin := 0 // column of the statement before
	for !tokens.Peek().EOF() {
		if tokens.Peek().Type == tEnd {
			tokens.Next()
			continue
		}
		t := *tokens.Peek()
		if len(list) > 0 && t.Pos.Column > begin && t.Type == tOp && (plain(&t) == "+" || plain(&t) == "-") && tokens.Range(tokens.RawCursor()-1, tokens.RawCursor())[0].Value == "" {
			return nil, strayContinuation(&t)
		}
		begin = t.Pos.Column
		s, err := w.grammar.ParseFromLexer(tokens, participle.AllowTrailing(true))
		if err != nil {
			return nil, asError(err)
		}
		list = append(list, s.tree(tokens))
		if t := tokens.Peek(); t.Type != tEnd && !t.EOF() {
			return nil, attempt(w, tokens, func(p *parser) { p.trailing(s.last()) })
		}
	}
	return list, nil
}

// ParseExpr reads one expression and nothing else.
func ParseExpr(src string, lex *Lexicon) (Expr, *Error) {
	w := lex.index()
	tokens, fault := read(src)
	if fault != nil {
		return nil, fault
	}
	for tokens.Peek().Type == tEnd {
		tokens.Next()
	}
	var x Expr
	fault = attempt(w, tokens, func(p *parser) {
		x = p.expression()
		for tokens.Peek().Type == tEnd {
			tokens.Next()
		}
		if !tokens.Peek().EOF() {
			p.unexpected(nothing)
		}
	})
	if fault != nil {
		return nil, fault
	}
	return x, nil
}

// read cuts src into tokens.
func read(src string) (*lexer.PeekingLexer, *Error) {
	if len(src) > maxSource {
		return nil, &Error{Reason: fmt.Sprintf("the text has %d bytes, more than the %d that a cell may have", len(src), maxSource),
			Remedy: "cut it into several cells"}
	}
	tokens, err := lexer.Upgrade(newLayout(src))
	if err != nil {
		return nil, asError(err)
	}
	return tokens, nil
}

// asError brings an error of the grammar library back to ours. Nearly all
// are ours to begin with; what the library itself finds missing is the = of let.
func asError(err error) *Error {
	var ours *Error
	if errors.As(err, &ours) {
		return ours
	}
	var theirs *participle.UnexpectedTokenError
	if errors.As(err, &theirs) {
		return missingEquals(&theirs.Unexpected)
	}
	return &Error{Reason: "this cannot be read: " + err.Error()}
}

// attempt runs a part of the parser and returns the fault it stopped at.
func attempt(w *words, tokens *lexer.PeekingLexer, part func(p *parser)) (fault *Error) {
	defer func() {
		if r := recover(); r != nil {
			err, ok := r.(*Error)
			if !ok {
				panic(r)
			}
			fault = err
		}
	}()
	part(&parser{tokens: tokens, words: w})
	return nil
}
