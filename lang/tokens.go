package lang

import (
	"sort"

	"github.com/alecthomas/participle/v2/lexer"
)

// Kind classifies a token by its letters alone, for highlighting.
type Kind int

// The kinds of tokens.
const (
	KindError    Kind = iota // a stray character, a string without end, a malformed number
	KindKeyword              // a word reserved by the grammar: let, where, of, ...
	KindWord                 // two letters or more, all lower case: trace, polynomial
	KindName                 // any other name: x, K, F_8, Gal
	KindNumber               // 1729, 0x11D, a superscript
	KindString               // in double quotes
	KindComment              // from # to the end of the line
	KindOperator             // + = |-> , ; ' and the like
	KindBracket              // ( ) [ ] { }
)

// Token is one token as written, and where it stands.
type Token struct {
	Kind Kind
	Text string
	Span Span
}

// Tokens cuts src into tokens, comments included, blanks and line ends left
// out. It accepts any text whatever: what is no token has KindError.
func Tokens(src string) []Token {
	var list []Token
	for s := newScanner(src); ; {
		t := s.next()
		if t.EOF() {
			return list
		}
		if t.Type != tNewline {
			list = append(list, Token{kind(&t), t.Value, tokenSpan(&t)})
		}
	}
}

// TokenAt is the token that covers byte offset at, or else the one that ends
// there, so that a cursor just behind a name finds it. Between two tokens
// that touch, a name or a word wins over a mark. It is false in a gap.
func TokenAt(src string, at int) (Token, bool) {
	list := Tokens(src)
	i := sort.Search(len(list), func(i int) bool { return list[i].Span.End >= at })
	if i == len(list) || list[i].Span.Start > at {
		return Token{}, false
	}
	if next := i + 1; list[i].Span.End == at && next < len(list) && list[next].Span.Start == at {
		if !list[i].named() || list[next].named() {
			return list[next], true
		}
	}
	return list[i], true
}

func (t Token) named() bool { return t.Kind == KindName || t.Kind == KindWord || t.Kind == KindKeyword }

func kind(t *lexer.Token) Kind {
	switch t.Type {
	case tKeyword:
		return KindKeyword
	case tName:
		if isWordText(t.Value) {
			return KindWord
		}
		return KindName
	case tInt, tSup:
		return KindNumber
	case tStr:
		return KindString
	case tComment:
		return KindComment
	case tOp, tEnd:
		return KindOperator
	case tBracket:
		return KindBracket
	}
	return KindError
}

func sortedKeys(m entries) []string {
	keys := make([]string, 0, len(m))
	for k := range m {
		keys = append(keys, k)
	}
	sort.Strings(keys)
	return keys
}
