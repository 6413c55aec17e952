package lang

import (
	"strconv"
	"testing"
)

func TestIsComplete(t *testing.T) {
	runCorpus(t, "complete.txt", func(t *testing.T, text string) string {
		text, err := unescapeBytes(text)
		if err != nil {
			t.Fatal(err)
		}
		switch c := IsComplete(text, testLexicon); c.Status {
		case Complete:
			return "complete" + c.Indent
		case Incomplete:
			return "incomplete [" + c.Indent + "]"
		default:
			return "invalid" + c.Indent
		}
	})
}

// A cell that is typed line by line is incomplete until its statement ends.
func TestIsCompleteOfPrefixes(t *testing.T) {
	cell := "let A = [\n  1,\n  (2 +\n   3),\n  f(x,\n y)\n]\nlet K = F_2(a,\n b) where\n a^2 = a +\n 1,\n b^3 = b + 1"
	for i := range cell {
		if cell[i] != '\n' {
			continue
		}
		want := Incomplete
		if cell[i-1] == ']' {
			want = Complete
		}
		if got := IsComplete(cell[:i+1], testLexicon).Status; got != want {
			t.Errorf("IsComplete(%s) is %d, not %d", strconv.Quote(cell[:i+1]), got, want)
		}
	}
}
