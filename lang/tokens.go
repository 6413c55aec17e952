package lang

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
	KindOperator             // + = |-> , ' and the like
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
func Tokens(src string) []Token { panic("to come") }

// TokenAt is the token that covers byte offset at, or ends there (so that a
// cursor just behind a name finds it). It is false between tokens.
func TokenAt(src string, at int) (Token, bool) { panic("to come") }
