package lang

import (
	"path/filepath"
	"testing"
	"unicode/utf8"
)

func addCorpus(f *testing.F) {
	paths, err := filepath.Glob(filepath.Join("testdata", "*.txt"))
	if err != nil || len(paths) == 0 {
		f.Fatal(err)
	}
	for _, path := range paths {
		for _, s := range readCorpus(f, path) {
			f.Add(s.text)
		}
	}
}

// Whatever the text is: Parse does not panic, a fault lies inside the text
// and says what is wrong and the way out, a tree prints and parses back, and
// IsComplete agrees.
func FuzzParse(f *testing.F) {
	addCorpus(f)
	f.Fuzz(func(t *testing.T, src string) {
		list, fault := Parse(src, testLexicon)
		status := IsComplete(src, testLexicon)
		if fault != nil {
			if fault.At.Start < 0 || fault.At.End < fault.At.Start || fault.At.End > len(src) {
				t.Fatalf("the fault of %q is at %v", src, fault.At)
			}
			if fault.Reason == "" || fault.Remedy == "" || !utf8.ValidString(fault.Error()) {
				t.Fatalf("the fault of %q is %q", src, fault.Error())
			}
			if (status.Status == Incomplete) != fault.Incomplete || status.Status == Complete {
				t.Fatalf("%q has a fault and status %d", src, status.Status)
			}
			return
		}
		if status.Status != Complete {
			t.Fatalf("%q parses and has status %d", src, status.Status)
		}
		end := 0
		for _, s := range list {
			if s.Span().Start < end || s.Span().End < s.Span().Start || s.Span().End > len(src) {
				t.Fatalf("a statement of %q is at %v", src, s.Span())
			}
			end = s.Span().End
		}
		checkSpans(t, src, list)
		checkRoundTrip(t, src, list)
	})
}

// Tokens covers any text: its tokens lie in order, hold the text of their
// place, and leave out nothing but blanks and line ends.
func FuzzTokens(f *testing.F) {
	addCorpus(f)
	f.Fuzz(func(t *testing.T, src string) {
		end := 0
		for _, tok := range Tokens(src) {
			if tok.Span.Start < end || tok.Span.End <= tok.Span.Start || src[tok.Span.Start:tok.Span.End] != tok.Text {
				t.Fatalf("%q has token %q at %v behind %d", src, tok.Text, tok.Span, end)
			}
			checkGap(t, src[end:tok.Span.Start])
			end = tok.Span.End
		}
		checkGap(t, src[end:])
		for at := -1; at <= min(len(src), 100)+1; at++ {
			if tok, ok := TokenAt(src, at); ok && (at < tok.Span.Start || at > tok.Span.End) {
				t.Fatalf("TokenAt(%q, %d) is %v", src, at, tok)
			}
		}
	})
}

func checkGap(t *testing.T, gap string) {
	t.Helper()
	if n := span(gap, func(r rune, n int) bool { return (isBlank(r) || r == '\n') && utf8.ValidRune(r) }); n < len(gap) {
		t.Fatalf("no token covers %q", gap)
	}
}
