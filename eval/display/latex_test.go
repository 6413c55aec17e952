package display

import (
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
)

// compiles runs pdfLaTeX on a document. ADJOIN_REQUIRE=all turns a missing
// pdfLaTeX into a failure.
func compiles(t *testing.T, preamble, body string) {
	t.Helper()
	if _, err := exec.LookPath("pdflatex"); err != nil {
		if os.Getenv("ADJOIN_REQUIRE") == "all" {
			t.Fatal("pdflatex is required and not installed")
		}
		t.Skip("pdflatex is not installed")
	}
	dir := t.TempDir()
	text := preamble + "\n\\begin{document}\n" + body + "\n\\end{document}\n"
	if err := os.WriteFile(filepath.Join(dir, "a.tex"), []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
	cmd := exec.Command("pdflatex", "-interaction=nonstopmode", "-halt-on-error", "a.tex")
	cmd.Dir = dir
	if out, err := cmd.CombinedOutput(); err != nil {
		t.Fatalf("%v\n%s\n%s", err, out, text)
	}
}

// The packages are those that a printed notebook loads.
const printedNotebook = `\documentclass{article}
\usepackage[T1]{fontenc}\usepackage[utf8]{inputenc}
\usepackage{amsmath,amssymb,longtable,booktabs,array}`

func TestLaTeXCompiles(t *testing.T) {
	awkward := subfieldTable()
	for _, s := range nasty {
		awkward.Rows = append(awkward.Rows, []Cell{{Text: s}, {Text: s, TeX: "$"}, {Text: "[" + s}, {Text: "*"}})
	}
	squares := numbered(100)
	squares.Total = 100
	middle := numbered(50)
	middle.Caption, middle.Note = "Squares of n_i", "x^2 = x in F_2"
	long := make([]string, 901)
	for i := range long {
		long[i] = "x^{1}"
	}
	parts := []string{
		subfieldTable().LaTeX(), awkward.LaTeX(), squares.LaTeX(), middle.LaTeX(), Table{}.LaTeX(),
		irreducible().LaTeX(), irreducible().Table().LaTeX(),
		Formula{TeX: `x^{2}+x+1`}.LaTeX(), Formula{TeX: strings.Join(long[:20], " + ")}.LaTeX(), Formula{TeX: strings.Join(long, " + ")}.LaTeX(),
		Matrix{Rows: [][]Cell{{{"1", "1"}, {"F_{2^12}", ""}}, {{"0", "0"}}}}.LaTeX(), Matrix{}.LaTeX(),
		Sequence{"{", "}", []Cell{{"a", "a"}, {"b^2", ""}}, 50}.LaTeX(),
	}
	compiles(t, printedNotebook, strings.Join(parts, "\n\n"))
}

func TestTikZCompiles(t *testing.T) {
	compiles(t, `\documentclass{article}\usepackage{tikz}`, divisorLattice(60).TikZ())
	d := Diagram{Title: "a % b\nc", Nodes: []Node{{ID: "1", Label: "K = Q(zeta_7)"}, {ID: "2", Label: "50% & #1", Sub: "x |-> x^{2}", Rank: 3}, {ID: "3", Label: "∘ 漢", Rank: 1}}, Edges: []Edge{{"1", "2", "6"}, {"1", "3", ""}, {"3", "2", "_"}}}
	compiles(t, `\documentclass{article}\usepackage[T1]{fontenc}\usepackage{tikz,amsmath,amssymb}`, d.TikZ())
}
