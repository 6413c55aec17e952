package eval

import (
	"strings"
	"testing"

	"adjoin/lang"
)

// TestErrorText: the block that language documents show, with the caret under
// the place in characters, also behind letters of several bytes.
func TestErrorText(t *testing.T) {
	src := "let K = 1\nlet αβ = F_6 + 1"
	at := strings.Index(src, "F_6")
	e := locate(src, &fault{at: lang.Span{Start: at, End: at + 3}, name: "Invalid", reason: "there is no field with 6 elements", remedy: "try F_7"})
	want := `line 2, column 10: there is no field with 6 elements
    let αβ = F_6 + 1
             ^
    try F_7`
	if e.Text() != want {
		t.Errorf("got\n%s\nwant\n%s", e.Text(), want)
	}
	if e.Error() != "line 2, column 10: there is no field with 6 elements; try F_7" {
		t.Error(e.Error())
	}
}

// TestLongLine: the excerpt of a long line stays short and keeps the place.
func TestLongLine(t *testing.T) {
	src := strings.Repeat("1 + ", 1000) + "?" + strings.Repeat(" + 1", 1000)
	at := strings.Index(src, "?")
	e := locate(src, &fault{at: lang.Span{Start: at, End: at + 1}, reason: "r"})
	if r := []rune(e.Excerpt); len(r) > 120 || r[e.Caret] != '?' {
		t.Errorf("%d %q", e.Caret, e.Excerpt)
	}
}
