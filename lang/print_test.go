package lang

import (
	"path/filepath"
	"strings"
	"testing"
)

func printAll(list []Stmt) string {
	lines := make([]string, len(list))
	for i, s := range list {
		lines[i] = Print(s)
	}
	return strings.Join(lines, "\n")
}

func TestPrint(t *testing.T) {
	runCorpus(t, "print.txt", func(t *testing.T, text string) string {
		list, fault := Parse(text, testLexicon)
		if fault != nil {
			t.Fatalf("%s: %v", text, fault)
		}
		return printAll(list)
	})
}

// checkRoundTrip checks that what was parsed from text prints to something
// that parses to the same tree and prints to itself.
func checkRoundTrip(t *testing.T, text string, list []Stmt) {
	t.Helper()
	printed := printAll(list)
	again, fault := Parse(printed, testLexicon)
	if fault != nil {
		t.Fatalf("%q prints as\n%q,\nwhich does not parse: %v", text, printed, fault)
	}
	if a, b := sexprs(list), sexprs(again); a != b {
		t.Fatalf("%q prints as\n%q:\n%s\nis read back as\n%s", text, printed, a, b)
	}
	if twice := printAll(again); twice != printed {
		t.Fatalf("%q prints as\n%q\nand then as\n%q", text, printed, twice)
	}
}

func TestPrintOfTheCorpusParsesBack(t *testing.T) {
	for _, pattern := range []string{"tree_*.txt", "print.txt"} {
		paths, err := filepath.Glob(filepath.Join("testdata", pattern))
		if err != nil || len(paths) == 0 {
			t.Fatal(pattern, err)
		}
		for _, path := range paths {
			for _, s := range readCorpus(t, path) {
				list, fault := Parse(s.text, testLexicon)
				if fault != nil {
					t.Fatalf("%s: %s: %v", path, s.text, fault)
				}
				checkRoundTrip(t, s.text, list)
			}
		}
	}
}
