package lang

import (
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "rewrite the corpus with what the parser gives")

// A corpus file is a series of samples: the text of a cell, a line ----, what
// comes out of it, and a line ====. Lines before a sample that begin with %
// are remarks. See testdata/README.
type sample struct{ remarks, text, want string }

func readCorpus(t testing.TB, path string) []sample {
	t.Helper()
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	var list []sample
	for _, part := range strings.Split(string(data), "\n====\n") {
		if strings.TrimSpace(part) == "" {
			continue
		}
		var s sample
		for strings.HasPrefix(part, "%") {
			line, rest, _ := strings.Cut(part, "\n")
			s.remarks += line + "\n"
			part = rest
		}
		text, want, ok := strings.Cut(part, "\n----")
		if !ok {
			text = strings.TrimSuffix(part, "\n")
		}
		s.text, s.want = text, strings.TrimPrefix(want, "\n")
		list = append(list, s)
	}
	return list
}

func writeCorpus(t testing.TB, path string, list []sample) {
	t.Helper()
	var b strings.Builder
	for _, s := range list {
		fmt.Fprintf(&b, "%s%s\n----\n%s\n====\n", s.remarks, s.text, s.want)
	}
	if err := os.WriteFile(path, []byte(b.String()), 0o644); err != nil {
		t.Fatal(err)
	}
}

// runCorpus compares every sample of the files that match with what f makes of it.
func runCorpus(t *testing.T, pattern string, f func(t *testing.T, text string) string) {
	t.Helper()
	paths, err := filepath.Glob(filepath.Join("testdata", pattern))
	if err != nil || len(paths) == 0 {
		t.Fatalf("no corpus files %s: %v", pattern, err)
	}
	for _, path := range paths {
		list := readCorpus(t, path)
		for i := range list {
			got := f(t, list[i].text)
			if *update {
				list[i].want = got
			} else if got != list[i].want {
				t.Errorf("%s:\n%s\ngives\n%s\nand not\n%s", path, list[i].text, got, list[i].want)
			}
		}
		if *update {
			writeCorpus(t, path, list)
		}
	}
}

func TestTrees(t *testing.T) {
	runCorpus(t, "tree_*.txt", func(t *testing.T, text string) string {
		list, fault := Parse(text, testLexicon)
		if fault != nil {
			t.Errorf("%s: %v", text, fault)
			return showFault(text, fault)
		}
		checkSpans(t, text, list)
		return sexprs(list)
	})
}

func TestFaults(t *testing.T) {
	runCorpus(t, "fault_*.txt", func(t *testing.T, text string) string {
		text, err := unescapeBytes(text)
		if err != nil {
			t.Fatal(err)
		}
		list, fault := Parse(text, testLexicon)
		if fault == nil {
			t.Errorf("%s is no fault", text)
			return sexprs(list)
		}
		return showFault(text, fault)
	})
}

// unescapeBytes lets a corpus file hold bytes that are not UTF-8: \xNN.
func unescapeBytes(text string) (string, error) {
	for {
		before, after, ok := strings.Cut(text, `\x`)
		if !ok {
			return text, nil
		}
		var b byte
		if _, err := fmt.Sscanf(after[:2], "%02x", &b); err != nil {
			return "", err
		}
		text = before + string([]byte{b}) + after[2:]
	}
}

// showFault writes a fault as a user might see it: the line with the place
// marked, what is wrong, and the way out.
func showFault(text string, fault *Error) string {
	begin := strings.LastIndexByte(text[:fault.At.Start], '\n') + 1
	line, _, _ := strings.Cut(text[begin:], "\n")
	width := max(1, len([]rune(text[fault.At.Start:min(fault.At.End, begin+len(line))])))
	incomplete := ""
	if fault.Incomplete {
		incomplete = " (incomplete)"
	}
	return fmt.Sprintf("    %s\n    %s%s\n%s%s\n%s", strings.ToValidUTF8(line, "?"),
		strings.Repeat(" ", len([]rune(text[begin:fault.At.Start]))), strings.Repeat("^", width),
		fault.Reason, incomplete, fault.Remedy)
}

// checkSpans checks that the spans of a tree lie inside one another and that
// the text of each statement's span parses to the same statement.
func checkSpans(t *testing.T, text string, list []Stmt) {
	t.Helper()
	for _, s := range list {
		part := text[s.Span().Start:s.Span().End]
		again, fault := Parse(part, testLexicon)
		if fault != nil || len(again) != 1 || sexpr(again[0]) != sexpr(s) {
			t.Errorf("the span of a statement of %q is %q", text, part)
		}
	}
}
