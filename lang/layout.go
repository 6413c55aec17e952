package lang

import (
	"io"
	"strings"

	"github.com/alecthomas/participle/v2/lexer"
)

// layout turns the scanner's tokens into the grammar's: comments go, and a
// line end becomes the end of a statement unless a bracket is open or the
// line ends in an operator, a comma or a word of the grammar. A text that
// breaks off there ends without the end of a statement, which is how the
// parser knows an unfinished text from a wrong one.
type layout struct {
	scan    *scanner
	pending []lexer.Token // at most one, held back behind an end of statement
	last    lexer.Token   // the last token given out
	open    int           // brackets
	count   int
}

func newLayout(src string) *layout {
	return &layout{scan: newScanner(src), last: lexer.Token{Type: tEnd}}
}

// Next implements lexer.Lexer. It fails only on a text with too many tokens.
func (l *layout) Next() (lexer.Token, error) {
	t, err := l.step()
	l.last = t
	return t, err
}

func (l *layout) step() (lexer.Token, error) {
	if len(l.pending) > 0 {
		t := l.pending[0]
		l.pending = nil
		return t, nil
	}
	for {
		t := l.scan.next()
		switch t.Type {
		case tComment:
			continue
		case tNewline:
			if l.ends() {
				t.Type = tEnd
				t.Value = "" // so that its span is a place, not a character
				return t, nil
			}
			continue
		case tEnd:
			if l.open == 0 && l.last.Type == tEnd {
				continue
			}
		case lexer.EOF:
			end := l.last.Pos
			end.Offset += len(l.last.Value)
			end.Column += len([]rune(l.last.Value))
			t.Pos = end
			if l.ends() {
				l.pending = []lexer.Token{t}
				t.Type = tEnd
			}
			return t, nil
		case tBracket:
			if strings.Contains("([{", t.Value) {
				l.open++
			} else if l.open > 0 {
				l.open--
			}
		}
		if l.count++; l.count > maxTokens {
			return t, tooManyTokens(&t)
		}
		return t, nil
	}
}

// ends says whether a line end here ends a statement.
func (l *layout) ends() bool {
	return l.open == 0 && l.last.Type != tEnd && !continues(&l.last)
}

// continues says whether a line that ends in t goes on in the next one.
func continues(t *lexer.Token) bool {
	return t.Type == tKeyword || t.Type == tOp && plain(t) != "'"
}

// notation is the lexer's definition as the grammar library wants it.
type notation struct{}

func (notation) Symbols() map[string]lexer.TokenType {
	return map[string]lexer.TokenType{"EOF": lexer.EOF, "Name": tName, "Keyword": tKeyword, "Int": tInt, "Str": tStr,
		"Op": tOp, "Bracket": tBracket, "Sup": tSup, "End": tEnd, "Bad": tBad}
}

func (notation) Lex(_ string, r io.Reader) (lexer.Lexer, error) {
	src, err := io.ReadAll(r)
	return newLayout(string(src)), err
}
