package lang

import (
	"sync"
	"testing"
)

func TestParseExpr(t *testing.T) {
	for _, test := range []struct{ src, want string }{
		{"a + b", "(+ a b)"},
		{"\n trace of a # note\n\n", "(phrase trace (:of a))"},
	} {
		x, fault := ParseExpr(test.src, testLexicon)
		if fault != nil || sexpr(x) != test.want {
			t.Errorf("ParseExpr(%q) is %v, %v", test.src, x, fault)
		}
	}
	for _, src := range []string{"", "a; b", "a b", "let x = 1", "a\nb", "(", "claim a", "1)"} {
		if x, fault := ParseExpr(src, testLexicon); fault == nil || fault.Reason == "" {
			t.Errorf("ParseExpr(%q) is %s", src, sexpr(x))
		}
	}
}

// Without a lexicon the symbols still parse, and words still make phrases.
func TestParseWithoutLexicon(t *testing.T) {
	for _, test := range []struct{ src, want string }{
		{"x^2 + 1", "(+ (^ x 2) 1)"},
		{"minimal polynomial of a over K", "(phrase minimal-polynomial (:of a) (:over K))"},
		{"F_8", "F_8"},
		{"a is prime", "(is prime a)"},
	} {
		list, fault := Parse(test.src, nil)
		if fault != nil || sexprs(list) != test.want {
			t.Errorf("Parse(%q, nil) is %s, %v", test.src, sexprs(list), fault)
		}
	}
}

// Every node below a statement has the place of its own text.
func TestSpans(t *testing.T) {
	const src = "trace of (a + b₁)^2 over F_{2^8}; let 𝔽 = x²"
	list, fault := Parse(src, testLexicon)
	if fault != nil {
		t.Fatal(fault)
	}
	phrase := list[0].(*ExprStmt).X.(*Phrase)
	power := phrase.Args[0].X.(*Binary)
	sum := power.X.(*Paren).X.(*Binary)
	square := list[1].(*Let).Value.(*Binary)
	for _, test := range []struct {
		node Node
		want string
	}{
		{phrase, "trace of (a + b₁)^2 over F_{2^8}"}, {phrase.Args[0], "of (a + b₁)^2"}, {power, "(a + b₁)^2"}, {power.X, "(a + b₁)"},
		{sum, "a + b₁"}, {sum.Y, "b₁"}, {phrase.Args[1], "over F_{2^8}"}, {phrase.Args[1].X.(*Subscript).Index, "2^8"},
		{list[1], "let 𝔽 = x²"}, {list[1].(*Let).Names[0], "𝔽"}, {square, "x²"}, {square.X, "x"}, {square.Y, "²"},
	} {
		if got := src[test.node.Span().Start:test.node.Span().End]; got != test.want {
			t.Errorf("the place of %q is that of %q", test.want, got)
		}
	}
}

// A lexicon may be used by several goroutines from its first use on.
func TestParseTogether(t *testing.T) {
	lex := &Lexicon{Nouns: []string{"trace"}, Heads: []string{"F"}}
	var all sync.WaitGroup
	for range 8 {
		all.Go(func() {
			if list, fault := Parse("let x = trace of a over F_2", lex); fault != nil || len(list) != 1 {
				t.Error(fault)
			}
		})
	}
	all.Wait()
}
