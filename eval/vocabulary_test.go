package eval

import (
	"strings"
	"testing"
	"unicode"

	"adjoin/eval/vocabulary"
)

// TestExamples runs the examples of every entry, each in a session of its own.
func TestExamples(t *testing.T) {
	for _, e := range vocabulary.All() {
		t.Run(e.Class.String()+" "+e.Words, func(t *testing.T) {
			for _, x := range e.Examples {
				out, err := run(NewSession(Options{}), x.Code)
				if err != nil {
					t.Errorf("%s\n%s", x.Code, err.Text())
					continue
				}
				if got := lastValue(out); got != x.Result {
					t.Errorf("%s\n  want %s\n  got  %s", x.Code, x.Result, got)
				}
			}
		})
	}
}

// lastValue is the text of the last value shown, without the comments.
func lastValue(out string) string {
	lines := strings.Split(out, "\n")
	for i := len(lines) - 1; i >= 0; i-- {
		text, _, _ := strings.Cut(lines[i], "  # ")
		if !strings.HasPrefix(text, "#") {
			return text
		}
	}
	return ""
}

// TestEntries: every entry says what it means, once, and shows an example.
func TestEntries(t *testing.T) {
	for _, e := range vocabulary.All() {
		name := e.Class.String() + " " + e.Words
		if e.Meaning == "" || strings.HasSuffix(e.Meaning, ".") {
			t.Errorf("%s: the meaning is empty or ends in a full stop", name)
		}
		if first := []rune(e.Meaning)[0]; unicode.IsUpper(first) && !strings.HasPrefix(e.Meaning, "K ") && !strings.HasPrefix(e.Meaning, "H ") {
			t.Errorf("%s: the meaning begins with a capital", name)
		}
		if e.Topic == "" || len(e.Signatures()) == 0 {
			t.Errorf("%s: no topic or no signature", name)
		}
		if len(e.Examples) == 0 && e.Topic != "statements" {
			t.Errorf("%s: no example", name)
		}
	}
}

// TestExplain: one entry, several with one word, the whole reference, and what
// was nearly said.
func TestExplain(t *testing.T) {
	s := NewSession(Options{})
	for _, c := range []struct{ src, want string }{
		{"explain trace", "trace of a [over K]"},
		{"explain minimal polynomial", "Source: "},
		{"explain primitive", "is primitive"},
		{"explain", "ELEMENTS\n========"},
	} {
		if out, err := run(s, c.src); err != nil || !strings.HasPrefix(out, "page: ") || !strings.Contains(out, c.want) {
			t.Errorf("%s shows\n%s", c.src, out)
		}
	}
	if _, err := run(s, "explain minimal polynomail"); err == nil || !strings.Contains(err.Remedy, "minimal polynomial") {
		t.Errorf("no suggestion: %v", err)
	}
}
