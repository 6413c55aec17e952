package lang

import (
	"strings"
	"unicode/utf8"

	"github.com/alecthomas/participle/v2/lexer"
)

// The types of tokens. The value of a token is always the text as written,
// so that its end is known; plain gives the spelling that the grammar means.
const (
	tName lexer.TokenType = iota + 1
	tKeyword
	tInt
	tStr
	tOp
	tBracket
	tSup     // raised digits
	tEnd     // the end of a statement
	tComment // dropped by the layout
	tNewline // becomes tEnd or nothing
	tBad     // no token at all; fault.go says why
)

// scanner cuts text into tokens, and accepts any text. It is written by hand
// because the grammar library's own lexer tries one regular expression after
// another at every token, each against the whole rest of the text.
type scanner struct {
	src       string
	at        int
	line, col int // of at, from 1; columns count code points
}

func newScanner(src string) *scanner { return &scanner{src: src, line: 1, col: 1} }

// next is the next token, comments and line ends included, blanks left out.
func (s *scanner) next() lexer.Token {
	for s.at < len(s.src) {
		r, n := s.rune()
		if !isBlank(r) || r == utf8.RuneError && n == 1 {
			break
		}
		s.at += n
		s.col++
	}
	t := lexer.Token{Pos: lexer.Position{Offset: s.at, Line: s.line, Column: s.col}}
	if s.at == len(s.src) {
		t.Type = lexer.EOF
		return t
	}
	typ, end := s.cut()
	t.Type, t.Value = typ, s.src[s.at:end]
	s.at = end
	if typ == tNewline {
		s.line++
		s.col = 1
	} else {
		s.col += utf8.RuneCountInString(t.Value)
	}
	return t
}

func (s *scanner) rune() (rune, int) { return decode(s.src[s.at:]) }

func decode(s string) (rune, int) {
	if s != "" && s[0] < utf8.RuneSelf {
		return rune(s[0]), 1
	}
	return utf8.DecodeRuneInString(s)
}

// cut finds the type and the end of the token at s.at.
func (s *scanner) cut() (lexer.TokenType, int) {
	rest := s.src[s.at:]
	r, n := decode(rest)
	switch {
	case r == '\n':
		return tNewline, s.at + 1
	case r == utf8.RuneError && n == 1:
		return tBad, s.at + span(rest, func(r rune, n int) bool { return r == utf8.RuneError && n == 1 })
	case r == '#':
		end := strings.IndexByte(rest, '\n')
		if end < 0 {
			end = len(rest)
		}
		if !utf8.ValidString(rest[:end]) {
			return s.badComment(rest[:end])
		}
		return tComment, s.at + end
	case r == '"':
		return s.str(rest)
	case isDigit(r):
		return s.number(rest)
	case r == '√':
		return tName, s.at + n
	case isLetter(r):
		end := span(rest, func(r rune, _ int) bool {
			return isLetter(r) || isDigit(r) || isSubscript(r) || r == '_'
		})
		if keywords[rest[:end]] {
			return tKeyword, s.at + end
		}
		return tName, s.at + end
	case isSuperscript(r):
		end := span(rest, func(r rune, _ int) bool { return isSuperscript(r) })
		if !wellRaised(rest[:end]) {
			return tBad, s.at + end
		}
		return tSup, s.at + end
	case strings.ContainsRune("()[]{}", r):
		return tBracket, s.at + n
	case r == ';':
		return tEnd, s.at + n
	}
	return s.mark(rest, n)
}

// mark cuts an operator, or a mark that is none.
func (s *scanner) mark(rest string, n int) (lexer.TokenType, int) {
	if !strings.HasPrefix(rest, "|->") {
		for _, m := range []string{"=/=", "...", "==", ":=", "**", "//", "/=", "<>", "->", "=>", "&&", "||"} {
			if strings.HasPrefix(rest, m) {
				return tBad, s.at + len(m)
			}
		}
	}
	for _, op := range operators {
		if strings.HasPrefix(rest, op) {
			return tOp, s.at + len(op)
		}
	}
	if _, ok := spellings[rest[:n]]; ok {
		return tOp, s.at + n
	}
	return tBad, s.at + n
}

// badComment stops a comment before the bytes that are not UTF-8, so that
// the next token is the fault.
func (s *scanner) badComment(text string) (lexer.TokenType, int) {
	end := span(text, func(r rune, n int) bool { return r != utf8.RuneError || n != 1 })
	return tComment, s.at + end
}

// str cuts a string; one without an end on its line is bad, and so is one
// with an unknown escape or bytes that are not UTF-8.
func (s *scanner) str(rest string) (lexer.TokenType, int) {
	typ := tStr
	for i := 1; i < len(rest); {
		r, n := decode(rest[i:])
		switch {
		case r == '"':
			return typ, s.at + i + 1
		case r == '\n':
			return tBad, s.at + i
		case r == utf8.RuneError && n == 1:
			typ = tBad
		case r == '\\' && i+1 < len(rest) && rest[i+1] != '\n':
			if _, ok := escapes[rest[i+1]]; !ok {
				typ = tBad
			}
			n = 2
			if rest[i+1] >= utf8.RuneSelf {
				n = 1
			}
		}
		i += n
	}
	return tBad, s.at + len(rest)
}

var escapes = map[byte]byte{'"': '"', '\\': '\\', 'n': '\n', 't': '\t'}

// number cuts an integer. What runs into it and makes it doubtful (0x without
// digits, 1.5, 12_) is cut with it and bad.
func (s *scanner) number(rest string) (lexer.TokenType, int) {
	if len(rest) > 1 && rest[0] == '0' && strings.IndexByte("xXbB", rest[1]) >= 0 {
		end := span(rest, func(r rune, _ int) bool { return isLetter(r) || isDigit(r) || r == '_' })
		digits := "01"
		if rest[1] == 'x' || rest[1] == 'X' {
			digits = "0123456789abcdefABCDEF"
		}
		if !wellParted(rest[2:end], digits) {
			return tBad, s.at + end
		}
		return tInt, s.at + end
	}
	end := span(rest, func(r rune, _ int) bool { return isDigit(r) || r == '_' })
	if len(rest) > end+1 && rest[end] == '.' && isDigit(rune(rest[end+1])) {
		end++
		end += span(rest[end:], func(r rune, _ int) bool { return isDigit(r) })
		return tBad, s.at + end
	}
	if !wellParted(rest[:end], "0123456789") {
		return tBad, s.at + end
	}
	return tInt, s.at + end
}

// wellParted says whether text is digits with single _ between them.
func wellParted(text, digits string) bool {
	after := false // a digit stands before
	for i := 0; i < len(text); i++ {
		if text[i] == '_' {
			if !after {
				return false
			}
			after = false
			continue
		}
		if strings.IndexByte(digits, text[i]) < 0 {
			return false
		}
		after = true
	}
	return after
}

// wellRaised says whether raised text is digits after at most one sign.
func wellRaised(text string) bool {
	p := plainSuperscript(text)
	return wellParted(strings.TrimPrefix(strings.TrimPrefix(p, "-"), "+"), "0123456789") && !strings.HasPrefix(p, "-+")
}

// span is the length of the longest prefix whose characters all satisfy ok.
func span(s string, ok func(r rune, n int) bool) int {
	i := 0
	for i < len(s) {
		r, n := decode(s[i:])
		if !ok(r, n) {
			break
		}
		i += n
	}
	return i
}

// plain is the spelling of a token that the grammar means: ≤ is <=, ℚ is Q.
func plain(t *lexer.Token) string {
	switch t.Type {
	case tOp:
		if t.Value[0] >= utf8.RuneSelf {
			return spellings[t.Value]
		}
	case tName:
		return plainName(t.Value)
	}
	return t.Value
}

func tokenSpan(t *lexer.Token) Span { return Span{t.Pos.Offset, t.Pos.Offset + len(t.Value)} }
