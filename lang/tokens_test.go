package lang

import (
	"fmt"
	"strings"
	"testing"
)

var kindNames = map[Kind]string{KindError: "error", KindKeyword: "keyword", KindWord: "word", KindName: "name", KindNumber: "number",
	KindString: "string", KindComment: "comment", KindOperator: "operator", KindBracket: "bracket"}

func TestTokens(t *testing.T) {
	runCorpus(t, "tokens.txt", func(t *testing.T, text string) string {
		text, err := unescapeBytes(text)
		if err != nil {
			t.Fatal(err)
		}
		var parts []string
		for _, tok := range Tokens(text) {
			parts = append(parts, fmt.Sprintf("%s %q", kindNames[tok.Kind], tok.Text))
		}
		return strings.Join(parts, ", ")
	})
}

func TestTokenAt(t *testing.T) {
	const src = "let K = F_2(α)  # x"
	for _, test := range []struct {
		at   int
		want string
	}{
		{0, "let"}, {2, "let"}, {3, "let"}, {4, "K"}, {5, "K"}, {6, "="}, {7, "="}, {8, "F_2"}, {11, "F_2"},
		{12, "α"}, {13, "α"}, {14, "α"}, {15, ")"}, {16, ""}, {17, "# x"}, {20, "# x"}, {21, ""}, {-1, ""}, {99, ""},
	} {
		tok, ok := TokenAt(src, test.at)
		if tok.Text != test.want || ok != (test.want != "") {
			t.Errorf("TokenAt(%q, %d) is %q, %v, not %q", src, test.at, tok.Text, ok, test.want)
		}
	}
	if tok, ok := TokenAt("", 0); ok {
		t.Errorf("the empty text has token %v", tok)
	}
	if tok, _ := TokenAt("f(", 1); tok.Text != "f" {
		t.Errorf("behind a name and before a bracket stands %q", tok.Text)
	}
	if tok, _ := TokenAt("(f", 1); tok.Text != "f" {
		t.Errorf("behind a bracket and before a name stands %q", tok.Text)
	}
}
